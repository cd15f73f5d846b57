//! Passive boosts along x and along any direction of the plane.

use super::{Displacement, GeometryError, Rapidity};

/// A direction in the plane, kept by cosine and sine; multiples of 90 degrees are exact.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Angle {
    cos: f64,
    sin: f64,
}

impl Angle {
    /// Along +x.
    pub const ZERO: Self = Self { cos: 1.0, sin: 0.0 };
    /// From degrees, counter-clockwise from +x.
    pub fn from_degrees(degrees: f64) -> Self {
        todo!()
    }
    /// The direction of (x, y); +x for (0, 0).
    pub fn of(x: f64, y: f64) -> Self {
        todo!()
    }
    /// In degrees, in (-180, 180].
    pub fn degrees(self) -> f64 {
        todo!()
    }
    /// Its cosine.
    pub fn cos(self) -> f64 {
        self.cos
    }
    /// Its sine.
    pub fn sin(self) -> f64 {
        self.sin
    }
    /// True for 0 and 180 degrees.
    pub fn is_along_x(self) -> bool {
        self.sin == 0.0
    }
}

/// The change from one frame to a frame moving at a rapidity in a direction, axes unrotated; a passive boost.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Boost {
    /// Not negative unless the direction is along x, where rapidity is signed and the angle is 0.
    rapidity: Rapidity,
    angle: Angle,
}

impl Boost {
    /// No change of frame.
    pub const IDENTITY: Self = Self {
        rapidity: Rapidity::ZERO,
        angle: Angle::ZERO,
    };
    /// Along x, signed.
    pub fn along_x(rapidity: Rapidity) -> Self {
        Self {
            rapidity,
            angle: Angle::ZERO,
        }
    }
    /// In a direction; along x it is normalised to a signed rapidity and angle 0.
    pub fn new(rapidity: Rapidity, angle: Angle) -> Self {
        todo!()
    }
    /// The rapidity, signed along x.
    pub fn rapidity(self) -> Rapidity {
        self.rapidity
    }
    /// The direction.
    pub fn angle(self) -> Angle {
        self.angle
    }
    /// True when it keeps y: along x or the identity.
    pub fn is_along_x(self) -> bool {
        self.angle.is_along_x()
    }
    /// The way back.
    pub fn inverse(self) -> Self {
        todo!()
    }
    /// A displacement as the moving frame has it.
    pub fn apply(self, d: Displacement) -> Result<Displacement, GeometryError> {
        todo!()
    }
    /// First this boost, then one stated in the moving frame: the boost of the whole and the rotation angle
    /// (Wigner), in degrees, that is left over; 0 for parallel ones, whose rapidities add.
    pub fn then(self, next: Self) -> Result<(Self, f64), GeometryError> {
        todo!()
    }
}
