//! Running the program as a person would, for the other tests.

use std::path::{Path, PathBuf};
use std::process::{Command, Stdio};

/// What a run gave.
pub(crate) struct Ran {
    pub(crate) code: i32,
    pub(crate) out: Vec<u8>,
    pub(crate) err: String,
}

impl Ran {
    pub(crate) fn text(&self) -> String {
        String::from_utf8(self.out.clone()).unwrap()
    }

    pub(crate) fn json(&self) -> serde_json::Value {
        serde_json::from_slice(&self.out)
            .unwrap_or_else(|e| panic!("{e}: {}{}", self.text(), self.err))
    }
}

/// The program with some arguments, without a display.
pub(crate) fn command(args: &[&str]) -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_conewright"));
    command
        .args(args)
        .env_remove("DISPLAY")
        .env_remove("WAYLAND_DISPLAY")
        .stdin(Stdio::null());
    command
}

pub(crate) fn run(args: &[&str]) -> Ran {
    let output = command(args).output().unwrap();
    Ran {
        code: output.status.code().unwrap_or(-1),
        out: output.stdout,
        err: String::from_utf8_lossy(&output.stderr).into_owned(),
    }
}

/// A scene written into a folder of its own.
pub(crate) fn written(text: &str) -> (tempfile::TempDir, String) {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("scene.ron");
    std::fs::write(&path, text).unwrap();
    let path = path.to_str().unwrap().to_owned();
    (folder, path)
}

/// The ledger of a scene's text, as JSON.
pub(crate) fn ledger(text: &str, more: &[&str]) -> serde_json::Value {
    let (_folder, path) = written(text);
    let mut args = vec!["ledger", &path, "--as", "json"];
    args.extend(more);
    run(&args).json()
}

/// What an audit of a scene's text prints, line by line, without the path.
pub(crate) fn audit(text: &str) -> (i32, Vec<String>) {
    let (_folder, path) = written(text);
    let ran = run(&["audit", &path]);
    let lines = ran
        .text()
        .lines()
        .map(|l| l.replace(&path, "scene.ron"))
        .collect();
    (ran.code, lines)
}

/// The examples.
pub(crate) fn examples() -> Vec<PathBuf> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("scenes");
    let mut paths: Vec<PathBuf> = std::fs::read_dir(folder)
        .unwrap()
        .map(|e| e.unwrap().path())
        .filter(|p| p.extension().is_some_and(|e| e == "ron"))
        .collect();
    paths.sort();
    assert!(paths.len() >= 3);
    paths
}
