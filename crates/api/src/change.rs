//! One reaction at given temperatures: `leeway change`.

use crate::request::ChangeRequest;
use crate::response::{Problem, Reaction, Used};
use crate::{problem, words};
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_quantity::constants::{GAS_CONSTANT, KJ_PER_J, REFERENCE_TEMPERATURE_K};
use leeway_quantity::entry;
use leeway_quantity::math::{ln, sqrt};
use leeway_quantity::{Kind, Unit};
use leeway_reactions::{Equation, Reaction as Joined};
use leeway_substances::{Book, Class, Species};

const LN_10: f64 = core::f64::consts::LN_10;

/// Evaluates a reaction at every temperature asked for.
pub(crate) fn change(book: &Book, request: &ChangeRequest) -> Result<Vec<Reaction>, Problem> {
    let place = || String::from("equation");
    let equation =
        Equation::parse(&request.equation).map_err(|e| problem::equation(&e, request.equation.clone(), place()))?;
    let joined = match (&request.dh, &request.ds) {
        (None, None) => {
            Joined::new(book, &equation).map_err(|e| problem::reaction(book, &e, request.equation.clone(), place()))?
        }
        (Some(dh), Some(ds)) => Joined::from_constants(
            &equation,
            energy(dh, "dh", &[("kJ", 1.0), ("kJ/mol", 1.0), ("J", 1e-3), ("J/mol", 1e-3)])?,
            energy(ds, "ds", &[("J/K", 1.0), ("J/(mol K)", 1.0), ("kJ/K", 1e3), ("kJ/(mol K)", 1e3)])?,
        ),
        _ => {
            return Err(Problem {
                code: "change.constants".to_string(),
                at: String::new(),
                place: "dh and ds".to_string(),
                message: "found one of dh and ds, expected both or neither".to_string(),
                found: "one of dh and ds".to_string(),
                expected: "both or neither".to_string(),
                hints: Vec::new(),
                more: Vec::new(),
            });
        }
    };
    let mut activities: Vec<(String, f64)> = Vec::new();
    for text in &request.activities {
        activities.push(activity(text, &equation)?);
    }
    let value_of =
        |u: &str, formula: &str| activities.iter().find(|(f, _)| f == u || f == formula).map_or(1.0, |(_, a)| *a);
    let ln_q: f64 = equation
        .terms
        .iter()
        .map(|t| {
            let n = num_traits::ToPrimitive::to_f64(&t.coefficient).unwrap_or(f64::NAN);
            n * ln(value_of(&t.species.text(), t.species.formula.text()))
        })
        .sum();
    let crossings = joined.turning(book, ln_q, 0.0);
    let range = joined.range_k();
    let mut at: Vec<f64> = Vec::new();
    for text in &request.at {
        let typed = entry::parse(text, Kind::Temperature, Unit::Celsius).map_err(|e| {
            problem::from_text("number", text.clone(), String::from("temperature"), e.to_string(), e.hints())
        })?;
        at.push(typed.quantity.value);
    }
    if at.is_empty() {
        at.push(REFERENCE_TEMPERATURE_K);
    }
    at.into_iter()
        .map(|t| {
            let chosen = joined
                .choose(book, t)
                .map_err(|e| problem::lookup(book, &e, words::celsius(t), String::from("temperature")))?;
            let sum = joined.sum(t, &chosen);
            let rt = GAS_CONSTANT * KJ_PER_J * t;
            let (u_dh, u_ds) = joined.u_dh_ds(book, &chosen);
            let u_dg = sqrt(joined.data_doubt(book, t, &chosen).iter().fold(0.0, |sum, (_, c)| sum + c * c));
            let used: Vec<Used> = joined
                .used
                .iter()
                .zip(&chosen)
                .map(|(u, c)| {
                    let record = &book.substances[c.substance].records[c.record];
                    let phase = &record.phases[c.phase];
                    let source = &book.sources[record.source];
                    let activity = value_of(&u.text, &u.formula);
                    Used {
                        formula: u.formula.clone(),
                        phase: phase.name.clone(),
                        state: phase.state.letter().to_string(),
                        coefficient: u.nu,
                        activity,
                        activity_from: String::from(if activity == 1.0 { "standard" } else { "given" }),
                        source: source.short.clone(),
                        cite: source.cite.clone(),
                        u_kj: record.u_g_kj(t),
                        extrapolated: c.extrapolated,
                    }
                })
                .collect();
            let mut notes = joined.notes.clone();
            for u in joined.used.iter().filter(|u| u.either && u.class == Class::Gas) {
                let f = &u.formula;
                notes.push(alloc::format!("{f} is read as gas; write {f}(l) or {f}(s) for the other"));
            }
            for u in used.iter().filter(|u| u.extrapolated) {
                notes.push(alloc::format!("{} ({}) is carried beyond its fitted range", u.formula, u.phase));
            }
            let (low, high) = range.unwrap_or((t, t));
            let goes_k = goes(&joined, book, ln_q, &crossings.iter().map(|c| c.at).collect::<Vec<_>>(), low, high);
            Ok(Reaction {
                equation: equation.text(),
                temperature_k: t,
                dh_kj: sum.dh_kj,
                u_dh_kj: u_dh,
                ds_j_per_k: sum.ds_j_per_k,
                u_ds_j_per_k: u_ds,
                dg_kj: sum.dg_kj + rt * ln_q,
                u_dg_kj: u_dg,
                dg0_kj: sum.dg_kj,
                log10_k: -sum.dg_kj / (rt * LN_10),
                u_log10_k: u_dg / (rt * LN_10),
                phases: used.iter().map(|u| (u.formula.clone(), u.phase.clone())).collect(),
                turning_temperatures_k: crossings.iter().map(|c| c.at).collect(),
                goes: goes_text(&goes_k, low, high),
                goes_k,
                data_k: [low, high],
                used,
                notes,
            })
        })
        .collect()
}

/// Ranges between crossings in which dG is below zero.
fn goes(joined: &Joined, book: &Book, ln_q: f64, crossings: &[f64], low: f64, high: f64) -> Vec<[f64; 2]> {
    let mut marks = alloc::vec![low];
    marks.extend_from_slice(crossings);
    marks.push(high);
    let mut ranges: Vec<[f64; 2]> = Vec::new();
    for pair in marks.windows(2) {
        let middle = 0.5 * (pair[0] + pair[1]);
        let rt = GAS_CONSTANT * KJ_PER_J * middle;
        if joined.at(book, middle).is_ok_and(|s| s.dg_kj + rt * ln_q < 0.0) {
            match ranges.last_mut() {
                Some(last) if last[1] == pair[0] => last[1] = pair[1],
                _ => ranges.push([pair[0], pair[1]]),
            }
        }
    }
    ranges
}

fn goes_text(ranges: &[[f64; 2]], low: f64, high: f64) -> String {
    match ranges {
        [] => "never".to_string(),
        [[a, b]] if *a <= low && *b >= high => "always".to_string(),
        ranges => {
            let parts: Vec<String> = ranges
                .iter()
                .map(|[a, b]| {
                    if *a <= low {
                        alloc::format!("below {}", words::celsius(*b))
                    } else if *b >= high {
                        alloc::format!("above {}", words::celsius(*a))
                    } else {
                        alloc::format!("between {} and {}", words::celsius(*a), words::celsius(*b))
                    }
                })
                .collect();
            words::list(&parts)
        }
    }
}

/// `H2O=0.01`: an activity, or a partial pressure in bar.
fn activity(text: &str, equation: &Equation) -> Result<(String, f64), Problem> {
    let fail = |found: String, expected: &str| {
        let message = alloc::format!("found {found}, expected {expected}");
        problem::from_text("activity", text.to_string(), String::from("activity"), message, Vec::new())
    };
    let (name, value) = text
        .split_once('=')
        .ok_or_else(|| fail(alloc::format!("\u{201c}{text}\u{201d}"), "FORMULA=VALUE, for example H2O=0.01"))?;
    let name = name.trim();
    let species = Species::parse(name).map_err(|_| {
        let found =
            if name.is_empty() { "nothing before the =".to_string() } else { alloc::format!("\u{201c}{name}\u{201d}") };
        fail(found, &alloc::format!("a substance of {}", equation.text()))
    })?;
    let known =
        equation.terms.iter().any(|t| t.species.text() == species.text() || t.species.formula.text() == species.text());
    if !known {
        return Err(fail(name.to_string(), &alloc::format!("a substance of {}", equation.text())));
    }
    let value = entry::number(value).map_err(|e| {
        let ready = e.hints().into_iter().map(|h| alloc::format!("{name}={h}")).collect();
        problem::from_text("activity", text.to_string(), String::from("activity"), e.to_string(), ready)
    })?;
    if !(value.is_finite() && value > 0.0) {
        return Err(fail(alloc::format!("{value}"), "an activity above 0, or a partial pressure in bar above 0"));
    }
    Ok((species.text(), value))
}

/// A constant with its unit.
fn energy(text: &str, name: &str, units: &[(&str, f64)]) -> Result<f64, Problem> {
    let fail = |found: String| {
        let expected: Vec<&str> = units.iter().map(|(u, _)| *u).collect();
        let message = alloc::format!("found {found}, expected a number with its unit: {}", expected.join(", "));
        problem::from_text("change.constants", text.to_string(), name.to_string(), message, Vec::new())
    };
    let text = text.trim();
    let split = text
        .find(|c: char| c.is_alphabetic() && c != 'e' && c != 'E')
        .ok_or_else(|| fail(alloc::format!("\u{201c}{text}\u{201d} without a unit")))?;
    let (number, unit) = (text[..split].trim(), text[split..].trim());
    let factor = units
        .iter()
        .find(|(u, _)| *u == unit)
        .map(|(_, f)| *f)
        .ok_or_else(|| fail(alloc::format!("the unit \u{201c}{unit}\u{201d}")))?;
    let value = entry::number(number).map_err(|_| fail(alloc::format!("\u{201c}{number}\u{201d}")))?;
    Ok(value * factor)
}
