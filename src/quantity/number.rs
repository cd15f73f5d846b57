//! A number: an exact rational for as long as it is one, else an f64.

use num_rational::BigRational;

/// A number as read. Rationals stay exact (at most 2,048 bits above and below the bar).
#[derive(Clone, Debug, PartialEq)]
pub enum Number {
    /// Exact.
    Rational(BigRational),
    /// Rounded.
    Real(f64),
}

impl Number {
    /// Zero.
    pub fn zero() -> Self {
        todo!()
    }
    /// An integer.
    pub fn integer(n: i64) -> Self {
        todo!()
    }
    /// The decimal as written (`-1.5e3`): exact. `None` if it is not one.
    pub fn decimal(text: &str) -> Option<Self> {
        todo!()
    }
    /// Correctly rounded.
    pub fn to_f64(&self) -> f64 {
        todo!()
    }
    /// Exactly 0.
    pub fn is_zero(&self) -> bool {
        todo!()
    }
    /// True while exact.
    pub fn is_exact(&self) -> bool {
        matches!(self, Self::Rational(_))
    }
    /// Sum.
    pub fn plus(&self, other: &Self) -> Self {
        todo!()
    }
    /// Difference, formed before rounding where both are exact.
    pub fn minus(&self, other: &Self) -> Self {
        todo!()
    }
    /// Product.
    pub fn times(&self, other: &Self) -> Self {
        todo!()
    }
    /// Quotient; division by zero gives infinity as a real.
    pub fn over(&self, other: &Self) -> Self {
        todo!()
    }
}
