//! Chemical formulas: text to exact element counts, and molar mass.
//!
//! Follows the IUPAC Red Book (2005) for what a formula may be: element symbols, subscripts, nested round,
//! square and curly brackets, hydrates after a dot. Subscripts may be decimal (`Fe0.947O`); counts are kept
//! as exact ratios, so that balancing loses nothing.

use crate::element::Element;
use alloc::collections::BTreeMap;
use alloc::string::{String, ToString};
use num_rational::BigRational;
use num_traits::{One, ToPrimitive, Zero};

/// A formula's elements and how many of each.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Formula {
    text: String,
    counts: BTreeMap<Element, BigRational>,
}

/// Why a text is not a formula.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
#[error("found {found}, expected {expected}")]
pub struct FormulaError {
    /// Character position in the text, from 0.
    pub at: usize,
    /// What was found there.
    pub found: String,
    /// What was expected.
    pub expected: String,
}

const DEPTH: usize = 16;

impl Formula {
    /// Reads a formula without state or phase.
    ///
    /// # Errors
    /// [`FormulaError`] with the position of the first character that does not fit: an unknown element, an
    /// unclosed bracket, a subscript of zero.
    ///
    /// ```
    /// use leeway_substances::Formula;
    /// let f = Formula::parse("CaMg(CO3)2").unwrap();
    /// assert!((f.molar_mass() - 184.399).abs() < 1e-3);
    /// assert!(Formula::parse("Cq2").is_err());
    /// ```
    pub fn parse(text: &str) -> Result<Self, FormulaError> {
        let chars: alloc::vec::Vec<char> = text.chars().collect();
        let mut parser = Parser { chars: &chars, at: 0 };
        let mut counts = parser.group(0)?;
        while parser.peek().is_some_and(|c| matches!(c, '.' | '·' | '•' | '*')) {
            parser.at += 1;
            let times = parser.number()?.unwrap_or_else(BigRational::one);
            let part = parser.group(0)?;
            for (element, n) in part {
                *counts.entry(element).or_insert_with(BigRational::zero) += n * &times;
            }
        }
        if parser.at < chars.len() {
            return Err(parser.error("an element symbol, a subscript or a bracket"));
        }
        Ok(Self { text: text.to_string(), counts })
    }

    /// The formula as written.
    #[must_use]
    pub fn text(&self) -> &str {
        &self.text
    }

    /// Elements with their exact counts, ordered.
    #[must_use]
    pub fn counts(&self) -> &BTreeMap<Element, BigRational> {
        &self.counts
    }

    /// Molar mass, g/mol.
    #[must_use]
    pub fn molar_mass(&self) -> f64 {
        self.counts.iter().map(|(e, n)| e.mass() * n.to_f64().unwrap_or(f64::NAN)).sum()
    }

    /// Atoms in the formula.
    #[must_use]
    pub fn atoms(&self) -> f64 {
        self.counts.values().map(|n| n.to_f64().unwrap_or(f64::NAN)).sum()
    }

    /// Number of atoms of one element.
    #[must_use]
    pub fn count(&self, element: Element) -> f64 {
        self.counts.get(&element).and_then(ToPrimitive::to_f64).unwrap_or(0.0)
    }

    /// The only element, where the formula holds no other.
    #[must_use]
    pub fn single_element(&self) -> Option<Element> {
        if self.counts.len() == 1 { self.counts.keys().next().copied() } else { None }
    }
}

struct Parser<'a> {
    chars: &'a [char],
    at: usize,
}

impl Parser<'_> {
    fn peek(&self) -> Option<char> {
        self.chars.get(self.at).copied()
    }

    fn error(&self, expected: &str) -> FormulaError {
        let found = match self.peek() {
            None => String::from("the end"),
            // A control character would spoil the place it is shown in.
            Some(c) if c.is_control() => alloc::format!("a control character (U+{:04X})", u32::from(c)),
            Some(c) => alloc::format!("\u{201c}{c}\u{201d}"),
        };
        FormulaError { at: self.at, found, expected: expected.to_string() }
    }

    fn group(&mut self, depth: usize) -> Result<BTreeMap<Element, BigRational>, FormulaError> {
        if depth > DEPTH {
            return Err(self.error("at most 16 brackets within each other"));
        }
        let mut counts: BTreeMap<Element, BigRational> = BTreeMap::new();
        let start = self.at;
        while let Some(c) = self.peek() {
            if c.is_ascii_uppercase() {
                let element = self.element()?;
                let n = self.number()?.unwrap_or_else(BigRational::one);
                *counts.entry(element).or_insert_with(BigRational::zero) += n;
            } else if let Some(close) = closing(c) {
                self.at += 1;
                let inner = self.group(depth + 1)?;
                if self.peek() != Some(close) {
                    return Err(self.error(&alloc::format!("\u{201c}{close}\u{201d}")));
                }
                self.at += 1;
                let n = self.number()?.unwrap_or_else(BigRational::one);
                for (element, m) in inner {
                    *counts.entry(element).or_insert_with(BigRational::zero) += m * &n;
                }
            } else {
                break;
            }
        }
        if self.at == start {
            let small = self.peek().is_some_and(char::is_lowercase);
            return Err(self.error(if small {
                "an element symbol, which begins with a capital letter"
            } else {
                "an element symbol"
            }));
        }
        Ok(counts)
    }

    fn element(&mut self) -> Result<Element, FormulaError> {
        let first: String = self.chars[self.at..=self.at].iter().collect();
        if let Some(second) = self.chars.get(self.at + 1).filter(|c| c.is_ascii_lowercase()) {
            let mut two = first.clone();
            two.push(*second);
            if let Some(element) = Element::from_symbol(&two) {
                self.at += 2;
                return Ok(element);
            }
            return Err(FormulaError {
                at: self.at,
                found: alloc::format!("\u{201c}{two}\u{201d}"),
                expected: String::from("the symbol of an element that the program knows, for example Fe or O"),
            });
        }
        let element = Element::from_symbol(&first).ok_or_else(|| FormulaError {
            at: self.at,
            found: alloc::format!("\u{201c}{first}\u{201d}"),
            expected: String::from("the symbol of an element that the program knows, for example Fe or O"),
        })?;
        self.at += 1;
        Ok(element)
    }

    /// A subscript: digits with at most one decimal point; subscript digits of Unicode are taken too.
    fn number(&mut self) -> Result<Option<BigRational>, FormulaError> {
        let start = self.at;
        let mut digits = String::new();
        let mut point = None;
        while let Some(c) = self.peek() {
            let digit = match c {
                '0'..='9' => Some(c),
                '\u{2080}'..='\u{2089}' => char::from_digit(c as u32 - 0x2080, 10),
                _ => None,
            };
            if let Some(d) = digit {
                digits.push(d);
                self.at += 1;
            } else if c == '.'
                && point.is_none()
                && !digits.is_empty()
                && self.chars.get(self.at + 1).is_some_and(char::is_ascii_digit)
                && !self.hydrate_follows()
            {
                point = Some(digits.len());
                self.at += 1;
            } else {
                break;
            }
        }
        if digits.is_empty() {
            return Ok(None);
        }
        if digits.len() > 12 {
            self.at = start;
            return Err(self.error("a subscript of at most 12 digits"));
        }
        let numerator: u64 = digits.parse().unwrap_or(0);
        let decimals = point.map_or(0, |p| digits.len() - p);
        let denominator = 10u64.pow(u32::try_from(decimals).unwrap_or(0));
        if numerator == 0 {
            self.at = start;
            return Err(self.error("a subscript above 0; oxygen is the letter O"));
        }
        Ok(Some(BigRational::new(numerator.into(), denominator.into())))
    }

    /// A dot between a subscript and a digit starts a hydrate if an element follows the digits and the
    /// subscript before it is not of the form `0`: `CaSO4.2H2O` is a hydrate, `Fe0.947O` is not.
    fn hydrate_follows(&self) -> bool {
        let mut i = self.at + 1;
        while self.chars.get(i).is_some_and(char::is_ascii_digit) {
            i += 1;
        }
        let digits = i - self.at - 1;
        let before_is_zero = self.at >= 1
            && self.chars[self.at - 1] == '0'
            && !(self.at >= 2 && self.chars[self.at - 2].is_ascii_digit());
        let rest: String = self.chars[i..].iter().collect();
        !before_is_zero
            && digits <= 2
            && (rest.starts_with("H2O") || rest.starts_with("(H2O)") || rest.starts_with("H₂O"))
    }
}

fn closing(open: char) -> Option<char> {
    match open {
        '(' => Some(')'),
        '[' => Some(']'),
        '{' => Some('}'),
        _ => None,
    }
}
