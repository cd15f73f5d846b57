//! The scene on the desk, and where it came from.

use std::path::{Path, PathBuf};
use std::sync::Arc;

use crate::scene::Scene;
use crate::solve::solve;
use crate::task::{self, Opened};

/// The open scene.
#[derive(Debug)]
pub(super) struct Document {
    /// Its file; none for the empty scene the desk begins with.
    pub(super) path: Option<PathBuf>,
    pub(super) opened: Opened,
    /// Counts the scenes that have stood here.
    pub(super) revision: u64,
    /// Why the last file did not open, one line.
    pub(super) refused: Option<String>,
}

impl Document {
    /// A scene without anything in it but a base frame.
    pub(super) fn empty() -> Self {
        let scene = Scene {
            format: 1,
            base: "lab".to_owned(),
            ..Scene::default()
        };
        let solved = solve(&scene, &[]);
        let faults = solved.faults.clone();
        let opened = Opened {
            scene: Arc::new(scene),
            places: Arc::default(),
            solved: Arc::new(solved),
            faults,
        };
        Self {
            path: None,
            opened,
            revision: 0,
            refused: None,
        }
    }

    /// Opens a file in place of what is here; what is here stays if it does not open.
    pub(super) fn open(&mut self, path: &Path) -> bool {
        match task::open(path) {
            Ok(opened) => {
                self.opened = opened;
                self.path = Some(path.to_owned());
                self.revision += 1;
                self.refused = None;
                true
            }
            Err(fault) => {
                self.refused = Some(fault.line(&file_name(path)));
                false
            }
        }
    }

    /// The file's name, or words for a scene without one.
    pub(super) fn name(&self) -> String {
        self.path
            .as_deref()
            .map_or_else(|| "Untitled scene".to_owned(), file_name)
    }

    /// Whether nothing stands in the scene.
    pub(super) fn is_empty(&self) -> bool {
        let scene = &self.opened.scene;
        scene.events.is_empty()
            && scene.lines.is_empty()
            && scene.particles.is_empty()
            && scene.collisions.is_empty()
            && scene.frames.is_empty()
    }
}

fn file_name(path: &Path) -> String {
    path.file_name().map_or_else(
        || path.display().to_string(),
        |n| n.to_string_lossy().into_owned(),
    )
}
