//! One energy-momentum vector. A massive one is kept by mass, longitudinal rapidity and py; a massless one by
//! its null components and py.

use crate::geometry::{Angle, Boost, GeometryError, Rapidity};

/// Why a momentum cannot be.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum DynamicsError {
    /// A number or a range of the geometry.
    #[error(transparent)]
    Geometry(#[from] GeometryError),
    /// A particle without mass has no rest frame and no free choice of speed.
    #[error("{0}")]
    Massless(&'static str),
    /// A vector whose mass squared would be negative.
    #[error("the difference is spacelike: its mass squared is {mass_squared:e}")]
    Spacelike {
        /// Its mass squared, in the square of the energy unit.
        mass_squared: f64,
    },
}

/// The energy-momentum vector of one particle.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Momentum {
    /// `mass > 0`.
    Massive {
        /// Its mass.
        mass: f64,
        /// `1/2 ln(p+/p-)`.
        rapidity: Rapidity,
        /// Across.
        py: f64,
    },
    /// Mass 0: `p- p+ = py^2`.
    Massless {
        /// E - px.
        p_minus: f64,
        /// E + px.
        p_plus: f64,
        /// Across.
        py: f64,
    },
}

impl Momentum {
    /// At rest.
    pub fn at_rest(mass: f64) -> Result<Self, DynamicsError> {
        todo!()
    }
    /// By mass (above 0), longitudinal rapidity and py.
    pub fn longitudinal(mass: f64, rapidity: Rapidity, py: f64) -> Result<Self, DynamicsError> {
        todo!()
    }
    /// Moving with a total rapidity (signed along the direction).
    pub fn moving(mass: f64, rapidity: Rapidity, angle: Angle) -> Result<Self, DynamicsError> {
        todo!()
    }
    /// From total kinetic energy; mass 0 is light.
    pub fn from_kinetic(mass: f64, kinetic: f64, angle: Angle) -> Result<Self, DynamicsError> {
        todo!()
    }
    /// From total energy, at least the mass. `excess` is `energy - mass`, formed by the caller before rounding.
    pub fn from_energy(mass: f64, excess: f64, angle: Angle) -> Result<Self, DynamicsError> {
        todo!()
    }
    /// From the size of the momentum, signed along the direction; mass 0 is light.
    pub fn from_momentum(mass: f64, momentum: f64, angle: Angle) -> Result<Self, DynamicsError> {
        todo!()
    }
    /// From px and py; mass 0 is light.
    pub fn from_components(mass: f64, px: f64, py: f64) -> Result<Self, DynamicsError> {
        todo!()
    }

    /// The mass, as given.
    pub fn mass(&self) -> f64 {
        todo!()
    }
    /// E.
    pub fn energy(&self) -> f64 {
        todo!()
    }
    /// px.
    pub fn px(&self) -> f64 {
        todo!()
    }
    /// py.
    pub fn py(&self) -> f64 {
        todo!()
    }
    /// The size of the momentum.
    pub fn momentum(&self) -> f64 {
        todo!()
    }
    /// E - px.
    pub fn p_minus(&self) -> f64 {
        todo!()
    }
    /// E + px.
    pub fn p_plus(&self) -> f64 {
        todo!()
    }
    /// E - m, never by subtraction.
    pub fn kinetic(&self) -> f64 {
        todo!()
    }
    /// The root of `m^2 + py^2`.
    pub fn transverse_mass(&self) -> f64 {
        todo!()
    }
    /// The speed.
    pub fn beta(&self) -> f64 {
        todo!()
    }
    /// px / E.
    pub fn beta_x(&self) -> f64 {
        todo!()
    }
    /// `1 - beta` of the whole speed, to full relative accuracy; 0 for light.
    pub fn one_minus_beta(&self) -> f64 {
        todo!()
    }
    /// E / m; none for light.
    pub fn gamma(&self) -> Option<f64> {
        todo!()
    }
    /// Longitudinal rapidity; none where p- or p+ is 0.
    pub fn rapidity(&self) -> Option<f64> {
        todo!()
    }
    /// Rapidity of the whole motion; none for light.
    pub fn total_rapidity(&self) -> Option<f64> {
        todo!()
    }
    /// `asinh(px / |py|)`; none where py is 0.
    pub fn pseudorapidity(&self) -> Option<f64> {
        todo!()
    }
    /// The direction; +x at rest.
    pub fn angle(&self) -> Angle {
        todo!()
    }
    /// As a moving frame has it.
    pub fn boosted(&self, boost: Boost) -> Result<Self, DynamicsError> {
        todo!()
    }
    /// The boost to its rest frame.
    pub fn rest_frame(&self) -> Result<Boost, DynamicsError> {
        todo!()
    }
}
