//! Numbers of so many digits that the plainest formulas do: E^2 - p^2 loses 35 digits at rapidity 40 and 521 at
//! rapidity 600, and more than a hundred are left of 210 or of 660.

use std::cell::Cell;
use std::cmp::Ordering;
use std::ops::{Add, Div, Mul, Neg, Sub};
use std::str::FromStr as _;

use dashu_float::ops::Abs as _;
use dashu_float::round::mode::HalfEven;
use dashu_float::{DBig, FBig};

thread_local! {
    /// Bits kept of every number; a test, which has a thread of its own, may ask for more.
    static BITS: Cell<usize> = const { Cell::new(700) };
}

/// Digits that every function keeps.
const SURE: i32 = 100;

type Big = FBig<HalfEven, 2>;

/// Keeps 660 digits from here on, for rapidities of hundreds.
pub(crate) fn keep_660_digits() {
    BITS.set(2200);
}

/// A number of 700 bits, or of 2200.
#[derive(Clone, Debug, PartialEq, PartialOrd)]
pub(crate) struct Real(Big);

impl Real {
    pub(crate) fn zero() -> Self {
        Self::int(0)
    }

    pub(crate) fn one() -> Self {
        Self::int(1)
    }

    pub(crate) fn int(n: i64) -> Self {
        Self(Big::from(n).with_precision(BITS.get()).value())
    }

    /// Exactly the double.
    pub(crate) fn of(x: f64) -> Self {
        Self(Big::try_from(x).unwrap().with_precision(BITS.get()).value())
    }

    /// 10^n.
    pub(crate) fn ten_to(n: i32) -> Self {
        let power = (0..n.abs()).fold(Self::one(), |p, _| p * Self::int(10));
        if n < 0 { Self::one() / power } else { power }
    }

    /// A plain decimal, with or without an exponent.
    pub(crate) fn decimal(text: &str) -> Self {
        let (digits, exponent) = text.split_once(['e', 'E']).unwrap_or((text, "0"));
        let (whole, fraction) = digits.split_once('.').unwrap_or((digits, ""));
        let places = i32::try_from(fraction.len()).unwrap();
        let exponent: i32 = exponent.parse().unwrap();
        let (sign, whole) = match whole.strip_prefix('-') {
            Some(rest) => (-1, rest),
            None => (1, whole),
        };
        let mut value = Self::zero();
        for c in whole.chars().chain(fraction.chars()) {
            let digit = c.to_digit(10).unwrap_or_else(|| panic!("{text}"));
            value = value * Self::int(10) + Self::int(i64::from(digit));
        }
        value * Self::int(sign) * Self::ten_to(exponent - places)
    }

    /// With so many significant digits, as a decimal that a scene may hold.
    pub(crate) fn digits(&self, count: usize) -> String {
        let decimal: DBig = self.0.clone().to_decimal().value();
        let decimal = decimal.with_precision(count).value();
        format!("{decimal:e}").replace("e+", "e")
    }

    pub(crate) fn f64(&self) -> f64 {
        self.0.to_f64().value()
    }

    pub(crate) fn exp(&self) -> Self {
        Self(self.0.exp())
    }

    pub(crate) fn ln(&self) -> Self {
        Self(self.0.ln())
    }

    pub(crate) fn sqrt(&self) -> Self {
        Self(self.0.sqrt())
    }

    pub(crate) fn abs(&self) -> Self {
        Self(self.0.clone().abs())
    }

    pub(crate) fn squared(&self) -> Self {
        self * self
    }

    pub(crate) fn sinh(&self) -> Self {
        let e = self.exp();
        (&e - Self::one() / &e) / Self::int(2)
    }

    pub(crate) fn cosh(&self) -> Self {
        let e = self.exp();
        (&e + Self::one() / &e) / Self::int(2)
    }

    pub(crate) fn asinh(&self) -> Self {
        let size = self.abs();
        let value = (&size + (size.squared() + Self::one()).sqrt()).ln();
        if *self < Self::zero() { -value } else { value }
    }

    pub(crate) fn atanh(&self) -> Self {
        ((Self::one() + self) / (Self::one() - self)).ln() / Self::int(2)
    }

    pub(crate) fn sin_cos(&self) -> (Self, Self) {
        let (sin, cos) = self.0.sin_cos();
        (Self(sin), Self(cos))
    }

    /// The angle of (x, self), in (-pi, pi].
    pub(crate) fn atan2(&self, x: &Self) -> Self {
        Self(self.0.atan2(&x.0))
    }

    pub(crate) fn pi() -> Self {
        Self::zero().atan2(&Self::int(-1))
    }

    /// What an exact 0 may come out as.
    pub(crate) fn speck() -> Self {
        Self::ten_to(if BITS.get() > 1000 { -308 } else { -150 })
    }

    pub(crate) fn is_zero(&self) -> bool {
        *self == Self::zero()
    }

    /// Zero as far as the digits go, beside the terms it was summed from.
    pub(crate) fn vanishes_beside(&self, terms: &Self) -> bool {
        let sure = if BITS.get() > 1000 { -580 } else { -150 };
        self.abs() <= terms.abs() * Self::ten_to(sure)
    }

    pub(crate) fn max(&self, other: &Self) -> Self {
        match self.partial_cmp(other) {
            Some(Ordering::Less) => other.clone(),
            _ => self.clone(),
        }
    }
}

macro_rules! operators {
    ($($name:ident $method:ident),*) => {$(
        impl $name<&Real> for &Real {
            type Output = Real;
            fn $method(self, o: &Real) -> Real {
                Real((&self.0).$method(&o.0))
            }
        }
        impl $name<Real> for &Real {
            type Output = Real;
            fn $method(self, o: Real) -> Real {
                self.$method(&o)
            }
        }
        impl $name<&Real> for Real {
            type Output = Real;
            fn $method(self, o: &Real) -> Real {
                (&self).$method(o)
            }
        }
        impl $name<Real> for Real {
            type Output = Real;
            fn $method(self, o: Real) -> Real {
                (&self).$method(&o)
            }
        }
    )*};
}

operators!(Add add, Sub sub, Mul mul, Div div);

impl Neg for Real {
    type Output = Self;
    fn neg(self) -> Self {
        Self(-self.0)
    }
}

/// Values of 25 digits from Abramowitz and Stegun, Handbook of Mathematical Functions, tables 1.1, 4.2, 4.15 (from
/// memory), and identities that no two of the functions could break together.
#[test]
fn the_oracle_knows_its_functions() {
    keep_660_digits();
    let close = |a: &Real, b: &Real, digits: i32| {
        assert!(
            (a - b).abs() <= b.abs() * Real::ten_to(-digits),
            "{} {}",
            a.digits(40),
            b.digits(40)
        );
    };
    let known = |text: &str| Real::decimal(text);
    close(&Real::one().exp(), &known("2.718281828459045235360287"), 24);
    close(
        &Real::int(2).ln(),
        &known("0.6931471805599453094172321"),
        24,
    );
    close(&Real::pi(), &known("3.141592653589793238462643"), 24);
    close(
        &Real::int(2).sqrt(),
        &known("1.414213562373095048801689"),
        24,
    );
    for text in ["1e-10", "0.3", "-2.5", "18", "300", "-600"] {
        let x = known(text);
        close(&x.sinh().asinh(), &x, SURE);
        close(&x.exp().ln(), &x, SURE);
        close(
            &(x.cosh().squared() - x.sinh().squared()),
            &Real::one(),
            SURE,
        );
        let (sin, cos) = x.sin_cos();
        close(&(sin.squared() + cos.squared()), &Real::one(), SURE);
        close(&known(&x.digits(50)), &x, 49);
    }
    let (sin, cos) = (Real::pi() / Real::int(6)).sin_cos();
    close(&sin, &known("0.5"), SURE);
    close(&sin.atan2(&cos), &(Real::pi() / Real::int(6)), SURE);
    close(&known("0.6").atanh().exp(), &Real::int(2), SURE);
    assert_eq!(known("-12.5e-1").f64(), -1.25);
    assert_eq!(Real::of(0.1).f64(), 0.1);
}

/// One speck of the code that the standard library would do: a decimal of ours and one of another reader agree.
#[test]
fn decimals_read_as_another_reader_reads_them() {
    for text in [
        "497.611",
        "0.299792458",
        "6.02214076e23",
        "-1.602176634e-19",
    ] {
        let theirs = DBig::from_str(text).unwrap().to_f64().value();
        assert_eq!(Real::decimal(text).f64(), theirs);
    }
}
