//! Reads a case and the files it names; shows what there is to say.

use crate::analysis::{Options, Outcome, analyse};
use crate::case::LARGEST;
use crate::report::terminal;
use std::io::{IsTerminal, Write};
use std::path::Path;

/// Reads and analyses the case file; says on standard error why it cannot be
/// read.
pub(super) fn load(path: &Path, options: Options) -> Option<Outcome> {
    let text = match read(path) {
        Ok(text) => text,
        Err(why) => {
            say(&format!("STOP[CF-1]: the case file cannot be read: {why}\n"));
            return None;
        }
    };
    let folder = path.parent().unwrap_or(Path::new(""));
    let beside = |name: &str| -> Result<String, String> {
        // Only a file beside the case: a case file must not read the disk.
        let plain = Path::new(name).components().all(|c| matches!(c, std::path::Component::Normal(_)));
        if !plain || name.is_empty() {
            return Err(format!("'{name}' is not the name of a file beside the case file"));
        }
        let file = folder.join(name);
        // A link that leads elsewhere is not beside the case either.
        let place = |p: &Path| p.canonicalize().ok().and_then(|p| p.parent().map(Path::to_path_buf));
        let here = if folder.as_os_str().is_empty() { Path::new(".") } else { folder };
        if file.exists() && place(&file) != here.canonicalize().ok() {
            return Err(format!("'{name}' leads to a file that is not beside the case file"));
        }
        read(&file)
    };
    Some(analyse(&path.to_string_lossy(), &text, &beside, options))
}

/// The text of a file, or a sentence that says why not.
pub(super) fn read(path: &Path) -> Result<String, String> {
    let name = path.display();
    let size = std::fs::metadata(path).map_err(|e| format!("{name}: {e}"))?;
    if size.is_dir() {
        return Err(format!("{name} is a folder"));
    }
    if !size.is_file() {
        return Err(format!("{name} is not a file"));
    }
    if size.len() > LARGEST as u64 {
        return Err(format!("{name} has {} bytes; is it a case file?", size.len()));
    }
    let bytes = std::fs::read(path).map_err(|e| format!("{name}: {e}"))?;
    String::from_utf8(bytes).map_err(|error| {
        let at = error.utf8_error().valid_up_to();
        let line = error.as_bytes()[..at].iter().filter(|b| **b == b'\n').count() + 1;
        format!("{name}, line {line}: byte {at} is not UTF-8 text; save the file as UTF-8")
    })
}

/// Shows the notices on standard error.
pub(super) fn show_notices(outcome: &Outcome) {
    let text = terminal::notices(&outcome.notices, &outcome.files, styled(std::io::stderr().is_terminal()));
    say(&text);
}

/// Whether to use styles: only on a terminal, and not when NO_COLOR is set.
pub(super) fn styled(is_terminal: bool) -> bool {
    is_terminal && std::env::var_os("NO_COLOR").is_none_or(|v| v.is_empty())
}

/// Writes to standard error; a closed pipe is no fault.
pub(super) fn say(text: &str) {
    let _ = std::io::stderr().lock().write_all(text.as_bytes());
}

/// Writes to standard output; a closed pipe is no fault.
pub(super) fn put(text: &str) {
    let _ = std::io::stdout().lock().write_all(text.as_bytes());
}
