//! LaTeX math to placed glyphs and outlines, words and size. Everything is in em, y up, the baseline at y = 0 and
//! the label's left end at x = 0. An allow-list of commands: nothing that could run or link passes.

mod allow;
mod face;
mod layout;
mod words;

pub use face::Face;
pub use layout::{Glyph, Label, LabelFault, Piece, plain, typeset};
