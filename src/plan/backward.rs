//! Compiles a case into a plan that works backward from rest.
//!
//! Each unit's travel after impact gives its speed at separation; the impact
//! gives the speeds before it; marks before impact give the speed at their
//! start.

use super::{Builder, Plan, Planned, Role, SlotId, Sought, Stage, impact_inline, impact_momentum, travel};
use crate::case::{Begin, Case, Direction, End, ImpactMethod, Phase, PointId, TestId, Unit, UnitId};
use crate::diag::{Notice, Notices};
use crate::method::MethodError;
use crate::physics::{STANDARD_GRAVITY, mass, path};
use crate::units::Kind;

/// What several lines use and must be one slot. Kept apart from symbols, which
/// are made of the case's own words.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Shared {
    /// Friction of a test.
    Friction(TestId),
    /// Method error of skids on a test's surface.
    Skid(TestId),
    /// Method error of travel after impact on a test's surface.
    Travel(TestId),
    /// Duration of contact.
    ContactTime,
    /// Friction taken for the road's impulse where none is tested.
    UsualFriction,
    /// A factor of one.
    One,
}

/// A plan under construction, with the slots that are shared by reference.
pub(super) struct Backward<'a> {
    pub(super) case: &'a Case,
    pub(super) b: Builder,
    pub(super) notices: Notices,
    pub(super) gravity: SlotId,
    points: Vec<Option<[SlotId; 2]>>,
    masses: Vec<Option<SlotId>>,
    shared: Vec<(Shared, SlotId)>,
}

/// Compiles a case. What the case lacks for a step becomes a notice; the steps
/// that do not need it are still planned.
pub fn backward(case: &Case) -> Planned {
    let mut b = Builder::default();
    let gravity = match &case.gravity {
        Some(entry) => b.entry("g", entry, Role::Measured),
        None => b.assumed(
            "g",
            Kind::Acceleration,
            STANDARD_GRAVITY,
            "standard gravity",
            "CGPM 1901; gravity differs by at most 0.3 % on the ground",
        ),
    };
    let mut w = Backward {
        case,
        b,
        notices: Notices::default(),
        gravity,
        points: vec![None; case.points.len()],
        masses: vec![None; case.units.len()],
        shared: Vec::new(),
    };
    w.all();
    Planned { plan: finished(w.b), notices: w.notices }
}

/// Sections without lines are dropped.
fn finished(b: Builder) -> Plan {
    let mut plan = b.finish();
    let mut kept = Vec::new();
    let mut new_index = vec![0; plan.sections.len()];
    for (index, title) in plan.sections.drain(..).enumerate() {
        if plan.calls.iter().any(|c| c.section == index) {
            new_index[index] = kept.len();
            kept.push(title);
        }
    }
    for call in &mut plan.calls {
        call.section = new_index.get(call.section).copied().unwrap_or(0);
    }
    plan.sections = kept;
    plan
}

impl<'a> Backward<'a> {
    fn all(&mut self) {
        if self.case.impacts.len() > 1 {
            let place = self.case.impacts.get(1).map(|i| i.place);
            self.notices.push(
                Notice::stop(
                    "P-1",
                    "successive impacts are described, but this version solves one impact only",
                )
                .at(place)
                .expected("one [[impact]]")
                .hint("the speeds after the last impact are still worked out"),
            );
        }
        let mut separation = vec![None; self.case.units.len()];
        for (index, unit) in self.case.units.iter().enumerate() {
            for phase in &unit.phases {
                match (phase.begin, phase.end) {
                    (Begin::Impact(_), End::Rest) => separation[index] = self.after_impact(unit, phase),
                    (Begin::Approach, End::Rest) => self.alone(unit, phase),
                    _ => {}
                }
            }
        }
        if let [impact] = self.case.impacts.as_slice() {
            if let Some(fixed) = impact.units.iter().find(|u| self.unit(**u).fixed) {
                self.refuse_fixed(*fixed, impact.place);
                return;
            }
            match impact.method {
                ImpactMethod::Momentum => impact_momentum::plan(self, impact, &separation),
                ImpactMethod::InLine => impact_inline::plan(self, impact, &separation),
            }
        }
        if self.b.plan.results.is_empty() && !self.notices.any_stop() {
            let notice = Notice::stop("P-7", "the case gives nothing to work out");
            self.notices.push(notice.expected("a unit's travel, or an impact with what it needs"));
        }
    }

    fn refuse_fixed(&mut self, unit: UnitId, place: crate::diag::Place) {
        let message = format!(
            "{} is a fixed object: the ground takes part in the impact, so momentum of the two is not conserved",
            self.unit(unit).label
        );
        self.notices.push(
            Notice::stop("M-8", message).at(place).expected("two units that are free to move").hint(
                "the speed after impact is still worked out; crush energy or a recorder would give the rest",
            ),
        );
    }

    fn after_impact(&mut self, unit: &Unit, phase: &Phase) -> Option<SlotId> {
        self.b.section(format!("{}: from impact to rest", title(unit)));
        let speed = match &phase.speed {
            Some(entry) => self.b.entry(format!("v′_{{{}}}", unit.id), entry, Role::Measured),
            None if phase.travel.is_empty() => return None,
            None => travel::chain(self, unit, phase, None)?,
        };
        let label = format!("Speed of {} after impact", unit.id);
        self.b.result((Sought::PostImpactSpeed, Stage::Travel), Some(&unit.id), label, speed, None);
        Some(speed)
    }

    fn alone(&mut self, unit: &Unit, phase: &Phase) {
        self.b.section(format!("{}: braking to rest", title(unit)));
        if let Some(speed) = travel::chain(self, unit, phase, None) {
            let label = format!("Speed of {} at the start of its marks (a minimum)", unit.id);
            let remark = "a minimum: braking before the first visible mark is not counted, nor what happened after the last";
            let what = (Sought::SpeedAtStartOfMarks, Stage::Travel);
            self.b.result(what, Some(&unit.id), label, speed, Some(remark));
        }
    }

    /// Speed at the start of the marks before impact, from the impact speed.
    pub(super) fn marks_before(&mut self, unit: &Unit, impact_speed: SlotId) {
        let Some(phase) = before(unit).filter(|p| !p.travel.is_empty()) else { return };
        self.b.section(format!("{}: marks before impact", title(unit)));
        if let Some(speed) = travel::chain(self, unit, phase, Some(impact_speed)) {
            let label = format!("Speed of {} at the start of its marks (a minimum)", unit.id);
            let remark =
                "a minimum for the onset of braking: braking before the first visible mark is not counted";
            let what = (Sought::SpeedAtStartOfMarks, Stage::Impact);
            self.b.result(what, Some(&unit.id), label, speed, Some(remark));
        }
    }

    pub(super) fn unit(&self, id: UnitId) -> &'a Unit {
        &self.case.units[id.0]
    }

    /// The slots of a point's coordinates, added once.
    pub(super) fn point(&mut self, id: PointId) -> [SlotId; 2] {
        if let Some(slots) = self.points[id.0] {
            return slots;
        }
        let point = &self.case.points[id.0];
        let east = self.b.entry(format!("E_{{{}}}", point.number), &point.east, Role::Measured);
        let north = self.b.entry(format!("N_{{{}}}", point.number), &point.north, Role::Measured);
        self.points[id.0] = Some([east, north]);
        [east, north]
    }

    /// The slots of two points: east, north, east, north.
    pub(super) fn two_points(&mut self, a: PointId, b: PointId) -> [SlotId; 4] {
        let [e1, n1] = self.point(a);
        let [e2, n2] = self.point(b);
        [e1, n1, e2, n2]
    }

    /// The mass of a unit in the crash, added once.
    pub(super) fn mass(&mut self, id: UnitId) -> Option<SlotId> {
        if let Some(slot) = self.masses[id.0] {
            return Some(slot);
        }
        let unit = self.unit(id);
        let vehicle = unit.mass.as_ref()?;
        let slot = match &unit.load {
            None => self.b.entry(format!("m_{{{}}}", unit.id), vehicle, Role::Measured),
            Some(load) => {
                let own = self.b.entry(format!("m_{{{},v}}", unit.id), vehicle, Role::Measured);
                let load = self.b.entry(format!("m_{{{},l}}", unit.id), load, Role::Measured);
                let title = format!("Mass of {} in the crash", unit.id);
                self.b.call(mass::LoadedMass::NODE, &[own, load], format!("m_{{{}}}", unit.id), title, None)
            }
        };
        self.masses[id.0] = Some(slot);
        Some(slot)
    }

    /// A method error as a variable: the case's own value where it changes it.
    pub(super) fn method_error(&mut self, symbol: String, error: &MethodError, whose: &str) -> SlotId {
        match self.case.error_changes.iter().find(|c| c.id == error.id) {
            None => self.b.method_error(symbol, error, whose),
            Some(change) => {
                let mut entry = change.entry.clone();
                entry.name = format!("method error, changed by the case: {}{whose}", error.title);
                entry.note = Some(change.reason.clone());
                self.b.entry(symbol, &entry, Role::MethodError)
            }
        }
    }

    /// The slot of something shared, made at its first use.
    pub(super) fn shared(&mut self, what: Shared, make: impl FnOnce(&mut Self) -> SlotId) -> SlotId {
        if let Some((_, slot)) = self.shared.iter().find(|(known, _)| *known == what) {
            return *slot;
        }
        let slot = make(self);
        self.shared.push((what, slot));
        slot
    }

    /// A direction as a slot; `None` for words that only in-line impacts know.
    pub(super) fn direction(&mut self, direction: &Direction, symbol: &str, title: &str) -> Option<SlotId> {
        match direction {
            Direction::Angle(entry) => Some(self.b.entry(symbol, entry, Role::Measured)),
            Direction::Points(a, b, place) => {
                let ins = self.two_points(*a, *b);
                Some(self.b.call(path::Course::NODE, &ins, symbol, title, Some(*place)))
            }
            Direction::Along(_) | Direction::Against(_) => None,
        }
    }

    /// Reports that an impact lacks something.
    pub(super) fn lacks(&mut self, what: String, place: crate::diag::Place, hint: &str) {
        self.notices.push(Notice::stop("P-2", what).at(place).expected("what this impact needs").hint(hint));
    }
}

/// The unit's name, and what it is if that says more.
fn title(unit: &Unit) -> String {
    if unit.label == unit.id {
        format!("Unit {}", unit.id)
    } else {
        format!("Unit {}, {}", unit.id, unit.label)
    }
}

/// The phase that ends in the unit's impact.
pub(super) fn before(unit: &Unit) -> Option<&Phase> {
    unit.phases.iter().find(|p| p.begin == Begin::Approach && matches!(p.end, End::Impact(_)))
}

/// The phase that follows the unit's impact.
pub(super) fn after(unit: &Unit) -> Option<&Phase> {
    unit.phases.iter().find(|p| matches!(p.begin, Begin::Impact(_)) && p.end == End::Rest)
}
