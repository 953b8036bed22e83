//! Travel in stretches: lengths, drags, speeds at the joins.

use super::backward::{Backward, Shared};
use super::{Role, SlotId};
use crate::case::{Begin, Drag, Phase, StandsFor, Stretch, StretchLength, TestId, Unit};
use crate::physics::{braking, path};
use crate::stats::Dist;
use crate::units::Kind;

/// Names of one stretch: `A after impact, stretch 2`.
struct Names {
    /// Subscript: `A,2`.
    index: String,
    /// Mark of the phase on symbols: a prime after impact.
    prime: &'static str,
    /// In words.
    words: String,
}

/// Chains the stretches of a phase from its end to its start and gives the
/// speed there. `end_speed` is `None` for rest.
pub(super) fn chain(
    w: &mut Backward<'_>,
    unit: &Unit,
    phase: &Phase,
    end_speed: Option<SlotId>,
) -> Option<SlotId> {
    let after = matches!(phase.begin, Begin::Impact(_));
    let mut speed = end_speed;
    let mut lengths = Vec::new();
    for (index, stretch) in phase.travel.iter().enumerate().rev() {
        let names = Names {
            index: format!("{},{}", unit.id, index + 1),
            prime: if after { "′" } else { "" },
            words: match (after, phase.travel.len()) {
                (true, 1) => format!("{} after impact", unit.id),
                (true, _) => format!("{} after impact, stretch {}", unit.id, index + 1),
                (false, 1) => format!("{}'s marks", unit.id),
                (false, _) => format!("{}'s marks, stretch {}", unit.id, index + 1),
            },
        };
        let grade = stretch
            .grade
            .as_ref()
            .map(|entry| w.b.entry(format!("G{}_{{{}}}", names.prime, names.index), entry, Role::Measured));
        let length = length(w, phase, stretch, grade, &names);
        lengths.insert(0, length);
        let drag = drag(w, stretch, grade, after, &names);
        let symbol = match (index, after) {
            (0, true) => format!("v′_{{{}}}", unit.id),
            (0, false) => format!("v_{{{},s}}", unit.id),
            _ => format!("v{}_{{{}}}", names.prime, names.index),
        };
        let title = match (index, after) {
            (0, true) => format!("Speed of {} after impact", unit.id),
            (0, false) => format!("Speed of {} at the start of its marks", unit.id),
            _ => format!("Speed at the start of: {}", names.words),
        };
        let place = Some(stretch.place);
        speed = Some(match speed {
            None => w.b.call(braking::StopSpeed::NODE, &[w.gravity, drag, length], symbol, title, place),
            Some(end) => {
                w.b.call(braking::BrakedSpeed::NODE, &[end, w.gravity, drag, length], symbol, title, place)
            }
        });
    }
    chord(w, unit, phase, &lengths);
    speed
}

fn length(
    w: &mut Backward<'_>,
    phase: &Phase,
    stretch: &Stretch,
    grade: Option<SlotId>,
    names: &Names,
) -> SlotId {
    let symbol = format!("d{}_{{{}}}", names.prime, names.index);
    match (&stretch.length, grade) {
        (StretchLength::Entered(entry), _) => w.b.entry(symbol, entry, Role::Measured),
        (StretchLength::AlongPath(from, to), None) => along_path(w, phase, *from, *to, &symbol, names),
        // Points are surveyed in plan; the drag acts along the slope.
        (StretchLength::AlongPath(from, to), Some(grade)) => {
            let in_plan = format!("d{}_{{p,{}}}", names.prime, names.index);
            let plan = along_path(w, phase, *from, *to, &in_plan, names);
            let title = format!("Length along the slope: {}", names.words);
            w.b.call(path::SlopeLength::NODE, &[plan, grade], symbol, title, Some(stretch.place))
        }
    }
}

/// The lengths of a phase's stretches together can be no less than the
/// straight line from separation to rest: a stretch may be too short, or
/// missing.
fn chord(w: &mut Backward<'_>, unit: &Unit, phase: &Phase, lengths: &[SlotId]) {
    let whole = [StretchLength::AlongPath(0, phase.path.len().saturating_sub(1))];
    let alone = phase.travel.iter().map(|s| &s.length).eq(&whole);
    let (Some(first), Some(last), Some((so_far, rest))) =
        (phase.path.first(), phase.path.last(), lengths.split_first())
    else {
        return;
    };
    if alone || first == last {
        return;
    }
    let place = Some(phase.place);
    let words = format!("{} after impact", unit.id);
    let mut total = *so_far;
    for length in rest {
        let title = format!("Length of all stretches so far: {words}");
        let symbol = format!("Σd′_{{{}}}", unit.id);
        total = w.b.call(path::LongerPath::NODE, &[total, *length], symbol, title, place);
    }
    let ins = w.two_points(*first, *last);
    let title = format!("Straight line from separation to rest: {words}");
    let chord = w.b.call(path::Leg::NODE, &ins, format!("c′_{{{}}}", unit.id), title, place);
    w.b.plan.watch.chords.push((total, chord, phase.place, words));
}

fn along_path(
    w: &mut Backward<'_>,
    phase: &Phase,
    from: usize,
    to: usize,
    symbol: &str,
    names: &Names,
) -> SlotId {
    let points = &phase.path[from..=to];
    let pieces = points.len() - 1;
    let mut total = None;
    for (i, pair) in points.windows(2).enumerate() {
        let ins = w.two_points(pair[0], pair[1]);
        let numbers = [pair[0], pair[1]].map(|p| w.case.points[p.0].number.clone());
        let own =
            if pieces == 1 { symbol.to_string() } else { format!("d_{{{}–{}}}", numbers[0], numbers[1]) };
        let title = format!("Distance from point {} to point {}: {}", numbers[0], numbers[1], names.words);
        let piece = w.b.call(path::Leg::NODE, &ins, own, title, Some(phase.place));
        total = Some(match total {
            None => piece,
            Some(so_far) => {
                let sum = if i + 1 == pieces { symbol.to_string() } else { format!("{symbol}*") };
                let what = if i + 1 == pieces { "Length of the path" } else { "Length so far" };
                let title = format!("{what}: {}", names.words);
                w.b.call(path::LongerPath::NODE, &[so_far, piece], sum, title, Some(phase.place))
            }
        });
    }
    // The case's check gives two points at least; no piece is no length.
    total.unwrap_or_else(|| w.b.assumed(symbol, Kind::Length, 0.0, "a path without pieces", "no points"))
}

fn drag(
    w: &mut Backward<'_>,
    stretch: &Stretch,
    grade: Option<SlotId>,
    after: bool,
    names: &Names,
) -> SlotId {
    let symbol = format!("f{}_{{{}}}", names.prime, names.index);
    let title = format!("Drag factor: {}", names.words);
    let place = Some(stretch.place);
    match &stretch.drag {
        Drag::Friction { test, share } => {
            let k = friction_error(w, *test, after);
            let mu = friction(w, *test);
            if k.is_none() && grade.is_none() && share.dist == Dist::Exact(1.0) {
                return mu;
            }
            let k = k.unwrap_or_else(|| one(w));
            let share = w.b.entry(format!("η{}_{{{}}}", names.prime, names.index), share, Role::Measured);
            match grade {
                None => w.b.call(braking::LevelDrag::NODE, &[k, share, mu], symbol, title, place),
                Some(grade) => {
                    w.b.call(braking::GradeDrag::NODE, &[k, share, mu, grade], symbol, title, place)
                }
            }
        }
        Drag::Stated { factor, includes_grade } => {
            let grade = grade.filter(|_| !includes_grade);
            let stated = w.b.entry(format!("f{}_{{s,{}}}", names.prime, names.index), factor, Role::Measured);
            let k = after.then(|| {
                w.method_error(
                    format!("k′_{{{}}}", names.index),
                    &braking::TRAVEL_ERROR,
                    &format!(": {}", names.words),
                )
            });
            match (k, grade) {
                (None, None) => stated,
                (Some(k), None) => w.b.call(braking::StatedDrag::NODE, &[k, stated], symbol, title, place),
                (k, Some(grade)) => {
                    let k = k.unwrap_or_else(|| one(w));
                    w.b.call(braking::StatedDragOnGrade::NODE, &[k, stated, grade], symbol, title, place)
                }
            }
        }
    }
}

/// The method error on a test's friction: shared by all that use the test.
/// Before impact there is none on top of 'this vehicle', whose scatter is in
/// the test's own uncertainty.
fn friction_error(w: &mut Backward<'_>, test: TestId, after: bool) -> Option<SlotId> {
    let t = &w.case.tests[test.0];
    let whose = format!(", test {}", t.id);
    if after {
        let symbol = format!("k′_{{{}}}", t.id);
        Some(w.shared(Shared::Travel(test), |w| w.method_error(symbol, &braking::TRAVEL_ERROR, &whose)))
    } else if t.stands_for == StandsFor::SurfaceMean {
        let symbol = format!("k_{{{}}}", t.id);
        Some(w.shared(Shared::Skid(test), |w| w.method_error(symbol, &braking::SKID_ERROR, &whose)))
    } else {
        None
    }
}

/// The friction of a test, added once.
pub(super) fn friction(w: &mut Backward<'_>, test: TestId) -> SlotId {
    w.shared(Shared::Friction(test), |w| {
        let t = &w.case.tests[test.0];
        let symbol = format!("μ_{{{}}}", t.id);
        let Some(grade) = &t.grade else { return w.b.entry(symbol, &t.drag, Role::Measured) };
        let drag = w.b.entry(format!("f_{{{}}}", t.id), &t.drag, Role::Measured);
        let grade = w.b.entry(format!("G_{{{}}}", t.id), grade, Role::Measured);
        let title = format!("Friction of the surface from test {}", t.id);
        w.b.call(braking::TestFriction::NODE, &[drag, grade], symbol, title, Some(t.drag.place))
    })
}

/// A factor of exactly one, where a formula has room for a method error that
/// does not apply.
fn one(w: &mut Backward<'_>) -> SlotId {
    w.shared(Shared::One, |w| {
        let why = "none on top of 'this vehicle here' or of a stated drag factor";
        w.b.assumed("k_{0}", Kind::Ratio, 1.0, "no method error", why)
    })
}

/// A friction to take for the road's impulse on a unit: that of its first
/// stretch after impact.
pub(super) fn first_friction(w: &mut Backward<'_>, phase: &Phase) -> Option<SlotId> {
    match &phase.travel.first()?.drag {
        Drag::Friction { test, .. } => Some(friction(w, *test)),
        Drag::Stated { .. } => None,
    }
}
