//! The command as a shell runs it: exit codes, what goes to which stream, never a panic.

use serde_json::Value;
use std::io::{Read, Write};
use std::path::{Path, PathBuf};
use std::process::{Command, Output, Stdio};

const LINE: &str = r#"{
  "leeway": 1,
  "name": "Invented belt",
  "invented": true,
  "pressure": {"value": 1.02, "unit": "bar"},
  "charge": [{"substance": "Fe", "share_wt": 100}],
  "zones": [{"name": "Heat", "temperature": {"value": 1000, "unit": "C"},
    "gas": {"basis": "dry", "analysis": {"H2": {"value": 75, "unit": "%"}}, "balance": "N2",
            "dew_point": {"value": -40, "unit": "C", "over": "ice"}}}],
  "changes": [{"name": "Iron oxidises", "equation": "Fe + H2O = Fe0.947O + H2", "wish": "avoid"}],
  "variants": [{"name": "Wish turned", "about": "",
    "patch": [{"op": "replace", "path": "/changes/0/wish", "value": "want"}]}]
}"#;

fn command(args: &[&str]) -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_leeway"));
    command.args(args).env_remove("NO_COLOR").stdin(Stdio::null());
    command
}

fn ran(mut command: Command) -> (i32, String, String) {
    let Output { status, stdout, stderr } = command.output().expect("the command starts");
    let (out, err) = (String::from_utf8(stdout).expect("UTF-8"), String::from_utf8(stderr).expect("UTF-8"));
    assert!(!err.contains("panicked") && !out.contains("panicked"), "{err}");
    (status.code().expect("an exit code, no signal"), out, err)
}

fn run(args: &[&str]) -> (i32, String, String) {
    ran(command(args))
}

fn piped(args: &[&str], input: &[u8]) -> (i32, String, String) {
    let mut child =
        command(args).stdin(Stdio::piped()).stdout(Stdio::piped()).stderr(Stdio::piped()).spawn().expect("starts");
    // The command may leave before it has read everything.
    let _ = child.stdin.take().expect("a pipe").write_all(input);
    let Output { status, stdout, stderr } = child.wait_with_output().expect("ends");
    let err = String::from_utf8(stderr).expect("UTF-8");
    assert!(!err.contains("panicked"), "{err}");
    (status.code().expect("an exit code"), String::from_utf8(stdout).expect("UTF-8"), err)
}

fn demo_lines() -> Vec<PathBuf> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("../../tests/lines");
    let mut all: Vec<PathBuf> = std::fs::read_dir(folder).expect("lines").map(|e| e.expect("a file").path()).collect();
    all.sort();
    all
}

fn scratch(name: &str, bytes: &[u8]) -> PathBuf {
    let path = Path::new(env!("CARGO_TARGET_TMPDIR")).join(name);
    std::fs::write(&path, bytes).expect("a scratch file");
    path
}

fn json(text: &str) -> Value {
    serde_json::from_str(text).unwrap_or_else(|e| panic!("{e}: {text}"))
}

#[test]
fn every_demo_line_is_assessed() {
    let lines = demo_lines();
    assert!(lines.len() >= 6, "{} lines", lines.len());
    for path in lines {
        let path = path.to_str().expect("a name");
        let (code, out, err) = run(&["assess", path]);
        assert_eq!((code, err.as_str()), (0, ""), "{path}");
        assert!(out.contains("What can happen, not how fast."), "{path}: {out}");
        assert!(out.contains("(invented line)"), "{path}");
        assert!(!out.contains('\u{1b}'), "{path}: colour without a terminal");
        let (code, out, _) = run(&["assess", path, "--json"]);
        assert_eq!(code, 0, "{path}");
        json(&out);
        assert_eq!(run(&["propose", path]).0, 0, "{path}");
    }
}

#[test]
fn json_of_an_assessment_has_the_promised_fields() {
    let (code, out, _) = piped(&["assess", "-", "--json"], LINE.as_bytes());
    assert_eq!(code, 0);
    let a = json(&out);
    for key in ["line", "data_version", "zones", "findings", "notes"] {
        assert!(!a[key].is_null(), "{key}");
    }
    for key in ["name", "temperature_K", "pressure_bar", "partial_pressures_bar", "notes"] {
        assert!(!a["zones"][0][key].is_null(), "zone: {key}");
    }
    let f = &a["findings"][0];
    for key in [
        "zone",
        "change",
        "equation",
        "wish",
        "standing",
        "dG_kJ",
        "u_dG_kJ",
        "chance_wrong",
        "levers",
        "budget",
        "notes",
    ] {
        assert!(!f[key].is_null(), "finding: {key}");
    }
    assert!(f.get("shifted").is_some(), "finding: shifted");
    for key in ["lever", "unit", "reading", "turning_points", "held"] {
        assert!(!f["levers"][0][key].is_null(), "lever: {key}");
    }
    for key in ["leeway", "leeway_u"] {
        assert!(f["levers"][0].get(key).is_some(), "lever: {key}");
    }
    for key in ["source", "share"] {
        assert!(!f["budget"][0][key].is_null(), "budget: {key}");
    }
    let shares: f64 = f["budget"].as_array().expect("a list").iter().filter_map(|s| s["share"].as_f64()).sum();
    assert!((shares - 1.0).abs() < 1e-9, "{shares}");
}

#[test]
fn strict_tells_off_side_by_its_exit_code() {
    let on = scratch("strict.leeway.json", LINE.as_bytes());
    let on = on.to_str().expect("a name");
    assert_eq!(run(&["assess", on, "--strict"]).0, 0);
    assert_eq!(run(&["assess", on, "--variant", "Wish turned"]).0, 0);
    let (code, out, err) = run(&["assess", on, "--variant", "Wish turned", "--strict"]);
    assert_eq!((code, err.as_str()), (1, ""));
    assert!(out.contains("off side"), "{out}");
    let (code, out, _) = run(&["assess", on, "--variant", "Wish turned", "--strict", "--json"]);
    assert_eq!((code, json(&out)["findings"][0]["standing"].as_str()), (1, Some("off side")));
}

#[test]
fn a_change_prints_one_object_for_each_temperature() {
    let (code, out, err) =
        run(&["change", "2 Cr + 1.5 O2 = Cr2O3", "--at", "1000 C", "--at", "1400 K", "--at", "-50 C", "--json"]);
    assert_eq!((code, err.as_str()), (0, ""));
    let all = json(&out);
    assert_eq!(all.as_array().map(Vec::len), Some(3));
    for key in [
        "equation",
        "temperature_K",
        "dH_kJ",
        "dS_J_per_K",
        "dG_kJ",
        "u_dG_kJ",
        "log10_K",
        "phases",
        "turning_temperatures_K",
    ] {
        assert!(!all[0][key].is_null(), "{key}");
    }
    assert!((all[0]["temperature_K"].as_f64().expect("a number") - 1273.15).abs() < 1e-9);
    assert_eq!(all[0]["phases"]["Cr"].as_str(), Some("cr"));
}

#[test]
fn the_textbook_case_comes_out_by_the_same_command() {
    // dH 179.2 kJ, dS 160.2 J/K: common practice, no source.
    let (code, out, _) = run(&["change", "CaCO3 = CaO + CO2", "--dh", "179.2 kJ", "--ds", "160.2 J/K", "--json"]);
    assert_eq!(code, 0);
    let one = &json(&out)[0];
    assert!((one["dG_kJ"].as_f64().expect("a number") - 131.4).abs() < 0.1);
    assert!((one["turning_temperatures_K"][0].as_f64().expect("a number") - 1118.6).abs() < 0.1);
    assert!(one["u_dG_kJ"].as_f64().is_some_and(|u| u == 0.0 && u.is_sign_positive()));
    let (_, out, _) = run(&["change", "CaCO3 = CaO + CO2", "--dh", "179.2 kJ", "--ds", "160.2 J/K"]);
    assert!(out.contains("goes above 845.5"), "{out}");
}

#[test]
fn substances_are_listed_and_shown() {
    let (code, out, _) = run(&["substances"]);
    assert_eq!(code, 0);
    assert!(out.contains("Cr2O3"), "{out}");
    let (code, out, _) = run(&["substances", "Cr2O3"]);
    assert_eq!(code, 0);
    assert!(out.contains("source:"), "{out}");
    let (code, out, _) = run(&["substances", "--elements", "Ca C O", "--json"]);
    assert_eq!(code, 0);
    let rows = json(&out);
    assert!(rows.as_array().is_some_and(|r| r.iter().any(|s| s["formula"] == "CaCO3")), "{out}");
    let (code, out, err) = run(&["substances", "Qz9"]);
    assert_eq!((code, out.as_str()), (2, ""));
    assert!(err.contains("Qz9 is not in the data"), "{err}");
}

/// Runs, and gives what standard error says; nothing stands on standard output.
fn bad(args: &[&str]) -> String {
    let (code, out, err) = run(args);
    assert_eq!((code, out.as_str()), (2, ""), "{args:?}: {err}");
    assert!(err.starts_with("leeway: "), "{args:?}: {err}");
    assert!(err.lines().all(|l| l.chars().count() <= 200), "{args:?}: {err}");
    unwrapped(&err)
}

/// Lines are wrapped: a sentence is one again.
fn unwrapped(text: &str) -> String {
    text.split_whitespace().collect::<Vec<_>>().join(" ")
}

#[test]
fn bad_files_are_named_with_their_mend() {
    let missing = bad(&["assess", "no-such.leeway.json"]);
    assert!(missing.starts_with("leeway: no-such.leeway.json: it is not read: "), "{missing}");
    bad(&["assess", env!("CARGO_TARGET_TMPDIR")]);
    let cut = scratch("cut.leeway.json", &LINE.as_bytes()[..300]);
    let err = bad(&["assess", cut.to_str().expect("a name")]);
    assert!(err.contains("cut off") && err.contains("mend") && err.contains("cut.leeway.json"), "{err}");
    let binary = scratch("binary.leeway.json", b"\x89PNG\r\n\x1a\n\0\0\0");
    assert!(bad(&["assess", binary.to_str().expect("a name")]).contains("a binary file"));
    let huge = scratch("huge.leeway.json", b"");
    std::fs::File::options().write(true).open(&huge).and_then(|f| f.set_len(100_000_000)).expect("a large file");
    assert!(bad(&["assess", huge.to_str().expect("a name")]).contains("more than 4 MB"));
    std::fs::remove_file(&huge).expect("removed");
    let (code, out, err) = piped(&["assess", "-"], &vec![b' '; 20_000_000]);
    assert_eq!((code, out.as_str()), (2, ""));
    assert!(err.contains("more than 4 MB"), "{err}");
    let (code, _, err) = piped(&["assess", "-"], b"");
    assert_eq!(code, 2);
    assert!(err.contains("standard input: found an empty file"), "{err}");
    let many = LINE.replace("\"unit\": \"bar\"", "\"unit\": \"%\"").replace("\"avoid\"", "\"perhaps\"");
    let (code, _, err) = piped(&["assess", "-"], many.as_bytes());
    assert_eq!(code, 2);
    assert!(err.contains("pressure.unit") && err.contains("changes[0].wish"), "all that is wrong: {err}");
    assert!(bad(&["assess", "no-such", "--variant", "x"]).contains("no-such"));
    let line = scratch("named.leeway.json", LINE.as_bytes());
    let line = line.to_str().expect("a name");
    assert!(bad(&["assess", line, "--variant", "Colder"]).contains("Wish turned"));
    assert!(bad(&["assess", line, "--zone", "Cool"]).contains("Heat"));
    assert!(bad(&["assess", line, "--change", "Rust"]).contains("Iron oxidises"));
    assert!(bad(&["propose", "no-such.leeway.json"]).contains("no-such"));
}

#[test]
fn a_zone_or_change_that_cannot_be_taken_is_bad_input_and_the_rest_is_told() {
    let text = LINE.replace("\"balance\": \"N2\",", "\"balance\": \"H2\",");
    let (code, out, err) = piped(&["assess", "-"], text.as_bytes());
    assert_eq!(code, 2);
    assert!(unwrapped(&err).contains("zone 1, Heat; line 8") && err.contains("H2 twice"), "{err}");
    assert!(out.contains("no data"), "{out}");
    let text = LINE.replace("Fe + H2O = Fe0.947O + H2", "Fe + H2O = FeO");
    let (code, out, err) = piped(&["assess", "-", "--json", "--strict"], text.as_bytes());
    assert_eq!(code, 2);
    assert!(unwrapped(&err).contains("change 1, Iron oxidises; line 10"), "{err}");
    assert_eq!(json(&out)["findings"][0]["standing"], "no data");
}

#[test]
fn bad_changes_are_named_with_their_mend() {
    let err = bad(&["change", "2 Cr + 2 O2 = Cr2O3"]);
    assert!(err.contains("O, 1 too many on the left") && err.contains("4 Cr + 3 O2 = 2 Cr2O3"), "{err}");
    assert!(bad(&["change", "Cr + O2 = Cr2O3", "--at", "1,050 C"]).contains("1050 C"));
    assert!(bad(&["change", "Cr + O2 = Cr2O3", "--at", "1000 bar"]).contains("one of C, F, K"));
    assert!(bad(&["change", "Cr + O2 = Cr2O3", "--activity", "O2"]).contains("FORMULA=VALUE"));
    assert!(bad(&["change", "Cr + O2 = Cr2O3", "--dh", "179.2 kJ"]).contains("both or neither"));
    assert!(bad(&["change", ""]).contains("an equation"));
}

#[test]
fn a_byte_order_mark_is_said_and_does_not_matter() {
    let marked = [&[0xef, 0xbb, 0xbf], LINE.as_bytes()].concat();
    let (code, out, err) = piped(&["assess", "-"], &marked);
    assert_eq!((code, err.as_str()), (0, ""));
    assert!(out.contains("byte order mark"), "{out}");
}

#[test]
fn words_that_are_no_command_are_bad_input() {
    for args in [&[][..], &["asses"], &["assess"], &["assess", "-", "--color", "pink"], &["change", "a = b", "--bt"]] {
        let (code, out, err) = run(args);
        assert_eq!((code, out.as_str()), (2, ""), "{args:?}");
        assert!(!err.is_empty() && !err.to_lowercase().contains("error"), "{args:?}: {err}");
    }
    for args in [&["--help"][..], &["assess", "--help"], &["change", "--help"], &["substances", "--help"]] {
        let (code, out, _) = run(args);
        assert_eq!(code, 0, "{args:?}");
        assert!(out.contains("Examples:"), "{args:?}: {out}");
    }
    assert_eq!(run(&["--version"]).0, 0);
}

#[test]
fn colour_is_a_choice() {
    let path = scratch("colour.leeway.json", LINE.as_bytes());
    let path = path.to_str().expect("a name");
    assert!(run(&["assess", path, "--color", "always"]).1.contains('\u{1b}'));
    assert!(!run(&["assess", path, "--color", "never"]).1.contains('\u{1b}'));
    assert!(!run(&["assess", path, "--color", "always", "--json"]).1.contains('\u{1b}'), "JSON is for programs");
    let plain = |t: &str| {
        let mut text = String::new();
        let mut inside = false;
        for c in t.chars() {
            match c {
                '\u{1b}' => inside = true,
                'm' if inside => inside = false,
                c if !inside => text.push(c),
                _ => {}
            }
        }
        text
    };
    assert_eq!(
        plain(&run(&["assess", path, "--color", "always"]).1),
        run(&["assess", path, "--color", "never"]).1,
        "colour carries nothing"
    );
}

/// A device that is always full stands for a full disk.
#[test]
#[cfg(target_os = "linux")]
fn a_full_disk_is_said() {
    let full = std::fs::File::options().write(true).open("/dev/full").expect("the device");
    let output = command(&["substances"]).stdout(full).output().expect("starts");
    let err = String::from_utf8(output.stderr).expect("UTF-8");
    assert_eq!(output.status.code(), Some(2), "{err}");
    assert!(err.contains("standard output takes no more"), "{err}");
}

#[test]
fn a_closed_pipe_is_no_fault() {
    let path = demo_lines().remove(0);
    let mut child = command(&["assess", path.to_str().expect("a name"), "--json"])
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .expect("starts");
    drop(child.stdout.take());
    let mut err = String::new();
    child.stderr.take().expect("a pipe").read_to_string(&mut err).expect("UTF-8");
    let status = child.wait().expect("ends");
    assert_eq!((status.code(), err.as_str()), (Some(0), ""));
}
