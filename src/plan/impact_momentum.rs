//! Plans an oblique impact of two units as points.

use super::backward::{Backward, Shared, after, before};
use super::{Departure, MomentumSlots, Role, SlotId, Sought, Stage, travel};
use crate::case::{Direction, Impact, Phase, Unit};
use crate::diag::{Notice, Place};
use crate::method::Node;
use crate::physics::{contact, momentum, path};
use crate::units::Kind;

/// Friction taken for the road's impulse where no tested surface is stated
/// (methods: μ = 0.7).
const USUAL_FRICTION: f64 = 0.7;

/// One unit in the impact.
struct Party<'a> {
    unit: &'a Unit,
    mass: SlotId,
    after: SlotId,
    course: SlotId,
    approach: Approach,
    heading: Option<SlotId>,
}

/// What is known of a unit's approach.
enum Approach {
    /// It stood: speed zero.
    Stood { speed: SlotId },
    /// Its course is known, its speed not.
    Course(SlotId),
    /// Course and speed are known.
    Known { course: SlotId, speed: SlotId },
}

pub(super) fn plan(w: &mut Backward<'_>, impact: &Impact, separation: &[Option<SlotId>]) {
    w.b.section("Masses and directions");
    let parties = impact.units.map(|id| {
        let unit = w.unit(id);
        let speed = separation.get(id.0).copied().flatten();
        party(w, unit, id, speed, impact.place)
    });
    let [Some(a), Some(b)] = parties else { return };
    w.b.section("Method error: what the road may have pushed during contact");
    let road = [("x", "eastward"), ("y", "northward")]
        .map(|(axis, along)| [&a, &b].map(|p| road_impulse(w, p.unit, axis, along)));
    w.b.section("Impact: momentum");
    let xy = [&a, &b].map(|p| components(w, p.after, p.course, &p.unit.id, "′", "after impact"));
    let sums = momentum_sums(w, &a, &b, xy, road, impact.place);
    let Some((before, condition)) = speeds(w, &a, &b, sums, impact.place) else { return };
    outcome(w, [&a, &b], before, condition, xy, impact.place);
    for (party, speed) in [(&a, before[0]), (&b, before[1])] {
        w.marks_before(party.unit, speed);
    }
}

fn party<'a>(
    w: &mut Backward<'a>,
    unit: &'a Unit,
    id: crate::case::UnitId,
    speed: Option<SlotId>,
    place: Place,
) -> Option<Party<'a>> {
    let mass = w.mass(id);
    let course = course_after(w, unit);
    let approach = approach(w, unit);
    for (missing, what) in [
        (mass.is_none(), "its mass"),
        (speed.is_none(), "its speed after impact: travel to rest, or a speed"),
        (course.is_none(), "the direction in which it left: a path from separation, or a direction"),
        (approach.is_none(), "the direction in which it came (or standing = true)"),
    ] {
        if missing {
            let message = format!("momentum cannot be balanced: {} lacks {what}", unit.id);
            w.lacks(message, place, "enter it under the unit, or solve the impact in another way");
        }
    }
    let (mass, after, course, approach) = (mass?, speed?, course?, approach?);
    let heading = heading(w, unit, &approach);
    Some(Party { unit, mass, after, course, approach, heading })
}

/// Direction just after separation: from the first two points of the path, or
/// as stated (rule M-3: not the line to rest).
fn course_after(w: &mut Backward<'_>, unit: &Unit) -> Option<SlotId> {
    let phase = after(unit)?;
    let symbol = format!("θ_{{{}}}", unit.id);
    let title = format!("Direction in which {} left the impact", unit.id);
    let stated = phase.direction.is_some();
    let course = match (&phase.direction, phase.path.as_slice()) {
        (Some(direction), _) => w.direction(direction, &symbol, &title)?,
        (None, [first, second, ..]) => {
            let ins = w.two_points(*first, *second);
            w.b.call(path::Course::NODE, &ins, symbol, title, Some(phase.place))
        }
        _ => return None,
    };
    if let [first, second, ..] = phase.path.as_slice() {
        let last = phase.path.last().copied().unwrap_or(*second);
        w.b.plan.watch.departures.push(Departure {
            unit: unit.id.clone(),
            course,
            line: (*first, last),
            first: (*first, *second),
            stated,
            place: phase.place,
        });
    }
    Some(course)
}

fn approach(w: &mut Backward<'_>, unit: &Unit) -> Option<Approach> {
    let phase = before(unit)?;
    if phase.standing {
        let speed = w.b.assumed(
            &format!("v_{{{}}}", unit.id),
            Kind::Speed,
            0.0,
            &format!("speed of {} before impact: it stood", unit.id),
            "stated in the case",
        );
        return Some(Approach::Stood { speed });
    }
    let title = format!("Direction in which {} came", unit.id);
    let course = w.direction(phase.direction.as_ref()?, &format!("α_{{{}}}", unit.id), &title)?;
    Some(match &phase.speed {
        None => Approach::Course(course),
        Some(entry) => {
            Approach::Known { course, speed: w.b.entry(format!("v_{{{}}}", unit.id), entry, Role::Measured) }
        }
    })
}

/// Where the front pointed: as stated, else the way the unit travelled.
fn heading(w: &mut Backward<'_>, unit: &Unit, approach: &Approach) -> Option<SlotId> {
    let stated: Option<&Direction> = before(unit).and_then(|p: &Phase| p.heading.as_ref());
    match (stated, approach) {
        (Some(direction), _) => w.direction(
            direction,
            &format!("ψ_{{{}}}", unit.id),
            &format!("Heading of {} at impact", unit.id),
        ),
        (None, Approach::Course(course) | Approach::Known { course, .. }) => Some(*course),
        (None, Approach::Stood { .. }) => None,
    }
}

fn components(
    w: &mut Backward<'_>,
    speed: SlotId,
    course: SlotId,
    unit: &str,
    prime: &str,
    when: &str,
) -> [SlotId; 2] {
    let x = w.b.call(
        momentum::ComponentX::NODE,
        &[speed, course],
        format!("v{prime}_{{{unit}x}}"),
        format!("Velocity of {unit} {when}, east component"),
        None,
    );
    let y = w.b.call(
        momentum::ComponentY::NODE,
        &[speed, course],
        format!("v{prime}_{{{unit}y}}"),
        format!("Velocity of {unit} {when}, north component"),
        None,
    );
    [x, y]
}

/// What the road may have added to a unit's velocity during contact: method
/// errors, zero at their best estimates.
pub(super) fn road_impulse(w: &mut Backward<'_>, unit: &Unit, axis: &str, along: &str) -> SlotId {
    let tau = w.shared(Shared::ContactTime, |w| w.method_error("τ".into(), &contact::ROAD_TIME, ""));
    let z = w.method_error(
        format!("z_{{{}{axis}}}", unit.id),
        &contact::ROAD_SHARE,
        &format!(", on {} {along}", unit.id),
    );
    let mu = match after(unit).and_then(|phase| travel::first_friction(w, phase)) {
        Some(mu) => mu,
        None => usual_friction(w),
    };
    let g = w.gravity;
    w.b.call(
        contact::RoadImpulse::NODE,
        &[z, mu, g, tau],
        format!("δ_{{{}{axis}}}", unit.id),
        format!("Velocity change of {} by the road during contact, {along}", unit.id),
        None,
    )
}

fn usual_friction(w: &mut Backward<'_>) -> SlotId {
    w.shared(Shared::UsualFriction, |w| {
        let name = "friction taken for the road's impulse during contact";
        w.b.assumed("μ_{0}", Kind::Ratio, USUAL_FRICTION, name, "common practice; scales a method error only")
    })
}

fn momentum_sums(
    w: &mut Backward<'_>,
    a: &Party<'_>,
    b: &Party<'_>,
    xy: [[SlotId; 2]; 2],
    road: [[SlotId; 2]; 2],
    place: Place,
) -> [SlotId; 2] {
    [("x", "east", 0), ("y", "north", 1)].map(|(axis, along, i)| {
        let [da, db] = road[i];
        w.b.call(
            momentum::MomentumSum::NODE,
            &[a.mass, xy[0][i], da, b.mass, xy[1][i], db],
            format!("P_{{{axis}}}"),
            format!("Momentum of both before impact, {along} component"),
            Some(place),
        )
    })
}

/// Speeds before impact, and the condition of the solution where both were
/// unknown.
fn speeds(
    w: &mut Backward<'_>,
    a: &Party<'_>,
    b: &Party<'_>,
    p: [SlotId; 2],
    place: Place,
) -> Option<([SlotId; 2], Option<SlotId>)> {
    match (&a.approach, &b.approach) {
        (Approach::Course(own), Approach::Course(other)) => {
            let title = "Condition of the momentum solution";
            let k = w.b.call(momentum::Condition::NODE, &[*own, *other], "K", title, Some(place));
            let va = unknown_speed(
                w,
                a,
                momentum::ApproachSpeed::NODE,
                &[p[0], p[1], a.mass, *own, *other],
                place,
            );
            let vb = unknown_speed(
                w,
                b,
                momentum::ApproachSpeed::NODE,
                &[p[0], p[1], b.mass, *other, *own],
                place,
            );
            Some(([va, vb], Some(k)))
        }
        (Approach::Course(own), Approach::Stood { speed }) => {
            Some(([standing_partner(w, a, *own, p, place), *speed], None))
        }
        (Approach::Stood { speed }, Approach::Course(own)) => {
            Some(([*speed, standing_partner(w, b, *own, p, place)], None))
        }
        (Approach::Course(own), Approach::Known { course, speed }) => {
            Some(([known_partner(w, [a, b], *own, (*speed, *course), p, place), *speed], None))
        }
        (Approach::Known { course, speed }, Approach::Course(own)) => {
            Some(([*speed, known_partner(w, [b, a], *own, (*speed, *course), p, place)], None))
        }
        _ => {
            let message = "both speeds before impact are given: there is nothing to solve for";
            let hint =
                "leave one out; holding all evidence against each other is the work of a reconciliation";
            let notice = Notice::stop("P-3", message).at(place).expected("one or both speeds unknown");
            w.notices.push(notice.hint(hint));
            None
        }
    }
}

fn unknown_speed(
    w: &mut Backward<'_>,
    party: &Party<'_>,
    node: &'static dyn Node,
    ins: &[SlotId],
    place: Place,
) -> SlotId {
    let title = format!("Speed of {} before impact", party.unit.id);
    w.b.call(node, ins, format!("v_{{{}}}", party.unit.id), title, Some(place))
}

fn known_partner(
    w: &mut Backward<'_>,
    [mover, partner]: [&Party<'_>; 2],
    own: SlotId,
    (speed, course): (SlotId, SlotId),
    [px, py]: [SlotId; 2],
    place: Place,
) -> SlotId {
    let ins = [px, py, own, partner.mass, speed, course];
    let title = format!("Momentum across the course of {} (should be zero)", mover.unit.id);
    let across = w.b.call(momentum::MomentumAcrossKnownPartner::NODE, &ins, "P_{q}", title, Some(place));
    w.b.plan.watch.zeros.push((
        across,
        "momentum does not close: what the two units brought across the course of the one with the unknown speed is \
         not what they took away; the known speed, directions, masses or speeds after impact contradict each other",
    ));
    let ins = [px, py, mover.mass, own, partner.mass, speed, course];
    unknown_speed(w, mover, momentum::ApproachSpeedKnownPartner::NODE, &ins, place)
}

fn standing_partner(
    w: &mut Backward<'_>,
    mover: &Party<'_>,
    own: SlotId,
    [px, py]: [SlotId; 2],
    place: Place,
) -> SlotId {
    let across = w.b.call(
        momentum::MomentumAcross::NODE,
        &[px, py, own],
        "P_{q}",
        format!("Momentum across the course of {} (should be zero)", mover.unit.id),
        Some(place),
    );
    w.b.plan.watch.zeros.push((
        across,
        "momentum does not close: with only one unit moving, no momentum may be left across its course: directions, masses or speeds after \
         impact contradict each other",
    ));
    let ins = [px, py, mover.mass, own];
    unknown_speed(w, mover, momentum::ApproachSpeedStandingPartner::NODE, &ins, place)
}

/// Delta-V, direction of force, closing speed, energy, restitution.
fn outcome(
    w: &mut Backward<'_>,
    parties: [&Party<'_>; 2],
    before: [SlotId; 2],
    condition: Option<SlotId>,
    after_xy: [[SlotId; 2]; 2],
    place: Place,
) {
    w.b.section("Impact: what it did to the units");
    let before_xy = [0, 1].map(|i| match &parties[i].approach {
        // A unit that stood has no course; its components are its speed, zero.
        Approach::Stood { speed } => [*speed, *speed],
        Approach::Course(course) | Approach::Known { course, .. } => {
            components(w, before[i], *course, &parties[i].unit.id, "", "before impact")
        }
    });
    for i in [0, 1] {
        let id = &parties[i].unit.id;
        let label = format!("Speed of {id} at impact");
        w.b.result((Sought::ImpactSpeed, Stage::Impact), Some(id), label, before[i], None);
    }
    for i in [0, 1] {
        delta_v(w, parties[i], after_xy[i], before_xy[i]);
    }
    let restitution = losses(w, parties, before, before_xy, after_xy, place);
    w.b.plan.watch.momentum = Some(MomentumSlots {
        names: parties.map(|p| p.unit.id.clone()),
        mass: parties.map(|p| p.mass),
        before,
        approach: parties.map(|p| match &p.approach {
            Approach::Stood { .. } => None,
            Approach::Course(c) | Approach::Known { course: c, .. } => Some(*c),
        }),
        course: parties.map(|p| p.course),
        before_xy,
        after_xy,
        condition,
        restitution,
        place,
    });
}

/// Closing speed, energy lost and restitution; gives the slot of the last.
fn losses(
    w: &mut Backward<'_>,
    [a, b]: [&Party<'_>; 2],
    before: [SlotId; 2],
    before_xy: [[SlotId; 2]; 2],
    after_xy: [[SlotId; 2]; 2],
    place: Place,
) -> SlotId {
    let flat: Vec<SlotId> = before_xy.iter().flatten().copied().collect();
    let closing = w.b.call(momentum::ClosingSpeed::NODE, &flat, "V_{c}", "Closing speed", Some(place));
    w.b.result((Sought::ClosingSpeed, Stage::Impact), None, "Closing speed", closing, None);
    let ins = [a.mass, before[0], a.after, b.mass, before[1], b.after];
    let title = "Energy lost in the impact";
    let energy = w.b.call(momentum::EnergyLost::NODE, &ins, "E_{lost}", title, Some(place));
    let remark = "holds the spin energy left after the impact too (often a tenth, up to half)";
    w.b.result((Sought::EnergyLost, Stage::Impact), None, title, energy, Some(remark));
    let all: Vec<SlotId> = before_xy.iter().chain(after_xy.iter()).flatten().copied().collect();
    let title = "Restitution implied, centres of gravity along the line of the impulse";
    let restitution = w.b.call(momentum::ImpliedRestitution::NODE, &all, "e", title, Some(place));
    let remark = "of the centres of gravity along the line of the impulse, not of the contact";
    let what = (Sought::Restitution, Stage::Impact);
    w.b.result(what, None, "Restitution implied", restitution, Some(remark));
    restitution
}

fn delta_v(w: &mut Backward<'_>, party: &Party<'_>, after: [SlotId; 2], before: [SlotId; 2]) {
    let id = &party.unit.id;
    let [x, y] = [("x", "east", 0), ("y", "north", 1)].map(|(axis, along, i)| {
        let title = format!("Delta-V of {id}, {along} component");
        w.b.call(
            contact::VelocityChange::NODE,
            &[after[i], before[i]],
            format!("ΔV_{{{id}{axis}}}"),
            title,
            None,
        )
    });
    let size = w.b.call(
        contact::VectorSize::NODE,
        &[x, y],
        format!("ΔV_{{{id}}}"),
        format!("Delta-V of {id}"),
        None,
    );
    w.b.result((Sought::DeltaV, Stage::Impact), Some(id), format!("Delta-V of {id}"), size, None);
    if let Some(heading) = party.heading {
        let title = format!("Principal direction of force on {id}");
        let pdof = w.b.call(
            momentum::ForceDirection::NODE,
            &[x, y, heading],
            format!("p_{{{id}}}"),
            title.clone(),
            None,
        );
        w.b.result((Sought::ForceDirection, Stage::Impact), Some(id), title, pdof, None);
    }
}
