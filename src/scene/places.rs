//! Where every object and field stands in the text.
//!
//! A field is addressed by names and numbers with dots between, as it is written: `state`, `clock.1`, `of.0`,
//! `panels.0.range.t.1`; numbers count the values of a list or pair from 0. A form whose one value stands bare has it
//! at its own address: `velocity: Beta("3/5")` has `3/5` at `velocity`, `CentreOfMomentum("strike")` has its value at
//! `of`, or whatever name is asked for. The fields of the scene itself are addressed likewise: `base`, `units.time`.

use std::fmt;
use std::sync::Arc;

use indexmap::IndexMap;

use super::faults::Source;
use super::literal;
use super::tree::{NodeId, Shape, Value};
use crate::fault::{Fault, Kind, ObjectId, Place};

/// The values of the objects, by name.
pub(super) type Index = IndexMap<ObjectId, NodeId>;

/// Places of the objects and fields of a scene as it was read. It lies beside the scene: no part of equality, undo
/// or solving. Cheap to clone; of a scene that was not read it knows no place.
#[derive(Clone, Debug, Default)]
pub struct Places {
    map: Option<Arc<Map>>,
}

struct Map {
    source: Arc<Source>,
    root: NodeId,
    index: Index,
}

impl fmt::Debug for Map {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "places of {} objects", self.index.len())
    }
}

impl Places {
    pub(super) fn new(source: Arc<Source>, root: NodeId, index: Index) -> Self {
        let map = Map {
            source,
            root,
            index,
        };
        Self {
            map: Some(Arc::new(map)),
        }
    }

    /// Where a field of an object stands: the first character of its value, or the one some characters in (of a
    /// string, of its contents, escapes counted as the characters they stand for; 0 is its opening quote).
    ///
    /// A field that is not written falls back to the longest part of its path that is, in the end to the object's own
    /// value, and the offset is then ignored. `None` if no object of the name stands in the text.
    pub fn find(&self, object: &ObjectId, field: &str, offset: usize) -> Option<Place> {
        let map = self.map.as_deref()?;
        let id = match object.kind {
            Kind::Scene => map.root,
            _ => *map.index.get(object)?,
        };
        let Source { text, tree, lines } = &*map.source;
        let (value, whole) = Value { text, tree, id }.follow(field);
        let mut at = value.start();
        if whole && offset > 0 && value.shape() == Shape::Leaf {
            at += literal::advance(value.raw(), offset);
        }
        Some(lines.place(text, at))
    }

    /// Gives each fault without a place the one it belongs to.
    pub fn mark(&self, faults: &mut [Fault]) {
        for fault in faults.iter_mut().filter(|fault| fault.place.is_none()) {
            fault.place = self.find(&fault.object, &fault.field, fault.offset);
        }
    }
}
