//! Where the paper lies in its region, and between mm on it and points on the screen.

#![expect(
    clippy::cast_possible_truncation,
    reason = "the screen is in f32 points"
)]

use egui::{Pos2, Rect, Vec2, pos2, vec2};

use crate::app::view::Camera;

/// Points to a mm at true size: 96 to the inch.
pub(in crate::app) const MM_TRUE: f32 = 96.0 / 25.4;
/// The smallest and the largest scale, of true size.
const SCALES: (f32, f32) = (0.1, 20.0);

/// A paper's place.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(in crate::app) struct Lie {
    /// Points to a mm.
    pub(in crate::app) scale: f32,
    /// The paper on the screen.
    pub(in crate::app) paper: Rect,
}

/// The part of the region a fitted paper may take: room for bar and tabs above, margins around.
pub(super) fn room(rect: Rect) -> Rect {
    Rect::from_min_max(rect.min + vec2(32.0, 64.0), rect.max - vec2(32.0, 16.0))
}

/// A scale within bounds.
pub(in crate::app) fn bounded(scale: f32) -> f32 {
    scale.clamp(SCALES.0 * MM_TRUE, SCALES.1 * MM_TRUE)
}

impl Lie {
    /// For a sheet of some mm in a region.
    pub(super) fn new(
        rect: Rect,
        (width, height): (f64, f64),
        camera: Camera,
        pixels_per_point: f32,
    ) -> Self {
        let room = room(rect);
        let size = vec2(width as f32, height as f32).max(vec2(1.0, 1.0));
        let (scale, offset) = match camera {
            Camera::Fit => {
                let fit = (room.width() / size.x).min(room.height() / size.y);
                (bounded(fit), Vec2::ZERO)
            }
            Camera::At { scale, offset } => (scale, offset),
        };
        let corner = room.center() + offset - size * scale / 2.0;
        // On whole pixels, so that the picture of the marks is not resampled.
        let snapped = pos2(
            (corner.x * pixels_per_point).round() / pixels_per_point,
            (corner.y * pixels_per_point).round() / pixels_per_point,
        );
        Self {
            scale,
            paper: Rect::from_min_size(snapped, size * scale),
        }
    }

    /// A place on the sheet, mm, on the screen.
    pub(super) fn point(&self, at: kurbo::Point) -> Pos2 {
        self.paper.min + vec2(at.x as f32, at.y as f32) * self.scale
    }

    /// A box in mm on the screen.
    pub(super) fn rect(&self, mm: kurbo::Rect) -> Rect {
        Rect::from_two_pos(
            self.point(kurbo::Point::new(mm.x0, mm.y0)),
            self.point(kurbo::Point::new(mm.x1, mm.y1)),
        )
    }

    /// A place on the screen, in mm on the sheet.
    pub(in crate::app) fn mm(&self, at: Pos2) -> kurbo::Point {
        let from = (at - self.paper.min) / self.scale;
        kurbo::Point::new(f64::from(from.x), f64::from(from.y))
    }
}
