//! Rapidity: the angle of a boost, and every number that says the same.

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

/// A finite rapidity along x, at most 600 in size.
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd, Default)]
pub struct Rapidity(f64);

impl Rapidity {
    /// At rest.
    pub const ZERO: Self = Self(0.0);

    /// From the rapidity itself.
    pub fn new(rapidity: f64) -> Result<Self, GeometryError> {
        todo!()
    }
    /// From beta = v/c, in (-1, 1).
    pub fn from_beta(beta: f64) -> Result<Self, GeometryError> {
        todo!()
    }
    /// From `1 - |beta|`, in (0, 1].
    pub fn from_one_minus_beta(one_minus_beta: f64, side: Side) -> Result<Self, GeometryError> {
        todo!()
    }
    /// From gamma, at least 1.
    pub fn from_gamma(gamma: f64, side: Side) -> Result<Self, GeometryError> {
        todo!()
    }
    /// From `gamma - 1`, at least 0; the same number as the kinetic energy per rest energy.
    pub fn from_kinetic_per_rest(kinetic_per_rest: f64, side: Side) -> Result<Self, GeometryError> {
        todo!()
    }
    /// From the celerity `gamma beta`, any finite number.
    pub fn from_celerity(celerity: f64) -> Result<Self, GeometryError> {
        todo!()
    }
    /// From the Doppler factor `k = e^rapidity`, above 0.
    pub fn from_doppler(k: f64) -> Result<Self, GeometryError> {
        todo!()
    }
    /// The number itself.
    pub fn value(self) -> f64 {
        self.0
    }
    /// beta = tanh.
    pub fn beta(self) -> f64 {
        todo!()
    }
    /// `1 - |beta|`, to full relative accuracy.
    pub fn one_minus_beta(self) -> f64 {
        todo!()
    }
    /// gamma = cosh.
    pub fn gamma(self) -> f64 {
        todo!()
    }
    /// `gamma beta` = sinh.
    pub fn celerity(self) -> f64 {
        todo!()
    }
    /// k = e^rapidity.
    pub fn doppler(self) -> f64 {
        todo!()
    }
    /// `gamma - 1` = 2 sinh^2(half the rapidity), to full relative accuracy.
    pub fn kinetic_per_rest(self) -> f64 {
        todo!()
    }
    /// Which way it points; plus at 0.
    pub fn side(self) -> Side {
        todo!()
    }
}
