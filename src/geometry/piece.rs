//! One straight leg of a worldline: its events, its clock, and where it crosses another.

use crate::num::{self, EPS};

use super::{Displacement, GeometryError, Leg, Rapidity, Separation};

/// Rounding bound of a derived event, in units of EPS times the largest coordinate used.
pub(super) const ROUNDING: f64 = 8.0;

/// One leg with what fixes its events: the straight way `step` from `base` takes `duration` of its clock.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Piece {
    pub(super) leg: Leg,
    pub(super) base: Displacement,
    pub(super) step: Displacement,
    /// The clock at the base and what it gains over the step; both 0 for light.
    pub(super) reading: f64,
    pub(super) duration: f64,
}

/// Where two straight lines cross.
pub(super) enum Crossing {
    At(Displacement),
    /// With words where there is more to say than that they never meet.
    Never(Option<&'static str>),
    Together,
}

impl Piece {
    /// The leg by the step from one event, the `from`th of its line, to the next.
    pub(super) fn stepping(
        base: Displacement,
        step: Displacement,
        from: usize,
    ) -> Result<Self, GeometryError> {
        let why = match (step.separation(), step.rapidity()) {
            (Separation::Spacelike, _) => "they are spacelike separated",
            (Separation::Lightlike, _) if step == Displacement::ZERO => "they are one event",
            (Separation::Timelike, Some(rapidity)) if step.t() > 0.0 => {
                let duration = step.length();
                return Ok(Self {
                    leg: Leg::Free {
                        rapidity: Rapidity::new(rapidity)?,
                        across: step.y / duration,
                    },
                    base,
                    step,
                    reading: 0.0,
                    duration,
                });
            }
            (Separation::Timelike, _) => "it is the earlier one",
            (Separation::Lightlike, _) => "they are lightlike separated",
        };
        Err(GeometryError::Step { from, why })
    }

    pub(super) fn clocked(&self) -> Result<(), GeometryError> {
        match self.leg {
            Leg::Free { .. } => Ok(()),
            Leg::Light(_) => Err(GeometryError::Lacking("light has no clock")),
        }
    }

    /// The event `k` steps from the base; what light keeps is kept bit for bit.
    pub(super) fn at(&self, k: f64) -> Displacement {
        let keep = |base: f64, step: f64| {
            if step == 0.0 {
                base
            } else {
                k.mul_add(step, base)
            }
        };
        Displacement {
            u: keep(self.base.u, self.step.u),
            v: keep(self.base.v, self.step.v),
            y: keep(self.base.y, self.step.y),
        }
    }

    /// How many steps a displacement along the piece is, by its t.
    pub(super) fn share(&self, d: Displacement) -> f64 {
        d.t() / self.step.t()
    }

    pub(super) fn parameter(&self, event: Displacement) -> f64 {
        self.share(event - self.base)
    }

    pub(super) fn at_time(&self, t: f64) -> Displacement {
        match self.leg {
            Leg::Free { .. } => self.at((t - self.base.t()) / self.step.t()),
            Leg::Light(side) => {
                let other = |kept: f64| 2.0 * t - kept;
                if side.sign() > 0.0 {
                    Displacement {
                        v: other(self.base.u),
                        ..self.base
                    }
                } else {
                    Displacement {
                        u: other(self.base.v),
                        ..self.base
                    }
                }
            }
        }
    }

    /// The event with this u; none where the piece keeps another.
    pub(super) fn at_u(&self, u: f64) -> Option<Displacement> {
        if self.step.u == 0.0 {
            return None;
        }
        let event = self.at((u - self.base.u) / self.step.u);
        Some(Displacement { u, ..event })
    }

    /// The event with this v; none where the piece keeps another.
    pub(super) fn at_v(&self, v: f64) -> Option<Displacement> {
        if self.step.v == 0.0 {
            return None;
        }
        let event = self.at((v - self.base.v) / self.step.v);
        Some(Displacement { v, ..event })
    }

    /// How far an event lies off in x and in y, at its t, and the rounding bound of that.
    pub(super) fn offset(&self, event: Displacement) -> (f64, f64, f64) {
        let (d, s) = (event - self.base, self.step);
        let dx = num::difference_of_products(d.v, s.u, d.u, s.v) / (s.u + s.v);
        let dy = d.y - self.share(d) * s.y;
        let scale = event.scale().max(self.base.scale()).max(d.scale());
        (dx, dy, ROUNDING * EPS * scale)
    }

    /// Where the straight lines through two pieces cross, without regard to where the pieces end.
    pub(super) fn meeting(&self, other: &Self) -> Crossing {
        let (s, r, d) = (self.step, other.step, other.base - self.base);
        let size = (s.u * r.v).abs() + (s.v * r.u).abs();
        let turn = num::difference_of_products(s.u, r.v, s.v, r.u);
        if turn.abs() <= 4.0 * EPS * size {
            return self.meeting_across(other);
        }
        let k = num::difference_of_products(d.u, r.v, d.v, r.u) / turn;
        let l = num::difference_of_products(d.u, s.v, d.v, s.u) / turn;
        // The better placed of the two: at rest, else nearer its base; then what light keeps.
        let at_rest = |p: &Self| p.step.u == p.step.v;
        let by_self = if at_rest(self) == at_rest(other) {
            k.abs() * s.t() <= l.abs() * r.t()
        } else {
            at_rest(self)
        };
        let (a, b) = (self.at(k), other.at(l));
        let mut event = if by_self { a } else { b };
        for piece in [self, other] {
            if piece.step.u == 0.0 {
                event.u = piece.base.u;
            }
            if piece.step.v == 0.0 {
                event.v = piece.base.v;
            }
        }
        let scale = self.base.scale().max(other.base.scale()).max(event.scale());
        if (a.y - b.y).abs() > ROUNDING * EPS * scale * (size / turn.abs()) {
            return Crossing::Never(Some("the lines cross in (t, x), but at different y"));
        }
        Crossing::At(event)
    }

    /// The same for pieces of one dx/dt: they meet by their motion across, if at all.
    fn meeting_across(&self, other: &Self) -> Crossing {
        let beside = Crossing::Never(Some("the lines run side by side: they never meet"));
        let (dx, dy, bound) = self.offset(other.base);
        if dx.abs() > bound {
            return beside;
        }
        let (a, b) = (self.step.y / self.step.t(), other.step.y / other.step.t());
        if (a - b).abs() > 4.0 * EPS * (a.abs() + b.abs()) {
            let later = if dy.abs() <= bound { 0.0 } else { dy / (a - b) };
            return Crossing::At(other.at(later / other.step.t()));
        }
        if dy.abs() <= bound {
            Crossing::Together
        } else {
            beside
        }
    }
}
