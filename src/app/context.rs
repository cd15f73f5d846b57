//! What panels may read.

use super::document::Document;
use super::rail;
use super::shown::Shown;
use super::view::View;
use crate::quantity::{Decimals, fixed, grouped};
use crate::solve::Viewing;

/// The desk as a panel sees it.
#[derive(Clone, Copy, Debug)]
pub(super) struct Context<'a> {
    pub(super) document: &'a Document,
    pub(super) view: &'a View,
    pub(super) shown: &'a Shown,
}

impl Context<'_> {
    /// The viewing frame in words: its name, "rest of beam", or its rapidity.
    pub(super) fn frame_name(&self) -> String {
        let Some(frame) = self.shown.ledger.as_ref().map(|l| &l.frame) else {
            return self.document.opened.solved.base.to_string();
        };
        match &frame.name {
            Some(name) => name.clone(),
            None => self.rapidity_name(frame.rapidity),
        }
    }

    /// The same for any panel.
    pub(super) fn panel_frame(&self, viewing: &Viewing) -> String {
        match &viewing.name {
            Some(name) => name.to_string(),
            None => self.rapidity_name(viewing.boost.rapidity().value()),
        }
    }

    fn rapidity_name(&self, rapidity: f64) -> String {
        rail::name_at(self, rapidity)
            .unwrap_or_else(|| format!("rapidity {}", grouped(&fixed(rapidity, Decimals(3)))))
    }
}
