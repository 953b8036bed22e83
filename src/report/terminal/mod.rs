//! Text for a terminal or a pipe.
//!
//! In: a document, or notices with the files they point into. Out: text, with
//! styles only when asked for. Never looks at the environment.

mod notices;
mod page;
mod table;

pub use notices::notices;
pub use page::render;
