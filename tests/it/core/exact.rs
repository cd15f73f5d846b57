//! Arbitrary precision (dashu-float, an independent implementation) for the bounds of the core.

use std::str::FromStr;

use dashu_float::DBig;
use dashu_float::FBig;
use dashu_float::round::mode::HalfEven;

/// A binary float of [`BITS`] bits.
pub(super) type Big = FBig<HalfEven, 2>;

/// Enough for `1 - beta` by subtraction at a rapidity of 300 (e^600 = 2^866) to all the digits of an f64.
const BITS: usize = 1000;

/// An f64 as it is.
pub(super) fn big(x: f64) -> Big {
    Big::try_from(x)
        .expect("a finite number")
        .with_precision(BITS)
        .value()
}

/// A decimal of a table.
pub(super) fn decimal(text: &str) -> Big {
    let decimal = DBig::from_str(text).unwrap_or_else(|e| panic!("{text}: {e}"));
    decimal
        .with_precision(400)
        .value()
        .with_base_and_precision::<2>(400)
        .value()
        .with_rounding()
}

/// The f64 nearest.
pub(super) fn f64_of(x: &Big) -> f64 {
    x.to_f64().value()
}

/// |got - want| / |want|; 0 where both are 0.
pub(super) fn relative(got: f64, want: &Big) -> f64 {
    if *want == Big::ZERO {
        return if got == 0.0 { 0.0 } else { f64::INFINITY };
    }
    let gap = (big(got) - want) / want;
    f64_of(&gap).abs()
}

/// |got - want|.
pub(super) fn absolute(got: f64, want: &Big) -> f64 {
    f64_of(&(big(got) - want)).abs()
}

#[test]
fn the_oracle_reads_decimals_and_has_hyperbolic_functions() {
    assert_eq!(f64_of(&decimal("1.0051709e-3")), 1.0051709e-3);
    // sinh(1), from memory of tables: 1.17520119364380145688...
    assert!(
        absolute(1.1752011936438014, &big(1.0).sinh()) < 3e-16,
        "{}",
        f64_of(&big(1.0).sinh())
    );
    assert_eq!(relative(0.5, &big(0.5)), 0.0);
}
