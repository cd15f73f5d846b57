//! Tables of check values in `tests/facts`, each row with its source.

use std::collections::BTreeMap;
use std::path::Path;

/// One row: column name to text.
pub(crate) type Row = BTreeMap<String, String>;

/// The rows of `tests/facts/NAME`: a header line, then one row a line; fields may be quoted.
pub(crate) fn rows(name: &str) -> Vec<Row> {
    let path = Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("tests/facts")
        .join(name);
    let text = std::fs::read_to_string(&path)
        .unwrap_or_else(|error| panic!("{}: {error}", path.display()));
    let mut lines = text.lines().map(fields);
    let header = lines.next().expect("a header line");
    lines
        .map(|line| {
            assert_eq!(line.len(), header.len(), "{name}: {line:?}");
            header.iter().cloned().zip(line).collect()
        })
        .collect()
}

/// The row of that id.
pub(crate) fn row<'a>(rows: &'a [Row], id: &str) -> &'a Row {
    rows.iter()
        .find(|row| row["id"] == id)
        .unwrap_or_else(|| panic!("no row {id}"))
}

/// A binary64 written in hexadecimal, as `0x1.8p+1`.
pub(crate) fn hex(text: &str) -> f64 {
    let (sign, body) = match text.strip_prefix('-') {
        Some(rest) => (-1.0, rest),
        None => (1.0, text),
    };
    let body = body.strip_prefix("0x").expect("0x");
    let (mantissa, exponent) = body.split_once('p').expect("an exponent");
    let (whole, fraction) = mantissa.split_once('.').unwrap_or((mantissa, ""));
    let digits = u64::from_str_radix(&format!("{whole}{fraction}"), 16).expect("hex digits");
    let places = 4 * i32::try_from(fraction.len()).expect("few digits");
    let exponent: i32 = exponent.parse().expect("a decimal exponent");
    // Powers of two are exact; in two steps, so that neither leaves the range.
    let half = (exponent - places) / 2;
    sign * digits as f64 * power_of_two(half) * power_of_two(exponent - places - half)
}

fn power_of_two(exponent: i32) -> f64 {
    let factor = if exponent < 0 { 0.5 } else { 2.0 };
    (0..exponent.abs()).fold(1.0, |product, _| product * factor)
}

fn fields(line: &str) -> Vec<String> {
    let mut fields = vec![String::new()];
    let mut quoted = false;
    for c in line.chars() {
        match c {
            '"' => quoted = !quoted,
            ',' if !quoted => fields.push(String::new()),
            c => fields.last_mut().expect("a field").push(c),
        }
    }
    fields
}

#[test]
fn hexadecimal_numbers_read_exactly() {
    assert_eq!(hex("0x1.19799812dea11p-40"), 1e-12);
    assert_eq!(hex("-0x1.5e00000000000p+8"), -350.0);
    assert_eq!(hex("0x0.0p+0"), 0.0);
    assert_eq!(hex("0x1.56e1fc2f8f359p-997"), 1e-300);
}
