//! The command line.

mod args;
mod run;

pub use args::{Command, Paint, Parsed, parse};
pub use run::run;
