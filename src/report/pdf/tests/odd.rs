//! Tests of what nobody should write: empty, endless, or not a number.

use super::super::super::document::{Block, Column, Document, Figure, Mark, Stroke, Table, Worked};
use super::super::read_back::rows;
use super::super::sample::{figure, worked};
use super::super::{PdfError, render};
use super::{assert_inside, assert_no_overhang, paragraph, read, with};

#[test]
fn empty_things_do_not_matter() {
    let none = Table { columns: Vec::new(), rows: Vec::new() };
    let blank = Worked {
        number: 0,
        title: String::new(),
        method: String::new(),
        formula: String::new(),
        substitution: String::new(),
        result: String::new(),
        aside: String::new(),
        from: String::new(),
    };
    let point =
        Figure { caption: String::new(), width: 0.0, height: 0.0, marks: Vec::new(), in_words: Vec::new() };
    let blocks = vec![
        Block::Table(none.clone()),
        Block::Table(Table { columns: Vec::new(), rows: vec![Vec::new(), vec!["a".into()]] }),
        Block::Table(Table {
            columns: vec![Column::words("", f64::NAN), Column::words("b", -1.0)],
            rows: Vec::new(),
        }),
        Block::Worked(blank),
        Block::Figure(point),
        Block::SignOff(Vec::new()),
        Block::SignOff(vec![String::new()]),
        Block::Boxed { title: String::new(), paragraphs: Vec::new() },
        Block::Heading { level: 0, text: String::new() },
        paragraph(" \n "),
        Block::Heading { level: 9, text: "_{".into() },
    ];
    for block in blocks.clone() {
        render(&with(vec![block])).unwrap();
    }
    assert_inside(&render(&with(blocks)).unwrap());
    assert_eq!(rows(&render(&Document::default()).unwrap()), Vec::<String>::new());
}

#[test]
fn very_long_words_and_rows_stay_inside() {
    let word = "W".repeat(6000);
    let sub = format!("x_{{{word}}}");
    let table = Table {
        columns: vec![
            Column::words("Narrow", 1.0),
            Column::numbers("Number", 1.0),
            Column::words(&word, 8.0),
        ],
        rows: vec![vec![word.clone(), "1".into(), sub.clone(), "beyond the head".into()]; 2],
    };
    let boxed = Block::Boxed { title: word.clone(), paragraphs: vec![word.clone(), sub.clone()] };
    let line = Worked { title: word.clone(), formula: sub.clone(), method: word.clone(), ..worked(3) };
    let document = with(vec![
        paragraph(&word),
        Block::Heading { level: 1, text: word.clone() },
        Block::Table(table),
        boxed,
        Block::Worked(line),
        Block::SignOff(vec![word.clone(), "Checked by".into()]),
    ]);
    let pdf = render(&document).unwrap();
    assert_inside(&pdf);
    assert_no_overhang(&document);
    let letters: usize = rows(&pdf).iter().map(|row| row.matches('W').count()).sum();
    assert!(letters >= 6000 * 12, "{letters}");
}

#[test]
fn many_columns_still_show_every_cell() {
    let cells: Vec<String> = (0..60).map(|n| format!("{n}")).collect();
    let got = read(vec![Block::Table(Table { columns: Vec::new(), rows: vec![cells] })]);
    assert_eq!(got[1..].concat(), (0..60).map(|n| n.to_string()).collect::<String>());
}

#[test]
fn a_word_of_a_hundred_pages_is_printed() {
    let pdf = render(&with(vec![paragraph(&"W".repeat(300_000))])).unwrap();
    assert_eq!(rows(&pdf)[1..].concat().len(), 300_000);
}

#[test]
fn figure_larger_than_the_page_is_shrunk() {
    let mut large = figure();
    (large.width, large.height) = (400.0, 900.0);
    let stroke = Stroke { width: 1.0, grey: 0.0, dashed: false };
    large.marks.push(Mark::Line { from: (-50.0, -50.0), to: (500.0, 950.0), stroke });
    large.marks.push(Mark::Label { at: (400.0, 900.0), anchor: 1, size: 30.0, text: "corner".into() });
    let document = with(vec![Block::Figure(large)]);
    assert_no_overhang(&document);
    let pdf = render(&document).unwrap();
    assert_inside(&pdf);
    assert!(rows(&pdf).iter().any(|row| row == "corner"));
}

#[test]
fn drawing_with_no_number_is_refused() {
    for bad in [f64::NAN, f64::INFINITY, 1e300] {
        let mut drawing = figure();
        drawing.marks.push(Mark::Label { at: (0.0, bad), anchor: 0, size: 8.0, text: "x".into() });
        let error = render(&with(vec![Block::Figure(drawing)])).unwrap_err();
        assert!(matches!(error, PdfError::Drawing { .. }), "{error}");
    }
}

#[test]
fn endless_caution_is_refused() {
    let document = Document { caution_short: "Take care. ".repeat(1000), ..with(Vec::new()) };
    assert_eq!(render(&document), Err(PdfError::HeadAndFoot));
}
