//! First-order doubt against Monte Carlo (JCGM 101:2008): 200 000 seeded draws on each of at least 50 findings.
//!
//! Every reading is drawn by its own kind of tolerance (rectangular limits or standard), every activity
//! between its limits on a logarithmic scale, H298 and S298 of every record normally. The combined standard
//! uncertainty must agree within 3 %, or the engine must have said by itself that the finding is not linear.

use leeway_findings::activity::Charge;
use leeway_findings::judge::{Case, Ground, Outcome, Source, Why, assess};
use leeway_gas::shift::Shift;
use leeway_quantity::constants::{GAS_CONSTANT, KJ_PER_J};
use leeway_quantity::math::{exp, ln, sqrt};
use leeway_quantity::{Quantity, Spread};
use leeway_substances::Book;
use leeway_tests::demo_lines_and_variants;

const DRAWS: usize = 200_000;

/// Numbers that look random and are the same on every run (SplitMix64; Steele, Lea and Flood 2014).
struct Seeded(u64);

impl Seeded {
    fn unit(&mut self) -> f64 {
        self.0 = self.0.wrapping_add(0x9e37_79b9_7f4a_7c15);
        let mut z = self.0;
        z = (z ^ (z >> 30)).wrapping_mul(0xbf58_476d_1ce4_e5b9);
        z = (z ^ (z >> 27)).wrapping_mul(0x94d0_49bb_1331_11eb);
        ((z ^ (z >> 31)) >> 11) as f64 / (1u64 << 53) as f64
    }
    /// Mean zero, standard deviation one, between plus and minus root three.
    fn rectangular(&mut self) -> f64 {
        (2.0 * self.unit() - 1.0) * sqrt(3.0)
    }
    /// Marsaglia's polar method.
    fn normal(&mut self) -> f64 {
        loop {
            let (u, v) = (2.0 * self.unit() - 1.0, 2.0 * self.unit() - 1.0);
            let s = u * u + v * v;
            if s > 0.0 && s < 1.0 {
                return u * sqrt(-2.0 * ln(s) / s);
            }
        }
    }
    fn like(&mut self, q: &Quantity) -> f64 {
        match q.tolerance {
            Some((_, Spread::Limits)) => self.rectangular() * q.u,
            _ => self.normal() * q.u,
        }
    }
}

/// Standard deviation of dG over the draws; `None` where a draw has no value (a share below zero).
fn spread(case: &Case, outcome: &Outcome, random: &mut Seeded) -> Option<f64> {
    let (book, shift) = (case.ground.book, case.ground.shift);
    let reaction = case.reaction(&outcome.bound);
    let (mut mean, mut square) = (0.0, 0.0);
    let base = case.gas.intake.values();
    for n in 0..DRAWS {
        let mut t = outcome.place.t_k;
        let at_leaving = case.zone.leaving.as_ref().is_some_and(|l| (l.value - t).abs() < 1e-9 && l.u > 0.0);
        let thermometer = if at_leaving { case.zone.leaving.as_ref()? } else { &case.zone.temperature };
        t += random.like(thermometer);
        if let (Why::Allowed(seconds, _, _), Some(rate)) = (outcome.place.why, &case.zone.rate)
            && outcome.place.u_rate > 0.0
        {
            t += random.like(rate) * seconds;
        }
        if outcome.place.u_acts > 0.0 {
            t += random.like(&case.change.acts_above.as_ref()?.temperature);
        }
        let values: Vec<f64> =
            case.gas.intake.inputs.iter().zip(&base).map(|(i, v)| v + random.like(&i.quantity)).collect();
        let p = case.zone.pressure.value + random.like(&case.zone.pressure);
        let taken = case.gas.intake.take(book, shift, &values, t, p).ok()?;
        let mut state = taken.partial_pressures_bar;
        state.resize(case.gas.species.len(), f64::NAN);
        let mut ln_q = outcome.bound.ln_q(reaction, &state);
        for (i, taken) in &outcome.bound.activities {
            ln_q += reaction.used[*i].nu * random.rectangular() * taken.u_ln();
        }
        let chosen = reaction.choose(book, t).ok()?;
        let mut dg = reaction.sum(t, &chosen).dg_kj + GAS_CONSTANT * KJ_PER_J * t * ln_q;
        for (u, c) in reaction.used.iter().zip(&chosen) {
            let record = &book.substances[c.substance].records[c.record];
            dg += u.nu * (record.u_h298_kj * random.normal() - t * KJ_PER_J * record.u_s298_j_per_k * random.normal());
        }
        if !dg.is_finite() {
            return None;
        }
        let d = dg - mean;
        mean += d / (n + 1) as f64;
        square += d * (dg - mean);
    }
    Some(sqrt(square / (DRAWS - 1) as f64))
}

#[test]
fn first_order_doubt_agrees_with_draws() {
    let book = Book::parse(leeway_dataset::TEXT).expect("data");
    let shift = Shift::new(&book);
    let mut random = Seeded(2031);
    let (mut checked, mut flagged, mut worst) = (0, 0, 0.0f64);
    for (label, text) in demo_lines_and_variants() {
        let line = leeway_line::read(&text).unwrap_or_else(|e| panic!("{label}: {e}"));
        let found = assess(&book, &shift, &line);
        let charge = Charge::new(&line.charge);
        let ground = Ground { book: &book, shift: &shift, charge: &charge, k: line.coverage_factor };
        for f in &found.findings {
            // Every third finding of the list: all kinds of lines, zones and changes come up.
            if (f.zone + f.change) % 3 != 0 {
                continue;
            }
            let (Ok(outcome), Ok(compiled), Ok((gas, _))) =
                (&f.outcome, &found.changes[f.change], &found.gases[f.zone])
            else {
                continue;
            };
            let case = Case { ground, zone: &line.zones[f.zone], change: &line.changes[f.change], compiled, gas };
            let name = format!("{label}, {} in {}", case.change.name, case.zone.name);
            let doubt = &outcome.read.doubt;
            // The shares add up to the combined figure by construction; the draws do not know them.
            let sum: f64 = doubt.shares.iter().map(|(_, c)| c * c).sum();
            assert!((sqrt(sum) - doubt.u_kj).abs() < 1e-12, "{name}");
            assert!(doubt.shares.iter().any(|(s, _)| matches!(s, Source::Data(_))), "{name}: no doubt of the data");
            match spread(&case, outcome, &mut random) {
                None => assert!(doubt.nonlinear, "{name}: draws without a value, and not flagged"),
                Some(drawn) => {
                    let off = doubt.u_kj / drawn - 1.0;
                    if doubt.nonlinear {
                        flagged += 1;
                    } else {
                        assert!(
                            off.abs() < 0.03,
                            "{name}: first order {:.4} kJ, draws {drawn:.4} kJ, not flagged",
                            doubt.u_kj
                        );
                        worst = worst.max(off.abs());
                    }
                    checked += 1;
                }
            }
        }
    }
    assert!(checked >= 50, "only {checked} findings checked");
    assert!(flagged * 4 < checked, "{flagged} of {checked} flagged: the flag must be the exception");
    assert!(worst > 0.0 && exp(worst) < 1.031, "{worst}");
}
