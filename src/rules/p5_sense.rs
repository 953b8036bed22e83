//! P-5: a unit would have come from the other side.
//!
//! On one line a speed before impact below zero contradicts the stated sense
//! of travel.

use super::{Facts, Finding, Withheld};
use crate::diag::Notice;
use crate::plan::Sought;
use crate::units::Kind;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let speeds = facts.plan.results.iter().filter(|r| r.sought == Sought::ImpactSpeed);
    speeds
        .filter_map(|r| {
            let value = facts.evaluation.value(r.slot).filter(|v| *v < 0.0)?;
            let place =
                facts.plan.call_of(r.slot).and_then(|c| facts.plan.calls.get(c)).and_then(|c| c.place);
            let message = format!(
                "{}: {}, so it would have moved against its stated sense of travel",
                r.label,
                facts.show(Kind::Speed, value)
            );
            let notice = Notice::stop("P-5", message).at(place);
            let notice = notice.hint("check senses of travel, masses and speeds after impact");
            Some(Finding { notice, withheld: Withheld::Impact })
        })
        .collect()
}
