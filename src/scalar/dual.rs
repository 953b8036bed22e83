//! A value with its derivatives: forward differentiation.

use super::Real;
use std::array::from_fn;
use std::ops::{Add, Div, Mul, Neg, Sub};

/// A value and its derivatives with respect to `N` variables.
///
/// Follows the branch that was taken: at a kink it gives one side's derivative.
#[derive(Debug, Clone, Copy)]
pub struct Dual<const N: usize> {
    /// The value.
    pub value: f64,
    /// Its derivatives.
    pub slopes: [f64; N],
}

impl<const N: usize> Dual<N> {
    /// Variable number `index` at `value`.
    pub fn variable(value: f64, index: usize) -> Self {
        Dual { value, slopes: from_fn(|i| if i == index { 1.0 } else { 0.0 }) }
    }

    /// Chain rule: the new value, and the slope of the outer function.
    fn chain(self, value: f64, slope: f64) -> Self {
        Dual { value, slopes: self.slopes.map(|s| times(s, slope)) }
    }

    /// Chain rule for two arguments.
    fn chain2(self, other: Self, value: f64, by_self: f64, by_other: f64) -> Self {
        Dual { value, slopes: from_fn(|i| times(self.slopes[i], by_self) + times(other.slopes[i], by_other)) }
    }
}

/// What does not vary has no slope, even where the outer slope is infinite.
fn times(slope: f64, outer: f64) -> f64 {
    if slope == 0.0 { 0.0 } else { slope * outer }
}

impl<const N: usize> Add for Dual<N> {
    type Output = Self;
    fn add(self, o: Self) -> Self {
        self.chain2(o, self.value + o.value, 1.0, 1.0)
    }
}

impl<const N: usize> Sub for Dual<N> {
    type Output = Self;
    fn sub(self, o: Self) -> Self {
        self.chain2(o, self.value - o.value, 1.0, -1.0)
    }
}

impl<const N: usize> Mul for Dual<N> {
    type Output = Self;
    fn mul(self, o: Self) -> Self {
        self.chain2(o, self.value * o.value, o.value, self.value)
    }
}

impl<const N: usize> Div for Dual<N> {
    type Output = Self;
    fn div(self, o: Self) -> Self {
        let quotient = self.value / o.value;
        self.chain2(o, quotient, 1.0 / o.value, -quotient / o.value)
    }
}

impl<const N: usize> Neg for Dual<N> {
    type Output = Self;
    fn neg(self) -> Self {
        self.chain(-self.value, -1.0)
    }
}

impl<const N: usize> Real for Dual<N> {
    fn of(value: f64) -> Self {
        Dual { value, slopes: [0.0; N] }
    }

    fn sqrt(self) -> Self {
        let root = self.value.sqrt();
        self.chain(root, 0.5 / root)
    }

    fn sin(self) -> Self {
        self.chain(libm::sin(self.value), libm::cos(self.value))
    }

    fn cos(self) -> Self {
        self.chain(libm::cos(self.value), -libm::sin(self.value))
    }

    fn atan2(self, x: Self) -> Self {
        let r2 = self.value * self.value + x.value * x.value;
        self.chain2(x, Real::atan2(self.value, x.value), x.value / r2, -self.value / r2)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_product_rule_holds() {
        let x = Dual::<2>::variable(3.0, 0);
        let y = Dual::<2>::variable(4.0, 1);
        let r = (x * x + y * y).sqrt();
        assert_eq!(r.value, 5.0);
        assert!((r.slopes[0] - 0.6).abs() < 1e-15 && (r.slopes[1] - 0.8).abs() < 1e-15);
    }

    #[test]
    fn the_root_of_a_constant_zero_has_no_slope() {
        assert_eq!(Dual::<1>::of(0.0).sqrt().slopes, [0.0]);
    }
}
