//! Rapidity: the angle of a boost, and every number that says the same.

use std::ops::Neg;

use crate::num;

use super::GeometryError;

/// Which way along x, for the forms that carry no sign.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Default)]
pub enum Side {
    /// Toward +x.
    #[default]
    Plus,
    /// Toward -x.
    Minus,
}

impl Side {
    /// 1 or -1.
    pub const fn sign(self) -> f64 {
        match self {
            Self::Plus => 1.0,
            Self::Minus => -1.0,
        }
    }

    /// The other way.
    pub const fn opposite(self) -> Self {
        match self {
            Self::Plus => Self::Minus,
            Self::Minus => Self::Plus,
        }
    }
}

/// A finite rapidity along x, at most 600 in size.
///
/// Every form reads and gives back to a few units in the last place of what that form can hold: near rest the
/// relative digits of `kinetic_per_rest` or `celerity` are kept, near light those of `one_minus_beta`. A rapidity
/// of size y fixes `gamma` and `1 - beta` to `(y + 2) EPS` of themselves.
///
/// ```
/// use conewright::geometry::Rapidity;
/// let half = Rapidity::from_beta(0.5)?;
/// assert!((half.then(half)?.beta() - 0.8).abs() < 1e-15);
/// # Ok::<(), conewright::geometry::GeometryError>(())
/// ```
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd, Default)]
pub struct Rapidity(f64);

impl Rapidity {
    /// At rest.
    pub const ZERO: Self = Self(0.0);

    /// The largest size allowed.
    pub const LIMIT: f64 = 600.0;

    /// From the rapidity itself.
    ///
    /// # Errors
    /// `Domain` beyond 600 in size, and for inf and NaN.
    pub fn new(rapidity: f64) -> Result<Self, GeometryError> {
        // NaN fails the comparison.
        if rapidity.abs() <= Self::LIMIT {
            // Without a negative zero.
            Ok(Self(rapidity + 0.0))
        } else {
            Err(domain("the rapidity", "from -600 to 600", rapidity))
        }
    }

    /// From beta = v/c, in (-1, 1).
    ///
    /// # Errors
    /// `Domain` at and beyond the speed of light.
    pub fn from_beta(beta: f64) -> Result<Self, GeometryError> {
        if beta.abs() < 1.0 {
            Self::new(num::atanh(beta))
        } else {
            Err(domain("beta", "between -1 and 1", beta))
        }
    }

    /// From `1 - |beta|`, in (0, 1].
    ///
    /// # Errors
    /// `Domain` outside that, and below 1e-300, which f64 does not hold to full accuracy.
    pub fn from_one_minus_beta(one_minus_beta: f64, side: Side) -> Result<Self, GeometryError> {
        let d = one_minus_beta;
        if !(1e-300..=1.0).contains(&d) {
            return Err(domain("1 - beta", "above 0 (1e-300) and at most 1", d));
        }
        // (1 + beta) / (1 - beta) = (2 - d) / d; as 1 + 2 (1 - d) / d near rest, where 1 - d is exact.
        let doubled = if d > 0.5 {
            num::log1p(2.0 * (1.0 - d) / d)
        } else {
            num::ln((2.0 - d) / d)
        };
        Self::new(side.sign() * 0.5 * doubled)
    }

    /// From gamma, at least 1.
    ///
    /// # Errors
    /// `Domain` below 1 and beyond a rapidity of 600.
    pub fn from_gamma(gamma: f64, side: Side) -> Result<Self, GeometryError> {
        if gamma >= 1.0 {
            // gamma - 1 is exact up to 2, and beyond that costs nothing.
            Self::from_kinetic_per_rest(gamma - 1.0, side)
        } else {
            Err(domain("gamma", "at least 1", gamma))
        }
    }

    /// From `gamma - 1`, at least 0; the same number as the kinetic energy per rest energy.
    ///
    /// # Errors
    /// `Domain` below 0 and beyond a rapidity of 600.
    pub fn from_kinetic_per_rest(kinetic_per_rest: f64, side: Side) -> Result<Self, GeometryError> {
        let k = kinetic_per_rest;
        if k >= 0.0 {
            // gamma - 1 = 2 sinh^2 (eta / 2)
            Self::new(side.sign() * 2.0 * num::asinh((k / 2.0).sqrt()))
        } else {
            Err(domain("the kinetic energy", "at least 0", k))
        }
    }

    /// From the celerity `gamma beta`, any finite number.
    ///
    /// # Errors
    /// `Domain` beyond a rapidity of 600.
    pub fn from_celerity(celerity: f64) -> Result<Self, GeometryError> {
        Self::new(num::asinh(celerity))
    }

    /// From the Doppler factor `k = e^rapidity`, above 0.
    ///
    /// # Errors
    /// `Domain` at and below 0 and beyond a rapidity of 600.
    pub fn from_doppler(k: f64) -> Result<Self, GeometryError> {
        if k > 0.0 {
            Self::new(num::ln(k))
        } else {
            Err(domain("the Doppler factor", "above 0", k))
        }
    }

    /// The number itself.
    pub fn value(self) -> f64 {
        self.0
    }

    /// beta = tanh; 1 in size from rapidity 19 on, where `one_minus_beta` has the digits.
    pub fn beta(self) -> f64 {
        num::tanh(self.0)
    }

    /// `1 - |beta| = 2 / (e^(2 |rapidity|) + 1)`, to full relative accuracy up to rapidity 353; beyond that it is too
    /// small for an f64, and 0.
    pub fn one_minus_beta(self) -> f64 {
        let d = 2.0 / (num::exp(2.0 * self.0.abs()) + 1.0);
        if d.is_normal() { d } else { 0.0 }
    }

    /// gamma = cosh.
    pub fn gamma(self) -> f64 {
        num::cosh(self.0)
    }

    /// `gamma beta` = sinh.
    pub fn celerity(self) -> f64 {
        num::sinh(self.0)
    }

    /// k = e^rapidity: above 1 when receding toward +x; what is received has the frequency 1/k of what was sent.
    pub fn doppler(self) -> f64 {
        num::exp(self.0)
    }

    /// `gamma - 1` = 2 sinh^2(half the rapidity), to full relative accuracy.
    pub fn kinetic_per_rest(self) -> f64 {
        let s = num::sinh(self.0 / 2.0);
        2.0 * s * s
    }

    /// Which way it points; plus at 0.
    pub fn side(self) -> Side {
        if self.0 < 0.0 {
            Side::Minus
        } else {
            Side::Plus
        }
    }

    /// The rapidity of something that moves at `next` in the frame that moves at this one: the sum.
    ///
    /// # Errors
    /// `Domain` beyond 600 in size.
    pub fn then(self, next: Self) -> Result<Self, GeometryError> {
        Self::new(self.0 + next.0)
    }

    /// This rapidity as seen from something that moves at `other`: the difference.
    ///
    /// # Errors
    /// `Domain` beyond 600 in size.
    pub fn relative_to(self, other: Self) -> Result<Self, GeometryError> {
        Self::new(self.0 - other.0)
    }
}

impl Neg for Rapidity {
    type Output = Self;

    fn neg(self) -> Self {
        Self(0.0 - self.0)
    }
}

fn domain(what: &'static str, domain: &'static str, value: f64) -> GeometryError {
    GeometryError::Domain {
        what,
        domain,
        value,
    }
}
