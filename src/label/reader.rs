//! Reading a label's LaTeX by our own small grammar, so that only what it knows reaches a typesetter.

use super::LabelFault;
use super::allow::{self, Command, Letters};
use super::symbols::{self, Symbol};

/// A label as read.
#[derive(Clone, Debug, PartialEq)]
pub(super) enum Node {
    /// A character of math; minus is `-`.
    Char(char),
    /// A symbol by name.
    Symbol(&'static Symbol),
    /// Upright words: `\text`, names of functions.
    Text(String),
    /// What stood in braces.
    Group(Vec<Node>),
    /// An argument set in another face.
    Font(Letters, Box<Node>),
    /// What goes over (or under) the argument, in words.
    Accent(&'static str, Box<Node>),
    /// A base with scripts.
    Scripts {
        /// What carries them.
        base: Option<Box<Node>>,
        /// Below.
        sub: Option<Box<Node>>,
        /// How many primes.
        primes: usize,
        /// Above.
        sup: Option<Box<Node>>,
    },
    /// Numerator and denominator.
    Fraction(Box<Node>, Box<Node>),
    /// Index and radicand.
    Root(Option<Box<Node>>, Box<Node>),
    /// The small thing, how it stands, the big thing.
    Stack(Box<Node>, &'static str, Box<Node>),
    /// White space.
    Space,
}

/// What was read, and the LaTeX for it in ASCII (accented letters inside `\text` excepted).
#[derive(Debug)]
pub(super) struct Reading {
    pub(super) nodes: Vec<Node>,
    pub(super) latex: String,
}

#[derive(Clone, Debug, PartialEq, Eq)]
enum Token {
    Char(char),
    Command(String),
}

/// What ends a list.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum End {
    Label,
    Brace,
    Bracket,
    Right,
}

/// No braces deeper than this: paper has no room for them.
const DEEPEST: usize = 16;

struct Reader {
    /// Tokens and the column each starts at, last first.
    tokens: Vec<(Token, usize)>,
    /// Columns in all.
    columns: usize,
    depth: usize,
    latex: String,
}

/// Reads a whole label.
///
/// # Errors
/// What the grammar does not know, with its column.
pub(super) fn read(source: &str) -> Result<Reading, LabelFault> {
    let mut tokens = tokens(source)?;
    tokens.reverse();
    let columns = source.chars().count();
    let mut reader = Reader {
        tokens,
        columns,
        depth: 0,
        latex: String::new(),
    };
    let nodes = reader.list(End::Label)?;
    Ok(Reading {
        nodes,
        latex: reader.latex,
    })
}

fn fault(column: usize, what: impl Into<String>, mend: impl Into<String>) -> LabelFault {
    LabelFault {
        column,
        what: what.into(),
        mend: mend.into(),
    }
}

fn tokens(source: &str) -> Result<Vec<(Token, usize)>, LabelFault> {
    let mut found = Vec::new();
    let mut characters = source.chars().enumerate().peekable();
    while let Some((column, character)) = characters.next() {
        let token = match character {
            '\\' => {
                let mut name = String::new();
                while let Some((_, letter)) =
                    characters.next_if(|next| next.1.is_ascii_alphabetic())
                {
                    name.push(letter);
                }
                if name.is_empty() {
                    let Some((_, sign)) = characters.next() else {
                        return Err(fault(
                            column,
                            "a backslash ends the label",
                            "name a command after it, or take it out",
                        ));
                    };
                    name.push(sign);
                }
                Token::Command(name)
            }
            '\t' | '\n' | '\r' => Token::Char(' '),
            control if control.is_control() => {
                let what = format!(
                    "a label holds the control character U+{:04X}",
                    u32::from(control)
                );
                return Err(fault(column, what, "take it out"));
            }
            other => Token::Char(other),
        };
        found.push((token, column));
    }
    Ok(found)
}

/// A character beyond ASCII as the tokens that LaTeX has for it.
fn spelled(character: char) -> Option<Vec<Token>> {
    let command = |name: &str| Token::Command(name.to_owned());
    Some(match character {
        '\u{2212}' => vec![Token::Char('-')],
        '\u{2032}' => vec![Token::Char('\'')],
        '\u{2033}' => vec![Token::Char('\''), Token::Char('\'')],
        '\u{B0}' => vec![Token::Char('^'), command("circ")],
        '\u{B9}' => vec![Token::Char('^'), Token::Char('1')],
        '\u{B2}' => vec![Token::Char('^'), Token::Char('2')],
        '\u{B3}' => vec![Token::Char('^'), Token::Char('3')],
        '\u{A0}' => vec![Token::Char('~')],
        '\u{2009}' | '\u{202F}' => vec![command(",")],
        other => vec![command(symbols::of_char(other)?.0)],
    })
}

impl Reader {
    /// The next token of math and its column; characters beyond ASCII are spelled out.
    fn peek(&mut self) -> Option<(Token, usize)> {
        if let Some((Token::Char(character), column)) = self.tokens.last().cloned()
            && !character.is_ascii()
            && let Some(spelled) = spelled(character)
        {
            self.tokens.pop();
            self.tokens
                .extend(spelled.into_iter().rev().map(|token| (token, column)));
        }
        self.tokens.last().cloned()
    }

    /// Takes the next token and writes it to the LaTeX.
    fn take(&mut self) -> Option<(Token, usize)> {
        let next = self.peek()?;
        self.tokens.pop();
        match &next.0 {
            Token::Char(character) => self.write(&character.to_string()),
            Token::Command(name) => self.write(&format!("\\{name}")),
        }
        Some(next)
    }

    /// A letter right after a command's name would be read into it.
    fn write(&mut self, text: &str) {
        let letter = text.starts_with(|first: char| first.is_ascii_alphabetic());
        let name = self.latex.rfind('\\').is_some_and(|at| {
            let name = self.latex.get(at + 1..).unwrap_or_default();
            !name.is_empty() && name.bytes().all(|byte| byte.is_ascii_alphabetic())
        });
        if letter && name {
            self.latex.push(' ');
        }
        self.latex.push_str(text);
    }

    fn skip_space(&mut self) {
        while self.peek().is_some_and(|next| next.0 == Token::Char(' ')) {
            self.take();
        }
    }

    fn missing(&self, what: &str) -> LabelFault {
        fault(
            self.columns,
            format!("the label ends where {what} is missing"),
            format!("add {what}"),
        )
    }

    fn deeper(&mut self, column: usize) -> Result<(), LabelFault> {
        self.depth += 1;
        if self.depth > DEEPEST {
            let what = format!("braces stand more than {DEEPEST} deep");
            return Err(fault(column, what, "write it with fewer"));
        }
        Ok(())
    }

    fn list(&mut self, end: End) -> Result<Vec<Node>, LabelFault> {
        let mut nodes = Vec::new();
        loop {
            let Some((token, column)) = self.peek() else {
                return match end {
                    End::Label => Ok(nodes),
                    End::Brace => Err(self.missing("a closing brace }")),
                    End::Bracket => Err(self.missing("a closing bracket ]")),
                    End::Right => Err(self.missing(r"\right and a delimiter")),
                };
            };
            let ends = match (&token, end) {
                (Token::Char('}'), End::Brace) | (Token::Char(']'), End::Bracket) => true,
                (Token::Command(name), End::Right) => name == "right",
                _ => false,
            };
            if ends {
                self.take();
                return Ok(nodes);
            }
            match token {
                Token::Char(' ') => {
                    self.take();
                }
                Token::Char('}') => {
                    return Err(fault(
                        column,
                        "a closing brace } has no opening one",
                        "take it out, or open one before it",
                    ));
                }
                Token::Command(name) if name == "right" => {
                    return Err(fault(
                        column,
                        r"\right has no \left before it",
                        r"take it out, or add \left",
                    ));
                }
                _ => nodes.push(self.scripted()?),
            }
        }
    }

    /// One thing with its scripts.
    fn scripted(&mut self) -> Result<Node, LabelFault> {
        let bare = matches!(self.peek(), Some((Token::Char('^' | '_' | '\''), _)));
        let base = if bare { None } else { Some(self.nucleus()?) };
        let (mut sub, mut sup, mut primes) = (None, None, 0_usize);
        loop {
            self.skip_space();
            let Some((Token::Char(sign), column)) = self.peek() else {
                break;
            };
            let twice = |which: &str| {
                fault(
                    column,
                    format!("one thing has two {which}s"),
                    "put the first part in braces",
                )
            };
            match sign {
                '\'' if sup.is_some() => return Err(twice("superscript")),
                '\'' => {
                    self.take();
                    primes += 1;
                    if primes > 1 && !self.latex.ends_with("''") {
                        return Err(twice("superscript"));
                    }
                }
                '^' if sup.is_some() => return Err(twice("superscript")),
                '^' if primes > 0 && !self.latex.trim_end().ends_with('\'') => {
                    return Err(twice("superscript"));
                }
                '_' if sub.is_some() => return Err(twice("subscript")),
                '^' | '_' => {
                    self.take();
                    let script = Some(Box::new(self.argument("a script")?));
                    if sign == '^' {
                        sup = script
                    } else {
                        sub = script
                    }
                }
                _ => break,
            }
        }
        if sub.is_none() && sup.is_none() && primes == 0 {
            return base.ok_or_else(|| self.missing("a symbol"));
        }
        Ok(Node::Scripts {
            base: base.map(Box::new),
            sub,
            primes,
            sup,
        })
    }

    fn nucleus(&mut self) -> Result<Node, LabelFault> {
        let Some((token, column)) = self.peek() else {
            return Err(self.missing("a symbol"));
        };
        match token {
            Token::Char('{') => self.group(column).map(Node::Group),
            Token::Char('~') => {
                self.take();
                Ok(Node::Space)
            }
            Token::Char(character) if allow::math_char(character) => {
                self.take();
                Ok(Node::Char(character))
            }
            Token::Char(character) => Err(refused_char(character, column)),
            Token::Command(name) => {
                let Some(command) = allow::command(&name) else {
                    return Err(refused_command(&name, column));
                };
                self.take();
                self.command(command, &name, column)
            }
        }
    }

    fn group(&mut self, column: usize) -> Result<Vec<Node>, LabelFault> {
        self.deeper(column)?;
        self.take();
        let nodes = self.list(End::Brace)?;
        self.depth -= 1;
        Ok(nodes)
    }

    fn command(&mut self, command: Command, name: &str, column: usize) -> Result<Node, LabelFault> {
        let boxed = |node: Node| Box::new(node);
        Ok(match command {
            Command::Symbol(symbol) => Node::Symbol(symbol),
            Command::Function => Node::Text(name.to_owned()),
            Command::Space => Node::Space,
            Command::Accent(words) => Node::Accent(
                words,
                boxed(self.argument(&format!("what \\{name} goes over"))?),
            ),
            Command::Font(letters) => self.font(letters, name)?,
            Command::Text => Node::Text(self.text(name)?),
            Command::OperatorName => Node::Text(self.operator_name()?),
            Command::Fraction => {
                let above = boxed(self.argument("a numerator")?);
                Node::Fraction(above, boxed(self.argument("a denominator")?))
            }
            Command::Stack(words) => {
                let small = boxed(self.argument("what is stacked")?);
                Node::Stack(small, words, boxed(self.argument("what carries it")?))
            }
            Command::Root => self.root(column)?,
            Command::Left => self.fenced(column)?,
            Command::Big => self.delimiter()?,
            Command::Right => {
                return Err(fault(
                    column,
                    r"\right has no \left before it",
                    r"take it out, or add \left",
                ));
            }
        })
    }

    /// A group, or a single character or symbol.
    fn argument(&mut self, what: &str) -> Result<Node, LabelFault> {
        self.skip_space();
        let Some((token, column)) = self.peek() else {
            return Err(self.missing(what));
        };
        match &token {
            Token::Char('{') => return self.group(column).map(Node::Group),
            Token::Char(character) if allow::math_char(*character) => return self.nucleus(),
            Token::Command(name) => match allow::command(name) {
                Some(Command::Symbol(_)) => {
                    // Some symbols are two in TeX, which takes one alone.
                    self.write("{");
                    let node = self.nucleus();
                    self.write("}");
                    return node;
                }
                Some(_) => {}
                None => return Err(refused_command(name, column)),
            },
            Token::Char('^' | '_' | '\'' | '}' | '~') => {}
            Token::Char(character) => return Err(refused_char(*character, column)),
        }
        Err(fault(
            column,
            format!("{what} must stand in braces here"),
            format!("put {what} in braces {{..}}"),
        ))
    }

    fn font(&mut self, letters: Letters, name: &str) -> Result<Node, LabelFault> {
        self.skip_space();
        let column = self.peek().map_or(self.columns, |next| next.1);
        let argument = self.argument(&format!("what \\{name} sets"))?;
        let fits = |node: &Node| match (letters, node) {
            (Letters::Word | Letters::Each, _) => true,
            (Letters::Capitals, Node::Char(letter)) => letter.is_ascii_uppercase(),
            (Letters::Latin, Node::Char(letter)) => letter.is_ascii_alphabetic(),
            _ => false,
        };
        let all = match &argument {
            Node::Group(nodes) => nodes.iter().all(fits),
            node => fits(node),
        };
        if !all {
            let kind = if letters == Letters::Capitals {
                "capital letters A to Z"
            } else {
                "letters"
            };
            return Err(fault(
                column,
                format!("\\{name} has {kind} alone"),
                "move everything else out of it",
            ));
        }
        Ok(Node::Font(letters, Box::new(argument)))
    }

    /// The words of `\text{..}`, read character by character: no math in it.
    fn text(&mut self, name: &str) -> Result<String, LabelFault> {
        self.skip_space();
        match self.peek() {
            Some((Token::Char('{'), _)) => self.take(),
            Some((_, column)) => {
                return Err(fault(
                    column,
                    format!("\\{name} needs braces"),
                    format!("write \\{name}{{..}}"),
                ));
            }
            None => return Err(self.missing("text in braces")),
        };
        let mut words = String::new();
        loop {
            let Some((token, column)) = self.tokens.pop() else {
                return Err(self.missing("a closing brace }"));
            };
            match token {
                Token::Char('}') => {
                    self.latex.push('}');
                    return Ok(words);
                }
                Token::Char('~' | '\u{A0}') => {
                    self.latex.push('~');
                    words.push(' ');
                }
                Token::Char(character) if allow::text_char(character) => {
                    self.latex.push(character);
                    words.push(character);
                }
                Token::Command(escape) if "{}#%&$_ ".contains(&escape) => {
                    self.latex.push('\\');
                    self.latex.push_str(&escape);
                    words.push_str(&escape);
                }
                Token::Char('$') => {
                    return Err(fault(
                        column,
                        "a dollar sign stands inside text",
                        format!("close \\{name}{{..}} before the math"),
                    ));
                }
                Token::Char(character)
                    if symbols::of_char(character).is_some() || character.is_ascii() =>
                {
                    let mend = format!("write it outside \\{name}{{..}}");
                    return Err(fault(
                        column,
                        format!("\"{character}\" cannot stand inside text"),
                        mend,
                    ));
                }
                Token::Char(character) => return Err(refused_char(character, column)),
                Token::Command(command) if allow::command(&command).is_some() => {
                    let mend = format!("close \\{name}{{..}} before it");
                    return Err(fault(
                        column,
                        format!("\\{command} cannot stand inside text"),
                        mend,
                    ));
                }
                Token::Command(command) => return Err(refused_command(&command, column)),
            }
        }
    }

    fn operator_name(&mut self) -> Result<String, LabelFault> {
        self.skip_space();
        let column = self.peek().map_or(self.columns, |next| next.1);
        let nodes = match self.argument("the function's name")? {
            Node::Group(nodes) => nodes,
            node => vec![node],
        };
        let letter = |node: &Node| match node {
            Node::Char(letter) if letter.is_ascii_alphanumeric() => Some(*letter),
            _ => None,
        };
        let name: Option<String> = nodes.iter().map(letter).collect();
        name.ok_or_else(|| {
            fault(
                column,
                "a function's name has letters alone",
                "move everything else out of it",
            )
        })
    }

    fn root(&mut self, column: usize) -> Result<Node, LabelFault> {
        self.skip_space();
        let mut index = None;
        if matches!(self.peek(), Some((Token::Char('['), _))) {
            self.deeper(column)?;
            self.take();
            index = Some(Box::new(Node::Group(self.list(End::Bracket)?)));
            self.depth -= 1;
        }
        Ok(Node::Root(
            index,
            Box::new(self.argument("what stands under the root")?),
        ))
    }

    fn fenced(&mut self, column: usize) -> Result<Node, LabelFault> {
        self.deeper(column)?;
        let mut nodes = vec![self.delimiter()?];
        nodes.extend(self.list(End::Right)?);
        nodes.push(self.delimiter()?);
        self.depth -= 1;
        Ok(Node::Group(nodes))
    }

    fn delimiter(&mut self) -> Result<Node, LabelFault> {
        self.skip_space();
        let Some((token, column)) = self.peek() else {
            return Err(self.missing("a delimiter"));
        };
        let node = match &token {
            Token::Char('.') => Some(Node::Space),
            Token::Char(character) if allow::delimiter_char(*character) => {
                Some(Node::Char(*character))
            }
            Token::Command(name) if allow::delimiter_command(name) => {
                symbols::named(name).map(Node::Symbol)
            }
            _ => None,
        };
        let Some(node) = node else {
            return Err(fault(
                column,
                "a delimiter is missing here",
                r"write one of ( ) [ ] | / \{ \} \langle \rangle, or . for none",
            ));
        };
        self.take();
        Ok(node)
    }
}

fn refused_command(name: &str, column: usize) -> LabelFault {
    fault(
        column,
        format!("the command \\{name} is not allowed in a label"),
        allow::instead(name),
    )
}

fn refused_char(character: char, column: usize) -> LabelFault {
    let mend = match character {
        '$' => "a label is math already: leave the dollar signs out",
        '%' | '#' => "put a backslash before it",
        '&' => r"write \& for the sign itself",
        '"' => r"leave it out, or write '' for a double prime",
        other if other.is_alphabetic() => {
            r"write Latin words inside \text{..}; other scripts have no glyphs here"
        }
        _ => "take it out, or name the symbol by a command",
    };
    let what = if character.is_ascii() {
        format!("\"{character}\" cannot stand in a label")
    } else {
        format!(
            "no face has a glyph for \"{character}\" (U+{:04X})",
            u32::from(character)
        )
    };
    fault(column, what, mend)
}
