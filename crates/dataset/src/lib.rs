//! The data file: thermochemical records of substances, as text.
//!
//! Made by `make/make.py` beside this crate, byte for byte, from open sources; `SOURCES.md` names them, their
//! licences, and every record that was set aside or mended and why. This crate only carries the text: reading
//! and checking it is the work of the crate that uses it.
#![no_std]

/// The data file, UTF-8, line-based: sources, then substances with their sets, phases and spans.
///
/// H in J/mol on the scale where the elements in their reference states at 298.15 K and 1 bar are zero,
/// S in J/(mol K) by the third law, Cp as a sum of powers of T.
pub const TEXT: &str = include_str!("../data/leeway-data.txt");
