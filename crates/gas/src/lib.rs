//! From what instruments show to partial pressures in a zone, as read and shifted.
//!
//! [`intake::Intake`] takes a reading apart once and then gives the partial pressures for any values of its
//! inputs, which is what levers and doubt need. [`shift`] re-equilibrates a gas at a temperature. Neither
//! knows zones, charges or changes.
#![no_std]
extern crate alloc;

pub mod humidity;
pub mod intake;
pub mod reading;
pub mod shift;
