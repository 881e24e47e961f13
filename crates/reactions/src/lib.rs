//! Equations as a chemist types them, balanced exactly, and what they give in enthalpy, entropy and Gibbs energy.
//!
//! Stoichiometry is exact (ratios of big integers); thermochemistry is `f64` with one door to its functions.
//! This crate knows no gas readings and no zones.
#![no_std]
extern crate alloc;

mod balance;
mod equation;
mod reaction;
mod turning;

pub use equation::{Equation, EquationError, Term};
pub use reaction::{Reaction, ReactionError, Sum, Used};
pub use turning::{Bend, Crossing, Slopes, crossings, root};
