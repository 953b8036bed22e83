//! M-10: the centres of gravity still closed in along the impulse.
//!
//! For points that means passing through each other. Real units turn round
//! each other, and off-centre impacts mostly show it, so for points it is a
//! remark: the momentum sums hold all the same.

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
    let hint = "usual where units turn round each other or slide past; momentum holds all the same, but restitution \
                of points says nothing here";
    vec![Notice::note("M-10", message).at(impact.place).hint(hint).into()]
}
