//! Activities of the charge.
//!
//! Elements of the charge form one alloy: mole fraction from mass shares, times an activity coefficient
//! (1 where none is given: Raoult's law). Compounds are phases of their own with activity 1, unless the
//! file gives another. Carbon dissolves between the atoms of the alloy, so Raoult's law would be far off:
//! its activity must be given.

use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_line::model::{Activity, Member};
use leeway_quantity::math::{ln, sqrt};
use leeway_substances::{Formula, Species};

/// Doubt of an activity by Raoult's law alone, limits as a factor up and down (common practice, no source).
pub const RAOULT_FACTOR: f64 = 2.0;
/// Doubt of a given coefficient or activity without a stated doubt (common practice, no source).
pub const GIVEN_FACTOR: f64 = 1.25;

/// How an activity came about.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum From {
    /// A substance of its own.
    Pure,
    /// Given in the line, as an activity.
    Given,
    /// Mole fraction times a given coefficient.
    Coefficient,
    /// Mole fraction alone.
    Raoult,
    /// Partial pressure of a gas given with the change.
    GivenPressure,
}

/// An activity with its doubt.
#[derive(Debug, Clone, PartialEq)]
pub struct Taken {
    /// The formula it is of.
    pub formula: String,
    /// The activity.
    pub value: f64,
    /// Half-width of its logarithm's limits of error.
    pub ln_half: f64,
    /// How it came about.
    pub from: From,
    /// Mole fraction in the alloy, where it has one.
    pub mole_fraction: Option<f64>,
    /// Source as the file gives it.
    pub source: Option<String>,
}

impl Taken {
    /// Standard uncertainty of ln a (rectangular limits).
    #[must_use]
    pub fn u_ln(&self) -> f64 {
        self.ln_half / sqrt(3.0)
    }
}

/// Why a member of the charge has no activity.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Missing {
    /// Carbon in an alloy needs its activity given.
    Carbon,
    /// An element without a mass share has no mole fraction.
    Share(String),
}

/// The charge with its mole fractions.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Charge {
    members: Vec<(String, Option<f64>, Option<Activity>)>,
    /// Elements among the members: together they are one alloy.
    elements: Vec<String>,
}

fn formula_of(text: &str) -> String {
    Species::parse(text).map_or_else(|_| text.to_string(), |s| s.formula.text().to_string())
}

impl Charge {
    /// Mole fractions of the alloy's elements from mass shares. Shares that do not add up to 100 % count by
    /// their ratio.
    #[must_use]
    pub fn new(members: &[Member]) -> Self {
        let moles: Vec<(String, Option<f64>)> = members
            .iter()
            .map(|m| {
                let formula = formula_of(&m.substance);
                let element = Formula::parse(&formula).ok().filter(|f| f.single_element().is_some());
                let n = element.and_then(|f| Some(m.share_wt.as_ref()?.value / f.molar_mass()));
                (formula, n)
            })
            .collect();
        let elements: Vec<String> = moles
            .iter()
            .map(|(f, _)| f)
            .filter(|f| Formula::parse(f).is_ok_and(|f| f.single_element().is_some()))
            .cloned()
            .collect();
        let total: f64 = moles.iter().filter_map(|(_, n)| *n).sum();
        let members = moles
            .into_iter()
            .zip(members)
            .map(|((formula, n), m)| (formula, n.filter(|_| total > 0.0).map(|n| n / total), m.activity.clone()))
            .collect();
        Self { members, elements }
    }

    /// Formulas of the charge, in the file's order.
    pub fn formulas(&self) -> impl Iterator<Item = &str> {
        self.members.iter().map(|(f, _, _)| f.as_str())
    }

    /// Activity of a condensed substance: what the change gives, else the charge, else a pure phase.
    ///
    /// # Errors
    /// [`Missing`] where the charge holds it without what its activity needs.
    pub fn of(&self, formula: &str, overrides: &[(String, Activity)]) -> Result<Taken, Missing> {
        let member = self.members.iter().find(|(f, _, _)| f == formula);
        let mole_fraction = member.and_then(|(_, x, _)| *x);
        let own = overrides.iter().find(|(f, _)| formula_of(f) == formula).map(|(_, a)| a);
        let given = own.or_else(|| member.and_then(|(_, _, a)| a.as_ref()));
        let taken = |value: f64, factor: f64, from: From, source: Option<String>| Taken {
            formula: formula.to_string(),
            value,
            ln_half: ln(factor),
            from,
            mole_fraction,
            source,
        };
        let needs_share = || Missing::Share(formula.to_string());
        match (given, member) {
            (Some(a), _) if a.is_coefficient => {
                let x = mole_fraction.ok_or_else(needs_share)?;
                Ok(taken(x * a.value, a.doubt_factor.unwrap_or(GIVEN_FACTOR), From::Coefficient, a.source.clone()))
            }
            (Some(a), _) => {
                let exact = a.value == 1.0 && a.doubt_factor.is_none();
                let factor = a.doubt_factor.unwrap_or(if exact { 1.0 } else { GIVEN_FACTOR });
                Ok(taken(a.value, factor, From::Given, a.source.clone()))
            }
            (None, Some(_)) if self.is_dissolved(formula) => {
                if formula == "C" {
                    return Err(Missing::Carbon);
                }
                let x = mole_fraction.ok_or_else(needs_share)?;
                // The base metal is bound by its own mole fraction: the doubt shrinks as it nears purity.
                let factor = leeway_quantity::math::pow(RAOULT_FACTOR, 1.0 - x);
                Ok(taken(x, factor, From::Raoult, None))
            }
            _ => Ok(taken(1.0, 1.0, From::Pure, None)),
        }
    }

    /// Whether the formula is an element of an alloy of at least two.
    fn is_dissolved(&self, formula: &str) -> bool {
        self.elements.len() > 1 && self.elements.iter().any(|e| e == formula)
    }
}
