//! The case: what an investigator typed, checked.
//!
//! In: the text of a case file (and of the files it names). Out: a [`Case`]
//! whose every entry has a kind, a distribution and a place, or all faults of
//! the file at once. Knows no physics and never changes a file.
//! A new key goes into the checker of its table (`check/`) and into
//! `model.rs`; unknown keys are errors.

mod check;
mod flat;
mod lexer;
mod model;
mod notation;
mod raw;
mod survey;

pub use check::{Checked, LARGEST, Load, read};
pub use flat::{Flat, flat};
pub use model::{
    Answer, Begin, Braking, Case, Direction, Drag, End, Entry, ErrorChange, FrictionTest, Identity, Impact,
    ImpactMethod, Phase, Point, PointId, Question, StandsFor, Stretch, StretchLength, TestId, Unit, UnitId,
};
pub use notation::{Fault, Spread, quantity, spread_alone};
