//! `print`: the worksheet as a PDF file, written whole or not at all.

use super::args::PrintArgs;
use super::load::{load, put, say, show_notices};
use super::save::{Existing, save};
use crate::report::{compose, pdf};
use std::path::{Path, PathBuf};

pub(super) fn run(args: &PrintArgs) -> u8 {
    if let Some(folder) = args.output.as_deref().and_then(Path::parent).filter(|p| !p.as_os_str().is_empty())
        && !folder.is_dir()
    {
        say(&format!("STOP: nothing was written: there is no folder {}\n", folder.display()));
        return 2;
    }
    let Some(outcome) = load(&args.case, args.draws.options()) else { return 2 };
    show_notices(&outcome);
    let Some(document) = compose(&outcome) else {
        say("nothing was written\n");
        return 2;
    };
    let output = args.output.clone().unwrap_or_else(|| here(&args.case));
    let written = pdf::render(&document)
        .map_err(|e| e.to_string())
        .and_then(|bytes| write(&output, &args.case, &bytes));
    match written {
        Ok(()) => {
            put(&format!("wrote {}\n", output.display()));
            outcome.status()
        }
        Err(why) => {
            say(&format!("STOP: {} was not written: {why}\n", output.display()));
            2
        }
    }
}

/// The case's name with .pdf, in the current folder.
fn here(case: &Path) -> PathBuf {
    PathBuf::from(case.with_extension("pdf").file_name().unwrap_or_else(|| "worksheet.pdf".as_ref()))
}

/// Writes the PDF, but never over the case it was made from.
fn write(output: &Path, case: &Path, bytes: &[u8]) -> Result<(), String> {
    let same = |a: &Path, b: &Path| matches!((a.canonicalize(), b.canonicalize()), (Ok(a), Ok(b)) if a == b);
    if same(output, case) {
        return Err("it is the case file itself".into());
    }
    if output.extension().is_none_or(|e| !e.eq_ignore_ascii_case("pdf")) {
        return Err("a PDF file's name ends in .pdf".into());
    }
    save(output, bytes, Existing::Replace)
}
