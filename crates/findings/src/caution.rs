//! Which cautions a line calls for. The words stand behind the door to the bindings.

use crate::judge::Assessed;
use leeway_line::model::Line;
use leeway_quantity::constants::ZERO_CELSIUS_K;

/// A hazard that the sheet must name.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Caution {
    /// Hydrogen in a hot line.
    Hydrogen,
    /// A flammable gas in a zone below its self-ignition temperature.
    ColdFlammable,
    /// Free oxygen beside a fuel.
    Unburned,
    /// Carbon monoxide.
    Monoxide,
    /// Nickel, iron or cobalt cooled in carbon monoxide.
    Carbonyl,
    /// Ammonia.
    Ammonia,
    /// Methane or another hydrocarbon.
    Hydrocarbon,
    /// Sulfur gases or sulfur in the charge.
    Sulfur,
    /// Chlorine or hydrogen chloride.
    Chlorine,
    /// Quicklime.
    Lime,
    /// Fresh metal powder or catalyst that burns in air.
    Pyrophoric,
    /// Vacuum.
    Vacuum,
    /// Chromates, molybdenum, tungsten or nickel dust and fume.
    Fume,
    /// Nitrogen or argon, which suffocate.
    Asphyxiant,
}

/// Below this the furnace standards treat a flammable atmosphere as cold (760 C; common practice, no source).
pub const COLD_FLAMMABLE_K: f64 = 760.0 + ZERO_CELSIUS_K;
/// Below this pressure a furnace counts as a vacuum furnace, bar.
const VACUUM_BAR: f64 = 0.5;
/// Carbonyls form where the metal cools in carbon monoxide below this (200 C; common practice, no source).
const CARBONYL_K: f64 = 200.0 + ZERO_CELSIUS_K;
/// A fuel share worth a caution.
const TRACE: f64 = 1e-4;

/// Cautions that apply to a line, in order of weight.
#[must_use]
pub fn cautions(line: &Line, assessed: &Assessed) -> alloc::vec::Vec<Caution> {
    let mut list = alloc::vec::Vec::new();
    let mut add = |c: Caution, when: bool| {
        if when && !list.contains(&c) {
            list.push(c);
        }
    };
    let charge = |names: &[&str]| line.charge.iter().any(|m| names.iter().any(|n| m.substance == *n));
    let named = |part: &str| line.changes.iter().any(|c| c.equation.contains(part));
    for (zone, gas) in line.zones.iter().zip(&assessed.gases) {
        let Ok((gas, fan)) = gas else { continue };
        let share = |f: &str| {
            gas.species
                .iter()
                .position(|s| s == f)
                .map_or(0.0, |i| if fan.read[i].is_finite() { fan.read[i] / fan.at.p_bar } else { 0.0 })
        };
        let has = |f: &str| share(f) > TRACE;
        let coldest = zone.leaving.as_ref().map_or(zone.temperature.value, |l| l.value.min(zone.temperature.value));
        let flammable = has("H2") || has("CO") || has("CH4") || has("NH3");
        add(Caution::Hydrogen, has("H2"));
        add(Caution::Monoxide, has("CO"));
        add(Caution::Unburned, gas.intake.unburned(&fan.read));
        add(Caution::ColdFlammable, flammable && coldest < COLD_FLAMMABLE_K);
        add(Caution::Carbonyl, share("CO") > 0.0 && coldest < CARBONYL_K && charge(&["Ni", "Fe", "Co", "NiO"]));
        add(Caution::Ammonia, has("NH3"));
        add(
            Caution::Hydrocarbon,
            has("CH4") || gas.species.iter().any(|s| s.starts_with("C2H") || s.starts_with("C3H")),
        );
        add(Caution::Sulfur, ["H2S", "SO2", "SO3", "COS", "S2"].iter().any(|f| share(f) > 0.0));
        add(Caution::Chlorine, ["HCl", "Cl2"].iter().any(|f| share(f) > 0.0));
        add(Caution::Vacuum, zone.pressure.value < VACUUM_BAR);
        add(Caution::Asphyxiant, share("N2") > 0.9 || share("Ar") > 0.5 || share("CO2") > 0.1);
        let powder = ["Ni", "Fe", "Co", "Cu", "W", "Mo", "NiO", "Fe2O3", "Fe3O4", "MoO3", "WO3", "CoO", "Co3O4", "CuO"];
        add(
            Caution::Pyrophoric,
            flammable && line.charge.iter().any(|m| powder[6..].contains(&m.substance.as_str()))
                || (charge(&["Ni"]) && charge(&["Al2O3"])),
        );
    }
    add(Caution::Sulfur, named("CaS") || named("SO2") || named("SO3") || named("H2S"));
    add(Caution::Lime, named("CaO") || charge(&["CaO", "CaCO3"]));
    add(Caution::Fume, named("MoO3") || named("WO3") || named("CrO3") || named("CrO4"));
    list.sort_unstable();
    list
}
