//! Friction tests.

use super::context::Context;
use super::quantity::{self, DRAG, Said, enough, opened, repeats};
use super::stretch;
use crate::case::model::{Braking, Entry, FrictionTest, StandsFor};
use crate::case::raw::{Item, Section};
use crate::diag::Notice;
use crate::stats::Dist;
use crate::units::significant;

/// Least standard uncertainty of 'this vehicle here' (common practice).
const FLOOR_THIS_VEHICLE: f64 = 0.03;

const KEYS: &[&str] = &["surface", "braking", "drag_factor", "stands_for", "grade", "source", "note"];

/// All `[friction_test.…]` tables.
pub(super) fn tests(root: &Section<'_>, cx: &mut Context) -> Vec<FrictionTest> {
    let Some(table) = cx.section(root, "friction_test") else { return Vec::new() };
    let mut tests = Vec::new();
    for (id, _, item) in table.items() {
        if let Some(section) = cx.table(&item, format!("friction_test.{id}")) {
            tests.extend(test(id, &section, cx));
        }
    }
    tests
}

fn test(id: &str, section: &Section<'_>, cx: &mut Context) -> Option<FrictionTest> {
    section.only(KEYS, &mut cx.notices);
    let said = Said::of(section, cx);
    let surface = cx.required_text(section, "surface", "the surface and its state, such as \"lane, dry\"");
    let braking = cx.choice(section, "braking", &[("locked", Braking::Locked), ("abs", Braking::Abs)]);
    if !section.has("braking") {
        section.missing("braking", "\"locked\" or \"abs\"", &mut cx.notices);
    }
    let words = [("this vehicle", StandsFor::ThisVehicle), ("surface mean", StandsFor::SurfaceMean)];
    let stands_for = cx.choice(section, "stands_for", &words);
    if !section.has("stands_for") {
        let message = format!("friction_test.{id} does not say what its drag factor stands for");
        cx.notices.push(
            Notice::stop("B-2", message)
                .at(section.place)
                .expected("stands_for = \"this vehicle\" or \"surface mean\"")
                .hint("one vehicle scatters more than the mean of a surface: s √(1 + 1/n) against s/√n"),
        );
    }
    let grade = stretch::grade(section, &format!("grade of friction test {id}"), &said, cx);
    let name = format!("drag factor of friction test {id} ({})", surface.as_deref().unwrap_or(""));
    let drag = drag_factor(section, &name, stands_for?, &said, cx)?;
    Some(FrictionTest {
        id: id.into(),
        surface: surface?,
        braking: braking?,
        drag,
        stands_for: stands_for?,
        grade,
    })
}

/// The drag factor: stated, or from repeats according to what it stands for.
fn drag_factor(
    section: &Section<'_>,
    name: &str,
    stands_for: StandsFor,
    said: &Said,
    cx: &mut Context,
) -> Option<Entry> {
    let item = section.get(DRAG.key);
    let list =
        item.and_then(|i| opened(i, said, cx)).and_then(|(value, said)| Some((value, value.array()?, said)));
    let Some((value, items, said)) = list else {
        let words = match stands_for {
            StandsFor::ThisVehicle => "stands for this vehicle here",
            StandsFor::SurfaceMean => "stands for the surface's mean",
        };
        return quantity::required(section, DRAG, name, said, cx).map(|entry| remarked(entry, words));
    };
    from_repeats(&value, &items, name, stands_for, said, cx)
}

/// Adds a remark to an entry's own.
fn remarked(mut entry: Entry, words: &str) -> Entry {
    entry.note = Some(entry.note.map_or_else(|| words.to_string(), |note| format!("{note}; {words}")));
    entry
}

fn from_repeats(
    value: &Item<'_>,
    items: &[Item<'_>],
    name: &str,
    stands_for: StandsFor,
    said: Said,
    cx: &mut Context,
) -> Option<Entry> {
    let (readings, entered) = repeats(items, DRAG.kind, cx)?;
    if let Some(bad) = readings.iter().position(|r| !(*r > 0.0 && *r < 2.0)) {
        let place = items.get(bad).map_or(value.place(), Item::place);
        let notice = Notice::stop("CF-8", format!("{name}: {} is not possible", readings[bad]));
        cx.notices.push(notice.at(place).expected("a drag factor between 0 and 2"));
        return None;
    }
    let t = enough(&readings, value.place(), cx)?;
    let (scale, meaning) = match stands_for {
        StandsFor::ThisVehicle => (
            t.of_the_next().max(FLOOR_THIS_VEHICLE),
            "stands for this vehicle here: s √(1 + 1/n), at least 0.03",
        ),
        StandsFor::SurfaceMean => (t.of_the_mean(), "stands for the surface's mean: s/√n"),
    };
    let entry = Entry {
        name: name.into(),
        kind: DRAG.kind,
        dist: Dist::StudentT { mean: t.mean, scale, dof: t.dof() },
        entered,
        source: said.source,
        note: said.note,
        place: value.place(),
        bounds: DRAG.bounds,
    };
    Some(remarked(entry, &format!("mean of {} readings, s = {}; {meaning}", t.n, significant(t.s, 2))))
}
