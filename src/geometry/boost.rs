//! Passive boosts along x and along any direction of the plane.

use glam::DVec2;

use crate::num;

use super::{Angle, Displacement, GeometryError, Rapidity};

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

    /// In a direction; along x it is normalised to a signed rapidity and angle 0, at rest to the identity.
    pub fn new(rapidity: Rapidity, angle: Angle) -> Self {
        let backward = rapidity.value() < 0.0;
        if rapidity.value() == 0.0 {
            Self::IDENTITY
        } else if angle.is_along_x() {
            let toward_plus = angle.cos() > 0.0;
            Self::along_x(if toward_plus { rapidity } else { -rapidity })
        } else if backward {
            Self {
                rapidity: -rapidity,
                angle: angle.opposite(),
            }
        } else {
            Self { rapidity, angle }
        }
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
        Self::new(-self.rapidity, self.angle)
    }

    /// A displacement as the moving frame has it.
    ///
    /// Along x `u' = u e^eta` and `v' = v / e^eta`: the interval stays to 4 units in the last place, each component
    /// is right to `2 EPS`, and a boost by `a` then one by `b` agrees with one by `a + b` to `(|a + b| + 6) EPS` of
    /// each component. In another direction each component is right to `8 EPS` of the largest component
    /// times `e^rapidity`; so is then the interval, to the square of that.
    ///
    /// # Errors
    /// `Range` where a component, before or after, is not 0 and not from 1e-150 to 1e150 in size.
    pub fn apply(self, d: Displacement) -> Result<Displacement, GeometryError> {
        let d = d.checked("an event before a boost")?;
        let k = self.rapidity.doppler();
        let boosted = if self.is_along_x() {
            Displacement::new(d.u * k, d.v / k, d.y)
        } else {
            let along = turned(d, self.angle);
            turned(
                Displacement::new(along.u * k, along.v / k, along.y),
                -self.angle,
            )
        };
        boosted.checked("an event after a boost")
    }

    /// First this boost, then one stated in the moving frame: the boost of the whole and the rotation angle (Wigner)
    /// in degrees that is left over; 0 for parallel ones, whose rapidities add.
    ///
    /// With W the whole and omega the angle, `next.apply(self.apply(d))` is `W.apply(d)` turned counter-clockwise by
    /// omega: the axes of a frame reached in two steps are those of W turned clockwise. With the angle theta from
    /// this direction to the next, `tan(omega/2) = s1 s2 sin(theta) / (c1 c2 + s1 s2 cos(theta))`, where s and c are
    /// sinh and cosh of half the rapidities.
    ///
    /// # Errors
    /// `Domain` where the rapidity of the whole is beyond 600.
    pub fn then(self, next: Self) -> Result<(Self, f64), GeometryError> {
        if self == Self::IDENTITY {
            return Ok((next, 0.0));
        }
        if next == Self::IDENTITY {
            return Ok((self, 0.0));
        }
        let (n1, n2) = (self.angle.unit(), next.angle.unit());
        let theta_sin = num::difference_of_products(n1.x, n2.y, n1.y, n2.x);
        let theta_cos = num::difference_of_products(n1.x, n2.x, -n1.y, n2.y);
        if theta_sin == 0.0 {
            let second = if theta_cos > 0.0 {
                next.rapidity
            } else {
                -next.rapidity
            };
            return Ok((Self::new(self.rapidity.then(second)?, self.angle), 0.0));
        }
        // As elements of SL(2, C): exp(-eta2 n2/2) exp(-eta1 n1/2) = R(omega) exp(-eta n/2).
        let (h1, h2) = (self.rapidity.value() / 2.0, next.rapidity.value() / 2.0);
        let (s1, c1) = (num::sinh(h1), num::cosh(h1));
        let (s2, c2) = (num::sinh(h2), num::cosh(h2));
        let cosine = if theta_cos * s1 * s2 < 0.0 {
            // The same sum without cancellation, for nearly opposite directions of the motion.
            let toward = (s1 * s2).signum();
            let gap = theta_sin * theta_sin / (1.0 - toward * theta_cos);
            num::cosh(h1 - toward * h2) + s1.abs() * s2.abs() * gap
        } else {
            c1 * c2 + s1 * s2 * theta_cos
        };
        let half = Angle::of(cosine, s1 * s2 * theta_sin);
        let (a, b) = (s1 * c2, c1 * s2);
        let vector = DVec2::new(
            num::difference_of_products(a, n1.x, -b, n2.x),
            num::difference_of_products(a, n1.y, -b, n2.y),
        );
        let size = num::hypot(vector.x, vector.y);
        let whole = Rapidity::new(2.0 * num::asinh(size))?;
        let direction = Angle::of(vector.x, vector.y).plus(-half);
        let omega = half.plus(half).degrees();
        Ok((Self::new(whole, direction), omega))
    }
}

/// The displacement in axes turned counter-clockwise by `angle`, so that a vector along it is along x.
fn turned(d: Displacement, angle: Angle) -> Displacement {
    let (c, s) = (angle.cos(), angle.sin());
    // (1 + c) / 2 and (1 - c) / 2, the small one without cancellation.
    let large = f64::midpoint(1.0, c.abs());
    let small = s * s / (4.0 * large);
    let (plus, minus) = if c < 0.0 {
        (small, large)
    } else {
        (large, small)
    };
    let slant = d.y * s;
    Displacement {
        u: num::sum([d.u * plus, d.v * minus, -slant]),
        v: num::sum([d.u * minus, d.v * plus, slant]),
        y: num::difference_of_products(d.y, c, d.x(), s),
    }
}
