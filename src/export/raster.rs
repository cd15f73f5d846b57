//! Marks as dots: the one way a sheet is painted, for a PNG and for the screen.

use kurbo::{BezPath, PathEl};
use tiny_skia::{
    FillRule, LineCap, LineJoin, Paint as Brush, Path, PathBuilder, Pixmap, Stroke as Line,
    StrokeDash, Transform,
};

use super::goes_anywhere;
use crate::marks::{Cap, Ink, Join, Mark, Paint, Shape, Sheet};

/// A sheet made ready to be painted at one scale.
#[derive(Clone, Debug)]
pub struct Raster {
    marks: Vec<Drawn>,
}

/// A mark in dots.
#[derive(Clone, Debug)]
struct Drawn {
    path: Path,
    ink: Ink,
    line: Option<Line>,
    /// First and last row it touches.
    rows: (f64, f64),
}

impl Raster {
    /// At some dots to a mm.
    pub fn new(sheet: &Sheet, scale: f64) -> Self {
        Self {
            marks: sheet
                .marks
                .iter()
                .filter_map(|mark| drawn(mark, scale))
                .collect(),
        }
    }

    /// Paints over what a picture holds, whose first dot is at (`left`, `top`) dots from the sheet's corner.
    pub fn paint(&self, picture: &mut Pixmap, left: u32, top: u32) {
        let place = Transform::from_translate(-narrow(f64::from(left)), -narrow(f64::from(top)));
        let (first, last) = (f64::from(top), f64::from(top) + f64::from(picture.height()));
        for mark in self
            .marks
            .iter()
            .filter(|m| m.rows.1 >= first && m.rows.0 <= last)
        {
            let mut brush = Brush::default();
            let Ink(red, green, blue) = mark.ink;
            brush.set_color_rgba8(red, green, blue, 255);
            match &mark.line {
                None => picture.fill_path(&mark.path, &brush, FillRule::Winding, place, None),
                Some(line) => picture.stroke_path(&mark.path, &brush, line, place, None),
            }
        }
    }
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
                line_cap: match stroke.cap {
                    Cap::Round => LineCap::Round,
                    Cap::Butt => LineCap::Butt,
                },
                line_join: match stroke.join {
                    Join::Round => LineJoin::Round,
                    Join::Mitre => LineJoin::Miter,
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
        path: raster_path(&mark.shape.outline(), scale)?,
        ink,
        line,
        rows,
    })
}

#[expect(clippy::cast_possible_truncation, reason = "the painter works in f32")]
fn narrow(value: f64) -> f32 {
    value as f32
}

/// A path in mm as one in dots; none for a path that goes nowhere.
pub fn raster_path(outline: &BezPath, scale: f64) -> Option<Path> {
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
