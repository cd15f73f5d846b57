//! Sums of energy-momentum vectors and their invariants, by forms that do not cancel.

use super::{DynamicsError, Momentum};
use crate::geometry::Boost;

/// The sum of some vectors: its components, its invariant mass and its excess over the sum of masses.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Total {
    /// Sum of E.
    pub energy: f64,
    /// Sum of px.
    pub px: f64,
    /// Sum of py.
    pub py: f64,
    /// Sum of E - px.
    pub p_minus: f64,
    /// Sum of E + px.
    pub p_plus: f64,
    /// Sum of E - m.
    pub kinetic: f64,
    /// Sum of the masses.
    pub mass_sum: f64,
    /// The invariant mass of the sum; 0 for parallel light, for nothing.
    pub invariant_mass: f64,
    /// `invariant_mass - mass_sum`, summed as kinetic energies in the centre of momentum, never a difference.
    pub excess: f64,
    /// Sum of |E| added, for tolerances.
    pub energy_scale: f64,
    /// Sum of |px| + |py| added, for tolerances.
    pub momentum_scale: f64,
}

impl Total {
    /// The sum of `parts`; of none, all zero.
    pub fn of(parts: &[Momentum]) -> Self {
        todo!()
    }
    /// The sum as one vector, with the invariant mass as its mass. An error for nothing.
    pub fn to_momentum(&self) -> Result<Momentum, DynamicsError> {
        todo!()
    }
    /// The boost to the frame in which the total momentum is 0. An error for parallel light.
    pub fn centre_of_momentum(&self) -> Result<Boost, DynamicsError> {
        todo!()
    }
}

/// The vector that must be added to `parts` to make `whole`: the missing one. A mass squared within rounding of 0 is
/// 0; below it, an error that states it.
pub fn remainder(whole: &[Momentum], parts: &[Momentum]) -> Result<Momentum, DynamicsError> {
    todo!()
}
