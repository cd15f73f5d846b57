//! Constants and particles against published tables.

use super::read_in;
use crate::facts::{Row, row, rows};
use conewright::label::typeset;
use conewright::quantity::{CONSTANTS, Dimension, Number, SPECIES, Species, Unit, species};

const CONSTANTS_FILE: &str = "constants.csv";

fn number(row: &Row, column: &str) -> f64 {
    row[column].parse().expect(column)
}

fn published(id: &str) -> f64 {
    number(row(&rows(CONSTANTS_FILE), id), "published_value")
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

fn life(species: &Species) -> (f64, f64) {
    let text = species.mean_life.expect(species.name);
    let quantity = read_in(text, "s", Dimension::Time).expect(text);
    (quantity.value.to_f64(), quantity.uncertainty.expect(text))
}

#[test]
fn masses_are_those_of_the_published_tables() {
    // CODATA 2022 and the Particle Data Group's table of 2026; the rows name their sources. The table has the masses
    // of W and n with fewer digits than the listings, within a tenth of the uncertainty.
    let mut checked = 0;
    for row in rows(CONSTANTS_FILE) {
        let name = match row["symbol"].as_str() {
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
        let Some(found) = species(name).filter(|_| row["unit"].starts_with("MeV")) else {
            continue;
        };
        let (value, uncertainty) = mass(found);
        let (want, sigma) = (number(&row, "published_value"), number(&row, "uncertainty"));
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
    for row in rows("particles.csv") {
        let name = &row["species"];
        let found = species(name).unwrap_or_else(|| panic!("{name}"));
        let power: i32 = row["power_of_ten"].parse().unwrap();
        let power = power + if row["unit"] == "GeV" { 3 } else { 0 };
        let listed = |column: &str| format!("{}e{power}", row[column]).parse::<f64>().unwrap();
        let (value, uncertainty) = match row["quantity"].as_str() {
            "mass" => mass(found),
            _ => life(found),
        };
        assert_eq!(value, listed("value"), "{name} {}", row["quantity"]);
        close(uncertainty, listed("uncertainty"));
    }
}

#[test]
fn lives_agree_with_the_widths_of_the_table() {
    // The table's notes give hbar over the width, `mean life 2.19698e-06 s; width ..`, to some four digits.
    for row in rows(CONSTANTS_FILE) {
        let life = row["notes"]
            .strip_prefix("mean life ")
            .and_then(|t| t.split_once(" s;"));
        let found = SPECIES.iter().find(|s| s.name == row["symbol"]);
        let (Some((life, _)), Some(text)) = (life, found.and_then(|s| s.mean_life)) else {
            continue;
        };
        let ours = read_in(text, "s", Dimension::Time).unwrap();
        let difference = ours.value.to_f64() - life.parse::<f64>().unwrap();
        assert!(
            difference.abs() <= ours.uncertainty.unwrap(),
            "{}",
            row["symbol"]
        );
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

#[test]
fn labels_of_species_and_units_can_be_set() {
    for species in SPECIES {
        assert!(typeset(species.label).is_ok(), "{}", species.label);
    }
    for (symbol, dimension) in [
        ("us", Dimension::Time),
        ("um", Dimension::Length),
        ("c ns", Dimension::Length),
        ("GeV/c^2", Dimension::Mass),
        ("kg m/s", Dimension::Momentum),
        ("deg", Dimension::Angle),
        ("c", Dimension::Speed),
    ] {
        let latex = Unit::named(symbol, dimension).unwrap().latex();
        assert!(typeset(&latex).is_ok(), "{latex}");
    }
}
