//! The arithmetic that formulas may use.

use std::ops::{Add, Div, Mul, Neg, Sub};

/// A number that formulas can compute with.
///
/// Transcendental functions come from the `libm` crate, or for lanes from
/// `trig.rs`: the system's own change their last bits with the processor.
pub trait Real:
    Copy + Add<Output = Self> + Sub<Output = Self> + Mul<Output = Self> + Div<Output = Self> + Neg<Output = Self>
{
    /// A constant of the formula.
    fn of(value: f64) -> Self;
    /// The square root; not a number below zero.
    fn sqrt(self) -> Self;
    /// The sine of an angle in radians.
    fn sin(self) -> Self;
    /// The cosine of an angle in radians.
    fn cos(self) -> Self;
    /// The angle of the vector (`x`, `self`), in (−π, π]; not a number for a
    /// vector without length, which has none.
    fn atan2(self, x: Self) -> Self;

    /// The square.
    fn squared(self) -> Self {
        self * self
    }
}

impl Real for f64 {
    #[inline(always)]
    fn of(value: f64) -> Self {
        value
    }

    #[inline(always)]
    fn sqrt(self) -> Self {
        // The square root is exact to the last bit on every processor.
        f64::sqrt(self)
    }

    #[inline(always)]
    fn sin(self) -> Self {
        libm::sin(self)
    }

    #[inline(always)]
    fn cos(self) -> Self {
        libm::cos(self)
    }

    #[inline(always)]
    fn atan2(self, x: Self) -> Self {
        if self == 0.0 && x == 0.0 { f64::NAN } else { libm::atan2(self, x) }
    }
}
