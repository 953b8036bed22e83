//! Sine, cosine and direction without branches, for many trials at once.
//!
//! A loop over these runs two trials at a time on every x86-64 processor,
//! where a call for each trial would not. They use the four operations and the
//! numbers' bits only, so the results do not depend on the processor.

use std::f64::consts::{FRAC_2_PI, FRAC_PI_2, FRAC_PI_4, PI};

// Coefficients of (sin √z/√z − 1)/z and (cos √z − 1)/z for z up to (π/4)², and
// of (atan √z/√z − 1)/z for z up to tan²(π/8): interpolated at Chebyshev's
// points in 50 digits; what is left is below 2e-17.
const SIN: [f64; 6] = [
    -0.166_666_666_666_666_66,
    0.008_333_333_333_330_948,
    -0.000_198_412_698_367_567_74,
    2.755_731_610_161_787_4e-6,
    -2.505_113_165_023_518e-8,
    1.591_811_526_326_597_4e-10,
];
const COS: [f64; 7] = [
    -0.5,
    0.041_666_666_666_666_64,
    -0.001_388_888_888_888_077,
    2.480_158_729_369_030_5e-5,
    -2.755_731_556_524_682e-7,
    2.087_588_656_448_267_2e-9,
    -1.136_798_842_329_498_7e-11,
];
const ATAN: [f64; 11] = [
    -0.333_333_333_333_333_3,
    0.199_999_999_999_955_16,
    -0.142_857_142_846_656_82,
    0.111_111_110_151_870_18,
    -0.090_909_045_753_064_9,
    0.076_921_831_253_768_92,
    -0.066_645_105_255_089_36,
    0.058_581_409_048_663_28,
    -0.050_854_078_345_894_844,
    0.039_230_447_784_793_09,
    -0.019_175_404_711_104_935,
];
const TAN_PI_8: f64 = 0.414_213_562_373_095_05;

/// Adding it (1.5 · 2⁵²) rounds to an integer, which then stands in the last bits.
const ROUND: f64 = 6_755_399_441_055_744.0;
/// π/2 in three parts; the first two have 33 bits, so that their multiples by
/// the quarters of an angle up to [`LARGEST`] are exact.
const HALF_PI: [f64; 3] = [1.570_796_326_734_125_6, 6.077_100_506_303_966e-11, 2.022_266_248_795_950_6e-21];
/// Largest angle, in radians, that is reduced here.
const LARGEST: f64 = 1e5;

/// Sines and cosines of angles.
pub(crate) fn sincos_all<const N: usize>(angles: &[f64; N], sin: &mut [f64; N], cos: &mut [f64; N]) {
    for ((angle, sin), cos) in angles.iter().zip(sin.iter_mut()).zip(cos.iter_mut()) {
        (*sin, *cos) = sincos(*angle);
    }
    for ((angle, sin), cos) in angles.iter().zip(sin).zip(cos) {
        if angle.abs() > LARGEST {
            (*sin, *cos) = libm::sincos(*angle);
        }
    }
}

/// Sine and cosine of an angle of at most [`LARGEST`].
#[inline(always)]
fn sincos(x: f64) -> (f64, f64) {
    let shifted = x * FRAC_2_PI + ROUND;
    let (quarters, k) = (shifted - ROUND, shifted.to_bits());
    let r = HALF_PI.iter().fold(x, |r, part| r - quarters * part);
    let z = r * r;
    let s = (r + r * z * polynomial(SIN, z)).to_bits();
    let c = (1.0 + z * polynomial(COS, z)).to_bits();
    // An odd number of quarters exchanges the two; the next bit is the sign.
    let exchanged = (s ^ c) & (k & 1).wrapping_neg();
    let sin = s ^ exchanged ^ ((k & 2) << 62);
    let cos = c ^ exchanged ^ ((k.wrapping_add(1) & 2) << 62);
    (f64::from_bits(sin), f64::from_bits(cos))
}

/// The angle of the vector (`x`, `y`), in [−π, π]; not a number for a vector
/// without length.
#[inline(always)]
pub(crate) fn atan2(y: f64, x: f64) -> f64 {
    let (across, along) = (y.abs(), x.abs());
    let steep = across > along;
    let (small, large) = if steep { (along, across) } else { (across, along) };
    // Beyond π/8 the angle is counted from π/4.
    let far = small > TAN_PI_8 * large;
    let (n, d) = if far { (small - large, small + large) } else { (small, large) };
    // Without this question the division is taken into both branches above and
    // the loop no longer runs two trials at a time.
    let t = n / if d == 0.0 { f64::NAN } else { d };
    let z = t * t;
    let series = t + t * z * polynomial(ATAN, z);
    let octant = if far { FRAC_PI_4 + series } else { series };
    let quadrant = if steep { FRAC_PI_2 - octant } else { octant };
    let half = if x.to_bits() >> 63 == 1 { PI - quadrant } else { quadrant };
    half.copysign(y)
}

/// Even and odd powers apart: two short chains instead of a long one.
#[inline(always)]
fn polynomial<const N: usize>(c: [f64; N], z: f64) -> f64 {
    let w = z * z;
    let (mut even, mut odd) = (0.0, 0.0);
    for i in (0..N).rev() {
        let chain = if i % 2 == 0 { &mut even } else { &mut odd };
        *chain = *chain * w + c[i];
    }
    even + z * odd
}

#[cfg(test)]
mod tests {
    use super::super::Real;
    use super::*;
    use std::array::from_mut;

    const ODD: [f64; 8] = [0.0, -0.0, f64::NAN, f64::INFINITY, 1e-300, 1.0, -1.0, 1e9];

    /// Both not a number, or equal within two units of the last place of
    /// `size`.
    fn near(a: f64, b: f64, size: f64) -> bool {
        (a.is_nan() && b.is_nan()) || (a - b).abs() <= 2.0 * f64::EPSILON * size
    }

    #[test]
    fn sine_and_cosine_are_those_of_the_library() {
        let mut angles: Vec<f64> = (-40_000..40_000).map(|i| f64::from(i) * 7.3e-4).collect();
        angles.extend(ODD);
        angles.extend([99_999.9, -99_999.9, 355.0, 100_000.1]);
        for x in angles {
            let (mut s, mut c) = (9.0, 9.0);
            sincos_all(&[x], from_mut(&mut s), from_mut(&mut c));
            let (sin, cos) = libm::sincos(x);
            assert!(near(s, sin, sin.abs().max(1e-5)), "sin {x}: {s} {sin}");
            assert!(near(c, cos, cos.abs().max(1e-5)), "cos {x}: {c} {cos}");
        }
    }

    #[test]
    fn directions_are_those_of_the_library() {
        let ring = (0..20_000).map(|i| {
            let (y, x) = libm::sincos(f64::from(i) * 3.3e-4);
            (y * f64::from(i % 7), x * f64::from(i % 5))
        });
        let odd = ODD.iter().flat_map(|y| ODD.iter().map(|x| (*y, *x)));
        for (y, x) in ring.chain(odd).filter(|(y, x)| !y.is_infinite() && !x.is_infinite()) {
            let (own, library) = (atan2(y, x), Real::atan2(y, x));
            assert!(near(own, library, library.abs()), "{y} {x}: {own} {library}");
            assert!(own.is_nan() || own.is_sign_negative() == library.is_sign_negative(), "{y} {x}");
        }
    }
}
