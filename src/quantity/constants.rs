//! Constants: CODATA 2022, c exact.

/// A constant with its source.
#[derive(Clone, Copy, Debug)]
pub struct Constant {
    /// Symbol.
    pub symbol: &'static str,
    /// Value as printed in the source.
    pub value: &'static str,
    /// Unit as printed in the source.
    pub unit: &'static str,
    /// Where it is from.
    pub source: &'static str,
}
/// Every constant used.
pub const CONSTANTS: &[Constant] = &[];
