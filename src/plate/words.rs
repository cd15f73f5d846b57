//! A sheet in words, for those who do not see it.

use super::job::{Job, letter};
use super::{Contents, Prepared};
use crate::scene::Plate;
use crate::solve::Viewing;

/// Most names of one kind that are listed.
const MOST_NAMES: usize = 6;

/// Two sentences or so: what the panels are, and what they show.
pub(super) fn of(job: &Job<'_>, plate: &Plate, panels: &[Prepared]) -> String {
    let several = panels.len() > 1;
    let mut sentences = Vec::new();
    for panel in panels {
        let lead = if several {
            format!("Panel {}: ", letter(panel.index))
        } else {
            String::new()
        };
        let (kind, shown) = match &panel.contents {
            Contents::Spacetime(contents) => ("spacetime diagram", contents.words()),
            Contents::Energy(contents) => ("energy-momentum diagram", contents.words()),
            Contents::Blank => ("empty panel", Vec::new()),
        };
        let view = frame_words(job, &panel.viewing);
        sentences.push(capital(&format!("{lead}{kind} {view}.")));
        if !shown.is_empty() {
            sentences.push(format!("It shows {}.", listed(&shown)));
        }
    }
    let note = plate
        .title
        .as_ref()
        .filter(|title| !title.is_empty())
        .map(|title| format!("{title}. "));
    format!("{}{}", note.unwrap_or_default(), sentences.join(" "))
}

fn frame_words(job: &Job<'_>, from: &Viewing) -> String {
    match &from.name {
        Some(name) if *name == job.solved.base => format!("in the frame {name}"),
        Some(name) => format!(
            "in the frame {name}, moving relative to {}",
            job.solved.base
        ),
        None => {
            let rapidity = crate::quantity::significant(from.boost.rapidity().value(), 3);
            format!(
                "in a frame at rapidity {rapidity} relative to {}",
                job.solved.base
            )
        }
    }
}

/// `events A, B and C`; a long list is counted.
pub(super) fn kind(word: &str, names: &[&str]) -> Option<String> {
    match names {
        [] => None,
        [name] => Some(format!("{word} {name}")),
        _ if names.len() > MOST_NAMES => Some(format!("{} {word}s", names.len())),
        [most @ .., last] => Some(format!("{word}s {} and {last}", most.join(", "))),
    }
}

fn listed(parts: &[String]) -> String {
    match parts {
        [] => String::new(),
        [one] => one.clone(),
        [most @ .., last] => format!("{}; and {last}", most.join("; ")),
    }
}

fn capital(text: &str) -> String {
    let mut chars = text.chars();
    chars.next().map_or_else(String::new, |first| {
        first.to_uppercase().chain(chars).collect()
    })
}
