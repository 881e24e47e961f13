//! The line as run: zones in order of travel, one charge, the changes that are watched.
#![no_std]
extern crate alloc;

pub mod model;
