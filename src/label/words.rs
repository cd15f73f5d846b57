//! A label in words, for a screen reader, and in letters, for searching and copying.

use super::allow::Letters;
use super::reader::Node;
use super::symbols;

/// For a screen reader: `p sub a prime`.
pub(super) fn words(nodes: &[Node]) -> String {
    let mut said = String::new();
    say(nodes, Letters::Each, &mut said);
    said
}

/// For searching and copying: `pa′`.
pub(super) fn letters(nodes: &[Node]) -> String {
    let mut found = String::new();
    for node in nodes {
        spell(node, &mut found);
    }
    found.split_whitespace().collect::<Vec<_>>().join(" ")
}

fn word(said: &mut String, next: &str) {
    if !said.is_empty() && !said.ends_with(['(', '[', ' ']) {
        said.push(' ');
    }
    said.push_str(next);
}

fn say(nodes: &[Node], letters: Letters, said: &mut String) {
    let mut before: Option<&Node> = None;
    for node in nodes {
        let joins = match (before, carrier(node)) {
            (Some(Node::Char(left)), Some(right)) => joins(*left, right, letters),
            _ => false,
        };
        if joins {
            let mut next = String::new();
            say_one(node, letters, &mut next);
            said.push_str(&next);
        } else {
            say_one(node, letters, said);
        }
        before = Some(node);
    }
}

/// The character a node begins with, where it is one.
fn carrier(node: &Node) -> Option<char> {
    match node {
        Node::Char(character) => Some(*character),
        Node::Scripts {
            base: Some(base), ..
        } => carrier(base),
        _ => None,
    }
}

/// Whether two characters are parts of one word or number.
fn joins(left: char, right: char, letters: Letters) -> bool {
    let number = |sign: char| sign.is_ascii_digit() || sign == '.';
    let one_word =
        letters == Letters::Word && left.is_ascii_alphanumeric() && right.is_ascii_alphanumeric();
    (number(left) && number(right)) || one_word
}

fn say_one(node: &Node, letters: Letters, said: &mut String) {
    match node {
        Node::Char(character) => say_char(*character, said),
        Node::Symbol(symbol) => word(said, symbols::words(symbol)),
        Node::Text(text) => text.split_whitespace().for_each(|part| word(said, part)),
        Node::Group(nodes) => say(nodes, letters, said),
        Node::Font(letters, inner) => match &**inner {
            Node::Group(nodes) => say(nodes, *letters, said),
            node => say_one(node, *letters, said),
        },
        Node::Accent(accent, inner) => {
            word(said, accent);
            say_one(inner, letters, said);
        }
        Node::Scripts {
            base,
            sub,
            primes,
            sup,
        } => {
            if let Some(base) = base {
                say_one(base, letters, said);
            }
            if let Some(sub) = sub {
                word(said, "sub");
                say_one(sub, letters, said);
            }
            match primes {
                0 => {}
                1 => word(said, "prime"),
                2 => word(said, "double prime"),
                more => word(said, &format!("{more} primes")),
            }
            if let Some(sup) = sup {
                say_power(sup, letters, said);
            }
        }
        Node::Fraction(above, below) => {
            let long = [above, below].iter().any(|part| length(part) > 1);
            if long {
                word(said, "the fraction");
            }
            say_one(above, letters, said);
            word(said, "over");
            say_one(below, letters, said);
            if long {
                word(said, "end fraction");
            }
        }
        Node::Root(index, inner) => {
            match index {
                None => word(said, "square root of"),
                Some(index) => {
                    word(said, "root of order");
                    say_one(index, letters, said);
                    word(said, "of");
                }
            }
            say_one(inner, letters, said);
            if length(inner) > 1 {
                word(said, "end root");
            }
        }
        Node::Stack(small, how, big) => {
            say_one(small, letters, said);
            word(said, how);
            say_one(big, letters, said);
        }
        Node::Space => {}
    }
}

fn length(node: &Node) -> usize {
    match node {
        Node::Group(nodes) => nodes.iter().map(length).sum(),
        Node::Space => 0,
        _ => 1,
    }
}

fn say_char(character: char, said: &mut String) {
    match character {
        '-' => word(said, "minus"),
        '+' => word(said, "plus"),
        '*' => word(said, "star"),
        '/' => word(said, "over"),
        '=' => word(said, "equals"),
        '<' => word(said, "less than"),
        '>' => word(said, "greater than"),
        '|' => word(said, "vertical bar"),
        ')' | ']' | ',' | '.' | ';' | ':' | '!' | '?' => said.push(character),
        other => word(said, other.encode_utf8(&mut [0; 4])),
    }
}

fn say_power(sup: &Node, letters: Letters, said: &mut String) {
    let inner = match sup {
        Node::Group(nodes) => nodes.as_slice(),
        node => std::slice::from_ref(node),
    };
    match inner {
        [Node::Char('2')] => return word(said, "squared"),
        [Node::Char('3')] => return word(said, "cubed"),
        [Node::Char('*')] => return word(said, "star"),
        [Node::Symbol(symbol)] if symbol.0 == "circ" => return word(said, "degrees"),
        [Node::Symbol(symbol)]
            if matches!(symbol.0, "prime" | "star" | "ast" | "dagger" | "dag") =>
        {
            return word(said, symbols::words(symbol));
        }
        [Node::Char(digit), ..] | [Node::Char('-'), Node::Char(digit), ..]
            if digit.is_ascii_digit() =>
        {
            word(said, "to the");
        }
        _ => word(said, "super"),
    }
    say_one(sup, letters, said);
}

fn spell(node: &Node, found: &mut String) {
    let each =
        |nodes: &[Node], found: &mut String| nodes.iter().for_each(|node| spell(node, found));
    match node {
        Node::Char('-') => found.push('\u{2212}'),
        Node::Char('*') => found.push('\u{2217}'),
        Node::Char(character) => found.push(*character),
        Node::Symbol(symbol) => found.push(symbol.1),
        Node::Text(text) => found.push_str(text),
        Node::Group(nodes) => each(nodes, found),
        Node::Font(_, inner) | Node::Accent(_, inner) => spell(inner, found),
        Node::Scripts {
            base,
            sub,
            primes,
            sup,
        } => {
            for part in [base, sub].into_iter().flatten() {
                spell(part, found);
            }
            (0..*primes).for_each(|_| found.push('\u{2032}'));
            if let Some(sup) = sup {
                spell(sup, found);
            }
        }
        Node::Fraction(above, below) => {
            spell(above, found);
            found.push('/');
            spell(below, found);
        }
        Node::Root(index, inner) => {
            if let Some(index) = index {
                spell(index, found);
            }
            found.push('\u{221A}');
            spell(inner, found);
        }
        Node::Stack(small, _, big) => {
            spell(small, found);
            spell(big, found);
        }
        Node::Space => found.push(' '),
    }
}
