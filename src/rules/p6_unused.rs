//! P-6: an entry that no result uses.
//!
//! Evidence that is entered and left aside may contradict the results without
//! anybody seeing it. Points and spare friction tests are no evidence of their
//! own; for those a remark is enough.

use super::{Facts, Finding};
use crate::case::{Case, Direction, Entry};
use crate::diag::{Notice, Place};
use crate::plan::Stage;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    if !facts.plan.results.iter().any(|r| r.stage == Stage::Impact) && !facts.case.impacts.is_empty() {
        // The impact was refused for another reason, which is said.
        return Vec::new();
    }
    let used = used(facts);
    let mut found: Vec<Finding> = Vec::new();
    for entry in evidence(facts.case).into_iter().filter(|e| !used.contains(&e.place)) {
        let message = format!("{} ({}) is entered, but no result uses it", entry.name, entry.entered);
        let hint = "what it says is not held against the results; leave it out, or solve the impact from it";
        found.push(Notice::warn("P-6", message).at(entry.place).hint(hint).into());
    }
    for test in facts.case.tests.iter().filter(|t| !used.contains(&t.drag.place)) {
        let message = format!("friction test {} is not used", test.id);
        found.push(Notice::note("P-6", message).at(test.drag.place).into());
    }
    found
}

/// Places of the entries that some line needs, whatever becomes of it.
fn used(facts: &Facts<'_>) -> Vec<Place> {
    let mut slots = facts.plan.checks();
    slots.extend(facts.plan.results.iter().map(|r| r.slot));
    let needed = facts.plan.needed(&slots);
    let calls = facts.plan.calls.iter().zip(&needed).filter(|(_, needed)| **needed);
    slots.extend(calls.flat_map(|(call, _)| call.ins.iter().copied()));
    slots.iter().filter_map(|slot| facts.plan.input_of(*slot)?.place).collect()
}

/// Entries that somebody measured about a unit or an impact.
fn evidence(case: &Case) -> Vec<&Entry> {
    let mut all: Vec<&Entry> = Vec::new();
    for impact in &case.impacts {
        all.extend(impact.restitution.iter().chain(&impact.absorbed_energy));
        all.extend(impact.delta_v.iter().flatten());
    }
    for phase in case.units.iter().flat_map(|u| &u.phases) {
        all.extend(&phase.speed);
        for direction in [&phase.direction, &phase.heading].into_iter().flatten() {
            if let Direction::Angle(entry) = direction {
                all.push(entry);
            }
        }
    }
    all.extend(case.error_changes.iter().map(|c| &c.entry));
    all
}
