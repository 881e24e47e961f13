//! The line file: bytes to text, text to a checked [`Line`], every wrong field named by its path and in words.
//!
//! Nothing is thrown away: unknown fields stay in the text and are reported; all problems of a file are
//! gathered before it is refused, the first with the rest behind it.

use crate::json::{Json, TWICE, clip, line_of};
use crate::model::{Activity, ActsAbove, Change, Line, Member, Note, Wish, Zone};
use alloc::format;
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_gas::reading::{Basis, Cell, Channel, DewPoint, GasReading, Surface};
use leeway_quantity::constants::BAR_PER_ATM;
use leeway_quantity::entry::Share;
use leeway_quantity::instrument;
use leeway_quantity::{Kind, Quantity, Spread, Unit};
use leeway_substances::Species;

/// Version of the form this reader knows.
pub const VERSION: f64 = 1.0;
/// Largest file that is read, bytes: a line with every zone a plant can have takes a hundredth of it.
pub const LARGEST: usize = 4_000_000;
/// Problems gathered before the reader stops.
const MOST_PROBLEMS: usize = 20;
/// Largest sum of the charge's mass shares, as a fraction: rounding of an assay.
const LARGEST_CHARGE: f64 = 1.005;

/// Why a file is refused.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
#[error("{message}")]
pub struct FileError {
    /// Stable code.
    pub code: &'static str,
    /// Path in the file.
    pub at: String,
    /// The place in words, with the line of the text.
    pub place: String,
    /// The sentence.
    pub message: String,
    /// What was found.
    pub found: String,
    /// What was expected.
    pub expected: String,
    /// What to do.
    pub hints: Vec<String>,
    /// Further problems of the same file.
    pub more: Vec<FileError>,
}

fn error(code: &'static str, at: &str, place: String, found: String, expected: &str) -> FileError {
    let message = format!("found {found}, expected {expected}");
    FileError {
        code,
        at: at.to_string(),
        place,
        message,
        found,
        expected: expected.to_string(),
        hints: Vec::new(),
        more: Vec::new(),
    }
}

/// Bytes of a file as text: UTF-8, a byte order mark dropped with a note.
///
/// # Errors
/// [`FileError`] for a file larger than [`LARGEST`], UTF-16, a binary file, or bytes that are not UTF-8.
pub fn decode(bytes: &[u8]) -> Result<(String, Vec<Note>), FileError> {
    let file = || String::from("the file");
    if bytes.len() > LARGEST {
        return Err(too_large());
    }
    let utf16 = bytes.starts_with(&[0xff, 0xfe])
        || bytes.starts_with(&[0xfe, 0xff])
        || bytes.starts_with(b"{\0")
        || bytes.starts_with(b"\0{");
    if utf16 {
        let mut e = error("file.utf16", "", file(), "text in UTF-16".to_string(), "text in UTF-8");
        e.hints.push("Save it again as UTF-8".to_string());
        return Err(e);
    }
    let mut notes = Vec::new();
    let body = bytes.strip_prefix(&[0xef, 0xbb, 0xbf]).unwrap_or(bytes);
    if body.len() < bytes.len() {
        notes.push(Note {
            at: String::new(),
            text: "A byte order mark at the head of the file is left out".to_string(),
        });
    }
    if body.iter().all(u8::is_ascii_whitespace) {
        return Err(error("file.empty", "", file(), "an empty file".to_string(), "a line file, which begins with {"));
    }
    if body.contains(&0) {
        return Err(error("file.binary", "", file(), "a binary file".to_string(), "a line file, which is text"));
    }
    match core::str::from_utf8(body) {
        Ok(text) => Ok((text.to_string(), notes)),
        Err(e) => {
            let line = body[..e.valid_up_to()].iter().filter(|b| **b == b'\n').count() + 1;
            let found = format!("a byte that is not UTF-8 (0x{:02x}) in line {line}", body[e.valid_up_to()]);
            let mut e = error("file.utf8", "", format!("line {line}"), found, "text in UTF-8");
            e.hints.push("Save it again as UTF-8".to_string());
            Err(e)
        }
    }
}

/// The text as an ordered tree.
///
/// # Errors
/// [`FileError`] with line and column where the text is not JSON, is cut off, nests deeper than 128 or holds
/// a key twice.
pub(crate) fn tree(text: &str) -> Result<Json, FileError> {
    if text.len() > LARGEST {
        return Err(too_large());
    }
    if !text.trim_start().starts_with(['{', '[']) && serde_json::from_str::<Json>(text).is_err() {
        let line = text.len() - text.trim_start().len();
        let line = text[..line].matches('\n').count() + 1;
        let head = text.trim_start().lines().next().unwrap_or("");
        let found = if head.is_empty() {
            "an empty file".to_string()
        } else {
            format!("text that begins with {}", quoted(head))
        };
        let mut e = error("file.json", "", format!("line {line}"), found, "a line file, which begins with {");
        if head.contains([';', '\t']) {
            e.hints.push("A table of readings is no line file".to_string());
        }
        return Err(e);
    }
    serde_json::from_str::<Json>(text).map_err(|e| syntax(text, &e))
}

fn too_large() -> FileError {
    let found = "a file of more than 4 MB".to_string();
    let mut e = error("file.large", "", "the file".to_string(), found, "a line file of at most 4 MB");
    e.hints.push("A record of readings is no line file".to_string());
    e
}

/// What is wrong with a text that is not JSON, and the mend where the fault is a common one.
fn syntax(text: &str, e: &serde_json::Error) -> FileError {
    let (line, column) = (e.line(), e.column());
    let place = format!("line {line}, column {column}");
    let said = e.to_string();
    let said = said.split(" at line").next().unwrap_or("");
    let row: Vec<char> = text.lines().nth(line.saturating_sub(1)).unwrap_or("").chars().collect();
    let here: String = row.iter().skip(column.saturating_sub(1)).collect();
    let around: String = row.iter().skip(column.saturating_sub(10)).take(20).collect();
    let before = row.get(..column.saturating_sub(1)).unwrap_or(&row).iter().collect::<String>();
    let before = before.trim_end();
    let found = format!("{} in line {line}, column {column}", quoted(around.trim()));
    let one = |found: String, expected: &str, hint: &str| {
        let mut e = error("file.json", "", place.clone(), found, expected);
        if !hint.is_empty() {
            e.hints.push(hint.to_string());
        }
        e
    };
    if e.is_eof() {
        let found = format!("the end of the file in line {line}");
        return one(found, "the rest of the line file: it is cut off", "Copy the file again from where it was saved");
    }
    if said.contains("recursion") {
        let found = format!("brackets nested more than 128 deep in line {line}");
        return one(found, "a line file, which nests 8 deep", "");
    }
    if said.contains(TWICE) {
        return one(format!("{said} in line {line}"), "each key once in its object", "Take one of the two out");
    }
    if said.contains("number out of range") {
        return one(found, "a number below 10^308", "");
    }
    if here.starts_with("NaN") || here.starts_with("Inf") || here.starts_with("-Inf") {
        return one(found, "a number", "Leave the reading out where there is none");
    }
    if here.starts_with("//") || here.starts_with("/*") || here.starts_with('#') {
        return one(found, "no remarks in a line file", "Put it into the field \u{201c}about\u{201d}");
    }
    if here.starts_with('\'') {
        return one(found, "a text in double quotes", "Write \" for '");
    }
    if here.starts_with('+') {
        return one(found, "a number without a plus", "Take the + out");
    }
    if here.starts_with(|c: char| c.is_ascii_digit()) && said.contains("key must be") {
        return one(found, "a number with a decimal point", "Write 1.02 for 1,02");
    }
    if said.contains("trailing comma") {
        return one(found, "another member after the comma", "Take the last comma out");
    }
    if said.contains("trailing characters") {
        return one(found, "nothing after the end of the line", "One file is one line: save the rest apart");
    }
    if said.contains("expected `,`") && !before.ends_with(',') {
        return one(found, "a comma before it", "");
    }
    one(found, "JSON: texts in double quotes, numbers without, commas between members", "")
}

fn quoted(text: &str) -> String {
    format!("\u{201c}{}\u{201d}", clip(text))
}

struct Reader<'a> {
    text: &'a str,
    root: &'a Json,
    problems: Vec<FileError>,
    notes: Vec<Note>,
}

/// Reads and checks a line.
///
/// # Errors
/// [`FileError`] for the first problem, with up to nineteen more behind it.
pub fn read(text: &str) -> Result<Line, FileError> {
    let root = tree(text)?;
    let mut reader = Reader { text, root: &root, problems: Vec::new(), notes: Vec::new() };
    let line = reader.line();
    let mut problems = reader.problems;
    if problems.is_empty() {
        return line
            .ok_or_else(|| error("file.line", "", "the file".to_string(), "no line".to_string(), "a line file"));
    }
    let mut first = problems.remove(0);
    first.more = problems;
    Err(first)
}

const TOP: [&str; 13] = [
    "leeway",
    "name",
    "invented",
    "about",
    "charge_name",
    "readings_note",
    "coverage_factor",
    "pressure",
    "charge",
    "zones",
    "changes",
    "variants",
    "view",
];
const ANALYSIS: &str = "shares in { } by formula, such as {\"H2\": {\"value\": 75, \"unit\": \"%\"}}";
const QUANTITY: [&str; 6] = ["value", "unit", "tolerance", "tolerance_kind", "instrument", "source"];

impl Reader<'_> {
    /// The place of a path in words: `zone 3, Heat 3; line 41`.
    fn place(&self, at: &str) -> String {
        let mut words = Vec::new();
        for (key, noun) in
            [("zones", "zone"), ("changes", "change"), ("charge", "charge member"), ("variants", "variant")]
        {
            let Some(rest) = at.strip_prefix(key).and_then(|r| r.strip_prefix('[')) else { continue };
            let Some(i) = rest.split(']').next().and_then(|i| i.parse::<usize>().ok()) else { continue };
            let mut word = format!("{noun} {}", i + 1);
            if let Some(Json::List(list)) = self.root.get(key) {
                let name = list.get(i).and_then(|o| o.get("name").or_else(|| o.get("substance"))).and_then(Json::text);
                if let Some(name) = name.filter(|n| !n.trim().is_empty()) {
                    word += &format!(", {}", clip(name));
                }
            }
            words.push(word);
        }
        if let Some(line) = line_of(self.text, at) {
            words.push(format!("line {line}"));
        }
        words.join("; ")
    }

    fn wrong(&mut self, code: &'static str, at: &str, found: String, expected: &str) {
        self.wrong_hint(code, at, found, expected, Vec::new());
    }

    fn wrong_hint(&mut self, code: &'static str, at: &str, found: String, expected: &str, hints: Vec<String>) {
        if self.problems.len() < MOST_PROBLEMS {
            let mut e = error(code, at, self.place(at), found, expected);
            if !at.is_empty() {
                e.message = format!("{at}: {}", e.message);
            }
            e.hints = hints;
            self.problems.push(e);
        }
    }

    fn object<'j>(&mut self, json: &'j Json, at: &str, expected: &str) -> Option<&'j [(String, Json)]> {
        match json {
            Json::Object(members) => Some(members),
            other => {
                self.wrong("line.type", at, other.describe(), expected);
                None
            }
        }
    }

    fn list<'j>(&mut self, json: Option<&'j Json>, at: &str) -> &'j [Json] {
        match json {
            None => &[],
            Some(Json::List(list)) => list,
            Some(other) => {
                self.wrong("line.type", at, other.describe(), "a list in [ ]");
                &[]
            }
        }
    }

    /// Notes fields that are not known, with the nearest known name.
    fn known(&mut self, members: &[(String, Json)], known: &[&str], at: &str) {
        for (key, _) in members {
            if known.contains(&key.as_str()) {
                continue;
            }
            let path = if at.is_empty() { key.clone() } else { format!("{at}.{key}") };
            let hint = nearest(key, known.iter().copied())
                .map_or_else(String::new, |k| format!(" Is \u{201c}{k}\u{201d} meant?"));
            self.notes.push(Note {
                at: path,
                text: format!("The field \u{201c}{}\u{201d} is not known: kept, not used.{hint}", clip(key)),
            });
        }
    }

    fn text_of(&mut self, json: Option<&Json>, at: &str, needed: bool) -> Option<String> {
        match json {
            Some(Json::Text(t)) if !t.trim().is_empty() => Some(t.clone()),
            Some(Json::Null) | None if !needed => None,
            Some(other) => {
                let found = if matches!(other, Json::Text(_)) { "an empty text".to_string() } else { other.describe() };
                self.wrong("line.type", at, found, "a text in quotes");
                None
            }
            None => {
                self.wrong("line.missing", at, "nothing".to_string(), "a text in quotes");
                None
            }
        }
    }

    fn flag(&mut self, json: Option<&Json>, at: &str) -> bool {
        match json {
            None => false,
            Some(Json::Bool(b)) => *b,
            Some(other) => {
                self.wrong("line.type", at, other.describe(), "true or false");
                false
            }
        }
    }

    fn number(&mut self, json: Option<&Json>, at: &str, low: f64, high: f64, expected: &str) -> Option<f64> {
        match json {
            None => None,
            Some(Json::Number(n)) if *n >= low && *n <= high => Some(*n),
            Some(other) => {
                self.wrong("line.number", at, other.describe(), expected);
                None
            }
        }
    }

    /// A quantity of one of the kinds, with its tolerance.
    fn quantity(&mut self, json: Option<&Json>, at: &str, kinds: &[Kind], more: &[&str]) -> Option<Quantity> {
        let json = json?;
        let Json::Object(members) = json else {
            let (expected, hints) = as_quantity(json, kinds);
            self.wrong_hint("line.type", at, json.describe(), &expected, hints);
            return None;
        };
        let known: Vec<&str> = QUANTITY.iter().chain(more).copied().collect();
        self.known(members, &known, at);
        let units: Vec<&str> = Unit::ALL.iter().filter(|u| kinds.contains(&u.kind())).map(|u| u.symbol()).collect();
        let wanted = format!("one of {}", units.join(", "));
        let unit_at = format!("{at}.unit");
        let unit = match json.get("unit") {
            Some(Json::Text(t)) => match leeway_quantity::entry::unit(t).filter(|u| kinds.contains(&u.kind())) {
                Some(unit) => Some(unit),
                None => {
                    let hints = unit_hints(json, t, kinds, at);
                    self.wrong_hint("line.unit", &unit_at, quoted(t), &wanted, hints);
                    None
                }
            },
            Some(other) => {
                self.wrong("line.unit", &unit_at, other.describe(), &wanted);
                None
            }
            None => {
                self.wrong("line.missing", &unit_at, "no unit".to_string(), &wanted);
                None
            }
        };
        let value_at = format!("{at}.value");
        let value = match json.get("value") {
            Some(Json::Number(n)) => Some(*n),
            Some(other) => {
                let ready = other.text().and_then(|t| leeway_quantity::entry::number(t).ok());
                let hints = ready.map(|n| format!("\"value\": {n}")).into_iter().collect();
                self.wrong_hint("line.number", &value_at, other.describe(), "a number without quotes", hints);
                None
            }
            None => {
                self.wrong("line.missing", &value_at, "no value".to_string(), "a number");
                None
            }
        };
        let (unit, value) = (unit?, value?);
        let quantity = match Quantity::new(value, unit) {
            Ok(q) => q,
            Err(e) => {
                let text = e.to_string();
                let (found, expected) = text.split_once(", expected ").unwrap_or((&text, ""));
                self.wrong("line.value", &value_at, found.trim_start_matches("found ").to_string(), expected);
                return None;
            }
        };
        self.tolerance(json, at, quantity)
    }

    fn tolerance(&mut self, json: &Json, at: &str, quantity: Quantity) -> Option<Quantity> {
        let kind_at = format!("{at}.tolerance_kind");
        let spread = match json.get("tolerance_kind") {
            None => Spread::Limits,
            Some(Json::Text(t)) if t == "limits" => Spread::Limits,
            Some(Json::Text(t)) if t == "standard" => Spread::Standard,
            Some(other) => {
                self.wrong(
                    "line.tolerance",
                    &kind_at,
                    other.describe(),
                    "\u{201c}limits\u{201d} or \u{201c}standard\u{201d}",
                );
                Spread::Limits
            }
        };
        if let Some(json) = json.get("instrument") {
            let at = format!("{at}.instrument");
            let Some(name) = self.text_of(Some(json), &at, true) else { return Some(quantity) };
            if quantity.unit.kind() != Kind::Temperature {
                self.wrong("line.instrument", &at, quoted(&name), "an instrument for a temperature only");
                return Some(quantity);
            }
            return match instrument::limits_k(&name, quantity.value) {
                Ok(limits) => quantity.with_tolerance(limits / quantity.unit.step(), Spread::Limits).ok(),
                Err(e) => {
                    let text = e.to_string();
                    let (found, expected) = text.split_once(", expected ").unwrap_or((&text, "type K class 1"));
                    self.wrong("line.instrument", &at, found.trim_start_matches("found ").to_string(), expected);
                    None
                }
            };
        }
        match json.get("tolerance") {
            None | Some(Json::Null) => Some(quantity),
            Some(Json::Number(n)) => match quantity.with_tolerance(*n, spread) {
                Ok(q) => Some(q),
                Err(e) => {
                    let text = e.to_string();
                    let (found, expected) = text.split_once(", expected ").unwrap_or((&text, ""));
                    self.wrong(
                        "line.tolerance",
                        &format!("{at}.tolerance"),
                        found.trim_start_matches("found ").to_string(),
                        expected,
                    );
                    None
                }
            },
            Some(other) => {
                self.wrong(
                    "line.tolerance",
                    &format!("{at}.tolerance"),
                    other.describe(),
                    "a number in the quantity's own unit",
                );
                None
            }
        }
    }

    fn line(&mut self) -> Option<Line> {
        let root = self.root;
        let members = self.object(root, "", "a line file: one object in { }")?;
        self.known(members, &TOP, "");
        match root.get("leeway") {
            Some(Json::Number(n)) if *n == VERSION => {}
            Some(Json::Number(n)) if *n > VERSION => self.notes.push(Note {
                at: "leeway".to_string(),
                text: format!(
                    "The file is version {n}; this program reads version 1. What it does not know is kept and not used."
                ),
            }),
            Some(other) => self.wrong("line.version", "leeway", other.describe(), "1, the version of the form"),
            None => self.wrong(
                "line.version",
                "leeway",
                "no version".to_string(),
                "\u{201c}leeway\u{201d}: 1, which marks a line file",
            ),
        }
        let name = self.text_of(root.get("name"), "name", false).unwrap_or_else(|| "Line without a name".to_string());
        let invented = self.flag(root.get("invented"), "invented");
        let coverage_factor = self
            .number(root.get("coverage_factor"), "coverage_factor", 1.0, 4.0, "a number from 1 to 4")
            .unwrap_or(2.0);
        for key in ["about", "charge_name", "readings_note"] {
            self.text_of(root.get(key), key, false);
        }
        let pressure = self.pressure(root.get("pressure"), "pressure");
        let charge = self.charge(root.get("charge"));
        let zones = self.zones(root.get("zones"), pressure);
        // From the file, not from what was taken: a zone with a fault of its own is there all the same.
        let names: Vec<String> = match root.get("zones") {
            Some(Json::List(list)) => {
                list.iter().map(|z| z.get("name").and_then(Json::text).unwrap_or("").to_string()).collect()
            }
            _ => Vec::new(),
        };
        let changes = self.changes(root.get("changes"), &names);
        self.variants_field(root.get("variants"));
        Some(Line { name, invented, coverage_factor, charge, zones, changes, notes: core::mem::take(&mut self.notes) })
    }

    fn pressure(&mut self, json: Option<&Json>, at: &str) -> Option<Quantity> {
        let q = self.quantity(json, at, &[Kind::Pressure], &[])?;
        if q.value > 0.0 {
            return Some(q);
        }
        self.wrong(
            "line.value",
            &format!("{at}.value"),
            format!("{} {}", q.given, q.unit.symbol()),
            "an absolute pressure above 0",
        );
        None
    }

    fn charge(&mut self, json: Option<&Json>) -> Vec<Member> {
        let mut charge = Vec::new();
        let mut sum = 0.0;
        for (i, member) in self.list(json, "charge").iter().enumerate() {
            let at = format!("charge[{i}]");
            let expected = "a member in { } with its substance and share_wt";
            let Some(members) = self.object(member, &at, expected) else { continue };
            self.known(
                members,
                &["substance", "share_wt", "activity", "activity_coefficient", "doubt_factor", "source"],
                &at,
            );
            let Some(substance) = self.text_of(member.get("substance"), &format!("{at}.substance"), true) else {
                continue;
            };
            self.formula(&substance, &format!("{at}.substance"));
            let share_at = format!("{at}.share_wt");
            let share_wt = match member.get("share_wt") {
                Some(Json::Number(n)) => match Quantity::new(*n, Unit::Percent) {
                    Ok(q) => Some(q),
                    Err(_) => {
                        self.wrong("line.value", &share_at, format!("{n}"), "a mass share from 0 to 100 %");
                        None
                    }
                },
                other => {
                    if let Some(json) = other {
                        self.share_of(json, &share_at, Share::Volume, "a share by mass: %, ppm, ppb, fraction");
                    }
                    self.quantity(other, &share_at, &[Kind::Fraction], &[])
                }
            };
            sum += share_wt.map_or(0.0, |q| q.value);
            let activity = self.activity(member, &at, true);
            charge.push(Member { substance, share_wt, activity });
        }
        if sum > LARGEST_CHARGE {
            self.wrong(
                "line.charge",
                "charge",
                format!("mass shares that add up to {:.2} %", sum * 100.0),
                "at most 100.5 %",
            );
        }
        charge
    }

    /// Refuses a share of the other kind: 5 wt% of a gas are not 5 % of its volume.
    fn share_of(&mut self, json: &Json, at: &str, not: Share, expected: &str) {
        let Some(unit) = json.get("unit").and_then(Json::text) else { return };
        if leeway_quantity::entry::share(unit) == Some(not) {
            self.wrong("line.unit", &format!("{at}.unit"), quoted(unit), expected);
        }
    }

    /// Notes a name that is no formula: a trade name or a sum such as loss on ignition may stand in a charge.
    fn formula(&mut self, name: &str, at: &str) {
        if let Err(e) = Species::parse(name) {
            self.notes.push(Note {
                at: at.to_string(),
                text: format!("{} is no formula ({e}): it takes no part in any change", quoted(name)),
            });
        }
    }

    /// Activity or activity coefficient of a member of the charge, or of a change's own list.
    fn activity(&mut self, json: &Json, at: &str, member: bool) -> Option<Activity> {
        let direct = if member { "activity" } else { "value" };
        let positive = "a number above 0 and at most 1000";
        let value = self.number(json.get(direct), &format!("{at}.{direct}"), f64::MIN_POSITIVE, 1000.0, positive);
        let coefficient = self.number(
            json.get("activity_coefficient"),
            &format!("{at}.activity_coefficient"),
            f64::MIN_POSITIVE,
            1000.0,
            positive,
        );
        let doubt_factor = self.number(
            json.get("doubt_factor"),
            &format!("{at}.doubt_factor"),
            1.0,
            1e6,
            "a factor of at least 1, by which the activity may be off up and down",
        );
        let source = self.text_of(json.get("source"), &format!("{at}.source"), false);
        match (value, coefficient) {
            (Some(_), Some(_)) => {
                self.wrong("line.activity", at, "an activity and an activity coefficient".to_string(), "one of them");
                None
            }
            (Some(value), None) => Some(Activity { value, is_coefficient: false, doubt_factor, source }),
            (None, Some(value)) => Some(Activity { value, is_coefficient: true, doubt_factor, source }),
            (None, None) => {
                doubt_factor.map(|f| Activity { value: 1.0, is_coefficient: true, doubt_factor: Some(f), source })
            }
        }
    }

    fn zones(&mut self, json: Option<&Json>, line_pressure: Option<Quantity>) -> Vec<Zone> {
        let mut zones: Vec<Zone> = Vec::new();
        let list = self.list(json, "zones");
        let mut without_pressure = false;
        for (i, zone) in list.iter().enumerate() {
            let at = format!("zones[{i}]");
            let Some(members) = self.object(zone, &at, "a zone in { } with its name, temperature and gas") else {
                continue;
            };
            self.known(members, &["name", "temperature", "leaving", "rate", "pressure", "gas", "about"], &at);
            let name = self.text_of(zone.get("name"), &format!("{at}.name"), true);
            if let Some(name) = &name
                && zones.iter().any(|z| z.name == *name)
            {
                self.wrong(
                    "line.name",
                    &format!("{at}.name"),
                    format!("\u{201c}{}\u{201d} a second time", clip(name)),
                    "a name of its own for each zone",
                );
            }
            let temperature_at = format!("{at}.temperature");
            if zone.get("temperature").is_none() {
                self.wrong(
                    "line.missing",
                    &temperature_at,
                    "no temperature".to_string(),
                    "the zone's temperature, such as {\"value\": 950, \"unit\": \"C\"}",
                );
            }
            let temperature = self.quantity(zone.get("temperature"), &temperature_at, &[Kind::Temperature], &[]);
            let leaving = self.quantity(zone.get("leaving"), &format!("{at}.leaving"), &[Kind::Temperature], &[]);
            let rate = self.quantity(zone.get("rate"), &format!("{at}.rate"), &[Kind::Rate], &[]);
            let own = self.pressure(zone.get("pressure"), &format!("{at}.pressure"));
            let pressure = own.or(line_pressure).unwrap_or_else(|| {
                without_pressure = true;
                Quantity { value: BAR_PER_ATM, given: BAR_PER_ATM, u: 0.0, unit: Unit::Bar, tolerance: None }
            });
            let gas = self.gas(zone.get("gas"), &format!("{at}.gas"));
            if let (Some(name), Some(temperature)) = (name, temperature) {
                zones.push(Zone { name, temperature, leaving, rate, pressure, gas });
            }
        }
        if without_pressure {
            self.notes.push(Note {
                at: "pressure".to_string(),
                text: "No pressure is given: 1.01325 bar is taken".to_string(),
            });
        }
        zones
    }

    fn basis(&mut self, json: Option<&Json>, at: &str) -> Option<Basis> {
        match json? {
            Json::Text(t) if t == "dry" => Some(Basis::Dry),
            Json::Text(t) if t == "wet" => Some(Basis::Wet),
            other => {
                self.wrong("line.basis", at, other.describe(), "\u{201c}dry\u{201d} or \u{201c}wet\u{201d}");
                None
            }
        }
    }

    fn gas(&mut self, json: Option<&Json>, at: &str) -> GasReading {
        let mut gas = GasReading::default();
        let Some(json) = json else { return gas };
        let Some(members) = self.object(json, at, "a gas in { } with its analysis, balance or dew_point") else {
            return gas;
        };
        self.known(members, &["basis", "analysis", "balance", "dew_point", "oxygen_cell"], at);
        gas.basis = self.basis(json.get("basis"), &format!("{at}.basis"));
        gas.balance = self.text_of(json.get("balance"), &format!("{at}.balance"), false);
        if let Some(analysis) = json.get("analysis") {
            let at = format!("{at}.analysis");
            for (formula, channel) in self.object(analysis, &at, ANALYSIS).unwrap_or(&[]) {
                let at = format!("{at}.{formula}");
                self.share_of(channel, &at, Share::Mass, "a share by volume: %, ppm, ppb, fraction");
                let Some(quantity) =
                    self.quantity(Some(channel), &at, &[Kind::Fraction, Kind::Pressure], &["basis", "bound"])
                else {
                    continue;
                };
                let basis = self.basis(channel.get("basis"), &format!("{at}.basis"));
                let upper_bound = match channel.get("bound") {
                    None => false,
                    Some(Json::Text(t)) if t == "upper" => true,
                    Some(other) => {
                        self.wrong(
                            "line.bound",
                            &format!("{at}.bound"),
                            other.describe(),
                            "\u{201c}upper\u{201d}, for a reading at its detection limit",
                        );
                        false
                    }
                };
                gas.channels.push(Channel { formula: formula.clone(), quantity, basis, upper_bound });
            }
        }
        if let Some(dew) = json.get("dew_point") {
            let at = format!("{at}.dew_point");
            let over = match dew.get("over") {
                None => None,
                Some(Json::Text(t)) if t == "ice" => Some(Surface::Ice),
                Some(Json::Text(t)) if t == "water" => Some(Surface::Water),
                Some(other) => {
                    self.wrong(
                        "line.over",
                        &format!("{at}.over"),
                        other.describe(),
                        "\u{201c}ice\u{201d} or \u{201c}water\u{201d}",
                    );
                    None
                }
            };
            let pressure = self.pressure(dew.get("pressure"), &format!("{at}.pressure"));
            if let Some(quantity) = self.quantity(Some(dew), &at, &[Kind::Temperature], &["over", "pressure"]) {
                gas.dew_point = Some(DewPoint { quantity, over, pressure });
            }
        }
        if let Some(cell) = json.get("oxygen_cell") {
            let at = format!("{at}.oxygen_cell");
            let temperature =
                self.quantity(cell.get("temperature"), &format!("{at}.temperature"), &[Kind::Temperature], &[]);
            let reference_bar = self.pressure(cell.get("reference"), &format!("{at}.reference"));
            if let Some(voltage) = self.quantity(Some(cell), &at, &[Kind::Voltage], &["temperature", "reference"]) {
                gas.cell = Some(Cell { voltage, temperature, reference_bar });
            }
        }
        gas
    }

    fn changes(&mut self, json: Option<&Json>, zones: &[String]) -> Vec<Change> {
        let mut changes: Vec<Change> = Vec::new();
        for (i, change) in self.list(json, "changes").iter().enumerate() {
            let at = format!("changes[{i}]");
            let expected = "a change in { } with its name, equation and wish";
            let Some(members) = self.object(change, &at, expected) else { continue };
            self.known(
                members,
                &["name", "equation", "wish", "zones", "activities", "acts_above", "allowed", "tolerated", "about"],
                &at,
            );
            let name = self.text_of(change.get("name"), &format!("{at}.name"), true);
            if let Some(name) = &name
                && changes.iter().any(|c| c.name == *name)
            {
                self.wrong(
                    "line.name",
                    &format!("{at}.name"),
                    format!("\u{201c}{}\u{201d} a second time", clip(name)),
                    "a name of its own for each change",
                );
            }
            let equation = self.text_of(change.get("equation"), &format!("{at}.equation"), true);
            let wish = match change.get("wish") {
                Some(Json::Text(t)) if t == "want" => Some(Wish::Want),
                Some(Json::Text(t)) if t == "avoid" => Some(Wish::Avoid),
                Some(other) => {
                    self.wrong(
                        "line.wish",
                        &format!("{at}.wish"),
                        other.describe(),
                        "\u{201c}want\u{201d} or \u{201c}avoid\u{201d}",
                    );
                    None
                }
                None => {
                    self.wrong(
                        "line.missing",
                        &format!("{at}.wish"),
                        "no wish".to_string(),
                        "\u{201c}want\u{201d} or \u{201c}avoid\u{201d}",
                    );
                    None
                }
            };
            let in_zones = change.get("zones").map(|list| {
                let zones_at = format!("{at}.zones");
                let mut indices = Vec::new();
                for (j, zone) in self.list(Some(list), &zones_at).iter().enumerate() {
                    match zone.text().and_then(|t| zones.iter().position(|z| z == t)) {
                        Some(index) => indices.push(index),
                        None => {
                            let expected = if zones.is_empty() {
                                "no zone: the line has none yet".to_string()
                            } else {
                                let named: Vec<&str> =
                                    zones.iter().map(String::as_str).filter(|z| !z.trim().is_empty()).collect();
                                format!("a zone of the line: {}", named.join(", "))
                            };
                            let hints = zone.text().and_then(|t| nearest(t, zones.iter().map(String::as_str)));
                            let hints = hints.map(|z| format!("\"{z}\"")).into_iter().collect();
                            self.wrong_hint(
                                "line.zone",
                                &format!("{zones_at}[{j}]"),
                                zone.describe(),
                                &expected,
                                hints,
                            );
                        }
                    }
                }
                indices
            });
            let mut activities = Vec::new();
            if let Some(given) = change.get("activities") {
                let at = format!("{at}.activities");
                for (formula, value) in
                    self.object(given, &at, "activities in { } by formula, such as {\"Cr\": 0.25}").unwrap_or(&[])
                {
                    let at = format!("{at}.{formula}");
                    let taken = match value {
                        Json::Number(n) if *n > 0.0 && n.is_finite() => {
                            Some(Activity { value: *n, is_coefficient: false, doubt_factor: None, source: None })
                        }
                        Json::Object(members) => {
                            self.known(members, &["value", "activity_coefficient", "doubt_factor", "source"], &at);
                            self.activity(value, &at, false)
                        }
                        other => {
                            self.wrong(
                                "line.activity",
                                &at,
                                other.describe(),
                                "an activity above 0, or an object with its value",
                            );
                            None
                        }
                    };
                    self.formula(formula, &at);
                    activities.extend(taken.map(|a| (formula.clone(), a)));
                }
            }
            let acts_at = format!("{at}.acts_above");
            let acts_above =
                self.quantity(change.get("acts_above"), &acts_at, &[Kind::Temperature], &[]).map(|temperature| {
                    ActsAbove {
                        temperature,
                        source: change
                            .get("acts_above")
                            .and_then(|a| a.get("source"))
                            .and_then(Json::text)
                            .map(ToString::to_string),
                    }
                });
            let allowed = self.quantity(change.get("allowed"), &format!("{at}.allowed"), &[Kind::Time], &[]);
            let tolerated = self.flag(change.get("tolerated"), &format!("{at}.tolerated"));
            if let (Some(name), Some(equation), Some(wish)) = (name, equation, wish) {
                changes.push(Change {
                    name,
                    equation,
                    wish,
                    zones: in_zones,
                    activities,
                    acts_above,
                    allowed,
                    tolerated,
                });
            }
        }
        changes
    }

    fn variants_field(&mut self, json: Option<&Json>) {
        for (i, variant) in self.list(json, "variants").iter().enumerate() {
            let at = format!("variants[{i}]");
            let Some(members) = self.object(variant, &at, "a variant in { } with its name and patch") else { continue };
            self.known(members, &["name", "about", "patch"], &at);
            self.text_of(variant.get("name"), &format!("{at}.name"), true);
            self.list(variant.get("patch"), &format!("{at}.patch"));
        }
    }
}

/// The name nearest to what was typed, where it is near enough to have been meant.
fn nearest<'n>(typed: &str, names: impl Iterator<Item = &'n str>) -> Option<&'n str> {
    let near = names.map(|n| (distance(n, typed), n)).min_by_key(|(d, _)| *d)?;
    (near.0 <= 2).then_some(near.1)
}

/// A value that should have been a quantity: what is expected, and the quantity it may stand for.
fn as_quantity(json: &Json, kinds: &[Kind]) -> (String, Vec<String>) {
    let usual = match kinds.first() {
        Some(Kind::Temperature) => (950.0, Unit::Celsius),
        Some(Kind::Pressure) => (1.02, Unit::Bar),
        Some(Kind::Voltage) => (1136.0, Unit::Millivolt),
        Some(Kind::Rate) => (38.0, Unit::KelvinPerSecond),
        Some(Kind::Time) => (8.0, Unit::Second),
        _ => (75.0, Unit::Percent),
    };
    let written = |value: f64, unit: Unit| format!("{{\"value\": {value}, \"unit\": \"{}\"}}", unit.symbol());
    let ready = json
        .text()
        .and_then(|t| leeway_quantity::entry::parse_any(t, usual.1).ok())
        .filter(|t| kinds.contains(&t.quantity.unit.kind()) && t.unit_typed)
        .map(|t| written(t.quantity.given, t.quantity.unit));
    (format!("a quantity such as {}", written(usual.0, usual.1)), ready.into_iter().collect())
}

/// Ready answers for a unit that does not fit: the absolute pressure for a gauge pressure, the place for water
/// given as a share.
fn unit_hints(json: &Json, unit: &str, kinds: &[Kind], at: &str) -> Vec<String> {
    let Some(Json::Number(value)) = json.get("value") else { return Vec::new() };
    if kinds.contains(&Kind::Pressure)
        && let Err(e) = leeway_quantity::entry::parse_any(&format!("{value} {unit}"), Unit::Bar)
    {
        return e.hints();
    }
    let share = leeway_quantity::entry::unit(unit).is_some_and(|u| matches!(u.kind(), Kind::Fraction | Kind::Pressure));
    if at.ends_with("dew_point") && share {
        return alloc::vec![format!(
            "Water as a share stands in the analysis: \"H2O\": {{\"value\": {value}, \"unit\": \"{unit}\"}}"
        )];
    }
    Vec::new()
}

/// Number of single-letter edits between two words, for hints.
fn distance(a: &str, b: &str) -> usize {
    let b: Vec<char> = b.chars().take(40).collect();
    let mut row: Vec<usize> = (0..=b.len()).collect();
    for (i, x) in a.chars().enumerate() {
        let mut before = row[0];
        row[0] = i + 1;
        for (j, y) in b.iter().enumerate() {
            let cost = before + usize::from(x != *y);
            before = row[j + 1];
            row[j + 1] = cost.min(row[j] + 1).min(before + 1);
        }
    }
    row[b.len()]
}
