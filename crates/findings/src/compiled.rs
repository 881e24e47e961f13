//! A change joined to the data, with the forms it takes where the gas shows oxygen only through its carriers.
//!
//! Where an equation holds O2 and the gas does not show it, H2O/H2 or CO2/CO stand for it: the equation less
//! a multiple of 2 H2O = 2 H2 + O2 (or 2 CO2 = 2 CO + O2), which is at equilibrium, has the same dG.

use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_line::model::{Change, Wish};
use leeway_reactions::{Equation, EquationError, Reaction, ReactionError, Term};
use leeway_substances::{Book, Class, Species};
use num_rational::BigRational;
use num_traits::{Signed, Zero};

/// What carries the oxygen.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Carrier {
    /// The equation as written.
    Written,
    /// Water over hydrogen.
    Water,
    /// Carbon dioxide over carbon monoxide.
    Dioxide,
}

/// Why a change cannot be evaluated.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum ChangeProblem {
    /// The equation does not read or balance.
    #[error(transparent)]
    Equation(#[from] EquationError),
    /// The data do not hold what it names.
    #[error(transparent)]
    Reaction(#[from] ReactionError),
}

/// A change ready to be judged.
#[derive(Debug, Clone, PartialEq)]
pub struct Compiled {
    /// Forms, the one as written first.
    pub forms: Vec<(Carrier, Reaction)>,
    /// +1 where it is wished not to go (dG above zero is on side), -1 where it is wished to go.
    pub sign: f64,
}

impl Compiled {
    /// Reads the equation of a change and joins it to the data.
    ///
    /// # Errors
    /// [`ChangeProblem`] where the equation does not read or its substances are not held.
    pub fn new(book: &Book, change: &Change) -> Result<Self, ChangeProblem> {
        let sign = if change.wish == Wish::Avoid { 1.0 } else { -1.0 };
        Ok(Self::from_equation(book, &Equation::parse(&change.equation)?, sign)?)
    }

    /// Joins an equation to the data.
    ///
    /// # Errors
    /// [`ReactionError`] where its substances are not held.
    pub fn from_equation(book: &Book, equation: &Equation, sign: f64) -> Result<Self, ReactionError> {
        let mut forms = alloc::vec![(Carrier::Written, Reaction::new(book, equation)?)];
        for (carrier, oxidised, reduced) in [(Carrier::Water, "H2O", "H2"), (Carrier::Dioxide, "CO2", "CO")] {
            if let Some(other) = carried(equation, oxidised, reduced)
                && let Ok(reaction) = Reaction::new(book, &other)
            {
                forms.push((carrier, reaction));
            }
        }
        Ok(Self { forms, sign })
    }

    /// The change as written.
    #[must_use]
    pub fn written(&self) -> &Reaction {
        &self.forms[0].1
    }

    /// The gas of which the equation exchanges most, for a driving force per mole: formula and amount.
    #[must_use]
    pub fn exchanged(&self) -> Option<(String, f64)> {
        let gases = self.written().used.iter().filter(|u| u.class == Class::Gas);
        // The reactant gas, or the gas given off where none is taken up.
        let mut taken: Vec<_> = gases.clone().filter(|u| u.nu < 0.0).collect();
        if taken.is_empty() {
            taken = gases.collect();
        }
        taken.into_iter().max_by(|a, b| a.nu.abs().total_cmp(&b.nu.abs())).map(|u| (u.formula.clone(), u.nu.abs()))
    }
}

/// The equation with its O2 carried by a pair; `None` where it holds no O2.
fn carried(equation: &Equation, oxidised: &str, reduced: &str) -> Option<Equation> {
    let oxygen = equation.terms.iter().find(|t| t.species.formula.text() == "O2")?.coefficient.clone();
    let two = BigRational::from(num_bigint::BigInt::from(2)) * oxygen;
    let mut terms: Vec<Term> = equation.terms.iter().filter(|t| t.species.formula.text() != "O2").cloned().collect();
    for (formula, n) in [(oxidised, two.clone()), (reduced, -two)] {
        let text = formula.to_string() + "(g)";
        match terms.iter_mut().find(|t| t.species.formula.text() == formula) {
            Some(t) => t.coefficient += n,
            None => terms.push(Term { species: Species::parse(&text).ok()?, coefficient: n }),
        }
    }
    let both = terms.iter().any(|t| t.coefficient.is_negative()) && terms.iter().any(|t| t.coefficient.is_positive());
    (both && terms.iter().any(|t| !t.coefficient.is_zero())).then(|| Equation::from_terms(terms))
}
