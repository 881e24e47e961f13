//! What must hold whatever the figures: turning points are zeros, leeway and standing change together, the
//! reverse is the negative, a sum of steps is the direct equation, balancing conserves every element.

use leeway_api::request::ChangeRequest;
use leeway_findings::activity::Charge;
use leeway_findings::fan::Situation;
use leeway_findings::judge::{Case, Ground, assess};
use leeway_findings::lever::What;
use leeway_gas::shift::Shift;
use leeway_quantity::math::ln;
use leeway_reactions::{Equation, Reaction};
use leeway_substances::Book;
use leeway_tests::{demo_lines_and_variants, session};

/// Every turning point of every lever of every finding, put back through the gas intake and the data: dG
/// below 1e-6 kJ.
#[test]
fn turning_points_are_zeros() {
    let book = Book::parse(leeway_dataset::TEXT).expect("data");
    let shift = Shift::new(&book);
    let mut checked = 0;
    for (label, text) in demo_lines_and_variants() {
        let line = leeway_line::read(&text).unwrap_or_else(|e| panic!("{label}: {e}"));
        let found = assess(&book, &shift, &line);
        let charge = Charge::new(&line.charge);
        let ground = Ground { book: &book, shift: &shift, charge: &charge, k: line.coverage_factor };
        for f in &found.findings {
            let (Ok(outcome), Ok(compiled), Ok((gas, _))) =
                (&f.outcome, &found.changes[f.change], &found.gases[f.zone])
            else {
                continue;
            };
            let case = Case { ground, zone: &line.zones[f.zone], change: &line.changes[f.change], compiled, gas };
            let reaction = case.reaction(&outcome.bound);
            let at = Situation { t_k: outcome.place.t_k, p_bar: case.zone.pressure.value, values: gas.intake.values() };
            for lever in &outcome.levers {
                for turn in &lever.turning {
                    let value = lever.unit.to_internal(*turn);
                    let dg = match &lever.what {
                        What::Temperature => case.dg_kj(reaction, value, outcome.ln_q),
                        What::Activity(n, _) => {
                            let (i, taken) = &outcome.bound.activities[*n];
                            let shift = reaction.used[*i].nu * ln(value / taken.value);
                            case.dg_kj(reaction, outcome.place.t_k, outcome.ln_q + shift)
                        }
                        what => {
                            let (state, _) =
                                gas.read(&book, &shift, &what.apply(&at, value)).expect("a gas at its turning point");
                            case.dg_kj(reaction, outcome.place.t_k, outcome.bound.ln_q(reaction, &state))
                        }
                    };
                    assert!(
                        dg.abs() < 1e-6,
                        "{label}, {} in {}, {}: dG {dg:e} kJ at {turn}",
                        case.change.name,
                        case.zone.name,
                        lever.what.name()
                    );
                    checked += 1;
                }
            }
        }
    }
    assert!(checked > 400, "only {checked} turning points");
}

/// Turning the dew point through its turning point flips the sign of the leeway and the clear standing with it.
#[test]
fn leeway_changes_sign_where_the_standing_does() {
    let session = session();
    let line = leeway_tests::text("lines/heron-2.leeway.json");
    let mut tree: serde_json::Value = serde_json::from_str(&line).expect("JSON");
    tree["coverage_factor"] = serde_json::json!(1);
    let mut seen = [0usize; 3];
    let mut last: Option<(f64, String)> = None;
    for step in 0..=600 {
        let frost = -60.0 + 0.1 * f64::from(step);
        tree["zones"][1]["gas"]["dew_point"]["value"] = serde_json::json!(frost);
        let a = session.assess(&tree.to_string()).expect("a line");
        let f = a.findings.iter().find(|f| f.change == "Chromium oxidises" && f.zone == "Heat 2").expect("the finding");
        let lever = f.levers.iter().find(|l| l.lever == "dew_point").expect("the lever");
        let (leeway, u) = (lever.leeway.expect("a turn"), f.leeway_u.expect("doubt"));
        let turn = lever.turning_points[0];
        assert_eq!(leeway > 0.0, frost < turn, "at {frost}");
        assert_eq!(leeway > 0.0, f.leeway_kj.expect("kJ") > 0.0, "at {frost}");
        let wanted = if u >= 1.0 {
            "on side"
        } else if u <= -1.0 {
            "off side"
        } else {
            "too close to call"
        };
        assert_eq!(f.standing, wanted, "at {frost}, {u} u");
        seen[if u >= 1.0 {
            0
        } else if u <= -1.0 {
            1
        } else {
            2
        }] += 1;
        if let Some((before, _)) = &last {
            assert!(leeway < *before, "the leeway falls as the gas gets wetter");
        }
        last = Some((leeway, f.standing.clone()));
    }
    assert!(seen.iter().all(|n| *n > 5), "{seen:?}");
}

fn request(equation: &str, at: &[&str]) -> ChangeRequest {
    ChangeRequest {
        equation: equation.into(),
        at: at.iter().map(ToString::to_string).collect(),
        ..ChangeRequest::default()
    }
}

#[test]
fn the_reverse_is_the_negative() {
    let session = session();
    for (there, back) in [
        ("2 Cr + 3 H2O = Cr2O3 + 3 H2", "Cr2O3 + 3 H2 = 2 Cr + 3 H2O"),
        ("CaCO3 = CaO + CO2", "CaO + CO2 = CaCO3"),
        ("3 Fe + 4 CO2 = Fe3O4 + 4 CO", "Fe3O4 + 4 CO = 3 Fe + 4 CO2"),
    ] {
        let at = ["25 C", "400 C", "900 C"];
        let (a, b) =
            (session.change(&request(there, &at)).expect("there"), session.change(&request(back, &at)).expect("back"));
        for (a, b) in a.iter().zip(&b) {
            assert!(
                (a.dg_kj + b.dg_kj).abs() < 1e-9 && (a.dh_kj + b.dh_kj).abs() < 1e-9,
                "{there} at {}",
                a.temperature_k
            );
            assert_eq!(a.turning_temperatures_k.len(), b.turning_temperatures_k.len());
            assert!((a.u_dg_kj - b.u_dg_kj).abs() < 1e-12);
        }
    }
}

#[test]
fn a_sum_of_steps_is_the_direct_equation() {
    let session = session();
    for (steps, direct) in [
        ("2*(C + O2 = CO2) - (2 CO + O2 = 2 CO2)", "2 C + O2 = 2 CO"),
        ("(CO + H2O = CO2 + H2) + (C + CO2 = 2 CO)", "C + H2O = CO + H2"),
        ("1/2*(2 Fe2O3 + C = 4 FeO + CO2) - 0.5 (C + O2 = CO2)", "Fe2O3 = 2 FeO + 0.5 O2"),
        ("(Ca + 0.5 O2 = CaO) + (C + O2 = CO2) − (Ca + C + 1.5 O2 = CaCO3)", "CaCO3 = CaO + CO2"),
    ] {
        let at = ["700 C", "900 C", "1000 C"];
        let (a, b) =
            (session.change(&request(steps, &at)).expect(steps), session.change(&request(direct, &at)).expect(direct));
        for (a, b) in a.iter().zip(&b) {
            assert!((a.dg_kj - b.dg_kj).abs() < 1e-9, "{steps}: {} and {}", a.dg_kj, b.dg_kj);
            assert!((a.dh_kj - b.dh_kj).abs() < 1e-9 && (a.ds_j_per_k - b.ds_j_per_k).abs() < 1e-9, "{steps}");
        }
    }
}

/// Random pairs of substances of the data joined by random gases: whatever balances conserves every element,
/// and has no coefficient of zero.
#[test]
fn balancing_conserves_every_element() {
    let book = Book::parse(leeway_dataset::TEXT).expect("data");
    let names: Vec<&str> = book.substances.iter().map(|s| s.formula.text()).collect();
    let gases = ["O2", "H2", "H2O", "CO", "CO2", "N2", "SO2", "HCl"];
    arbtest::arbtest(|u| {
        let mut left = vec![*u.choose(&names)?];
        let mut right = vec![*u.choose(&names)?];
        for side in [&mut left, &mut right] {
            for _ in 0..u.int_in_range(0..=2)? {
                side.push(u.choose(&gases)?);
            }
        }
        let text = format!("{} = {}", left.join(" + "), right.join(" + "));
        if let Ok(equation) = Equation::parse(&text) {
            let mut sums = std::collections::BTreeMap::new();
            for t in &equation.terms {
                let n = t.coefficient.to_string();
                assert_ne!(n, "0", "{text}");
                let nu: f64 = n
                    .split_once('/')
                    .map_or_else(|| n.parse().unwrap(), |(a, b)| a.parse::<f64>().unwrap() / b.parse::<f64>().unwrap());
                for e in t.species.formula.counts().keys() {
                    *sums.entry(*e).or_insert(0.0) += nu * t.species.formula.count(*e);
                }
            }
            assert!(sums.values().all(|s: &f64| s.abs() < 1e-9), "{text}: {sums:?}");
            // Written out and read again it is the same equation.
            let again = Equation::parse(&equation.text()).expect("its own text");
            assert_eq!(again.text(), equation.text());
        }
        Ok(())
    })
    .seed(0x1ee_0007_0000_4000)
    .budget_ms(1_500);
    // Hand-made ones that must balance, with their known answers (common practice, no source).
    for (typed, wanted) in [
        ("Cr + H2O = Cr2O3 + H2", "2 Cr + 3 H2O = Cr2O3 + 3 H2"),
        ("KOH + H3PO4 = K3PO4 + H2O", "3 KOH + H3PO4 = K3PO4 + 3 H2O"),
        ("Fe + H2O = Fe0.947O + H2", "0.947 Fe + H2O = Fe0.947O + H2"),
        ("CaSO4.2H2O = CaSO4 + H2O", "CaSO4.2H2O = CaSO4 + 2 H2O"),
        ("FeS2 + O2 → Fe2O3 + SO2", "4 FeS2 + 11 O2 = 2 Fe2O3 + 8 SO2"),
        ("[Ni(CO)4] = Ni + CO", "[Ni(CO)4] = Ni + 4 CO"),
    ] {
        assert_eq!(Equation::parse(typed).expect(typed).text(), wanted);
    }
}

/// Four sign cases and several crossings by the same code; the textbook case of limestone.
#[test]
fn ranges_of_temperature() {
    let session = session();
    let with = |dh: &str, ds: &str| {
        let r = ChangeRequest {
            equation: "CaCO3 = CaO + CO2".into(),
            dh: Some(dh.into()),
            ds: Some(ds.into()),
            ..ChangeRequest::default()
        };
        session.change(&r).expect("constants").remove(0)
    };
    // Constants of the textbook case (common practice, no source): +131.5 kJ at 298 K, turn near 1119 K.
    let limestone = with("179.2 kJ", "160.2 J/K");
    assert!((limestone.dg_kj - 131.44).abs() < 0.1, "{}", limestone.dg_kj);
    assert!((limestone.turning_temperatures_k[0] - 1118.6).abs() < 0.1, "{:?}", limestone.turning_temperatures_k);
    assert_eq!(limestone.goes, "above 845.5\u{2009}\u{b0}C");
    assert_eq!(with("-179.2 kJ", "-160.2 J/K").goes, "below 845.5\u{2009}\u{b0}C");
    assert_eq!(with("-179.2 kJ", "160.2 J/K").goes, "always");
    assert_eq!(with("179.2 kJ", "-160.2 J/K").goes, "never");
    // A slip between J and kJ would show here: the same figures typed in the other unit.
    assert!((with("179200 J", "0.1602 kJ/K").dg_kj - limestone.dg_kj).abs() < 1e-9);
    // On the real curve with phase changes: dolomite's magnesia half, and an oxide that boils away from its metal.
    let real = session.change(&request("MgO + C = Mg(g) + CO", &["1000 C"])).expect("real").remove(0);
    assert_eq!(real.turning_temperatures_k.len(), 1);
    assert!(
        (real.turning_temperatures_k[0] - 2130.0).abs() < 30.0,
        "carbothermic magnesium at 1 bar (from memory, about 2130 K): {:?}",
        real.turning_temperatures_k
    );
}

/// A curve with three crossings made from a data file of our own: all are found, each to a zero.
#[test]
fn several_crossings_are_all_found() {
    let text = "leeway-data 1\nversion test\nsource S\n  short S\n  cite S\n  licence S\n\
        substance Fe\n set S preferred\n why t\n made t\n doubt t\n H298 0 u 0.1\n S298 30 u 0.1\n anchor none\n phase cr s 300 1700\n \
        span 300 1700 h 0 s 0 cp 0:30\n\
        substance Fe2\n set S preferred\n why t\n made t\n doubt t\n H298 0 u 0.1\n S298 30 u 0.1\n anchor none\n phase cr s 300 1700\n \
        span 300 1700 h 10125 s 38.25 cp 0:60 1:-0.087 2:9e-5\n";
    // dG = -1.5e-5 (T - 500)(T - 900)(T - 1500) J; the 60 J/K cancel against twice the 30 J/K of Fe.
    let book = Book::parse(text).unwrap_or_else(|e| panic!("{e}"));
    let reaction = Reaction::new(&book, &Equation::parse("2 Fe = Fe2").expect("an equation")).expect("held");
    let found: Vec<f64> = reaction.turning(&book, 0.0, 0.0).iter().map(|c| c.at).collect();
    assert_eq!(found.len(), 3, "{found:?}");
    for (t, wanted) in found.iter().zip([500.0, 900.0, 1500.0]) {
        assert!((t - wanted).abs() < 1e-6, "{found:?}");
        assert!(reaction.at(&book, *t).expect("a value").dg_kj.abs() < 1e-9);
    }
    // A pair of crossings inside one cell of the grid: the level is set just inside the extremum.
    let low = reaction.turning(&book, 0.0, 0.0);
    assert!(low[0].rises != low[1].rises && low[1].rises != low[2].rises);
    let extremum = leeway_reactions::root(|t| 38.25 - 0.087 * t + 4.5e-5 * t * t, 550.0, 800.0);
    let level = reaction.at(&book, extremum).expect("a value").dg_kj;
    for inside in [1e-3, 1e-6] {
        let pair = reaction.turning(&book, 0.0, level * (1.0 - inside));
        assert_eq!(pair.len(), 3, "level {inside}: {pair:?}");
    }
}

/// What a remedy proposes puts the finding on side.
#[test]
fn remedies_bring_findings_back() {
    let session = session();
    let mut tried = 0;
    for (label, text) in demo_lines_and_variants() {
        let a = session.assess(&text).expect("a line");
        for f in &a.findings {
            for r in &f.remedies {
                let mut tree: serde_json::Value = serde_json::from_str(&text).expect("JSON");
                let zone = &mut tree["zones"][f.zone_index];
                let value = serde_json::json!(r.beyond_doubt);
                match r.lever.as_str() {
                    "temperature" => zone["temperature"]["value"] = value,
                    "rate" => zone["rate"]["value"] = value,
                    "dew_point" => zone["gas"]["dew_point"]["value"] = value,
                    gas => zone["gas"]["analysis"][gas]["value"] = value,
                }
                let after = session.assess(&tree.to_string()).expect("a line");
                let g = after.findings.iter().find(|g| g.change == f.change && g.zone == f.zone).expect("the finding");
                assert_eq!(g.standing, "on side", "{label}: {} in {}, {}", f.change, f.zone, r.sentence);
                // Raising what burns, poisons or wets is never proposed.
                let raised = r.beyond_doubt > r.from;
                let harmless = ["temperature", "rate", "N2", "Ar", "He"].contains(&r.lever.as_str());
                assert!(!raised || harmless, "{}", r.sentence);
                tried += 1;
            }
        }
    }
    assert!(tried > 30, "only {tried} remedies");
}

/// The standing follows the rule of doubt and of rate, whatever the line.
#[test]
fn standing_follows_its_rule() {
    let session = session();
    for (label, text) in demo_lines_and_variants() {
        let a = session.assess(&text).expect("a line");
        for f in &a.findings {
            let (g, u) = (f.dg_kj.expect("a figure"), f.u_dg_kj.expect("a doubt"));
            let slow = f.acts_above_k.is_some_and(|t| f.judged_at_k < t - 1e-6);
            let goes = g < 0.0;
            let wanted = if slow && goes {
                "on paper"
            } else if g.abs() < a.coverage_factor * u {
                "too close to call"
            } else if goes == (f.wish == "want") {
                "on side"
            } else {
                "off side"
            };
            let at_limit = f.notes.iter().any(|n| n.contains("detection limit"));
            assert!(
                f.standing == wanted || at_limit,
                "{label}: {} stands {}, the rule says {wanted}",
                f.sentence,
                f.standing
            );
            let chance = f.chance_wrong.expect("a chance");
            assert!((0.0..=0.5).contains(&chance));
            assert!((chance - 0.5 * leeway_quantity::math::erfc((g / u).abs() / 2f64.sqrt())).abs() < 1e-12);
        }
    }
}

/// A phase named by its family is the form that is stable there; named whole it is that form.
#[test]
fn phases_by_name() {
    let session = session();
    let phase = |equation: &str, at: &str, formula: &str| {
        session.change(&request(equation, &[at])).unwrap_or_else(|p| panic!("{}", p.message))[0].phases[formula].clone()
    };
    assert_eq!(phase("SiO2(quartz) + 2 H2 = Si + 2 H2O", "500 C", "SiO2"), "quartz-alpha");
    assert_eq!(phase("SiO2(quartz) + 2 H2 = Si + 2 H2O", "700 C", "SiO2"), "quartz-beta");
    assert_eq!(phase("SiO2 + 2 H2 = Si + 2 H2O", "1600 C", "SiO2"), "cristobalite");
    assert_eq!(phase("Fe(l) + 0.5 O2 = FeO(g)", "1600 C", "Fe"), "liquid");
    assert_eq!(phase("FeO(wustite) + H2 = Fe + H2O", "900 C", "FeO"), "wustite");
    assert!(
        session.change(&request("SiO2(tridymite) = SiO2(quartz)", &["900 C"])).is_err_and(|p| p.code == "data.phase")
    );
}
