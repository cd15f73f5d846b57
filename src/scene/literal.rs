//! Strings and numbers as they stand in the text.

/// Why a string or a number does not read.
#[derive(Debug, PartialEq, Eq)]
pub(super) struct LiteralFault {
    /// Bytes from its start.
    pub(super) at: usize,
    pub(super) what: String,
    pub(super) mend: String,
}

/// The longest bare number, bytes.
const NUMBER: usize = 256;

/// Whether a leaf is a string: `"..."`, `r"..."`, `r#"..."#`.
pub(super) fn is_string(raw: &str) -> bool {
    let body = raw.strip_prefix('r').map(|r| r.trim_start_matches('#'));
    body.unwrap_or(raw).starts_with('"')
}

/// A string between its quotes; escaped or raw.
enum Quoted<'a> {
    Escaped(&'a str),
    Raw(&'a str),
}

/// A string's contents as written, and how many bytes stand before them.
fn quoted(raw: &str) -> (usize, Quoted<'_>) {
    if let Some(rest) = raw.strip_prefix('r') {
        let hashes = rest.len() - rest.trim_start_matches('#').len();
        let open = hashes + 2;
        return (open, Quoted::Raw(&raw[open..raw.len() - hashes - 1]));
    }
    (1, Quoted::Escaped(&raw[1..raw.len() - 1]))
}

/// The contents of a string, escapes resolved.
pub(super) fn string(raw: &str) -> Result<String, LiteralFault> {
    match quoted(raw) {
        (_, Quoted::Raw(contents)) => Ok(contents.to_owned()),
        (_, Quoted::Escaped(contents)) if !contents.contains('\\') => Ok(contents.to_owned()),
        _ => ron::from_str(raw).map_err(|_spanless| bad_escape(raw)),
    }
}

/// Finds the first escape that ron refuses. Its own position is counted differently for each kind of escape.
fn bad_escape(raw: &str) -> LiteralFault {
    let contents = &raw[1..raw.len() - 1];
    let mut at = 0;
    while at < contents.len() {
        let length = unit_length(&contents[at..]);
        let unit = &contents[at..at + length];
        if ron::from_str::<String>(&format!("\"{unit}\"")).is_err() {
            return LiteralFault {
                at: at + 1,
                what: format!("`{unit}` is no escape"),
                mend: "write a backslash twice to mean one, or write r\"...\"".to_owned(),
            };
        }
        at += length;
    }
    LiteralFault {
        at: 0,
        what: "the string does not read".to_owned(),
        mend: "write a backslash twice to mean one".to_owned(),
    }
}

/// Bytes of the first character of an escaped string's contents, as written.
fn unit_length(contents: &str) -> usize {
    let mut chars = contents.chars();
    let first = chars.next().map_or(0, char::len_utf8);
    if !contents.starts_with('\\') {
        return first;
    }
    let length = match chars.next() {
        // `\xC3\xA9` is one character in two bytes: the first byte tells how many there are.
        Some('x') => match contents.get(2..4).map(|hex| u8::from_str_radix(hex, 16)) {
            Some(Ok(0xC0..0xE0)) => 8,
            Some(Ok(0xE0..0xF0)) => 12,
            Some(Ok(0xF0..=0xFF)) => 16,
            _ => 4,
        },
        Some('u') => contents.find('}').map_or(2, |end| end + 1),
        Some(c) => 1 + c.len_utf8(),
        None => 1,
    };
    let mut end = length.min(contents.len());
    while !contents.is_char_boundary(end) {
        end += 1;
    }
    end
}

/// Bytes from the start of a leaf to a character of it: of a string, to a character of its contents.
pub(super) fn advance(raw: &str, characters: usize) -> usize {
    if !is_string(raw) {
        return raw
            .char_indices()
            .nth(characters)
            .map_or(raw.len(), |(i, _)| i);
    }
    let (open, contents) = quoted(raw);
    let length = match contents {
        Quoted::Raw(text) => text
            .char_indices()
            .nth(characters)
            .map_or(text.len(), |(i, _)| i),
        Quoted::Escaped(text) => {
            let mut at = 0;
            for _ in 0..characters.min(text.len()) {
                at += unit_length(&text[at..]);
            }
            at
        }
    };
    open + length
}

/// Whether a bare text is a decimal number: sign, digits with at most one point, exponent.
fn is_decimal(raw: &str) -> bool {
    let unsigned = raw.strip_prefix(['+', '-']).unwrap_or(raw);
    let (mantissa, exponent) = match unsigned.split_once(['e', 'E']) {
        Some((mantissa, exponent)) => (mantissa, Some(exponent)),
        None => (unsigned, None),
    };
    let digits = |s: &str| s.bytes().all(|b| b.is_ascii_digit());
    let (whole, fraction) = mantissa.split_once('.').unwrap_or((mantissa, ""));
    let sound = digits(whole) && digits(fraction) && !(whole.is_empty() && fraction.is_empty());
    sound
        && exponent.is_none_or(|e| {
            let e = e.strip_prefix(['+', '-']).unwrap_or(e);
            !e.is_empty() && digits(e)
        })
}

/// A bare number as written, if it is finite and no longer than 256 bytes.
pub(super) fn number(raw: &str) -> Result<&str, LiteralFault> {
    let fault = |what: String, mend: String| LiteralFault { at: 0, what, mend };
    let shown = shorten(raw);
    if matches!(
        raw.trim_start_matches(['+', '-']),
        "inf" | "NaN" | "nan" | "infinity"
    ) {
        return Err(fault(
            format!("`{shown}` is not a finite number"),
            "write a finite one".to_owned(),
        ));
    }
    if !is_decimal(raw) {
        let mend = if raw.starts_with(|c: char| c.is_ascii_digit() || "+-.".contains(c)) {
            format!("write a decimal, or an expression in quotes: \"{shown}\"")
        } else {
            "write a number, or a string such as \"3/5\"".to_owned()
        };
        return Err(fault(format!("`{shown}` is not a number"), mend));
    }
    if raw.len() > NUMBER {
        return Err(fault(
            format!("a number of more than {NUMBER} characters"),
            "write fewer digits".to_owned(),
        ));
    }
    let mantissa = raw.split(['e', 'E']).next().unwrap_or(raw);
    let zero = !mantissa.contains(|c: char| ('1'..='9').contains(&c));
    match raw.parse::<f64>() {
        Ok(value) if value.is_finite() && (zero || value != 0.0) => Ok(raw),
        _ => Err(fault(
            format!("`{shown}` is beyond the range of numbers"),
            "write one between 1e-307 and 1e308".to_owned(),
        )),
    }
}

/// A text for a message: at most 40 characters, nothing in it that does not print.
pub(super) fn shorten(text: &str) -> String {
    let mut shown: String = text.chars().take(40).flat_map(printable).collect();
    if text.chars().nth(40).is_some() {
        shown.push_str("...");
    }
    shown
}

fn printable(c: char) -> impl Iterator<Item = char> {
    let escape = c.is_control() || (c.is_whitespace() && c != ' ');
    let (plain, escaped) = if escape {
        (None, Some(c.escape_default()))
    } else {
        (Some(c), None)
    };
    plain.into_iter().chain(escaped.into_iter().flatten())
}
