//! The session: holds the data, answers one request per method.
//!
//! A page or a shell makes one session and asks it. It keeps no work of the user's: the text of the line
//! comes with every request, so a session that fell over is made again without loss.

use crate::response::Note;
use alloc::string::String;
use alloc::vec::Vec;
use serde::Serialize;

/// A file read into text, with what was noticed on the way.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Opened {
    /// The text, as UTF-8 JSON.
    pub text: String,
    /// Names of the variants it carries.
    pub variants: Vec<String>,
    /// Unknown fields kept, and other remarks.
    pub notes: Vec<Note>,
}
