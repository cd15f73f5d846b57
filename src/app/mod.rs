//! The desk: egui panels that show marks and rows and turn gestures into changes of view. It knows no geometry and no
//! dynamics: every number comes from the ledger or from the program's verbs.
//!
//! State stands in three parts: the document, the view, and what is shown, which follows from both. A panel is a
//! function that reads a context and asks for commands.

mod action;
mod canvas;
mod chooser;
mod command;
mod context;
mod desk;
mod document;
mod empty;
mod facts;
mod findings;
mod help;
mod icon;
mod list;
mod menu;
pub mod paint;
mod rail;
mod run;
mod shown;
mod status;
mod table;
mod text;
mod theme;
mod view;
mod widgets;

pub use desk::Desk;
pub use run::{Paint, RunFault, run};
pub use theme::install;
