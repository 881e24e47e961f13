//! A reading taken apart: every instrument value an input, partial pressures a function of the inputs.
//!
//! Wet share = dry share x (1 - water share). Water from a dew point is the saturation pressure over the
//! pressure in the instrument. A zirconia cell gives p(O2) = p_ref exp(-4FE/RT) (Nernst). The balance gas
//! takes the rest; without one the analysis must add up to 97-103 % and is then scaled to 100 %.

use crate::humidity::saturation_pressure_bar;
use crate::reading::{Basis, GasReading, Surface};
use crate::shift::Shift;
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_quantity::constants::{BAR_PER_ATM, FARADAY, GAS_CONSTANT, ZERO_CELSIUS_K};
use leeway_quantity::math::{exp, sqrt};
use leeway_quantity::{Kind, Quantity, Unit};
use leeway_substances::{Book, Formula};

/// Largest distance of a sum from 100 % that is scaled away, as a fraction.
pub const SUM_LIMIT: f64 = 0.03;
/// Oxygen in dry ambient air, by volume (common practice for reference air).
pub const AIR_OXYGEN: f64 = 0.2095;
/// Dry air as a balance gas, by volume; what is not nitrogen or oxygen counts as argon.
const AIR: [(&str, f64); 3] = [("N2", 0.7808), ("O2", AIR_OXYGEN), ("Ar", 0.0097)];
/// Free oxygen beside a fuel is worth saying from 1 ppm up.
const UNBURNED: f64 = 1e-6;

/// Why a gas cannot be taken.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum GasProblem {
    /// Parts add up to too much or too little.
    #[error("found a sum of {percent:.1} % ({parts}), expected 97 to 103 %{}", if *.balance { ", or less with a balance gas" } else if *.percent < 97.0 { "; name a balance gas if the rest was not analysed" } else { "" })]
    Sum {
        /// The sum, %.
        percent: f64,
        /// The parts in words.
        parts: String,
        /// A balance gas is named.
        balance: bool,
    },
    /// A channel does not say dry or wet, and the gas holds water.
    #[error("found {formula} without a basis in a gas with water, expected \u{201c}dry\u{201d} or \u{201c}wet\u{201d}")]
    NoBasis {
        /// The channel.
        formula: String,
    },
    /// A name that is no formula.
    #[error(
        "found the gas \u{201c}{formula}\u{201d}, expected a formula such as H2, CO2 or N2, or \u{201c}air\u{201d} as the balance"
    )]
    NotAFormula {
        /// The name.
        formula: String,
    },
    /// The same component twice.
    #[error("found {formula} twice ({first} and {second}), expected it once")]
    Twice {
        /// The component.
        formula: String,
        /// First place.
        first: &'static str,
        /// Second place.
        second: &'static str,
    },
    /// A dew point outside the formula's range.
    #[error("found a dew point of {celsius:.1} C, expected -100 to 100 C")]
    DewPoint {
        /// The dew point, C.
        celsius: f64,
    },
    /// More water than pressure.
    #[error(
        "found a dew point of {celsius:.1} C, which is {water_bar:.3} bar of water in {pressure_bar:.3} bar of gas, expected less water than gas"
    )]
    AllWater {
        /// The dew point, C.
        celsius: f64,
        /// Saturation pressure, bar.
        water_bar: f64,
        /// Pressure in the instrument, bar.
        pressure_bar: f64,
    },
    /// Nothing was read.
    #[error("found no gas reading, expected an analysis, a balance gas, a dew point or a cell voltage")]
    Empty,
    /// A cell that needs data at its temperature.
    #[error("found a cell at {kelvin:.0} K, expected a temperature inside the data of H2, H2O, CO and CO2")]
    Cell {
        /// Cell temperature, K.
        kelvin: f64,
    },
}

/// What an input is.
#[derive(Debug, Clone, PartialEq)]
enum Role {
    Channel { species: usize, pressure: bool, basis: Basis },
    DewPoint { over: Surface },
    InstrumentPressure,
    CellVoltage,
    CellTemperature,
    CellReference,
}

/// One value an instrument shows.
#[derive(Debug, Clone, PartialEq)]
pub struct Input {
    /// Name for budgets: `dew point`, `H2 share`, `cell voltage`.
    pub label: String,
    /// Name of the lever it is, where it is one.
    pub lever: Option<String>,
    /// The reading.
    pub quantity: Quantity,
    role: Role,
}

/// A gas reading, taken apart and checked.
#[derive(Debug, Clone, PartialEq)]
pub struct Intake {
    /// Inputs in a fixed order.
    pub inputs: Vec<Input>,
    /// Components in a fixed order: the order of the partial pressures.
    pub species: Vec<String>,
    /// Components whose figure is an upper bound.
    pub upper_bound: Vec<bool>,
    /// Component that makes up the rest, in words.
    pub balance: Option<String>,
    /// What was assumed or converted, in sentences.
    pub notes: Vec<String>,
    balance_parts: Vec<(usize, f64)>,
    water: Option<usize>,
    derived_water: bool,
    derived_dioxide: Option<usize>,
    cell_oxygen: Option<usize>,
    cell_equilibrium: bool,
    dew_pressure: Option<usize>,
}

/// Partial pressures with what was noticed while computing them.
#[derive(Debug, Clone, PartialEq)]
pub struct Taken {
    /// Partial pressures, bar, in the order of [`Intake::species`].
    pub partial_pressures_bar: Vec<f64>,
    /// The analysis before it was scaled to 100 %, as a fraction.
    pub sum: f64,
}

impl Intake {
    /// Takes a reading apart.
    ///
    /// # Errors
    /// [`GasProblem`] for what no value could mend: a missing basis, a name that is no formula, a component
    /// given twice.
    pub fn new(book: &Book, reading: &GasReading) -> Result<Self, GasProblem> {
        let mut it = Self {
            inputs: Vec::new(),
            species: Vec::new(),
            upper_bound: Vec::new(),
            balance: reading.balance.clone(),
            notes: Vec::new(),
            balance_parts: Vec::new(),
            water: None,
            derived_water: false,
            derived_dioxide: None,
            cell_oxygen: None,
            cell_equilibrium: false,
            dew_pressure: None,
        };
        if reading.channels.is_empty()
            && reading.balance.is_none()
            && reading.dew_point.is_none()
            && reading.cell.is_none()
        {
            return Err(GasProblem::Empty);
        }
        let has = |f: &str| reading.channels.iter().any(|c| c.formula == f);
        let fuel = |f: &str| has(f) || reading.balance.as_deref() == Some(f);
        let wet_gas = reading.dew_point.is_some() || has("H2O") || (reading.cell.is_some() && fuel("H2"));
        for channel in &reading.channels {
            let formula = checked(book, &channel.formula, &mut it.notes)?;
            if it.species.contains(&formula) {
                return Err(GasProblem::Twice { formula, first: "analysis", second: "analysis" });
            }
            let pressure = channel.quantity.unit.kind() == Kind::Pressure;
            let basis = match channel.basis.or(reading.basis) {
                _ if pressure => Basis::Wet,
                _ if formula == "H2O" => channel.basis.unwrap_or(Basis::Wet),
                Some(basis) => basis,
                None if wet_gas => return Err(GasProblem::NoBasis { formula }),
                None => Basis::Wet,
            };
            let species = it.add(&formula, channel.upper_bound);
            if formula == "H2O" {
                it.water = Some(species);
            }
            it.inputs.push(Input {
                label: alloc::format!("{formula} share"),
                lever: Some(formula),
                quantity: channel.quantity,
                role: Role::Channel { species, pressure, basis },
            });
        }
        if let Some(dew) = &reading.dew_point {
            if it.water.is_some() {
                return Err(GasProblem::Twice { formula: "H2O".to_string(), first: "analysis", second: "dew point" });
            }
            it.water = Some(it.add("H2O", false));
            let below = dew.quantity.value < ZERO_CELSIUS_K;
            let over = dew.over.unwrap_or(if below { Surface::Ice } else { Surface::Water });
            if dew.over.is_none() && below {
                let as_ice = saturation_pressure_bar(dew.quantity.value, Surface::Ice);
                let as_water = saturation_pressure_bar(dew.quantity.value, Surface::Water);
                let ratio = as_ice.zip(as_water).map_or(1.0, |(i, w)| w / i);
                it.notes.push(alloc::format!(
                    "The reading below 0 C does not say ice or water: taken as frost point over ice; over water the gas would hold {ratio:.2} times as much"
                ));
            }
            let name = if over == Surface::Ice { "frost point" } else { "dew point" };
            it.inputs.push(Input {
                label: name.to_string(),
                lever: Some("dew_point".to_string()),
                quantity: dew.quantity,
                role: Role::DewPoint { over },
            });
            if let Some(p) = dew.pressure {
                it.dew_pressure = Some(it.inputs.len());
                it.inputs.push(Input {
                    label: alloc::format!("pressure of the {name} instrument"),
                    lever: None,
                    quantity: p,
                    role: Role::InstrumentPressure,
                });
            }
        }
        if let Some(name) = &reading.balance {
            let parts: Vec<(&str, f64)> =
                if name.eq_ignore_ascii_case("air") { AIR.to_vec() } else { alloc::vec![(name.as_str(), 1.0)] };
            for (part, share) in parts {
                let formula = checked(book, part, &mut it.notes)?;
                if let Some(at) = it.species.iter().position(|s| *s == formula) {
                    if name.eq_ignore_ascii_case("air") {
                        it.balance_parts.push((at, share));
                        continue;
                    }
                    return Err(GasProblem::Twice { formula, first: "analysis", second: "balance" });
                }
                let at = it.add(&formula, false);
                it.balance_parts.push((at, share));
            }
        }
        if let Some(cell) = &reading.cell {
            it.inputs.push(Input {
                label: "cell voltage".to_string(),
                lever: None,
                quantity: cell.voltage,
                role: Role::CellVoltage,
            });
            if let Some(t) = cell.temperature {
                it.inputs.push(Input {
                    label: "cell temperature".to_string(),
                    lever: None,
                    quantity: t,
                    role: Role::CellTemperature,
                });
            }
            if let Some(r) = cell.reference_bar {
                it.inputs.push(Input {
                    label: "cell reference".to_string(),
                    lever: None,
                    quantity: r,
                    role: Role::CellReference,
                });
            }
            let holds = |s: &str, it: &Self| it.species.iter().any(|x| x == s);
            let (h2, co) = (holds("H2", &it), holds("CO", &it));
            if h2 || co {
                it.cell_equilibrium = true;
                if h2 && it.water.is_none() {
                    it.water = Some(it.add("H2O", false));
                    it.derived_water = true;
                    it.notes
                        .push("Water is from the cell voltage and the hydrogen, at the cell's temperature".to_string());
                }
                if co && !holds("CO2", &it) {
                    it.derived_dioxide = Some(it.add("CO2", false));
                    it.notes.push(
                        "CO2 is from the cell voltage and the carbon monoxide, at the cell's temperature".to_string(),
                    );
                }
                if !it.derived_water && it.derived_dioxide.is_none() {
                    it.notes.push("The cell voltage is a second witness of the oxygen potential; the analysis is what counts here".to_string());
                }
            } else if holds("O2", &it) {
                it.notes.push("Oxygen is read twice; the analysis is what counts here, not the cell".to_string());
            } else {
                it.cell_oxygen = Some(it.add("O2", false));
            }
        }
        let at = |s: &str| it.species.iter().position(|x| x == s);
        if let (Some(_), true) = (at("O2"), at("H2").is_some() || at("CO").is_some()) {
            it.notes.push(
                "Free oxygen beside hydrogen or carbon monoxide: an unburned mixture as read; shifted, the oxygen is burnt".to_string(),
            );
        }
        Ok(it)
    }

    fn add(&mut self, formula: &str, upper_bound: bool) -> usize {
        self.species.push(formula.to_string());
        self.upper_bound.push(upper_bound);
        self.species.len() - 1
    }

    /// The values of all inputs, in internal units.
    #[must_use]
    pub fn values(&self) -> Vec<f64> {
        self.inputs.iter().map(|i| i.quantity.value).collect()
    }

    /// Whether free oxygen stands beside a fuel in these partial pressures.
    #[must_use]
    pub fn unburned(&self, partial_pressures_bar: &[f64]) -> bool {
        let of = |f: &str| self.species.iter().position(|s| s == f).map_or(0.0, |i| partial_pressures_bar[i]);
        let total: f64 = partial_pressures_bar[..self.species.len()].iter().sum();
        let read = self.species.iter().position(|s| s == "O2").is_some_and(|i| !self.upper_bound[i]);
        read && of("O2") > UNBURNED * total && of("H2") + of("CO") > UNBURNED * total
    }

    /// Partial pressures for given values of the inputs, at the zone's temperature (for a cell in place) and
    /// pressure.
    ///
    /// # Errors
    /// [`GasProblem`] where the values cannot be one gas.
    pub fn take(&self, book: &Book, shift: &Shift, values: &[f64], t_k: f64, p_bar: f64) -> Result<Taken, GasProblem> {
        let mut x = alloc::vec![0.0f64; self.species.len()];
        let find = |role: fn(&Role) -> bool| self.inputs.iter().position(|i| role(&i.role)).map(|i| values[i]);
        let cell_k = find(|r| matches!(r, Role::CellTemperature)).unwrap_or(t_k);
        let cell_oxygen_bar = find(|r| matches!(r, Role::CellVoltage)).map(|volt| {
            let reference = find(|r| matches!(r, Role::CellReference)).unwrap_or(AIR_OXYGEN * BAR_PER_ATM);
            reference * exp(-4.0 * FARADAY * volt / (GAS_CONSTANT * cell_k))
        });
        // Water first: dry shares need it.
        let mut water = 0.0;
        for (input, &value) in self.inputs.iter().zip(values) {
            match input.role {
                Role::DewPoint { over } => {
                    let celsius = Unit::Celsius.from_internal(value);
                    let saturated = saturation_pressure_bar(value, over).ok_or(GasProblem::DewPoint { celsius })?;
                    let pressure = self.dew_pressure.map_or(p_bar, |i| values[i]);
                    if saturated >= pressure {
                        return Err(GasProblem::AllWater { celsius, water_bar: saturated, pressure_bar: pressure });
                    }
                    water = saturated / pressure;
                }
                Role::Channel { species, pressure, basis } if Some(species) == self.water => {
                    water = match (pressure, basis) {
                        (true, _) => value / p_bar,
                        (false, Basis::Wet) => value,
                        (false, Basis::Dry) => value / (1.0 + value),
                    };
                }
                _ => {}
            }
        }
        if self.derived_water {
            water = self.water_from_cell(book, shift, values, cell_k, cell_oxygen_bar.unwrap_or(0.0), p_bar)?;
        }
        if let Some(w) = self.water {
            x[w] = water;
        }
        let mut others = 0.0;
        for (input, &value) in self.inputs.iter().zip(values) {
            if let Role::Channel { species, pressure, basis } = input.role {
                if Some(species) == self.water {
                    continue;
                }
                x[species] = match (pressure, basis) {
                    (true, _) => value / p_bar,
                    (false, Basis::Wet) => value,
                    (false, Basis::Dry) => value * (1.0 - water),
                };
                others += x[species];
            }
        }
        if let (Some(at), Some(oxygen)) = (self.derived_dioxide, cell_oxygen_bar) {
            let co = self.species.iter().position(|s| s == "CO").map_or(0.0, |i| x[i]);
            let k = shift.k_monoxide(book, cell_k).ok_or(GasProblem::Cell { kelvin: cell_k })?;
            x[at] = co * sqrt(k * oxygen);
            others += x[at];
        }
        if let (Some(at), Some(oxygen)) = (self.cell_oxygen, cell_oxygen_bar) {
            x[at] = oxygen / p_bar;
            others += x[at];
        }
        let sum = water + others;
        let parts = || {
            let mut parts: Vec<String> = Vec::new();
            for (s, share) in self.species.iter().zip(&x) {
                if *share > 0.0 {
                    parts.push(alloc::format!("{s} {:.2} %", share * 100.0));
                }
            }
            parts.join(", ")
        };
        let refuse = |balance: bool| GasProblem::Sum { percent: sum * 100.0, parts: parts(), balance };
        if self.balance_parts.is_empty() {
            if (sum - 1.0).abs() > SUM_LIMIT || others <= 0.0 {
                return Err(refuse(false));
            }
            let scale = (1.0 - water) / others;
            for (i, share) in x.iter_mut().enumerate() {
                if Some(i) != self.water {
                    *share *= scale;
                }
            }
        } else {
            let rest = 1.0 - sum;
            if rest < -SUM_LIMIT || water >= 1.0 {
                return Err(refuse(true));
            }
            if rest >= 0.0 {
                for &(i, share) in &self.balance_parts {
                    x[i] += rest * share;
                }
            } else {
                let scale = (1.0 - water) / others;
                for (i, share) in x.iter_mut().enumerate() {
                    if Some(i) != self.water {
                        *share *= scale;
                    }
                }
            }
        }
        Ok(Taken { partial_pressures_bar: x.into_iter().map(|s| s * p_bar).collect(), sum })
    }

    /// Water share from p(H2O)/p(H2) = sqrt(K p(O2)) at the cell; a dry hydrogen share closes on itself.
    fn water_from_cell(
        &self,
        book: &Book,
        shift: &Shift,
        values: &[f64],
        cell_k: f64,
        oxygen_bar: f64,
        p_bar: f64,
    ) -> Result<f64, GasProblem> {
        let k = shift.k_hydrogen(book, cell_k).ok_or(GasProblem::Cell { kelvin: cell_k })?;
        let ratio = sqrt(k * oxygen_bar);
        let h2 = self.species.iter().position(|s| s == "H2");
        let channel = self.inputs.iter().zip(values).find_map(|(input, &v)| match input.role {
            Role::Channel { species, pressure, basis } if Some(species) == h2 => Some((v, pressure, basis)),
            _ => None,
        });
        Ok(match channel {
            Some((v, true, _)) => ratio * v / p_bar,
            Some((v, false, Basis::Wet)) => ratio * v,
            Some((v, false, Basis::Dry)) => ratio * v / (1.0 + ratio * v),
            None => {
                // Hydrogen is the balance: it takes what the wet channels and the water leave.
                let dry: f64 = self
                    .inputs
                    .iter()
                    .zip(values)
                    .filter_map(|(i, &v)| matches!(i.role, Role::Channel { pressure: false, .. }).then_some(v))
                    .sum();
                ratio * (1.0 - dry) / (1.0 + ratio)
            }
        })
    }

    /// The largest value a channel can take before the rest is used up, in its internal unit; `None` where
    /// the input is no share.
    #[must_use]
    pub fn ceiling(&self, input: usize, values: &[f64], water_share: f64, p_bar: f64) -> Option<f64> {
        let Role::Channel { pressure, basis, .. } = self.inputs[input].role else { return None };
        let mut room = 1.0 - water_share;
        for (i, (other, &v)) in self.inputs.iter().zip(values).enumerate() {
            if let Role::Channel { species, pressure, basis } = other.role
                && i != input
                && Some(species) != self.water
            {
                room -= match (pressure, basis) {
                    (true, _) => v / p_bar,
                    (false, Basis::Wet) => v,
                    (false, Basis::Dry) => v * (1.0 - water_share),
                };
            }
        }
        let room = room.max(0.0);
        Some(match (pressure, basis) {
            (true, _) => room * p_bar,
            (false, Basis::Wet) => room,
            (false, Basis::Dry) => room / (1.0 - water_share),
        })
    }

    /// Surface of the dew-point input, where there is one.
    #[must_use]
    pub fn dew_surface(&self) -> Option<Surface> {
        self.inputs.iter().find_map(|i| match i.role {
            Role::DewPoint { over } => Some(over),
            _ => None,
        })
    }

    /// Whether the gas depends on the zone's temperature: a cell in place.
    #[must_use]
    pub fn follows_temperature(&self) -> bool {
        self.inputs.iter().any(|i| i.role == Role::CellVoltage)
            && !self.inputs.iter().any(|i| i.role == Role::CellTemperature)
            && (self.derived_water || self.derived_dioxide.is_some() || self.cell_oxygen.is_some())
    }
}

fn checked(book: &Book, name: &str, notes: &mut Vec<String>) -> Result<String, GasProblem> {
    let bare = name.trim().trim_end_matches("(g)");
    if Formula::parse(bare).is_err() {
        return Err(GasProblem::NotAFormula { formula: name.to_string() });
    }
    if book.find(bare).is_none() {
        notes.push(alloc::format!("{bare} is not in the data: it counts as a gas that takes no part"));
    }
    Ok(bare.to_string())
}
