//! A value as an instrument shows it: number, unit and tolerance.

use crate::math::sqrt;
use crate::unit::Unit;

/// What a stated tolerance means (JCGM 100:2008, 4.3.7 and 4.3.2).
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Spread {
    /// Limits of error: every value within is as likely; the standard uncertainty is the half-width over the root of three.
    #[default]
    Limits,
    /// Already a standard uncertainty.
    Standard,
}

/// A quantity that cannot be: not a number, or below what is possible.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum QuantityError {
    /// The number is not finite.
    #[error("found {found}, expected a finite number")]
    NotFinite {
        /// The value found.
        found: f64,
    },
    /// The value is outside what the kind of quantity allows.
    #[error("found {} {unit}, expected {expected}", figure(*found))]
    OutOfBounds {
        /// The value found, in its unit.
        found: f64,
        /// The unit's symbol.
        unit: &'static str,
        /// What is allowed, in words.
        expected: &'static str,
    },
}

/// A number as typed, a huge one by its exponent: nobody reads thirty zeros.
fn figure(x: f64) -> alloc::string::String {
    if x.abs() < 1e9 { alloc::format!("{x}") } else { alloc::format!("{x:e}") }
}

/// A reading: value, unit as given, standard uncertainty.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Quantity {
    /// Value in the internal unit of the unit's kind.
    pub value: f64,
    /// The value as it was given, in `unit`.
    pub given: f64,
    /// Standard uncertainty in the internal unit; zero if none was given.
    pub u: f64,
    /// The unit it was given in.
    pub unit: Unit,
    /// The tolerance as given, in `unit` steps, with its meaning; `None` where none was given.
    pub tolerance: Option<(f64, Spread)>,
}

impl Quantity {
    /// Makes a quantity from a value in `unit`, without tolerance.
    ///
    /// # Errors
    /// [`QuantityError`] for a value that is not finite, a temperature at or below 0 K or above
    /// 100 000 K, a pressure below 0 or above 100 000 bar, a voltage beyond 5 V, a time below 0, a rate not above
    /// 0, a fraction below 0 or above 1.03 (the largest sum of an analysis that is taken).
    pub fn new(value: f64, unit: Unit) -> Result<Self, QuantityError> {
        if !value.is_finite() {
            return Err(QuantityError::NotFinite { found: value });
        }
        let internal = unit.to_internal(value);
        let expected = match unit.kind() {
            crate::Kind::Temperature if internal <= 0.0 => Some("a temperature above 0 K (-273.15 C)"),
            crate::Kind::Temperature if internal > 1e5 => Some("a temperature below 100 000 K"),
            crate::Kind::Pressure if internal > 1e5 => Some("a pressure below 100 000 bar"),
            crate::Kind::Voltage if internal.abs() > 5.0 => Some("a cell voltage within 5 V"),
            crate::Kind::Pressure if internal < 0.0 => Some("a pressure of 0 or more"),
            crate::Kind::Fraction if internal < 0.0 => Some("a share of 0 or more"),
            crate::Kind::Fraction if internal > 1.03 => Some("a share of at most 103 %"),
            crate::Kind::Time if internal < 0.0 => Some("a time of 0 or more"),
            crate::Kind::Rate if internal <= 0.0 => {
                Some("a rate above 0 (whether it heats or cools follows from the temperatures)")
            }
            _ => None,
        };
        if let Some(expected) = expected {
            return Err(QuantityError::OutOfBounds { found: value, unit: unit.symbol(), expected });
        }
        Ok(Self { value: internal, given: value, u: 0.0, unit, tolerance: None })
    }

    /// The same quantity with a tolerance given in steps of its own unit.
    ///
    /// # Errors
    /// [`QuantityError`] if the tolerance is negative or not finite.
    pub fn with_tolerance(mut self, tolerance: f64, spread: Spread) -> Result<Self, QuantityError> {
        if !tolerance.is_finite() {
            return Err(QuantityError::NotFinite { found: tolerance });
        }
        if tolerance < 0.0 {
            return Err(QuantityError::OutOfBounds {
                found: tolerance,
                unit: self.unit.symbol(),
                expected: "a tolerance of 0 or more",
            });
        }
        let half = tolerance * self.unit.step();
        self.u = match spread {
            Spread::Limits => half / sqrt(3.0),
            Spread::Standard => half,
        };
        self.tolerance = Some((tolerance, spread));
        Ok(self)
    }
}
