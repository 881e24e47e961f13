//! What the engine answers, as both bindings hand it on. Units stand in the names.
//!
//! Numbers are in full precision: rounding belongs to whoever shows them to people. The fields that
//! `leeway assess --json`, `leeway change --json` promise to programs are all here; the rest serves the page.

use alloc::collections::BTreeMap;
use alloc::string::String;
use alloc::vec::Vec;
use serde::Serialize;

/// A sentence with the place it is about.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Note {
    /// Path in the line file, or empty for the whole.
    pub at: String,
    /// The sentence.
    pub text: String,
}

/// A caution: a heading and a sentence that ends with the deferral to local code and licensed practice.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Caution {
    /// One or two words, for example `Hydrogen`.
    pub title: String,
    /// The sentence.
    pub text: String,
}

/// How many findings stand where.
#[derive(Debug, Clone, Copy, Default, PartialEq, Eq, Serialize)]
pub struct Counts {
    /// `on side`.
    pub on_side: usize,
    /// `off side`.
    pub off_side: usize,
    /// `too close to call`.
    pub too_close: usize,
    /// `on paper`.
    pub on_paper: usize,
    /// `no data`.
    pub no_data: usize,
}

/// What an engineer would say over the telephone.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Summary {
    /// The finding, in one sentence.
    pub sentence: String,
    /// What brings it back and what that costs elsewhere; empty where nothing is off side.
    pub remedy: String,
    /// Index into `findings` of the worst one.
    pub worst: Option<usize>,
    /// Counts by standing.
    pub counts: Counts,
}

/// A zone as the engine took it.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Zone {
    /// Name.
    pub name: String,
    /// Temperature (entering, on a course), K.
    #[serde(rename = "temperature_K")]
    pub temperature_k: f64,
    /// Temperature leaving, K, on a course.
    #[serde(rename = "leaving_K")]
    pub leaving_k: Option<f64>,
    /// Pressure, bar.
    pub pressure_bar: f64,
    /// Partial pressures as read, bar.
    pub partial_pressures_bar: BTreeMap<String, f64>,
    /// Partial pressures shifted at the zone's temperature, bar; absent where it cannot be told.
    pub shifted_partial_pressures_bar: Option<BTreeMap<String, f64>>,
    /// Frost point of the gas as read, K, where it holds water.
    #[serde(rename = "frost_point_K")]
    pub frost_point_k: Option<f64>,
    /// Why the gas could not be taken, where it could not.
    pub refused: Option<Problem>,
    /// Notes of the gas intake: what was assumed, converted, normalised.
    pub notes: Vec<String>,
}

/// A change as the engine took it.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Change {
    /// Name.
    pub name: String,
    /// The equation balanced, as written out.
    pub equation: String,
    /// Condensed reactants and products only, for a narrow column: `2 Cr -> Cr2O3`.
    pub short: String,
    /// `want` or `avoid`.
    pub wish: String,
    /// Turning temperatures of the standard reaction (all activities one), K.
    #[serde(rename = "standard_turning_temperatures_K")]
    pub standard_turning_temperatures_k: Vec<f64>,
    /// Why it cannot be read, where it cannot.
    pub refused: Option<Problem>,
    /// Notes, for example that FeO was taken as wustite.
    pub notes: Vec<String>,
}

/// A lever of one finding.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Lever {
    /// `temperature`, `pressure`, `dew_point`, the gas's formula, or `activity X`.
    pub lever: String,
    /// In words: `Frost point`, `Temperature`, `H2 share`, `Cr activity`.
    pub label: String,
    /// Unit of reading, turning points and leeway (a temperature's leeway is in K or F steps of the same size).
    pub unit: String,
    /// The reading.
    pub reading: f64,
    /// Standard uncertainty of the reading's own tolerance, in `unit`.
    pub u_reading: f64,
    /// Where dG is zero, ascending.
    pub turning_points: Vec<f64>,
    /// Signed distance to the nearest turning point, positive on the wished side; `None` without a turning point.
    pub leeway: Option<f64>,
    /// The same in combined standard uncertainties.
    pub leeway_u: Option<f64>,
    /// Combined standard uncertainty of the finding expressed in this lever, in `unit`.
    pub u: Option<f64>,
    /// Side of the nearest turning point on which the wish does not hold: `above` or `below`.
    pub off_side: Option<String>,
    /// Range searched, in `unit`.
    pub searched: [f64; 2],
    /// What was held.
    pub held: String,
    /// May be proposed as a remedy.
    pub allowed: bool,
    /// Why it is not proposed, or why there is no turn; empty otherwise.
    pub why_not: String,
}

/// A share of the doubt.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Share {
    /// Contributor, for example `dew point, Soak` or `data of Cr2O3`.
    pub source: String,
    /// Share of the variance, 0 to 1; all add up to 1.
    pub share: f64,
    /// Its contribution as a standard uncertainty of dG, kJ.
    #[serde(rename = "u_kJ")]
    pub u_kj: f64,
}

/// A change of one allowed lever that brings the finding back.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Remedy {
    /// Lever name as in [`Lever::lever`], or `rate`.
    pub lever: String,
    /// In words.
    pub label: String,
    /// Unit.
    pub unit: String,
    /// The reading.
    pub from: f64,
    /// Value at which it only just turns.
    pub just_turns: f64,
    /// Value beyond doubt, rounded to the safe side.
    pub beyond_doubt: f64,
    /// For example `Frost point -52 C or lower`.
    pub sentence: String,
}

/// The line of arithmetic, for a calculator.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Arithmetic {
    /// Temperature used, K.
    #[serde(rename = "temperature_K")]
    pub temperature_k: f64,
    /// Standard dG, kJ.
    #[serde(rename = "dG0_kJ")]
    pub dg0_kj: f64,
    /// Standard dH, kJ.
    #[serde(rename = "dH0_kJ")]
    pub dh0_kj: f64,
    /// Standard dS, J/K.
    #[serde(rename = "dS0_J_per_K")]
    pub ds0_j_per_k: f64,
    /// Q in symbols.
    pub q_symbols: String,
    /// Q with its numbers.
    pub q_numbers: String,
    /// ln Q.
    pub ln_q: f64,
    /// RT ln Q, kJ.
    #[serde(rename = "RT_ln_Q_kJ")]
    pub rt_ln_q_kj: f64,
    /// dG, kJ.
    #[serde(rename = "dG_kJ")]
    pub dg_kj: f64,
}

/// A substance as used in a finding.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Used {
    /// Formula.
    pub formula: String,
    /// Phase used.
    pub phase: String,
    /// `s`, `l` or `g`.
    pub state: String,
    /// Coefficient, negative for reactants.
    pub coefficient: f64,
    /// Activity (condensed) or partial pressure in bar (gas).
    pub activity: f64,
    /// How that activity came about: `partial pressure`, `pure`, `your file`, `mole fraction (Raoult)`.
    pub activity_from: String,
    /// Short name of the source of the data.
    pub source: String,
    /// Full citation.
    pub cite: String,
    /// Standard uncertainty of its G at this temperature, kJ/mol.
    #[serde(rename = "u_kJ")]
    pub u_kj: f64,
    /// Outside its fitted range but within the stated margin.
    pub extrapolated: bool,
}

/// The same finding with the gas re-equilibrated at the zone's temperature.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Shifted {
    /// Standing.
    pub standing: String,
    /// dG, kJ.
    #[serde(rename = "dG_kJ")]
    pub dg_kj: f64,
    /// Combined standard uncertainty, kJ.
    #[serde(rename = "u_dG_kJ")]
    pub u_dg_kj: f64,
    /// Gas after the shift, bar.
    pub partial_pressures_bar: BTreeMap<String, f64>,
    /// What was let react, in words.
    pub how: String,
}

/// A place on a course.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct CoursePoint {
    /// Temperature, K.
    #[serde(rename = "temperature_K")]
    pub temperature_k: f64,
    /// dG there, kJ.
    #[serde(rename = "dG_kJ")]
    pub dg_kj: f64,
    /// Standing there.
    pub standing: String,
}

/// One zone, one change.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Finding {
    /// Zone's name.
    pub zone: String,
    /// Change's name.
    pub change: String,
    /// Index of the zone.
    pub zone_index: usize,
    /// Index of the change.
    pub change_index: usize,
    /// The equation, balanced.
    pub equation: String,
    /// `want` or `avoid`.
    pub wish: String,
    /// `on side`, `off side`, `too close to call`, `on paper`, `no data`.
    pub standing: String,
    /// The finding in one sentence.
    pub sentence: String,
    /// Temperature it was judged at, K.
    #[serde(rename = "judged_at_K")]
    pub judged_at_k: f64,
    /// Why there, in words; empty for a zone of one temperature.
    pub judged_why: String,
    /// dG at the conditions, kJ per mole as written; `None` with `no data`.
    #[serde(rename = "dG_kJ")]
    pub dg_kj: Option<f64>,
    /// Its combined standard uncertainty, kJ.
    #[serde(rename = "u_dG_kJ")]
    pub u_dg_kj: Option<f64>,
    /// Driving force (minus dG) per mole of gas exchanged, kJ, with the gas it is per.
    #[serde(rename = "driving_force_per_mole_kJ")]
    pub driving_force_per_mole_kj: Option<f64>,
    /// The gas the driving force is per mole of.
    pub per_mole_of: Option<String>,
    /// Leeway in kJ: positive on the wished side.
    #[serde(rename = "leeway_kJ")]
    pub leeway_kj: Option<f64>,
    /// The same in combined standard uncertainties.
    pub leeway_u: Option<f64>,
    /// Chance that the sign of dG is wrong, 0 to 0.5.
    pub chance_wrong: Option<f64>,
    /// First-order doubt is not good to 3 %: a contributor acts in a curve.
    pub nonlinear: bool,
    /// Levers, the most useful first.
    pub levers: Vec<Lever>,
    /// Doubt by contributor, largest first.
    pub budget: Vec<Share>,
    /// What to measure next, in words; empty where the doubt does not matter.
    pub measure_next: String,
    /// What brings it back, least change first; empty where it is on side.
    pub remedies: Vec<Remedy>,
    /// The shifted gas; `None` where there is nothing to shift.
    pub shifted: Option<Shifted>,
    /// The arithmetic.
    pub arithmetic: Option<Arithmetic>,
    /// Phases used, by formula.
    pub phases: BTreeMap<String, String>,
    /// Substances used, with sources.
    pub used: Vec<Used>,
    /// The course, hot end first as travelled; empty for a zone of one temperature.
    pub course: Vec<CoursePoint>,
    /// Temperature below which it is known too slow, K.
    #[serde(rename = "acts_above_K")]
    pub acts_above_k: Option<f64>,
    /// Seconds spent past the turn before it is too slow, on a course with a rate.
    pub seconds_past_turn: Option<f64>,
    /// Seconds allowed.
    pub allowed_s: Option<f64>,
    /// Notes.
    pub notes: Vec<String>,
}

/// A line assessed.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Assessment {
    /// Name of the line.
    pub line: String,
    /// The line is invented.
    pub invented: bool,
    /// Version of the data file.
    pub data_version: String,
    /// Coverage factor of the standing.
    pub coverage_factor: f64,
    /// The telephone sentence.
    pub summary: Summary,
    /// Zones in order of travel.
    pub zones: Vec<Zone>,
    /// Changes in order.
    pub changes: Vec<Change>,
    /// Findings, zone by zone within each change.
    pub findings: Vec<Finding>,
    /// Cautions that apply.
    pub cautions: Vec<Caution>,
    /// Notes about the file as a whole.
    pub notes: Vec<Note>,
}

/// A change proposed from charge and gas.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Proposal {
    /// Name in words: `Chromium oxidises`.
    pub name: String,
    /// Balanced equation.
    pub equation: String,
    /// Suggested wish.
    pub wish: String,
    /// Zone in which it is nearest to its turn.
    pub nearest_zone: String,
    /// Distance there, in combined standard uncertainties, positive where it does not go.
    pub leeway_u: f64,
    /// dG there, kJ.
    #[serde(rename = "dG_kJ")]
    pub dg_kj: f64,
}

/// A standard reaction at one temperature.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Reaction {
    /// Balanced equation.
    pub equation: String,
    /// Temperature, K.
    #[serde(rename = "temperature_K")]
    pub temperature_k: f64,
    /// dH, kJ.
    #[serde(rename = "dH_kJ")]
    pub dh_kj: f64,
    /// Its standard uncertainty, kJ.
    #[serde(rename = "u_dH_kJ")]
    pub u_dh_kj: f64,
    /// dS, J/K.
    #[serde(rename = "dS_J_per_K")]
    pub ds_j_per_k: f64,
    /// Its standard uncertainty, J/K.
    #[serde(rename = "u_dS_J_per_K")]
    pub u_ds_j_per_k: f64,
    /// dG: standard, or at the activities given, kJ.
    #[serde(rename = "dG_kJ")]
    pub dg_kj: f64,
    /// Its standard uncertainty, kJ.
    #[serde(rename = "u_dG_kJ")]
    pub u_dg_kj: f64,
    /// Standard dG, kJ.
    #[serde(rename = "dG0_kJ")]
    pub dg0_kj: f64,
    /// Decadic logarithm of the equilibrium constant.
    #[serde(rename = "log10_K")]
    pub log10_k: f64,
    /// Its standard uncertainty.
    #[serde(rename = "u_log10_K")]
    pub u_log10_k: f64,
    /// Phases used, by formula.
    pub phases: BTreeMap<String, String>,
    /// Temperatures at which dG (at these activities) is zero, K.
    #[serde(rename = "turning_temperatures_K")]
    pub turning_temperatures_k: Vec<f64>,
    /// Temperature ranges in which it goes, K.
    #[serde(rename = "goes_K")]
    pub goes_k: Vec<[f64; 2]>,
    /// The same in words: `always`, `never`, `above 887 C`, ...
    pub goes: String,
    /// Range of the data, K.
    #[serde(rename = "data_K")]
    pub data_k: [f64; 2],
    /// Substances with sources.
    pub used: Vec<Used>,
    /// Notes.
    pub notes: Vec<String>,
}

/// A row of the substances list.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct SubstanceRow {
    /// Formula.
    pub formula: String,
    /// Names.
    pub name: String,
    /// Elements, in the formula's order.
    pub elements: Vec<String>,
    /// Phases held, preferred sets only.
    pub phases: Vec<String>,
    /// Number of sets held.
    pub sets: usize,
    /// Holds a gas.
    pub gas: bool,
    /// Holds a condensed phase.
    pub condensed: bool,
}

/// One source's record of a substance.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct SetRow {
    /// Short name of the source.
    pub source: String,
    /// Full citation.
    pub cite: String,
    /// Preferred.
    pub preferred: bool,
    /// Why it is preferred.
    pub why: String,
    /// How the figures were made from the source.
    pub made: String,
    /// Gas or condensed.
    pub gas: bool,
    /// Standard enthalpy of formation at 298.15 K, kJ/mol.
    #[serde(rename = "H298_kJ")]
    pub h298_kj: f64,
    /// Its standard uncertainty.
    #[serde(rename = "u_H298_kJ")]
    pub u_h298_kj: f64,
    /// Standard entropy at 298.15 K, J/(mol K).
    #[serde(rename = "S298_J_per_K")]
    pub s298_j_per_k: f64,
    /// Its standard uncertainty.
    #[serde(rename = "u_S298_J_per_K")]
    pub u_s298_j_per_k: f64,
    /// Reason for the uncertainty.
    pub doubt: String,
    /// Phases.
    pub phases: Vec<PhaseRow>,
}

/// A phase of a record, with its curves.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct PhaseRow {
    /// Phase name.
    pub phase: String,
    /// `s`, `l`, `g`.
    pub state: String,
    /// Lower end of the fitted range, K.
    #[serde(rename = "from_K")]
    pub from_k: f64,
    /// Upper end, K.
    #[serde(rename = "to_K")]
    pub to_k: f64,
    /// Only when named.
    pub metastable: bool,
    /// Temperatures of the curves, K.
    #[serde(rename = "temperature_K")]
    pub temperature_k: Vec<f64>,
    /// Cp, J/(mol K).
    #[serde(rename = "Cp_J_per_K")]
    pub cp_j_per_k: Vec<f64>,
    /// H minus H298 of the set, kJ/mol.
    #[serde(rename = "H_minus_H298_kJ")]
    pub h_minus_h298_kj: Vec<f64>,
    /// S, J/(mol K).
    #[serde(rename = "S_J_per_K")]
    pub s_j_per_k: Vec<f64>,
    /// G = H - TS on the formation scale, kJ/mol.
    #[serde(rename = "G_kJ")]
    pub g_kj: Vec<f64>,
}

/// A substance with all its records.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Substance {
    /// Formula.
    pub formula: String,
    /// Names.
    pub name: String,
    /// Molar mass, g/mol.
    pub molar_mass_g: f64,
    /// Records by source, preferred first.
    pub sets: Vec<SetRow>,
}

/// A typed reading, understood.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Entry {
    /// The quantity as the line file writes it.
    pub quantity: serde_json::Value,
    /// The field of the zone's gas it belongs to, where what was typed says more than was asked (`35 ppm` for a dew point gives a water channel).
    pub field: String,
    /// Read back in full.
    pub read_back: String,
    /// Its consequence, for example `74.5 ppm H2O at 1.025 bar (58.7 to 94.1)`; empty where there is none.
    pub consequence: String,
}

/// What is wrong, where, what was found, what was expected, and the mend.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Problem {
    /// Stable code for programs, for example `line.unit`.
    pub code: String,
    /// Path in the file or equation, for example `zones[2].gas.dew_point.unit`.
    pub at: String,
    /// The place in people's words: `zone 3, Heat 3; line 41`.
    pub place: String,
    /// What is wrong, as a sentence.
    pub message: String,
    /// What was found.
    pub found: String,
    /// What was expected.
    pub expected: String,
    /// What to do; ready answers first.
    pub hints: Vec<String>,
    /// Further problems of the same file, in its order.
    #[serde(skip_serializing_if = "Vec::is_empty")]
    pub more: Vec<Problem>,
}
