//! B-6: the entries reach into the physically impossible.
//!
//! Impossible trials are left out of the band and counted. Beyond 1 % that is
//! worth a flag; beyond half of all trials the entries contradict each other.

use super::{Facts, Finding, Withheld};
use crate::diag::Notice;
use crate::units::significant;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let share = facts.sampling.impossible as f64 / facts.sampling.trials.max(1) as f64;
    if share <= 0.01 {
        return Vec::new();
    }
    let percent = significant(share * 100.0, 2);
    let reaching = facts
        .plan
        .inputs
        .iter()
        .map(|i| (i.dist.cdf(i.bounds.0) + 1.0 - i.dist.cdf(i.bounds.1), i))
        .filter(|(p, i)| *p > 0.002 && !i.dist.is_exact())
        .max_by(|a, b| a.0.total_cmp(&b.0));
    let travel = facts.sampling.impossible_travel as f64 / facts.sampling.trials.max(1) as f64;
    // Surely more than half: three standard errors of counting beyond it.
    let half = 0.5 + 1.5 / (facts.sampling.trials.max(1) as f64).sqrt();
    if share > half {
        let message =
            format!("{percent} % of the trials are physically impossible: the entries contradict each other");
        let notice =
            Notice::stop("B-6", message).hint("look at the refused lines, directions and masses first");
        let withheld = if travel > half { Withheld::All } else { Withheld::Impact };
        return vec![Finding { notice, withheld }];
    }
    let mut notice = Notice::warn(
        "B-6",
        format!(
            "{percent} % of the trials are physically impossible (an entry beyond its limits, or energy gained); the \
             bands are those of the possible ones"
        ),
    );
    if let Some((_, input)) = reaching {
        notice = notice
            .at(input.place)
            .hint(format!("{} reaches beyond what is possible: give it limits", input.name));
    }
    vec![notice.into()]
}
