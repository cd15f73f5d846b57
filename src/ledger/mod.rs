//! The numbers to quote: a solved scene in a frame, as tables.

use crate::solve::{Solved, Viewing};

mod rows;
mod tables;

pub use rows::{
    CollisionRow, DifferenceRow, EventRow, FaultRow, FrameRow, IntervalRow, Ledger, LineRow,
    ParticleRow, SumRow, UnitsRow,
};
pub use tables::{Align, Cell, Column, Row, Table, tables};

/// The ledger of a solved scene in a frame. Faults are left empty: whoever knows their places adds them.
pub fn ledger(solved: &Solved, from: &Viewing) -> Ledger {
    todo!()
}
