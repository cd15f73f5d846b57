//! Tests of `quantity`.

use conewright::quantity::{
    CONSTANTS, Decimals, Dimension, Number, Quantity, ReadFault, SPECIES, Species, Typed, Unit,
    decimals_allowed, fixed, grouped, read, rounded, shortest, significant, species,
    with_uncertainty,
};
use proptest::prelude::*;

fn read_in(text: &str, symbol: &str, dimension: Dimension) -> Result<Quantity, ReadFault> {
    let unit = Unit::named(symbol, dimension).expect("a unit");
    read(&Typed::Text(text.to_owned()), &unit)
}

fn plain(text: &str) -> Result<Quantity, ReadFault> {
    read_in(text, "", Dimension::Plain)
}

fn value(text: &str) -> Number {
    plain(text)
        .unwrap_or_else(|f| panic!("{text}: {f:?}"))
        .value
}

fn exact(text: &str) -> Number {
    Number::decimal(text).expect("a decimal")
}

fn fault_at(text: &str) -> (usize, String) {
    let fault = plain(text).expect_err(text);
    (fault.column, fault.what)
}

// ---- precedence, exactness

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
        ("sqrt(3)/2", 0.866_025_403_8),
        ("exp(1)", 2.718_281_828_5),
        ("e", 2.718_281_828_5),
        ("ln(2)", 0.693_147_180_6),
        ("log10(2)", 0.301_029_995_7),
        ("pi", 3.141_592_653_6),
        ("sin(1)", 0.841_470_984_8),
        ("cos(1)", 0.540_302_305_9),
        ("tan(1)", 1.557_407_724_7),
        ("sinh(1)", 1.175_201_193_6),
        ("cosh(1)", 1.543_080_634_8),
        ("tanh(0.4)", 0.379_948_962_3),
        ("asin(1/2)", 0.523_598_775_6),
        ("acos(1/2)", 1.047_197_551_2),
        ("atan(1)", 0.785_398_163_4),
        ("asinh(1)", 0.881_373_587_0),
        ("acosh(2)", 1.316_957_896_9),
        ("atanh(1/2)", 0.549_306_144_3),
        ("cbrt(2)", 1.259_921_049_9),
        ("2^(1/2)", 1.414_213_562_4),
        ("sin(pi/2)", 1.0),
        ("sin(45 deg)", 0.707_106_781_2),
    ] {
        let got = value(text).to_f64();
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

// ---- faults

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

// ---- numbers

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    // Oracle: the standard library's parser, which rounds correctly.
    #[test]
    fn decimals_round_as_the_standard_parser_does(
        digits in "[0-9]{1,25}", decimals in "[0-9]{0,25}", exponent in -360_i32..320, minus: bool,
    ) {
        let text = format!("{}{digits}.{decimals}e{exponent}", if minus { "-" } else { "" });
        let expected: f64 = text.parse().unwrap();
        prop_assert_eq!(Number::decimal(&text).unwrap().to_f64(), expected);
    }

    // Oracle: the shortest text of any f64 (all bit patterns) reads back to it by the standard parser as well.
    #[test]
    fn shortest_reads_back_bit_equal(bits: u64) {
        let x = f64::from_bits(bits);
        prop_assume!(x.is_finite());
        let text = shortest(x);
        let back = Number::decimal(&text).unwrap().to_f64();
        prop_assert!(back == x && text.parse::<f64>().unwrap() == x, "{}", text);
    }

    // Oracle: the standard formatter finds as few digits.
    #[test]
    fn shortest_has_as_few_digits_as_the_standard_formatter(bits: u64) {
        let x = f64::from_bits(bits);
        prop_assume!(x.is_finite() && x != 0.0);
        let digits = |text: &str| {
            let mantissa = text.split('e').next().unwrap().replace(['-', '.'], "");
            mantissa.trim_matches('0').len()
        };
        prop_assert_eq!(digits(&shortest(x)), digits(&format!("{x:e}")));
    }

    // Oracle: IEEE 754 division, which rounds correctly.
    #[test]
    fn quotients_of_whole_numbers_round_as_ieee_division(a in -(1_i64 << 53)..(1 << 53), b in 1_i64..(1 << 53)) {
        let quotient = Number::integer(a).over(&Number::integer(b));
        prop_assert!(quotient.is_exact());
        prop_assert_eq!(quotient.to_f64(), a as f64 / b as f64);
    }

    #[test]
    fn exact_arithmetic_agrees_with_f64(a in -1e6..1e6_f64, b in -1e6..1e6_f64) {
        let (p, q) = (exact(&shortest(a)), exact(&shortest(b)));
        let scale = a.abs() + b.abs();
        prop_assert!((p.plus(&q).to_f64() - (a + b)).abs() <= f64::EPSILON * scale);
        prop_assert!((p.minus(&q).to_f64() - (a - b)).abs() <= f64::EPSILON * scale);
        prop_assert!((p.times(&q).to_f64() - a * b).abs() <= 2.0 * f64::EPSILON * (a * b).abs());
        prop_assert_eq!(p.plus(&q).minus(&q), p.clone());
        prop_assert_eq!(p.minus(&p), Number::zero());
    }

    // Oracle: IEEE 754 division by a power of two, which rounds once, below 2^-1022 too.
    #[test]
    fn subnormal_results_are_rounded_once(m in 1_u64..(1 << 53), k in 1000_i32..1140) {
        let rest = value(&format!("2^{}", k - 900));
        let quotient = Number::integer(m.cast_signed()).over(&value("2^900")).over(&rest);
        let scaled = m as f64 / value("2^900").to_f64();
        prop_assert_eq!(quotient.to_f64(), scaled / rest.to_f64());
    }

    #[test]
    fn expressions_keep_the_value_of_their_tree(tree in tree()) {
        let read = plain(&tree.text(0));
        match tree.value() {
            Some(value) => prop_assert_eq!(read.unwrap().value, value),
            None => prop_assert!(read.unwrap_err().what.contains("divides by zero")),
        }
    }
}

/// An expression as a tree, written with no more parentheses than the rules of precedence ask for.
#[derive(Clone, Debug)]
enum Tree {
    Leaf(u8),
    Negative(Box<Tree>),
    Both(char, Box<Tree>, Box<Tree>),
}

impl Tree {
    fn text(&self, least: u8) -> String {
        let (own, text) = match self {
            Self::Leaf(n) => (9, n.to_string()),
            Self::Negative(t) => (3, format!("-{}", t.text(3))),
            Self::Both(sign @ ('+' | '-'), a, b) => {
                (1, format!("{} {sign} {}", a.text(1), b.text(2)))
            }
            Self::Both(sign, a, b) => (2, format!("{}{sign}{}", a.text(2), b.text(3))),
        };
        if own < least {
            format!("({text})")
        } else {
            text
        }
    }

    fn value(&self) -> Option<Number> {
        Some(match self {
            Self::Leaf(n) => Number::integer(i64::from(*n)),
            Self::Negative(t) => Number::zero().minus(&t.value()?),
            Self::Both('+', a, b) => a.value()?.plus(&b.value()?),
            Self::Both('-', a, b) => a.value()?.minus(&b.value()?),
            Self::Both('*', a, b) => a.value()?.times(&b.value()?),
            Self::Both(_, a, b) => Some(b.value()?)
                .filter(|b| !b.is_zero())
                .and_then(|b| Some(a.value()?.over(&b)))?,
        })
    }
}

fn tree() -> impl Strategy<Value = Tree> {
    (0_u8..10)
        .prop_map(Tree::Leaf)
        .prop_recursive(5, 24, 2, |inner| {
            prop_oneof![
                inner.clone().prop_map(|t| Tree::Negative(Box::new(t))),
                (
                    prop::sample::select(vec!['+', '-', '*', '/']),
                    inner.clone(),
                    inner
                )
                    .prop_map(|(sign, a, b)| Tree::Both(
                        sign,
                        Box::new(a),
                        Box::new(b)
                    )),
            ]
        })
}

// ---- uncertainty and digits

#[test]
fn uncertainty_applies_to_the_last_digits() {
    let mev = |text: &str| read_in(text, "MeV/c^2", Dimension::Mass).expect(text);
    for text in [
        "497.611(13) MeV",
        "497.611 +- 0.013 MeV",
        "497.611 \u{b1} 0.013 MeV",
        "497.611 +/- 0.013 MeV/c^2",
        "(497.611 +- 0.013) MeV",
        "497.611 MeV +- 13 keV",
        "0.497611(13) GeV",
        "497.611(0.013) MeV",
        "4976.11(13)e-1 MeV",
        "497.611(13)",
    ] {
        let quantity = mev(text);
        assert_eq!(quantity.value, exact("497.611"), "{text}");
        assert_eq!(quantity.uncertainty, Some(0.013), "{text}");
    }
    assert_eq!(mev("497.611 MeV").uncertainty, None);
    assert_eq!(mev("1232(2)").uncertainty, Some(2.0));
    assert_eq!(mev("80362.5(7.7)").uncertainty, Some(7.7));
}

#[test]
fn half_a_last_digit_is_that_of_a_lone_decimal() {
    for (text, half) in [
        ("12.5", 0.05),
        ("-12.5", 0.05),
        ("(12.50)", 0.005),
        ("800", 0.0),
        ("1.", 0.0),
        ("1e3", 0.0),
        ("1.20e3", 5.0),
        ("3/5", 0.0),
        ("2*12.5", 0.0),
        ("sqrt(12.5)", 0.0),
        ("497.611(13)", 0.0005),
        ("12.5 +- 0.25", 0.05),
    ] {
        assert_eq!(plain(text).expect(text).half_digit, half, "{text}");
    }
    assert_eq!(
        read_in("12.5 GeV", "MeV", Dimension::Energy)
            .unwrap()
            .half_digit,
        50.0
    );
    let bare = read(
        &Typed::Bare("12.50".to_owned()),
        &Unit::base(Dimension::Time),
    )
    .unwrap();
    assert_eq!((bare.value, bare.half_digit), (exact("12.5"), 0.005));
}

#[test]
fn bare_numbers_are_decimals_only() {
    let second = Unit::base(Dimension::Time);
    for text in ["3/5", "1 s", "inf", "NaN", ""] {
        let fault = read(&Typed::Bare(text.to_owned()), &second).expect_err(text);
        assert_eq!(fault.what, "this is not a decimal number");
    }
}

// ---- units

#[test]
fn slashes_divide_numbers_and_join_units() {
    let momentum = |text: &str| {
        read_in(text, "GeV/c", Dimension::Momentum)
            .expect(text)
            .value
    };
    assert_eq!(momentum("0.3 GeV/c"), exact("0.3"));
    assert_eq!(momentum("3/5 GeV/c"), exact("0.6"));
    assert_eq!(momentum("3/(2+3)GeV / c"), exact("0.6"));
    assert_eq!(momentum("300 MeV"), exact("0.3"));
    assert!((momentum("1/sqrt(4) GeV/c").to_f64() - 0.5).abs() < 1e-15);
    let mass = |text: &str| read_in(text, "GeV/c^2", Dimension::Mass).expect(text).value;
    for text in [
        "0.5 GeV/c^2",
        "0.5 GeV/c\u{b2}",
        "0.5 GeV/c2",
        "500 MeV",
        "5e8 eV/c^2",
    ] {
        assert_eq!(mass(text), exact("0.5"), "{text}");
    }
}

#[test]
fn units_convert_exactly() {
    use Dimension::{Angle, Energy, Length, Mass, Momentum, Paper, Speed, Time};
    for (text, symbol, dimension, result) in [
        ("1 yr", "d", Time, "365.25"),
        ("1.5 us", "ns", Time, "1500"),
        ("1.5 \u{b5}s", "ns", Time, "1500"),
        ("1.5 \u{3bc}s", "ns", Time, "1500"),
        ("1 h", "min", Time, "60"),
        ("c ns", "m", Length, "0.299792458"),
        ("1 ls", "m", Length, "299792458"),
        ("1 c yr", "ly", Length, "1"),
        ("2.5 km", "m", Length, "2500"),
        ("3 fm", "m", Length, "3e-15"),
        ("1 TeV", "GeV", Energy, "1000"),
        ("1 EeV", "PeV", Energy, "1000"),
        ("250 meV", "eV", Energy, "0.25"),
        ("1 kg", "g", Mass, "1000"),
        ("1 kg m/s", "kg m/s", Momentum, "1"),
        ("299792458 m/s", "c", Speed, "1"),
        ("149896.229 km/s", "c", Speed, "0.5"),
        ("0.6 c", "c", Speed, "0.6"),
        ("0.6", "c", Speed, "0.6"),
        ("36 km/h", "m/s", Speed, "10"),
        ("30\u{b0}", "deg", Angle, "30"),
        ("1 in", "mm", Paper, "25.4"),
        ("72 pt", "in", Paper, "1"),
        ("8.6 cm", "mm", Paper, "86"),
    ] {
        // `c ns` alone is a unit without a number.
        let text = if text.starts_with('c') {
            format!("1 {text}")
        } else {
            text.to_owned()
        };
        let quantity =
            read_in(&text, symbol, dimension).unwrap_or_else(|f| panic!("{text}: {f:?}"));
        assert_eq!(quantity.value, exact(result), "{text}");
    }
    let degrees = read_in("pi rad", "deg", Angle).unwrap().value.to_f64();
    assert!((degrees - 180.0).abs() < 1e-13);
    assert_eq!(
        read_in("0.5 rad", "rad", Angle).unwrap().value,
        exact("0.5")
    );
}

#[test]
fn wrong_units_say_which_would_do() {
    use Dimension::{Energy, Length, Mass, Plain, Speed, Time};
    for (text, dimension, column, what, mend) in [
        (
            "5 MeV/c",
            Energy,
            2,
            "`MeV/c` is a unit of momentum; an energy is wanted",
            "GeV",
        ),
        (
            "5 GeV/c",
            Mass,
            2,
            "`GeV/c` is a unit of momentum; a mass is wanted",
            "MeV/c^2",
        ),
        (
            "12.5 m",
            Time,
            5,
            "`m` is a unit of length; a time is wanted",
            "ns",
        ),
        (
            "1 Mev",
            Energy,
            2,
            "there is no unit `Mev`; an energy is wanted",
            "perhaps `MeV`",
        ),
        (
            "1 gev/c^2",
            Mass,
            2,
            "there is no unit `gev/c^2`; a mass is wanted",
            "perhaps `GeV/c^2`",
        ),
        (
            "1 NM",
            Length,
            2,
            "there is no unit `NM`; a length is wanted",
            "perhaps `nm`",
        ),
        (
            "1 c nss",
            Length,
            2,
            "there is no unit `c nss`; a length is wanted",
            "`c ns`",
        ),
        (
            "3 s",
            Plain,
            2,
            "`s` is a unit of time; a plain number is wanted",
            "no unit",
        ),
        (
            "3 GeV",
            Speed,
            2,
            "`GeV` is a unit of energy; a speed is wanted",
            "km/s",
        ),
        (
            "50 %",
            Speed,
            3,
            "there is no unit `%`; a speed is wanted",
            "c, m/s",
        ),
    ] {
        let fault = read(&Typed::Text(text.to_owned()), &Unit::base(dimension)).expect_err(text);
        assert_eq!((fault.column, fault.what.as_str()), (column, what));
        assert!(fault.mend.contains(mend), "{text}: {}", fault.mend);
    }
}

#[test]
fn units_know_their_kin() {
    let mev = Unit::named("MeV", Dimension::Energy).unwrap();
    let momentum = mev.for_dimension(Dimension::Momentum);
    assert_eq!(
        (momentum.symbol.as_str(), momentum.dimension),
        ("MeV/c", Dimension::Momentum)
    );
    assert_eq!(momentum.size, mev.size);
    let mass = momentum.for_dimension(Dimension::Mass);
    assert_eq!(
        (mass.symbol.as_str(), mass.latex().as_str()),
        ("MeV/c^2", r"\mathrm{MeV}/c^{2}")
    );
    assert_eq!(mass.for_dimension(Dimension::Energy), mev);
    let ns = Unit::named("ns", Dimension::Time).unwrap();
    let way = ns.light_way().unwrap();
    assert_eq!(
        (way.symbol.as_str(), way.latex().as_str()),
        ("c ns", r"c\,\mathrm{ns}")
    );
    assert_eq!(Unit::named("c ns", Dimension::Length), Some(way));
    assert_eq!(mev.light_way(), None);
    assert_eq!(Unit::named("MeV/c", Dimension::Energy), None);
    assert_eq!(Unit::base(Dimension::Momentum).symbol, "eV/c");
    assert_eq!(Unit::base(Dimension::Length).symbol, "m");
    assert_eq!(Unit::base(Dimension::Plain).symbol, "");
    assert_eq!(ns.in_terms_of(&Unit::base(Dimension::Time)), exact("1e-9"));
}

#[test]
fn light_at_whole_nanoseconds_is_exactly_lightlike() {
    // With c exact, n ns and n times 0.299792458 m differ by exactly nothing.
    for n in 1..=1000 {
        let t = read_in(&format!("{n} ns"), "s", Dimension::Time)
            .unwrap()
            .value;
        let x = read_in(&format!("{n}*0.299792458 m"), "c s", Dimension::Length)
            .unwrap()
            .value;
        assert!(t.minus(&x).is_zero(), "{n}");
    }
}

// ---- constants and particles

/// The rows of a table of facts, by column name.
fn rows(csv: &str) -> Vec<Vec<String>> {
    csv.lines().skip(1).map(split).collect()
}

fn split(line: &str) -> Vec<String> {
    let mut cells = vec![String::new()];
    let mut quoted = false;
    for c in line.chars() {
        match c {
            '"' => quoted = !quoted,
            ',' if !quoted => cells.push(String::new()),
            _ => cells.last_mut().unwrap().push(c),
        }
    }
    cells
}

const CONSTANT_ROWS: &str = include_str!("../facts/constants.csv");
const PARTICLE_ROWS: &str = include_str!("../facts/particles.csv");

fn published(id: &str) -> f64 {
    let rows = rows(CONSTANT_ROWS);
    let row = rows
        .iter()
        .find(|r| r[0] == id)
        .unwrap_or_else(|| panic!("{id}"));
    row[4].parse().unwrap()
}

fn close(got: f64, want: f64) {
    assert!((got - want).abs() <= 1e-15 * want.abs(), "{got} {want}");
}

#[test]
fn constants_are_those_of_codata_and_iau() {
    let of = |symbol: &str| {
        let constant = CONSTANTS.iter().find(|c| c.symbol == symbol).unwrap();
        Number::decimal(constant.value).unwrap().to_f64()
    };
    // CODATA 2022 and the IAU's definitions; the rows name their sources.
    assert_eq!(of("c"), published("CO01"));
    assert_eq!(of("e"), published("CO07"));
    assert_eq!(of("yr"), published("DF01"));
    assert_eq!(of("AU"), published("DF03"));
}

#[test]
fn sizes_of_units_are_those_of_codata_and_iau() {
    let in_base = |symbol: &str, dimension| {
        Unit::named(symbol, dimension)
            .unwrap()
            .in_terms_of(&Unit::base(dimension))
            .to_f64()
    };
    let kg = Unit::named("kg", Dimension::Mass).unwrap();
    close(in_base("kg", Dimension::Mass), published("CO35"));
    close(
        Unit::base(Dimension::Mass).in_terms_of(&kg).to_f64(),
        published("CO34"),
    );
    close(
        Unit::base(Dimension::Mass).in_terms_of(&kg).to_f64(),
        published("DF11"),
    );
    close(1.0 / in_base("J", Dimension::Energy), published("CO33"));
    close(1.0 / in_base("m/s", Dimension::Speed), published("CO01"));
    close(in_base("yr", Dimension::Time), published("DF01"));
    close(in_base("d", Dimension::Time), published("DF05"));
    close(in_base("ly", Dimension::Length), published("DF02"));
    close(in_base("c yr", Dimension::Length), published("DF02"));
    close(in_base("AU", Dimension::Length), published("DF03"));
    close(in_base("ls", Dimension::Length), published("DF04"));
}

#[test]
fn masses_in_kilograms_are_their_energies() {
    // CODATA 2022 lists each mass both ways, each with its own rounding.
    for (kilograms, mev) in [("CO08", "CO09"), ("CO11", "CO12"), ("CO14", "CO15")] {
        let text = format!("{:e} kg", published(kilograms));
        let mass = read_in(&text, "MeV/c^2", Dimension::Mass)
            .unwrap()
            .value
            .to_f64();
        assert!((mass / published(mev) - 1.0).abs() < 1e-10, "{text}");
    }
}

fn mass(species: &Species) -> (f64, f64) {
    let quantity = read_in(species.mass, "MeV/c^2", Dimension::Mass).expect(species.name);
    (quantity.value.to_f64(), quantity.uncertainty.unwrap_or(0.0))
}

#[test]
fn masses_are_those_of_the_published_tables() {
    // CODATA 2022 and the Particle Data Group's table of 2026; the rows name their sources. The table has the masses
    // of W, Z and H rounded otherwise than the listings, within a tenth of the uncertainty.
    let mut checked = 0;
    for row in rows(CONSTANT_ROWS) {
        let name = match row[2].as_str() {
            "m_e c^2" => "e-",
            "m_p c^2" => "p",
            "m_n c^2" => "n",
            "m_d c^2" => "d",
            "m_alpha c^2" => "alpha",
            "m_mu c^2" => "mu-",
            "Z0" => "Z",
            "H0" => "H",
            "eta'(958)" => "etaprime",
            "rho(770)0" => "rho0",
            "omega(782)" => "omega",
            "phi(1020)" => "phi",
            "K(S)0" => "K0S",
            "K(L)0" => "K0L",
            "J/psi(1S)" => "Jpsi",
            other => other,
        };
        let Some(found) = species(name).filter(|_| row[6].starts_with("MeV")) else {
            continue;
        };
        let (value, uncertainty) = mass(found);
        let (want, sigma): (f64, f64) = (row[4].parse().unwrap(), row[5].parse().unwrap());
        let slack = if matches!(name, "W+" | "n") {
            0.1 * sigma
        } else {
            0.0
        };
        assert!((value - want).abs() <= slack, "{name}: {value} {want}");
        assert!(
            (uncertainty - sigma).abs() <= 0.05 * sigma,
            "{name}: {uncertainty} {sigma}"
        );
        checked += 1;
    }
    assert!(checked >= 30, "{checked}");
}

#[test]
fn lives_and_further_masses_are_those_of_the_listings() {
    for row in rows(PARTICLE_ROWS) {
        let found = species(&row[0]).unwrap_or_else(|| panic!("{}", row[0]));
        let scale = if row[5] == "GeV" { "e3" } else { "" };
        let power: i32 = row[4].parse().unwrap();
        let (got, want, sigma) = if row[1] == "mass" {
            let (got, uncertainty) = mass(found);
            let sigma: f64 = format!("{}{scale}", row[3]).parse().unwrap();
            let want: f64 = format!("{}{scale}", row[2]).parse().unwrap();
            ((got, uncertainty), want, sigma)
        } else {
            let life = read_in(found.mean_life.unwrap(), "s", Dimension::Time).unwrap();
            let number = |text: &str| format!("{text}e{power}").parse::<f64>().unwrap();
            (
                (life.value.to_f64(), life.uncertainty.unwrap()),
                number(&row[2]),
                number(&row[3]),
            )
        };
        assert_eq!(got.0, want, "{} {}", row[0], row[1]);
        assert!((got.1 / sigma - 1.0).abs() < 1e-12, "{} {}", row[0], row[1]);
    }
}

#[test]
fn lives_agree_with_the_widths_of_the_table() {
    // The table's notes give hbar over the width, `mean life 2.19698e-06 s; width ..`, to some four digits.
    for row in rows(CONSTANT_ROWS) {
        let life = row[11]
            .strip_prefix("mean life ")
            .and_then(|t| t.split_once(" s;"));
        let found = SPECIES.iter().find(|s| s.name == row[2]);
        let (Some((life, _)), Some(text)) = (life, found.and_then(|s| s.mean_life)) else {
            continue;
        };
        let ours = read_in(text, "s", Dimension::Time).unwrap();
        let difference = ours.value.to_f64() - life.parse::<f64>().unwrap();
        assert!(difference.abs() <= ours.uncertainty.unwrap(), "{}", row[2]);
    }
}

#[test]
fn species_are_distinct_and_antiparticles_mirror_them() {
    for (i, a) in SPECIES.iter().enumerate() {
        assert!(
            SPECIES[..i]
                .iter()
                .all(|b| b.name != a.name && b.label != a.label),
            "{}",
            a.name
        );
    }
    for (name, anti) in [
        ("e-", "e+"),
        ("mu-", "mu+"),
        ("tau-", "tau+"),
        ("pi+", "pi-"),
        ("K+", "K-"),
        ("K0", "K0bar"),
        ("D0", "D0bar"),
        ("D+", "D-"),
        ("p", "pbar"),
        ("n", "nbar"),
        ("Lambda", "Lambdabar"),
        ("W+", "W-"),
        ("nu_e", "nubar_e"),
    ] {
        let (a, b) = (species(name).unwrap(), species(anti).unwrap());
        assert_eq!(
            (a.mass, a.mean_life, a.charge),
            (b.mass, b.mean_life, -b.charge),
            "{name}"
        );
    }
    assert_eq!(species("proton"), None);
    assert_eq!(mass(species("gamma").unwrap()), (0.0, 0.0));
}

// ---- text

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
