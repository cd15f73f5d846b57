//! A label's tokens, and the LaTeX written of them.

use super::LabelFault;
use super::symbols;

/// A character or a command's name.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) enum Token {
    /// A character.
    Char(char),
    /// A command, without its backslash.
    Command(String),
}

/// Tokens still to be read, and the LaTeX of those that were.
#[derive(Debug)]
pub(super) struct Tape {
    /// Tokens and the column each starts at, last first.
    tokens: Vec<(Token, usize)>,
    /// Columns in all.
    pub(super) columns: usize,
    /// What was taken, as LaTeX.
    pub(super) latex: String,
}

/// A fault of the label.
pub(super) fn fault(column: usize, what: impl Into<String>, mend: impl Into<String>) -> LabelFault {
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
        '\u{A0}' => vec![Token::Char('~')],
        '\u{2009}' | '\u{202F}' => vec![command(",")],
        other => vec![command(symbols::of_char(other)?.0)],
    })
}

impl Tape {
    /// The tokens of a label.
    ///
    /// # Errors
    /// A control character, a backslash at the end.
    pub(super) fn new(source: &str) -> Result<Self, LabelFault> {
        let mut tokens = tokens(source)?;
        tokens.reverse();
        let columns = source.chars().count();
        Ok(Self {
            tokens,
            columns,
            latex: String::new(),
        })
    }

    /// The next token as it was typed, taken without writing it.
    pub(super) fn pop(&mut self) -> Option<(Token, usize)> {
        self.tokens.pop()
    }

    /// The next token of math and its column; characters beyond ASCII are spelled out.
    pub(super) fn peek(&mut self) -> Option<(Token, usize)> {
        if let Some((Token::Char(character), column)) = self.tokens.last().cloned()
            && !character.is_ascii()
        {
            let spelled = self.raised().or_else(|| {
                let spelled = spelled(character)?;
                self.tokens.pop();
                Some(spelled)
            });
            let spelled = spelled.unwrap_or_default();
            self.tokens
                .extend(spelled.into_iter().rev().map(|token| (token, column)));
        }
        self.tokens.last().cloned()
    }

    /// A run of raised or lowered characters as one script.
    fn raised(&mut self) -> Option<Vec<Token>> {
        let mut run: Option<(char, String)> = None;
        while let Some((Token::Char(character), _)) = self.tokens.last() {
            let Some((sign, plain)) = symbols::script(*character) else {
                break;
            };
            let (first, all) = run.get_or_insert((sign, String::new()));
            if *first != sign {
                break;
            }
            all.push(plain);
            self.tokens.pop();
        }
        let (sign, all) = run?;
        let inner = all.chars().map(Token::Char);
        Some(
            [Token::Char(sign), Token::Char('{')]
                .into_iter()
                .chain(inner)
                .chain([Token::Char('}')])
                .collect(),
        )
    }

    /// Takes the next token and writes it to the LaTeX.
    pub(super) fn take(&mut self) -> Option<(Token, usize)> {
        let next = self.peek()?;
        self.tokens.pop();
        match &next.0 {
            Token::Char(character) => self.write(&character.to_string()),
            Token::Command(name) => self.write(&format!("\\{name}")),
        }
        Some(next)
    }

    /// Adds to the LaTeX. A letter right after a command's name would be read into it.
    pub(super) fn write(&mut self, text: &str) {
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

    /// Takes white space.
    pub(super) fn skip_space(&mut self) {
        while self.peek().is_some_and(|next| next.0 == Token::Char(' ')) {
            self.take();
        }
    }
}
