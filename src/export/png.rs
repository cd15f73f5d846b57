//! PNG with its physical size.

use kurbo::{BezPath, PathEl};
use png::{BitDepth, ColorType, Encoder, PixelDimensions, SrgbRenderingIntent, Unit};
use tiny_skia::{
    FillRule, LineCap, LineJoin, Paint as Brush, Path, PathBuilder, Pixmap, Stroke as Line,
    StrokeDash, Transform,
};

use super::{ExportFault, PROGRAM, check, clean, goes_anywhere};
use crate::marks::{Cap, Ink, Join, Mark, Paint, Shape, Sheet};

/// Fewest and most dots per inch.
const DPI: std::ops::RangeInclusive<f64> = 20.0..=2_400.0;
/// The longest side, dots.
const LONGEST: f64 = 30_000.0;
/// Dots that are painted at a time: 64 MB.
const BAND: usize = 16_000_000;

/// Writes a sheet as PNG at some dots per inch, on white.
///
/// # Errors
/// A sheet without a size; under 20 or over 2,400 dpi; over 30,000 dots a side.
pub fn png(sheet: &Sheet, dpi: f64) -> Result<Vec<u8>, ExportFault> {
    check(sheet)?;
    if !DPI.contains(&dpi) {
        let what = format!("a picture of {dpi} dots per inch was asked for");
        return Err(ExportFault::new(
            what,
            format!("ask for {} to {} dpi", DPI.start(), DPI.end()),
        ));
    }
    let scale = dpi / 25.4;
    let (width, height) = (
        dots(sheet.width * scale, dpi)?,
        dots(sheet.height * scale, dpi)?,
    );
    let drawn: Vec<Drawn> = sheet
        .marks
        .iter()
        .filter_map(|mark| drawn(mark, scale))
        .collect();
    picture(sheet, &drawn, (width, height), dpi).map_err(|cause| {
        ExportFault::new(
            format!("the picture cannot be written: {cause}"),
            "ask for fewer dots per inch",
        )
    })
}

#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "between 1 and 30,000"
)]
fn dots(side: f64, dpi: f64) -> Result<u32, ExportFault> {
    if side > LONGEST {
        let what = format!("at {dpi} dpi the picture is {side:.0} dots long, over {LONGEST}");
        let mend = format!("ask for at most {:.0} dpi", (dpi * LONGEST / side).floor());
        return Err(ExportFault::new(what, mend));
    }
    Ok(side.round().max(1.0) as u32)
}

/// A mark in dots.
struct Drawn {
    path: Path,
    ink: Ink,
    line: Option<Line>,
    /// First and last row it touches.
    rows: (f64, f64),
}

fn drawn(mark: &Mark, scale: f64) -> Option<Drawn> {
    let ink_box = mark.shape.ink_box();
    let (ink, line) = match &mark.shape {
        Shape::Label { ink, .. }
        | Shape::Path {
            paint: Paint::Fill(ink),
            ..
        } => (*ink, None),
        Shape::Path {
            paint: Paint::Stroke(stroke),
            ..
        } => {
            let dash = stroke
                .dash
                .iter()
                .map(|length| narrow(length * scale))
                .collect();
            let line = Line {
                width: narrow(stroke.width * scale),
                miter_limit: 10.0,
                line_cap: if stroke.cap == Cap::Round {
                    LineCap::Round
                } else {
                    LineCap::Butt
                },
                line_join: if stroke.join == Join::Round {
                    LineJoin::Round
                } else {
                    LineJoin::Miter
                },
                dash: StrokeDash::new(dash, 0.0),
            };
            (stroke.ink, Some(line))
        }
    };
    // A mitred corner may reach ten half widths out.
    let margin = line
        .as_ref()
        .map_or(1.0, |line| 1.0 + 5.0 * f64::from(line.width));
    let rows = (ink_box.y0 * scale - margin, ink_box.y1 * scale + margin);
    Some(Drawn {
        path: path(&mark.shape.outline(), scale)?,
        ink,
        line,
        rows,
    })
}

#[expect(clippy::cast_possible_truncation, reason = "the painter works in f32")]
fn narrow(value: f64) -> f32 {
    value as f32
}

fn path(outline: &BezPath, scale: f64) -> Option<Path> {
    if !goes_anywhere(outline) {
        return None;
    }
    let mut path = PathBuilder::new();
    let at = |point: kurbo::Point| (narrow(point.x * scale), narrow(point.y * scale));
    for element in outline.elements() {
        match *element {
            PathEl::MoveTo(end) => {
                let (x, y) = at(end);
                path.move_to(x, y);
            }
            PathEl::LineTo(end) => {
                let (x, y) = at(end);
                path.line_to(x, y);
            }
            PathEl::QuadTo(by, end) => {
                let ((x1, y1), (x, y)) = (at(by), at(end));
                path.quad_to(x1, y1, x, y);
            }
            PathEl::CurveTo(by, and, end) => {
                let ((x1, y1), (x2, y2), (x, y)) = (at(by), at(and), at(end));
                path.cubic_to(x1, y1, x2, y2, x, y);
            }
            PathEl::ClosePath => path.close(),
        }
    }
    path.finish()
}

fn picture(
    sheet: &Sheet,
    drawn: &[Drawn],
    (width, height): (u32, u32),
    dpi: f64,
) -> Result<Vec<u8>, png::EncodingError> {
    let mut bytes = Vec::new();
    let mut encoder = Encoder::new(&mut bytes, width, height);
    encoder.set_color(ColorType::Rgb);
    encoder.set_depth(BitDepth::Eight);
    encoder.set_source_srgb(SrgbRenderingIntent::RelativeColorimetric);
    encoder.set_pixel_dims(Some(per_metre(dpi)));
    let texts = [
        ("Title", &*sheet.title),
        ("Description", &sheet.words),
        ("Software", PROGRAM),
    ];
    for (keyword, text) in texts {
        encoder.add_itxt_chunk(keyword.into(), clean(text))?;
    }
    let mut writer = encoder.write_header()?;
    let mut stream = writer.stream_writer()?;
    let rows = u32::try_from((BAND / width as usize).max(1)).unwrap_or(u32::MAX);
    let mut top = 0;
    while top < height {
        let band = rows.min(height - top);
        std::io::Write::write_all(&mut stream, &painted(drawn, width, top, band))?;
        top += band;
    }
    stream.finish()?;
    writer.finish()?;
    Ok(bytes)
}

#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "at most 94,489"
)]
fn per_metre(dpi: f64) -> PixelDimensions {
    let dots = (dpi / 0.0254).round() as u32;
    PixelDimensions {
        xppu: dots,
        yppu: dots,
        unit: Unit::Meter,
    }
}

/// Some rows of the picture, three bytes a dot.
fn painted(drawn: &[Drawn], width: u32, top: u32, rows: u32) -> Vec<u8> {
    let Some(mut band) = Pixmap::new(width, rows) else {
        return Vec::new();
    };
    band.fill(tiny_skia::Color::WHITE);
    let place = Transform::from_translate(0.0, -narrow(f64::from(top)));
    for mark in drawn {
        if mark.rows.1 < f64::from(top) || mark.rows.0 > f64::from(top + rows) {
            continue;
        }
        let mut brush = Brush::default();
        let Ink(red, green, blue) = mark.ink;
        brush.set_color_rgba8(red, green, blue, 255);
        match &mark.line {
            None => band.fill_path(&mark.path, &brush, FillRule::Winding, place, None),
            Some(line) => band.stroke_path(&mark.path, &brush, line, place, None),
        }
    }
    band.data()
        .chunks_exact(4)
        .flat_map(|dot| dot.iter().take(3).copied())
        .collect()
}
