//! Numbers as text.

/// How many digits stand after the decimal sign.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Decimals(pub usize);

/// The shortest decimal text that reads back to the same f64; whole numbers without `.0`; `-0` as `0`.
pub fn shortest(value: f64) -> String {
    todo!()
}
/// Rounded to some significant digits, plain notation from 1e-4 to 1e7, else `1.234e-8`. Half to even on the exact
/// binary value (as the standard formatter does).
pub fn significant(value: f64, digits: usize) -> String {
    todo!()
}
/// With a fixed number of decimals; never `-0.00`.
pub fn fixed(value: f64, decimals: Decimals) -> String {
    todo!()
}
/// Typographic: minus U+2212, digits in threes by U+2009 on both sides, from 4 digits left and 5 right of the sign.
pub fn grouped(text: &str) -> String {
    todo!()
}
