//! Directions in the plane.

use std::ops::Neg;

use glam::DVec2;

use crate::num;

/// Radians in a degree, and what the rounding of that left.
const RADIAN: f64 = 0.017453292519943295;
const RADIAN_REST: f64 = 2.9486522708701687e-19;

/// A direction in the plane, kept by cosine and sine; multiples of 90 degrees are exact.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Angle(DVec2);

impl Angle {
    /// Along +x.
    pub const ZERO: Self = Self(DVec2::X);

    /// From degrees (finite), counter-clockwise from +x. Multiples of 30 and 45 degrees have exact sines and
    /// cosines where these are rational, and equal ones where they are equal; others to one unit in the last place.
    pub fn from_degrees(degrees: f64) -> Self {
        // The remainder and the part beyond the nearest quarter turn are exact.
        let turn = degrees % 360.0;
        let quarter = (turn / 90.0).round();
        let rest = turn - 90.0 * quarter;
        let Self(d) = Self::small(rest);
        // -3 to 4 quarters.
        let turned = if quarter == 1.0 || quarter == -3.0 {
            DVec2::new(-d.y, d.x)
        } else if quarter == 2.0 || quarter == -2.0 {
            -d
        } else if quarter == -1.0 || quarter == 3.0 {
            DVec2::new(d.y, -d.x)
        } else {
            d
        };
        Self::unsigned_zeros(turned)
    }

    /// From -45 to 45 degrees.
    fn small(degrees: f64) -> Self {
        let size = degrees.abs();
        let radians = size.mul_add(RADIAN_REST, size * RADIAN);
        let (mut cos, mut sin) = (num::cos(radians), num::sin(radians));
        if size == 30.0 {
            sin = 0.5;
        } else if size == 45.0 {
            cos = std::f64::consts::FRAC_1_SQRT_2;
            sin = cos;
        }
        Self(DVec2::new(cos, if degrees < 0.0 { -sin } else { sin }))
    }

    fn unsigned_zeros(d: DVec2) -> Self {
        Self(d + DVec2::ZERO)
    }

    /// The direction of (x, y); +x for (0, 0).
    pub fn of(x: f64, y: f64) -> Self {
        let size = num::hypot(x, y);
        if size == 0.0 {
            return Self::ZERO;
        }
        if y == 0.0 {
            return Self(DVec2::new(x.signum(), 0.0));
        }
        if x == 0.0 {
            return Self(DVec2::new(0.0, y.signum()));
        }
        Self(DVec2::new(x / size, y / size))
    }

    /// In degrees, in (-180, 180].
    pub fn degrees(self) -> f64 {
        let (c, s) = (self.cos(), self.sin());
        let slope = |a: f64, b: f64| {
            let radians = num::atan(a / b);
            radians / RADIAN
        };
        // From the nearest axis, so that multiples of 90 degrees are exact and small angles keep their digits.
        let degrees = if s.abs() > c.abs() {
            90.0_f64.copysign(s) - slope(c, s)
        } else if c > 0.0 {
            slope(s, c)
        } else {
            180.0_f64.copysign(s) + slope(s, c)
        };
        if degrees <= -180.0 { 180.0 } else { degrees }
    }

    /// Its cosine.
    pub fn cos(self) -> f64 {
        self.0.x
    }

    /// Its sine.
    pub fn sin(self) -> f64 {
        self.0.y
    }

    /// The unit vector.
    pub fn unit(self) -> DVec2 {
        self.0
    }

    /// True for 0 and 180 degrees.
    pub fn is_along_x(self) -> bool {
        self.sin() == 0.0
    }

    /// Turned by 180 degrees.
    pub fn opposite(self) -> Self {
        Self::unsigned_zeros(-self.0)
    }

    /// Turned counter-clockwise by `other`.
    pub fn plus(self, other: Self) -> Self {
        let (a, b) = (self.0, other.0);
        Self::of(
            num::difference_of_products(a.x, b.x, a.y, b.y),
            num::difference_of_products(a.x, b.y, -a.y, b.x),
        )
    }

    /// Components of a vector of the plane along this direction and across it (along the direction 90 degrees on).
    pub fn split(self, p: DVec2) -> (f64, f64) {
        (
            num::difference_of_products(p.x, self.0.x, -p.y, self.0.y),
            num::difference_of_products(p.y, self.0.x, p.x, self.0.y),
        )
    }

    /// The vector of the plane with these components along and across: the inverse of [`Angle::split`].
    pub fn join(self, along: f64, across: f64) -> DVec2 {
        DVec2::new(
            num::difference_of_products(along, self.0.x, across, self.0.y),
            num::difference_of_products(along, self.0.y, -across, self.0.x),
        )
    }
}

/// Mirrored in the x axis: the angle with the other sign.
impl Neg for Angle {
    type Output = Self;

    fn neg(self) -> Self {
        Self::unsigned_zeros(DVec2::new(self.0.x, -self.0.y))
    }
}
