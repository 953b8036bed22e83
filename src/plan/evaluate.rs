//! Evaluates a plan once: values, exact derivatives, refusals.

use super::{Plan, SlotId};
use crate::method::Refusal;

/// Why a slot has no value.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum SlotRefusal {
    /// The formula itself refused.
    Here(Refusal),
    /// An earlier line refused: the number of that call.
    Earlier(usize),
}

/// All values of a plan, with their derivatives by every input.
#[derive(Debug, Clone)]
pub struct Evaluation {
    /// Value of each slot; not a number where it was refused.
    pub values: Vec<f64>,
    /// Derivatives of each slot by each input.
    pub rows: Vec<Vec<f64>>,
    /// Derivatives of each call by its own inputs.
    pub local: Vec<Vec<f64>>,
    /// Why a slot has no value.
    pub refusals: Vec<Option<SlotRefusal>>,
}

impl Evaluation {
    /// The slot's value, if it has one.
    pub fn value(&self, slot: SlotId) -> Option<f64> {
        self.values.get(slot.0).copied().filter(|v| v.is_finite())
    }

    /// The slot's derivatives by the inputs.
    pub fn row(&self, slot: SlotId) -> &[f64] {
        self.rows.get(slot.0).map_or(&[], Vec::as_slice)
    }
}

impl Plan {
    /// Evaluates the plan at given inputs (SI). A refused line makes the lines
    /// that need it refused too; the others keep their values.
    pub fn evaluate(&self, inputs: &[f64]) -> Evaluation {
        let n = self.inputs.len();
        let mut e = Evaluation {
            values: vec![f64::NAN; self.slots.len()],
            rows: vec![vec![0.0; n]; self.slots.len()],
            local: Vec::with_capacity(self.calls.len()),
            refusals: vec![None; self.slots.len()],
        };
        for (i, (input, value)) in self.inputs.iter().zip(inputs).enumerate() {
            e.values[input.slot.0] = *value;
            e.rows[input.slot.0][i] = 1.0;
        }
        for index in 0..self.calls.len() {
            self.call(index, &mut e);
        }
        e
    }

    fn call(&self, index: usize, e: &mut Evaluation) {
        let call = &self.calls[index];
        let earlier = call.ins.iter().find_map(|slot| {
            e.refusals[slot.0].map(|r| match r {
                SlotRefusal::Here(_) => self.call_of(*slot).unwrap_or(index),
                SlotRefusal::Earlier(origin) => origin,
            })
        });
        if let Some(origin) = earlier {
            e.refusals[call.out.0] = Some(SlotRefusal::Earlier(origin));
            e.local.push(vec![0.0; call.ins.len()]);
            return;
        }
        let x: Vec<f64> = call.ins.iter().map(|slot| e.values[slot.0]).collect();
        match call.node.gradient(&x) {
            Ok((value, slopes)) => {
                let mut row = vec![0.0; self.inputs.len()];
                for (slot, slope) in call.ins.iter().zip(&slopes) {
                    for (total, part) in row.iter_mut().zip(&e.rows[slot.0]) {
                        // An infinite slope of what does not vary is no slope.
                        *total += if *part == 0.0 { 0.0 } else { slope * part };
                    }
                }
                e.values[call.out.0] = value;
                e.rows[call.out.0] = row;
                e.local.push(slopes);
            }
            Err(refusal) => {
                e.refusals[call.out.0] = Some(SlotRefusal::Here(refusal));
                e.local.push(vec![0.0; x.len()]);
            }
        }
    }

    /// Derivatives of one slot by every slot before it, each taken as if it
    /// were free: what a degree of a computed direction is worth.
    pub fn adjoint(&self, e: &Evaluation, slot: SlotId) -> Vec<f64> {
        let mut by = vec![0.0; self.slots.len()];
        by[slot.0] = 1.0;
        for (call, local) in self.calls.iter().zip(&e.local).rev() {
            let outer = by[call.out.0];
            if outer != 0.0 {
                call.ins.iter().zip(local).for_each(|(s, slope)| by[s.0] += outer * slope);
            }
        }
        by
    }

    /// The call that gives a slot, if one does.
    pub fn call_of(&self, slot: SlotId) -> Option<usize> {
        match self.slot(slot).origin {
            super::Origin::Call(index) => Some(index),
            super::Origin::Input(_) => None,
        }
    }
}
