//! Reading the forms of each kind of object.

mod collision;
mod event;
mod frame;
mod line;
mod particle;
mod plate;
mod species;
mod velocity;

pub(super) use collision::collision;
pub(super) use event::event;
pub(super) use frame::frame;
pub(super) use line::line;
pub(super) use particle::particle;
pub(super) use plate::plate;
pub(super) use species::species;
