//! Collisions.

use crate::scene::faults::Faults;
use crate::scene::fields::Form;
use crate::scene::tree::Value;
use crate::scene::values::{one_of, text, texts};
use crate::scene::{Closure, Collision};

/// Reads a collision. Without a closure nothing in it is unknown.
pub(in crate::scene) fn collision<'a>(
    value: Value<'a>,
    faults: &mut Faults<'a>,
) -> Option<Collision> {
    let form = Form::anonymous(value, &["before", "after", "closure", "at"], faults);
    let before = form.need("before", faults, texts);
    let after = form.need("after", faults, texts);
    let closure = form.may("closure", faults, closure);
    let at = form.may("at", faults, text)?;
    Some(Collision {
        before: before?,
        after: after?,
        closure: closure?.unwrap_or(Closure::Given),
        at,
    })
}

fn closure<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Closure> {
    let words = [
        ("Given", Closure::Given),
        ("Merge", Closure::Merge),
        ("Remainder", Closure::Remainder),
    ];
    one_of(value, faults, &words)
}
