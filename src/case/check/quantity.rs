//! Entries: a quantity with its name, place, source and physical bounds.

use super::context::Context;
use crate::case::model::{Entry, Point};
use crate::case::notation::{Fault, quantity, spread_alone};
use crate::case::raw::{Item, Section};
use crate::diag::{Notice, Place};
use crate::stats::{Dist, TypeA, type_a};
use crate::units::{Kind, System, find_unit, significant};

/// What may stand under a key.
#[derive(Debug, Clone, Copy)]
pub(super) struct Field {
    /// The key.
    pub(super) key: &'static str,
    /// Kind of quantity.
    pub(super) kind: Kind,
    /// Least and greatest value that is physically possible, SI.
    pub(super) bounds: (f64, f64),
    /// Range in which practically all cases lie, SI, for rule U-1.
    pub(super) plausible: (f64, f64),
}

const NO_LIMIT: f64 = f64::INFINITY;
const fn field(key: &'static str, kind: Kind, bounds: (f64, f64), plausible: (f64, f64)) -> Field {
    Field { key, kind, bounds, plausible }
}

// Plausible ranges are common practice: what crashes on roads show.
pub(super) const DISTANCE: Field = field("distance", Kind::Length, (0.0, NO_LIMIT), (0.0, 400.0));
pub(super) const MASS: Field = field("mass", Kind::Mass, (f64::MIN_POSITIVE, NO_LIMIT), (40.0, 60_000.0));
pub(super) const LOAD: Field = field("occupants_and_load", Kind::Mass, (0.0, NO_LIMIT), (0.0, 40_000.0));
pub(super) const DRAG: Field = field("drag_factor", Kind::Ratio, (0.0, NO_LIMIT), (0.02, 1.3));
pub(super) const SHARE: Field = field("braking_share", Kind::Ratio, (0.0, 1.0), (0.0, 1.0));
pub(super) const SPEED: Field = field("speed", Kind::Speed, (0.0, NO_LIMIT), (0.0, 90.0));
pub(super) const RESTITUTION: Field = field("restitution", Kind::Ratio, (0.0, 1.0), (0.0, 1.0));
pub(super) const ENERGY: Field = field("absorbed_energy", Kind::Energy, (0.0, NO_LIMIT), (0.0, 5e6));
pub(super) const GRAVITY: Field = field("gravity", Kind::Acceleration, (9.7, 9.9), (9.7, 9.9));
const EAST: Field = field("east", Kind::Length, (-NO_LIMIT, NO_LIMIT), (-NO_LIMIT, NO_LIMIT));
const NORTH: Field = field("north", Kind::Length, (-NO_LIMIT, NO_LIMIT), (-NO_LIMIT, NO_LIMIT));

/// Texts that belong to an entry.
#[derive(Debug, Clone, Default)]
pub(super) struct Said {
    pub(super) source: Option<String>,
    pub(super) note: Option<String>,
}

impl Said {
    /// Source and note of the surrounding table: they serve every entry in it
    /// that has none of its own.
    pub(super) fn of(section: &Section<'_>, cx: &mut Context) -> Self {
        Said { source: cx.text_of(section, "source"), note: cx.text_of(section, "note") }
    }
}

/// The entry under a field's key, if it is there.
pub(super) fn entry(
    section: &Section<'_>,
    field: Field,
    name: &str,
    said: &Said,
    cx: &mut Context,
) -> Option<Entry> {
    let item = section.get(field.key)?;
    read(&item, field, name, said, cx)
}

/// The entry under a field's key, which must be there.
pub(super) fn required(
    section: &Section<'_>,
    field: Field,
    name: &str,
    said: &Said,
    cx: &mut Context,
) -> Option<Entry> {
    if !section.has(field.key) {
        let what = format!("{} ({})", field.kind.in_words(), field.kind.examples());
        section.missing(field.key, &what, &mut cx.notices);
    }
    entry(section, field, name, said, cx)
}

/// Opens `{ value = …, source = …, note = … }`; anything else is the value.
pub(super) fn opened<'a>(item: Item<'a>, said: &Said, cx: &mut Context) -> Option<(Item<'a>, Said)> {
    let Some(table) = item.section("this entry") else { return Some((item, said.clone())) };
    table.only(&["value", "source", "note"], &mut cx.notices);
    let Some(value) = table.get("value") else {
        table.missing("value", "the quantity itself", &mut cx.notices);
        return None;
    };
    let own = Said::of(&table, cx);
    Some((value, Said { source: own.source.or(said.source.clone()), note: own.note.or(said.note.clone()) }))
}

/// Reads one entry.
pub(super) fn read(
    item: &Item<'_>,
    field: Field,
    name: &str,
    said: &Said,
    cx: &mut Context,
) -> Option<Entry> {
    let (value, said) = opened(*item, said, cx)?;
    let (dist, entered) = match value.array() {
        Some(items) => {
            let (readings, entered) = repeats(&items, field.kind, cx)?;
            let t = enough(&readings, value.place(), cx)?;
            (Dist::StudentT { mean: t.mean, scale: t.of_the_mean(), dof: t.dof() }, entered)
        }
        None => {
            let text = typed(&value, field.kind, cx)?;
            let result = quantity(&text, field.kind, cx.spread);
            (settled(result, &value, cx)?, text)
        }
    };
    let entry = Entry {
        name: name.into(),
        kind: field.kind,
        dist,
        entered,
        source: said.source,
        note: said.note,
        place: value.place(),
        bounds: field.bounds,
    };
    possible(&entry, cx).then(|| plausible(entry, field, cx))
}

/// The text of a quantity, a bare number included.
pub(super) fn typed(value: &Item<'_>, kind: Kind, cx: &mut Context) -> Option<String> {
    let text = value.text_or_number();
    if text.is_none() {
        let wanted = format!("a quantity in quotation marks: {} ({})", kind.in_words(), kind.examples());
        cx.wrong_sort(value, &wanted);
    }
    text.map(|t| t.trim().to_string())
}

/// Turns a notation fault into a notice at its very place.
pub(super) fn settled<T>(result: Result<T, Fault>, value: &Item<'_>, cx: &mut Context) -> Option<T> {
    result.map_err(|fault| cx.notices.push(notice_of(fault, value, 0))).ok()
}

/// A notation fault as a notice; `skip` bytes of the text come before it.
pub(super) fn notice_of(fault: Fault, value: &Item<'_>, skip: usize) -> Notice {
    // The fault counts in the trimmed text.
    let blank = value.text().map_or(0, |t| t.len() - t.trim_start().len());
    let at = |p: Place| p.part(skip + blank + fault.from, skip + blank + fault.to);
    let place = value.text_place().map_or_else(|| value.place(), at);
    let mut notice = Notice::stop(fault.code, fault.message).at(place).expected(fault.expected);
    notice.hint = fault.hint;
    notice
}

/// Readings of a list and how they were typed.
pub(super) fn repeats(items: &[Item<'_>], kind: Kind, cx: &mut Context) -> Option<(Vec<f64>, String)> {
    let mut readings = Vec::new();
    let mut typed_texts = Vec::new();
    for item in items {
        let text = typed(item, kind, cx)?;
        match settled(quantity(&text, kind, None), item, cx)? {
            Dist::Exact(value) => readings.push(value),
            _ => {
                cx.wrong_sort(item, "a plain reading: repeats carry their uncertainty in their scatter");
                return None;
            }
        }
        typed_texts.push(text);
    }
    Some((readings, format!("[{}]", typed_texts.join(", "))))
}

/// Type A evaluation of at least four readings (rule B-3).
pub(super) fn enough(readings: &[f64], place: Place, cx: &mut Context) -> Option<TypeA> {
    let result = type_a(readings).filter(|t| t.n >= 4);
    if result.is_some_and(|t| t.s == 0.0) {
        let message =
            "all readings are the same: they tell how finely was read, not how the quantity scatters";
        let notice = Notice::stop("B-3", message).at(place).expected("readings that differ");
        cx.notices.push(notice.hint("give the mean with an uncertainty of your own: \"0.72 ± 0.06 (95 %)\""));
        return None;
    }
    if result.is_none() {
        let message = format!(
            "{} reading(s): too few to take an uncertainty from their scatter (Student's t is 12.7 for two, 4.3 for three)",
            readings.len()
        );
        cx.notices.push(
            Notice::stop("B-3", message)
                .at(place)
                .expected("four readings or more")
                .hint("give the mean with an uncertainty of your own: \"0.72 ± 0.06 (95 %)\""),
        );
    }
    result
}

/// Refuses estimates that are physically impossible.
fn possible(entry: &Entry, cx: &mut Context) -> bool {
    let value = entry.dist.estimate();
    let (lo, hi) = entry.bounds;
    if value >= lo && value <= hi {
        return true;
    }
    let (unit, _) = System::Metric.unit(entry.kind);
    let show = |v: f64| {
        format!("{} {unit}", significant(System::Metric.number(entry.kind, v), 4)).trim_end().to_string()
    };
    let range = match (lo, hi) {
        (lo, hi) if hi.is_infinite() && lo == f64::MIN_POSITIVE => "more than zero".to_string(),
        (_, hi) if hi.is_infinite() => format!("{} or more", show(lo)),
        (lo, hi) => format!("from {} to {}", show(lo), show(hi)),
    };
    cx.notices.push(
        Notice::stop("CF-8", format!("{}: {} is not possible", entry.name, entry.entered))
            .at(entry.place)
            .expected(range.trim().to_string()),
    );
    false
}

/// Rule U-1: a value outside what crashes show that would lie inside after a
/// common slip of units.
fn plausible(entry: Entry, field: Field, cx: &mut Context) -> Entry {
    let value = entry.dist.estimate();
    let (lo, hi) = field.plausible;
    let inside = |v: f64| v >= lo && v <= hi;
    if inside(value) {
        return entry;
    }
    let slips: &[(&str, f64)] = match field.kind {
        Kind::Length => {
            &[("m for ft", 3.280_84), ("m for cm", 100.0), ("m for mm", 1000.0), ("cm for in", 2.54)]
        }
        Kind::Mass => &[("kg for lb", 2.204_62), ("kg for t", 1000.0)],
        Kind::Speed => &[("m/s for km/h", 3.6), ("km/h for mph", 1.609_344)],
        Kind::Ratio => &[("a ratio for percent", 100.0)],
        Kind::Energy => &[("J for kJ", 1000.0)],
        _ => &[],
    };
    let slip = slips.iter().find(|(_, factor)| inside(value / factor) || inside(value * factor));
    let unit = find_unit(field.kind.si_unit()).map_or("", |u| u.name);
    let mut notice = Notice::warn(
        "U-1",
        format!("{}: {} {unit} lies outside what crashes show", entry.name, significant(value, 4)),
    )
    .at(entry.place);
    notice.hint = slip.map(|(words, _)| format!("was the unit mistaken ({words}, or the other way round)?"));
    cx.notices.push(notice);
    entry
}

/// The standard uncertainty under a key: `± 0.05 m (1 sd)`.
pub(super) fn spread(section: &Section<'_>, key: &str, cx: &mut Context) -> Option<Dist> {
    let Some(item) = section.get(key) else {
        section.missing(key, "\"± 0.05 m (1 sd)\", the uncertainty of each coordinate", &mut cx.notices);
        return None;
    };
    let text = typed(&item, Kind::Length, cx)?;
    settled(spread_alone(&text, Kind::Length, cx.spread), &item, cx)
}

/// A point typed into the case file.
pub(super) fn point(number: &str, section: &Section<'_>, cx: &mut Context) -> Option<Point> {
    let said = Said::of(section, cx);
    let code = cx.text_of(section, "code").map_or(String::new(), |c| format!(" ({c})"));
    let east = required(section, EAST, &format!("point {number}{code}, east"), &said, cx);
    let north = required(section, NORTH, &format!("point {number}{code}, north"), &said, cx);
    Some(Point { number: number.into(), east: east?, north: north? })
}
