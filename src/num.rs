//! Elementary functions by `libm`, so that every platform gives the same bytes, and small exact helpers.

pub use libm::{
    acos, acosh, asin, asinh, atan, atan2, atanh, cbrt, cos, cosh, exp, expm1, hypot, log as ln,
    log1p, log10, pow, sin, sinh, tan, tanh,
};

/// The spacing of f64 at 1: 2^-52.
pub const EPS: f64 = f64::EPSILON;

/// The smallest size of a component that keeps every digit through products and quotients.
pub const SMALLEST: f64 = 1e-150;

/// The largest size of a component that keeps every digit through products and quotients.
pub const LARGEST: f64 = 1e150;

/// Whether a component is 0 or from [`SMALLEST`] to [`LARGEST`] in size; false for inf and NaN.
pub fn in_range(x: f64) -> bool {
    x == 0.0 || (SMALLEST..=LARGEST).contains(&x.abs())
}

/// `a b - c d`, rounded about once, by fused multiply-add: no digits are lost when the products nearly cancel.
pub fn difference_of_products(a: f64, b: f64, c: f64, d: f64) -> f64 {
    let w = c * d;
    let e = (-c).mul_add(d, w);
    a.mul_add(b, -w) + e
}

/// The sum of `terms` in order, with the rounding of each step carried along (Neumaier 1974): right to about one
/// unit in the last place plus `n^2 EPS^2` of the sum of sizes.
pub fn sum(terms: impl IntoIterator<Item = f64>) -> f64 {
    let (mut total, mut lost) = (0.0_f64, 0.0_f64);
    for term in terms {
        let next = total + term;
        lost += if total.abs() >= term.abs() {
            (total - next) + term
        } else {
            (term - next) + total
        };
        total = next;
    }
    total + lost
}
