//! Standard normal and uniform numbers by the ziggurat method.
//!
//! Source: Marsaglia & Tsang, The Ziggurat Method for Generating Random
//! Variables, J. Stat. Softw. 5(8), 2000, with layer and abscissa from
//! separate bits as in Doornik, An Improved Ziggurat Method (2005).
//! Written here because the crates that offer it take their exponential from
//! the system, whose last bits change with the processor.

use rand_core::{Rng, SeedableRng};
use rand_xoshiro::Xoshiro256PlusPlus;

const LAYERS: usize = 1024;
/// Numbers whose bits are drawn together.
const CHUNK: usize = 256;
/// Start of the tail and area of a layer, at which 1024 layers end at the top:
/// found by bisection in 40 digits (which for 256 layers gives the paper's
/// figures). With four times the paper's layers a fourth of the draws needs
/// the density.
const TAIL: f64 = 4.038_849_846_109_504;
const AREA: f64 = 0.001_226_324_646_353_088;

/// A seeded stream of random numbers.
#[derive(Debug, Clone)]
pub struct Generator(Xoshiro256PlusPlus);

impl Generator {
    /// The stream number `stream` of a seed. Streams are independent of the
    /// order in which they are used, hence of the number of threads.
    pub fn new(seed: u64, stream: u64) -> Self {
        // Scrambled twice, so that neighbouring seeds and streams start from
        // unrelated states; the generator's own seeding only counts on.
        Generator(Xoshiro256PlusPlus::seed_from_u64(scramble(scramble(seed) ^ stream)))
    }

    /// A uniform number in (0, 1): never 0, never 1.
    pub fn uniform(&mut self) -> f64 {
        ((self.0.next_u64() >> 11) as f64 + 0.5) * (1.0 / 9_007_199_254_740_992.0)
    }
}

/// Stafford's mix 13: every bit of the input moves every bit of the output.
fn scramble(x: u64) -> u64 {
    let x = (x ^ (x >> 30)).wrapping_mul(0xBF58_476D_1CE4_E5B9);
    let x = (x ^ (x >> 27)).wrapping_mul(0x94D0_49BB_1331_11EB);
    x ^ (x >> 31)
}

/// The tables of the method.
#[derive(Debug)]
pub struct Ziggurat {
    /// Right ends of the layers, from the tail inwards; one more than layers.
    x: [f64; LAYERS + 1],
    /// Density at those ends.
    f: [f64; LAYERS + 1],
}

impl Default for Ziggurat {
    fn default() -> Self {
        let mut x = [0.0; LAYERS + 1];
        let mut f = [1.0; LAYERS + 1];
        x[1] = TAIL;
        f[1] = density(TAIL);
        // The base layer's rectangle, wider than the curve, stands for the tail too.
        x[0] = AREA / f[1];
        f[0] = 0.0;
        for i in 2..LAYERS {
            f[i] = f[i - 1] + AREA / x[i - 1];
            x[i] = libm::sqrt(-2.0 * libm::log(f[i]));
        }
        Ziggurat { x, f }
    }
}

impl Ziggurat {
    /// Fills a column with standard normal numbers.
    pub fn fill(&self, column: &mut [f64], rng: &mut Generator) {
        // All bits of a chunk come first: a loop without calls runs with the
        // generator's state in registers, twice as fast as draw by draw.
        let mut bits = [0; CHUNK];
        for chunk in column.chunks_mut(CHUNK) {
            bits[..chunk.len()].iter_mut().for_each(|b| *b = rng.0.next_u64());
            for (x, bits) in chunk.iter_mut().zip(&bits) {
                *x = self.accept(*bits).unwrap_or_else(|| self.reconsider(*bits, rng));
            }
        }
    }

    /// One standard normal number.
    #[inline]
    pub fn normal(&self, rng: &mut Generator) -> f64 {
        let bits = rng.0.next_u64();
        self.accept(bits).unwrap_or_else(|| self.reconsider(bits, rng))
    }

    /// The number that these bits stand for, if it lies wholly below the curve.
    #[inline]
    fn accept(&self, bits: u64) -> Option<f64> {
        let (layer, u) = split(bits);
        let x = u * self.x[layer];
        (x.abs() < self.x[layer + 1]).then_some(x)
    }

    /// A number for bits that were not accepted at once (one in three hundred).
    #[cold]
    fn reconsider(&self, bits: u64, rng: &mut Generator) -> f64 {
        let (layer, u) = split(bits);
        if layer == 0 {
            return tail(rng, u < 0.0);
        }
        let x = u * self.x[layer];
        let height = self.f[layer] + (self.f[layer + 1] - self.f[layer]) * rng.uniform();
        if height < density(x) { x } else { self.normal(rng) }
    }
}

/// Layer and place in the layer, a number in [−1, 1): from separate bits.
#[inline]
fn split(bits: u64) -> (usize, f64) {
    // 52 bits as a number in [2, 4), less 3.
    (bits as usize % LAYERS, f64::from_bits((bits >> 12) | 0x4000_0000_0000_0000) - 3.0)
}

fn density(x: f64) -> f64 {
    libm::exp(-0.5 * x * x)
}

/// A number from beyond the last layer (Marsaglia 1964, as in the paper).
#[cold]
fn tail(rng: &mut Generator, negative: bool) -> f64 {
    loop {
        let x = -libm::log(rng.uniform()) / TAIL;
        let y = -libm::log(rng.uniform());
        if 2.0 * y > x * x {
            return if negative { -(TAIL + x) } else { TAIL + x };
        }
    }
}

#[cfg(test)]
mod tests {
    use super::super::normal_cdf;
    use super::*;

    #[test]
    fn layers_have_equal_areas_and_meet_at_the_top() {
        let z = Ziggurat::default();
        for i in 1..LAYERS {
            let area = z.x[i] * (z.f[i + 1] - z.f[i]);
            assert!((area - AREA).abs() < 1e-9, "layer {i}: {area}");
        }
    }

    /// Kolmogorov–Smirnov against the normal distribution function; 1.95/√n is
    /// the 0.1 % critical value (from memory, standard tables).
    #[test]
    fn draws_follow_the_normal_distribution() {
        let z = Ziggurat::default();
        let mut rng = Generator::new(7, 0);
        let n = 200_000;
        let mut draws: Vec<f64> = (0..n).map(|_| z.normal(&mut rng)).collect();
        draws.sort_unstable_by(f64::total_cmp);
        let worst = draws
            .iter()
            .enumerate()
            .map(|(i, x)| (normal_cdf(*x) - (i as f64 + 0.5) / n as f64).abs())
            .fold(0.0, f64::max);
        assert!(worst < 1.95 / libm::sqrt(n as f64), "{worst}");
        let beyond = draws.iter().filter(|x| x.abs() > TAIL).count() as f64;
        let expected = 2.0 * normal_cdf(-TAIL) * n as f64;
        assert!((beyond - expected).abs() < 4.0 * libm::sqrt(expected), "{beyond} for {expected}");
    }

    #[test]
    fn streams_differ_and_repeat() {
        let draw = |stream| Generator::new(1, stream).uniform();
        assert_eq!(draw(3), draw(3));
        assert_ne!(draw(3), draw(4));
    }
}
