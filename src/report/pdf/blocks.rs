//! Blocks: title, headings, paragraphs, and the order of all of them.
//!
//! In: a document and the height of a page. Out: its strips, with the white
//! between blocks. Never decides where a page ends.

use super::super::document::{Block, Document, plain};
use super::error::PdfError;
use super::fonts::Fonts;
use super::page::TEXT_WIDTH;
use super::strip::{Draw, Strip, hold_together, no_single_rows, stack};
use super::style::{BODY, HEADING_1, HEADING_2, TITLE};
use super::text::wrap;
use super::{figure, frame, table, worked};

/// The strips of the whole document.
pub fn lay_out(fonts: &Fonts, document: &Document, page_height: f64) -> Result<Vec<Strip>, PdfError> {
    let mut strips = title(fonts, &document.title);
    let mut above = TITLE_AFTER;
    for block in &document.blocks {
        let (before, after) = white(block);
        let mut more = block_strips(fonts, block, page_height)?;
        if let Some(first) = more.first_mut() {
            first.before = f64::max(above, before);
            above = after;
        }
        strips.append(&mut more);
    }
    Ok(strips)
}

const TITLE_AFTER: f64 = 10.0;

/// White above and below a block, points.
fn white(block: &Block) -> (f64, f64) {
    match block {
        Block::Heading { level: 0 | 1, .. } => (18.0, 5.0),
        Block::Heading { .. } => (12.0, 3.5),
        Block::Paragraph(_) => (5.5, 5.5),
        Block::Boxed { .. } => (9.0, 10.0),
        Block::Table(_) => (6.5, 11.0),
        Block::Worked(_) => (9.5, 9.5),
        Block::Figure(_) => (10.0, 12.0),
        Block::SignOff(_) => (12.0, 12.0),
    }
}

fn block_strips(fonts: &Fonts, block: &Block, page_height: f64) -> Result<Vec<Strip>, PdfError> {
    Ok(match block {
        Block::Heading { level, text } => heading(fonts, *level, text),
        Block::Paragraph(text) => paragraph(fonts, text),
        Block::Boxed { title, paragraphs } => frame::boxed(fonts, title, paragraphs),
        Block::Table(given) => table::lay_out(fonts, given, page_height),
        Block::Worked(line) => worked::lay_out(fonts, line),
        Block::Figure(drawing) => figure::lay_out(fonts, drawing, page_height)?,
        Block::SignOff(roles) => frame::sign_off(fonts, roles),
    })
}

fn title(fonts: &Fonts, text: &str) -> Vec<Strip> {
    let mut strips = stack(0.0, TITLE, wrap(fonts, TITLE, text, TEXT_WIDTH, 0.0));
    hold_together(&mut strips);
    strips
}

/// A heading; its last row is glued to the block after it.
fn heading(fonts: &Fonts, level: u8, text: &str) -> Vec<Strip> {
    let style = if level <= 1 { HEADING_1 } else { HEADING_2 };
    let mut strips = stack(0.0, style, wrap(fonts, style, text, TEXT_WIDTH, 0.0));
    for strip in &mut strips {
        strip.glued = true;
    }
    if let (true, Some(first)) = (level <= 1, strips.first_mut()) {
        first.draws.insert(0, Draw::Entry(plain(text)));
    }
    strips
}

/// A paragraph; one that ends with a colon is glued to the block after it.
fn paragraph(fonts: &Fonts, text: &str) -> Vec<Strip> {
    let mut strips = stack(0.0, BODY, wrap(fonts, BODY, text, TEXT_WIDTH, 0.0));
    no_single_rows(&mut strips);
    if let (true, Some(last)) = (text.trim_end().ends_with(':'), strips.last_mut()) {
        last.glued = true;
    }
    strips
}
