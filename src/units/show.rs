//! Values in the reader's units.

use super::{Kind, find_unit, fixed};
use serde::{Deserialize, Serialize};

/// The system of units in which results are printed.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum System {
    /// km/h, m, kg, kJ.
    #[default]
    Metric,
    /// mph, ft, lb, ft·lbf.
    Us,
}

impl System {
    /// The unit for a kind and how many SI units are in one of it.
    pub fn unit(self, kind: Kind) -> (&'static str, f64) {
        let name = match (kind, self) {
            (Kind::Angle, _) => return ("°", find_unit("deg").map_or(1.0, |u| u.factor)),
            (Kind::Ratio, _) => return ("", 1.0),
            (Kind::Speed, System::Metric) => "km/h",
            (Kind::Speed, System::Us) => "mph",
            (Kind::Length, System::Us) => "ft",
            (Kind::Mass, System::Us) => "lb",
            (Kind::Energy, System::Metric) => "kJ",
            (Kind::Energy, System::Us) => "ft·lbf",
            (Kind::Acceleration, System::Us) => "ft/s²",
            _ => return (kind.si_unit(), 1.0),
        };
        (name, find_unit(name).map_or(1.0, |u| u.factor))
    }

    /// An SI value in these units, without the unit's name.
    pub fn number(self, kind: Kind, value: f64) -> f64 {
        value / self.unit(kind).1
    }
}

/// An SI value with its unit, angles in degrees: how worked lines write it.
pub fn si(kind: Kind, value: f64, decimals: i32) -> String {
    match kind {
        Kind::Angle => format!("{}°", fixed(System::Metric.number(kind, value), decimals)),
        Kind::Ratio => fixed(value, decimals),
        _ => format!("{} {}", fixed(value, decimals), kind.si_unit()),
    }
}

/// An ISO 8855 angle (radians, counter-clockwise from east) as a direction of
/// the compass in words.
pub fn compass(angle: f64) -> &'static str {
    const NAMES: [&str; 8] =
        ["east", "north-east", "north", "north-west", "west", "south-west", "south", "south-east"];
    let eighth = libm::round(angle / std::f64::consts::FRAC_PI_4);
    let index = eighth.rem_euclid(8.0) as usize;
    NAMES.get(index).copied().unwrap_or("east")
}

/// A direction of force (radians, clockwise from straight ahead, as SAE J224
/// counts) in words and by the clock: `30° right of ahead, 1 o'clock`.
pub fn clock(pdof: f64) -> String {
    let degrees = System::Metric.number(Kind::Angle, pdof);
    let wrapped = degrees - 360.0 * libm::ceil((degrees - 180.0) / 360.0);
    let hour = match libm::round(wrapped / 30.0).rem_euclid(12.0) as i32 {
        0 => 12,
        other => other,
    };
    let size = fixed(wrapped.abs(), 0);
    let side = match () {
        () if size == "0" => "straight from ahead".to_string(),
        () if size == "180" => "straight from behind".to_string(),
        () if wrapped > 0.0 => format!("{size}° right of ahead"),
        () => format!("{size}° left of ahead"),
    };
    format!("{side}, {hour} o'clock")
}

#[cfg(test)]
mod tests {
    use super::*;

    fn rad(degrees: f64) -> f64 {
        degrees * std::f64::consts::PI / 180.0
    }

    #[test]
    fn the_clock_counts_clockwise_from_ahead() {
        assert_eq!(clock(rad(30.0)), "30° right of ahead, 1 o'clock");
        assert_eq!(clock(rad(-60.0)), "60° left of ahead, 10 o'clock");
        assert_eq!(clock(rad(0.2)), "straight from ahead, 12 o'clock");
        assert_eq!(clock(rad(-179.9)), "straight from behind, 6 o'clock");
        assert_eq!(clock(rad(190.0)), "170° left of ahead, 6 o'clock");
    }

    #[test]
    fn the_compass_counts_from_east_anticlockwise() {
        assert_eq!(compass(rad(88.0)), "north");
        assert_eq!(compass(rad(-45.0)), "south-east");
        assert_eq!(compass(rad(359.0)), "east");
    }
}
