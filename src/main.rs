//! Picks the desk or the command line.

use std::process::ExitCode;

use conewright::cli;

fn main() -> ExitCode {
    let parsed = cli::parse();
    match &parsed.command {
        Some(command) => ExitCode::from(cli::run(command)),
        None => desk(parsed),
    }
}

#[cfg(feature = "window")]
fn desk(parsed: cli::Parsed) -> ExitCode {
    use conewright::app::{self, Paint};
    use conewright::task;
    if let Some(path) = &parsed.scene
        && let Err(fault) = task::open(path)
    {
        return refuse(&fault.line(&path.display().to_string()));
    }
    let paint = match parsed.paint {
        None => Paint::Auto,
        Some(cli::Paint::Gl) => Paint::Gl,
        Some(cli::Paint::Software) => Paint::Software,
    };
    match app::run(parsed.scene, paint) {
        Ok(()) => ExitCode::SUCCESS,
        Err(fault) => refuse(&fault.to_string()),
    }
}

#[cfg(not(feature = "window"))]
fn desk(_parsed: cli::Parsed) -> ExitCode {
    refuse(
        "this conewright is built without its window; see conewright --help for the command line",
    )
}

fn refuse(words: &str) -> ExitCode {
    use std::io::Write as _;
    let _reader_gone = writeln!(std::io::stderr().lock(), "{words}");
    ExitCode::from(2)
}
