//! Worked lines.

use super::{Numbering, decimals, exact_decimals, line_scale};
use crate::method::Card;
use crate::plan::{Call, Evaluation, Origin, Plan, SlotId};
use crate::units::{Kind, System, decimals_for, fixed, guard_decimals, si};

/// How much of the result's last digit all roundings on a line may use up
/// together. Half a digit goes to the result's own rounding, so the line
/// closes within one.
const ROUNDING_BUDGET: f64 = 0.2;

/// One worked line.
#[derive(Debug, Clone)]
pub struct Line {
    /// Its number.
    pub number: usize,
    /// The section it stands in.
    pub section: usize,
    /// What it finds.
    pub title: String,
    /// The formula's card.
    pub card: &'static Card,
    /// `v_{A} = √(…)`
    pub formula: String,
    /// `= √((9.15 m/s)² + …)`
    pub substitution: String,
    /// `= 13.21 m/s`
    pub result: String,
    /// `u = 0.34 m/s; 47.6 km/h`
    pub aside: String,
    /// Where the symbols' values come from.
    pub from: String,
    /// The slot it gives.
    pub slot: SlotId,
}

/// All lines that are numbered and have a value.
pub fn lines(plan: &Plan, e: &Evaluation, u: &[f64], numbering: &Numbering, system: System) -> Vec<Line> {
    let mut lines = Vec::new();
    for (index, call) in plan.calls.iter().enumerate() {
        if let (Some(number), Some(value)) = (numbering.line(index), e.value(call.out)) {
            lines.push(line(plan, e, u, numbering, system, index, call, number, value));
        }
    }
    lines
}

#[allow(clippy::too_many_arguments)]
fn line(
    plan: &Plan,
    e: &Evaluation,
    u: &[f64],
    numbering: &Numbering,
    system: System,
    index: usize,
    call: &Call,
    number: usize,
    value: f64,
) -> Line {
    let out = plan.slot(call.out);
    let places = decimals(out.kind, value, u[call.out.0]);
    let symbols: Vec<String> = call.ins.iter().map(|s| plan.slot(*s).symbol.clone()).collect();
    let numbers: Vec<String> =
        (0..call.ins.len()).map(|i| substituted(plan, e, index, call, i, places)).collect();
    let expression = call.node.expression();
    Line {
        number,
        section: call.section,
        title: call.title.clone(),
        card: call.node.card(),
        formula: format!("{} = {}", out.symbol, expression.in_symbols(&symbols)),
        substitution: format!("= {}", expression.in_numbers(&numbers)),
        result: format!("= {}", si(out.kind, value, places)),
        aside: aside(out.kind, value, u[call.out.0], places, system),
        from: origins(plan, numbering, call),
        slot: call.out,
    }
}

/// An input's number with the guard digits that let the line close: the
/// smaller its effect, the fewer digits; exact values as they are.
fn substituted(plan: &Plan, e: &Evaluation, index: usize, call: &Call, i: usize, places: i32) -> String {
    let slot = call.ins[i];
    let kind = plan.slot(slot).kind;
    let value = e.values[slot.0];
    let scale = line_scale(kind);
    let slope =
        e.local[index].get(i).copied().unwrap_or(0.0) * scale / line_scale(call.node.card().output.kind);
    let guard = guard_decimals(places, slope, ROUNDING_BUDGET / call.ins.len() as f64);
    let short = exact_decimals(value / scale);
    let exact = plan.input_of(slot).is_some_and(|input| input.dist.is_exact()) && short < 6;
    // Three figures, so that a number without effect is still seen; but what is
    // a rounding error beside the result stays a zero.
    let figures = decimals_for(value.abs() / (10.0 * scale)).unwrap_or(0).min(guard.max(places) + 2);
    si(kind, value, if exact { short } else { guard.max(figures) })
}

/// Standard uncertainty, and the value in the reader's units.
fn aside(kind: Kind, value: f64, u: f64, places: i32, system: System) -> String {
    let mut parts = Vec::new();
    // Less is a rounding error, not an uncertainty.
    if u > 1e-9 * value.abs() {
        parts.push(format!("u = {}", si(kind, u, places)));
    }
    let (unit, scale) = system.unit(kind);
    if scale != 1.0 && kind != Kind::Angle {
        let decimals = decimals_for(u / scale).unwrap_or_else(|| exact_decimals(value / scale).min(3));
        parts.push(format!("{} {unit}", fixed(value / scale, decimals)));
    }
    parts.join("; ")
}

/// `v_{A}: line 3 · g: entry 1`
fn origins(plan: &Plan, numbering: &Numbering, call: &Call) -> String {
    let mut seen = Vec::new();
    let mut parts = Vec::new();
    for slot in &call.ins {
        if seen.contains(slot) {
            continue;
        }
        seen.push(*slot);
        let symbol = &plan.slot(*slot).symbol;
        match plan.slot(*slot).origin {
            Origin::Input(input) => parts.push(format!("{symbol}: entry {}", input + 1)),
            Origin::Call(call) => match numbering.line(call) {
                Some(number) => parts.push(format!("{symbol}: line {number}")),
                None => parts.push(symbol.clone()),
            },
        }
    }
    parts.join(" · ")
}
