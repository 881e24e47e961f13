//! Where a function of one variable is zero: all crossings on an interval, each to the last bit.

use alloc::vec::Vec;

/// A place where a function crosses zero.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Crossing {
    /// Where.
    pub at: f64,
    /// Whether the function is positive just above it.
    pub rises: bool,
}

/// The zero of `f` between `a` and `b`, where `f(a)` and `f(b)` differ in sign.
///
/// Bisection sharpened by Ridders' rule (Ridders 1979, IEEE Trans. Circuits Syst. 26, 979): every step at
/// least halves the bracket, so it ends after at most 120 steps at neighbouring numbers.
pub fn root(mut f: impl FnMut(f64) -> f64, mut a: f64, mut b: f64) -> f64 {
    let (mut fa, mut fb) = (f(a), f(b));
    if fa == 0.0 {
        return a;
    }
    if fb == 0.0 {
        return b;
    }
    for _ in 0..120 {
        let m = 0.5 * (a + b);
        if m <= a.min(b) || m >= a.max(b) {
            break;
        }
        let fm = f(m);
        if fm == 0.0 {
            return m;
        }
        let s = leeway_quantity::math::sqrt(fm * fm - fa * fb);
        let mut x = m + (m - a) * if fa >= fb { fm / s } else { -fm / s };
        if !(x > a.min(b) && x < a.max(b)) {
            x = m;
        }
        let fx = if x == m { fm } else { f(x) };
        if fx == 0.0 {
            return x;
        }
        // Keep the tightest bracket among a, m, x, b.
        let mut points = [(a, fa), (m, fm), (x, fx), (b, fb)];
        if a > b {
            points.reverse();
        }
        if points[1].0 > points[2].0 {
            points.swap(1, 2);
        }
        let pair = points.windows(2).find(|w| (w[0].1 < 0.0) != (w[1].1 < 0.0));
        let Some(pair) = pair else { return x };
        ((a, fa), (b, fb)) = (pair[0], pair[1]);
    }
    if fa.abs() <= fb.abs() { a } else { b }
}

/// Slopes of a function just above the start and just below the end of each cell of a grid.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Slopes {
    /// Just above the start of each cell.
    pub start: Vec<f64>,
    /// Just below the end of each cell.
    pub end: Vec<f64>,
}

/// How a function bends between the points of a grid.
pub struct Bend<'a> {
    /// Slopes at the ends of the cells, less `shift`.
    pub slopes: &'a Slopes,
    /// What the slopes are to be raised by.
    pub shift: f64,
    /// The derivative anywhere.
    pub slope: &'a mut dyn FnMut(f64) -> f64,
}

/// All crossings of `f` through the ascending `grid`, from the values `f` has there.
///
/// With slopes, a pair of crossings inside one cell shows as an extremum that turns back towards zero, and
/// is then looked for by the derivative. Complete where `f` bends one way only within each cell, which the
/// grid must provide (kinks on grid points).
pub fn crossings(grid: &[f64], values: &[f64], mut f: impl FnMut(f64) -> f64, mut bend: Option<Bend>) -> Vec<Crossing> {
    let mut found = Vec::new();
    for i in 1..grid.len() {
        let (a, b) = (grid[i - 1], grid[i]);
        let (fa, fb) = (values[i - 1], values[i]);
        if !(fa.is_finite() && fb.is_finite()) {
            continue;
        }
        if fa == 0.0 && i == 1 {
            found.push(Crossing { at: a, rises: fb > 0.0 });
            continue;
        }
        if (fa < 0.0) != (fb < 0.0) {
            found.push(Crossing { at: root(&mut f, a, b), rises: fb > fa });
            continue;
        }
        let Some(Bend { slopes, shift, slope }) = bend.as_mut() else { continue };
        // Same sign at both ends: only a cell that heads for zero on entry and away on leaving can hold a pair.
        let (sa, sb) = (slopes.start[i - 1] + *shift, slopes.end[i - 1] + *shift);
        if fa * sa < 0.0 && fb * sb > 0.0 {
            let inset = 1e-9 * (b - a);
            let turn = root(&mut **slope, a + inset, b - inset);
            let ft = f(turn);
            if ft != 0.0 && (ft < 0.0) != (fa < 0.0) {
                found.push(Crossing { at: root(&mut f, a, turn), rises: ft > 0.0 });
                found.push(Crossing { at: root(&mut f, turn, b), rises: fb > 0.0 });
            }
        }
    }
    found
}
