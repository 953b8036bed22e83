//! Central impact on one line, with restitution.
//!
//! Speeds are signed along the line; unit 1 comes from behind, so that
//! v₁ > v₂ before impact and v₂′ ≥ v₁′ after it.

use crate::formula;
use crate::method::{Limit, Method, MethodError, Node};
use crate::stats::Dist;
use crate::units::Kind;

/// The method's card.
pub const METHOD: Method = Method {
    id: "in-line",
    title: "Central impact on one line with restitution",
    answers: "speeds before or after an impact on one line, and the closing speed from delta-Vs or absorbed energy",
    holds: "The impulse passes through both centres of gravity. Off-centre impacts turn the units and a part of the \
            closing speed is not seen in the delta-Vs. Backward from the separation speeds it is badly conditioned \
            for small restitution.",
    source: "Newton's law of impact; Brach & Brach, Vehicle Accident Analysis and Reconstruction Methods (SAE), \
             from memory",
    errors: &[RECORDER_ERROR],
};

/// Scatter of a recorded delta-V.
pub const RECORDER_ERROR: MethodError = MethodError {
    id: "recorded_delta_v",
    title: "recorded delta-V against the vehicle's true one",
    dist: Dist::Normal { mean: 1.0, sd: 0.05 },
    kind: Kind::Ratio,
    source: "mean error just under 6 % where the pulse was fully recorded: Niehoff et al., ESV 2005 (abstract)",
};

const E_RANGE: &str = "restitution lies between 0 (common velocity) and 1 (elastic)";

/// The formulas of this family.
pub const FORMULAS: &[&dyn Node] = &[
    Reversed::NODE,
    AfterFirst::NODE,
    AfterSecond::NODE,
    ClosingFromSeparation::NODE,
    ClosingFromEnergy::NODE,
    ClosingFromDeltaVs::NODE,
    DeltaVMismatch::NODE,
    SeparationMismatch::NODE,
    BeforeFirst::NODE,
    BeforeSecond::NODE,
    BeforeKnownPartner::NODE,
    Restitution::NODE,
    AbsorbedEnergy::NODE,
    ClosingInLine::NODE,
];

formula! {
    /// A speed seen against the line, or back again.
    Reversed, "reversed", "in-line", "Speed with the opposite sense";
    in v: Speed "v" "speed";
    out Speed "w" "the same with the opposite sense";
    undefined "the speed is not a number";
    source "sign convention";
    = -v
}

formula! {
    /// Forward: velocity of the first after impact.
    AfterFirst, "after-first", "in-line", "Velocity of the first after impact";
    in m1: Mass "m_{1}" "mass of the first", v1: Speed "v_{1}" "its velocity before", m2: Mass "m_{2}" "mass of the second",
       v2: Speed "v_{2}" "its velocity before", e: Ratio "e" "restitution";
    out Speed "v′_{1}" "velocity of the first after impact";
    limits &[Limit::input(4, 0.0, 1.0, E_RANGE)];
    undefined "the masses give no velocity";
    source "momentum and Newton's law of impact";
    = (m1 * v1 + m2 * v2 - m2 * e * (v1 - v2)) / (m1 + m2)
}

formula! {
    /// Forward: velocity of the second after impact.
    AfterSecond, "after-second", "in-line", "Velocity of the second after impact";
    in m1: Mass "m_{1}" "mass of the first", v1: Speed "v_{1}" "its velocity before", m2: Mass "m_{2}" "mass of the second",
       v2: Speed "v_{2}" "its velocity before", e: Ratio "e" "restitution";
    out Speed "v′_{2}" "velocity of the second after impact";
    limits &[Limit::input(4, 0.0, 1.0, E_RANGE)];
    undefined "the masses give no velocity";
    source "momentum and Newton's law of impact";
    = (m1 * v1 + m2 * v2 + m1 * e * (v1 - v2)) / (m1 + m2)
}

formula! {
    /// Closing speed from the speed of separation.
    ClosingFromSeparation, "closing-from-separation", "in-line", "Closing speed from the separation";
    in w1: Speed "v′_{1}" "velocity of the first after", w2: Speed "v′_{2}" "velocity of the second after",
       e: Ratio "e" "restitution";
    out Speed "V_{c}" "closing speed";
    limits &[Limit::input(2, 0.0, 1.0, E_RANGE),
             Limit::output(0.0, f64::INFINITY, "after the impact the unit behind would be the faster one: the units would pass through each other")];
    undefined "without restitution the separation says nothing about the closing speed";
    source "Newton's law of impact";
    = (w2 - w1) / e
}

formula! {
    /// Closing speed from the energy absorbed.
    ClosingFromEnergy, "closing-from-energy", "in-line", "Closing speed from the energy absorbed";
    in energy: Energy "E" "energy absorbed by both", m1: Mass "m_{1}" "mass of the first", m2: Mass "m_{2}" "mass of the second",
       e: Ratio "e" "restitution";
    out Speed "V_{c}" "closing speed";
    limits &[Limit::input(3, 0.0, 1.0, E_RANGE), Limit::input(0, 0.0, f64::INFINITY, "absorbed energy is not below zero")];
    undefined "an elastic impact absorbs no energy, so its energy says nothing about the closing speed";
    source "E = ½ m₁ m₂/(m₁ + m₂) (1 − e²) V²";
    = (R::of(2.0) * energy * (m1 + m2) / (m1 * m2 * (R::of(1.0) - e.squared()))).sqrt()
}

formula! {
    /// Closing speed along the line from both delta-Vs.
    ClosingFromDeltaVs, "closing-from-delta-vs", "in-line", "Closing speed from both delta-Vs";
    in k1: Ratio "k_{1}" "method error of the first, 1 unless stated", d1: Speed "ΔV_{1}" "delta-V of the first",
       k2: Ratio "k_{2}" "method error of the second, 1 unless stated", d2: Speed "ΔV_{2}" "delta-V of the second",
       e: Ratio "e" "restitution";
    out Speed "V_{c}" "closing speed along the line";
    limits &[Limit::input(4, 0.0, 1.0, E_RANGE)];
    undefined "the delta-Vs give no closing speed";
    source "ΔV₁ + ΔV₂ = (1 + e) V, from Newton's law of impact";
    = (k1 * d1 + k2 * d2) / (R::of(1.0) + e)
}

formula! {
    /// Difference of the two impulses, which should be none.
    DeltaVMismatch, "delta-v-mismatch", "in-line", "Difference of the two impulses";
    in m1: Mass "m_{1}" "mass of the first", k1: Ratio "k_{1}" "its method error", d1: Speed "ΔV_{1}" "its delta-V",
       m2: Mass "m_{2}" "mass of the second", k2: Ratio "k_{2}" "its method error", d2: Speed "ΔV_{2}" "its delta-V";
    out Momentum "Q" "difference of the impulses; should be zero";
    undefined "masses and delta-Vs give no impulse";
    source "Newton's third law: m₁ ΔV₁ = m₂ ΔV₂ in size";
    = m1 * k1 * d1 - m2 * k2 * d2
}

formula! {
    /// Difference between the separation speed and what restitution and
    /// closing speed make of it; it should be none.
    SeparationMismatch, "separation-mismatch", "in-line", "Difference of the separation speeds";
    in w1: Speed "v′_{1}" "velocity of the first after", w2: Speed "v′_{2}" "velocity of the second after",
       e: Ratio "e" "restitution", closing: Speed "V_{c}" "closing speed";
    out Speed "Δ" "difference; should be zero";
    undefined "the velocities give no difference";
    source "Newton's law of impact";
    = w2 - w1 - e * closing
}

formula! {
    /// Backward: velocity of the first before impact.
    BeforeFirst, "before-first", "in-line", "Velocity of the first before impact";
    in m1: Mass "m_{1}" "mass of the first", w1: Speed "v′_{1}" "its velocity after", m2: Mass "m_{2}" "mass of the second",
       w2: Speed "v′_{2}" "its velocity after", closing: Speed "V_{c}" "closing speed";
    out Speed "v_{1}" "velocity of the first before impact";
    undefined "the masses give no velocity";
    source "common velocity of the centre of gravity of both, plus the share of the closing speed";
    = (m1 * w1 + m2 * w2 + m2 * closing) / (m1 + m2)
}

formula! {
    /// Backward: velocity of the second before impact.
    BeforeSecond, "before-second", "in-line", "Velocity of the second before impact";
    in m1: Mass "m_{1}" "mass of the first", w1: Speed "v′_{1}" "its velocity after", m2: Mass "m_{2}" "mass of the second",
       w2: Speed "v′_{2}" "its velocity after", closing: Speed "V_{c}" "closing speed";
    out Speed "v_{2}" "velocity of the second before impact";
    undefined "the masses give no velocity";
    source "common velocity of the centre of gravity of both, less the share of the closing speed";
    = (m1 * w1 + m2 * w2 - m1 * closing) / (m1 + m2)
}

formula! {
    /// Velocity of one unit when its partner's is known on the same side of
    /// the impact, and both on the other side.
    BeforeKnownPartner, "before-known-partner", "in-line", "Velocity before impact, the partner's known";
    in m1: Mass "m_{1}" "its mass", w1: Speed "v′_{1}" "its velocity after", m2: Mass "m_{2}" "the partner's mass",
       w2: Speed "v′_{2}" "the partner's velocity after", v2: Speed "v_{2}" "the partner's velocity before";
    out Speed "v_{1}" "velocity before impact";
    undefined "the masses give no velocity";
    source "conservation of momentum";
    = (m1 * w1 + m2 * w2 - m2 * v2) / m1
}

formula! {
    /// Restitution from all four velocities.
    Restitution, "restitution", "in-line", "Restitution implied";
    in v1: Speed "v_{1}" "first before", v2: Speed "v_{2}" "second before", w1: Speed "v′_{1}" "first after",
       w2: Speed "v′_{2}" "second after";
    out Ratio "e" "restitution";
    limits &[Limit::output(-0.05, 1.0 + 1e-9, "a ratio of separation to approach speed below 0 or above 1 is impossible: the units would pass through each other or gain energy")];
    undefined "without a closing speed there is no restitution";
    source "Newton's law of impact";
    = (w2 - w1) / (v1 - v2)
}

formula! {
    /// Energy absorbed.
    AbsorbedEnergy, "absorbed-energy", "in-line", "Energy absorbed";
    in m1: Mass "m_{1}" "mass of the first", m2: Mass "m_{2}" "mass of the second", e: Ratio "e" "restitution",
       closing: Speed "V_{c}" "closing speed";
    out Energy "E" "energy absorbed";
    limits &[Limit::output(-1e-6, f64::INFINITY, "the units would leave the impact with more energy than they brought: the entries contradict each other")];
    undefined "masses, restitution and closing speed give no energy";
    source "½ m₁ m₂/(m₁ + m₂) (1 − e²) V²";
    = R::of(0.5) * m1 * m2 / (m1 + m2) * (R::of(1.0) - e.squared()) * closing.squared()
}

formula! {
    /// Closing speed from both velocities before impact.
    ClosingInLine, "closing-in-line", "in-line", "Closing speed";
    in v1: Speed "v_{1}" "first before", v2: Speed "v_{2}" "second before";
    out Speed "V_{c}" "closing speed";
    limits &[Limit::output(0.0, f64::INFINITY, "the unit behind is the slower one: they would never meet (check which unit is named first and the senses of travel)")];
    undefined "the velocities give no difference";
    source "definition";
    = v1 - v2
}
