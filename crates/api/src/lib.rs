//! The one door for both bindings: requests in, answers out.
#![no_std]
extern crate alloc;

pub mod request;
pub mod response;
mod session;

pub use session::Opened;
