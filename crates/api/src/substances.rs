//! What the data hold: the list, and one substance with all its records and curves.

use crate::problem;
use crate::response::{PhaseRow, Problem, SetRow, Substance, SubstanceRow};
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_quantity::constants::KJ_PER_J;
use leeway_substances::{Book, Class, Element, LookupError, Phase};

/// Points of a curve.
const POINTS: u16 = 60;

/// Substances that fit a query: part of a formula or name, or element symbols (`Ca C O`), of which a
/// substance may hold no other. Everything for an empty query.
pub(crate) fn list(book: &Book, query: &str) -> Vec<SubstanceRow> {
    let query = query.trim();
    let symbols: Option<Vec<Element>> =
        query.split([' ', ',', '-']).filter(|w| !w.is_empty()).map(Element::from_symbol).collect();
    let only = symbols.filter(|s| s.len() > 1);
    let lower = query.to_lowercase();
    let mut rows: Vec<(u8, SubstanceRow)> = book
        .substances
        .iter()
        .filter_map(|s| {
            let formula = s.formula.text();
            let rank = if let Some(only) = &only {
                s.formula.counts().keys().all(|e| only.contains(e)).then_some(0)
            } else if query.is_empty() || formula == query {
                Some(0)
            } else if formula.starts_with(query) {
                Some(1)
            } else if s.name.to_lowercase().contains(&lower) {
                Some(2)
            } else if formula.to_lowercase().contains(&lower) {
                Some(3)
            } else {
                None
            }?;
            let phases = s
                .records
                .iter()
                .filter(|r| r.preferred)
                .flat_map(|r| r.phases.iter().map(|p| p.name.clone()))
                .collect();
            Some((
                rank,
                SubstanceRow {
                    formula: formula.to_string(),
                    name: s.name.clone(),
                    elements: s.formula.counts().keys().map(|e| e.symbol().to_string()).collect(),
                    phases,
                    sets: s.records.len(),
                    gas: s.records.iter().any(|r| r.class == Class::Gas),
                    condensed: s.records.iter().any(|r| r.class == Class::Condensed),
                },
            ))
        })
        .collect();
    rows.sort_by_key(|(rank, _)| *rank);
    rows.into_iter().map(|(_, row)| row).collect()
}

/// One substance with every record.
pub(crate) fn one(book: &Book, formula: &str) -> Result<Substance, Problem> {
    let formula = formula.trim();
    if formula.is_empty() {
        let message = String::from("found nothing, expected a formula, for example Cr2O3");
        return Err(problem::from_text(
            "data.substance",
            String::new(),
            String::from("substance"),
            message,
            Vec::new(),
        ));
    }
    let index = book.find(formula).ok_or_else(|| {
        let error = LookupError::NoSubstance { formula: formula.to_string() };
        problem::lookup(book, &error, formula.to_string(), String::from("substance"))
    })?;
    let s = &book.substances[index];
    let mut records: Vec<_> = s.records.iter().collect();
    records.sort_by_key(|r| (r.class != book.default_class(index), !r.preferred));
    Ok(Substance {
        formula: s.formula.text().to_string(),
        name: s.name.clone(),
        molar_mass_g: s.formula.molar_mass(),
        sets: records
            .into_iter()
            .map(|r| {
                let source = &book.sources[r.source];
                SetRow {
                    source: source.short.clone(),
                    cite: source.cite.clone(),
                    preferred: r.preferred,
                    why: r.why.clone(),
                    made: r.made.clone(),
                    gas: r.class == Class::Gas,
                    h298_kj: r.h298_kj,
                    u_h298_kj: r.u_h298_kj,
                    s298_j_per_k: r.s298_j_per_k,
                    u_s298_j_per_k: r.u_s298_j_per_k,
                    doubt: r.doubt.clone(),
                    phases: r.phases.iter().map(|p| phase(p, r.h298_kj)).collect(),
                }
            })
            .collect(),
    })
}

fn phase(phase: &Phase, h298_kj: f64) -> PhaseRow {
    let (low, high) = (phase.low_k(), phase.high_k());
    let t: Vec<f64> = (0..=POINTS).map(|i| low + (high - low) * f64::from(i) / f64::from(POINTS)).collect();
    let values: Vec<_> = t.iter().map(|&t| phase.values(t)).collect();
    PhaseRow {
        phase: phase.name.clone(),
        state: phase.state.letter().to_string(),
        from_k: low,
        to_k: high,
        metastable: phase.metastable,
        cp_j_per_k: values.iter().map(|v| v.cp_j_per_k).collect(),
        h_minus_h298_kj: values.iter().map(|v| v.h_j * KJ_PER_J - h298_kj).collect(),
        s_j_per_k: values.iter().map(|v| v.s_j_per_k).collect(),
        g_kj: values.iter().map(|v| v.g_j * KJ_PER_J).collect(),
        temperature_k: t,
    }
}
