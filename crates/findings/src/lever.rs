//! Levers: the value of one reading at which dG is zero, all else held.
//!
//! Temperature: over the range of the data, through phase changes, at the gas as read. Pressure, dew point
//! and each analysed gas: through the gas intake, so that what chemistry and the instruments tie stays tied
//! (dry shares thin out with water, the balance gas gives way). Activity: in closed form.

use crate::fan::{Situation, State};
use crate::judge::{Case, Ground, Outcome, Supply, Why};
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_gas::humidity;
use leeway_quantity::constants::{GAS_CONSTANT, KJ_PER_J};
use leeway_quantity::math::{exp, exp10, ln, log10};
use leeway_quantity::{Kind, Unit};
use leeway_reactions::{Crossing, crossings};

/// What the engineer can turn.
#[derive(Debug, Clone, PartialEq)]
pub enum What {
    /// Temperature of the zone.
    Temperature,
    /// Pressure of the zone.
    Pressure,
    /// Dew or frost point: index of the gas input.
    DewPoint(usize),
    /// An analysed gas: index of the gas input, and its formula.
    Gas(usize, String),
    /// Activity of a substance of the charge: place in the bound activities, and its formula.
    Activity(usize, String),
    /// Rate of cooling or heating.
    Rate,
}

/// Which way a lever may be turned when a remedy is proposed.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Allowed {
    /// To higher values.
    pub up: bool,
    /// To lower values.
    pub down: bool,
}

/// A lever of one finding.
#[derive(Debug, Clone, PartialEq)]
pub struct Lever {
    /// Which.
    pub what: What,
    /// Unit of the figures.
    pub unit: Unit,
    /// Reading, in `unit`.
    pub reading: f64,
    /// Standard uncertainty of the reading itself, in `unit`.
    pub u_reading: f64,
    /// Turning points, in `unit`, ascending.
    pub turning: Vec<f64>,
    /// Signed distance to the nearest, in `unit`; positive on side.
    pub leeway: Option<f64>,
    /// Range searched, in `unit`.
    pub searched: (f64, f64),
    /// Directions in which it may be proposed.
    pub allowed: Allowed,
}

/// A gas lever of a zone swept once: its values and the gas at each.
#[derive(Debug, Clone, PartialEq)]
pub struct Sweep {
    /// Which lever.
    pub what: What,
    /// Values, ascending, internal unit.
    pub values: Vec<f64>,
    /// Logarithms of the partial pressures at each value: a change costs a few products then.
    logs: Vec<Option<State>>,
}

/// Lowest and highest pressure searched, bar: vacuum furnaces to pressure vessels.
const PRESSURE_RANGE: (f64, f64) = (1e-7, 100.0);
/// Smallest share searched.
const SMALLEST_SHARE: f64 = 1e-10;

/// Gases that are never proposed to be raised: they burn, poison, corrode, oxidise or wet. Everything that
/// is not named inert counts as one of them.
const INERT: [&str; 3] = ["N2", "Ar", "He"];

impl What {
    /// Directions in which a change of this lever is ever proposed. Admitting air or steam, raising
    /// hydrogen, or another gas that harms, is not; nor is the pressure of a shell or the alloy itself.
    #[must_use]
    pub fn allowed(&self) -> Allowed {
        match self {
            What::Temperature => Allowed { up: true, down: true },
            What::DewPoint(_) => Allowed { up: false, down: true },
            What::Gas(_, f) => Allowed { up: INERT.contains(&f.as_str()), down: !INERT.contains(&f.as_str()) },
            What::Pressure | What::Activity(..) => Allowed { up: false, down: false },
            What::Rate => Allowed { up: true, down: false },
        }
    }

    /// Name in the machine's answers.
    #[must_use]
    pub fn name(&self) -> String {
        match self {
            What::Temperature => "temperature".to_string(),
            What::Pressure => "pressure".to_string(),
            What::DewPoint(_) => "dew_point".to_string(),
            What::Gas(_, f) => f.clone(),
            What::Activity(_, f) => alloc::format!("activity {f}"),
            What::Rate => "rate".to_string(),
        }
    }

    /// The situation with this lever at a value, internal unit.
    #[must_use]
    pub fn apply(&self, at: &Situation, value: f64) -> Situation {
        let mut there = at.clone();
        match self {
            What::Temperature => there.t_k = value,
            What::Pressure => there.p_bar = value,
            What::DewPoint(i) | What::Gas(i, _) => there.values[*i] = value,
            What::Activity(..) | What::Rate => {}
        }
        there
    }
}

#[expect(clippy::cast_precision_loss, reason = "small counts")]
fn log_steps(from: f64, to: f64, per_decade: usize) -> Vec<f64> {
    let (a, b) = (log10(from), log10(to));
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "at most a hundred")]
    let n = (((b - a) * per_decade as f64) as usize).max(2);
    let mut v: Vec<f64> = (0..=n).map(|i| exp10(a + (b - a) * i as f64 / n as f64)).collect();
    v[0] = from;
    v[n] = to;
    v
}

/// Sweeps every gas lever of a zone.
#[must_use]
pub fn sweeps(ground: &Ground, gas: &crate::fan::ZoneGas, at: &Situation) -> Vec<Sweep> {
    let mut list: Vec<(What, Vec<f64>)> = Vec::new();
    let base = gas.read(ground.book, ground.shift, at).ok();
    let water = gas.species.iter().position(|s| s == "H2O");
    let water_share = base
        .as_ref()
        .zip(water)
        .map_or(0.0, |((state, _), i)| if state[i].is_finite() { state[i] / at.p_bar } else { 0.0 });
    for (i, input) in gas.intake.inputs.iter().enumerate() {
        let Some(lever) = &input.lever else { continue };
        if lever == "dew_point" {
            let steps: Vec<f64> = (0..=50u8).map(|n| humidity::LOWEST_K + 4.0 * f64::from(n)).collect();
            list.push((What::DewPoint(i), steps));
        } else if let Some(ceiling) = gas.intake.ceiling(i, &at.values, water_share, at.p_bar) {
            let smallest = SMALLEST_SHARE * if input.quantity.unit.kind() == Kind::Pressure { at.p_bar } else { 1.0 };
            if ceiling <= smallest * 10.0 {
                continue;
            }
            let mut steps = log_steps(smallest, ceiling, 4);
            // Where the balance gas runs out, its own share spans decades.
            steps.extend((1..=16u8).map(|n| ceiling * (1.0 - exp10(-0.5 * f64::from(n)))));
            steps.sort_by(f64::total_cmp);
            steps.dedup();
            list.push((What::Gas(i, lever.clone()), steps));
        }
    }
    list.push((What::Pressure, log_steps(PRESSURE_RANGE.0, PRESSURE_RANGE.1, 4)));
    list.into_iter()
        .map(|(what, values)| {
            let logs = values
                .iter()
                .map(|&v| {
                    gas.read(ground.book, ground.shift, &what.apply(at, v))
                        .ok()
                        .map(|(s, _)| s.into_iter().map(ln).collect())
                })
                .collect();
            Sweep { what, values, logs }
        })
        .collect()
}

impl Sweep {
    /// Crossings of dG minus `level` (kJ) along the lever, at the outcome's place.
    #[must_use]
    pub fn crossings(&self, case: &Case, outcome: &Outcome, at: &Situation, level_kj: f64) -> Vec<Crossing> {
        let reaction = case.reaction(&outcome.bound);
        let rt = GAS_CONSTANT * KJ_PER_J * outcome.place.t_k;
        let dg = |ln_q: f64| outcome.sum.dg_kj + rt * ln_q - level_kj;
        let bound = &outcome.bound;
        let values: Vec<f64> =
            self.logs.iter().map(|s| s.as_ref().map_or(f64::NAN, |s| dg(bound.ln_q_of_logs(reaction, s)))).collect();
        let f = |v: f64| {
            case.gas
                .read(case.ground.book, case.ground.shift, &self.what.apply(at, v))
                .map_or(f64::NAN, |(s, _)| dg(bound.ln_q(reaction, &s)))
        };
        crossings(&self.values, &values, f, None)
    }

    fn moves(&self, case: &Case, outcome: &Outcome) -> bool {
        let reaction = case.reaction(&outcome.bound);
        let mut first = None;
        self.logs.iter().flatten().any(|s| {
            let q = outcome.bound.ln_q_of_logs(reaction, s);
            if !q.is_finite() {
                return false;
            }
            let start = *first.get_or_insert(q);
            (q - start).abs() > 1e-9
        })
    }
}

/// Levers of a finding: those of its own gases and the temperature first.
#[must_use]
pub fn levers(case: &Case, outcome: &Outcome, sweeps: &[Sweep]) -> Vec<Lever> {
    let at = Situation { t_k: outcome.place.t_k, p_bar: case.zone.pressure.value, values: case.gas.intake.values() };
    let mut list = Vec::new();
    let reaction = case.reaction(&outcome.bound);
    let holds = |f: &str| reaction.used.iter().any(|u| u.formula == f);
    for sweep in sweeps {
        let (unit, reading, u) = match &sweep.what {
            What::DewPoint(i) | What::Gas(i, _) => {
                let q = &case.gas.intake.inputs[*i].quantity;
                (q.unit, q.given, q.u)
            }
            _ => (case.zone.pressure.unit, case.zone.pressure.given, case.zone.pressure.u),
        };
        // Water moves a change it takes no part in only by thinning the gas: true, and no use as a lever.
        let only_thins = matches!(sweep.what, What::DewPoint(_)) && !holds("H2O");
        if only_thins || !sweep.moves(case, outcome) {
            continue;
        }
        let turning: Vec<f64> =
            sweep.crossings(case, outcome, &at, 0.0).iter().map(|c| unit.from_internal(c.at)).collect();
        let ends = (sweep.values[0], sweep.values[sweep.values.len() - 1]);
        list.push(make(sweep.what.clone(), unit, reading, u, turning, ends, outcome));
    }
    // A gas of the equation moves it itself; another only by making room.
    let rank = |l: &Lever| match &l.what {
        What::DewPoint(_) => 0,
        What::Temperature => 1,
        What::Gas(_, f) if holds(f) => 2,
        What::Pressure => 3,
        What::Activity(..) => 4,
        _ => 5,
    };
    let unit = case.zone.temperature.unit;
    let turning =
        reaction.turning(case.ground.book, outcome.ln_q, 0.0).iter().map(|c| unit.from_internal(c.at)).collect();
    let reading = if outcome.place.why == Why::Zone {
        case.zone.temperature.given
    } else {
        unit.from_internal(outcome.place.t_k)
    };
    let range = reaction.range_k().unwrap_or((outcome.place.t_k, outcome.place.t_k));
    list.push(make(What::Temperature, unit, reading, outcome.place.u_t, turning, range, outcome));
    for (n, (i, taken)) in outcome.bound.activities.iter().enumerate() {
        if taken.from == crate::activity::From::Pure {
            continue;
        }
        let Supply::Fixed(ln_a) = outcome.bound.supply[*i] else { continue };
        let nu = reaction.used[*i].nu;
        let rt = GAS_CONSTANT * KJ_PER_J * outcome.place.t_k;
        let turn = exp(ln_a - outcome.read.dg_kj / (nu * rt));
        let turning = if turn <= 1.0 { alloc::vec![turn] } else { Vec::new() };
        let u = taken.value * taken.u_ln();
        list.push(make(
            What::Activity(n, taken.formula.clone()),
            Unit::Fraction,
            taken.value,
            u,
            turning,
            (0.0, 1.0),
            outcome,
        ));
    }
    list.sort_by_key(|l| (l.turning.is_empty(), rank(l)));
    list
}

fn make(what: What, unit: Unit, reading: f64, u: f64, turning: Vec<f64>, ends: (f64, f64), outcome: &Outcome) -> Lever {
    let side = if outcome.leeway_kj() >= 0.0 { 1.0 } else { -1.0 };
    let distance = turning.iter().map(|t| (t - reading).abs()).reduce(f64::min);
    let allowed = what.allowed();
    Lever {
        what,
        unit,
        reading,
        u_reading: u / unit.step(),
        turning,
        leeway: distance.map(|d| side * d),
        searched: (unit.from_internal(ends.0), unit.from_internal(ends.1)),
        allowed,
    }
}

impl Lever {
    /// The turning point nearest to the reading.
    #[must_use]
    pub fn nearest(&self) -> Option<f64> {
        self.turning.iter().copied().min_by(|a, b| (a - self.reading).abs().total_cmp(&(b - self.reading).abs()))
    }

    /// Whether the wish fails above the nearest turning point (else below it).
    #[must_use]
    pub fn fails_above(&self, on_side: bool) -> Option<bool> {
        self.nearest().map(|t| (self.reading > t) != on_side)
    }
}
