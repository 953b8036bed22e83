//! M-13: a travel shorter than the straight line between its ends.

use super::{Facts, Finding, Withheld};
use crate::diag::Notice;
use crate::units::{Kind, fixed, si};

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let mut found = Vec::new();
    for (length, chord, place, words) in &facts.plan.watch.chords {
        let (Some(l), Some(c)) = (facts.evaluation.value(*length), facts.evaluation.value(*chord)) else {
            continue;
        };
        let u = libm::hypot(facts.u(*length), facts.u(*chord));
        if l < c - 2.0 * u {
            let message = format!(
                "{words}: a travel of {} is shorter than the straight line of {} between its ends",
                si(Kind::Length, l, 2),
                fixed(c, 2)
            );
            let notice = Notice::stop("M-13", message).at(*place).expected("at least the straight line");
            found.push(Finding { notice, withheld: Withheld::All });
        }
    }
    found
}
