//! The gas re-equilibrated at a temperature: trace oxygen burns out, and the water-gas shift runs to equilibrium.
//!
//! This room answers one question, "what does the gas read cold become hot?", for the reactions it frees.
//! A full minimisation over all gas species takes its place without a change elsewhere: callers see only
//! [`Shift::run`].

use alloc::string::String;
use alloc::vec::Vec;
use leeway_quantity::constants::{GAS_CONSTANT, KJ_PER_J};
use leeway_quantity::math::{exp, sqrt};
use leeway_reactions::{Equation, Reaction};
use leeway_substances::Book;

/// A gas after the shift.
#[derive(Debug, Clone, PartialEq)]
pub struct Shifted {
    /// Formula and partial pressure, bar.
    pub partial_pressures_bar: Vec<(String, f64)>,
    /// What was let react, in words.
    pub how: &'static str,
}

/// The reactions that are let run, joined to the data once.
#[derive(Debug, Clone, PartialEq)]
pub struct Shift {
    water_gas: Option<Reaction>,
    hydrogen: Option<Reaction>,
    monoxide: Option<Reaction>,
}

/// A share below this counts as none: no analyser sees it.
const NONE: f64 = 1e-30;

fn reaction(book: &Book, text: &str) -> Option<Reaction> {
    Reaction::new(book, &Equation::parse(text).ok()?).ok()
}

impl Shift {
    /// Joins the shift's reactions to the data; those whose substances are not held stay frozen.
    #[must_use]
    pub fn new(book: &Book) -> Self {
        Self {
            water_gas: reaction(book, "CO(g) + H2O(g) = CO2(g) + H2(g)"),
            hydrogen: reaction(book, "2 H2(g) + O2(g) = 2 H2O(g)"),
            monoxide: reaction(book, "2 CO(g) + O2(g) = 2 CO2(g)"),
        }
    }

    /// Equilibrium constant of burning 2 H2 with O2, at `t_k`; `None` outside the data.
    #[must_use]
    pub fn k_hydrogen(&self, book: &Book, t_k: f64) -> Option<f64> {
        k(self.hydrogen.as_ref(), book, t_k)
    }

    /// Equilibrium constant of burning 2 CO with O2, at `t_k`; `None` outside the data.
    #[must_use]
    pub fn k_monoxide(&self, book: &Book, t_k: f64) -> Option<f64> {
        k(self.monoxide.as_ref(), book, t_k)
    }

    /// Lets the gas react at `t_k` and the pressure it has; everything but H2, H2O, CO, CO2 and O2 stays as
    /// it is. `None` where there is nothing to react, or no data.
    #[must_use]
    pub fn run(&self, book: &Book, gas: &[(&str, f64)], t_k: f64) -> Option<Shifted> {
        let of = |f: &str| gas.iter().filter(|(g, _)| *g == f).map(|(_, p)| *p).sum::<f64>();
        let total: f64 = gas.iter().map(|(_, p)| *p).sum();
        let (mut h2, mut h2o, mut co, mut co2, mut o2) = (of("H2"), of("H2O"), of("CO"), of("CO2"), of("O2"));
        let none = NONE * total;
        let burns = o2 > none && h2 + co > none;
        if burns {
            let by_hydrogen = (2.0 * o2).min(h2);
            h2 -= by_hydrogen;
            h2o += by_hydrogen;
            let by_monoxide = (2.0 * o2 - by_hydrogen).clamp(0.0, co);
            co -= by_monoxide;
            co2 += by_monoxide;
            o2 = (o2 - 0.5 * (by_hydrogen + by_monoxide)).max(0.0);
        }
        let shifts = (co > none && h2o > none) || (co2 > none && h2 > none);
        let lean = burns && h2 + co <= none;
        if !burns && !shifts {
            return None;
        }
        if shifts {
            let k = k(self.water_gas.as_ref(), book, t_k)?;
            let x = extent(co, h2o, co2, h2, k);
            (co, h2o, co2, h2) = (co - x, h2o - x, co2 + x, h2 + x);
        }
        if lean && o2 > none {
            // What is left of the fuels beside free oxygen, from their own equilibrium.
            h2 = h2o / sqrt(self.k_hydrogen(book, t_k)? * o2);
            co = co2 / sqrt(self.k_monoxide(book, t_k)? * o2);
        }
        let mut after: Vec<(String, f64)> = gas
            .iter()
            .filter(|(g, _)| !["H2", "H2O", "CO", "CO2", "O2"].contains(g))
            .map(|(g, p)| (String::from(*g), *p))
            .collect();
        for (formula, p) in [("H2", h2), ("H2O", h2o), ("CO", co), ("CO2", co2), ("O2", o2)] {
            if p > none {
                after.push((String::from(formula), p));
            }
        }
        let sum: f64 = after.iter().map(|(_, p)| *p).sum();
        for (_, p) in &mut after {
            *p *= total / sum;
        }
        let how = match (burns, shifts) {
            (true, true) => {
                "oxygen burnt out with hydrogen or carbon monoxide, then CO, CO2, H2 and H2O at equilibrium"
            }
            (true, false) => "oxygen burnt out with hydrogen or carbon monoxide",
            _ => "CO, CO2, H2 and H2O at equilibrium",
        };
        Some(Shifted { partial_pressures_bar: after, how })
    }
}

fn k(reaction: Option<&Reaction>, book: &Book, t_k: f64) -> Option<f64> {
    let dg_kj = reaction?.at(book, t_k).ok()?.dg_kj;
    Some(exp(-dg_kj / (GAS_CONSTANT * KJ_PER_J * t_k)))
}

/// Extent of CO + H2O = CO2 + H2 at equilibrium: the root of the quadratic that leaves nothing negative,
/// by the form that does not cancel.
fn extent(co: f64, h2o: f64, co2: f64, h2: f64, k: f64) -> f64 {
    let f = |x: f64| (co2 + x) * (h2 + x) - k * (co - x) * (h2o - x);
    leeway_reactions::root(f, -co2.min(h2), co.min(h2o))
}
