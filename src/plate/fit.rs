//! What part of the plane a field shows, and how high it is: light at 45 degrees, so one scale for both axes.

use kurbo::{Rect, Size};

use super::style::Style;

/// What a panel wants to show, in its plane.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Wanted {
    /// The level range, where it is given.
    pub(super) x: Option<(f64, f64)>,
    /// The upright range, where it is given.
    pub(super) y: Option<(f64, f64)>,
    /// What there is to be seen.
    pub(super) contents: Rect,
}

/// A field's height relative to its width: lowest and highest where the range is given, lowest and highest where it
/// is fitted.
const GIVEN_ASPECT: (f64, f64) = (0.3, 1.6);
const FITTED_ASPECT: (f64, f64) = (0.62, 0.963);
/// Least part of a panel's width that a field takes.
const LEAST_PART: f64 = 0.25;
/// A flat content counts as this part of its other side.
const FLAT: f64 = 0.25;

impl Wanted {
    /// The contents, blown up where they are flat or a point, so that they have a scale.
    fn span(&self) -> Size {
        let (w, h) = (self.contents.width(), self.contents.height());
        let far = self.contents.x0.abs().max(self.contents.y0.abs());
        let least = FLAT * w.max(h);
        let least = if least > far * 1e-9 && least > 0.0 {
            least
        } else {
            (far * 1e-3).max(1.0)
        };
        Size::new(w.max(least), h.max(least))
    }

    /// mm per unit at which the contents fill a field of some width.
    fn scale_by_width(&self, width: f64, style: &Style) -> f64 {
        match self.x {
            Some((low, high)) => width / (high - low),
            None => (width - 2.0 * style.air).max(width / 3.0) / self.span().width,
        }
    }

    /// The height a field of some width would like.
    pub(super) fn height(&self, width: f64, style: &Style) -> f64 {
        let scale = self.scale_by_width(width, style);
        let (bounds, height) = if let Some((low, high)) = self.y {
            (GIVEN_ASPECT, (high - low) * scale)
        } else {
            let room = self.span().height * scale + style.air + style.below_axis;
            (FITTED_ASPECT, room)
        };
        height.clamp(bounds.0 * width, bounds.1 * width)
    }

    /// True where both ranges are given, so that the height follows from them.
    pub(super) fn is_given(&self) -> bool {
        self.x.is_some() && self.y.is_some()
    }

    /// The part of the plane in a field of at most some size, and the field's own size. The flag says that a given
    /// range had to be widened.
    pub(super) fn fit(&self, room: Size, style: &Style) -> (Rect, Size, bool) {
        match (self.x, self.y) {
            (Some(x), Some(y)) => given(x, y, room),
            (Some((x0, x1)), None) => {
                let by_width = room.width / (x1 - x0);
                let by_height = inner_height(room, style) / self.span().height;
                let scale = by_width.min(by_height).max(LEAST_PART * by_width);
                let size = Size::new((x1 - x0) * scale, room.height);
                let y0 = self.lower_edge(room.height, scale, style);
                (Rect::new(x0, y0, x1, y0 + room.height / scale), size, false)
            }
            (None, Some((y0, y1))) => {
                let scale = (room.height / (y1 - y0)).min(self.scale_by_width(room.width, style));
                let scale = scale.max(LEAST_PART * room.height / (y1 - y0));
                let (x0, x1) = self.across(room.width, scale);
                let size = Size::new(room.width, ((y1 - y0) * scale).min(room.height));
                (Rect::new(x0, y0, x1, y0 + size.height / scale), size, false)
            }
            (None, None) => {
                let by_height = inner_height(room, style) / self.span().height;
                let scale = by_height.min(self.scale_by_width(room.width, style));
                let (x0, x1) = self.across(room.width, scale);
                let y0 = self.lower_edge(room.height, scale, style);
                (Rect::new(x0, y0, x1, y0 + room.height / scale), room, false)
            }
        }
    }

    /// The contents in the middle.
    fn across(&self, width: f64, scale: f64) -> (f64, f64) {
        let middle = self.contents.center().x;
        let half = width / scale / 2.0;
        (middle - half, middle + half)
    }

    /// The contents stand on the room for the level axis' numbers; flat ones in the middle.
    fn lower_edge(&self, height: f64, scale: f64, style: &Style) -> f64 {
        let spare = self.span().height - self.contents.height();
        let below = style.below_axis.min(height / 4.0) / scale;
        self.contents.y0 - spare / 2.0 - below
    }
}

/// The height in which contents stand.
fn inner_height(room: Size, style: &Style) -> f64 {
    (room.height - style.air - style.below_axis).max(room.height / 3.0)
}

/// Both ranges as given; a field that would be a sliver shows more of the plane around its middle instead.
fn given((x0, x1): (f64, f64), (y0, y1): (f64, f64), room: Size) -> (Rect, Size, bool) {
    let (dx, dy) = (x1 - x0, y1 - y0);
    let scale = (room.width / dx).min(room.height / dy);
    let size = Size::new(dx * scale, dy * scale);
    let least = LEAST_PART * room.width.min(room.height);
    if size.width >= least && size.height >= least {
        return (Rect::new(x0, y0, x1, y1), size, false);
    }
    let size = Size::new(size.width.max(least), size.height.max(least));
    let (mx, my) = (x0.midpoint(x1), y0.midpoint(y1));
    let (w, h) = (size.width / scale / 2.0, size.height / scale / 2.0);
    (Rect::new(mx - w, my - h, mx + w, my + h), size, true)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn one_scale_both_ways() {
        let style = Style::new(9.0);
        let contents = Rect::new(-1.0, 0.0, 2.0, 4.0);
        for (x, y) in [
            (None, None),
            (Some((-3.0, 5.0)), None),
            (None, Some((-1.0, 9.0))),
            (Some((-3.0, 5.0)), Some((0.0, 7.0))),
            (Some((0.0, 1.0)), Some((0.0, 1e6))),
        ] {
            let wanted = Wanted { x, y, contents };
            let (plane, size, _) = wanted.fit(Size::new(78.3, 75.4), &style);
            let (a, b) = (size.width / plane.width(), size.height / plane.height());
            assert!((a / b - 1.0).abs() < 1e-12, "{x:?} {y:?}: {a} {b}");
            assert!(size.width <= 78.3 + 1e-9 && size.height <= 75.4 + 1e-9);
        }
    }

    #[test]
    fn contents_lie_inside_a_fitted_field() {
        let style = Style::new(9.0);
        for contents in [
            Rect::new(-1.0, 0.0, 2.0, 4.0),
            Rect::new(0.0, 0.0, 0.0, 0.0),
            Rect::new(5e8, 5e8, 7e8, 7e8),
            Rect::new(0.0, -3.0, 1e-9, 0.0),
        ] {
            let wanted = Wanted {
                x: None,
                y: None,
                contents,
            };
            let (plane, _, _) = wanted.fit(Size::new(78.3, 75.4), &style);
            assert!(plane.union(contents) == plane, "{contents:?} {plane:?}");
        }
    }
}
