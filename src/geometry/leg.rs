//! The pieces of a worldline.

use crate::num;

use super::{Displacement, Rapidity, Side};

/// One piece of a worldline: what moves along it between (or beyond) its anchor events.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Leg {
    /// Uniform motion: rapidity along x and, for a line that follows a particle with py, its speed across
    /// as `gamma dy/dt`. Clocks read gamma of the whole motion.
    Free {
        /// Longitudinal rapidity `1/2 ln(dv/du)`.
        rapidity: Rapidity,
        /// `gamma dy/dt`, the celerity across (py / m).
        across: f64,
    },
    /// Light along x.
    Light(Side),
}

impl Leg {
    /// Uniform motion along x.
    pub const fn free(rapidity: Rapidity) -> Self {
        Self::Free {
            rapidity,
            across: 0.0,
        }
    }

    /// dx/dt.
    pub fn beta_x(self) -> f64 {
        match self {
            Self::Free { rapidity, .. } => rapidity.beta(),
            Self::Light(side) => side.sign(),
        }
    }

    /// dy/dt.
    pub fn beta_y(self) -> f64 {
        match self {
            Self::Free { across, .. } => across / self.step().t(),
            Self::Light(_) => 0.0,
        }
    }

    /// The way gone while its clock runs for 1: its four-velocity. For light, which has no clock, 1 in the null
    /// component that grows.
    pub fn step(self) -> Displacement {
        match self {
            Self::Free { rapidity, across } => {
                let k = rapidity.doppler();
                let w = if across == 0.0 {
                    1.0
                } else {
                    num::hypot(1.0, across)
                };
                Displacement::new(w / k, w * k, across)
            }
            Self::Light(Side::Plus) => Displacement::new(0.0, 1.0, 0.0),
            Self::Light(Side::Minus) => Displacement::new(1.0, 0.0, 0.0),
        }
    }
}
