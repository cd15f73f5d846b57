//! Sheets and tables as bytes. A writer knows marks and rows, never a scene.

mod pdf;
mod png;
mod raster;
mod svg;
mod table;
mod tikz;

use std::path::Path;

use kurbo::{BezPath, PathEl};

pub use self::pdf::pdf;
pub use self::png::png;
pub use self::raster::{Raster, raster_path};
pub use self::svg::svg;
pub use self::table::{json, text};
pub use self::tikz::tikz;
use crate::label::Piece;
use crate::marks::{Paint, Shape, Sheet};

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

impl ExportFault {
    fn new(what: impl Into<String>, mend: impl Into<String>) -> Self {
        Self {
            what: what.into(),
            mend: mend.into(),
        }
    }
}

/// A kind of figure file.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Format {
    /// Scalable Vector Graphics.
    Svg,
    /// Portable Document Format.
    Pdf,
    /// Portable Network Graphics.
    Png,
    /// A TikZ picture.
    Tikz,
}

impl Format {
    /// The format that a file's ending names: `.svg`, `.pdf`, `.png` or `.tex`, in any case.
    ///
    /// # Errors
    /// Another ending, or none.
    pub fn of(path: &Path) -> Result<Self, ExportFault> {
        let ending = path
            .extension()
            .map(|ending| ending.to_string_lossy().to_lowercase());
        match ending.as_deref() {
            Some("svg") => Ok(Self::Svg),
            Some("pdf") => Ok(Self::Pdf),
            Some("png") => Ok(Self::Png),
            Some("tex") => Ok(Self::Tikz),
            other => {
                let what = match other {
                    Some(ending) => format!("no figure is written as .{ending}"),
                    None => "the file's name has no ending to tell the format by".into(),
                };
                Err(ExportFault::new(what, "end it in .svg, .pdf, .png or .tex"))
            }
        }
    }
}

/// How a sheet is written.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Options {
    /// Dots per inch of a PNG.
    pub dpi: f64,
    /// Text or outlines, in SVG and PDF.
    pub lettering: Lettering,
}

impl Default for Options {
    fn default() -> Self {
        Self {
            dpi: 600.0,
            lettering: Lettering::Usual,
        }
    }
}

/// Writes a sheet in a format.
///
/// # Errors
/// A sheet no file can hold, a picture of too many dots.
pub fn write(sheet: &Sheet, format: Format, options: &Options) -> Result<Vec<u8>, ExportFault> {
    match format {
        Format::Svg => svg(sheet, options.lettering),
        Format::Pdf => pdf(sheet, options.lettering),
        Format::Png => png(sheet, options.dpi),
        Format::Tikz => tikz(sheet),
    }
}

/// The program's name and version, for a file's own record.
const PROGRAM: &str = concat!("Conewright ", env!("CARGO_PKG_VERSION"));

/// Larger than any sheet of paper, mm; beyond it TeX and PDF readers have no numbers.
const LARGEST: f64 = 5_000.0;

/// Refuses what no file can hold, so that the writers need not look.
fn check(sheet: &Sheet) -> Result<(), ExportFault> {
    let size = |side: f64| side > 0.0 && side <= LARGEST;
    if !(size(sheet.width) && size(sheet.height)) {
        let what = format!("the plate is {} mm by {} mm", sheet.width, sheet.height);
        return Err(ExportFault::new(
            what,
            format!("give it a width and a height up to {LARGEST} mm"),
        ));
    }
    let drawable = sheet.marks.iter().all(|mark| match &mark.shape {
        Shape::Path { path, paint } => path.is_finite() && paintable(paint),
        Shape::Label { at, em, .. } => at.is_finite() && em.is_finite() && *em > 0.0,
    });
    let grouped = sheet
        .marks
        .iter()
        .all(|mark| mark.group < sheet.groups.len());
    if drawable && grouped {
        return Ok(());
    }
    Err(ExportFault::new(
        "the plate holds a mark that cannot be drawn",
        "draw a smaller range",
    ))
}

fn paintable(paint: &Paint) -> bool {
    match paint {
        Paint::Fill(_) => true,
        Paint::Stroke(stroke) => {
            let lengths = stroke
                .dash
                .iter()
                .all(|length| length.is_finite() && *length >= 0.0);
            let whole = stroke.dash.is_empty() || stroke.dash.iter().sum::<f64>() > 0.0;
            stroke.width.is_finite()
                && stroke.width > 0.0
                && lengths
                && whole
                && stroke.dash.len() % 2 == 0
        }
    }
}

/// A number to 4 decimals, without trailing zeros and without a negative zero.
fn fixed(value: f64) -> String {
    let text = format!("{value:.4}");
    let text = text.trim_end_matches('0').trim_end_matches('.');
    if text == "-0" {
        "0".into()
    } else {
        text.into()
    }
}

/// Text without control characters (line ends become spaces): none of the formats takes them all.
fn clean(text: &str) -> String {
    let plain = |letter: char| if letter.is_whitespace() { ' ' } else { letter };
    let forbidden = |letter: char| letter.is_control() || matches!(letter, '\u{FFFE}' | '\u{FFFF}');
    text.chars()
        .map(plain)
        .filter(|letter| !forbidden(*letter))
        .collect()
}

/// Whether there is anything to paint: a path that goes somewhere.
fn goes_anywhere(path: &BezPath) -> bool {
    path.elements()
        .iter()
        .any(|element| !matches!(element, PathEl::MoveTo(_) | PathEl::ClosePath))
}

/// Whether two pieces of a label are glyphs of one face, size and baseline.
fn one_run(a: &Piece, b: &Piece) -> bool {
    match (a, b) {
        (Piece::Glyph(a), Piece::Glyph(b)) => a.face == b.face && a.y == b.y && a.scale == b.scale,
        _ => false,
    }
}
