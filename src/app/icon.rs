//! The desk's icons: strokes on a grid of 20.

#![expect(
    clippy::cast_possible_truncation,
    reason = "the screen is in f32 points"
)]

use egui::{Color32, Painter, Pos2, Rect, Shape, Stroke, pos2, vec2};
use kurbo::{BezPath, PathEl};

use crate::fault::Kind;

/// An icon.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Icon {
    Event,
    Line,
    Particle,
    Collision,
    Frame,
    Plate,
    Fault,
    Sound,
    Open,
    /// Points right; turned down for an open list.
    Closed,
    Down,
    Plus,
    Minus,
}

impl Icon {
    /// The icon of a kind of object.
    pub(super) fn of(kind: Kind) -> Self {
        match kind {
            Kind::Event => Self::Event,
            Kind::Line => Self::Line,
            Kind::Particle | Kind::Species => Self::Particle,
            Kind::Collision => Self::Collision,
            Kind::Frame => Self::Frame,
            Kind::Plate | Kind::Scene => Self::Plate,
        }
    }

    fn strokes(self) -> &'static str {
        match self {
            Self::Event => "M10 2.5 V5 M10 15 V17.5 M2.5 10 H5 M15 10 H17.5",
            Self::Line => "M6 17.5 L14 2.5 M6 12 L10.4 14.3 M9.6 5.7 L14 8",
            Self::Particle => "M4 18 L10.6 9 M2.5 2.5 Q10 9.5 17.5 2.5",
            Self::Collision => "M3.5 17 L8.4 11.7 M16.5 17 L11.6 11.7 M8.8 8 L6 3 M11.2 8 L14 3",
            Self::Frame => {
                "M4.5 16 L8.5 3 M4.5 16 L17 12 M6.4 4.8 L8.5 3 L9.4 5.6 M14.8 10.6 L17 12 L15.2 14.2"
            }
            Self::Plate => "M3.5 3.5 H16.5 V16.5 H3.5 Z M10 3.5 V16.5",
            Self::Fault => "M10 3 L17.5 16.5 H2.5 Z M10 8 V11.6 M10 13.9 V14.1",
            Self::Sound => "M4 10.5 L8.2 14.8 L16 5.5",
            Self::Open => "M2.5 16.5 V4.5 H8 L10 6.5 H17.5 V16.5 Z",
            Self::Closed => "M7.5 5 L12.5 10 L7.5 15",
            Self::Down => "M5 7.5 L10 12.5 L15 7.5",
            Self::Plus => "M10 4 V16 M4 10 H16",
            Self::Minus => "M4 10 H16",
        }
    }

    fn fills(
        self,
        painter: &Painter,
        place: impl Fn(f64, f64) -> Pos2,
        scale: f32,
        colour: Color32,
    ) {
        match self {
            Self::Event => {
                painter.circle_filled(place(10.0, 10.0), 2.6 * scale, colour);
            }
            Self::Collision => {
                painter.circle_filled(place(10.0, 10.0), 2.5 * scale, colour);
            }
            Self::Particle => {
                let head = [place(13.6, 5.0), place(12.7, 10.8), place(8.4, 7.7)];
                painter.add(Shape::convex_polygon(head.to_vec(), colour, Stroke::NONE));
            }
            Self::Line
            | Self::Frame
            | Self::Plate
            | Self::Fault
            | Self::Sound
            | Self::Open
            | Self::Closed
            | Self::Down
            | Self::Plus
            | Self::Minus => {}
        }
    }
}

/// Paints an icon, `side` points across, about a centre.
pub(super) fn paint(painter: &Painter, icon: Icon, centre: Pos2, side: f32, colour: Color32) {
    let rect = Rect::from_center_size(centre, vec2(side, side));
    let scale = side / 20.0;
    let place = |x: f64, y: f64| {
        pos2(
            rect.left() + x as f32 * scale,
            rect.top() + y as f32 * scale,
        )
    };
    let stroke = Stroke::new(1.5 * scale.max(0.8), colour);
    for line in flattened(icon.strokes()) {
        let points: Vec<Pos2> = line.iter().map(|p| place(p.x, p.y)).collect();
        // Round ends: a disc at each.
        for end in [points.first(), points.last()].into_iter().flatten() {
            painter.circle_filled(*end, stroke.width / 2.0, colour);
        }
        painter.add(Shape::line(points, stroke));
    }
    icon.fills(painter, place, scale, colour);
}

fn flattened(path: &str) -> Vec<Vec<kurbo::Point>> {
    let Ok(path) = BezPath::from_svg(path) else {
        return Vec::new();
    };
    let mut lines: Vec<Vec<kurbo::Point>> = Vec::new();
    kurbo::flatten(path, 0.05, |element| match element {
        PathEl::MoveTo(p) => lines.push(vec![p]),
        PathEl::LineTo(p) => {
            if let Some(line) = lines.last_mut() {
                line.push(p);
            }
        }
        PathEl::ClosePath => {
            if let Some(line) = lines.last_mut() {
                line.extend(line.first().copied());
            }
        }
        PathEl::QuadTo(..) | PathEl::CurveTo(..) => {}
    });
    lines
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_icon_draws_within_its_grid() {
        for icon in [
            Icon::Event,
            Icon::Line,
            Icon::Particle,
            Icon::Collision,
            Icon::Frame,
            Icon::Plate,
            Icon::Fault,
            Icon::Sound,
            Icon::Open,
            Icon::Closed,
            Icon::Down,
            Icon::Plus,
            Icon::Minus,
        ] {
            let lines = flattened(icon.strokes());
            assert!(!lines.is_empty(), "{icon:?}");
            for p in lines.iter().flatten() {
                assert!(
                    (0.0..=20.0).contains(&p.x) && (0.0..=20.0).contains(&p.y),
                    "{icon:?}"
                );
            }
        }
    }
}
