//! A small reader of numbers: a decimal or a simple expression, and a unit, to seconds (times, and lengths as light
//! goes them), eV (energies, masses, momenta) and degrees.
//!
//! c = 299 792 458 m/s and e = 1.602 176 634e-19 C, exact by the definition of the SI; yr = 365.25 d.

use super::real::Real;

/// What a bare number and a unit measure.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(crate) enum Kind {
    Plain,
    Time,
    Length,
    Energy,
    Mass,
    Momentum,
    Angle,
}

fn c() -> Real {
    Real::int(299_792_458)
}

/// J in eV.
fn joule() -> Real {
    Real::one() / Real::decimal("1.602176634e-19")
}

fn time(symbol: &str) -> Real {
    Real::decimal(match symbol {
        "s" => "1",
        "ms" => "1e-3",
        "us" => "1e-6",
        "ns" => "1e-9",
        "ps" => "1e-12",
        "h" => "3600",
        "d" => "86400",
        "yr" => "31557600",
        _ => panic!("no unit of time: {symbol}"),
    })
}

/// In seconds of light's way.
fn length(symbol: &str) -> Real {
    if let Some(unit) = symbol.strip_prefix("c ") {
        return time(unit);
    }
    let metres = match symbol {
        "m" => "1",
        "km" => "1e3",
        "cm" => "1e-2",
        "mm" => "1e-3",
        "ls" => return Real::one(),
        "ly" => return time("yr"),
        _ => panic!("no unit of length: {symbol}"),
    };
    Real::decimal(metres) / c()
}

fn energy(symbol: &str) -> Real {
    Real::decimal(match symbol {
        "eV" => "1",
        "keV" => "1e3",
        "MeV" => "1e6",
        "GeV" => "1e9",
        "TeV" => "1e12",
        "J" => return joule(),
        _ => panic!("no unit of energy: {symbol}"),
    })
}

/// The size of a unit.
pub(crate) fn unit(kind: Kind, symbol: &str) -> Real {
    match kind {
        Kind::Plain => match symbol {
            "" | "c" => Real::one(),
            "m/s" => Real::one() / c(),
            "km/s" => Real::int(1000) / c(),
            _ => panic!("no unit of speed: {symbol}"),
        },
        Kind::Time => time(symbol),
        Kind::Length => length(symbol),
        Kind::Energy => energy(symbol),
        Kind::Mass => match symbol {
            "kg" => c().squared() * joule(),
            "g" => c().squared() * joule() / Real::int(1000),
            _ => energy(symbol.strip_suffix("/c^2").unwrap_or(symbol)),
        },
        Kind::Momentum => match symbol {
            "kg m/s" => c() * joule(),
            _ => energy(symbol.strip_suffix("/c").unwrap_or(symbol)),
        },
        Kind::Angle => match symbol {
            "" | "deg" => Real::one(),
            "rad" => Real::int(180) / Real::pi(),
            _ => panic!("no unit of angle: {symbol}"),
        },
    }
}

/// The number that a text says, with what a bare one is multiplied by.
pub(crate) fn read(text: &str, kind: Kind, bare: &Real) -> Real {
    let mut expression = Expression { rest: text.trim() };
    let value = expression.sum();
    match expression.rest.trim() {
        "" => value * bare,
        symbol => value * unit(kind, symbol),
    }
}

struct Expression<'a> {
    rest: &'a str,
}

impl<'a> Expression<'a> {
    fn take(&mut self, symbol: char) -> bool {
        let rest = self.rest.trim_start().strip_prefix(symbol);
        self.rest = rest.unwrap_or(self.rest);
        rest.is_some()
    }

    fn while_(&mut self, wanted: impl Fn(char) -> bool) -> &'a str {
        let end = self.rest.find(|c| !wanted(c)).unwrap_or(self.rest.len());
        let (found, rest) = self.rest.split_at(end);
        self.rest = rest;
        found
    }

    fn sum(&mut self) -> Real {
        let mut value = self.product();
        loop {
            if self.take('+') {
                value = value + self.product();
            } else if self.take('-') {
                value = value - self.product();
            } else {
                return value;
            }
        }
    }

    fn product(&mut self) -> Real {
        let mut value = self.factor();
        loop {
            if self.take('*') {
                value = value * self.factor();
            } else if self.take('/') {
                value = value / self.factor();
            } else {
                return value;
            }
        }
    }

    fn factor(&mut self) -> Real {
        self.rest = self.rest.trim_start();
        if self.take('-') {
            return -self.factor();
        }
        if self.take('(') {
            let value = self.sum();
            assert!(self.take(')'));
            return value;
        }
        if self.rest.starts_with(|c: char| c.is_ascii_digit()) {
            return self.decimal();
        }
        let name = self.while_(char::is_alphanumeric);
        assert!(self.take('('), "{name}");
        let x = self.sum();
        assert!(self.take(')'));
        match name {
            "sqrt" => x.sqrt(),
            "exp" => x.exp(),
            "ln" => x.ln(),
            "sinh" => x.sinh(),
            "cosh" => x.cosh(),
            "tanh" => x.sinh() / x.cosh(),
            "atanh" => x.atanh(),
            _ => panic!("no function {name}"),
        }
    }

    /// A decimal; an uncertainty behind it is passed over.
    fn decimal(&mut self) -> Real {
        let digits = self.while_(|c| c.is_ascii_digit() || c == '.');
        if self.rest.starts_with('(') {
            let end = self.rest.find(')').unwrap();
            self.rest = &self.rest[end + 1..];
        }
        let exponent = self.rest.strip_prefix(['e', 'E']).filter(|rest| {
            rest.trim_start_matches('-')
                .starts_with(|c: char| c.is_ascii_digit())
        });
        let Some(rest) = exponent else {
            return Real::decimal(digits);
        };
        self.rest = rest;
        let exponent = self.while_(|c| c.is_ascii_digit() || c == '-');
        Real::decimal(&format!("{digits}e{exponent}"))
    }
}

#[test]
fn the_oracle_reads_numbers() {
    let plain = |text| read(text, Kind::Plain, &Real::one()).f64();
    assert_eq!(plain("3/5"), 0.6);
    assert_eq!(plain("-2.5e-3"), -0.0025);
    assert_eq!(plain("sqrt(3)/2"), 3.0_f64.sqrt() / 2.0);
    assert_eq!(plain("2*(3 - 1/2)"), 5.0);
    assert_eq!(plain("149896229 m/s"), 0.5);
    let mass = |text| read(text, Kind::Mass, &Real::int(1_000_000)).f64();
    assert_eq!(mass("497.611(13) MeV"), 497_611_000.0);
    assert_eq!(mass("5"), 5e6);
    // CODATA 2022: 1 kg is 5.609588603804452e35 eV/c^2.
    assert_eq!(mass("1 kg"), 5.609588603804452e35);
    assert_eq!(read("299.792458 m", Kind::Length, &Real::one()).f64(), 1e-6);
}
