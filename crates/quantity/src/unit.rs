//! Units and their conversion to the internal unit of their kind.

use crate::constants::{BAR_PER_ATM, ZERO_CELSIUS_K};

/// What a quantity measures. The internal unit stands behind the name.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Kind {
    /// A temperature; kelvin.
    Temperature,
    /// A pressure, also a partial pressure; bar.
    Pressure,
    /// A share of the gas by volume, or of the charge by mass; fraction of one.
    Fraction,
    /// A cell voltage; volt.
    Voltage,
    /// A heating or cooling rate; kelvin per second.
    Rate,
    /// A span of time; second.
    Time,
}

/// A unit a reading may be given in.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
#[allow(missing_docs, reason = "each unit is its own description")]
pub enum Unit {
    Celsius,
    Fahrenheit,
    Kelvin,
    Bar,
    Millibar,
    Pascal,
    Kilopascal,
    Atmosphere,
    Torr,
    Psi,
    Fraction,
    Percent,
    Ppm,
    Ppb,
    Volt,
    Millivolt,
    KelvinPerSecond,
    KelvinPerMinute,
    KelvinPerHour,
    Second,
    Minute,
    Hour,
}

impl Unit {
    /// Every unit, in the order they are offered.
    pub const ALL: [Unit; 22] = [
        Unit::Celsius,
        Unit::Fahrenheit,
        Unit::Kelvin,
        Unit::Bar,
        Unit::Millibar,
        Unit::Pascal,
        Unit::Kilopascal,
        Unit::Atmosphere,
        Unit::Torr,
        Unit::Psi,
        Unit::Percent,
        Unit::Ppm,
        Unit::Ppb,
        Unit::Fraction,
        Unit::Volt,
        Unit::Millivolt,
        Unit::KelvinPerSecond,
        Unit::KelvinPerMinute,
        Unit::KelvinPerHour,
        Unit::Second,
        Unit::Minute,
        Unit::Hour,
    ];

    /// The kind of quantity the unit measures.
    #[must_use]
    pub const fn kind(self) -> Kind {
        match self {
            Unit::Celsius | Unit::Fahrenheit | Unit::Kelvin => Kind::Temperature,
            Unit::Bar
            | Unit::Millibar
            | Unit::Pascal
            | Unit::Kilopascal
            | Unit::Atmosphere
            | Unit::Torr
            | Unit::Psi => Kind::Pressure,
            Unit::Fraction | Unit::Percent | Unit::Ppm | Unit::Ppb => Kind::Fraction,
            Unit::Volt | Unit::Millivolt => Kind::Voltage,
            Unit::KelvinPerSecond | Unit::KelvinPerMinute | Unit::KelvinPerHour => Kind::Rate,
            Unit::Second | Unit::Minute | Unit::Hour => Kind::Time,
        }
    }

    /// How the line file writes the unit.
    #[must_use]
    pub const fn symbol(self) -> &'static str {
        match self {
            Unit::Celsius => "C",
            Unit::Fahrenheit => "F",
            Unit::Kelvin => "K",
            Unit::Bar => "bar",
            Unit::Millibar => "mbar",
            Unit::Pascal => "Pa",
            Unit::Kilopascal => "kPa",
            Unit::Atmosphere => "atm",
            Unit::Torr => "Torr",
            Unit::Psi => "psi",
            Unit::Fraction => "fraction",
            Unit::Percent => "%",
            Unit::Ppm => "ppm",
            Unit::Ppb => "ppb",
            Unit::Volt => "V",
            Unit::Millivolt => "mV",
            Unit::KelvinPerSecond => "K/s",
            Unit::KelvinPerMinute => "K/min",
            Unit::KelvinPerHour => "K/h",
            Unit::Second => "s",
            Unit::Minute => "min",
            Unit::Hour => "h",
        }
    }

    /// Size of one step of this unit in the internal unit (a difference of 1 C is 1 K).
    #[must_use]
    pub const fn step(self) -> f64 {
        match self {
            Unit::Celsius
            | Unit::Kelvin
            | Unit::Bar
            | Unit::Fraction
            | Unit::Volt
            | Unit::KelvinPerSecond
            | Unit::Second => 1.0,
            Unit::Fahrenheit => 5.0 / 9.0,
            Unit::Millibar | Unit::Millivolt => 1e-3,
            Unit::Pascal => 1e-5,
            Unit::Kilopascal | Unit::Percent => 1e-2,
            Unit::Atmosphere => BAR_PER_ATM,
            Unit::Torr => BAR_PER_ATM / 760.0,
            Unit::Psi => 0.068_947_572_931_683_6,
            Unit::Ppm => 1e-6,
            Unit::Ppb => 1e-9,
            Unit::KelvinPerMinute => 1.0 / 60.0,
            Unit::KelvinPerHour => 1.0 / 3600.0,
            Unit::Minute => 60.0,
            Unit::Hour => 3600.0,
        }
    }

    /// The value in the internal unit.
    #[must_use]
    pub fn to_internal(self, value: f64) -> f64 {
        match self {
            Unit::Celsius => value + ZERO_CELSIUS_K,
            Unit::Fahrenheit => (value + 459.67) * 5.0 / 9.0,
            _ => value * self.step(),
        }
    }

    /// The value in this unit, of a value in the internal unit.
    #[must_use]
    pub fn from_internal(self, value: f64) -> f64 {
        match self {
            Unit::Celsius => value - ZERO_CELSIUS_K,
            Unit::Fahrenheit => value * 9.0 / 5.0 - 459.67,
            _ => value / self.step(),
        }
    }
}
