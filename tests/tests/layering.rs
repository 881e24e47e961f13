//! The drawing of the rooms in DEVELOPERS.md against the manifests: only the edges that are drawn may exist.

use std::collections::{BTreeMap, BTreeSet};
use std::process::Command;

type Edges = BTreeMap<String, BTreeSet<String>>;

/// Edges of the drawing: the fenced block that begins with `rooms`.
fn drawn() -> Edges {
    let text = leeway_tests::text("../DEVELOPERS.md");
    let block =
        text.split("```rooms\n").nth(1).expect("a block ```rooms in DEVELOPERS.md").split("```").next().unwrap_or("");
    block
        .lines()
        .filter_map(|line| line.split_once(':'))
        .map(|(room, uses)| (room.trim().to_owned(), uses.split_whitespace().map(ToOwned::to_owned).collect()))
        .collect()
}

fn manifests() -> (Edges, serde_json::Value) {
    let out = Command::new(env!("CARGO"))
        .args(["metadata", "--format-version", "1", "--no-deps", "--offline"])
        .current_dir(leeway_tests::path(".."))
        .output()
        .expect("cargo metadata");
    let meta: serde_json::Value = serde_json::from_slice(&out.stdout).expect("JSON of cargo metadata");
    let mut edges = Edges::new();
    for package in meta["packages"].as_array().expect("packages") {
        let name = package["name"].as_str().expect("a name");
        let Some(room) = name.strip_prefix("leeway-").filter(|r| *r != "tests") else { continue };
        let uses = package["dependencies"]
            .as_array()
            .expect("dependencies")
            .iter()
            .filter(|d| d["kind"].is_null())
            .filter_map(|d| d["name"].as_str()?.strip_prefix("leeway-").map(ToOwned::to_owned))
            .collect();
        edges.insert(room.to_owned(), uses);
    }
    (edges, meta)
}

#[test]
fn the_drawing_is_true() {
    let (drawn, (real, _)) = (drawn(), manifests());
    assert_eq!(drawn, real, "DEVELOPERS.md draws other rooms or edges than the manifests hold");
}

/// Core rooms are no_std: files, clocks and platform floats do not compile in them.
#[test]
fn core_rooms_cannot_reach_the_outside() {
    for room in ["quantity", "substances", "reactions", "gas", "line", "findings", "api", "dataset"] {
        let head = leeway_tests::text(&format!("../crates/{room}/src/lib.rs"));
        assert!(head.contains("#![no_std]"), "{room} is not no_std");
        assert!(!head.contains("extern crate std"), "{room} reaches for std");
    }
}

/// Rooms that know no JSON at all.
#[test]
fn the_computation_knows_no_json() {
    let (_, meta) = manifests();
    for package in meta["packages"].as_array().expect("packages") {
        let name = package["name"].as_str().unwrap_or("");
        if !["leeway-quantity", "leeway-substances", "leeway-reactions", "leeway-gas", "leeway-findings"]
            .contains(&name)
        {
            continue;
        }
        for d in package["dependencies"].as_array().expect("dependencies") {
            assert!(!d["name"].as_str().unwrap_or("").starts_with("serde"), "{name} depends on serde");
        }
    }
}
