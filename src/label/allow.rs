//! The commands a label may use. Each compiles in LaTeX with amsmath and amssymb and does nothing but set type.

use super::symbols::{self, Symbol};

/// What an allowed command does.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Command {
    /// Stands for one character.
    Symbol(&'static Symbol),
    /// A function's name, set upright; said as written.
    Function,
    /// Goes over its argument; said before it.
    Accent(&'static str),
    /// Sets its argument in another face.
    Font(Letters),
    /// Words inside math.
    Text,
    /// The name of a function as its argument.
    OperatorName,
    /// Two arguments, one over the other, with a bar.
    Fraction,
    /// `\sqrt`, with an optional index in brackets.
    Root,
    /// A small thing over or under a big one; said between them.
    Stack(&'static str),
    /// White space.
    Space,
    /// Opens a pair of delimiters that grow.
    Left,
    /// Closes it.
    Right,
    /// A delimiter of a fixed larger size.
    Big,
}

/// Which letters a face has, and whether they read as one word.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Letters {
    /// Any; a row of them is a word.
    Word,
    /// Any; each is a symbol of its own.
    Each,
    /// Latin capitals alone.
    Capitals,
    /// Latin letters alone.
    Latin,
}

const FUNCTIONS: &[&str] = &[
    "sin", "cos", "tan", "cot", "sec", "csc", "sinh", "cosh", "tanh", "coth", "arcsin", "arccos",
    "arctan", "exp", "ln", "log", "lim", "min", "max", "sup", "inf", "det", "arg", "dim", "ker",
];

const ACCENTS: &[(&str, &str)] = &[
    ("bar", "bar"),
    ("overline", "bar"),
    ("hat", "hat"),
    ("widehat", "hat"),
    ("tilde", "tilde"),
    ("widetilde", "tilde"),
    ("vec", "vector"),
    ("overrightarrow", "vector"),
    ("dot", "dot"),
    ("ddot", "double dot"),
    ("check", "check"),
    ("breve", "breve"),
    ("acute", "acute"),
    ("grave", "grave"),
    ("mathring", "ring"),
    ("underline", "underlined"),
];

const FONTS: &[(&str, Letters)] = &[
    ("mathrm", Letters::Word),
    ("mathbf", Letters::Word),
    ("mathsf", Letters::Word),
    ("mathtt", Letters::Word),
    ("mathit", Letters::Word),
    ("mathnormal", Letters::Each),
    ("boldsymbol", Letters::Each),
    ("mathcal", Letters::Capitals),
    ("mathbb", Letters::Capitals),
    ("mathfrak", Letters::Latin),
];

const TEXTS: &[&str] = &["text", "textrm", "textit", "textbf"];
const FRACTIONS: &[&str] = &["frac", "dfrac", "tfrac"];
const STACKS: &[(&str, &str)] = &[("overset", "over"), ("underset", "under")];
const SPACES: &[&str] = &[",", ":", ";", "!", " ", "quad", "qquad"];
const BIGS: &[&str] = &[
    "big", "Big", "bigg", "Bigg", "bigl", "Bigl", "biggl", "Biggl", "bigr", "Bigr", "biggr",
    "Biggr", "bigm", "Bigm",
];

/// Commands that are delimiters.
const DELIMITERS: &[&str] = &[
    "{",
    "}",
    "|",
    "langle",
    "rangle",
    "lvert",
    "rvert",
    "lVert",
    "rVert",
    "vert",
    "Vert",
    "lfloor",
    "rfloor",
    "lceil",
    "rceil",
    "lbrace",
    "rbrace",
    "backslash",
    "uparrow",
    "downarrow",
];

/// What an allowed command does; none where it is not allowed.
pub(super) fn command(name: &str) -> Option<Command> {
    let pair = |table: &[(&'static str, &'static str)]| {
        table.iter().find(|row| row.0 == name).map(|row| row.1)
    };
    if let Some(symbol) = symbols::named(name) {
        return Some(Command::Symbol(symbol));
    }
    if let Some(words) = pair(ACCENTS) {
        return Some(Command::Accent(words));
    }
    if let Some(words) = pair(STACKS) {
        return Some(Command::Stack(words));
    }
    if let Some(font) = FONTS.iter().find(|font| font.0 == name) {
        return Some(Command::Font(font.1));
    }
    let lists = [
        (FUNCTIONS, Command::Function),
        (TEXTS, Command::Text),
        (FRACTIONS, Command::Fraction),
        (SPACES, Command::Space),
        (BIGS, Command::Big),
    ];
    if let Some(found) = lists.iter().find(|list| list.0.contains(&name)) {
        return Some(found.1);
    }
    match name {
        "sqrt" => Some(Command::Root),
        "operatorname" => Some(Command::OperatorName),
        "left" => Some(Command::Left),
        "right" => Some(Command::Right),
        _ => None,
    }
}

/// Whether a character may stand for itself in math.
pub(super) fn math_char(character: char) -> bool {
    character.is_ascii_alphanumeric() || "+-*/=<>()[]|.,;:!?@".contains(character)
}

/// Whether a character may stand for itself in `\text`.
pub(super) fn text_char(character: char) -> bool {
    character.is_ascii_alphanumeric()
        || " .,;:!?()[]'`-/+=*@".contains(character)
        || super::plain::is_accented(character)
}

/// Whether a character is a delimiter that `\left` may take; `.` is none at all.
pub(super) fn delimiter_char(character: char) -> bool {
    "()[]|/.<>".contains(character)
}

/// Whether a command is a delimiter that `\left` may take.
pub(super) fn delimiter_command(name: &str) -> bool {
    DELIMITERS.contains(&name)
}

/// What to write in place of a command that is not allowed.
pub(super) fn instead(name: &str) -> String {
    let better = match name {
        "degree" | "textdegree" => r"write ^\circ",
        "bm" | "mathbold" | "bold" => r"write \boldsymbol{..}",
        "mathscr" => r"write \mathcal{..}",
        "rm" | "textup" | "mbox" | "hbox" | "mathup" | "textnormal" => {
            r"write \mathrm{..} or \text{..}"
        }
        "bf" => r"write \mathbf{..}",
        "it" => r"write \mathit{..}",
        "over" => r"write \frac{..}{..}",
        "(" | ")" | "[" | "]" | "begin" | "end" => {
            "a label is one line of math already: leave it out"
        }
        "\\" | "newline" => "a label is one line: leave it out",
        "color" | "textcolor" => "give the object a look instead",
        _ => "take it out, or say it with commands of amsmath and amssymb that only set symbols",
    };
    better.to_owned()
}

/// The names of all allowed commands.
pub(super) fn names() -> impl Iterator<Item = &'static str> {
    let singles = ["sqrt", "operatorname", "left", "right"];
    symbols::SYMBOLS
        .iter()
        .map(|symbol| symbol.0)
        .chain(ACCENTS.iter().chain(STACKS).map(|row| row.0))
        .chain(FONTS.iter().map(|font| font.0))
        .chain(
            [FUNCTIONS, TEXTS, FRACTIONS, SPACES, BIGS]
                .into_iter()
                .flatten()
                .copied(),
        )
        .chain(singles)
}
