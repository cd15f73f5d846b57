//! The Minkowski plane with c = 1: rapidity, null-coordinate vectors, boosts, worldlines. Pure functions on f64;
//! no units, no names, no drawing.
//!
//! Components are 0 or from 1e-150 to 1e150 in size: there every bound stated holds. What would leave that range is
//! a [`GeometryError::Range`], never an infinity, a 0 or a subnormal number.

mod angle;
mod boost;
mod displacement;
mod leg;
mod piece;
mod rapidity;
mod worldline;

pub use angle::Angle;
pub use boost::Boost;
pub use displacement::{Displacement, Separation};
pub use leg::Leg;
pub use rapidity::{Rapidity, Side};
pub use worldline::Worldline;

/// Why a number or a construction is impossible.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum GeometryError {
    /// A number outside what the form allows.
    #[error("{what} must be {domain}, not {value}")]
    Domain {
        /// Which number.
        what: &'static str,
        /// What it may be, in words.
        domain: &'static str,
        /// What it was.
        value: f64,
    },
    /// A result outside 1e-150 to 1e150 in size (0 is allowed).
    #[error("{what} leaves the range 1e-150 to 1e150 that keeps every digit")]
    Range {
        /// Which number.
        what: &'static str,
    },
    /// Two lines that never meet, or meet everywhere.
    #[error("{0}")]
    NoMeeting(&'static str),
    /// Two events of a broken line between which no clock can go.
    #[error("no clock goes from event {from} of the line to event {}: {why}", from + 1)]
    Step {
        /// The earlier event's place in the list, from 1.
        from: usize,
        /// Why not.
        why: &'static str,
    },
    /// Something that the kind of line does not have.
    #[error("{0}")]
    Lacking(&'static str),
}

impl GeometryError {
    /// The components, if all of them are in range.
    pub(crate) fn check<const N: usize>(
        what: &'static str,
        components: [f64; N],
    ) -> Result<(), Self> {
        if components.into_iter().all(crate::num::in_range) {
            Ok(())
        } else {
            Err(Self::Range { what })
        }
    }
}
