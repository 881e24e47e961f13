//! Prints every demo line and variant with its assessment as the native engine makes it: what the engine in
//! WebAssembly must give to the last bit.
#![allow(clippy::print_stdout, reason = "its one purpose")]

fn main() {
    let session = leeway_tests::session();
    let all: Vec<serde_json::Value> = leeway_tests::demo_lines_and_variants()
        .into_iter()
        .map(|(label, line)| {
            let assessment = session.assess(&line).unwrap_or_else(|p| panic!("{label}: {}", p.message));
            let text = serde_json::to_string(&assessment).unwrap_or_else(|e| panic!("{label}: {e}"));
            serde_json::json!({ "label": label, "line": line, "assessment": text })
        })
        .collect();
    println!("{}", serde_json::to_string(&all).unwrap_or_else(|e| panic!("{e}")));
}
