//! Whole scenes as an author leaves them.

use serde_json::Value;

use super::compare::compare;
use super::prove;
use super::solved::Oracle;
use crate::program;

const RELAY: &str = include_str!("../../data/relay.ron");

#[test]
fn the_relay_is_sound_and_right_in_every_frame() {
    let (code, lines) = program::audit(RELAY);
    assert_eq!((code, lines), (0, Vec::<String>::new()));
    prove("relay", RELAY, &["0.5", "-7"]);
    let json = program::ledger(RELAY, &["--frame", "courier"]);
    // 40 ns of his own, where he is.
    let turn = &json["events"][1];
    assert_eq!(turn["name"], "turn");
    assert!((turn["t"].as_f64().unwrap() - 40.0).abs() < 1e-13);
    assert!(turn["x"].as_f64().unwrap().abs() < 1e-13);
    // Light sent at 10 ns meets x = 3/5 t at 25 ns, and his clock reads 25 / gamma = 20 ns.
    assert!((json["events"][3]["t"].as_f64().unwrap() - 20.0).abs() < 1e-13);
}

#[test]
fn the_examples_are_right_in_every_frame() {
    for path in program::examples() {
        let text = std::fs::read_to_string(&path).unwrap();
        prove(&path.display().to_string(), &text, &["-2.5"]);
    }
}

/// Where every number of a printed value stands that is not 0.
fn numbers(value: &Value, at: &str, into: &mut Vec<String>) {
    match value {
        Value::Number(n) if n.as_f64() != Some(0.0) => into.push(at.to_owned()),
        Value::Array(items) => {
            for (i, item) in items.iter().enumerate() {
                numbers(item, &format!("{at}/{i}"), into);
            }
        }
        Value::Object(fields) => {
            for (name, field) in fields {
                numbers(field, &format!("{at}/{name}"), into);
            }
        }
        _ => {}
    }
}

/// The proof proves something: a part in 1e9 more, in any one number, is found.
#[test]
fn a_wrong_number_anywhere_is_found() {
    let oracle = Oracle::of(RELAY);
    let json = program::ledger(RELAY, &["--frame", "courier"]);
    let mut places = Vec::new();
    numbers(&json, "", &mut places);
    // A tolerance is a bound itself; what is 0 but for rounding stays so.
    let rounding = |place: &str| json.pointer(place).unwrap().as_f64().unwrap().abs() < 1e-9;
    places.retain(|place| !place.ends_with("tolerance") && !rounding(place));
    assert!(places.len() > 70, "{}", places.len());
    for place in places {
        let mut wrong = json.clone();
        let number = wrong.pointer_mut(&place).unwrap();
        *number = (number.as_f64().unwrap() * (1.0 + 1e-9)).into();
        let found = compare(&oracle, &oracle.frame("courier"), &wrong);
        assert!(!found.wrong.is_empty(), "{place} passes");
    }
}
