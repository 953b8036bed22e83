//! The mechanics: formulas in SI units, ISO 8855 axes.
//!
//! In: numbers. Out: numbers, or a refusal with its reason. Never formats
//! text, reads a clock, draws a random number, or clamps.
//! Angles run counter-clockwise from east (X); grades are positive uphill in
//! the direction of travel.
//!
//! A new method is one file here (its formulas and its [`Method`]) and one
//! line in [`METHODS`] and [`formulas`]; `tests/catalogue.rs` then demands its
//! reference values.

pub mod braking;
pub mod contact;
pub mod inline_impact;
pub mod mass;
pub mod momentum;
pub mod path;

use crate::method::{Method, Node};

/// Standard gravity, m/s² (CGPM 1901), unless a case states a local value.
pub const STANDARD_GRAVITY: f64 = 9.80665;

/// Every method.
pub const METHODS: &[&Method] = &[
    &braking::METHOD,
    &mass::METHOD,
    &path::METHOD,
    &contact::METHOD,
    &momentum::METHOD,
    &inline_impact::METHOD,
];

/// Every formula, by family.
pub fn formulas() -> Vec<&'static dyn Node> {
    [
        braking::FORMULAS,
        mass::FORMULAS,
        path::FORMULAS,
        contact::FORMULAS,
        momentum::FORMULAS,
        inline_impact::FORMULAS,
    ]
    .concat()
}
