//! Phases of a unit's travel.

use super::context::Context;
use super::direction::{direction, named_point, point};
use super::quantity::{self, SPEED, Said};
use super::stretch::stretch;
use crate::case::model::{Begin, End, FrictionTest, Impact, Phase, Point, PointId, Stretch, StretchLength};
use crate::case::raw::Section;
use crate::diag::Notice;

/// What a phase may refer to.
pub(super) struct Scope<'a> {
    pub(super) points: &'a [Point],
    pub(super) tests: &'a [FrictionTest],
    pub(super) impacts: &'a [Impact],
}

/// Where a phase stands in time, and how messages call it.
#[derive(Debug, Clone, Copy)]
pub(super) struct Span {
    pub(super) begin: Begin,
    pub(super) end: End,
    pub(super) words: &'static str,
}

const BEFORE: &[&str] = &["direction", "heading", "standing", "speed", "travel", "source", "note"];
const AFTER: &[&str] = &["direction", "separation", "path", "rest", "speed", "travel", "source", "note"];
const ALONE: &[&str] = &["travel", "source", "note"];

/// Reads one phase of a unit.
pub(super) fn phase(
    section: &Section<'_>,
    unit: &str,
    span: Span,
    scope: &Scope<'_>,
    cx: &mut Context,
) -> Phase {
    let keys = match (span.begin, span.end) {
        (Begin::Approach, End::Rest) => ALONE,
        (Begin::Approach, End::Impact(_)) => BEFORE,
        (Begin::Impact(_), _) => AFTER,
    };
    section.only(keys, &mut cx.notices);
    let said = Said::of(section, cx);
    let name = |what: &str| format!("{what} of {unit} {}", span.words);
    let path = path(section, scope, cx);
    let standing = cx.flag(section, "standing").unwrap_or(false);
    let travel: Vec<Stretch> = cx
        .sections(section, "travel")
        .iter()
        .enumerate()
        .filter_map(|(i, s)| {
            stretch(s, &format!("stretch {} of {unit} {}", i + 1, span.words), &path, scope, cx)
        })
        .collect();
    let speed = quantity::entry(section, SPEED, &name("speed"), &said, cx);
    if standing && (speed.is_some() || !travel.is_empty()) {
        let notice =
            Notice::stop("CF-4", format!("{unit} stands {}, yet it has a speed or travel there", span.words));
        cx.notices.push(notice.at(section.place).expected("standing = true alone, or leave it out"));
    }
    if speed.is_some() && !travel.is_empty() && matches!(span.begin, Begin::Impact(_)) {
        let message =
            format!("{unit} has both a speed and a travel {}: one of the two must be left out", span.words);
        let notice = Notice::stop("X-1", message).at(section.place);
        cx.notices.push(notice.expected("speed, or travel from which the speed follows"));
    }
    joined(&travel, &path, section, unit, cx);
    Phase {
        begin: span.begin,
        end: span.end,
        direction: direction(section, "direction", &name("direction"), scope.points, &said, cx),
        heading: direction(section, "heading", &name("heading"), scope.points, &said, cx),
        standing,
        speed,
        path,
        travel,
        place: section.place,
    }
}

/// Separation, path and rest as one list of points.
fn path(section: &Section<'_>, scope: &Scope<'_>, cx: &mut Context) -> Vec<PointId> {
    let mut path = Vec::new();
    path.extend(point(section, "separation", scope.points, cx));
    if let Some(item) = section.get("path") {
        match item.array() {
            Some(items) => {
                for item in items {
                    if let Some(text) = cx.text(&item, "a point, such as \"point 31\"") {
                        path.extend(named_point(&text, &item, scope.points, cx));
                    }
                }
            }
            None => cx.wrong_sort(&item, "a list of points: [\"point 32\", \"point 33\"]"),
        }
    }
    path.extend(point(section, "rest", scope.points, cx));
    let has_separation = section.has("separation");
    if !path.is_empty() && !section.has("rest") && !cx.broken.points {
        let notice = Notice::stop("CF-3", "a path ends at rest, and rest is missing");
        cx.notices.push(notice.at(section.place).expected("rest = \"point …\""));
    }
    if !path.is_empty() && (!has_separation || path.len() < 2) && !cx.broken.points {
        let notice = Notice::stop("CF-3", "a path starts at separation and has at least one more point");
        cx.notices.push(
            notice.at(section.place).expected("separation = \"point …\", path = […], rest = \"point …\""),
        );
    }
    path
}

/// Stretches along the path join each other and cover it: a gap leaves speed
/// out, an overlap counts it twice. Beside stretches with a length of their own
/// only the first may begin at separation and only the last may end at rest.
fn joined(travel: &[Stretch], path: &[PointId], section: &Section<'_>, unit: &str, cx: &mut Context) {
    let last = path.len().saturating_sub(1);
    let mut at = Some(0);
    for (i, stretch) in travel.iter().enumerate() {
        let StretchLength::AlongPath(from, to) = stretch.length else {
            at = None;
            continue;
        };
        let follows = at.is_none_or(|at| at == from) && (i == 0 || from > 0);
        let leaves_room = i + 1 == travel.len() || to < last;
        if !(follows && leaves_room) {
            let message = format!(
                "{unit}: this stretch does not begin where the one before it ends, or leaves no room for the next"
            );
            let notice = Notice::stop("CF-11", message).at(stretch.place);
            cx.notices.push(
                notice.expected(
                    "from = the point at which the stretch before ends; to = where the next begins",
                ),
            );
            return;
        }
        at = Some(to);
    }
    if !travel.is_empty() && !path.is_empty() && at.is_some_and(|at| at != last) {
        let message = format!("{unit}: the stretches end before rest");
        cx.notices.push(
            Notice::stop("CF-11", message).at(section.place).expected("a last stretch up to the rest point"),
        );
    }
}
