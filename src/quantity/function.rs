//! The functions and constants that an expression may name.

use super::Number;
use crate::num;
use num_bigint::BigInt;
use num_rational::BigRational;
use num_traits::{Signed, ToPrimitive};
use std::f64::consts::{E, PI};

/// A function of one real argument.
#[derive(Clone, Copy, Debug)]
pub(super) struct Function {
    name: &'static str,
    real: fn(f64) -> f64,
    domain: &'static str,
}

const ALWAYS: &str = "the result is too large for a number";

const FUNCTIONS: &[Function] = &[
    Function {
        name: "sqrt",
        real: f64::sqrt,
        domain: "a negative number has no real square root",
    },
    Function {
        name: "cbrt",
        real: num::cbrt,
        domain: ALWAYS,
    },
    Function {
        name: "exp",
        real: num::exp,
        domain: ALWAYS,
    },
    Function {
        name: "ln",
        real: num::ln,
        domain: "only a positive number has a logarithm",
    },
    Function {
        name: "log10",
        real: num::log10,
        domain: "only a positive number has a logarithm",
    },
    Function {
        name: "sin",
        real: num::sin,
        domain: ALWAYS,
    },
    Function {
        name: "cos",
        real: num::cos,
        domain: ALWAYS,
    },
    Function {
        name: "tan",
        real: num::tan,
        domain: "this angle has no tangent",
    },
    Function {
        name: "asin",
        real: num::asin,
        domain: "`asin` is defined from -1 to 1",
    },
    Function {
        name: "acos",
        real: num::acos,
        domain: "`acos` is defined from -1 to 1",
    },
    Function {
        name: "atan",
        real: num::atan,
        domain: ALWAYS,
    },
    Function {
        name: "sinh",
        real: num::sinh,
        domain: ALWAYS,
    },
    Function {
        name: "cosh",
        real: num::cosh,
        domain: ALWAYS,
    },
    Function {
        name: "tanh",
        real: num::tanh,
        domain: ALWAYS,
    },
    Function {
        name: "asinh",
        real: num::asinh,
        domain: ALWAYS,
    },
    Function {
        name: "acosh",
        real: num::acosh,
        domain: "`acosh` is defined from 1 up",
    },
    Function {
        name: "atanh",
        real: num::atanh,
        domain: "`atanh` is defined between -1 and 1",
    },
    Function {
        name: "abs",
        real: f64::abs,
        domain: ALWAYS,
    },
];

/// The function of that name.
pub(super) fn named(name: &str) -> Option<Function> {
    FUNCTIONS.iter().find(|f| f.name == name).copied()
}

/// The names of all functions.
pub(super) fn names() -> impl Iterator<Item = &'static str> {
    FUNCTIONS.iter().map(|f| f.name)
}

/// `pi` and `e`.
pub(super) fn constant(name: &str) -> Option<f64> {
    match name {
        "pi" | "\u{3c0}" => Some(PI),
        "e" => Some(E),
        _ => None,
    }
}

impl Function {
    /// Whether its argument is an angle.
    pub(super) fn takes_angle(self) -> bool {
        matches!(self.name, "sin" | "cos" | "tan")
    }

    /// Its value; in words why there is none.
    pub(super) fn of(self, argument: &Number, degrees: bool) -> Result<Number, &'static str> {
        if let Number::Rational(r) = argument {
            if degrees {
                return self.of_degrees(r);
            }
            if let Some(exact) = self.exactly(r) {
                return Ok(Number::Rational(exact));
            }
        }
        let x = argument.to_f64();
        self.finite((self.real)(if degrees { x * (PI / 180.0) } else { x }))
    }

    fn finite(self, y: f64) -> Result<Number, &'static str> {
        if y.is_finite() {
            Ok(Number::Real(y))
        } else {
            Err(self.domain)
        }
    }

    /// Where a rational argument has a rational value that is found without rounding.
    fn exactly(self, r: &BigRational) -> Option<BigRational> {
        let root = |of: fn(&BigInt) -> BigInt, power: u32| {
            let root = BigRational::new(of(r.numer()), of(r.denom()));
            (root.pow(power.cast_signed()) == *r).then_some(root)
        };
        match self.name {
            "abs" => Some(r.abs()),
            "sqrt" if !r.is_negative() => root(BigInt::sqrt, 2),
            "cbrt" => root(BigInt::cbrt, 3),
            _ => None,
        }
    }

    /// Of an exact angle in degrees, turned back into one turn first.
    fn of_degrees(self, r: &BigRational) -> Result<Number, &'static str> {
        let turn = BigRational::from(BigInt::from(360));
        let angle = r - (r / &turn).floor() * &turn;
        let whole = angle.is_integer().then(|| angle.to_i64()).flatten();
        if let Some((n, d)) = whole.and_then(|degrees| self.quarter(degrees)) {
            return if d == 0 {
                Err(self.domain)
            } else {
                Ok(Number::integer(n).over(&Number::integer(d)))
            };
        }
        self.finite((self.real)(Number::Rational(angle).to_f64() * (PI / 180.0)))
    }

    /// The rational values on a turn, as numerator and denominator; the denominator is 0 where there is no value.
    fn quarter(self, degrees: i64) -> Option<(i64, i64)> {
        let sine = |degrees: i64| match degrees.rem_euclid(360) {
            0 | 180 => Some((0, 1)),
            30 | 150 => Some((1, 2)),
            90 => Some((1, 1)),
            210 | 330 => Some((-1, 2)),
            270 => Some((-1, 1)),
            _ => None,
        };
        match (self.name, degrees.rem_euclid(180)) {
            ("sin", _) => sine(degrees),
            ("cos", _) => sine(degrees + 90),
            ("tan", 0) => Some((0, 1)),
            ("tan", 45) => Some((1, 1)),
            ("tan", 90) => Some((1, 0)),
            ("tan", 135) => Some((-1, 1)),
            _ => None,
        }
    }
}
