//! Numbers as text.

use super::{read_in, value};
use conewright::quantity::{
    Decimals, Dimension, decimals_allowed, fixed, grouped, rounded, scientific, shortest,
    significant, with_uncertainty,
};
use proptest::prelude::*;

#[test]
fn shortest_prints_whole_numbers_bare() {
    for (x, text) in [
        (0.0, "0"),
        (-0.0, "0"),
        (1.0, "1"),
        (-12.5, "-12.5"),
        (0.1, "0.1"),
        (299792458.0, "299792458"),
        (1e15, "1000000000000000"),
        (1e16, "1e16"),
        (0.00001, "0.00001"),
        (1.5e-7, "1.5e-7"),
        (5e-324, "5e-324"),
    ] {
        assert_eq!(shortest(x), text);
    }
}

#[test]
fn significant_digits_are_kept() {
    for (x, digits, text) in [
        (0.6, 6, "0.600000"),
        (1234567.4, 6, "1234570"),
        (12345678.0, 6, "1.23457e7"),
        (9999999.9, 6, "1.00000e7"),
        (0.00012345678, 6, "0.000123457"),
        (0.000012345678, 4, "1.235e-5"),
        (0.0000999999, 3, "0.000100"),
        (0.0, 6, "0"),
        (-0.0, 6, "0"),
        (-2.5, 1, "-2"),
        (3.5, 1, "4"),
        (1.25, 0, "1"),
    ] {
        assert_eq!(significant(x, digits), text);
    }
}

#[test]
fn scientific_always_has_a_power_of_ten() {
    assert_eq!(scientific(1.23456789e12, 6), "1.23457e12");
    assert_eq!(scientific(-0.5, 3), "-5.00e-1");
    assert_eq!(scientific(0.0, 3), "0");
}

#[test]
fn fixed_never_prints_a_negative_zero() {
    assert_eq!(fixed(-0.001, Decimals(2)), "0.00");
    assert_eq!(fixed(-0.0, Decimals(0)), "0");
    assert_eq!(fixed(-0.006, Decimals(2)), "-0.01");
    assert_eq!(fixed(2.5, Decimals(0)), "2");
    assert_eq!(fixed(12.2135, Decimals(3)), "12.213");
}

#[test]
fn digits_are_grouped_in_threes() {
    for (text, print) in [
        ("299792458", "299 792 458"),
        ("1234", "1 234"),
        ("123", "123"),
        ("0.1234", "0.1234"),
        ("0.12345", "0.123 45"),
        ("-1234567.1234567", "\u{2212}1 234 567.123 456 7"),
        ("0.299792458", "0.299 792 458"),
        ("497.611(13)", "497.611(13)"),
        ("1.5e-7", "1.5e\u{2212}7"),
        ("", ""),
    ] {
        assert_eq!(grouped(text), print.replace(' ', "\u{2009}"));
    }
}

proptest! {
    #[test]
    fn grouped_numbers_read_back(x in -1e12..1e12_f64) {
        let printed = grouped(&shortest(x));
        prop_assert_eq!(value(&printed).to_f64(), x);
    }
}

#[test]
fn values_are_rounded_by_the_rule_of_the_particle_data_group() {
    // The first two are worked cases of published implementations of the rule (12.214 +- 0.032, 12.21 +- 0.07); the
    // others follow from its three bands (Review of Particle Physics, Introduction, 5.3), by hand.
    for (x, sigma, text, error, short) in [
        (12.2135, 0.03215, "12.214", "0.032", "12.214(32)"),
        (12.2135, 0.06515, "12.21", "0.07", "12.21(7)"),
        (0.827, 0.119, "0.83", "0.12", "0.83(12)"),
        (0.827, 0.367, "0.8", "0.4", "0.8(4)"),
        (0.827, 0.354, "0.83", "0.35", "0.83(35)"),
        (14.674, 0.964, "14.7", "1.0", "14.7(10)"),
        (1.23456, 0.00999, "1.235", "0.010", "1.235(10)"),
        (56789.0, 1234.0, "56800", "1200", "56800(1200)"),
        (-56789.0, 9876.0, "-57000", "10000", "-57000(10000)"),
        (60.0, 1234.0, "100", "1200", "100(1200)"),
        (3.0, 40.0, "0", "40", "0(40)"),
        (-0.001, 0.1, "0.00", "0.10", "0.00(10)"),
    ] {
        let both = rounded(x, sigma).unwrap();
        assert_eq!(
            (both.value.as_str(), both.uncertainty.as_str()),
            (text, error)
        );
        assert_eq!(with_uncertainty(x, sigma), short);
    }
    assert_eq!(rounded(1.0, 0.0), None);
    assert_eq!(with_uncertainty(0.25, 0.0), "0.25");
    assert_eq!(decimals_allowed(0.03215), Some(Decimals(3)));
    assert_eq!(decimals_allowed(0.06515), Some(Decimals(2)));
    assert_eq!(decimals_allowed(0.999), Some(Decimals(1)));
    assert_eq!(decimals_allowed(1234.0), Some(Decimals(0)));
    assert_eq!(decimals_allowed(0.0), None);
}

#[test]
fn parenthesised_values_print_as_they_are_published() {
    // CODATA 2022 and Review of Particle Physics 2026, as printed there.
    for (text, unit) in [
        ("497.611(13)", "MeV"),
        ("938.27208943(29)", "MeV"),
        ("139.57039(18)", "MeV"),
        ("9.1093837139(28)e-31", "kg"),
        ("2.1969811(22)e-6", "kg"),
    ] {
        let quantity = read_in(text, unit, Dimension::Mass).unwrap();
        let printed = with_uncertainty(quantity.value.to_f64(), quantity.uncertainty.unwrap());
        assert_eq!(printed, text);
    }
}
