//! A zone's gas as read and shifted, and how each reading of it moves both.
//!
//! First-order doubt needs the gas at each reading moved up and down; a zone's changes share these states.

use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_gas::intake::{GasProblem, Intake};
use leeway_gas::shift::Shift;
use leeway_line::model::Zone;
use leeway_substances::Book;

/// Partial pressures over the zone's species list, bar; NaN where the gas does not show a species.
pub type State = Vec<f64>;

/// A place in a zone: what its instruments show there.
#[derive(Debug, Clone, PartialEq)]
pub struct Situation {
    /// Temperature, K.
    pub t_k: f64,
    /// Pressure, bar.
    pub p_bar: f64,
    /// Values of the gas inputs.
    pub values: Vec<f64>,
}

/// The zone's gas, taken apart once.
#[derive(Debug, Clone, PartialEq)]
pub struct ZoneGas {
    /// The reading.
    pub intake: Intake,
    /// Species of both states, those as read first.
    pub species: Vec<String>,
}

/// Which reading a branch of the fan moves.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Moved {
    /// A gas input, by index.
    Input(usize),
    /// The zone's pressure.
    Pressure,
    /// The zone's temperature.
    Temperature,
}

/// The gas with one reading moved: down and up by the standard uncertainty, down and up by root three of it.
#[derive(Debug, Clone, PartialEq)]
pub struct Branch {
    /// Which reading.
    pub moved: Moved,
    /// Its standard uncertainty, internal unit.
    pub u: f64,
    /// Gas as read at -u, +u, -w, +w with w = u root 3.
    pub read: [Option<State>; 4],
    /// Gas shifted at the same.
    pub shifted: [Option<State>; 4],
}

/// All states of a zone's gas at one place.
#[derive(Debug, Clone, PartialEq)]
pub struct Fan {
    /// The place.
    pub at: Situation,
    /// Gas as read.
    pub read: State,
    /// The analysis before scaling, as a fraction.
    pub sum: f64,
    /// Gas shifted, with what reacted; `None` where nothing does.
    pub shifted: Option<(State, &'static str)>,
    /// One branch for each reading with a tolerance.
    pub branches: Vec<Branch>,
}

/// Steps of a branch in standard uncertainties.
pub const STEPS: [f64; 4] = [-1.0, 1.0, -1.732_050_807_568_877_2, 1.732_050_807_568_877_2];

impl ZoneGas {
    /// Takes a zone's reading apart.
    ///
    /// # Errors
    /// [`GasProblem`] where the reading cannot be one gas.
    pub fn new(book: &Book, zone: &Zone) -> Result<Self, GasProblem> {
        let intake = Intake::new(book, &zone.gas)?;
        let mut species = intake.species.clone();
        for f in ["H2", "H2O", "CO", "CO2", "O2"] {
            if !species.iter().any(|s| s == f) {
                species.push(f.to_string());
            }
        }
        Ok(Self { intake, species })
    }

    /// Gas as read at a place.
    ///
    /// # Errors
    /// [`GasProblem`] where the values cannot be one gas.
    pub fn read(&self, book: &Book, shift: &Shift, at: &Situation) -> Result<(State, f64), GasProblem> {
        let taken = self.intake.take(book, shift, &at.values, at.t_k, at.p_bar)?;
        let mut state = taken.partial_pressures_bar;
        state.resize(self.species.len(), f64::NAN);
        Ok((state, taken.sum))
    }

    /// The same gas shifted at the place's temperature.
    #[must_use]
    pub fn shift(&self, book: &Book, shift: &Shift, read: &State, t_k: f64) -> Option<(State, &'static str)> {
        let gas: Vec<(&str, f64)> =
            self.species.iter().map(String::as_str).zip(read.iter().copied()).filter(|(_, p)| p.is_finite()).collect();
        let after = shift.run(book, &gas, t_k)?;
        let state = self
            .species
            .iter()
            .map(|s| after.partial_pressures_bar.iter().find(|(f, _)| f == s).map_or(f64::NAN, |(_, p)| *p))
            .collect();
        Some((state, after.how))
    }

    /// All states at a place. `u_t` and `u_p` are the standard uncertainties of temperature and pressure
    /// there; `with_shift` leaves out the shifted states where they are not asked for.
    ///
    /// # Errors
    /// [`GasProblem`] where the reading itself cannot be one gas; a branch that cannot is left empty.
    pub fn fan(
        &self,
        book: &Book,
        shift: &Shift,
        at: Situation,
        u_t: f64,
        u_p: f64,
        with_shift: bool,
    ) -> Result<Fan, GasProblem> {
        let (read, sum) = self.read(book, shift, &at)?;
        let shifted = if with_shift { self.shift(book, shift, &read, at.t_k) } else { None };
        let mut moved: Vec<(Moved, f64)> = self
            .intake
            .inputs
            .iter()
            .enumerate()
            .map(|(i, input)| (Moved::Input(i), input.quantity.u))
            .filter(|(_, u)| *u > 0.0)
            .collect();
        if u_p > 0.0 {
            moved.push((Moved::Pressure, u_p));
        }
        if u_t > 0.0 && (shifted.is_some() || self.intake.follows_temperature()) {
            moved.push((Moved::Temperature, u_t));
        }
        let branches = moved
            .into_iter()
            .map(|(moved, u)| {
                let mut branch = Branch { moved, u, read: [const { None }; 4], shifted: [const { None }; 4] };
                for (i, step) in STEPS.iter().enumerate() {
                    let mut place = at.clone();
                    match moved {
                        Moved::Input(j) => place.values[j] += step * u,
                        Moved::Pressure => place.p_bar += step * u,
                        Moved::Temperature => place.t_k += step * u,
                    }
                    let Ok((state, _)) = self.read(book, shift, &place) else { continue };
                    if shifted.is_some() {
                        branch.shifted[i] = self.shift(book, shift, &state, place.t_k).map(|(s, _)| s);
                    }
                    branch.read[i] = Some(state);
                }
                branch
            })
            .collect();
        Ok(Fan { at, read, sum, shifted, branches })
    }
}
