//! The ledger's rows as tables of text: one number of decimals a column.

use super::Ledger;
use crate::fault::ObjectId;

/// How a column's text stands.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Align {
    /// Names.
    Left,
    /// Numbers with equal decimals.
    Right,
}

/// A column of a table.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Column {
    /// Its head, plain text: `E`, `px`, `u v`.
    pub head: String,
    /// Its unit, plain text; empty for a plain number.
    pub unit: String,
    /// How it stands.
    pub align: Align,
}

/// One entry.
#[derive(Clone, Debug, PartialEq)]
pub struct Cell {
    /// The number, for other writers; none for words and for what does not exist.
    pub value: Option<f64>,
    /// As shown: plain ASCII digits with a dot, ungrouped; a centred dot for what does not exist.
    pub text: String,
}

/// A table of the ledger.
#[derive(Clone, Debug, PartialEq)]
pub struct Table {
    /// `collisions`, `particles`, `events`, `lines`, `intervals`.
    pub name: &'static str,
    /// Columns; the first holds names.
    pub columns: Vec<Column>,
    /// Rows of cells, as many as there are columns, with the object each is about and whether a rule stands above it.
    pub rows: Vec<Row>,
}

/// A row of a table.
#[derive(Clone, Debug, PartialEq)]
pub struct Row {
    /// What it is about.
    pub object: Option<ObjectId>,
    /// A sum or difference, set semibold.
    pub is_sum: bool,
    /// A rule above it.
    pub rule_above: bool,
    /// Its cells.
    pub cells: Vec<Cell>,
}

/// The ledger as tables.
pub fn tables(ledger: &Ledger) -> Vec<Table> {
    todo!()
}
