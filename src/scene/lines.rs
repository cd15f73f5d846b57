//! Byte offsets as lines and columns.

use crate::fault::Place;

/// Bytes between two marks.
const STRIDE: usize = 1024;

/// Marks along a text, so that a place is found without counting from its start, however long its lines.
#[derive(Clone, Debug, Default)]
pub(super) struct Lines {
    marks: Vec<(usize, Place)>,
}

impl Lines {
    /// Counts a text.
    pub(super) fn new(text: &str) -> Self {
        let mut marks = vec![(0, START)];
        let mut place = START;
        for (at, c) in text.char_indices() {
            if at >= marks.len() * STRIDE {
                marks.push((at, place));
            }
            place = after(place, c, text.as_bytes().get(at + 1));
        }
        Self { marks }
    }

    /// The place of a byte of the same text.
    pub(super) fn place(&self, text: &str, at: usize) -> Place {
        let mark = self.marks.partition_point(|&(byte, _)| byte <= at).max(1) - 1;
        let (from, start) = self.marks.get(mark).copied().unwrap_or((0, START));
        count(start, text, from, at)
    }
}

/// The line of a byte, from 1, by counting.
pub(super) fn line_of(text: &str, at: usize) -> usize {
    count(START, text, 0, at).line
}

/// The first place of a text.
const START: Place = Place { line: 1, column: 1 };

fn count(mut place: Place, text: &str, from: usize, to: usize) -> Place {
    for (i, c) in text[from..].char_indices() {
        if from + i >= to {
            break;
        }
        place = after(place, c, text.as_bytes().get(from + i + 1));
    }
    place
}

/// The place after a character; of `\r\n` only the second ends the line.
fn after(place: Place, c: char, next: Option<&u8>) -> Place {
    if c == '\n' || (c == '\r' && next != Some(&b'\n')) {
        return Place {
            line: place.line + 1,
            column: 1,
        };
    }
    Place {
        column: place.column + 1,
        ..place
    }
}
