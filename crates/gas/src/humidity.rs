//! Water vapour over ice and over liquid water.
//!
//! Sonntag (1990), Z. Meteorol. 70, 340-344 (ITS-90), for ln e in Pa:
//! over water, valid -100 to 100 C (supercooled below 0): -6096.9385/T + 21.2409642 - 2.711193e-2 T + 1.673952e-5 T^2 + 2.433502 ln T;
//! over ice, valid -100 to 0.01 C: -6024.5282/T + 29.32707 + 1.0613868e-2 T - 1.3198825e-5 T^2 - 0.49382577 ln T.
//! No enhancement factor for the carrier gas: 0.5 % at 1 bar, far inside any instrument's tolerance.

use crate::reading::Surface;
use leeway_quantity::math::{exp, ln};

/// Lowest dew or frost point taken, K (-100 C).
pub const LOWEST_K: f64 = 173.15;
/// Highest dew point taken, K (100 C).
pub const HIGHEST_K: f64 = 373.15;
/// Triple point of water, K: above it there is no ice.
const TRIPLE_K: f64 = 273.16;
const BAR_PER_PA: f64 = 1e-5;

/// Saturation pressure of water, bar, at `t_k` over the surface; over liquid water where ice does not exist.
/// `None` outside -100 to 100 C.
#[must_use]
pub fn saturation_pressure_bar(t_k: f64, over: Surface) -> Option<f64> {
    if !(LOWEST_K..=HIGHEST_K).contains(&t_k) {
        return None;
    }
    Some(exp(ln_saturation_pa(t_k, over)) * BAR_PER_PA)
}

fn ln_saturation_pa(t: f64, over: Surface) -> f64 {
    if over == Surface::Ice && t < TRIPLE_K {
        -6024.5282 / t + 29.32707 + 1.0613868e-2 * t - 1.3198825e-5 * t * t - 0.493_825_77 * ln(t)
    } else {
        -6096.9385 / t + 21.240_964_2 - 2.711193e-2 * t + 1.673952e-5 * t * t + 2.433502 * ln(t)
    }
}

/// Dew or frost point, K, at which water of this partial pressure condenses on the surface; `None` outside
/// -100 to 100 C.
#[must_use]
pub fn frost_point_k(p_bar: f64, over: Surface) -> Option<f64> {
    if p_bar <= 0.0 {
        return None;
    }
    let target = ln(p_bar / BAR_PER_PA);
    let f = |t: f64| ln_saturation_pa(t, over) - target;
    if f(LOWEST_K) > 0.0 || f(HIGHEST_K) < 0.0 {
        return None;
    }
    Some(leeway_reactions::root(f, LOWEST_K, HIGHEST_K))
}
