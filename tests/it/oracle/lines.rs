//! Worldlines: straight pieces, what their clocks read, and where they meet.

use super::kinematics::{Event, FEW, Vector, eps};
use super::particle::Particle;
use super::real::Real;

/// One straight piece, from its base on (the first one also before it).
#[derive(Clone, Debug)]
struct Piece {
    base: Event,
    /// Of mass 1, or light.
    motion: Particle,
    reading: Real,
}

/// A worldline.
#[derive(Clone, Debug)]
pub(crate) struct Line {
    pieces: Vec<Piece>,
}

/// The promise for derived events: 8 units in the last place of the largest coordinate used.
fn derived() -> Real {
    eps(8)
}

impl Piece {
    /// The velocity dx/dt and how far it may be off.
    fn beta(&self) -> (Real, Real) {
        let (p, slope) = (&self.motion.p, self.motion.transverse_mass());
        let steep = slope.squared() / p.t.squared();
        (&p.x / &p.t, steep * &self.motion.rapidity_doubt + eps(1))
    }

    /// The event on the piece that is `k` times the motion from the base.
    fn at(&self, k: &Real) -> Vector {
        self.base.at.plus(&self.motion.p.times(k))
    }

    /// An event found on it by a quotient of which `beta` is the difference of velocities.
    fn found(&self, k: &Real, other: &Event, beta: &Real, beta_doubt: &Real) -> Event {
        let at = self.at(k);
        let lasts = (k * &self.motion.p.t).abs();
        let largest = at
            .largest()
            .max(&self.base.at.largest())
            .max(&other.at.largest());
        let given = self.base.doubt() + other.doubt();
        let off = (derived() * largest + given + lasts * beta_doubt) * Real::int(2) / beta.abs();
        Event::off_by(at, &off)
    }
}

impl Line {
    pub(crate) fn straight(base: Event, motion: Particle) -> Self {
        let reading = Real::zero();
        Self {
            pieces: vec![Piece {
                base,
                motion,
                reading,
            }],
        }
    }

    pub(crate) fn broken(events: &[Event]) -> Self {
        let mut pieces: Vec<Piece> = Vec::new();
        let mut reading = Real::zero();
        for pair in events.windows(2) {
            let step = pair[1].since(&pair[0]);
            let clock = step.at.square().sqrt();
            let relative = &step.u_doubt / step.at.u() + &step.v_doubt / step.at.v();
            let aside = eps(FEW) * (&step.at.y / &clock).abs() + &step.y_doubt / &clock;
            let p = step.at.times(&(Real::one() / &clock));
            let y = p.rapidity();
            let doubt = relative + eps(FEW) * y.abs() + eps(1);
            pieces.push(Piece {
                base: pair[0].clone(),
                motion: Particle::new(p, Real::one(), doubt, aside),
                reading: reading.clone(),
            });
            reading = reading + clock;
        }
        Self { pieces }
    }

    pub(crate) fn bends(&self) -> bool {
        self.pieces.len() > 1
    }

    fn piece_at(&self, t: &Real) -> &Piece {
        let later = self.pieces[1..].iter().rev().find(|p| p.base.at.t <= *t);
        later.unwrap_or(&self.pieces[0])
    }

    /// How it moves; on a bent line at an event, and at a corner as after it.
    pub(crate) fn motion_at(&self, event: Option<&Event>) -> Particle {
        let piece = event.map_or(&self.pieces[0], |e| self.piece_at(&e.at.t));
        piece.motion.clone()
    }

    fn clock_at(&self, event: &Event) -> Real {
        let piece = self.piece_at(&event.at.t);
        (&event.at.t - &piece.base.at.t) / &piece.motion.p.t + &piece.reading
    }

    pub(crate) fn set_clock(mut self, event: &Event, reading: &Real) -> Self {
        let offset = reading - self.clock_at(event);
        for piece in &mut self.pieces {
            piece.reading = &piece.reading + &offset;
        }
        self
    }

    pub(crate) fn at_clock(&self, reading: &Real) -> Event {
        let later = self.pieces[1..].iter().rev();
        let piece = later
            .clone()
            .find(|p| p.reading <= *reading)
            .unwrap_or(&self.pieces[0]);
        let gained = reading - &piece.reading;
        let at = piece.at(&gained);
        let moved = piece.motion.px_doubt() + piece.motion.energy_doubt() + &piece.motion.py_doubt;
        let largest = at.largest().max(&piece.base.at.largest());
        let clocks = eps(FEW) * (reading.abs() + piece.reading.abs()) * &piece.motion.p.t;
        let off = piece.base.doubt() + gained.abs() * moved + clocks + derived() * largest;
        Event::off_by(at, &off)
    }

    /// The one event that both lines share.
    pub(crate) fn meeting(&self, other: &Self) -> Event {
        for a in &self.pieces {
            for b in &other.pieces {
                let (p, q, d) = (&a.motion.p, &b.motion.p, b.base.at.minus(&a.base.at));
                let turn = &p.t * &q.x - &p.x * &q.t;
                if turn.is_zero() {
                    continue;
                }
                let k = (&d.t * &q.x - &d.x * &q.t) / &turn;
                let at = a.at(&k);
                let on = |line: &Self, piece: &Piece| {
                    line.piece_at(&at.t)
                        .base
                        .at
                        .minus(&piece.base.at)
                        .largest()
                        .is_zero()
                };
                if !(on(self, a) && on(other, b)) {
                    continue;
                }
                let ((beta, off), (beta_other, off_other)) = (a.beta(), b.beta());
                let lasts = (&at.t - &b.base.at.t).abs() * &off_other;
                let given = Event::off_by(b.base.at.clone(), &(b.base.doubt() + lasts));
                return a.found(&k, &given, &(beta - beta_other), &off);
            }
        }
        panic!("the lines never meet");
    }

    /// Where light from an event meets the line, in the event's future.
    pub(crate) fn light_from(&self, event: &Event) -> Event {
        for piece in &self.pieces {
            for way in [1, -1] {
                // (base + k p - event) is along (1, way): its t less way x is 0.
                let (p, d) = (&piece.motion.p, event.at.minus(&piece.base.at));
                let rate = &p.t - Real::int(way) * &p.x;
                if rate.is_zero() {
                    continue;
                }
                let k = (&d.t - Real::int(way) * &d.x) / &rate;
                let at = piece.at(&k);
                let later = &at.t - &event.at.t;
                let largest = at.largest() + event.at.largest();
                let same = later.vanishes_beside(&largest);
                let on = self.piece_at(&at.t).base.at.minus(&piece.base.at);
                if (later < Real::zero() && !same) || !on.largest().is_zero() {
                    continue;
                }
                let (beta, off) = piece.beta();
                let mut found = piece.found(&k, event, &(Real::int(way) - beta), &off);
                // The null coordinate that the light keeps is the event's.
                if way == 1 {
                    found.u_doubt = event.u_doubt.clone();
                } else {
                    found.v_doubt = event.v_doubt.clone();
                }
                return found;
            }
        }
        panic!("no light reaches the line");
    }

    /// Proper time from one event of the line to another, and how far it may be off.
    pub(crate) fn proper_time(&self, from: &Event, until: &Event) -> (Real, Real) {
        let mut marks = vec![from.clone()];
        let between = |p: &&Piece| p.base.at.t > from.at.t && p.base.at.t < until.at.t;
        marks.extend(
            self.pieces[1..]
                .iter()
                .filter(between)
                .map(|p| p.base.clone()),
        );
        marks.push(until.clone());
        let (mut whole, mut off) = (Real::zero(), Real::zero());
        for pair in marks.windows(2) {
            let gamma = &self.piece_at(&pair[0].at.t).motion;
            let step = pair[1].since(&pair[0]);
            let clock = &step.at.t / &gamma.p.t;
            off = off
                + (step.u_doubt + step.v_doubt) / &gamma.p.t
                + &clock * (gamma.energy_doubt() / &gamma.p.t + eps(FEW));
            whole = whole + clock;
        }
        (whole, off)
    }
}
