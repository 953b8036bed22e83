//! Mass of a vehicle as it was in the crash.

use crate::formula;
use crate::method::{Limit, Method, Node};

/// The method's card.
pub const METHOD: Method = Method {
    id: "mass",
    title: "Mass in the crash",
    answers: "the mass that moved: the vehicle with its occupants and load",
    holds: "Whatever moved with the vehicle through the impact is in it, and nothing else.",
    source: "elementary mechanics",
    errors: &[],
};

/// The formulas of this family.
pub const FORMULAS: &[&dyn Node] = &[LoadedMass::NODE];

formula! {
    /// Vehicle plus occupants and load.
    LoadedMass, "loaded-mass", "mass", "Mass with occupants and load";
    in vehicle: Mass "m_{v}" "vehicle", load: Mass "m_{l}" "occupants and load";
    out Mass "m" "mass in the crash";
    limits &[Limit::input(0, 0.0, f64::INFINITY, "a mass is not below zero"),
             Limit::input(1, 0.0, f64::INFINITY, "a load is not below zero")];
    undefined "the masses give no sum";
    source "elementary mechanics";
    = vehicle + load
}
