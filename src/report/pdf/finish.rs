//! The file: pages in, bytes out.
//!
//! In: finished pages and the characters they use. Out: the bytes of the file,
//! with title, outline and an identifier made from the content. Never reads the
//! clock: the file carries no dates, and the same pages give the same bytes.

use lopdf::{Dictionary, Document, Object, StringFormat};
use printpdf::{PdfDocument, PdfFont, PdfSaveOptions};
use sha2::{Digest, Sha256};

use super::super::document::plain;
use super::error::PdfError;
use super::fonts::FACES;
use super::ink::Printed;
use super::outline;
use super::page::Pages;

/// Writes the file.
pub fn write(title: &str, pages: Pages, printed: &Printed<'_>) -> Result<Vec<u8>, PdfError> {
    let mut source = PdfDocument::new(title);
    for face in FACES {
        if let Some(characters) = printed.used.get(&face) {
            let font = PdfFont::new(printed.fonts.reduced(face, characters)?);
            source.resources.fonts.map.insert(face.id(), font);
        }
    }
    source.pages = pages.pages;
    let mut file = convert(&source)?;
    file.version = "1.5".into();
    set_info(&mut file, title);
    set_catalog(&mut file, &pages.entries)?;
    file.compress();
    identify(&mut file)
}

/// Every warning of the renderer is a fault: it means that something is lost.
fn convert(source: &PdfDocument) -> Result<Document, PdfError> {
    let mut warnings = Vec::new();
    let options = PdfSaveOptions { image_optimization: None, ..PdfSaveOptions::default() };
    let file = source.to_lopdf_document(&options, &mut warnings);
    match warnings.first() {
        Some(warning) => Err(PdfError::Writer(warning.msg.clone())),
        None => Ok(file),
    }
}

/// The file's properties: title and maker, nothing else.
fn set_info(file: &mut Document, title: &str) {
    let mut info = Dictionary::new();
    info.set("Title", outline::text_string(plain(title).trim()));
    info.set("Creator", outline::text_string("retrodict"));
    if let Ok(id) = file.trailer.get(b"Info").and_then(Object::as_reference) {
        file.objects.insert(id, Object::Dictionary(info));
    }
}

fn set_catalog(file: &mut Document, entries: &[outline::Entry]) -> Result<(), PdfError> {
    let outlines = outline::add(file, entries);
    let catalog = file.catalog_mut().map_err(writer)?;
    let mut preferences = Dictionary::new();
    preferences.set("DisplayDocTitle", Object::Boolean(true));
    catalog.set("ViewerPreferences", Object::Dictionary(preferences));
    catalog.set("Lang", Object::String(b"en".to_vec(), StringFormat::Literal));
    if let Some(id) = outlines {
        catalog.set("Outlines", Object::Reference(id));
    }
    Ok(())
}

/// Gives the file an identifier made from everything else in it.
fn identify(file: &mut Document) -> Result<Vec<u8>, PdfError> {
    set_identifier(file, &[0; 16]);
    let digest = Sha256::digest(bytes(file)?);
    set_identifier(file, digest.get(..16).unwrap_or_default());
    bytes(file)
}

fn set_identifier(file: &mut Document, id: &[u8]) {
    let id = Object::String(id.to_vec(), StringFormat::Hexadecimal);
    file.trailer.set("ID", Object::Array(vec![id.clone(), id]));
}

fn bytes(file: &Document) -> Result<Vec<u8>, PdfError> {
    let mut out = Vec::new();
    file.clone().save_to(&mut out).map_err(writer)?;
    Ok(out)
}

fn writer(error: impl std::fmt::Display) -> PdfError {
    PdfError::Writer(error.to_string())
}
