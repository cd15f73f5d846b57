//! A scene with every reference followed and every derived thing computed, in the base frame.
//!
//! Inside, times and places are in the scene's time unit (x in light's way of it, c = 1); energies, masses and
//! momenta in its energy unit.

mod solved;

pub use solved::{
    RapidityTick, Solved, SolvedCollision, SolvedEvent, SolvedFrame, SolvedLine, SolvedParticle,
    SolvedUnits, Stated, Viewing,
};

use crate::fault::ObjectId;
use crate::scene::Scene;

/// Solves a scene. `unread` names objects that stand in the file and could not be read: what refers to them is left
/// out without a fault of its own.
pub fn solve(scene: &Scene, unread: &[ObjectId]) -> Solved {
    todo!()
}
