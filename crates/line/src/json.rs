//! An ordered JSON tree that loses nothing: keys in their order, duplicates refused, depth limited by the reader.

use alloc::format;
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use core::fmt;
use serde::de::{self, Deserialize, Deserializer, MapAccess, SeqAccess, Visitor};
use serde::ser::{Serialize, SerializeMap, Serializer};

/// A JSON value with object keys in the order written.
#[derive(Debug, Clone, PartialEq)]
pub(crate) enum Json {
    /// `null`.
    Null,
    /// `true` or `false`.
    Bool(bool),
    /// A number; whole numbers print without a point.
    Number(f64),
    /// A text.
    Text(String),
    /// A list.
    List(Vec<Json>),
    /// An object.
    Object(Vec<(String, Json)>),
}

impl Json {
    /// What the value is, for a message: `the text "C"`, `the number 5`, `a list`.
    #[must_use]
    pub(crate) fn describe(&self) -> String {
        match self {
            Json::Null => "null".to_string(),
            Json::Bool(b) => b.to_string(),
            Json::Number(n) => format!("{n}"),
            Json::Text(t) => format!("\u{201c}{}\u{201d}", clip(t)),
            Json::List(_) => "a list".to_string(),
            Json::Object(_) => "an object".to_string(),
        }
    }

    /// A member of an object.
    #[must_use]
    pub(crate) fn get(&self, key: &str) -> Option<&Json> {
        match self {
            Json::Object(members) => members.iter().find(|(k, _)| k == key).map(|(_, v)| v),
            _ => None,
        }
    }

    /// The text, where it is one.
    #[must_use]
    pub(crate) fn text(&self) -> Option<&str> {
        match self {
            Json::Text(t) => Some(t),
            _ => None,
        }
    }
}

/// Marks the refusal of a key that its object holds already.
pub(crate) const TWICE: &str = "a second time";

/// At most 40 characters of a text.
pub(crate) fn clip(text: &str) -> String {
    // A control character would spoil the terminal it is printed on.
    let mut piece: String = text.chars().take(40).map(|c| if c.is_control() { '\u{fffd}' } else { c }).collect();
    if text.chars().count() > 40 {
        piece.push('\u{2026}');
    }
    piece
}

impl<'de> Deserialize<'de> for Json {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        deserializer.deserialize_any(Reader)
    }
}

struct Reader;

impl<'de> Visitor<'de> for Reader {
    type Value = Json;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a JSON value")
    }
    fn visit_unit<E>(self) -> Result<Json, E> {
        Ok(Json::Null)
    }
    fn visit_bool<E>(self, b: bool) -> Result<Json, E> {
        Ok(Json::Bool(b))
    }
    #[expect(clippy::cast_precision_loss, reason = "readings have far fewer digits than 2^53")]
    fn visit_u64<E>(self, n: u64) -> Result<Json, E> {
        Ok(Json::Number(n as f64))
    }
    #[expect(clippy::cast_precision_loss, reason = "readings have far fewer digits than 2^53")]
    fn visit_i64<E>(self, n: i64) -> Result<Json, E> {
        Ok(Json::Number(n as f64))
    }
    fn visit_f64<E>(self, n: f64) -> Result<Json, E> {
        Ok(Json::Number(n))
    }
    fn visit_str<E>(self, t: &str) -> Result<Json, E> {
        Ok(Json::Text(t.to_string()))
    }
    fn visit_seq<A: SeqAccess<'de>>(self, mut seq: A) -> Result<Json, A::Error> {
        let mut list = Vec::new();
        while let Some(item) = seq.next_element()? {
            list.push(item);
        }
        Ok(Json::List(list))
    }
    fn visit_map<A: MapAccess<'de>>(self, mut map: A) -> Result<Json, A::Error> {
        let mut members: Vec<(String, Json)> = Vec::new();
        while let Some(key) = map.next_key::<String>()? {
            if members.iter().any(|(k, _)| *k == key) {
                return Err(de::Error::custom(format!("the key \u{201c}{}\u{201d} {TWICE}", clip(&key))));
            }
            let value = map.next_value()?;
            members.push((key, value));
        }
        Ok(Json::Object(members))
    }
}

impl Serialize for Json {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        match self {
            Json::Null => serializer.serialize_unit(),
            Json::Bool(b) => serializer.serialize_bool(*b),
            Json::Number(n) => {
                #[expect(clippy::cast_possible_truncation, reason = "checked to be whole and small")]
                let whole = *n as i64;
                #[expect(clippy::cast_precision_loss, reason = "compared back exactly")]
                if whole as f64 == *n && n.abs() < 1e15 {
                    serializer.serialize_i64(whole)
                } else {
                    serializer.serialize_f64(*n)
                }
            }
            Json::Text(t) => serializer.serialize_str(t),
            Json::List(list) => list.serialize(serializer),
            Json::Object(members) => {
                let mut map = serializer.serialize_map(Some(members.len()))?;
                for (k, v) in members {
                    map.serialize_entry(k, v)?;
                }
                map.end()
            }
        }
    }
}

/// Line of the text, from 1, on which the value at a path begins. `path` as in `zones[2].gas.dew_point`.
#[must_use]
pub fn line_of(text: &str, path: &str) -> Option<usize> {
    let mut scan = Scan { bytes: text.as_bytes(), at: 0 };
    let mut steps: Vec<Step> = Vec::new();
    for part in path.split('.').filter(|p| !p.is_empty()) {
        let (name, indices) = part.split_once('[').map_or((part, ""), |(n, i)| (n, i));
        if !name.is_empty() {
            steps.push(Step::Key(name));
        }
        for index in indices.split('[') {
            if let Ok(i) = index.trim_end_matches(']').parse() {
                steps.push(Step::Index(i));
            }
        }
    }
    for step in steps {
        if !scan.enter(&step) {
            break;
        }
    }
    scan.space();
    Some(text.as_bytes()[..scan.at.min(text.len())].iter().filter(|b| **b == b'\n').count() + 1)
}

enum Step<'a> {
    Key(&'a str),
    Index(usize),
}

/// A walk over text that is known to be JSON.
struct Scan<'a> {
    bytes: &'a [u8],
    at: usize,
}

impl Scan<'_> {
    fn peek(&self) -> u8 {
        self.bytes.get(self.at).copied().unwrap_or(0)
    }
    fn space(&mut self) {
        while matches!(self.peek(), b' ' | b'\n' | b'\r' | b'\t') {
            self.at += 1;
        }
    }
    fn string(&mut self) -> (usize, usize) {
        self.at += 1;
        let start = self.at;
        while self.at < self.bytes.len() && self.peek() != b'"' {
            self.at += if self.peek() == b'\\' { 2 } else { 1 };
        }
        let end = self.at.min(self.bytes.len());
        self.at += 1;
        (start, end)
    }
    fn skip(&mut self) {
        self.space();
        let mut depth = 0usize;
        loop {
            match self.peek() {
                0 => return,
                b'"' => {
                    self.string();
                }
                b'{' | b'[' => {
                    depth += 1;
                    self.at += 1;
                }
                b'}' | b']' => {
                    if depth == 0 {
                        return;
                    }
                    depth -= 1;
                    self.at += 1;
                }
                b',' | b':' if depth == 0 => return,
                _ => self.at += 1,
            }
            if depth == 0 && matches!(self.peek(), b',' | b'}' | b']' | 0) {
                return;
            }
        }
    }
    /// Moves to the value of a step; stays at the container where it is not there.
    fn enter(&mut self, step: &Step) -> bool {
        self.space();
        let back = self.at;
        let open = self.peek();
        if !(open == b'{' && matches!(step, Step::Key(_)) || open == b'[' && matches!(step, Step::Index(_))) {
            return false;
        }
        self.at += 1;
        let mut index = 0;
        loop {
            self.space();
            match self.peek() {
                b'}' | b']' | 0 => {
                    self.at = back;
                    return false;
                }
                b',' => {
                    self.at += 1;
                    index += 1;
                    continue;
                }
                _ => {}
            }
            match step {
                Step::Key(key) => {
                    let (start, end) = self.string();
                    self.space();
                    self.at += 1;
                    if self.bytes.get(start..end) == Some(key.as_bytes()) {
                        return true;
                    }
                }
                Step::Index(i) if *i == index => return true,
                Step::Index(_) => {}
            }
            self.skip();
        }
    }
}
