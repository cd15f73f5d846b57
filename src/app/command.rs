//! What panels ask for. Panels only read; the desk carries commands out between them.

use std::path::PathBuf;

use egui::{ThemePreference, Vec2};

use super::rail::RailCommand;
use super::view::{Help, TableKind};
use crate::fault::{Kind, ObjectId};
use crate::scene::When;

/// A wish of a panel's.
#[derive(Clone, Debug, PartialEq)]
pub(super) enum Command {
    /// Show the chooser of files.
    Choose,
    /// Go to a folder in the chooser.
    Browse(PathBuf),
    /// Put away whatever stands over the desk.
    Dismiss,
    Open(PathBuf),
    Close,
    Quit,
    Plate(usize),
    Panel(usize),
    /// See the active panel, and the ledger, from this frame.
    Frame(When),
    Select(Option<ObjectId>),
    Hover(Option<ObjectId>),
    Table(TableKind),
    Fold(Kind),
    /// Names that begin so and differ by a number: list them, or not.
    Unfold(ObjectId),
    LedgerHeight(f32),
    Fit,
    /// Zoom to a scale in points per mm, about a place given from the middle of the sheet's region.
    Zoom {
        scale: f32,
        about: Vec2,
    },
    Pan(Vec2),
    TrueSize,
    ZoomBy(f32),
    Theme(ThemePreference),
    Help(Help),
    Rail(RailCommand),
}

/// Commands in the order in which they were asked for.
pub(super) type Wishes = Vec<Command>;
