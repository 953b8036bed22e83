//! Reports: results in, a document out; renderers lay it out.
//!
//! In: an [`Outcome`](crate::analysis::Outcome). Out: a [`document::Document`],
//! and from it text for a terminal or the bytes of a PDF; or the JSON object.
//! Renderers compute nothing: what they print was found before.
//! A new renderer is one file here.

pub mod caution;
mod compose;
pub mod document;
pub mod json;
pub mod pdf;
pub mod terminal;

pub use compose::{compose, method_list, method_page};
