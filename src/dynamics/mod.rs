//! Energy-momentum vectors in the plane (E, px, py), their sums and invariants, with c = 1.

mod momentum;
mod total;

pub use momentum::{DynamicsError, Momentum};
pub use total::{Total, remainder};
