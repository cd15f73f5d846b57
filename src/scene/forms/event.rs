//! Events.

use crate::scene::Event;
use crate::scene::faults::Faults;
use crate::scene::fields::Form;
use crate::scene::tree::Value;
use crate::scene::values::{list, number, text, unknown};

/// The forms of an event.
const FORMS: [&str; 4] = ["At", "Along", "Meeting", "LightFrom"];

/// Reads an event.
pub(in crate::scene) fn event<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Event> {
    match value.word() {
        "At" => {
            let form = Form::open(value, &["t", "x", "frame", "rapidity"], None, faults);
            let (t, x) = (
                form.need("t", faults, number),
                form.need("x", faults, number),
            );
            let when = form.when(faults)?;
            Some(Event::At { t: t?, x: x?, when })
        }
        "Along" => {
            let form = Form::open(value, &["line", "clock"], None, faults);
            let line = form.need("line", faults, text);
            let clock = form.need("clock", faults, number)?;
            Some(Event::Along { line: line?, clock })
        }
        "Meeting" => {
            let form = Form::open(value, &["of"], Some("of"), faults);
            let of = form.need("of", faults, two_names)?;
            Some(Event::Meeting { of })
        }
        "LightFrom" => {
            let form = Form::open(value, &["event", "meets"], None, faults);
            let event = form.need("event", faults, text);
            let meets = form.need("meets", faults, text)?;
            Some(Event::LightFrom {
                event: event?,
                meets,
            })
        }
        _ => unknown(value, "an event", FORMS.into_iter(), faults),
    }
}

/// A list of two names.
fn two_names<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<[String; 2]> {
    let names = list(value, faults, text)?;
    let two = <[String; 2]>::try_from(names).ok();
    if two.is_none() {
        faults.add(
            value.start(),
            "two names are wanted here",
            "write [\"a\", \"b\"]",
        );
    }
    two
}
