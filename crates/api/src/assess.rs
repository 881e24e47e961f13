//! The findings as answers: figures with names that carry units, sentences beside them.

use crate::response::{
    Arithmetic, Assessment, Change, Counts, CoursePoint, Finding, Lever, Note, Remedy, Share, Shifted, Summary, Used,
    Zone,
};
use crate::{cautions, problem, words};
use alloc::collections::BTreeMap;
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_findings::activity::{From, Missing};
use leeway_findings::compiled::Carrier;
use leeway_findings::fan::ZoneGas;
use leeway_findings::judge::{
    Assessed, Case, Finding as Found, Ground, NoData, Outcome, Source, Standing, Supply, Why,
};
use leeway_findings::lever::What;
use leeway_gas::humidity::frost_point_k;
use leeway_gas::reading::Surface;
use leeway_gas::shift::Shift;
use leeway_line::model::{Line, Wish, Zone as LineZone};
use leeway_quantity::constants::{GAS_CONSTANT, KJ_PER_J};
use leeway_substances::{Book, Class, Species};

/// How a standing is written.
#[must_use]
pub(crate) fn standing_text(standing: Standing) -> &'static str {
    match standing {
        Standing::OnSide => "on side",
        Standing::OffSide => "off side",
        Standing::TooClose => "too close to call",
        Standing::OnPaper => "on paper",
        Standing::NoData => "no data",
    }
}

pub(crate) fn wish_text(wish: Wish) -> &'static str {
    match wish {
        Wish::Want => "want",
        Wish::Avoid => "avoid",
    }
}

struct Teller<'a> {
    book: &'a Book,
    line: &'a Line,
    ground: Ground<'a>,
    assessed: &'a Assessed,
    /// What each zone's other readings are held at, written once.
    held: Vec<Held>,
}

/// Readings of a zone in words, for what a lever holds.
#[derive(Default)]
struct Held {
    pressure: String,
    inputs: Vec<Option<String>>,
}

impl Held {
    fn new(zone: &LineZone, gas: &ZoneGas) -> Self {
        let inputs = gas.intake.inputs.iter().map(|input| {
            let lever = input.lever.as_deref()?;
            let name = if lever == "dew_point" { input.label.as_str() } else { lever };
            Some(alloc::format!("{name} {}", words::value(input.quantity.given, input.quantity.unit)))
        });
        Self { pressure: words::value(zone.pressure.given, zone.pressure.unit), inputs: inputs.collect() }
    }

    /// What was held while a lever was turned.
    fn for_lever(&self, what: &What, temperature: &str, balance: Option<&str>) -> String {
        let mut text = String::new();
        let mut add = |part: &str| {
            if !text.is_empty() {
                text.push_str(", ");
            }
            text.push_str(part);
        };
        if *what != What::Temperature {
            add(temperature);
        }
        if *what != What::Pressure {
            add(&self.pressure);
        }
        let own = match what {
            What::DewPoint(i) | What::Gas(i, _) => Some(*i),
            _ => None,
        };
        for (i, part) in self.inputs.iter().enumerate() {
            if let Some(part) = part.as_ref().filter(|_| own != Some(i)) {
                add(part);
            }
        }
        if let (What::Gas(..), Some(balance)) = (what, balance) {
            add(balance);
            text.push_str(" gives way");
        }
        text
    }
}

/// Assesses a line and tells what was found.
pub(crate) fn assess(book: &Book, shift: &Shift, line: &Line) -> Assessment {
    let assessed = leeway_findings::assess(book, shift, line);
    let charge = leeway_findings::activity::Charge::new(&line.charge);
    let ground = Ground { book, shift, charge: &charge, k: line.coverage_factor };
    let held = line
        .zones
        .iter()
        .zip(&assessed.gases)
        .map(|(zone, gas)| gas.as_ref().map_or_else(|_| Held::default(), |(gas, _)| Held::new(zone, gas)))
        .collect();
    let teller = Teller { book, line, ground, assessed: &assessed, held };
    let findings: Vec<Finding> = assessed.findings.iter().map(|f| teller.finding(f)).collect();
    Assessment {
        line: line.name.clone(),
        invented: line.invented,
        data_version: book.version.clone(),
        coverage_factor: line.coverage_factor,
        summary: teller.summary(&findings),
        zones: teller.zones(),
        changes: teller.changes(),
        cautions: leeway_findings::caution::cautions(line, &assessed).into_iter().map(cautions::words).collect(),
        notes: line
            .notes
            .iter()
            .map(|n| Note { at: n.at.clone(), text: n.text.clone() })
            .chain(charge_notes(book, line))
            .collect(),
        findings,
    }
}

/// Members of the charge that the data do not hold: no change can count with them.
fn charge_notes(book: &Book, line: &Line) -> Vec<Note> {
    let unknown = |text: &str| Species::parse(text).is_ok_and(|s| book.find(s.formula.text()).is_none());
    line.charge
        .iter()
        .enumerate()
        .filter(|(_, m)| unknown(&m.substance))
        .map(|(i, m)| Note {
            at: alloc::format!("charge[{i}].substance"),
            text: alloc::format!("{} is not in the data: it takes no part in any change", m.substance),
        })
        .collect()
}

fn pressures(gas: &ZoneGas, state: &[f64]) -> BTreeMap<String, f64> {
    gas.species.iter().zip(state).filter(|(_, p)| p.is_finite()).map(|(s, p)| (s.clone(), *p)).collect()
}

/// What the data call a substance, for a sentence: its first name, else its formula.
pub(crate) fn short_equation(reaction: &leeway_reactions::Reaction) -> String {
    let side = |left: bool| -> Vec<String> {
        reaction
            .used
            .iter()
            .filter(|u| (u.nu < 0.0) == left && u.class == Class::Condensed)
            .map(|u| {
                let n = u.nu.abs();
                if n == 1.0 { u.formula.clone() } else { alloc::format!("{}{}", words::number(n, 4), u.formula) }
            })
            .collect()
    };
    let or_gas = |list: Vec<String>, left: bool| {
        if list.is_empty() {
            let gas: Vec<String> =
                reaction.used.iter().filter(|u| (u.nu < 0.0) == left).map(|u| u.formula.clone()).collect();
            gas.join(" + ")
        } else {
            list.join(" + ")
        }
    };
    alloc::format!("{} \u{2192} {}", or_gas(side(true), true), or_gas(side(false), false))
}

impl Teller<'_> {
    fn zones(&self) -> Vec<Zone> {
        self.line
            .zones
            .iter()
            .zip(&self.assessed.gases)
            .enumerate()
            .map(|(i, (zone, gas))| {
                let mut answer = Zone {
                    name: zone.name.clone(),
                    temperature_k: zone.temperature.value,
                    leaving_k: zone.leaving.as_ref().map(|l| l.value),
                    pressure_bar: zone.pressure.value,
                    partial_pressures_bar: BTreeMap::new(),
                    shifted_partial_pressures_bar: None,
                    frost_point_k: None,
                    refused: None,
                    notes: Vec::new(),
                };
                match gas {
                    Ok((gas, fan)) => {
                        answer.partial_pressures_bar = pressures(gas, &fan.read);
                        answer.shifted_partial_pressures_bar = fan.shifted.as_ref().map(|(s, _)| pressures(gas, s));
                        answer.frost_point_k =
                            answer.partial_pressures_bar.get("H2O").and_then(|p| frost_point_k(*p, Surface::Ice));
                        answer.notes.clone_from(&gas.intake.notes);
                        if (fan.sum - 1.0).abs() > 1e-4 && (gas.intake.balance.is_none() || fan.sum > 1.0) {
                            answer.notes.push(alloc::format!(
                                "The analysis adds up to {}{}%; it is scaled to 100{}%",
                                words::number(fan.sum * 100.0, 4),
                                words::THIN,
                                words::THIN
                            ));
                        }
                    }
                    Err(e) => answer.refused = Some(problem::gas(e, i, &zone.name)),
                }
                answer
            })
            .collect()
    }

    fn changes(&self) -> Vec<Change> {
        self.line
            .changes
            .iter()
            .zip(&self.assessed.changes)
            .enumerate()
            .map(|(i, (change, compiled))| {
                let mut answer = Change {
                    name: change.name.clone(),
                    equation: change.equation.clone(),
                    short: change.equation.clone(),
                    wish: wish_text(change.wish).to_string(),
                    standard_turning_temperatures_k: Vec::new(),
                    refused: None,
                    notes: Vec::new(),
                };
                match compiled {
                    Ok(compiled) => {
                        let reaction = compiled.written();
                        answer.equation = reaction.equation.text();
                        answer.short = short_equation(reaction);
                        answer.standard_turning_temperatures_k =
                            reaction.turning(self.book, 0.0, 0.0).iter().map(|c| c.at).collect();
                        answer.notes.clone_from(&reaction.notes);
                        answer.notes.extend(beside_note(self.book, reaction));
                        for (formula, _) in &change.activities {
                            let bare = Species::parse(formula).map(|s| s.formula.text().to_string());
                            let part = |b: &str| {
                                reaction.used.iter().any(|u| u.formula == b)
                                    || reaction.equation.terms.iter().any(|t| t.species.formula.text() == b)
                            };
                            if bare.is_ok_and(|b| !part(&b)) {
                                answer.notes.push(alloc::format!(
                                    "The activity of {formula} is not used: it is no part of {}",
                                    answer.equation
                                ));
                            }
                        }
                    }
                    Err(e) => answer.refused = Some(problem::change(self.book, e, i, &change.name)),
                }
                answer
            })
            .collect()
    }

    fn finding(&self, found: &Found) -> Finding {
        let zone = &self.line.zones[found.zone];
        let change = &self.line.changes[found.change];
        let compiled = self.assessed.changes[found.change].as_ref();
        let mut answer = Finding {
            zone: zone.name.clone(),
            change: change.name.clone(),
            zone_index: found.zone,
            change_index: found.change,
            equation: compiled.map_or_else(|_| change.equation.clone(), |c| c.written().equation.text()),
            wish: wish_text(change.wish).to_string(),
            standing: standing_text(found.standing).to_string(),
            sentence: String::new(),
            judged_at_k: zone.temperature.value,
            judged_why: String::new(),
            dg_kj: None,
            u_dg_kj: None,
            driving_force_per_mole_kj: None,
            per_mole_of: None,
            leeway_kj: None,
            leeway_u: None,
            chance_wrong: None,
            nonlinear: false,
            levers: Vec::new(),
            budget: Vec::new(),
            measure_next: String::new(),
            remedies: Vec::new(),
            shifted: None,
            arithmetic: None,
            phases: BTreeMap::new(),
            used: Vec::new(),
            course: Vec::new(),
            acts_above_k: change.acts_above.as_ref().map(|a| a.temperature.value),
            seconds_past_turn: None,
            allowed_s: change.allowed.as_ref().map(|a| a.value),
            notes: Vec::new(),
        };
        match (&found.outcome, compiled, &self.assessed.gases[found.zone]) {
            (Ok(outcome), Ok(compiled), Ok((gas, _))) => {
                let case = Case { ground: self.ground, zone, change, compiled, gas };
                self.figures(&mut answer, &case, outcome);
            }
            (Err(why), _, gas) => {
                let why = self.why_no_data(why, zone, gas.as_ref().ok().map(|(g, _)| g));
                answer.sentence = alloc::format!("{} in {}: no data. {why}", change.name, zone.name);
                answer.notes.push(why);
            }
            _ => {}
        }
        if change.tolerated {
            answer.notes.push("The site tolerates this; the figures stand as they are".to_string());
        }
        answer
    }

    fn why_no_data(&self, why: &NoData, zone: &LineZone, gas: Option<&ZoneGas>) -> String {
        match why {
            NoData::Change => "The change cannot be read as it is written".to_string(),
            NoData::Gas => alloc::format!("The gas of {} cannot be taken as it is read", zone.name),
            NoData::NotRead(missing) => {
                let shown = gas.map_or_else(String::new, |g| words::list(&g.intake.species));
                alloc::format!(
                    "The gas reading of {} does not show {}; it shows {shown}. Give a reading, its detection limit, or a pressure with the change",
                    zone.name,
                    words::list(missing)
                )
            }
            NoData::ReadsZero(f) => {
                alloc::format!("{f} reads zero: give the detection limit instead, as an upper bound")
            }
            NoData::Activity(Missing::Carbon) => {
                "Carbon in an alloy does not follow its mole fraction: give its activity with the charge".to_string()
            }
            NoData::Activity(Missing::Share(f)) => {
                alloc::format!("{f} has neither a mass share nor an activity: give one with the charge")
            }
            NoData::Data(e) => {
                let text = e.to_string();
                text.strip_prefix("the data").map_or(text.clone(), |t| alloc::format!("The data{t}"))
            }
        }
    }

    fn figures(&self, answer: &mut Finding, case: &Case, outcome: &Outcome) {
        let reaction = case.reaction(&outcome.bound);
        let on_side = outcome.leeway_kj() >= 0.0;
        answer.judged_at_k = outcome.place.t_k;
        answer.judged_why = judged_why(outcome.place.why);
        answer.dg_kj = Some(outcome.read.dg_kj);
        answer.u_dg_kj = Some(outcome.read.doubt.u_kj);
        if let Some((formula, n)) = case.compiled.exchanged() {
            answer.driving_force_per_mole_kj = Some(-outcome.read.dg_kj / n);
            answer.per_mole_of = Some(formula);
        }
        answer.leeway_kj = Some(outcome.leeway_kj());
        answer.leeway_u = outcome.leeway_u();
        answer.chance_wrong = Some(outcome.chance_wrong());
        answer.nonlinear = outcome.read.doubt.nonlinear;
        let temperature = words::celsius(outcome.place.t_k);
        let balance = case.gas.intake.balance.as_deref();
        let held = |what: &What| self.held[answer.zone_index].for_lever(what, &temperature, balance);
        answer.levers = outcome.levers.iter().map(|l| self.lever(case, outcome, l, on_side, &held)).collect();
        answer.budget = budget(case, outcome);
        answer.measure_next = measure_next(case, outcome, self.ground.k);
        answer.remedies = outcome
            .remedies
            .iter()
            .map(|r| {
                let label = words::lever_label(&r.what, case.gas.intake.dew_surface());
                let up = r.beyond_doubt > r.from;
                let direction = match (&r.what, up) {
                    (What::Rate, _) => "or faster",
                    (_, true) => "or higher",
                    (_, false) => "or lower",
                };
                Remedy {
                    lever: r.what.name(),
                    unit: r.unit.symbol().to_string(),
                    from: r.from,
                    just_turns: r.just_turns,
                    beyond_doubt: r.beyond_doubt,
                    sentence: alloc::format!("{label} {} {direction}", words::value(r.beyond_doubt, r.unit)),
                    label,
                }
            })
            .collect();
        answer.shifted = outcome.shifted.as_ref().map(|(gas, state, how)| Shifted {
            standing: standing_text(gas.standing).to_string(),
            dg_kj: gas.dg_kj,
            u_dg_kj: gas.doubt.u_kj,
            partial_pressures_bar: pressures(case.gas, state),
            how: (*how).to_string(),
        });
        answer.used = self.used(case, outcome);
        answer.phases = answer.used.iter().map(|u| (u.formula.clone(), u.phase.clone())).collect();
        answer.arithmetic = Some(arithmetic(outcome, &answer.used));
        answer.course = outcome
            .course
            .iter()
            .map(|p| CoursePoint {
                temperature_k: p.t_k,
                dg_kj: p.dg_kj,
                standing: standing_text(p.standing).to_string(),
            })
            .collect();
        answer.seconds_past_turn = outcome.seconds_past;
        answer.sentence = self.sentence(answer, case, outcome);
        self.notes(answer, case, outcome, reaction);
    }

    fn notes(&self, answer: &mut Finding, case: &Case, outcome: &Outcome, reaction: &leeway_reactions::Reaction) {
        match outcome.carrier {
            Carrier::Written => {}
            Carrier::Water => {
                answer.notes.push("Oxygen is taken from H2O over H2 at the temperature judged".to_string())
            }
            Carrier::Dioxide => {
                answer.notes.push("Oxygen is taken from CO2 over CO at the temperature judged".to_string())
            }
        }
        if let Some(f) = &outcome.at_limit {
            answer.notes.push(alloc::format!(
                "{f} stands at its detection limit: only a verdict that less {f} cannot overturn is given"
            ));
        }
        if outcome.read.doubt.nonlinear {
            answer
                .notes
                .push("A contributor to the doubt acts in a curve: the doubt and the chance are rough".to_string());
        }
        if outcome.cut {
            answer.notes.push("Part of the course lies outside the data and is not judged".to_string());
        }
        for used in answer.used.iter().filter(|u| u.extrapolated) {
            answer.notes.push(alloc::format!("{} ({}) is carried beyond its fitted range", used.formula, used.phase));
        }
        for (_, taken) in &outcome.bound.activities {
            if taken.from == From::Raoult {
                answer.notes.push(alloc::format!(
                    "Activity of {} is its mole fraction (Raoult's law), doubted by a factor of {}: a given activity with a source is better",
                    taken.formula,
                    words::number(leeway_quantity::math::exp(taken.ln_half), 3)
                ));
            }
        }
        if let Some((gas, _, _)) = &outcome.shifted
            && gas.standing != outcome.read.standing
        {
            answer
                .notes
                .push(alloc::format!("Shifted, the gas gives another standing: {}", standing_text(gas.standing)));
        }
        if case.change.allowed.is_some()
            && case.zone.leaving.is_some()
            && !matches!(outcome.place.why, Why::Allowed(..) | Why::TooCold)
        {
            answer.notes.push("The allowed time needs a rate in the zone and a temperature the change acts above; the worst place is judged instead".to_string());
        }
        answer.notes.extend(beside_note(self.book, reaction));
    }

    fn lever(
        &self,
        case: &Case,
        outcome: &Outcome,
        lever: &leeway_findings::lever::Lever,
        on_side: bool,
        held: &dyn Fn(&What) -> String,
    ) -> Lever {
        let surface = case.gas.intake.dew_surface();
        let label = words::lever_label(&lever.what, surface);
        let z = outcome.leeway_u();
        let fails_above = lever.fails_above(on_side);
        let held = held(&lever.what);
        let why_not = match (&lever.what, lever.turning.is_empty()) {
            (_, true) => alloc::format!(
                "no turn from {} to {}",
                words::value(lever.searched.0, lever.unit),
                words::value(lever.searched.1, lever.unit)
            ),
            (What::Pressure, _) => "not proposed: the shell's own limits come first".to_string(),
            (What::Activity(..), _) => "not proposed: the charge's own".to_string(),
            (What::DewPoint(_), _) => {
                "only drier is proposed: wetting is for the plant's own interlocked humidifier".to_string()
            }
            (What::Gas(_, f), _) if !lever.allowed.up => alloc::format!("only less {f} is proposed"),
            (What::Gas(_, f), _) => alloc::format!("only more {f} is proposed"),
            (What::Temperature, _) if outcome.place.why != Why::Zone => {
                "not proposed: the place on a course is judged".to_string()
            }
            _ => String::new(),
        };
        Lever {
            lever: lever.what.name(),
            label,
            unit: lever.unit.symbol().to_string(),
            reading: lever.reading,
            u_reading: lever.u_reading,
            turning_points: lever.turning.clone(),
            leeway: lever.leeway,
            leeway_u: lever.leeway.and(z),
            u: lever.leeway.zip(z).filter(|(_, z)| z.abs() > 1e-12).map(|(l, z)| (l / z).abs()),
            off_side: fails_above.map(|above| String::from(if above { "above" } else { "below" })),
            searched: [lever.searched.0, lever.searched.1],
            held,
            allowed: lever.allowed.up || lever.allowed.down,
            why_not,
        }
    }

    fn used(&self, case: &Case, outcome: &Outcome) -> Vec<Used> {
        let reaction = case.reaction(&outcome.bound);
        let state = |i: usize| {
            self.assessed
                .gases
                .iter()
                .zip(&self.line.zones)
                .find(|(_, z)| core::ptr::eq(*z, case.zone))
                .and_then(|(g, _)| g.as_ref().ok())
                .map_or(f64::NAN, |(_, fan)| fan.read[i])
        };
        reaction
            .used
            .iter()
            .zip(&outcome.chosen)
            .zip(&outcome.bound.supply)
            .enumerate()
            .map(|(n, ((used, chosen), supply))| {
                let substance = &self.book.substances[chosen.substance];
                let record = &substance.records[chosen.record];
                let phase = &record.phases[chosen.phase];
                let source = &self.book.sources[record.source];
                let taken = outcome.bound.activities.iter().find(|(i, _)| *i == n).map(|(_, t)| t);
                let (activity, from) = match supply {
                    Supply::Gas(i) => (state(*i), "partial pressure".to_string()),
                    Supply::Fixed(ln_a) => {
                        (leeway_quantity::math::exp(*ln_a), taken.map_or_else(String::new, activity_from))
                    }
                };
                Used {
                    formula: used.formula.clone(),
                    phase: phase.name.clone(),
                    state: phase.state.letter().to_string(),
                    coefficient: used.nu,
                    activity,
                    activity_from: from,
                    source: source.short.clone(),
                    cite: source.cite.clone(),
                    u_kj: record.u_g_kj(outcome.place.t_k),
                    extrapolated: chosen.extrapolated,
                }
            })
            .collect()
    }

    /// One sentence for a finding: what, where, and how far.
    fn sentence(&self, answer: &Finding, case: &Case, outcome: &Outcome) -> String {
        let (change, zone) = (&case.change.name, &case.zone.name);
        let how_far = |on: bool| -> String {
            let lever = outcome.levers.iter().find(|l| l.leeway.is_some());
            lever.map_or_else(
                || alloc::format!("{}{}kJ", words::number(outcome.leeway_kj().abs(), 3), words::THIN),
                |l| {
                    let label = words::lower_first(&words::lever_label(&l.what, case.gas.intake.dew_surface()));
                    let size = words::leeway(l.leeway.unwrap_or(0.0), l.unit);
                    if on {
                        alloc::format!("{size} of {label} to the turn")
                    } else {
                        alloc::format!("{label} is {size} {}", words::too(l, l.fails_above(false).unwrap_or(true)))
                    }
                },
            )
        };
        match outcome.read.standing {
            Standing::OnSide if case.change.wish == Wish::Avoid => {
                alloc::format!("{change}: not in {zone}; {}", how_far(true))
            }
            Standing::OnSide => alloc::format!("{change} in {zone}; {}", how_far(true)),
            Standing::OffSide if case.change.wish == Wish::Avoid => {
                alloc::format!("{change} in {zone}: {}", how_far(false))
            }
            Standing::OffSide => alloc::format!("{change}: not in {zone}; {}", how_far(false)),
            Standing::TooClose => match answer.chance_wrong {
                Some(chance) if outcome.at_limit.is_none() => alloc::format!(
                    "{change} in {zone}: too close to call, the sign is wrong with a chance of {}{}%",
                    words::number(chance * 100.0, 2),
                    words::THIN
                ),
                _ => alloc::format!("{change} in {zone}: too close to call at the detection limit"),
            },
            Standing::OnPaper => alloc::format!(
                "{change} in {zone}: on paper; below {} it is known to be too slow",
                answer.acts_above_k.map_or_else(String::new, words::celsius)
            ),
            Standing::NoData => String::new(),
        }
    }

    fn summary(&self, findings: &[Finding]) -> Summary {
        let mut counts = Counts::default();
        for f in findings {
            match f.standing.as_str() {
                "on side" => counts.on_side += 1,
                "off side" => counts.off_side += 1,
                "too close to call" => counts.too_close += 1,
                "on paper" => counts.on_paper += 1,
                _ => counts.no_data += 1,
            }
        }
        let tolerated = |f: &&Finding| self.line.changes[f.change_index].tolerated;
        let of = |standing: &str| -> Vec<&Finding> {
            findings.iter().filter(|f| f.standing == standing && !tolerated(f)).collect()
        };
        let (off, close) = (of("off side"), of("too close to call"));
        let worst = off
            .iter()
            .chain(if off.is_empty() { close.iter() } else { [].iter() })
            .min_by(|a, b| a.leeway_u.unwrap_or(0.0).total_cmp(&b.leeway_u.unwrap_or(0.0)))
            .map(|f| (f.change_index, f.zone_index));
        let worst = worst.and_then(|w| findings.iter().position(|f| (f.change_index, f.zone_index) == w));
        let by_change = |list: &[&Finding]| -> Vec<(usize, Vec<String>)> {
            let mut groups: Vec<(usize, Vec<String>)> = Vec::new();
            for f in list {
                match groups.iter_mut().find(|(c, _)| *c == f.change_index) {
                    Some((_, zones)) => zones.push(f.zone.clone()),
                    None => groups.push((f.change_index, alloc::vec![f.zone.clone()])),
                }
            }
            groups
        };
        let name = |c: usize| self.line.changes[c].name.as_str();
        let fails = |c: usize, zones: &[String]| match self.line.changes[c].wish {
            Wish::Avoid => alloc::format!("{} in {}", name(c), words::list(zones)),
            Wish::Want => alloc::format!("{}: not in {}", name(c), words::list(zones)),
        };
        let nothing =
            if counts.off_side > 0 { "Nothing is off side but what the site tolerates" } else { "Nothing is off side" };
        let sentence = if self.line.zones.is_empty() {
            "No zone yet.".to_string()
        } else if findings.is_empty() {
            "No change is watched yet.".to_string()
        } else if !off.is_empty() {
            let mut groups = by_change(&off);
            let first = worst.map_or(0, |w| findings[w].change_index);
            groups.sort_by_key(|(c, _)| *c != first);
            let (c, zones) = &groups[0];
            let mut text = fails(*c, zones);
            let close_too: Vec<String> =
                close.iter().filter(|f| f.change_index == *c).map(|f| f.zone.clone()).collect();
            if !close_too.is_empty() {
                text += &alloc::format!("; in {} it is too close to call", words::list(&close_too));
            }
            let more = groups.len() - 1;
            match more {
                0 => text + ".",
                1 => alloc::format!("{text}. {} too.", fails(groups[1].0, &groups[1].1)),
                n => alloc::format!("{text}. {n} more changes are off side."),
            }
        } else if !close.is_empty() {
            let groups = by_change(&close);
            let parts: Vec<String> = groups
                .iter()
                .take(2)
                .map(|(c, zones)| alloc::format!("{} in {}", name(*c), words::list(zones)))
                .collect();
            let more = if groups.len() > 2 { alloc::format!(" ({} more)", groups.len() - 2) } else { String::new() };
            alloc::format!("{nothing}; too close to call: {}{more}.", parts.join("; "))
        } else {
            let nearest = findings
                .iter()
                .filter(|f| f.standing == "on side" && !tolerated(f))
                .min_by(|a, b| a.leeway_u.unwrap_or(f64::MAX).total_cmp(&b.leeway_u.unwrap_or(f64::MAX)));
            match nearest {
                Some(f) => alloc::format!("{nothing}. The nearest: {}.", words::lower_first(&f.sentence)),
                None if counts.no_data == findings.len() => {
                    "No finding: the data or readings do not reach.".to_string()
                }
                None => alloc::format!("{nothing}."),
            }
        };
        let remedy = worst.and_then(|w| {
            let f = &findings[w];
            let first = f.remedies.first()?;
            let back = if f.standing == "off side" { "brings it back beyond doubt" } else { "puts it beyond doubt" };
            let others = if off.len() + close.len() > 1 {
                alloc::format!(" (worst: {} in {})", f.change, f.zone)
            } else {
                String::new()
            };
            Some(alloc::format!("{} {back}{others}, all else held.", first.sentence))
        });
        let remedy = remedy.unwrap_or_else(|| {
            if worst.is_some() {
                "No single allowed lever brings the worst one back; see its levers.".to_string()
            } else {
                String::new()
            }
        });
        Summary { sentence, remedy, worst, counts }
    }
}

fn activity_from(taken: &leeway_findings::activity::Taken) -> String {
    let source = taken.source.as_ref().map_or_else(String::new, |s| alloc::format!(": {s}"));
    match taken.from {
        From::Pure => "pure".to_string(),
        From::Given => alloc::format!("your file{source}"),
        From::Coefficient => alloc::format!("mole fraction times your coefficient{source}"),
        From::Raoult => "mole fraction (Raoult's law)".to_string(),
        From::GivenPressure => alloc::format!("pressure given with the change{source}"),
    }
}

/// A note where a phase record of a boundary was used.
fn beside_note(book: &Book, reaction: &leeway_reactions::Reaction) -> Option<String> {
    let wustite = reaction.used.iter().any(|u| u.formula == "FeO" && u.class == Class::Condensed);
    let magnetite = reaction.used.iter().any(|u| u.formula == "Fe3O4");
    if !wustite || book.find("FeO").is_none() {
        return None;
    }
    let side = if magnetite { "magnetite" } else { "iron" };
    Some(alloc::format!("FeO is wustite at its {side} boundary, not stoichiometric: its activity is that of FeO in it"))
}

fn judged_why(why: Why) -> String {
    match why {
        Why::Zone => String::new(),
        Why::Worst(low, high) => {
            alloc::format!("the worst place between {} and {}", words::celsius(low), words::celsius(high))
        }
        Why::Allowed(seconds, rate, floor) => alloc::format!(
            "{}{}s before {} at {}{}K/s",
            words::number(seconds, 4),
            words::THIN,
            words::celsius(floor),
            words::number(rate, 4),
            words::THIN
        ),
        Why::TooCold => "the hot end: the whole course is below the temperature it acts above".to_string(),
    }
}

fn budget(case: &Case, outcome: &Outcome) -> Vec<Share> {
    let variance: f64 = outcome.read.doubt.shares.iter().map(|(_, c)| c * c).sum();
    if variance <= 0.0 {
        return Vec::new();
    }
    let mut list: Vec<Share> = outcome
        .read
        .doubt
        .shares
        .iter()
        .map(|(source, c)| {
            let label = case.source_label(source);
            let local = !matches!(source, Source::Data(_) | Source::Activity(_));
            Share {
                source: if local { alloc::format!("{label}, {}", case.zone.name) } else { label },
                share: c * c / variance,
                u_kj: c.abs(),
            }
        })
        .collect();
    list.sort_by(|a, b| b.share.total_cmp(&a.share));
    list
}

/// What to measure next: the largest contributor that a better instrument or coupon can shrink.
fn measure_next(case: &Case, outcome: &Outcome, k: f64) -> String {
    let doubt = &outcome.read.doubt;
    let variance: f64 = doubt.shares.iter().map(|(_, c)| c * c).sum();
    if variance <= 0.0 || outcome.leeway_u().is_some_and(|z| z.abs() > 3.0 * k) {
        return String::new();
    }
    let Some((source, c)) = doubt.shares.iter().max_by(|a, b| a.1.abs().total_cmp(&b.1.abs())) else {
        return String::new();
    };
    let without = leeway_quantity::math::sqrt((variance - 0.75 * c * c).max(0.0));
    let gain = alloc::format!(
        "halving it takes the doubt from {} to {}{}kJ",
        words::number(doubt.u_kj, 3),
        words::number(without, 3),
        words::THIN
    );
    let what = match source {
        Source::Data(f) => {
            return alloc::format!("The data of {f} weigh most: no instrument of the line can shrink that.");
        }
        Source::Activity(f) => alloc::format!("Pin the activity of {f} first, with a coupon or a published figure"),
        other => alloc::format!("A better {} comes first", case.source_label(other)),
    };
    let least = doubt
        .shares
        .iter()
        .filter(|(s, c)| {
            matches!(s, Source::Temperature | Source::Input(_) | Source::Pressure) && c * c < 0.02 * variance
        })
        .map(|(s, _)| case.source_label(s))
        .next();
    let gains_nothing = least.map_or_else(String::new, |l| alloc::format!(" A better {l} gains nothing."));
    alloc::format!("{what}: {gain}.{gains_nothing}")
}

fn arithmetic(outcome: &Outcome, used: &[Used]) -> Arithmetic {
    let power = |n: f64| if n == 1.0 { String::new() } else { alloc::format!("^{}", words::number(n, 4)) };
    let side = |products: bool, numbers: bool| -> String {
        let parts: Vec<String> = used
            .iter()
            .filter(|u| (u.coefficient > 0.0) == products && !(u.state != "g" && u.activity == 1.0))
            .map(|u| {
                let p = power(u.coefficient.abs());
                if numbers {
                    let value = words::number(u.activity, 5);
                    if p.is_empty() { value } else { alloc::format!("({value}){p}") }
                } else {
                    let letter = if u.state == "g" { "p" } else { "a" };
                    alloc::format!("{letter}({}){p}", u.formula)
                }
            })
            .collect();
        parts.join(" \u{b7} ")
    };
    let whole = |numbers: bool| {
        let (top, bottom) = (side(true, numbers), side(false, numbers));
        match (top.is_empty(), bottom.is_empty()) {
            (true, true) => "1".to_string(),
            (true, false) => alloc::format!("1 / ({bottom})"),
            (false, true) => top,
            (false, false) => alloc::format!("{top} / ({bottom})"),
        }
    };
    let t = outcome.place.t_k;
    Arithmetic {
        temperature_k: t,
        dg0_kj: outcome.sum.dg_kj,
        dh0_kj: outcome.sum.dh_kj,
        ds0_j_per_k: outcome.sum.ds_j_per_k,
        q_symbols: whole(false),
        q_numbers: whole(true),
        ln_q: outcome.ln_q,
        rt_ln_q_kj: GAS_CONSTANT * KJ_PER_J * t * outcome.ln_q,
        dg_kj: outcome.read.dg_kj,
    }
}

/// Proposed name of a change.
pub(crate) fn proposal_name(book: &Book, p: &leeway_findings::propose::Proposal) -> String {
    use leeway_findings::propose::Kind as Does;
    let name = |formula: &str| {
        let first = book
            .find(formula)
            .map(|i| book.substances[i].name.split([',', ';']).next().unwrap_or("").trim().to_string());
        first.filter(|n| !n.is_empty() && n.len() <= 24).unwrap_or_else(|| formula.to_string())
    };
    let title = |text: String| {
        let mut chars = text.chars();
        chars.next().map_or_else(String::new, |c| c.to_uppercase().chain(chars).collect())
    };
    let one = p.from.len() == 1;
    match &p.kind {
        Does::Oxidises if one => alloc::format!("{} oxidises to {}", title(name(&p.from[0])), p.product),
        Does::Reduces => alloc::format!("{} reduces to {}", title(name(&p.from[0])), p.product),
        Does::GivesOff(gas) if one => alloc::format!("{} gives off {gas}", title(name(&p.from[0]))),
        _ => alloc::format!("{} forms", title(p.product.clone())),
    }
}

/// A proposed name with the gas that brings the change about.
pub(crate) fn proposal_by(name: &str, p: &leeway_findings::propose::Proposal) -> String {
    let gas = p.equation.terms.iter().rfind(|t| t.coefficient < num_traits::Zero::zero());
    gas.map_or_else(|| name.to_string(), |t| alloc::format!("{name} by {}", t.species.formula.text()))
}
