//! Kinds of quantity, unit names, and how numbers are written.
//!
//! In: unit names as people type them, SI values. Out: exact factors (from
//! uom) and text. Everything inside the program is SI; units exist only at its
//! edges. Never guesses a unit that was not written.
//! A new unit is one row in `table.rs`.

mod digits;
mod kind;
mod show;
mod table;

pub use digits::{decimals_for, fixed, guard_decimals, round_to, significant};
pub use kind::Kind;
pub use show::{System, clock, compass, si};
pub use table::{Unit, find_unit, unit_names};
