//! Ready variants of a line: JSON Patch (RFC 6902; add, replace, remove) over the text of the line.

use crate::file::{FileError, tree};
use crate::json::Json;
use alloc::format;
use alloc::string::{String, ToString};
use alloc::vec::Vec;

/// A variant a line carries.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Variant {
    /// Name.
    pub name: String,
    /// What it stands for.
    pub about: String,
}

fn variants_of(root: &Json) -> &[Json] {
    match root.get("variants") {
        Some(Json::List(list)) => list,
        _ => &[],
    }
}

/// Names of the variants in a line's text.
///
/// # Errors
/// [`FileError`] where the text is not JSON.
pub fn variants(text: &str) -> Result<Vec<Variant>, FileError> {
    let root = tree(text)?;
    let word = |v: &Json, key: &str| v.get(key).and_then(Json::text).unwrap_or("").to_string();
    Ok(variants_of(&root).iter().map(|v| Variant { name: word(v, "name"), about: word(v, "about") }).collect())
}

/// The text of a line with a variant applied; everything else, unknown fields too, as it was.
///
/// # Errors
/// [`FileError`] where no variant has this name, or a step of its patch does not fit the line.
pub fn with_variant(text: &str, name: &str) -> Result<String, FileError> {
    let mut root = tree(text)?;
    let list = variants_of(&root);
    let Some(index) = list.iter().position(|v| v.get("name").and_then(Json::text) == Some(name)) else {
        let names: Vec<&str> = list.iter().filter_map(|v| v.get("name").and_then(Json::text)).collect();
        let expected = if names.is_empty() {
            "no variant: the line has none".to_string()
        } else {
            format!("one of: {}", names.join("; "))
        };
        return Err(fail("variants", format!("variant \u{201c}{name}\u{201d}"), &expected));
    };
    let steps = match list[index].get("patch") {
        Some(Json::List(steps)) => steps.clone(),
        _ => Vec::new(),
    };
    for (i, step) in steps.iter().enumerate() {
        apply(&mut root, step)
            .map_err(|(found, expected)| fail(&format!("variants[{index}].patch[{i}]"), found, expected))
            .map_err(|e| FileError { place: format!("variant {}, {name}, step {}", index + 1, i + 1), ..e })?;
    }
    serde_json::to_string_pretty(&root).map_err(|e| fail("variants", e.to_string(), "a line that can be written"))
}

fn fail(at: &str, found: String, expected: &str) -> FileError {
    FileError {
        code: "line.variant",
        at: at.to_string(),
        place: at.to_string(),
        message: format!("{at}: found {found}, expected {expected}"),
        found,
        expected: expected.to_string(),
        hints: Vec::new(),
        more: Vec::new(),
    }
}

/// A place in a list: digits without a sign or a leading zero (RFC 6901, section 4).
fn index(key: &str) -> Option<usize> {
    let plain = key.bytes().all(|b| b.is_ascii_digit()) && (key == "0" || !key.starts_with('0'));
    key.parse().ok().filter(|_| plain)
}

fn apply(root: &mut Json, step: &Json) -> Result<(), (String, &'static str)> {
    let path = step
        .get("path")
        .and_then(Json::text)
        .ok_or(("no path".to_string(), "a path such as /zones/0/temperature/value"))?;
    let op = step.get("op").and_then(Json::text).unwrap_or("");
    let keys: Vec<String> = path.split('/').skip(1).map(|k| k.replace("~1", "/").replace("~0", "~")).collect();
    let Some((last, parents)) = keys.split_last() else {
        return Err((format!("the path \u{201c}{path}\u{201d}"), "a path into the line"));
    };
    let missing = || (format!("the path \u{201c}{path}\u{201d}"), "a path that the line has");
    let mut at = root;
    for key in parents {
        at = match at {
            Json::Object(members) => members.iter_mut().find(|(k, _)| k == key).map(|(_, v)| v).ok_or_else(missing)?,
            Json::List(list) => index(key).and_then(|i| list.get_mut(i)).ok_or_else(missing)?,
            _ => return Err(missing()),
        };
    }
    let value = || step.get("value").cloned().ok_or(("no value".to_string(), "a value to put there"));
    match (op, at) {
        ("add", Json::Object(members)) => {
            let value = value()?;
            match members.iter_mut().find(|(k, _)| k == last) {
                Some((_, v)) => *v = value,
                None => members.push((last.clone(), value)),
            }
        }
        ("add", Json::List(list)) => {
            let i = if last == "-" { list.len() } else { index(last).ok_or_else(missing)? };
            if i > list.len() {
                return Err(missing());
            }
            list.insert(i, value()?);
        }
        ("replace", Json::Object(members)) => {
            let value = value()?;
            members.iter_mut().find(|(k, _)| k == last).ok_or_else(missing)?.1 = value;
        }
        ("replace", Json::List(list)) => {
            let value = value()?;
            *index(last).and_then(|i| list.get_mut(i)).ok_or_else(missing)? = value;
        }
        ("remove", Json::Object(members)) => {
            let i = members.iter().position(|(k, _)| k == last).ok_or_else(missing)?;
            members.remove(i);
        }
        ("remove", Json::List(list)) => {
            let i = index(last).filter(|i| *i < list.len()).ok_or_else(missing)?;
            list.remove(i);
        }
        ("add" | "replace" | "remove", _) => return Err(missing()),
        _ => return Err((format!("the step \u{201c}{op}\u{201d}"), "add, replace or remove")),
    }
    Ok(())
}
