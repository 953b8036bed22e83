//! M-2: one unit carries most of the momentum.
//!
//! A small error of its direction then decides the other's speed: 1° of a
//! 1500 kg car at 54 km/h is 4.7 km/h on a 300 kg motorcycle crossing it.

use super::{Facts, Finding};
use crate::diag::Notice;
use crate::units::fixed;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let Some(impact) = &facts.plan.watch.momentum else { return Vec::new() };
    if impact.condition.is_none() {
        return Vec::new();
    }
    let value = |slot| facts.evaluation.value(slot);
    let momentum = [0, 1].map(|i| Some(value(impact.mass[i])? * value(impact.before[i])?));
    let [Some(a), Some(b)] = momentum else { return Vec::new() };
    let (heavy, light, ratio) = if a >= b { (0, 1, a / b) } else { (1, 0, b / a) };
    if !ratio.is_finite() || ratio <= 3.0 {
        return Vec::new();
    }
    let names = &impact.names;
    let message = format!(
        "{} brought {} times the momentum of {}: the speed of {} hangs on the direction of {}",
        names[heavy],
        fixed(ratio, 1),
        names[light],
        names[light],
        names[heavy]
    );
    let hint = "the budget prints the speed per degree for every direction: measure those directions best";
    vec![Notice::warn("M-2", message).at(impact.place).hint(hint).into()]
}
