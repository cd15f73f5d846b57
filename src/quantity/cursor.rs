//! A place in a text, and the small pieces that are read there.

use super::function;

/// Characters and how many of them are read.
pub(super) struct Cursor {
    chars: Vec<char>,
    /// Characters before the one to come.
    pub(super) at: usize,
}

impl Cursor {
    pub(super) fn new(text: &str) -> Self {
        Self {
            chars: text.chars().collect(),
            at: 0,
        }
    }

    pub(super) fn peek(&self) -> Option<char> {
        self.chars.get(self.at).copied()
    }

    pub(super) fn blanks(&mut self) {
        self.take(char::is_whitespace);
    }

    /// Whether this character comes; it is read if it does.
    pub(super) fn skip(&mut self, c: char) -> bool {
        let found = self.peek() == Some(c);
        self.at += usize::from(found);
        found
    }

    /// A name, empty if none begins here.
    pub(super) fn name(&mut self) -> String {
        if self.peek().is_some_and(begins_name) {
            self.take(continues_name)
        } else {
            String::new()
        }
    }

    /// The name that begins here, not read yet.
    pub(super) fn name_ahead(&self) -> String {
        let rest = self.chars[self.at..].iter().copied();
        rest.take_while(|&c| continues_name(c)).collect()
    }

    /// Everything up to the sign of an uncertainty or the end, without blanks behind it.
    pub(super) fn unit(&mut self) -> String {
        let start = self.at;
        while self.at < self.chars.len() && self.spread_sign().is_none() {
            self.at += 1;
        }
        self.chars[start..self.at]
            .iter()
            .collect::<String>()
            .trim_end()
            .to_owned()
    }

    /// How many characters the sign of an uncertainty takes, if it comes.
    pub(super) fn spread_sign(&self) -> Option<usize> {
        let rest = self.chars[self.at..]
            .get(..3)
            .unwrap_or(&self.chars[self.at..]);
        match rest {
            ['\u{b1}', ..] => Some(1),
            ['+', '-' | '\u{2212}', ..] => Some(2),
            ['+', '/', '-' | '\u{2212}'] => Some(3),
            _ => None,
        }
    }

    /// Whether the `/` that comes belongs to the expression and not to a unit.
    pub(super) fn divides(&self) -> bool {
        let rest = self.chars[self.at + 1..]
            .iter()
            .copied()
            .skip_while(|c| c.is_whitespace());
        let name: String = rest.take_while(|&c| continues_name(c)).collect();
        !name.starts_with(begins_name)
            || function::constant(&name).is_some()
            || function::named(&name).is_some()
    }

    /// Digits, with thin spaces between them as in print.
    pub(super) fn digits(&mut self) -> String {
        let mut text = String::new();
        while let Some(c) = self.peek() {
            let next = self.chars.get(self.at + 1);
            let thin =
                matches!(c, '\u{2009}' | '\u{202f}') && next.is_some_and(char::is_ascii_digit);
            if c.is_ascii_digit() {
                text.push(c);
            } else if text.is_empty() || !thin {
                break;
            }
            self.at += 1;
        }
        text
    }

    /// The digits of `(13)`, if that comes.
    pub(super) fn bracketed_digits(&mut self) -> Option<String> {
        let rest = &self.chars[self.at..];
        let end = rest
            .iter()
            .position(|&c| c == ')')
            .filter(|_| rest.first() == Some(&'('))?;
        let digits: String = rest[1..end].iter().collect();
        if digits.is_empty() || !digits.bytes().all(|b| b.is_ascii_digit() || b == b'.') {
            return None;
        }
        self.at += end + 1;
        Some(digits)
    }

    /// `e-3`, if a digit follows; `eV` is left to the unit.
    pub(super) fn exponent(&mut self) -> String {
        let rest = &self.chars[self.at..];
        let signed = usize::from(matches!(rest.get(1), Some('+' | '-' | '\u{2212}')));
        let marked = matches!(rest.first(), Some('e' | 'E'));
        if !marked || !rest.get(1 + signed).is_some_and(char::is_ascii_digit) {
            return String::new();
        }
        let sign = if signed == 1 && rest[1] != '+' {
            "-"
        } else {
            ""
        };
        self.at += 1 + signed;
        format!("e{sign}{}", self.take(|c| c.is_ascii_digit()))
    }

    fn take(&mut self, wanted: impl Fn(char) -> bool) -> String {
        let taken: String = self.chars[self.at..]
            .iter()
            .copied()
            .take_while(|&c| wanted(c))
            .collect();
        self.at += taken.chars().count();
        taken
    }
}

/// Whether a name may begin with this; the degree sign and the percent sign count as names.
pub(super) fn begins_name(c: char) -> bool {
    c.is_alphabetic() || matches!(c, '\u{b0}' | '%')
}

fn continues_name(c: char) -> bool {
    begins_name(c) || c.is_ascii_digit() || c == '_'
}
