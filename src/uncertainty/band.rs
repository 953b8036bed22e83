//! Which band is printed: the linear one where Monte Carlo confirms it, else
//! the Monte Carlo one.

use super::{Linear, Sampled, Sampling, Wanted};
use crate::units::decimals_for;
use serde::Serialize;

/// Where a band comes from.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize)]
pub enum Basis {
    /// Linear propagation, confirmed by Monte Carlo.
    #[serde(rename = "linear")]
    Linear,
    /// Monte Carlo, from which linear propagation differs.
    #[serde(rename = "Monte Carlo")]
    MonteCarlo,
    /// Nothing that enters has an uncertainty.
    #[serde(rename = "exact inputs")]
    Exact,
}

/// A result with its 95 % band.
#[derive(Debug, Clone)]
pub struct Band {
    /// Value.
    pub value: f64,
    /// Standard uncertainty.
    pub u: f64,
    /// Lower end of the 95 % interval.
    pub low: f64,
    /// Upper end.
    pub high: f64,
    /// Where they come from.
    pub basis: Basis,
    /// By linear propagation.
    pub linear: Linear,
    /// By Monte Carlo.
    pub sampled: Sampled,
    /// Largest difference of the two interval ends, and how much is allowed.
    pub difference: (f64, f64),
}

/// Joins both propagations; results that either refused are left out.
pub fn bands(linear: Vec<Option<Linear>>, sampling: &Sampling, wanted: &[Wanted]) -> Vec<Option<Band>> {
    linear
        .into_iter()
        .zip(&sampling.results)
        .zip(wanted)
        .map(|((linear, sampled), w)| Some(band(linear?, (*sampled)?, w.scale)))
        .collect()
}

/// JCGM 101, 8.1: linear propagation is confirmed when both interval ends
/// agree within half a unit of the last digit regarded as meaningful. One
/// digit of u is so regarded here (7.9.2 allows one or two), but never more
/// than a fifth of u: the first digit alone would let u = 10 pass with half of
/// itself. The sampling error of the ends is granted on top.
fn band(linear: Linear, sampled: Sampled, scale: f64) -> Band {
    let sure = linear.u == 0.0 && sampled.u <= 1e-12 * linear.value.abs();
    let difference = (linear.low() - sampled.low).abs().max((linear.high() - sampled.high).abs());
    let allowed = tolerance(sampled.u, scale) + 2.0 * sampled.errors[2].max(sampled.errors[3]);
    let beyond = linear.k * linear.u > linear.worst * (1.0 + 1e-9);
    let basis = match () {
        () if sure => Basis::Exact,
        // A band must not reach beyond the bounding case.
        () if beyond => Basis::MonteCarlo,
        // One block does not know its own error and confirms nothing.
        () if allowed.is_finite() && difference <= allowed => Basis::Linear,
        () => Basis::MonteCarlo,
    };
    let (value, u, low, high) = match basis {
        Basis::MonteCarlo => (sampled.value, sampled.u, sampled.low, sampled.high),
        Basis::Exact => (linear.value, 0.0, linear.value, linear.value),
        Basis::Linear => (linear.value, linear.u, linear.low(), linear.high()),
    };
    Band { value, u, low, high, basis, linear, sampled, difference: (difference, allowed) }
}

/// Half a unit of the first digit of u, at most u/5, in SI.
fn tolerance(u: f64, scale: f64) -> f64 {
    let digit = decimals_for(u / scale).map_or(0.0, |two| 0.5 * libm::pow(10.0, f64::from(1 - two)) * scale);
    digit.min(0.2 * u)
}
