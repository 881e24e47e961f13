//! A substance as an equation names it: `Fe`, `Fe(l)`, `SiO2(quartz)`, `H2O(g)`.

use crate::formula::{Formula, FormulaError};
use crate::phase::State;
use alloc::string::{String, ToString};

/// What the text asks of the phase.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Asked {
    /// Nothing: the phase of least G counts.
    Any,
    /// A state of matter: `(s)`, `(cr)`, `(l)`, `(g)`.
    State(State),
    /// A phase by name.
    Phase(String),
}

/// A formula with what was asked of its phase.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Species {
    /// The formula.
    pub formula: Formula,
    /// State or phase asked for.
    pub asked: Asked,
}

/// Why a text is not a species.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
#[non_exhaustive]
pub enum SpeciesError {
    /// The formula does not read.
    #[error(transparent)]
    Formula(#[from] FormulaError),
    /// Dissolved species are outside what the data hold.
    #[error("found a dissolved species, expected a solid (s), liquid (l) or gas (g)")]
    Dissolved,
}

impl Species {
    /// Reads a species.
    ///
    /// # Errors
    /// [`SpeciesError`] where the formula does not read, or the state is `(aq)`.
    pub fn parse(text: &str) -> Result<Self, SpeciesError> {
        let text = text.trim();
        if let Some((formula, inner)) = split_suffix(text) {
            let asked = match inner {
                "g" => Asked::State(State::Gas),
                "l" => Asked::State(State::Liquid),
                "s" | "cr" => Asked::State(State::Solid),
                "aq" => return Err(SpeciesError::Dissolved),
                name => Asked::Phase(name.to_string()),
            };
            return Ok(Self { formula: Formula::parse(formula)?, asked });
        }
        Ok(Self { formula: Formula::parse(text)?, asked: Asked::Any })
    }

    /// The species as written.
    #[must_use]
    pub fn text(&self) -> String {
        match &self.asked {
            Asked::Any => self.formula.text().to_string(),
            Asked::State(state) => alloc::format!("{}({})", self.formula.text(), state.letter()),
            Asked::Phase(name) => alloc::format!("{}({name})", self.formula.text()),
        }
    }
}

/// Splits a closing `(name)` that begins with a small letter: no bracketed group of elements does.
fn split_suffix(text: &str) -> Option<(&str, &str)> {
    let body = text.strip_suffix(')')?;
    let open = body.rfind('(')?;
    let inner = &body[open + 1..];
    let fits = inner.starts_with(|c: char| c.is_ascii_lowercase() || ('α'..='ω').contains(&c))
        && inner.chars().all(|c| c.is_alphanumeric() || matches!(c, '-' | '\''));
    (fits && open > 0).then(|| (body[..open].trim_end(), inner))
}
