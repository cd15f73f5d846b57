//! Numbers: rounding against independent oracles, exact arithmetic.

use super::{exact, plain, value};
use conewright::quantity::{Number, shortest};
use proptest::prelude::*;

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

    // Oracle: a JSON writer goes over to powers of ten at the same sizes. (Of two texts as short and as near, either may
    // be printed, so their lengths are compared.)
    #[test]
    fn shortest_is_as_long_as_what_json_prints(mantissa in -1e4..1e4_f64, exponent in -12_i32..24) {
        let x: f64 = format!("{mantissa}e{exponent}").parse().unwrap();
        let json = serde_json::to_string(&x).unwrap().replace("e+", "e");
        prop_assert_eq!(shortest(x).len(), json.strip_suffix(".0").unwrap_or(&json).len());
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
    Negative(Box<Self>),
    Both(char, Box<Self>, Box<Self>),
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
