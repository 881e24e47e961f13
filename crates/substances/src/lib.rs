//! From the text of the data file to checked substances, their phases and their Gibbs energies.
//!
//! H, S and Cp of a phase are exact integrals of one sum of powers of T per span; nothing is interpolated.
//! All enthalpies are on the formation scale (elements in their reference states at 298.15 K are zero), all
//! at a standard pressure of 1 bar. This crate knows no reactions and no gas.
#![no_std]
extern crate alloc;

mod book;
mod element;
mod formula;
mod parse;
mod phase;
mod species;

pub use book::{Book, Chosen, Class, LookupError, MARGIN_ABOVE_K, MARGIN_BELOW_K, Record, Source, Substance};
pub use element::Element;
pub use formula::{Formula, FormulaError};
pub use parse::DataError;
pub use phase::{Phase, Span, State, Values};
pub use species::{Asked, Species, SpeciesError};
