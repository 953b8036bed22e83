//! Unit names and their exact factors.
//!
//! Factors come from uom so that they cannot drift, except where uom 0.38
//! holds a rounded one (the pound and what hangs on it, 1.5e-8 off): those are
//! written here as the 1959 agreement defines them.

use super::Kind;
use uom::si::f64 as q;

/// A unit of measurement.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Unit {
    /// How it is printed.
    pub name: &'static str,
    /// What it measures.
    pub kind: Kind,
    /// SI units in one of it.
    pub factor: f64,
}

/// Rows of: printed name, other spellings, kind, uom quantity and unit.
macro_rules! units {
    ($(($name:literal, [$($alias:literal),*], $kind:ident, $quantity:ident, $module:ident :: $unit:ident)),* $(,)?) => {
        fn rows() -> Vec<(&'static [&'static str], Unit)> {
            vec![$((
                &[$name $(, $alias)*] as &[&str],
                Unit {
                    name: $name,
                    kind: Kind::$kind,
                    factor: exact($name).unwrap_or(q::$quantity::new::<uom::si::$module::$unit>(1.0).value),
                },
            )),*]
        }
    };
}

/// Defined factors that uom holds rounded.
fn exact(name: &str) -> Option<f64> {
    const POUND: f64 = 0.453_592_37;
    const POUND_FORCE: f64 = POUND * 9.80665;
    match name {
        "lb" => Some(POUND),
        "lbf" => Some(POUND_FORCE),
        "ft·lbf" => Some(0.3048 * POUND_FORCE),
        _ => None,
    }
}

units![
    ("m", ["metre", "metres", "meter", "meters"], Length, Length, length::meter),
    ("cm", [], Length, Length, length::centimeter),
    ("mm", [], Length, Length, length::millimeter),
    ("km", [], Length, Length, length::kilometer),
    ("ft", ["foot", "feet", "'"], Length, Length, length::foot),
    ("in", ["inch", "inches", "\""], Length, Length, length::inch),
    ("yd", ["yard", "yards"], Length, Length, length::yard),
    ("mi", ["mile", "miles"], Length, Length, length::mile),
    ("kg", [], Mass, Mass, mass::kilogram),
    ("t", ["tonne", "tonnes"], Mass, Mass, mass::ton),
    ("lb", ["lbs", "pound", "pounds"], Mass, Mass, mass::pound),
    ("s", ["sec", "second", "seconds"], Time, Time, time::second),
    ("ms", [], Time, Time, time::millisecond),
    ("min", [], Time, Time, time::minute),
    ("m/s", ["mps"], Speed, Velocity, velocity::meter_per_second),
    ("km/h", ["kmh", "kph", "km/hr"], Speed, Velocity, velocity::kilometer_per_hour),
    ("mph", ["mi/h"], Speed, Velocity, velocity::mile_per_hour),
    ("ft/s", ["fps"], Speed, Velocity, velocity::foot_per_second),
    ("m/s²", ["m/s^2", "m/s2"], Acceleration, Acceleration, acceleration::meter_per_second_squared),
    ("ft/s²", ["ft/s^2", "ft/s2"], Acceleration, Acceleration, acceleration::foot_per_second_squared),
    ("g", [], Acceleration, Acceleration, acceleration::standard_gravity),
    ("deg", ["°", "degree", "degrees"], Angle, Angle, angle::degree),
    ("rad", ["radian", "radians"], Angle, Angle, angle::radian),
    ("%", ["percent", "per cent"], Ratio, Ratio, ratio::percent),
    ("J", [], Energy, Energy, energy::joule),
    ("kJ", [], Energy, Energy, energy::kilojoule),
    ("ft·lbf", ["ft lbf", "ft*lbf", "ft-lbf", "ft·lb", "ft-lb"], Energy, Energy, energy::foot_pound),
    ("N", [], Force, Force, force::newton),
    ("kN", [], Force, Force, force::kilonewton),
    ("lbf", [], Force, Force, force::pound_force),
];

/// The unit that a person means by `text`. Letters must match in case, since
/// `m` and `M` or `g` and `G` are not the same thing; whole words need not.
pub fn find_unit(text: &str) -> Option<Unit> {
    if text.is_empty() {
        return Some(Unit { name: "", kind: Kind::Ratio, factor: 1.0 });
    }
    rows()
        .into_iter()
        .find(|(names, _)| names.iter().any(|n| *n == text || (n.len() > 3 && n.eq_ignore_ascii_case(text))))
        .map(|(_, unit)| unit)
}

/// Every spelling, for suggestions.
pub fn unit_names() -> Vec<&'static str> {
    rows().into_iter().flat_map(|(names, _)| names.iter().copied()).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Factors that the international yard and pound agreement (1959), the
    /// SI brochure and the CGPM (1901) fix by definition.
    #[test]
    fn factors_are_the_defined_ones() {
        for (name, factor) in [
            ("in", 0.0254),
            ("ft", 0.3048),
            ("yd", 0.9144),
            ("mi", 1609.344),
            ("lb", 0.45359237),
            ("mph", 1609.344 / 3600.0),
            ("km/h", 1.0 / 3.6),
            ("g", 9.80665),
            ("deg", std::f64::consts::PI / 180.0),
            ("lbf", 0.45359237 * 9.80665),
            ("ft·lbf", 0.3048 * 0.45359237 * 9.80665),
            ("%", 0.01),
        ] {
            let unit = find_unit(name).unwrap_or_else(|| panic!("{name} is missing"));
            let error = (unit.factor / factor - 1.0).abs();
            assert!(error < 1e-12, "{name}: {} instead of {factor}", unit.factor);
        }
    }

    #[test]
    fn spellings_are_unique() {
        let mut names = unit_names();
        names.sort_unstable();
        let before = names.len();
        names.dedup();
        assert_eq!(before, names.len());
    }
}
