//! All substances of a data file, looked up by formula, with the rule that picks a phase.

use crate::formula::Formula;
use crate::phase::{Phase, State, Values};
use crate::species::Asked;
use alloc::collections::BTreeMap;
use alloc::string::{String, ToString};
use alloc::vec::Vec;

/// How far above its fitted range a phase is carried, marked as extrapolated, K.
pub const MARGIN_ABOVE_K: f64 = 100.0;
/// How far below its fitted range a phase is carried, marked as extrapolated, K.
pub const MARGIN_BELOW_K: f64 = 50.0;
/// A substance whose gas lies within this of its condensed phase at 298.15 K is read as a gas where the
/// equation names no state, J/mol: it boils near room temperature or is met as vapour (water).
const GAS_BY_DEFAULT_J: f64 = 10_000.0;

/// Gas or condensed: the two have records of their own.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Class {
    /// Gas.
    Gas,
    /// Solid or liquid.
    Condensed,
}

/// A published source.
#[derive(Debug, Clone, PartialEq, Eq, Default)]
pub struct Source {
    /// Key in the data file.
    pub key: String,
    /// Short name.
    pub short: String,
    /// Full citation.
    pub cite: String,
    /// Licence of the figures.
    pub licence: String,
}

/// One source's record of a substance in one class.
#[derive(Debug, Clone, PartialEq)]
pub struct Record {
    /// Index of the source.
    pub source: usize,
    /// The record that counts.
    pub preferred: bool,
    /// Why it is preferred.
    pub why: String,
    /// How the figures were made from the source.
    pub made: String,
    /// Gas or condensed.
    pub class: Class,
    /// Standard enthalpy of formation at 298.15 K, kJ/mol.
    pub h298_kj: f64,
    /// Its standard uncertainty, kJ/mol.
    pub u_h298_kj: f64,
    /// Standard entropy at 298.15 K, J/(mol K).
    pub s298_j_per_k: f64,
    /// Its standard uncertainty, J/(mol K).
    pub u_s298_j_per_k: f64,
    /// Reason for the uncertainties.
    pub doubt: String,
    /// Whether a phase of the record reaches 298.15 K.
    pub anchored: bool,
    /// Phases.
    pub phases: Vec<Phase>,
}

impl Record {
    /// Standard uncertainty of G at `t`, kJ/mol: that of H298 and T S298, taken as independent.
    #[must_use]
    pub fn u_g_kj(&self, t: f64) -> f64 {
        let us = t * self.u_s298_j_per_k * leeway_quantity::constants::KJ_PER_J;
        leeway_quantity::math::sqrt(self.u_h298_kj * self.u_h298_kj + us * us)
    }
}

/// A substance: a formula and its records.
#[derive(Debug, Clone, PartialEq)]
pub struct Substance {
    /// The formula.
    pub formula: Formula,
    /// Names, as the data file lists them.
    pub name: String,
    /// Records, in the file's order.
    pub records: Vec<Record>,
}

/// A phase picked for a species.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Chosen {
    /// Index of the substance.
    pub substance: usize,
    /// Index of its record.
    pub record: usize,
    /// Index of the record's phase.
    pub phase: usize,
    /// Values at the temperature asked for.
    pub values: Values,
    /// Outside the fitted range, within the margin.
    pub extrapolated: bool,
}

/// Why no phase could be picked.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum LookupError {
    /// The formula is not in the data.
    #[error("{formula} is not in the data")]
    NoSubstance {
        /// The formula.
        formula: String,
    },
    /// The substance is there, not in the state or phase asked for.
    #[error("{formula} is not held as {asked}; held: {held}")]
    NoPhase {
        /// The formula.
        formula: String,
        /// What was asked for.
        asked: String,
        /// What is there.
        held: String,
    },
    /// The temperature is outside the data.
    #[error("the data of {formula} reach from {low_k} to {high_k} K, not to {asked_k:.1} K")]
    OutOfRange {
        /// The formula.
        formula: String,
        /// The temperature asked for, K.
        asked_k: f64,
        /// Lower end, K.
        low_k: f64,
        /// Upper end, K.
        high_k: f64,
    },
}

/// The data: sources and substances.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Book {
    /// Version of the data file.
    pub version: String,
    /// Sources.
    pub sources: Vec<Source>,
    /// Substances, in the file's order.
    pub substances: Vec<Substance>,
    pub(crate) index: BTreeMap<String, usize>,
}

impl Book {
    /// Index of the substance with this formula as written in the data file.
    #[must_use]
    pub fn find(&self, formula: &str) -> Option<usize> {
        self.index.get(formula).copied()
    }

    /// The class a formula is read as where the equation names no state.
    #[must_use]
    pub fn default_class(&self, substance: usize) -> Class {
        let s = &self.substances[substance];
        let g = |class: Class| {
            let record = s.records.iter().find(|r| r.preferred && r.class == class)?;
            let t = leeway_quantity::constants::REFERENCE_TEMPERATURE_K;
            if record.anchored {
                let values = record.phases.iter().filter(|p| p.holds(t)).map(|p| p.values(t).g_j);
                values.reduce(f64::min)
            } else {
                Some(record.h298_kj * 1e3 - t * record.s298_j_per_k)
            }
        };
        match (g(Class::Gas), g(Class::Condensed)) {
            (Some(_), None) => Class::Gas,
            (Some(gas), Some(condensed)) if gas - condensed < GAS_BY_DEFAULT_J => Class::Gas,
            _ => Class::Condensed,
        }
    }

    /// The class a species is read as.
    #[must_use]
    pub fn class_of(&self, substance: usize, asked: &Asked) -> Class {
        match asked {
            Asked::State(State::Gas) => Class::Gas,
            Asked::State(_) => Class::Condensed,
            Asked::Phase(name) => {
                let gas = self.substances[substance]
                    .records
                    .iter()
                    .any(|r| r.class == Class::Gas && r.phases.iter().any(|p| is_kind_of(&p.name, name)));
                if gas { Class::Gas } else { Class::Condensed }
            }
            Asked::Any => self.default_class(substance),
        }
    }

    /// Phases that may stand for a species: `(record, phase)` pairs of the preferred record of its class.
    ///
    /// A phase of a boundary (see [`Phase::beside`]) counts where the equation holds the formula it stands
    /// beside, and then alone.
    ///
    /// # Errors
    /// [`LookupError::NoPhase`] where the data hold nothing that fits.
    pub fn candidates(
        &self,
        substance: usize,
        asked: &Asked,
        beside: &dyn Fn(&str) -> bool,
    ) -> Result<Vec<(usize, usize)>, LookupError> {
        let s = &self.substances[substance];
        let class = self.class_of(substance, asked);
        // `quartz` names both quartz-alpha and quartz-beta where no phase is called just that.
        let exact = matches!(asked, Asked::Phase(name)
            if s.records.iter().any(|r| r.phases.iter().any(|p| p.name == *name)));
        let mut found = Vec::new();
        let mut at_boundary = false;
        for (ri, record) in s.records.iter().enumerate().filter(|(_, r)| r.preferred && r.class == class) {
            for (pi, phase) in record.phases.iter().enumerate() {
                let fits = match asked {
                    Asked::Any => !phase.metastable,
                    Asked::State(state) => phase.state == *state && !phase.metastable,
                    Asked::Phase(name) if exact => phase.name == *name,
                    Asked::Phase(name) => is_kind_of(&phase.name, name),
                };
                if !fits {
                    continue;
                }
                let named = matches!(asked, Asked::Phase(_));
                match &phase.beside {
                    Some(formula) if !named && beside(formula) => {
                        if !at_boundary {
                            found.clear();
                        }
                        at_boundary = true;
                        found.push((ri, pi));
                    }
                    Some(_) if !named => {}
                    _ if at_boundary => {}
                    _ => found.push((ri, pi)),
                }
            }
        }
        if found.is_empty() {
            let held: Vec<String> = s
                .records
                .iter()
                .filter(|r| r.preferred)
                .flat_map(|r| r.phases.iter().map(|p| alloc::format!("{} ({})", p.name, p.state.letter())))
                .collect();
            let asked = match asked {
                Asked::Any => String::from("anything"),
                Asked::State(state) => alloc::format!("({})", state.letter()),
                Asked::Phase(name) => name.clone(),
            };
            return Err(LookupError::NoPhase { formula: s.formula.text().to_string(), asked, held: held.join(", ") });
        }
        Ok(found)
    }

    /// The phase of least G at `t` among candidates.
    ///
    /// # Errors
    /// [`LookupError::OutOfRange`] where no candidate reaches `t` within its margin.
    pub fn choose(&self, substance: usize, candidates: &[(usize, usize)], t: f64) -> Result<Chosen, LookupError> {
        let s = &self.substances[substance];
        let mut best: Option<Chosen> = None;
        for inside in [true, false] {
            for &(record, phase) in candidates {
                let p = &s.records[record].phases[phase];
                let near = t >= p.low_k() - MARGIN_BELOW_K && t <= p.high_k() + MARGIN_ABOVE_K;
                if p.holds(t) != inside || !near {
                    continue;
                }
                let values = p.values(t);
                if best.is_none_or(|b| values.g_j < b.values.g_j) {
                    best = Some(Chosen { substance, record, phase, values, extrapolated: !inside });
                }
            }
            if best.is_some() {
                break;
            }
        }
        best.ok_or_else(|| {
            let (low_k, high_k) = self.range(substance, candidates);
            LookupError::OutOfRange { formula: s.formula.text().to_string(), asked_k: t, low_k, high_k }
        })
    }

    /// Range over which the candidates reach without extrapolation, K.
    #[must_use]
    pub fn range(&self, substance: usize, candidates: &[(usize, usize)]) -> (f64, f64) {
        let s = &self.substances[substance];
        candidates.iter().fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), &(r, p)| {
            let phase = &s.records[r].phases[p];
            (low.min(phase.low_k()), high.max(phase.high_k()))
        })
    }
}

/// Whether a phase is the one named, or one of its forms: `quartz-beta` is quartz.
fn is_kind_of(phase: &str, name: &str) -> bool {
    phase.strip_prefix(name).is_some_and(|rest| rest.is_empty() || rest.starts_with('-'))
}
