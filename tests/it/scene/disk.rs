//! Files are read with a limit and written whole or not at all.

use std::fs;
use std::path::Path;

use conewright::disk::{LIMIT, Overwrite, read_text, write};
use tempfile::TempDir;

fn folder() -> TempDir {
    tempfile::tempdir().unwrap()
}

/// Names in a folder, sorted.
fn names(folder: &Path) -> Vec<String> {
    let entries = fs::read_dir(folder).unwrap();
    let mut names: Vec<String> = entries
        .map(|entry| entry.unwrap().file_name().into_string().unwrap())
        .collect();
    names.sort();
    names
}

#[track_caller]
fn refuses<T: std::fmt::Debug>(result: Result<T, conewright::disk::DiskFault>, words: &str) {
    let fault = result.unwrap_err();
    assert!(fault.what.contains(words), "{}", fault.what);
    assert!(!fault.mend.is_empty());
}

#[test]
fn what_is_written_is_read() {
    let folder = folder();
    let path = folder.path().join("a.ron");
    write(&path, "\u{FEFF}caf\u{e9}\r\n".as_bytes(), Overwrite::Refuse).unwrap();
    assert_eq!(read_text(&path).unwrap(), "\u{FEFF}caf\u{e9}\r\n");
    assert_eq!(names(folder.path()), ["a.ron"]);
}

#[test]
fn no_file_is_overwritten_unasked() {
    let folder = folder();
    let path = folder.path().join("a.ron");
    write(&path, b"old", Overwrite::Refuse).unwrap();
    refuses(write(&path, b"new", Overwrite::Refuse), "exists already");
    assert_eq!(read_text(&path).unwrap(), "old");
    write(&path, b"new", Overwrite::Replace).unwrap();
    assert_eq!(read_text(&path).unwrap(), "new");
    write(&folder.path().join("b.ron"), b"", Overwrite::Replace).unwrap();
    assert_eq!(names(folder.path()), ["a.ron", "b.ron"]);
}

#[test]
fn what_is_no_text_is_refused_with_its_byte() {
    let folder = folder();
    let path = folder.path().join("a.ron");
    fs::write(&path, b"ab\nc\xffd").unwrap();
    refuses(read_text(&path), "byte 5 (in line 2) is 0xff");
    fs::write(&path, b"ab\xe2\x82").unwrap();
    refuses(read_text(&path), "byte 3 (in line 1) is 0xe2");
    fs::write(&path, b"\xff\xfeS\0").unwrap();
    refuses(read_text(&path), "UTF-16");
}

#[test]
fn reading_is_limited() {
    let folder = folder();
    let path = folder.path().join("a.ron");
    let most = usize::try_from(LIMIT).unwrap();
    fs::write(&path, vec![b' '; most]).unwrap();
    assert_eq!(read_text(&path).unwrap().len(), most);
    fs::write(&path, vec![b' '; most + 1]).unwrap();
    refuses(read_text(&path), "larger than 16 MB");
}

#[test]
fn folders_and_missing_files_are_refused() {
    let folder = folder();
    let missing = folder.path().join("none").join("a.ron");
    refuses(read_text(folder.path()), "it is a folder");
    refuses(read_text(&missing), "does not exist");
    refuses(
        write(folder.path(), b"a", Overwrite::Replace),
        "it is a folder",
    );
    refuses(
        write(&missing, b"a", Overwrite::Refuse),
        "its folder does not exist",
    );
    refuses(
        write(Path::new(""), b"a", Overwrite::Refuse),
        "names no file",
    );
    let long = folder.path().join("n".repeat(300));
    write(&long, b"a", Overwrite::Refuse).unwrap_err();
    let beneath = folder.path().join("file").join("a.ron");
    fs::write(folder.path().join("file"), b"").unwrap();
    write(&beneath, b"a", Overwrite::Refuse).unwrap_err();
    assert_eq!(names(folder.path()), ["file"]);
}

#[cfg(unix)]
mod unix {
    use std::os::unix::fs::{PermissionsExt as _, symlink};
    use std::process::Command;

    use super::*;

    fn mode(path: &Path) -> u32 {
        fs::metadata(path).unwrap().permissions().mode() & 0o7777
    }

    #[test]
    fn pipes_and_devices_are_refused() {
        let folder = folder();
        let pipe = folder.path().join("pipe");
        assert!(
            Command::new("mkfifo")
                .arg(&pipe)
                .status()
                .unwrap()
                .success()
        );
        refuses(read_text(&pipe), "not a plain file");
        refuses(write(&pipe, b"a", Overwrite::Replace), "not a plain file");
        refuses(read_text(Path::new("/dev/null")), "not a plain file");
        let null = Path::new("/dev/null");
        refuses(write(null, b"a", Overwrite::Replace), "not a plain file");
        assert_eq!(names(folder.path()), ["pipe"]);
    }

    #[test]
    fn permissions_of_a_replaced_file_are_kept() {
        let folder = folder();
        let path = folder.path().join("a.ron");
        for kept in [0o600, 0o640, 0o664, 0o755] {
            fs::write(&path, b"old").unwrap();
            fs::set_permissions(&path, fs::Permissions::from_mode(kept)).unwrap();
            write(&path, b"new", Overwrite::Replace).unwrap();
            assert_eq!(mode(&path), kept);
        }
    }

    /// Against what the standard library's own creation gives under the same umask.
    #[test]
    fn a_new_file_has_the_usual_permissions() {
        let folder = folder();
        let (ours, usual) = (folder.path().join("a"), folder.path().join("b"));
        write(&ours, b"", Overwrite::Refuse).unwrap();
        fs::write(&usual, b"").unwrap();
        assert_eq!(mode(&ours), mode(&usual));
    }

    #[test]
    fn a_read_only_file_is_left() {
        let folder = folder();
        let path = folder.path().join("a.ron");
        fs::write(&path, b"old").unwrap();
        fs::set_permissions(&path, fs::Permissions::from_mode(0o444)).unwrap();
        refuses(write(&path, b"new", Overwrite::Replace), "read-only");
        assert_eq!(read_text(&path).unwrap(), "old");
        assert_eq!(names(folder.path()), ["a.ron"]);
    }

    #[test]
    fn links_are_followed() {
        let folder = folder();
        let at = |name: &str| folder.path().join(name);
        fs::create_dir(at("deep")).unwrap();
        fs::write(at("deep/a.ron"), b"old").unwrap();
        symlink("deep/a.ron", at("one")).unwrap();
        symlink(at("one"), at("two")).unwrap();
        refuses(
            write(&at("two"), b"new", Overwrite::Refuse),
            "exists already",
        );
        write(&at("two"), b"new", Overwrite::Replace).unwrap();
        assert_eq!(read_text(&at("deep/a.ron")).unwrap(), "new");
        assert!(fs::symlink_metadata(at("one")).unwrap().is_symlink());
        assert!(fs::symlink_metadata(at("two")).unwrap().is_symlink());
        symlink("deep/b.ron", at("dangling")).unwrap();
        write(&at("dangling"), b"b", Overwrite::Refuse).unwrap();
        assert_eq!(read_text(&at("deep/b.ron")).unwrap(), "b");
        symlink("loop", at("loop")).unwrap();
        refuses(write(&at("loop"), b"", Overwrite::Replace), "never ends");
        read_text(&at("loop")).unwrap_err();
        assert_eq!(names(&at("deep")), ["a.ron", "b.ron"]);
    }
}
