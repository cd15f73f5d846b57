//! A number: an exact rational for as long as it is one, else an f64.

use num_bigint::{BigInt, BigUint};
use num_rational::BigRational;
use num_traits::{One, Signed, Zero};

/// Bits that an exact number may have above and below the bar.
pub(super) const BITS: u64 = 2048;
/// Decimal digits, or powers of ten, beyond which a number surely has more than [`BITS`].
const DIGITS: usize = 620;

/// A number as read. Rationals stay exact (at most 2,048 bits above and below the bar).
///
/// Arithmetic on two exact numbers is exact; a result that would need more bits is the nearest f64 instead. With an
/// f64 on either side it is that of f64, rounded once.
#[derive(Clone, Debug, PartialEq)]
pub enum Number {
    /// Exact.
    Rational(BigRational),
    /// Rounded.
    Real(f64),
}

/// Why a decimal was not read.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum DecimalFault {
    /// It is not written as one.
    Malformed,
    /// It needs more than [`BITS`].
    TooLarge,
}

/// A decimal as written.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Decimal {
    /// Its exact value.
    pub(super) value: Number,
    /// One unit of its last digit, `0.1` for `12.5`, `1` for `800`, `10` for `1.20e3`.
    pub(super) last_digit: Number,
    /// Whether a decimal digit was written: true for `12.5` and `1.20e3`, false for `800`, `1.` and `1e3`.
    has_decimals: bool,
}

impl Number {
    /// Zero.
    pub fn zero() -> Self {
        Self::integer(0)
    }
    /// An integer.
    pub fn integer(n: i64) -> Self {
        Self::Rational(BigInt::from(n).into())
    }
    /// The decimal as written (`-1.5e3`, `.5`, `1.`): exact. `None` if it is not one, or has more than 2,048 bits.
    pub fn decimal(text: &str) -> Option<Self> {
        Decimal::read(text).ok().map(|d| d.value)
    }
    /// The nearest f64, ties to even, subnormals included; infinite beyond the largest.
    pub fn to_f64(&self) -> f64 {
        match self {
            Self::Rational(r) => nearest_f64(r),
            Self::Real(x) => *x,
        }
    }
    /// Exactly 0.
    pub fn is_zero(&self) -> bool {
        match self {
            Self::Rational(r) => r.is_zero(),
            Self::Real(x) => *x == 0.0,
        }
    }
    /// Below 0.
    pub fn is_negative(&self) -> bool {
        match self {
            Self::Rational(r) => r.is_negative(),
            Self::Real(x) => *x < 0.0,
        }
    }
    /// True while exact.
    pub fn is_exact(&self) -> bool {
        matches!(self, Self::Rational(_))
    }
    /// Sum.
    pub fn plus(&self, other: &Self) -> Self {
        self.combine(other, |a, b| a + b, |a, b| a + b)
    }
    /// Difference, formed before rounding where both are exact.
    pub fn minus(&self, other: &Self) -> Self {
        self.combine(other, |a, b| a - b, |a, b| a - b)
    }
    /// Product.
    pub fn times(&self, other: &Self) -> Self {
        self.combine(other, |a, b| a * b, |a, b| a * b)
    }
    /// Quotient; division by zero gives infinity as a real (NaN for 0/0).
    pub fn over(&self, other: &Self) -> Self {
        if other.is_zero() {
            return Self::Real(self.to_f64() / other.to_f64());
        }
        self.combine(other, |a, b| a / b, |a, b| a / b)
    }
    /// The same with the opposite sign.
    pub fn negated(&self) -> Self {
        match self {
            Self::Rational(r) => Self::Rational(-r),
            Self::Real(x) => Self::Real(-x),
        }
    }

    /// `numerator / denominator * 10^ten`; the denominator is not 0.
    pub(super) fn scaled(numerator: u64, denominator: u64, ten: i32) -> Self {
        let power = BigInt::from(10).pow(ten.unsigned_abs());
        let (up, down) = if ten < 0 {
            (BigInt::one(), power)
        } else {
            (power, BigInt::one())
        };
        Self::Rational(BigRational::new(up * numerator, down * denominator))
    }

    fn combine(
        &self,
        other: &Self,
        exact: impl Fn(&BigRational, &BigRational) -> BigRational,
        rounded: impl Fn(f64, f64) -> f64,
    ) -> Self {
        match (self, other) {
            (Self::Rational(a), Self::Rational(b)) => {
                let r = exact(a, b);
                if fits(&r) {
                    Self::Rational(r)
                } else {
                    Self::Real(nearest_f64(&r))
                }
            }
            _ => Self::Real(rounded(self.to_f64(), other.to_f64())),
        }
    }
}

/// Whether a rational keeps within [`BITS`] above and below the bar.
pub(super) fn fits(r: &BigRational) -> bool {
    r.numer().bits() <= BITS && r.denom().bits() <= BITS
}

impl Decimal {
    /// Reads `[+-] digits [. digits] [e [+-] digits]`, at least one digit before the `e`.
    pub(super) fn read(text: &str) -> Result<Self, DecimalFault> {
        let (negative, rest) = match text.strip_prefix('-') {
            Some(rest) => (true, rest),
            None => (false, text.strip_prefix('+').unwrap_or(text)),
        };
        let (mantissa, exponent) = match rest.split_once(['e', 'E']) {
            Some((mantissa, exponent)) => (mantissa, read_exponent(exponent)?),
            None => (rest, 0),
        };
        let (whole, decimals) = mantissa.split_once('.').unwrap_or((mantissa, ""));
        let all_digits = |s: &str| s.bytes().all(|b| b.is_ascii_digit());
        if whole.len() + decimals.len() == 0 || !all_digits(whole) || !all_digits(decimals) {
            return Err(DecimalFault::Malformed);
        }
        let digits = format!("{whole}{decimals}");
        let significant = digits.trim_start_matches('0');
        let ten = i32::try_from(decimals.len())
            .ok()
            .and_then(|d| exponent.checked_sub(d))
            .ok_or(DecimalFault::TooLarge)?;
        if significant.len() > DIGITS || decimals.len() > DIGITS {
            return Err(DecimalFault::TooLarge);
        }
        // Zero has no size of its own, whatever its exponent: `0e999999`.
        let within = ten.unsigned_abs() as usize <= DIGITS;
        if !within && !significant.is_empty() {
            return Err(DecimalFault::TooLarge);
        }
        let last_digit = Number::scaled(1, 1, if within { ten } else { 0 });
        let magnitude = significant
            .bytes()
            .fold(BigInt::zero(), |n, b| n * 10 + (b - b'0'));
        let value = Number::Rational(if negative { -magnitude } else { magnitude }.into())
            .times(&last_digit);
        if !value.is_exact() {
            return Err(DecimalFault::TooLarge);
        }
        Ok(Self {
            value,
            last_digit,
            has_decimals: !decimals.is_empty(),
        })
    }

    /// Half a unit of the last digit after the decimal sign; 0 where none was written.
    pub(super) fn half_digit(&self) -> Number {
        if self.has_decimals {
            self.last_digit.over(&Number::integer(2))
        } else {
            Number::zero()
        }
    }
}

/// The exponent after the `e`; beyond what an i32 holds it saturates.
fn read_exponent(text: &str) -> Result<i32, DecimalFault> {
    let digits = text.strip_prefix(['+', '-']).unwrap_or(text);
    if digits.is_empty() || !digits.bytes().all(|b| b.is_ascii_digit()) {
        return Err(DecimalFault::Malformed);
    }
    let far = if text.starts_with('-') {
        i32::MIN
    } else {
        i32::MAX
    };
    Ok(text.parse().unwrap_or(far))
}

/// The f64 nearest to a rational, ties to even.
///
/// A quotient of at least 64 bits with a sticky last bit is cut to 53 bits, or to those left above 2^-1074.
fn nearest_f64(r: &BigRational) -> f64 {
    let (n, d) = (r.numer().magnitude(), r.denom().magnitude());
    if n.is_zero() {
        return 0.0;
    }
    let shift = 64 + bits(d) - bits(n);
    let (n, d) = if shift >= 0 {
        (n << shift.unsigned_abs(), d.clone())
    } else {
        (n.clone(), d << shift.unsigned_abs())
    };
    let quotient = &n / &d;
    let sticky = u128::from(&quotient * d != n);
    // 64 or 65 bits: never too many for a u128.
    let q = u128::try_from(&quotient).unwrap_or(u128::MAX) | sticky;
    let length = bits(&quotient);
    let leading = length - 1 - shift;
    let kept = (leading + 1075).min(53);
    let magnitude = if leading > 1023 {
        f64::INFINITY
    } else if kept < 0 {
        0.0
    } else {
        let dropped = length - kept;
        let half = 1_u128 << (dropped - 1);
        let rest = q & ((half << 1) - 1);
        let cut = q >> dropped;
        let up = rest > half || (rest == half && cut & 1 == 1);
        (cut + u128::from(up)) as f64 * power_of_two(dropped - shift)
    };
    if r.is_negative() {
        -magnitude
    } else {
        magnitude
    }
}

fn bits(n: &BigUint) -> i64 {
    i64::try_from(n.bits()).unwrap_or(i64::MAX)
}

/// 2^k, k from -1074 to 1023.
fn power_of_two(k: i64) -> f64 {
    if k >= -1022 {
        f64::from_bits((k + 1023).unsigned_abs() << 52)
    } else {
        f64::from_bits(1 << (k + 1074).unsigned_abs())
    }
}
