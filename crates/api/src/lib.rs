//! The one door for both bindings: requests in, answers out.
//!
//! Translation only: figures come from the rooms behind, words for people are made here once so that page
//! and shell say the same.
#![no_std]
extern crate alloc;

mod assess;
mod cautions;
mod change;
mod entry;
mod problem;
pub mod request;
pub mod response;
mod session;
mod substances;
mod words;

pub use leeway_line::line_of;
pub use session::{Opened, Session, Variant};
