//! Braking and sliding: work and energy along a path of several surfaces.

use crate::formula;
use crate::method::{Limit, Method, MethodError, Node};
use crate::stats::Dist;

/// The method's card.
pub const METHOD: Method = Method {
    id: "braking",
    title: "Braking and sliding: work and energy",
    answers: "the speed at the start of a braked or sliding path, from its length, drag and end speed",
    holds: "Uniform drag on each stretch; distances along the slope. The speed is that at the start of the \
            visible mark: braking before it is not counted, so it is a minimum for the onset of braking.",
    source: "Elementary mechanics; Fricke, Traffic Accident Reconstruction (Northwestern), from memory",
    errors: &[SKID_ERROR, TRAVEL_ERROR],
};

/// 2.5 % of speed, which is 5 % of the friction.
pub const SKID_ERROR: MethodError = MethodError {
    id: "skid",
    title: "locked-wheel skid on a surface's mean friction: this vehicle against the mean",
    dist: Dist::Normal { mean: 1.0, sd: 0.05 },
    kind: crate::units::Kind::Ratio,
    source: "±5 % of speed at 95 %, instrumented skids: Lambourn, Int. Crim. Police Rev. 325 (1979), as quoted",
};

/// The drag of a damaged vehicle sliding to rest.
pub const TRAVEL_ERROR: MethodError = MethodError {
    id: "post_impact_drag",
    title: "drag of a struck vehicle on its way to rest (wheels, scraping, rotation)",
    dist: Dist::Normal { mean: 1.0, sd: 0.10 },
    kind: crate::units::Kind::Ratio,
    source: "common practice; the program's starting value",
};

/// The formulas of this family.
pub const FORMULAS: &[&dyn Node] = &[
    TestFriction::NODE,
    LevelDrag::NODE,
    GradeDrag::NODE,
    StatedDrag::NODE,
    StatedDragOnGrade::NODE,
    StopSpeed::NODE,
    BrakedSpeed::NODE,
];

formula! {
    /// Friction of a test surface from a drag factor measured on a grade:
    /// undoes [`GradeDrag`] for fully braked wheels.
    TestFriction, "test-friction", "braking", "Friction of the surface from a test on a grade";
    in f: Ratio "f" "drag factor of the test", grade: Ratio "G" "grade of the test, rise over run, + uphill";
    out Ratio "μ" "friction coefficient";
    limits &[Limit::output(0.0, f64::INFINITY, "the test's drag factor is less than its downhill grade explains: check the grade's sense")];
    undefined "the test's drag factor and grade give no friction";
    source "f = μ cos θ + sin θ with tan θ = G; elementary mechanics";
    = f * (R::of(1.0) + grade.squared()).sqrt() - grade
}

formula! {
    /// Drag factor on the level.
    LevelDrag, "level-drag", "braking", "Drag factor on the level";
    in k: Ratio "k" "method error, 1 unless stated", share: Ratio "η" "share of the friction used",
       friction: Ratio "μ" "friction coefficient";
    out Ratio "f" "drag factor: deceleration over g";
    limits &[Limit::input(1, 0.0, 1.0, "a braking share lies between 0 (free rolling) and 1 (all wheels sliding)"),
             Limit::input(2, 0.0, f64::INFINITY, "a friction coefficient is not below zero")];
    undefined "friction and braking share give no drag factor";
    source "elementary mechanics";
    = k * share * friction
}

formula! {
    /// Drag factor on a grade `G` (rise over run, positive uphill along the
    /// travel): f = k η μ cos θ + sin θ with tan θ = G.
    GradeDrag, "grade-drag", "braking", "Drag factor on a grade";
    in k: Ratio "k" "method error, 1 unless stated", share: Ratio "η" "share of the friction used",
       friction: Ratio "μ" "friction coefficient", grade: Ratio "G" "grade, rise over run, + uphill";
    out Ratio "f" "drag factor: deceleration over g, along the slope";
    limits &[Limit::input(1, 0.0, 1.0, "a braking share lies between 0 (free rolling) and 1 (all wheels sliding)"),
             Limit::input(2, 0.0, f64::INFINITY, "a friction coefficient is not below zero")];
    undefined "friction, braking share and grade give no drag factor";
    source "elementary mechanics: η μ cos θ + sin θ with θ = atan G";
    = (k * share * friction + grade) / (R::of(1.0) + grade.squared()).sqrt()
}

formula! {
    /// A drag factor stated for this very stretch, its grade included.
    StatedDrag, "stated-drag", "braking", "Drag factor as stated, grade included";
    in k: Ratio "k" "method error, 1 unless stated", stated: Ratio "f_{s}" "stated drag factor";
    out Ratio "f" "drag factor: deceleration over g";
    undefined "the stated drag factor is not a number";
    source "elementary mechanics";
    = k * stated
}

formula! {
    /// A drag factor stated for the level, taken to a grade.
    StatedDragOnGrade, "stated-drag-on-grade", "braking", "Drag factor stated for the level, on a grade";
    in k: Ratio "k" "method error, 1 unless stated", stated: Ratio "f_{s}" "drag factor stated for the level",
       grade: Ratio "G" "grade, rise over run, + uphill";
    out Ratio "f" "drag factor: deceleration over g, along the slope";
    undefined "the stated drag factor and the grade give no drag factor";
    source "elementary mechanics: f cos θ + sin θ with θ = atan G";
    = (k * stated + grade) / (R::of(1.0) + grade.squared()).sqrt()
}

formula! {
    /// Speed at the start of a stretch that ends at rest.
    StopSpeed, "stop-speed", "braking", "Speed at the start of a stretch that ends at rest";
    in g: Acceleration "g" "gravity", f: Ratio "f" "drag factor", d: Length "d" "length along the slope";
    out Speed "v_{0}" "speed at its start";
    limits &[Limit::input(2, 0.0, f64::INFINITY, "a distance is not below zero")];
    undefined "a vehicle cannot come to rest here: the downhill pull is larger than the braking (check the grade's sense, the friction and the braking share)";
    source "work and energy: v² = 2 g f d";
    = (R::of(2.0) * g * f * d).sqrt()
}

formula! {
    /// Speed at the start of a stretch from the speed at its end.
    BrakedSpeed, "braked-speed", "braking", "Speed at the start of a stretch";
    in end: Speed "v_{1}" "speed at its end", g: Acceleration "g" "gravity", f: Ratio "f" "drag factor",
       d: Length "d" "length along the slope";
    out Speed "v_{0}" "speed at its start";
    limits &[Limit::input(3, 0.0, f64::INFINITY, "a distance is not below zero")];
    undefined "the vehicle would have had to start this stretch with less than no speed: the downhill pull gives more than the speed at its end (check the grade's sense, the friction and the braking share)";
    source "work and energy: v² adds up, v₀² = v₁² + 2 g f d";
    = (end.squared() + R::of(2.0) * g * f * d).sqrt()
}
