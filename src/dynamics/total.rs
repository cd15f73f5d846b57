//! Sums of energy-momentum vectors and their invariants, by forms that do not cancel.

use crate::geometry::{Boost, Rapidity};
use crate::num::{self, EPS};

use super::momentum::root_of_squares;
use super::{DynamicsError, Momentum};

/// The sum of some vectors: its components, its invariant mass and its excess over the sum of masses.
///
/// Components are right to 1e-12 of the sum of absolute terms. A py that is 0 within the rounding of its terms is 0,
/// so that what balances across goes along x exactly.
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
    /// The invariant mass of the sum; 0 for parallel light, for nothing. Right to 1e-12 of what is stored (light
    /// stores its direction to EPS: two photons open by an angle a have their mass to EPS / a of itself).
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
        let sum = |f: fn(&Momentum) -> f64| num::sum(parts.iter().map(f));
        let across = sum(|p| p.py().abs());
        let py = Some(sum(Momentum::py)).filter(|py| py.abs() > 2.0 * EPS * across);
        let energy = sum(Momentum::energy);
        let mut total = Self {
            energy,
            px: sum(Momentum::px),
            py: py.unwrap_or(0.0),
            p_minus: sum(Momentum::p_minus),
            p_plus: sum(Momentum::p_plus),
            kinetic: sum(Momentum::kinetic),
            mass_sum: sum(Momentum::mass),
            invariant_mass: 0.0,
            excess: 0.0,
            energy_scale: energy,
            momentum_scale: sum(|p| p.px().abs()) + across,
        };
        match parts {
            [] => {}
            [one] => total.invariant_mass = one.mass(),
            _ => {
                let shares = Shares::of(parts);
                total.invariant_mass = shares.mass(total.mass_sum);
                if total.mass_sum == 0.0 {
                    total.excess = total.invariant_mass;
                } else {
                    total.excess = excess(parts, &shares, total.invariant_mass);
                }
            }
        }
        total
    }

    /// The sum as one vector, with the invariant mass as its mass.
    ///
    /// # Errors
    /// `Nothing` for no parts; `Geometry` beyond the range.
    pub fn to_momentum(&self) -> Result<Momentum, DynamicsError> {
        if self.energy == 0.0 {
            return Err(DynamicsError::Nothing(
                "nothing is added: there is no sum to make one vector of",
            ));
        }
        if self.invariant_mass == 0.0 {
            return null_of(self.p_minus, self.p_plus, self.py);
        }
        let m_t = root_of_squares(self.invariant_mass, self.py);
        let rapidity = Rapidity::from_celerity(self.px / m_t)?;
        Momentum::longitudinal(self.invariant_mass, rapidity, self.py)
    }

    /// The boost to the frame in which the total momentum is 0.
    ///
    /// # Errors
    /// `Massless` for parallel light, `Nothing` for no parts.
    pub fn centre_of_momentum(&self) -> Result<Boost, DynamicsError> {
        if self.energy > 0.0 && self.invariant_mass == 0.0 {
            return Err(DynamicsError::Massless(
                "light that goes one way has no centre-of-momentum frame",
            ));
        }
        self.to_momentum()?.rest_frame()
    }
}

/// A massless vector from components that are null within rounding: the larger null component and py hold it.
fn null_of(p_minus: f64, p_plus: f64, py: f64) -> Result<Momentum, DynamicsError> {
    Momentum::null(if p_plus >= p_minus { p_plus } else { -p_minus }, py)
}

/// Each part's share `x = p+ / P+` of the larger null component of the total and its momentum across relative to
/// the total, `k = py - x Py` (p- for p+ throughout where P- > P+). In these
/// `p.P = 1/2 ((m^2 + k^2) / x + x M^2)` and `M^2` is the sum of `(m^2 + k^2) / x`.
struct Shares {
    parts: Vec<Share>,
}

struct Share {
    py: f64,
    x: f64,
    /// What it adds to M^2.
    square: f64,
}

impl Shares {
    fn of(parts: &[Momentum]) -> Self {
        let sum = |f: fn(&Momentum) -> f64| num::sum(parts.iter().map(f));
        let (plus, minus) = (sum(Momentum::p_plus), sum(Momentum::p_minus));
        let py = sum(Momentum::py);
        let ends = |p: &Momentum| {
            if plus >= minus {
                (p.p_plus(), p.p_minus())
            } else {
                (p.p_minus(), p.p_plus())
            }
        };
        let whole = plus.max(minus);
        let share = |p: &Momentum| {
            let (large, small) = ends(p);
            let x = large / whole;
            let k = num::difference_of_products(p.py(), whole, large, py) / whole;
            let square = if x == 0.0 {
                whole * small
            } else {
                p.mass() * (p.mass() / x) + k * (k / x)
            };
            Share {
                py: p.py(),
                x,
                square,
            }
        };
        Self {
            parts: parts.iter().map(share).collect(),
        }
    }

    /// The invariant mass; 0 for light that is parallel within the rounding of its stored components.
    fn mass(&self, mass_sum: f64) -> f64 {
        let square = num::sum(self.parts.iter().map(|s| s.square));
        let rounding = |s: &Share| {
            let blur = 4.0 * EPS * s.py;
            if s.x == 0.0 { 0.0 } else { blur * (blur / s.x) }
        };
        if mass_sum == 0.0 && square <= num::sum(self.parts.iter().map(rounding)) {
            0.0
        } else {
            square.sqrt()
        }
    }
}

/// The sum of the kinetic energies in the centre of momentum, for parts of which some are massive.
///
/// `T* = m [2 w W sinh^2(dy/2) + 2 sinh^2((a - A)/2)]` with w = m_T/m, a = asinh(py/m), W and A the same of the total
/// and dy the longitudinal rapidity to the total; of a massless part p.P / M.
fn excess(parts: &[Momentum], shares: &Shares, mass: f64) -> f64 {
    let py = num::sum(parts.iter().map(Momentum::py));
    let across = num::asinh(py / mass);
    let w_total = root_of_squares(mass, py) / mass;
    let (reference, ahead) = rapidity_of_total(parts);
    let kinetic = |(p, s): (&Momentum, &Share)| match *p {
        Momentum::Massive { mass, rapidity, py } => {
            let half_dy = ((rapidity.value() - reference) - ahead) / 2.0;
            let half_da = (num::asinh(py / mass) - across) / 2.0;
            let (along, aside) = (num::sinh(half_dy), num::sinh(half_da));
            2.0 * (p.transverse_mass() * w_total * along * along + mass * aside * aside)
        }
        Momentum::Massless { .. } => f64::midpoint(s.square / mass, s.x * mass),
    };
    num::sum(parts.iter().zip(&shares.parts).map(kinetic))
}

/// The longitudinal rapidity of the total, as that of its heaviest part and what is to be added to it.
fn rapidity_of_total(parts: &[Momentum]) -> (f64, f64) {
    let heaviest = parts
        .iter()
        .filter(|p| p.mass() > 0.0)
        .max_by(|a, b| a.transverse_mass().total_cmp(&b.transverse_mass()));
    let reference = heaviest.and_then(Momentum::rapidity).unwrap_or(0.0);
    // p- and p+ - p- as seen at the reference.
    let minus = |p: &Momentum| match *p {
        Momentum::Massive { rapidity, .. } => {
            p.transverse_mass() * num::exp(reference - rapidity.value())
        }
        Momentum::Massless { p_minus, .. } => p_minus * num::exp(reference),
    };
    let twice_px = |p: &Momentum| match *p {
        Momentum::Massive { rapidity, .. } => {
            2.0 * p.transverse_mass() * num::sinh(rapidity.value() - reference)
        }
        Momentum::Massless {
            p_minus, p_plus, ..
        } => p_plus * num::exp(-reference) - p_minus * num::exp(reference),
    };
    let quotient = num::sum(parts.iter().map(twice_px)) / num::sum(parts.iter().map(minus));
    if quotient.abs() < 0.5 {
        return (reference, 0.5 * num::log1p(quotient));
    }
    let plus = num::sum(parts.iter().map(Momentum::p_plus));
    let minus = num::sum(parts.iter().map(Momentum::p_minus));
    (0.5 * num::ln(plus / minus), 0.0)
}

/// The vector that must be added to `parts` to make `whole`: the missing one. A mass squared within rounding of 0 is
/// 0; below it, an error that states it. A py within rounding of 0 is 0.
///
/// Rounding is `(|rapidity| + 8) EPS` of each null component added, which covers the storing of a rapidity.
///
/// # Errors
/// `Spacelike` and `NegativeEnergy` where no particle can be what is missing, `Nothing` where nothing is, `Geometry`
/// beyond the range.
pub fn remainder(whole: &[Momentum], parts: &[Momentum]) -> Result<Momentum, DynamicsError> {
    let difference = |f: fn(&Momentum) -> f64| {
        let added = whole.iter().map(f);
        num::sum(added.chain(parts.iter().map(|p| -f(p))))
    };
    let blur = |f: fn(&Momentum) -> f64| {
        let one = |p: &Momentum| (p.rapidity().unwrap_or(0.0).abs() + 8.0) * EPS * f(p).abs();
        num::sum(whole.iter().chain(parts).map(one))
    };
    let (minus, plus) = (difference(Momentum::p_minus), difference(Momentum::p_plus));
    let (minus_blur, plus_blur) = (blur(Momentum::p_minus), blur(Momentum::p_plus));
    let py_blur = blur(Momentum::py);
    let py = Some(difference(Momentum::py))
        .filter(|py| py.abs() > py_blur)
        .unwrap_or(0.0);
    if minus.abs() <= minus_blur && plus.abs() <= plus_blur && py == 0.0 {
        return Err(DynamicsError::Nothing(
            "both sides are equal within rounding: nothing is missing",
        ));
    }
    if minus < -minus_blur || plus < -plus_blur {
        return Err(negative(minus, plus, py));
    }
    let square = num::difference_of_products(minus, plus, py, py);
    let square_blur = (minus.abs() + minus_blur) * plus_blur
        + (plus.abs() + plus_blur) * minus_blur
        + 2.0 * (py.abs() + py_blur) * py_blur;
    if square.abs() <= square_blur {
        return null_of(minus, plus, py);
    }
    if square < 0.0 {
        return Err(DynamicsError::Spacelike {
            mass_squared: square,
        });
    }
    let mass = square.sqrt();
    let px = difference(Momentum::px);
    let rapidity = Rapidity::from_celerity(px / root_of_squares(mass, py))?;
    Momentum::longitudinal(mass, rapidity, py)
}

/// Why components of which one is negative are no particle's.
fn negative(minus: f64, plus: f64, py: f64) -> DynamicsError {
    let square = num::difference_of_products(minus, plus, py, py);
    if square < 0.0 {
        DynamicsError::Spacelike {
            mass_squared: square,
        }
    } else {
        DynamicsError::NegativeEnergy {
            energy: minus.midpoint(plus),
        }
    }
}
