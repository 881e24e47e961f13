//! Figures and sentences for people, the same in the page and in the shell.
//!
//! Leeways are rounded against the user (towards the turning point); readings keep the digits they were
//! given; every figure has its unit. Plain text with proper signs: U+2212 for minus, a thin space before a unit.

use alloc::string::{String, ToString};
use leeway_findings::lever::{Lever, What};
use leeway_gas::reading::Surface;
use leeway_quantity::math::{exp10, floor, log10};
use leeway_quantity::{Kind, Unit};

/// Thin space.
pub(crate) const THIN: char = '\u{2009}';

fn minus(text: &str) -> String {
    text.replacen('-', "\u{2212}", 1)
}

/// A number with at most `digits` significant digits, without trailing zeros.
pub(crate) fn number(x: f64, digits: i32) -> String {
    if x == 0.0 {
        return "0".to_string();
    }
    if !x.is_finite() {
        return "\u{2013}".to_string();
    }
    let magnitude = floor(log10(x.abs()));
    if !(-4.0..6.0).contains(&magnitude) {
        let mantissa = x / exp10(magnitude);
        return alloc::format!(
            "{} \u{d7} 10^{}",
            minus(&trim(&alloc::format!("{mantissa:.*}", places(digits - 1)))),
            minus(&alloc::format!("{magnitude}"))
        );
    }
    #[expect(clippy::cast_possible_truncation, reason = "a magnitude of at most 6")]
    let decimals = (digits - 1 - magnitude as i32).max(0);
    minus(&trim(&alloc::format!("{x:.*}", places(decimals))))
}

fn places(n: i32) -> usize {
    usize::try_from(n).unwrap_or(0)
}

fn trim(text: &str) -> String {
    if text.contains('.') { text.trim_end_matches('0').trim_end_matches('.').to_string() } else { text.to_string() }
}

/// A value with its unit as people write it.
pub(crate) fn value(x: f64, unit: Unit) -> String {
    let digits = match unit.kind() {
        Kind::Temperature => 5,
        _ => 4,
    };
    let rounded = if unit.kind() == Kind::Temperature { leeway_quantity::math::round(x * 10.0) / 10.0 } else { x };
    alloc::format!("{}{THIN}{}", number(rounded, digits), unit_text(unit))
}

/// A unit as people write it.
pub(crate) fn unit_text(unit: Unit) -> &'static str {
    match unit {
        Unit::Celsius => "\u{b0}C",
        Unit::Fahrenheit => "\u{b0}F",
        Unit::Fraction => "",
        other => other.symbol(),
    }
}

/// Unit of a difference: a leeway of a temperature is in kelvin or Fahrenheit degrees.
pub(crate) fn difference_unit(unit: Unit) -> &'static str {
    match unit {
        Unit::Celsius | Unit::Kelvin => "K",
        Unit::Fahrenheit => "F degrees",
        other => unit_text(other),
    }
}

/// A leeway without its sign, rounded towards the turning point: to 0.1 of a degree, else to two digits.
pub(crate) fn leeway(x: f64, unit: Unit) -> String {
    let size = x.abs();
    let step = if unit.kind() == Kind::Temperature {
        if size < 100.0 { 0.1 } else { 1.0 }
    } else if size > 0.0 {
        exp10(floor(log10(size)) - 1.0)
    } else {
        1.0
    };
    // Towards the line: less leeway on side, more lack of it off side.
    let steps = if x >= 0.0 { floor(size / step + 1e-9) } else { leeway_quantity::math::ceil(size / step - 1e-9) };
    let unit = difference_unit(unit);
    let gap = if unit.is_empty() { String::new() } else { alloc::format!("{THIN}{unit}") };
    alloc::format!("{}{gap}", number(steps * step, 4))
}

/// Name of a lever for people.
pub(crate) fn lever_label(lever: &What, surface: Option<Surface>) -> String {
    match lever {
        What::Temperature => "Temperature".to_string(),
        What::Pressure => "Pressure".to_string(),
        What::DewPoint(_) if surface == Some(Surface::Ice) => "Frost point".to_string(),
        What::DewPoint(_) => "Dew point".to_string(),
        What::Gas(_, f) => alloc::format!("{f} share"),
        What::Activity(_, f) => alloc::format!("{f} activity"),
        What::Rate => "Rate".to_string(),
    }
}

/// `too wet`, `too cold`: what a reading past its turning point is.
pub(crate) fn too(lever: &Lever, fails_above: bool) -> &'static str {
    match (&lever.what, fails_above) {
        (What::DewPoint(_), true) => "too wet",
        (What::DewPoint(_), false) => "too dry",
        (What::Temperature, true) => "too hot",
        (What::Temperature, false) => "too cold",
        (_, true) => "too high",
        (_, false) => "too low",
    }
}

/// A list in words: `a`, `a and b`, `a, b and c`.
pub(crate) fn list(items: &[String]) -> String {
    match items {
        [] => String::new(),
        [one] => one.clone(),
        [most @ .., last] => alloc::format!("{} and {last}", most.join(", ")),
    }
}

/// The first letter made small, unless the word is a formula or an abbreviation.
pub(crate) fn lower_first(text: &str) -> String {
    let mut chars = text.chars();
    match (chars.next(), chars.next()) {
        (Some(a), Some(b))
            if a.is_uppercase() && b.is_lowercase() && text.split(' ').next().is_none_or(|w| w.len() > 2) =>
        {
            a.to_lowercase().chain(text.chars().skip(1)).collect()
        }
        _ => text.to_string(),
    }
}

/// A temperature in kelvin as degrees Celsius for a sentence.
pub(crate) fn celsius(t_k: f64) -> String {
    value(Unit::Celsius.from_internal(t_k), Unit::Celsius)
}
