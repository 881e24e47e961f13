//! Changes that a charge and a gas suggest: oxidation, reduction, carbide, nitride, sulfide, chloride,
//! carbonate, hydroxide and mixed oxides, wherever the data hold the product.
//!
//! Each proposal is balanced exactly and judged in every zone; the list is ordered by how near each comes to
//! its turn, in combined standard uncertainties.

use crate::activity::Charge;
use crate::compiled::Compiled;
use crate::fan::{Situation, ZoneGas};
use crate::judge::{Case, Ground};
use alloc::collections::BTreeSet;
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_gas::shift::Shift;
use leeway_line::model::{Change, Line, Wish};
use leeway_reactions::Equation;
use leeway_substances::{Book, Class, Element, Formula};

/// What a proposed change does.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Kind {
    /// An element or lower oxide takes up oxygen.
    Oxidises,
    /// An oxide loses oxygen to hydrogen or carbon monoxide.
    Reduces,
    /// A compound with nitrogen, carbon, sulfur, chlorine, carbon dioxide or water forms.
    Forms,
    /// The solid gives off a gas by itself.
    GivesOff(String),
}

/// A proposed change.
#[derive(Debug, Clone, PartialEq)]
pub struct Proposal {
    /// What it does.
    pub kind: Kind,
    /// What is usually wished of such a change: reduction and calcining are wanted, the rest is not.
    pub wish: Wish,
    /// Members of the charge it starts from.
    pub from: Vec<String>,
    /// Condensed product.
    pub product: String,
    /// Balanced equation.
    pub equation: Equation,
    /// Zone where it is nearest to its turn.
    pub nearest_zone: usize,
    /// dG there, kJ.
    pub dg_kj: f64,
    /// dG there in combined standard uncertainties.
    pub z: f64,
}

/// Gas taken up, gas given off, and what the pair does.
const GASES: [(&[&str], &[&str]); 17] = [
    (&["H2O"], &["H2"]),
    (&["CO2"], &["CO"]),
    (&["O2"], &[]),
    (&["N2"], &[]),
    (&["CO"], &["CO2"]),
    (&["CH4"], &["H2"]),
    (&["H2S"], &["H2"]),
    (&["SO2", "O2"], &[]),
    (&["SO2", "O2"], &["CO2"]),
    (&["HCl"], &["H2"]),
    (&["CO2"], &[]),
    (&["H2O"], &[]),
    (&["H2"], &["H2O"]),
    (&[], &["CO2"]),
    (&[], &["H2O"]),
    (&[], &["O2"]),
    (&[], &[]),
];

/// Most proposals that are handed on.
const MOST: usize = 40;

/// Proposes changes that the line does not watch yet.
#[must_use]
pub fn propose(book: &Book, shift: &Shift, line: &Line) -> Vec<Proposal> {
    let charge = Charge::new(&line.charge);
    let ground = Ground { book, shift, charge: &charge, k: line.coverage_factor };
    let gases: Vec<Option<(ZoneGas, crate::fan::Fan)>> = line
        .zones
        .iter()
        .map(|zone| {
            let gas = ZoneGas::new(book, zone).ok()?;
            let at = Situation { t_k: zone.temperature.value, p_bar: zone.pressure.value, values: gas.intake.values() };
            let fan = gas.fan(book, shift, at, zone.temperature.u, zone.pressure.u, false).ok()?;
            Some((gas, fan))
        })
        .collect();
    let shown: BTreeSet<&str> = gases
        .iter()
        .flatten()
        .flat_map(|(gas, fan)| gas.species.iter().zip(&fan.read).filter(|(_, p)| **p > 0.0).map(|(s, _)| s.as_str()))
        .collect();
    let watched: Vec<Compiled> = line.changes.iter().filter_map(|c| Compiled::new(book, c).ok()).collect();
    let members: Vec<&str> = {
        let mut seen = BTreeSet::new();
        charge.formulas().filter(|f| book.find(f).is_some() && seen.insert(*f)).collect()
    };
    let mut starts: Vec<Vec<&str>> = members.iter().map(|m| alloc::vec![*m]).collect();
    for (i, a) in members.iter().enumerate() {
        for b in &members[i + 1..] {
            starts.push(alloc::vec![*a, *b]);
        }
    }
    let products: Vec<&str> = book
        .substances
        .iter()
        .enumerate()
        .filter(|(i, s)| {
            s.records.iter().any(|r| r.class == Class::Condensed) && book.default_class(*i) == Class::Condensed
        })
        .map(|(_, s)| s.formula.text())
        .collect();
    let carbon = Element::from_symbol("C");
    let mut list: Vec<Proposal> = Vec::new();
    for start in &starts {
        let own: BTreeSet<Element> = start
            .iter()
            .filter_map(|f| book.find(f))
            .flat_map(|i| book.substances[i].formula.counts().keys().copied())
            .collect();
        for (taken, given) in GASES {
            // Two members join by themselves, by losing carbon dioxide, or by taking up oxygen, sulfur or chlorine.
            let alone = taken.is_empty() && given.is_empty();
            let joins = !matches!((taken, given), (["N2" | "CO" | "CH4"], _) | ([], ["H2O" | "O2"]));
            if (start.len() == 1 && alone) || (start.len() > 1 && !joins) {
                continue;
            }
            if !taken.iter().chain(given).all(|g| shown.contains(g)) {
                continue;
            }
            let brought: BTreeSet<Element> = taken
                .iter()
                .chain(given)
                .filter_map(|g| Formula::parse(g).ok())
                .flat_map(|f| f.counts().keys().copied().collect::<Vec<_>>())
                .collect();
            for product in &products {
                if start.contains(product) {
                    continue;
                }
                let Some(at) = book.find(product) else { continue };
                let elements: BTreeSet<Element> = book.substances[at].formula.counts().keys().copied().collect();
                let fits = elements.iter().all(|e| own.contains(e) || brought.contains(e))
                    && own.iter().all(|e| elements.contains(e) || brought.contains(e))
                    && start.iter().all(|f| shares_metal(book, f, &elements, &brought));
                if !fits {
                    continue;
                }
                let left = start.iter().copied().chain(taken.iter().copied());
                let right = core::iter::once(*product).chain(given.iter().copied());
                let text = left.collect::<Vec<_>>().join(" + ") + " = " + &right.collect::<Vec<_>>().join(" + ");
                let Ok(equation) = Equation::parse(&text) else { continue };
                let kind = match (taken, given) {
                    ([], [g, ..]) => Kind::GivesOff((*g).to_string()),
                    (["H2"], ["H2O"]) => Kind::Reduces,
                    (["CO"], ["CO2"]) if !carbon.is_some_and(|c| elements.contains(&c)) => Kind::Reduces,
                    (["H2O"], ["H2"]) | (["CO2"], ["CO"]) | (["O2"], []) => Kind::Oxidises,
                    _ => Kind::Forms,
                };
                let wanted = kind == Kind::Reduces || (start.len() == 1 && matches!(kind, Kind::GivesOff(_)));
                let (wish, sign) = if wanted { (Wish::Want, -1.0) } else { (Wish::Avoid, 1.0) };
                let Ok(compiled) = Compiled::from_equation(book, &equation, sign) else { continue };
                if watched.iter().any(|w| w.forms.iter().any(|(_, r)| r.same_as(compiled.written()))) {
                    continue;
                }
                if list.iter().any(|p| {
                    Compiled::from_equation(book, &p.equation, 1.0)
                        .is_ok_and(|c| c.written().same_as(compiled.written()))
                }) {
                    continue;
                }
                let Some((nearest_zone, dg_kj, z)) = nearest(&ground, line, &gases, &compiled, &text, wish) else {
                    continue;
                };
                list.push(Proposal {
                    kind,
                    wish,
                    from: start.iter().map(ToString::to_string).collect(),
                    product: (*product).to_string(),
                    equation,
                    nearest_zone,
                    dg_kj,
                    z,
                });
            }
        }
    }
    list.sort_by(|a, b| a.z.abs().total_cmp(&b.z.abs()));
    list.truncate(MOST);
    list
}

/// Whether a member's own elements, those the gas does not bring, all go into the product.
fn shares_metal(book: &Book, formula: &str, elements: &BTreeSet<Element>, brought: &BTreeSet<Element>) -> bool {
    book.find(formula).is_some_and(|i| {
        let counts = book.substances[i].formula.counts();
        let metals: Vec<_> = counts.keys().filter(|e| !brought.contains(e)).collect();
        !metals.is_empty() && metals.iter().all(|e| elements.contains(e))
    })
}

fn nearest(
    ground: &Ground,
    line: &Line,
    gases: &[Option<(ZoneGas, crate::fan::Fan)>],
    compiled: &Compiled,
    text: &str,
    wish: Wish,
) -> Option<(usize, f64, f64)> {
    let change = Change {
        name: String::new(),
        equation: text.to_string(),
        wish,
        zones: None,
        activities: Vec::new(),
        acts_above: None,
        allowed: None,
        tolerated: false,
    };
    let mut best: Option<(usize, f64, f64)> = None;
    for (i, (zone, gas)) in line.zones.iter().zip(gases).enumerate() {
        let Some((gas, fan)) = gas else { continue };
        let case = Case { ground: *ground, zone, change: &change, compiled, gas };
        let Ok(outcome) = case.outcome(fan) else { continue };
        let z = outcome.leeway_u().map_or(f64::MAX, |z| outcome.sign * z);
        if best.is_none_or(|(_, _, b)| z.abs() < b.abs()) {
            best = Some((i, outcome.read.dg_kj, z));
        }
    }
    best
}
