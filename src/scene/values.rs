//! Reading values: numbers, strings, words, lists, pairs. A reader returns `None` when it has noted a fault.

use super::faults::Faults;
use super::literal::{self, is_string, shorten};
use super::tree::{Entry, Shape, Value};
use crate::fault::nearest;
use crate::quantity::Typed;

/// The longest label or title, bytes.
pub(super) const LABEL: usize = 1000;

/// A number as typed.
pub(super) fn number<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Typed> {
    if value.shape() != Shape::Leaf {
        let mend = if value.word().starts_with(|c: char| c.is_ascii_digit()) {
            format!("write it in quotes: \"{}\"", shorten(value.raw()))
        } else {
            "write a number, or a string such as \"3/5\"".to_owned()
        };
        faults.unlike(value, "a number", mend);
        return None;
    }
    if is_string(value.raw()) {
        return text(value, faults).map(Typed::Text);
    }
    match literal::number(value.raw()) {
        Ok(digits) => Some(Typed::Bare(digits.to_owned())),
        Err(fault) => {
            faults.literal(value, fault);
            None
        }
    }
}

/// A string's contents.
pub(super) fn text<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<String> {
    if value.shape() != Shape::Leaf || !is_string(value.raw()) {
        faults.unlike(value, "a string", "write it in quotes: \"..\"");
        return None;
    }
    match literal::string(value.raw()) {
        Ok(contents) => Some(contents),
        Err(fault) => {
            faults.literal(value, fault);
            None
        }
    }
}

/// A string of at most 1,000 bytes.
pub(super) fn short_text<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<String> {
    let contents = text(value, faults)?;
    if contents.len() > LABEL {
        let what = format!("it has {} bytes, {LABEL} are the most", contents.len());
        faults.add(value.start(), what, "shorten it");
        return None;
    }
    Some(contents)
}

/// `true` or `false`.
pub(super) fn truth<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<bool> {
    one_of(value, faults, &[("true", true), ("false", false)])
}

/// A whole number, bare or as a string.
pub(super) fn whole<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<i32> {
    let typed = number(value, faults)?;
    let (Typed::Bare(digits) | Typed::Text(digits)) = &typed;
    let whole = digits.parse().ok();
    if whole.is_none() {
        faults.unlike(value, "a whole number", "write one such as 1 or -2");
    }
    whole
}

/// One of some bare words.
pub(super) fn one_of<'a, T: Copy>(
    value: Value<'a>,
    faults: &mut Faults<'a>,
    words: &[(&str, T)],
) -> Option<T> {
    let found = words.iter().find(|(word, _)| *word == value.word());
    match found {
        Some(&(word, meaning)) => bare_word(value, word, faults).map(|()| meaning),
        None => unknown(value, "it", words.iter().map(|(word, _)| *word), faults),
    }
}

/// Holds a word to standing alone, without brackets.
pub(super) fn bare_word<'a>(value: Value<'a>, word: &str, faults: &mut Faults<'a>) -> Option<()> {
    if value.shape() == Shape::Leaf {
        return Some(());
    }
    let what = format!("`{word}` stands alone, without brackets");
    faults.add(value.start(), what, "delete the brackets");
    None
}

/// Notes that a word is none of those known, and names them.
pub(super) fn unknown<'a, 'w, T>(
    value: Value<'a>,
    what: &str,
    words: impl Iterator<Item = &'w str> + Clone,
    faults: &mut Faults<'a>,
) -> Option<T> {
    let word = value.word();
    let mend = match nearest(word.trim_matches('"'), words.clone()) {
        Some(near) if is_string(word) => format!("write `{near}` without quotes"),
        Some(near) => format!("did you mean `{near}`?"),
        None => format!("write one of {}", listed(words)),
    };
    let said = if word.is_empty() || is_string(word) {
        let begins = shorten(value.raw());
        format!("{what} begins with a word, not with `{begins}`")
    } else {
        format!("`{}` is not known here", shorten(word))
    };
    faults.add(value.start(), said, mend);
    None
}

pub(super) fn listed<'w>(words: impl Iterator<Item = &'w str>) -> String {
    let quoted: Vec<String> = words.map(|word| format!("`{word}`")).collect();
    quoted.join(", ")
}

/// The values of a list `[ .. ]`.
pub(super) fn list<'a, T>(
    value: Value<'a>,
    faults: &mut Faults<'a>,
    read: impl Fn(Value<'a>, &mut Faults<'a>) -> Option<T>,
) -> Option<Vec<T>> {
    if value.shape() != Shape::Square {
        faults.unlike(value, "a list", "write `[ .. ]` with commas between");
        return None;
    }
    plain_items(value, faults, read)
}

/// Strings in a list.
pub(super) fn texts<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Vec<String>> {
    list(value, faults, text)
}

/// Two values in round brackets.
pub(super) fn pair<'a, A, B>(
    value: Value<'a>,
    faults: &mut Faults<'a>,
    first: impl Fn(Value<'a>, &mut Faults<'a>) -> Option<A>,
    second: impl Fn(Value<'a>, &mut Faults<'a>) -> Option<B>,
) -> Option<(A, B)> {
    let values = if value.shape() == Shape::Round && value.word().is_empty() {
        plain_items(value, faults, |v, _| Some(v))?
    } else {
        Vec::new()
    };
    if let [a, b] = values[..] {
        let (a, b) = (first(a, faults), second(b, faults));
        return Some((a?, b?));
    }
    faults.unlike(value, "a pair", "write two values: `( .. , .. )`");
    None
}

/// Values without keys, all of them sound.
fn plain_items<'a, T>(
    value: Value<'a>,
    faults: &mut Faults<'a>,
    read: impl Fn(Value<'a>, &mut Faults<'a>) -> Option<T>,
) -> Option<Vec<T>> {
    let mut all = Vec::with_capacity(value.len());
    let mut sound = true;
    // What follows a value without a comma is its fault, not one of its own.
    let mut torn_off = false;
    for (entry, next) in with_next(value) {
        let torn = std::mem::replace(&mut torn_off, entry.item.comma.is_none());
        let punctuated = punctuation(entry, next, faults);
        let item = match (entry.key(), entry.value()) {
            (None, Some(_)) if torn => None,
            (None, Some(item)) => read(item, faults),
            (Some(key), _) => {
                let what = "a list has no names in it";
                faults.add(key.start(), what, "write the value alone");
                None
            }
            (None, None) => None,
        };
        sound &= punctuated.is_some() && item.is_some();
        all.extend(item);
    }
    sound.then_some(all)
}

/// The items of a value, each with the one behind it.
pub(super) fn with_next(value: Value<'_>) -> impl Iterator<Item = (Entry<'_>, Option<Entry<'_>>)> {
    let nexts = value.items().skip(1).map(Some).chain([None]);
    value.items().zip(nexts)
}

/// Holds an item to having a value, and a comma behind it if there is another.
pub(super) fn punctuation<'a>(
    entry: Entry<'a>,
    next: Option<Entry<'a>>,
    faults: &mut Faults<'a>,
) -> Option<()> {
    if entry.value().is_none() {
        match entry.key_text() {
            Some(key) => {
                let what = format!("`{}` has no value", shorten(key));
                faults.add(entry.start(), what, "write one behind the colon");
            }
            None => faults.add(
                entry.start(),
                "nothing stands before this comma",
                "delete it",
            ),
        }
        return None;
    }
    let Some(next) = next.filter(|_| entry.item.comma.is_none()) else {
        return Some(());
    };
    let digits = entry.value().filter(|v| literal::number(v.raw()).is_ok());
    match (digits, next.key(), next.value()) {
        (Some(digits), None, Some(unit)) if !is_string(unit.raw()) => {
            let typed = shorten(&format!("{} {}", digits.raw(), unit.raw()));
            let what = format!("`{typed}` is not a number");
            faults.add(
                digits.start(),
                what,
                format!("write it in quotes: \"{typed}\""),
            );
        }
        _ => faults.add(next.start(), "a comma is missing before this", "write one"),
    }
    None
}
