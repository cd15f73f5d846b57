//! Opening and auditing a scene.

use std::path::Path;
use std::sync::Arc;

use crate::disk::{DiskFault, read_text};
use crate::fault::{Fault, Place, Weight};
use crate::plate::Override;
use crate::scene::{Places, Scene, Unreadable, read};
use crate::solve::{Solved, solve};

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

impl OpenFault {
    /// One line for people: `file:line:column: what; mend`.
    pub fn line(&self, file: &str) -> String {
        match self {
            Self::Disk(fault) => format!("{}; {}", fault.what, fault.mend),
            Self::Text(Unreadable {
                place: Some(Place { line, column }),
                what,
                mend,
            }) => {
                format!("{file}:{line}:{column}: scene: {what}; {mend}")
            }
            Self::Text(Unreadable {
                place: None,
                what,
                mend,
            }) => {
                format!("{file}: scene: {what}; {mend}")
            }
        }
    }
}

/// Opens a scene file.
///
/// # Errors
/// Where the file cannot be read, or is no scene at all; everything smaller is one of the faults of what is opened.
pub fn open(path: &Path) -> Result<Opened, OpenFault> {
    Ok(open_text(&read_text(path)?)?)
}

/// Opens a scene from its text.
///
/// # Errors
/// Where the text is no scene at all.
pub fn open_text(text: &str) -> Result<Opened, Unreadable> {
    let reading = read(text)?;
    let solved = solve(&reading.scene, &reading.unread);
    let mut faults = reading.faults;
    faults.extend(solved.faults.iter().cloned());
    let places = Arc::new(reading.places);
    place(&places, &mut faults);
    Ok(Opened {
        scene: Arc::new(reading.scene),
        places,
        solved: Arc::new(solved),
        faults,
    })
}

/// All faults and findings of a scene, those of its plates included, in the order of the file. Remarks on
/// a plate are made when it is drawn.
pub fn audit(opened: &Opened) -> Vec<Fault> {
    let mut faults = opened.faults.clone();
    for name in opened.scene.plates.keys() {
        let laid = super::lay_out(opened, Some(name), &Override::default());
        faults.extend(laid.into_iter().flat_map(|laid| laid.faults));
    }
    faults.retain(|fault| fault.weight != Weight::Remark);
    place(&opened.places, &mut faults);
    faults.dedup();
    faults
}

/// Gives each fault its place, and orders them by it.
pub(super) fn place(places: &Places, faults: &mut [Fault]) {
    places.mark(faults);
    faults.sort_by_key(|f| f.place);
}
