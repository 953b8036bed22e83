//! Reads the printed rows back out of a PDF file; for tests only.
//!
//! In: the bytes of a rendered file. Out: its rows in the order of writing, head
//! and foot left out. Uses nothing of the renderer, so integration tests can
//! take this file in by its path. Never guesses: text is decoded through the
//! file's own ToUnicode tables.

#![allow(dead_code, clippy::expect_used)]

use std::collections::BTreeMap;

use lopdf::content::{Content, Operation};
use lopdf::{Dictionary, Document, Encoding, Object};

/// One printed row.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct PrintedRow {
    /// Page, counted from 1.
    pub page: u32,
    /// Left end of the baseline, points from the paper's left edge.
    pub x: f64,
    /// Height of the baseline, points from the paper's lower edge.
    pub y: f64,
    /// Size of the first characters, points.
    pub size: f64,
    /// Whether the row begins in the bold face.
    pub bold: bool,
    /// Whether it belongs to head or foot.
    pub artifact: bool,
    /// The characters, subscripts without mark; ends with a space if the text
    /// goes on in the next row.
    pub text: String,
}

/// The rows of the text, one entry for each printed row, without trailing spaces.
pub fn rows(pdf: &[u8]) -> Vec<String> {
    text_rows(pdf).iter().map(|row| row.text.trim_end().to_string()).collect()
}

/// As `rows`, with rows that go on in the next one put together again.
pub fn joined(pdf: &[u8]) -> Vec<String> {
    let mut out: Vec<String> = Vec::new();
    for row in text_rows(pdf) {
        match out.last_mut() {
            Some(last) if last.ends_with(' ') => last.push_str(&row.text),
            _ => out.push(row.text),
        }
    }
    out
}

/// The rows of the text with their places; head and foot left out.
pub fn text_rows(pdf: &[u8]) -> Vec<PrintedRow> {
    all_rows(pdf).into_iter().filter(|row| !row.artifact).collect()
}

/// All rows, head and foot of every page included.
pub fn all_rows(pdf: &[u8]) -> Vec<PrintedRow> {
    let file = Document::load_mem(pdf).expect("a PDF file");
    let mut rows = Vec::new();
    for (page, id) in file.get_pages() {
        let fonts = file.get_page_fonts(id).expect("fonts");
        let encodings = fonts.iter().map(|(name, font)| (name.clone(), encoding(font, &file))).collect();
        let mut reader =
            Reader { page, encodings, font: Vec::new(), artifact: false, row: None, rows: Vec::new() };
        let content = Content::decode(&file.get_page_content(id)).expect("operators");
        content.operations.iter().for_each(|operation| reader.take(operation));
        rows.append(&mut reader.rows);
    }
    rows
}

fn encoding<'a>(font: &'a Dictionary, file: &'a Document) -> Encoding<'a> {
    font.get_font_encoding(file).expect("an encoding")
}

struct Reader<'a> {
    page: u32,
    encodings: BTreeMap<Vec<u8>, Encoding<'a>>,
    font: Vec<u8>,
    artifact: bool,
    row: Option<PrintedRow>,
    rows: Vec<PrintedRow>,
}

impl Reader<'_> {
    fn take(&mut self, operation: &Operation) {
        let operands = &operation.operands;
        match operation.operator.as_str() {
            "BMC" => self.artifact = true,
            "EMC" => self.artifact = false,
            "BT" => {
                self.row =
                    Some(PrintedRow { page: self.page, artifact: self.artifact, ..Default::default() });
            }
            "ET" => self.rows.extend(self.row.take()),
            "Tm" => self.place(number(operands, 4), number(operands, 5)),
            "Tf" => self.set_font(operands),
            "Tj" => self.show(operands),
            _ => {}
        }
    }

    fn place(&mut self, x: f64, y: f64) {
        let row = self.row.as_mut().expect("within BT and ET");
        (row.x, row.y) = (x, y);
    }

    fn set_font(&mut self, operands: &[Object]) {
        self.font = operands[0].as_name().expect("a font").to_vec();
        let row = self.row.as_mut().expect("within BT and ET");
        if row.text.is_empty() {
            row.size = number(operands, 1);
            row.bold = self.font == b"FBold";
        }
    }

    fn show(&mut self, operands: &[Object]) {
        let bytes = operands[0].as_str().expect("a string");
        let text = Document::decode_text(&self.encodings[&self.font], bytes).expect("readable text");
        self.row.as_mut().expect("within BT and ET").text.push_str(&text);
    }
}

fn number(operands: &[Object], index: usize) -> f64 {
    f64::from(operands[index].as_float().expect("a number"))
}
