//! Coverage factors and effective degrees of freedom.

use statrs::distribution::{ContinuousCDF, StudentsT};

/// Half-width of the central 95 % of Student's t with `dof` degrees of
/// freedom, in units of its scale. Infinite degrees of freedom give the normal
/// value; fewer than one is not a number.
pub fn student_t_two_sided(dof: f64) -> f64 {
    if dof > 1e6 {
        return super::normal_quantile_95();
    }
    match StudentsT::new(0.0, 1.0, dof) {
        // Nine digits: the library's logarithm may differ in its last bits
        // from one processor to the next, and those must not reach a page.
        Ok(t) if dof >= 1.0 => libm::round(t.inverse_cdf(0.975) * 1e9) / 1e9,
        _ => f64::NAN,
    }
}

/// Effective degrees of freedom of a combined uncertainty: `parts` holds each
/// contribution to the combined standard uncertainty and its own degrees of
/// freedom, `None` for infinitely many.
///
/// Source: Welch–Satterthwaite, JCGM 100 G.4.1, equation G.2b.
pub fn welch_satterthwaite(parts: impl IntoIterator<Item = (f64, Option<f64>)>) -> f64 {
    let mut variance = 0.0;
    let mut denominator = 0.0;
    for (u, dof) in parts {
        let square = u * u;
        variance += square;
        if let Some(dof) = dof {
            denominator += square * square / dof;
        }
    }
    if denominator > 0.0 { variance * variance / denominator } else { f64::INFINITY }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// JCGM 100 table G.2: t for 95 %.
    #[test]
    fn t_is_that_of_the_table() {
        for (dof, t) in [(1.0, 12.71), (2.0, 4.30), (3.0, 3.18), (9.0, 2.26), (16.0, 2.12), (50.0, 2.01)] {
            assert!((student_t_two_sided(dof) - t).abs() < 0.005, "{dof}");
        }
        assert!((student_t_two_sided(f64::INFINITY) - 1.96).abs() < 0.005);
        assert!(student_t_two_sided(0.5).is_nan());
    }

    /// Given in the tests of PyPI suncal 1.7.1: 0.57 with 9 degrees of
    /// freedom and 0.25 with infinitely many give 12.8.
    #[test]
    fn effective_degrees_of_freedom() {
        let dof = welch_satterthwaite([(0.57, Some(9.0)), (0.25, None)]);
        assert!((dof - 12.8).abs() < 0.05, "{dof}");
    }
}
