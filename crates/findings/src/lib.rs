//! What follows for the plant: for each zone and change, whether it goes, by how much, by which lever, and how sure.
//!
//! The rules of judgement live here, one in each module: activities of the charge ([`activity`]), the gas
//! and how the readings move it ([`fan`]), where on a course a change is judged and how it stands
//! ([`judge`]), the levers ([`lever`]), what brings a finding back ([`remedy`]), which changes a charge and
//! a gas suggest ([`propose`]), which cautions apply ([`caution`]). Numbers only: words are made behind the
//! door to the bindings. Nothing here says how fast a change runs.
#![no_std]
extern crate alloc;

pub mod activity;
pub mod caution;
pub mod compiled;
pub mod fan;
pub mod judge;
pub mod lever;
pub mod propose;

pub mod remedy;

pub use judge::{Assessed, Doubt, Finding, NoData, Outcome, Place, Standing, assess};
