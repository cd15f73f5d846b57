//! Numerically exact spacetime and energy-momentum figures, and the numbers to quote beside them.
//!
//! Conventions: c = 1, signature (+, -), null components `u = t - x`, `v = t + x` and
//! `p- = E - px`, `p+ = E + px` without a factor of the square root of two. A boost is passive:
//! seen from a frame of rapidity `eta` moving toward +x, `u' = u e^eta`, `v' = v e^-eta`, and a
//! rapidity `y` becomes `y - eta`. Angles are counter-clockwise from +x.
//!
//! Data runs one way: a [`scene::Scene`] is solved ([`solve`]), laid out as a sheet of marks
//! ([`plate`]) and written ([`export`]) or painted; the numbers go through [`ledger`].

#[cfg(feature = "window")]
pub mod app;
pub mod cli;
pub mod disk;
pub mod dynamics;
pub mod export;
pub mod fault;
pub mod geometry;
pub mod label;
pub mod ledger;
pub mod marks;
pub mod num;
pub mod plate;
pub mod quantity;
pub mod scene;
pub mod solve;
pub mod task;
