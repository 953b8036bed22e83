//! Writes files whole or not at all: beside the target, then renamed.

use std::io::Write;
use std::path::Path;

/// Whether a file that is there already may be replaced.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Existing {
    /// It is replaced.
    Replace,
    /// It is left alone, and that is said.
    Keep,
}

/// Writes a file so that no half of it is ever seen.
pub(super) fn save(file: &Path, bytes: &[u8], existing: Existing) -> Result<(), String> {
    let folder = file.parent().filter(|p| !p.as_os_str().is_empty()).unwrap_or(Path::new("."));
    if !folder.is_dir() {
        return Err(format!("there is no folder {}", folder.display()));
    }
    let mut temporary = tempfile::NamedTempFile::new_in(folder).map_err(|e| e.kind().to_string())?;
    temporary.write_all(bytes).map_err(|e| e.to_string())?;
    temporary.as_file().sync_all().map_err(|e| e.to_string())?;
    readable(&temporary)?;
    let written = match existing {
        Existing::Replace => temporary.persist(file),
        Existing::Keep => temporary.persist_noclobber(file),
    };
    written.map(|_| ()).map_err(|e| match e.error.kind() {
        std::io::ErrorKind::AlreadyExists => "it is there already; name another file".to_string(),
        _ => e.error.to_string(),
    })
}

/// A temporary file starts out private; what the program writes is as readable
/// as any file.
#[cfg(unix)]
fn readable(file: &tempfile::NamedTempFile) -> Result<(), String> {
    use std::os::unix::fs::PermissionsExt;
    file.as_file().set_permissions(std::fs::Permissions::from_mode(0o644)).map_err(|e| e.to_string())
}

#[cfg(not(unix))]
fn readable(_: &tempfile::NamedTempFile) -> Result<(), String> {
    Ok(())
}
