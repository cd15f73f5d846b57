//! Tests of `scene`, `disk` and `fault`.

use conewright::scene::read;

const RELAY: &str = include_str!("../data/relay.ron");

#[test]
fn a_sound_scene_reads_without_faults() {
    let reading = read(RELAY).unwrap();
    assert_eq!(reading.faults, []);
    assert_eq!(reading.unread, []);
    println!("{:#?}", reading.scene);
}
