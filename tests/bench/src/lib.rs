//! A seeded line of 8 zones and 12 changes, the size the speed of the page is promised for.

use serde_json::{Value, json};

/// Numbers that look random and are the same on every run (Steele, Lea and Flood 2014, SplitMix64).
pub struct Seeded(pub u64);

impl Seeded {
    /// A number from `low` to `high`.
    pub fn between(&mut self, low: f64, high: f64) -> f64 {
        self.0 = self.0.wrapping_add(0x9e37_79b9_7f4a_7c15);
        let mut z = self.0;
        z = (z ^ (z >> 30)).wrapping_mul(0xbf58_476d_1ce4_e5b9);
        z = (z ^ (z >> 27)).wrapping_mul(0x94d0_49bb_1331_11eb);
        let unit = ((z ^ (z >> 31)) >> 11) as f64 / (1u64 << 53) as f64;
        low + (high - low) * unit
    }
}

/// The line as text.
pub fn line(seed: u64) -> String {
    let mut r = Seeded(seed);
    let zones: Vec<Value> = (0..8)
        .map(|i| {
            json!({"name": format!("Zone {}", i + 1),
                "temperature": {"value": r.between(600.0, 1150.0), "unit": "C", "tolerance": 5},
                "gas": {"basis": "dry", "balance": "N2",
                    "analysis": {"H2": {"value": r.between(5.0, 60.0), "unit": "%", "tolerance": 1},
                        "CO": {"value": r.between(0.5, 20.0), "unit": "%", "tolerance": 0.3},
                        "CO2": {"value": r.between(0.05, 1.0), "unit": "%", "tolerance": 0.02},
                        "CH4": {"value": 0.2, "unit": "%", "tolerance": 0.05}},
                    "dew_point": {"value": r.between(-45.0, 0.0), "unit": "C", "tolerance": 2, "over": "ice"}}})
        })
        .collect();
    let changes: Vec<Value> = [
        "Cr + H2O = Cr2O3 + H2", "Mn + H2O = MnO + H2", "Si + H2O = SiO2 + H2", "Fe + H2O = FeO + H2",
        "3 Fe + 4 H2O = Fe3O4 + 4 H2", "Cr + N2 = Cr2N", "Fe + Cr + H2O = FeCr2O4 + H2", "Mn + Cr + H2O = MnCr2O4 + H2",
        "2 CO = C + CO2", "Cr + CO2 = Cr2O3 + CO", "Ni + H2O = NiO + H2", "2 Cr + 1.5 O2 = Cr2O3",
    ]
    .iter()
    .enumerate()
    .map(|(i, e)| json!({"name": format!("Change {i}"), "equation": e, "wish": if i % 3 == 0 { "want" } else { "avoid" }}))
    .collect();
    json!({"leeway": 1, "name": "bench", "pressure": {"value": 1.02, "unit": "bar", "tolerance": 0.005},
        "charge": [{"substance": "Fe", "share_wt": 70}, {"substance": "Cr", "share_wt": 18}, {"substance": "Ni", "share_wt": 9},
            {"substance": "Mn", "share_wt": 1.5}, {"substance": "Si", "share_wt": 0.5}],
        "zones": zones, "changes": changes})
    .to_string()
}
