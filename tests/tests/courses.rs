//! Zones through which the charge heats or cools: where the change is judged, and what the time past its turn is.

use leeway_api::response::Finding;
use leeway_tests::session;
use serde_json::{Value, json};

/// Chromium of activity 0.25 in hydrogen at -38 C frost point, cooled from 1090 to 80 C: it turns near 881 C.
fn finding(zone: Value, change: Value) -> Finding {
    let mut z = json!({"name": "Cool", "temperature": {"value": 1090, "unit": "C", "tolerance": 6},
        "gas": {"balance": "H2", "dew_point": {"value": -38, "unit": "C", "over": "ice", "tolerance": 2}}});
    let mut c = json!({"name": "c", "equation": "2 Cr + 3 H2O = Cr2O3 + 3 H2", "wish": "avoid"});
    for (to, from) in [(&mut z, zone), (&mut c, change)] {
        for (k, v) in from.as_object().expect("an object") {
            to[k] = v.clone();
        }
    }
    let text = json!({"leeway": 1, "pressure": {"value": 1.025, "unit": "bar"}, "charge": [{"substance": "Cr", "activity": 0.25, "doubt_factor": 1.2}],
        "zones": [z], "changes": [c]}).to_string();
    session().assess(&text).unwrap_or_else(|p| panic!("{}", p.message)).findings.remove(0)
}

fn celsius(f: &Finding) -> f64 {
    f.judged_at_k - 273.15
}

fn turn(f: &Finding) -> f64 {
    f.levers.iter().find(|l| l.lever == "temperature").expect("a lever").turning_points[0]
}

const LEAVING: &str = r#"{"leaving": {"value": 80, "unit": "C"}}"#;
const WITH_RATE: &str =
    r#"{"leaving": {"value": 80, "unit": "C"}, "rate": {"value": 38, "unit": "K/s", "tolerance": 3}}"#;

fn parsed(text: &str) -> Value {
    serde_json::from_str(text).expect("JSON")
}

#[test]
fn the_worst_place_without_a_rate() {
    // Oxidation of chromium is favoured by cold: the worst place is the end, or where it begins to be too slow.
    let f = finding(parsed(LEAVING), json!({}));
    assert!((celsius(&f) - 80.0).abs() < 1e-6, "{}", celsius(&f));
    assert_eq!(f.standing, "off side");
    let f = finding(parsed(LEAVING), json!({"acts_above": {"value": 500, "unit": "C", "source": "t"}}));
    assert!((celsius(&f) - 500.0).abs() < 1e-6, "{}", celsius(&f));
    // A wanted change that heat favours is worst where it is coldest, and a nitride where it is hottest if wanted.
    let f = finding(
        parsed(LEAVING),
        json!({"equation": "Cr2O3 + 3 H2 = 2 Cr + 3 H2O", "wish": "want", "acts_above": {"value": 700, "unit": "C"}}),
    );
    assert!((celsius(&f) - 700.0).abs() < 1e-6);
    assert_eq!(f.standing, "off side");
    // Heating instead of cooling: the same places.
    let heating = json!({"temperature": {"value": 80, "unit": "C"}, "leaving": {"value": 1090, "unit": "C"}});
    let f = finding(heating, json!({"acts_above": {"value": 500, "unit": "C"}}));
    assert!((celsius(&f) - 500.0).abs() < 1e-6);
}

#[test]
fn the_time_that_is_allowed_moves_the_place() {
    let change = |s: f64| json!({"acts_above": {"value": 500, "unit": "C", "source": "t"}, "allowed": {"value": s, "unit": "s"}});
    // 8 s before 500 C at 38 K/s is 804 C.
    let f = finding(parsed(WITH_RATE), change(8.0));
    assert!((celsius(&f) - 804.0).abs() < 1e-6, "{}", celsius(&f));
    assert_eq!(f.standing, "off side");
    assert!(f.budget.iter().any(|s| s.source.starts_with("rate")), "{:?}", f.budget);
    // The strip needs (881 - 500) / 38 s from its turn to where it is too slow: allowed a little more, it is judged past its turn.
    let needed = (turn(&f) - 500.0) / 38.0;
    assert!((f.seconds_past_turn.expect("seconds") - needed).abs() < 1e-6);
    for (seconds, goes) in [(needed + 0.01, false), (needed - 0.01, true)] {
        let f = finding(parsed(WITH_RATE), change(seconds));
        assert_eq!(f.dg_kj.expect("kJ") < 0.0, goes, "{seconds} s of {needed} s");
    }
    // Allowed longer than the whole course: judged at its hot end.
    let f = finding(parsed(WITH_RATE), change(60.0));
    assert!((celsius(&f) - 1090.0).abs() < 1e-6);
    assert_eq!(f.standing, "on side");
    // Without a rate the allowance cannot be used, and that is said.
    let f = finding(parsed(LEAVING), change(8.0));
    assert!((celsius(&f) - 500.0).abs() < 1e-6);
    assert!(f.notes.iter().any(|n| n.contains("needs a rate")), "{:?}", f.notes);
}

#[test]
fn a_course_below_what_it_acts_above_is_on_paper() {
    let f = finding(
        json!({"temperature": {"value": 450, "unit": "C"}, "leaving": {"value": 80, "unit": "C"}}),
        json!({"acts_above": {"value": 500, "unit": "C"}}),
    );
    assert!((celsius(&f) - 450.0).abs() < 1e-6);
    assert_eq!(f.standing, "on paper");
    // One temperature below it: on paper where it would go, and plainly on side where it would not.
    let cold = |frost: f64| {
        let zone = json!({"temperature": {"value": 450, "unit": "C"}, "gas": {"balance": "H2", "dew_point": {"value": frost, "unit": "C", "over": "ice"}}});
        finding(zone, json!({"acts_above": {"value": 500, "unit": "C"}})).standing
    };
    assert_eq!(cold(-60.0), "on paper");
    assert_eq!(cold(-99.0), "on side");
}

#[test]
fn the_course_is_followed_through_its_standings() {
    let f = finding(
        parsed(WITH_RATE),
        json!({"acts_above": {"value": 500, "unit": "C"}, "allowed": {"value": 8, "unit": "s"}}),
    );
    let standings: Vec<&str> = f.course.iter().map(|p| p.standing.as_str()).collect();
    assert_eq!((standings[0], standings[standings.len() - 1]), ("on side", "on paper"));
    assert!(standings.contains(&"off side"));
    assert!(f.course.windows(2).all(|w| w[0].temperature_k > w[1].temperature_k), "in order of travel");
    let flip = f.course.windows(2).find(|w| w[0].dg_kj > 0.0 && w[1].dg_kj <= 0.0).expect("it turns on the way");
    assert!(
        (flip[0].temperature_k..).contains(&flip[0].temperature_k)
            && turn(&f) + 273.15 <= flip[0].temperature_k
            && turn(&f) + 273.15 >= flip[1].temperature_k
    );
}

/// The demo logs' line in the worst case: a cooling leg through which a change turns twice counts only what is off side.
#[test]
fn seconds_count_only_what_is_off_side() {
    let f = finding(parsed(WITH_RATE), json!({"acts_above": {"value": 900, "unit": "C"}}));
    assert_eq!(f.seconds_past_turn, Some(0.0), "it turns below 900 C");
    let f = finding(parsed(WITH_RATE), json!({}));
    assert!((f.seconds_past_turn.expect("seconds") - (turn(&f) - 80.0) / 38.0).abs() < 1e-6);
}
