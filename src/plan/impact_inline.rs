//! Plans a central impact on one line.
//!
//! Velocities are signed along the line: + is the way the first unit travels.
//! Momentum is balanced without the road's push during contact; restitution
//! ties the velocities as they were at separation, that push included.

use super::backward::{Backward, after, before};
use super::impact_momentum::road_impulse;
use super::{Role, SlotId, Sought, Stage};
use crate::case::{Direction, Entry, Impact, Phase, Unit};
use crate::diag::{Notice, Place};
use crate::physics::contact::{RecordedDeltaV, RoadTakenOut, VelocityChange};
use crate::physics::inline_impact as line;
use crate::units::Kind;

const SENSES: &str =
    "direction = \"along the line\" (the way the first unit travels) or \"against the line\"";

/// Which side of the impact a velocity belongs to.
#[derive(Clone, Copy)]
enum When {
    Before,
    After,
}

impl When {
    fn words(self) -> &'static str {
        match self {
            When::Before => "before impact",
            When::After => "after impact",
        }
    }
}

/// One unit in the impact.
struct Party<'a> {
    unit: &'a Unit,
    mass: Option<SlotId>,
    /// Signed velocity after impact.
    after: Option<SlotId>,
    /// Signed velocity before impact and the speed as entered, if known.
    before: Option<(SlotId, SlotId)>,
    /// Travels against the line before impact.
    against: bool,
}

pub(super) fn plan(w: &mut Backward<'_>, impact: &Impact, separation: &[Option<SlotId>]) {
    w.b.section("Masses and senses on the line");
    let [a, b] = [0, 1].map(|i| {
        let id = impact.units[i];
        let unit = w.unit(id);
        let speed = separation.get(id.0).copied().flatten();
        let mass = w.mass(id);
        let against = before(unit).is_some_and(|p| matches!(p.direction, Some(Direction::Against(_))));
        Party {
            unit,
            mass,
            after: signed_after(w, unit, speed),
            before: known_before(w, unit, i == 0),
            against,
        }
    });
    if a.against {
        let message = format!("{} is named first, so the line points the way it travels", a.unit.id);
        let notice = Notice::stop("P-2", message).at(before(a.unit).map(|p| p.place));
        w.notices.push(notice.expected("direction = \"along the line\" before impact for the first unit"));
        return;
    }
    let recorded = impact.delta_v.iter().all(Option::is_some);
    if let Some(phase) =
        before(b.unit).filter(|p| !recorded && !p.standing && p.speed.is_none() && p.direction.is_none())
    {
        let message = format!("{} before impact: on one line a direction is along or against it", b.unit.id);
        w.notices.push(Notice::stop("P-2", message).at(phase.place).expected(SENSES));
    }
    if w.notices.any_stop() {
        return;
    }
    w.b.section("Impact on one line");
    match (a.after, b.after, &impact.delta_v, a.before, b.before) {
        (Some(w1), Some(w2), ..) => backward(w, impact, [&a, &b], [w1, w2]),
        (_, _, [Some(d1), Some(d2)], ..) => from_delta_vs(w, impact, [&a, &b], [d1, d2]),
        (_, _, _, Some(v1), Some(v2)) => forward(w, impact, [&a, &b], [v1.0, v2.0]),
        _ => w.lacks(
            "an impact on one line is worked out from both speeds after it, from both speeds before it, or from both \
             delta-Vs; this case has none of the three"
                .into(),
            impact.place,
            "give both units a travel to rest or a speed after impact; then one speed before it (standing = true), or \
             restitution, or absorbed_energy with restitution",
        ),
    }
}

/// A speed with its sense on the line; reports a direction that is missing or
/// none of the two.
fn signed(
    w: &mut Backward<'_>,
    unit: &Unit,
    phase: &Phase,
    speed: SlotId,
    (symbol, when): (String, When),
    first: bool,
) -> Option<SlotId> {
    match &phase.direction {
        Some(Direction::Along(_)) => Some(speed),
        // The line points the way the unit named first travels.
        None if first && matches!(when, When::Before) => Some(speed),
        Some(Direction::Against(place)) => {
            let title = format!("Velocity of {} {}, signed along the line", unit.id, when.words());
            Some(w.b.call(line::Reversed::NODE, &[speed], symbol, title, Some(*place)))
        }
        _ => {
            let message =
                format!("{} {}: on one line a direction is along or against it", unit.id, when.words());
            w.notices.push(Notice::stop("P-2", message).at(phase.place).expected(SENSES));
            None
        }
    }
}

fn signed_after(w: &mut Backward<'_>, unit: &Unit, speed: Option<SlotId>) -> Option<SlotId> {
    let phase = after(unit)?;
    signed(w, unit, phase, speed?, (format!("w′_{{{}}}", unit.id), When::After), false)
}

fn known_before(w: &mut Backward<'_>, unit: &Unit, first: bool) -> Option<(SlotId, SlotId)> {
    let phase = before(unit)?;
    if phase.standing {
        let name = format!("speed of {} before impact: it stood", unit.id);
        let zero = w.b.assumed(&format!("v_{{{}}}", unit.id), Kind::Speed, 0.0, &name, "stated in the case");
        return Some((zero, zero));
    }
    let speed = w.b.entry(format!("v_{{{}}}", unit.id), phase.speed.as_ref()?, Role::Measured);
    let signed = signed(w, unit, phase, speed, (format!("w_{{{}}}", unit.id), When::Before), first)?;
    Some((signed, speed))
}

fn restitution(w: &mut Backward<'_>, entry: Option<&Entry>) -> Option<SlotId> {
    entry.map(|e| w.b.entry("e", e, Role::Measured))
}

fn masses(w: &mut Backward<'_>, [a, b]: [&Party<'_>; 2], place: Place) -> Option<[SlotId; 2]> {
    if let (Some(ma), Some(mb)) = (a.mass, b.mass) {
        return Some([ma, mb]);
    }
    w.lacks("an impact on one line needs both masses".into(), place, "enter mass for both units");
    None
}

/// Velocities, masses and, if entered, the restitution of a solved impact.
struct Solved {
    mass: [SlotId; 2],
    before: [SlotId; 2],
    /// After impact, the road's push included.
    after: [SlotId; 2],
    /// After impact without it.
    contact: [SlotId; 2],
    restitution: Option<SlotId>,
    closing: Option<SlotId>,
}

/// Both velocities after impact are known: from known partner, absorbed
/// energy or restitution.
fn backward(w: &mut Backward<'_>, impact: &Impact, parties: [&Party<'_>; 2], after: [SlotId; 2]) {
    let place = impact.place;
    let Some(mass) = masses(w, parties, place) else { return };
    let contact = [0, 1].map(|i| {
        let unit = parties[i].unit;
        let delta = road_impulse(w, unit, "l", "along the line");
        let title = format!("Velocity of {} after impact, the road's impulse taken out", unit.id);
        w.b.call(RoadTakenOut::NODE, &[after[i], delta], format!("u′_{{{}}}", unit.id), title, Some(place))
    });
    let [a, b] = parties;
    let ([m1, m2], [u1, u2]) = (mass, contact);
    let mut solved = Solved { mass, before: after, after, contact, restitution: None, closing: None };
    match (a.before, b.before) {
        (Some(_), Some(_)) => {
            let message = "both speeds before and both after impact are given: there is nothing to solve for";
            let notice = Notice::stop("P-3", message).at(place);
            w.notices.push(notice.expected("one or both speeds before impact unknown"));
            return;
        }
        (None, Some((v2, _))) => solved.before = [known_partner(w, a, [m1, u1, m2, u2, v2], place), v2],
        (Some((v1, _)), None) => solved.before = [v1, known_partner(w, b, [m2, u2, m1, u1, v1], place)],
        (None, None) => {
            if !both_unknown(w, impact, parties, &mut solved) {
                return;
            }
        }
    }
    outcome(w, parties, &solved, place);
}

fn known_partner(w: &mut Backward<'_>, p: &Party<'_>, ins: [SlotId; 5], place: Place) -> SlotId {
    let title = format!("Velocity of {} before impact, signed along the line", p.unit.id);
    w.b.call(line::BeforeKnownPartner::NODE, &ins, velocity_symbol(p), title, Some(place))
}

/// Signed velocities carry a `w` where the speed itself has the opposite sign.
fn velocity_symbol(p: &Party<'_>) -> String {
    format!("{}_{{{}}}", if p.against { "w" } else { "v" }, p.unit.id)
}

/// Closing speed from absorbed energy or restitution, then both speeds; false
/// when the case has neither.
fn both_unknown(w: &mut Backward<'_>, impact: &Impact, [a, b]: [&Party<'_>; 2], s: &mut Solved) -> bool {
    let place = impact.place;
    let ([m1, m2], [u1, u2]) = (s.mass, s.contact);
    let Some(e) = restitution(w, impact.restitution.as_ref()) else {
        w.lacks(
            "two unknown speeds on one line: momentum alone fixes only their sum".into(),
            place,
            "add restitution, or absorbed_energy with restitution, or one unit's speed before impact (standing = true)",
        );
        return false;
    };
    let closing = match &impact.absorbed_energy {
        Some(entry) => {
            let energy = w.b.entry("E_{a}", entry, Role::Measured);
            let title = "Closing speed from the energy absorbed";
            w.b.call(line::ClosingFromEnergy::NODE, &[energy, m1, m2, e], "V_{c}", title, Some(place))
        }
        None => {
            let title = "Closing speed from the speed of separation";
            w.b.call(
                line::ClosingFromSeparation::NODE,
                &[s.after[0], s.after[1], e],
                "V_{c}",
                title,
                Some(place),
            )
        }
    };
    if impact.absorbed_energy.is_some() {
        let title = "Separation speed against restitution times closing speed (difference, should be zero)";
        let zero = w.b.call(
            line::SeparationMismatch::NODE,
            &[s.after[0], s.after[1], e, closing],
            "Δ_{e}",
            title,
            Some(place),
        );
        w.b.plan.watch.zeros.push((
            zero,
            "the evidence contradicts itself: the speeds after impact do not separate as restitution and absorbed \
             energy demand",
        ));
    }
    let ins = [m1, u1, m2, u2, closing];
    let title = |p: &Party<'_>| format!("Velocity of {} before impact, signed along the line", p.unit.id);
    let v1 = w.b.call(line::BeforeFirst::NODE, &ins, velocity_symbol(a), title(a), Some(place));
    let v2 = w.b.call(line::BeforeSecond::NODE, &ins, velocity_symbol(b), title(b), Some(place));
    s.before = [v1, v2];
    s.restitution = Some(e);
    s.closing = Some(closing);
    true
}

/// Forward: both velocities before impact and the restitution are known.
fn forward(w: &mut Backward<'_>, impact: &Impact, parties: [&Party<'_>; 2], before: [SlotId; 2]) {
    let place = impact.place;
    let told = |p: &&Party<'_>| after(p.unit).is_some_and(|a| a.direction.is_some() || p.after.is_some());
    if let Some(party) = parties.iter().find(|p| told(p)) {
        let message = format!(
            "both speeds before impact are given, so what follows is worked out; yet {} has entries after impact",
            party.unit.id
        );
        let notice = Notice::stop("P-3", message).at(after(party.unit).map(|p| p.place));
        w.notices.push(notice.expected("one speed before impact left out, or nothing after it"));
        return;
    }
    let Some(mass) = masses(w, parties, place) else { return };
    let Some(e) = restitution(w, impact.restitution.as_ref()) else {
        w.lacks("speeds after impact need the restitution".into(), place, "add restitution to the impact");
        return;
    };
    let ins = [mass[0], before[0], mass[1], before[1], e];
    let nodes = [line::AfterFirst::NODE, line::AfterSecond::NODE];
    let after = [0, 1].map(|i| {
        let id = &parties[i].unit.id;
        let title = format!("Velocity of {id} after impact, signed along the line");
        let v = w.b.call(nodes[i], &ins, format!("w′_{{{id}}}"), title.clone(), Some(place));
        let remark = "below zero: against the line";
        w.b.result((Sought::PostImpactSpeed, Stage::Impact), Some(id), title, v, Some(remark));
        v
    });
    let solved = Solved { mass, before, after, contact: after, restitution: Some(e), closing: None };
    outcome(w, parties, &solved, place);
}

/// Speeds, delta-Vs, closing speed, restitution and energy.
fn outcome(w: &mut Backward<'_>, parties: [&Party<'_>; 2], s: &Solved, place: Place) {
    let mut speeds = s.before;
    for i in [0, 1] {
        let p = parties[i];
        let id = &p.unit.id;
        if let Some((_, entered)) = p.before {
            speeds[i] = entered;
        } else if p.against {
            let title = format!("Speed of {id} before impact");
            speeds[i] =
                w.b.call(line::Reversed::NODE, &[s.before[i]], format!("v_{{{id}}}"), title, Some(place));
        }
        let label = format!("Speed of {id} at impact");
        w.b.result((Sought::ImpactSpeed, Stage::Impact), Some(id), label, speeds[i], None);
    }
    w.b.section("Impact: what it did to the units");
    // The first unit is pushed back and the second forward: both sizes are +.
    let changes =
        [(s.before[0], s.after[0], "against the line"), (s.after[1], s.before[1], "along the line")];
    for (p, (larger, smaller, sense)) in parties.iter().zip(changes) {
        let id = &p.unit.id;
        let title = format!("Delta-V of {id}, {sense}");
        let ins = [larger, smaller];
        let delta = w.b.call(VelocityChange::NODE, &ins, format!("ΔV_{{{id}}}"), title.clone(), Some(place));
        w.b.result((Sought::DeltaV, Stage::Impact), Some(id), title, delta, None);
    }
    losses(w, s, place);
    for i in [0, 1] {
        w.marks_before(parties[i].unit, speeds[i]);
    }
}

/// Closing speed, restitution and energy.
fn losses(w: &mut Backward<'_>, s: &Solved, place: Place) {
    let ([v1, v2], [w1, w2]) = (s.before, s.after);
    let closing = match s.closing {
        Some(closing) => closing,
        None => w.b.call(line::ClosingInLine::NODE, &[v1, v2], "V_{c}", "Closing speed", Some(place)),
    };
    w.b.result((Sought::ClosingSpeed, Stage::Impact), None, "Closing speed", closing, None);
    let (e, label) = match s.restitution {
        Some(e) => (e, "Restitution as entered"),
        None => {
            let title = "Restitution implied";
            (w.b.call(line::Restitution::NODE, &[v1, v2, w1, w2], "e", title, Some(place)), title)
        }
    };
    w.b.result((Sought::Restitution, Stage::Impact), None, label, e, None);
    let title = "Energy lost in the impact";
    let ins = [s.mass[0], s.mass[1], e, closing];
    let energy = w.b.call(line::AbsorbedEnergy::NODE, &ins, "E_{lost}", title, Some(place));
    w.b.result((Sought::EnergyLost, Stage::Impact), None, title, energy, None);
}

/// Closing speed along the line from both delta-Vs and restitution.
fn from_delta_vs(w: &mut Backward<'_>, impact: &Impact, parties: [&Party<'_>; 2], recorded: [&Entry; 2]) {
    let place = impact.place;
    let Some(e) = restitution(w, impact.restitution.as_ref()) else {
        w.lacks(
            "the closing speed from delta-Vs needs the restitution".into(),
            place,
            "add restitution to the impact",
        );
        return;
    };
    if let Some(party) = parties.iter().find(|p| p.after.is_some() || p.before.is_some()) {
        let message = format!("the speed of {} is not held against the delta-Vs", party.unit.id);
        let hint = "solve the impact from the speeds instead, and compare the two";
        w.notices.push(Notice::warn("P-6", message).at(party.unit.place).hint(hint));
    }
    let readings = [0, 1].map(|i| {
        let id = &parties[i].unit.id;
        let k = w.method_error(format!("k_{{ΔV,{id}}}"), &line::RECORDER_ERROR, &format!(", {id}"));
        (k, w.b.entry(format!("ΔV_{{r,{id}}}"), recorded[i], Role::Measured))
    });
    let [(k1, d1), (k2, d2)] = readings;
    let title = "Closing speed along the line from both delta-Vs";
    let closing = w.b.call(line::ClosingFromDeltaVs::NODE, &[k1, d1, k2, d2, e], "V_{c}", title, Some(place));
    let remark = "along the line of the impulse; the two speeds themselves do not follow from delta-Vs";
    let what = (Sought::ClosingSpeed, Stage::Impact);
    w.b.result(what, None, "Closing speed along the line", closing, Some(remark));
    for (p, (k, d)) in parties.iter().zip(readings) {
        let id = &p.unit.id;
        let title = format!("Delta-V of {id} as recorded");
        let delta =
            w.b.call(RecordedDeltaV::NODE, &[k, d], format!("ΔV_{{{id}}}"), title.clone(), Some(place));
        w.b.result((Sought::DeltaV, Stage::Impact), Some(id), title, delta, None);
    }
    let [Some(m1), Some(m2)] = parties.map(|p| p.mass) else { return };
    let title = "Difference of the two impulses (should be zero)";
    let q = w.b.call(line::DeltaVMismatch::NODE, &[m1, k1, d1, m2, k2, d2], "Q", title, Some(place));
    w.b.plan.watch.zeros.push((
        q,
        "momentum does not close: the two delta-Vs do not carry opposite impulses of one size, so one of the delta-Vs \
         or masses is wrong, or the recorders were not at the centres of gravity",
    ));
    let title = "Energy absorbed along the line";
    let energy = w.b.call(line::AbsorbedEnergy::NODE, &[m1, m2, e, closing], "E_{lost}", title, Some(place));
    w.b.result((Sought::EnergyLost, Stage::Impact), None, title, energy, None);
}
