//! Worldlines: free, broken and light. Accelerated legs will be one more kind of leg.

use crate::num::{self, EPS};

use super::piece::{Crossing, Piece, ROUNDING};
use super::{Displacement, GeometryError, Leg};

/// A worldline of straight legs through given events. The first and last legs run on without end; trimming is
/// not its business.
///
/// Derived events are right to 8 units in the last place of the largest coordinate used, over the difference of
/// dx/dt where lines are near parallel. An event on a light leg copies the null coordinate that light keeps bit for
/// bit, so it is null by construction.
#[derive(Clone, Debug, PartialEq)]
pub struct Worldline {
    /// At least one, in order. Each but the first starts at its base; the first runs back without end.
    pieces: Vec<Piece>,
    legs: Vec<Leg>,
    /// Where leg `i` meets leg `i + 1`; with one leg, empty.
    corners: Vec<Displacement>,
}

impl Worldline {
    /// One leg through an event, its clock reading `reading` there (light has no clock).
    pub fn straight(leg: Leg, anchor: Displacement, reading: f64) -> Self {
        let (reading, duration) = match leg {
            Leg::Free { .. } => (reading, 1.0),
            Leg::Light(_) => (0.0, 0.0),
        };
        Self {
            pieces: vec![Piece {
                leg,
                base: anchor,
                step: leg.step(),
                reading,
                duration,
            }],
            legs: vec![leg],
            corners: Vec::new(),
        }
    }

    /// Straight legs from event to event (at least two), each timelike and forward in time; the clock reads
    /// `reading` at the event of index `at`.
    ///
    /// # Errors
    /// `Step` where no clock can go from one event to the next, `Lacking` for fewer than two events, `Range` for
    /// events out of range.
    pub fn broken(
        through: &[Displacement],
        at: usize,
        reading: f64,
    ) -> Result<Self, GeometryError> {
        let steps: Vec<_> = through.windows(2).map(|w| w[1] - w[0]).collect();
        Self::broken_by_steps(through, &steps, at, reading)
    }

    /// The same with the displacements from event to event, for callers who have formed them before rounding.
    ///
    /// # Errors
    /// As [`Worldline::broken`]; `Lacking` too where there is not one step less than there are events.
    pub fn broken_by_steps(
        through: &[Displacement],
        steps: &[Displacement],
        at: usize,
        reading: f64,
    ) -> Result<Self, GeometryError> {
        if through.len() < 2 || steps.len() + 1 != through.len() || at >= through.len() {
            return Err(GeometryError::Lacking(
                "a broken line needs at least two events, and its clock one of them",
            ));
        }
        for event in through.iter().chain(steps) {
            event.checked("an event of a broken line")?;
        }
        let starts = through.iter().zip(steps).enumerate();
        let mut pieces = starts
            .map(|(i, (&base, &step))| Piece::stepping(base, step, i + 1))
            .collect::<Result<Vec<_>, _>>()?;
        // Readings run both ways from the event whose reading is given.
        let mut later = reading;
        for piece in &mut pieces[at..] {
            piece.reading = later;
            later += piece.duration;
        }
        let mut earlier = reading;
        for piece in pieces[..at].iter_mut().rev() {
            earlier -= piece.duration;
            piece.reading = earlier;
        }
        Ok(Self {
            legs: pieces.iter().map(|p| p.leg).collect(),
            corners: through[1..steps.len()].to_vec(),
            pieces,
        })
    }

    /// The legs, first to last.
    pub fn legs(&self) -> &[Leg] {
        &self.legs
    }

    /// The corners between legs.
    pub fn corners(&self) -> &[Displacement] {
        &self.corners
    }

    /// The event at which the line's clock reads `reading`.
    ///
    /// # Errors
    /// `Lacking` for light, `Range` for an event out of range.
    pub fn at_clock(&self, reading: f64) -> Result<Displacement, GeometryError> {
        let piece = self.piece_by(|p| p.reading, reading);
        piece.clocked()?;
        piece
            .at((reading - piece.reading) / piece.duration)
            .checked("the event at that clock reading")
    }

    /// What the line's clock reads at an event that lies on it (where the line is at the event's t, otherwise).
    ///
    /// # Errors
    /// `Lacking` for light.
    pub fn clock_at(&self, event: Displacement) -> Result<f64, GeometryError> {
        let piece = self.piece_at(event.t());
        piece.clocked()?;
        Ok(piece
            .parameter(event)
            .mul_add(piece.duration, piece.reading))
    }

    /// The line's event at a time t.
    pub fn at_time(&self, t: f64) -> Displacement {
        self.piece_at(t).at_time(t)
    }

    /// How far the event lies off the line, as |dx| + |dy| at its t, with the rounding bound of that number.
    pub fn distance(&self, event: Displacement) -> (f64, f64) {
        let (dx, dy, bound) = self.piece_at(event.t()).offset(event);
        (dx.abs() + dy.abs(), bound)
    }

    /// Whether an event lies on the line within the rounding bound.
    pub fn passes(&self, event: Displacement) -> bool {
        let (distance, bound) = self.distance(event);
        distance <= bound
    }

    /// The leg that an event on the line lies on; at a corner, the later one.
    pub fn leg_at(&self, event: Displacement) -> Leg {
        self.piece_at(event.t()).leg
    }

    /// Where two lines meet: the only place, else an error in words.
    ///
    /// # Errors
    /// `NoMeeting` where they never meet, meet more than once, run together, or pass at different y; `Range`.
    pub fn meeting(&self, other: &Self) -> Result<Displacement, GeometryError> {
        let mut found: Option<Displacement> = None;
        let mut missed = None;
        for (i, a) in self.pieces.iter().enumerate() {
            for (j, b) in other.pieces.iter().enumerate() {
                let event = match a.meeting(b) {
                    Crossing::At(event) => event,
                    Crossing::Never(words) => {
                        missed = missed.or(words);
                        continue;
                    }
                    Crossing::Together => {
                        if self.overlap(i, other, j) {
                            return Err(GeometryError::NoMeeting(together(self, other)));
                        }
                        continue;
                    }
                };
                let near = ROUNDING * EPS * a.base.scale().max(b.base.scale()).max(event.scale());
                let Some(event) = self
                    .within(i, event, near)
                    .and_then(|event| other.within(j, event, near))
                else {
                    continue;
                };
                match found {
                    Some(first) if (first - event).scale() > 2.0 * near => {
                        return Err(GeometryError::NoMeeting("the lines meet more than once"));
                    }
                    Some(_) => {}
                    None => found = Some(event),
                }
            }
        }
        found
            .ok_or(GeometryError::NoMeeting(
                missed.unwrap_or("the lines never meet"),
            ))?
            .checked("the event where two lines meet")
    }

    /// Where light sent from an event toward the future meets the line; the event itself when it lies on it.
    ///
    /// The null coordinate that the light keeps is the event's, bit for bit.
    ///
    /// # Errors
    /// `NoMeeting` where no light reaches it (it flees as light does, or runs at another y); `Range`.
    pub fn light_from(&self, event: Displacement) -> Result<Displacement, GeometryError> {
        if self.passes(event) {
            return Ok(event);
        }
        let toward_plus = self.piece_by(|p| p.base.u, event.u).at_u(event.u);
        let toward_minus = self.piece_by(|p| p.base.v, event.v).at_v(event.v);
        // How much later the light along +x (-x) arrives than it was sent; for a clock's line one is not negative.
        let by_plus = toward_plus.map_or(f64::NEG_INFINITY, |hit| hit.v - event.v);
        let by_minus = toward_minus.map_or(f64::NEG_INFINITY, |hit| hit.u - event.u);
        let hit = if by_plus >= by_minus {
            toward_plus.filter(|_| by_plus >= 0.0 || toward_minus.is_some())
        } else {
            toward_minus.filter(|_| by_minus >= 0.0 || toward_plus.is_some())
        };
        let hit = hit.ok_or(GeometryError::NoMeeting(
            "light from the event never reaches the line",
        ))?;
        let bound = ROUNDING * EPS * hit.scale().max(event.scale());
        if (hit.y - event.y).abs() > bound {
            return Err(GeometryError::NoMeeting(
                "light along x from the event passes the line at another y",
            ));
        }
        hit.checked("the event where light meets the line")
    }

    /// Proper time from one event on the line to another; negative where the second is the earlier.
    ///
    /// # Errors
    /// `Lacking` for light.
    pub fn proper_time(
        &self,
        from: Displacement,
        until: Displacement,
    ) -> Result<f64, GeometryError> {
        if from.t() > until.t() {
            return Ok(-self.proper_time(until, from)?);
        }
        let (first, last) = (self.index_at(from.t()), self.index_at(until.t()));
        let (a, b) = (&self.pieces[first], &self.pieces[last]);
        a.clocked()?;
        if first == last {
            return Ok(a.share(until - from) * a.duration);
        }
        let whole = self.pieces[first + 1..last].iter().map(|p| p.duration);
        let begun = a.share(self.corners[first] - from) * a.duration;
        let ended = b.share(until - b.base) * b.duration;
        Ok(num::sum([begun].into_iter().chain(whole).chain([ended])))
    }

    /// The last piece whose `start` is not after `value`, else the first. `start` must grow along the line.
    fn piece_by(&self, start: impl Fn(&Piece) -> f64, value: f64) -> &Piece {
        let later = self.pieces[1..].partition_point(|p| start(p) <= value);
        &self.pieces[later]
    }

    fn index_at(&self, t: f64) -> usize {
        self.pieces[1..].partition_point(|p| p.base.t() <= t)
    }

    fn piece_at(&self, t: f64) -> &Piece {
        &self.pieces[self.index_at(t)]
    }

    /// The event if it lies between the ends of piece `i` to `near`, moved to the end it is that near to.
    fn within(&self, i: usize, event: Displacement, near: f64) -> Option<Displacement> {
        let ends = [
            i.checked_sub(1).and_then(|k| self.corners.get(k)),
            self.corners.get(i),
        ];
        for corner in ends.into_iter().flatten() {
            if (*corner - event).scale() <= near {
                return Some(*corner);
            }
        }
        let t = event.t();
        let begun = ends[0].is_none_or(|c| c.t() <= t);
        let going = ends[1].is_none_or(|c| t <= c.t());
        (begun && going).then_some(event)
    }

    /// Whether two pieces of one straight line share more than an event.
    fn overlap(&self, i: usize, other: &Self, j: usize) -> bool {
        let start = |line: &Self, k: usize| {
            k.checked_sub(1)
                .and_then(|k| line.corners.get(k))
                .map_or(f64::NEG_INFINITY, |c| c.t())
        };
        let end = |line: &Self, k: usize| line.corners.get(k).map_or(f64::INFINITY, |c| c.t());
        start(self, i).max(start(other, j)) < end(self, i).min(end(other, j))
    }
}

fn together(a: &Worldline, b: &Worldline) -> &'static str {
    if a.pieces.len() == 1 && b.pieces.len() == 1 {
        "the two lines are one and the same: they meet everywhere"
    } else {
        "the lines run together along a stretch"
    }
}
