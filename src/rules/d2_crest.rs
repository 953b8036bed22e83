//! D-2: two stretches that follow each other slope opposite ways.
//!
//! Without a crest or a sag between them one of the two has the wrong sense:
//! with a friction of 0.7 that changes the speed by 3 % for a 2 % grade.

use super::{Facts, Finding};
use crate::diag::Notice;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let mut found = Vec::new();
    for unit in &facts.case.units {
        for phase in &unit.phases {
            for pair in phase.travel.windows(2) {
                let grades =
                    [&pair[0], &pair[1]].map(|s| s.grade.as_ref().map_or(0.0, |g| g.dist.estimate()));
                if grades[0] * grades[1] < 0.0 && !pair[1].crest {
                    let message = format!(
                        "{}: one stretch goes up and the next one down, with no crest between",
                        unit.id
                    );
                    let notice = Notice::warn("D-2", message).at(pair[1].grade.as_ref().map(|g| g.place));
                    found.push(
                        notice
                            .hint("if the road turns over there, say crest = true; else one sense is wrong")
                            .into(),
                    );
                }
            }
        }
    }
    found
}
