//! One phase of a substance: spans of Cp as sums of powers of T, with exact integrals.
//!
//! Cp(T) = sum of c T^e; H(T) = h + the sum of c T^(e+1)/(e+1); S(T) = s + the sum of c T^e/e, with
//! c ln T where the exponent of the integral is zero. J/mol and J/(mol K). Exponents are whole or half
//! numbers and kept as twice their value, so that no power needs a transcendental function.

use alloc::string::String;
use alloc::vec::Vec;
use leeway_quantity::math::{ln, sqrt};

/// State of matter.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum State {
    /// Solid.
    Solid,
    /// Liquid.
    Liquid,
    /// Gas.
    Gas,
}

impl State {
    /// `s`, `l` or `g`.
    #[must_use]
    pub const fn letter(self) -> &'static str {
        match self {
            State::Solid => "s",
            State::Liquid => "l",
            State::Gas => "g",
        }
    }
}

/// Molar values of a phase at a temperature.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Values {
    /// Enthalpy on the formation scale, J/mol.
    pub h_j: f64,
    /// Entropy, J/(mol K).
    pub s_j_per_k: f64,
    /// Gibbs energy H - TS, J/mol.
    pub g_j: f64,
    /// Heat capacity, J/(mol K).
    pub cp_j_per_k: f64,
}

/// A stretch of temperature with one sum of powers.
#[derive(Debug, Clone, PartialEq)]
pub struct Span {
    /// Lower end, K.
    pub low_k: f64,
    /// Upper end, K.
    pub high_k: f64,
    /// Enthalpy constant, J/mol.
    pub h_j: f64,
    /// Entropy constant, J/(mol K).
    pub s_j_per_k: f64,
    /// Terms: twice the exponent, and the coefficient.
    pub terms: Vec<(i32, f64)>,
}

/// T to the power `twice / 2`.
fn power(t: f64, root: f64, twice: i32) -> f64 {
    let n = twice.unsigned_abs();
    let mut p = 1.0;
    for _ in 0..n / 2 {
        p *= t;
    }
    if n % 2 == 1 {
        p *= root;
    }
    if twice < 0 { 1.0 / p } else { p }
}

impl Span {
    /// Values inside the span; the caller keeps `t` within the span.
    #[must_use]
    pub fn values(&self, t: f64) -> Values {
        let (log, root) = (ln(t), sqrt(t));
        let (mut cp, mut h, mut s) = (0.0, self.h_j, self.s_j_per_k);
        for &(twice, c) in &self.terms {
            let p = c * power(t, root, twice);
            cp += p;
            if twice == -2 {
                h += c * log;
            } else {
                h += p * t / (f64::from(twice) / 2.0 + 1.0);
            }
            if twice == 0 {
                s += c * log;
            } else {
                s += p / (f64::from(twice) / 2.0);
            }
        }
        Values { h_j: h, s_j_per_k: s, g_j: h - t * s, cp_j_per_k: cp }
    }
}

/// A phase: contiguous spans in ascending order.
#[derive(Debug, Clone, PartialEq)]
pub struct Phase {
    /// Name, for example `quartz`, `cr`, `liquid`.
    pub name: String,
    /// State of matter.
    pub state: State,
    /// The record holds where the equation also holds this formula (a phase boundary of varying composition).
    pub beside: Option<String>,
    /// Taken only when named.
    pub metastable: bool,
    /// Spans, never empty.
    pub spans: Vec<Span>,
}

impl Phase {
    /// Lower end of the fitted range, K.
    #[must_use]
    pub fn low_k(&self) -> f64 {
        self.spans.first().map_or(f64::NAN, |s| s.low_k)
    }

    /// Upper end of the fitted range, K.
    #[must_use]
    pub fn high_k(&self) -> f64 {
        self.spans.last().map_or(f64::NAN, |s| s.high_k)
    }

    /// Whether `t` is inside the fitted range.
    #[must_use]
    pub fn holds(&self, t: f64) -> bool {
        t >= self.low_k() && t <= self.high_k()
    }

    /// Values at `t`; outside the fitted range with Cp held at its value at the end (a polynomial run past
    /// its end is worth nothing near a lambda point).
    #[must_use]
    pub fn values(&self, t: f64) -> Values {
        let inside = t.clamp(self.low_k(), self.high_k());
        let span = self.spans.iter().find(|s| inside <= s.high_k).or(self.spans.last());
        let Some(span) = span else { return Values::default() };
        let at_end = span.values(inside);
        if inside == t {
            return at_end;
        }
        let h = at_end.h_j + at_end.cp_j_per_k * (t - inside);
        let s = at_end.s_j_per_k + at_end.cp_j_per_k * ln(t / inside);
        Values { h_j: h, s_j_per_k: s, g_j: h - t * s, cp_j_per_k: at_end.cp_j_per_k }
    }
}
