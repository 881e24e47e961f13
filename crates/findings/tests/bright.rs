//! A bright annealing line built by hand: the flagship case through the whole engine.

use leeway_findings::judge::{Standing, assess};
use leeway_gas::reading::{Basis, Channel, DewPoint, GasReading, Surface};
use leeway_gas::shift::Shift;
use leeway_line::model::{Activity, Change, Line, Member, Wish, Zone};
use leeway_quantity::{Quantity, Spread, Unit};
use leeway_substances::Book;

fn q(value: f64, unit: Unit, tolerance: f64) -> Quantity {
    Quantity::new(value, unit).and_then(|q| q.with_tolerance(tolerance, Spread::Limits)).expect("a quantity")
}

fn line(celsius: f64, frost: f64) -> Line {
    let member = |s: &str, wt: f64, a: Option<f64>| Member {
        substance: s.into(),
        share_wt: Some(q(wt, Unit::Percent, 0.0)),
        activity: a.map(|value| Activity { value, is_coefficient: false, doubt_factor: Some(1.6), source: None }),
    };
    Line {
        name: "hand-made".into(),
        invented: true,
        coverage_factor: 2.0,
        charge: vec![member("Cr", 18.0, Some(0.25)), member("Fe", 72.0, None), member("Ni", 8.0, None)],
        zones: vec![Zone {
            name: "Heat".into(),
            temperature: q(celsius, Unit::Celsius, 5.0),
            leaving: None,
            rate: None,
            pressure: q(1.01325, Unit::Bar, 0.0),
            gas: GasReading {
                basis: Some(Basis::Dry),
                channels: vec![Channel {
                    formula: "N2".into(),
                    quantity: q(0.0001, Unit::Percent, 0.0),
                    basis: None,
                    upper_bound: false,
                }],
                balance: Some("H2".into()),
                dew_point: Some(DewPoint {
                    quantity: q(frost, Unit::Celsius, 2.0),
                    over: Some(Surface::Ice),
                    pressure: None,
                }),
                cell: None,
            },
        }],
        changes: vec![Change {
            name: "Chromium oxidises".into(),
            equation: "Cr + H2O = Cr2O3 + H2".into(),
            wish: Wish::Avoid,
            zones: None,
            activities: vec![],
            acts_above: None,
            allowed: None,
            tolerated: false,
        }],
        notes: vec![],
    }
}

/// Frost point at which chromium of activity 0.25 turns at 1050 C in hydrogen: -21.9 C by the JANAF values
/// (Chase 1998), 2 K of spread between sources (Jeannin, Mannerskantz, Richardson 1963).
#[test]
fn chromium_turns_where_the_published_values_say() {
    let book = Book::parse(leeway_dataset::TEXT).expect("data");
    let shift = Shift::new(&book);
    let found = assess(&book, &shift, &line(1050.0, -50.0));
    let outcome = found.findings[0].outcome.as_ref().expect("figures");
    let dew = outcome.levers.iter().find(|l| l.what.name() == "dew_point").expect("dew point");
    assert!((dew.turning[0] + 21.9).abs() < 2.0, "{}", dew.turning[0]);
    assert_eq!(found.findings[0].standing, Standing::OnSide);
}
