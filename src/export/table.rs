//! The ledger as JSON and as text aligned for reading.

use std::fmt::Write as _;

use crate::ledger::{Align, Column, Ledger, Row, Table, tables};
use crate::quantity::significant;

/// As JSON, numbers at full precision: the shortest text that reads back to the same f64.
pub fn json(ledger: &Ledger) -> Vec<u8> {
    let mut bytes = serde_json::to_vec_pretty(ledger).unwrap_or_default();
    bytes.push(b'\n');
    bytes
}

/// As aligned text: 6 significant digits or what an uncertainty allows, units in the heads.
pub fn text(ledger: &Ledger) -> Vec<u8> {
    let mut out = String::new();
    let frame = &ledger.frame;
    let name = frame
        .name
        .as_ref()
        .map_or(String::new(), |name| format!(" {name}"));
    let direction = if frame.direction == 0.0 {
        String::new()
    } else {
        format!(", direction {} deg", significant(frame.direction, 6))
    };
    line(
        &mut out,
        &format!(
            "frame{name}: rapidity {}, beta {}, gamma {}{direction}",
            significant(frame.rapidity, 6),
            significant(frame.beta, 6),
            significant(frame.gamma, 6),
        ),
    );
    for table in tables(ledger) {
        out.push('\n');
        lines(&mut out, &table);
    }
    out.into_bytes()
}

fn line(out: &mut String, text: &str) {
    let _infallible = writeln!(out, "{}", text.trim_end());
}

fn head(column: &Column) -> String {
    if column.unit.is_empty() {
        column.head.clone()
    } else {
        format!("{} / {}", column.head, bracketed(&column.unit))
    }
}

/// A quotient after a solidus is bracketed: `px / (MeV/c)`.
fn bracketed(unit: &str) -> String {
    if unit.contains('/') || unit.contains(' ') {
        format!("({unit})")
    } else {
        unit.to_owned()
    }
}

/// The table with its numbers padded behind, up to the most decimals of their column.
fn aligned(table: &Table) -> Table {
    let mut table = table.clone();
    for (c, column) in table.columns.iter().enumerate() {
        if column.align == Align::Left {
            continue;
        }
        let numbers = table
            .rows
            .iter()
            .filter_map(|r| r.cells.get(c))
            .filter(|c| c.value.is_some());
        let most = numbers.map(|cell| decimals(&cell.text)).max().unwrap_or(0);
        for cell in table.rows.iter_mut().filter_map(|r| r.cells.get_mut(c)) {
            let short = most - decimals(&cell.text).min(most);
            if cell.value.is_some() && !cell.text.contains('e') {
                cell.text.push_str(&" ".repeat(short));
            }
        }
    }
    table
}

/// Characters from the decimal sign on: numbers with fewer are moved left, so that the signs stand in one line.
fn decimals(text: &str) -> usize {
    text.find('.').map_or(0, |dot| text.len() - dot)
}

fn lines(out: &mut String, table: &Table) {
    let table = &aligned(table);
    let heads: Vec<String> = table.columns.iter().map(head).collect();
    let width = |c: usize| {
        let cells = table
            .rows
            .iter()
            .filter_map(|r| r.cells.get(c))
            .map(|c| c.text.chars().count());
        cells.chain([heads[c].chars().count()]).max().unwrap_or(0)
    };
    let widths: Vec<usize> = (0..heads.len()).map(width).collect();
    let rule = "-".repeat(widths.iter().sum::<usize>() + 2 * widths.len().saturating_sub(1));
    let set = |texts: &mut dyn Iterator<Item = &str>| -> String {
        let mut parts = Vec::new();
        for ((text, column), width) in texts.zip(&table.columns).zip(&widths) {
            let pad = " ".repeat(width.saturating_sub(text.chars().count()));
            parts.push(match column.align {
                Align::Left => format!("{text}{pad}"),
                Align::Right => format!("{pad}{text}"),
            });
        }
        parts.join("  ")
    };
    line(out, &set(&mut heads.iter().map(String::as_str)));
    line(out, &rule);
    for Row {
        cells,
        rule_above,
        object: _,
        is_sum: _,
    } in &table.rows
    {
        if *rule_above {
            line(out, &rule);
        }
        line(out, &set(&mut cells.iter().map(|c| c.text.as_str())));
    }
    for note in &table.notes {
        line(out, note);
    }
}
