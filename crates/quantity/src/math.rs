//! The only door to transcendental functions.
//!
//! `libm` gives the same bits on every target, which the platform's own functions do not; a finding must
//! not depend on whether it was computed in the page or in the shell.

/// Natural logarithm.
#[must_use]
pub fn ln(x: f64) -> f64 {
    libm::log(x)
}
/// Logarithm to base 10.
#[must_use]
pub fn log10(x: f64) -> f64 {
    libm::log10(x)
}
/// Exponential.
#[must_use]
pub fn exp(x: f64) -> f64 {
    libm::exp(x)
}
/// Ten to the power `x`.
#[must_use]
pub fn exp10(x: f64) -> f64 {
    libm::exp10(x)
}
/// `x` to the power `y`.
#[must_use]
pub fn pow(x: f64, y: f64) -> f64 {
    libm::pow(x, y)
}
/// Square root (correctly rounded on every target).
#[must_use]
pub fn sqrt(x: f64) -> f64 {
    libm::sqrt(x)
}
/// Complementary error function.
#[must_use]
pub fn erfc(x: f64) -> f64 {
    libm::erfc(x)
}
/// Probability that a standard normal variable exceeds `z`.
#[must_use]
pub fn normal_tail(z: f64) -> f64 {
    0.5 * erfc(z * core::f64::consts::FRAC_1_SQRT_2)
}
/// Largest integer not above `x`.
#[must_use]
pub fn floor(x: f64) -> f64 {
    libm::floor(x)
}
/// Smallest integer not below `x`.
#[must_use]
pub fn ceil(x: f64) -> f64 {
    libm::ceil(x)
}
/// Nearest integer, halves away from zero.
#[must_use]
pub fn round(x: f64) -> f64 {
    libm::round(x)
}
