//! LaTeX math to placed glyphs and outlines, words and size. Everything is in em, y up, the baseline at y = 0 and
//! the label's left end at x = 0. An allow-list of commands: nothing that could run or link passes.

mod allow;
mod face;
mod layout;
mod plain;
mod reader;
mod symbols;
mod tape;
mod words;

pub use face::Face;
pub use layout::{Glyph, Label, LabelFault, Piece, typeset};
pub use plain::plain;

/// The names of all commands a label may use, without the backslash.
pub fn commands() -> impl Iterator<Item = &'static str> {
    allow::names()
}
