//! Changes proposed from charge and gas: what a chemist would look for is there, each balanced, named apart,
//! not watched yet, and in order of how near it comes to its turn.

use leeway_api::response::Proposal;
use leeway_reactions::Equation;
use leeway_tests::{demo_lines, session, text};
use serde_json::json;

fn proposals(line: &str) -> Vec<Proposal> {
    session().propose(line).unwrap_or_else(|p| panic!("{}", p.message))
}

fn equations(file: &str) -> Vec<String> {
    proposals(&text(&format!("lines/{file}.leeway.json"))).into_iter().map(|p| p.equation).collect()
}

#[test]
fn every_kind_is_found() {
    let heron = equations("heron-2");
    // Oxide, mixed oxide, nitride of the alloy (common practice, no source: what a bright line watches).
    for wanted in ["Mn + H2O = MnO + H2", "Fe + 2 Cr + 4 H2O = FeCr2O4 + 4 H2", "2 Cr + N2 = 2 CrN"] {
        assert!(heron.iter().any(|e| e == wanted), "{wanted} is not among {heron:?}");
    }
    let chamber = equations("chamber-c5");
    for wanted in ["3 Fe + 2 CO = Fe3C + CO2", "7 Cr + 6 CO = Cr7C3 + 3 CO2"] {
        assert!(chamber.iter().any(|e| e == wanted), "{wanted} is not among {chamber:?}");
    }
    let vessel = equations("vessel-r210");
    assert!(vessel.iter().any(|e| e == "Ni + H2S = NiS + H2"), "{vessel:?}");
    let kiln = equations("kiln-k4");
    // The stone's silica joins its lime by giving off carbon dioxide; sulfur goes to the stone.
    assert!(kiln.iter().any(|e| e.starts_with("CaCO3 + SiO2 = ")), "{kiln:?}");
    assert!(kiln.iter().any(|e| e.contains("CaSO4")), "{kiln:?}");
    let pusher = equations("pusher-p7");
    assert!(pusher.iter().any(|e| e == "MoO3 + 3 H2 = Mo + 3 H2O"), "{pusher:?}");
    // Hydroxide and carbonate of an oxide in moist gas.
    let lime = json!({"leeway": 1, "pressure": {"value": 1, "unit": "bar"}, "charge": [{"substance": "CaO"}, {"substance": "MgO"}],
        "zones": [{"name": "Z", "temperature": {"value": 400, "unit": "C"}, "gas": {"basis": "wet", "balance": "N2",
            "analysis": {"CO2": {"value": 10, "unit": "%"}, "H2O": {"value": 10, "unit": "%"}}}}]})
    .to_string();
    let found: Vec<String> = proposals(&lime).into_iter().map(|p| p.equation).collect();
    for wanted in ["CaO + H2O = Ca(OH)2", "CaO + CO2 = CaCO3", "MgO + CO2 = MgCO3"] {
        assert!(found.iter().any(|e| e == wanted), "{wanted} is not among {found:?}");
    }
}

#[test]
fn proposals_are_in_order_and_fit_to_be_taken() {
    for (name, line) in demo_lines() {
        let list = proposals(&line);
        assert!(!list.is_empty(), "{name}");
        assert!(
            list.windows(2).all(|w| w[0].leeway_u.abs() <= w[1].leeway_u.abs()),
            "{name}: not in order of nearness"
        );
        let mut tree: serde_json::Value = serde_json::from_str(&line).expect("JSON");
        let watched: Vec<String> =
            tree["changes"].as_array().expect("changes").iter().map(|c| c["equation"].to_string()).collect();
        let changes = tree["changes"].as_array_mut().expect("changes");
        for p in &list {
            let equation = Equation::parse(&p.equation).unwrap_or_else(|e| panic!("{}: {e}", p.equation));
            assert_eq!(equation.text(), p.equation);
            assert!(!p.equation.contains('/'), "{}: a coefficient nobody writes", p.equation);
            assert!(!watched.contains(&p.equation), "{} is watched already", p.equation);
            assert!((p.dg_kj >= 0.0) == (p.leeway_u >= 0.0));
            changes.push(json!({"name": p.name, "equation": p.equation, "wish": p.wish}));
        }
        // All of them taken at once still make a line: every name is its own.
        let a = session().assess(&tree.to_string()).unwrap_or_else(|p| panic!("{name}: {}", p.message));
        assert!(a.changes.iter().all(|c| c.refused.is_none()), "{name}");
        for p in &list {
            let f = a.findings.iter().find(|f| f.change == p.name && f.zone == p.nearest_zone).expect("the finding");
            assert!((f.dg_kj.expect("kJ") - p.dg_kj).abs() < 1e-9, "{name}, {}: {:?} and {}", p.name, f.dg_kj, p.dg_kj);
        }
    }
}
