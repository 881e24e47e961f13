//! A zone's gas as its instruments show it, before any conversion.

use alloc::string::String;
use alloc::vec::Vec;
use leeway_quantity::Quantity;

/// Whether a share is of the gas with its water or without.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Basis {
    /// Share of the gas after its water was taken out.
    Dry,
    /// Share of the gas as it is.
    Wet,
}

/// What the dew-point instrument's condensate is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Surface {
    /// Frost point.
    Ice,
    /// Dew point over liquid water, supercooled below 0 C.
    Water,
}

/// One analysed component.
#[derive(Debug, Clone, PartialEq)]
pub struct Channel {
    /// Formula of the component.
    pub formula: String,
    /// Share ([`leeway_quantity::Kind::Fraction`]) or partial pressure ([`leeway_quantity::Kind::Pressure`]).
    pub quantity: Quantity,
    /// The channel's own basis; the reading's if `None`. Water itself is always read wet.
    pub basis: Option<Basis>,
    /// The reading stands at its detection limit: an upper bound.
    pub upper_bound: bool,
}

/// A dew or frost point.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct DewPoint {
    /// Temperature of condensation.
    pub quantity: Quantity,
    /// Over ice or over liquid water. `None` where not said: taken as frost point below 0 C, and noted.
    pub over: Option<Surface>,
    /// Pressure in the instrument; the zone's where `None`.
    pub pressure: Option<Quantity>,
}

/// A zirconia cell.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Cell {
    /// The cell's voltage against its reference; positive where the gas holds less oxygen.
    pub voltage: Quantity,
    /// Temperature of the cell; the zone's where `None` (a probe in place).
    pub temperature: Option<Quantity>,
    /// Oxygen partial pressure of the reference, bar; `None` for ambient air at 0.2095 of 1.01325 bar.
    pub reference_bar: Option<Quantity>,
}

/// Everything read of one zone's gas.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct GasReading {
    /// Basis of channels that do not say their own.
    pub basis: Option<Basis>,
    /// Analysed components, in the order given.
    pub channels: Vec<Channel>,
    /// The component that makes up the rest.
    pub balance: Option<String>,
    /// Dew or frost point.
    pub dew_point: Option<DewPoint>,
    /// Zirconia cell.
    pub cell: Option<Cell>,
}
