//! The text of the data file to a checked [`Book`].
//!
//! The form is line-based; every error names the line. Loading checks what a wrong figure would break:
//! H298 and S298 against the spans, continuity within a phase and across the transitions of a record,
//! ranges, signs of Cp, elements, one preferred record per class, sources that exist.

use crate::book::{Book, Class, Record, Source, Substance};
use crate::formula::Formula;
use crate::phase::{Phase, Span, State};
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_quantity::constants::REFERENCE_TEMPERATURE_K;

/// What is wrong with the data file, and in which line.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
#[error("data file, line {line}: found {found}, expected {expected}")]
pub struct DataError {
    /// Line number, from 1.
    pub line: usize,
    /// What was found.
    pub found: String,
    /// What was expected.
    pub expected: String,
}

impl DataError {
    fn at(line: usize, found: impl ToString, expected: &str) -> Self {
        Self { line, found: found.to_string(), expected: expected.to_string() }
    }
}

/// Largest difference between H298 as stated and as the spans give it, J/mol.
const H298_J: f64 = 20.0;
/// The same for S298, J/(mol K).
const S298_J_PER_K: f64 = 0.05;
/// Largest step of G, or of H inside a phase, at a join, J/mol.
const JOIN_J: f64 = 100.0;
/// Largest heat capacity per mole of atoms that is believed, J/(mol K): above it a lambda peak or a slip.
const CP_PER_ATOM: f64 = 100.0;

impl Book {
    /// Reads and checks the text of a data file.
    ///
    /// # Errors
    /// [`DataError`] naming the first line that does not fit.
    pub fn parse(text: &str) -> Result<Self, DataError> {
        let mut reader = Reader::default();
        for (i, raw) in text.lines().enumerate() {
            let line = raw.trim();
            if line.is_empty() || line.starts_with('#') {
                continue;
            }
            reader.line = i + 1;
            let (key, rest) = line.split_once(char::is_whitespace).unwrap_or((line, ""));
            reader.take(key, rest.trim())?;
        }
        reader.finish()
    }
}

#[derive(Default)]
struct Reader {
    line: usize,
    headed: bool,
    book: Book,
    /// Line of each record of the substance being read, for errors found at its end.
    record_lines: Vec<usize>,
    in_source: bool,
}

impl Reader {
    fn error(&self, found: impl ToString, expected: &str) -> DataError {
        DataError::at(self.line, found, expected)
    }

    fn number(&self, text: &str, what: &str) -> Result<f64, DataError> {
        match text.parse::<f64>() {
            Ok(x) if x.is_finite() => Ok(x),
            _ => Err(self.error(alloc::format!("\u{201c}{text}\u{201d}"), &alloc::format!("a number for {what}"))),
        }
    }

    fn record(&mut self) -> Result<&mut Record, DataError> {
        let line = self.line;
        self.book
            .substances
            .last_mut()
            .and_then(|s| s.records.last_mut())
            .ok_or_else(|| DataError::at(line, "a line outside a set", "a line \u{201c}set SOURCE\u{201d} before it"))
    }

    fn take(&mut self, key: &str, rest: &str) -> Result<(), DataError> {
        if !self.headed {
            if key == "leeway-data" && rest == "1" {
                self.headed = true;
                return Ok(());
            }
            return Err(self.error(alloc::format!("\u{201c}{key} {rest}\u{201d}"), "\u{201c}leeway-data 1\u{201d}"));
        }
        match key {
            "version" => self.book.version = rest.to_string(),
            "source" => {
                if self.book.sources.iter().any(|s| s.key == rest) {
                    return Err(self.error(alloc::format!("source {rest} again"), "each source once"));
                }
                self.in_source = true;
                self.book.sources.push(Source { key: rest.to_string(), ..Source::default() });
            }
            "short" | "cite" | "licence" if self.in_source => {
                if let Some(source) = self.book.sources.last_mut() {
                    match key {
                        "short" => source.short = rest.to_string(),
                        "cite" => source.cite = rest.to_string(),
                        _ => source.licence = rest.to_string(),
                    }
                }
            }
            "substance" => {
                self.close_substance()?;
                self.in_source = false;
                let formula =
                    Formula::parse(rest).map_err(|e| self.error(alloc::format!("{rest}, {}", e.found), &e.expected))?;
                if self.book.index.contains_key(rest) {
                    return Err(self.error(alloc::format!("substance {rest} again"), "each formula once"));
                }
                self.book.index.insert(rest.to_string(), self.book.substances.len());
                self.book.substances.push(Substance { formula, name: String::new(), records: Vec::new() });
            }
            "name" => {
                let line = self.line;
                let missing =
                    || DataError::at(line, "a name outside a substance", "\u{201c}substance FORMULA\u{201d} before it");
                self.book.substances.last_mut().ok_or_else(missing)?.name = rest.to_string();
            }
            "set" => self.open_set(rest)?,
            "why" => self.record()?.why = rest.to_string(),
            "made" => self.record()?.made = rest.to_string(),
            "doubt" => self.record()?.doubt = rest.to_string(),
            "anchor" if rest == "none" => self.record()?.anchored = false,
            "H298" | "S298" => {
                let mut words = rest.split_whitespace();
                let (value, mark, u) = (words.next(), words.next(), words.next());
                let (Some(value), Some("u"), Some(u), None) = (value, mark, u, words.next()) else {
                    return Err(
                        self.error(alloc::format!("\u{201c}{rest}\u{201d}"), "\u{201c}VALUE u UNCERTAINTY\u{201d}")
                    );
                };
                let value = self.number(value, key)?;
                let u = self.number(u, "its standard uncertainty")?;
                if u < 0.0 {
                    return Err(self.error(u, "an uncertainty of 0 or more"));
                }
                let record = self.record()?;
                if key == "H298" {
                    (record.h298_kj, record.u_h298_kj) = (value, u);
                } else {
                    (record.s298_j_per_k, record.u_s298_j_per_k) = (value, u);
                }
            }
            "phase" => self.open_phase(rest)?,
            "span" => self.add_span(rest)?,
            _ => {
                return Err(self.error(
                    alloc::format!("\u{201c}{key}\u{201d}"),
                    "one of: source short cite licence substance name set why made H298 S298 doubt anchor phase span",
                ));
            }
        }
        Ok(())
    }

    fn open_set(&mut self, rest: &str) -> Result<(), DataError> {
        let mut words = rest.split_whitespace();
        let key = words.next().unwrap_or("");
        let preferred = match (words.next(), words.next()) {
            (None, _) => false,
            (Some("preferred"), None) => true,
            _ => {
                return Err(self.error(
                    alloc::format!("\u{201c}{rest}\u{201d}"),
                    "\u{201c}set SOURCE\u{201d} or \u{201c}set SOURCE preferred\u{201d}",
                ));
            }
        };
        let source =
            self.book.sources.iter().position(|s| s.key == key).ok_or_else(|| {
                self.error(alloc::format!("source \u{201c}{key}\u{201d}"), "a source listed at the head")
            })?;
        let line = self.line;
        let missing =
            || DataError::at(line, "a set outside a substance", "\u{201c}substance FORMULA\u{201d} before it");
        let substance = self.book.substances.last_mut().ok_or_else(missing)?;
        substance.records.push(Record {
            source,
            preferred,
            why: String::new(),
            made: String::new(),
            class: Class::Condensed,
            h298_kj: f64::NAN,
            u_h298_kj: f64::NAN,
            s298_j_per_k: f64::NAN,
            u_s298_j_per_k: f64::NAN,
            doubt: String::new(),
            anchored: true,
            phases: Vec::new(),
        });
        self.record_lines.push(line);
        Ok(())
    }

    fn open_phase(&mut self, rest: &str) -> Result<(), DataError> {
        let words: Vec<&str> = rest.split_whitespace().collect();
        let [name, state, low, high, more @ ..] = words.as_slice() else {
            return Err(
                self.error(alloc::format!("\u{201c}{rest}\u{201d}"), "\u{201c}phase NAME STATE LOW HIGH\u{201d}")
            );
        };
        let state = match *state {
            "s" => State::Solid,
            "l" => State::Liquid,
            "g" => State::Gas,
            other => return Err(self.error(alloc::format!("state \u{201c}{other}\u{201d}"), "s, l or g")),
        };
        let (low, high) = (self.number(low, "the lower temperature")?, self.number(high, "the upper temperature")?);
        if !(low > 0.0 && high > low) {
            return Err(self.error(alloc::format!("{low} to {high} K"), "a range that ascends, above 0 K"));
        }
        let (beside, metastable) = match more {
            [] => (None, false),
            ["metastable"] => (None, true),
            ["beside", f] => (Some((*f).to_string()), false),
            _ => {
                return Err(self.error(
                    alloc::format!("\u{201c}{}\u{201d}", more.join(" ")),
                    "\u{201c}beside FORMULA\u{201d} or \u{201c}metastable\u{201d}",
                ));
            }
        };
        let class = if state == State::Gas { Class::Gas } else { Class::Condensed };
        let line = self.line;
        let range = Span { low_k: low, high_k: high, h_j: f64::NAN, s_j_per_k: 0.0, terms: Vec::new() };
        let record = self.record()?;
        if !record.phases.is_empty() && record.class != class {
            let expected = "gas and condensed phases in sets of their own";
            return Err(DataError::at(line, "a gas phase beside condensed ones", expected));
        }
        record.class = class;
        // The stated range rides along as a marker span until the phase's own spans replace it.
        record.phases.push(Phase { name: (*name).to_string(), state, beside, metastable, spans: alloc::vec![range] });
        Ok(())
    }

    fn add_span(&mut self, rest: &str) -> Result<(), DataError> {
        let words: Vec<&str> = rest.split_whitespace().collect();
        let [low, high, "h", h, "s", s, "cp", terms @ ..] = words.as_slice() else {
            return Err(self.error(
                alloc::format!("\u{201c}{rest}\u{201d}"),
                "\u{201c}span LOW HIGH h H s S cp EXPONENT:COEFFICIENT ...\u{201d}",
            ));
        };
        let low = self.number(low, "the lower temperature")?;
        let high = self.number(high, "the upper temperature")?;
        let mut span = Span {
            low_k: low,
            high_k: high,
            h_j: self.number(h, "h")?,
            s_j_per_k: self.number(s, "s")?,
            terms: Vec::with_capacity(terms.len()),
        };
        for term in terms {
            let (e, c) = term
                .split_once(':')
                .ok_or_else(|| self.error(alloc::format!("\u{201c}{term}\u{201d}"), "EXPONENT:COEFFICIENT"))?;
            let twice = self.number(e, "an exponent")? * 2.0;
            if twice != leeway_quantity::math::round(twice) || twice.abs() > 20.0 {
                return Err(self.error(alloc::format!("exponent {e}"), "a whole or half number from -10 to 10"));
            }
            #[expect(clippy::cast_possible_truncation, reason = "a whole number of at most 20")]
            span.terms.push((twice as i32, self.number(c, "a coefficient")?));
        }
        if high <= low {
            return Err(self.error(alloc::format!("{low} to {high} K"), "a span that ascends"));
        }
        let atoms = self.book.substances.last().map_or(f64::NAN, |s| s.formula.atoms());
        for t in [low, 0.5 * (low + high), high] {
            let cp = span.values(t).cp_j_per_k;
            if !(cp > 0.0 && cp < CP_PER_ATOM * atoms) {
                return Err(self.error(
                    alloc::format!("Cp of {cp:.1} J/(mol K) at {t} K"),
                    &alloc::format!("above 0 and below {CP_PER_ATOM} J/(mol K) per mole of atoms"),
                ));
            }
        }
        let line = self.line;
        let record = self.record()?;
        let Some(phase) = record.phases.last_mut() else {
            return Err(DataError {
                line,
                found: "a span outside a phase".to_string(),
                expected: "\u{201c}phase\u{201d} before it".to_string(),
            });
        };
        if phase.spans.last().is_some_and(|s| s.h_j.is_nan()) {
            let stated = phase.spans[0].low_k;
            if (stated - low).abs() > 1e-9 {
                return Err(DataError {
                    line,
                    found: alloc::format!("a span from {low} K"),
                    expected: alloc::format!("the phase's lower end, {stated} K"),
                });
            }
            let high_stated = phase.spans[0].high_k;
            phase.spans.clear();
            phase.spans.push(span);
            if high > high_stated + 1e-9 {
                return Err(DataError {
                    line,
                    found: alloc::format!("a span to {high} K"),
                    expected: alloc::format!("at most {high_stated} K"),
                });
            }
            return Ok(());
        }
        if let Some(before) = phase.spans.last() {
            if (before.high_k - low).abs() > 1e-9 {
                return Err(DataError {
                    line,
                    found: alloc::format!("a span from {low} K"),
                    expected: alloc::format!("the end of the span before, {} K", before.high_k),
                });
            }
            let (a, b) = (before.values(low), span.values(low));
            if (a.g_j - b.g_j).abs() > JOIN_J || (a.h_j - b.h_j).abs() > JOIN_J {
                return Err(DataError {
                    line,
                    found: alloc::format!(
                        "a step of {:.3} kJ in G and {:.3} kJ in H at {low} K",
                        (b.g_j - a.g_j) * 1e-3,
                        (b.h_j - a.h_j) * 1e-3
                    ),
                    expected: "spans that join within 0.1 kJ (a real transition is a phase of its own)".to_string(),
                });
            }
        }
        phase.spans.push(span);
        Ok(())
    }

    fn close_substance(&mut self) -> Result<(), DataError> {
        let lines = core::mem::take(&mut self.record_lines);
        let Some(substance) = self.book.substances.last() else { return Ok(()) };
        let text = substance.formula.text();
        if substance.records.is_empty() {
            return Err(self.error(alloc::format!("{text} without a set"), "at least one set"));
        }
        for (record, &line) in substance.records.iter().zip(&lines) {
            check_record(text, record, line)?;
        }
        for class in [Class::Gas, Class::Condensed] {
            let of_class = substance.records.iter().filter(|r| r.class == class).count();
            let preferred = substance.records.iter().filter(|r| r.class == class && r.preferred).count();
            if of_class > 0 && preferred != 1 {
                return Err(DataError {
                    line: lines.first().copied().unwrap_or(self.line),
                    found: alloc::format!("{text} with {preferred} preferred sets of {of_class}"),
                    expected: "exactly one preferred for the gas and one for the condensed phases".to_string(),
                });
            }
        }
        Ok(())
    }

    fn finish(mut self) -> Result<Book, DataError> {
        self.close_substance()?;
        if !self.headed || self.book.substances.is_empty() {
            return Err(self.error("no substance", "a data file with substances"));
        }
        if self.book.version.is_empty() {
            return Err(self.error("no version", "a line \u{201c}version\u{201d}"));
        }
        Ok(self.book)
    }
}

fn check_record(formula: &str, record: &Record, line: usize) -> Result<(), DataError> {
    let fail = |found: String, expected: &str| Err(DataError { line, found, expected: expected.to_string() });
    if record.h298_kj.is_nan() || record.s298_j_per_k.is_nan() {
        return fail(alloc::format!("{formula} without H298 or S298"), "both, each with its uncertainty");
    }
    if record.phases.is_empty() {
        return fail(alloc::format!("{formula} without a phase"), "at least one phase");
    }
    if record.preferred && record.why.is_empty() {
        return fail(alloc::format!("{formula}, preferred without a reason"), "a line \u{201c}why\u{201d}");
    }
    if record.doubt.is_empty() || record.made.is_empty() {
        return fail(
            alloc::format!("{formula} without \u{201c}doubt\u{201d} or \u{201c}made\u{201d}"),
            "the reason for the uncertainty, and how the figures were made",
        );
    }
    if let Some(phase) = record.phases.iter().find(|p| p.spans.iter().any(|s| s.h_j.is_nan())) {
        return fail(alloc::format!("{formula}, phase {} without a span", phase.name), "at least one span");
    }
    if record.anchored {
        let t = REFERENCE_TEMPERATURE_K;
        let stable = record
            .phases
            .iter()
            .filter(|p| p.holds(t) && !p.metastable)
            .map(|p| p.values(t))
            .reduce(|a, b| if b.g_j < a.g_j { b } else { a });
        let Some(values) = stable else {
            return fail(
                alloc::format!("{formula}, no phase at 298.15 K"),
                "a phase that reaches it, or \u{201c}anchor none\u{201d}",
            );
        };
        let dh = values.h_j - record.h298_kj * 1e3;
        let ds = values.s_j_per_k - record.s298_j_per_k;
        if dh.abs() > H298_J || ds.abs() > S298_J_PER_K {
            return fail(
                alloc::format!(
                    "{formula}: the spans give H298 {:.3} kJ and S298 {:.3} J/K",
                    values.h_j * 1e-3,
                    values.s_j_per_k
                ),
                &alloc::format!(
                    "{} kJ and {} J/K as stated, within 0.02 kJ and 0.05 J/K",
                    record.h298_kj,
                    record.s298_j_per_k
                ),
            );
        }
    }
    let stable: Vec<&Phase> = record.phases.iter().filter(|p| !p.metastable && p.beside.is_none()).collect();
    for pair in stable.windows(2) {
        let (a, b) = (pair[0], pair[1]);
        let t = b.low_k();
        if a.high_k() < t - 1e-9 {
            return fail(
                alloc::format!("{formula}: a gap from {} to {t} K between {} and {}", a.high_k(), a.name, b.name),
                "phases that meet",
            );
        }
        let step = b.values(t).g_j - a.values(t).g_j;
        if (a.high_k() - t).abs() < 1e-9 && step.abs() > JOIN_J {
            return fail(
                alloc::format!(
                    "{formula}: a step of {:.3} kJ in G at {t} K from {} to {}",
                    step * 1e-3,
                    a.name,
                    b.name
                ),
                "phases that meet within 0.1 kJ",
            );
        }
    }
    Ok(())
}
