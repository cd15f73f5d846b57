//! A particle (or anything that moves), and how far its numbers may be off.

use super::kinematics::{Frame, Vector, eps, few};
use super::real::Real;

/// A vector in some frame, its mass, and how far what is stored of it may be off.
#[derive(Clone, Debug)]
pub(crate) struct Particle {
    pub(crate) p: Vector,
    pub(crate) mass: Real,
    /// Of the longitudinal rapidity.
    pub(crate) rapidity_doubt: Real,
    /// Of py.
    pub(crate) py_doubt: Real,
    /// Of the mass.
    pub(crate) mass_doubt: Real,
    /// Of p- and of p+.
    pub(crate) null_doubt: (Real, Real),
}

impl Particle {
    /// By what is stored: mass, rapidity and py.
    pub(crate) fn new(p: Vector, mass: Real, rapidity_doubt: Real, py_doubt: Real) -> Self {
        let mass_doubt = eps(2) * &mass;
        Self::closing(p, mass, rapidity_doubt, py_doubt, mass_doubt)
    }

    pub(crate) fn closing(
        p: Vector,
        mass: Real,
        rapidity_doubt: Real,
        py_doubt: Real,
        mass_doubt: Real,
    ) -> Self {
        let mut made = Self {
            p,
            mass,
            rapidity_doubt,
            py_doubt,
            mass_doubt,
            null_doubt: (Real::zero(), Real::zero()),
        };
        let relative = &made.rapidity_doubt + made.transverse_doubt() + few();
        made.null_doubt = (made.p.u() * &relative, made.p.v() * relative);
        made
    }

    /// Per unit of its mass: its 4-velocity. Light stays as it is.
    pub(crate) fn per_mass(&self) -> Self {
        if self.mass.is_zero() {
            return self.clone();
        }
        let k = Real::one() / &self.mass;
        let relative = &self.mass_doubt * &k;
        let mut motion = Self::new(
            self.p.times(&k),
            Real::one(),
            self.rapidity_doubt.clone(),
            &self.py_doubt * &k + (self.p.y.abs() * &k) * (relative + eps(2)),
        );
        motion.p.y = if self.p.y.is_zero() {
            Real::zero()
        } else {
            motion.p.y
        };
        motion
    }

    /// True for light along x, which has no longitudinal rapidity.
    pub(crate) fn is_endless(&self) -> bool {
        self.mass.is_zero() && self.p.y.is_zero()
    }

    /// Longitudinal rapidity; none for light along x.
    pub(crate) fn rapidity(&self) -> Option<Real> {
        (!self.is_endless()).then(|| self.p.rapidity())
    }

    pub(crate) fn transverse_mass(&self) -> Real {
        if self.p.y.is_zero() {
            return self.mass.clone();
        }
        (self.mass.squared() + self.p.y.squared()).sqrt()
    }

    /// Of the transverse mass, relative.
    fn transverse_doubt(&self) -> Real {
        if self.is_endless() {
            return Real::zero();
        }
        (self.p.y.abs() * &self.py_doubt + &self.mass * &self.mass_doubt)
            / self.transverse_mass().squared()
    }

    /// As a frame has it.
    pub(crate) fn seen(&self, frame: &Frame) -> Self {
        if frame.is_base() {
            return self.clone();
        }
        self.turned(frame.see(&self.p), frame, &frame.doppler)
    }

    /// The way back: a particle given in a frame, in the base.
    pub(crate) fn unseen(&self, frame: &Frame) -> Self {
        self.turned(frame.unsee(&self.p), frame, &(Real::one() / &frame.doppler))
    }

    /// With `k` the factor of p- along x.
    fn turned(&self, p: Vector, frame: &Frame, k: &Real) -> Self {
        if frame.is_along_x() {
            return self.shifted(p, frame, k);
        }
        // Across x: one doubt for every component.
        let stored = &self.null_doubt.0 + &self.null_doubt.1 + &self.py_doubt;
        let off = (stored + (eps(32) + &frame.doubt) * &self.p.t) * &frame.doppler;
        let mut seen = Self {
            p,
            py_doubt: off.clone(),
            null_doubt: (Real::int(2) * &off, Real::int(2) * &off),
            ..self.clone()
        };
        seen.rapidity_doubt = if seen.is_endless() {
            Real::zero()
        } else {
            let aside = seen.p.y.abs() / seen.transverse_mass().squared();
            off * (Real::one() / &seen.p.t + aside)
        };
        seen
    }

    fn shifted(&self, p: Vector, frame: &Frame, k: &Real) -> Self {
        let (minus, plus) = &self.null_doubt;
        let shift = frame.shift_doubt() + few();
        let mut seen = Self {
            null_doubt: (minus * k + p.u() * &shift, plus / k + p.v() * &shift),
            p,
            ..self.clone()
        };
        if let Some(y) = seen.rapidity() {
            seen.rapidity_doubt = &seen.rapidity_doubt + frame.shift_doubt() + eps(1) * y.abs();
            if self.mass.is_zero() {
                seen.rapidity_doubt = &seen.rapidity_doubt + few();
            }
        }
        seen
    }

    pub(crate) fn energy_doubt(&self) -> Real {
        self.component_doubt(&self.p.x, &self.p.t)
    }

    pub(crate) fn px_doubt(&self) -> Real {
        self.component_doubt(&self.p.t, &self.p.x)
    }

    /// Of E or px, whose derivative by the rapidity is px or E: by what is stored, or by p- and p+ if that says more.
    fn component_doubt(&self, derivative: &Real, value: &Real) -> Real {
        let by_null = (&self.null_doubt.0 + &self.null_doubt.1) / Real::int(2);
        if self.is_endless() {
            return by_null;
        }
        let by_stored = derivative.abs() * &self.rapidity_doubt
            + value.abs() * (self.transverse_doubt() + few());
        if by_stored < by_null {
            by_stored
        } else {
            by_null
        }
    }

    pub(crate) fn kinetic_doubt(&self) -> Real {
        let kinetic = &self.p.t - &self.mass;
        if self.is_endless() {
            return self.energy_doubt();
        }
        let aside = &self.p.t * self.p.y.abs() / self.transverse_mass().squared();
        let moved = self.p.x.abs() * &self.rapidity_doubt + aside * &self.py_doubt;
        if self.mass.is_zero() {
            return moved + few() * kinetic;
        }
        // At rest the first order is 0, and the second one counts.
        let second = self.px_doubt().squared() + self.py_doubt.squared();
        moved + second / &self.mass + &kinetic * (few() + &self.mass_doubt / &self.mass)
    }

    /// Of the size of the momentum.
    pub(crate) fn momentum_doubt(&self) -> Real {
        let p = self.p.size();
        if p.is_zero() {
            return self.px_doubt() + &self.py_doubt;
        }
        (self.p.x.abs() * self.px_doubt() + self.p.y.abs() * &self.py_doubt) / &p + few() * p
    }

    /// Of 1 - beta, apart from its own rounding.
    pub(crate) fn beta_doubt(&self) -> Real {
        let e = &self.p.t;
        let by_mass = &self.mass * &self.mass_doubt * self.p.size() / (e * e * e);
        self.mass.squared() * self.momentum_doubt() / (e * e * e) + by_mass
    }

    pub(crate) fn angle_doubt(&self) -> Real {
        let across = self.p.y.abs() * self.px_doubt() + self.p.x.abs() * &self.py_doubt;
        across / self.p.size().squared()
    }

    pub(crate) fn pseudorapidity_doubt(&self) -> Real {
        let (p, y) = (self.p.size(), self.p.y.abs());
        self.px_doubt() / &p + self.p.x.abs() * &self.py_doubt / (y * p)
    }
}
