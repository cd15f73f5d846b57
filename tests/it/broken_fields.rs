//! Every field of every example broken in turn: the fault points at that value.

use std::fs;

use crate::program::{audit, examples};

/// What no field of a scene takes: a list that holds a list.
const BROKEN: &str = "[[]]";

/// The spans of all `key: value` values of a scene's text, whatever their depth; comments and strings are stepped over.
fn values(text: &str) -> Vec<(usize, usize)> {
    let bytes = text.as_bytes();
    let mut found = Vec::new();
    let mut i = 0;
    while i < bytes.len() {
        match bytes[i] {
            b'"' => {
                i = string_end(text, i);
                continue;
            }
            b'/' if bytes.get(i + 1) == Some(&b'/') => {
                i += text[i..].find('\n').unwrap_or(text.len() - i);
            }
            b':' => {
                let start = i + 1 + text[i + 1..].find(|c: char| !c.is_whitespace()).unwrap();
                found.push((start, value_end(text, start)));
            }
            _ => {}
        }
        i += 1;
    }
    found
}

/// Past the closing quote of the string that begins at `i`. The examples use no escaped quotes.
fn string_end(text: &str, i: usize) -> usize {
    i + 2 + text[i + 1..].find('"').unwrap()
}

fn value_end(text: &str, start: usize) -> usize {
    let bytes = text.as_bytes();
    let mut depth = 0;
    let mut i = start;
    loop {
        match bytes[i] {
            b'"' => {
                i = string_end(text, i);
                continue;
            }
            b'(' | b'[' | b'{' => depth += 1,
            b')' | b']' | b'}' | b',' if depth == 0 => return i,
            b')' | b']' | b'}' => depth -= 1,
            _ => {}
        }
        i += 1;
    }
}

fn place(text: &str, at: usize) -> (usize, usize) {
    let before = &text[..at];
    let line = before.matches('\n').count() + 1;
    let column = before.rsplit('\n').next().unwrap().chars().count() + 1;
    (line, column)
}

#[test]
fn a_broken_value_is_pointed_at() {
    for path in examples() {
        let text = fs::read_to_string(&path).unwrap();
        for (start, end) in values(&text) {
            let broken = format!("{}{BROKEN}{}", &text[..start], &text[end..]);
            let (code, lines) = audit(&broken);
            let what = &text[start..end.min(start + 60)];
            assert!(
                code > 0,
                "{}: {what} broken, but nothing is said",
                path.display()
            );
            let (line, column) = place(&text, start);
            let pointed = |said: &String| {
                let mut parts = said
                    .split(':')
                    .skip(1)
                    .map_while(|n| n.parse::<usize>().ok());
                parts.next() == Some(line)
                    && parts
                        .next()
                        .is_some_and(|c| (column..column + BROKEN.len()).contains(&c))
            };
            assert!(
                lines.iter().any(pointed),
                "{}: {what} broken at {line}:{column}, but this is said:\n{}",
                path.display(),
                lines.join("\n"),
            );
        }
    }
}
