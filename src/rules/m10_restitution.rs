//! M-10: the centres of gravity still closed in along the impulse.
//!
//! For points that means passing through each other. Real units can turn round
//! each other, so for points it is a flag, not a stop.

use super::{Facts, Finding};
use crate::diag::Notice;
use crate::units::fixed;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let Some(impact) = &facts.plan.watch.momentum else { return Vec::new() };
    let Some(e) = facts.evaluation.value(impact.restitution) else { return Vec::new() };
    if e >= -0.05 || e + 2.0 * facts.u(impact.restitution) >= 0.0 {
        return Vec::new();
    }
    let message = format!(
        "restitution implied is {}: after the impact the centres of gravity still closed in along the impulse",
        fixed(e, 2)
    );
    let hint = "the units turned round each other or slid past: a model with rotation is needed, or a direction is wrong";
    vec![Notice::warn("M-10", message).at(impact.place).hint(hint).into()]
}
