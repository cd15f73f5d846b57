//! Figures and ledgers of an opened scene.

use super::Opened;
use super::open::place;
use crate::export::{ExportFault, Format, Options, write};
use crate::fault::{Fault, nearest};
use crate::ledger::{FaultRow, Ledger};
use crate::plate::{self, Laid, Override};
use crate::scene::When;

/// What to draw, and how.
#[derive(Clone, Debug)]
pub struct Drawing {
    /// The plate; the first, if none is named.
    pub plate: Option<String>,
    /// Only this panel, by its letter.
    pub panel: Option<char>,
    /// The viewing frame of every panel drawn, in place of its own.
    pub when: Option<When>,
    /// The format.
    pub format: Format,
    /// How it is written.
    pub options: Options,
}

/// A figure as bytes, and the faults of what it shows.
#[derive(Clone, Debug)]
pub struct Drawn {
    /// The file's bytes.
    pub bytes: Vec<u8>,
    /// Faults of the scene and of the plate, placed.
    pub faults: Vec<Fault>,
}

/// Why nothing was made.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
#[error("{what}; {mend}")]
pub struct TaskFault {
    /// What is wrong.
    pub what: String,
    /// What would mend it.
    pub mend: String,
    /// The faults of the scene that are behind it, placed.
    pub faults: Vec<Fault>,
}

impl TaskFault {
    fn new(what: impl Into<String>, mend: impl Into<String>) -> Self {
        Self {
            what: what.into(),
            mend: mend.into(),
            faults: Vec::new(),
        }
    }
}

impl From<ExportFault> for TaskFault {
    fn from(fault: ExportFault) -> Self {
        Self::new(fault.what, fault.mend)
    }
}

/// Lays out a plate by name (the first, if none is named; one that shows everything, if the scene has none). `None`
/// if no plate has that name. Faults come placed.
pub fn lay_out(opened: &Opened, plate: Option<&str>, change: &Override) -> Option<Laid> {
    let scene = &opened.scene;
    let (name, plate) = match plate {
        Some(name) => {
            let (name, object) = scene.plates.get_key_value(name)?;
            (name.to_string(), object.form.clone())
        }
        None => match scene.plates.first() {
            Some((name, object)) => (name.to_string(), object.form.clone()),
            None => ("everything".to_owned(), plate::everything(&opened.solved)),
        },
    };
    let mut laid = plate::lay_out(&opened.solved, &name, &plate, change);
    place(&opened.places, &mut laid.faults);
    Some(laid)
}

/// Draws a plate to the bytes of a file.
///
/// # Errors
/// Where the plate, the panel or the frame is not there, or the format cannot hold the figure.
pub fn draw(opened: &Opened, drawing: &Drawing) -> Result<Drawn, TaskFault> {
    let plate = drawing.plate.as_deref();
    let panels = panel_count(opened, plate)?;
    let only = drawing
        .panel
        .map(|letter| panel_index(letter, panels))
        .transpose()?;
    if let Some(when) = &drawing.when {
        viewing(opened, when)?;
    }
    let change = Override {
        viewing: vec![drawing.when.clone(); panels],
        only,
    };
    let laid = lay_out(opened, plate, &change).ok_or_else(|| no_plate(opened, plate))?;
    let mut faults = opened.faults.clone();
    faults.extend(laid.faults);
    place(&opened.places, &mut faults);
    if laid.panels.iter().all(|panel| panel.is_blank) {
        let mend = if faults.is_empty() {
            "add events, lines or particles"
        } else {
            "mend what is listed of it"
        };
        let blank = TaskFault::new("nothing of the plate can be drawn", mend);
        return Err(TaskFault { faults, ..blank });
    }
    let bytes = write(&laid.sheet, drawing.format, &drawing.options)?;
    Ok(Drawn { bytes, faults })
}

/// The ledger in the frame asked for, with the faults of the scene.
///
/// # Errors
/// Where no such frame is sound.
pub fn ledger(opened: &Opened, from: &When) -> Result<Ledger, TaskFault> {
    let viewing = viewing(opened, from)?;
    let mut ledger = crate::ledger::ledger(&opened.solved, &viewing);
    let scene_faults = opened.faults.iter().map(fault_row);
    ledger.faults = scene_faults
        .chain(std::mem::take(&mut ledger.faults))
        .collect();
    Ok(ledger)
}

fn fault_row(fault: &Fault) -> FaultRow {
    FaultRow {
        object: fault.object.to_string(),
        line: fault.place.map(|p| p.line),
        column: fault.place.map(|p| p.column),
        what: fault.what.clone(),
        mend: fault.mend.clone(),
    }
}

fn viewing(opened: &Opened, when: &When) -> Result<crate::solve::Viewing, TaskFault> {
    let solved = &opened.solved;
    solved.viewing(when).ok_or_else(|| match when {
        When::Frame(name) if opened.scene.frames.contains_key(name.as_str()) => TaskFault::new(
            format!("frame \"{name}\" is at fault"),
            "mend what is listed of it first".to_owned(),
        ),
        When::Frame(name) => {
            let known = solved.frames.keys().map(|n| &**n).chain([&*solved.base]);
            TaskFault::new(
                format!("there is no frame named \"{name}\""),
                offer(name, known),
            )
        }
        When::Base | When::Rapidity(_) => TaskFault::new(
            "that is no rapidity".to_owned(),
            "give a number between -600 and 600".to_owned(),
        ),
    })
}

fn panel_count(opened: &Opened, plate: Option<&str>) -> Result<usize, TaskFault> {
    let plates = &opened.scene.plates;
    match plate {
        Some(name) => plates
            .get(name)
            .map(|object| object.form.panels.len())
            .ok_or_else(|| no_plate(opened, plate)),
        None => Ok(match plates.first() {
            Some((_, object)) => object.form.panels.len(),
            None => plate::everything(&opened.solved).panels.len(),
        }),
    }
}

fn no_plate(opened: &Opened, plate: Option<&str>) -> TaskFault {
    let name = plate.unwrap_or_default();
    let known = opened.scene.plates.keys().map(|n| &**n);
    TaskFault::new(
        format!("there is no plate named \"{name}\""),
        offer(name, known),
    )
}

fn panel_index(letter: char, panels: usize) -> Result<usize, TaskFault> {
    let letter = letter.to_ascii_lowercase();
    let index = usize::try_from(u32::from(letter))
        .unwrap_or(0)
        .wrapping_sub(usize::from(b'a'));
    if index < panels {
        return Ok(index);
    }
    let last = char::from(b'a' + u8::try_from(panels.saturating_sub(1).min(25)).unwrap_or(0));
    let mend = if panels < 2 {
        "it has only a".to_owned()
    } else {
        format!("it has a to {last}")
    };
    Err(TaskFault::new(
        format!("the plate has no panel \"{letter}\""),
        mend,
    ))
}

fn offer<'a>(name: &str, known: impl Iterator<Item = &'a str> + Clone) -> String {
    if let Some(near) = nearest(name, known.clone()) {
        return format!("perhaps \"{near}\" is meant");
    }
    let names: Vec<String> = known.take(12).map(|n| format!("\"{n}\"")).collect();
    if names.is_empty() {
        "the scene has none".to_owned()
    } else {
        format!("the scene has {}", names.join(", "))
    }
}
