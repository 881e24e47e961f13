//! The line as run: zones in order of travel, one charge, the changes that are watched; and its file.
#![no_std]
extern crate alloc;

mod file;
mod json;
pub mod model;
mod variant;

pub use file::{FileError, LARGEST, VERSION, decode, read};
pub use json::line_of;
pub use variant::{Variant, variants, with_variant};
