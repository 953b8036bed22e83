//! Builds a plan slot by slot.

use super::{Call, Input, Named, Origin, Plan, Role, Slot, SlotId, Sought, Stage};
use crate::case::Entry;
use crate::diag::Place;
use crate::method::{MethodError, Node};
use crate::stats::Dist;
use crate::units::Kind;

/// A plan under construction.
#[derive(Debug, Default)]
pub struct Builder {
    pub(super) plan: Plan,
}

impl Builder {
    fn slot(&mut self, symbol: String, kind: Kind, origin: Origin) -> SlotId {
        self.plan.slots.push(Slot { symbol, kind, origin });
        SlotId(self.plan.slots.len() - 1)
    }

    /// Adds an input and gives its slot. The caller keeps the slot: a quantity
    /// that is used twice must be added once.
    pub fn input(&mut self, symbol: impl Into<String>, kind: Kind, mut input: Input) -> SlotId {
        let slot = self.slot(symbol.into(), kind, Origin::Input(self.plan.inputs.len()));
        input.slot = slot;
        self.plan.inputs.push(input);
        slot
    }

    /// Adds an entry of the case.
    pub fn entry(&mut self, symbol: impl Into<String>, entry: &Entry, role: Role) -> SlotId {
        let input = Input {
            slot: SlotId(0),
            dist: entry.dist,
            role,
            bounds: entry.bounds,
            name: entry.name.clone(),
            entered: entry.entered.clone(),
            source: entry.source.clone(),
            note: entry.note.clone(),
            place: Some(entry.place),
        };
        self.input(symbol, entry.kind, input)
    }

    /// Adds a value that nobody measured.
    pub fn assumed(&mut self, symbol: &str, kind: Kind, value: f64, name: &str, source: &str) -> SlotId {
        let input = Input {
            slot: SlotId(0),
            dist: Dist::Exact(value),
            role: Role::Assumed,
            bounds: (f64::NEG_INFINITY, f64::INFINITY),
            name: name.into(),
            entered: "not entered".into(),
            source: Some(source.into()),
            note: None,
            place: None,
        };
        self.input(symbol, kind, input)
    }

    /// Adds a method error with the program's own value.
    pub fn method_error(&mut self, symbol: String, error: &MethodError, whose: &str) -> SlotId {
        let bounds = if error.dist.estimate() > 0.0 {
            (0.0, f64::INFINITY)
        } else {
            (f64::NEG_INFINITY, f64::INFINITY)
        };
        let input = Input {
            slot: SlotId(0),
            dist: error.dist,
            role: Role::MethodError,
            bounds,
            name: format!("method error: {}{whose}", error.title),
            entered: "on by default".into(),
            source: Some(error.source.into()),
            note: None,
            place: None,
        };
        self.input(symbol, error.kind, input)
    }

    /// Starts a section of the worksheet.
    pub fn section(&mut self, title: impl Into<String>) {
        self.plan.sections.push(title.into());
    }

    /// Adds a line and gives the slot of its result.
    pub fn call(
        &mut self,
        node: &'static dyn Node,
        ins: &[SlotId],
        symbol: impl Into<String>,
        title: impl Into<String>,
        place: Option<Place>,
    ) -> SlotId {
        let out = self.slot(symbol.into(), node.card().output.kind, Origin::Call(self.plan.calls.len()));
        let section = self.plan.sections.len().saturating_sub(1);
        self.plan.calls.push(Call { node, ins: ins.to_vec(), out, title: title.into(), section, place });
        out
    }

    /// Names a slot as a result; the stable name follows from what it is.
    pub fn result(
        &mut self,
        (sought, stage): (Sought, Stage),
        unit: Option<&str>,
        label: impl Into<String>,
        slot: SlotId,
        remark: Option<&'static str>,
    ) {
        let id = unit.map_or(sought.word().to_string(), |unit| format!("{unit}.{}", sought.word()));
        let unit = unit.map(str::to_string);
        self.plan.results.push(Named { sought, stage, unit, id, label: label.into(), slot, remark });
    }

    /// The finished plan.
    pub fn finish(self) -> Plan {
        self.plan
    }
}
