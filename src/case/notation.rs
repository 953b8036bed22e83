//! How a measured quantity is written: `18.4 ± 0.3 m (95 %)` and its kin.
//!
//! | as written | meaning |
//! |---|---|
//! | `18.4 m` | exact |
//! | `18.4 ± 0.3 m (95 %)` | normal, the ± covers 95 % |
//! | `18.4 ± 0.3 m (1 sd)` | normal, one standard deviation |
//! | `18.4 ± 0.3 m (limits)` | rectangular |
//! | `17.9..19.0 m` | rectangular |
//! | `17.9..18.4..19.0 m` | triangular |
//! | `18.4(3) m` | normal, standard uncertainty in the last digit (JCGM 100, 7.2.2) |
//!
//! `+/-` may stand for `±`. A ± without its kind is refused unless the case
//! declares one for the whole file. In: text and the kind expected. Out: a
//! distribution in SI, or a fault with its place in the text. Never guesses.

use super::lexer::{Number, number, trim};
use crate::diag::nearest;
use crate::stats::{Dist, normal_quantile_95};
use crate::units::{Kind, Unit, find_unit, unit_names};

/// What a ± stands for.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Spread {
    /// Covers 95 %.
    Cover95,
    /// One standard deviation.
    OneSd,
    /// Outer limits.
    Limits,
}

impl Spread {
    /// Reads `95 %`, `1 sd` or `limits`.
    pub fn from_words(words: &str) -> Option<Self> {
        match words.replace([' ', '.'], "").as_str() {
            "95%" => Some(Spread::Cover95),
            "1sd" => Some(Spread::OneSd),
            "limits" => Some(Spread::Limits),
            _ => None,
        }
    }

    /// The distribution round `centre` with a ± of `half`.
    pub fn around(self, centre: f64, half: f64) -> Dist {
        if half == 0.0 {
            return Dist::Exact(centre);
        }
        match self {
            Spread::Cover95 => Dist::Normal { mean: centre, sd: half / normal_quantile_95() },
            Spread::OneSd => Dist::Normal { mean: centre, sd: half },
            Spread::Limits => Dist::Rectangular { lo: centre - half, hi: centre + half },
        }
    }
}

/// What is wrong with a quantity, and where in its text (bytes).
#[derive(Debug, Clone, PartialEq)]
pub struct Fault {
    /// First byte of the part that is wrong.
    pub from: usize,
    /// One past its last byte.
    pub to: usize,
    /// Rule it breaks.
    pub code: &'static str,
    /// What is the matter.
    pub message: String,
    /// What was expected there.
    pub expected: String,
    /// What to write instead.
    pub hint: Option<String>,
}

/// Code of a quantity that cannot be read.
pub const UNREADABLE: &str = "CF-5";
/// Code of a unit that is unknown or does not fit.
pub const WRONG_UNIT: &str = "CF-6";
/// Code of a weight where a mass is wanted.
pub const WEIGHT_FOR_MASS: &str = "U-2";
/// Code of a ± without its kind.
pub const BARE_PLUS_MINUS: &str = "B-1";

/// A piece of the text with its place.
#[derive(Debug, Clone, Copy)]
pub(super) struct Piece<'a> {
    pub(super) text: &'a str,
    pub(super) from: usize,
}

impl<'a> Piece<'a> {
    fn to(&self) -> usize {
        self.from + self.text.len()
    }

    fn split_at(&self, at: usize, skip: usize) -> (Piece<'a>, Piece<'a>) {
        let right = Piece { text: &self.text[at + skip..], from: self.from + at + skip };
        (trim(Piece { text: &self.text[..at], from: self.from }), trim(right))
    }

    pub(super) fn fault(
        &self,
        code: &'static str,
        message: impl Into<String>,
        expected: impl Into<String>,
    ) -> Fault {
        let to = self.to().max(self.from + 1);
        Fault { from: self.from, to, code, message: message.into(), expected: expected.into(), hint: None }
    }
}

/// Reads a quantity of the given kind; `default` says what a ± without a kind
/// of its own means, if the case declares that.
pub fn quantity(text: &str, kind: Kind, default: Option<Spread>) -> Result<Dist, Fault> {
    let whole = trim(Piece { text, from: 0 });
    if kind == Kind::Ratio
        && let Some((at, length)) = find_plus_minus(whole.text)
        && whole.text[at + length..].replace("95 %", "").replace("95%", "").contains('%')
        && !whole.text[..at].contains('%')
    {
        let mut fault = whole.fault(
            WRONG_UNIT,
            "% after the ± alone can be a share of the value or points",
            "both in the same unit",
        );
        fault.hint = Some("write 0.42 ± 0.04 (95 %), or 42 ± 4 % as 42 % ± 4 % (95 %)".into());
        return Err(fault);
    }
    in_bounds(written(whole, kind, default)?, whole)
}

/// Reads a grade's steepness, where `1.5 ± 0.3 %` is the usual notation and %
/// belongs to both.
pub(super) fn steepness(text: &str, default: Option<Spread>) -> Result<Dist, Fault> {
    let whole = trim(Piece { text, from: 0 });
    in_bounds(written(whole, Kind::Ratio, default)?, whole)
}

fn in_bounds(dist: Dist, whole: Piece<'_>) -> Result<Dist, Fault> {
    // Finite numbers may still overflow with their unit's factor.
    if dist.estimate().is_finite() && dist.u().is_finite() {
        Ok(dist)
    } else {
        Err(whole.fault(UNREADABLE, "this is larger than any number", "a finite number and its unit"))
    }
}

fn written(whole: Piece<'_>, kind: Kind, default: Option<Spread>) -> Result<Dist, Fault> {
    let (body, tag) = split_tag(whole)?;
    if let Some((at, length)) = find_plus_minus(body.text) {
        let (centre, spread) = body.split_at(at, length);
        return plus_minus(centre, spread, kind, tag.map(|(s, _)| s).or(default), whole);
    }
    if let Some((_, piece)) = tag {
        let message = "this says what a ± means, but there is no ±";
        return Err(piece.fault(UNREADABLE, message, "a ± before it, or nothing here"));
    }
    if body.text.contains("..") {
        return range(body, kind);
    }
    let (number, unit) = number_and_unit(body, kind)?;
    let value = number.value * unit.factor;
    Ok(match number.last_digit {
        Some(sd) => Dist::Normal { mean: value, sd: sd * unit.factor },
        None => Dist::Exact(value),
    })
}

/// Reads a standard uncertainty alone: `± 0.05 m (1 sd)`. Gives the
/// distribution round zero.
pub fn spread_alone(text: &str, kind: Kind, default: Option<Spread>) -> Result<Dist, Fault> {
    let whole = trim(Piece { text, from: 0 });
    let (body, tag) = split_tag(whole)?;
    let Some((0, length)) = find_plus_minus(body.text) else {
        return Err(whole.fault(UNREADABLE, "an uncertainty starts with ±", "such as ± 0.05 m (1 sd)"));
    };
    let (_, spread) = body.split_at(0, length);
    let spread_kind = tag.map(|(s, _)| s).or(default).ok_or_else(|| bare(whole))?;
    let (number, unit) = plain(spread)?;
    let unit = unit_of(unit, kind)?;
    half_width(number.value * unit.factor, spread).map(|half| spread_kind.around(0.0, half))
}

/// Cuts off `(95 %)` and the like; `0.72(3)` is no such tag.
fn split_tag(whole: Piece<'_>) -> Result<(Piece<'_>, Option<(Spread, Piece<'_>)>), Fault> {
    let Some(open) = whole.text.rfind('(') else { return Ok((whole, None)) };
    let attached = whole.text[..open].ends_with(|c: char| c.is_ascii_digit());
    let Some(inside) = whole.text[open + 1..].strip_suffix(')') else {
        if attached {
            return Ok((whole, None));
        }
        let (_, rest) = whole.split_at(open, 0);
        return Err(rest.fault(UNREADABLE, "a bracket is not closed", "(95 %), (1 sd) or (limits)"));
    };
    if attached && inside.chars().all(|c| c.is_ascii_digit()) {
        return Ok((whole, None));
    }
    let (body, tag) = whole.split_at(open, 0);
    match Spread::from_words(inside) {
        Some(spread) => Ok((body, Some((spread, tag)))),
        None => {
            let message = format!("'{inside}' does not say what the ± means");
            Err(tag.fault(BARE_PLUS_MINUS, message, "(95 %), (1 sd) or (limits)"))
        }
    }
}

fn find_plus_minus(text: &str) -> Option<(usize, usize)> {
    ["±", "+/-", "+-"].iter().filter_map(|sign| text.find(sign).map(|at| (at, sign.len()))).min()
}

fn bare(whole: Piece<'_>) -> Fault {
    let mut fault = whole.fault(
        BARE_PLUS_MINUS,
        "a ± without its kind can mean three things",
        "(95 %), (1 sd) or (limits) after it",
    );
    fault.hint = Some("add the kind here, or declare one for the whole file: plus_minus = \"95 %\"".into());
    fault
}

fn half_width(half: f64, piece: Piece<'_>) -> Result<f64, Fault> {
    if half >= 0.0 {
        Ok(half)
    } else {
        Err(piece.fault(UNREADABLE, "a ± is not below zero", "a number from 0 up"))
    }
}

fn plus_minus(
    centre: Piece<'_>,
    spread: Piece<'_>,
    kind: Kind,
    means: Option<Spread>,
    whole: Piece<'_>,
) -> Result<Dist, Fault> {
    let means = means.ok_or_else(|| bare(whole))?;
    let (half, half_unit) = plain(spread)?;
    let (value, value_unit) = plain(centre)?;
    // The unit may stand behind the value, behind the ±, or behind both.
    let written = if half_unit.text.is_empty() { value_unit } else { half_unit };
    let relative = half_unit.text == "%" && kind != Kind::Ratio;
    if relative {
        let unit = unit_of(value_unit, kind)?;
        let value = value.value * unit.factor;
        return half_width(half.value, spread).map(|h| means.around(value, (value * h / 100.0).abs()));
    }
    let unit = unit_of(written, kind)?;
    let own = if value_unit.text.is_empty() { unit } else { unit_of(value_unit, kind)? };
    let half = half_width(half.value * unit.factor, spread)?;
    Ok(means.around(value.value * own.factor, half))
}

fn range(body: Piece<'_>, kind: Kind) -> Result<Dist, Fault> {
    let mut pieces = Vec::new();
    let mut rest = body;
    while let Some(at) = rest.text.find("..") {
        let (left, right) = rest.split_at(at, 2);
        pieces.push(left);
        rest = right;
    }
    let (last, last_unit) = plain(rest)?;
    let unit = unit_of(last_unit, kind)?;
    let mut values = Vec::new();
    for piece in pieces {
        let (value, own) = plain(piece)?;
        let factor = if own.text.is_empty() { unit.factor } else { unit_of(own, kind)?.factor };
        values.push(value.value * factor);
    }
    values.push(last.value * unit.factor);
    let rising = values.windows(2).all(|w| w[0] <= w[1]) && values.first() < values.last();
    match (rising, values.as_slice()) {
        (true, [lo, hi]) => Ok(Dist::Rectangular { lo: *lo, hi: *hi }),
        (true, [lo, mode, hi]) => Ok(Dist::Triangular { lo: *lo, mode: *mode, hi: *hi }),
        (false, [_, _] | [_, _, _]) => {
            Err(body.fault(UNREADABLE, "a range runs from its lower end to its upper", "rising numbers"))
        }
        _ => Err(body.fault(
            UNREADABLE,
            "a range has two numbers, or three with the likeliest in the middle",
            "lo..hi or lo..likeliest..hi",
        )),
    }
}

/// A number without brackets: beside a ± or in a range they would say the
/// uncertainty twice.
fn plain(piece: Piece<'_>) -> Result<(Number, Piece<'_>), Fault> {
    let (value, unit) = number(piece)?;
    match value.last_digit {
        None => Ok((value, unit)),
        Some(_) => Err(piece.fault(
            UNREADABLE,
            "brackets and a ± or a range say the uncertainty twice",
            "one of the two",
        )),
    }
}

fn number_and_unit(piece: Piece<'_>, kind: Kind) -> Result<(Number, Unit), Fault> {
    let (value, rest) = number(piece)?;
    unit_of(rest, kind).map(|unit| (value, unit))
}

/// The unit a piece names, if it is one of the wanted kind.
fn unit_of(piece: Piece<'_>, kind: Kind) -> Result<Unit, Fault> {
    let Some(unit) = find_unit(piece.text) else {
        let mut fault = piece.fault(
            WRONG_UNIT,
            format!("'{}' is not a unit this program knows", piece.text),
            format!("{}: {}", kind.in_words(), kind.examples()),
        );
        fault.hint = nearest(piece.text, unit_names()).map(|n| format!("did you mean {n}?"));
        return Err(fault);
    };
    if unit.kind == kind {
        return Ok(unit);
    }
    Err(misfit(piece, unit, kind))
}

fn misfit(piece: Piece<'_>, unit: Unit, kind: Kind) -> Fault {
    let expected = format!("{}: {}", kind.in_words(), kind.examples());
    if unit.name.is_empty() {
        let mut fault = piece.fault(WRONG_UNIT, "a number without its unit", expected);
        fault.hint = Some("every entry carries its own unit".into());
        return fault;
    }
    let message = format!("{} is {}, not {}", unit.name, unit.kind.in_words(), kind.in_words());
    if kind == Kind::Mass && unit.kind == Kind::Force {
        let mut fault = piece.fault(WEIGHT_FOR_MASS, message, expected);
        fault.hint = Some("give the mass: a weight in N over 9.80665, or lb instead of lbf".into());
        return fault;
    }
    piece.fault(WRONG_UNIT, message, expected)
}
