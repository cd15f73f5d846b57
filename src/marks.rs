//! The sheet: what a plate is once every drawing decision is made. Sizes in mm, origin at the top left, y down.

use std::sync::Arc;

use kurbo::{Affine, BezPath, Point, Rect, Shape as _, Vec2};

use crate::label::Label;

/// A colour of ink or paper, sRGB.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Ink(pub u8, pub u8, pub u8);

/// How the ends of a stroke look.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Cap {
    /// Cut square at the end.
    Butt,
    /// Round.
    Round,
}

/// How the corners of a stroke look.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Join {
    /// Sharp, up to a mitre limit of 10.
    Mitre,
    /// Round.
    Round,
}

/// A stroke.
#[derive(Clone, Debug, PartialEq)]
pub struct Stroke {
    /// Its ink.
    pub ink: Ink,
    /// Width, mm.
    pub width: f64,
    /// On and off lengths, mm; empty for a solid stroke. It starts at the path's start.
    pub dash: Vec<f64>,
    /// Ends.
    pub cap: Cap,
    /// Corners.
    pub join: Join,
}

/// A path and how it is painted.
#[derive(Clone, Debug, PartialEq)]
pub enum Paint {
    /// Filled (non-zero winding).
    Fill(Ink),
    /// Stroked along.
    Stroke(Stroke),
}

/// What a mark is.
#[derive(Clone, Debug, PartialEq)]
pub enum Shape {
    /// A path in mm.
    Path {
        /// The curve, mm.
        path: BezPath,
        /// Its paint.
        paint: Paint,
    },
    /// A label.
    Label {
        /// The label as set.
        label: Arc<Label>,
        /// Where its baseline begins, mm.
        at: Point,
        /// One em, mm.
        em: f64,
        /// Its ink.
        ink: Ink,
    },
}

/// One drawn thing.
#[derive(Clone, Debug, PartialEq)]
pub struct Mark {
    /// Index of the group it belongs to.
    pub group: usize,
    /// What is drawn.
    pub shape: Shape,
}

/// Marks that show one object.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Group {
    /// Unique on the sheet and fit for an XML id: `a-event-turn`.
    pub id: String,
    /// For people: `event turn`.
    pub title: String,
}

/// A finished plate: marks in drawing order.
#[derive(Clone, Debug, PartialEq)]
pub struct Sheet {
    /// Width, mm.
    pub width: f64,
    /// Height, mm.
    pub height: f64,
    /// Its title.
    pub title: String,
    /// What it shows, in words (alternative text).
    pub words: String,
    /// The groups that marks refer to.
    pub groups: Vec<Group>,
    /// In drawing order, lowest first.
    pub marks: Vec<Mark>,
}

impl Shape {
    /// The box of its ink, mm (a stroke's half width included; a mitred corner may reach beyond it).
    pub fn ink_box(&self) -> Rect {
        match self {
            Self::Path { path, .. } if path.elements().is_empty() => Rect::ZERO,
            Self::Path {
                path,
                paint: Paint::Fill(_),
            } => path.bounding_box(),
            Self::Path {
                path,
                paint: Paint::Stroke(stroke),
            } => {
                let half = stroke.width / 2.0;
                path.bounding_box().inflate(half, half)
            }
            Self::Label { label, at, em, .. } => page(*at, *em).transform_rect_bbox(label.ink),
        }
    }
    /// A label's outlines in mm, y down; a path as it is.
    pub fn outline(&self) -> BezPath {
        match self {
            Self::Path { path, .. } => path.clone(),
            Self::Label { label, at, em, .. } => page(*at, *em) * label.outline(),
        }
    }
    /// The same, moved.
    pub fn moved(self, by: Vec2) -> Self {
        match self {
            Self::Path { path, paint } => Self::Path {
                path: Affine::translate(by) * path,
                paint,
            },
            Self::Label { label, at, em, ink } => Self::Label {
                label,
                at: at + by,
                em,
                ink,
            },
        }
    }
}

/// From a label's em (y up, from its baseline) to mm (y down).
fn page(at: Point, em: f64) -> Affine {
    Affine::new([em, 0.0, 0.0, -em, at.x, at.y])
}
