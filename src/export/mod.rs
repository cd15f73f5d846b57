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

/// Temporary.
#[derive(Clone, Copy, Debug)]
pub enum Format {
    /// x
    Svg,
}
impl Format {
    /// x
    pub fn of_path(_: &std::path::Path) -> Option<Self> {
        None
    }
}
/// x
#[derive(Clone, Copy, Debug)]
pub struct Options {
    /// x
    pub dpi: f64,
    /// x
    pub lettering: Lettering,
}
/// x
pub fn write(_: &crate::marks::Sheet, _: Format, _: &Options) -> Result<Vec<u8>, ExportFault> {
    todo!()
}
