//! One energy-momentum vector. A massive one is kept by mass, longitudinal rapidity and py; a massless one by
//! its null components and py.

use glam::DVec2;

use crate::geometry::{Angle, Boost, GeometryError, Rapidity, Side};
use crate::num;

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
    /// A vector whose energy would be negative.
    #[error("the difference has negative energy: {energy:e}")]
    NegativeEnergy {
        /// Its energy, in the energy unit.
        energy: f64,
    },
    /// A vector that would be zero.
    #[error("{0}")]
    Nothing(&'static str),
}

/// The energy-momentum vector of one particle.
///
/// Mass, p+, p- and py are 0 or from 1e-150 to 1e150 in size, and gamma is at most 1e150; what would be beyond is a
/// `Range` error. All energies and momenta share one unit (c = 1). Derived numbers are right to a few EPS times
/// `1 + |rapidity|`, of what is stored.
///
/// ```
/// use conewright::dynamics::Momentum;
/// use conewright::geometry::Angle;
/// let p = Momentum::from_momentum(3.0, 4.0, Angle::ZERO)?;
/// assert!((p.energy() - 5.0).abs() < 1e-14 && p.mass() == 3.0);
/// # Ok::<(), conewright::dynamics::DynamicsError>(())
/// ```
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
    ///
    /// # Errors
    /// `Massless` for mass 0; `Geometry` for a mass that is negative or out of range.
    pub fn at_rest(mass: f64) -> Result<Self, DynamicsError> {
        Self::longitudinal(mass, Rapidity::ZERO, 0.0)
    }

    /// By mass (above 0), longitudinal rapidity and py.
    ///
    /// # Errors
    /// As [`Momentum::at_rest`].
    pub fn longitudinal(mass: f64, rapidity: Rapidity, py: f64) -> Result<Self, DynamicsError> {
        check_mass(mass)?;
        if mass == 0.0 {
            return Err(DynamicsError::Massless(
                "light is never at rest and has no rapidity of its own: give its energy or its momentum",
            ));
        }
        Self::Massive { mass, rapidity, py }.checked()
    }

    /// Moving with a total rapidity (signed along the direction).
    ///
    /// # Errors
    /// As [`Momentum::at_rest`].
    pub fn moving(mass: f64, rapidity: Rapidity, angle: Angle) -> Result<Self, DynamicsError> {
        Self::directed(mass, rapidity, mass * rapidity.celerity(), angle)
    }

    /// From total kinetic energy; mass 0 is light.
    ///
    /// # Errors
    /// `Geometry` for a negative one, for light of no energy and out of range.
    pub fn from_kinetic(mass: f64, kinetic: f64, angle: Angle) -> Result<Self, DynamicsError> {
        if kinetic < 0.0 {
            return Err(domain("the kinetic energy", "at least 0", kinetic));
        }
        Self::above_rest(mass, kinetic, angle)
    }

    /// From total energy, at least the mass. `excess` is `energy - mass`, formed by the caller before rounding; mass
    /// 0 is light.
    ///
    /// # Errors
    /// `Geometry` for a negative excess, for light of no energy and out of range.
    pub fn from_energy(mass: f64, excess: f64, angle: Angle) -> Result<Self, DynamicsError> {
        if excess < 0.0 {
            return Err(domain("energy less mass", "at least 0", excess));
        }
        Self::above_rest(mass, excess, angle)
    }

    /// From the size of the momentum, signed along the direction; mass 0 is light.
    ///
    /// # Errors
    /// `Geometry` for a mass that is negative, for light of no momentum and out of range.
    pub fn from_momentum(mass: f64, momentum: f64, angle: Angle) -> Result<Self, DynamicsError> {
        check_mass(mass)?;
        if mass == 0.0 {
            return if momentum < 0.0 {
                Self::light(-momentum, angle.opposite())
            } else {
                Self::light(momentum, angle)
            };
        }
        Self::directed(
            mass,
            Rapidity::from_celerity(momentum / mass)?,
            momentum,
            angle,
        )
    }

    /// From px and py; mass 0 is light.
    ///
    /// # Errors
    /// `Geometry` for a mass that is negative, for light of no momentum and out of range.
    pub fn from_components(mass: f64, px: f64, py: f64) -> Result<Self, DynamicsError> {
        check_mass(mass)?;
        if mass > 0.0 {
            let rapidity = Rapidity::from_celerity(px / root_of_squares(mass, py))?;
            return Self::longitudinal(mass, rapidity, py);
        }
        let energy = root_of_squares(px, py);
        if energy == 0.0 {
            return Err(domain("the momentum of light", "above 0", energy));
        }
        let large = energy + px.abs();
        Self::null(if px < 0.0 { -large } else { large }, py)
    }

    /// The mass, as given.
    pub fn mass(&self) -> f64 {
        match *self {
            Self::Massive { mass, .. } => mass,
            Self::Massless { .. } => 0.0,
        }
    }

    /// E.
    pub fn energy(&self) -> f64 {
        match *self {
            Self::Massive { rapidity, .. } => self.transverse_mass() * rapidity.gamma(),
            Self::Massless {
                p_minus, p_plus, ..
            } => p_minus.midpoint(p_plus),
        }
    }

    /// px.
    pub fn px(&self) -> f64 {
        match *self {
            Self::Massive { rapidity, .. } => self.transverse_mass() * rapidity.celerity(),
            Self::Massless {
                p_minus, p_plus, ..
            } => (p_plus - p_minus) / 2.0,
        }
    }

    /// py.
    pub fn py(&self) -> f64 {
        match *self {
            Self::Massive { py, .. } | Self::Massless { py, .. } => py,
        }
    }

    /// The size of the momentum.
    pub fn momentum(&self) -> f64 {
        match *self {
            Self::Massive { py, .. } => root_of_squares(self.px(), py),
            Self::Massless { .. } => self.energy(),
        }
    }

    /// E - px.
    pub fn p_minus(&self) -> f64 {
        match *self {
            Self::Massive { rapidity, .. } => self.transverse_mass() / rapidity.doppler(),
            Self::Massless { p_minus, .. } => p_minus,
        }
    }

    /// E + px.
    pub fn p_plus(&self) -> f64 {
        match *self {
            Self::Massive { rapidity, .. } => self.transverse_mass() * rapidity.doppler(),
            Self::Massless { p_plus, .. } => p_plus,
        }
    }

    /// E - m, never by subtraction: `py^2 / (m_T + m) + 2 m_T sinh^2(y/2)`.
    pub fn kinetic(&self) -> f64 {
        match *self {
            Self::Massive { mass, rapidity, py } => {
                let m_t = self.transverse_mass();
                py / (m_t + mass) * py + m_t * rapidity.kinetic_per_rest()
            }
            Self::Massless { .. } => self.energy(),
        }
    }

    /// The root of `m^2 + py^2`.
    pub fn transverse_mass(&self) -> f64 {
        root_of_squares(self.mass(), self.py())
    }

    /// The speed; 1 from a rapidity of 19 on, where `one_minus_beta` has the digits.
    pub fn beta(&self) -> f64 {
        let rest = self.one_minus_beta();
        if rest < 0.5 {
            1.0 - rest
        } else {
            self.momentum() / self.energy()
        }
    }

    /// px / E.
    pub fn beta_x(&self) -> f64 {
        match *self {
            Self::Massive { rapidity, .. } => rapidity.beta(),
            Self::Massless {
                p_minus, p_plus, ..
            } => (p_plus - p_minus) / (p_plus + p_minus),
        }
    }

    /// `1 - beta` of the whole speed, to full relative accuracy; 0 for light.
    pub fn one_minus_beta(&self) -> f64 {
        let (mass, energy) = (self.mass(), self.energy());
        // (E - p) / E with E - p = m^2 / (E + p)
        (mass / energy) * (mass / (energy + self.momentum()))
    }

    /// E / m; none for light.
    pub fn gamma(&self) -> Option<f64> {
        match *self {
            Self::Massive { mass, rapidity, .. } => {
                Some(self.transverse_mass() / mass * rapidity.gamma())
            }
            Self::Massless { .. } => None,
        }
    }

    /// Longitudinal rapidity; none where p- or p+ is 0.
    pub fn rapidity(&self) -> Option<f64> {
        match *self {
            Self::Massive { rapidity, .. } => Some(rapidity.value()),
            Self::Massless {
                p_minus, p_plus, ..
            } => (p_minus > 0.0 && p_plus > 0.0).then(|| 0.5 * num::ln(p_plus / p_minus)),
        }
    }

    /// Rapidity of the whole motion, not negative; none for light.
    pub fn total_rapidity(&self) -> Option<f64> {
        match *self {
            Self::Massive { mass, rapidity, py } => Some(if py == 0.0 {
                rapidity.value().abs()
            } else {
                num::asinh(self.momentum() / mass)
            }),
            Self::Massless { .. } => None,
        }
    }

    /// `asinh(px / |py|)`; none where py is 0.
    pub fn pseudorapidity(&self) -> Option<f64> {
        let py = self.py();
        (py != 0.0).then(|| num::asinh(self.px() / py.abs()))
    }

    /// The direction; +x at rest.
    pub fn angle(&self) -> Angle {
        Angle::of(self.px(), self.py())
    }

    /// As a moving frame has it. The mass is kept as it is; along x the rapidity shifts and py stays. In another
    /// direction each component is right to `32 EPS` of E times `e^rapidity` of the frame.
    ///
    /// # Errors
    /// `Geometry` beyond the range.
    pub fn boosted(&self, boost: Boost) -> Result<Self, DynamicsError> {
        match *self {
            Self::Massive { mass, rapidity, py } => {
                if boost.is_along_x() {
                    let seen = rapidity.relative_to(boost.rapidity())?;
                    return Self::longitudinal(mass, seen, py);
                }
                // In axes along the boost it shifts the rapidity as one along x does.
                let (along, across) = boost.angle().split(DVec2::new(self.px(), py));
                let m_t = root_of_squares(mass, across);
                let seen = Rapidity::from_celerity(along / m_t)?.relative_to(boost.rapidity())?;
                let p = boost.angle().join(m_t * seen.celerity(), across);
                Self::from_components(mass, p.x, p.y)
            }
            Self::Massless {
                p_minus,
                p_plus,
                py,
            } => {
                let k = boost.rapidity().doppler();
                if boost.is_along_x() {
                    return Self::Massless {
                        p_minus: p_minus * k,
                        p_plus: p_plus / k,
                        py,
                    }
                    .checked();
                }
                let (along, across) = boost.angle().split(DVec2::new(self.px(), py));
                let large = self.energy() + along.abs();
                let small = across * (across / large);
                let (minus, plus) = if along < 0.0 {
                    (large * k, small / k)
                } else {
                    (small * k, large / k)
                };
                let p = boost.angle().join((plus - minus) / 2.0, across);
                Self::from_components(0.0, p.x, p.y)
            }
        }
    }

    /// The boost to its rest frame.
    ///
    /// # Errors
    /// `Massless` for light.
    pub fn rest_frame(&self) -> Result<Boost, DynamicsError> {
        match (*self, self.total_rapidity()) {
            (Self::Massive { rapidity, py, .. }, Some(total)) => Ok(if py == 0.0 {
                Boost::along_x(rapidity)
            } else {
                Boost::new(Rapidity::new(total)?, self.angle())
            }),
            _ => Err(DynamicsError::Massless("light has no rest frame")),
        }
    }

    fn above_rest(mass: f64, kinetic: f64, angle: Angle) -> Result<Self, DynamicsError> {
        check_mass(mass)?;
        if mass == 0.0 {
            return Self::light(kinetic, angle);
        }
        let rapidity = Rapidity::from_kinetic_per_rest(kinetic / mass, Side::Plus)?;
        let momentum = kinetic.sqrt() * (kinetic + 2.0 * mass).sqrt();
        Self::directed(mass, rapidity, momentum, angle)
    }

    /// A massive one by the rapidity or the momentum of the whole motion, which say the same.
    fn directed(
        mass: f64,
        rapidity: Rapidity,
        momentum: f64,
        angle: Angle,
    ) -> Result<Self, DynamicsError> {
        if angle.is_along_x() {
            let toward_plus = angle.cos() > 0.0;
            let rapidity = if toward_plus { rapidity } else { -rapidity };
            return Self::longitudinal(mass, rapidity, 0.0);
        }
        let p = angle.unit() * momentum;
        if mass == 0.0 {
            // For its words.
            return Self::longitudinal(mass, rapidity, p.y);
        }
        Self::from_components(mass, p.x, p.y)
    }

    fn light(energy: f64, angle: Angle) -> Result<Self, DynamicsError> {
        if energy > 0.0 {
            let large = energy * (1.0 + angle.cos().abs());
            let signed = if angle.cos() < 0.0 { -large } else { large };
            Self::null(signed, energy * angle.sin())
        } else {
            Err(domain("the energy of light", "above 0", energy))
        }
    }

    /// A massless one by its larger null component, negative where that is p-, and py.
    pub(super) fn null(large: f64, py: f64) -> Result<Self, DynamicsError> {
        let small = py * (py / large.abs());
        let (p_minus, p_plus) = if large < 0.0 {
            (-large, small)
        } else {
            (small, large)
        };
        Self::Massless {
            p_minus,
            p_plus,
            py,
        }
        .checked()
    }

    fn checked(self) -> Result<Self, DynamicsError> {
        let shown = [
            self.mass(),
            self.px(),
            self.py(),
            self.p_minus(),
            self.p_plus(),
        ];
        GeometryError::check("an energy-momentum vector", shown)?;
        if self.gamma().is_some_and(|gamma| gamma > num::LARGEST) {
            return Err(GeometryError::Range { what: "gamma" }.into());
        }
        Ok(self)
    }
}

/// `sqrt(a^2 + b^2)`, exact where one is 0.
pub(super) fn root_of_squares(a: f64, b: f64) -> f64 {
    if b == 0.0 {
        a.abs()
    } else if a == 0.0 {
        b.abs()
    } else {
        num::hypot(a, b)
    }
}

fn check_mass(mass: f64) -> Result<(), DynamicsError> {
    if mass >= 0.0 {
        Ok(())
    } else {
        Err(domain("the mass", "at least 0", mass))
    }
}

fn domain(what: &'static str, domain: &'static str, value: f64) -> DynamicsError {
    GeometryError::Domain {
        what,
        domain,
        value,
    }
    .into()
}
