//! Units and what they measure. With c = 1 inside, a mass, an energy and a momentum share one base unit (eV), and
//! a speed is a fraction of c.
//!
//! Sizes are exact: c = 299 792 458 m/s and e = 1.602 176 634e-19 C by the definition of the SI (CODATA 2022 lists
//! both as exact), so kg and J are exact in eV; yr = 365.25 d; AU = 149 597 870 700 m (IAU 2012); in = 25.4 mm and
//! pt = in/72. Only rad and mrad are rounded, for pi is.

use super::Number;
use std::f64::consts::PI;

/// What a number measures.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Dimension {
    /// A plain number.
    Plain,
    /// A time; base unit s.
    Time,
    /// A length along x or y; base unit m.
    Length,
    /// An energy; base unit eV.
    Energy,
    /// A mass; base unit eV/c^2. Units of energy will do as well.
    Mass,
    /// A momentum; base unit eV/c. Units of energy will do as well.
    Momentum,
    /// A speed; base unit c. A plain number is a fraction of c.
    Speed,
    /// An angle; base unit degree.
    Angle,
    /// A size on paper; base unit mm. Also pt (1/72 in), cm, in.
    Paper,
}

/// A symbol and its size in base units: numerator, denominator, power of ten.
type Row = (&'static str, u64, u64, i32);

/// The speed of light in m/s.
const C: u64 = 299_792_458;
/// The elementary charge in 1e-28 C.
const E: u64 = 1_602_176_634;

const TIMES: &[Row] = &[
    ("s", 1, 1, 0),
    ("ms", 1, 1, -3),
    ("us", 1, 1, -6),
    ("ns", 1, 1, -9),
    ("ps", 1, 1, -12),
    ("fs", 1, 1, -15),
    ("as", 1, 1, -18),
    ("min", 60, 1, 0),
    ("h", 3600, 1, 0),
    ("d", 86_400, 1, 0),
    ("yr", 31_557_600, 1, 0),
    ("kyr", 31_557_600, 1, 3),
    ("Myr", 31_557_600, 1, 6),
    ("Gyr", 31_557_600, 1, 9),
];
const LENGTHS: &[Row] = &[
    ("m", 1, 1, 0),
    ("km", 1, 1, 3),
    ("cm", 1, 1, -2),
    ("mm", 1, 1, -3),
    ("um", 1, 1, -6),
    ("nm", 1, 1, -9),
    ("pm", 1, 1, -12),
    ("fm", 1, 1, -15),
    ("Mm", 1, 1, 6),
    ("Gm", 1, 1, 9),
    ("ls", C, 1, 0),
    ("ly", C * 31_557_600, 1, 0),
    ("kly", C * 31_557_600, 1, 3),
    ("AU", 149_597_870_700, 1, 0),
];
// MeV stands before meV, so that `mev` is taken for the commoner one.
const ENERGIES: &[Row] = &[
    ("eV", 1, 1, 0),
    ("keV", 1, 1, 3),
    ("MeV", 1, 1, 6),
    ("GeV", 1, 1, 9),
    ("TeV", 1, 1, 12),
    ("PeV", 1, 1, 15),
    ("EeV", 1, 1, 18),
    ("meV", 1, 1, -3),
    ("J", 1, E, 28),
];
const MASSES: &[Row] = &[("kg", C * C, E, 28), ("g", C * C, E, 25)];
const MOMENTA: &[Row] = &[("kg m/s", C, E, 28)];
const SPEEDS: &[Row] = &[
    ("c", 1, 1, 0),
    ("m/s", 1, C, 0),
    ("km/s", 1, C, 3),
    ("km/h", 10, 36 * C, 0),
];
const PAPER: &[Row] = &[
    ("mm", 1, 1, 0),
    ("cm", 10, 1, 0),
    ("m", 1000, 1, 0),
    ("pt", 254, 720, 0),
    ("in", 254, 10, 0),
];

impl Dimension {
    /// Every dimension.
    pub(super) const ALL: [Self; 9] = [
        Self::Plain,
        Self::Time,
        Self::Length,
        Self::Energy,
        Self::Mass,
        Self::Momentum,
        Self::Speed,
        Self::Angle,
        Self::Paper,
    ];

    /// The kind in words, with its article: `a time`, `an energy`.
    pub const fn words(self) -> &'static str {
        match self {
            Self::Plain => "a plain number",
            Self::Time => "a time",
            Self::Length => "a length",
            Self::Energy => "an energy",
            Self::Mass => "a mass",
            Self::Momentum => "a momentum",
            Self::Speed => "a speed",
            Self::Angle => "an angle",
            Self::Paper => "a size on paper",
        }
    }

    /// The symbols that would do, as a person would list them.
    pub const fn choices(self) -> &'static str {
        match self {
            Self::Plain => "no unit",
            Self::Time => "s, ms, us, ns, ps, fs, min, h, d or yr",
            Self::Length => {
                "m, km, cm, mm, um, nm, fm, ly, ls, AU or light's way in a time, as in `c ns`"
            }
            Self::Energy => "eV, keV, MeV, GeV, TeV or J",
            Self::Mass => "MeV/c^2, GeV/c^2 and their like, a unit of energy, kg or g",
            Self::Momentum => "MeV/c, GeV/c and their like, a unit of energy or kg m/s",
            Self::Speed => "c, m/s, km/s or km/h",
            Self::Angle => "deg, rad or mrad",
            Self::Paper => "mm, cm, m, pt or in",
        }
    }

    /// The exact rows of this dimension's own, the base unit first.
    const fn rows(self) -> &'static [Row] {
        match self {
            Self::Plain => &[("", 1, 1, 0)],
            Self::Time => TIMES,
            Self::Length => LENGTHS,
            Self::Energy => ENERGIES,
            Self::Mass => MASSES,
            Self::Momentum => MOMENTA,
            Self::Speed => SPEEDS,
            Self::Angle => &[("deg", 1, 1, 0)],
            Self::Paper => PAPER,
        }
    }

    /// What is written behind a unit of energy to make it one of this dimension.
    const fn energy_suffix(self) -> Option<&'static str> {
        match self {
            Self::Energy => Some(""),
            Self::Mass => Some("/c^2"),
            Self::Momentum => Some("/c"),
            Self::Plain | Self::Time | Self::Length | Self::Speed | Self::Angle | Self::Paper => {
                None
            }
        }
    }
}

/// A unit: its symbol as typed and printed, what it measures and its size in base units.
#[derive(Clone, Debug, PartialEq)]
pub struct Unit {
    /// As typed (`ns`, `MeV`, `GeV/c`), in ASCII: `us` for `µs`, `deg` for `°`, `c^2` for `c²`.
    pub symbol: String,
    /// What it measures.
    pub dimension: Dimension,
    /// In base units; exact but for rad and mrad.
    pub size: Number,
}

impl Unit {
    /// The unit of that symbol for that dimension, `None` if there is none (or it measures something else).
    ///
    /// A mass or a momentum may be in a plain unit of energy; a length may be light's way in a unit of time (`c ns`).
    pub fn named(symbol: &str, dimension: Dimension) -> Option<Self> {
        let symbol = ascii(symbol);
        let size = find(dimension, &symbol)
            .or_else(|| energy_like(&symbol, dimension))
            .or_else(|| light_way_size(&symbol, dimension))
            .or_else(|| radians(&symbol, dimension))?;
        Some(Self {
            symbol,
            dimension,
            size,
        })
    }
    /// The base unit of a dimension: s, m, eV, eV/c^2, eV/c, c, deg, mm; empty for a plain number.
    pub fn base(dimension: Dimension) -> Self {
        let symbol = match dimension.energy_suffix() {
            Some(suffix) => format!("eV{suffix}"),
            None => dimension.rows().first().map_or("", |r| r.0).to_owned(),
        };
        Self {
            symbol,
            dimension,
            size: Number::integer(1),
        }
    }
    /// The length that light goes in this unit of time (or `None` for another dimension): symbol `c ns`.
    pub fn light_way(&self) -> Option<Self> {
        (self.dimension == Dimension::Time).then(|| Self {
            symbol: format!("c {}", self.symbol),
            dimension: Dimension::Length,
            size: self.size.times(&Number::scaled(C, 1, 0)),
        })
    }
    /// This unit of energy as one of another energy-like dimension: `MeV` -> `MeV/c` or `MeV/c^2`, size unchanged.
    /// Any other unit comes back as it is.
    pub fn for_dimension(&self, dimension: Dimension) -> Self {
        let stem = energy_stem(&self.symbol);
        match (dimension.energy_suffix(), find(Dimension::Energy, stem)) {
            (Some(suffix), Some(size)) => Self {
                symbol: format!("{stem}{suffix}"),
                dimension,
                size,
            },
            _ => self.clone(),
        }
    }
    /// A factor: how many of `other` one of this is. Exactly 1 for units of one size.
    pub fn in_terms_of(&self, other: &Self) -> Number {
        if self.size == other.size {
            return Number::integer(1);
        }
        self.size.over(&other.size)
    }
    /// As LaTeX math: `\mathrm{MeV}/c`, `c\,\mathrm{ns}`, `\mathrm{km}/\mathrm{s}`, `^{\circ}`.
    pub fn latex(&self) -> String {
        self.symbol
            .split('/')
            .map(|part| {
                part.split(' ')
                    .map(latex_symbol)
                    .collect::<Vec<_>>()
                    .join(r"\,")
            })
            .collect::<Vec<_>>()
            .join("/")
    }
}

/// The dimension of a symbol, whichever it is.
pub(super) fn dimension_of(symbol: &str) -> Option<Dimension> {
    Dimension::ALL
        .into_iter()
        .find(|&d| Unit::named(symbol, d).is_some())
}

/// The unit that someone who wrote `symbol` probably meant.
pub(super) fn probably(symbol: &str, wanted: Dimension) -> Option<String> {
    let suffix = wanted.energy_suffix();
    let stem = if suffix.is_some() {
        energy_stem(symbol)
    } else {
        symbol
    };
    let energies = if suffix.is_some() { ENERGIES } else { &[] };
    let known = || energies.iter().chain(wanted.rows()).map(|r| r.0);
    let near = known()
        .find(|k| k.eq_ignore_ascii_case(stem))
        .or_else(|| crate::fault::nearest(stem, known().filter(|k| k.len() > 1)))?;
    let tail = if find(Dimension::Energy, near).is_some() {
        &symbol[stem.len()..]
    } else {
        ""
    };
    let meant = format!("{near}{tail}");
    Unit::named(&meant, wanted).map(|_| meant)
}

/// One spelling for each unit, single spaces.
fn ascii(symbol: &str) -> String {
    let plain = symbol
        .replace(['\u{b5}', '\u{3bc}'], "u")
        .replace('\u{b2}', "^2")
        .replace('\u{b0}', "deg");
    let spaced = plain.split_whitespace().collect::<Vec<_>>().join(" ");
    spaced
        .replace(" /", "/")
        .replace("/ ", "/")
        .replace("/c2", "/c^2")
}

fn find(dimension: Dimension, symbol: &str) -> Option<Number> {
    let row = dimension.rows().iter().find(|r| r.0 == symbol)?;
    Some(Number::scaled(row.1, row.2, row.3))
}

/// `MeV` of `MeV/c^2` and of `MeV/c`.
fn energy_stem(symbol: &str) -> &str {
    symbol
        .strip_suffix("/c^2")
        .or_else(|| symbol.strip_suffix("/c"))
        .unwrap_or(symbol)
}

fn energy_like(symbol: &str, dimension: Dimension) -> Option<Number> {
    let suffix = dimension.energy_suffix()?;
    find(
        Dimension::Energy,
        symbol.strip_suffix(suffix).unwrap_or(symbol),
    )
}

fn light_way_size(symbol: &str, dimension: Dimension) -> Option<Number> {
    let time = symbol.strip_prefix("c ")?;
    let size = find(Dimension::Time, time).filter(|_| dimension == Dimension::Length)?;
    Some(size.times(&Number::scaled(C, 1, 0)))
}

fn radians(symbol: &str, dimension: Dimension) -> Option<Number> {
    let size = match symbol {
        "rad" => 180.0 / PI,
        "mrad" => 0.18 / PI,
        _ => return None,
    };
    (dimension == Dimension::Angle).then_some(Number::Real(size))
}

fn latex_symbol(symbol: &str) -> String {
    match symbol {
        "c" => "c".to_owned(),
        "c^2" => "c^{2}".to_owned(),
        "deg" => r"^{\circ}".to_owned(),
        "us" => r"\mu\mathrm{s}".to_owned(),
        "um" => r"\mu\mathrm{m}".to_owned(),
        "" => String::new(),
        _ => format!(r"\mathrm{{{symbol}}}"),
    }
}
