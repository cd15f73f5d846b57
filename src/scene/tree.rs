//! A text as a tree of spans: values, their keys, the commas behind them, the comments between. Nothing is copied
//! from the text and nothing is understood of it.

use std::num::NonZeroU32;
use std::ops::Range;

/// A stretch of the text, in bytes.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) struct Span {
    pub(super) start: u32,
    pub(super) end: u32,
}

impl Span {
    pub(super) fn new(start: usize, end: usize) -> Self {
        Self {
            start: Tree::offset(start),
            end: Tree::offset(end),
        }
    }

    pub(super) fn range(self) -> Range<usize> {
        self.start as usize..self.end as usize
    }
}

/// How a value is bracketed.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Shape {
    /// Not at all: a word, a number, a string.
    Leaf,
    /// `( .. )`, with or without a word before it.
    Round,
    /// `[ .. ]`.
    Square,
    /// `{ .. }`.
    Curly,
}

/// A node's number in its tree.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) struct NodeId(NonZeroU32);

/// A value or a key.
#[derive(Clone, Debug)]
pub(super) struct Node {
    /// From its word, or its bracket where it has none, to its closing bracket.
    pub(super) span: Span,
    /// Where its word ends: at `span.start` if it has none.
    pub(super) word_end: u32,
    /// Where its bracket opens; no meaning for a leaf.
    pub(super) open: u32,
    pub(super) shape: Shape,
    first: u32,
    count: u32,
}

impl Node {
    pub(super) fn leaf(span: Span) -> Self {
        Self {
            span,
            word_end: span.end,
            open: span.end,
            shape: Shape::Leaf,
            first: 0,
            count: 0,
        }
    }

    pub(super) fn open_at(&mut self, at: usize, shape: Shape) {
        self.open = Tree::offset(at);
        self.shape = shape;
    }
}

/// What stands between two commas: `key: value`, or a value alone. Either may be missing from a text that is wrong.
#[derive(Clone, Copy, Debug)]
pub(super) struct Item {
    pub(super) key: Option<NodeId>,
    pub(super) value: Option<NodeId>,
    /// The comma behind it.
    pub(super) comma: Option<u32>,
}

impl Item {
    pub(super) fn value(id: NodeId) -> Self {
        Self {
            key: None,
            value: Some(id),
            comma: None,
        }
    }

    pub(super) fn key(id: NodeId) -> Self {
        Self {
            key: Some(id),
            value: None,
            comma: None,
        }
    }

    pub(super) fn comma(at: usize) -> Self {
        Self {
            key: None,
            value: None,
            comma: Some(Tree::offset(at)),
        }
    }
}

/// The tree of a text.
#[derive(Clone, Debug, Default)]
pub(super) struct Tree {
    pub(super) nodes: Vec<Node>,
    items: Vec<Item>,
    /// What stands outside all brackets.
    pub(super) top: Vec<Item>,
    /// Every comment, in the order of the text.
    pub(super) comments: Vec<Span>,
}

impl Tree {
    /// A byte offset as it is kept. Texts are far shorter than 4 GB; one that is not ends at the largest offset.
    pub(super) fn offset(at: usize) -> u32 {
        u32::try_from(at).unwrap_or(u32::MAX)
    }

    pub(super) fn push(&mut self, node: Node) -> NodeId {
        self.nodes.push(node);
        NodeId(NonZeroU32::new(Self::offset(self.nodes.len())).unwrap_or(NonZeroU32::MIN))
    }

    pub(super) fn node(&self, id: NodeId) -> &Node {
        &self.nodes[id.0.get() as usize - 1]
    }

    pub(super) fn node_mut(&mut self, id: NodeId) -> &mut Node {
        &mut self.nodes[id.0.get() as usize - 1]
    }

    pub(super) fn close(&mut self, id: NodeId, end: usize, items: impl Iterator<Item = Item>) {
        let first = self.items.len();
        self.items.extend(items);
        let count = self.items.len() - first;
        let node = self.node_mut(id);
        node.span.end = Self::offset(end);
        node.first = Self::offset(first);
        node.count = Self::offset(count);
    }

    fn items(&self, id: NodeId) -> &[Item] {
        let node = self.node(id);
        &self.items[node.first as usize..][..node.count as usize]
    }
}

/// A node seen with its text.
#[derive(Clone, Copy)]
pub(super) struct Value<'a> {
    pub(super) text: &'a str,
    pub(super) tree: &'a Tree,
    pub(super) id: NodeId,
}

impl<'a> Value<'a> {
    pub(super) fn node(self) -> &'a Node {
        self.tree.node(self.id)
    }

    pub(super) fn start(self) -> usize {
        self.node().span.start as usize
    }

    pub(super) fn end(self) -> usize {
        self.node().span.end as usize
    }

    pub(super) fn shape(self) -> Shape {
        self.node().shape
    }

    /// All of it, as written.
    pub(super) fn raw(self) -> &'a str {
        &self.text[self.node().span.range()]
    }

    /// The word before its bracket; the whole of a leaf.
    pub(super) fn word(self) -> &'a str {
        &self.text[self.start()..self.node().word_end as usize]
    }

    pub(super) fn len(self) -> usize {
        self.node().count as usize
    }

    pub(super) fn items(self) -> impl ExactSizeIterator<Item = Entry<'a>> {
        let Self { text, tree, id } = self;
        let items = tree.items(id).iter();
        items.map(move |item| Entry { text, tree, item })
    }

    fn nth(self, n: usize) -> Option<Self> {
        let item = self.tree.items(self.id).get(n)?;
        let id = item.value.filter(|_| item.key.is_none())?;
        Some(Self { id, ..self })
    }

    /// The one value of a form that stands bare in it: `"3/5"` of `Beta("3/5")`.
    pub(super) fn bare(self) -> Option<Self> {
        let form = self.shape() == Shape::Round && !self.word().is_empty() && self.len() == 1;
        self.nth(0).filter(|_| form)
    }

    /// The value of a field, or the n-th value of a list; of a form with one bare value, that one by any name.
    fn step(self, segment: &str) -> Option<Self> {
        let mut named = self.items().filter(|e| e.key_text() == Some(segment));
        named
            .find_map(Entry::value)
            .or_else(|| self.nth(segment.parse().ok()?))
            .or_else(|| self.bare())
    }

    /// The value at a path of fields, or at the longest part of it that is there; and whether all of it is.
    pub(super) fn follow(self, path: &str) -> (Self, bool) {
        let mut value = self;
        for segment in path.split('.').filter(|s| !s.is_empty()) {
            match value.step(segment) {
                Some(next) => value = next,
                None => return (value, false),
            }
        }
        let bare = value.bare().filter(|_| !path.is_empty());
        (bare.unwrap_or(value), true)
    }

    /// The path of fields to what stands at a byte: the inverse of [`Self::follow`].
    pub(super) fn path_to(self, at: usize) -> String {
        let mut path: Vec<String> = Vec::new();
        let mut value = self;
        while let Some((n, entry)) = value.items().enumerate().find(|(_, e)| e.holds(at)) {
            if let Some(key) = entry.key_text() {
                path.push(key.to_owned());
            } else if value.bare().is_none() {
                path.push(n.to_string());
            }
            match entry.value() {
                Some(next) if next.start() <= at => value = next,
                _ => break,
            }
        }
        path.join(".")
    }
}

/// An item seen with its text.
#[derive(Clone, Copy)]
pub(super) struct Entry<'a> {
    text: &'a str,
    tree: &'a Tree,
    pub(super) item: &'a Item,
}

impl<'a> Entry<'a> {
    pub(super) fn top(text: &'a str, tree: &'a Tree) -> impl Iterator<Item = Self> {
        let items = tree.top.iter();
        items.map(move |item| Self { text, tree, item })
    }

    fn see(self, id: NodeId) -> Value<'a> {
        let Self { text, tree, .. } = self;
        Value { text, tree, id }
    }

    pub(super) fn key(self) -> Option<Value<'a>> {
        self.item.key.map(|id| self.see(id))
    }

    pub(super) fn value(self) -> Option<Value<'a>> {
        self.item.value.map(|id| self.see(id))
    }

    pub(super) fn key_text(self) -> Option<&'a str> {
        self.key().map(Value::raw)
    }

    /// Where it begins.
    pub(super) fn start(self) -> usize {
        let first = self.key().or(self.value());
        first.map_or_else(|| self.item.comma.unwrap_or(0) as usize, Value::start)
    }

    /// Where it ends, its comma not counted.
    pub(super) fn end(self) -> usize {
        let last = self.value().or(self.key());
        last.map_or_else(|| self.item.comma.unwrap_or(0) as usize, Value::end)
    }

    fn holds(self, at: usize) -> bool {
        self.start() <= at && at < self.end().max(self.start() + 1)
    }
}
