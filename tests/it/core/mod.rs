//! The exact core: geometry and dynamics, against arbitrary precision, published tables and their own laws.

mod boosts;
mod exact;
mod generators;
mod momenta;
mod published;
mod rapidities;
mod sums;
mod tables;
mod worldlines;
