//! Errors of the core rooms as problems with place, found, expected and mend.

use crate::response::Problem;
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_findings::compiled::ChangeProblem;
use leeway_gas::intake::GasProblem;
use leeway_line::FileError;
use leeway_reactions::{EquationError, ReactionError};
use leeway_substances::{Book, DataError, LookupError};

/// A problem from a sentence of the form `found F, expected E`.
pub(crate) fn from_text(code: &str, at: String, place: String, message: String, hints: Vec<String>) -> Problem {
    let (found, expected) = message.split_once(", expected ").map_or((message.clone(), String::new()), |(f, e)| {
        (f.rsplit_once("found ").map_or(f, |(_, f)| f).to_string(), e.to_string())
    });
    Problem { code: code.to_string(), at, place, message, found, expected, hints, more: Vec::new() }
}

pub(crate) fn data(error: &DataError) -> Problem {
    from_text(
        "data.line",
        String::new(),
        alloc::format!("data file, line {}", error.line),
        error.to_string(),
        Vec::new(),
    )
}

pub(crate) fn file(error: FileError) -> Problem {
    Problem {
        code: error.code.to_string(),
        at: error.at,
        place: error.place,
        message: error.message,
        found: error.found,
        expected: error.expected,
        hints: error.hints,
        more: error.more.into_iter().map(file).collect(),
    }
}

pub(crate) fn gas(error: &GasProblem, zone: usize, name: &str) -> Problem {
    let hints = match error {
        GasProblem::Sum { balance: false, percent, .. } if *percent < 100.0 => {
            alloc::vec!["Name the balance gas, or give the missing component".to_string()]
        }
        GasProblem::Sum { .. } => alloc::vec!["Check which channel reads dry and which wet, and the units".to_string()],
        GasProblem::NoBasis { .. } => alloc::vec![
            "Say \u{201c}basis\u{201d}: \u{201c}dry\u{201d} for a gas cooled and dried before the analyser".to_string()
        ],
        GasProblem::DewPoint { .. } | GasProblem::AllWater { .. } => {
            alloc::vec!["Check the sign and the unit of the dew point, or give the water as a share".to_string()]
        }
        _ => Vec::new(),
    };
    from_text(
        "gas",
        alloc::format!("zones[{zone}].gas"),
        alloc::format!("zone {}, {name}", zone + 1),
        error.to_string(),
        hints,
    )
}

pub(crate) fn change(book: &Book, error: &ChangeProblem, index: usize, name: &str) -> Problem {
    let at = alloc::format!("changes[{index}].equation");
    let place = alloc::format!("change {}, {name}", index + 1);
    match error {
        ChangeProblem::Equation(e) => equation(e, at, place),
        ChangeProblem::Reaction(e) => reaction(book, e, at, place),
        other => from_text("change", at, place, other.to_string(), Vec::new()),
    }
}

pub(crate) fn equation(error: &EquationError, at: String, place: String) -> Problem {
    let (code, hints) = match error {
        EquationError::TooLong { .. } => ("equation.long", Vec::new()),
        EquationError::Sides { .. } => ("equation.sides", alloc::vec!["Write it as 2 Cr + 1.5 O2 = Cr2O3".to_string()]),
        EquationError::Species { .. } => ("equation.formula", Vec::new()),
        EquationError::Coefficient { .. } => ("equation.coefficient", Vec::new()),
        EquationError::Unbalanced { balanced, .. } => {
            let ready =
                balanced.clone().unwrap_or_else(|| "Leave all coefficients out to have it balanced".to_string());
            ("equation.unbalanced", alloc::vec![ready])
        }
        EquationError::Unbalanceable { .. } => ("equation.unbalanceable", Vec::new()),
        EquationError::Ambiguous { ways } => ("equation.ambiguous", ways.clone()),
        EquationError::Sum { .. } => ("equation.sum", alloc::vec!["Write a sum as 2*(A = B) - (C = D)".to_string()]),
        _ => ("equation.nothing", Vec::new()),
    };
    // The whole equation names the place where it was typed alone; a long one is told apart by its head.
    let at = if at.chars().count() > 120 { at.chars().take(119).chain(['\u{2026}']).collect() } else { at };
    let mut problem = from_text(code, at, place, error.to_string(), hints);
    match error {
        EquationError::Unbalanced { .. } => {
            problem.expected = "the same number of each element on both sides".to_string()
        }
        EquationError::Unbalanceable { .. } => {
            problem.expected = "an equation that some coefficients balance".to_string()
        }
        EquationError::Ambiguous { .. } => {
            problem.expected = "one balance; give the coefficients, or leave a substance out".to_string()
        }
        _ => {}
    }
    problem
}

pub(crate) fn reaction(book: &Book, error: &ReactionError, at: String, place: String) -> Problem {
    match error {
        ReactionError::Lookup(e) => lookup(book, e, at, place),
        other => from_text("reaction", at, place, other.to_string(), Vec::new()),
    }
}

pub(crate) fn lookup(book: &Book, error: &LookupError, at: String, place: String) -> Problem {
    let (code, found, expected, hints) = match error {
        LookupError::NoSubstance { formula } => {
            ("data.substance", formula.clone(), "a substance the data hold".to_string(), near(book, formula))
        }
        LookupError::NoPhase { asked, held, .. } => ("data.phase", asked.clone(), held.clone(), Vec::new()),
        LookupError::OutOfRange { asked_k, low_k, high_k, .. } => {
            ("data.range", alloc::format!("{asked_k:.1} K"), alloc::format!("{low_k} to {high_k} K"), Vec::new())
        }
        _ => ("data", String::new(), String::new(), Vec::new()),
    };
    Problem { code: code.to_string(), at, place, message: error.to_string(), found, expected, hints, more: Vec::new() }
}

/// Substances of the same elements, at most four: what may have been meant.
fn near(book: &Book, formula: &str) -> Vec<String> {
    let text = |s: &leeway_substances::Substance| s.formula.text().to_string();
    let Ok(asked) = leeway_substances::Formula::parse(formula) else {
        // Typed without capitals.
        let small = formula.to_lowercase();
        return book.substances.iter().map(text).filter(|f| f.to_lowercase() == small).take(4).collect();
    };
    book.substances.iter().filter(|s| s.formula.counts().keys().eq(asked.counts().keys())).map(text).take(4).collect()
}
