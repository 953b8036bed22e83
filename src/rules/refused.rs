//! Lines that refused, with their reasons: P-4, or M-9 where energy would be
//! gained.
//!
//! What contradicts itself in one unit is no result for the other either: a
//! line of the impact that refuses takes all its results away.

use super::{Facts, Finding, Withheld};
use crate::diag::Notice;
use crate::plan::SlotRefusal;

/// Formulas whose refusal means that energy would be gained.
const ENERGY: [&str; 4] = ["energy-lost", "implied-restitution", "absorbed-energy", "restitution"];

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let mut found = Vec::new();
    for call in &facts.plan.calls {
        let Some(SlotRefusal::Here(refusal)) = facts.evaluation.refusals[call.out.0] else { continue };
        let mut message = format!("{}: {}", call.title, refusal.reason);
        if refusal.value.is_finite() {
            message.push_str(&format!(" (it would be {})", facts.show(refusal.kind, refusal.value)));
        }
        let card = call.node.card();
        let code = if ENERGY.contains(&card.id) { "M-9" } else { "P-4" };
        let mut notice = Notice::stop(code, message).at(call.place);
        let in_impact = matches!(card.method, "momentum" | "in-line");
        if card.method == "momentum" {
            let hint = "was a bearing entered as an angle, or the other way round? check directions, masses and speeds";
            notice = notice.hint(hint);
        }
        let withheld = if in_impact { Withheld::Impact } else { Withheld::Nothing };
        found.push(Finding { notice, withheld });
    }
    found
}
