//! Why a document could not be rendered.
//!
//! In: the faults the other modules find. Out: a sentence for the reader.
//! Never decides whether something is a fault.

use std::fmt;

/// Why a document could not be rendered to PDF.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum PdfError {
    /// A built-in face could not be read or reduced.
    Font(String),
    /// A character that the face cannot show, with the row it stands in.
    MissingCharacter {
        /// The character.
        character: char,
        /// The row of text it stands in.
        row: String,
    },
    /// A drawing with a coordinate or size that is not a finite number.
    Drawing {
        /// The drawing's caption.
        caption: String,
    },
    /// Running head and caution together leave too little of the page.
    HeadAndFoot,
    /// The PDF writer warned about something or failed.
    Writer(String),
}

impl fmt::Display for PdfError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            PdfError::Font(what) => write!(f, "the built-in typeface cannot be used: {what}"),
            PdfError::MissingCharacter { character, row } => write!(
                f,
                "the character '{}' (U+{:04X}) cannot be printed: it is missing from the typeface; it stands in \"{row}\"",
                character.escape_debug(),
                u32::from(*character),
            ),
            PdfError::Drawing { caption } => {
                write!(f, "the drawing \"{caption}\" has a coordinate that is not a finite number")
            }
            PdfError::HeadAndFoot => {
                write!(
                    f,
                    "the running head and the caution at the foot are too long to leave room for the text"
                )
            }
            PdfError::Writer(what) => write!(f, "the PDF could not be written: {what}"),
        }
    }
}

impl std::error::Error for PdfError {}
