//! Units: vehicles and fixed objects.

use super::context::Context;
use super::phase::{Scope, Span, phase};
use super::quantity::{self, LOAD, MASS, Said};
use crate::case::model::{Begin, End, Phase, Unit, UnitId};
use crate::case::raw::Section;
use crate::diag::{Notice, Place};

/// Names of the units in the order of the file, with their places.
pub(super) fn names(root: &Section<'_>, cx: &mut Context) -> Vec<(String, Place)> {
    let Some(table) = cx.section(root, "unit") else {
        root.missing("[unit.A]", "a table for each vehicle or object", &mut cx.notices);
        return Vec::new();
    };
    let mut names = Vec::new();
    for (name, place, _) in table.items() {
        let fine = !name.is_empty()
            && name.len() <= 24
            && name.chars().all(|c| c.is_alphanumeric() || c == '_' || c == '-');
        if !fine {
            let notice = Notice::stop("CF-4", format!("'{name}' cannot name a unit")).at(place);
            cx.notices.push(notice.expected("letters, digits, _ and -, at most 24"));
        }
        names.push((name.to_string(), place));
    }
    names
}

/// All units.
pub(super) fn units(root: &Section<'_>, scope: &Scope<'_>, cx: &mut Context) -> Vec<Unit> {
    // A missing table was reported when the names were read.
    let Some(table) = root.get("unit").and_then(|i| i.section("unit")) else { return Vec::new() };
    let mut units = Vec::new();
    for (index, (id, place, item)) in table.items().into_iter().enumerate() {
        if let Some(section) = cx.table(&item, format!("unit.{id}")) {
            units.push(unit(id, UnitId(index), place, &section, scope, cx));
        }
    }
    units
}

const KEYS: &[&str] = &[
    "label",
    "fixed",
    "mass",
    "occupants_and_load",
    "pre_impact",
    "post_impact",
    "after_impact",
    "to_rest",
    "source",
    "note",
];

fn unit(
    id: &str,
    index: UnitId,
    place: Place,
    section: &Section<'_>,
    scope: &Scope<'_>,
    cx: &mut Context,
) -> Unit {
    section.only(KEYS, &mut cx.notices);
    let said = Said::of(section, cx);
    let struck: Vec<usize> =
        (0..scope.impacts.len()).filter(|i| scope.impacts[*i].units.contains(&index)).collect();
    let fixed = cx.flag(section, "fixed").unwrap_or(false);
    let mass = quantity::entry(section, MASS, &format!("mass of {id}"), &said, cx);
    if mass.is_none() && !fixed && !struck.is_empty() && !section.has("mass") {
        section.missing("mass", "\"1480 ± 15 kg (limits)\"", &mut cx.notices);
    }
    Unit {
        id: id.into(),
        label: cx.text_of(section, "label").unwrap_or_else(|| id.into()),
        fixed,
        mass,
        load: quantity::entry(section, LOAD, &format!("occupants and load of {id}"), &said, cx),
        phases: phases(id, section, &struck, scope, cx),
        place,
    }
}

/// The phases between the unit's impacts, in time.
fn phases(
    id: &str,
    section: &Section<'_>,
    struck: &[usize],
    scope: &Scope<'_>,
    cx: &mut Context,
) -> Vec<Phase> {
    let mut phases = Vec::new();
    let (Some(first), Some(last)) = (struck.first(), struck.last()) else {
        for key in ["pre_impact", "post_impact", "after_impact"] {
            if let Some(item) = section.get(key).filter(|_| !cx.broken.impacts) {
                let notice = Notice::stop("CF-3", format!("{id} has {key}, but no [[impact]] names it"))
                    .at(item.place());
                cx.notices.push(notice.expected("an [[impact]] with this unit, or to_rest for a unit alone"));
            }
        }
        if let Some(alone) = cx.section(section, "to_rest") {
            let span = Span { begin: Begin::Approach, end: End::Rest, words: "to rest" };
            phases.push(phase(&alone, id, span, scope, cx));
        }
        return phases;
    };
    if let Some(item) = section.get("to_rest") {
        let notice = Notice::stop("CF-3", format!("{id} is in an impact; to_rest is for a unit alone"))
            .at(item.place());
        cx.notices.push(notice.expected("pre_impact and post_impact"));
    }
    if let Some(before) = cx.section(section, "pre_impact") {
        let span = Span { begin: Begin::Approach, end: End::Impact(*first), words: "before impact" };
        phases.push(phase(&before, id, span, scope, cx));
    }
    if let Some(between) = cx.section(section, "after_impact") {
        phases.extend(between_impacts(id, &between, struck, scope, cx));
    }
    if let Some(after) = cx.section(section, "post_impact") {
        let span = Span { begin: Begin::Impact(*last), end: End::Rest, words: "after impact" };
        phases.push(phase(&after, id, span, scope, cx));
    }
    phases
}

/// `[unit.A.after_impact.1]`: travel from impact 1 to the unit's next impact.
fn between_impacts(
    id: &str,
    table: &Section<'_>,
    struck: &[usize],
    scope: &Scope<'_>,
    cx: &mut Context,
) -> Vec<Phase> {
    let mut phases = Vec::new();
    for (number, place, item) in table.items() {
        let at = number.parse::<usize>().ok().and_then(|n| struck.iter().position(|i| i + 1 == n));
        let next = at.and_then(|at| Some((*struck.get(at)?, *struck.get(at + 1)?)));
        let (Some((this, next)), Some(section)) =
            (next, cx.table(&item, format!("unit.{id}.after_impact.{number}")))
        else {
            let message =
                format!("after_impact.{number}: {id} has no impact of that number with another one after it");
            let notice = Notice::stop("CF-7", message).at(place);
            cx.notices.push(notice.expected(
                "the number of one of its impacts, in the order of [[impact]]; post_impact for the last",
            ));
            continue;
        };
        let span = Span { begin: Begin::Impact(this), end: End::Impact(next), words: "between impacts" };
        phases.push(phase(&section, id, span, scope, cx));
    }
    phases.sort_by_key(|p| match p.begin {
        Begin::Approach => 0,
        Begin::Impact(i) => i + 1,
    });
    phases
}
