//! Directions: bearings, angles, from point to point, along the line.

use super::context::Context;
use super::quantity::{Said, notice_of, opened};
use crate::case::model::{Direction, Entry, Point, PointId};
use crate::case::notation::quantity;
use crate::case::raw::{Item, Section};
use crate::diag::Notice;
use crate::units::Kind;

const WANTED: &str = "\"bearing 45 ± 2 deg (95 %)\" (clockwise from north), \"angle 90 ± 2 deg (95 %)\" \
                      (anticlockwise from east), \"from point 1 to point 2\", \"along the line\" or \"against the line\"";

/// The direction under a key, if the key is there.
pub(super) fn direction(
    section: &Section<'_>,
    key: &str,
    name: &str,
    points: &[Point],
    said: &Said,
    cx: &mut Context,
) -> Option<Direction> {
    let item = section.get(key)?;
    let (value, said) = opened(item, said, cx)?;
    let Some(text) = value.text() else {
        cx.wrong_sort(&value, WANTED);
        return None;
    };
    match text {
        "along the line" => return Some(Direction::Along(value.place())),
        "against the line" => return Some(Direction::Against(value.place())),
        _ => {}
    }
    if let Some(ends) = text.strip_prefix("from ") {
        let Some((from, to)) = ends.split_once(" to ") else {
            cx.notices.push(
                Notice::stop("CF-5", "a direction between two points").at(value.place()).expected(WANTED),
            );
            return None;
        };
        let from = named_point(from, &value, points, cx);
        let to = named_point(to, &value, points, cx);
        return Some(Direction::Points(from?, to?, value.place()));
    }
    angle(text, &value, name, said, cx).map(Direction::Angle)
}

/// `bearing …` or `angle …` as an ISO 8855 angle.
fn angle(text: &str, value: &Item<'_>, name: &str, said: Said, cx: &mut Context) -> Option<Entry> {
    let (rest, bearing) = match (text.strip_prefix("bearing "), text.strip_prefix("angle ")) {
        (Some(rest), _) => (rest, true),
        (_, Some(rest)) => (rest, false),
        _ => {
            let message = "a direction says whether it is a bearing or an angle";
            cx.notices.push(Notice::stop("CF-5", message).at(value.place()).expected(WANTED));
            return None;
        }
    };
    let skip = text.len() - rest.len();
    match quantity(rest, Kind::Angle, cx.spread) {
        Ok(dist) => Some(Entry {
            name: name.into(),
            kind: Kind::Angle,
            // A bearing b, clockwise from north, is the angle 90° − b.
            dist: if bearing { dist.affine(std::f64::consts::FRAC_PI_2, -1.0) } else { dist },
            entered: text.into(),
            source: said.source,
            note: said.note,
            place: value.place(),
            bounds: (f64::NEG_INFINITY, f64::INFINITY),
        }),
        Err(fault) => {
            cx.notices.push(notice_of(fault, value, skip));
            None
        }
    }
}

/// The point under a key, if the key is there.
pub(super) fn point(section: &Section<'_>, key: &str, points: &[Point], cx: &mut Context) -> Option<PointId> {
    let item = section.get(key)?;
    let text = cx.text(&item, "a point, such as \"point 31\"")?;
    named_point(&text, &item, points, cx)
}

/// `point 31` as the point it names.
pub(super) fn named_point(
    text: &str,
    item: &Item<'_>,
    points: &[Point],
    cx: &mut Context,
) -> Option<PointId> {
    let number = text.trim().strip_prefix("point ").map(str::trim);
    let found = number.and_then(|n| points.iter().position(|p| p.number == n)).map(PointId);
    if found.is_none() && !cx.broken.points {
        let names: Vec<String> = points.iter().map(|p| format!("point {}", p.number)).collect();
        let all: Vec<&str> = names.iter().map(String::as_str).collect();
        let shown = if all.len() > 12 { &all[..12] } else { &all[..] };
        cx.unknown_name(item, text, &format!("'{text}' is not a surveyed point"), shown);
    }
    found
}
