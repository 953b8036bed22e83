//! The PDF renderer: a document in, the bytes of a PDF file out.
//!
//! In: a [`Document`]. Out: A4 pages in black and grey, with both faces
//! embedded and every character readable by machine. Each printed row is one
//! text object in reading order, so the text can be taken out again row by
//! row; head and foot are marked as artifacts. Never computes results, never
//! reads the clock or the file system, never leaves out what does not fit: it
//! wraps, shrinks drawings, or refuses.

mod blocks;
mod error;
mod figure;
mod finish;
mod flow;
mod fonts;
mod frame;
mod ink;
mod outline;
mod page;
mod strip;
mod style;
mod table;
mod text;
mod words;
mod worked;

#[cfg(test)]
mod read_back;
#[cfg(test)]
mod sample;
#[cfg(test)]
mod tests;

use super::document::Document;
pub use error::PdfError;

/// Renders to the bytes of a PDF file. Same document, same bytes.
///
/// # Errors
///
/// When a character is in neither face, when a drawing has a coordinate that is
/// not a number, when head and foot leave no room, or when the writer complains.
pub fn render(document: &Document) -> Result<Vec<u8>, PdfError> {
    let fonts = fonts::Fonts::load()?;
    let frame = page::PageFrame::new(&fonts, document)?;
    let strips = blocks::lay_out(&fonts, document, frame.body_height())?;
    let sheets = flow::paginate(strips, frame.body_height());
    let mut ink = ink::Ink::new(&fonts);
    let pages = frame.draw_all(&mut ink, &sheets);
    let printed = ink.finish()?;
    finish::write(&document.title, pages, &printed)
}
