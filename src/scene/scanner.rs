//! From text to a tree of spans by brackets, strings, comments and commas. Knows nothing of scenes.
//!
//! Anything whose brackets and strings match has a tree; what is odd inside (a value or a comma that is missing) is
//! left to the reader of the tree. A line ends at `\n`, `\r\n` or a lone `\r`.

use super::tree::{Item, Node, NodeId, Shape, Span, Tree};

/// The deepest nesting of brackets that is read.
pub(super) const DEPTH: usize = 64;
/// The largest number of values, keys among them, that is read.
pub(super) const VALUES: usize = 1 << 21;

/// Why a text has no tree.
#[derive(Debug, PartialEq, Eq)]
pub(super) struct Broken {
    /// Byte offset of the spot.
    pub(super) at: usize,
    /// What is wrong.
    pub(super) what: String,
    /// What would mend it.
    pub(super) mend: String,
}

impl Broken {
    pub(super) fn new(at: usize, what: impl Into<String>, mend: impl Into<String>) -> Self {
        Self {
            at,
            what: what.into(),
            mend: mend.into(),
        }
    }
}

/// Scans a text of less than 4 GB.
pub(super) fn scan(text: &str) -> Result<Tree, Broken> {
    let mut scanner = Scanner {
        text,
        at: 0,
        tree: Tree::default(),
        pending: Vec::new(),
        levels: Vec::new(),
        top_open: false,
    };
    scanner.run()?;
    Ok(scanner.tree)
}

/// A bracket that is open.
struct Level {
    node: NodeId,
    /// Where its items begin among the pending ones.
    first: usize,
    /// Whether its last item may still take a value, a colon or a comma.
    open: bool,
}

struct Scanner<'a> {
    text: &'a str,
    at: usize,
    tree: Tree,
    /// Items of the brackets that are open, outermost first.
    pending: Vec<Item>,
    levels: Vec<Level>,
    top_open: bool,
}

impl Scanner<'_> {
    fn run(&mut self) -> Result<(), Broken> {
        while let Some(&byte) = self.text.as_bytes().get(self.at) {
            match byte {
                b'(' => self.open_bracket(Shape::Round)?,
                b'[' => self.open_bracket(Shape::Square)?,
                b'{' => self.open_bracket(Shape::Curly)?,
                b')' | b']' | b'}' => self.close_bracket(char::from(byte))?,
                b',' => self.comma(),
                b':' => self.colon()?,
                b'"' => {
                    let end = self.quoted_end(self.at)?;
                    self.leaf(end)?;
                }
                b' ' | b'\t'..=b'\r' => self.at += 1,
                0x80.. if self.wide_blank() > 0 => self.at += self.wide_blank(),
                b'/' if self.comment()? => {}
                _ => {
                    let end = self.run_end()?;
                    self.leaf(end)?;
                }
            }
        }
        if let Some(level) = self.levels.last() {
            let open = self.tree.node(level.node).open as usize;
            let bracket = self.text[open..].chars().next().unwrap_or('(');
            return Err(Broken::new(
                open,
                format!("the bracket `{bracket}` that opens here is never closed"),
                format!("close it with `{}`", closer(bracket)),
            ));
        }
        self.tree.top = std::mem::take(&mut self.pending);
        Ok(())
    }

    /// Length of the blank of more than one byte at the current place, 0 if there is none.
    fn wide_blank(&self) -> usize {
        let next = self.text[self.at..].chars().next();
        next.filter(|&c| is_blank(c)).map_or(0, char::len_utf8)
    }

    /// Takes a comment that begins here, if one does.
    fn comment(&mut self) -> Result<bool, Broken> {
        let start = self.at;
        let bytes = self.text.as_bytes();
        match bytes.get(start + 1) {
            Some(b'/') => {
                let rest = &bytes[start..];
                let length = rest.iter().position(|&b| b == b'\n' || b == b'\r');
                self.at = start + length.unwrap_or(rest.len());
            }
            Some(b'*') => self.at = self.block_end(start)?,
            _ => return Ok(false),
        }
        self.tree.comments.push(Span::new(start, self.at));
        Ok(true)
    }

    fn block_end(&self, start: usize) -> Result<usize, Broken> {
        let bytes = self.text.as_bytes();
        let (mut at, mut depth) = (start, 0_usize);
        while at < bytes.len() {
            if bytes[at..].starts_with(b"/*") {
                depth += 1;
                at += 2;
            } else if bytes[at..].starts_with(b"*/") {
                depth -= 1;
                at += 2;
                if depth == 0 {
                    return Ok(at);
                }
            } else {
                at += 1;
            }
        }
        Err(Broken::new(
            start,
            "the comment that begins here never ends",
            "end it with `*/`, once for each `/*` within it",
        ))
    }

    /// The end of a string whose opening quote is at `quote`.
    fn quoted_end(&self, quote: usize) -> Result<usize, Broken> {
        let bytes = self.text.as_bytes();
        let mut at = quote + 1;
        while let Some(&byte) = bytes.get(at) {
            match byte {
                b'"' => return Ok(at + 1),
                b'\\' => at += 2,
                _ => at += 1,
            }
        }
        Err(unended(quote))
    }

    /// The end of a raw string that begins here (`r"..."`, `r#"..."#`), if one does.
    fn raw_end(&self) -> Result<Option<usize>, Broken> {
        let rest = &self.text[self.at..];
        let Some(after) = rest.strip_prefix('r') else {
            return Ok(None);
        };
        let body = after.trim_start_matches('#');
        let hashes = after.len() - body.len();
        if !body.starts_with('"') {
            return Ok(None);
        }
        let mut ending = String::from("\"");
        ending.push_str(&after[..hashes]);
        let length = body[1..].find(&ending).ok_or_else(|| unended(self.at))?;
        Ok(Some(self.at + 1 + hashes + 1 + length + ending.len()))
    }

    /// The end of the run of other characters that begins here: a word, a number, a character in single quotes.
    fn run_end(&self) -> Result<usize, Broken> {
        if let Some(end) = self.raw_end()? {
            return Ok(end);
        }
        let rest = &self.text[self.at..];
        if let Some(length) = character_length(rest) {
            return Ok(self.at + length);
        }
        let bytes = rest.as_bytes();
        let ends = |&(i, c): &(usize, char)| match c {
            '(' | ')' | '[' | ']' | '{' | '}' | ',' | ':' | '"' => true,
            '/' => matches!(bytes.get(i + 1), Some(b'/' | b'*')),
            _ => is_blank(c),
        };
        let end = rest.char_indices().find(ends);
        Ok(self.at + end.map_or(rest.len(), |(i, _)| i))
    }

    fn leaf(&mut self, end: usize) -> Result<(), Broken> {
        let id = self.add(Node::leaf(Span::new(self.at, end)))?;
        self.value(id);
        self.at = end;
        Ok(())
    }

    fn add(&mut self, node: Node) -> Result<NodeId, Broken> {
        if self.tree.nodes.len() >= VALUES {
            return Err(Broken::new(
                self.at,
                format!("the text has more than {VALUES} values"),
                "split the scene",
            ));
        }
        Ok(self.tree.push(node))
    }

    fn level_open(&mut self) -> &mut bool {
        match self.levels.last_mut() {
            Some(level) => &mut level.open,
            None => &mut self.top_open,
        }
    }

    /// The item that may still take something.
    fn open_item(&mut self) -> Option<&mut Item> {
        let open = *self.level_open();
        self.pending.last_mut().filter(|_| open)
    }

    fn begin(&mut self, item: Item) {
        self.pending.push(item);
        *self.level_open() = true;
    }

    fn value(&mut self, id: NodeId) {
        match self.open_item() {
            Some(item) if item.value.is_none() => item.value = Some(id),
            _ => self.begin(Item::value(id)),
        }
    }

    fn colon(&mut self) -> Result<(), Broken> {
        let at = self.at;
        self.at += 1;
        // In `a: b: c` the value of `a` is missing and `b` is a key.
        let taken = self.open_item().and_then(|item| {
            let first = item.key.is_none();
            item.value.take().map(|value| (first, value))
        });
        match taken {
            Some((true, key)) => {
                if let Some(item) = self.open_item() {
                    item.key = Some(key);
                }
            }
            Some((false, key)) => self.begin(Item::key(key)),
            None => {
                let key = self.add(Node::leaf(Span::new(at, at)))?;
                self.begin(Item::key(key));
            }
        }
        Ok(())
    }

    fn comma(&mut self) {
        let at = self.at;
        match self.open_item() {
            Some(item) => item.comma = Some(Tree::offset(at)),
            None => self.pending.push(Item::comma(at)),
        }
        *self.level_open() = false;
        self.at += 1;
    }

    fn open_bracket(&mut self, shape: Shape) -> Result<(), Broken> {
        if self.levels.len() >= DEPTH {
            return Err(Broken::new(
                self.at,
                format!("brackets are nested more than {DEPTH} deep"),
                "a scene needs no more than 8",
            ));
        }
        let at = self.at;
        let word = self.word_before().filter(|_| shape == Shape::Round);
        let node = if let Some(word) = word {
            word
        } else {
            let id = self.add(Node::leaf(Span::new(at, at)))?;
            self.value(id);
            id
        };
        self.tree.node_mut(node).open_at(at, shape);
        self.levels.push(Level {
            node,
            first: self.pending.len(),
            open: false,
        });
        self.at += 1;
        Ok(())
    }

    /// The bare word that stands right before, to which a round bracket belongs.
    fn word_before(&mut self) -> Option<NodeId> {
        let id = self.open_item()?.value?;
        let node = self.tree.node(id);
        let text = &self.text[node.span.range()];
        let word = node.shape == Shape::Leaf && !text.ends_with(['"', '#', '\'']);
        word.then_some(id)
    }

    fn close_bracket(&mut self, bracket: char) -> Result<(), Broken> {
        let Some(level) = self.levels.pop() else {
            return Err(Broken::new(
                self.at,
                format!("`{bracket}` closes a bracket that was never opened"),
                "delete it, or open the bracket",
            ));
        };
        let open = self.tree.node(level.node).open as usize;
        let opener = self.text[open..].chars().next().unwrap_or('(');
        if closer(opener) != bracket {
            let line = super::lines::line_of(self.text, open);
            return Err(Broken::new(
                self.at,
                format!("`{bracket}` cannot close the `{opener}` that opens in line {line}"),
                format!("close that one first, with `{}`", closer(opener)),
            ));
        }
        self.at += 1;
        let items = self.pending.drain(level.first..);
        self.tree.close(level.node, self.at, items);
        Ok(())
    }
}

fn unended(at: usize) -> Broken {
    Broken::new(
        at,
        "the string that begins here never ends",
        "close it with `\"`; if it is closed, an earlier one is not",
    )
}

/// Length of a character in single quotes that begins the text.
fn character_length(text: &str) -> Option<usize> {
    let mut rest = text.strip_prefix('\'')?.chars();
    if rest.next()? == '\\' {
        rest.next()?;
    }
    let rest = rest.as_str().strip_prefix('\'')?;
    Some(text.len() - rest.len())
}

fn closer(bracket: char) -> char {
    match bracket {
        '[' => ']',
        '{' => '}',
        _ => ')',
    }
}

/// Whether a character is white space in RON.
fn is_blank(c: char) -> bool {
    matches!(
        c,
        ' ' | '\t'..='\r' | '\u{85}' | '\u{200E}' | '\u{200F}' | '\u{2028}' | '\u{2029}'
    )
}
