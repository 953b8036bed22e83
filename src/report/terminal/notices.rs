//! Notices with the place they point at, underlined.

use crate::diag::{Notice, Notices, Severity, SourceFile};
use annotate_snippets::{AnnotationKind, Level, Renderer, Snippet};

/// All notices as text.
pub fn notices(notices: &Notices, files: &[SourceFile], styled: bool) -> String {
    let renderer = if styled { Renderer::styled() } else { Renderer::plain() };
    let mut text = String::new();
    for notice in notices.iter() {
        text.push_str(&one(notice, files, &renderer));
        text.push_str("\n\n");
    }
    text
}

fn one(notice: &Notice, files: &[SourceFile], renderer: &Renderer) -> String {
    let level = match notice.severity {
        Severity::Stop => Level::ERROR.with_name("STOP"),
        Severity::Warn => Level::WARNING.with_name("WARN"),
        Severity::Note => Level::NOTE.with_name("NOTE"),
    };
    let mut group = level
        .primary_title(printable(&notice.message))
        .id(notice.code)
        .elements(std::iter::empty::<annotate_snippets::Padding>());
    let place = notice.place.and_then(|p| Some((p, files.get(p.file.0)?)));
    if let Some((place, file)) = place {
        let range = whole_characters(&file.text, place.start, place.end);
        let mut mark = AnnotationKind::Primary.span(range);
        if let Some(expected) = &notice.expected {
            mark = mark.label(format!("expected: {}", printable(expected)));
        }
        group = group.element(Snippet::source(file.text.as_str()).path(file.name.as_str()).annotation(mark));
    } else if let Some(expected) = &notice.expected {
        group = group.element(Level::NOTE.message(format!("expected: {}", printable(expected))));
    }
    if let Some(hint) = &notice.hint {
        group = group.element(Level::HELP.message(printable(hint)));
    }
    if let Some(answer) = &notice.answer {
        group = group.element(Level::NOTE.with_name("answered").message(printable(answer)));
    }
    renderer.render(&[group]).to_string()
}

/// Widens a byte range to whole characters.
fn whole_characters(text: &str, start: usize, end: usize) -> std::ops::Range<usize> {
    let mut start = start.min(text.len());
    while !text.is_char_boundary(start) {
        start -= 1;
    }
    let mut end = end.clamp(start, text.len());
    while !text.is_char_boundary(end) {
        end += 1;
    }
    start..end
}

/// Control characters would let a file write over the terminal.
fn printable(text: &str) -> String {
    text.chars().map(|c| if c.is_control() && c != '\n' { '\u{fffd}' } else { c }).collect()
}
