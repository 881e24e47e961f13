//! A balanced equation joined to the data: enthalpy, entropy and Gibbs energy of the change as written.
//!
//! dX = sum of nu X over products minus reactants (nu negative for reactants); dG = dH - T dS. At actual
//! conditions dG + RT ln Q with Q the product of activities to the power nu, pressures in bar.

use crate::equation::Equation;
use crate::turning::{Bend, Crossing, Slopes, crossings};
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_quantity::constants::{GAS_CONSTANT, KJ_PER_J};
use leeway_quantity::math::sqrt;
use leeway_substances::{Asked, Book, Chosen, Class, LookupError};
use num_traits::ToPrimitive;

/// Why an equation cannot be evaluated with the data.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum ReactionError {
    /// A substance, or its phase, is not held.
    #[error(transparent)]
    Lookup(#[from] LookupError),
}

/// One species of the change with its place in the data.
#[derive(Debug, Clone, PartialEq)]
pub struct Used {
    /// Formula as in the data file.
    pub formula: String,
    /// As the equation names it.
    pub text: String,
    /// Coefficient, negative for reactants.
    pub nu: f64,
    /// Index of the substance.
    pub substance: usize,
    /// Gas or condensed.
    pub class: Class,
    /// Nothing was asked of the state, and the data hold the substance both as gas and condensed.
    pub either: bool,
    candidates: Vec<(usize, usize)>,
}

/// Values of the change per mole as written.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Sum {
    /// Standard enthalpy, kJ.
    pub dh_kj: f64,
    /// Standard entropy, J/K.
    pub ds_j_per_k: f64,
    /// Standard Gibbs energy, kJ.
    pub dg_kj: f64,
}

/// A change that can be evaluated.
#[derive(Debug, Clone, PartialEq)]
pub struct Reaction {
    /// The equation, balanced.
    pub equation: Equation,
    /// Species, reactants first; empty for a change given by constants.
    pub used: Vec<Used>,
    /// What was taken for granted.
    pub notes: Vec<String>,
    constants: Option<(f64, f64)>,
    grid_k: Vec<f64>,
    dg0_kj: Vec<f64>,
    /// Slopes of dG0 along the cells, kJ/K.
    slopes: Slopes,
}

/// Widest cell of the temperature grid, K. Between kinks dG bends slowly: entropies change sign of their
/// slope over hundreds of kelvin, not tens.
const CELL_K: f64 = 50.0;
/// Range searched where constants replace the data, K.
const CONSTANT_RANGE_K: (f64, f64) = (1.0, 6000.0);

impl Reaction {
    /// Joins an equation to the data.
    ///
    /// # Errors
    /// [`ReactionError`] where a species is not in the data, or not in the phase asked for.
    pub fn new(book: &Book, equation: &Equation) -> Result<Self, ReactionError> {
        let mut used = Vec::with_capacity(equation.terms.len());
        let holds = |f: &str| equation.terms.iter().any(|t| t.species.formula.text() == f);
        for term in &equation.terms {
            let species = &term.species;
            let formula = species.formula.text();
            let substance =
                book.find(formula).ok_or_else(|| LookupError::NoSubstance { formula: formula.to_string() })?;
            let class = book.class_of(substance, &species.asked);
            let candidates = book.candidates(substance, &species.asked, &holds)?;
            let classes = |c: Class| book.substances[substance].records.iter().any(|r| r.class == c);
            used.push(Used {
                formula: formula.to_string(),
                text: species.text(),
                nu: term.coefficient.to_f64().unwrap_or(f64::NAN),
                substance,
                class,
                either: species.asked == Asked::Any && classes(Class::Gas) && classes(Class::Condensed),
                candidates,
            });
        }
        let mut reaction = Self {
            equation: equation.clone(),
            used,
            notes: Vec::new(),
            constants: None,
            grid_k: Vec::new(),
            dg0_kj: Vec::new(),
            slopes: Slopes::default(),
        };
        reaction.lay_grid(book);
        Ok(reaction)
    }

    /// A change with constant enthalpy (kJ) and entropy (J/K) in place of data: a straight line in T.
    #[must_use]
    pub fn from_constants(equation: &Equation, dh_kj: f64, ds_j_per_k: f64) -> Self {
        let (low, high) = CONSTANT_RANGE_K;
        let dg = |t: f64| dh_kj - t * ds_j_per_k * KJ_PER_J;
        Self {
            equation: equation.clone(),
            used: Vec::new(),
            notes: alloc::vec![String::from("dH and dS are constants as given; no data are used")],
            constants: Some((dh_kj, ds_j_per_k)),
            grid_k: alloc::vec![low, high],
            dg0_kj: alloc::vec![dg(low), dg(high)],
            slopes: Slopes { start: alloc::vec![-ds_j_per_k * KJ_PER_J], end: alloc::vec![-ds_j_per_k * KJ_PER_J] },
        }
    }

    /// Range in which the data of every species hold, K; `None` where they have no temperature in common.
    #[must_use]
    pub fn range_k(&self) -> Option<(f64, f64)> {
        Some((*self.grid_k.first()?, *self.grid_k.last()?))
    }

    /// Phases picked at `t`, in the order of [`Reaction::used`].
    ///
    /// # Errors
    /// [`LookupError::OutOfRange`] where a species has no data at `t`.
    pub fn choose(&self, book: &Book, t: f64) -> Result<Vec<Chosen>, LookupError> {
        self.used.iter().map(|u| book.choose(u.substance, &u.candidates, t)).collect()
    }

    /// Standard values from the phases picked at `t`.
    #[must_use]
    pub fn sum(&self, t: f64, chosen: &[Chosen]) -> Sum {
        if let Some((dh_kj, ds_j_per_k)) = self.constants {
            return Sum { dh_kj, ds_j_per_k, dg_kj: dh_kj - t * ds_j_per_k * KJ_PER_J };
        }
        let (mut h, mut s) = (0.0, 0.0);
        for (u, c) in self.used.iter().zip(chosen) {
            h += u.nu * c.values.h_j;
            s += u.nu * c.values.s_j_per_k;
        }
        Sum { dh_kj: h * KJ_PER_J, ds_j_per_k: s, dg_kj: (h - t * s) * KJ_PER_J }
    }

    /// Standard values at `t`.
    ///
    /// # Errors
    /// [`LookupError::OutOfRange`] where a species has no data at `t`.
    pub fn at(&self, book: &Book, t: f64) -> Result<Sum, LookupError> {
        if let Some((dh_kj, ds_j_per_k)) = self.constants {
            return Ok(Sum { dh_kj, ds_j_per_k, dg_kj: dh_kj - t * ds_j_per_k * KJ_PER_J });
        }
        let (mut h, mut s) = (0.0, 0.0);
        for u in &self.used {
            let values = book.choose(u.substance, &u.candidates, t)?.values;
            h += u.nu * values.h_j;
            s += u.nu * values.s_j_per_k;
        }
        Ok(Sum { dh_kj: h * KJ_PER_J, ds_j_per_k: s, dg_kj: (h - t * s) * KJ_PER_J })
    }

    /// Temperatures at which dG0 + RT ln Q takes the value `level_kj` (zero: where the change turns) for a
    /// fixed ln Q, over the range of the data; K.
    #[must_use]
    pub fn turning(&self, book: &Book, ln_q: f64, level_kj: f64) -> Vec<Crossing> {
        let rq = GAS_CONSTANT * KJ_PER_J * ln_q;
        let values: Vec<f64> = self.grid_k.iter().zip(&self.dg0_kj).map(|(t, g)| g + t * rq - level_kj).collect();
        let f = |t: f64| self.at(book, t).map_or(f64::NAN, |s| s.dg_kj + t * rq - level_kj);
        let mut slope = |t: f64| self.at(book, t).map_or(f64::NAN, |s| rq - s.ds_j_per_k * KJ_PER_J);
        crossings(&self.grid_k, &values, f, Some(Bend { slopes: &self.slopes, shift: rq, slope: &mut slope }))
    }

    /// Standard uncertainty of each substance's share in dG at `t`: index of `used`, contribution in kJ with
    /// sign. A substance that stands in two places of one record counts once.
    #[must_use]
    pub fn data_doubt(&self, book: &Book, t: f64, chosen: &[Chosen]) -> Vec<(usize, f64)> {
        let mut shares: Vec<(usize, f64, f64)> = Vec::new();
        for (i, (u, c)) in self.used.iter().zip(chosen).enumerate() {
            let same = |j: usize| (chosen[j].substance, chosen[j].record) == (c.substance, c.record);
            let record = &book.substances[c.substance].records[c.record];
            match shares.iter_mut().find(|(j, _, _)| same(*j)) {
                Some(share) => share.1 += u.nu,
                None => shares.push((i, u.nu, record.u_g_kj(t))),
            }
        }
        shares.into_iter().map(|(i, nu, u)| (i, nu * u)).collect()
    }

    /// Standard uncertainties of dH (kJ) and dS (J/K) from the data.
    #[must_use]
    pub fn u_dh_ds(&self, book: &Book, chosen: &[Chosen]) -> (f64, f64) {
        let (mut vh, mut vs) = (0.0, 0.0);
        for (i, share) in self.data_doubt(book, 0.0, chosen) {
            let c = &chosen[i];
            let record = &book.substances[c.substance].records[c.record];
            vh += share * share;
            let nu: f64 = self
                .used
                .iter()
                .zip(chosen)
                .filter(|(_, d)| (d.substance, d.record) == (c.substance, c.record))
                .map(|(u, _)| u.nu)
                .sum();
            vs += (nu * record.u_s298_j_per_k) * (nu * record.u_s298_j_per_k);
        }
        (sqrt(vh), sqrt(vs))
    }

    /// Whether `other` is the same change, up to its direction and scale.
    #[must_use]
    pub fn same_as(&self, other: &Reaction) -> bool {
        if self.used.len() != other.used.len() {
            return false;
        }
        let mut ratio = None;
        self.used.iter().all(|u| {
            let Some(v) = other.used.iter().find(|v| v.substance == u.substance && v.class == u.class) else {
                return false;
            };
            let r = u.nu / v.nu;
            let first = *ratio.get_or_insert(r);
            (r - first).abs() < 1e-9 * first.abs()
        })
    }

    /// Grid over the common range with every kink on it: ends of spans and phases, and temperatures at which
    /// the phase of least G changes.
    fn lay_grid(&mut self, book: &Book) {
        let (mut low, mut high) = (0.0f64, f64::INFINITY);
        for u in &self.used {
            let (l, h) = book.range(u.substance, &u.candidates);
            (low, high) = (low.max(l), high.min(h));
        }
        if low >= high {
            return;
        }
        let mut kinks = alloc::vec![low, high];
        for u in &self.used {
            for &(r, p) in &u.candidates {
                for span in &book.substances[u.substance].records[r].phases[p].spans {
                    kinks.extend([span.low_k, span.high_k].into_iter().filter(|t| *t > low && *t < high));
                }
            }
        }
        kinks.sort_by(f64::total_cmp);
        kinks.dedup_by(|a, b| (*a - *b).abs() < 1e-9);
        let mut grid = Vec::new();
        for pair in kinks.windows(2) {
            let (a, b) = (pair[0], pair[1]);
            #[expect(
                clippy::cast_possible_truncation,
                clippy::cast_sign_loss,
                reason = "a count of at most a few hundred"
            )]
            let n = leeway_quantity::math::ceil((b - a) / CELL_K).max(1.0) as usize;
            for i in 0..n {
                #[expect(clippy::cast_precision_loss, reason = "a count of at most a few hundred")]
                grid.push(a + (b - a) * (i as f64) / (n as f64));
            }
        }
        grid.push(high);
        let mut switches = Vec::new();
        let picks = |t: f64| -> Option<Vec<(usize, usize)>> {
            Some(self.choose(book, t).ok()?.iter().map(|c| (c.record, c.phase)).collect())
        };
        for pair in grid.windows(2) {
            let (mut a, mut b) = (pair[0], pair[1]);
            let inset = 1e-9 * (b - a);
            let (at_a, at_b) = (picks(a + inset), picks(b - inset));
            if at_a == at_b || at_a.is_none() || at_b.is_none() {
                continue;
            }
            for _ in 0..60 {
                let m = 0.5 * (a + b);
                if m <= a || m >= b {
                    break;
                }
                if picks(m) == at_a { a = m } else { b = m }
            }
            switches.push(b);
        }
        grid.extend(switches);
        grid.sort_by(f64::total_cmp);
        grid.dedup_by(|a, b| (*a - *b).abs() < 1e-9);
        let values: Vec<f64> = grid.iter().map(|&t| self.at(book, t).map_or(f64::NAN, |s| s.dg_kj)).collect();
        let slope = |t: f64| self.at(book, t).map_or(f64::NAN, |s| -s.ds_j_per_k * KJ_PER_J);
        let slopes = Slopes {
            start: grid.windows(2).map(|w| slope(w[0] + 1e-9 * (w[1] - w[0]))).collect(),
            end: grid.windows(2).map(|w| slope(w[1] - 1e-9 * (w[1] - w[0]))).collect(),
        };
        // A gap in the data of a phase leaves points without a value; crossings skip them.
        (self.grid_k, self.dg0_kj, self.slopes) = (grid, values, slopes);
    }
}
