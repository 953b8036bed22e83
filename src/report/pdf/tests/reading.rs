//! Tests of reading the text back out of the file.

use super::super::super::document::{Block, Column, Table, Worked};
use super::super::read_back::{joined, rows};
use super::super::render;
use super::super::sample::worked;
use super::{paragraph, read, with};

#[test]
fn worked_rows_come_out_in_order() {
    let line = worked(7);
    let got = read(vec![Block::Worked(line)]);
    let expected = [
        "Title",
        "[7] Speed of vehicle A at the start of slide 7",
        "M-3 sliding with constant drag",
        "vA,7 = √(vend² + 2 · μA · g · dA)",
        "= √(4.2000² + 2 · 0.7200 · 9.80665 · 18.4000)",
        "= 16.6743 m/s",
        "u = 0.62 m/s; 59.7 km/h",
        "vend: line [2]; μA: drag sled, case.toml line 14; dA: scene plan, case.toml line 21",
    ];
    assert_eq!(got, expected);
}

#[test]
fn lopdf_itself_reads_the_rows_too() {
    let pdf = render(&with(vec![Block::Worked(worked(7))])).unwrap();
    let text = lopdf::Document::load_mem(&pdf).unwrap().extract_text(&[1]).unwrap();
    let lines: Vec<&str> = text.lines().map(str::trim_end).collect();
    assert_eq!(lines[..3], ["Head", "Page 1 of 1", "Title"]);
    assert_eq!(lines[6], "= √(4.2000² + 2 · 0.7200 · 9.80665 · 18.4000)");
    assert_eq!(lines.last(), Some(&"Caution in short."));
}

#[test]
fn wrapped_substitution_joins_to_the_original_and_never_splits_a_number() {
    for length in 1..40 {
        let numbers: Vec<String> =
            (0..length).map(|n| format!("{}.{:04}", n * 7 % 100, n * 1237 % 10_000)).collect();
        let substitution = format!("= {}", numbers.join(" + "));
        let line = Worked { substitution: substitution.clone(), ..worked(1) };
        let pdf = render(&with(vec![Block::Worked(line)])).unwrap();
        assert_eq!(joined(&pdf)[4], substitution);
        let starting: Vec<_> = rows(&pdf).into_iter().filter(|row| row.starts_with('=')).collect();
        assert_eq!(starting.len(), 2, "substitution and result only: {starting:?}");
    }
}

#[test]
fn number_in_a_word_wider_than_the_page_stays_whole() {
    let word = vec!["123.4567"; 40].join("·");
    let got = read(vec![paragraph(&word)]);
    assert_eq!(got[1..].concat(), word);
    assert!(
        got[1..].iter().all(|row| row.trim_matches('·').split('·').all(|number| number == "123.4567")),
        "{got:?}"
    );
}

#[test]
fn operators_begin_the_row_and_narrow_cells_break_at_their_spaces() {
    let terms = vec!["1.2345"; 80].join(" − ");
    let got = read(vec![paragraph(&terms)]);
    assert!(got[2..].iter().all(|row| row.starts_with("− ")), "{got:?}");
    let columns = vec![Column::numbers("a", 1.0), Column::words("b", 17.0)];
    let got = read(vec![Block::Table(Table { columns, rows: vec![vec!["± 0.15 m".into()]] })]);
    assert_eq!(got[3..], ["±", "0.15", "m"]);
}

#[test]
fn look_alikes_are_told_apart() {
    let text = "\u{b5} \u{3bc} \u{394} \u{2206} \u{3a9} \u{2126} - \u{2010} ² √ ′ − × · ≥ → ₁ ± ω\u{a0}ψ";
    assert_eq!(read(vec![paragraph(text)])[1], text);
}
