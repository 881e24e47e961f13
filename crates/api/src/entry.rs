//! What was typed into a field, as the line file writes it, read back in full with its consequence.

use crate::request::EntryRequest;
use crate::response::{Entry, Problem};
use crate::{problem, words};
use alloc::string::{String, ToString};
use leeway_gas::humidity::{frost_point_k, saturation_pressure_bar};
use leeway_gas::reading::Surface;
use leeway_quantity::entry::{EntryError, Share, Typed, number, parse_of};
use leeway_quantity::{Kind, Unit};
use serde_json::json;

/// Understands a typed entry.
pub(crate) fn read_entry(request: &EntryRequest) -> Result<Entry, Problem> {
    let fail = |e: &EntryError| {
        let place = alloc::format!("character {}", e.column);
        problem::from_text("entry", request.field.clone(), place, e.to_string(), e.hints())
    };
    let unit = leeway_quantity::entry::unit(&request.unit);
    let field = request.field.as_str();
    let kind = match field {
        "temperature" | "leaving" | "acts_above" | "dew_point" => Kind::Temperature,
        "pressure" => Kind::Pressure,
        "rate" => Kind::Rate,
        "allowed" => Kind::Time,
        "oxygen_cell" => Kind::Voltage,
        "gas" | "share_wt" => Kind::Fraction,
        "tolerance" | "number" | "activity" | "activity_coefficient" => {
            let value = number(&request.text).map_err(|e| fail(&e))?;
            return plain(field, value);
        }
        other => {
            let message = alloc::format!("found the field \u{201c}{other}\u{201d}, expected a field of the line");
            let place = "the field".to_string();
            return Err(problem::from_text("entry.field", other.to_string(), place, message, alloc::vec![]));
        }
    };
    let default = unit.filter(|u| u.kind() == kind).or(unit.filter(|_| field == "gas")).unwrap_or(match kind {
        Kind::Temperature => Unit::Celsius,
        Kind::Pressure => Unit::Bar,
        Kind::Rate => Unit::KelvinPerSecond,
        Kind::Time => Unit::Second,
        Kind::Voltage => Unit::Millivolt,
        Kind::Fraction => Unit::Percent,
    });
    // A dew point may be typed as water in the gas, and a share as a partial pressure.
    let kinds: &[Kind] = match field {
        "dew_point" => &[Kind::Temperature, Kind::Fraction, Kind::Pressure],
        "gas" => &[Kind::Fraction, Kind::Pressure],
        _ => &[kind],
    };
    let typed = parse_of(&request.text, kinds, default).map_err(|e| fail(&e))?;
    if typed.bound && field != "gas" {
        let message = "found \u{201c}<\u{201d}, expected a reading; only a gas can stand at its detection limit";
        return Err(problem::from_text(
            "entry.bound",
            field.to_string(),
            "character 1".to_string(),
            message.to_string(),
            alloc::vec![],
        ));
    }
    let meant = match (field, typed.share) {
        ("gas" | "dew_point", Some(Share::Mass)) => Some(("a share by mass", "a share by volume: %, ppm, ppb")),
        ("share_wt", Some(Share::Volume)) => Some(("a share by volume", "a share by mass: %, ppm, ppb")),
        _ => None,
    };
    if let Some((found, expected)) = meant {
        return Err(problem::from_text(
            "entry.share",
            field.to_string(),
            "the unit".to_string(),
            alloc::format!("found {found}, expected {expected}"),
            alloc::vec![],
        ));
    }
    if field == "pressure" && typed.quantity.value <= 0.0 {
        let message = alloc::format!(
            "found {} {}, expected an absolute pressure above 0",
            typed.quantity.given,
            typed.quantity.unit.symbol()
        );
        return Err(problem::from_text(
            "entry.value",
            field.to_string(),
            "the number".to_string(),
            message,
            alloc::vec![],
        ));
    }
    Ok(quantity(request, &typed, field))
}

fn plain(field: &str, value: f64) -> Result<Entry, Problem> {
    let expected = match field {
        "tolerance" if value < 0.0 => Some("a tolerance of 0 or more"),
        "activity" | "activity_coefficient" if value <= 0.0 => Some("a number above 0"),
        "activity" if value > 1000.0 => Some("an activity of at most 1000"),
        _ => None,
    };
    if let Some(expected) = expected {
        let message = alloc::format!("found {value}, expected {expected}");
        return Err(problem::from_text(
            "entry.value",
            field.to_string(),
            "the number".to_string(),
            message,
            alloc::vec![],
        ));
    }
    Ok(Entry {
        quantity: json!(value),
        field: field.to_string(),
        read_back: words::number(value, 6),
        consequence: String::new(),
    })
}

fn quantity(request: &EntryRequest, typed: &Typed, asked: &str) -> Entry {
    let q = &typed.quantity;
    let is_dew = asked == "dew_point" && q.unit.kind() == Kind::Temperature;
    let field = if asked == "dew_point" && !is_dew { "H2O" } else { asked };
    let mut value = json!({ "value": q.given, "unit": q.unit.symbol() });
    // A kept tolerance is in steps of the unit asked for: it holds where the size of the step is the same.
    let same_step = leeway_quantity::entry::unit(&request.unit).is_some_and(|u| u.kind() == q.unit.kind());
    let kept = request.tolerance.filter(|_| same_step).map(|t| {
        let asked_step = leeway_quantity::entry::unit(&request.unit).map_or(1.0, Unit::step);
        t * asked_step / q.unit.step()
    });
    let tolerance = q.tolerance.map(|(t, _)| t).or(kept);
    if let Some(t) = tolerance {
        value["tolerance"] = json!(t);
    }
    if typed.bound {
        value["bound"] = json!("upper");
    }
    if field == "H2O" {
        value["basis"] = json!("wet");
    }
    let over = match typed.over.unwrap_or(request.over.as_str()) {
        "water" => Surface::Water,
        "ice" => Surface::Ice,
        _ if q.value < 273.15 => Surface::Ice,
        _ => Surface::Water,
    };
    // In full: all digits typed, never rounded.
    let unit = words::unit_text(q.unit);
    let mut read_back = words::number(q.given, 12);
    if !unit.is_empty() {
        read_back += &alloc::format!("{}{unit}", words::THIN);
    }
    if is_dew {
        value["over"] = json!(if over == Surface::Ice { "ice" } else { "water" });
        read_back += if over == Surface::Ice { " frost point, over ice" } else { " dew point, over water" };
    }
    if let Some(t) = tolerance {
        let unit = words::difference_unit(q.unit);
        read_back += &alloc::format!(" \u{b1} {}{}{unit}", words::number(t, 4), words::THIN);
    }
    if typed.bound {
        read_back += ", at its detection limit: an upper bound";
    }
    if field == "H2O" {
        read_back += " of water, wet";
    }
    let consequence = consequence(request, typed, is_dew, over, tolerance);
    Entry { quantity: value, field: field.to_string(), read_back, consequence }
}

/// What the entry means in the other currency: water in ppm for a dew point, a frost point for water.
fn consequence(request: &EntryRequest, typed: &Typed, is_dew: bool, over: Surface, tolerance: Option<f64>) -> String {
    let q = &typed.quantity;
    let Some(p) = request.pressure_bar.filter(|p| *p > 0.0) else { return String::new() };
    if is_dew {
        let share = |t: f64| saturation_pressure_bar(t, over).map(|e| e / p);
        let Some(middle) = share(q.value) else {
            return "a dew point is taken from \u{2212}100 to 100\u{2009}\u{b0}C".to_string();
        };
        if middle >= 1.0 {
            return alloc::format!("that is more water than gas at {}{}bar", words::number(p, 4), words::THIN);
        }
        let text = |x: f64| {
            if x < 1e-2 {
                alloc::format!("{}{}ppm", words::number(x * 1e6, 3), words::THIN)
            } else {
                alloc::format!("{}{}%", words::number(x * 100.0, 3), words::THIN)
            }
        };
        let around = tolerance
            .map(|t| t * q.unit.step())
            .and_then(|half| Some((share(q.value - half)?, share(q.value + half)?)))
            .map_or_else(String::new, |(low, high)| alloc::format!(" ({} to {})", text(low), text(high)));
        return alloc::format!("{} H2O at {}{}bar{around}", text(middle), words::number(p, 4), words::THIN);
    }
    if request.field == "dew_point" {
        let bar = if q.unit.kind() == Kind::Pressure { q.value } else { q.value * p };
        return frost_point_k(bar, Surface::Ice).map_or_else(String::new, |t| {
            alloc::format!("frost point {} at {}{}bar", words::celsius(t), words::number(p, 4), words::THIN)
        });
    }
    String::new()
}
