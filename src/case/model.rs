//! The checked case.

use crate::diag::Place;
use crate::stats::Dist;
use crate::units::{Kind, System};

/// Everything a case file says, checked.
#[derive(Debug, Clone)]
pub struct Case {
    /// Who, what, which units.
    pub identity: Identity,
    /// Local gravity, if stated.
    pub gravity: Option<Entry>,
    /// Surveyed points, in the order of the file.
    pub points: Vec<Point>,
    /// Friction tests.
    pub tests: Vec<FrictionTest>,
    /// The units: vehicles, fixed objects.
    pub units: Vec<Unit>,
    /// The impacts in the order in which they happened.
    pub impacts: Vec<Impact>,
    /// Method errors that the case changes.
    pub error_changes: Vec<ErrorChange>,
    /// Answers to warnings.
    pub answers: Vec<Answer>,
    /// Questions about a limit.
    pub questions: Vec<Question>,
}

/// What stands at the head of the worksheet.
#[derive(Debug, Clone, Default)]
pub struct Identity {
    /// Case number.
    pub number: String,
    /// Title.
    pub title: String,
    /// Units in which results print.
    pub system: System,
    /// Who prepared it.
    pub prepared_by: Option<String>,
    /// Its date, as typed.
    pub date: Option<String>,
    /// The question asked.
    pub question: Option<String>,
    /// Remarks to be printed: what is known of where the entries come from.
    pub remarks: Vec<String>,
}

/// One entered quantity.
#[derive(Debug, Clone, PartialEq)]
pub struct Entry {
    /// What it is, in words.
    pub name: String,
    /// Its kind.
    pub kind: Kind,
    /// What is known about it, SI.
    pub dist: Dist,
    /// As the investigator typed it.
    pub entered: String,
    /// Where it comes from.
    pub source: Option<String>,
    /// A remark.
    pub note: Option<String>,
    /// Its place in the case file.
    pub place: Place,
    /// Least and greatest value that is physically possible, SI.
    pub bounds: (f64, f64),
}

/// Index of a point in [`Case::points`].
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct PointId(pub usize);

/// Index of a friction test in [`Case::tests`].
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct TestId(pub usize);

/// Index of a unit in [`Case::units`].
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct UnitId(pub usize);

/// A surveyed point: its coordinates are two entries.
#[derive(Debug, Clone)]
pub struct Point {
    /// Its number.
    pub number: String,
    /// East coordinate, m.
    pub east: Entry,
    /// North coordinate, m.
    pub north: Entry,
}

/// How the wheels were braked in a friction test.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Braking {
    /// All wheels locked.
    Locked,
    /// Full braking with anti-lock brakes.
    Abs,
}

/// What repeated friction tests are to stand for.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum StandsFor {
    /// This vehicle on this surface: the next single value.
    ThisVehicle,
    /// The surface's mean.
    SurfaceMean,
}

/// A friction test.
#[derive(Debug, Clone)]
pub struct FrictionTest {
    /// Its name in the case.
    pub id: String,
    /// The surface.
    pub surface: String,
    /// How the wheels were braked.
    pub braking: Braking,
    /// The drag factor.
    pub drag: Entry,
    /// What it stands for.
    pub stands_for: StandsFor,
    /// Grade of the test, + uphill, if not level.
    pub grade: Option<Entry>,
}

/// A vehicle, or a fixed object.
#[derive(Debug, Clone)]
pub struct Unit {
    /// Its name in the case.
    pub id: String,
    /// In words.
    pub label: String,
    /// A wall, a pole, a bridge: nothing that moves.
    pub fixed: bool,
    /// Mass of the vehicle.
    pub mass: Option<Entry>,
    /// Mass of occupants and load.
    pub load: Option<Entry>,
    /// What it did, in time.
    pub phases: Vec<Phase>,
    /// Its place in the case file.
    pub place: Place,
}

/// What a phase begins with.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Begin {
    /// The start of the marks, or of what is known.
    Approach,
    /// The impact with this index.
    Impact(usize),
}

/// What a phase ends with.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum End {
    /// The impact with this index.
    Impact(usize),
    /// Rest.
    Rest,
}

/// A unit's travel between two events.
#[derive(Debug, Clone)]
pub struct Phase {
    /// What it begins with.
    pub begin: Begin,
    /// What it ends with.
    pub end: End,
    /// Where the centre of gravity moved at the impact's side of the phase.
    pub direction: Option<Direction>,
    /// Where the front pointed, if not along the direction.
    pub heading: Option<Direction>,
    /// The unit stood still.
    pub standing: bool,
    /// Speed at the impact's side, if known otherwise.
    pub speed: Option<Entry>,
    /// Points of the path in order: separation, path, rest.
    pub path: Vec<PointId>,
    /// Braked or sliding stretches in the order travelled.
    pub travel: Vec<Stretch>,
    /// Its place in the case file.
    pub place: Place,
}

/// A direction in the road plane.
#[derive(Debug, Clone)]
pub enum Direction {
    /// Counter-clockwise from east, radians (bearings are converted).
    Angle(Entry),
    /// From one point to another.
    Points(PointId, PointId, Place),
    /// Along the line of an in-line impact, the way the first unit travels.
    Along(Place),
    /// Against it.
    Against(Place),
}

/// A stretch of uniform drag.
#[derive(Debug, Clone)]
pub struct Stretch {
    /// How long.
    pub length: StretchLength,
    /// What slows the unit.
    pub drag: Drag,
    /// Grade, rise over run, + uphill in the direction of travel.
    pub grade: Option<Entry>,
    /// A crest or sag lies between this stretch and the one before.
    pub crest: bool,
    /// Its place in the case file.
    pub place: Place,
}

/// Where a stretch's length comes from.
#[derive(Debug, Clone, PartialEq)]
pub enum StretchLength {
    /// Measured.
    Entered(Entry),
    /// Along the phase's path, between these places in [`Phase::path`].
    AlongPath(usize, usize),
}

/// What slows a unit on a stretch.
#[derive(Debug, Clone)]
pub enum Drag {
    /// A tested surface and the share of its friction that was used.
    Friction {
        /// The test.
        test: TestId,
        /// The share.
        share: Entry,
    },
    /// A drag factor stated for this stretch.
    Stated {
        /// The drag factor.
        factor: Entry,
        /// The stretch's grade is already in it.
        includes_grade: bool,
    },
}

/// How an impact is solved.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum ImpactMethod {
    /// Oblique momentum of two units as points.
    Momentum,
    /// Central impact on one line.
    InLine,
}

/// An impact between two units.
#[derive(Debug, Clone)]
pub struct Impact {
    /// The units, in the order named.
    pub units: [UnitId; 2],
    /// How it is solved.
    pub method: ImpactMethod,
    /// Restitution, if known.
    pub restitution: Option<Entry>,
    /// Energy absorbed by both, if known.
    pub absorbed_energy: Option<Entry>,
    /// Recorded delta-V of either unit.
    pub delta_v: [Option<Entry>; 2],
    /// Its place in the case file.
    pub place: Place,
}

/// A method error changed by the case.
#[derive(Debug, Clone)]
pub struct ErrorChange {
    /// The method error's name.
    pub id: String,
    /// The value it gets.
    pub entry: Entry,
    /// Why.
    pub reason: String,
}

/// A question: was a result above a limit?
#[derive(Debug, Clone)]
pub struct Question {
    /// Stable name of the result.
    pub of: String,
    /// The limit, a value without uncertainty.
    pub above: Entry,
    /// The question in the asker's words.
    pub asked: Option<String>,
}

/// An answer to a warning.
#[derive(Debug, Clone)]
pub struct Answer {
    /// The warning's code.
    pub code: String,
    /// Words of the warning it is about, where several carry the code.
    pub about: Option<String>,
    /// Why the result stands all the same.
    pub reason: String,
    /// Who says so.
    pub by: String,
    /// Its place in the case file.
    pub place: Place,
}
