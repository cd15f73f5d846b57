//! Numbers as people write and read them: expressions, units, uncertainties, constants, the particle table. The one
//! place where a number becomes text.

mod constants;
mod cursor;
mod expression;
mod function;
mod number;
mod operation;
mod reading;
mod species;
mod text;
mod units;

pub use constants::{CONSTANTS, Constant};
pub use number::Number;
pub use reading::{Quantity, ReadFault, Typed, read};
pub use species::{SPECIES, Species, species};
pub use text::{
    Decimals, Rounded, decimals_allowed, fixed, grouped, rounded, scientific, shortest,
    significant, with_uncertainty,
};
pub use units::{Dimension, Unit};
