//! Plans a central impact on one line.
//!
//! Velocities are signed along the line: + is the way the first unit travels.

use super::backward::{Backward, after, before};
use super::impact_momentum::road_impulse;
use super::{Role, SlotId};
use crate::case::{Direction, Entry, Impact, Phase, Unit};
use crate::diag::{Notice, Place};
use crate::physics::inline_impact as line;
use crate::physics::momentum::VelocityChange;
use crate::units::Kind;

/// One unit in the impact.
struct Party<'a> {
    unit: &'a Unit,
    mass: Option<SlotId>,
    /// Signed velocity after impact.
    after: Option<SlotId>,
    /// Signed velocity before impact, if known.
    before: Option<SlotId>,
    /// The same as entered, without its sign.
    speed_before: Option<SlotId>,
    /// Travels against the line before impact.
    against: bool,
    delta_v: Option<SlotId>,
}

pub(super) fn plan(w: &mut Backward<'_>, impact: &Impact, separation: &[Option<SlotId>]) {
    w.b.section("Masses and senses on the line");
    let [a, b] = [0, 1].map(|i| {
        let id = impact.units[i];
        let unit = w.unit(id);
        let speed = separation.get(id.0).copied().flatten();
        let mass = w.mass(id);
        let known = known_before(w, unit);
        Party {
            unit,
            mass,
            after: signed_after(w, unit, speed),
            before: known.map(|k| k.0),
            speed_before: known.map(|k| k.1),
            against: i == 1
                && before(unit).is_some_and(|p| matches!(p.direction, Some(Direction::Against(_)))),
            delta_v: impact.delta_v[i]
                .as_ref()
                .map(|entry| w.b.entry(format!("ΔV_{{{}}}", unit.id), entry, Role::Measured)),
        }
    });
    if a.against {
        let message = format!("{} is named first, so the line points the way it travels", a.unit.id);
        let notice = Notice::stop("P-2", message).at(before(a.unit).map(|p| p.place));
        w.notices.push(notice.expected("direction = \"along the line\" before impact for the first unit"));
        return;
    }
    w.b.section("Impact on one line");
    match (&a, &b) {
        (Party { after: Some(w1), .. }, Party { after: Some(w2), .. }) => backward(w, impact, [&a, &b], [*w1, *w2]),
        (Party { delta_v: Some(_), .. }, Party { delta_v: Some(_), .. }) => from_delta_vs(w, impact, &a, &b),
        (Party { before: Some(v1), .. }, Party { before: Some(v2), .. }) => forward(w, impact, &a, &b, *v1, *v2),
        _ => w.lacks(
            "an impact on one line needs both speeds after impact, or both speeds before it, or both delta-Vs".into(),
            impact.place,
            "enter travel to rest or a speed for both units, or delta_v = { … } with restitution",
        ),
    }
}

/// A speed with its sense on the line; reports directions that have none.
fn signed(
    w: &mut Backward<'_>,
    unit: &Unit,
    phase: &Phase,
    speed: SlotId,
    symbol: String,
    when: &str,
) -> Option<SlotId> {
    match &phase.direction {
        Some(Direction::Along(_)) | None => Some(speed),
        Some(Direction::Against(place)) => {
            let title = format!("Velocity of {} {when}, signed along the line", unit.id);
            Some(w.b.call(line::Reversed::NODE, &[speed], symbol, title, Some(*place)))
        }
        Some(_) => {
            let message = format!("{}: on one line a direction is along or against it", unit.id);
            let expected = "\"along the line\" (the way the first unit travels) or \"against the line\"";
            w.notices.push(Notice::stop("P-2", message).at(phase.place).expected(expected));
            None
        }
    }
}

fn signed_after(w: &mut Backward<'_>, unit: &Unit, speed: Option<SlotId>) -> Option<SlotId> {
    let phase = after(unit)?;
    signed(w, unit, phase, speed?, format!("w′_{{{}}}", unit.id), "after impact")
}

/// A known velocity before impact: signed along the line, and as entered.
fn known_before(w: &mut Backward<'_>, unit: &Unit) -> Option<(SlotId, SlotId)> {
    let phase = before(unit)?;
    if phase.standing {
        let name = format!("speed of {} before impact: it stood", unit.id);
        let zero = w.b.assumed(&format!("v_{{{}}}", unit.id), Kind::Speed, 0.0, &name, "stated in the case");
        return Some((zero, zero));
    }
    let speed = w.b.entry(format!("v_{{{}}}", unit.id), phase.speed.as_ref()?, Role::Measured);
    let signed = signed(w, unit, phase, speed, format!("w_{{{}}}", unit.id), "before impact")?;
    Some((signed, speed))
}

fn restitution(w: &mut Backward<'_>, entry: Option<&Entry>) -> Option<SlotId> {
    entry.map(|e| w.b.entry("e", e, Role::Measured))
}

fn masses(w: &mut Backward<'_>, a: &Party<'_>, b: &Party<'_>, place: Place) -> Option<[SlotId; 2]> {
    if let (Some(ma), Some(mb)) = (a.mass, b.mass) {
        return Some([ma, mb]);
    }
    w.lacks("an impact on one line needs both masses".into(), place, "enter mass for both units");
    None
}

/// Both velocities after impact are known: from known partner, absorbed
/// energy or restitution, in this order of strength.
fn backward(w: &mut Backward<'_>, impact: &Impact, [a, b]: [&Party<'_>; 2], [w1, w2]: [SlotId; 2]) {
    let place = impact.place;
    let Some([m1, m2]) = masses(w, a, b, place) else { return };
    let [u1, u2] = [(a, w1), (b, w2)].map(|(p, v)| {
        let delta = road_impulse(w, p.unit, "l", "along the line");
        let title = format!("Velocity of {} after impact, the road's impulse taken out", p.unit.id);
        w.b.call(line::RoadTakenOut::NODE, &[v, delta], format!("u′_{{{}}}", p.unit.id), title, Some(place))
    });
    let before = match (a.before, b.before) {
        (Some(_), Some(_)) => {
            let message = "both speeds before and both after impact are given: there is nothing to solve for";
            w.notices.push(
                Notice::stop("P-3", message).at(place).expected("one or both speeds before impact unknown"),
            );
            return;
        }
        (None, Some(v2)) => [known_partner(w, a, [m1, u1, m2, u2, v2], place), v2],
        (Some(v1), None) => [v1, known_partner(w, b, [m2, u2, m1, u1, v1], place)],
        (None, None) => match both_unknown(w, impact, [a, b], [m1, u1, m2, u2]) {
            Some(before) => before,
            None => return,
        },
    };
    outcome(w, [a, b], [m1, m2], before, [w1, w2], place);
}

fn known_partner(w: &mut Backward<'_>, p: &Party<'_>, ins: [SlotId; 5], place: Place) -> SlotId {
    let title = format!("Velocity of {} before impact, signed along the line", p.unit.id);
    w.b.call(line::BeforeKnownPartner::NODE, &ins, velocity_symbol(p), title, Some(place))
}

/// Signed velocities carry a `w` where the speed itself has the opposite sign.
fn velocity_symbol(p: &Party<'_>) -> String {
    format!("{}_{{{}}}", if p.against { "w" } else { "v" }, p.unit.id)
}

fn both_unknown(
    w: &mut Backward<'_>,
    impact: &Impact,
    [a, b]: [&Party<'_>; 2],
    [m1, u1, m2, u2]: [SlotId; 4],
) -> Option<[SlotId; 2]> {
    let place = impact.place;
    let e = restitution(w, impact.restitution.as_ref());
    let closing = match (&impact.absorbed_energy, e) {
        (Some(entry), Some(e)) => {
            let energy = w.b.entry("E_{a}", entry, Role::Measured);
            w.b.call(
                line::ClosingFromEnergy::NODE,
                &[energy, m1, m2, e],
                "V_{c}",
                "Closing speed from the energy absorbed",
                Some(place),
            )
        }
        (None, Some(e)) => {
            let title = "Closing speed from the speed of separation";
            w.b.call(line::ClosingFromSeparation::NODE, &[u1, u2, e], "V_{c}", title, Some(place))
        }
        _ => {
            w.lacks(
                "two unknown speeds on one line: momentum alone fixes only their sum".into(),
                place,
                "add restitution, or absorbed_energy with restitution, or one unit's speed before impact (standing = true)",
            );
            return None;
        }
    };
    let ins = [m1, u1, m2, u2, closing];
    let v1 = w.b.call(
        line::BeforeFirst::NODE,
        &ins,
        velocity_symbol(a),
        format!("Velocity of {} before impact, signed along the line", a.unit.id),
        Some(place),
    );
    let v2 = w.b.call(
        line::BeforeSecond::NODE,
        &ins,
        velocity_symbol(b),
        format!("Velocity of {} before impact, signed along the line", b.unit.id),
        Some(place),
    );
    w.b.result("closing_speed", "Closing speed", closing);
    Some([v1, v2])
}

/// Forward: both velocities before impact and the restitution are known.
fn forward(w: &mut Backward<'_>, impact: &Impact, a: &Party<'_>, b: &Party<'_>, v1: SlotId, v2: SlotId) {
    let place = impact.place;
    let Some([m1, m2]) = masses(w, a, b, place) else { return };
    let Some(e) = restitution(w, impact.restitution.as_ref()) else {
        w.lacks("speeds after impact need the restitution".into(), place, "add restitution to the impact");
        return;
    };
    let ins = [m1, v1, m2, v2, e];
    let after = [(a, line::AfterFirst::NODE), (b, line::AfterSecond::NODE)].map(|(p, node)| {
        let title = format!("Velocity of {} after impact, signed along the line", p.unit.id);
        w.b.call(node, &ins, format!("w′_{{{}}}", p.unit.id), title, Some(place))
    });
    for (p, v) in [(a, after[0]), (b, after[1])] {
        w.b.result(
            format!("{}.post_impact_speed", p.unit.id),
            format!("Velocity of {} after impact, signed along the line", p.unit.id),
            v,
        );
    }
    outcome(w, [a, b], [m1, m2], [v1, v2], after, place);
}

/// Speeds, delta-Vs, closing speed, restitution and energy from all four
/// velocities.
fn outcome(
    w: &mut Backward<'_>,
    parties: [&Party<'_>; 2],
    [m1, m2]: [SlotId; 2],
    before: [SlotId; 2],
    after: [SlotId; 2],
    place: Place,
) {
    let mut speeds = before;
    for i in [0, 1] {
        let p = parties[i];
        if let Some(entered) = p.speed_before {
            speeds[i] = entered;
        } else if p.against {
            let title = format!("Speed of {} before impact", p.unit.id);
            speeds[i] = w.b.call(
                line::Reversed::NODE,
                &[before[i]],
                format!("v_{{{}}}", p.unit.id),
                title,
                Some(place),
            );
        }
        w.b.result(
            format!("{}.impact_speed", p.unit.id),
            format!("Speed of {} at impact", p.unit.id),
            speeds[i],
        );
    }
    w.b.section("Impact: what it did to the units");
    // The first unit is pushed back and the second forward: both sizes are +.
    let changes = [(before[0], after[0], "against the line"), (after[1], before[1], "along the line")];
    for (p, (larger, smaller, sense)) in parties.iter().zip(changes) {
        let id = &p.unit.id;
        let title = format!("Delta-V of {id}, {sense}");
        let ins = [larger, smaller];
        let delta = w.b.call(VelocityChange::NODE, &ins, format!("ΔV_{{{id}}}"), title.clone(), Some(place));
        w.b.result(format!("{id}.delta_v"), title, delta);
    }
    losses(w, [m1, m2], before, after, place);
    for i in [0, 1] {
        w.marks_before(parties[i].unit, speeds[i]);
    }
}

/// Closing speed, restitution and energy from all four velocities.
fn losses(
    w: &mut Backward<'_>,
    [m1, m2]: [SlotId; 2],
    [v1, v2]: [SlotId; 2],
    [w1, w2]: [SlotId; 2],
    place: Place,
) {
    let title = "Closing speed of both velocities";
    let closing = w.b.call(line::ClosingInLine::NODE, &[v1, v2], "V_{c}*", title, Some(place));
    if !w.b.plan.results.iter().any(|r| r.id == "closing_speed") {
        w.b.result("closing_speed", "Closing speed", closing);
    }
    let e = w.b.call(line::Restitution::NODE, &[v1, v2, w1, w2], "e_{i}", "Restitution implied", Some(place));
    w.b.result("restitution", "Restitution implied", e);
    let title = "Energy lost in the impact";
    let energy = w.b.call(line::AbsorbedEnergy::NODE, &[m1, m2, e, closing], "E_{lost}", title, Some(place));
    w.b.result("energy_lost", title, energy);
}

/// Closing speed along the line from both delta-Vs and restitution.
fn from_delta_vs(w: &mut Backward<'_>, impact: &Impact, a: &Party<'_>, b: &Party<'_>) {
    let place = impact.place;
    let (Some(d1), Some(d2)) = (a.delta_v, b.delta_v) else { return };
    let Some(e) = restitution(w, impact.restitution.as_ref()) else {
        w.lacks(
            "the closing speed from delta-Vs needs the restitution".into(),
            place,
            "add restitution to the impact",
        );
        return;
    };
    let [k1, k2] = [a, b].map(|p| {
        w.method_error(format!("k_{{ΔV,{}}}", p.unit.id), &line::RECORDER_ERROR, &format!(", {}", p.unit.id))
    });
    let title = "Closing speed along the line from both delta-Vs";
    let closing = w.b.call(line::ClosingFromDeltaVs::NODE, &[k1, d1, k2, d2, e], "V_{c}", title, Some(place));
    let remark = "along the line of the impulse; the two speeds themselves do not follow from delta-Vs";
    w.b.result_with("closing_speed".into(), "Closing speed along the line".into(), closing, remark);
    for (p, d) in [(a, d1), (b, d2)] {
        w.b.result(format!("{}.delta_v", p.unit.id), format!("Delta-V of {} as recorded", p.unit.id), d);
    }
    if let (Some(m1), Some(m2)) = (a.mass, b.mass) {
        let title = "Difference of the two impulses (should be zero)";
        let q = w.b.call(line::DeltaVMismatch::NODE, &[m1, k1, d1, m2, k2, d2], "Q", title, Some(place));
        w.b.plan.watch.zeros.push((
            q,
            "the two delta-Vs do not carry opposite impulses of one size: momentum does not close, so one of the \
             delta-Vs or masses is wrong, or the recorders were not at the centres of gravity",
        ));
        let restitution_known = [e, closing];
        let ins = [m1, m2, restitution_known[0], restitution_known[1]];
        let energy = w.b.call(
            line::AbsorbedEnergy::NODE,
            &ins,
            "E_{lost}",
            "Energy absorbed along the line",
            Some(place),
        );
        w.b.result("energy_lost", "Energy absorbed along the line", energy);
    }
}
