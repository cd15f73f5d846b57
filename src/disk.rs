//! Reading with a limit; writing whole or not at all, never over a file unasked.

use std::path::Path;

/// Largest file read, bytes.
pub const LIMIT: u64 = 16 * 1024 * 1024;

/// Why a file could not be read or written.
#[derive(Debug, thiserror::Error)]
#[error("{what}")]
pub struct DiskFault {
    /// What is wrong, naming the path.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}

/// Whether an existing file may be replaced.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Overwrite {
    /// Never: an existing file is a fault.
    Refuse,
    /// It was asked for.
    Replace,
}

/// Reads a text file: UTF-8, at most [`LIMIT`] bytes, a plain file (not a folder, pipe or device).
pub fn read_text(path: &Path) -> Result<String, DiskFault> {
    todo!()
}

/// Writes a file whole or not at all: a sibling temporary file, flushed, moved over the target. Permissions of a
/// replaced file are kept, a symlink is followed, and no litter stays when anything fails.
pub fn write(path: &Path, bytes: &[u8], overwrite: Overwrite) -> Result<(), DiskFault> {
    todo!()
}
