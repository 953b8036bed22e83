//! Stretches of travel: length, drag, grade.

use super::context::Context;
use super::direction::point;
use super::phase::Scope;
use super::quantity::{self, DISTANCE, DRAG, SHARE, Said, notice_of, opened};
use crate::case::model::{Drag, Entry, PointId, Stretch, StretchLength, TestId};
use crate::case::notation::{Fault, quantity as read_quantity, steepness};
use crate::case::raw::{Item, Section};
use crate::diag::Notice;
use crate::stats::Dist;
use crate::units::Kind;

const KEYS: &[&str] = &[
    "distance",
    "from",
    "to",
    "friction",
    "wheels",
    "braking_share",
    "braking_share_reason",
    "drag_factor",
    "includes_grade",
    "grade",
    "crest",
    "source",
    "note",
];

/// Reads one stretch. `what` names it for people, `path` is the phase's path.
pub(super) fn stretch(
    section: &Section<'_>,
    what: &str,
    path: &[PointId],
    scope: &Scope<'_>,
    cx: &mut Context,
) -> Option<Stretch> {
    section.only(KEYS, &mut cx.notices);
    let said = Said::of(section, cx);
    let grade = grade(section, &format!("grade, {what}"), &said, cx);
    if !section.has("grade") && !section.has("includes_grade") {
        let message = format!("{what}: no grade is entered, so it is taken as level");
        cx.notices.push(
            Notice::note("D-2", message).at(section.place).hint("say grade = \"level\" if it was measured"),
        );
    }
    let length = length(section, what, path, scope, &said, cx);
    let drag = drag(section, what, grade.is_some(), scope, &said, cx);
    let crest = cx.flag(section, "crest").unwrap_or(false);
    Some(Stretch { length: length?, drag: drag?, grade, crest, place: section.place })
}

fn length(
    section: &Section<'_>,
    what: &str,
    path: &[PointId],
    scope: &Scope<'_>,
    said: &Said,
    cx: &mut Context,
) -> Option<StretchLength> {
    if section.has("distance") {
        return quantity::entry(section, DISTANCE, &format!("distance, {what}"), said, cx)
            .map(StretchLength::Entered);
    }
    let last = path.len().saturating_sub(1);
    let mut end_of = |key: &str, otherwise: usize| match point(section, key, scope.points, cx) {
        Some(id) => path.iter().position(|p| *p == id).ok_or(()),
        None => Ok(otherwise),
    };
    match (end_of("from", 0), end_of("to", last)) {
        (Ok(from), Ok(to)) if from < to => Some(StretchLength::AlongPath(from, to)),
        _ if cx.broken.points => None,
        _ => {
            let message = if section.has("from") || section.has("to") {
                format!("{what}: from and to are not points of this unit's path, in its order")
            } else {
                format!("{what}: no length")
            };
            cx.notices.push(
                Notice::stop("CF-3", message)
                    .at(section.place)
                    .expected("distance = \"12.4 ± 0.3 m (95 %)\", or from and to: points of the unit's path, in order")
                    .hint("with neither, the whole path from separation to rest is taken"),
            );
            None
        }
    }
}

fn drag(
    section: &Section<'_>,
    what: &str,
    graded: bool,
    scope: &Scope<'_>,
    said: &Said,
    cx: &mut Context,
) -> Option<Drag> {
    match (section.has("friction"), section.has("drag_factor")) {
        (true, false) => friction(section, what, scope, said, cx),
        (false, true) => stated(section, what, graded, said, cx),
        (both, _) => {
            let message =
                if both { "friction and drag_factor at once" } else { "nothing says what slowed the unit" };
            cx.notices.push(Notice::stop("CF-3", format!("{what}: {message}")).at(section.place).expected(
                "friction = the name of a friction test, or drag_factor = a value for this stretch",
            ));
            None
        }
    }
}

fn friction(
    section: &Section<'_>,
    what: &str,
    scope: &Scope<'_>,
    said: &Said,
    cx: &mut Context,
) -> Option<Drag> {
    let item = section.get("friction")?;
    let name = cx.text(&item, "the name of a friction test")?;
    let test = scope.tests.iter().position(|t| t.id == name).map(TestId);
    if test.is_none() && !cx.broken.tests {
        let known: Vec<&str> = scope.tests.iter().map(|t| t.id.as_str()).collect();
        cx.unknown_name(&item, &name, &format!("'{name}' is not a friction test of this case"), &known);
    }
    if let Some(item) = section.get("includes_grade") {
        let notice = Notice::stop("CF-2", "includes_grade belongs to a stated drag_factor");
        cx.notices.push(notice.at(item.place()).expected("leave it out: friction never includes the grade"));
    }
    let share = share(section, what, said, cx);
    Some(Drag::Friction { test: test?, share: share? })
}

/// The share of the friction that was used: from the wheels' state, or stated
/// with its reason.
fn share(section: &Section<'_>, what: &str, said: &Said, cx: &mut Context) -> Option<Entry> {
    let name = format!("braking share, {what}");
    match (section.get("wheels"), section.has("braking_share")) {
        (Some(item), false) => {
            let words = [("all locked", 1.0), ("abs", 1.0), ("sliding sideways", 1.0)];
            let value = cx.choice(section, "wheels", &words)?;
            Some(Entry {
                name,
                kind: Kind::Ratio,
                dist: Dist::Exact(value),
                entered: item.text().unwrap_or_default().into(),
                source: said.source.clone(),
                note: said.note.clone(),
                place: item.place(),
                bounds: SHARE.bounds,
            })
        }
        (None, true) => {
            let reason = cx.required_text(section, "braking_share_reason", "why this share and not another");
            let mut entry = quantity::entry(section, SHARE, &name, said, cx)?;
            entry.note = reason.or(entry.note);
            Some(entry)
        }
        (wheels, _) => {
            let message = if wheels.is_some() {
                "wheels and braking_share at once"
            } else {
                "the wheels' state is missing"
            };
            cx.notices.push(
                Notice::stop("CF-3", format!("{what}: {message}"))
                    .at(section.place)
                    .expected("wheels = \"all locked\", \"abs\" or \"sliding sideways\"; or braking_share with braking_share_reason"),
            );
            None
        }
    }
}

/// A drag factor stated for the stretch (rule D-1: with a grade beside it, it
/// must say whether the grade is in it).
fn stated(section: &Section<'_>, what: &str, graded: bool, said: &Said, cx: &mut Context) -> Option<Drag> {
    for key in ["wheels", "braking_share", "braking_share_reason"] {
        if let Some(item) = section.get(key) {
            let notice =
                Notice::stop("D-1", format!("{what}: {key} beside a drag factor counts the braking twice"));
            cx.notices.push(
                notice.at(item.place()).expected("leave it out: a drag factor holds the braking already"),
            );
        }
    }
    let includes = cx.flag(section, "includes_grade");
    if graded && includes.is_none() {
        let item = section.get("drag_factor")?;
        let message =
            format!("{what}: a drag factor and a grade, but nothing says whether the grade is in it");
        cx.notices.push(
            Notice::stop("D-1", message)
                .at(item.place())
                .expected("includes_grade = true or false beside it")
                .hint("a drag factor measured on this very slope includes it"),
        );
    }
    let factor = quantity::entry(section, DRAG, &format!("drag factor, {what}"), said, cx)?;
    Some(Drag::Stated { factor, includes_grade: includes.unwrap_or(false) })
}

const GRADE_WANTED: &str =
    "\"level\", \"up 1.5 ± 0.3 % (95 %)\" or \"down 2 ± 1 deg (95 %)\", seen in the direction of travel";

/// The grade of a stretch or a test: `None` for level or not given.
pub(super) fn grade(section: &Section<'_>, name: &str, said: &Said, cx: &mut Context) -> Option<Entry> {
    let item = section.get("grade")?;
    let (value, said) = opened(item, said, cx)?;
    let Some(text) = value.text_or_number() else {
        cx.wrong_sort(&value, GRADE_WANTED);
        return None;
    };
    if text == "level" {
        return None;
    }
    let (sign, rest) = match (text.strip_prefix("up "), text.strip_prefix("down ")) {
        (Some(rest), _) => (1.0, rest),
        (_, Some(rest)) => (-1.0, rest),
        _ => {
            let message = "a grade says up or down in the direction of travel, not + or −";
            cx.notices.push(Notice::stop("D-2", message).at(value.place()).expected(GRADE_WANTED));
            return None;
        }
    };
    let skip = text.len() - rest.len();
    match rise_over_run(rest, cx) {
        Ok(dist) if dist.estimate() < 0.0 => {
            let message = "a grade is up or down; a minus sign beside that can mean either";
            cx.notices.push(Notice::stop("D-2", message).at(value.place()).expected(GRADE_WANTED));
            None
        }
        Ok(dist) => too_steep(make(dist.affine(0.0, sign), name, &text, said, &value), cx),
        Err(fault) => {
            cx.notices.push(notice_of(fault, &value, skip));
            None
        }
    }
}

fn make(dist: Dist, name: &str, text: &str, said: Said, value: &Item<'_>) -> Entry {
    Entry {
        name: name.into(),
        kind: Kind::Ratio,
        dist,
        entered: text.into(),
        source: said.source,
        note: said.note,
        place: value.place(),
        bounds: (f64::NEG_INFINITY, f64::INFINITY),
    }
}

/// Rise over run from percent or degrees; anything else is rule U-3.
fn rise_over_run(text: &str, cx: &Context) -> Result<Dist, Fault> {
    let degrees = text.contains("deg") || text.contains('°') || text.contains("rad");
    let percent = text.replace("(95 %)", "").replace("(95%)", "").contains('%');
    if !degrees && !percent {
        let message = "a grade needs its unit: 5 % and 5 degrees are not the same".to_string();
        let expected = GRADE_WANTED.to_string();
        return Err(Fault { from: 0, to: text.len(), code: "U-3", message, expected, hint: None });
    }
    if percent {
        return steepness(text, cx.spread);
    }
    let angle = read_quantity(text, Kind::Angle, cx.spread)?;
    let tangent = libm::tan(angle.estimate());
    let slope = 1.0 + tangent * tangent;
    Ok(angle.affine(tangent - slope * angle.estimate(), slope))
}

/// Rule U-3: steep grades are flagged, impossible ones refused.
fn too_steep(entry: Entry, cx: &mut Context) -> Option<Entry> {
    let size = entry.dist.estimate().abs();
    if size > 0.35 {
        let message = format!("{}: {:.0} % is steeper than any road", entry.name, size * 100.0);
        let notice = Notice::stop("U-3", message).at(entry.place).expected("at most 35 %");
        cx.notices.push(notice.hint("were degrees meant instead of percent, or the other way round?"));
        return None;
    }
    if size > 0.12 {
        let message = format!("{}: {:.1} % is unusually steep", entry.name, size * 100.0);
        let notice = Notice::warn("U-3", message).at(entry.place);
        cx.notices.push(notice.hint("were degrees meant instead of percent, or the other way round?"));
    }
    Some(entry)
}
