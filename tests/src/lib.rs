//! Loaders and helpers shared by the tests.

use std::collections::BTreeMap;
use std::path::PathBuf;

/// The engine with its data.
///
/// # Panics
/// Where the data file does not load.
#[must_use]
pub fn session() -> leeway_api::Session {
    leeway_api::Session::new(leeway_dataset::TEXT).unwrap_or_else(|p| panic!("{}: {}", p.place, p.message))
}

/// A path inside the folder of the tests.
#[must_use]
pub fn path(inside: &str) -> PathBuf {
    PathBuf::from(env!("CARGO_MANIFEST_DIR")).join(inside)
}

/// A text file inside the folder of the tests.
///
/// # Panics
/// Where it cannot be read.
#[must_use]
pub fn text(inside: &str) -> String {
    let path = path(inside);
    std::fs::read_to_string(&path).unwrap_or_else(|e| panic!("{}: {e}", path.display()))
}

/// Rows of a table of comma-separated values inside the folder of the tests, by name of column. Lines that begin
/// with `#` are comments; a cell with commas stands in quotation marks.
///
/// # Panics
/// Where it cannot be read, or a row has another number of cells than the head.
#[must_use]
pub fn table(inside: &str) -> Vec<BTreeMap<String, String>> {
    let text = text(inside);
    let mut rows = text.lines().filter(|l| !l.starts_with('#') && !l.is_empty()).map(cells);
    let head = rows.next().unwrap_or_else(|| panic!("{inside}: empty"));
    rows.map(|row| {
        assert_eq!(row.len(), head.len(), "{inside}: {row:?}");
        head.iter().cloned().zip(row).collect()
    })
    .collect()
}

fn cells(line: &str) -> Vec<String> {
    let (mut out, mut quoted) = (vec![String::new()], false);
    for c in line.chars() {
        match c {
            '"' => quoted = !quoted,
            ',' if !quoted => out.push(String::new()),
            c => out.last_mut().expect("never empty").push(c),
        }
    }
    out
}

/// File names and texts of the demo lines, in order of name.
///
/// # Panics
/// Where the folder cannot be read.
#[must_use]
pub fn demo_lines() -> Vec<(String, String)> {
    let mut names: Vec<String> = std::fs::read_dir(path("lines"))
        .unwrap_or_else(|e| panic!("tests/lines: {e}"))
        .filter_map(|e| e.ok()?.file_name().into_string().ok())
        .filter(|n| n.ends_with(".leeway.json"))
        .collect();
    names.sort();
    names.into_iter().map(|n| (n.clone(), text(&format!("lines/{n}")))).collect()
}

/// Every demo line and every variant of one: label and text.
///
/// # Panics
/// Where a line cannot be read.
#[must_use]
pub fn demo_lines_and_variants() -> Vec<(String, String)> {
    let mut all = Vec::new();
    for (name, text) in demo_lines() {
        let variants = leeway_line::variants(&text).unwrap_or_else(|e| panic!("{name}: {e}"));
        all.push((name.clone(), text.clone()));
        for v in variants {
            let varied =
                leeway_line::with_variant(&text, &v.name).unwrap_or_else(|e| panic!("{name}, {}: {e}", v.name));
            all.push((format!("{name}: {}", v.name), varied));
        }
    }
    all
}
