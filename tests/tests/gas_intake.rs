//! Gas as instruments give it, through the whole engine: what a reading means in the zone, and what is refused.
//!
//! The figures are arithmetic on Sonntag (1990) vapour pressures, worked by hand, unless a source stands beside them.

use leeway_api::response::{Assessment, Zone};
use leeway_tests::session;
use serde_json::{Value, json};

fn line(gas: Value, pressure: Value) -> String {
    json!({"leeway": 1, "name": "t", "pressure": pressure, "charge": [{"substance": "Cr"}],
        "zones": [{"name": "Z", "temperature": {"value": 1000, "unit": "C", "tolerance": 5}, "gas": gas}],
        "changes": [{"name": "Chromium oxidises", "equation": "2 Cr + 3 H2O = Cr2O3 + 3 H2", "wish": "avoid"}]})
    .to_string()
}

fn assessed(gas: Value, bar: f64) -> Assessment {
    session().assess(&line(gas, json!({"value": bar, "unit": "bar"}))).unwrap_or_else(|p| panic!("{}", p.message))
}

fn zone(gas: Value, bar: f64) -> Zone {
    assessed(gas, bar).zones.remove(0)
}

fn ppm(z: &Zone, formula: &str) -> f64 {
    z.partial_pressures_bar[formula] / z.pressure_bar * 1e6
}

#[track_caller]
fn relative(found: f64, wanted: f64, within: f64) {
    assert!((found / wanted - 1.0).abs() <= within, "found {found}, wanted {wanted}");
}

fn dew(celsius: f64, over: &str) -> Value {
    json!({"value": celsius, "unit": "C", "over": over})
}

#[test]
fn frost_and_dew_point_are_not_the_same() {
    let hydrogen = |d: Value| zone(json!({"balance": "H2", "dew_point": d}), 1.01325);
    relative(ppm(&hydrogen(dew(-40.0, "ice")), "H2O"), 126.7, 0.002);
    relative(ppm(&hydrogen(dew(-40.0, "water")), "H2O"), 187.8, 0.002);
    // The same gas read either way: -43.75 C dew point is -40.0 C frost point within 0.1 K.
    let z = hydrogen(dew(-43.75, "water"));
    assert!((z.frost_point_k.expect("water") - 233.15).abs() < 0.1, "{:?}", z.frost_point_k);
    // Not said: frost point, and the note says what the other would mean.
    let z = hydrogen(json!({"value": -40, "unit": "C"}));
    relative(ppm(&z, "H2O"), 126.7, 0.002);
    assert!(z.notes.iter().any(|n| n.contains("1.48")), "{:?}", z.notes);
    // In Fahrenheit, where both scales meet.
    relative(ppm(&hydrogen(json!({"value": -40, "unit": "F", "over": "ice"})), "H2O"), 126.7, 0.002);
}

#[test]
fn pressure_of_the_instrument_and_of_the_site() {
    // Read at 5 bar in the sample line, -40 C is -53 C at 1 atm.
    let z = zone(
        json!({"balance": "H2", "dew_point": {"value": -40, "unit": "C", "over": "ice", "pressure": {"value": 5, "unit": "bar"}}}),
        1.01325,
    );
    assert!((z.frost_point_k.expect("water") - 273.15 + 53.0).abs() < 0.5, "{:?}", z.frost_point_k);
    // At 2000 m (79.5 kPa) -40 C is 161 ppm, not 127.
    relative(ppm(&zone(json!({"balance": "H2", "dew_point": dew(-40.0, "ice")}), 0.795), "H2O"), 161.0, 0.005);
}

#[test]
fn dry_shares_become_wet() {
    // 40 % dry at 20 % moisture is 32 % wet.
    let z = zone(
        json!({"basis": "dry", "balance": "N2", "analysis": {"CO2": {"value": 40, "unit": "%"}, "H2O": {"value": 20, "unit": "%", "basis": "wet"}}}),
        1.0,
    );
    relative(z.partial_pressures_bar["CO2"], 0.32, 1e-12);
    relative(z.partial_pressures_bar["H2O"], 0.20, 1e-12);
    relative(z.partial_pressures_bar["N2"], 0.48, 1e-12);
    // Each channel may say its own.
    let z = zone(
        json!({"basis": "dry", "balance": "N2", "analysis": {"CO2": {"value": 40, "unit": "%", "basis": "wet"}, "H2O": {"value": 20, "unit": "%"}}}),
        1.0,
    );
    relative(z.partial_pressures_bar["CO2"], 0.40, 1e-12);
    // The same gas in every unit a site uses.
    for co2 in [
        json!({"value": 0.2, "unit": "%"}),
        json!({"value": 2000, "unit": "ppm"}),
        json!({"value": 0.002, "unit": "fraction"}),
        json!({"value": 4, "unit": "mbar"}),
        json!({"value": 400, "unit": "Pa"}),
        json!({"value": 2e6, "unit": "ppb"}),
    ] {
        let z = zone(json!({"basis": "wet", "balance": "N2", "analysis": {"CO2": co2}}), 2.0);
        relative(z.partial_pressures_bar["CO2"], 0.004, 1e-12);
    }
}

#[test]
fn sums_are_scaled_or_refused() {
    let analysis = |h2: f64| json!({"basis": "wet", "analysis": {"H2": {"value": h2, "unit": "%"}, "N2": {"value": 25, "unit": "%"}}});
    let z = zone(analysis(76.0), 1.0);
    relative(z.partial_pressures_bar["H2"], 76.0 / 101.0, 1e-12);
    assert!(z.notes.iter().any(|n| n.contains("101")), "{:?}", z.notes);
    for bad in [85.0, 70.0] {
        let a = assessed(analysis(bad), 1.0);
        let p = a.zones[0].refused.as_ref().expect("refused");
        assert!(p.message.contains(&format!("{:.1} %", bad + 25.0)) && p.at == "zones[0].gas", "{p:?}");
        assert_eq!(a.findings[0].standing, "no data");
    }
    // With a balance gas the rest is its own; too much is refused all the same.
    relative(
        zone(json!({"basis": "wet", "balance": "N2", "analysis": {"H2": {"value": 70, "unit": "%"}}}), 1.0)
            .partial_pressures_bar["N2"],
        0.3,
        1e-12,
    );
    let over = json!({"basis": "wet", "balance": "Ar", "analysis": {"H2": {"value": 80, "unit": "%"}, "N2": {"value": 25, "unit": "%"}}});
    assert!(assessed(over, 1.0).zones[0].refused.is_some());
    // A channel that does not say dry or wet in a gas with water is refused, not assumed.
    let unsaid =
        json!({"balance": "N2", "analysis": {"H2": {"value": 75, "unit": "%"}}, "dew_point": dew(-40.0, "ice")});
    let a = assessed(unsaid, 1.0);
    assert!(a.zones[0].refused.as_ref().is_some_and(|p| p.message.contains("dry")), "{:?}", a.zones[0].refused);
    // More water than gas.
    let a = assessed(json!({"balance": "H2", "dew_point": dew(99.0, "water")}), 0.5);
    assert!(a.zones[0].refused.as_ref().is_some_and(|p| p.message.contains("99.0")));
}

#[test]
fn oxygen_beside_a_fuel_is_unburned_and_shifts_to_water() {
    let a = assessed(
        json!({"basis": "dry", "balance": "H2", "analysis": {"O2": {"value": 50, "unit": "ppm"}}, "dew_point": dew(-60.0, "ice")}),
        1.01325,
    );
    assert!(a.cautions.iter().any(|c| c.title == "Oxygen in a gas that burns"), "{:?}", a.cautions);
    assert!(a.zones[0].notes.iter().any(|n| n.contains("unburned")));
    let shifted = a.zones[0].shifted_partial_pressures_bar.as_ref().expect("it burns");
    // 10.67 ppm of the frost point and twice the oxygen.
    relative(shifted["H2O"] / 1.01325 * 1e6, 110.7, 0.005);
    assert!(!shifted.contains_key("O2"));
    // The verdict differs between the two, and says so.
    let wet = assessed(
        json!({"basis": "dry", "balance": "H2", "analysis": {"O2": {"value": 2000, "unit": "ppm"}}, "dew_point": dew(-60.0, "ice")}),
        1.01325,
    );
    let f = &wet.findings[0];
    assert_eq!((f.standing.as_str(), f.shifted.as_ref().expect("shifted").standing.as_str()), ("on side", "off side"));
    assert!(f.notes.iter().any(|n| n.contains("another standing")), "{:?}", f.notes);
}

#[test]
fn a_detection_limit_is_an_upper_bound() {
    let gas = |co2: f64| json!({"basis": "dry", "balance": "N2", "analysis": {"CO2": {"value": co2, "unit": "ppm", "bound": "upper"}}});
    let one = |co2: f64, equation: &str, wish: &str| {
        let text = json!({"leeway": 1, "pressure": {"value": 1, "unit": "bar"}, "zones": [{"name": "Z", "temperature": {"value": 700, "unit": "C"}, "gas": gas(co2)}],
            "changes": [{"name": "c", "equation": equation, "wish": wish}]}).to_string();
        session().assess(&text).unwrap_or_else(|p| panic!("{}", p.message)).findings.remove(0)
    };
    // Stone at 700 C turns near 0.03 bar of CO2. At most 100 ppm: it goes, whatever the true figure is.
    assert_eq!(one(100.0, "CaCO3 = CaO + CO2", "want").standing, "on side");
    // At most 20 %: it may or may not. The figure at the limit says no, less could say yes.
    assert_eq!(one(200_000.0, "CaCO3 = CaO + CO2", "want").standing, "too close to call");
    // Taken up, the other way round: at most 100 ppm cannot carbonate the lime.
    assert_eq!(one(100.0, "CaO + CO2 = CaCO3", "avoid").standing, "on side");
    assert_eq!(one(200_000.0, "CaO + CO2 = CaCO3", "avoid").standing, "too close to call");
    // A reading of exactly zero is no figure.
    let f = one(0.0, "CaCO3 = CaO + CO2", "want");
    assert_eq!(f.standing, "no data");
    assert!(f.sentence.contains("detection limit"), "{}", f.sentence);
}

#[test]
fn cell_and_hydrogen_give_the_water() {
    // 75 % H2, -40 C frost point, 1050 C: 1355 mV in place; a kelvin is 6.5 mV (worked by hand from JANAF values).
    let z = zone(
        json!({"basis": "dry", "balance": "N2", "analysis": {"H2": {"value": 75, "unit": "%"}},
        "oxygen_cell": {"value": 1355, "unit": "mV", "temperature": {"value": 1050, "unit": "C"}}}),
        1.01325,
    );
    assert!((z.frost_point_k.expect("water") - 233.15).abs() < 0.5, "{:?}", z.frost_point_k);
    let z = zone(
        json!({"basis": "dry", "balance": "N2", "analysis": {"H2": {"value": 75, "unit": "%"}},
        "oxygen_cell": {"value": 1330, "unit": "mV", "temperature": {"value": 1050, "unit": "C"}}}),
        1.01325,
    );
    assert!((z.frost_point_k.expect("water") - 237.15).abs() < 0.7, "{:?}", z.frost_point_k);
    // 20 % CO and 1136 mV at 925 C: 0.153 % CO2 (Boudouard and austenite relations, worked by hand).
    let z = zone(
        json!({"basis": "dry", "balance": "N2", "analysis": {"CO": {"value": 20, "unit": "%"}, "H2": {"value": 40, "unit": "%"}},
        "oxygen_cell": {"value": 1136.1, "unit": "mV", "temperature": {"value": 925, "unit": "C"}}}),
        1.01325,
    );
    let dry = 1.0 - z.partial_pressures_bar["H2O"] / z.pressure_bar;
    relative(z.partial_pressures_bar["CO2"] / z.pressure_bar / dry, 0.00153, 0.03);
}

#[test]
fn oxygen_comes_from_its_carriers() {
    let text = |equation: &str| {
        json!({"leeway": 1, "pressure": {"value": 1, "unit": "bar"}, "zones": [{"name": "Z", "temperature": {"value": 1000, "unit": "C", "tolerance": 5},
            "gas": {"balance": "H2", "dew_point": {"value": -40, "unit": "C", "over": "ice", "tolerance": 1}}}],
            "changes": [{"name": "c", "equation": equation, "wish": "avoid"}]}).to_string()
    };
    let by_oxygen = session().assess(&text("2 Cr + 1.5 O2 = Cr2O3")).expect("a line").findings.remove(0);
    let by_water = session().assess(&text("2 Cr + 3 H2O = Cr2O3 + 3 H2")).expect("a line").findings.remove(0);
    assert!((by_oxygen.dg_kj.expect("kJ") - by_water.dg_kj.expect("kJ")).abs() < 1e-9);
    assert!(by_oxygen.notes.iter().any(|n| n.contains("H2O over H2")));
    assert_eq!(by_oxygen.levers[0].turning_points, by_water.levers[0].turning_points);
    // A gas that shows neither: no data, and the words say what is missing.
    let none = session().assess(&text("Cr + CO2 = Cr2O3 + CO")).expect("a line").findings.remove(0);
    assert_eq!(none.standing, "no data");
    assert!(none.sentence.contains("CO2 and CO") && none.sentence.contains("H2O"), "{}", none.sentence);
}
