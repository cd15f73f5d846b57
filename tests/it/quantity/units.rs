//! Units, uncertainties and typed digits.

use super::{exact, plain, read_in};
use conewright::quantity::{Dimension, Typed, Unit, read};

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
