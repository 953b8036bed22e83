//! The kinds of quantity the program knows.

/// A kind of quantity. Values are held in its SI unit.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Kind {
    /// metre
    Length,
    /// kilogram
    Mass,
    /// second
    Time,
    /// metre a second
    Speed,
    /// metre a second squared
    Acceleration,
    /// radian, shown in degrees
    Angle,
    /// a pure number
    Ratio,
    /// joule
    Energy,
    /// kilogram metre a second
    Momentum,
    /// newton
    Force,
}

impl Kind {
    /// The unit in which values are held and worked lines are written.
    pub fn si_unit(self) -> &'static str {
        match self {
            Kind::Length => "m",
            Kind::Mass => "kg",
            Kind::Time => "s",
            Kind::Speed => "m/s",
            Kind::Acceleration => "m/s²",
            Kind::Angle => "rad",
            Kind::Ratio => "1",
            Kind::Energy => "J",
            Kind::Momentum => "kg·m/s",
            Kind::Force => "N",
        }
    }

    /// The kind in words, with its article.
    pub fn in_words(self) -> &'static str {
        match self {
            Kind::Length => "a length",
            Kind::Mass => "a mass",
            Kind::Time => "a time",
            Kind::Speed => "a speed",
            Kind::Acceleration => "an acceleration",
            Kind::Angle => "an angle",
            Kind::Ratio => "a pure number",
            Kind::Energy => "an energy",
            Kind::Momentum => "a momentum",
            Kind::Force => "a force",
        }
    }

    /// Units to suggest when one of this kind is expected.
    pub fn examples(self) -> &'static str {
        match self {
            Kind::Length => "m, cm, mm, ft, in",
            Kind::Mass => "kg, t, lb",
            Kind::Time => "s, ms",
            Kind::Speed => "km/h, m/s, mph, ft/s",
            Kind::Acceleration => "m/s², g, ft/s²",
            Kind::Angle => "deg, rad",
            Kind::Ratio => "no unit, or %",
            Kind::Energy => "J, kJ, ft·lbf",
            Kind::Momentum => "kg·m/s",
            Kind::Force => "N, kN, lbf",
        }
    }
}
