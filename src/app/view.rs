//! What is looked at and how: nothing here belongs to the scene.

use egui::Vec2;

use super::chooser::Chooser;
use super::rail::RailView;
use crate::fault::ObjectId;
use crate::scene::When;

/// The state of the view.
#[derive(Debug, Default)]
pub(super) struct View {
    /// Which plate, by its place in the scene.
    pub(super) plate: usize,
    /// Which panel of it is active.
    pub(super) panel: usize,
    /// The frame each panel is seen from, where that is not the plate's own.
    pub(super) frames: Vec<Option<When>>,
    pub(super) selected: Option<ObjectId>,
    /// What the pointer is over, on paper, in the list or in the ledger.
    pub(super) hovered: Option<ObjectId>,
    pub(super) camera: Camera,
    pub(super) table: TableKind,
    /// Height of the ledger, where it was dragged.
    pub(super) ledger_height: Option<f32>,
    /// Kinds folded in the list.
    pub(super) folded: Vec<crate::fault::Kind>,
    /// Runs of numbered names that are listed one by one, by kind and what the names begin with.
    pub(super) unfolded: Vec<ObjectId>,
    pub(super) rail: RailView,
    pub(super) chooser: Option<Chooser>,
    pub(super) help: Option<Help>,
}

/// Where the paper lies.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub(super) enum Camera {
    /// The whole plate, as large as it goes.
    #[default]
    Fit,
    /// At a scale in points per mm, with the paper's middle off the middle of its region by some points.
    At {
        /// Points per mm.
        scale: f32,
        /// From the middle of the region to the middle of the paper, points.
        offset: Vec2,
    },
}

/// The ledger's kinds of row.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Default)]
pub(super) enum TableKind {
    #[default]
    Collisions,
    Particles,
    Events,
    Lines,
    Intervals,
}

impl TableKind {
    pub(super) const ALL: [Self; 5] = [
        Self::Collisions,
        Self::Particles,
        Self::Events,
        Self::Lines,
        Self::Intervals,
    ];

    /// Its word.
    pub(super) fn word(self) -> &'static str {
        match self {
            Self::Collisions => "Collisions",
            Self::Particles => "Particles",
            Self::Events => "Events",
            Self::Lines => "Lines",
            Self::Intervals => "Intervals",
        }
    }

    /// The ledger's name for it.
    pub(super) fn table(self) -> &'static str {
        match self {
            Self::Collisions => "collisions",
            Self::Particles => "particles",
            Self::Events => "events",
            Self::Lines => "lines",
            Self::Intervals => "intervals",
        }
    }
}

/// A page of help.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Help {
    Shortcuts,
    Words,
    About,
}

impl View {
    /// The view of a scene just opened.
    pub(super) fn fresh(&mut self) {
        let ledger_height = self.ledger_height;
        *self = Self {
            ledger_height,
            ..Self::default()
        };
    }

    /// The frame set for the active panel, if one was set.
    pub(super) fn set_frame(&mut self, when: When) {
        let panel = self.panel;
        if self.frames.len() <= panel {
            self.frames.resize(panel + 1, None);
        }
        self.frames[panel] = Some(when);
    }
}
