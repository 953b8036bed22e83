//! Momentum of two units in the plane, treated as points.
//!
//! Courses α before and θ after, speeds v before and v′ after; x points east,
//! y north. ΔV = V′ − V. The principal direction of force is the side the
//! force came from, clockwise from straight ahead (SAE J224).

use crate::formula;
use crate::method::{Limit, Method, Node};

/// The method's card.
pub const METHOD: Method = Method {
    id: "momentum",
    title: "Oblique momentum of two units",
    answers: "both speeds before an impact, from both velocities after it and both approach directions",
    holds: "Units as points: spin is left out, and the energy lost then contains the spin energy left after the \
            impact (often a tenth, up to half of it). The nearer the two approach directions are to one line, the \
            worse: errors grow as 1/|sin(α₂ − α₁)|.",
    source: "Conservation of momentum; Brach & Brach, Vehicle Accident Analysis and Reconstruction Methods (SAE), \
             from memory",
    errors: &[],
};

/// The formulas of this family.
pub const FORMULAS: &[&dyn Node] = &[
    ComponentX::NODE,
    ComponentY::NODE,
    MomentumSum::NODE,
    Condition::NODE,
    ApproachSpeed::NODE,
    ApproachSpeedKnownPartner::NODE,
    ApproachSpeedStandingPartner::NODE,
    MomentumAcross::NODE,
    MomentumAcrossKnownPartner::NODE,
    ForceDirection::NODE,
    ClosingSpeed::NODE,
    EnergyLost::NODE,
    ImpliedRestitution::NODE,
];

formula! {
    /// East component of a velocity.
    ComponentX, "component-x", "momentum", "Velocity, east component";
    in v: Speed "v" "speed", course: Angle "θ" "course";
    out Speed "v_{x}" "east component";
    undefined "speed and course give no component";
    source "plane geometry";
    = v * course.cos()
}

formula! {
    /// North component of a velocity.
    ComponentY, "component-y", "momentum", "Velocity, north component";
    in v: Speed "v" "speed", course: Angle "θ" "course";
    out Speed "v_{y}" "north component";
    undefined "speed and course give no component";
    source "plane geometry";
    = v * course.sin()
}

formula! {
    /// One component of the momentum of both, with the road's impulse taken out.
    MomentumSum, "momentum-sum", "momentum", "Momentum of both before impact, one component";
    in m1: Mass "m_{1}" "mass of the first", v1: Speed "v′_{1}" "component of the first after impact",
       d1: Speed "δ_{1}" "velocity change of the first by the road", m2: Mass "m_{2}" "mass of the second",
       v2: Speed "v′_{2}" "component of the second after impact",
       d2: Speed "δ_{2}" "velocity change of the second by the road";
    out Momentum "P" "momentum component";
    undefined "masses and velocities give no momentum";
    source "conservation of momentum";
    = m1 * (v1 - d1) + m2 * (v2 - d2)
}

formula! {
    /// How much the crossing angle of the approach courses amplifies errors.
    Condition, "condition", "momentum", "Condition of the momentum solution";
    in a1: Angle "α_{1}" "approach course of the first", a2: Angle "α_{2}" "approach course of the second";
    out Ratio "K" "amplification; its size counts";
    undefined "the two approach courses lie on one line: momentum cannot tell the two speeds apart";
    source "derivative of the solution for the two speeds";
    = R::of(1.0) / (a2 - a1).sin()
}

formula! {
    /// Approach speed of one unit from the momentum of both.
    ApproachSpeed, "approach-speed", "momentum", "Speed before impact";
    in px: Momentum "P_{x}" "momentum, east", py: Momentum "P_{y}" "momentum, north", m: Mass "m_{1}" "its mass",
       own: Angle "α_{1}" "its approach course", other: Angle "α_{2}" "the other's approach course";
    out Speed "v_{1}" "speed before impact";
    limits &[Limit::output(0.0, f64::INFINITY, "momentum closes only if this unit moved against its stated approach direction: check directions, masses and speeds after impact")];
    undefined "the two approach courses lie on one line: momentum cannot tell the two speeds apart";
    source "conservation of momentum, solved for one speed";
    = (px * other.sin() - py * other.cos()) / (m * (other - own).sin())
}

formula! {
    /// Approach speed along the own course, when the partner's velocity is known.
    ApproachSpeedKnownPartner, "approach-speed-known-partner", "momentum", "Speed before impact, the partner's known";
    in px: Momentum "P_{x}" "momentum, east", py: Momentum "P_{y}" "momentum, north", m: Mass "m_{1}" "its mass",
       own: Angle "α_{1}" "its approach course", mo: Mass "m_{2}" "the partner's mass",
       vo: Speed "v_{2}" "the partner's speed", other: Angle "α_{2}" "the partner's approach course";
    out Speed "v_{1}" "speed before impact";
    limits &[Limit::output(0.0, f64::INFINITY, "momentum closes only if this unit moved against its stated approach direction: check directions, masses and speeds")];
    undefined "momentum and mass give no speed";
    source "conservation of momentum along the unit's own course";
    = (px * own.cos() + py * own.sin() - mo * vo * (other - own).cos()) / m
}

formula! {
    /// Approach speed along the own course, when the partner stood.
    ApproachSpeedStandingPartner, "approach-speed-standing-partner", "momentum", "Speed before impact, the partner standing";
    in px: Momentum "P_{x}" "momentum, east", py: Momentum "P_{y}" "momentum, north", m: Mass "m_{1}" "its mass",
       own: Angle "α_{1}" "its approach course";
    out Speed "v_{1}" "speed before impact";
    limits &[Limit::output(0.0, f64::INFINITY, "momentum closes only if this unit moved against its stated approach direction: check directions, masses and speeds after impact")];
    undefined "momentum and mass give no speed";
    source "conservation of momentum along the unit's own course";
    = (px * own.cos() + py * own.sin()) / m
}

formula! {
    /// Momentum across a course: zero when only one unit moved.
    MomentumAcross, "momentum-across", "momentum", "Momentum across the only mover's course";
    in px: Momentum "P_{x}" "momentum, east", py: Momentum "P_{y}" "momentum, north",
       own: Angle "α_{1}" "approach course";
    out Momentum "P_{q}" "momentum across, + to the left; should be zero";
    undefined "momentum and course give no component";
    source "conservation of momentum across the unit's course";
    = py * own.cos() - px * own.sin()
}

formula! {
    /// Principal direction of force, clockwise from straight ahead.
    ForceDirection, "force-direction", "momentum", "Principal direction of force";
    in x: Speed "ΔV_{x}" "delta-V, east", y: Speed "ΔV_{y}" "delta-V, north", heading: Angle "ψ" "heading";
    out Angle "p" "where the force came from, clockwise from ahead";
    undefined "without a change of velocity there is no direction of force";
    source "SAE J224: direction of −ΔV against the heading, clockwise seen from above";
    = (y * heading.cos() - x * heading.sin()).atan2(-(x * heading.cos() + y * heading.sin()))
}

formula! {
    /// Momentum across a course, the partner's share taken out: zero when the
    /// partner's velocity is right.
    MomentumAcrossKnownPartner, "momentum-across-known-partner", "momentum", "Momentum across the course of the unknown speed";
    in px: Momentum "P_{x}" "momentum, east", py: Momentum "P_{y}" "momentum, north",
       own: Angle "α_{1}" "approach course of the unknown speed", mo: Mass "m_{2}" "the partner's mass",
       vo: Speed "v_{2}" "the partner's speed", other: Angle "α_{2}" "the partner's approach course";
    out Momentum "P_{q}" "momentum across, + to the left; should be zero";
    undefined "momentum and courses give no component";
    source "conservation of momentum across the unit's course";
    = py * own.cos() - px * own.sin() - mo * vo * (other - own).sin()
}

formula! {
    /// Closing speed: size of the difference of the approach velocities.
    ClosingSpeed, "closing-speed", "momentum", "Closing speed";
    in x1: Speed "v_{1x}" "first before impact, east", y1: Speed "v_{1y}" "first before impact, north",
       x2: Speed "v_{2x}" "second before impact, east", y2: Speed "v_{2y}" "second before impact, north";
    out Speed "V_{c}" "closing speed";
    undefined "the velocities give no difference";
    source "definition: |V₁ − V₂|";
    = ((x1 - x2).squared() + (y1 - y2).squared()).sqrt()
}

formula! {
    /// Kinetic energy lost by both, without rotation.
    EnergyLost, "energy-lost", "momentum", "Energy lost in the impact";
    in m1: Mass "m_{1}" "mass of the first", v1: Speed "v_{1}" "its speed before", w1: Speed "v′_{1}" "its speed after",
       m2: Mass "m_{2}" "mass of the second", v2: Speed "v_{2}" "its speed before", w2: Speed "v′_{2}" "its speed after";
    out Energy "E" "energy lost, spin left out";
    limits &[Limit::output(-1e-6, f64::INFINITY, "the units would leave the impact with more energy than they brought: the entries contradict each other")];
    undefined "masses and speeds give no energy";
    source "½ Σ m v² − ½ Σ m v′²";
    = R::of(0.5) * m1 * (v1.squared() - w1.squared()) + R::of(0.5) * m2 * (v2.squared() - w2.squared())
}

formula! {
    /// Ratio of separation to approach speed of the centres of gravity along
    /// the line of the impulse (that of the second unit's delta-V).
    ImpliedRestitution, "implied-restitution", "momentum", "Restitution implied along the line of the impulse";
    in ax: Speed "v_{1x}" "first before, east", ay: Speed "v_{1y}" "first before, north",
       bx: Speed "v_{2x}" "second before, east", by: Speed "v_{2y}" "second before, north",
       px: Speed "v′_{1x}" "first after, east", py: Speed "v′_{1y}" "first after, north",
       qx: Speed "v′_{2x}" "second after, east", qy: Speed "v′_{2y}" "second after, north";
    out Ratio "e" "restitution, of the centres of gravity";
    limits &[Limit::output(-1.0, 1.0 + 1e-9, "separation faster than approach along the line of the impulse: energy would be gained")];
    undefined "without a change of velocity there is no line of impulse";
    source "definition of restitution, points instead of contact";
    = ((qx - px) * (qx - bx) + (qy - py) * (qy - by)) / ((ax - bx) * (qx - bx) + (ay - by) * (qy - by))
}
