//! Evaluates a plan for many trials at once.

use super::{Call, Plan, SlotId};
use crate::method::{Column, Lanes, WIDTH};
use crate::scalar::trig::sincos_all;
use crate::stats::{Generator, Ziggurat};
use crate::units::Kind;

/// Columns of one block of trials, reused from block to block.
#[derive(Debug)]
pub struct Block {
    values: Vec<Lanes>,
    sines: Vec<Lanes>,
    cosines: Vec<Lanes>,
    /// Where a slot's sine and cosine are kept, if it is an angle that enters
    /// a formula; place 0 is shared by all others and never read.
    trig: Vec<usize>,
    /// Which calls are run: those that a result needs.
    live: Vec<bool>,
}

impl Block {
    /// Room for one block of a plan. Only what `wanted` needs is computed.
    pub fn new(plan: &Plan, wanted: &[SlotId]) -> Self {
        let live = plan.needed(wanted);
        let mut trig = vec![0; plan.slots.len()];
        let mut count = 1;
        for (call, _) in plan.calls.iter().zip(&live).filter(|(_, live)| **live) {
            for slot in &call.ins {
                if plan.slot(*slot).kind == Kind::Angle && trig[slot.0] == 0 {
                    trig[slot.0] = count;
                    count += 1;
                }
            }
        }
        Block {
            values: vec![[0.0; WIDTH]; plan.slots.len()],
            sines: vec![[0.0; WIDTH]; count],
            cosines: vec![[1.0; WIDTH]; count],
            trig,
            live,
        }
    }

    /// Draws all inputs from their distributions. A draw that is physically
    /// impossible becomes no number, so that its trial is refused and counted.
    pub fn draw(&mut self, plan: &Plan, ziggurat: &Ziggurat, rng: &mut Generator) {
        for input in &plan.inputs {
            let column = &mut self.values[input.slot.0];
            input.dist.fill(column, ziggurat, rng);
            let (lo, hi) = input.bounds;
            if lo > f64::NEG_INFINITY || hi < f64::INFINITY {
                column.iter_mut().filter(|v| **v < lo || **v > hi).for_each(|v| *v = f64::NAN);
            }
        }
    }

    /// Computes every line for the drawn inputs. Whatever is not a number makes
    /// all that follows from it not a number.
    pub fn compute(&mut self, plan: &Plan) {
        plan.inputs.iter().for_each(|input| self.prepare_angle(input.slot));
        for (index, call) in plan.calls.iter().enumerate() {
            if self.live[index] {
                self.run(call);
                self.prepare_angle(call.out);
            }
        }
    }

    /// A line's result stands after all that it needs.
    fn run(&mut self, call: &Call) {
        let (earlier, later) = self.values.split_at_mut(call.out.0);
        let column = |slot: &SlotId| {
            let trig = self.trig[slot.0];
            Column { value: &earlier[slot.0], sin: &self.sines[trig], cos: &self.cosines[trig] }
        };
        let columns: Vec<Column<'_>> = call.ins.iter().map(column).collect();
        call.node.batch(&columns, &mut later[0]);
    }

    fn prepare_angle(&mut self, slot: SlotId) {
        let trig = self.trig[slot.0];
        if trig == 0 {
            return;
        }
        sincos_all(&self.values[slot.0], &mut self.sines[trig], &mut self.cosines[trig]);
    }

    /// The trials of a slot; not a number where a line on the way to it refused.
    pub fn trials(&self, slot: SlotId) -> &Lanes {
        &self.values[slot.0]
    }
}
