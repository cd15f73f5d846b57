//! The program's verbs: a scene and options to bytes. The window and the command line both call these.

use std::path::Path;
use std::sync::Arc;

use crate::disk::DiskFault;
use crate::fault::Fault;
use crate::plate::{Laid, Override};
use crate::scene::{Places, Scene, Unreadable, When};
use crate::solve::Solved;

/// A scene opened: as read, and solved.
#[derive(Clone, Debug)]
pub struct Opened {
    /// The scene as read.
    pub scene: Arc<Scene>,
    /// Where things stand in its file.
    pub places: Arc<Places>,
    /// Solved.
    pub solved: Arc<Solved>,
    /// All faults and findings of reading and solving, placed, in the order of the file.
    pub faults: Vec<Fault>,
}

/// Why a scene does not open.
#[derive(Debug, thiserror::Error)]
pub enum OpenFault {
    /// The file.
    #[error(transparent)]
    Disk(#[from] DiskFault),
    /// Its text.
    #[error(transparent)]
    Text(#[from] Unreadable),
}

/// Opens a scene file.
pub fn open(path: &Path) -> Result<Opened, OpenFault> {
    todo!()
}

/// Opens a scene from its text.
pub fn open_text(text: &str) -> Result<Opened, OpenFault> {
    todo!()
}

/// Lays out a plate by name (the first, if none is named; one that shows everything, if the scene has none). `None`
/// if no plate has that name. Faults come placed.
pub fn lay_out(opened: &Opened, plate: Option<&str>, change: &Override) -> Option<Laid> {
    todo!()
}

/// The ledger in the frame asked for, with the faults of `opened`. `None` if no such frame is sound.
pub fn ledger(opened: &Opened, from: &When) -> Option<crate::ledger::Ledger> {
    todo!()
}
