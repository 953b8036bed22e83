//! Type A evaluation: the uncertainty of repeated readings.

/// Mean and scatter of repeated readings.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct TypeA {
    /// Arithmetic mean.
    pub mean: f64,
    /// Experimental standard deviation of one reading.
    pub s: f64,
    /// How many readings.
    pub n: u32,
}

impl TypeA {
    /// Standard uncertainty of the mean: s/√n (JCGM 100, 4.2.3).
    pub fn of_the_mean(&self) -> f64 {
        self.s / f64::from(self.n).sqrt()
    }

    /// Standard uncertainty of the next single value: s √(1 + 1/n).
    pub fn of_the_next(&self) -> f64 {
        self.s * (1.0 + 1.0 / f64::from(self.n)).sqrt()
    }

    /// Degrees of freedom.
    pub fn dof(&self) -> u32 {
        self.n.saturating_sub(1)
    }
}

/// Evaluates repeated readings; `None` for fewer than two.
pub fn type_a(readings: &[f64]) -> Option<TypeA> {
    let n = u32::try_from(readings.len()).ok().filter(|n| *n >= 2)?;
    let mean = readings.iter().sum::<f64>() / f64::from(n);
    let squares: f64 = readings.iter().map(|r| (r - mean) * (r - mean)).sum();
    Some(TypeA { mean, s: (squares / f64::from(n - 1)).sqrt(), n })
}
