//! Scalars: the arithmetic that formulas may use, at four kinds of number.
//!
//! A formula is written once, generic over [`Real`], and then run at
//! - `f64` for a value,
//! - [`Dual`] for a value with its exact derivatives,
//! - [`Lane`] for one trial of many, with sines and cosines shared,
//! - [`Traced`] to record the expression itself, for printing.
//!
//! In: numbers. Out: numbers. Never clamps, never panics: an impossible
//! operation gives a value that is not finite, which the caller refuses.
//! A new kind of number goes into a file of its own here.

mod dual;
mod lane;
mod real;
mod traced;
pub(crate) mod trig;

pub use dual::Dual;
pub use lane::Lane;
pub use real::Real;
pub use traced::{Arena, Expression, Traced};
