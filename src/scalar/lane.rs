//! One trial of many, with sines and cosines shared between formulas.

use super::Real;
use std::ops::{Add, Div, Mul, Neg, Sub};

/// A value that may know its sine and cosine.
///
/// A direction enters many formulas of one calculation. Its sine and cosine
/// are computed once a trial and handed to each of them; the sine of a
/// difference then follows from the addition theorem. Whether a lane knows its
/// sine is fixed by the formula's text, so the compiler removes the question
/// and everything that is not used. Values agree with `f64` to rounding.
#[derive(Debug, Clone, Copy)]
pub struct Lane {
    /// The value.
    pub value: f64,
    trig: Option<(f64, f64)>,
}

impl Lane {
    /// A value that does not know its sine.
    #[inline(always)]
    pub fn plain(value: f64) -> Self {
        Lane { value, trig: None }
    }

    /// An angle with its sine and cosine.
    #[inline(always)]
    pub fn angle(value: f64, sin: f64, cos: f64) -> Self {
        Lane { value, trig: Some((sin, cos)) }
    }
}

impl Add for Lane {
    type Output = Self;
    #[inline(always)]
    fn add(self, o: Self) -> Self {
        let trig = match (self.trig, o.trig) {
            (Some((s, c)), Some((t, d))) => Some((s * d + c * t, c * d - s * t)),
            _ => None,
        };
        Lane { value: self.value + o.value, trig }
    }
}

impl Sub for Lane {
    type Output = Self;
    #[inline(always)]
    fn sub(self, o: Self) -> Self {
        let trig = match (self.trig, o.trig) {
            (Some((s, c)), Some((t, d))) => Some((s * d - c * t, c * d + s * t)),
            _ => None,
        };
        Lane { value: self.value - o.value, trig }
    }
}

impl Mul for Lane {
    type Output = Self;
    #[inline(always)]
    fn mul(self, o: Self) -> Self {
        Lane::plain(self.value * o.value)
    }
}

impl Div for Lane {
    type Output = Self;
    #[inline(always)]
    fn div(self, o: Self) -> Self {
        Lane::plain(self.value / o.value)
    }
}

impl Neg for Lane {
    type Output = Self;
    #[inline(always)]
    fn neg(self) -> Self {
        Lane { value: -self.value, trig: self.trig.map(|(s, c)| (-s, c)) }
    }
}

impl Real for Lane {
    #[inline(always)]
    fn of(value: f64) -> Self {
        Lane::plain(value)
    }

    #[inline(always)]
    fn sqrt(self) -> Self {
        Lane::plain(self.value.sqrt())
    }

    #[inline(always)]
    fn sin(self) -> Self {
        Lane::plain(match self.trig {
            Some((s, _)) => s,
            None => libm::sin(self.value),
        })
    }

    #[inline(always)]
    fn cos(self) -> Self {
        Lane::plain(match self.trig {
            Some((_, c)) => c,
            None => libm::cos(self.value),
        })
    }

    #[inline(always)]
    fn atan2(self, x: Self) -> Self {
        Lane::plain(super::trig::atan2(self.value, x.value))
    }
}
