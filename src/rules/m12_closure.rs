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
        // Sums of exact entries close but for rounding.
        let rounding = 1e-9 * facts.size(*slot);
        if value.abs() > (2.0 * u).max(rounding) {
            let place = facts.plan.call_of(*slot).and_then(|c| facts.plan.calls.get(c)).and_then(|c| c.place);
            let how_far = if u > 0.0 {
                format!("{} standard uncertainties", fixed(value.abs() / u, 1))
            } else {
                "exact entries contradict each other".to_string()
            };
            let message = format!("{sentence} ({how_far})");
            found.push(
                Notice::warn("M-12", message).at(place).hint("see the line that should be zero").into(),
            );
        }
    }
    found
}
