//! Where a table's columns stand: pure functions of its texts and the width there is.

use crate::ledger::{Align, Column, Table};
use crate::quantity::grouped;

/// The narrowest and the widest a column of numbers is made for its own sake.
const NUMBER: (f32, f32) = (66.0, 96.0);
/// Names are not pushed further from their numbers than this.
const NAMES: f32 = 250.0;
/// Between columns.
const GAP: f32 = 18.0;
/// Between words and numbers at least.
const WORDS_GAP: f32 = 24.0;

/// A column's place from the table's left end.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Place {
    pub(super) left: f32,
    pub(super) right: f32,
    pub(super) align: Align,
}

/// All columns' places.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Columns {
    pub(super) places: Vec<Place>,
    /// How many of them hold words.
    pub(super) words: usize,
}

/// A column's head with its unit: "E / MeV", "px / (MeV/c)".
pub(super) fn head(column: &Column) -> String {
    let head = match column.head.as_str() {
        "beta" => "β",
        "gamma" => "γ",
        head => head,
    }
    .replace("^2", "²");
    let unit = column.unit.replace("^2", "²");
    if unit.is_empty() {
        head
    } else if unit.contains(['/', ' ']) {
        format!("{head} / ({unit})")
    } else {
        format!("{head} / {unit}")
    }
}

impl Columns {
    /// Numbers stand at the right, as wide as the widest of them and at least 66; 72 to 86 where there is room. The
    /// rest goes to the names.
    pub(super) fn new(table: &Table, room: f32, measure: impl Fn(&str, bool) -> f32) -> Self {
        let natural: Vec<f32> = table
            .columns
            .iter()
            .enumerate()
            .map(|(i, column)| {
                let cells = table
                    .rows
                    .iter()
                    .filter_map(|r| Some((r.cells.get(i)?, r.is_sum)));
                let widest = cells
                    .map(|(cell, strong)| match column.align {
                        Align::Left => measure(&cell.text, true),
                        Align::Right => measure(&grouped(&cell.text), strong),
                    })
                    .fold(0.0, f32::max);
                widest.max(measure(&head(column), false) * 0.93).ceil()
            })
            .collect();
        let words = table
            .columns
            .iter()
            .take_while(|c| c.align == Align::Left)
            .count();
        let count = table.columns.len() - words;
        let numbers: f32 = natural[words..].iter().map(|w| w.max(NUMBER.0) + GAP).sum();
        let names: f32 = natural[..words].iter().map(|w| w + GAP).sum::<f32>() - GAP + WORDS_GAP;
        let spare = (room - numbers - names).max(0.0);
        let most = names.max(NAMES);
        let more = if count == 0 {
            0.0
        } else {
            (spare / count as f32).min(NUMBER.1 - NUMBER.0)
        };
        let widths: Vec<f32> = natural[words..]
            .iter()
            .map(|w| w.max((NUMBER.0 + more).max(NUMBER.0)))
            .collect();
        let total: f32 = widths.iter().map(|w| w + GAP).sum();
        // The last column keeps room for the sign at its right.
        let start = (room - total).clamp(names, most);
        let mut places = Vec::new();
        let mut x = 0.0;
        for (i, width) in natural[..words].iter().enumerate() {
            let last = i + 1 == words;
            let right = if last { start - WORDS_GAP } else { x + width };
            places.push(Place {
                left: x,
                right: right.max(x),
                align: Align::Left,
            });
            x += width + GAP;
        }
        let mut x = start;
        for width in widths {
            places.push(Place {
                left: x,
                right: x + width,
                align: Align::Right,
            });
            x += width + GAP;
        }
        Self { places, words }
    }

    /// Where the first column of numbers begins.
    pub(super) fn numbers_from(&self) -> f32 {
        self.places.get(self.words).map_or(0.0, |p| p.left)
    }

    /// Where the last column ends.
    pub(super) fn end(&self) -> f32 {
        self.places.last().map_or(0.0, |p| p.right)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ledger::{Cell, Row};

    fn table(rows: &[(&str, &[&str])]) -> Table {
        let column = |head: &str, align| Column {
            head: head.to_owned(),
            unit: "MeV/c^2".to_owned(),
            align,
            invariant: false,
        };
        let numbers = rows.first().map_or(0, |r| r.1.len());
        let mut columns = vec![column("particle", Align::Left)];
        columns.extend((0..numbers).map(|_| column("m", Align::Right)));
        let cell = |text: &&str| Cell {
            value: None,
            text: (*text).to_owned(),
        };
        let rows = rows
            .iter()
            .map(|(name, numbers)| Row {
                object: None,
                is_sum: false,
                rule_above: false,
                cells: std::iter::once(name).chain(*numbers).map(cell).collect(),
            })
            .collect();
        Table {
            name: "particles",
            columns,
            rows,
            notes: Vec::new(),
        }
    }

    fn measure(text: &str, _: bool) -> f32 {
        text.chars().count() as f32 * 7.0
    }

    #[test]
    fn columns_never_overlap_and_end_before_the_edge() {
        let table = table(&[(
            "a rather long name of a particle",
            &["1234.567890", "-0.5", "12.25"],
        )]);
        for room in [300.0, 640.0, 1200.0] {
            let columns = Columns::new(&table, room, measure);
            for pair in columns.places.windows(2) {
                assert!(pair[0].right + 17.0 <= pair[1].left, "{room}: {pair:?}");
            }
            if room > 700.0 {
                assert!(columns.end() + GAP <= room + 0.5, "{room}");
            }
        }
    }

    #[test]
    fn a_column_is_at_least_as_wide_as_its_widest_number() {
        let table = table(&[("x", &["123456789.123456"])]);
        let columns = Columns::new(&table, 400.0, measure);
        let place = columns.places[1];
        assert!(place.right - place.left >= measure(&grouped("123456789.123456"), false));
    }

    #[test]
    fn heads_carry_their_units() {
        let column = |head: &str, unit: &str| Column {
            head: head.to_owned(),
            unit: unit.to_owned(),
            align: Align::Right,
            invariant: false,
        };
        assert_eq!(head(&column("E", "MeV")), "E / MeV");
        assert_eq!(head(&column("m", "MeV/c^2")), "m / (MeV/c²)");
        assert_eq!(head(&column("x", "c ns")), "x / (c ns)");
        assert_eq!(head(&column("beta", "")), "β");
    }
}
