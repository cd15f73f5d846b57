//! Whole scenes as an author leaves them.

use super::prove;
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
