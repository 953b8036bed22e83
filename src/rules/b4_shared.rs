//! B-4: one measurement entered twice is treated as two.
//!
//! If both speeds after impact come from the same friction, its error moves
//! both; entered as two it seems to average out.

use super::{Facts, Finding};
use crate::case::Drag;
use crate::diag::Notice;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let tests = &facts.case.tests;
    let mut found = Vec::new();
    for (i, a) in tests.iter().enumerate() {
        for b in &tests[i + 1..] {
            if a.drag.dist == b.drag.dist && a.grade.is_none() == b.grade.is_none() {
                let message = format!(
                    "friction tests {} and {} have the same values: if they are one test, its error is shared, and \
                     entering it twice makes the band too narrow",
                    a.id, b.id
                );
                let notice = Notice::warn("B-4", message).at(b.drag.place);
                found.push(notice.hint(format!("if it is one test, use {} in both places", a.id)).into());
            }
        }
    }
    found.extend(stated(facts));
    found
}

/// Drag factors typed twice with the same value and uncertainty.
fn stated(facts: &Facts<'_>) -> Vec<Finding> {
    let stretches = facts.case.units.iter().flat_map(|u| &u.phases).flat_map(|p| &p.travel);
    let factors: Vec<_> = stretches
        .filter_map(|s| match &s.drag {
            Drag::Stated { factor, .. } if !factor.dist.is_exact() => Some(factor),
            _ => None,
        })
        .collect();
    let mut found = Vec::new();
    for (i, a) in factors.iter().enumerate() {
        if let Some(b) = factors[i + 1..].iter().find(|b| b.dist == a.dist) {
            let message =
                format!("{} and {} have the same values and count as two measurements", a.name, b.name);
            let hint = "if they are one, make a friction test of it and use it in both places";
            found.push(Notice::warn("B-4", message).at(b.place).hint(hint).into());
        }
    }
    found
}
