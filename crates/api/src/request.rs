//! What the bindings ask. Field names are what the page writes and the shell builds from its words.

use alloc::string::String;
use alloc::vec::Vec;
use serde::Deserialize;

/// A reaction to evaluate.
#[derive(Debug, Clone, Default, PartialEq, Deserialize)]
#[serde(default, deny_unknown_fields)]
pub struct ChangeRequest {
    /// Equation, or a sum of equations: `2*(A = B) - (C = D)`.
    pub equation: String,
    /// Temperatures as typed, for example `1000 C`; 298.15 K where empty.
    pub at: Vec<String>,
    /// Activities as typed, for example `H2O=0.01`; partial pressures in bar for gases.
    pub activities: Vec<String>,
    /// Constant standard enthalpy of reaction as typed, for example `179.2 kJ`; replaces the data.
    pub dh: Option<String>,
    /// Constant standard entropy of reaction as typed, for example `160.2 J/K`.
    pub ds: Option<String>,
}

/// Something typed into a field of the line.
#[derive(Debug, Clone, Default, PartialEq, Deserialize)]
#[serde(default, deny_unknown_fields)]
pub struct EntryRequest {
    /// As typed.
    pub text: String,
    /// The field asked for: `temperature`, `leaving`, `rate`, `pressure`, `dew_point`, `oxygen_cell`,
    /// `gas` (a share or partial pressure), `share_wt`, `acts_above`, `allowed`, `activity`,
    /// `activity_coefficient`, `number`, `tolerance`.
    pub field: String,
    /// Unit where none is typed, as the line file writes it.
    pub unit: String,
    /// Over `ice` or `water`, for a dew point, where it is not typed.
    pub over: String,
    /// Tolerance to keep where none is typed, in `unit`.
    pub tolerance: Option<f64>,
    /// Pressure at which a dew point is read, bar, for the consequence.
    pub pressure_bar: Option<f64>,
}
