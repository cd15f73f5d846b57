//! Expressions: precedence, exactness, faults and their columns, hostile texts.

use super::{exact, plain, value};
use conewright::quantity::{Dimension, Number, Typed, Unit, read};
use proptest::prelude::*;

fn fault_at(text: &str) -> (usize, String) {
    let fault = plain(text).expect_err(text);
    (fault.column, fault.what)
}

#[test]
fn sign_binds_below_power_and_power_goes_to_the_right() {
    for (text, result) in [
        ("-3^2", "-9"),
        ("2^3^2", "512"),
        ("(2^3)^2", "64"),
        ("2^-1", "0.5"),
        ("2^-1^2", "0.5"),
        ("-2^-2", "-0.25"),
        ("2-3-4", "-5"),
        ("16/4/2", "2"),
        ("2+3*4", "14"),
        ("2*-3", "-6"),
        ("-2*3+1", "-5"),
        ("--2", "2"),
        ("+2", "2"),
        ("2*(3+4)", "14"),
        ("\u{2212}3\u{b7}2", "-6"),
        ("0^0", "1"),
        ("(-1)^1000001", "-1"),
        ("1^99999999999999999999", "1"),
    ] {
        assert_eq!(value(text), exact(result), "{text}");
    }
}

#[test]
fn rational_expressions_stay_exact() {
    assert_eq!(value("3/5"), exact("0.6"));
    assert_eq!(value("1/3+1/3+1/3"), Number::integer(1));
    assert_eq!(value("0.1+0.2"), exact("0.3"));
    assert_eq!(value("sqrt(9/16)"), exact("0.75"));
    assert_eq!(value("cbrt(-27/8)"), exact("-1.5"));
    assert_eq!(value("abs(-1/4)"), exact("0.25"));
    assert_eq!(value("sin(30 deg)"), exact("0.5"));
    assert_eq!(value("cos(-300 deg)"), exact("0.5"));
    assert_eq!(value("cos(90 deg)"), Number::zero());
    assert_eq!(value("tan(225 deg)"), Number::integer(1));
    assert!(!value("sqrt(2)").is_exact());
}

#[test]
fn functions_give_the_values_of_published_tables() {
    // Abramowitz and Stegun, tables 4.4, 4.6 and 4.15, from memory, ten digits.
    for (text, result) in [
        ("sqrt(3)/2", "0.8660254038"),
        ("exp(1)", "2.7182818285"),
        ("e", "2.7182818285"),
        ("ln(2)", "0.6931471806"),
        ("log10(2)", "0.3010299957"),
        ("pi", "3.1415926536"),
        ("sin(1)", "0.8414709848"),
        ("cos(1)", "0.5403023059"),
        ("tan(1)", "1.5574077247"),
        ("sinh(1)", "1.1752011936"),
        ("cosh(1)", "1.5430806348"),
        ("tanh(0.4)", "0.3799489623"),
        ("asin(1/2)", "0.5235987756"),
        ("acos(1/2)", "1.0471975512"),
        ("atan(1)", "0.7853981634"),
        ("asinh(1)", "0.8813735870"),
        ("acosh(2)", "1.3169578969"),
        ("atanh(1/2)", "0.5493061443"),
        ("cbrt(2)", "1.2599210499"),
        ("2^(1/2)", "1.4142135624"),
        ("sin(pi/2)", "1.0"),
        ("sin(45 deg)", "0.7071067812"),
    ] {
        let got = value(text).to_f64();
        let result = exact(result).to_f64();
        assert!((got - result).abs() < 5.1e-11, "{text}: {got}");
    }
}

#[test]
fn decimals_read_as_a_person_means_them() {
    for (text, result) in [
        ("1.2e-3", "0.0012"),
        (".5", "0.5"),
        ("1.", "1"),
        ("  7 ", "7"),
        ("1E3", "1000"),
        ("1e+3", "1000"),
        ("-\u{2009}4", "-4"),
        ("299\u{2009}792\u{2009}458", "299792458"),
        ("1.5e\u{2212}3", "0.0015"),
    ] {
        assert_eq!(value(text), exact(result), "{text}");
    }
    assert_eq!(Number::decimal("-1.5e3"), Some(Number::integer(-1500)));
    for text in [
        "", ".", "e3", "1e", "1e+", "0x10", "1_000", "inf", "NaN", "1,5", "--1", "1.2.3",
    ] {
        assert_eq!(Number::decimal(text), None, "{text}");
    }
}

#[test]
fn division_by_zero_of_numbers_is_infinite() {
    assert_eq!(
        Number::integer(1).over(&Number::zero()),
        Number::Real(f64::INFINITY)
    );
    assert_eq!(
        Number::integer(-1).over(&Number::zero()),
        Number::Real(f64::NEG_INFINITY)
    );
}

#[test]
fn faults_stand_at_their_column() {
    for (text, column, words) in [
        ("", 0, "missing"),
        ("   ", 3, "missing"),
        ("1 +", 3, "missing"),
        ("2 * * 3", 4, "before this `*`"),
        ("1/0", 1, "divides by zero"),
        ("2 + 1/(3-3)", 5, "divides by zero"),
        ("0^-1", 1, "divides by zero"),
        ("sqrt(-1)", 0, "square root"),
        ("1 + ln(0)", 4, "logarithm"),
        ("acosh(1/2)", 0, "from 1 up"),
        ("atanh(1)", 0, "between -1 and 1"),
        ("asin(2)", 0, "from -1 to 1"),
        ("tan(90 deg)", 0, "no tangent"),
        ("(-8)^(1/3)", 4, "no real power"),
        ("exp(1000)", 0, "too large"),
        ("(1 + 2", 0, "not closed"),
        ("3 * (1 + (2)", 4, "not closed"),
        ("1 + 2)", 5, "closes nothing"),
        ("2(3+4)", 1, "no operator before this `(`"),
        ("3 4", 2, "no operator before this `4`"),
        ("2 pi", 2, "no operator before `pi`"),
        ("12,5", 2, "comma"),
        ("1.2.3", 3, "no operator"),
        ("sqrt 4", 5, "parentheses"),
        ("sqt(4)", 0, "`sqt`"),
        ("2 * foo", 4, "`foo`"),
        ("3 $", 2, "`$`"),
        ("\u{2212}\u{2212}\u{3bb}", 2, "`\u{3bb}`"),
        ("sin(30 m)", 7, "`m` cannot stand here"),
        ("2*497.611(13)", 9, "lone number"),
        ("1 +- -2", 2, "not negative"),
        ("1(2) +- 3", 5, "second uncertainty"),
        ("3 - (1 +- 2)", 7, "belongs at the end"),
        ("3 / s", 2, "neither a number nor a function"),
        ("3 ** 2", 3, "before this `*`"),
    ] {
        let (at, what) = fault_at(text);
        assert_eq!(at, column, "{text}: {what}");
        assert!(what.contains(words), "{text}: {what}");
    }
}

#[test]
fn every_fault_says_what_would_mend_it() {
    for text in [
        "", "1/0", "(1", "3 parsec", "sqt(4)", "9^9^9", "1,5", "1 +- -2",
    ] {
        let fault = plain(text).expect_err(text);
        assert!(!fault.what.is_empty() && !fault.mend.is_empty(), "{text}");
    }
    assert_eq!(plain("sqt(4)").expect_err("a fault").mend, "perhaps `sqrt`");
    let unit_first = plain("3 * ns").expect_err("a fault");
    assert!(
        unit_first.mend.contains("it is a unit"),
        "{}",
        unit_first.mend
    );
}

#[test]
fn hostile_numbers_end_at_once() {
    for (text, column) in [
        ("9^9^9", 1),
        ("2^-99999", 1),
        ("1e999999999", 0),
        ("1e-999999999", 0),
        ("1e99999999999999999999999", 0),
        ("2^2048", 1),
        ("(1/2)^2048", 5),
        ("(2^1500)*(2^1500)", 8),
        ("1.0000000001^2047", 12),
    ] {
        let (at, what) = fault_at(text);
        assert_eq!(at, column, "{text}: {what}");
        assert!(what.contains("2,048 bits"), "{text}: {what}");
    }
    // 2^2047 has 2,048 bits and is held, but no f64 holds it.
    assert!(fault_at("2^2047").1.contains("too large for a number"));
    assert!(fault_at("1e-400").1.contains("too small for a number"));
    assert_eq!(value("2^2047/2^2040"), Number::integer(128));
    assert_eq!(value("0e999999"), Number::zero());
}

#[test]
fn depth_and_length_are_bounded() {
    let nested = |n: usize| format!("{}1{}", "(".repeat(n), ")".repeat(n));
    assert_eq!(value(&nested(63)), Number::integer(1));
    assert_eq!(
        fault_at(&nested(64)),
        (64, "this nests deeper than 64".to_owned())
    );
    assert_eq!(fault_at(&"-".repeat(200)).0, 64);
    assert_eq!(fault_at(&"2^".repeat(100)).0, 128);
    assert_eq!(
        value(&format!("1{}", "+1".repeat(127))),
        Number::integer(128)
    );
    assert_eq!(
        fault_at(&"1".repeat(300)),
        (256, "this is longer than 256 bytes".to_owned())
    );
    assert_eq!(fault_at(&"\u{2212}".repeat(100)).0, 85);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn no_text_makes_the_reader_fail_otherwise(text in r"[-+*/^().,0-9eE a-z\u{2212}\u{b1}\u{b0}\u{b5}\u{1F600}]{0,80}") {
        for dimension in [Dimension::Plain, Dimension::Mass, Dimension::Length, Dimension::Angle] {
            if let Err(fault) = read(&Typed::Text(text.clone()), &Unit::base(dimension)) {
                prop_assert!(fault.column <= text.chars().count());
            }
        }
        let _ = read(&Typed::Bare(text), &Unit::base(Dimension::Time));
    }
}
