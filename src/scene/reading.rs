//! From text to a scene.

use super::{Places, Scene};
use crate::fault::{Fault, Place};

/// A scene as read: what could be read of it, where it stands, and what could not be read.
#[derive(Clone, Debug)]
pub struct Reading {
    /// Everything that could be read.
    pub scene: Scene,
    /// Where things stand.
    pub places: Places,
    /// One fault for each object that does not read, with its place.
    pub faults: Vec<Fault>,
    /// Objects that stand in the file and could not be read; what refers to them hangs on a fault, not on a missing name.
    pub unread: Vec<crate::fault::ObjectId>,
}

/// A text that is no scene at all: brackets or strings that do not match, too large, too deep, no `Scene(..)`.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
#[error("{what}")]
pub struct Unreadable {
    /// Where.
    pub place: Option<Place>,
    /// What is wrong.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}

/// Reads a scene's text (at most 16 MB, with or without a byte-order mark, LF or CRLF).
///
/// # Errors
/// Only where nothing can be made of the text; everything smaller is a fault of its object.
pub fn read(text: &str) -> Result<Reading, Unreadable> {
    todo!()
}
