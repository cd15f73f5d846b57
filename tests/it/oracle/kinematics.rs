//! Vectors by plain components, frames, and how far the program may be off.
//!
//! The bounds follow the promises: a particle is stored by mass, longitudinal rapidity y and py, each rounded, so that
//! y is right to a few units in the last place of all rapidities that were added to make it; components follow by the
//! derivatives. A boost across x is right to 16 EPS of E times e^rapidity.

use super::real::Real;

/// 2^-52 times `n`.
pub(crate) fn eps(n: i64) -> Real {
    Real::of(f64::EPSILON) * Real::int(n)
}

/// The few units in the last place that a short chain of operations may cost.
pub(crate) const FEW: i64 = 8;

pub(crate) fn few() -> Real {
    eps(FEW)
}

/// (t, x, y) or (E, px, py).
#[derive(Clone, Debug)]
pub(crate) struct Vector {
    pub(crate) t: Real,
    pub(crate) x: Real,
    pub(crate) y: Real,
}

impl Vector {
    pub(crate) fn new(t: Real, x: Real, y: Real) -> Self {
        Self { t, x, y }
    }

    pub(crate) fn zero() -> Self {
        Self::new(Real::zero(), Real::zero(), Real::zero())
    }

    pub(crate) fn plus(&self, o: &Self) -> Self {
        Self::new(&self.t + &o.t, &self.x + &o.x, &self.y + &o.y)
    }

    pub(crate) fn minus(&self, o: &Self) -> Self {
        Self::new(&self.t - &o.t, &self.x - &o.x, &self.y - &o.y)
    }

    pub(crate) fn times(&self, k: &Real) -> Self {
        Self::new(&self.t * k, &self.x * k, &self.y * k)
    }

    pub(crate) fn dot(&self, o: &Self) -> Real {
        &self.t * &o.t - &self.x * &o.x - &self.y * &o.y
    }

    /// t^2 - x^2 - y^2; 0 where nothing is left of the digits.
    pub(crate) fn square(&self) -> Real {
        let square = self.dot(self);
        if square.vanishes_beside(&self.t.squared().max(&self.x.squared())) {
            Real::zero()
        } else {
            square
        }
    }

    pub(crate) fn u(&self) -> Real {
        &self.t - &self.x
    }

    pub(crate) fn v(&self) -> Real {
        &self.t + &self.x
    }

    /// The size of (x, y).
    pub(crate) fn size(&self) -> Real {
        if self.y.is_zero() {
            self.x.abs()
        } else {
            (self.x.squared() + self.y.squared()).sqrt()
        }
    }

    /// The largest of |u|, |v|, |y|.
    pub(crate) fn largest(&self) -> Real {
        self.u().abs().max(&self.v().abs()).max(&self.y.abs())
    }

    /// 1/2 ln(v/u).
    pub(crate) fn rapidity(&self) -> Real {
        (self.v() / self.u()).ln() / Real::int(2)
    }

    /// A unit vector along t that moves at a rapidity in a direction.
    pub(crate) fn moving(rapidity: &Real, (cos, sin): &(Real, Real)) -> Self {
        let celerity = rapidity.sinh();
        Self::new(rapidity.cosh(), &celerity * cos, &celerity * sin)
    }
}

/// Cosine and sine of an angle in degrees; those of multiples of 90 degrees are 0 and 1.
pub(crate) fn direction(degrees: &Real) -> (Real, Real) {
    let quarters = (degrees.f64() / 90.0).round();
    if (Real::of(quarters) * Real::int(90) - degrees).is_zero() {
        let quarters = quarters.rem_euclid(4.0);
        let table = [(0.0, 1, 0), (1.0, 0, 1), (2.0, -1, 0), (3.0, 0, -1)];
        let (_, cos, sin) = table.into_iter().find(|row| row.0 == quarters).unwrap();
        return (Real::int(cos), Real::int(sin));
    }
    let (sin, cos) = (degrees * Real::pi() / Real::int(180)).sin_cos();
    (cos, sin)
}

/// A frame: where its clock goes, seen from the base, and its origin.
#[derive(Clone, Debug)]
pub(crate) struct Frame {
    pub(crate) velocity: Vector,
    pub(crate) origin: Event,
    /// How far its rapidity (and, across x, its celerity) may be off.
    pub(crate) doubt: Real,
    /// Signed along x.
    pub(crate) rapidity: Real,
    /// e^rapidity.
    pub(crate) doppler: Real,
}

impl Frame {
    pub(crate) fn new(velocity: Vector, origin: Event, doubt: Real) -> Self {
        let celerity = if velocity.y.is_zero() {
            velocity.x.clone()
        } else {
            velocity.size()
        };
        let rapidity = celerity.asinh();
        Self {
            velocity,
            origin,
            doubt,
            doppler: rapidity.exp(),
            rapidity,
        }
    }

    pub(crate) fn base() -> Self {
        let at_rest = Vector::new(Real::one(), Real::zero(), Real::zero());
        Self::new(at_rest, Event::origin(), Real::zero())
    }

    pub(crate) fn is_along_x(&self) -> bool {
        self.velocity.y.is_zero()
    }

    pub(crate) fn is_base(&self) -> bool {
        self.velocity.size().is_zero()
    }

    /// A vector as the frame has it; axes unrotated.
    pub(crate) fn see(&self, v: &Vector) -> Vector {
        boosted(v, &self.velocity)
    }

    /// The way back.
    pub(crate) fn unsee(&self, v: &Vector) -> Vector {
        let w = &self.velocity;
        let back = Vector::new(w.t.clone(), -w.x.clone(), -w.y.clone());
        boosted(v, &back)
    }

    /// What every rapidity seen from it is off by at least: its own doubt and the rounding of a sum.
    pub(crate) fn shift_doubt(&self) -> Real {
        &self.doubt + few() * self.rapidity.abs()
    }
}

/// The pure boost to a frame of 4-velocity w: t' = w.v, r' = r + [(w_r.r)/(w_t + 1) - t] w_r.
fn boosted(v: &Vector, w: &Vector) -> Vector {
    let along = &w.x * &v.x + &w.y * &v.y;
    let k = &along / (&w.t + Real::one()) - &v.t;
    Vector::new(&w.t * &v.t - along, &v.x + &k * &w.x, &v.y + &k * &w.y)
}

/// An event in the base frame, and how far its u, v and y may be off.
#[derive(Clone, Debug)]
pub(crate) struct Event {
    pub(crate) at: Vector,
    pub(crate) u_doubt: Real,
    pub(crate) v_doubt: Real,
    pub(crate) y_doubt: Real,
    /// Typed in the base frame: differences are formed before rounding.
    pub(crate) exact: bool,
}

impl Event {
    pub(crate) fn origin() -> Self {
        Self::typed(Vector::zero())
    }

    pub(crate) fn typed(at: Vector) -> Self {
        Self {
            u_doubt: eps(1) * at.u().abs(),
            v_doubt: eps(1) * at.v().abs(),
            y_doubt: eps(1) * at.y.abs(),
            at,
            exact: true,
        }
    }

    pub(crate) fn off_by(at: Vector, doubt: &Real) -> Self {
        Self {
            at,
            u_doubt: doubt.clone(),
            v_doubt: doubt.clone(),
            y_doubt: doubt.clone(),
            exact: false,
        }
    }

    pub(crate) fn doubt(&self) -> Real {
        self.u_doubt.max(&self.v_doubt).max(&self.y_doubt)
    }

    /// From another event to this one.
    pub(crate) fn since(&self, o: &Self) -> Self {
        let d = Self::typed(self.at.minus(&o.at));
        if self.exact && o.exact {
            return d;
        }
        Self {
            u_doubt: d.u_doubt + &self.u_doubt + &o.u_doubt,
            v_doubt: d.v_doubt + &self.v_doubt + &o.v_doubt,
            y_doubt: d.y_doubt + &self.y_doubt + &o.y_doubt,
            exact: false,
            ..d
        }
    }

    /// As a frame has it, from its origin.
    pub(crate) fn seen(&self, frame: &Frame) -> Self {
        let d = self.since(&frame.origin);
        turned(&d, &frame.see(&d.at), frame)
    }

    /// The way back: an event given in a frame, in the base.
    pub(crate) fn unseen(&self, frame: &Frame) -> Self {
        let moved = turned(self, &frame.unsee(&self.at), frame);
        Self {
            at: moved.at.plus(&frame.origin.at),
            u_doubt: moved.u_doubt + &frame.origin.u_doubt + eps(1) * frame.origin.at.u().abs(),
            v_doubt: moved.v_doubt + &frame.origin.v_doubt + eps(1) * frame.origin.at.v().abs(),
            y_doubt: moved.y_doubt + &frame.origin.y_doubt,
            exact: false,
        }
    }

    /// How far t^2 - x^2 - y^2 may be off.
    pub(crate) fn square_doubt(&self) -> Real {
        let (u, v, y) = (self.at.u().abs(), self.at.v().abs(), self.at.y.abs());
        &u * &self.v_doubt
            + &v * &self.u_doubt
            + Real::int(2) * &y * &self.y_doubt
            + eps(4) * (u * v + y.squared())
    }
}

/// The doubts of `d` after a boost that made `at` of it.
fn turned(d: &Event, at: &Vector, frame: &Frame) -> Event {
    if !frame.is_along_x() {
        let off = (d.doubt() + (eps(16) + &frame.doubt) * d.at.largest()) * &frame.doppler;
        return Event::off_by(at.clone(), &off);
    }
    let shift = frame.shift_doubt() + eps(4);
    let grow = |before: &Real, after: &Real, doubt: &Real| {
        let factor = if before.is_zero() {
            frame.rapidity.abs().exp()
        } else {
            (after / before).abs()
        };
        doubt * factor + after.abs() * &shift
    };
    Event {
        u_doubt: grow(&d.at.u(), &at.u(), &d.u_doubt),
        v_doubt: grow(&d.at.v(), &at.v(), &d.v_doubt),
        y_doubt: d.y_doubt.clone(),
        at: at.clone(),
        exact: false,
    }
}
