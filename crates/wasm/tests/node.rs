//! The engine as WebAssembly in Node: every demo line and variant gives what the native engine gave, to the
//! last bit; and a failure carries its problem across.
#![cfg(target_arch = "wasm32")]

use js_sys::{JSON, Reflect};
use leeway_wasm::Session;
use serde::Deserialize;
use wasm_bindgen::JsValue;
use wasm_bindgen_test::wasm_bindgen_test;

/// What `cargo run --package leeway-tests --bin parity` wrote, path given by the build.
const NATIVE: &str = include_str!(env!("LEEWAY_PARITY"));

#[derive(Deserialize)]
struct Case {
    label: String,
    line: String,
    assessment: String,
}

#[wasm_bindgen_test]
fn the_same_bits_as_native() {
    let cases: Vec<Case> = serde_json::from_str(NATIVE).expect("the native answers");
    assert!(cases.len() >= 18, "{} lines and variants", cases.len());
    let session = Session::new().expect("the data");
    for case in cases {
        let answer = session.assess(&case.line).expect("an assessment");
        // Shortest round-trip texts of the same numbers are the same; one differing bit is another text.
        let wasm = String::from(JSON::stringify(&answer).expect("text"));
        let native = String::from(JSON::stringify(&JSON::parse(&case.assessment).expect("JSON")).expect("text"));
        assert!(
            wasm == native,
            "{}: the page and the shell differ at {:?}",
            case.label,
            first_difference(&wasm, &native)
        );
    }
}

fn first_difference(a: &str, b: &str) -> String {
    let at = a.bytes().zip(b.bytes()).position(|(x, y)| x != y).unwrap_or(a.len().min(b.len()));
    let cut = |t: &str| t.chars().skip(at.saturating_sub(60)).take(120).collect::<String>();
    format!("{} / {}", cut(a), cut(b))
}

#[wasm_bindgen_test]
fn a_failure_carries_its_problem() {
    let session = Session::new().expect("the data");
    let error = session.assess("{\"leeway\": 1, \"zones\": 3}").expect_err("no line");
    let problem = Reflect::get(&error, &JsValue::from_str("problem")).expect("a problem");
    let at = Reflect::get(&problem, &JsValue::from_str("at")).expect("a place");
    assert_eq!(at.as_string().as_deref(), Some("zones"));
}

#[wasm_bindgen_test]
fn requests_come_in_as_objects() {
    let session = Session::new().expect("the data");
    let asked = JSON::parse(r#"{"equation":"CaCO3 = CaO + CO2","at":["887 C"]}"#).expect("JSON");
    let answer = session.change(asked).expect("a reaction");
    let text = String::from(JSON::stringify(&answer).expect("text"));
    assert!(text.contains("\"log10_K\""), "{text}");
    let wrong = JSON::parse(r#"{"equation":"A","nonsense":1}"#).expect("JSON");
    assert!(session.change(wrong).is_err());
}
