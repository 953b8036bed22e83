//! What an impact does to each unit: delta-V, and the push of the road while
//! the units are in contact.

use crate::formula;
use crate::method::{Limit, Method, MethodError, Node};
use crate::stats::Dist;
use crate::units::Kind;

/// The method's card.
pub const METHOD: Method = Method {
    id: "contact",
    title: "Delta-V, and the road's impulse during contact",
    answers: "how much an impact changed a unit's velocity, and what the road may have added meanwhile",
    holds: "Delta-V is the change from just before contact to separation, the road's push included.",
    source: "Definition of delta-V; impulse of friction, at most μ g τ a unit of mass",
    errors: &[ROAD_TIME, ROAD_SHARE],
};

/// Duration of contact, for the road's impulse.
pub const ROAD_TIME: MethodError = MethodError {
    id: "contact_time",
    title: "duration of contact, while the tyres keep pushing",
    // As a rectangle the standard deviation is 0.04 s and zero is out of reach.
    dist: Dist::Rectangular { lo: 0.03, hi: 0.17 },
    kind: Kind::Time,
    source: "contacts last 55 to 160 ms in crashes simulated in a general rigid-body library; starting value",
};

/// The road's impulse in units of ½ μ g τ.
pub const ROAD_SHARE: MethodError = MethodError {
    id: "road_impulse",
    title: "road's impulse during contact, in units of ½ μ g τ",
    dist: Dist::Normal { mean: 0.0, sd: 1.0 },
    kind: Kind::Ratio,
    source: "the tyres can push with at most μ g for the time of contact; half of it as one standard deviation",
};

/// The formulas of this family.
pub const FORMULAS: &[&dyn Node] =
    &[RoadImpulse::NODE, RoadTakenOut::NODE, VelocityChange::NODE, VectorSize::NODE, RecordedDeltaV::NODE];

formula! {
    /// Velocity that the road's friction may give or take during contact.
    RoadImpulse, "road-impulse", "contact", "Velocity change by the road during contact";
    in z: Ratio "z" "share, in units of ½ μ g τ", mu: Ratio "μ" "friction", g: Acceleration "g" "gravity",
       tau: Time "τ" "duration of contact";
    out Speed "δ" "velocity change by the road";
    limits &[Limit::input(3, 0.0, f64::INFINITY, "a contact does not last less than no time")];
    undefined "the road's impulse is not a number";
    source "impulse of friction: at most μ g τ a unit of mass";
    = R::of(0.5) * z * mu * g * tau
}

formula! {
    /// Velocity after impact without what the road added during contact.
    RoadTakenOut, "road-taken-out", "contact", "Velocity after impact, the road's impulse taken out";
    in v: Speed "v′" "velocity after impact along the line", d: Speed "δ" "velocity change by the road";
    out Speed "w" "velocity after impact without it";
    undefined "the velocities give no difference";
    source "conservation of momentum";
    = v - d
}

formula! {
    /// One component of delta-V.
    VelocityChange, "velocity-change", "contact", "Delta-V, one component";
    in after: Speed "v′" "component after impact", before: Speed "v" "component before impact";
    out Speed "ΔV" "component of delta-V";
    undefined "the velocities give no difference";
    source "definition of delta-V: vector change of velocity over the contact";
    = after - before
}

formula! {
    /// Size of a vector.
    VectorSize, "vector-size", "contact", "Delta-V";
    in x: Speed "ΔV_{x}" "east component", y: Speed "ΔV_{y}" "north component";
    out Speed "ΔV" "delta-V";
    undefined "the components give no size";
    source "plane geometry";
    = (x.squared() + y.squared()).sqrt()
}

formula! {
    /// A recorded delta-V with the recorder's own scatter.
    RecordedDeltaV, "recorded-delta-v", "contact", "Delta-V as recorded";
    in k: Ratio "k" "method error of the recorder, 1 unless stated", recorded: Speed "ΔV_{r}" "recorded delta-V";
    out Speed "ΔV" "delta-V";
    undefined "the recorded delta-V is not a number";
    source "definition of the method error";
    = k * recorded
}
