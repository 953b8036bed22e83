//! B-4: one measurement entered twice is treated as two.
//!
//! If both speeds after impact come from the same friction, its error moves
//! both; entered as two it seems to average out.

use super::{Facts, Finding};
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
    found
}
