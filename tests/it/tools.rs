//! Programs outside the project that tests read its files with.

use std::env;
use std::path::PathBuf;
use std::process::Command;

/// The program of a name, or none (said as `skipped: NAME`) where this machine has none.
///
/// With `REQUIRE_TOOLS=1` in the environment a missing program fails the test.
pub(crate) fn tool(name: &str) -> Option<Command> {
    let paths = env::var_os("PATH").unwrap_or_default();
    let found: Option<PathBuf> = env::split_paths(&paths)
        .map(|directory| directory.join(name))
        .find(|path| path.is_file());
    if found.is_none() {
        println!("skipped: {name}");
        let required = env::var_os("REQUIRE_TOOLS").is_some_and(|value| value == "1");
        assert!(!required, "{name} is required and not installed");
    }
    found.map(Command::new)
}

/// What a program prints, having ended well.
pub(crate) fn printed(command: &mut Command) -> String {
    let output = command.output().unwrap();
    let text = String::from_utf8_lossy(&output.stdout).into_owned();
    let errors = String::from_utf8_lossy(&output.stderr);
    assert!(
        output.status.success(),
        "{command:?} failed:\n{text}\n{errors}"
    );
    text
}

/// What pdflatex says of a document (its log), having set it without an error; none where it is not installed.
pub(crate) fn latex_log(document: &str) -> Option<String> {
    let mut latex = tool("pdflatex")?;
    let directory = tempfile::tempdir().unwrap();
    std::fs::write(directory.path().join("it.tex"), document).unwrap();
    let output = latex
        .current_dir(directory.path())
        .env("max_print_line", "10000")
        .args(["-interaction=nonstopmode", "-halt-on-error", "it.tex"])
        .output()
        .unwrap();
    let log = std::fs::read(directory.path().join("it.log")).unwrap_or_default();
    let log = String::from_utf8_lossy(&log).into_owned();
    let errors: Vec<&str> = log
        .lines()
        .skip_while(|line| !line.starts_with('!'))
        .take(12)
        .collect();
    assert!(
        output.status.success(),
        "pdflatex failed:\n{}",
        errors.join("\n")
    );
    Some(log)
}
