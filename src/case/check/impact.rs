//! Impacts, in the order in which they happened.

use super::context::Context;
use super::quantity::{self, ENERGY, Field, RESTITUTION, Said};
use crate::case::model::{Entry, Impact, ImpactMethod, UnitId};
use crate::case::raw::Section;
use crate::diag::{Notice, Place};
use crate::units::Kind;

const KEYS: &[&str] = &["units", "method", "restitution", "absorbed_energy", "delta_v", "source", "note"];

/// All `[[impact]]` tables.
pub(super) fn impacts(root: &Section<'_>, names: &[(String, Place)], cx: &mut Context) -> Vec<Impact> {
    let sections = cx.sections(root, "impact");
    sections.iter().enumerate().filter_map(|(i, s)| impact(i + 1, s, names, cx)).collect()
}

fn impact(
    number: usize,
    section: &Section<'_>,
    names: &[(String, Place)],
    cx: &mut Context,
) -> Option<Impact> {
    section.only(KEYS, &mut cx.notices);
    let said = Said::of(section, cx);
    let units = pair(section, names, cx)?;
    let words = [("momentum", ImpactMethod::Momentum), ("in-line", ImpactMethod::InLine)];
    if !section.has("method") {
        section.missing("method", "\"momentum\" (two directions) or \"in-line\" (one line)", &mut cx.notices);
    }
    let method = cx.choice(section, "method", &words);
    let restitution =
        quantity::entry(section, RESTITUTION, &format!("restitution of impact {number}"), &said, cx);
    let absorbed =
        quantity::entry(section, ENERGY, &format!("energy absorbed in impact {number}"), &said, cx);
    let delta_v = delta_vs(section, units, names, &said, cx);
    Some(Impact {
        units,
        method: method?,
        restitution,
        absorbed_energy: absorbed,
        delta_v,
        place: section.place,
    })
}

fn pair(section: &Section<'_>, names: &[(String, Place)], cx: &mut Context) -> Option<[UnitId; 2]> {
    let Some(item) = section.get("units") else {
        section.missing("units", "[\"A\", \"B\"]", &mut cx.notices);
        return None;
    };
    let Some(items) = item.array().filter(|a| a.len() == 2) else {
        cx.wrong_sort(&item, "a list of the two units that met: [\"A\", \"B\"]");
        return None;
    };
    let known: Vec<&str> = names.iter().map(|(n, _)| n.as_str()).collect();
    let mut found = Vec::new();
    for item in &items {
        let name = cx.text(item, "the name of a unit")?;
        match known.iter().position(|k| *k == name) {
            Some(at) => found.push(UnitId(at)),
            None => cx.unknown_name(item, &name, &format!("'{name}' is not a unit of this case"), &known),
        }
    }
    match found.as_slice() {
        [a, b] if a == b => {
            let notice = Notice::stop("CF-7", "a unit does not collide with itself").at(item.place());
            cx.notices.push(notice.expected("two different units"));
            None
        }
        [a, b] => Some([*a, *b]),
        _ => None,
    }
}

/// `delta_v = { A = "…", B = "…" }`.
fn delta_vs(
    section: &Section<'_>,
    units: [UnitId; 2],
    names: &[(String, Place)],
    said: &Said,
    cx: &mut Context,
) -> [Option<Entry>; 2] {
    let Some(table) = cx.section(section, "delta_v") else { return [None, None] };
    let ids = units.map(|u| names.get(u.0).map_or("", |(n, _)| n.as_str()));
    table.only(&ids, &mut cx.notices);
    ids.map(|id| {
        let item = table.get(id)?;
        let field =
            Field { key: "delta_v", kind: Kind::Speed, bounds: (0.0, f64::INFINITY), plausible: (0.0, 60.0) };
        quantity::read(&item, field, &format!("delta-V of {id}"), said, cx)
    })
}
