//! The session: holds the data, answers one request per method.
//!
//! A page or a shell makes one session and asks it. It keeps no work of the user's: the text of the line
//! comes with every request, so a session that fell over is made again without loss.

use crate::request::{ChangeRequest, EntryRequest};
use crate::response::{Assessment, Entry, Note, Problem, Proposal, Reaction, Substance, SubstanceRow};
use crate::{assess, change, entry, problem, substances};
use alloc::string::String;
use alloc::vec::Vec;
use leeway_gas::shift::Shift;
use leeway_line::model::Line;
use leeway_substances::Book;
use serde::Serialize;

/// A file read into text, with what was noticed on the way.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Opened {
    /// The text, as UTF-8 JSON.
    pub text: String,
    /// Names of the variants it carries, with what they stand for.
    pub variants: Vec<Variant>,
    /// Unknown fields kept, and other remarks.
    pub notes: Vec<Note>,
}

/// A ready variant of a line.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Variant {
    /// Name.
    pub name: String,
    /// What it stands for.
    pub about: String,
}

/// The data, loaded and checked, and the reactions of the shift.
#[derive(Debug, Clone)]
pub struct Session {
    book: Book,
    shift: Shift,
}

impl Session {
    /// Loads and checks the text of a data file.
    ///
    /// # Errors
    /// [`Problem`] naming the line of the data file that does not fit.
    pub fn new(data: &str) -> Result<Self, Problem> {
        let book = Book::parse(data).map_err(|e| problem::data(&e))?;
        let shift = Shift::new(&book);
        Ok(Self { book, shift })
    }

    /// Version of the data file.
    #[must_use]
    pub fn data_version(&self) -> &str {
        &self.book.version
    }

    /// The data, for those who compute with them directly.
    #[must_use]
    pub fn book(&self) -> &Book {
        &self.book
    }

    fn line(line_text: &str) -> Result<Line, Problem> {
        leeway_line::read(line_text).map_err(problem::file)
    }

    /// Assesses every change in every zone of a line.
    ///
    /// # Errors
    /// [`Problem`] where the text is no line. A gas or an equation that cannot be taken is no error: the zone
    /// or the change says so and its findings are `no data`.
    pub fn assess(&self, line_text: &str) -> Result<Assessment, Problem> {
        Ok(assess::assess(&self.book, &self.shift, &Self::line(line_text)?))
    }

    /// Changes that charge and gas suggest, nearest to turning first.
    ///
    /// # Errors
    /// [`Problem`] where the text is no line.
    pub fn propose(&self, line_text: &str) -> Result<Vec<Proposal>, Problem> {
        let line = Self::line(line_text)?;
        let mut taken: Vec<String> = line.changes.iter().map(|c| c.name.clone()).collect();
        Ok(leeway_findings::propose::propose(&self.book, &self.shift, &line)
            .into_iter()
            .map(|p| {
                let mut name = assess::proposal_name(&self.book, &p);
                // A change needs a name of its own: the gas it is by tells two apart, else a number.
                if taken.contains(&name) {
                    name = assess::proposal_by(&name, &p);
                }
                let mut n = 2;
                let plain = name.clone();
                while taken.contains(&name) {
                    name = alloc::format!("{plain}, {n}");
                    n += 1;
                }
                taken.push(name.clone());
                Proposal {
                    name,
                    equation: p.equation.text(),
                    wish: String::from(assess::wish_text(p.wish)),
                    nearest_zone: line.zones[p.nearest_zone].name.clone(),
                    leeway_u: p.z,
                    dg_kj: p.dg_kj,
                }
            })
            .collect())
    }

    /// A reaction, or a sum of reactions, at given temperatures.
    ///
    /// # Errors
    /// [`Problem`] naming what of the request does not read or is not held.
    pub fn change(&self, request: &ChangeRequest) -> Result<Vec<Reaction>, Problem> {
        change::change(&self.book, request)
    }

    /// Substances that fit a query; all for an empty one.
    #[must_use]
    pub fn substances(&self, query: &str) -> Vec<SubstanceRow> {
        substances::list(&self.book, query)
    }

    /// One substance with every record and its curves.
    ///
    /// # Errors
    /// [`Problem`] where the data do not hold it.
    pub fn substance(&self, formula: &str) -> Result<Substance, Problem> {
        substances::one(&self.book, formula)
    }

    /// Something typed into a field, understood.
    ///
    /// # Errors
    /// [`Problem`] saying what was found and what was expected.
    pub fn read_entry(&self, request: &EntryRequest) -> Result<Entry, Problem> {
        entry::read_entry(request)
    }

    /// The bytes of a file as the text of a line.
    ///
    /// # Errors
    /// [`Problem`] where the bytes are no text, or the text is no line.
    pub fn open(&self, bytes: &[u8]) -> Result<Opened, Problem> {
        let (text, mut notes) = leeway_line::decode(bytes).map_err(problem::file)?;
        let line = leeway_line::read(&text).map_err(problem::file)?;
        notes.extend(line.notes);
        let variants = leeway_line::variants(&text).map_err(problem::file)?;
        Ok(Opened {
            text,
            variants: variants.into_iter().map(|v| Variant { name: v.name, about: v.about }).collect(),
            notes: notes.into_iter().map(|n| Note { at: n.at, text: n.text }).collect(),
        })
    }

    /// The text of a line with one of its variants applied.
    ///
    /// # Errors
    /// [`Problem`] where the line has no such variant, or it does not fit the line.
    pub fn variant(&self, line_text: &str, name: &str) -> Result<String, Problem> {
        leeway_line::with_variant(line_text, name).map_err(problem::file)
    }
}
