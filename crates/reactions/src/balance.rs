//! Exact null space of the element matrix: every way an equation can balance.

use alloc::collections::BTreeSet;
use alloc::vec;
use alloc::vec::Vec;
use leeway_substances::{Element, Formula};
use num_rational::BigRational;
use num_traits::{One, Zero};

/// Basis of all coefficient vectors for which every element is conserved (Gauss-Jordan elimination over the
/// rationals). Signed: products positive in a solution mean reactants negative.
pub(crate) fn null_space(formulas: &[&Formula]) -> Vec<Vec<BigRational>> {
    let elements: BTreeSet<Element> = formulas.iter().flat_map(|f| f.counts().keys().copied()).collect();
    let n = formulas.len();
    let mut rows: Vec<Vec<BigRational>> = elements
        .iter()
        .map(|e| formulas.iter().map(|f| f.counts().get(e).cloned().unwrap_or_else(BigRational::zero)).collect())
        .collect();
    let mut pivots = Vec::new();
    let mut row = 0;
    for column in 0..n {
        let Some(found) = (row..rows.len()).find(|&r| !rows[r][column].is_zero()) else { continue };
        rows.swap(row, found);
        let pivot = rows[row][column].clone();
        for x in &mut rows[row] {
            *x /= &pivot;
        }
        let lead = rows[row].clone();
        for (r, other) in rows.iter_mut().enumerate() {
            if r != row && !other[column].is_zero() {
                let factor = other[column].clone();
                for (x, l) in other.iter_mut().zip(&lead) {
                    *x -= &factor * l;
                }
            }
        }
        pivots.push(column);
        row += 1;
        if row == rows.len() {
            break;
        }
    }
    (0..n)
        .filter(|c| !pivots.contains(c))
        .map(|free| {
            let mut v = vec![BigRational::zero(); n];
            v[free] = BigRational::one();
            for (r, &p) in pivots.iter().enumerate() {
                v[p] = -rows[r][free].clone();
            }
            v
        })
        .collect()
}
