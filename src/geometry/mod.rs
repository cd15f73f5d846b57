//! The Minkowski plane with c = 1: rapidity, null-coordinate vectors, boosts, worldlines. Pure functions on f64;
//! no units, no names, no drawing.

mod boost;
mod displacement;
mod rapidity;
mod worldline;

pub use boost::{Angle, Boost};
pub use displacement::{Displacement, Separation};
pub use rapidity::{Rapidity, Side};
pub use worldline::{Leg, Worldline};

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
}
