//! S-1: notes on how the bands were found.

use super::{Facts, Finding};
use crate::diag::Notice;
use crate::uncertainty::{Band, Basis, Trials};

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let mut found = Vec::new();
    if facts.trials == Trials::Look {
        return found;
    }
    let differ: Vec<&str> = facts
        .plan
        .results
        .iter()
        .zip(facts.bands)
        .filter(|(_, b)| b.as_ref().is_some_and(|b| b.basis == Basis::MonteCarlo && differs(b)))
        .map(|(r, _)| r.label.as_str())
        .collect();
    if !differ.is_empty() {
        let message = format!(
            "linear propagation and Monte Carlo differ by more than the numerical tolerance of JCGM 101, 8.1; the \
             Monte Carlo band is printed for: {}",
            differ.join("; ")
        );
        found.push(Notice::note("S-1", message).into());
    }
    if !facts.sampling.stable && facts.sampling.trials > 0 {
        let message = format!(
            "after {} trials not every printed digit of the bands is stable (JCGM 101, 7.9)",
            facts.sampling.trials
        );
        found.push(Notice::note("S-2", message).hint("more trials: --trials").into());
    }
    found
}

/// A single block knows no tolerance, so it cannot say that they differ; where
/// linear propagation says nothing at all, they do.
fn differs(band: &Band) -> bool {
    let (difference, allowed) = band.difference;
    difference.is_nan() || difference > allowed
}
