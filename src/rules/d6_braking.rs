//! D-6: friction of a locked skid used for a stop with anti-lock brakes, or the
//! other way round.
//!
//! The two differ by 10 to 20 % on the drag (common practice, from memory).

use super::{Facts, Finding};
use crate::case::{Braking, Drag};
use crate::diag::Notice;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let phases = facts.case.units.iter().flat_map(|u| &u.phases);
    let stretches = phases.flat_map(|p| &p.travel);
    stretches
        .filter_map(|stretch| {
            let Drag::Friction { test, share } = &stretch.drag else { return None };
            let test = &facts.case.tests[test.0];
            let wheels = match share.entered.as_str() {
                "all locked" | "sliding sideways" => Braking::Locked,
                "abs" => Braking::Abs,
                _ => return None,
            };
            if wheels == test.braking {
                return None;
            }
            let message = format!(
                "{}: wheels \"{}\", but friction test {} was braked otherwise",
                share.name, share.entered, test.id
            );
            let hint = "use a test braked the same way, or give a drag_factor with an uncertainty that covers the difference";
            Some(Notice::warn("D-6", message).at(share.place).hint(hint).into())
        })
        .collect()
}
