//! The normal distribution function.

/// Half-width of the central 95 % of a normal distribution, in standard
/// deviations: Φ⁻¹(0.975), to the digits a double holds.
pub fn normal_quantile_95() -> f64 {
    1.959_963_984_540_054
}

/// Φ(z): the probability that a standard normal number lies below `z`.
pub fn normal_cdf(z: f64) -> f64 {
    0.5 * libm::erfc(-z * std::f64::consts::FRAC_1_SQRT_2)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_quantile_and_the_distribution_function_agree() {
        assert!((normal_cdf(normal_quantile_95()) - 0.975).abs() < 1e-15);
        assert_eq!(normal_cdf(0.0), 0.5);
    }
}
