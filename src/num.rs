//! Elementary functions by `libm`, so that every platform gives the same bytes, and small exact helpers.

pub use libm::{
    acos, acosh, asin, asinh, atan, atan2, atanh, cbrt, cos, cosh, exp, expm1, hypot, log as ln,
    log1p, log10, pow, sin, sinh, tan, tanh,
};

/// The spacing of f64 at 1: 2^-52.
pub const EPS: f64 = f64::EPSILON;

/// `a b - c d`, rounded about once, by fused multiply-add: no digits are lost when the products nearly cancel.
pub fn difference_of_products(a: f64, b: f64, c: f64, d: f64) -> f64 {
    let w = c * d;
    let e = (-c).mul_add(d, w);
    a.mul_add(b, -w) + e
}
