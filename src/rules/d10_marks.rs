//! D-10: a skid gives the speed at the start of the visible mark.
//!
//! Braking before the mark is not counted, so the speed is a minimum for the
//! onset of braking.

use super::{Facts, Finding};
use crate::diag::Notice;
use crate::plan::Sought;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    facts
        .plan
        .results
        .iter()
        .filter(|r| r.sought == Sought::SpeedAtStartOfMarks)
        .map(|r| {
            let message =
                format!("{}: at the start of the visible mark, a minimum for the onset of braking", r.label);
            Notice::note("D-10", message).into()
        })
        .collect()
}
