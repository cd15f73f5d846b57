//! What can be said on the command line.

use std::path::PathBuf;

use clap::{Args, Parser, Subcommand, ValueEnum};

use crate::quantity::Typed;
use crate::scene::When;

/// Drafts numerically exact spacetime and energy-momentum figures, and the numbers to quote beside them.
///
/// Kinematics only: no rates, no dose, no shielding. Radiation safety belongs to licensed people and local rules.
#[derive(Debug, Parser)]
#[command(name = "conewright", version, args_conflicts_with_subcommands = true)]
pub struct Parsed {
    /// The scene to open on the desk
    pub scene: Option<PathBuf>,
    /// How the desk is painted; by OpenGL where it works, else in software
    #[arg(long, value_enum)]
    pub paint: Option<Paint>,
    /// Something other than the desk
    #[command(subcommand)]
    pub command: Option<Command>,
}

/// How the desk is painted.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum Paint {
    /// By OpenGL
    Gl,
    /// By the program's own software drawing
    Software,
}

/// The verbs.
#[derive(Debug, Subcommand)]
pub enum Command {
    /// Write a plate as a figure
    Draw(Draw),
    /// Print the numbers of a scene in a frame
    Ledger(LedgerArgs),
    /// List what is wrong with scenes: exit 0 all sound, 1 findings, 2 unreadable
    Audit(Audit),
}

/// The viewing frame.
#[derive(Debug, Args)]
pub struct Frame {
    /// The viewing frame, by name
    #[arg(long, value_name = "NAME", conflicts_with = "rapidity")]
    frame: Option<String>,
    /// The viewing frame, by its rapidity along x relative to the base
    #[arg(long, value_name = "ETA", allow_hyphen_values = true)]
    rapidity: Option<String>,
}

impl Frame {
    /// What was said, if anything.
    pub fn when(&self) -> Option<When> {
        match (&self.frame, &self.rapidity) {
            (Some(name), _) => Some(When::Frame(name.clone())),
            (None, Some(eta)) => Some(When::Rapidity(Typed::Text(eta.trim().to_owned()))),
            (None, None) => None,
        }
    }
}

/// Write a plate as a figure.
#[derive(Debug, Args)]
pub struct Draw {
    /// The scene
    pub scene: PathBuf,
    /// The file to write: its ending, .svg .pdf .png or .tex, says the format
    #[arg(long, value_name = "FILE")]
    pub to: PathBuf,
    /// The plate; the first if left out
    #[arg(long, value_name = "NAME")]
    pub plate: Option<String>,
    /// Only this panel of it
    #[arg(long, value_name = "LETTER")]
    pub panel: Option<char>,
    /// The viewing frame of every panel drawn
    #[command(flatten)]
    pub frame: Frame,
    /// Dots per inch of a .png
    #[arg(long, value_name = "N", default_value_t = 600.0)]
    pub dpi: f64,
    /// Labels as text with fonts or as outlines (.svg usually outlines, .pdf usually text)
    #[arg(long, value_enum, value_name = "HOW")]
    pub text: Option<Text>,
    /// Replace the file if it exists
    #[arg(long)]
    pub force: bool,
}

/// How labels are written.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum Text {
    /// As text with fonts
    Real,
    /// As outlines
    Outline,
}

/// Print the numbers of a scene in a frame.
#[derive(Debug, Args)]
pub struct LedgerArgs {
    /// The scene
    pub scene: PathBuf,
    /// The viewing frame; the base if left out
    #[command(flatten)]
    pub frame: Frame,
    /// How the numbers are printed
    #[arg(long = "as", value_enum, value_name = "FORM", default_value_t = Form::Text)]
    pub form: Form,
}

/// How the ledger is printed.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum Form {
    /// Tables aligned for reading
    Text,
    /// One object, for other programs
    Json,
}

/// List what is wrong with scenes.
#[derive(Debug, Args)]
pub struct Audit {
    /// The scenes
    #[arg(required = true)]
    pub scenes: Vec<PathBuf>,
}

/// Reads the command line; help, version and mistakes are printed and end the program.
pub fn parse() -> Parsed {
    Parsed::parse()
}
