//! Statistics: distributions, special functions, random numbers.
//!
//! In: parameters and seeds. Out: densities' moments, quantiles, draws.
//! Never reads a clock: the same seed gives the same numbers everywhere.
//! A new distribution is one variant of [`Dist`].

mod dist;
mod normal;
mod special;
mod type_a;
mod ziggurat;

pub use dist::Dist;
pub use normal::{normal_cdf, normal_quantile_95};
pub use special::{student_t_two_sided, welch_satterthwaite};
pub use type_a::{TypeA, type_a};
pub use ziggurat::{Generator, Ziggurat};
