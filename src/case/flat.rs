//! A case as a flat list of entries, for comparing two versions of it.
//!
//! In: the text of a case file. Out: every entry's place in the file's tables,
//! in words, with what is typed there. Knows nothing of what entries mean.

use super::raw::{Item, Section, parse};
use crate::diag::Notices;

/// One entry: where it stands (`unit.A.mass`) and what is typed there.
pub type Flat = (String, String);

/// All entries in the order of the file; the first fault if the file cannot be
/// read.
pub fn flat(text: &str) -> Result<Vec<Flat>, String> {
    let mut notices = Notices::default();
    let table = parse(text, &mut notices);
    if let Some(notice) = notices.iter().next() {
        return Err(notice.message.clone());
    }
    let mut entries = Vec::new();
    walk(&Section::root(&table, text), "", &mut entries);
    Ok(entries)
}

fn walk(section: &Section<'_>, path: &str, entries: &mut Vec<Flat>) {
    for (key, _, item) in section.items() {
        let path = if path.is_empty() { key.to_string() } else { format!("{path}.{key}") };
        value(&item, &path, entries);
    }
}

/// Tables and lists of tables are walked; all else is an entry.
fn value(item: &Item<'_>, path: &str, entries: &mut Vec<Flat>) {
    if let Some(section) = item.section("") {
        return walk(&section, path, entries);
    }
    match item.array() {
        Some(items) if items.iter().any(|i| i.section("").is_some()) => {
            for (i, item) in items.iter().enumerate() {
                value(item, &format!("{path} {}", i + 1), entries);
            }
        }
        _ => entries.push((path.to_string(), item.typed())),
    }
}
