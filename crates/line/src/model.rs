//! The line as the computation needs it: every quantity in its internal unit, every name checked.

use alloc::string::String;
use alloc::vec::Vec;
use leeway_gas::reading::GasReading;
use leeway_quantity::Quantity;

/// What the engineer wishes of a change.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Wish {
    /// It should go.
    Want,
    /// It should not go.
    Avoid,
}

/// How the activity of a substance is given.
#[derive(Debug, Clone, PartialEq)]
pub struct Activity {
    /// The activity, or the factor on the mole fraction: see [`Activity::is_coefficient`].
    pub value: f64,
    /// `value` multiplies the mole fraction in the alloy; otherwise it is the activity itself.
    pub is_coefficient: bool,
    /// Limits of error as a factor up and down, at least 1; `None` where not given.
    pub doubt_factor: Option<f64>,
    /// Where it is from, as the file says.
    pub source: Option<String>,
}

/// One substance of the charge.
#[derive(Debug, Clone, PartialEq)]
pub struct Member {
    /// The formula as written, with its phase if one was named, for example `SiO2(quartz)`.
    pub substance: String,
    /// Share of the charge by mass, fraction of one.
    pub share_wt: Option<Quantity>,
    /// Activity or activity coefficient, where given.
    pub activity: Option<Activity>,
}

/// A place with one gas, and one temperature or a course from one to another.
#[derive(Debug, Clone, PartialEq)]
pub struct Zone {
    /// Name, unique in the line.
    pub name: String,
    /// Temperature; of the charge entering where `leaving` is given.
    pub temperature: Quantity,
    /// Temperature of the charge as it leaves.
    pub leaving: Option<Quantity>,
    /// How fast the charge heats or cools, K/s, always positive.
    pub rate: Option<Quantity>,
    /// Pressure, the line's where the zone has none of its own.
    pub pressure: Quantity,
    /// The gas as read.
    pub gas: GasReading,
}

/// Temperature below which a change is known to be too slow.
#[derive(Debug, Clone, PartialEq)]
pub struct ActsAbove {
    /// The temperature.
    pub temperature: Quantity,
    /// Where it is from.
    pub source: Option<String>,
}

/// A change the engineer watches.
#[derive(Debug, Clone, PartialEq)]
pub struct Change {
    /// Name, unique in the line.
    pub name: String,
    /// The equation as typed.
    pub equation: String,
    /// Want or avoid.
    pub wish: Wish,
    /// Indices of the zones it is watched in; all zones where `None`.
    pub zones: Option<Vec<usize>>,
    /// Activities that hold in this change only, by formula.
    pub activities: Vec<(String, Activity)>,
    /// Below this it is known to be too slow.
    pub acts_above: Option<ActsAbove>,
    /// Time allowed past the turn on a course.
    pub allowed: Option<Quantity>,
    /// A film or loss the site tolerates: said beside the finding, changes no figure.
    pub tolerated: bool,
}

/// Something the reader of the file noticed and must say.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Note {
    /// Path in the file, for example `zones[2].gas`; empty for the whole file.
    pub at: String,
    /// The sentence.
    pub text: String,
}

/// A line, checked.
#[derive(Debug, Clone, PartialEq)]
pub struct Line {
    /// Name of the line.
    pub name: String,
    /// The file says that the line is invented.
    pub invented: bool,
    /// Coverage factor k; 2 where the file gives none.
    pub coverage_factor: f64,
    /// The charge.
    pub charge: Vec<Member>,
    /// Zones in order of travel.
    pub zones: Vec<Zone>,
    /// Changes watched.
    pub changes: Vec<Change>,
    /// Notes of reading: unknown fields kept, units taken for granted.
    pub notes: Vec<Note>,
}
