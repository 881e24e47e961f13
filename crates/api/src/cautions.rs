//! Cautions in the product's own words. Every one ends by giving way to local code and licensed practice.
//!
//! The facts behind them are common practice in furnace standards (NFPA 86, EN 746 and ISO 13577 series,
//! ISO 10156); figures are left to the standard in force wherever it has its own.

use crate::response::Caution;
use alloc::string::ToString;
use leeway_findings::caution::Caution as Hazard;

pub(crate) fn words(hazard: Hazard) -> Caution {
    let (title, text) = match hazard {
        Hazard::Hydrogen => (
            "Hydrogen",
            "Air let in to hot hydrogen, or hydrogen let out, burns or explodes. Nothing here judges that: local code and licensed practice come first.",
        ),
        Hazard::ColdFlammable => (
            "Cold and flammable",
            "A zone here is below 760 °C with a gas that burns: the standard's rules for introducing and removing such a gas apply, whatever stands above. Local code and licensed practice come first.",
        ),
        Hazard::Unburned => (
            "Oxygen in a gas that burns",
            "The reading holds free oxygen beside hydrogen or carbon monoxide. A lean mixture is undecided, not safe; a hot cell may burn it and read none. Local code and licensed practice come first.",
        ),
        Hazard::Monoxide => (
            "Carbon monoxide",
            "Toxic and without smell; it also burns. Fixed and personal alarms belong wherever it can leak. Local code and licensed practice come first.",
        ),
        Hazard::Carbonyl => (
            "Metal carbonyl",
            "Nickel, iron and cobalt cooled in carbon monoxide give off very poisonous carbonyls. Purge the monoxide out before the charge falls below 200 °C. Local code and licensed practice come first.",
        ),
        Hazard::Ammonia => (
            "Ammonia",
            "Toxic, burns from 15 to 28 % in air, and attacks copper alloys. Local code and licensed practice come first.",
        ),
        Hazard::Hydrocarbon => (
            "Methane",
            "Burns and explodes with air; hot gas burns leaner than the cold limit says. Local code and licensed practice come first.",
        ),
        Hazard::Sulfur => (
            "Sulfur",
            "Sulfur gases poison and corrode; opened sulfates and sulfides can give off SO2 or H2S. Use the site's own exposure limits. Local code and licensed practice come first.",
        ),
        Hazard::Chlorine => (
            "Chlorine",
            "Chlorine and hydrogen chloride poison and corrode. Use the site's own exposure limits. Local code and licensed practice come first.",
        ),
        Hazard::Lime => (
            "Hot lime",
            "Quicklime boils with water and burns eyes and skin; carbon dioxide collects in pits and hoppers. Local code and licensed practice come first.",
        ),
        Hazard::Pyrophoric => (
            "Fresh metal",
            "Freshly reduced powder or catalyst can burn in air. Cool it under inert gas, admit oxygen only by the plant's own passivation procedure and watch its temperature. Local code and licensed practice come first.",
        ),
        Hazard::Vacuum => (
            "Vacuum",
            "A leak draws air in; backfilling hot re-oxidises and may react; hydrogen only in a furnace built for it. The vessel itself is not judged here. Local code and licensed practice come first.",
        ),
        Hazard::Fume => (
            "Dust and fume",
            "Oxides of molybdenum and tungsten fume when hot; chromates and nickel dust are poisonous. Local code and licensed practice come first.",
        ),
        Hazard::Asphyxiant => (
            "Gas that suffocates",
            "Nitrogen, argon and carbon dioxide displace air without warning in pits and chambers. Local code and licensed practice come first.",
        ),
    };
    Caution { title: title.to_string(), text: text.to_string() }
}
