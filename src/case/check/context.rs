//! What the checkers share: the notices, the text, the default ±.

use crate::case::notation::Spread;
use crate::case::raw::{Item, Section};
use crate::diag::{Notice, Notices, nearest};

/// State of one check.
#[derive(Debug, Default)]
pub(super) struct Context {
    /// What was found so far.
    pub(super) notices: Notices,
    /// What a ± without its kind means, if the case says so.
    pub(super) spread: Option<Spread>,
    /// Points, tests or impacts were given but could not be read: names that
    /// stand for nothing are then no fault of their own.
    pub(super) broken: Broken,
}

/// Which parts of the case could not be read.
#[derive(Debug, Default)]
pub(super) struct Broken {
    pub(super) points: bool,
    pub(super) tests: bool,
    pub(super) impacts: bool,
}

impl Context {
    /// Reports a value of the wrong sort.
    pub(super) fn wrong_sort(&mut self, item: &Item<'_>, wanted: &str) {
        self.notices.push(
            Notice::stop("CF-4", format!("this is {}, not {wanted}", item.sort()))
                .at(item.place())
                .expected(wanted),
        );
    }

    /// A value that must be a table.
    pub(super) fn table<'a>(&mut self, item: &Item<'a>, name: impl Into<String>) -> Option<Section<'a>> {
        let section = item.section(name);
        if section.is_none() {
            self.wrong_sort(item, "a table");
        }
        section
    }

    /// The table under a key, if the key is there.
    pub(super) fn section<'a>(&mut self, parent: &Section<'a>, key: &str) -> Option<Section<'a>> {
        let item = parent.get(key)?;
        let name = if parent.place.end == 0 { key.to_string() } else { format!("{}.{key}", parent.name) };
        self.table(&item, name)
    }

    /// The tables of a list under a key (`[[key]]`).
    pub(super) fn sections<'a>(&mut self, parent: &Section<'a>, key: &str) -> Vec<Section<'a>> {
        let Some(item) = parent.get(key) else { return Vec::new() };
        let name = if parent.place.end == 0 { key.to_string() } else { format!("{}.{key}", parent.name) };
        match item.array() {
            Some(items) => items
                .iter()
                .enumerate()
                .filter_map(|(i, item)| self.table(item, format!("{name} {}", i + 1)))
                .collect(),
            None => {
                self.wrong_sort(&item, &format!("a list of tables: [[{name}]]"));
                Vec::new()
            }
        }
    }

    /// A value that must be a text.
    pub(super) fn text(&mut self, item: &Item<'_>, wanted: &str) -> Option<String> {
        let text = item.text();
        if text.is_none() {
            self.wrong_sort(item, wanted);
        }
        text.map(str::to_string)
    }

    /// The text under a key, if the key is there.
    pub(super) fn text_of(&mut self, section: &Section<'_>, key: &str) -> Option<String> {
        let item = section.get(key)?;
        self.text(&item, "a text in quotation marks")
    }

    /// The text under a key that must be there.
    pub(super) fn required_text(&mut self, section: &Section<'_>, key: &str, what: &str) -> Option<String> {
        if !section.has(key) {
            section.missing(key, what, &mut self.notices);
        }
        let text = self.text_of(section, key)?;
        if text.trim().is_empty() {
            section.missing(key, what, &mut self.notices);
            return None;
        }
        Some(text)
    }

    /// The yes or no under a key; absent is `None`.
    pub(super) fn flag(&mut self, section: &Section<'_>, key: &str) -> Option<bool> {
        let item = section.get(key)?;
        if item.flag().is_none() {
            self.wrong_sort(&item, "true or false");
        }
        item.flag()
    }

    /// One of several words under a key; anything else is reported.
    pub(super) fn choice<T: Copy>(
        &mut self,
        section: &Section<'_>,
        key: &str,
        words: &[(&str, T)],
    ) -> Option<T> {
        let item = section.get(key)?;
        let text = self.text(&item, "a text in quotation marks")?;
        let found = words.iter().find(|(word, _)| *word == text).map(|(_, value)| *value);
        if found.is_none() {
            let all: Vec<&str> = words.iter().map(|(word, _)| *word).collect();
            self.unknown_name(&item, &text, &format!("'{text}' is not possible for {key}"), &all);
        }
        found
    }

    /// Reports a name that stands for nothing, with the nearest that does.
    pub(super) fn unknown_name(&mut self, item: &Item<'_>, word: &str, message: &str, known: &[&str]) {
        let expected = if known.is_empty() {
            "a name that the case defines; there is none yet".to_string()
        } else {
            format!("one of: {}", known.join(", "))
        };
        let mut notice = Notice::stop("CF-7", message).at(item.place()).expected(expected);
        notice.hint = nearest(word, known.iter().copied()).map(|n| format!("did you mean {n}?"));
        self.notices.push(notice);
    }
}
