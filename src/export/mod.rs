//! Sheets and tables as bytes. A writer knows marks and rows, never a scene.

mod pdf;
mod png;
mod svg;
mod table;
mod tikz;

pub use self::pdf::pdf;
pub use self::png::png;
pub use self::svg::svg;
pub use self::table::{json, text};
pub use self::tikz::tikz;

/// Whether labels are written as text with fonts or as outlines (SVG; PDF has always real text unless asked).
#[derive(Clone, Copy, Debug, PartialEq, Eq, Default)]
pub enum Lettering {
    /// Each format's own default: outlines in SVG, real text in PDF.
    #[default]
    Usual,
    /// Text with fonts.
    Real,
    /// Outlines.
    Outline,
}

/// Why a sheet cannot be written.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{what}")]
pub struct ExportFault {
    /// What is wrong.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}
