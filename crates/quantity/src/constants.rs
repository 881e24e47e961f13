//! Physical constants, with year and source.

/// Molar gas constant, J/(mol K). CODATA 2018, exact.
pub const GAS_CONSTANT: f64 = 8.314_462_618;
/// Faraday constant, C/mol. CODATA 2018, exact to the digits given.
pub const FARADAY: f64 = 96_485.332_12;
/// Kilojoules in a joule: the one bridge between J and kJ.
pub const KJ_PER_J: f64 = 1e-3;
/// Standard pressure, bar (IUPAC 1982).
pub const STANDARD_PRESSURE_BAR: f64 = 1.0;
/// Kelvin at 0 degrees Celsius (ITS-90).
pub const ZERO_CELSIUS_K: f64 = 273.15;
/// Bar in a standard atmosphere (exact).
pub const BAR_PER_ATM: f64 = 1.013_25;
/// Reference temperature of tabulated standard values, K.
pub const REFERENCE_TEMPERATURE_K: f64 = 298.15;
