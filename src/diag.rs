//! Notices: what the program has to say about a case, each with its place.
//!
//! In: codes, sentences and byte ranges from the layers above. Out: an ordered
//! collection that knows its worst severity. Never prints, never decides what
//! a rule means.

use serde::Serialize;

/// How a notice bears on the result.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Serialize)]
#[serde(rename_all = "UPPERCASE")]
pub enum Severity {
    /// For the record; nothing is asked of the reader.
    Note,
    /// The result stands with a flag that somebody has to answer.
    Warn,
    /// No result.
    Stop,
}

impl Severity {
    /// The word printed before the message.
    pub fn word(self) -> &'static str {
        match self {
            Severity::Note => "NOTE",
            Severity::Warn => "WARN",
            Severity::Stop => "STOP",
        }
    }
}

/// Which of the case's files a place lies in: 0 is the case file itself.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub struct FileId(pub usize);

/// The case file itself.
pub const CASE_FILE: FileId = FileId(0);

/// A byte range in one of the files of a case.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub struct Place {
    /// The file.
    pub file: FileId,
    /// First byte.
    pub start: usize,
    /// One past the last byte.
    pub end: usize,
}

impl Place {
    /// A range in the case file.
    pub fn in_case(range: std::ops::Range<usize>) -> Self {
        Place { file: CASE_FILE, start: range.start, end: range.end }
    }

    /// The part `from..to` (bytes) of the text that stands at this place.
    /// Parts beyond the end are cut back to it.
    pub fn part(self, from: usize, to: usize) -> Self {
        let start = (self.start + from).min(self.end);
        Place { file: self.file, start, end: (self.start + to).clamp(start, self.end) }
    }
}

/// A file of the case as read, for showing places in it.
#[derive(Debug, Clone)]
pub struct SourceFile {
    /// The name as the user wrote it.
    pub name: String,
    /// The whole text.
    pub text: String,
}

impl SourceFile {
    /// Line and column, both counted from 1, the column in characters.
    pub fn line_column(&self, offset: usize) -> (usize, usize) {
        let mut end = offset.min(self.text.len());
        while !self.text.is_char_boundary(end) {
            end -= 1;
        }
        let before = &self.text[..end];
        let line_start = before.rfind('\n').map_or(0, |at| at + 1);
        (before.matches('\n').count() + 1, before[line_start..].chars().count() + 1)
    }
}

/// One thing the program has to say, with its place.
#[derive(Debug, Clone)]
pub struct Notice {
    /// Stable code, such as `M-1`.
    pub code: &'static str,
    /// How it bears on the result.
    pub severity: Severity,
    /// What is the matter, in a sentence.
    pub message: String,
    /// Where in the case.
    pub place: Option<Place>,
    /// What was expected there: stands under the underlined text.
    pub expected: Option<String>,
    /// What to do about it.
    pub hint: Option<String>,
    /// The analyst's answer to a warning, from the case file.
    pub answer: Option<String>,
}

impl Notice {
    /// A notice without place, expectation or hint.
    pub fn new(severity: Severity, code: &'static str, message: impl Into<String>) -> Self {
        Notice {
            code,
            severity,
            message: message.into(),
            place: None,
            expected: None,
            hint: None,
            answer: None,
        }
    }

    /// A fault that stops the work.
    pub fn stop(code: &'static str, message: impl Into<String>) -> Self {
        Notice::new(Severity::Stop, code, message)
    }

    /// A flag that somebody has to answer.
    pub fn warn(code: &'static str, message: impl Into<String>) -> Self {
        Notice::new(Severity::Warn, code, message)
    }

    /// A remark.
    pub fn note(code: &'static str, message: impl Into<String>) -> Self {
        Notice::new(Severity::Note, code, message)
    }

    /// Adds the place.
    pub fn at(mut self, place: impl Into<Option<Place>>) -> Self {
        self.place = place.into();
        self
    }

    /// Adds what was expected at the place.
    pub fn expected(mut self, text: impl Into<String>) -> Self {
        self.expected = Some(text.into());
        self
    }

    /// Adds what to do.
    pub fn hint(mut self, text: impl Into<String>) -> Self {
        self.hint = Some(text.into());
        self
    }

    /// A warning that nobody has answered.
    pub fn is_open_warning(&self) -> bool {
        self.severity == Severity::Warn && self.answer.is_none()
    }
}

/// All notices of one run.
#[derive(Debug, Clone, Default)]
pub struct Notices(Vec<Notice>);

impl Notices {
    /// Adds one.
    pub fn push(&mut self, notice: Notice) {
        self.0.push(notice);
    }

    /// Adds many.
    pub fn extend(&mut self, more: impl IntoIterator<Item = Notice>) {
        self.0.extend(more);
    }

    /// True when at least one of them stops the work.
    pub fn any_stop(&self) -> bool {
        self.0.iter().any(|n| n.severity == Severity::Stop)
    }

    /// True when at least one warning is unanswered.
    pub fn any_open_warning(&self) -> bool {
        self.0.iter().any(Notice::is_open_warning)
    }

    /// In the order of their places in the case, those without a place last.
    pub fn sorted(mut self) -> Self {
        self.0.sort_by_key(|n| (n.place.is_none(), n.place));
        self
    }

    /// All of them.
    pub fn iter(&self) -> std::slice::Iter<'_, Notice> {
        self.0.iter()
    }

    /// All of them, to be changed.
    pub fn iter_mut(&mut self) -> std::slice::IterMut<'_, Notice> {
        self.0.iter_mut()
    }

    /// How many.
    pub fn len(&self) -> usize {
        self.0.len()
    }

    /// True when there are none.
    pub fn is_empty(&self) -> bool {
        self.0.is_empty()
    }
}

impl IntoIterator for Notices {
    type Item = Notice;
    type IntoIter = std::vec::IntoIter<Notice>;
    fn into_iter(self) -> Self::IntoIter {
        self.0.into_iter()
    }
}

/// The nearest of `known` to a misspelt `word`, if one is near enough to
/// suggest: at most one edit, plus one for every four letters.
pub fn nearest<'a>(word: &str, known: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    let limit = 1 + word.chars().count() / 4;
    known
        .into_iter()
        .map(|k| (strsim::damerau_levenshtein(&word.to_lowercase(), &k.to_lowercase()), k))
        .filter(|(distance, _)| *distance <= limit)
        .min_by_key(|(distance, _)| *distance)
        .map(|(_, k)| k)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn line_and_column_count_characters_and_survive_any_offset() {
        let file = SourceFile { name: "x".into(), text: "a = 1\nμ = \"2 ± 1\"\n".into() };
        assert_eq!(file.line_column(0), (1, 1));
        let at = file.text.find('±').unwrap();
        assert_eq!(file.line_column(at), (2, 8));
        assert_eq!(file.line_column(at + 1), (2, 8));
        assert_eq!(file.line_column(9999), (3, 1));
    }

    #[test]
    fn suggestions_stop_where_words_differ() {
        assert_eq!(nearest("frction", ["friction", "grade"]), Some("friction"));
        assert_eq!(nearest("wheels", ["friction", "grade"]), None);
    }
}
