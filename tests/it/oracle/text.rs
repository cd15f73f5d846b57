//! A small reader of scene files: text to a tree, with no idea of what it means.

use std::iter::Peekable;
use std::str::Chars;

/// What stands in a scene.
#[derive(Clone, Debug, PartialEq)]
pub(crate) enum Tree {
    /// A quoted text.
    Text(String),
    /// A bare number or word.
    Word(String),
    /// `[a, b]`, or `(a, b)` without a name.
    List(Vec<Self>),
    /// `{"name": form}`.
    Map(Vec<(String, Self)>),
    /// `Name(field: value)`, `(field: value)` or `Name(value)`, whose one field is named "".
    Form(String, Vec<(String, Self)>),
}

impl Tree {
    pub(crate) fn read(text: &str) -> Self {
        let mut reader = Reader {
            rest: text.chars().peekable(),
        };
        let tree = reader.value();
        reader.space();
        assert!(reader.rest.peek().is_none(), "something follows the scene");
        tree
    }

    /// A field of a form or an entry of a map.
    pub(crate) fn get(&self, name: &str) -> Option<&Self> {
        match self {
            Self::Map(fields) | Self::Form(_, fields) => {
                fields.iter().find(|(n, _)| n == name).map(|(_, v)| v)
            }
            _ => None,
        }
    }

    pub(crate) fn need(&self, name: &str) -> &Self {
        self.get(name)
            .unwrap_or_else(|| panic!("no {name} in {self:?}"))
    }

    /// Entries of the list or map of that name; none where it is left out.
    pub(crate) fn entries(&self, name: &str) -> &[(String, Self)] {
        match self.get(name) {
            Some(Self::Map(entries)) => entries,
            None => &[],
            Some(other) => panic!("{name} is no map: {other:?}"),
        }
    }

    pub(crate) fn items(&self) -> &[Self] {
        match self {
            Self::List(items) => items,
            other => panic!("no list: {other:?}"),
        }
    }

    /// A text or a bare word.
    pub(crate) fn str(&self) -> &str {
        match self {
            Self::Text(text) | Self::Word(text) => text,
            other => panic!("no text: {other:?}"),
        }
    }

    /// The name of a form; a bare word is one too.
    pub(crate) fn name(&self) -> &str {
        match self {
            Self::Form(name, _) | Self::Word(name) => name,
            other => panic!("no form: {other:?}"),
        }
    }
}

impl std::fmt::Display for Tree {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        let list = |items: &[Self]| {
            let texts: Vec<String> = items.iter().map(ToString::to_string).collect();
            texts.join(", ")
        };
        match self {
            Self::Text(text) => write!(f, "\"{text}\""),
            Self::Word(word) => write!(f, "{word}"),
            Self::List(items) => write!(f, "[{}]", list(items)),
            Self::Map(entries) => {
                let each = entries
                    .iter()
                    .map(|(name, v)| format!("\"{name}\": {v},\n"));
                write!(f, "{{\n{}}}", each.collect::<String>())
            }
            Self::Form(name, fields) => {
                let each = fields.iter().map(|(field, v)| match field.as_str() {
                    "" => format!("{v}, "),
                    // The one pair in a scene.
                    "clock" => format!("clock: {}, ", pair(v)),
                    _ => format!("{field}: {v}, "),
                });
                write!(
                    f,
                    "{name}({})",
                    each.collect::<String>().trim_end_matches(", ")
                )
            }
        }
    }
}

fn pair(clock: &Tree) -> String {
    match clock {
        Tree::List(items) => format!("({}, {})", items[0], items[1]),
        reading => reading.to_string(),
    }
}

struct Reader<'a> {
    rest: Peekable<Chars<'a>>,
}

impl Reader<'_> {
    fn space(&mut self) {
        loop {
            match self.rest.peek() {
                Some(c) if c.is_whitespace() => {
                    self.rest.next();
                }
                Some('/') => while self.rest.next().is_some_and(|c| c != '\n') {},
                _ => return,
            }
        }
    }

    fn peek(&mut self) -> char {
        self.space();
        *self.rest.peek().expect("more of the scene")
    }

    fn take(&mut self, wanted: char) -> bool {
        let found = self.peek() == wanted;
        if found {
            self.rest.next();
        }
        found
    }

    fn word(&mut self) -> String {
        let mut word = String::new();
        while let Some(&c) = self.rest.peek() {
            if c.is_alphanumeric() || "_+-.#".contains(c) {
                word.push(c);
                self.rest.next();
            } else {
                break;
            }
        }
        word
    }

    /// After the opening mark; a raw text ends at the mark that `hashes` follow.
    fn quoted(&mut self, raw: bool, hashes: usize) -> String {
        let mut text = String::new();
        loop {
            match self.rest.next().expect("a closing quotation mark") {
                '"' if hashes == 0 || self.rest.peek() == Some(&'#') => {
                    (0..hashes).for_each(|_| {
                        self.rest.next();
                    });
                    return text;
                }
                '\\' if !raw => text.push(self.rest.next().expect("an escaped character")),
                c => text.push(c),
            }
        }
    }

    fn value(&mut self) -> Tree {
        match self.peek() {
            '"' => {
                self.rest.next();
                Tree::Text(self.quoted(false, 0))
            }
            '[' => {
                self.rest.next();
                Tree::List(self.until(']', Self::value))
            }
            '{' => {
                self.rest.next();
                Tree::Map(self.until('}', |r| {
                    let name = r.value().str().to_owned();
                    assert!(r.take(':'));
                    (name, r.value())
                }))
            }
            '(' => self.form(String::new()),
            _ => {
                let word = self.word();
                assert!(!word.is_empty(), "nothing here at {:?}", self.rest.peek());
                let hashes = word.matches('#').count();
                if word.trim_end_matches('#') == "r" && self.rest.peek() == Some(&'"') {
                    self.rest.next();
                    return Tree::Text(self.quoted(true, hashes));
                }
                if self.rest.peek() == Some(&'(') {
                    self.form(word)
                } else {
                    Tree::Word(word)
                }
            }
        }
    }

    fn form(&mut self, name: String) -> Tree {
        assert!(self.take('('));
        let fields = self.until(')', |r| {
            let first = r.value();
            if matches!(first, Tree::Word(_)) && r.take(':') {
                (first.str().to_owned(), r.value())
            } else {
                (String::new(), first)
            }
        });
        if name.is_empty() && fields.iter().all(|(n, _)| n.is_empty()) {
            return Tree::List(fields.into_iter().map(|(_, v)| v).collect());
        }
        Tree::Form(name, fields)
    }

    fn until<T>(&mut self, end: char, mut one: impl FnMut(&mut Self) -> T) -> Vec<T> {
        let mut found = Vec::new();
        while !self.take(end) {
            found.push(one(self));
            if !self.take(',') {
                assert!(self.take(end), "no comma before {:?}", self.rest.peek());
                break;
            }
        }
        found
    }
}

#[test]
fn the_oracle_reads_a_tree() {
    let tree = Tree::read(
        "// a remark\nScene(base: \"b\", events: { \"e\": At(t: -1.5, x: \"2 m\",), },\n l: [Beta(\"3/5\"), AtRest, r\"\\a\"], p: (1, 2))",
    );
    assert_eq!(tree.entries("events")[0].1.need("t").str(), "-1.5");
    assert_eq!(tree.need("l").items()[0].need("").str(), "3/5");
    assert_eq!(tree.need("l").items()[1].name(), "AtRest");
    assert_eq!(tree.need("l").items()[2].str(), "\\a");
    assert_eq!(tree.need("p").items().len(), 2);
    let scene = "Scene(a: [Beta(\"1\"), AtRest], b: {\n\"e\": At(t: -1, clock: (\"o\", 2)),\n})";
    assert_eq!(Tree::read(scene).to_string(), scene);
}
