//! A displacement between two events, by null components.

/// The causal kind of a displacement.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Separation {
    /// A clock can go along it.
    Timelike,
    /// Light goes along it.
    Lightlike,
    /// A ruler can lie along it.
    Spacelike,
}

/// `u = t - x`, `v = t + x` and y: a displacement between two events, or an event seen from an origin.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct Displacement {
    /// t - x.
    pub u: f64,
    /// t + x.
    pub v: f64,
    /// y, across.
    pub y: f64,
}

impl Displacement {
    /// By null components.
    pub const fn new(u: f64, v: f64, y: f64) -> Self {
        Self { u, v, y }
    }
    /// From t and x; u and v are rounded once each.
    pub fn from_tx(t: f64, x: f64) -> Self {
        Self {
            u: t - x,
            v: t + x,
            y: 0.0,
        }
    }
    /// (u + v) / 2.
    pub fn t(self) -> f64 {
        self.u.midpoint(self.v)
    }
    /// (v - u) / 2.
    pub fn x(self) -> f64 {
        (self.v - self.u) / 2.0
    }
    /// `t^2 - x^2 - y^2`, without cancellation in t and x.
    pub fn interval(self) -> f64 {
        todo!()
    }
    /// The kind: exact for given components; use `kind_within` where they carry a rounding bound.
    pub fn separation(self) -> Separation {
        self.separation_within(0.0)
    }
    /// The kind, lightlike where the interval is not larger than `bound`.
    pub fn separation_within(self, bound: f64) -> Separation {
        todo!()
    }
    /// The square root of the interval's size: proper time if timelike, proper distance if spacelike.
    pub fn length(self) -> f64 {
        todo!()
    }
    /// The longitudinal rapidity `1/2 ln(v/u)` of a future- or past-pointing timelike displacement.
    pub fn rapidity(self) -> Option<f64> {
        todo!()
    }
}

impl std::ops::Add for Displacement {
    type Output = Self;
    fn add(self, o: Self) -> Self {
        Self::new(self.u + o.u, self.v + o.v, self.y + o.y)
    }
}
impl std::ops::Sub for Displacement {
    type Output = Self;
    fn sub(self, o: Self) -> Self {
        Self::new(self.u - o.u, self.v - o.v, self.y - o.y)
    }
}
