//! The worksheet: numbered lines that a second expert can recompute.
//!
//! In: a plan, one evaluation of it, the standard uncertainty of every slot.
//! Out: the register of what enters and the worked lines in order: formula in
//! symbols, numbers put in, result. Formula text comes from the formula that
//! was computed. Never computes a result of its own.

mod line;
mod register;

pub use line::{Line, lines};
pub use register::{Row, register};

use crate::plan::{Plan, SlotId};
use crate::units::{Kind, System, decimals_for};

/// Decimals for a value whose standard uncertainty is `u` (SI), in the unit in
/// which worked lines write its kind.
fn decimals(kind: Kind, value: f64, u: f64) -> i32 {
    let scale = line_scale(kind);
    // Less than this is a rounding error, not an uncertainty.
    let known = u < 1e-9 * value.abs();
    decimals_for(if known { 0.0 } else { u / scale }).unwrap_or_else(|| exact_decimals(value / scale))
}

/// Exact values: as many decimals as they need, at most six.
fn exact_decimals(value: f64) -> i32 {
    (0..6).find(|d| (crate::units::round_to(value, *d) - value).abs() < 1e-9 * value.abs()).unwrap_or(6)
}

/// SI units in the unit in which worked lines write a kind: angles in degrees,
/// all else in SI.
fn line_scale(kind: Kind) -> f64 {
    match kind {
        Kind::Angle => System::Metric.unit(Kind::Angle).1,
        _ => 1.0,
    }
}

/// Numbers of entries and lines, so that each can point at the others.
#[derive(Debug)]
pub struct Numbering {
    calls: Vec<Option<usize>>,
}

impl Numbering {
    /// Numbers the calls that some wanted slot needs, from 1, in order.
    pub fn new(plan: &Plan, wanted: &[SlotId]) -> Self {
        let mut number = 0;
        let calls = plan
            .needed(wanted)
            .into_iter()
            .map(|needed| {
                needed.then(|| {
                    number += 1;
                    number
                })
            })
            .collect();
        Numbering { calls }
    }

    /// The number of a call's line; `None` if the line is not printed.
    pub fn line(&self, call: usize) -> Option<usize> {
        self.calls.get(call).copied().flatten()
    }
}
