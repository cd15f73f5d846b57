//! Plain names set upright.

use super::layout::{self, Label};
use super::symbols;

/// Letters of Latin scripts that both the faces and LaTeX build from a letter and an accent, or have.
const ACCENTED: &str = "ÀÁÂÃÄÅÆÇÈÉÊËÌÍÎÏÑÒÓÔÕÖØÙÚÛÜÝßàáâãäåæçèéêëìíîïñòóôõöøùúûüýÿĆćČčĎĚěĞğİıŃńŇňŐőŘřŚśŞşŠšŤŮůŰűŹźŻżŽž";

/// The longest name that is set, characters; what follows is left out.
const LONGEST: usize = 200;

/// Whether a character beyond ASCII may stand in text.
pub(super) fn is_accented(character: char) -> bool {
    ACCENTED.contains(character)
}

/// Sets plain upright text (an object's name); characters no face has become a replacement box, so it never fails.
/// The label's `source` is the LaTeX of it: `\text{..}` with special characters escaped.
pub fn plain(text: &str) -> Label {
    let shown: String = text
        .chars()
        .filter(|letter| letter.is_whitespace() || !letter.is_control())
        .collect();
    let words = || shown.split_whitespace().collect::<Vec<_>>().join(" ");
    let latex = latex(&shown);
    layout::set(&latex, words(), words())
        .or_else(|_| layout::set(r"\square", words(), words()))
        .unwrap_or_else(|_| Label {
            source: latex,
            pieces: Vec::new(),
            words: words(),
            letters: words(),
            width: 0.0,
            height: 0.0,
            depth: 0.0,
            ink: kurbo::Rect::ZERO,
        })
}

/// The LaTeX of plain text: runs of `\text{..}` and, between them, symbols.
fn latex(text: &str) -> String {
    let mut found = String::new();
    let mut open = false;
    let mut space = true;
    for character in text.chars().take(LONGEST) {
        let blank = character.is_whitespace();
        if blank && space {
            continue;
        }
        space = blank;
        let (upright, spelled) = spelled(character);
        if upright && !open {
            found.push_str(r"\text{");
        } else if !upright && open {
            found.push('}');
        }
        open = upright;
        found.push_str(&spelled);
    }
    if open {
        found.push('}');
    }
    found
}

/// One character as LaTeX, and whether it belongs inside `\text`.
fn spelled(character: char) -> (bool, String) {
    match character {
        '#' | '$' | '%' | '&' | '_' | '{' | '}' => (true, format!("\\{character}")),
        // Braces keep two of them from becoming one dash.
        '-' => (true, "{-}".into()),
        '<' | '>' | '|' | '"' | '\\' | '^' | '~' => (false, math_sign(character).into()),
        '\'' | '\u{2019}' => (true, "'".into()),
        blank if blank.is_whitespace() => (true, " ".into()),
        '`' => (true, "`".into()),
        plain if plain.is_ascii_graphic() || is_accented(plain) => (true, plain.to_string()),
        '\u{2032}' => (false, "{}'".into()),
        '\u{2212}' => (false, "{-}".into()),
        '\u{B0}' => (false, r"{}^{\circ}".into()),
        other => (false, sign(other)),
    }
}

fn sign(character: char) -> String {
    if let Some((sign, plain)) = symbols::script(character) {
        return format!("{{}}{sign}{{{plain}}}");
    }
    match symbols::of_char(character) {
        Some(symbol) => format!("{{\\{}}}", symbol.0),
        None => r"\square{}".into(),
    }
}

fn math_sign(character: char) -> &'static str {
    match character {
        '<' => "{<}",
        '>' => "{>}",
        '|' => "{|}",
        '"' => "{}''",
        '\\' => r"{\backslash}",
        '^' => r"\hat{\ }",
        _ => r"{\sim}",
    }
}
