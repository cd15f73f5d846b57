//! A solved scene and a plate to a sheet of marks. All drawing decisions live here, once; one file a view.

use crate::fault::Fault;
use crate::marks::Sheet;
use crate::scene::{Plate, View, When};
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
    pub outer: kurbo::Rect,
    /// The field in which things are drawn, mm.
    pub field: kurbo::Rect,
    /// The kind of view.
    pub view: View,
    /// The frame it looks from.
    pub viewing: Viewing,
    /// mm from (horizontal, vertical) coordinates in internal units: x right, t (or E) up. An affine map.
    pub from_plane: kurbo::Affine,
}

/// What is drawn of a plate and from where, where that differs from what the plate itself says.
#[derive(Clone, Debug, Default)]
pub struct Override {
    /// The viewing frame of each panel, where `Some`; panels beyond the list keep their own.
    pub viewing: Vec<Option<When>>,
    /// Draw only this panel (index), at its own width.
    pub only: Option<usize>,
}

/// Lays out a plate. Never fails: what cannot be drawn is a fault, the rest is drawn.
pub fn lay_out(solved: &Solved, name: &str, plate: &Plate, change: &Override) -> Laid {
    todo!()
}

/// The plate drawn where a scene has none: one that shows everything.
pub fn everything(solved: &Solved) -> Plate {
    todo!()
}
