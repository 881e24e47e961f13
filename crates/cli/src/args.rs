//! The words of the command line.

use clap::{Parser, Subcommand, ValueEnum};
use std::path::PathBuf;

/// When to colour.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub(crate) enum Colour {
    /// On a terminal, unless NO_COLOR is set.
    Auto,
    /// Always.
    Always,
    /// Never.
    Never,
}

/// Tells whether each wanted or unwanted reaction goes in each zone of a hot line, how far that is from
/// turning, which lever brings it back, and how sure that is.
#[derive(Debug, Parser)]
#[command(
    name = "leeway",
    version,
    propagate_version = true,
    max_term_width = 100,
    after_help = "\
Examples:
  leeway assess strip.leeway.json
  leeway assess strip.leeway.json --variant \"75/25 gas\" --strict
  leeway change \"2 Cr + 1.5 O2 = Cr2O3\" --at \"1000 C\" --at \"1832 F\"
  leeway substances --elements \"Ca C O\"

What can happen, not how fast. Explosion, poisoning and vessels are not judged:
local code and licensed practice come first.

Exit: 0 done; 1 a finding is off side (with --strict); 2 bad input."
)]
pub(crate) struct Args {
    /// Colour of the text.
    #[arg(long, global = true, value_enum, default_value = "auto")]
    pub(crate) color: Colour,
    #[command(subcommand)]
    pub(crate) command: Command,
}

/// What is asked.
#[derive(Debug, Subcommand)]
pub(crate) enum Command {
    /// Every change in every zone of a line: standing, leeway, doubt, levers.
    #[command(
        after_help = "Examples:\n  leeway assess strip.leeway.json\n  leeway assess - --json < strip.leeway.json\n  leeway assess strip.leeway.json --zone Soak"
    )]
    Assess {
        /// The line file; - reads standard input.
        line: PathBuf,
        /// For programs: one JSON object, full precision.
        #[arg(long)]
        json: bool,
        /// Exit 1 where a finding is off side (tolerated changes apart).
        #[arg(long)]
        strict: bool,
        /// A variant that the line carries.
        #[arg(long, value_name = "NAME")]
        variant: Option<String>,
        /// Only findings of this zone.
        #[arg(long, value_name = "NAME")]
        zone: Option<String>,
        /// Only findings of this change.
        #[arg(long, value_name = "NAME")]
        change: Option<String>,
    },
    /// One reaction: dH, dS, dG, log10 K and the temperatures at which it goes.
    #[command(
        after_help = "Examples:\n  leeway change \"Cr + H2O = Cr2O3 + H2\" --at \"1050 C\" --activity \"H2O=4e-5\" --activity \"Cr=0.25\"\n  leeway change \"2*(C + O2 = CO2) - (2 CO + O2 = 2 CO2)\" --at \"900 C\"\n  leeway change \"CaCO3 = CaO + CO2\" --dh \"179.2 kJ\" --ds \"160.2 J/K\""
    )]
    Change {
        /// The equation; coefficients may be left out. Known steps add up: 2*(A = B) - (C = D).
        equation: String,
        /// A temperature with its unit; may be given again.
        #[arg(long, value_name = "TEMPERATURE", allow_hyphen_values = true)]
        at: Vec<String>,
        /// An activity, or a partial pressure in bar, as FORMULA=VALUE; may be given again.
        #[arg(long, value_name = "FORMULA=VALUE")]
        activity: Vec<String>,
        /// Constant enthalpy in place of data, with --ds.
        #[arg(long, value_name = "ENERGY", allow_hyphen_values = true)]
        dh: Option<String>,
        /// Constant entropy in place of data, with --dh.
        #[arg(long, value_name = "ENTROPY", allow_hyphen_values = true)]
        ds: Option<String>,
        /// For programs: an array, one object for each temperature.
        #[arg(long)]
        json: bool,
    },
    /// Changes that a line's charge and gas suggest, the nearest to turning first.
    Propose {
        /// The line file; - reads standard input.
        line: PathBuf,
        /// For programs.
        #[arg(long)]
        json: bool,
    },
    /// What the data hold, with sources.
    #[command(
        after_help = "Examples:\n  leeway substances Cr2O3\n  leeway substances --elements \"Ca C O\"\n  leeway substances wustite"
    )]
    Substances {
        /// A formula for its records; a part of a formula or name for a list.
        query: Option<String>,
        /// Only substances made of these elements.
        #[arg(long, value_name = "ELEMENTS")]
        elements: Option<String>,
        /// For programs.
        #[arg(long)]
        json: bool,
    },
}
