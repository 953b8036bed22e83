//! M-3: the direction after impact is that of the path just after separation.
//!
//! A rotating unit curves, so the straight line to rest misleads.

use super::{Facts, Finding};
use crate::case::PointId;
use crate::diag::Notice;
use crate::method::Formula;
use crate::physics::path::{Course, Leg};
use crate::plan::Departure;
use crate::units::{Kind, System, fixed};

/// Degrees between path and line to rest from which the rule speaks.
const TURN: f64 = 5.0;
/// A first step shorter than this says little about a direction; one longer
/// may have curved already. Metres.
const STEP: std::ops::Range<f64> = 1.0..4.0;

pub(super) fn rule(facts: &Facts<'_>) -> Vec<Finding> {
    let mut found: Vec<Finding> =
        facts.plan.watch.departures.iter().flat_map(|d| departure(facts, d)).collect();
    for unit in &facts.case.units {
        for phase in &unit.phases {
            let bends_back = phase.path.windows(3).any(|p| {
                let (first, second) = (vector(facts, (p[0], p[1])).0, vector(facts, (p[1], p[2])).0);
                turn(second, first).abs() > std::f64::consts::FRAC_PI_2
            });
            if bends_back {
                let message = format!("the path of {} after impact turns back on itself", unit.id);
                let hint = "are its points in the order travelled?";
                found.push(Notice::warn("M-3", message).at(phase.place).hint(hint).into());
            }
        }
    }
    found
}

fn departure(facts: &Facts<'_>, d: &Departure) -> Vec<Finding> {
    let mut found = Vec::new();
    let (line, length) = vector(facts, d.line);
    let (first, step) = vector(facts, d.first);
    let Some(course) = facts.evaluation.value(d.course) else { return found };
    let turn = System::Metric.number(Kind::Angle, turn(line, course)).abs();
    if length > 0.0 && turn > TURN {
        let message = format!(
            "the line from separation to rest of {} lies {} degrees off the path just after separation: it curved",
            d.unit,
            fixed(turn, 0)
        );
        let hint =
            "the path just after separation is used; make sure its points are those of the centre of gravity";
        found.push(Notice::warn("M-3", message).at(d.place).hint(hint).into());
    }
    if !d.stated && d.first == d.line {
        let message = format!(
            "the direction of {} after impact is taken from separation straight to rest: no point lies between",
            d.unit
        );
        let hint = "a point of the path 1 to 3 m after separation would give the direction just after it";
        found.push(Notice::warn("M-3", message).at(d.place).hint(hint).into());
    } else if !d.stated && !STEP.contains(&step) {
        let message = format!(
            "the direction of {} after impact comes from two points {} apart",
            d.unit,
            facts.show(Kind::Length, step)
        );
        found.push(
            Notice::note("M-3", message).at(d.place).hint("a point 1 to 3 m after separation is best: nearer it is uncertain, farther it may have curved").into(),
        );
    }
    let stated_off = System::Metric.number(Kind::Angle, self::turn(first, course)).abs();
    if d.stated && step > 0.0 && stated_off > TURN {
        let message = format!(
            "the stated direction of {} after impact lies {} degrees off its own path just after separation",
            d.unit,
            fixed(stated_off, 0)
        );
        found.push(
            Notice::warn("M-3", message)
                .at(d.place)
                .hint("leave the direction out to take the path's")
                .into(),
        );
    }
    found
}

/// Direction and length from one point to another, by the formulas of the
/// worked lines.
fn vector(facts: &Facts<'_>, (a, b): (PointId, PointId)) -> (f64, f64) {
    let at = |id: PointId| {
        let point = &facts.case.points[id.0];
        (point.east.dist.estimate(), point.north.dist.estimate())
    };
    let ((e1, n1), (e2, n2)) = (at(a), at(b));
    (Course::eval([e1, n1, e2, n2]), Leg::eval([e1, n1, e2, n2]))
}

/// The smaller angle between two directions, with its sign.
fn turn(a: f64, b: f64) -> f64 {
    let turns = libm::round((a - b) / std::f64::consts::TAU);
    a - b - turns * std::f64::consts::TAU
}
