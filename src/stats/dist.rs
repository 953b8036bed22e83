//! What is known about a measured quantity: the shapes of JCGM 101, 6.4.

use super::{Generator, Ziggurat, normal_cdf, normal_quantile_95, student_t_two_sided};
use statrs::distribution::{ContinuousCDF, StudentsT};

/// A distribution of possible values.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Dist {
    /// Known without uncertainty.
    Exact(f64),
    /// Mean and standard deviation.
    Normal {
        /// Mean.
        mean: f64,
        /// Standard deviation.
        sd: f64,
    },
    /// Equally likely between two limits.
    Rectangular {
        /// Lower limit.
        lo: f64,
        /// Upper limit.
        hi: f64,
    },
    /// Most likely at the mode, impossible beyond the limits.
    Triangular {
        /// Lower limit.
        lo: f64,
        /// Most likely value.
        mode: f64,
        /// Upper limit.
        hi: f64,
    },
    /// Scaled and shifted Student t of a Type A evaluation (JCGM 101, 6.4.9).
    StudentT {
        /// Mean of the readings.
        mean: f64,
        /// Standard uncertainty by JCGM 100, the scale of the t.
        scale: f64,
        /// Degrees of freedom.
        dof: u32,
    },
}

impl Dist {
    /// The best estimate: the mean.
    pub fn estimate(&self) -> f64 {
        match *self {
            Dist::Exact(v) => v,
            Dist::Normal { mean, .. } | Dist::StudentT { mean, .. } => mean,
            Dist::Rectangular { lo, hi } => 0.5 * (lo + hi),
            Dist::Triangular { lo, mode, hi } => (lo + mode + hi) / 3.0,
        }
    }

    /// The distribution of `offset + factor · x`.
    pub fn affine(&self, offset: f64, factor: f64) -> Dist {
        let f = |x: f64| offset + factor * x;
        match *self {
            Dist::Exact(v) => Dist::Exact(f(v)),
            Dist::Normal { mean, sd } => Dist::Normal { mean: f(mean), sd: sd * factor.abs() },
            Dist::StudentT { mean, scale, dof } => {
                Dist::StudentT { mean: f(mean), scale: scale * factor.abs(), dof }
            }
            Dist::Rectangular { lo, hi } => Dist::Rectangular { lo: f(lo).min(f(hi)), hi: f(lo).max(f(hi)) },
            Dist::Triangular { lo, mode, hi } => {
                Dist::Triangular { lo: f(lo).min(f(hi)), mode: f(mode), hi: f(lo).max(f(hi)) }
            }
        }
    }

    /// Standard uncertainty as JCGM 100 takes it: for a t its scale, since its
    /// degrees of freedom are counted separately.
    pub fn u(&self) -> f64 {
        match *self {
            Dist::Exact(_) => 0.0,
            Dist::Normal { sd, .. } => sd,
            Dist::StudentT { scale, .. } => scale,
            Dist::Rectangular { lo, hi } => (hi - lo) / 12f64.sqrt(),
            Dist::Triangular { lo, mode, hi } => {
                let squares = lo * lo + mode * mode + hi * hi - lo * mode - lo * hi - mode * hi;
                (squares.max(0.0) / 18.0).sqrt()
            }
        }
    }

    /// Degrees of freedom of [`Dist::u`]; `None` for infinitely many.
    pub fn dof(&self) -> Option<f64> {
        match self {
            Dist::StudentT { dof, .. } => Some(f64::from(*dof)),
            _ => None,
        }
    }

    /// True for a value without uncertainty.
    pub fn is_exact(&self) -> bool {
        self.u() == 0.0
    }

    /// How far the value may lie from its estimate when 'the worst' is meant:
    /// the limits where there are some, else the central 95 %.
    pub fn reach(&self) -> f64 {
        match *self {
            Dist::Exact(_) => 0.0,
            Dist::Normal { sd, .. } => normal_quantile_95() * sd,
            Dist::StudentT { scale, dof, .. } => student_t_two_sided(f64::from(dof)) * scale,
            Dist::Rectangular { lo, hi } => 0.5 * (hi - lo),
            Dist::Triangular { lo, hi, .. } => (hi - self.estimate()).max(self.estimate() - lo),
        }
    }

    /// Name of the shape.
    pub fn shape(&self) -> &'static str {
        match self {
            Dist::Exact(_) => "exact",
            Dist::Normal { .. } => "normal",
            Dist::Rectangular { .. } => "rectangular",
            Dist::Triangular { .. } => "triangular",
            Dist::StudentT { .. } => "Student t",
        }
    }

    /// Probability of a value below `x`.
    pub fn cdf(&self, x: f64) -> f64 {
        match *self {
            Dist::Exact(v) => f64::from(u8::from(x > v)),
            Dist::Normal { mean, sd } => normal_cdf((x - mean) / sd),
            Dist::Rectangular { lo, hi } => ((x - lo) / (hi - lo)).clamp(0.0, 1.0),
            Dist::Triangular { lo, mode, hi } => triangular_cdf(x, lo, mode, hi),
            Dist::StudentT { mean, scale, dof } => {
                StudentsT::new(mean, scale, f64::from(dof)).map_or(f64::NAN, |t| t.cdf(x))
            }
        }
    }

    /// Fills a column with draws.
    pub fn fill(&self, column: &mut [f64], z: &Ziggurat, rng: &mut Generator) {
        match *self {
            Dist::Exact(v) => column.fill(v),
            Dist::Normal { mean, sd } => {
                z.fill(column, rng);
                column.iter_mut().for_each(|x| *x = mean + sd * *x);
            }
            Dist::Rectangular { lo, hi } => {
                for x in column {
                    *x = lo + (hi - lo) * rng.uniform();
                }
            }
            Dist::Triangular { lo, mode, hi } => {
                for x in column {
                    *x = triangular_quantile(rng.uniform(), lo, mode, hi);
                }
            }
            Dist::StudentT { mean, scale, dof } => {
                for x in column {
                    *x = mean + scale * student(z, rng, dof);
                }
            }
        }
    }
}

/// A t is a normal over the root of a mean of squared normals.
fn student(z: &Ziggurat, rng: &mut Generator, dof: u32) -> f64 {
    let top = z.normal(rng);
    top / (squares(z, rng, dof) / f64::from(dof)).sqrt()
}

/// The sum of `dof` squared normals, as twice a gamma number of shape `dof`/2.
///
/// Source: Marsaglia & Tsang, A Simple Method for Generating Gamma Variables,
/// ACM Trans. Math. Softw. 26(3), 2000, for shapes of at least one.
fn squares(z: &Ziggurat, rng: &mut Generator, dof: u32) -> f64 {
    if dof < 2 {
        let x = z.normal(rng);
        return x * x;
    }
    let d = 0.5 * f64::from(dof) - 1.0 / 3.0;
    let c = 1.0 / (9.0 * d).sqrt();
    loop {
        let x = z.normal(rng);
        let v = (1.0 + c * x) * (1.0 + c * x) * (1.0 + c * x);
        let (u, square) = (rng.uniform(), x * x);
        let surely = u < 1.0 - 0.0331 * square * square;
        if v > 0.0 && (surely || libm::log(u) < 0.5 * square + d * (1.0 - v + libm::log(v))) {
            return 2.0 * d * v;
        }
    }
}

fn triangular_cdf(x: f64, lo: f64, mode: f64, hi: f64) -> f64 {
    if x <= lo {
        0.0
    } else if x >= hi {
        1.0
    } else if x < mode {
        (x - lo) * (x - lo) / ((hi - lo) * (mode - lo))
    } else {
        1.0 - (hi - x) * (hi - x) / ((hi - lo) * (hi - mode))
    }
}

fn triangular_quantile(p: f64, lo: f64, mode: f64, hi: f64) -> f64 {
    let turn = (mode - lo) / (hi - lo);
    if p < turn {
        lo + (p * (hi - lo) * (mode - lo)).sqrt()
    } else {
        hi - ((1.0 - p) * (hi - lo) * (hi - mode)).sqrt()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Sample mean, standard deviation and distribution function of a million
    /// draws against the closed forms; t's own standard deviation is
    /// scale √(ν/(ν−2)) (JCGM 101, 6.4.9.4).
    #[test]
    fn t_draws_have_the_tails_of_their_degrees_of_freedom() {
        let z = Ziggurat::default();
        let n = 400_000;
        for dof in [3, 5, 40] {
            let dist = Dist::StudentT { mean: 0.0, scale: 1.0, dof };
            let mut column = vec![0.0; n];
            dist.fill(&mut column, &z, &mut Generator::new(5, u64::from(dof)));
            for at in [-8.0, -5.0, -2.0, 0.3, 5.0] {
                let p = dist.cdf(at);
                let below = column.iter().filter(|x| **x < at).count() as f64 / n as f64;
                let allowed = 4.5 * (p * (1.0 - p) / n as f64).sqrt() + 2.0 / n as f64;
                assert!((below - p).abs() < allowed, "ν = {dof} at {at}: {below} for {p}");
            }
        }
    }

    #[test]
    fn draws_have_the_stated_moments() {
        let z = Ziggurat::default();
        let n = 400_000;
        for (i, (dist, sd)) in [
            (Dist::Normal { mean: 2.0, sd: 0.5 }, 0.5),
            (Dist::Rectangular { lo: -1.0, hi: 3.0 }, 4.0 / 12f64.sqrt()),
            (Dist::Triangular { lo: 0.0, mode: 1.0, hi: 4.0 }, (13.0 / 18.0f64).sqrt()),
            (Dist::StudentT { mean: 1.0, scale: 0.1, dof: 9 }, 0.1 * (9.0 / 7.0f64).sqrt()),
        ]
        .into_iter()
        .enumerate()
        {
            let mut column = vec![0.0; n];
            dist.fill(&mut column, &z, &mut Generator::new(11, i as u64));
            let mean = column.iter().sum::<f64>() / n as f64;
            let var = column.iter().map(|x| (x - mean) * (x - mean)).sum::<f64>() / n as f64;
            assert!((mean - dist.estimate()).abs() < 5.0 * sd / (n as f64).sqrt(), "{dist:?} {mean}");
            assert!((var.sqrt() / sd - 1.0).abs() < 0.01, "{dist:?} {}", var.sqrt());
            let at = dist.estimate() + 0.7 * sd;
            let below = column.iter().filter(|x| **x < at).count() as f64 / n as f64;
            assert!((below - dist.cdf(at)).abs() < 0.004, "{dist:?} {below}");
        }
    }
}
