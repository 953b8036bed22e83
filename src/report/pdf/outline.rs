//! The file's outline: one entry for each section.
//!
//! In: titles with page and height. Out: the outline's objects in the file.
//! Never nests, never sorts: entries keep the order of the document.

use lopdf::{Dictionary, Document, Object, ObjectId, StringFormat};

/// An entry of the outline.
#[derive(Debug, Clone, PartialEq)]
pub struct Entry {
    /// The words.
    pub title: String,
    /// The page, counted from 0.
    pub page: usize,
    /// Height on the page, points from the paper's lower edge.
    pub top: f64,
}

/// Text as PDF writes it outside pages.
pub fn text_string(text: &str) -> Object {
    let mut bytes = vec![0xFE, 0xFF];
    bytes.extend(text.encode_utf16().flat_map(u16::to_be_bytes));
    Object::String(bytes, StringFormat::Hexadecimal)
}

/// Adds the outline; gives its object, or none if there are no entries.
pub fn add(file: &mut Document, entries: &[Entry]) -> Option<ObjectId> {
    let pages: Vec<ObjectId> = file.get_pages().into_values().collect();
    let known: Vec<(&Entry, ObjectId)> =
        entries.iter().filter_map(|e| pages.get(e.page).map(|id| (e, *id))).collect();
    let root = file.new_object_id();
    let ids: Vec<ObjectId> = known.iter().map(|_| file.new_object_id()).collect();
    let (first, last) = (*ids.first()?, *ids.last()?);
    for (index, ((entry, page), id)) in known.iter().zip(&ids).enumerate() {
        let mut item = item(entry, *page, root);
        if let Some(before) = index.checked_sub(1).and_then(|i| ids.get(i)) {
            item.set("Prev", Object::Reference(*before));
        }
        if let Some(after) = ids.get(index + 1) {
            item.set("Next", Object::Reference(*after));
        }
        file.objects.insert(*id, Object::Dictionary(item));
    }
    let mut outlines = Dictionary::new();
    outlines.set("Type", Object::Name(b"Outlines".to_vec()));
    outlines.set("Count", Object::Integer(i64::try_from(ids.len()).unwrap_or(i64::MAX)));
    outlines.set("First", Object::Reference(first));
    outlines.set("Last", Object::Reference(last));
    file.objects.insert(root, Object::Dictionary(outlines));
    Some(root)
}

fn item(entry: &Entry, page: ObjectId, parent: ObjectId) -> Dictionary {
    let height = Object::Real(entry.top.round() as f32);
    let goal =
        vec![Object::Reference(page), Object::Name(b"XYZ".to_vec()), Object::Null, height, Object::Null];
    let mut item = Dictionary::new();
    item.set("Title", text_string(&entry.title));
    item.set("Parent", Object::Reference(parent));
    item.set("Dest", Object::Array(goal));
    item
}
