//! The line file: what is taken, what is noted, what stays as it was.

use leeway_line::model::Wish;
use leeway_line::{decode, line_of, read, variants, with_variant};
use leeway_quantity::Spread;
use leeway_tests::{demo_lines, demo_lines_and_variants, session};
use serde_json::Value;

fn line(zone: &str, rest: &str) -> String {
    format!(
        "{{\"leeway\": 1, \"name\": \"Invented\", \"zones\": [{{\"name\": \"Heat\", \"temperature\": {{\"value\": 950, \"unit\": \"C\"}}, {zone}}}]{rest}}}"
    )
}

const GAS: &str = "\"gas\": {\"balance\": \"N2\"}";

fn notes(text: &str) -> Vec<String> {
    let line = read(text).unwrap_or_else(|e| panic!("{e}: {text}"));
    line.notes.into_iter().map(|n| format!("{}: {}", n.at, n.text)).collect()
}

#[test]
fn an_empty_line_is_a_line() {
    for text in ["{\"leeway\": 1}", "{\"leeway\": 1, \"zones\": [], \"changes\": [], \"charge\": []}"] {
        let line = read(text).expect("a line");
        assert!(line.zones.is_empty() && line.changes.is_empty() && line.charge.is_empty());
        assert_eq!(line.coverage_factor, 2.0);
        let a = session().assess(text).expect("an assessment");
        assert!(a.findings.is_empty());
        assert!(!a.summary.sentence.is_empty(), "an empty line still says something");
        assert!(session().propose(text).expect("proposals").is_empty());
    }
}

#[test]
fn every_field_of_the_form_is_taken() {
    let text = r#"{"leeway": 1, "name": "Invented", "invented": true, "about": "a", "charge_name": "c", "readings_note": "r",
      "coverage_factor": 3, "pressure": {"value": 1020, "unit": "mbar", "tolerance": 5, "tolerance_kind": "standard"},
      "charge": [{"substance": "Cr", "share_wt": 17.2, "activity": 0.25, "doubt_factor": 1.6, "source": "s"},
                 {"substance": "Mn", "share_wt": {"value": 1.1, "unit": "%"}, "activity_coefficient": 1.3},
                 {"substance": "SiO2(quartz)"}],
      "zones": [{"name": "Heat", "temperature": {"value": 925, "unit": "C", "instrument": "type K class 1"},
                 "leaving": {"value": 80, "unit": "C"}, "rate": {"value": 38, "unit": "K/s"},
                 "pressure": {"value": 1, "unit": "atm"},
                 "gas": {"basis": "dry", "analysis": {"H2": {"value": 75, "unit": "%", "basis": "wet"},
                                                      "O2": {"value": 1, "unit": "ppm", "bound": "upper"}},
                         "balance": "N2", "dew_point": {"value": -48, "unit": "C", "over": "water", "pressure": {"value": 7, "unit": "bar"}},
                         "oxygen_cell": {"value": 1136, "unit": "mV", "temperature": {"value": 700, "unit": "C"}, "reference": {"value": 0.2, "unit": "bar"}}}}],
      "changes": [{"name": "a", "equation": "Cr + H2O = Cr2O3 + H2", "wish": "avoid", "zones": ["Heat"],
                   "activities": {"Cr": 0.25, "Cr2O3": {"value": 0.5, "doubt_factor": 2, "source": "s"}},
                   "acts_above": {"value": 650, "unit": "C", "source": "s"}, "allowed": {"value": 8, "unit": "s"}, "tolerated": true}],
      "variants": [{"name": "v", "about": "w", "patch": []}]}"#;
    let line = read(text).expect("a line");
    assert_eq!(line.notes, [], "nothing is left over");
    assert!(line.invented && line.coverage_factor == 3.0);
    assert!((line.charge[0].share_wt.expect("a share").value - 0.172).abs() < 1e-12);
    let (direct, factor) =
        (line.charge[0].activity.as_ref().expect("given"), line.charge[1].activity.as_ref().expect("given"));
    assert!(!direct.is_coefficient && direct.value == 0.25 && direct.doubt_factor == Some(1.6));
    assert!(factor.is_coefficient && factor.value == 1.3 && factor.doubt_factor.is_none());
    let zone = &line.zones[0];
    assert!((zone.pressure.value - 1.01325).abs() < 1e-12, "the zone's own pressure");
    assert!((zone.temperature.u - 3.7 / 3f64.sqrt()).abs() < 1e-9, "IEC 60584-1 class 1 at 925 C: 3.7 K");
    assert_eq!(zone.temperature.tolerance.map(|t| t.1), Some(Spread::Limits));
    assert!(zone.leaving.is_some() && zone.rate.is_some_and(|r| r.value == 38.0));
    assert!(zone.gas.channels[1].upper_bound && zone.gas.cell.is_some_and(|c| c.reference_bar.is_some()));
    assert!(zone.gas.dew_point.is_some_and(|d| d.pressure.is_some()));
    let change = &line.changes[0];
    assert_eq!((change.wish, change.zones.as_deref(), change.tolerated), (Wish::Avoid, Some(&[0usize][..]), true));
    assert_eq!(change.activities.len(), 2);
    assert!(change.allowed.is_some_and(|a| a.value == 8.0));
    assert_eq!(variants(text).expect("variants")[0].name, "v");
}

#[test]
fn the_zone_takes_the_lines_pressure_and_else_the_hall() {
    let own = read(&line(
        &format!("{GAS}, \"pressure\": {{\"value\": 2, \"unit\": \"bar\"}}"),
        ", \"pressure\": {\"value\": 3, \"unit\": \"bar\"}",
    ));
    assert_eq!(own.expect("a line").zones[0].pressure.value, 2.0);
    let shared = read(&line(GAS, ", \"pressure\": {\"value\": 3, \"unit\": \"bar\"}"));
    assert_eq!(shared.expect("a line").zones[0].pressure.value, 3.0);
    let hall = line(GAS, "");
    assert_eq!(read(&hall).expect("a line").zones[0].pressure.value, 1.01325);
    assert_eq!(notes(&hall), ["pressure: No pressure is given: 1.01325 bar is taken"]);
}

#[test]
fn what_is_not_known_is_kept_and_said() {
    let text = line(
        "\"gas\": {\"balance\": \"N2\", \"dewpoint\": {\"value\": -48, \"unit\": \"C\"}}, \"presure\": 1, \"colour\": 3",
        ", \"pressure\": {\"value\": 1, \"unit\": \"bar\", \"tolerence\": 1}, \"charge\": [{\"substance\": \"steel\", \"share_wt\": 50}]",
    );
    assert_eq!(
        notes(&text),
        [
            "pressure.tolerence: The field \u{201c}tolerence\u{201d} is not known: kept, not used. Is \u{201c}tolerance\u{201d} meant?",
            "charge[0].substance: \u{201c}steel\u{201d} is no formula (found \u{201c}s\u{201d}, expected an element symbol, which begins with a capital letter): it takes no part in any change",
            "zones[0].presure: The field \u{201c}presure\u{201d} is not known: kept, not used. Is \u{201c}pressure\u{201d} meant?",
            "zones[0].colour: The field \u{201c}colour\u{201d} is not known: kept, not used.",
            "zones[0].gas.dewpoint: The field \u{201c}dewpoint\u{201d} is not known: kept, not used. Is \u{201c}dew_point\u{201d} meant?",
        ]
    );
}

#[test]
fn the_assessment_says_what_the_charge_and_the_activities_do_not_reach() {
    let text = line(
        GAS,
        ", \"charge\": [{\"substance\": \"Fe\", \"share_wt\": 50}, {\"substance\": \"UO2\", \"share_wt\": 50}], \"changes\": [{\"name\": \"a\", \"equation\": \"Fe + H2O = Fe0.947O + H2\", \"wish\": \"avoid\", \"activities\": {\"Cr\": 0.25, \"Fe\": 0.9}}]",
    );
    let a = session().assess(&text).expect("an assessment");
    assert!(a.notes.iter().any(|n| n.at == "charge[1].substance" && n.text.starts_with("UO2 is not in the data")));
    let said = &a.changes[0].notes;
    assert!(said.iter().any(|n| n.starts_with("The activity of Cr is not used")), "{said:?}");
    assert!(!said.iter().any(|n| n.contains("activity of Fe ")), "{said:?}");
}

#[test]
fn a_newer_form_is_read_as_far_as_it_goes() {
    let text = line(GAS, ", \"later\": {}").replace("\"leeway\": 1", "\"leeway\": 2");
    let said = notes(&text);
    assert!(said[0].contains("not known") && said[1].starts_with("leeway: The file is version 2"), "{said:?}");
}

#[test]
fn a_byte_order_mark_is_left_out_and_said() {
    let mut bytes = vec![0xef, 0xbb, 0xbf];
    bytes.extend_from_slice(b"{\"leeway\": 1}");
    let (text, said) = decode(&bytes).expect("text");
    assert_eq!(text, "{\"leeway\": 1}");
    assert_eq!(said.len(), 1);
    let opened = session().open(&bytes).expect("a line");
    assert_eq!((opened.text.as_str(), opened.notes.len()), ("{\"leeway\": 1}", 1));
}

#[test]
fn places_name_the_line_of_the_text() {
    let text = "{\n\"a\": [\n{\"b\": 1},\n{\"b\": {\n\"c\": \"}]\"}\n}],\n\"d\": 2}";
    for (path, row) in
        [("a[0].b", 3), ("a[1].b", 4), ("a[1].b.c", 5), ("d", 7), ("", 1), ("a[1].missing", 4), ("a[9]", 2)]
    {
        assert_eq!(line_of(text, path), Some(row), "{path}");
    }
}

#[test]
fn demo_lines_read_without_a_note_and_say_that_they_are_invented() {
    for (name, text) in demo_lines_and_variants() {
        let line = read(&text).unwrap_or_else(|e| panic!("{name}: {}: {e}", e.place));
        assert_eq!(line.notes, [], "{name}");
        assert!(line.invented, "{name}");
    }
}

/// A line as generic JSON: keys in any order, 20.0 the same as 20.
fn tree(text: &str) -> Value {
    fn plain(value: &mut Value) {
        match value {
            Value::Number(n) => *value = serde_json::json!(n.as_f64()),
            Value::Array(list) => list.iter_mut().for_each(plain),
            Value::Object(members) => members.values_mut().for_each(plain),
            _ => {}
        }
    }
    let mut root = serde_json::from_str(text).expect("JSON");
    plain(&mut root);
    root
}

#[test]
fn a_variant_changes_what_its_patch_names_and_nothing_else() {
    for (name, text) in demo_lines() {
        let root = tree(&text);
        for variant in root["variants"].as_array().into_iter().flatten() {
            let label = variant["name"].as_str().expect("a name");
            let varied = tree(&with_variant(&text, label).unwrap_or_else(|e| panic!("{name}, {label}: {e}")));
            let mut back = varied.clone();
            let mut only_replaces = true;
            for step in variant["patch"].as_array().into_iter().flatten() {
                let path = step["path"].as_str().expect("a path");
                only_replaces &= step["op"] == "replace";
                if step["op"] != "remove" && !path.ends_with("/-") {
                    assert_eq!(varied.pointer(path), Some(&step["value"]), "{name}, {label}: {path}");
                }
                if step["op"] == "replace" {
                    *back.pointer_mut(path).expect("there") = root.pointer(path).expect("there").clone();
                }
            }
            if only_replaces {
                assert_eq!(back, root, "{name}, {label}");
            }
        }
    }
}

#[test]
fn steps_of_a_patch_follow_rfc_6902() {
    let patched = |patch: &str| {
        let text = format!(
            "{{\"leeway\": 1, \"a/b\": 1, \"m~n\": 2, \"list\": [1, 2, 3], \"variants\": [{{\"name\": \"v\", \"patch\": {patch}}}]}}"
        );
        with_variant(&text, "v").map(|t| tree(&t)).map_err(|e| e.message)
    };
    let list = |patch: &str| patched(patch).expect("patched")["list"].to_string();
    assert_eq!(list("[{\"op\": \"add\", \"path\": \"/list/1\", \"value\": 9}]"), "[1.0,9.0,2.0,3.0]");
    assert_eq!(list("[{\"op\": \"add\", \"path\": \"/list/-\", \"value\": 9}]"), "[1.0,2.0,3.0,9.0]");
    assert_eq!(list("[{\"op\": \"add\", \"path\": \"/list/3\", \"value\": 9}]"), "[1.0,2.0,3.0,9.0]");
    assert_eq!(list("[{\"op\": \"remove\", \"path\": \"/list/0\"}]"), "[2.0,3.0]");
    assert_eq!(list("[{\"op\": \"replace\", \"path\": \"/list/2\", \"value\": null}]"), "[1.0,2.0,null]");
    assert_eq!(patched("[{\"op\": \"replace\", \"path\": \"/a~1b\", \"value\": 5}]").expect("patched")["a/b"], 5.0);
    assert_eq!(patched("[{\"op\": \"remove\", \"path\": \"/m~0n\"}]").expect("patched").get("m~n"), None);
    assert_eq!(
        patched("[{\"op\": \"add\", \"path\": \"/new\", \"value\": {\"x\": 1}}]").expect("patched")["new"]["x"],
        1.0
    );
    for bad in [
        "[{\"op\": \"add\", \"path\": \"/list/4\", \"value\": 9}]",
        "[{\"op\": \"add\", \"path\": \"/list/01\", \"value\": 9}]",
        "[{\"op\": \"replace\", \"path\": \"/list/-\", \"value\": 9}]",
        "[{\"op\": \"replace\", \"path\": \"/none\", \"value\": 9}]",
        "[{\"op\": \"remove\", \"path\": \"/none\"}]",
        "[{\"op\": \"remove\", \"path\": \"/list/+1\"}]",
        "[{\"op\": \"add\", \"path\": \"/list/0/x\", \"value\": 9}]",
        "[{\"op\": \"add\", \"path\": \"\", \"value\": 9}]",
    ] {
        assert!(patched(bad).is_err(), "{bad}");
    }
}

#[test]
fn order_and_unknown_fields_outlive_a_variant() {
    let text = "{\"zz\": 1, \"leeway\": 1, \"name\": \"a\", \"aa\": [{\"q\": 0.1, \"b\": 1e-7}], \"variants\": [{\"name\": \"v\", \"patch\": [{\"op\": \"replace\", \"path\": \"/name\", \"value\": \"b\"}]}]}";
    let varied = with_variant(text, "v").expect("varied");
    let squeezed: String = varied.split_whitespace().collect();
    assert!(
        squeezed.starts_with("{\"zz\":1,\"leeway\":1,\"name\":\"b\",\"aa\":[{\"q\":0.1,\"b\":1e-7}],\"variants\""),
        "{squeezed}"
    );
}

#[test]
fn no_text_is_too_strange() {
    let demo = demo_lines().remove(0).1;
    arbtest::arbtest(|u| {
        let bytes: Vec<u8> = u.arbitrary()?;
        if let Ok((text, _)) = decode(&bytes) {
            let _ = read(&text);
        }
        // A line with a piece cut out or doubled is refused or read, never worse.
        let mut text = demo.clone();
        let places: Vec<usize> = text.char_indices().map(|(i, _)| i).collect();
        let (a, b) = (*u.choose(&places)?, *u.choose(&places)?);
        let (a, b) = (a.min(b), a.max(b).min(a.min(b) + 400));
        let b = (b..text.len()).find(|i| text.is_char_boundary(*i)).unwrap_or(text.len());
        if u.arbitrary::<bool>()? {
            text.replace_range(a..b, "");
        } else {
            let piece = text[a..b].to_string();
            text.insert_str(a, &piece);
        }
        if let Err(e) = read(&text) {
            assert!(!e.place.is_empty() && !e.found.is_empty() && !e.expected.is_empty(), "{e:?}");
        }
        let _ = variants(&text);
        Ok(())
    });
}
