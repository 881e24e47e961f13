//! What brings a finding back: the least change of a lever that may be turned, past all doubt.
//!
//! The doubt is taken anew at the new value, so that the finding really stands on side there. Levers that
//! could harm are never proposed (see [`crate::lever::What::allowed`]).

use crate::fan::Situation;
use crate::judge::{Case, Outcome, Standing, Why};
use crate::lever::{Sweep, What};
use alloc::vec::Vec;
use leeway_quantity::math::{ceil, exp10, floor, log10};
use leeway_quantity::{Kind, Quantity, Unit};

/// A change of one lever.
#[derive(Debug, Clone, PartialEq)]
pub struct Remedy {
    /// Which lever.
    pub what: What,
    /// Unit of the figures.
    pub unit: Unit,
    /// The reading.
    pub from: f64,
    /// Where it only just turns.
    pub just_turns: f64,
    /// Beyond doubt, rounded to the safe side.
    pub beyond_doubt: f64,
    /// Size of the change in usual steps of the lever: what the proposals are ordered by.
    pub steps: f64,
}

/// Size of a usual step of a lever in its internal unit, by which changes of different levers compare
/// (common practice, no source): 10 K of temperature, 3 K of dew point, a tenth of a gas or a rate.
fn usual_step(what: &What, from: f64) -> f64 {
    match what {
        What::Temperature => 10.0,
        What::DewPoint(_) => 3.0,
        _ => 0.1 * from.abs(),
    }
}

/// Rounds to the safe side: whole degrees, two digits of a share or a rate.
fn round_safe(value: f64, unit: Unit, up: bool) -> f64 {
    let step = match unit.kind() {
        Kind::Temperature => 1.0,
        _ if value > 0.0 => exp10(floor(log10(value)) - 1.0),
        _ => return value,
    };
    let n = if up { ceil(value / step - 1e-9) } else { floor(value / step + 1e-9) };
    // Dividing by a power of ten below one is exact where multiplying is not.
    if step < 1.0 { n / exp10(-log10(step)) } else { n * step }
}

/// Remedies of a finding that is off side or too close to call, least change first.
#[must_use]
pub fn remedies(case: &Case, outcome: &Outcome, sweeps: &[Sweep]) -> Vec<Remedy> {
    if !matches!(outcome.read.standing, Standing::OffSide | Standing::TooClose) || outcome.at_limit.is_some() {
        return Vec::new();
    }
    let at = at_reading(case, outcome);
    let mut list = Vec::new();
    for lever in &outcome.levers {
        let allowed = lever.what.allowed();
        let plain = outcome.place.why == Why::Zone;
        if !(allowed.up || allowed.down) || (lever.what == What::Temperature && !plain) {
            continue;
        }
        let from = match &lever.what {
            What::Temperature => at.t_k,
            What::DewPoint(i) | What::Gas(i, _) => at.values[*i],
            _ => continue,
        };
        let sweep = sweeps.iter().find(|s| s.what == lever.what);
        if let Some(remedy) = along(case, outcome, sweep, &lever.what, &at, from, lever.unit) {
            list.push(remedy);
        }
    }
    list.extend(faster(case, outcome));
    list.sort_by(|a, b| a.steps.total_cmp(&b.steps));
    list
}

/// Values of a lever at which the wish-signed dG equals `level` kJ.
fn at_level(case: &Case, outcome: &Outcome, sweep: Option<&Sweep>, level_kj: f64) -> Vec<f64> {
    let signed_level = outcome.sign * level_kj;
    match sweep {
        Some(sweep) => {
            sweep.crossings(case, outcome, &at_reading(case, outcome), signed_level).iter().map(|c| c.at).collect()
        }
        None => {
            let reaction = case.reaction(&outcome.bound);
            reaction.turning(case.ground.book, outcome.ln_q, signed_level).iter().map(|c| c.at).collect()
        }
    }
}

fn along(
    case: &Case,
    outcome: &Outcome,
    sweep: Option<&Sweep>,
    what: &What,
    at: &Situation,
    from: f64,
    unit: Unit,
) -> Option<Remedy> {
    let allowed = what.allowed();
    let reachable = |v: &f64| (*v > from && allowed.up) || (*v < from && allowed.down);
    let nearest = |list: Vec<f64>| {
        list.into_iter().filter(reachable).min_by(|a, b| (a - from).abs().total_cmp(&(b - from).abs()))
    };
    let off = outcome.leeway_kj() < 0.0;
    let just = if off { nearest(at_level(case, outcome, sweep, 0.0))? } else { from };
    let mut level = case.ground.k * outcome.read.doubt.u_kj * 1.000_001;
    for _ in 0..8 {
        let value = nearest(at_level(case, outcome, sweep, level))?;
        let up = value > from;
        let rounded = round_safe(unit.from_internal(value), unit, up);
        let internal = unit.to_internal(rounded);
        let there = case.with_situation(&what.apply(at, internal))?;
        if there.read.standing == Standing::OnSide {
            return Some(Remedy {
                what: what.clone(),
                unit,
                from: unit.from_internal(from),
                just_turns: unit.from_internal(just),
                beyond_doubt: rounded,
                steps: (internal - from).abs() / usual_step(what, from),
            });
        }
        level = raised(level, case, &there);
    }
    None
}

/// Cooling faster, where a time past the turn is allowed: the place judged moves up the course.
fn faster(case: &Case, outcome: &Outcome) -> Option<Remedy> {
    let Why::Allowed(seconds, rate, floor_k) = outcome.place.why else { return None };
    let q = case.zone.rate?;
    let hot = case.zone.temperature.value.max(case.zone.leaving.as_ref()?.value);
    let needed = |t: f64| q.unit.from_internal((t - floor_k) / seconds);
    let above = |level: f64| {
        at_level(case, outcome, None, level)
            .into_iter()
            .filter(|t| *t > outcome.place.t_k && *t <= hot)
            .min_by(f64::total_cmp)
    };
    let turn = if outcome.leeway_kj() < 0.0 { above(0.0)? } else { outcome.place.t_k };
    let mut level = case.ground.k * outcome.read.doubt.u_kj;
    for _ in 0..8 {
        let beyond_doubt = round_safe(needed(above(level)?), q.unit, true);
        let mut zone = case.zone.clone();
        let value = q.unit.to_internal(beyond_doubt);
        zone.rate = Some(Quantity { value, given: beyond_doubt, ..q });
        let there = Case { zone: &zone, ..*case }.with_situation(&at_reading(case, outcome))?;
        if there.read.standing == Standing::OnSide {
            return Some(Remedy {
                what: What::Rate,
                unit: q.unit,
                from: q.given,
                just_turns: if turn == outcome.place.t_k { q.given } else { needed(turn) },
                beyond_doubt,
                steps: (value - rate) / usual_step(&What::Rate, rate),
            });
        }
        level = raised(level, case, &there);
    }
    None
}

/// The next level to try where the doubt has grown on the way.
fn raised(level: f64, case: &Case, there: &Outcome) -> f64 {
    let needed = case.ground.k * there.read.doubt.u_kj;
    (level * 1.02).max(level + 1.02 * (needed - there.leeway_kj()).max(0.0))
}

/// The place judged, as the instruments show it.
fn at_reading(case: &Case, outcome: &Outcome) -> Situation {
    Situation { t_k: outcome.place.t_k, p_bar: case.zone.pressure.value, values: case.gas.intake.values() }
}
