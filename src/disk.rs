//! Reading with a limit; writing whole or not at all, never over a file unasked.

use std::fs::{self, File, Metadata};
use std::io::{self, ErrorKind, Read as _, Write as _};
use std::path::{Path, PathBuf};

use tempfile::NamedTempFile;

/// Largest file read, bytes.
pub const LIMIT: u64 = 16 * 1024 * 1024;

/// The most symbolic links followed to a file, as on Linux.
const LINKS: usize = 40;

/// Why a file could not be read or written.
#[derive(Debug, thiserror::Error)]
#[error("{what}")]
pub struct DiskFault {
    /// What is wrong, naming the path.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}

impl DiskFault {
    fn new(path: &Path, what: impl AsRef<str>, mend: impl Into<String>) -> Self {
        Self {
            what: format!("{} {}", path.display(), what.as_ref()),
            mend: mend.into(),
        }
    }

    fn from_error(path: &Path, doing: &str, error: &io::Error) -> Self {
        let (what, mend) = match error.kind() {
            ErrorKind::NotFound => ("does not exist".to_owned(), "check its path"),
            ErrorKind::PermissionDenied => (
                format!("cannot be {doing}: permission is denied"),
                "change its permissions or those of its folder",
            ),
            ErrorKind::StorageFull | ErrorKind::QuotaExceeded => (
                format!("cannot be {doing}: no space is left"),
                "make room, or use another disk",
            ),
            ErrorKind::ReadOnlyFilesystem => (
                format!("cannot be {doing}: its disk is read-only"),
                "use another disk",
            ),
            _ => (
                format!("cannot be {doing}: {error}"),
                "check the path and the disk",
            ),
        };
        Self::new(path, what, mend)
    }
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
///
/// # Errors
/// A file that is not there, may not be read, is no plain file, is too large, or is not UTF-8 (with the byte and its
/// line).
pub fn read_text(path: &Path) -> Result<String, DiskFault> {
    let fault = |error: io::Error| DiskFault::from_error(path, "read", &error);
    // A pipe without a writer would wait when opened, so its kind is asked for before.
    plain(path, &fs::metadata(path).map_err(fault)?, "read")?;
    let file = File::open(path).map_err(fault)?;
    plain(path, &file.metadata().map_err(fault)?, "read")?;
    let mut bytes = Vec::new();
    file.take(LIMIT + 1)
        .read_to_end(&mut bytes)
        .map_err(fault)?;
    if bytes.len() as u64 > LIMIT {
        let what = format!("is larger than {} MB", LIMIT >> 20);
        return Err(DiskFault::new(
            path,
            what,
            "a scene is a text file; split it",
        ));
    }
    String::from_utf8(bytes).map_err(|error| not_text(path, &error))
}

fn not_text(path: &Path, error: &std::string::FromUtf8Error) -> DiskFault {
    let bytes = error.as_bytes();
    if bytes.starts_with(&[0xFF, 0xFE]) || bytes.starts_with(&[0xFE, 0xFF]) {
        return DiskFault::new(path, "is UTF-16 text, not UTF-8", "save it as UTF-8");
    }
    let at = error.utf8_error().valid_up_to();
    let line = bytes[..at].split(|&b| b == b'\n').count();
    let byte = bytes.get(at).copied().unwrap_or(0);
    let what = format!(
        "is not UTF-8 text: byte {} (in line {line}) is {byte:#04x}",
        at + 1
    );
    DiskFault::new(path, what, "save it as UTF-8")
}

/// Holds a file to being a plain one.
fn plain(path: &Path, metadata: &Metadata, doing: &str) -> Result<(), DiskFault> {
    if metadata.is_dir() {
        let what = format!("cannot be {doing}: it is a folder");
        return Err(DiskFault::new(path, what, "name a file in it"));
    }
    if !metadata.is_file() {
        let what = format!("cannot be {doing}: it is a pipe or a device, not a plain file");
        return Err(DiskFault::new(path, what, "use a plain file"));
    }
    Ok(())
}

/// Writes a file whole or not at all: a sibling temporary file, flushed, moved over the target. Permissions of a
/// replaced file are kept, a symlink is followed, and no litter stays when anything fails.
///
/// # Errors
/// A file that exists and may not be replaced or is read-only, a folder that is not there or may not be written to,
/// a full disk. The target is then as it was.
pub fn write(path: &Path, bytes: &[u8], overwrite: Overwrite) -> Result<(), DiskFault> {
    let fault = |error: &io::Error| DiskFault::from_error(path, "written", error);
    let target = followed(path)?;
    let old = match fs::symlink_metadata(&target) {
        Ok(metadata) => Some(metadata),
        Err(error) if error.kind() == ErrorKind::NotFound => None,
        Err(error) => return Err(fault(&error)),
    };
    if let Some(metadata) = &old {
        plain(path, metadata, "written")?;
        if overwrite == Overwrite::Refuse {
            return Err(exists(path));
        }
        if metadata.permissions().readonly() {
            return Err(DiskFault::new(path, "is read-only", "allow writing to it"));
        }
    }
    let folder = match target.parent() {
        Some(parent) if !parent.as_os_str().is_empty() => parent,
        _ => Path::new("."),
    };
    if target.file_name().is_none() {
        return Err(DiskFault::new(path, "names no file", "write a file's name"));
    }
    let mut temporary = sibling(folder, old.as_ref()).map_err(|error| match error.kind() {
        ErrorKind::NotFound => {
            let what = "cannot be written: its folder does not exist";
            DiskFault::new(path, what, "make the folder first")
        }
        _ => fault(&error),
    })?;
    temporary.write_all(bytes).map_err(|error| fault(&error))?;
    keep_permissions(&temporary, old.as_ref()).map_err(|error| fault(&error))?;
    temporary
        .as_file()
        .sync_all()
        .map_err(|error| fault(&error))?;
    let moved = match overwrite {
        Overwrite::Refuse => temporary.persist_noclobber(&target),
        Overwrite::Replace => temporary.persist(&target),
    };
    match moved {
        Ok(_) => {
            flush_folder(folder);
            Ok(())
        }
        Err(failed) if failed.error.kind() == ErrorKind::AlreadyExists => Err(exists(path)),
        Err(failed) => Err(fault(&failed.error)),
    }
}

fn exists(path: &Path) -> DiskFault {
    let mend = "name another, or say that it is to be replaced";
    DiskFault::new(path, "exists already", mend)
}

/// The file at the end of symbolic links, whether it exists or not.
fn followed(path: &Path) -> Result<PathBuf, DiskFault> {
    let mut target = path.to_owned();
    for _ in 0..LINKS {
        match fs::read_link(&target) {
            // What the link says is relative to its own folder; an absolute path replaces it.
            Ok(next) => target = target.parent().unwrap_or(Path::new("")).join(next),
            Err(_) => return Ok(target),
        }
    }
    let what = "is a symbolic link that never ends";
    Err(DiskFault::new(path, what, "mend the link"))
}

/// A temporary file in a folder: with the usual permissions of a new file, or closed to others until it takes on
/// those of the file it replaces.
fn sibling(folder: &Path, old: Option<&Metadata>) -> io::Result<NamedTempFile> {
    let mut builder = tempfile::Builder::new();
    builder.prefix(".conewright-").suffix(".tmp");
    #[cfg(unix)]
    if old.is_none() {
        use std::os::unix::fs::PermissionsExt as _;
        // The system takes the umask off.
        builder.permissions(fs::Permissions::from_mode(0o666));
    }
    #[cfg(not(unix))]
    let _ = old;
    builder.tempfile_in(folder)
}

fn keep_permissions(file: &NamedTempFile, old: Option<&Metadata>) -> io::Result<()> {
    let Some(old) = old else {
        return Ok(());
    };
    #[cfg(unix)]
    {
        use std::os::unix::fs::{MetadataExt as _, fchown};
        let new = file.as_file().metadata()?;
        if (new.uid(), new.gid()) != (old.uid(), old.gid()) {
            // Only the superuser may give a file away; for others it becomes their own.
            fchown(file.as_file(), Some(old.uid()), Some(old.gid())).ok();
        }
    }
    file.as_file().set_permissions(old.permissions())
}

/// Makes the new name last through a power cut. Some file systems cannot; the file itself is whole by then.
fn flush_folder(folder: &Path) {
    #[cfg(unix)]
    if let Ok(folder) = File::open(folder) {
        folder.sync_all().ok();
    }
    #[cfg(not(unix))]
    let _ = folder;
}
