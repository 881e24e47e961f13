//! Text to a balanced equation.
//!
//! `Cr + H2O = Cr2O3 + H2` is balanced; `2 Cr + 1.5 O2 = Cr2O3` is checked. Sides are parted by `=`, `->` or
//! an arrow; coefficients may be whole, decimal (point or comma) or a fraction; states and phases follow in
//! brackets. Known steps add up: `2*(A = B) - (C = D)`.

use crate::balance::null_space;
use alloc::collections::BTreeMap;
use alloc::string::{String, ToString};
use alloc::vec::Vec;
use leeway_substances::{Element, Species, SpeciesError};
use num_bigint::BigInt;
use num_rational::BigRational;
use num_traits::{One, Signed, ToPrimitive, Zero};

/// One species with its coefficient: negative for a reactant.
#[derive(Debug, Clone, PartialEq)]
pub struct Term {
    /// The species.
    pub species: Species,
    /// Coefficient, exact.
    pub coefficient: BigRational,
}

/// A balanced equation.
#[derive(Debug, Clone, PartialEq)]
pub struct Equation {
    /// Reactants first, each side in the order typed.
    pub terms: Vec<Term>,
}

/// Why a text is not an equation.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
#[non_exhaustive]
pub enum EquationError {
    /// The text is longer than an equation is.
    #[error("found {found} characters, expected an equation of at most {most}")]
    TooLong {
        /// Characters found.
        found: usize,
        /// Most that is read.
        most: usize,
    },
    /// No sign between the sides, or more than one.
    #[error("found {} between the sides, expected one \u{201c}=\u{201d} or arrow", if *.found == 0 { "no sign".to_string() } else { alloc::format!("{found} signs") })]
    Sides {
        /// Number found.
        found: usize,
    },
    /// Something that is not a species stands at a place.
    #[error("{}found {found}, expected {expected}", place_text(token))]
    Species {
        /// The piece of text.
        token: String,
        /// What was found.
        found: String,
        /// What was expected.
        expected: String,
    },
    /// A coefficient that is not one.
    #[error(
        "at \u{201c}{token}\u{201d}: found coefficient {found}, expected a number above 0; reactants stand on the left"
    )]
    Coefficient {
        /// The piece of text.
        token: String,
        /// What was found.
        found: String,
    },
    /// Written with coefficients, and not balanced.
    #[error("not balanced: {}", surplus_text(surplus))]
    Unbalanced {
        /// Element, and surplus on the right (negative: on the left), as text.
        surplus: Vec<(String, String)>,
        /// The same substances balanced, where one balance exists.
        balanced: Option<String>,
    },
    /// Written without coefficients, and no coefficients balance it.
    #[error("no coefficients balance it: {why}")]
    Unbalanceable {
        /// Why, as far as it can be told.
        why: String,
    },
    /// Written without coefficients, and more than one independent balance exists.
    #[error("it balances in more than one way: {}", ways.join("; or "))]
    Ambiguous {
        /// Independent balances as equations.
        ways: Vec<String>,
    },
    /// Brackets of a sum of equations that do not close.
    #[error("at \u{201c}{token}\u{201d}: found {found}, expected {expected}")]
    Sum {
        /// The piece of text.
        token: String,
        /// What was found.
        found: String,
        /// What was expected.
        expected: String,
    },
    /// Everything cancels.
    #[error("found the same on both sides, expected a change")]
    Nothing,
}

fn place_text(token: &str) -> String {
    if token.is_empty() { String::new() } else { alloc::format!("at \u{201c}{token}\u{201d}: ") }
}

fn surplus_text(surplus: &[(String, String)]) -> String {
    let parts: Vec<String> = surplus
        .iter()
        .map(|(e, n)| match n.strip_prefix('-') {
            Some(n) => alloc::format!("{e}, {n} too many on the left"),
            None => alloc::format!("{e}, {n} too many on the right"),
        })
        .collect();
    parts.join("; ")
}

const LONGEST: usize = 600;
const MOST_SPECIES: usize = 24;
/// Whole coefficients up to this size are easier to read than decimals.
const LARGEST_WHOLE: u32 = 60;

impl Equation {
    /// Reads and balances an equation or a sum of equations.
    ///
    /// # Errors
    /// [`EquationError`] naming the piece of text, what was found and what was expected.
    pub fn parse(text: &str) -> Result<Self, EquationError> {
        let length = text.chars().count();
        if length > LONGEST {
            return Err(EquationError::TooLong { found: length, most: LONGEST });
        }
        let text = text.trim();
        if is_sum(text) { parse_sum(text) } else { parse_single(text) }
    }

    /// An equation of given species and coefficients; terms of coefficient zero are dropped.
    #[must_use]
    pub fn from_terms(terms: Vec<Term>) -> Self {
        let (left, right): (Vec<Term>, Vec<Term>) =
            terms.into_iter().filter(|t| !t.coefficient.is_zero()).partition(|t| t.coefficient.is_negative());
        Self { terms: left.into_iter().chain(right).collect() }
    }

    /// The same equation with every coefficient multiplied.
    #[must_use]
    pub fn times(&self, factor: &BigRational) -> Self {
        Self::from_terms(
            self.terms
                .iter()
                .map(|t| Term { species: t.species.clone(), coefficient: &t.coefficient * factor })
                .collect(),
        )
    }

    /// Written out: `2 Cr + 3 H2O = Cr2O3 + 3 H2`.
    #[must_use]
    pub fn text(&self) -> String {
        let side = |positive: bool| {
            let parts: Vec<String> = self
                .terms
                .iter()
                .filter(|t| t.coefficient.is_positive() == positive)
                .map(|t| {
                    let n = t.coefficient.abs();
                    if n.is_one() {
                        t.species.text()
                    } else {
                        alloc::format!("{} {}", number_text(&n), t.species.text())
                    }
                })
                .collect();
            parts.join(" + ")
        };
        alloc::format!("{} = {}", side(false), side(true))
    }
}

/// A coefficient as people write it: whole, or decimal where that is exact in few digits, or a fraction.
pub(crate) fn number_text(n: &BigRational) -> String {
    if n.is_integer() {
        return n.to_integer().to_string();
    }
    let mut denominator = n.denom().clone();
    for p in [2u32, 5] {
        while (&denominator % p).is_zero() {
            denominator /= p;
        }
    }
    if denominator.is_one() {
        let value = n.to_f64().unwrap_or(f64::NAN);
        let text = alloc::format!("{value}");
        if text.len() <= 8 {
            return text;
        }
    }
    alloc::format!("{}/{}", n.numer(), n.denom())
}

/// A sum of equations starts with a bracket, perhaps after a sign or a number, that holds a whole equation.
fn is_sum(text: &str) -> bool {
    let body = text.trim_start_matches(|c: char| {
        c.is_ascii_digit() || matches!(c, ' ' | '*' | '.' | ',' | '/' | '+' | '-' | '\u{2212}' | '·' | '×')
    });
    let Some(rest) = body.strip_prefix(['(', '[', '{']) else { return false };
    let mut depth = 1;
    for (i, c) in rest.char_indices() {
        match c {
            '(' | '[' | '{' => depth += 1,
            ')' | ']' | '}' => {
                depth -= 1;
                if depth == 0 {
                    return split_sides(&rest[..i]).len() > 1;
                }
            }
            _ => {}
        }
    }
    split_sides(rest).len() > 1
}

fn parse_sum(text: &str) -> Result<Equation, EquationError> {
    let mut total: Vec<Term> = Vec::new();
    let mut rest = text;
    let mut first = true;
    while !rest.trim_start().is_empty() {
        rest = rest.trim_start();
        let mut sign = BigRational::one();
        match rest.chars().next() {
            Some('+') => rest = rest[1..].trim_start(),
            Some('-') => {
                sign = -sign;
                rest = rest[1..].trim_start();
            }
            Some('\u{2212}') => {
                sign = -sign;
                rest = rest['\u{2212}'.len_utf8()..].trim_start();
            }
            _ if !first => {
                return Err(EquationError::Sum {
                    token: clip(rest),
                    found: "no sign".to_string(),
                    expected: "\u{201c}+\u{201d} or \u{201c}-\u{201d} between the steps".to_string(),
                });
            }
            _ => {}
        }
        first = false;
        let (factor, after) =
            take_number(rest).map_err(|found| EquationError::Coefficient { token: clip(rest), found })?;
        let after = after.trim_start().trim_start_matches(['*', '·', '×']).trim_start();
        let Some(inside) = after.strip_prefix(['(', '[', '{']) else {
            return Err(EquationError::Sum {
                token: clip(after),
                found: "no bracket".to_string(),
                expected: "a step in brackets, for example 2*(A = B)".to_string(),
            });
        };
        let mut depth = 1;
        let end = inside.char_indices().find_map(|(i, c)| {
            match c {
                '(' | '[' | '{' => depth += 1,
                ')' | ']' | '}' => depth -= 1,
                _ => {}
            }
            (depth == 0).then_some(i)
        });
        let Some(end) = end else {
            return Err(EquationError::Sum {
                token: clip(after),
                found: "a bracket left open".to_string(),
                expected: "\u{201c})\u{201d}".to_string(),
            });
        };
        let step = Equation::parse(&inside[..end])?.times(&(sign * factor.unwrap_or_else(BigRational::one)));
        for term in step.terms {
            match total.iter_mut().find(|t| t.species.text() == term.species.text()) {
                Some(t) => t.coefficient += term.coefficient,
                None => total.push(term),
            }
        }
        rest = &inside[end + 1..];
    }
    let equation = Equation::from_terms(total);
    if equation.terms.is_empty() { Err(EquationError::Nothing) } else { Ok(equation) }
}

fn clip(text: &str) -> String {
    // A control character would spoil the place it is shown in.
    let mut piece: String = text.chars().take(24).map(|c| if c.is_control() { '\u{fffd}' } else { c }).collect();
    if piece.chars().count() < text.chars().count() {
        piece.push('\u{2026}');
    }
    piece
}

/// Cuts at every `=`, `->`, `=>`, `<=>`, or arrow.
fn split_sides(text: &str) -> Vec<String> {
    let mut plain =
        text.replace("<=>", "=").replace("<->", "=").replace("-->", "=").replace("=>", "=").replace("->", "=");
    for arrow in ['→', '⇌', '⟶', '⇒', '↔', '⇄'] {
        plain = plain.replace(arrow, "=");
    }
    plain.split('=').map(|s| s.trim().to_string()).collect()
}

/// Splits a side at `+` outside brackets.
fn split_terms(side: &str) -> Vec<&str> {
    let (mut depth, mut start) = (0i32, 0);
    let mut parts = Vec::new();
    for (i, c) in side.char_indices() {
        match c {
            '(' | '[' | '{' => depth += 1,
            ')' | ']' | '}' => depth -= 1,
            '+' if depth <= 0 => {
                parts.push(side[start..i].trim());
                start = i + 1;
            }
            _ => {}
        }
    }
    parts.push(side[start..].trim());
    parts
}

fn parse_single(text: &str) -> Result<Equation, EquationError> {
    let sides = split_sides(text);
    if text.is_empty() {
        return Err(EquationError::Species {
            token: String::new(),
            found: "nothing".to_string(),
            expected: "an equation, for example Cr + H2O = Cr2O3 + H2".to_string(),
        });
    }
    if sides.len() != 2 {
        return Err(EquationError::Sides { found: sides.len() - 1 });
    }
    let mut terms: Vec<Term> = Vec::new();
    let mut any_coefficient = false;
    for (side, sign) in sides.iter().zip([-1i32, 1]) {
        for token in split_terms(side) {
            let (coefficient, name) =
                take_number(token).map_err(|found| EquationError::Coefficient { token: clip(token), found })?;
            let name = name.trim_start().trim_start_matches(['*', '·', '×']).trim();
            if name.is_empty() {
                return Err(EquationError::Species {
                    token: clip([token, side, text].into_iter().find(|t| !t.is_empty()).unwrap_or("")),
                    found: "nothing".to_string(),
                    expected: "a formula on both sides of every + and =".to_string(),
                });
            }
            let species = Species::parse(name).map_err(|e| match e {
                SpeciesError::Formula(e) => {
                    EquationError::Species { token: clip(token), found: e.found, expected: e.expected }
                }
                other => EquationError::Species {
                    token: clip(token),
                    found: other
                        .to_string()
                        .split(", expected")
                        .next()
                        .unwrap_or("")
                        .trim_start_matches("found ")
                        .to_string(),
                    expected: "a solid (s), liquid (l) or gas (g)".to_string(),
                },
            })?;
            any_coefficient |= coefficient.is_some();
            let n = coefficient.unwrap_or_else(BigRational::one) * BigRational::from(BigInt::from(sign));
            match terms
                .iter_mut()
                .find(|t| t.species.text() == species.text() && t.coefficient.is_positive() == n.is_positive())
            {
                Some(t) => t.coefficient += n,
                None => terms.push(Term { species, coefficient: n }),
            }
        }
    }
    if terms.len() > MOST_SPECIES {
        return Err(EquationError::Species {
            token: clip(text),
            found: alloc::format!("{} species", terms.len()),
            expected: alloc::format!("at most {MOST_SPECIES}"),
        });
    }
    let surplus = surplus(&terms);
    if surplus.is_empty() {
        return Ok(Equation::from_terms(terms));
    }
    if any_coefficient {
        let surplus = surplus.into_iter().map(|(e, n)| (e.symbol().to_string(), number_text_signed(&n))).collect();
        let one = |t: &Term| if t.coefficient.is_negative() { -BigRational::one() } else { BigRational::one() };
        let bare = terms.iter().map(|t| Term { species: t.species.clone(), coefficient: one(t) }).collect();
        let balanced = balance(bare).ok().map(|e| e.text());
        return Err(EquationError::Unbalanced { surplus, balanced });
    }
    balance(terms)
}

fn number_text_signed(n: &BigRational) -> String {
    if n.is_negative() { alloc::format!("-{}", number_text(&n.abs())) } else { number_text(n) }
}

fn surplus(terms: &[Term]) -> BTreeMap<Element, BigRational> {
    let mut sums: BTreeMap<Element, BigRational> = BTreeMap::new();
    for t in terms {
        for (e, n) in t.species.formula.counts() {
            *sums.entry(*e).or_insert_with(BigRational::zero) += n * &t.coefficient;
        }
    }
    sums.retain(|_, n| !n.is_zero());
    sums
}

fn balance(mut terms: Vec<Term>) -> Result<Equation, EquationError> {
    let formulas: Vec<_> = terms.iter().map(|t| &t.species.formula).collect();
    for (e, _) in surplus(&terms) {
        let on = |positive: bool| {
            terms.iter().any(|t| t.coefficient.is_positive() == positive && t.species.formula.counts().contains_key(&e))
        };
        let (left, right) = (on(false), on(true));
        if !(left && right) {
            let (here, there) = if left { ("left", "right") } else { ("right", "left") };
            return Err(EquationError::Unbalanceable {
                why: alloc::format!(
                    "{} stands on the {here} only; something with {} is missing on the {there}",
                    e.symbol(),
                    e.symbol()
                ),
            });
        }
    }
    let space = null_space(&formulas);
    if space.is_empty() {
        return Err(EquationError::Unbalanceable {
            why: "the elements cannot be conserved with these substances; one is missing or wrong".to_string(),
        });
    }
    if space.len() > 1 {
        let ways = space
            .iter()
            .map(|v| {
                let mut way: Vec<Term> = terms.clone();
                for (t, n) in way.iter_mut().zip(scaled(v)) {
                    t.coefficient = n;
                }
                Equation::from_terms(way).text()
            })
            .collect();
        return Err(EquationError::Ambiguous { ways });
    }
    let mut v = scaled(&space[0]);
    let agreeing = v.iter().zip(&terms).filter(|(n, t)| n.is_positive() == t.coefficient.is_positive()).count();
    let first_agrees = v[0].is_positive() == terms[0].coefficient.is_positive();
    if agreeing * 2 < v.len() || (agreeing * 2 == v.len() && !first_agrees) {
        v = v.into_iter().map(|n| -n).collect();
    }
    for (n, t) in v.iter().zip(&terms) {
        if n.is_zero() {
            return Err(EquationError::Unbalanceable {
                why: alloc::format!("{} takes no part; leave it out, or give coefficients", t.species.text()),
            });
        }
    }
    let astray: Vec<String> = v
        .iter()
        .zip(&terms)
        .filter(|(n, t)| n.is_positive() != t.coefficient.is_positive())
        .map(|(_, t)| t.species.text())
        .collect();
    if !astray.is_empty() {
        let belong = if astray.len() == 1 { "belongs" } else { "belong" };
        return Err(EquationError::Unbalanceable {
            why: alloc::format!("{} {belong} on the other side", astray.join(" and ")),
        });
    }
    for (t, n) in terms.iter_mut().zip(v) {
        t.coefficient = n;
    }
    Ok(Equation::from_terms(terms))
}

/// Smallest whole coefficients; where those run past [`LARGEST_WHOLE`], decimals with one of them set to one.
fn scaled(v: &[BigRational]) -> Vec<BigRational> {
    let lcm = v.iter().fold(BigInt::one(), |acc, n| {
        let d = n.denom();
        let gcd = gcd(acc.clone(), d.clone());
        acc * d / gcd
    });
    let whole: Vec<BigInt> = v.iter().map(|n| (n * BigRational::from(lcm.clone())).to_integer()).collect();
    let common = whole.iter().fold(BigInt::zero(), |acc, n| gcd(acc, n.abs()));
    let whole: Vec<BigInt> = whole.into_iter().map(|n| n / &common).collect();
    let largest = whole.iter().map(Signed::abs).max().unwrap_or_else(BigInt::one);
    if largest <= BigInt::from(LARGEST_WHOLE) {
        return whole.into_iter().map(BigRational::from).collect();
    }
    // The largest that leaves decimals people can read; 1000/2889 is none.
    let mut divisors: Vec<BigInt> = whole.iter().map(Signed::abs).collect();
    divisors.sort_by(|a, b| b.cmp(a));
    let by =
        |d: &BigInt| -> Vec<BigRational> { whole.iter().map(|n| BigRational::new(n.clone(), d.clone())).collect() };
    let readable = |v: &[BigRational]| v.iter().all(|n| !number_text(n).contains('/'));
    divisors.iter().map(by).find(|v| readable(v)).unwrap_or_else(|| by(&largest))
}

fn gcd(a: BigInt, b: BigInt) -> BigInt {
    let (mut a, mut b) = (a, b);
    while !b.is_zero() {
        (a, b) = (b.clone(), a % b);
    }
    a
}

/// A leading coefficient and what follows it. `Err` carries the text of a coefficient that is none.
fn take_number(text: &str) -> Result<(Option<BigRational>, &str), String> {
    let text = text.trim_start();
    for (sign, n, d) in [('½', 1, 2), ('⅓', 1, 3), ('⅔', 2, 3), ('¼', 1, 4), ('¾', 3, 4), ('⅕', 1, 5), ('⅙', 1, 6)]
    {
        if let Some(rest) = text.strip_prefix(sign) {
            return Ok((Some(BigRational::new(BigInt::from(n), BigInt::from(d))), rest));
        }
    }
    if let Some(sign) = text.chars().next().filter(|c| matches!(c, '-' | '\u{2212}')) {
        return Err(alloc::format!("\u{201c}{sign}\u{201d}"));
    }
    let end = text.find(|c: char| !(c.is_ascii_digit() || matches!(c, '.' | ',' | '/'))).unwrap_or(text.len());
    let number = &text[..end];
    if number.is_empty() {
        return Ok((None, text));
    }
    let value = match number.split_once('/') {
        Some((a, b)) => decimal(a).zip(decimal(b)).filter(|(_, b)| !b.is_zero()).map(|(a, b)| a / b),
        None => decimal(number),
    };
    match value {
        Some(value) if value.is_positive() => Ok((Some(value), &text[end..])),
        _ => Err(alloc::format!("\u{201c}{number}\u{201d}")),
    }
}

fn decimal(text: &str) -> Option<BigRational> {
    let text = text.replace(',', ".");
    let (whole, part) = text.split_once('.').unwrap_or((text.as_str(), ""));
    if (whole.is_empty() && part.is_empty()) || whole.len() + part.len() > 15 || part.contains('.') {
        return None;
    }
    let digits: u64 = alloc::format!("{whole}{part}").parse().ok()?;
    let scale = 10u64.pow(u32::try_from(part.len()).ok()?);
    Some(BigRational::new(BigInt::from(digits), BigInt::from(scale)))
}
