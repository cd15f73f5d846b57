//! The program's verbs: a scene and options to bytes. The window and the command line both call these, so a file from
//! either is the same file.

mod draw;
mod open;
mod speeds;

pub use draw::{Drawing, Drawn, TaskFault, draw, lay_out, ledger};
pub use open::{OpenFault, Opened, audit, open, open_text};
pub use speeds::{SpeedForm, Speeds, rapidity_from, speeds};
