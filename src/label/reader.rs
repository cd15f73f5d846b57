//! Reading a label's LaTeX by our own small grammar, so that only what it knows reaches a typesetter.

use super::LabelFault;
use super::allow::{self, Command, Letters};
use super::symbols::{self, Symbol};
use super::tape::{Tape, Token, fault};

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
    Group(Vec<Self>),
    /// An argument set in another face.
    Font(Letters, Box<Self>),
    /// What goes over (or under) the argument, in words.
    Accent(&'static str, Box<Self>),
    /// A base with scripts.
    Scripts {
        /// What carries them.
        base: Option<Box<Self>>,
        /// Below.
        sub: Option<Box<Self>>,
        /// How many primes.
        primes: usize,
        /// Above.
        sup: Option<Box<Self>>,
    },
    /// Numerator and denominator.
    Fraction(Box<Self>, Box<Self>),
    /// Index and radicand.
    Root(Option<Box<Self>>, Box<Self>),
    /// The small thing, how it stands, the big thing.
    Stack(Box<Self>, &'static str, Box<Self>),
    /// White space.
    Space,
}

/// What was read, and the LaTeX for it in ASCII (accented letters inside `\text` excepted).
#[derive(Debug)]
pub(super) struct Reading {
    pub(super) nodes: Vec<Node>,
    pub(super) latex: String,
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
    tape: Tape,
    depth: usize,
}

/// Reads a whole label.
///
/// # Errors
/// What the grammar does not know, with its column.
pub(super) fn read(source: &str) -> Result<Reading, LabelFault> {
    let mut reader = Reader {
        tape: Tape::new(source)?,
        depth: 0,
    };
    let nodes = reader.list(End::Label)?;
    Ok(Reading {
        nodes,
        latex: reader.tape.latex,
    })
}

impl Reader {
    fn missing(&self, what: &str) -> LabelFault {
        fault(
            self.tape.columns,
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
            let Some((token, column)) = self.tape.peek() else {
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
                self.tape.take();
                return Ok(nodes);
            }
            match token {
                Token::Char(' ') => {
                    self.tape.take();
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
        let bare = matches!(self.tape.peek(), Some((Token::Char('^' | '_' | '\''), _)));
        let base = if bare { None } else { Some(self.nucleus()?) };
        let (mut sub, mut sup, mut primes) = (None, None, 0_usize);
        loop {
            self.tape.skip_space();
            let Some((Token::Char(sign), column)) = self.tape.peek() else {
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
                '\'' | '^' if sup.is_some() => return Err(twice("superscript")),
                '\'' => {
                    self.tape.take();
                    primes += 1;
                    if primes > 1 && !self.tape.latex.ends_with("''") {
                        return Err(twice("superscript"));
                    }
                }
                '^' if primes > 0 && !self.tape.latex.ends_with('\'') => {
                    return Err(twice("superscript"));
                }
                '_' if sub.is_some() => return Err(twice("subscript")),
                '^' | '_' => {
                    self.tape.take();
                    let script = Some(Box::new(self.argument("a script")?));
                    if sign == '^' {
                        sup = script;
                    } else {
                        sub = script;
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
        let Some((token, column)) = self.tape.peek() else {
            return Err(self.missing("a symbol"));
        };
        match token {
            Token::Char('{') => self.group(column).map(Node::Group),
            Token::Char('~') => {
                self.tape.take();
                Ok(Node::Space)
            }
            Token::Char(character) if allow::math_char(character) => {
                self.tape.take();
                Ok(Node::Char(character))
            }
            Token::Char(character) => Err(refused_char(character, column)),
            Token::Command(name) => {
                let Some(command) = allow::command(&name) else {
                    return Err(refused_command(&name, column));
                };
                self.tape.take();
                self.command(command, &name, column)
            }
        }
    }

    fn group(&mut self, column: usize) -> Result<Vec<Node>, LabelFault> {
        self.deeper(column)?;
        self.tape.take();
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

    /// A group, a character or a command with its own arguments; a command is put in braces, as TeX needs it.
    fn argument(&mut self, what: &str) -> Result<Node, LabelFault> {
        self.tape.skip_space();
        let Some((token, column)) = self.tape.peek() else {
            return Err(self.missing(what));
        };
        match &token {
            Token::Char('{') => return self.group(column).map(Node::Group),
            Token::Char(character) if allow::math_char(*character) => return self.nucleus(),
            Token::Command(name) => match allow::command(name) {
                Some(Command::Space | Command::Right) => {}
                Some(_) => {
                    self.deeper(column)?;
                    self.tape.write("{");
                    let node = self.nucleus()?;
                    self.tape.write("}");
                    self.depth -= 1;
                    return Ok(node);
                }
                None => return Err(refused_command(name, column)),
            },
            Token::Char('^' | '_' | '\'' | '}' | '~') => {}
            Token::Char(character) => return Err(refused_char(*character, column)),
        }
        Err(fault(
            column,
            format!("{what} is missing here"),
            format!("put {what} in braces {{..}}"),
        ))
    }

    fn font(&mut self, letters: Letters, name: &str) -> Result<Node, LabelFault> {
        self.tape.skip_space();
        let column = self.tape.peek().map_or(self.tape.columns, |next| next.1);
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
        self.tape.skip_space();
        match self.tape.peek() {
            Some((Token::Char('{'), _)) => self.tape.take(),
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
            let Some((token, column)) = self.tape.pop() else {
                return Err(self.missing("a closing brace }"));
            };
            match token {
                Token::Char('}') => {
                    self.tape.latex.push('}');
                    return Ok(words);
                }
                Token::Char('~' | '\u{A0}') => {
                    self.tape.latex.push('~');
                    words.push(' ');
                }
                Token::Char(character) if allow::text_char(character) => {
                    self.tape.latex.push(character);
                    words.push(character);
                }
                Token::Command(escape) if "{}#%&$_ ".contains(&escape) => {
                    self.tape.latex.push('\\');
                    self.tape.latex.push_str(&escape);
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
        self.tape.skip_space();
        let column = self.tape.peek().map_or(self.tape.columns, |next| next.1);
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
        self.tape.skip_space();
        let mut index = None;
        if matches!(self.tape.peek(), Some((Token::Char('['), _))) {
            self.deeper(column)?;
            self.tape.take();
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
        self.tape.skip_space();
        let Some((token, column)) = self.tape.peek() else {
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
        self.tape.take();
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
