//! Labels of objects and of the panel's own words, set once a sheet; labels that do not set become faults.

use std::collections::BTreeMap;
use std::fmt::Write as _;
use std::sync::Arc;

use crate::fault::{Fault, ObjectId};
use crate::label::{Label, plain, typeset};

/// Sets labels and keeps what is wrong with them.
#[derive(Debug, Default)]
pub(super) struct Names {
    set: BTreeMap<String, Arc<Label>>,
    words: BTreeMap<String, Arc<Label>>,
    /// Faults of labels, in the order of finding, each once.
    pub(super) faults: Vec<Fault>,
    /// Where in that list the faults of an object's field stand.
    by_field: BTreeMap<(ObjectId, String), Vec<usize>>,
}

impl Names {
    /// An object's label, or its name in upright text. One that does not set is a fault and stands as it was written.
    pub(super) fn of(&mut self, object: &ObjectId, label: Option<&str>) -> Arc<Label> {
        let Some(source) = label else {
            return self.word(&object.name);
        };
        if let Some(label) = self.set.get(source) {
            return label.clone();
        }
        match typeset(source) {
            Ok(label) => self.keep(source, label),
            Err(wrong) => {
                let fault = Fault::new(object.clone(), "label", wrong.what, wrong.mend);
                self.fault(fault.at(wrong.column));
                self.word(source)
            }
        }
    }

    /// LaTeX math of the plate's own.
    pub(super) fn math(&mut self, source: &str) -> Arc<Label> {
        if let Some(label) = self.set.get(source) {
            return label.clone();
        }
        match typeset(source) {
            Ok(label) => self.keep(source, label),
            Err(_) => self.word(source),
        }
    }

    /// Upright text.
    pub(super) fn word(&mut self, text: &str) -> Arc<Label> {
        self.words
            .entry(text.to_owned())
            .or_insert_with(|| Arc::new(plain(text)))
            .clone()
    }

    /// Keeps a fault, once.
    pub(super) fn fault(&mut self, fault: Fault) {
        let key = (fault.object.clone(), fault.field.clone());
        let known = self.by_field.entry(key).or_default();
        if !known.iter().any(|&i| self.faults[i] == fault) {
            known.push(self.faults.len());
            self.faults.push(fault);
        }
    }

    fn keep(&mut self, source: &str, label: Label) -> Arc<Label> {
        let label = Arc::new(label);
        self.set.insert(source.to_owned(), label.clone());
        label
    }
}

/// A number as LaTeX math: digits in threes from five on, powers of ten written out. `text` is plain ASCII, `1.5e-7`
/// at most.
pub(super) fn number(text: &str) -> String {
    let (mantissa, exponent) = text
        .split_once('e')
        .map_or((text, None), |(m, e)| (m, Some(e)));
    let (whole, rest) = mantissa
        .split_once('.')
        .map_or((mantissa, None), |(w, r)| (w, Some(r)));
    let mut out = String::new();
    let (sign, digits) = whole.strip_prefix('-').map_or(("", whole), |d| ("-", d));
    out.push_str(sign);
    out.push_str(&threes(digits, digits.len() % 3));
    if let Some(rest) = rest {
        out.push('.');
        out.push_str(&threes(rest, 0));
    }
    if let Some(exponent) = exponent {
        let _ = write!(out, r"\times 10^{{{exponent}}}");
    }
    out
}

fn threes(digits: &str, first: usize) -> String {
    if digits.len() < 5 {
        return digits.to_owned();
    }
    let mut out = String::new();
    for (i, digit) in digits.chars().enumerate() {
        if i > 0 && i % 3 == first {
            out.push_str(r"\,");
        }
        out.push(digit);
    }
    out
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_are_grouped_from_five_digits() {
        assert_eq!(number("-1234.5"), "-1234.5");
        assert_eq!(number("12345.67891"), r"12\,345.678\,91");
        assert_eq!(number("2.5e-9"), r"2.5\times 10^{-9}");
    }
}
