//! The ledger as JSON and as text aligned for reading.
use crate::ledger::Ledger;
/// As JSON, numbers at full precision.
pub fn json(ledger: &Ledger) -> Vec<u8> {
    todo!()
}
/// As aligned text.
pub fn text(ledger: &Ledger) -> Vec<u8> {
    todo!()
}
