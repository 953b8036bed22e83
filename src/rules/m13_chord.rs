//! M-13: a travel shorter than the straight line between its ends, or more
//! than twice as long.

use super::{Facts, Finding, Withheld};
use crate::diag::Notice;
use crate::units::Kind;

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
                facts.show(Kind::Length, l),
                facts.show(Kind::Length, c)
            );
            let notice = Notice::stop("M-13", message).at(*place).expected("at least the straight line");
            found.push(Finding { notice, withheld: Withheld::All });
        } else if l > 2.0 * c + 2.0 * u {
            let message = format!(
                "{words}: a travel of {} is more than twice the straight line of {} between its ends",
                facts.show(Kind::Length, l),
                facts.show(Kind::Length, c)
            );
            let hint = "is a distance mistyped, a stretch entered twice, or a point wrong?";
            found.push(Notice::warn("M-13", message).at(*place).hint(hint).into());
        }
    }
    found
}
