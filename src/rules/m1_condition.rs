//! M-1: approach directions too near to one line.
//!
//! Errors of the two speeds grow as K = 1/|sin Δ|: 2 at 30°, 3.9 at 15°, 5.8
//! at 10°. From there on momentum alone does not tell the speeds apart; nor
//! does it from 30° on when a band grows wider than half its speed.

use super::m14_wide::too_wide;
use super::{Facts, Finding, Withheld};
use crate::diag::Notice;
use crate::units::{Kind, System, fixed};

pub(super) const WARN_FROM: f64 = 2.0;
const STRONG_FROM: f64 = 3.9;
const STOP_FROM: f64 = 5.8;
const REMEDY: &str =
    "an in-line method, crush energy, a recorder reading or one known speed would resolve it";

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let Some(impact) = &facts.plan.watch.momentum else { return Vec::new() };
    let Some(condition) = impact.condition.and_then(|slot| facts.evaluation.value(slot)) else {
        return Vec::new();
    };
    let k = condition.abs();
    let degrees = System::Metric.number(Kind::Angle, libm::asin(1.0 / k));
    let angle = format!(
        "the approach directions lie {} degrees from one line (K = {})",
        fixed(degrees, 0),
        fixed(k, 1)
    );
    if k >= STOP_FROM {
        return vec![stop(format!("{angle}: momentum cannot tell the two speeds apart"), impact.place)];
    }
    if k < WARN_FROM {
        return Vec::new();
    }
    if let Some(name) = too_wide(facts) {
        let message = format!("{angle}, and the 95 % band of {name}'s speed is wider than half the speed");
        return vec![stop(message, impact.place)];
    }
    let strength = if k >= STRONG_FROM { "strongly" } else { "markedly" };
    let message = format!("{angle}: errors of the directions weigh {strength} on the speeds");
    vec![Notice::warn("M-1", message).at(impact.place).hint(REMEDY).into()]
}

fn stop(message: String, place: crate::diag::Place) -> Finding {
    Finding { notice: Notice::stop("M-1", message).at(place).hint(REMEDY), withheld: Withheld::Impact }
}
