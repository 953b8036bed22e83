//! Linear propagation with exact derivatives.
//!
//! Source: JCGM 100, 5.1 (law of propagation), G.4 (effective degrees of
//! freedom). Inputs are independent: what is shared is one input.

use crate::plan::{Evaluation, Plan, SlotId};
use crate::stats::{student_t_two_sided, welch_satterthwaite};

/// What one input contributes to the uncertainty of a result.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Share {
    /// Index of the input.
    pub input: usize,
    /// Derivative of the result by it, SI.
    pub slope: f64,
    /// Its contribution to the standard uncertainty, with its sign.
    pub part: f64,
    /// Its share of the variance, 0 to 1.
    pub of_variance: f64,
}

/// A result's uncertainty by linear propagation.
#[derive(Debug, Clone)]
pub struct Linear {
    /// Value at the best estimates.
    pub value: f64,
    /// Combined standard uncertainty; not a number where a slope is infinite,
    /// as that of a root at zero: linear propagation says nothing there.
    pub u: f64,
    /// Effective degrees of freedom.
    pub dof: f64,
    /// Coverage factor for 95 %.
    pub k: f64,
    /// Contributions, largest first; inputs that contribute nothing are left out.
    pub shares: Vec<Share>,
    /// How far the result could be off if every input were at its worst at
    /// once: a bounding case, not a 95 % interval.
    pub worst: f64,
}

impl Linear {
    /// Lower end of the 95 % interval.
    pub fn low(&self) -> f64 {
        self.value - self.k * self.u
    }

    /// Upper end of the 95 % interval.
    pub fn high(&self) -> f64 {
        self.value + self.k * self.u
    }
}

/// Standard uncertainty of any slot, for its printed digits and for rules:
/// infinite slopes are left out, where [`linear`] gives no number.
pub fn standard_uncertainty(plan: &Plan, evaluation: &Evaluation, slot: SlotId) -> f64 {
    let parts = plan.inputs.iter().zip(evaluation.row(slot)).map(|(input, slope)| input.dist.u() * slope);
    parts.filter(|p| p.is_finite()).map(|p| p * p).sum::<f64>().sqrt()
}

/// Propagates to one slot; `None` when it was refused.
pub fn linear(plan: &Plan, evaluation: &Evaluation, slot: SlotId) -> Option<Linear> {
    let value = evaluation.value(slot)?;
    let row = evaluation.row(slot);
    let mut shares = Vec::new();
    let mut variance = 0.0;
    let mut worst = 0.0;
    for (input, (known, slope)) in plan.inputs.iter().zip(row).enumerate() {
        let part = slope * known.dist.u();
        if known.dist.is_exact() || part == 0.0 {
            continue;
        }
        variance += part * part;
        if part.is_finite() {
            worst += (slope * known.dist.reach()).abs();
            shares.push(Share { input, slope: *slope, part, of_variance: 0.0 });
        }
    }
    for share in &mut shares {
        share.of_variance = share.part * share.part / variance;
    }
    let dof = welch_satterthwaite(shares.iter().map(|s| (s.part, plan.inputs[s.input].dist.dof())));
    shares.sort_by(|a, b| b.of_variance.total_cmp(&a.of_variance).then(a.input.cmp(&b.input)));
    Some(Linear {
        value,
        u: if variance.is_finite() { variance.sqrt() } else { f64::NAN },
        dof,
        k: student_t_two_sided(dof),
        shares,
        worst,
    })
}
