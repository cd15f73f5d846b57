//! Reading values and the fields of a form. A reader returns `None` when it has noted a fault.

use super::faults::Faults;
use super::literal::{self, is_string, shorten};
use super::tree::{Entry, Shape, Value};
use super::{Common, When};
use crate::fault::nearest;
use crate::quantity::Typed;

/// Fields any object may carry.
const COMMON: [&str; 3] = ["label", "look", "note"];
/// The longest label or title, bytes.
const LABEL: usize = 1000;

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

fn listed<'w>(words: impl Iterator<Item = &'w str>) -> String {
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
pub(super) fn with_next<'a>(
    value: Value<'a>,
) -> impl Iterator<Item = (Entry<'a>, Option<Entry<'a>>)> {
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

/// The fields of a form, by name.
pub(super) struct Form<'a> {
    value: Value<'a>,
    names: &'static [&'static str],
    found: Vec<Option<Value<'a>>>,
    sound: bool,
}

impl<'a> Form<'a> {
    /// Finds the fields of a form; `alone` is the one whose value may stand bare.
    pub(super) fn open(
        value: Value<'a>,
        names: &'static [&'static str],
        alone: Option<&'static str>,
        faults: &mut Faults<'a>,
    ) -> Self {
        let mut form = Self {
            value,
            names,
            found: vec![None; names.len()],
            sound: true,
        };
        match value.shape() {
            Shape::Leaf if !is_string(value.raw()) => return form,
            Shape::Round => {}
            Shape::Leaf | Shape::Square | Shape::Curly => {
                let mend = format!("write `( .. )` with {}", listed(names.iter().copied()));
                faults.unlike(value, "a form with named fields", mend);
                form.sound = false;
                return form;
            }
        }
        if let (Some(alone), Some(bare)) = (alone, value.bare()) {
            form.put(alone, bare);
            return form;
        }
        let object = faults.root.is_some_and(|root| root.id == value.id);
        let mut torn_off = false;
        for (entry, next) in with_next(value) {
            form.sound &= punctuation(entry, next, faults).is_some();
            // What follows a value without a comma is its fault, not one of its own.
            if !torn_off || entry.key().is_some() {
                form.field(entry, object, faults);
            }
            torn_off = entry.item.comma.is_none();
        }
        form
    }

    /// An anonymous form, without a word.
    pub(super) fn anonymous(
        value: Value<'a>,
        names: &'static [&'static str],
        faults: &mut Faults<'a>,
    ) -> Self {
        let mut form = Self::open(value, names, None, faults);
        if form.sound && !value.word().is_empty() {
            let mend = format!("write `( .. )` with {}", listed(names.iter().copied()));
            faults.unlike(value, "a form without a word before it", mend);
            form.sound = false;
        }
        form
    }

    fn put(&mut self, name: &str, value: Value<'a>) -> bool {
        let slot = self.names.iter().position(|known| *known == name);
        match slot {
            Some(i) if self.found[i].is_none() => self.found[i] = Some(value),
            _ => self.sound = false,
        }
        slot.is_some()
    }

    fn field(&mut self, entry: Entry<'a>, object: bool, faults: &mut Faults<'a>) {
        let Some(value) = entry.value() else {
            return;
        };
        let names = self.names.iter().copied();
        let Some(key) = entry.key() else {
            let mend = format!("write it behind its name: {}", listed(names));
            faults.add(value.start(), "a field without its name", mend);
            self.sound = false;
            return;
        };
        let name = key.raw();
        if object && COMMON.contains(&name) {
            return;
        }
        let before = self.names.iter().position(|known| *known == name);
        if before.is_some_and(|i| self.found[i].is_some()) {
            let what = format!("`{name}` stands here a second time");
            faults.add(key.start(), what, "delete one of them");
        }
        if !self.put(name, value) && !faults.full() {
            let common = COMMON.iter().copied().filter(|_| object);
            let mend = match nearest(name, names.clone().chain(common)) {
                Some(near) => format!("did you mean `{near}`?"),
                None => format!("the fields here are {}", listed(names)),
            };
            let what = format!("there is no field `{}` here", shorten(name));
            faults.add(key.start(), what, mend);
        }
    }

    fn get(&self, name: &str) -> Option<Value<'a>> {
        let slot = self.names.iter().position(|known| *known == name)?;
        self.found[slot]
    }

    /// Whether a field is there.
    pub(super) fn has(&self, name: &str) -> bool {
        self.get(name).is_some()
    }

    /// A field that must be there.
    pub(super) fn need<T>(
        &self,
        name: &str,
        faults: &mut Faults<'a>,
        read: impl Fn(Value<'a>, &mut Faults<'a>) -> Option<T>,
    ) -> Option<T> {
        match self.get(name) {
            Some(value) => read(value, faults),
            None => {
                if self.sound {
                    faults.missing(self.value, name, format!("write `{name}: ..`"));
                }
                None
            }
        }
    }

    /// A field that may be left out.
    #[expect(clippy::option_option, reason = "outer: sound; inner: there")]
    pub(super) fn may<T>(
        &self,
        name: &str,
        faults: &mut Faults<'a>,
        read: impl Fn(Value<'a>, &mut Faults<'a>) -> Option<T>,
    ) -> Option<Option<T>> {
        match self.get(name) {
            Some(value) => read(value, faults).map(Some),
            None => Some(None),
        }
    }

    /// `frame: ".."` or `rapidity: ..`, which say in which frame a thing is so.
    pub(super) fn when(&self, faults: &mut Faults<'a>) -> Option<When> {
        match (self.get("frame"), self.get("rapidity")) {
            (None, None) => Some(When::Base),
            (Some(frame), None) => text(frame, faults).map(When::Frame),
            (None, Some(rapidity)) => number(rapidity, faults).map(When::Rapidity),
            (Some(frame), Some(rapidity)) => {
                let later = frame.start().max(rapidity.start());
                let what = "`frame` and `rapidity` both say in which frame this is so";
                faults.add(later, what, "delete one of them");
                None
            }
        }
    }
}

/// Takes the fields any object may carry. What is wrong with them is a finding: the object is used without.
pub(super) fn common<'a>(root: Value<'a>, faults: &mut Faults<'a>) -> Common {
    let mut common = Common::default();
    if root.shape() != Shape::Round || root.bare().is_some() {
        return common;
    }
    for entry in root.items() {
        let (Some(key), Some(value)) = (entry.key(), entry.value()) else {
            continue;
        };
        let slot = match key.raw() {
            "label" => &mut common.label,
            "note" => &mut common.note,
            "look" => {
                let what = "`look` is not read by this version";
                faults.find(key.start(), what, "it is drawn as if it were not there");
                continue;
            }
            _ => continue,
        };
        if slot.is_some() {
            let what = format!("`{}` stands here a second time", key.raw());
            faults.find(key.start(), what, "delete one of them");
            continue;
        }
        let limit = if key.raw() == "label" {
            LABEL
        } else {
            usize::MAX
        };
        let contents = match value.shape() {
            Shape::Leaf if is_string(value.raw()) => literal::string(value.raw()),
            _ => Err(literal::LiteralFault {
                at: 0,
                what: format!("`{}` is a string", key.raw()),
                mend: "write it in quotes: \"..\"".to_owned(),
            }),
        };
        match contents {
            Ok(contents) if contents.len() <= limit => *slot = Some(contents),
            Ok(contents) => {
                let what = format!("it has {} bytes, {limit} are the most", contents.len());
                faults.find(value.start(), what, "shorten it");
            }
            Err(fault) => faults.find(value.start() + fault.at, fault.what, fault.mend),
        }
    }
    common
}
