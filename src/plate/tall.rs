//! How high the fields of a plate are and where each stands: panels share their height and, where they can, the
//! height of their origins.

use kurbo::{Rect, Size};

use super::Prepared;
use super::axes::Axes;
use super::job::Job;
use super::style::{SMALLEST_FIELD, Style};
use super::window::Window;

/// The common measures of a plate's panels, mm.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Tall {
    /// Of the fields.
    field: f64,
    /// Below the fields.
    bottom: f64,
}

impl Tall {
    /// For panels of some width; `height` is the whole sheet's, where it is given.
    pub(super) fn of(style: &Style, slot: f64, height: Option<f64>, panels: &[Prepared]) -> Self {
        let [left, right, top, bottom] = style.margins;
        let width = slot - left - right;
        let wished = |given: bool| {
            panels
                .iter()
                .map(|panel| panel.contents.wanted())
                .filter(|wanted| wanted.is_given() == given)
                .map(|wanted| wanted.height(width, style))
                .fold(None, |most: Option<f64>, h| {
                    Some(most.map_or(h, |m| m.max(h)))
                })
        };
        let wish = wished(true).or_else(|| wished(false)).unwrap_or(width);
        let mut tall = Self {
            field: height.map_or(wish, |h| h - top - bottom),
            bottom,
        };
        for panel in panels {
            tall.bottom = tall.bottom.max(tall.room_below(style, width, panel));
        }
        if let Some(height) = height {
            tall.field = (height - top - tall.bottom).max(SMALLEST_FIELD);
        }
        tall
    }

    /// The whole sheet's height.
    pub(super) fn height(&self, style: &Style) -> f64 {
        style.margins[2] + self.field + self.bottom
    }

    /// Room that the level axis' numbers need below the field.
    fn room_below(&self, style: &Style, width: f64, panel: &Prepared) -> f64 {
        let (plane, size, _) = panel
            .contents
            .wanted()
            .fit(Size::new(width, self.field), style);
        let above = (0.0_f64.clamp(plane.y0, plane.y1) - plane.y0) * size.width / plane.width();
        style.number_room - above
    }

    /// Where a panel's field stands and what it shows; more room on its left where the upright axis' numbers need it.
    pub(super) fn window(&self, job: &mut Job<'_>, outer: Rect, panel: &Prepared) -> Window {
        let style = job.style.clone();
        let [usual, right, top, _] = style.margins;
        let place = |left: f64| {
            let room = Size::new(
                (outer.width() - left - right).max(SMALLEST_FIELD),
                self.field,
            );
            let (plane, size, widened) = panel.contents.wanted().fit(room, &style);
            let x0 = outer.x0 + left + (room.width - size.width) / 2.0;
            let y1 = outer.y0 + top + self.field;
            let field = Rect::new(x0, y1 - size.height, x0 + size.width, y1);
            (
                Window {
                    outer,
                    field,
                    plane,
                },
                widened,
            )
        };
        let (first, _) = place(usual);
        let left = (room_left(job, &first, panel) - (first.field.x0 - outer.x0 - usual)).max(usual);
        let (window, widened) = place(left);
        if widened {
            job.finding(
                &format!("panels.{}.range", panel.index),
                "with light at 45 degrees this range would be a sliver, so more than it is shown",
                "give ranges of t and x (or E and px) that are nearer to each other",
            );
        }
        window
    }
}

/// From the panel's edge to the field, so that the widest number has room left of the upright axis.
fn room_left(job: &mut Job<'_>, window: &Window, panel: &Prepared) -> f64 {
    let Some(axes) = panel.axes() else { return 0.0 };
    let plane = window.plane;
    let into = (0.0_f64.clamp(plane.x0, plane.x1) - plane.x0) * window.scale();
    let style = &job.style;
    let ticks = Axes::ticks_in(axes, window, style).y;
    let em = style.em;
    let widest = ticks
        .marks
        .iter()
        .map(|tick| {
            job.names
                .math(&super::names::number(&ticks.text(tick.count)))
                .ink
                .width()
                * em
        })
        .fold(0.0, f64::max);
    style.centred_number + widest + 2.0 * style.clear_edge - into
}

impl Prepared {
    fn axes(&self) -> Option<&Axes> {
        match &self.contents {
            super::Contents::Spacetime(panel) => Some(panel.axes()),
            super::Contents::Energy(panel) => Some(panel.axes()),
            super::Contents::Blank => None,
        }
    }
}
