//! The rail: the viewing frame's rapidity, with a tick at the rapidity of everything in the scene.

mod dimension;
mod entry;
mod layout;
mod paint;
mod sense;

use egui::Rect;

pub(crate) use layout::ACROSS;
pub(super) use paint::paint;
pub(super) use sense::sense;

use super::context::Context;
use super::shown::Shown;
use super::view::View;
use crate::quantity::{Typed, shortest};
use crate::scene::When;
use crate::task::SpeedForm;
use layout::{CloseUp, Name, Scale, Tick};

/// Height of the rail, points.
pub(super) const HEIGHT: f32 = 106.0;
/// With a close-up open.
pub(super) const HEIGHT_CLOSE: f32 = 192.0;
/// Middle of the first row.
const ROW: f32 = 20.0;
/// Middle of the names over the axis.
const NAMES: f32 = 48.0;
/// The axis.
const AXIS: f32 = 74.0;
/// The axis of the whole when a close-up is open.
const AXIS_ABOVE: f32 = 68.0;
/// The axis of a close-up.
const AXIS_CLOSE: f32 = 164.0;
/// How long going to a tick takes, seconds.
const GLIDE: f64 = 0.2;

/// The rail's own state.
#[derive(Clone, Debug, Default)]
pub(super) struct RailView {
    /// The part of the axis shown, where it was zoomed.
    range: Option<(f64, f64)>,
    /// The axis as it was when the handle was taken: it does not move under the hand.
    held: Option<(f64, f64)>,
    /// Where the handle was taken, in points from its middle.
    grip: f32,
    /// A rapidity within the crowd that was opened by a click.
    opened: Option<f64>,
    glide: Option<Glide>,
    entry: Option<Entry>,
}

/// A move of the handle to a tick.
#[derive(Clone, Debug, PartialEq)]
struct Glide {
    from: f64,
    to: f64,
    start: f64,
    when: When,
}

/// A field being typed in.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Entry {
    form: SpeedForm,
    text: String,
    /// Why it is no rapidity.
    fault: Option<String>,
}

/// What the rail asks for beyond a frame.
#[derive(Clone, Debug, PartialEq)]
pub(super) enum RailCommand {
    /// Show this part of the axis; all of it for none.
    Range(Option<(f64, f64)>),
    /// The handle is taken some points off its middle, with the axis as it is.
    Take { axis: (f64, f64), grip: f32 },
    /// The handle is let go.
    Release,
    /// Open the crowd at a rapidity.
    OpenCrowd(f64),
    /// Begin to go to a frame.
    Go {
        /// Where it is now.
        from: f64,
        /// Where it lies.
        to: f64,
        /// When, seconds.
        start: f64,
        /// The frame.
        when: When,
    },
    /// A field's state.
    Entry(Option<Entry>),
}

impl RailView {
    /// Carries out a command.
    pub(super) fn apply(&mut self, command: RailCommand) {
        match command {
            RailCommand::Range(range) => self.range = range,
            RailCommand::Take { axis, grip } => {
                self.held = Some(axis);
                self.grip = grip;
                self.glide = None;
            }
            RailCommand::Release => self.held = None,
            RailCommand::OpenCrowd(at) => self.opened = Some(at),
            RailCommand::Go {
                from,
                to,
                start,
                when,
            } => {
                self.glide = Some(Glide {
                    from,
                    to,
                    start,
                    when,
                });
            }
            RailCommand::Entry(entry) => self.entry = entry,
        }
    }

    /// The frame a move to a tick has come to; none while nothing moves.
    pub(super) fn gliding(&mut self, now: f64) -> Option<When> {
        let glide = self.glide.as_ref()?;
        let part = ((now - glide.start) / GLIDE).clamp(0.0, 1.0);
        if part >= 1.0 {
            return self.glide.take().map(|g| g.when);
        }
        let rest = 1.0 - part;
        let eased = 1.0 - rest * rest * rest;
        Some(at_rapidity(glide.from + (glide.to - glide.from) * eased))
    }
}

/// A frame that moves along x at a rapidity.
pub(super) fn at_rapidity(rapidity: f64) -> When {
    When::Rapidity(Typed::Bare(shortest(rapidity)))
}

/// Everything placed, for a width.
struct Layout {
    rect: Rect,
    ticks: Vec<Tick>,
    scale: Scale,
    names: Vec<Name>,
    close: Option<CloseUp>,
    rapidity: f64,
}

impl Layout {
    fn new(rect: Rect, shown: &Shown, view: &RailView, measure: layout::Measure<'_>) -> Self {
        let ticks = layout::gather(&shown.things);
        let rapidity = shown.rapidity();
        let (low, high) = view
            .held
            .or(view.range)
            .unwrap_or_else(|| layout::whole(ticks.iter().map(|t| t.rapidity).chain([rapidity])));
        let width = rect.width();
        let scale = Scale {
            low,
            high,
            left: layout::END,
            right: width - layout::END,
        };
        let names = layout::names(&ticks, &shown.things, &scale, width, measure);
        let holds = |name: &&Name, at: f64| {
            let range = &ticks[name.ticks.clone()];
            let (first, last) = (range.first(), range.last());
            let (Some(first), Some(last)) = (first, last) else {
                return false;
            };
            (first.rapidity..=last.rapidity).contains(&at)
        };
        let brackets = || names.iter().filter(|n| n.is_bracket());
        let open = view
            .opened
            .and_then(|at| brackets().find(|n| holds(n, at)))
            .or_else(|| brackets().find(|n| holds(n, rapidity)));
        let close = open.map(|bracket| layout::close_up(bracket, &ticks, width, measure));
        Self {
            rect,
            ticks,
            scale,
            names,
            close,
            rapidity,
        }
    }

    fn axis(&self) -> f32 {
        self.rect.top()
            + if self.close.is_some() {
                AXIS_ABOVE
            } else {
                AXIS
            }
    }

    /// The scale on which the handle moves, and the y of its axis.
    fn working(&self) -> (&Scale, f32) {
        match &self.close {
            Some(close) if (close.scale.low..=close.scale.high).contains(&self.rapidity) => {
                (&close.scale, self.rect.top() + AXIS_CLOSE)
            }
            Some(_) | None => (&self.scale, self.axis()),
        }
    }

    /// The handle's middle; it stops at the dots.
    fn handle_x(&self) -> f32 {
        let (scale, _) = self.working();
        let x = scale.x(self.rapidity.clamp(scale.low, scale.high));
        self.rect.left() + x
    }

    /// The box of the handle: a peg under its axis.
    fn handle(&self) -> Rect {
        let (_, axis) = self.working();
        Rect::from_min_max(
            egui::pos2(self.handle_x() - 7.0, axis + 2.0),
            egui::pos2(self.handle_x() + 7.0, axis + 22.0),
        )
    }

    /// The tick the handle stands on.
    fn standing(&self) -> Option<usize> {
        self.ticks
            .iter()
            .position(|t| (t.rapidity - self.rapidity).abs() <= 1e-9 * t.rapidity.abs().max(1.0))
    }
}

/// How high the rail is now.
pub(super) fn height(ui: &egui::Ui, width: f32, shown: &Shown, view: &View) -> f32 {
    let rect = Rect::from_min_size(egui::Pos2::ZERO, egui::vec2(width, HEIGHT));
    let layout = Layout::new(rect, shown, &view.rail, &measure(ui));
    if layout.close.is_some() {
        HEIGHT_CLOSE
    } else {
        HEIGHT
    }
}

fn measure(ui: &egui::Ui) -> impl Fn(&str) -> f32 {
    let painter = ui.painter().clone();
    // The strong face is the wider one: a name does not move when the handle comes to it.
    move |text: &str| super::text::width(&painter, text, super::theme::Type::CaptionStrong)
}

/// The frame to go to for a tick: the base, a named frame, or a rapidity.
fn frame_of(tick: &Tick, shown: &Shown) -> When {
    let things = tick.members.iter().map(|&i| &shown.things[i]);
    let frame = things
        .clone()
        .find(|t| t.object.kind == crate::fault::Kind::Frame);
    match frame {
        Some(thing) if thing.is_base => When::Base,
        Some(thing) => When::Frame(thing.object.name.to_string()),
        None => at_rapidity(tick.rapidity),
    }
}

/// "rest of beam", where something stands at that rapidity and no named frame does.
pub(super) fn name_at(context: &Context<'_>, rapidity: f64) -> Option<String> {
    let ticks = layout::gather(&context.shown.things);
    let tick = ticks
        .iter()
        .find(|t| (t.rapidity - rapidity).abs() <= 1e-9 * rapidity.abs().max(1.0))?;
    entry::rest_name(tick, context)
}

/// Every frame that has a tick, but the base, with its words.
pub(super) fn destinations(context: &Context<'_>) -> Vec<(String, When)> {
    layout::gather(&context.shown.things)
        .iter()
        .filter(|tick| tick.kind != layout::TickKind::Base)
        .map(|tick| (tick.text(), frame_of(tick, context.shown)))
        .collect()
}
