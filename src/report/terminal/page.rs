//! A document as text.

use super::table;
use crate::report::document::{Block, Document, Figure, Worked, plain};

/// Columns of a page.
const COLUMNS: usize = 100;

/// The whole document; `styled` adds bold headings.
pub fn render(document: &Document, styled: bool) -> String {
    let mut text = String::new();
    heading(&mut text, &document.title, 0, styled);
    for block in &document.blocks {
        match block {
            Block::Heading { level, text: words } => heading(&mut text, words, *level, styled),
            Block::Paragraph(words) => paragraph(&mut text, words, ""),
            Block::Boxed { title, paragraphs } => boxed(&mut text, title, paragraphs),
            Block::Table(table) => text.push_str(&table::render(table, COLUMNS)),
            Block::Worked(line) => worked(&mut text, line),
            Block::Figure(figure) => in_words(&mut text, figure),
            Block::SignOff(roles) => sign_off(&mut text, roles),
        }
    }
    text.push('\n');
    paragraph(&mut text, &document.caution_short, "");
    text
}

fn heading(text: &mut String, words: &str, level: u8, styled: bool) {
    let words = plain(words);
    let (on, off) = if styled { ("\u{1b}[1m", "\u{1b}[0m") } else { ("", "") };
    text.push_str(&format!("\n{on}{words}{off}\n"));
    let line = match level {
        0 => "=",
        1 => "-",
        _ => return,
    };
    text.push_str(&line.repeat(words.chars().count().min(COLUMNS)));
    text.push('\n');
}

fn paragraph(text: &mut String, words: &str, indent: &str) {
    for line in wrapped(&plain(words), COLUMNS - indent.chars().count()) {
        text.push_str(&format!("{indent}{line}\n"));
    }
}

fn boxed(text: &mut String, title: &str, paragraphs: &[String]) {
    text.push_str(&format!("\n| {title}\n"));
    for words in paragraphs {
        paragraph(text, words, "| ");
    }
}

fn worked(text: &mut String, line: &Worked) {
    text.push_str(&format!("\n[{}] {}\n", line.number, plain(&line.title)));
    for (row, indent) in [(&line.formula, "    "), (&line.substitution, "      ")] {
        paragraph(text, row, indent);
    }
    let aside = if line.aside.is_empty() { String::new() } else { format!("    ({})", plain(&line.aside)) };
    text.push_str(&format!("      {}{aside}\n", plain(&line.result)));
    paragraph(text, &line.from, "    from ");
}

fn in_words(text: &mut String, figure: &Figure) {
    text.push('\n');
    for line in &figure.in_words {
        paragraph(text, line, "  ");
    }
    paragraph(text, "(drawn to scale in the PDF: retrodict print)", "  ");
}

fn sign_off(text: &mut String, roles: &[String]) {
    for role in roles {
        text.push_str(&format!(
            "\n{role}: name ____________________  signature ____________________  date __________\n"
        ));
    }
}

/// Breaks text at spaces into lines of at most `columns` characters.
pub(super) fn wrapped(text: &str, columns: usize) -> Vec<String> {
    let columns = columns.max(1);
    let mut lines = Vec::new();
    let mut line = String::new();
    let mut length = 0;
    for word in text.split(' ').filter(|w| !w.is_empty()) {
        let mut word: Vec<char> = word.chars().map(|c| if c.is_control() { '\u{fffd}' } else { c }).collect();
        if length > 0 && length + 1 + word.len() > columns {
            lines.push(std::mem::take(&mut line));
            length = 0;
        }
        while word.len() > columns {
            let rest = word.split_off(columns);
            lines.push(word.into_iter().collect());
            word = rest;
        }
        if length > 0 {
            line.push(' ');
            length += 1;
        }
        length += word.len();
        line.extend(word);
    }
    if length > 0 || lines.is_empty() {
        lines.push(line);
    }
    lines
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn long_words_and_narrow_columns_are_cut() {
        assert_eq!(wrapped("ab cdefgh i", 3), ["ab", "cde", "fgh", "i"]);
        assert_eq!(wrapped("", 10), [""]);
    }
}
