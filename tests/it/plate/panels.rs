//! What a plate's panels may be, and whose axes they take.

use conewright::fault::Fault;

use super::{laid, says};

#[test]
fn a_line_without_one_rest_frame_along_x_has_no_axes() {
    let scene = |panel: &str| {
        format!(
            r#"Scene(format: 1, base: "b", units: (time: "s", energy: "GeV"),
            events: {{ "start": At(t: 0, x: 0), "turn": At(t: 2, x: 1), "end": At(t: 4, x: 0) }},
            lines: {{
                "aslant": Follows(particle: "q", through: "start"),
                "bent": Broken(through: ["start", "turn", "end"]),
                "beam": Light(through: "start", toward: Plus),
                "clock": Free(through: "turn", velocity: Beta("3/5")),
            }},
            particles: {{ "q": (species: "p", state: Components(px: 1, py: 0.5)) }},
            plates: {{ "p": (panels: [(view: Spacetime, {panel})]) }})"#
        )
    };
    for (line, what) in [
        (
            "aslant",
            "line aslant also moves across x; a spacetime panel shows boosts along x",
        ),
        ("bent", "line bent bends"),
        ("beam", "line beam is light"),
    ] {
        for (panel, field) in [
            (format!(r#"axes: ["clock", "{line}"]"#), "panels.0.axes.1"),
            (
                format!(r#"simultaneity: [("turn", "{line}")]"#),
                "panels.0.simultaneity.0.1",
            ),
        ] {
            let laid = laid(&scene(&panel), "p");
            let found: Vec<&Fault> = laid
                .faults
                .iter()
                .filter(|f| f.what.starts_with(what))
                .collect();
            assert_eq!(found.len(), 1, "{panel}: {:?}", laid.faults);
            assert_eq!(found[0].field, field);
        }
    }
    assert_eq!(
        laid(&scene(r#"axes: ["clock"]"#), "p")
            .faults
            .iter()
            .filter(|f| f.field.starts_with("panels.0.axes"))
            .count(),
        0
    );
}

#[test]
fn a_plate_has_as_many_panels_as_letters_and_at_least_one() {
    let scene = |panels: &str| {
        format!(
            r#"Scene(format: 1, base: "b", events: {{ "start": At(t: 0, x: 0) }},
            plates: {{ "p": (text: "48 pt", panels: [{panels}]) }})"#
        )
    };
    let seen = laid(&scene(&"(view: Spacetime), ".repeat(30)), "p");
    assert_eq!(seen.panels.len(), 26);
    assert_eq!(seen.panels[25].letter, 'z');
    assert!(seen.sheet.width < 5000.0, "{} mm", seen.sheet.width);
    assert!(says(&seen.faults, "at most 26 panels"));
    assert!(!says(
        &laid(&scene(&"(view: Spacetime), ".repeat(26)), "p").faults,
        "26 panels"
    ));
    let bare = laid(&scene(""), "p");
    let fault = bare.faults.iter().find(|f| f.field == "panels");
    assert!(
        fault.is_some_and(|f| f.what.contains("no panels")),
        "{:?}",
        bare.faults
    );
}
