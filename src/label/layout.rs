//! Placing glyphs by the layout crate.

use kurbo::{BezPath, Rect};

use super::Face;

/// One placed thing of a label, in em, y up.
#[derive(Clone, Debug, PartialEq)]
pub enum Piece {
    /// A glyph of a face.
    Glyph(Glyph),
    /// A filled outline that no glyph draws: fraction bars, radicals, accents.
    Outline(BezPath),
}

/// A placed glyph.
#[derive(Clone, Debug, PartialEq)]
pub struct Glyph {
    /// Its face.
    pub face: Face,
    /// Its index in the face.
    pub id: u16,
    /// What it stands for, for searching and copying.
    pub text: char,
    /// Left end of its origin, em.
    pub x: f64,
    /// Its baseline above the label's, em.
    pub y: f64,
    /// Its size relative to the label's.
    pub scale: f64,
}

/// A label set in type.
#[derive(Clone, Debug, PartialEq)]
pub struct Label {
    /// The LaTeX math as written.
    pub source: String,
    /// What is drawn, left to right.
    pub pieces: Vec<Piece>,
    /// For a screen reader: `p sub a prime`.
    pub words: String,
    /// For copying and searching: the letters, `pa′`.
    pub letters: String,
    /// Advance width, em.
    pub width: f64,
    /// Above the baseline, em.
    pub height: f64,
    /// Below the baseline, em, not negative.
    pub depth: f64,
    /// The box of the ink itself, em, y up.
    pub ink: Rect,
}

impl Label {
    /// All ink as one outline (non-zero winding), em, y up.
    pub fn outline(&self) -> BezPath {
        todo!()
    }
}

/// Why a label cannot be set.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{what}")]
pub struct LabelFault {
    /// Characters from the start of the label.
    pub column: usize,
    /// What is wrong.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}

/// Sets LaTeX math.
///
/// # Errors
/// A command that is not allowed, text that does not parse, a character no face has, over 1,000 bytes, a box over
/// 200 em.
pub fn typeset(source: &str) -> Result<Label, LabelFault> {
    todo!()
}

/// Sets plain upright text (an object's name); characters no face has become a replacement box, so it never fails.
/// The label's `source` is the LaTeX of it: `\text{..}` with special characters escaped.
pub fn plain(text: &str) -> Label {
    todo!()
}
