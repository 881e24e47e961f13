//! Numbers and units as people type them, in the habit of their site.
//!
//! Decimal comma or point; thousands apart by a thin or plain space or an apostrophe; a minus of any kind;
//! exponents; a tolerance after ±; `<` for a reading at its detection limit; units in many spellings. What
//! can mean two things is refused with both as ready answers; nothing is guessed. Where only one of the two can
//! be a reading of a hot line (`1.025 bar`, for nothing runs at 1025 bar), there is nothing to guess.

use crate::constants::BAR_PER_ATM;
use crate::reading::{Quantity, QuantityError, Spread};
use crate::unit::{Kind, Unit};
use alloc::format;
use alloc::string::{String, ToString};
use alloc::vec::Vec;

/// What was typed, understood.
#[derive(Debug, Clone, PartialEq)]
pub struct Typed {
    /// The quantity, with its tolerance where one was typed.
    pub quantity: Quantity,
    /// Typed with `<`: at the detection limit.
    pub bound: bool,
    /// `ice` or `water`, where a dew or frost point was typed so.
    pub over: Option<&'static str>,
    /// A unit was typed.
    pub unit_typed: bool,
    /// What a share was typed to be a share of, where its unit says so.
    pub share: Option<Share>,
}

/// What a unit such as `wt%` or `vol%` says a share to be a share of. The two differ by the molar masses.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Share {
    /// Of the mass.
    Mass,
    /// Of the volume, or of the moles.
    Volume,
}

/// What a unit's spelling says a share to be a share of; `None` where it says nothing.
#[must_use]
pub fn share(text: &str) -> Option<Share> {
    let key = folded(text);
    let any = |words: &[&str]| words.iter().any(|w| key.contains(w));
    if unit(text).is_none_or(|u| u.kind() != Kind::Fraction) {
        None
    } else if any(&["wt", "mass", "gew", "w/w", "w%"]) {
        Some(Share::Mass)
    } else if any(&["vol", "mol", "v/v", "v%", "ppmv", "ppbv", "vpm"]) {
        Some(Share::Volume)
    } else {
        None
    }
}

/// Why something typed is not understood.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[error("found {found}, expected {expected}")]
pub struct EntryError {
    /// What was found.
    pub found: String,
    /// What was expected.
    pub expected: String,
    /// Place in the text, in characters from 1.
    pub column: usize,
    hints: Vec<String>,
    /// The number could be read in two ways; the hints are both.
    two_ways: bool,
}

impl EntryError {
    fn new(found: impl Into<String>, expected: impl Into<String>, column: usize) -> Self {
        Self { found: found.into(), expected: expected.into(), column, hints: Vec::new(), two_ways: false }
    }

    /// Ready answers, as they would be typed.
    #[must_use]
    pub fn hints(&self) -> Vec<String> {
        self.hints.clone()
    }
}

/// Longest entry that is read, characters.
const LONGEST: usize = 80;

/// Spellings of units beside their symbols; compared without case, spaces, dots and brackets.
const SPELLINGS: [(&str, Unit); 85] = [
    ("°c", Unit::Celsius),
    ("ºc", Unit::Celsius),
    ("degc", Unit::Celsius),
    ("deg c", Unit::Celsius),
    ("celsius", Unit::Celsius),
    ("℃", Unit::Celsius),
    ("grad", Unit::Celsius),
    ("°f", Unit::Fahrenheit),
    ("ºf", Unit::Fahrenheit),
    ("degf", Unit::Fahrenheit),
    ("fahrenheit", Unit::Fahrenheit),
    ("℉", Unit::Fahrenheit),
    ("kelvin", Unit::Kelvin),
    ("°k", Unit::Kelvin),
    ("bara", Unit::Bar),
    ("barabs", Unit::Bar),
    ("mbara", Unit::Millibar),
    ("mbarabs", Unit::Millibar),
    ("hpa", Unit::Millibar),
    ("kpaa", Unit::Kilopascal),
    ("mmhg", Unit::Torr),
    ("psia", Unit::Psi),
    ("atma", Unit::Atmosphere),
    ("vol%", Unit::Percent),
    ("vol-%", Unit::Percent),
    ("%vol", Unit::Percent),
    ("v%", Unit::Percent),
    ("wt%", Unit::Percent),
    ("wt-%", Unit::Percent),
    ("%wt", Unit::Percent),
    ("w%", Unit::Percent),
    ("%w/w", Unit::Percent),
    ("mass%", Unit::Percent),
    ("mass-%", Unit::Percent),
    ("%mass", Unit::Percent),
    ("gew%", Unit::Percent),
    ("gew-%", Unit::Percent),
    ("%v/v", Unit::Percent),
    ("mol%", Unit::Percent),
    ("mol-%", Unit::Percent),
    ("%mol", Unit::Percent),
    ("percent", Unit::Percent),
    ("pct", Unit::Percent),
    ("ppmv", Unit::Ppm),
    ("volppm", Unit::Ppm),
    ("vpm", Unit::Ppm),
    ("ppbv", Unit::Ppb),
    ("volppb", Unit::Ppb),
    ("1", Unit::Fraction),
    ("mol/mol", Unit::Fraction),
    ("volt", Unit::Volt),
    ("millivolt", Unit::Millivolt),
    ("k/s", Unit::KelvinPerSecond),
    ("c/s", Unit::KelvinPerSecond),
    ("°c/s", Unit::KelvinPerSecond),
    ("degc/s", Unit::KelvinPerSecond),
    ("k/sec", Unit::KelvinPerSecond),
    ("k/min", Unit::KelvinPerMinute),
    ("c/min", Unit::KelvinPerMinute),
    ("°c/min", Unit::KelvinPerMinute),
    ("degc/min", Unit::KelvinPerMinute),
    ("k/m", Unit::KelvinPerMinute),
    ("k/h", Unit::KelvinPerHour),
    ("c/h", Unit::KelvinPerHour),
    ("°c/h", Unit::KelvinPerHour),
    ("degc/h", Unit::KelvinPerHour),
    ("k/hr", Unit::KelvinPerHour),
    ("k/hour", Unit::KelvinPerHour),
    ("sec", Unit::Second),
    ("secs", Unit::Second),
    ("second", Unit::Second),
    ("seconds", Unit::Second),
    ("mins", Unit::Minute),
    ("minute", Unit::Minute),
    ("minutes", Unit::Minute),
    ("hr", Unit::Hour),
    ("hrs", Unit::Hour),
    ("hour", Unit::Hour),
    ("hours", Unit::Hour),
    ("stunden", Unit::Hour),
    ("frac", Unit::Fraction),
    ("torr", Unit::Torr),
    ("mm hg", Unit::Torr),
    ("pascal", Unit::Pascal),
    ("atm", Unit::Atmosphere),
];

/// Columns of water, which show a pressure over the hall; size of their step in bar.
const WATER_COLUMNS: [(&str, f64); 7] = [
    ("mmh2o", 9.806_65e-5),
    ("mmwc", 9.806_65e-5),
    ("mmws", 9.806_65e-5),
    ("cmh2o", 9.806_65e-4),
    ("inh2o", 2.490_889_1e-3),
    ("inwc", 2.490_889_1e-3),
    ("inwg", 2.490_889_1e-3),
];

/// What follows a unit of a pressure over the hall.
const OVER_THE_HALL: [&str; 9] =
    ["overpressure", "gauge", "above", "over", "\u{fc}berdruck", "rel", "\u{fc}", "o", "g"];

/// Size in bar of the step of a unit that shows a pressure over the hall; `None` for any other unit.
fn gauge_step(text: &str) -> Option<f64> {
    if unit(text).is_some() {
        return None;
    }
    let key = folded(text);
    let column = WATER_COLUMNS.iter().find(|(w, _)| *w == key).map(|(_, step)| *step);
    column.or_else(|| {
        let mut stems = OVER_THE_HALL.iter().filter_map(|end| key.strip_suffix(end)).filter_map(unit);
        stems.find(|u| u.kind() == Kind::Pressure).map(Unit::step)
    })
}

fn folded(text: &str) -> String {
    text.chars().filter(|c| !c.is_whitespace() && !matches!(c, '(' | ')' | '.')).flat_map(char::to_lowercase).collect()
}

/// The unit a text names, in any spelling; `None` where it names none.
#[must_use]
pub fn unit(text: &str) -> Option<Unit> {
    let bare = text.trim();
    if let Some(unit) = Unit::ALL.iter().find(|u| u.symbol() == bare) {
        return Some(*unit);
    }
    let key = folded(bare);
    // Case tells millibar from megabar and millivolt from megavolt; nobody measures either mega here.
    SPELLINGS
        .iter()
        .find(|(s, _)| folded(s) == key)
        .map(|(_, u)| *u)
        .or_else(|| Unit::ALL.iter().find(|u| folded(u.symbol()) == key).copied())
}

/// A plain number in the habit of the site, without unit.
///
/// # Errors
/// [`EntryError`] where it is no number, or could be two.
pub fn number(text: &str) -> Result<f64, EntryError> {
    let text = text.trim();
    let (value, used) = take_number(text, 1)?;
    if used < text.len() {
        return Err(EntryError::new(
            format!("\u{201c}{}\u{201d} after the number", clip(text[used..].trim())),
            "nothing after it",
            text[..used].chars().count() + 1,
        ));
    }
    Ok(value)
}

/// Reads a quantity of one kind.
///
/// # Errors
/// [`EntryError`] where it does not read, has a unit of another kind, or cannot be (below 0 K, for example).
pub fn parse(text: &str, kind: Kind, default_unit: Unit) -> Result<Typed, EntryError> {
    parse_of(text, &[kind], default_unit)
}

/// Reads a quantity of any kind; a number without a unit is in `default_unit`.
///
/// # Errors
/// [`EntryError`] as for [`parse`].
pub fn parse_any(text: &str, default_unit: Unit) -> Result<Typed, EntryError> {
    use Kind::{Fraction, Pressure, Rate, Temperature, Time, Voltage};
    parse_of(text, &[Temperature, Pressure, Fraction, Voltage, Rate, Time], default_unit)
}

/// Reads a quantity of one of several kinds; a number without a unit is in `default_unit`.
///
/// # Errors
/// [`EntryError`] as for [`parse`].
pub fn parse_of(text: &str, kinds: &[Kind], default_unit: Unit) -> Result<Typed, EntryError> {
    let error = match parse_plain(text, kinds, default_unit) {
        Err(e) if e.two_ways => e,
        other => return other,
    };
    // 1.025 bar may be typed: 1025 bar is no gas of a hot line, so only one of the two can be meant.
    let (mut can_be, mut last) = (Vec::new(), None);
    for hint in &error.hints {
        match parse_plain(hint, kinds, default_unit) {
            Ok(typed) => can_be.push(typed),
            Err(e) => last = Some(e),
        }
    }
    // Where neither can be taken, the reason is the message: a choice between the two would lead nowhere. Where
    // it leads to a second question, one question follows the other.
    if let (true, Some(e)) = (can_be.is_empty(), last.filter(|e| !e.two_ways)) {
        return Err(e);
    }
    can_be.retain(plausible);
    match can_be.pop() {
        Some(only) if can_be.is_empty() => Ok(only),
        _ => Err(error),
    }
}

/// Whether a hot line can show the reading; used only to choose between two ways to read one number.
fn plausible(typed: &Typed) -> bool {
    let most = match typed.quantity.unit.kind() {
        Kind::Temperature => 6000.0,
        Kind::Pressure => 300.0,
        Kind::Fraction => 1.03,
        Kind::Voltage => 5.0,
        Kind::Rate | Kind::Time => f64::INFINITY,
    };
    typed.quantity.value <= most
}

fn parse_plain(text: &str, kinds: &[Kind], default_unit: Unit) -> Result<Typed, EntryError> {
    let whole = text;
    let length = whole.chars().count();
    if length > LONGEST {
        return Err(EntryError::new(
            format!("{length} characters"),
            format!("a reading of at most {LONGEST}"),
            LONGEST,
        ));
    }
    let mut rest = whole.trim();
    let column = |rest: &str| whole.trim_end().chars().count().saturating_sub(rest.chars().count()) + 1;
    if rest.is_empty() {
        return Err(EntryError::new("nothing", "a number with its unit", 1));
    }
    let mut bound = false;
    if let Some(after) = rest.strip_prefix(['<', '\u{2264}']) {
        bound = true;
        rest = after.strip_prefix('=').unwrap_or(after).trim_start();
    }
    let (after, over_before) = take_lead(rest, kinds);
    rest = after;
    let number_column = column(rest);
    let plus = rest.starts_with('+');
    let (value, used) = take_number(rest, column(rest)).map_err(|mut e| {
        if bound {
            e.hints.iter_mut().for_each(|h| h.insert(0, '<'));
        }
        e
    })?;
    let number_end = whole.trim().len() - rest.len() + used;
    rest = rest[used..].trim_start();
    // The tolerance may stand before or after the unit.
    let (before, tolerance) = split_tolerance(rest);
    let mut unit_text = before.trim();
    let mut tolerance_unit = "";
    let tolerance_value;
    let mut tolerance_column = 1;
    if let Some(t) = tolerance {
        let t = t.trim_start();
        tolerance_column = column(t);
        let (number, used) = take_number(t, column(t)).map_err(|mut e| {
            // A ready answer is the whole entry, not the tolerance alone.
            let whole = whole.trim();
            let head = &whole[..whole.len() - t.len()];
            e.hints.iter_mut().for_each(|h| h.insert_str(0, head));
            e
        })?;
        tolerance_unit = t[used..].trim();
        if unit_text.is_empty() {
            unit_text = tolerance_unit;
        }
        tolerance_value = Some(number);
    } else {
        tolerance_value = None;
    }
    let unit_column = whole.trim()[..number_end].chars().count() + 1;
    // Before the words of a dew point are taken off: 12 mbar over is no 12 mbar.
    if let Some(step) = gauge_step(unit_text) {
        let mut e =
            EntryError::new(format!("a pressure over the hall, {unit_text}"), "an absolute pressure", unit_column);
        e.hints.extend(absolute(value * step));
        return Err(e);
    }
    let (unit_text, over_after) = take_over(unit_text);
    let own = take_over(tolerance_unit);
    let over = over_before.or(over_after).or(own.1);
    let own = own.0;
    let mut unit_text = unit_text.trim();
    if kinds.contains(&Kind::Temperature) && kinds.contains(&Kind::Fraction) {
        // Water in place of a dew point: 35 ppm H2O.
        unit_text = unit_text.strip_suffix("H2O").map_or(unit_text, str::trim_end);
    }
    if before.trim().is_empty()
        && unit(&own) == Some(Unit::Kelvin)
        && kinds.contains(&Kind::Temperature)
        && matches!(default_unit, Unit::Celsius | Unit::Fahrenheit)
    {
        // 950 +- 4 K may be 950 C with a tolerance in kelvin, or 950 K: the words do not say.
        let head = whole.trim()[..number_end].trim_end();
        let tail = &whole.trim()[number_end..].trim_start();
        let usual = default_unit.symbol();
        let mut e = EntryError::new(
            format!("\u{201c}{}\u{201d}, which may be in K or in {usual}", clip(whole.trim())),
            "the unit of the reading before its tolerance",
            unit_column,
        );
        e.two_ways = true;
        e.hints = alloc::vec![format!("{head} {usual} {tail}"), format!("{head} K {tail}")];
        return Err(e);
    }
    let (unit_found, unit_typed) = if unit_text.is_empty() {
        (default_unit, false)
    } else {
        let found = unit(unit_text).filter(|u| kinds.contains(&u.kind())).ok_or_else(|| {
            let all: Vec<&str> = Unit::ALL.iter().filter(|u| kinds.contains(&u.kind())).map(|u| u.symbol()).collect();
            EntryError::new(
                if unit_text.starts_with(|c: char| c.is_ascii_digit()) {
                    format!("\u{201c}{}\u{201d} after the number", clip(unit_text))
                } else {
                    format!("the unit \u{201c}{}\u{201d}", clip(unit_text))
                },
                format!("one of {}", all.join(", ")),
                unit_column,
            )
        })?;
        (found, true)
    };
    let fail = |e: QuantityError, column: usize| {
        let text = e.to_string();
        let (found, expected) = text.split_once(", expected ").unwrap_or((&text, "a value that can be"));
        EntryError::new(found.trim_start_matches("found "), expected, column)
    };
    let alone = kinds == [Kind::Pressure];
    if alone && plus {
        // Nobody writes a plus before an absolute pressure.
        let mut e = EntryError::new(
            format!("+{} {}, which may stand over the hall", Figure(value), unit_found.symbol()),
            "an absolute pressure without a sign",
            number_column,
        );
        e.hints.extend(absolute(value * unit_found.step()));
        e.hints.push(whole.trim().trim_start_matches('+').trim_start().to_string());
        return Err(e);
    }
    let mut quantity = Quantity::new(value, unit_found).map_err(|e| {
        let mut e = fail(e, number_column);
        if alone && value < 0.0 {
            // A draught below the hall's pressure is meant.
            e.hints.extend(absolute(value * unit_found.step()));
        }
        e
    })?;
    if let Some(t) = tolerance_value {
        // A tolerance in a unit of its own is turned into steps of the value's unit.
        let own = own.trim();
        let wrong = |expected: String, column: usize| {
            EntryError::new(format!("a tolerance in \u{201c}{}\u{201d}", clip(own)), expected, column)
        };
        let steps = match unit(own).filter(|_| !own.is_empty()) {
            Some(Unit::Percent) if unit_found != Unit::Percent => {
                // Of the reading, or of the range: said in the reading's own unit it cannot be misread.
                let mut e = wrong(format!("a tolerance in {}", unit_found.symbol()), column(tolerance_unit));
                let whole = whole.trim();
                let head = whole[..whole.len() - tolerance.map_or(0, str::len)].trim_end();
                e.hints.push(format!("{head} {}", Figure(value.abs() * t / 100.0)));
                return Err(e);
            }
            Some(u) if u.kind() == unit_found.kind() => t * u.step() / unit_found.step(),
            _ if own.is_empty() => t,
            _ => return Err(wrong(format!("a tolerance in {}", unit_found.symbol()), column(tolerance_unit))),
        };
        quantity = quantity.with_tolerance(steps, Spread::Limits).map_err(|e| fail(e, tolerance_column))?;
    }
    let share = share(unit_text);
    Ok(Typed { quantity, bound, over, unit_typed, share })
}

/// The absolute pressure as it would be typed, of one over the hall's; none where it would be below 0.
fn absolute(over_bar: f64) -> Option<String> {
    let bar = BAR_PER_ATM + over_bar;
    (bar > 0.0).then(|| format!("{} bar", shortest(round_to(bar, 1e-5))))
}

/// A number to at most four digits, for a ready answer.
struct Figure(f64);

impl core::fmt::Display for Figure {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        let rounded: f64 = format!("{:.3e}", self.0).parse().unwrap_or(self.0);
        write!(f, "{rounded}")
    }
}

fn clip(text: &str) -> String {
    // A control character would spoil the place it is shown in.
    let mut piece: String = text.chars().take(24).map(|c| if c.is_control() { '\u{fffd}' } else { c }).collect();
    if text.chars().count() > 24 {
        piece.push('\u{2026}');
    }
    piece
}

fn round_to(x: f64, step: f64) -> f64 {
    crate::math::round(x / step) * step
}

fn shortest(x: f64) -> String {
    let text = format!("{x:.5}");
    text.trim_end_matches('0').trim_end_matches('.').to_string()
}

fn split_tolerance(text: &str) -> (&str, Option<&str>) {
    for mark in ["±", "+/-", "+-", "\u{2213}"] {
        if let Some(at) = text.find(mark) {
            return (&text[..at], Some(&text[at + mark.len()..]));
        }
    }
    (text, None)
}

/// Takes the words for a dew or frost point off a unit: `C dp`, `°C frost`, `C over ice`.
fn take_over(text: &str) -> (String, Option<&'static str>) {
    let mut over = None;
    let mut kept: Vec<&str> = Vec::new();
    for word in text.split_whitespace() {
        match word.to_lowercase().trim_end_matches(',') {
            "fp" | "frost" | "frostpoint" | "ice" => over = Some("ice"),
            "water" => over = Some("water"),
            "dp" | "dew" | "dewpoint" | "td" | "point" | "over" => {}
            _ => kept.push(word),
        }
    }
    (kept.join(" "), over)
}

/// Takes the words for a dew or frost point off the head of a text: `dp -48`, `frost point \u{2212}50 C`.
fn take_lead<'t>(text: &'t str, kinds: &[Kind]) -> (&'t str, Option<&'static str>) {
    let (mut rest, mut over) = (text, None);
    while kinds.contains(&Kind::Temperature) {
        let end = rest.find(|c: char| !c.is_alphabetic()).unwrap_or(rest.len());
        let (left, found) = take_over(&rest[..end]);
        if end == 0 || !left.is_empty() {
            break;
        }
        over = over.or(found);
        rest = rest[end..].trim_start_matches([' ', ':', '=', '\u{a0}']);
    }
    (rest, over)
}

/// A number at the head of a text, and how many bytes it takes.
fn take_number(text: &str, column: usize) -> Result<(f64, usize), EntryError> {
    let wanted = "a number";
    let mut chars = text.char_indices().peekable();
    let mut sign = "";
    if let Some(&(_, c)) = chars.peek() {
        if matches!(c, '-' | '\u{2212}' | '\u{2013}' | '\u{2010}' | '\u{2011}') {
            sign = "-";
            chars.next();
        } else if c == '+' && !text.starts_with("+-") && !text.starts_with("+/") {
            sign = "+";
            chars.next();
        }
        while chars.peek().is_some_and(|(_, c)| c.is_whitespace()) {
            chars.next();
        }
    }
    // The body: digits with their separators, as typed.
    let mut body = String::new();
    let mut end = chars.peek().map_or(text.len(), |(i, _)| *i);
    while let Some(&(i, c)) = chars.peek() {
        let next_digit = text[i + c.len_utf8()..].chars().next().is_some_and(|d| d.is_ascii_digit());
        let after_digit = body.ends_with(|d: char| d.is_ascii_digit());
        let space = matches!(c, ' ' | '\u{a0}' | '\u{2009}' | '\u{202f}' | '\'' | '\u{2019}');
        if c.is_ascii_digit() || (matches!(c, '.' | ',') && (next_digit || after_digit)) {
            body.push(c);
        } else if space && after_digit && three_digits(&text[i + c.len_utf8()..]) {
            body.push('\'');
        } else {
            break;
        }
        chars.next();
        end = i + c.len_utf8();
    }
    if body.is_empty() {
        let found = if text.is_empty() { "nothing".to_string() } else { format!("\u{201c}{}\u{201d}", clip(text)) };
        return Err(EntryError::new(found, wanted, column));
    }
    let mut plain = settle(&body, sign, column).map_err(|mut e| {
        // A ready answer keeps the unit and the tolerance that were typed.
        e.hints.iter_mut().for_each(|h| h.push_str(&text[end..]));
        e
    })?;
    let (mut exponent, mut used) = take_exponent(&text[end..]);
    if used == 0 && body == "10" {
        // A power of ten alone: 10^-3.
        let caret = text[end..].strip_prefix('^');
        let raised = take_digits(caret.unwrap_or(&text[end..]));
        let superscript = text[end..].starts_with(|c: char| is_superscript(c));
        if let Some((value, n)) = raised.filter(|_| caret.is_some() || superscript) {
            plain = String::from("1");
            (exponent, used) = (value, n + usize::from(caret.is_some()));
        }
    }
    end += used;
    let value: f64 = format!("{sign}{plain}e{exponent}")
        .parse()
        .map_err(|_| EntryError::new(format!("\u{201c}{}\u{201d}", clip(&text[..end])), wanted, column))?;
    if !value.is_finite() {
        return Err(EntryError::new(
            format!("\u{201c}{}\u{201d}", clip(&text[..end])),
            "a number below 10^308",
            column,
        ));
    }
    Ok((value, end))
}

fn three_digits(text: &str) -> bool {
    let digits = text.chars().take_while(char::is_ascii_digit).count();
    digits == 3
}

/// Digits with separators to digits with a point.
fn settle(body: &str, sign: &str, column: usize) -> Result<String, EntryError> {
    let has = |c: char| body.contains(c);
    let count = |c: char| body.matches(c).count();
    let bad = || EntryError::new(format!("\u{201c}{}\u{201d}", clip(body)), "one decimal point or comma", column);
    let spaced = has('\'');
    let without = |c: char| body.chars().filter(|x| *x != c && *x != '\'').collect::<String>();
    if has('.') && has(',') {
        // The one that stands last is the decimal sign; the other parts thousands.
        let decimal = if body.rfind('.') > body.rfind(',') { '.' } else { ',' };
        let thousands = if decimal == '.' { ',' } else { '.' };
        if count(decimal) != 1 || !groups_of_three(body, thousands, decimal) {
            return Err(bad());
        }
        return Ok(without(thousands).replace(decimal, "."));
    }
    for c in [',', '.'] {
        match count(c) {
            0 => {}
            1 => {
                let (before, after) = body.split_once(c).unwrap_or((body, ""));
                let ambiguous =
                    !spaced && after.len() == 3 && (1..=3).contains(&before.len()) && !before.starts_with('0');
                if ambiguous {
                    let mut e = EntryError::new(
                        format!(
                            "\u{201c}{sign}{body}\u{201d}, which may be {sign}{before}{after} or {sign}{before}.{after}"
                        ),
                        "one that can be read one way only",
                        column,
                    );
                    e.two_ways = true;
                    e.hints = alloc::vec![format!("{sign}{before}{after}"), format!("{sign}{before}.{after}0")];
                    return Err(e);
                }
                let plain = without('\'').replace(c, ".");
                return Ok(if after.is_empty() { plain + "0" } else { plain });
            }
            _ => {
                if spaced || !groups_of_three(body, c, '\0') {
                    return Err(bad());
                }
                return Ok(without(c));
            }
        }
    }
    Ok(without('\''))
}

fn groups_of_three(body: &str, separator: char, decimal: char) -> bool {
    let whole = body.split(decimal).next().unwrap_or(body);
    let mut parts = whole.split(separator);
    parts.next().is_some_and(|p| (1..=3).contains(&p.len())) && parts.all(|p| p.len() == 3)
}

/// An exponent at the head of a text: `e-3`, `×10^-3`, `·10⁻³`; and how many bytes it takes.
fn take_exponent(text: &str) -> (i32, usize) {
    if let Some(rest) = text.strip_prefix(['e', 'E'])
        && let Some((value, used)) = take_digits(rest)
    {
        return (value, used + 1);
    }
    let trimmed = text.trim_start();
    let lead = text.len() - trimmed.len();
    for mark in ["×", "·", "*", "x", "⋅"] {
        if let Some(rest) = trimmed.strip_prefix(mark) {
            let inner = rest.trim_start();
            let gap = rest.len() - inner.len();
            if let Some(rest) = inner.strip_prefix("10") {
                let caret = rest.strip_prefix('^');
                let body = caret.unwrap_or(rest);
                if let Some((value, used)) = take_digits(body) {
                    return (value, lead + mark.len() + gap + 2 + usize::from(caret.is_some()) + used);
                }
            }
        }
    }
    (0, 0)
}

fn is_superscript(c: char) -> bool {
    matches!(c, '\u{207b}' | '\u{2070}' | '\u{b9}' | '\u{b2}' | '\u{b3}' | '\u{2074}'..='\u{2079}')
}

/// A signed whole number of at most three digits, plain or raised, at the head of a text; and its bytes.
fn take_digits(text: &str) -> Option<(i32, usize)> {
    let mut value = String::new();
    let mut used = 0;
    for c in text.chars() {
        let plain = match c {
            '-' | '\u{2212}' | '\u{207b}' if value.is_empty() => '-',
            '+' if value.is_empty() => '+',
            '0'..='9' => c,
            '\u{2070}' => '0',
            '\u{b9}' => '1',
            '\u{b2}' => '2',
            '\u{b3}' => '3',
            '\u{2074}'..='\u{2079}' => char::from_digit(c as u32 - 0x2070, 10)?,
            _ => break,
        };
        value.push(plain);
        used += c.len_utf8();
    }
    if value.len() > 4 {
        return None;
    }
    value.parse().ok().map(|v| (v, used))
}
