//! Tests of whole files: same bytes, page breaks, refusals.

use super::super::super::document::Block;
use super::super::read_back::{PrintedRow, joined, rows, text_rows};
use super::super::sample::{long_table, sample, worked};
use super::super::{PdfError, render};
use super::{assert_inside, assert_no_overhang, paragraph, with};

#[test]
fn same_document_same_bytes_in_every_thread() {
    let first = render(&sample()).unwrap();
    let others: Vec<_> = (0..4).map(|_| std::thread::spawn(|| render(&sample()).unwrap())).collect();
    for other in others {
        assert!(other.join().unwrap() == first);
    }
    assert!(render(&with(Vec::new())).unwrap() != first);
    if let Ok(path) = std::env::var("RETRODICT_SAMPLE_PDF") {
        std::fs::write(path, first).unwrap();
    }
}

#[test]
fn identifier_comes_from_the_content_and_there_are_no_dates() {
    let open = |pdf: &[u8]| lopdf::Document::load_mem(pdf).unwrap();
    let one = open(&render(&with(vec![paragraph("one")])).unwrap());
    let two = open(&render(&with(vec![paragraph("two")])).unwrap());
    assert_ne!(one.trailer.get(b"ID").unwrap(), two.trailer.get(b"ID").unwrap());
    let info = one.trailer.get(b"Info").and_then(lopdf::Object::as_reference).unwrap();
    let info = one.get_dictionary(info).unwrap();
    let keys: Vec<_> = info.iter().map(|(key, _)| String::from_utf8_lossy(key).into_owned()).collect();
    assert_eq!(keys, ["Title", "Creator"]);
}

#[test]
fn missing_character_is_refused_by_name() {
    let error = render(&with(vec![paragraph("an \u{1F697} in the text")])).unwrap_err();
    assert_eq!(
        error,
        PdfError::MissingCharacter { character: '\u{1F697}', row: "an \u{1F697} in the text".into() }
    );
    assert!(error.to_string().contains("U+1F697"), "{error}");
}

#[test]
fn sample_stays_inside_the_margins_and_loses_nothing() {
    let pdf = render(&sample()).unwrap();
    assert_inside(&pdf);
    assert_no_overhang(&sample());
    let text = joined(&pdf);
    for index in 1..=60 {
        assert!(text.iter().any(|row| *row == format!("Mark no. {index}")), "{index}");
    }
    let heads = rows(&pdf).iter().filter(|row| *row == "Half band").count();
    assert!(heads >= 2, "head repeated: {heads}");
}

#[test]
fn worked_lines_are_not_parted_and_headings_not_left_alone() {
    for filler in 0..30 {
        let mut blocks: Vec<Block> = (0..filler).map(|_| paragraph("A row.")).collect();
        blocks.extend((1..=6).map(|n| Block::Worked(worked(n))));
        blocks.push(Block::Heading { level: 1, text: "Last".into() });
        blocks.push(paragraph("After the heading."));
        let rows = text_rows(&render(&with(blocks)).unwrap());
        let page =
            |start: &str| rows.iter().find(|row| row.text.starts_with(start)).map(|row| row.page).unwrap();
        assert_eq!(page("Last"), page("After the heading."));
        for number in 1..=6 {
            assert_eq!(page(&format!("[{number}]")), page(&format!("= 16.6{number}")));
        }
    }
}

#[test]
fn table_rows_stay_on_one_page() {
    let rows: Vec<PrintedRow> = text_rows(&render(&with(vec![Block::Table(long_table(60))])).unwrap());
    let words =
        "measured by tape along the outer edge of the mark, twice, by two persons; the longer value kept";
    let mut starts = rows.windows(2).filter(|pair| words.starts_with(pair[0].text.trim_end()));
    assert!(starts.clone().count() > 0);
    assert!(starts.all(|pair| pair[0].page == pair[1].page));
}
