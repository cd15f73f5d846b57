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

const fn constant(
    symbol: &'static str,
    value: &'static str,
    unit: &'static str,
    source: &'static str,
) -> Constant {
    Constant {
        symbol,
        value,
        unit,
        source,
    }
}

/// Every constant that the sizes of units rest on. All are exact by definition.
pub const CONSTANTS: &[Constant] = &[
    constant("c", "299792458", "m s^-1", "CODATA 2022 (exact, SI)"),
    constant("e", "1.602176634e-19", "C", "CODATA 2022 (exact, SI)"),
    constant("yr", "31557600", "s", "Julian year of 365.25 d (IAU)"),
    constant("AU", "149597870700", "m", "IAU 2012 resolution B2"),
    constant("in", "25.4", "mm", "international inch"),
];
