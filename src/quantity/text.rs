//! Numbers as text.

use super::Number;
use num_bigint::BigInt;
use std::ops::Range;

/// How many digits stand after the decimal sign.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Decimals(pub usize);

/// A value and its uncertainty, rounded together by the rule of the Particle Data Group.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Rounded {
    /// The value, plain: `497.611`.
    pub value: String,
    /// The uncertainty to the same place: `0.013`.
    pub uncertainty: String,
}

/// The shortest decimal text that reads back to the same f64; whole numbers without `.0`, `-0` as `0`. Plain notation
/// from 1e-5 up to below 1e16, as JSON writers have it, else `1.5e-7`.
pub fn shortest(value: f64) -> String {
    if value == 0.0 {
        return "0".to_owned();
    }
    laid_out(format!("{value:e}"), -5..16)
}

/// Rounded to some significant digits (at least one), plain notation from 1e-4 to 1e7, else `1.234e-8`. Half to even
/// on the exact binary value (as the standard formatter does). Zero is `0`.
pub fn significant(value: f64, digits: usize) -> String {
    laid_out(scientific(value, digits), -4..7)
}

/// Rounded to some significant digits (at least one), always with a power of ten: `1.23457e12`. Zero is `0`.
pub fn scientific(value: f64, digits: usize) -> String {
    if value == 0.0 {
        return "0".to_owned();
    }
    format!("{value:.*e}", digits.max(1) - 1)
}

/// With a fixed number of decimals; never `-0.00`.
pub fn fixed(value: f64, decimals: Decimals) -> String {
    let text = format!("{value:.*}", decimals.0);
    match text.strip_prefix('-') {
        Some(rest) if rest.bytes().all(|b| matches!(b, b'0' | b'.')) => rest.to_owned(),
        _ => text,
    }
}

/// Typographic: minus U+2212, digits in threes by U+2009 on both sides, from 4 digits left and 5 right of the sign.
pub fn grouped(text: &str) -> String {
    let mut out = String::with_capacity(2 * text.len());
    let mut rest = text;
    let mut after_sign = false;
    while let Some(c) = rest.chars().next() {
        let length = rest.bytes().take_while(u8::is_ascii_digit).count();
        let (run, tail) = rest.split_at(length.max(c.len_utf8()));
        match c {
            '0'..='9' if after_sign => push_threes(&mut out, run, 0, 5),
            '0'..='9' => push_threes(&mut out, run, run.len() % 3, 4),
            '-' => out.push('\u{2212}'),
            _ => out.push(c),
        }
        after_sign = c == '.';
        rest = tail;
    }
    out
}

/// Digits in threes, the first group of `first` (0 for a whole one), if there are at least `least` of them.
fn push_threes(out: &mut String, digits: &str, first: usize, least: usize) {
    for (i, digit) in digits.chars().enumerate() {
        if i > 0 && i % 3 == first && digits.len() >= least {
            out.push('\u{2009}');
        }
        out.push(digit);
    }
}

/// What is written with a power of ten, written out where the power is in `range`.
fn laid_out(scientific: String, range: Range<i32>) -> String {
    let parts = scientific.split_once('e');
    match parts.and_then(|(mantissa, power)| Some((mantissa, power.parse::<i32>().ok()?))) {
        Some((mantissa, power)) if range.contains(&power) => plain(mantissa, power),
        _ => scientific,
    }
}

/// `1.25` times ten to some power, written out.
fn plain(mantissa: &str, exponent: i32) -> String {
    let (sign, unsigned) = match mantissa.strip_prefix('-') {
        Some(rest) => ("-", rest),
        None => ("", mantissa),
    };
    let digits = unsigned.replace('.', "");
    let point = usize::try_from(exponent + 1).unwrap_or(0);
    if point == 0 {
        let zeros = "0".repeat(usize::try_from(-exponent - 1).unwrap_or(0));
        format!("{sign}0.{zeros}{digits}")
    } else if point >= digits.len() {
        format!("{sign}{digits:0<point$}")
    } else {
        format!("{sign}{}.{}", &digits[..point], &digits[point..])
    }
}

/// An uncertainty rounded by the rule of the Particle Data Group (Review of Particle Physics, Introduction, 5.3): of
/// its first three digits 100 to 354 keep two, 355 to 949 keep one, 950 to 999 become 1000 and keep two.
struct Spread {
    /// The power of ten of the last digit that is kept.
    place: i32,
    /// How many of that digit's units it is.
    units: BigInt,
}

impl Spread {
    /// `None` for 0 and what is not finite.
    fn of(uncertainty: f64) -> Option<Self> {
        if uncertainty == 0.0 || !uncertainty.is_finite() {
            return None;
        }
        let scientific = format!("{:.2e}", uncertainty.abs());
        let (mantissa, exponent) = scientific.split_once('e')?;
        let exponent: i32 = exponent.parse().ok()?;
        let three: u32 = mantissa.replace('.', "").parse().ok()?;
        let place = if three < 355 { exponent - 1 } else { exponent };
        let units = if three < 950 {
            units_of(uncertainty.abs(), place)?
        } else {
            BigInt::from(10)
        };
        Some(Self { place, units })
    }
}

/// How many times 10^place a value is, to the nearest whole number, half away from 0; of the decimal that is printed,
/// so that 12.2135 is half way between 12.213 and 12.214.
fn units_of(value: f64, place: i32) -> Option<BigInt> {
    match Number::decimal(&shortest(value))?.over(&Number::scaled(1, 1, place)) {
        Number::Rational(units) => Some(units.round().to_integer()),
        Number::Real(_) => None,
    }
}

/// A whole number of units of 10^place, in plain notation.
fn at_place(units: &BigInt, place: i32) -> String {
    let decimals = usize::try_from(-place).unwrap_or(0);
    let zeros = usize::try_from(place).unwrap_or(0);
    if *units == BigInt::ZERO && decimals == 0 {
        return "0".to_owned();
    }
    let sign = if *units < BigInt::ZERO { "-" } else { "" };
    let digits = format!("{:0>1$}", units.magnitude().to_string(), decimals + 1);
    let (whole, rest) = digits.split_at(digits.len() - decimals);
    let point = if rest.is_empty() { "" } else { "." };
    format!("{sign}{whole}{point}{rest}{}", "0".repeat(zeros))
}

/// How many decimals an uncertainty leaves in its value by the rule of the Particle Data Group (0 for one of 10 or
/// more); `None` for an uncertainty of 0.
pub fn decimals_allowed(uncertainty: f64) -> Option<Decimals> {
    let spread = Spread::of(uncertainty)?;
    Some(Decimals(usize::try_from(-spread.place).unwrap_or(0)))
}

/// A value and its uncertainty rounded by the rule of the Particle Data Group, in plain notation; `None` for an
/// uncertainty of 0 and for what is not finite.
///
/// 12.2135 and 0.03215 give `12.214` and `0.032`; 12.2135 and 0.06515 give `12.21` and `0.07`.
pub fn rounded(value: f64, uncertainty: f64) -> Option<Rounded> {
    let Spread { place, units } = Spread::of(uncertainty)?;
    Some(Rounded {
        value: at_place(&units_of(value, place)?, place),
        uncertainty: at_place(&units, place),
    })
}

/// A value with its uncertainty in parentheses, in units of the last digit: `497.611(13)`; below 1e-4 and from 1e7
/// with a power of ten, `9.1093837139(28)e-31`. For an uncertainty of 0 the shortest text of the value alone.
pub fn with_uncertainty(value: f64, uncertainty: f64) -> String {
    let (Some(spread), Some(exponent)) = (
        Spread::of(uncertainty),
        exponent_of(value.abs().max(uncertainty.abs())),
    ) else {
        return shortest(value);
    };
    let Some(units) = units_of(value, spread.place) else {
        return shortest(value);
    };
    if (-4..7).contains(&exponent) {
        let bracket = at_place(&spread.units, spread.place.max(0));
        return format!("{}({bracket})", at_place(&units, spread.place));
    }
    format!(
        "{}({})e{exponent}",
        at_place(&units, spread.place - exponent),
        spread.units
    )
}

/// The power of ten of the leading digit of what is not 0.
fn exponent_of(value: f64) -> Option<i32> {
    format!("{value:e}").split_once('e')?.1.parse().ok()
}
