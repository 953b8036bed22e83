//! The case file as typed: tables and values with their places.
//!
//! The only place that knows the TOML reader.

use crate::diag::{Notice, Notices, Place, nearest};
use std::borrow::Cow;
use toml::Spanned;
use toml::de::{DeTable, DeValue};

/// A table of the file.
#[derive(Clone)]
pub(super) struct Section<'a> {
    table: &'a DeTable<'a>,
    source: &'a str,
    /// Its name, for messages: `unit.A.pre_impact`.
    pub(super) name: String,
    /// Where it stands.
    pub(super) place: Place,
}

/// A value of the file.
#[derive(Clone, Copy)]
pub(super) struct Item<'a> {
    value: &'a Spanned<DeValue<'a>>,
    source: &'a str,
}

/// Parses the file; all its syntax errors become notices.
pub(super) fn parse<'a>(text: &'a str, notices: &mut Notices) -> Spanned<DeTable<'a>> {
    let (table, errors) = DeTable::parse_recoverable(text);
    for error in errors {
        let mut notice =
            Notice::stop("CF-1", format!("the file is not valid TOML: {}", error.message().trim()));
        notice.place = error.span().map(Place::in_case);
        notices.push(notice.expected("see the notation in README.md"));
    }
    table
}

impl<'a> Section<'a> {
    /// The whole file.
    pub(super) fn root(table: &'a Spanned<DeTable<'a>>, source: &'a str) -> Self {
        Section { table: table.get_ref(), source, name: "the case file".into(), place: Place::in_case(0..0) }
    }

    /// The value under a key.
    pub(super) fn get(&self, key: &str) -> Option<Item<'a>> {
        self.table.get(key).map(|value| Item { value, source: self.source })
    }

    /// True when the key is there.
    pub(super) fn has(&self, key: &str) -> bool {
        self.table.get(key).is_some()
    }

    /// Keys and values in the order of the file.
    pub(super) fn items(&self) -> Vec<(&'a str, Place, Item<'a>)> {
        let mut all: Vec<_> = self
            .table
            .iter()
            .map(|(key, value)| {
                (key.get_ref().as_ref(), Place::in_case(key.span()), Item { value, source: self.source })
            })
            .collect();
        all.sort_by_key(|(_, place, _)| place.start);
        all
    }

    /// Reports every key that is not one of `known`.
    pub(super) fn only(&self, known: &[&str], notices: &mut Notices) {
        for (key, _) in self.table.iter() {
            let word = key.get_ref().as_ref();
            if known.contains(&word) {
                continue;
            }
            let mut notice = Notice::stop("CF-2", format!("'{word}' is not a key of {}", self.name))
                .at(Place::in_case(key.span()))
                .expected(format!("one of: {}", known.join(", ")));
            notice.hint = nearest(word, known.iter().copied()).map(|n| format!("did you mean {n}?"));
            notices.push(notice);
        }
    }

    /// Reports a key that must be there and is not.
    pub(super) fn missing(&self, key: &str, what: &str, notices: &mut Notices) {
        notices.push(
            Notice::stop("CF-3", format!("{} lacks {key}", self.name))
                .at(self.place)
                .expected(format!("{key} = {what}")),
        );
    }
}

impl<'a> Item<'a> {
    /// Where it stands.
    pub(super) fn place(&self) -> Place {
        Place::in_case(self.value.span())
    }

    /// Where its text starts: behind the quotation mark, when nothing in the
    /// text is escaped, so that parts of it can be underlined.
    pub(super) fn text_place(&self) -> Option<Place> {
        let (span, text) = (self.value.span(), self.text()?);
        let inner = Place::in_case(span.start + 1..span.end.saturating_sub(1).max(span.start + 1));
        (self.source.get(inner.start..inner.end) == Some(text)).then_some(inner)
    }

    /// The text of a string.
    pub(super) fn text(&self) -> Option<&'a str> {
        match self.value.get_ref() {
            DeValue::String(text) => Some(text.as_ref()),
            _ => None,
        }
    }

    /// The text of a string or of a number as typed.
    pub(super) fn text_or_number(&self) -> Option<Cow<'a, str>> {
        match self.value.get_ref() {
            DeValue::String(text) => Some(Cow::Borrowed(text.as_ref())),
            DeValue::Integer(n) if n.radix() == 10 => Some(Cow::Owned(n.as_str().replace('_', ""))),
            DeValue::Float(n) => Some(Cow::Owned(n.as_str().replace('_', ""))),
            _ => None,
        }
    }

    /// A yes or no.
    pub(super) fn flag(&self) -> Option<bool> {
        match self.value.get_ref() {
            DeValue::Boolean(b) => Some(*b),
            _ => None,
        }
    }

    /// The items of an array.
    pub(super) fn array(&self) -> Option<Vec<Item<'a>>> {
        match self.value.get_ref() {
            DeValue::Array(items) => {
                Some(items.iter().map(|value| Item { value, source: self.source }).collect())
            }
            _ => None,
        }
    }

    /// The table behind it.
    pub(super) fn section(&self, name: impl Into<String>) -> Option<Section<'a>> {
        match self.value.get_ref() {
            DeValue::Table(table) => {
                Some(Section { table, source: self.source, name: name.into(), place: self.place() })
            }
            _ => None,
        }
    }

    /// The value as it is typed.
    pub(super) fn typed(&self) -> String {
        let span = self.value.span();
        self.source.get(span.start..span.end).unwrap_or_default().trim().to_string()
    }

    /// What sort of value it is, in words.
    pub(super) fn sort(&self) -> &'static str {
        match self.value.get_ref() {
            DeValue::String(_) => "a text",
            DeValue::Integer(_) | DeValue::Float(_) => "a number",
            DeValue::Boolean(_) => "true or false",
            DeValue::Datetime(_) => "a date",
            DeValue::Array(_) => "a list",
            DeValue::Table(_) => "a table",
        }
    }
}
