//! Carrying a verb out: results to standard output, words about them to standard error.

use std::io::Write as _;
use std::path::Path;

use super::args::{Audit, Command, Draw, Form, LedgerArgs, Text};
use crate::disk::{self, Overwrite};
use crate::export::{self, Format, Lettering, Options};
use crate::fault::{Fault, Weight};
use crate::scene::When;
use crate::task::{self, Drawing, OpenFault, Opened};

/// All is well.
const SOUND: u8 = 0;
/// Something was made although the scene has faults, or an audit has findings.
const FAULTS: u8 = 1;
/// Nothing was made.
const NOTHING: u8 = 2;

/// Carries a verb out; the exit code.
pub fn run(command: &Command) -> u8 {
    match command {
        Command::Draw(args) => draw(args),
        Command::Ledger(args) => ledger(args),
        Command::Audit(args) => audit(args),
    }
}

fn draw(args: &Draw) -> u8 {
    let format = match Format::of(&args.to) {
        Ok(format) => format,
        Err(fault) => {
            let to = args.to.display();
            return refuse(&format!("{to}: {}; {}", fault.what, fault.mend));
        }
    };
    let Some(opened) = open(&args.scene) else {
        return NOTHING;
    };
    let lettering = match args.text {
        None => Lettering::Usual,
        Some(Text::Real) => Lettering::Real,
        Some(Text::Outline) => Lettering::Outline,
    };
    let drawing = Drawing {
        plate: args.plate.clone(),
        panel: args.panel,
        when: args.frame.when(),
        format,
        options: Options {
            dpi: args.dpi,
            lettering,
        },
    };
    let drawn = match task::draw(&opened, &drawing) {
        Ok(drawn) => drawn,
        Err(fault) => {
            tell(&args.scene, &fault.faults);
            return refuse(&format!("{}: {fault}", args.scene.display()));
        }
    };
    let overwrite = if args.force {
        Overwrite::Replace
    } else {
        Overwrite::Refuse
    };
    if let Err(fault) = disk::write(&args.to, &drawn.bytes, overwrite) {
        let force = if !args.force && args.to.is_file() {
            " (--force)"
        } else {
            ""
        };
        return refuse(&format!("{}; {}{force}", fault.what, fault.mend));
    }
    tell(&args.scene, &drawn.faults)
}

fn ledger(args: &LedgerArgs) -> u8 {
    let Some(opened) = open(&args.scene) else {
        return NOTHING;
    };
    let ledger = match task::ledger(&opened, &args.frame.when().unwrap_or(When::Base)) {
        Ok(ledger) => ledger,
        Err(fault) => return refuse(&format!("{}: {fault}", args.scene.display())),
    };
    let bytes = match args.form {
        Form::Text => export::text(&ledger),
        Form::Json => export::json(&ledger),
    };
    print(&bytes);
    let told = tell(&args.scene, &opened.faults);
    // The rest are faults of the frame: what cannot be seen from it.
    let unseen = ledger.faults.get(opened.faults.len()..).unwrap_or_default();
    for row in unseen {
        say(&format!(
            "{}: {}: {}; {}",
            args.scene.display(),
            row.object,
            row.what,
            row.mend
        ));
    }
    if unseen.is_empty() { told } else { FAULTS }
}

fn audit(args: &Audit) -> u8 {
    let mut worst = SOUND;
    for path in &args.scenes {
        let file = path.display().to_string();
        let (code, lines) = match task::open(path) {
            Err(fault) => (NOTHING, vec![fault.line(&file)]),
            Ok(opened) => {
                let faults = task::audit(&opened);
                let code = if faults.is_empty() { SOUND } else { FAULTS };
                (code, faults.iter().map(|f| f.line(&file)).collect())
            }
        };
        worst = worst.max(code);
        for line in lines {
            print(format!("{line}\n").as_bytes());
        }
    }
    worst
}

fn open(path: &Path) -> Option<Opened> {
    match task::open(path) {
        Ok(opened) => Some(opened),
        Err(fault) => {
            say(&OpenFault::line(&fault, &path.display().to_string()));
            None
        }
    }
}

/// Lists faults and findings; the exit code of what was made in spite of them.
fn tell(path: &Path, faults: &[Fault]) -> u8 {
    let file = path.display().to_string();
    for fault in faults {
        say(&fault.line(&file));
    }
    if faults.iter().any(|f| f.weight == Weight::Fault) {
        FAULTS
    } else {
        SOUND
    }
}

fn refuse(words: &str) -> u8 {
    say(words);
    NOTHING
}

/// A reader that has gone away is no fault of ours.
fn print(bytes: &[u8]) {
    let mut out = std::io::stdout().lock();
    let _reader_gone = out.write_all(bytes).and_then(|()| out.flush());
}

fn say(words: &str) {
    let _reader_gone = writeln!(std::io::stderr().lock(), "{words}");
}
