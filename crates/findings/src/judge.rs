//! The judgement: dG at the place where a change is judged, its doubt, and how it stands.
//!
//! dG = dG0(T) + RT ln Q. Doubt by the first order of JCGM 100:2008 (5.1.2), each contributor moved by its
//! standard uncertainty to both sides; where the second or third order would show (beyond 3 % of the
//! combined figure) the finding says so. Readings are independent of each other; H298 and S298 of a record
//! are shared by all its places in an equation.

use crate::activity::{self, Charge};
use crate::compiled::{Carrier, ChangeProblem, Compiled};
use crate::fan::{Fan, Moved, STEPS, Situation, State, ZoneGas};
use crate::lever::{self, Lever};
use crate::remedy::{self, Remedy};
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_gas::intake::GasProblem;
use leeway_gas::shift::Shift;
use leeway_line::model::{Change, Line, Zone};
use leeway_quantity::constants::{GAS_CONSTANT, KJ_PER_J};
use leeway_quantity::math::{ln, normal_tail, sqrt};
use leeway_reactions::{Reaction, Sum};
use leeway_substances::{Book, Chosen, Class, LookupError};

/// How a finding stands.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Standing {
    /// What is wished for holds.
    OnSide,
    /// It does not hold.
    OffSide,
    /// The doubt spans the turning point.
    TooClose,
    /// The driving force is there, the rate is known not to be.
    OnPaper,
    /// The data or readings do not reach here.
    NoData,
}

/// Why a finding has no figure.
#[derive(Debug, Clone, PartialEq)]
pub enum NoData {
    /// The change itself cannot be read: see the change.
    Change,
    /// The zone's gas cannot be taken: see the zone.
    Gas,
    /// Gases the equation holds and the reading does not show.
    NotRead(Vec<String>),
    /// A gas that reads exactly zero.
    ReadsZero(String),
    /// A member of the charge without an activity.
    Activity(activity::Missing),
    /// Outside the data.
    Data(LookupError),
}

/// Why a course is judged where it is.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Why {
    /// A zone of one temperature.
    Zone,
    /// The worst place between the two temperatures, K.
    Worst(f64, f64),
    /// The place where the allowed time is left before the change is too slow: time s, rate K/s, K.
    Allowed(f64, f64, f64),
    /// The whole course is below the temperature at which the change acts: judged at its hot end.
    TooCold,
}

/// Where a finding is judged.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Place {
    /// Temperature, K.
    pub t_k: f64,
    /// Why there.
    pub why: Why,
    /// Standard uncertainty of the temperature there from the thermometer, K.
    pub u_t: f64,
    /// The same from the cooling or heating rate, K.
    pub u_rate: f64,
    /// The same from the temperature at which the change begins to act, K.
    pub u_acts: f64,
}

/// What a share of doubt comes from.
#[derive(Debug, Clone, PartialEq)]
pub enum Source {
    /// A gas input, by index.
    Input(usize),
    /// The zone's temperature.
    Temperature,
    /// The zone's pressure.
    Pressure,
    /// The rate of cooling or heating.
    Rate,
    /// The temperature at which the change begins to act.
    ActsAbove,
    /// Activity of a substance.
    Activity(String),
    /// Standard values of a substance.
    Data(String),
}

/// The combined doubt of dG.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Doubt {
    /// Combined standard uncertainty, kJ.
    pub u_kj: f64,
    /// Contributions with sign, kJ, in the order of the inputs.
    pub shares: Vec<(Source, f64)>,
    /// Higher orders would show.
    pub nonlinear: bool,
}

/// What a species of the equation is fed from.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Supply {
    /// A gas of the zone, by index into its species.
    Gas(usize),
    /// A fixed ln a.
    Fixed(f64),
}

/// A form of a change bound to a zone's gas and to the charge.
#[derive(Debug, Clone, PartialEq)]
pub struct Bound {
    /// Index of the form.
    pub form: usize,
    /// What feeds each species.
    pub supply: Vec<Supply>,
    /// Activities of condensed species and given pressures, with their place in `used`.
    pub activities: Vec<(usize, activity::Taken)>,
}

impl Bound {
    /// ln Q in a gas; NaN where the gas lacks a species.
    #[must_use]
    pub fn ln_q(&self, reaction: &Reaction, state: &[f64]) -> f64 {
        self.sum(reaction, |i| ln(state[i]))
    }

    /// The same from the logarithms of the partial pressures.
    #[must_use]
    pub fn ln_q_of_logs(&self, reaction: &Reaction, logs: &[f64]) -> f64 {
        self.sum(reaction, |i| logs[i])
    }

    fn sum(&self, reaction: &Reaction, log: impl Fn(usize) -> f64) -> f64 {
        self.supply
            .iter()
            .zip(&reaction.used)
            .map(|(s, u)| {
                u.nu * match *s {
                    Supply::Gas(i) => log(i),
                    Supply::Fixed(a) => a,
                }
            })
            .sum()
    }
}

/// dG in one state of the gas, with its doubt.
#[derive(Debug, Clone, PartialEq)]
pub struct InGas {
    /// dG, kJ.
    pub dg_kj: f64,
    /// Doubt.
    pub doubt: Doubt,
    /// How it stands.
    pub standing: Standing,
}

/// A point of a course.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct CoursePoint {
    /// Temperature, K.
    pub t_k: f64,
    /// dG, kJ.
    pub dg_kj: f64,
    /// Standing, with the doubt of the place where the course is judged.
    pub standing: Standing,
}

/// A finding with its figures.
#[derive(Debug, Clone, PartialEq)]
pub struct Outcome {
    /// Where it was judged.
    pub place: Place,
    /// The form of the change used, and what feeds it.
    pub bound: Bound,
    /// What carries the oxygen.
    pub carrier: Carrier,
    /// Phases picked.
    pub chosen: Vec<Chosen>,
    /// Standard values there.
    pub sum: Sum,
    /// ln Q.
    pub ln_q: f64,
    /// In the gas as read.
    pub read: InGas,
    /// +1 where dG above zero is on side, -1 otherwise.
    pub sign: f64,
    /// In the gas shifted, with its partial pressures and what reacted.
    pub shifted: Option<(InGas, State, &'static str)>,
    /// A species stands at its detection limit.
    pub at_limit: Option<String>,
    /// Levers.
    pub levers: Vec<Lever>,
    /// What brings it back.
    pub remedies: Vec<Remedy>,
    /// The course, in order of travel.
    pub course: Vec<CoursePoint>,
    /// Seconds past the turn while the change acts, on a course with a rate.
    pub seconds_past: Option<f64>,
    /// The course was cut to the data.
    pub cut: bool,
}

impl Outcome {
    /// dG with the sign of the wish, kJ: positive on side.
    #[must_use]
    pub fn leeway_kj(&self) -> f64 {
        self.sign * self.read.dg_kj
    }

    /// The same in combined standard uncertainties; `None` where there is no doubt at all.
    #[must_use]
    pub fn leeway_u(&self) -> Option<f64> {
        (self.read.doubt.u_kj > 0.0).then(|| self.leeway_kj() / self.read.doubt.u_kj)
    }

    /// Chance that the sign of dG is wrong.
    #[must_use]
    pub fn chance_wrong(&self) -> f64 {
        self.leeway_u().map_or(0.0, |z| normal_tail(z.abs()))
    }
}

/// One zone, one change.
#[derive(Debug, Clone, PartialEq)]
pub struct Finding {
    /// Index of the zone.
    pub zone: usize,
    /// Index of the change.
    pub change: usize,
    /// How it stands.
    pub standing: Standing,
    /// Figures, or why there are none.
    pub outcome: Result<Outcome, NoData>,
}

/// A line assessed.
#[derive(Debug, Clone, PartialEq)]
pub struct Assessed {
    /// Each zone's gas, or why it cannot be taken.
    pub gases: Vec<Result<(ZoneGas, Fan), GasProblem>>,
    /// Each change, or why it cannot be read.
    pub changes: Vec<Result<Compiled, ChangeProblem>>,
    /// Findings, change by change.
    pub findings: Vec<Finding>,
}

/// What every judgement needs and none changes.
#[derive(Debug, Clone, Copy)]
pub struct Ground<'a> {
    /// The data.
    pub book: &'a Book,
    /// The shift's reactions.
    pub shift: &'a Shift,
    /// The charge.
    pub charge: &'a Charge,
    /// Coverage factor of the standing.
    pub k: f64,
}

/// Assesses every change in every zone it is watched in.
#[must_use]
pub fn assess(book: &Book, shift: &Shift, line: &Line) -> Assessed {
    let charge = Charge::new(&line.charge);
    let ground = Ground { book, shift, charge: &charge, k: line.coverage_factor };
    let gases: Vec<Result<(ZoneGas, Fan), GasProblem>> = line
        .zones
        .iter()
        .map(|zone| {
            let gas = ZoneGas::new(book, zone)?;
            let fan = fan_at(&ground, &gas, zone, zone.temperature.value, zone.temperature.u)?;
            Ok((gas, fan))
        })
        .collect();
    let changes: Vec<Result<Compiled, ChangeProblem>> = line.changes.iter().map(|c| Compiled::new(book, c)).collect();
    let sweeps: Vec<Vec<lever::Sweep>> = gases
        .iter()
        .zip(&line.zones)
        .map(|(gas, _)| gas.as_ref().map_or_else(|_| Vec::new(), |(gas, fan)| lever::sweeps(&ground, gas, &fan.at)))
        .collect();
    let mut findings = Vec::new();
    for (ci, (change, compiled)) in line.changes.iter().zip(&changes).enumerate() {
        for (zi, zone) in line.zones.iter().enumerate() {
            if change.zones.as_ref().is_some_and(|z| !z.contains(&zi)) {
                continue;
            }
            let outcome = match (compiled, &gases[zi]) {
                (Err(_), _) => Err(NoData::Change),
                (_, Err(_)) => Err(NoData::Gas),
                (Ok(compiled), Ok((gas, fan))) => {
                    let case = Case { ground, zone, change, compiled, gas };
                    case.outcome(fan).map(|mut outcome| {
                        outcome.levers = lever::levers(&case, &outcome, &sweeps[zi]);
                        outcome.remedies = remedy::remedies(&case, &outcome, &sweeps[zi]);
                        outcome
                    })
                }
            };
            let standing = outcome.as_ref().map_or(Standing::NoData, |o| o.read.standing);
            findings.push(Finding { zone: zi, change: ci, standing, outcome });
        }
    }
    Assessed { gases, changes, findings }
}

fn fan_at(ground: &Ground, gas: &ZoneGas, zone: &Zone, t_k: f64, u_t: f64) -> Result<Fan, GasProblem> {
    let at = Situation { t_k, p_bar: zone.pressure.value, values: gas.intake.values() };
    gas.fan(ground.book, ground.shift, at, u_t, zone.pressure.u, true)
}

/// One change in one zone, with all it needs.
#[derive(Debug, Clone, Copy)]
pub struct Case<'a> {
    /// Data, charge and coverage factor.
    pub ground: Ground<'a>,
    /// The zone.
    pub zone: &'a Zone,
    /// The change.
    pub change: &'a Change,
    /// The change joined to the data.
    pub compiled: &'a Compiled,
    /// The zone's gas.
    pub gas: &'a ZoneGas,
}

/// Steps of a course as drawn and searched.
const COURSE_STEPS: usize = 48;

impl Case<'_> {
    fn acts_above_k(&self) -> Option<f64> {
        self.change.acts_above.as_ref().map(|a| a.temperature.value)
    }

    /// The form whose gases a state shows, with the activities of the rest.
    ///
    /// # Errors
    /// [`NoData`] where no form can be fed.
    pub fn bind(&self, state: &[f64]) -> Result<Bound, NoData> {
        let mut problem = None;
        for (form, (_, reaction)) in self.compiled.forms.iter().enumerate() {
            match self.bind_form(form, reaction, state) {
                Ok(bound) => return Ok(bound),
                Err(e) => problem = problem.or(Some(e)),
            }
        }
        Err(problem.unwrap_or(NoData::Change))
    }

    fn bind_form(&self, form: usize, reaction: &Reaction, state: &[f64]) -> Result<Bound, NoData> {
        let mut supply = Vec::with_capacity(reaction.used.len());
        let mut activities = Vec::new();
        let mut missing = Vec::new();
        let charge = self.ground.charge;
        for (i, used) in reaction.used.iter().enumerate() {
            if used.class == Class::Condensed {
                let mut taken = charge.of(&used.formula, &self.change.activities).map_err(NoData::Activity)?;
                if taken.value <= 0.0 {
                    return Err(NoData::ReadsZero(used.formula.clone()));
                }
                if taken.from == activity::From::Pure {
                    taken.source = None;
                }
                supply.push(Supply::Fixed(ln(taken.value)));
                activities.push((i, taken));
                continue;
            }
            if let Some((_, given)) = self.change.activities.iter().find(|(f, _)| *f == used.formula) {
                if given.value <= 0.0 {
                    return Err(NoData::ReadsZero(used.formula.clone()));
                }
                supply.push(Supply::Fixed(ln(given.value)));
                activities.push((
                    i,
                    activity::Taken {
                        formula: used.formula.clone(),
                        value: given.value,
                        ln_half: ln(given.doubt_factor.unwrap_or(1.0)),
                        from: activity::From::GivenPressure,
                        mole_fraction: None,
                        source: given.source.clone(),
                    },
                ));
                continue;
            }
            match self.gas.species.iter().position(|s| *s == used.formula) {
                Some(at) if state[at].is_finite() => {
                    if state[at] <= 0.0 {
                        return Err(NoData::ReadsZero(used.formula.clone()));
                    }
                    supply.push(Supply::Gas(at));
                }
                _ => missing.push(used.formula.clone()),
            }
        }
        if missing.is_empty() { Ok(Bound { form, supply, activities }) } else { Err(NoData::NotRead(missing)) }
    }

    /// The reaction a bound form evaluates.
    #[must_use]
    pub fn reaction(&self, bound: &Bound) -> &Reaction {
        &self.compiled.forms[bound.form].1
    }

    /// dG at a temperature for a fixed ln Q, kJ; NaN outside the data.
    #[must_use]
    pub fn dg_kj(&self, reaction: &Reaction, t_k: f64, ln_q: f64) -> f64 {
        reaction.at(self.ground.book, t_k).map_or(f64::NAN, |s| s.dg_kj + GAS_CONSTANT * KJ_PER_J * t_k * ln_q)
    }

    /// Where the change is judged in the zone, with the course cut to the data where it must be.
    fn place(&self, reaction: &Reaction, ln_q: f64, t_k: f64) -> (Place, bool) {
        let zone = self.zone;
        let plain = Place { t_k, why: Why::Zone, u_t: zone.temperature.u, u_rate: 0.0, u_acts: 0.0 };
        let Some(leaving) = zone.leaving.as_ref() else { return (plain, false) };
        let (mut cold, mut hot) =
            (zone.temperature.value.min(leaving.value), zone.temperature.value.max(leaving.value));
        let mut cut = false;
        if let Some((low, high)) = reaction.range_k() {
            let (from, to) = (low - leeway_substances::MARGIN_BELOW_K, high + leeway_substances::MARGIN_ABOVE_K);
            cut = cold < from || hot > to;
            (cold, hot) = (cold.max(from).min(hot.min(to)), hot.min(to));
        }
        let u_at =
            |t: f64| if (t - leaving.value).abs() < 1e-9 && leaving.u > 0.0 { leaving.u } else { zone.temperature.u };
        let acts = self.change.acts_above.as_ref();
        if acts.is_some_and(|a| a.temperature.value >= hot) {
            return (Place { t_k: hot, why: Why::TooCold, u_t: u_at(hot), u_rate: 0.0, u_acts: 0.0 }, cut);
        }
        if let (Some(acts), Some(allowed), Some(rate)) = (acts, &self.change.allowed, &zone.rate) {
            let floor = acts.temperature.value.max(cold);
            let t_k = (floor + rate.value * allowed.value).min(hot);
            let at_hot_end = t_k >= hot;
            return (
                Place {
                    t_k,
                    why: Why::Allowed(allowed.value, rate.value, floor),
                    u_t: u_at(t_k),
                    u_rate: if at_hot_end { 0.0 } else { rate.u * allowed.value },
                    u_acts: if at_hot_end || floor > acts.temperature.value { 0.0 } else { acts.temperature.u },
                },
                cut,
            );
        }
        let floor = acts.map_or(cold, |a| a.temperature.value.max(cold));
        let worst = |t: f64| self.compiled.sign * self.dg_kj(reaction, t, ln_q);
        let nodes: Vec<f64> = (0..=COURSE_STEPS).map(|i| floor + (hot - floor) * fraction(i)).collect();
        let mut best = (floor, worst(floor));
        let mut at = 0;
        for (i, &t) in nodes.iter().enumerate() {
            let w = worst(t);
            if w < best.1 || best.1.is_nan() {
                best = (t, w);
                at = i;
            }
        }
        if at > 0 && at < COURSE_STEPS {
            let (mut a, mut b) = (nodes[at - 1], nodes[at + 1]);
            for _ in 0..60 {
                let (m, n) = (a + (b - a) / 3.0, b - (b - a) / 3.0);
                if worst(m) < worst(n) { b = n } else { a = m }
            }
            best.0 = 0.5 * (a + b);
        }
        let from_acts = acts.is_some_and(|a| (best.0 - a.temperature.value).abs() < 1e-6);
        let u_acts = if from_acts { acts.map_or(0.0, |a| a.temperature.u) } else { 0.0 };
        (Place { t_k: best.0, why: Why::Worst(floor, hot), u_t: u_at(best.0), u_rate: 0.0, u_acts }, cut)
    }

    /// Figures of the finding, without levers and remedies.
    pub(crate) fn outcome(&self, zone_fan: &Fan) -> Result<Outcome, NoData> {
        let bound = self.bind(&zone_fan.read)?;
        let reaction = self.reaction(&bound);
        let ln_q = bound.ln_q(reaction, &zone_fan.read);
        let (place, cut) = self.place(reaction, ln_q, zone_fan.at.t_k);
        let fan_there;
        let fan = if place.t_k == zone_fan.at.t_k && place.why == Why::Zone {
            zone_fan
        } else {
            // The gas as read is the zone's; the shift belongs to the temperature of the place.
            let at = Situation { t_k: place.t_k, ..zone_fan.at.clone() };
            fan_there = self
                .gas
                .fan(self.ground.book, self.ground.shift, at, place.u_t, self.zone.pressure.u, true)
                .map_err(|_| NoData::Gas)?;
            &fan_there
        };
        let ln_q = bound.ln_q(reaction, &fan.read);
        let chosen = reaction.choose(self.ground.book, place.t_k).map_err(NoData::Data)?;
        let sum = reaction.sum(place.t_k, &chosen);
        let at_limit = bound.supply.iter().find_map(|s| match s {
            Supply::Gas(i) if *i < self.gas.intake.upper_bound.len() && self.gas.intake.upper_bound[*i] => {
                Some(self.gas.species[*i].clone())
            }
            _ => None,
        });
        let read = self.in_gas(&bound, &place, &chosen, &fan.read, |b| &b.read, fan);
        let shifted = fan.shifted.as_ref().and_then(|(state, how)| {
            let bound = self.bind(state).ok()?;
            let reaction = self.reaction(&bound);
            let chosen = reaction.choose(self.ground.book, place.t_k).ok()?;
            let gas = self.in_gas(&bound, &place, &chosen, state, |b| &b.shifted, fan);
            Some((gas, state.clone(), *how))
        });
        let mut outcome = Outcome {
            carrier: self.compiled.forms[bound.form].0,
            bound,
            place,
            chosen,
            sum,
            ln_q,
            sign: self.compiled.sign,
            read,
            shifted,
            at_limit,
            levers: Vec::new(),
            remedies: Vec::new(),
            course: Vec::new(),
            seconds_past: None,
            cut,
        };
        if self.zone.leaving.is_some() {
            self.follow_course(&mut outcome);
        }
        Ok(outcome)
    }

    /// dG and its doubt at a place in one state of the gas.
    fn in_gas(
        &self,
        bound: &Bound,
        place: &Place,
        chosen: &[Chosen],
        state: &State,
        branch_states: impl Fn(&crate::fan::Branch) -> &[Option<State>; 4],
        fan: &Fan,
    ) -> InGas {
        let reaction = self.reaction(bound);
        let rt = |t: f64| GAS_CONSTANT * KJ_PER_J * t;
        let t = place.t_k;
        let ln_q = bound.ln_q(reaction, state);
        let dg = reaction.sum(t, chosen).dg_kj + rt(t) * ln_q;
        let mut shares: Vec<(Source, f64)> = Vec::new();
        let mut second_order = 0.0;
        let mut bent = false;
        let mut add = |source: Source, f: &dyn Fn(usize) -> f64| {
            let values = [f(0), f(1), f(2), f(3)];
            if values.iter().all(|v| v.is_finite()) {
                let first = 0.5 * (values[1] - values[0]);
                let wide = 0.5 * (values[3] - values[2]) / STEPS[3];
                let curve = 0.5 * (values[1] + values[0]) - dg;
                second_order += 2.0 * curve * curve;
                shares.push((source, first));
                Some((first, wide))
            } else {
                bent = true;
                let usable = values.iter().zip(STEPS).find(|(v, _)| v.is_finite());
                let first = usable.map_or(0.0, |(v, step)| (v - dg) / step);
                shares.push((source, first));
                None
            }
        };
        let mut cubic: Vec<(f64, f64)> = Vec::new();
        let at_temperature = |dt: f64, state: &State| self.dg_kj(reaction, t + dt, bound.ln_q(reaction, state));
        let thermal = fan.branches.iter().find(|b| b.moved == Moved::Temperature);
        for (source, u) in
            [(Source::Temperature, place.u_t), (Source::Rate, place.u_rate), (Source::ActsAbove, place.u_acts)]
        {
            if u > 0.0 {
                // The gas moves with the temperature where it is shifted, or a cell reads it in place.
                let by = |i: usize| {
                    let moved = thermal.filter(|b| (b.u - u).abs() < 1e-12).and_then(|b| branch_states(b)[i].as_ref());
                    at_temperature(STEPS[i] * u, moved.unwrap_or(state))
                };
                cubic.extend(add(source, &by));
            }
        }
        for branch in &fan.branches {
            let source = match branch.moved {
                Moved::Input(i) => Source::Input(i),
                Moved::Pressure => Source::Pressure,
                Moved::Temperature => continue,
            };
            let touches = |s: &Supply| matches!(s, Supply::Gas(_));
            if !bound.supply.iter().any(touches) {
                continue;
            }
            let states = branch_states(branch);
            let by = |i: usize| {
                states[i].as_ref().map_or(f64::NAN, |s| reaction.sum(t, chosen).dg_kj + rt(t) * bound.ln_q(reaction, s))
            };
            cubic.extend(add(source, &by));
        }
        for (i, taken) in &bound.activities {
            if taken.ln_half > 0.0 {
                shares.push((Source::Activity(taken.formula.clone()), reaction.used[*i].nu * rt(t) * taken.u_ln()));
            }
        }
        for (i, share) in reaction.data_doubt(self.ground.book, t, chosen) {
            if share != 0.0 {
                shares.push((Source::Data(reaction.used[i].formula.clone()), share));
            }
        }
        let variance: f64 = shares.iter().map(|(_, c)| c * c).sum();
        // A rectangular input's second moment along a cubic lies four tenths of the way from the slope over
        // its standard uncertainty to the slope over its limits; 3 % of u is 6 % of the variance.
        let third_order: f64 = cubic.iter().map(|(a, w)| 0.8 * a * (w - a)).sum();
        let nonlinear = bent || (variance > 0.0 && (second_order + third_order).abs() > 0.05 * variance);
        let doubt = Doubt { u_kj: sqrt(variance), shares, nonlinear };
        let standing = self.standing(dg, doubt.u_kj, t, bound);
        InGas { dg_kj: dg, doubt, standing }
    }

    /// How a dG stands, by the wish, the doubt and the temperature at which the change acts.
    #[must_use]
    pub fn standing(&self, dg_kj: f64, u_kj: f64, t_k: f64, bound: &Bound) -> Standing {
        let band = self.ground.k * u_kj;
        let goes = dg_kj < 0.0;
        let slow = self.acts_above_k().is_some_and(|a| t_k < a - 1e-6);
        if slow && goes {
            return Standing::OnPaper;
        }
        if dg_kj.abs() < band || dg_kj == 0.0 {
            return Standing::TooClose;
        }
        // At a detection limit the true pressure is lower: a product's makes the change go more readily, a
        // reactant's less. Only the verdict that this cannot overturn is given.
        let reaction = self.reaction(bound);
        for (supply, used) in bound.supply.iter().zip(&reaction.used) {
            if let Supply::Gas(i) = *supply
                && self.gas.intake.upper_bound.get(i) == Some(&true)
                && (used.nu > 0.0) != goes
            {
                return Standing::TooClose;
            }
        }
        if goes == (self.compiled.sign < 0.0) { Standing::OnSide } else { Standing::OffSide }
    }

    fn follow_course(&self, outcome: &mut Outcome) {
        let Some(leaving) = self.zone.leaving.as_ref() else { return };
        let reaction = self.reaction(&outcome.bound);
        let (from, to) = (self.zone.temperature.value, leaving.value);
        for i in 0..=COURSE_STEPS {
            let t_k = from + (to - from) * fraction(i);
            let dg_kj = self.dg_kj(reaction, t_k, outcome.ln_q);
            if dg_kj.is_finite() {
                let standing = self.standing(dg_kj, outcome.read.doubt.u_kj, t_k, &outcome.bound);
                outcome.course.push(CoursePoint { t_k, dg_kj, standing });
            }
        }
        if let Some(rate) = &self.zone.rate {
            let (cold, hot) = (from.min(to), from.max(to));
            let low = self.acts_above_k().map_or(cold, |a| a.max(cold));
            let mut marks = alloc::vec![low.min(hot), hot];
            marks.extend(
                reaction
                    .turning(self.ground.book, outcome.ln_q, 0.0)
                    .iter()
                    .map(|c| c.at)
                    .filter(|t| *t > low && *t < hot),
            );
            marks.sort_by(f64::total_cmp);
            let off = marks
                .windows(2)
                .filter(|w| self.compiled.sign * self.dg_kj(reaction, 0.5 * (w[0] + w[1]), outcome.ln_q) < 0.0)
                .map(|w| w[1] - w[0])
                .sum::<f64>();
            outcome.seconds_past = Some(off / rate.value);
        }
    }

    /// The outcome with the zone's place or gas changed: what a remedy would give.
    #[must_use]
    pub fn with_situation(&self, situation: &Situation) -> Option<Outcome> {
        let fan = self
            .gas
            .fan(
                self.ground.book,
                self.ground.shift,
                situation.clone(),
                self.zone.temperature.u,
                self.zone.pressure.u,
                false,
            )
            .ok()?;
        self.outcome(&fan).ok()
    }

    /// Name of a source of doubt, for people.
    #[must_use]
    pub fn source_label(&self, source: &Source) -> String {
        match source {
            Source::Input(i) => self.gas.intake.inputs[*i].label.clone(),
            Source::Temperature => "temperature".to_string(),
            Source::Pressure => "pressure".to_string(),
            Source::Rate => "rate".to_string(),
            Source::ActsAbove => "temperature it acts above".to_string(),
            Source::Activity(f) => alloc::format!("activity of {f}"),
            Source::Data(f) => alloc::format!("data of {f}"),
        }
    }
}

#[expect(clippy::cast_precision_loss, reason = "a small count")]
fn fraction(i: usize) -> f64 {
    i as f64 / COURSE_STEPS as f64
}
