//! Uncertainty: bands from the plan and the distributions of its inputs.
//!
//! In: a plan, its evaluation, a seed. Out: a band for each result by linear
//! propagation (JCGM 100) and by Monte Carlo (JCGM 101), and which of the two
//! is to be printed. Same seed, same bytes, on any number of threads. Never
//! redraws an impossible trial: it is counted and reported.
//! A new analysis of the draws is one file here.

mod band;
mod linear;
mod monte_carlo;
mod tally;

pub use band::{Band, Basis, bands};
pub use linear::{Linear, Share, linear, standard_uncertainty};
pub use monte_carlo::{BLOCK, Sampled, Sampling, Trials, Wanted, sample};
