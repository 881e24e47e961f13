//! Limits of error of thermocouples by class (IEC 60584-1:2013, table 12, from public tabulations of it).
//!
//! The class holds for new wire; drift, leads and the cold end come on top.

use crate::constants::ZERO_CELSIUS_K;
use alloc::format;
use alloc::string::{String, ToString};

/// Why an instrument's limits are not known.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
#[error("found {found}, expected {expected}")]
pub struct InstrumentError {
    /// What was found.
    pub found: String,
    /// What was expected.
    pub expected: String,
}

/// Half-width of the limits of error, K, of a thermocouple such as `type K class 1` at `t_k`.
///
/// # Errors
/// [`InstrumentError`] where the type or class is not in the table, or the temperature is outside its range.
///
/// ```
/// use leeway_quantity::instrument::limits_k;
/// assert!((limits_k("type K class 1", 925.0 + 273.15).unwrap() - 3.7).abs() < 1e-9);
/// ```
pub fn limits_k(name: &str, t_k: f64) -> Result<f64, InstrumentError> {
    let lower = name.to_lowercase();
    let mut words = lower.split_whitespace();
    let (kind, class) = match (words.next(), words.next(), words.next(), words.next(), words.next()) {
        (Some("type"), Some(kind), Some("class"), Some(class), None) => (kind.to_string(), class.to_string()),
        _ => {
            return Err(InstrumentError {
                found: format!("\u{201c}{name}\u{201d}"),
                expected: "a thermocouple such as \u{201c}type K class 1\u{201d}".to_string(),
            });
        }
    };
    let t = t_k - ZERO_CELSIUS_K;
    // Greater of a fixed limit and a share of the temperature, within a range in C.
    let (fixed, share, low, high) = match (kind.as_str(), class.as_str()) {
        ("t", "1") => (0.5, 0.004, -40.0, 350.0),
        ("t", "2") => (1.0, 0.0075, -40.0, 350.0),
        ("t", "3") => (1.0, 0.015, -200.0, 40.0),
        ("e", "1") => (1.5, 0.004, -40.0, 800.0),
        ("e", "2") => (2.5, 0.0075, -40.0, 900.0),
        ("e", "3") => (2.5, 0.015, -200.0, 40.0),
        ("j", "1") => (1.5, 0.004, -40.0, 750.0),
        ("j", "2") => (2.5, 0.0075, -40.0, 750.0),
        ("k" | "n", "1") => (1.5, 0.004, -40.0, 1000.0),
        ("k" | "n", "2") => (2.5, 0.0075, -40.0, 1200.0),
        ("k" | "n", "3") => (2.5, 0.015, -200.0, 40.0),
        ("r" | "s", "1") => (1.0, 0.0, 0.0, 1600.0),
        ("r" | "s", "2") => (1.5, 0.0025, 0.0, 1600.0),
        ("b", "2") => (1.5, 0.0025, 600.0, 1700.0),
        ("b", "3") => (4.0, 0.005, 600.0, 1700.0),
        _ => {
            return Err(InstrumentError {
                found: format!("type {} class {class}", kind.to_uppercase()),
                expected: "types K, N, E, T of class 1 to 3, J, R, S of class 1 or 2, B of class 2 or 3".to_string(),
            });
        }
    };
    if !(low..=high).contains(&t) {
        return Err(InstrumentError {
            found: format!("type {} class {class} at {t:.0} C", kind.to_uppercase()),
            expected: format!("{low} to {high} C for that class"),
        });
    }
    if matches!((kind.as_str(), class.as_str()), ("r" | "s", "1")) {
        return Ok(if t < 1100.0 { fixed } else { fixed + 0.003 * (t - 1100.0) });
    }
    Ok((share * t.abs()).max(fixed))
}
