//! How many digits a number deserves.
//!
//! A standard uncertainty is written to two figures and the value to the same
//! place (JCGM 100, 7.2.6).

/// Decimals at which `u` has two significant figures; below zero for tens,
/// hundreds … `None` when `u` is zero or not finite.
pub fn decimals_for(u: f64) -> Option<i32> {
    if !u.is_finite() || u <= 0.0 {
        return None;
    }
    let magnitude = libm::floor(libm::log10(u)) as i32;
    let decimals = 1 - magnitude;
    // 0.0996 rounds to 0.10: one place fewer carries two figures.
    let rounded = round_to(u, decimals);
    Some(if rounded >= power_of_ten(magnitude + 1) { decimals - 1 } else { decimals })
}

/// Decimals needed so that rounding an input changes the result by no more
/// than `share` of the result's last printed unit, given the result's
/// `slope` with respect to that input. At most twelve.
pub fn guard_decimals(result_decimals: i32, slope: f64, share: f64) -> i32 {
    let unit = power_of_ten(-result_decimals);
    let effect = slope.abs() * 0.5;
    if effect == 0.0 || !effect.is_finite() {
        return result_decimals;
    }
    let needed = libm::ceil(libm::log10(effect / (share * unit))) as i32;
    needed.clamp(-3, 12)
}

/// `value` rounded to `decimals` places.
pub fn round_to(value: f64, decimals: i32) -> f64 {
    if decimals >= 0 {
        let scale = power_of_ten(decimals);
        let scaled = libm::round(value * scale) / scale;
        if scaled.is_finite() { scaled } else { value }
    } else {
        let scale = power_of_ten(-decimals);
        libm::round(value / scale) * scale
    }
}

/// `value` with a fixed number of decimals, a true minus sign, and no minus
/// before a zero. Fewer than zero decimals round to tens, hundreds …
pub fn fixed(value: f64, decimals: i32) -> String {
    if !value.is_finite() {
        return "not a number".into();
    }
    let places = decimals.max(0) as usize;
    let text = format!("{:.places$}", round_to(value, decimals));
    match text.strip_prefix('-') {
        Some(digits) if digits.chars().all(|c| c == '0' || c == '.') => digits.to_string(),
        Some(digits) => format!("−{digits}"),
        None => text,
    }
}

/// `value` to a number of significant figures, at most twelve decimals.
pub fn significant(value: f64, figures: i32) -> String {
    if value == 0.0 || !value.is_finite() {
        return fixed(value, 0);
    }
    let magnitude = libm::floor(libm::log10(value.abs())) as i32;
    let text = fixed(value, (figures - 1 - magnitude).min(12));
    // What is left of a rounding error is a zero.
    if text.chars().all(|c| matches!(c, '0' | '.')) { "0".into() } else { text }
}

fn power_of_ten(exponent: i32) -> f64 {
    // Parsing is exact to the last bit, repeated multiplication is not.
    format!("1e{exponent}").parse().unwrap_or(1.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn two_figures_of_uncertainty_and_the_carry() {
        assert_eq!(decimals_for(0.34), Some(2));
        assert_eq!(decimals_for(0.0996), Some(2));
        assert_eq!(decimals_for(0.0994), Some(3));
        assert_eq!(decimals_for(1234.0), Some(-2));
        assert_eq!(decimals_for(9.96), Some(0));
        assert_eq!(decimals_for(0.0), None);
        assert_eq!(decimals_for(f64::NAN), None);
    }

    #[test]
    fn numbers_are_written_as_people_write_them() {
        assert_eq!(fixed(-0.001, 2), "0.00");
        assert_eq!(fixed(-1.5, 1), "−1.5");
        assert_eq!(fixed(123456.0, -2), "123500");
        assert_eq!(significant(0.012345, 3), "0.0123");
        assert_eq!(significant(98765.4, 3), "98800");
        assert_eq!(fixed(f64::NAN, 2), "not a number");
    }

    #[test]
    fn guard_digits_keep_the_result_within_its_share() {
        let decimals = guard_decimals(2, 5.0, 0.05);
        let worst = 5.0 * 0.5 * power_of_ten(-decimals);
        assert!(worst <= 0.05 * 0.01);
        assert!(worst > 0.05 * 0.001 * 0.99);
    }
}
