//! Free energies of formation against the NIST-JANAF tables (Chase 1998, J. Phys. Chem. Ref. Data, Monograph 9) at 298.15,
//! 600, 1000 and 1400 K, for every phase of the data file that the tables also list. The tables' values and how they were
//! made: `reference/janaf_dfg.csv`; every difference that is left standing, with its reason: `reference/exceptions.csv`.

use leeway_substances::{Book, Class, Record, State};
use leeway_tests::table;
use std::collections::{BTreeMap, BTreeSet};

/// Accepted difference, kJ/mol, unless twice the standard uncertainty of the record is more.
const WITHIN_KJ: f64 = 2.0;

fn class(word: &str) -> Class {
    match word {
        "gas" => Class::Gas,
        "condensed" => Class::Condensed,
        other => panic!("{other} is no class"),
    }
}

/// Name and G, J/mol, of the stable phase at a temperature; boundaries and metastable forms left out.
fn stable(record: &Record, t: f64, state: Option<State>) -> Option<(&str, f64)> {
    let phases = record.phases.iter().filter(|p| p.beside.is_none() && !p.metastable && p.holds(t));
    let values = phases.filter(|p| state.is_none_or(|s| p.state == s)).map(|p| (p.name.as_str(), p.values(t).g_j));
    values.min_by(|a, b| a.1.total_cmp(&b.1))
}

/// G, J per mole of formula, of an element in the state the tables take for its reference: `1 Zn(g)`, `0.5 O2(g)`.
fn element(book: &Book, part: &str, t: f64) -> f64 {
    let (n, label) = part.split_once(' ').expect("a count");
    let (formula, state) = label.strip_suffix(')').and_then(|l| l.split_once('(')).expect("a state");
    let (class, state) = match state {
        "g" => (Class::Gas, State::Gas),
        "l" => (Class::Condensed, State::Liquid),
        _ => (Class::Condensed, State::Solid),
    };
    let substance = &book.substances[book.find(formula).unwrap_or_else(|| panic!("{formula} is not held"))];
    let record = substance.records.iter().find(|r| r.class == class && r.preferred).expect(formula);
    // An element may melt a few kelvin from where the tables melt it.
    let found = stable(record, t, Some(state)).or_else(|| stable(record, t, None));
    n.parse::<f64>().expect("a count") * found.unwrap_or_else(|| panic!("{formula} at {t} K")).1
}

/// How many of how many lie inside.
#[derive(Default)]
struct Tally {
    inside: usize,
    near: usize,
    all: usize,
}

impl Tally {
    fn add(&mut self, inside: bool, near: bool) {
        self.inside += usize::from(inside);
        self.near += usize::from(near);
        self.all += 1;
    }
    #[track_caller]
    fn at_least(&self, inside: f64, near: f64, what: &str) {
        let (a, b) = (self.inside as f64 / self.all as f64, self.near as f64 / self.all as f64);
        assert!(a >= inside, "{what}: only {:.1} % of {} inside", 100.0 * a, self.all);
        assert!(b >= near, "{what}: only {:.1} % of {} within 2 kJ", 100.0 * b, self.all);
    }
}

#[test]
fn free_energies_of_formation() {
    let book = Book::parse(leeway_dataset::TEXT).expect("data");
    let mut outside: BTreeMap<(String, String, String), Vec<String>> = BTreeMap::new();
    let mut figures = Vec::new();
    let mut groups: BTreeMap<&str, Tally> = BTreeMap::new();
    let mut by_temperature: BTreeMap<String, Tally> = BTreeMap::new();
    let mut seen = BTreeSet::new();
    for row in table("reference/janaf_dfg.csv") {
        let (formula, key, t) = (&row["formula"], &row["set"], row["t_k"].parse::<f64>().expect("a temperature"));
        let what = format!("{formula}, {key}, {t} K");
        assert!(seen.insert(what.clone() + &row["class"]), "{what}: twice");
        let substance = &book.substances[book.find(formula).unwrap_or_else(|| panic!("{what}: not held"))];
        let record = substance
            .records
            .iter()
            .find(|r| r.class == class(&row["class"]) && book.sources[r.source].key == *key)
            .unwrap_or_else(|| panic!("{what}: no such set; make the table anew"));
        let (phase, g) = stable(record, t, None).unwrap_or_else(|| panic!("{what}: no phase; make the table anew"));
        assert_eq!(phase, row["phase"], "{what}: another phase is stable; make the table anew");
        let formed: f64 = row["elements"].split(" + ").map(|part| element(&book, part, t)).sum();
        let off = (g - formed) * 1e-3 - row["dfg_kj"].parse::<f64>().expect("dfG");
        let near = off.abs() <= WITHIN_KJ;
        let inside = near || off.abs() <= 2.0 * record.u_g_kj(t);
        let own_fit = row["own_fit"] == "yes";
        if own_fit {
            // Fitted to these very tables: holds the fit, the integrals and the elements to the same table.
            groups.entry("fitted to the tables").or_default().add(inside, near);
        } else {
            groups.entry("from other sources").or_default().add(inside, near);
            if record.preferred {
                by_temperature.entry(format!("{t}")).or_default().add(inside, near);
            }
            // Not half of the difference to these very tables: twice such a doubt proves something.
            if !record.doubt.starts_with("independent sources") {
                groups.entry("doubt from elsewhere").or_default().add(inside, near);
            }
        }
        if record.preferred {
            groups.entry("preferred").or_default().add(inside, near);
        }
        if !inside {
            figures.push(format!("{what}: {off:+.2} kJ, twice the uncertainty {:.2}", 2.0 * record.u_g_kj(t)));
            outside.entry((formula.clone(), row["class"].clone(), key.clone())).or_default().push(row["t_k"].clone());
        }
    }
    assert!(seen.len() >= 2300, "only {} values compared", seen.len());
    // Shares inside, and within 2 kJ alone. Nine of ten inside is what is asked; the second figure holds what is reached.
    for (name, inside, near) in [
        ("fitted to the tables", 1.0, 1.0),
        ("from other sources", 0.90, 0.59),
        ("preferred", 0.90, 0.65),
        ("doubt from elsewhere", 0.90, 0.80),
    ] {
        groups[name].at_least(inside, near, name);
    }
    for (t, tally) in &by_temperature {
        tally.at_least(0.89, 0.5, &format!("preferred, from other sources, {t} K"));
    }
    // What is outside is listed with its reason, at just these temperatures, and nothing else is listed.
    let mut listed = BTreeMap::new();
    for row in table("reference/exceptions.csv") {
        assert!(row["reason"].len() > 10, "{row:?}: without a reason");
        let temperatures: Vec<String> = row["t_k"].split(' ').map(str::to_string).collect();
        let key = (row["formula"].clone(), row["class"].clone(), row["set"].clone());
        assert!(listed.insert(key, temperatures).is_none(), "{row:?}: listed twice");
    }
    let of = |key: &(String, String, String)| figures.iter().filter(|f| f.starts_with(&key.0)).collect::<Vec<_>>();
    for (key, temperatures) in &outside {
        assert_eq!(listed.get(key), Some(temperatures), "{key:?}: outside, and not so listed; {:#?}", of(key));
    }
    for (key, temperatures) in &listed {
        assert_eq!(outside.get(key), Some(temperatures), "{key:?}: listed, and no longer outside");
    }
}

/// The values of the reference itself: H and S of a table give its own column of dfG, or a note says that they do not.
#[test]
fn the_tables_agree_with_themselves() {
    let mut noted = 0;
    for row in table("reference/janaf_dfg.csv") {
        let number = |name: &str| row[name].parse::<f64>().expect(name);
        if row["dfg_column_kj"].is_empty() {
            continue;
        }
        let off = (number("dfg_kj") - number("dfg_column_kj")).abs();
        assert_eq!(off > 0.3, !row["table_note"].is_empty(), "{row:?}");
        noted += usize::from(off > 0.3);
    }
    assert!(noted > 0, "PbCl4 and the compounds of chromium have a note");
}
