//! A displacement between two events, by null components.

use std::ops::{Add, Mul, Neg, Sub};

use crate::num;

use super::GeometryError;

/// The causal kind of a displacement.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Separation {
    /// A clock can go along it.
    Timelike,
    /// Light goes along it.
    Lightlike,
    /// A ruler can lie along it.
    Spacelike,
}

/// `u = t - x`, `v = t + x` and y: a displacement between two events, or an event seen from an origin.
///
/// ```
/// use conewright::geometry::{Displacement, Separation};
/// let d = Displacement::from_tx(5.0, 3.0);
/// assert_eq!(d.separation(), Separation::Timelike);
/// assert_eq!(d.length(), 4.0);
/// ```
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct Displacement {
    /// t - x.
    pub u: f64,
    /// t + x.
    pub v: f64,
    /// y, across.
    pub y: f64,
}

impl Displacement {
    /// No displacement; as an event, the origin.
    pub const ZERO: Self = Self::new(0.0, 0.0, 0.0);

    /// By null components.
    pub const fn new(u: f64, v: f64, y: f64) -> Self {
        Self { u, v, y }
    }

    /// From t and x; u and v are rounded once each.
    pub fn from_tx(t: f64, x: f64) -> Self {
        Self::new(t - x, t + x, 0.0)
    }

    /// (u + v) / 2.
    pub fn t(self) -> f64 {
        self.u.midpoint(self.v)
    }

    /// (v - u) / 2.
    pub fn x(self) -> f64 {
        (self.v - self.u) / 2.0
    }

    /// `t^2 - x^2 - y^2 = u v - y^2`, without cancellation: right to 1.5 units in the last place of what the stored
    /// components say, and of the right sign.
    pub fn interval(self) -> f64 {
        num::difference_of_products(self.u, self.v, self.y, self.y)
    }

    /// The kind: exact for the stored components; use [`Displacement::separation_within`] where they carry a
    /// rounding bound. No displacement at all counts as lightlike.
    pub fn separation(self) -> Separation {
        self.separation_within(0.0)
    }

    /// The kind, lightlike where the interval is not larger in size than `bound` (in the square of the time unit).
    pub fn separation_within(self, bound: f64) -> Separation {
        let interval = self.interval();
        if interval.abs() <= bound {
            Separation::Lightlike
        } else if interval > 0.0 {
            Separation::Timelike
        } else {
            Separation::Spacelike
        }
    }

    /// The square root of the interval's size: proper time if timelike, proper distance if spacelike.
    pub fn length(self) -> f64 {
        let interval = self.interval().abs();
        if interval > 1e-290 || self.y != 0.0 {
            interval.sqrt()
        } else {
            // Where the product leaves the normal numbers the product of roots does not.
            self.u.abs().sqrt() * self.v.abs().sqrt()
        }
    }

    /// The longitudinal rapidity `1/2 ln(v/u)` of a future- or past-pointing timelike displacement.
    pub fn rapidity(self) -> Option<f64> {
        if self.separation() != Separation::Timelike {
            return None;
        }
        let quotient = self.v / self.u;
        Some(if (0.5..=2.0).contains(&quotient) {
            // v - u is exact here.
            0.5 * num::log1p((self.v - self.u) / self.u)
        } else {
            0.5 * num::ln(quotient)
        })
    }

    /// The largest of its components in size: the scale of their rounding.
    pub fn scale(self) -> f64 {
        self.u.abs().max(self.v.abs()).max(self.y.abs())
    }

    /// The same, if its components are 0 or from 1e-150 to 1e150 in size.
    ///
    /// # Errors
    /// `Range` otherwise, naming `what`.
    pub fn checked(self, what: &'static str) -> Result<Self, GeometryError> {
        GeometryError::check(what, [self.u, self.v, self.y])?;
        Ok(self)
    }
}

impl Add for Displacement {
    type Output = Self;

    fn add(self, o: Self) -> Self {
        Self::new(self.u + o.u, self.v + o.v, self.y + o.y)
    }
}

impl Sub for Displacement {
    type Output = Self;

    fn sub(self, o: Self) -> Self {
        Self::new(self.u - o.u, self.v - o.v, self.y - o.y)
    }
}

impl Neg for Displacement {
    type Output = Self;

    fn neg(self) -> Self {
        Self::ZERO - self
    }
}

impl Mul<f64> for Displacement {
    type Output = Self;

    fn mul(self, k: f64) -> Self {
        Self::new(self.u * k, self.v * k, self.y * k)
    }
}
