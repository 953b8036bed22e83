//! M-14: a band wider than half the speed it belongs to.
//!
//! Such a speed is hardly known; the budget tells what drives it. Where the
//! approach directions lie near one line the stop of M-1 speaks instead.

use super::{Facts, Finding};
use crate::diag::Notice;
use crate::plan::Sought;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    // From there on M-1 speaks of the same.
    let condition = facts.plan.watch.momentum.as_ref().and_then(|m| m.condition);
    if condition
        .and_then(|slot| facts.evaluation.value(slot))
        .is_some_and(|k| k.abs() >= super::m1_condition::WARN_FROM)
    {
        return Vec::new();
    }
    let Some(name) = too_wide(facts) else { return Vec::new() };
    let place = facts.case.impacts.first().map(|i| i.place);
    let message = format!("the 95 % band of {name}'s speed at impact is wider than half the speed");
    let hint = "the budget names the entries that drive it: measure those better, or add other evidence";
    vec![Notice::warn("M-14", message).at(place).hint(hint).into()]
}

/// The first unit whose 95 % band is wider than half its impact speed.
pub(super) fn too_wide(facts: &Facts<'_>) -> Option<String> {
    facts.plan.results.iter().zip(facts.bands).find_map(|(result, band)| {
        let name = result.unit.as_ref().filter(|_| result.sought == Sought::ImpactSpeed)?;
        // By linear propagation, so that the verdict does not hang on the
        // number of trials.
        let linear = &band.as_ref()?.linear;
        (2.0 * linear.k * linear.u > 0.5 * linear.value.abs()).then(|| name.clone())
    })
}
