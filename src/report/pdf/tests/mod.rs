//! Tests of the whole renderer, and what they share.

mod odd;
mod reading;
mod whole;

use super::super::document::{Block, Document};
use super::fonts::Fonts;
use super::page::{PageFrame, TEXT_WIDTH};
use super::read_back::{all_rows, rows};
use super::strip::Draw;
use super::{blocks, render};

pub fn with(blocks: Vec<Block>) -> Document {
    Document {
        title: "Title".into(),
        running_head: "Head".into(),
        caution_short: "Caution in short.".into(),
        blocks,
    }
}

pub fn read(blocks: Vec<Block>) -> Vec<String> {
    rows(&render(&with(blocks)).unwrap())
}

pub fn paragraph(text: &str) -> Block {
    Block::Paragraph(text.into())
}

/// Every row stays between the margins and between head and foot.
pub fn assert_inside(pdf: &[u8]) {
    let all = all_rows(pdf);
    for row in &all {
        assert!(row.x >= 56.6 && row.x <= 538.6, "{row:?}");
    }
    let outside = |page: u32| all.iter().filter(move |row| row.artifact && row.page == page);
    for row in all.iter().filter(|row| !row.artifact) {
        let foot = outside(row.page).filter(|row| row.y < 400.0).map(|row| row.y).fold(0.0, f64::max);
        let head = outside(row.page).filter(|row| row.y > 400.0).map(|row| row.y).fold(842.0, f64::min);
        assert!(row.y > foot + 15.0 && row.y < head - 12.0, "{row:?}");
    }
}

/// No row is wider than the text, no strip higher than a page.
pub fn assert_no_overhang(document: &Document) {
    let fonts = Fonts::load().unwrap();
    let height = PageFrame::new(&fonts, document).unwrap().body_height();
    for strip in blocks::lay_out(&fonts, document, height).unwrap() {
        assert!(strip.height <= height + 0.01, "{}", strip.height);
        for draw in &strip.draws {
            if let Draw::Text((x, down), row) = draw {
                assert!(x + row.width <= TEXT_WIDTH + 0.01, "{row:?}");
                assert!(*x >= -0.01 && *down <= strip.height + 0.01, "{row:?}");
            }
        }
    }
}
