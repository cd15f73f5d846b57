//! A solved scene and a plate to a sheet of marks. All drawing decisions live here, once; one file a view.

mod arrow;
mod axes;
mod beside;
mod canvas;
mod clip;
mod curve;
mod energy;
mod fit;
mod inks;
mod job;
mod names;
mod outline;
mod place;
mod spacetime;
mod style;
mod tall;
mod ticks;
mod tilted;
mod track;
mod vectors;
mod whole;
mod window;
mod words;

use std::collections::BTreeSet;

use kurbo::{Affine, Point, Rect, Size};

use self::canvas::{Canvas, Rank, Seek, Wish};
use self::energy::Energy;
use self::fit::Wanted;
use self::inks::Inks;
use self::job::{Job, letter, paper};
use self::names::Names;
use self::place::Candidate;
use self::spacetime::Spacetime;
use self::style::{
    COLUMN, INK, LARGEST, MOST_PANELS, SMALLEST_FIELD, Style, TEXT_RANGE, USUAL_TEXT,
};
use self::window::{Groups, Window};
use crate::fault::{Fault, Kind, ObjectId};
use crate::marks::{Mark, Sheet};
use crate::quantity::Typed;
use crate::scene::{Panel, Plate, View, When};
use crate::solve::{Solved, Viewing};

/// A plate laid out.
#[derive(Clone, Debug)]
pub struct Laid {
    /// The sheet.
    pub sheet: Sheet,
    /// Where its panels are and what they look at, for the window.
    pub panels: Vec<PanelPlace>,
    /// Faults of labels and ranges, unplaced.
    pub faults: Vec<Fault>,
}

/// Where one panel stands on its sheet.
#[derive(Clone, Debug)]
pub struct PanelPlace {
    /// `a`, `b`, ..
    pub letter: char,
    /// The whole panel, mm.
    pub outer: Rect,
    /// The field in which things are drawn, mm.
    pub field: Rect,
    /// The kind of view.
    pub view: View,
    /// The frame it looks from.
    pub viewing: Viewing,
    /// True where a fault leaves nothing to draw.
    pub is_blank: bool,
    /// mm from (horizontal, vertical) coordinates in internal units: x right, t (or E) up. An affine map.
    pub from_plane: Affine,
}

/// What is drawn of a plate and from where, where that differs from what the plate itself says.
#[derive(Clone, Debug, Default)]
pub struct Override {
    /// The viewing frame of each panel, where `Some`; panels beyond the list keep their own.
    pub viewing: Vec<Option<When>>,
    /// Draw only this panel (index), at its own width.
    pub only: Option<usize>,
}

/// What a panel shows.
#[derive(Clone, Debug)]
enum Contents {
    Spacetime(Box<Spacetime>),
    Energy(Box<Energy>),
    /// Nothing, for a fault.
    Blank,
}

/// A panel before it is drawn.
#[derive(Clone, Debug)]
struct Prepared {
    index: usize,
    view: View,
    viewing: Viewing,
    contents: Contents,
}

impl Contents {
    fn wanted(&self) -> Wanted {
        match self {
            Self::Spacetime(panel) => panel.wanted,
            Self::Energy(panel) => panel.wanted,
            Self::Blank => Wanted {
                x: None,
                y: None,
                contents: Rect::ZERO,
            },
        }
    }
}

/// Lays out a plate. Never fails: what cannot be drawn is a fault, the rest is drawn.
pub fn lay_out(solved: &Solved, name: &str, plate: &Plate, change: &Override) -> Laid {
    let mut job = Job {
        solved,
        left_out: solved
            .left_out
            .iter()
            .map(|id| (id.kind, &*id.name))
            .collect(),
        plate: ObjectId::new(Kind::Plate, name),
        style: Style::new(USUAL_TEXT),
        names: Names::default(),
        inks: inks(solved, plate),
        groups: Groups::default(),
    };
    job.style = Style::new(text_size(&mut job, plate));
    let own_panels = panels_of(&mut job, plate);
    let count = own_panels.len().max(1);
    let slot = slot_width(&mut job, plate, count);
    let prepared: Vec<Prepared> = own_panels
        .iter()
        .enumerate()
        .filter(|(index, _)| change.only.is_none_or(|only| only == *index))
        .map(|(index, panel)| prepare(&mut job, index, panel, change))
        .collect();
    let height = height(&mut job, plate);
    let tall = tall::Tall::of(&job.style, slot, height, &prepared);
    let mut marks: Vec<Mark> = Vec::new();
    let mut panels = Vec::new();
    for (place, panel) in prepared.iter().enumerate() {
        let left = place as f64 * (slot + job.style.gutter);
        let outer = Rect::new(left, 0.0, left + slot, tall.height(&job.style));
        let window = tall.window(&mut job, outer, panel);
        panels.push(PanelPlace {
            letter: letter(panel.index),
            outer,
            field: window.field,
            view: panel.view,
            viewing: panel.viewing.clone(),
            is_blank: matches!(panel.contents, Contents::Blank),
            from_plane: window.affine(),
        });
        marks.extend(draw(&mut job, panel, window, prepared.len() > 1));
    }
    let shown = prepared.len().max(1) as f64;
    let title = plate.title.clone().unwrap_or_else(|| name.to_owned());
    let sheet = Sheet {
        width: shown * slot + (shown - 1.0) * job.style.gutter,
        height: tall.height(&job.style),
        words: words::of(&job, plate, &prepared),
        title,
        groups: job.groups.list,
        marks,
    };
    Laid {
        sheet,
        panels,
        faults: job.names.faults,
    }
}

/// The plate drawn where a scene has none: one that shows everything.
pub fn everything(solved: &Solved) -> Plate {
    let has_particles = !solved.particles.is_empty();
    let has_spacetime = !(solved.events.is_empty() && solved.lines.is_empty() && has_particles);
    let views = [
        (View::Spacetime, has_spacetime),
        (View::EnergyMomentum, has_particles),
    ];
    let panels = views
        .into_iter()
        .filter(|(_, shown)| *shown)
        .map(|(view, _)| Panel {
            view,
            ..Panel::default()
        })
        .collect();
    let title = Some(solved.title.clone()).filter(|title| !title.is_empty());
    Plate {
        title,
        panels,
        ..Plate::default()
    }
}

/// A plate's panels, as many as there are letters for.
fn panels_of<'p>(job: &mut Job<'_>, plate: &'p Plate) -> &'p [Panel] {
    let panels = &plate.panels;
    if panels.is_empty() {
        job.fault(
            "panels",
            "the plate has no panels",
            "give it one, such as (view: Spacetime)",
        );
    }
    if panels.len() > MOST_PANELS {
        job.fault(
            "panels",
            format!(
                "the plate has {} panels, and panels have one letter each",
                panels.len()
            ),
            format!("give it at most {MOST_PANELS} panels"),
        );
    }
    &panels[..panels.len().min(MOST_PANELS)]
}

fn inks(solved: &Solved, plate: &Plate) -> Inks {
    let mut named = BTreeSet::new();
    let mut has_all = false;
    for panel in &plate.panels {
        match (panel.view, &panel.lines) {
            (View::Spacetime, Some(list)) => named.extend(list.iter().map(String::as_str)),
            (View::Spacetime, None) => has_all = true,
            (View::EnergyMomentum, _) => {}
        }
    }
    Inks::of(solved, |name| has_all || named.contains(name))
}

fn text_size(job: &mut Job<'_>, plate: &Plate) -> f64 {
    let Some(typed) = &plate.text else {
        return USUAL_TEXT;
    };
    let Some(size) = job.number(typed, &paper("pt"), "text") else {
        return USUAL_TEXT;
    };
    let (least, most) = TEXT_RANGE;
    if (least..=most).contains(&size) {
        return size;
    }
    job.fault(
        "text",
        "the lettering has no size that can be printed",
        format!("choose {least} to {most} pt"),
    );
    USUAL_TEXT
}

/// The width of one panel, mm.
fn slot_width(job: &mut Job<'_>, plate: &Plate, count: usize) -> f64 {
    let count = count as f64;
    let gutters = (count - 1.0) * job.style.gutter;
    let margins = job.style.margins[0] + job.style.margins[1];
    let least = count * (SMALLEST_FIELD + margins) + gutters;
    let width = length(job, plate.width.as_ref(), "width", least);
    width.map_or(COLUMN.max(SMALLEST_FIELD + margins), |width| {
        (width - gutters) / count
    })
}

/// The sheet's height, where it is given, mm.
fn height(job: &mut Job<'_>, plate: &Plate) -> Option<f64> {
    let least = SMALLEST_FIELD + job.style.margins[2] + job.style.margins[3];
    length(job, plate.height.as_ref(), "height", least)
}

fn length(job: &mut Job<'_>, typed: Option<&Typed>, field: &str, least: f64) -> Option<f64> {
    let value = job.number(typed?, &paper("mm"), field)?;
    if value >= least && value <= LARGEST {
        return Some(value);
    }
    let wrong = if value > LARGEST {
        "over 5 m"
    } else {
        "too little for its panels and lettering"
    };
    let least = least.ceil();
    job.fault(
        field,
        format!("the plate's {field} is {wrong}"),
        format!("choose {least} mm to 5000 mm"),
    );
    None
}

fn prepare(job: &mut Job<'_>, index: usize, panel: &Panel, change: &Override) -> Prepared {
    let when = change
        .viewing
        .get(index)
        .and_then(Option::as_ref)
        .unwrap_or(&panel.when);
    let Some(viewing) = viewing(job, index, when) else {
        let viewing = job.solved.base_view();
        return Prepared {
            index,
            view: panel.view,
            viewing,
            contents: Contents::Blank,
        };
    };
    let contents = match panel.view {
        View::Spacetime => Spacetime::of(job, index, panel, &viewing)
            .map_or(Contents::Blank, |panel| {
                Contents::Spacetime(Box::new(panel))
            }),
        View::EnergyMomentum => Contents::Energy(Box::new(Energy::of(job, index, panel, &viewing))),
    };
    Prepared {
        index,
        view: panel.view,
        viewing,
        contents,
    }
}

fn viewing(job: &mut Job<'_>, index: usize, when: &When) -> Option<Viewing> {
    let found = job.solved.viewing(when);
    if found.is_some() {
        return found;
    }
    match when {
        When::Base => {}
        When::Frame(name) => {
            if !job.is_left_out(Kind::Frame, name) {
                let solved = job.solved;
                let known: Vec<_> = solved
                    .frames
                    .keys()
                    .chain([&solved.base])
                    .cloned()
                    .collect();
                job.unknown("frame", name, &format!("panels.{index}.frame"), &known);
            }
        }
        When::Rapidity(_) => job.fault(
            &format!("panels.{index}.rapidity"),
            "the panel's rapidity is no number between -600 and 600",
            "write a plain number, such as 0.4",
        ),
    }
    None
}

fn draw(job: &mut Job<'_>, panel: &Prepared, window: Window, has_letter: bool) -> Vec<Mark> {
    let style = job.style.clone();
    let mut groups = std::mem::take(&mut job.groups);
    let letter = letter(panel.index);
    let mut canvas = Canvas::new(&style, window, letter, &mut groups);
    if has_letter {
        panel_letter(job, &mut canvas, letter);
    }
    match &panel.contents {
        Contents::Spacetime(contents) => contents.draw(job, &mut canvas, panel.index),
        Contents::Energy(contents) => contents.draw(job, &mut canvas),
        Contents::Blank => {}
    }
    let missing = canvas.set_labels();
    job.unplaced(panel.index, missing);
    let marks = canvas.finish();
    job.groups = groups;
    marks
}

/// `(a)`, top left, outside the field.
fn panel_letter(job: &mut Job<'_>, canvas: &mut Canvas<'_>, letter: char) {
    let group = canvas.group("letter");
    let label = job.names.word(&format!("({letter})"));
    let size = canvas.size(&label);
    let outer = canvas.window.outer;
    let [left, ..] = canvas.style.margins;
    let corner = Point::new(outer.x0 + left, outer.y0 + canvas.style.panel_letter);
    let rect = Rect::from_origin_size(corner, Size::new(size.x, size.y));
    let seek = Seek::Places(vec![Candidate {
        rect,
        cost: 0.0,
        leader: None,
    }]);
    canvas.wish(Wish {
        rank: Rank::Title,
        group,
        blame: None,
        label,
        ink: INK,
        seek,
    });
}
