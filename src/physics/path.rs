//! Lengths and directions from surveyed positions.

use crate::formula;
use crate::method::{Method, Node};

/// The method's card.
pub const METHOD: Method = Method {
    id: "path",
    title: "Lengths and directions from positions",
    answers: "how far and which way a vehicle's centre of gravity went, from surveyed points",
    holds: "Lengths in plan; straight pieces between the points, so a curved path is at least as long.",
    source: "plane geometry; ISO 8855 axes",
    errors: &[],
};

/// The formulas of this family.
pub const FORMULAS: &[&dyn Node] = &[Leg::NODE, LongerPath::NODE, SlopeLength::NODE, Course::NODE];

formula! {
    /// Straight distance between two points.
    Leg, "leg", "path", "Distance between two points";
    in e1: Length "E_{1}" "east of the first", n1: Length "N_{1}" "north of the first",
       e2: Length "E_{2}" "east of the second", n2: Length "N_{2}" "north of the second";
    out Length "d" "distance";
    undefined "the two points give no distance";
    source "plane geometry";
    = ((e2 - e1).squared() + (n2 - n1).squared()).sqrt()
}

formula! {
    /// A path with one more piece.
    LongerPath, "longer-path", "path", "Length of a path with one more piece";
    in so_far: Length "d_{1}" "length so far", piece: Length "d_{2}" "next piece";
    out Length "d" "length";
    undefined "the pieces give no sum";
    source "plane geometry";
    = so_far + piece
}

formula! {
    /// Length along the slope of a stretch surveyed in plan.
    SlopeLength, "slope-length", "path", "Length along the slope";
    in plan: Length "d_{p}" "length in plan", grade: Ratio "G" "grade, rise over run";
    out Length "d" "length along the slope";
    undefined "length and grade give no length";
    source "plane geometry";
    = plan * (R::of(1.0) + grade.squared()).sqrt()
}

formula! {
    /// Direction from one point to another, counter-clockwise from east.
    Course, "course", "path", "Direction from one point to another";
    in e1: Length "E_{1}" "east of the first", n1: Length "N_{1}" "north of the first",
       e2: Length "E_{2}" "east of the second", n2: Length "N_{2}" "north of the second";
    out Angle "θ" "direction, counter-clockwise from east";
    undefined "the two points give no direction";
    source "plane geometry; ISO 8855 axes";
    = (n2 - n1).atan2(e2 - e1)
}
