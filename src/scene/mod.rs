//! The document: what is saved, reading it, and where everything stands in the text.

mod document;
mod faults;
mod fields;
mod forms;
mod lines;
mod literal;
mod places;
mod reading;
mod scanner;
mod tree;
mod values;

pub use document::{
    Arrows, Closure, Collision, Common, Event, Frame, FramePart, Line, LineOrParticle, List,
    Object, Panel, Particle, Plate, Range, Scene, SpeciesEntry, State, TimeAxis, Toward, Units,
    Velocity, View, When, Whole,
};
pub use places::Places;
pub use reading::{Reading, Unreadable, read};
