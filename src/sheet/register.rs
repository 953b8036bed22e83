//! The register of everything that enters.

use super::decimals;
use crate::plan::{Input, Plan, Role, SlotId};
use crate::stats::Dist;
use crate::units::{decimals_for, si};

/// One row of the register.
#[derive(Debug, Clone)]
pub struct Row {
    /// Its number: `entry 4`.
    pub number: usize,
    /// Its symbol.
    pub symbol: String,
    /// What it is.
    pub name: String,
    /// As typed.
    pub entered: String,
    /// The value in SI.
    pub value: String,
    /// The standard uncertainty and the shape it comes from.
    pub uncertainty: String,
    /// Source and remark.
    pub source: String,
    /// What it is to the calculation.
    pub role: Role,
}

/// The rows, in the order of the inputs: every entry of the case, and of what
/// nobody entered that which `shown` slots need.
pub fn register(plan: &Plan, shown: &[SlotId]) -> Vec<Row> {
    let calls = plan.needed(shown);
    let used = |slot: SlotId| {
        let in_line = plan.calls.iter().zip(&calls).any(|(call, needed)| *needed && call.ins.contains(&slot));
        in_line || shown.contains(&slot)
    };
    let rows = plan.inputs.iter().enumerate();
    rows.filter(|(_, i)| i.place.is_some() || used(i.slot)).map(|(i, input)| row(plan, i, input)).collect()
}

fn row(plan: &Plan, index: usize, input: &Input) -> Row {
    let slot = plan.slot(input.slot);
    let (value, u) = (input.dist.estimate(), input.dist.u());
    let places = decimals(slot.kind, value, u);
    let source =
        [input.source.as_deref(), input.note.as_deref()].into_iter().flatten().collect::<Vec<_>>().join("; ");
    Row {
        number: index + 1,
        symbol: slot.symbol.clone(),
        name: input.name.clone(),
        entered: input.entered.clone(),
        value: si(slot.kind, value, places),
        uncertainty: uncertainty(input, slot.kind, places),
        source: if source.is_empty() { "no source given".into() } else { source },
        role: input.role,
    }
}

fn uncertainty(input: &Input, kind: crate::units::Kind, places: i32) -> String {
    match input.dist {
        Dist::Exact(_) => "exact".into(),
        Dist::StudentT { dof, .. } => {
            format!("u = {}, Student t, ν = {dof}", si(kind, input.dist.u(), places))
        }
        other => {
            let places = if decimals_for(other.u()).is_some() { places } else { 3 };
            format!("u = {}, {}", si(kind, other.u(), places), other.shape())
        }
    }
}
