//! Quantities with units, standard uncertainties and reproducible maths.
//!
//! One internal unit per kind of quantity (see [`Kind`]): kelvin, bar, mole fraction, volt, kelvin per
//! second, second. Energies are kJ/mol and entropies J/(mol K) everywhere in the workspace; names carry
//! the unit (`_kj`, `_j_per_k`) and [`constants::KJ_PER_J`] is the only bridge between them.
//!
//! This crate reads no files and knows no chemistry.
#![no_std]
extern crate alloc;

pub mod constants;
pub mod entry;
pub mod instrument;
pub mod math;
mod reading;
mod unit;

pub use reading::{Quantity, QuantityError, Spread};
pub use unit::{Kind, Unit};
