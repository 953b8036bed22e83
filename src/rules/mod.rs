//! Rules: what the trade knows to go wrong, one file each.
//!
//! In: the case, its plan, its evaluation and its bands. Out: findings, each
//! with a code and what it withholds. Rules about a single entry live with the
//! case's checkers, since they need its text. Never changes a number.
//! A new rule is one file with its code, its test, its sentence and its
//! remedy, and one line in `RULES`.

mod b4_shared;
mod b6_impossible;
mod d10_marks;
mod d2_crest;
mod d6_braking;
mod m10_restitution;
mod m12_closure;
mod m13_chord;
mod m14_wide;
mod m1_condition;
mod m2_heavy_light;
mod m3_departure;
mod p5_sense;
mod p6_unused;
mod refused;
mod s1_stability;

use crate::case::Case;
use crate::diag::{Notice, Severity};
use crate::plan::{Evaluation, Plan, SlotId};
use crate::uncertainty::{Band, Sampling, Trials, standard_uncertainty};
use crate::units::{Kind, significant};

/// What a rule may look at.
pub struct Facts<'a> {
    /// The case.
    pub case: &'a Case,
    /// Its plan.
    pub plan: &'a Plan,
    /// The plan at the best estimates.
    pub evaluation: &'a Evaluation,
    /// A band for each result of the plan; `None` where it was refused.
    pub bands: &'a [Option<Band>],
    /// The sampling behind the bands.
    pub sampling: &'a Sampling,
    /// How many trials were asked for.
    pub trials: Trials,
}

/// What a stop takes away.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Withheld {
    /// Nothing.
    Nothing,
    /// Every result of the impact; speeds after it stand.
    Impact,
    /// Every result.
    All,
}

/// A notice and what it withholds.
#[derive(Debug, Clone)]
pub struct Finding {
    /// The notice.
    pub notice: Notice,
    /// What it takes away.
    pub withheld: Withheld,
}

impl From<Notice> for Finding {
    fn from(notice: Notice) -> Self {
        Finding { notice, withheld: Withheld::Nothing }
    }
}

type Rule = fn(&Facts<'_>) -> Vec<Finding>;

/// All rules that look at a whole case, in the order of their codes.
const RULES: &[Rule] = &[
    b4_shared::rule,
    b6_impossible::rule,
    d2_crest::rule,
    d6_braking::rule,
    d10_marks::rule,
    m1_condition::rule,
    m2_heavy_light::rule,
    m3_departure::rule,
    m10_restitution::rule,
    m12_closure::rule,
    m13_chord::rule,
    m14_wide::rule,
    p5_sense::rule,
    p6_unused::rule,
    s1_stability::rule,
    refused::rule,
];

/// Applies every rule.
pub fn apply(facts: &Facts<'_>) -> Vec<Finding> {
    let mut found: Vec<Finding> = RULES.iter().flat_map(|rule| rule(facts)).collect();
    if found.iter().any(|f| f.withheld != Withheld::Nothing) {
        // Remarks on results that are taken away would only distract.
        found.retain(|f| f.notice.severity == Severity::Stop || !ON_RESULTS.contains(&f.notice.code));
    }
    found
}

/// Codes that speak of an impact's results.
const ON_RESULTS: [&str; 6] = ["D-10", "M-2", "M-10", "M-14", "S-1", "S-2"];

impl Facts<'_> {
    /// An SI value in the reader's units, to three figures.
    fn show(&self, kind: Kind, value: f64) -> String {
        let (unit, scale) = self.case.identity.system.unit(kind);
        let gap = if matches!(unit, "" | "°") { "" } else { " " };
        format!("{}{gap}{unit}", significant(value / scale, 3))
    }

    /// Size of the terms that add up to a slot: what a difference is held
    /// against.
    fn size(&self, slot: SlotId) -> f64 {
        let row = self.evaluation.row(slot).iter();
        let terms = self.plan.inputs.iter().zip(row).map(|(i, slope)| (i.dist.estimate() * slope).abs());
        terms.filter(|t| t.is_finite()).sum()
    }

    /// Standard uncertainty of any slot, by linear propagation.
    fn u(&self, slot: SlotId) -> f64 {
        standard_uncertainty(self.plan, self.evaluation, slot)
    }
}
