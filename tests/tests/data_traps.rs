//! Known defects of open data, and what a wrong data file must run into.
//!
//! Each trap names the figure that would come out if it were fallen into.

use leeway_api::request::ChangeRequest;
use leeway_quantity::math::exp;
use leeway_substances::{Book, Class, Record, State};
use leeway_tests::session;

fn book() -> Book {
    Book::parse(leeway_dataset::TEXT).unwrap_or_else(|e| panic!("{e}"))
}

fn preferred<'a>(book: &'a Book, formula: &str, class: Class) -> &'a Record {
    let i = book.find(formula).unwrap_or_else(|| panic!("{formula} is not held"));
    book.substances[i].records.iter().find(|r| r.class == class && r.preferred).unwrap_or_else(|| panic!("{formula}"))
}

#[track_caller]
fn near(found: f64, wanted: f64, within: f64) {
    assert!((found - wanted).abs() <= within, "found {found}, wanted {wanted} within {within}");
}

fn turn(equation: &str, activity: &[&str]) -> f64 {
    let request = ChangeRequest {
        equation: equation.into(),
        activities: activity.iter().map(ToString::to_string).collect(),
        ..ChangeRequest::default()
    };
    session().change(&request).unwrap_or_else(|p| panic!("{}", p.message))[0].turning_temperatures_k[0] - 273.15
}

#[test]
fn figures_that_open_files_have_wrong() {
    let b = book();
    let h = |f: &str, c: Class| preferred(&b, f, c).h298_kj;
    // Converted from calories twice: -1059.1 kJ. NIST-JANAF Cl-137: -253.13.
    near(h("FeCl3", Class::Gas), -253.1, 1.0);
    // Copied from cupric oxide: -155.6. NIST-JANAF Cl-009: -138.07.
    near(h("CuCl", Class::Condensed), -138.07, 0.5);
    // NIST-JANAF Cl-010, F-043, K-...: -205.9 (not -218.0), -280.3 (not -209.2), -495.8 (not -443.0).
    near(h("CuCl2", Class::Condensed), -205.9, 1.0);
    near(h("CuF", Class::Condensed), -280.3, 1.0);
    near(h("K2O2", Class::Condensed), -495.8, 1.0);
    // An old national value: -1096.0, which decomposes at 304 C. Berman (1988): -1113.6; NIST-JANAF: -1111.7.
    near(h("MgCO3", Class::Condensed), -1112.5, 2.0);
    let magnesite = turn("MgCO3 = MgO + CO2", &["CO2=1.01325"]);
    assert!((398.0..=430.0).contains(&magnesite), "{magnesite}");
    // On red phosphorus: +22.9. NASA Glenn, on white: +5.4.
    near(h("PH3", Class::Gas), 5.4, 1.0);
}

#[test]
fn wustite_is_not_stoichiometric() {
    let b = book();
    let wustite = b.find("Fe0.947O").expect("wustite");
    // Stored as Fe0.95O elsewhere: 69.05 g/mol, and iron is not conserved.
    near(b.substances[wustite].formula.molar_mass(), 0.947 * 55.845 + 15.999, 1e-9);
    let iron_boundary = preferred(&b, "FeO", Class::Condensed);
    assert!(
        iron_boundary.phases.iter().all(|p| p.name.starts_with("wustite")),
        "only wustite stands for condensed FeO"
    );
    assert!(
        iron_boundary.phases.iter().any(|p| p.beside.as_deref() == Some("Fe3O4")),
        "the magnetite boundary has its own record"
    );
    // The tables' stoichiometric crystal gives H2O/H2 = 0.31 at 1000 C; measured 0.669.
    let at = |equation: &str| {
        let r = ChangeRequest { equation: equation.into(), at: vec!["1000 C".into()], ..ChangeRequest::default() };
        session().change(&r).unwrap_or_else(|p| panic!("{}", p.message))[0].log10_k
    };
    near(exp(at("FeO + H2 = Fe + H2O") * core::f64::consts::LN_10), 0.669, 0.03);
    // Beside magnetite the other boundary is used: 3 FeO + H2O = Fe3O4 + H2 differs from the iron boundary's record.
    let magnetite = session()
        .change(&ChangeRequest {
            equation: "3 FeO + H2O = Fe3O4 + H2".into(),
            at: vec!["900 C".into()],
            ..ChangeRequest::default()
        })
        .expect("held");
    assert_ne!(magnetite[0].phases["FeO"], "wustite");
}

#[test]
fn mislabelled_and_overlapping_phases() {
    let b = book();
    // Aluminium nitride's "liquid" from 1800 K is the solid: it does not melt there.
    let nitride = preferred(&b, "AlN", Class::Condensed);
    assert!(nitride.phases.iter().all(|p| p.state == State::Solid || p.low_k() > 2600.0), "{:?}", nitride.phases);
    // No record of one source overlaps itself, whatever phase; strontium chloride and magnesium hydroxide did.
    for s in &b.substances {
        for r in &s.records {
            let stable: Vec<_> = r.phases.iter().filter(|p| !p.metastable && p.beside.is_none()).collect();
            for (i, p) in stable.iter().enumerate() {
                for q in &stable[i + 1..] {
                    let overlap = p.high_k().min(q.high_k()) - p.low_k().max(q.low_k());
                    let polymorphs = p.state == q.state && p.low_k() == q.low_k();
                    assert!(
                        overlap < 1e-6 || polymorphs,
                        "{}: {} and {} overlap by {overlap} K",
                        s.formula.text(),
                        p.name,
                        q.name
                    );
                }
            }
        }
    }
    // Sane upper ends: dioxides and solids are not carried to 6000 K.
    for s in &b.substances {
        for r in s.records.iter().filter(|r| r.class == Class::Condensed) {
            for p in r.phases.iter().filter(|p| p.state == State::Solid) {
                assert!(p.high_k() <= 4300.0, "{} ({}) to {} K", s.formula.text(), p.name, p.high_k());
            }
        }
    }
}

#[test]
fn every_record_says_where_it_is_from_and_how_sure_it_is() {
    let b = book();
    let mut phases = 0;
    for s in &b.substances {
        for r in &s.records {
            phases += r.phases.len();
            let source = &b.sources[r.source];
            let what = s.formula.text();
            assert!(!source.short.is_empty() && source.cite.len() > 10, "{what}: {source:?}");
            assert!(!r.doubt.is_empty() && !r.made.is_empty(), "{what}");
            let element = s.formula.single_element().is_some();
            assert!(r.u_h298_kj > 0.0 || element, "{what}: a compound without doubt of its enthalpy");
            assert!(r.u_s298_j_per_k > 0.0, "{what}: without doubt of its entropy");
            assert!(
                !r.cite_is_memory(&b) || r.u_h298_kj >= 10.0 || !r.preferred,
                "{what}: from memory with too small a doubt"
            );
        }
    }
    assert!(b.substances.len() >= 400 && phases >= 700, "{} substances, {phases} phases", b.substances.len());
    // Asked for by name from the start.
    for f in
        ["NiO", "CoO", "MnO", "ZnO", "FeO", "Fe0.947O", "Fe3C", "MgCO3", "CaCO3", "Cr2O3", "Cr2N", "MnCr2O4", "FeCr2O4"]
    {
        preferred(&b, f, Class::Condensed);
    }
}

trait Memory {
    fn cite_is_memory(&self, book: &Book) -> bool;
}

impl Memory for Record {
    fn cite_is_memory(&self, book: &Book) -> bool {
        book.sources[self.source].cite.contains("from memory") && self.made.contains("from memory")
    }
}

/// Steps of the Gibbs energy across the transitions of every record: below 0.1 kJ, and of Cp below: none of
/// the curves may be carried by a polynomial past its end.
#[test]
fn curves_join_and_are_not_carried_by_their_polynomials() {
    let b = book();
    for s in &b.substances {
        for r in &s.records {
            for p in &r.phases {
                for pair in p.spans.windows(2) {
                    let (x, y) = (pair[0].values(pair[0].high_k), pair[1].values(pair[1].low_k));
                    near((x.g_j - y.g_j) * 1e-3, 0.0, 0.1);
                }
                // Beyond the end Cp stays at its end value.
                let (end, beyond) = (p.values(p.high_k()), p.values(p.high_k() + 90.0));
                near(beyond.cp_j_per_k, end.cp_j_per_k, 1e-9);
            }
        }
    }
}

/// Every way to break the data file that was thought of names the line that is wrong.
#[test]
fn a_wrong_data_file_is_refused_with_its_line() {
    let good = "leeway-data 1\nversion t\nsource S\n  short S\n  cite S\n  licence S\nsubstance Fe\n  name iron\n  set S preferred\n    why w\n    made m\n    H298 0 u 0\n    S298 27.28 u 0.1\n    doubt d\n    phase cr s 200 1800\n      span 200 1000 h -7492.51 s -115.9006 cp 0:25.13\n      span 1000 1800 h -7492.51 s -115.9006 cp 0:25.13\n";
    Book::parse(good).unwrap_or_else(|e| panic!("{e}"));
    for (from, to, line, found) in [
        ("leeway-data 1", "leeway-data 2", 1, "leeway-data 2"),
        ("substance Fe", "substance Fq", 7, "Fq"),
        ("set S preferred", "set T preferred", 9, "T"),
        ("set S preferred", "set S", 9, "0 preferred"),
        ("why w\n", "\n", 9, "without a reason"),
        ("H298 0 u 0", "H298 0", 12, "0"),
        ("H298 0 u 0", "H298 -5 u 0", 9, "H298 -0.000 kJ"),
        ("S298 27.28 u 0.1", "S298 27.9 u 0.1", 9, "S298 27."),
        ("S298 27.28 u 0.1", "S298 27.28 u -1", 13, "-1"),
        ("phase cr s 200 1800", "phase cr q 200 1800", 15, "q"),
        ("phase cr s 200 1800", "phase cr s 1800 200", 15, "1800 to 200"),
        ("span 200 1000", "span 300 1000", 16, "300"),
        ("span 1000 1800", "span 1100 1800", 17, "1100"),
        ("span 1000 1800 h -7492.51", "span 1000 1800 h -5000", 17, "2.493 kJ"),
        ("cp 0:25.13\n      span 1000", "cp 0:-25.13\n      span 1000", 16, "Cp of -25.1"),
        ("cp 0:25.13\n      span 1000", "cp 0:abc\n      span 1000", 16, "abc"),
        ("cp 0:25.13\n      span 1000", "cp 0.3:25.13\n      span 1000", 16, "0.3"),
        ("doubt d", "dout d", 14, "dout"),
        ("    doubt d\n", "", 9, "without"),
    ] {
        let bad = good.replacen(from, to, 1);
        let error = Book::parse(&bad).expect_err(to);
        assert_eq!(error.line, line, "{to:?}: {error}");
        assert!(error.found.contains(found), "{to:?}: {error}");
        assert!(!error.expected.is_empty());
    }
}
