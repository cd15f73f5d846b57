//! The numbers to quote: a solved scene in a frame, as rows and as tables.

mod compute;
mod digits;
mod rows;
mod tables;

pub use compute::ledger;
pub use rows::{
    CollisionRow, DifferenceRow, EventRow, FaultRow, FrameRow, IntervalRow, Ledger, LineRow,
    ParticleRow, SumRow, UnitsRow,
};
pub use tables::{Align, Cell, Column, Row, Table, tables};
