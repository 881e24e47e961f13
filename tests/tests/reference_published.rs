//! Every row of `reference/published.csv` through the engine: published measurements, standards and recomputed values, the
//! source beside each in the table. A quantity that this file does not know fails.

use leeway_api::request::ChangeRequest;
use leeway_api::response::Reaction;
use leeway_gas::humidity::{frost_point_k, saturation_pressure_bar};
use leeway_gas::intake::Intake;
use leeway_gas::reading::{Cell, GasReading, Surface};
use leeway_gas::shift::Shift;
use leeway_quantity::constants::{BAR_PER_ATM, FARADAY, GAS_CONSTANT};
use leeway_quantity::math::{exp, ln};
use leeway_quantity::{Quantity, Unit};
use leeway_reactions::root;
use leeway_substances::{Book, Formula};
use leeway_tests::{session, table};
use std::collections::BTreeMap;

const KELVIN: f64 = 273.15;

/// Arguments of a row: `temperature=800 C; O2=0.01 of volume at 1 atm`.
struct Arguments(BTreeMap<String, String>);

impl Arguments {
    fn new(text: &str) -> Self {
        let pairs = text.split("; ").filter(|p| !p.is_empty());
        Self(pairs.map(|p| p.split_once('=').unwrap_or((p, ""))).map(|(a, b)| (a.into(), b.into())).collect())
    }
    fn has(&self, name: &str) -> bool {
        self.0.contains_key(name)
    }
    fn text(&self, name: &str) -> &str {
        self.0.get(name).unwrap_or_else(|| panic!("no {name} among {:?}", self.0))
    }
    fn value(&self, name: &str) -> (f64, &str) {
        let text = self.text(name);
        let (number, unit) = text.split_once(' ').unwrap_or((text, ""));
        (number.parse().unwrap_or_else(|_| panic!("{name}={text}")), unit)
    }
    fn number(&self, name: &str, unit: &str) -> f64 {
        let (number, found) = self.value(name);
        assert_eq!(found, unit, "unit of {name}");
        number
    }
    fn kelvin(&self, name: &str) -> f64 {
        match self.value(name) {
            (t, "C") => t + KELVIN,
            (t, "K") => t,
            (_, other) => panic!("{name} in {other}"),
        }
    }
    fn bar(&self, name: &str) -> f64 {
        match self.value(name) {
            (p, "bar") => p,
            (p, "atm" | "of volume at 1 atm") => p * BAR_PER_ATM,
            (_, other) => panic!("{name} in {other}"),
        }
    }
}

struct Engine {
    session: leeway_api::Session,
    book: Book,
    shift: Shift,
}

impl Engine {
    fn new() -> Self {
        let book = Book::parse(leeway_dataset::TEXT).expect("data");
        Self { session: session(), shift: Shift::new(&book), book }
    }

    fn change(&self, request: &ChangeRequest) -> Reaction {
        self.session.change(request).unwrap_or_else(|p| panic!("{}: {}", request.equation, p.message)).remove(0)
    }
    fn at(&self, equation: &str, t_k: f64) -> Reaction {
        self.change(&ChangeRequest {
            equation: equation.into(),
            at: vec![format!("{t_k} K")],
            ..ChangeRequest::default()
        })
    }
    fn ln_k(&self, equation: &str, t_k: f64) -> f64 {
        self.at(equation, t_k).log10_k * core::f64::consts::LN_10
    }
    /// H2O/H2 at which nothing is left to drive the equation, from the count of H2 on either side.
    fn water_ratio(&self, equation: &str, t_k: f64) -> f64 {
        let count = coefficient(equation, "H2");
        exp(self.ln_k(equation, t_k) / count.abs() * if count < 0.0 { 1.0 } else { -1.0 })
    }
    /// The only temperature at which the change turns, C.
    fn turns_c(&self, equation: &str, activities: &[String]) -> f64 {
        let request =
            ChangeRequest { equation: equation.into(), activities: activities.to_vec(), ..ChangeRequest::default() };
        let turns = self.change(&request).turning_temperatures_k;
        // A second turn may stand at the cold end; the published one is the highest.
        turns.into_iter().reduce(f64::max).unwrap_or_else(|| panic!("{equation} does not turn")) - KELVIN
    }
    /// Oxygen that the engine takes from a cell's voltage, bar.
    fn oxygen_bar(&self, millivolt: f64, t_k: f64, air_bar: f64) -> f64 {
        let reading = GasReading {
            balance: Some("N2".into()),
            cell: Some(Cell {
                voltage: Quantity::new(millivolt, Unit::Millivolt).expect("a voltage"),
                temperature: None,
                reference_bar: Some(Quantity::new(air_bar, Unit::Bar).expect("a pressure")),
            }),
            ..GasReading::default()
        };
        let intake = Intake::new(&self.book, &reading).expect("a reading");
        let taken = intake.take(&self.book, &self.shift, &intake.values(), t_k, BAR_PER_ATM).expect("a gas");
        taken.partial_pressures_bar[intake.species.iter().position(|s| s == "O2").expect("oxygen")]
    }
    /// The voltage, mV, at which the engine takes this oxygen.
    fn millivolt(&self, oxygen_bar: f64, t_k: f64, air_bar: f64) -> f64 {
        let nernst = 1e3 * GAS_CONSTANT * t_k / (4.0 * FARADAY) * ln(air_bar / oxygen_bar);
        root(|mv| ln(self.oxygen_bar(mv, t_k, air_bar) / oxygen_bar), nernst - 20.0, nernst + 20.0)
    }
}

/// Coefficient of a formula, negative on the left.
fn coefficient(equation: &str, formula: &str) -> f64 {
    let (left, right) = equation.split_once(" = ").expect("an equation");
    for (side, sign) in [(left, -1.0), (right, 1.0)] {
        for term in side.split(" + ") {
            let (n, name) = term.split_once(' ').map_or((1.0, term), |(n, f)| (n.parse().expect("a number"), f));
            if name == formula {
                return sign * n;
            }
        }
    }
    panic!("no {formula} in {equation}")
}

fn ice(t_k: f64) -> f64 {
    saturation_pressure_bar(t_k, Surface::Ice).expect("inside the range")
}

fn frost_c(water_bar: f64) -> f64 {
    frost_point_k(water_bar, Surface::Ice).expect("inside the range") - KELVIN
}

/// Temperature at which two changes ask for the same H2O/H2, K.
fn lines_meet(engine: &Engine, one: &str, other: &str) -> f64 {
    root(|t| ln(engine.water_ratio(one, t)) - ln(engine.water_ratio(other, t)), 790.0, 910.0)
}

fn found(engine: &Engine, quantity: &str, a: &Arguments) -> f64 {
    let surface = |s| saturation_pressure_bar(a.kelvin("temperature"), s).expect("inside the range") * 1e5;
    match quantity {
        "vapour pressure over ice" => return surface(Surface::Ice),
        "vapour pressure over water" | "vapour pressure over supercooled water" => return surface(Surface::Water),
        "water at the frost point" => return ice(a.kelvin("frost point")) / a.bar("pressure") * 1e6,
        "oxygen cell voltage against air" => {
            return engine.millivolt(a.bar("O2"), a.kelvin("temperature"), a.bar("air"));
        }
        "oxygen cell voltage in place from hydrogen and frost point" => {
            let (t, pressure) = (a.kelvin("temperature"), a.bar("pressure"));
            let ratio = ice(a.kelvin("frost point")) / (a.number("H2", "of volume") * pressure);
            let oxygen = ratio * ratio / exp(engine.ln_k("2 H2(g) + O2 = 2 H2O(g)", t));
            return engine.millivolt(oxygen, t, 0.2095 * pressure);
        }
        "frost point after trace oxygen has burned in hydrogen" => {
            let oxygen = a.number("O2", "ppm of volume") * 1e-6 * a.bar("pressure");
            let gas = [("H2", a.bar("pressure") - oxygen), ("O2", oxygen)];
            let after = engine.shift.run(&engine.book, &gas, 1000.0).expect("it burns").partial_pressures_bar;
            return frost_c(after.iter().find(|(f, _)| f == "H2O").expect("water").1);
        }
        "dG of the textbook case" | "temperature where the textbook case turns" => {
            let per_mole = |name: &str| a.text(name).replace("/(mol K)", "/K").replace("/mol", "");
            let at = if a.has("temperature") { a.text("temperature") } else { "298.15 K" };
            let r = engine.change(&ChangeRequest {
                equation: "CaCO3 = CaO + CO2".into(),
                at: vec![at.into()],
                dh: Some(per_mole("dH")),
                ds: Some(per_mole("dS")),
                ..ChangeRequest::default()
            });
            return if quantity.starts_with("dG") { r.dg_kj } else { r.turning_temperatures_k[0] };
        }
        _ => {}
    }
    let of = |start: &str| quantity.strip_prefix(start);
    let between = |start: &str, end: &str| of(start).and_then(|rest| rest.strip_suffix(end));
    if let Some(equation) = of("equilibrium constant of ") {
        exp(engine.ln_k(equation, a.kelvin("temperature")))
    } else if let Some(equation) = between("temperature where ", " has K = 1") {
        engine.turns_c(equation, &[])
    } else if let Some(equation) = between("temperature where ", " turns") {
        let activities: Vec<String> = a.0.keys().map(|f| format!("{f}={}", a.bar(f))).collect();
        engine.turns_c(equation, &activities)
    } else if let Some((one, other)) =
        between("temperature where the lines of ", " meet").and_then(|pair| pair.split_once(" and "))
    {
        lines_meet(engine, one, other)
    } else if let Some(equation) = of("H2O/H2 over ") {
        engine.water_ratio(equation, a.kelvin("temperature"))
    } else if let Some(equation) = of("H2/H2O over ") {
        1.0 / engine.water_ratio(equation, a.kelvin("temperature"))
    } else if let Some(equation) = of("oxygen pressure over ") {
        exp(engine.ln_k(equation, a.kelvin("temperature")) / coefficient(equation, "O2"))
    } else if let Some(equation) = of("nitrogen pressure over ") {
        exp(engine.ln_k(equation, a.kelvin("temperature")) / coefficient(equation, "N2"))
    } else if let Some(equation) = between("frost point where ", " turns") {
        // An alloy's element: ln Q holds its activity to the power of its coefficient.
        let (t, activity) = (a.kelvin("temperature"), a.number("activity of Cr", ""));
        let ln_q = coefficient(equation, "Cr") * ln(activity);
        let hydrogens = coefficient(equation, "H2");
        let ratio = exp((ln_q - engine.ln_k(equation, t)) / hydrogens);
        frost_c(ratio / (1.0 + ratio) * a.bar("pressure"))
    } else if let Some(equation) = between("heat of ", " per t of CaO") {
        let mass = Formula::parse("CaO").expect("a formula").molar_mass();
        engine.at(equation, a.kelvin("temperature")).dh_kj / mass
    } else if let Some(equation) = of("heat of ") {
        engine.at(equation, a.kelvin("temperature")).dh_kj
    } else if let Some((_, oxide)) = of("CO2 from ").and_then(|rest| rest.split_once(" per t of ")) {
        let mass = |f: &str| Formula::parse(f).expect("a formula").molar_mass();
        1e3 * mass("CO2") / mass(oxide)
    } else {
        panic!("{quantity}: this test does not know it")
    }
}

#[test]
fn every_published_value() {
    let engine = Engine::new();
    let (mut failed, mut ids) = (Vec::new(), std::collections::BTreeSet::new());
    for row in table("reference/published.csv") {
        let number = |name: &str| row[name].parse::<f64>().unwrap_or_else(|_| panic!("{name} of {row:?}"));
        let value = found(&engine, &row["quantity"], &Arguments::new(&row["arguments"]));
        let wanted = number("value");
        let off = match row["tolerance_kind"].as_str() {
            "relative" => (value / wanted - 1.0).abs(),
            "absolute" => (value - wanted).abs(),
            other => panic!("{other} is no kind of tolerance"),
        };
        assert!(!row["source"].is_empty(), "{row:?}: without a source");
        let line = format!(
            "{} {}, {}: {value:.5}, published {wanted} {}, off {off:.4} of {} {}",
            row["id"], row["quantity"], row["arguments"], row["unit"], row["tolerance"], row["tolerance_kind"]
        );
        if off.is_nan() || off > number("tolerance") {
            failed.push(line);
        }
        ids.insert(row["id"].clone());
    }
    assert!(failed.is_empty(), "{failed:#?}");
    let wanted =
        [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 13, 14, 15, 18, 21, 23, 24, 25, 26, 27, 29, 30, 38, 39, 40, 44, 52];
    for id in wanted {
        assert!(ids.contains(&id.to_string()), "row {id} is missing");
    }
    assert!(ids.contains("textbook"));
}
