//! The invented demo lines: every one is taken whole, and stands as its plant was drawn up to stand.
//!
//! The figures behind the plants were worked out by hand from JANAF (Chase 1998), NASA Glenn (McBride, Zehe,
//! Gordon 2002) and O'Neill and Pownceby (1993) values, independently of this engine; where another tolerance
//! than 10 K stands, its reason stands beside it.

use leeway_api::response::{Assessment, Finding};
use leeway_tests::{demo_lines_and_variants, session, text};

fn assessed(file: &str, variant: Option<&str>) -> Assessment {
    let session = session();
    let mut line = text(&format!("lines/{file}.leeway.json"));
    if let Some(name) = variant {
        line = session.variant(&line, name).unwrap_or_else(|p| panic!("{}", p.message));
    }
    session.assess(&line).unwrap_or_else(|p| panic!("{}", p.message))
}

fn finding<'a>(a: &'a Assessment, change: &str, zone: &str) -> &'a Finding {
    a.findings.iter().find(|f| f.change == change && f.zone == zone).unwrap_or_else(|| panic!("{change} in {zone}"))
}

/// Turning temperature nearest to the reading, C.
fn turn(f: &Finding) -> f64 {
    let lever = f.levers.iter().find(|l| l.lever == "temperature").unwrap_or_else(|| panic!("{}", f.sentence));
    let near = |a: &&f64, b: &&f64| (*a - lever.reading).abs().total_cmp(&(*b - lever.reading).abs());
    *lever.turning_points.iter().min_by(near).unwrap_or_else(|| panic!("{}: no turn", f.sentence))
}

fn dew_leeway(f: &Finding) -> f64 {
    f.levers.iter().find(|l| l.lever == "dew_point").and_then(|l| l.leeway).unwrap_or_else(|| panic!("{}", f.sentence))
}

#[track_caller]
fn near(found: f64, wanted: f64, within: f64) {
    assert!((found - wanted).abs() <= within, "found {found:.2}, wanted {wanted} within {within}");
}

#[test]
fn every_line_and_variant_is_taken_whole() {
    let session = session();
    let all = demo_lines_and_variants();
    assert_eq!(all.iter().filter(|(l, _)| !l.contains(':')).count(), 6, "six demo lines");
    for (label, line) in all {
        let a = session.assess(&line).unwrap_or_else(|p| panic!("{label}: {}", p.message));
        assert!(a.invented, "{label} does not say that it is invented");
        assert!(a.zones.iter().all(|z| z.refused.is_none()), "{label}: a gas is refused");
        assert!(a.changes.iter().all(|c| c.refused.is_none()), "{label}: a change is refused");
        assert_eq!(a.summary.counts.no_data, 0, "{label}: a finding without data");
        assert!(a.notes.is_empty(), "{label}: {:?}", a.notes);
        assert!(!a.cautions.is_empty(), "{label}: no caution");
        for f in &a.findings {
            let total: f64 = f.budget.iter().map(|s| s.share).sum();
            assert!((total - 1.0).abs() < 1e-12, "{label}, {}: shares add up to {total}", f.sentence);
        }
    }
}

#[test]
fn heron_as_recipe() {
    let a = assessed("heron-2", None);
    let chromium = |zone| finding(&a, "Chromium oxidises", zone);
    assert_eq!(chromium("Heat 1").standing, "off side");
    for zone in ["Heat 2", "Heat 3", "Soak", "Jet cool"] {
        assert_eq!(chromium(zone).standing, "on side", "{zone}");
    }
    // By hand at 1 atm: 28 K of frost point and 283 K in Heat 3, 14 K in Heat 2, 32 K in Soak; the line runs at 1.025 bar.
    near(dew_leeway(chromium("Heat 2")), 14.0, 2.0);
    near(dew_leeway(chromium("Heat 3")), 28.0, 2.0);
    near(dew_leeway(chromium("Soak")), 32.0, 2.0);
    near(turn(chromium("Jet cool")), 733.0, 10.0);
    let jet = chromium("Jet cool");
    // 8 s before 500 C at 38 K/s.
    near(jet.judged_at_k - 273.15, 804.0, 1e-6);
}

#[test]
fn heron_with_the_frost_point_up() {
    let a = assessed("heron-2", Some("Frost point up 12 K"));
    let chromium = |zone| finding(&a, "Chromium oxidises", zone);
    assert_eq!(chromium("Heat 2").standing, "too close to call");
    near(turn(chromium("Heat 2")), 879.0, 10.0);
    assert_eq!(chromium("Jet cool").standing, "off side");
    near(turn(chromium("Jet cool")), 879.0, 10.0);
    assert!(chromium("Jet cool").remedies.iter().any(|r| r.lever == "rate"), "cooling faster is offered");
}

#[test]
fn heron_in_cracked_ammonia_is_bright_and_nitrides() {
    let a = assessed("heron-2", Some("75/25 gas"));
    assert_eq!(finding(&a, "Chromium oxidises", "Heat 3").standing, "on side");
    let nitride = finding(&a, "Chromium nitrides", "Jet cool");
    assert_eq!(nitride.standing, "off side");
    near(turn(nitride), 966.0, 10.0);
}

#[test]
fn the_kiln() {
    let a = assessed("kiln-k4", None);
    let burning = finding(&a, "Stone calcines", "Burning");
    assert_eq!(burning.standing, "on side");
    near(turn(burning), 806.0, 10.0);
    let finishing = finding(&a, "Stone calcines", "Finishing");
    assert_eq!(finishing.standing, "on side");
    near(turn(finishing), 789.0, 10.0);
    near(turn(finding(&a, "Stone breaks up early", "Preheat")), 814.0, 10.0);
    near(turn(finding(&a, "Lime takes CO2 back", "Cooler")), 531.0, 10.0);
    // 900 ppm SO2: sulfate holds below about 1190 C.
    near(turn(finding(&a, "Sulfate forms", "Burning")), 1190.0, 10.0);
    let fault = assessed("kiln-k4", Some("Kiln gas in the cooler"));
    let back = finding(&fault, "Lime takes CO2 back", "Cooler");
    assert_eq!(back.standing, "off side");
    near(turn(back), 779.0, 10.0);
    // False air: less carbon dioxide, so the stone turns at a lower temperature, by about 17 K.
    let air = assessed("kiln-k4", Some("False air"));
    let fall = turn(burning) - turn(finding(&air, "Stone calcines", "Burning"));
    near(fall, 17.0, 3.0);
}

#[test]
fn the_sintering_belt() {
    let a = assessed("belt-s3", None);
    assert_eq!(finding(&a, "Chromium oxidises", "Sinter").standing, "on side");
    assert_eq!(finding(&a, "Chromium films", "Dewax").standing, "off side");
    assert_eq!(finding(&a, "Chromium films", "Slow cool").standing, "off side");
    assert_eq!(finding(&a, "Iron turns blue", "Exit, hot").standing, "on side");
    assert_eq!(finding(&a, "Iron turns blue", "Exit, cold").standing, "on paper");
    // By JANAF values; a kelvin of frost point is 4 K of turn here.
    near(turn(finding(&a, "Iron turns blue", "Exit, hot")), 157.0, 12.0);
    let fault = assessed("belt-s3", Some("Weak exit curtain"));
    assert_eq!(finding(&fault, "Iron turns blue", "Exit, hot").standing, "off side");
    near(turn(finding(&fault, "Iron turns blue", "Exit, hot")), 314.0, 10.0);
}

#[test]
fn the_molybdenum_pusher() {
    let a = assessed("pusher-p7", None);
    assert_eq!(finding(&a, "Trioxide reduces", "Stage 1").standing, "on side");
    assert_eq!(finding(&a, "Metal forms early", "Stage 1").standing, "on side");
    for zone in ["Stage 2, front", "Stage 2, middle", "Stage 2, end"] {
        assert_eq!(finding(&a, "Dioxide reduces", zone).standing, "on side", "{zone}");
    }
    near(turn(finding(&a, "Metal oxidises again", "Cooler")), 223.0, 10.0);
    let fault = assessed("pusher-p7", Some("Dryer off"));
    assert_eq!(finding(&fault, "Dioxide reduces", "Stage 2, middle").standing, "on side", "hot passes");
    assert_eq!(finding(&fault, "Metal oxidises again", "Cooler").standing, "off side", "cold fails");
    near(turn(finding(&fault, "Metal oxidises again", "Cooler")), 396.0, 10.0);
}

#[test]
fn the_carburising_chamber() {
    let a = assessed("chamber-c5", None);
    assert_eq!(finding(&a, "Iron oxidises", "Carburise").standing, "on side");
    assert_eq!(finding(&a, "Soot forms", "Carburise").standing, "on side");
    // The same gas soots at 820 C; its carbon activity reaches one at 880 C and is 2.6 at 820 C.
    let soot = finding(&a, "Soot forms", "Diffuse");
    assert_eq!(soot.standing, "off side");
    near(turn(soot), 880.0, 3.0);
    let rt = 8.314_462_618e-3 * soot.judged_at_k;
    let carbon = leeway_quantity::math::exp(-soot.dg_kj.expect("a figure") / rt);
    near(carbon, 2.6, 0.1);
    for f in a.findings.iter().filter(|f| f.zone == "Carburise") {
        let s = f.shifted.as_ref().unwrap_or_else(|| panic!("{}: not shifted", f.sentence));
        assert!(s.partial_pressures_bar["CO"] > 0.15);
    }
}

#[test]
fn the_nickel_vessel() {
    let a = assessed("vessel-r210", None);
    assert_eq!(finding(&a, "Nickel oxide reduces", "Reduce").standing, "on side");
    assert_eq!(finding(&a, "Nickel oxidises", "Steam, hot").standing, "on side");
    // Q over K is 1.16 by hand: dG = RT ln(1/1.16) = -0.95 kJ.
    let lean = finding(&a, "Nickel oxidises", "Steam, lean");
    assert_eq!(lean.standing, "too close to call");
    near(lean.dg_kj.expect("a figure"), -0.95, 0.15);
    assert_eq!(finding(&a, "Nickel sulfides in bulk", "Reduce").standing, "on side");
    let fault = assessed("vessel-r210", Some("Steam valve passes"));
    assert_eq!(finding(&fault, "Nickel oxidises", "Cool under nitrogen").standing, "off side");
    let carbonyl = assessed("vessel-r210", Some("Monoxide in the cool-down"));
    assert!(carbonyl.cautions.iter().any(|c| c.title == "Metal carbonyl"));
}
