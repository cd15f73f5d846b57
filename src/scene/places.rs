//! Where every object and field stands in the text.

use crate::fault::{Fault, ObjectId, Place};

/// Places of the objects and fields of a scene as it was read. It lies beside the scene: no part of equality, undo
/// or solving.
#[derive(Clone, Debug, Default)]
pub struct Places {}

impl Places {
    /// Where a field of an object stands (its value; the object's own value for an empty or unknown field), some
    /// characters in.
    pub fn find(&self, object: &ObjectId, field: &str, offset: usize) -> Option<Place> {
        todo!()
    }

    /// Gives each fault without a place the one it belongs to.
    pub fn mark(&self, faults: &mut [Fault]) {
        todo!()
    }
}
