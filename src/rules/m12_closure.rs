//! M-12: a quantity that must be zero is not.
//!
//! Momentum across a lone mover's course, or the difference of two recorded
//! impulses. Beyond twice its standard uncertainty the entries contradict.

use super::{Facts, Finding};
use crate::diag::Notice;
use crate::units::fixed;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let mut found = Vec::new();
    for (slot, sentence) in &facts.plan.watch.zeros {
        let Some(value) = facts.evaluation.value(*slot) else { continue };
        let u = facts.u(*slot);
        if u > 0.0 && value.abs() > 2.0 * u {
            let place = facts.plan.call_of(*slot).and_then(|c| facts.plan.calls.get(c)).and_then(|c| c.place);
            let message = format!("{sentence} ({} standard uncertainties)", fixed(value.abs() / u, 1));
            found.push(
                Notice::warn("M-12", message).at(place).hint("see the line that should be zero").into(),
            );
        }
    }
    found
}
