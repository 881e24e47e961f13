//! From what instruments show to partial pressures in a zone.
#![no_std]
extern crate alloc;

pub mod reading;
