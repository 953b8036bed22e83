//! The plan: one compiled calculation that everything reads.
//!
//! In: a checked case. Out: inputs, formula calls in order, and named results,
//! all on numbered slots. A measured quantity is one slot that all its uses
//! refer to, so that correlation needs no bookkeeping. After the plan is made
//! nothing can be misspelt. Never formats a number.
//! The sheet, the linear and the Monte Carlo propagation are readers of the
//! same plan.

mod backward;
mod batch;
mod builder;
mod evaluate;
mod impact_inline;
mod impact_momentum;
mod travel;

pub use backward::backward;
pub use batch::Block;
pub use builder::Builder;
pub use evaluate::{Evaluation, SlotRefusal};

use crate::diag::{Notices, Place};
use crate::method::Node;
use crate::stats::Dist;
use crate::units::Kind;

/// Number of a slot.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct SlotId(pub usize);

/// A quantity of the calculation.
#[derive(Debug, Clone)]
pub struct Slot {
    /// Its symbol; subscripts as `_{…}`.
    pub symbol: String,
    /// Its kind.
    pub kind: Kind,
    /// What gives its value.
    pub origin: Origin,
}

/// What gives a slot its value.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Origin {
    /// The input with this index.
    Input(usize),
    /// The call with this index.
    Call(usize),
}

/// What an input is to the calculation.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Role {
    /// Measured by somebody.
    Measured,
    /// Taken without measurement, such as standard gravity.
    Assumed,
    /// A method's own scatter.
    MethodError,
}

/// Something that enters the calculation.
#[derive(Debug, Clone)]
pub struct Input {
    /// Its slot.
    pub slot: SlotId,
    /// What is known about it, SI.
    pub dist: Dist,
    /// What it is to the calculation.
    pub role: Role,
    /// Least and greatest value that is physically possible, SI.
    pub bounds: (f64, f64),
    /// In words.
    pub name: String,
    /// As typed.
    pub entered: String,
    /// Where it comes from.
    pub source: Option<String>,
    /// A remark.
    pub note: Option<String>,
    /// Its place in the case.
    pub place: Option<Place>,
}

/// One line of the calculation: a formula applied to slots.
pub struct Call {
    /// The formula.
    pub node: &'static dyn Node,
    /// Its inputs.
    pub ins: Vec<SlotId>,
    /// Its result.
    pub out: SlotId,
    /// What it finds here, in words.
    pub title: String,
    /// The section it stands in.
    pub section: usize,
    /// The place in the case that led to it.
    pub place: Option<Place>,
}

impl std::fmt::Debug for Call {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        write!(f, "{} {:?} -> {:?}", self.node.card().id, self.ins, self.out)
    }
}

/// What a result is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Sought {
    /// Speed at the start of the visible marks.
    SpeedAtStartOfMarks,
    /// Speed at impact.
    ImpactSpeed,
    /// Speed after impact.
    PostImpactSpeed,
    /// Size of delta-V.
    DeltaV,
    /// Principal direction of force.
    ForceDirection,
    /// Closing speed.
    ClosingSpeed,
    /// Energy lost.
    EnergyLost,
    /// Restitution.
    Restitution,
}

impl Sought {
    /// The word in a result's stable name.
    pub fn word(self) -> &'static str {
        match self {
            Sought::SpeedAtStartOfMarks => "speed_at_start_of_marks",
            Sought::ImpactSpeed => "impact_speed",
            Sought::PostImpactSpeed => "post_impact_speed",
            Sought::DeltaV => "delta_v",
            Sought::ForceDirection => "pdof",
            Sought::ClosingSpeed => "closing_speed",
            Sought::EnergyLost => "energy_lost",
            Sought::Restitution => "restitution",
        }
    }
}

/// What a result hangs on, and falls with.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Stage {
    /// Found from a travel alone.
    Travel,
    /// Found through the impact.
    Impact,
}

/// A result with its stable name.
#[derive(Debug, Clone)]
pub struct Named {
    /// What it is.
    pub sought: Sought,
    /// What it hangs on.
    pub stage: Stage,
    /// The unit it belongs to, if it belongs to one.
    pub unit: Option<String>,
    /// Stable name, such as `A.impact_speed`.
    pub id: String,
    /// In words.
    pub label: String,
    /// Its slot.
    pub slot: SlotId,
    /// What must be said with the number.
    pub remark: Option<&'static str>,
}

/// A compiled calculation.
#[derive(Debug, Default)]
pub struct Plan {
    /// All slots.
    pub slots: Vec<Slot>,
    /// Everything that enters.
    pub inputs: Vec<Input>,
    /// The lines, each after the lines it needs.
    pub calls: Vec<Call>,
    /// Section titles; [`Call::section`] counts into them.
    pub sections: Vec<String>,
    /// What was asked for.
    pub results: Vec<Named>,
    /// Slots that rules look at.
    pub watch: Watch,
}

/// Slots that rules and figures look at, by meaning.
#[derive(Debug, Default, Clone)]
pub struct Watch {
    /// The oblique impact, if there is one.
    pub momentum: Option<MomentumSlots>,
    /// Quantities that should be zero: momentum across a lone mover's course,
    /// or the difference of two recorded impulses; with the sentence to say
    /// when they are not.
    pub zeros: Vec<(SlotId, &'static str)>,
    /// Paths: direction just after separation and from separation to rest.
    pub departures: Vec<Departure>,
    /// Entered lengths along points: the length and the chord between its ends.
    pub chords: Vec<(SlotId, SlotId, Place, String)>,
}

/// How a unit left the impact.
#[derive(Debug, Clone)]
pub struct Departure {
    /// The unit's name.
    pub unit: String,
    /// Direction of the path just after separation.
    pub course: SlotId,
    /// Separation and rest.
    pub line: (crate::case::PointId, crate::case::PointId),
    /// Separation and the next point of the path.
    pub first: (crate::case::PointId, crate::case::PointId),
    /// The direction was typed instead of following from the path.
    pub stated: bool,
    /// Place of the phase.
    pub place: Place,
}

/// The slots of an oblique impact.
#[derive(Debug, Clone)]
pub struct MomentumSlots {
    /// Names of the two units.
    pub names: [String; 2],
    /// Masses.
    pub mass: [SlotId; 2],
    /// Speeds before.
    pub before: [SlotId; 2],
    /// Approach courses; `None` for a unit that stood.
    pub approach: [Option<SlotId>; 2],
    /// Courses after.
    pub course: [SlotId; 2],
    /// Components before: east, north.
    pub before_xy: [[SlotId; 2]; 2],
    /// Components after: east, north.
    pub after_xy: [[SlotId; 2]; 2],
    /// Condition of the solution, where both speeds were unknown.
    pub condition: Option<SlotId>,
    /// Restitution implied.
    pub restitution: SlotId,
    /// Place of the impact.
    pub place: Place,
}

/// A plan and what there is to say about how it was made.
#[derive(Debug)]
pub struct Planned {
    /// The plan, as far as the case carries it.
    pub plan: Plan,
    /// What the case lacks or contradicts.
    pub notices: Notices,
}

impl Plan {
    /// The best estimates of the inputs.
    pub fn estimates(&self) -> Vec<f64> {
        self.inputs.iter().map(|i| i.dist.estimate()).collect()
    }

    /// For each call whether one of the wanted slots needs it.
    pub fn needed(&self, wanted: &[SlotId]) -> Vec<bool> {
        let mut slots = vec![false; self.slots.len()];
        wanted.iter().for_each(|slot| slots[slot.0] = true);
        let mut calls = vec![false; self.calls.len()];
        for (index, call) in self.calls.iter().enumerate().rev() {
            if slots[call.out.0] {
                calls[index] = true;
                call.ins.iter().for_each(|slot| slots[slot.0] = true);
            }
        }
        calls
    }

    /// Slots that are no results but belong on the worksheet: the condition of
    /// the solution, what should be zero, what a length is held against.
    pub fn checks(&self) -> Vec<SlotId> {
        let condition = self.watch.momentum.iter().filter_map(|m| m.condition);
        let zeros = self.watch.zeros.iter().map(|(slot, _)| *slot);
        condition.chain(zeros).chain(self.watch.chords.iter().flat_map(|c| [c.0, c.1])).collect()
    }

    /// The slot with this number.
    pub fn slot(&self, id: SlotId) -> &Slot {
        &self.slots[id.0]
    }

    /// The input behind a slot, if it is one.
    pub fn input_of(&self, id: SlotId) -> Option<&Input> {
        match self.slot(id).origin {
            Origin::Input(i) => self.inputs.get(i),
            Origin::Call(_) => None,
        }
    }
}
