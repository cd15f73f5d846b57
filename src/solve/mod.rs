//! A scene with every reference followed and every derived thing computed, in the base frame.
//!
//! Inside, times and places are in the scene's time unit (x in light's way of it, c = 1); energies, masses and
//! momenta in its energy unit.

mod checks;
mod collisions;
mod events;
mod frames;
mod graph;
mod lines;
mod particles;
mod solved;
mod solver;
mod units;
mod velocity;
mod views;

pub use solved::{
    RapidityTick, Solved, SolvedCollision, SolvedEvent, SolvedFrame, SolvedLine, SolvedParticle,
    SolvedUnits, Stated, Viewing,
};
pub use solver::solve;
pub use velocity::typed_rapidity;
