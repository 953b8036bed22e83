//! Lines that refused, with their reasons (M-9 where energy would be gained).

use super::{Facts, Finding, Withheld};
use crate::diag::Notice;
use crate::plan::SlotRefusal;
use crate::units::{System, significant};

/// Formulas whose refusal means that the whole impact is impossible.
const ENERGY: [&str; 4] = ["energy-lost", "implied-restitution", "absorbed-energy", "restitution"];

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let mut found = Vec::new();
    for call in &facts.plan.calls {
        let Some(SlotRefusal::Here(refusal)) = facts.evaluation.refusals[call.out.0] else { continue };
        let mut message = format!("{}: {}", call.title, refusal.reason);
        if refusal.value.is_finite() {
            let (unit, scale) = System::Metric.unit(refusal.kind);
            message.push_str(&format!(" (it would be {} {unit})", significant(refusal.value / scale, 3)));
        }
        let gains_energy = ENERGY.contains(&call.node.card().id);
        let code = if gains_energy { "M-9" } else { "P-4" };
        let withheld = if gains_energy { Withheld::Impact } else { Withheld::Nothing };
        found.push(Finding {
            notice: Notice::stop(code, message.trim_end().to_string()).at(call.place),
            withheld,
        });
    }
    found
}
