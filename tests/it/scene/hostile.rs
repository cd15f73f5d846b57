//! Hostile texts end in words.

use std::fmt::Write as _;
use std::time::{Duration, Instant};

use conewright::disk::LIMIT;
use conewright::fault::Place;
use conewright::scene::{Unreadable, read};
use proptest::prelude::*;

use super::{RELAY, place_of, with};

fn unreadable(text: &str) -> Unreadable {
    let refused = read(text).unwrap_err();
    assert!(!refused.what.is_empty() && !refused.mend.is_empty());
    refused
}

/// Refused at the n-th occurrence of some text, with some words.
fn refused_at(text: &str, needle: &str, n: usize, words: &str) {
    let refused = unreadable(text);
    assert_eq!(refused.place, Some(place_of(text, needle, n)), "{refused}");
    assert!(refused.what.contains(words), "{refused}");
}

#[test]
fn texts_that_are_no_scene_are_refused() {
    for text in ["", "  \n", "// nothing", "\u{FEFF}"] {
        assert!(unreadable(text).what.contains("no `Scene( .. )`"));
    }
    refused_at("(format: 1, base: \"b\")", "(", 0, "begin with `Scene(`");
    refused_at("a: Scene(format: 1)", "a", 0, "begin with `Scene(`");
    refused_at("Scene", "S", 0, "begin with `Scene(`");
    refused_at("\u{0}\u{1}\u{7f}\u{fffd}PNG", "\u{0}", 0, "begin with");
    refused_at("Scene(format: 1) Scene()", "Scene", 1, "behind the bracket");
    refused_at("Scene(format: 1),", ",", 0, "behind the bracket");
    refused_at("Scene(format: 1): 2", "Scene", 0, "begin with");
}

#[test]
fn brackets_strings_and_comments_must_match() {
    refused_at(
        "Scene(\n [1, 2)",
        ")",
        0,
        "`)` cannot close the `[` that opens in line 2",
    );
    refused_at(
        "Scene(a: {\n}",
        "(",
        0,
        "`(` that opens here is never closed",
    );
    refused_at("Scene())", ")", 1, "never opened");
    refused_at("Scene(\n\"a)", "\"", 0, "the string that begins here");
    refused_at("Scene(\n\"a\\\")", "\"", 0, "the string that begins here");
    refused_at("Scene(\"a\\", "\"", 0, "the string that begins here");
    refused_at("Scene(r##\"a\"#)", "r##", 0, "the string that begins here");
    refused_at(
        "Scene(\n /* /* */ )",
        "/*",
        0,
        "the comment that begins here",
    );
    // Brackets within strings, characters and comments count for nothing.
    let text = with("title: \")]}\\\"\", /* ( [ */ events: {}, // {\n lines: {}");
    assert!(read(&text).unwrap().faults.is_empty());
    assert!(read("Scene(a: '\"', b: '(', c: '\\'')").is_ok());
}

#[test]
fn a_format_above_ours_is_refused() {
    let text = "Scene(\n base: \"b\", format: 2)";
    refused_at(text, "2", 0, "format 2, this version reads up to 1");
    refused_at("Scene(format: 99999999999999999999)", "99", 0, "format 99");
    for format in ["0", "-1", "1.0", "\"1\"", "one"] {
        let text = format!("Scene(format: {format}, base: \"b\")");
        let faults = read(&text).unwrap().faults;
        assert_eq!(faults.len(), 1, "{format}");
        assert_eq!(
            (&*faults[0].field, faults[0].place.unwrap().column),
            ("format", 15)
        );
    }
}

#[test]
fn depth_is_limited() {
    for bracket in ["(", "[", "{", "Beta("] {
        let text = format!("Scene({}", bracket.repeat(100_000));
        assert!(unreadable(&text).what.contains("more than 64 deep"));
    }
    let text = with(&format!("deep: {}{}", "[".repeat(63), "]".repeat(63)));
    assert_eq!(read(&text).unwrap().faults.len(), 1);
    let text = with(&format!("deep: {}{}", "[".repeat(64), "]".repeat(64)));
    refused_at(&text, "[]", 0, "more than 64 deep");
    assert!(unreadable(&"/*".repeat(100_000)).what.contains("comment"));
}

#[test]
fn size_is_limited() {
    let most = usize::try_from(LIMIT).unwrap();
    let mut text = String::from("Scene(format: 1, base: \"b\")");
    text.extend(std::iter::repeat_n(' ', most - text.len()));
    assert!(read(&text).is_ok());
    text.push(' ');
    let refused = unreadable(&text);
    assert_eq!(refused.place, None);
    assert!(refused.what.contains("16 MB"));
    let commas = format!("Scene({}", "0,".repeat(3_000_000));
    assert!(unreadable(&commas).what.contains("2097152 values"));
}

fn events(count: usize, last: &str) -> String {
    let mut text = String::from("events: {\n");
    for n in 0..count {
        writeln!(text, "\"e{n}\": At(t: {n}, x: 0),").unwrap();
    }
    text.push_str(last);
    text.push('}');
    with(&text)
}

#[test]
fn the_number_of_objects_is_limited() {
    let text = events(100_000, "");
    assert_eq!(read(&text).unwrap().scene.events.len(), 100_000);
    let text = events(100_000, "\"one more\": At(t: 0, x: 0)");
    refused_at(&text, "\"one more\"", 0, "more than 100000 objects");
}

/// A bound that nothing quadratic meets at this size (10^9 steps of some ns), and everything linear meets in any build.
fn soon(text: &str) {
    let start = Instant::now();
    let reading = read(text);
    if let Ok(reading) = &reading {
        assert!(!reading.faults.is_empty());
        let mut unplaced = reading.faults.clone();
        for fault in &mut unplaced {
            fault.place = None;
        }
        reading.places.mark(&mut unplaced);
    }
    assert!(start.elapsed() < Duration::from_secs(20));
}

#[test]
fn many_faults_take_little_time() {
    let bad = "\"a\": At(t: nan, x: \"\\q\", y: 0),".repeat(30_000);
    soon(&with(&format!("events: {{ {bad} }}")));
    let unknown = "unknown: 0, ".repeat(30_000);
    soon(&with(&unknown));
    soon(&with(&format!("events: {{ \"a\": At({unknown}) }}")));
    let strangers = "0, ".repeat(30_000);
    soon(&with(&format!("lines: {{ \"a\": Broken([{strangers}]) }}")));
    soon(&with(&format!("lines: {{ {strangers} }}")));
    soon(&with(&strangers));
    let long = "x".repeat(1_000_000);
    soon(&with(&format!(
        "events: {{ \"a\": At({long}: {long}, t: \"{}\") }}",
        "\\q".repeat(30_000)
    )));
    soon(&with(&format!("events: {{ \"{long}\": {long}({long}) }}")));
    soon(&with(&format!(
        "events: {{ \"a\": At(t: {}, x: 0) }}",
        "9".repeat(1_000_000)
    )));
    soon(&format!("Scene({}", "r#".repeat(1_000_000)));
    soon(&with(&"/".repeat(1_000_000)));
}

#[test]
fn a_million_digits_are_a_fault() {
    let text = with(&format!(
        "events: {{ \"a\": At(t: {}, x: 0) }}",
        "9".repeat(257)
    ));
    let faults = read(&text).unwrap().faults;
    assert!(faults[0].what.contains("more than 256 characters"));
}

#[test]
fn faults_say_no_more_than_fits_a_line() {
    let long = "x\u{0}\n".repeat(10_000);
    let text = with(&format!("{long}: 1, events: {{ \"a\": \"{long}\" }}"));
    for fault in read(&text).unwrap().faults {
        assert!(fault.what.len() + fault.mend.len() < 1000, "{}", fault.what);
        assert!(!fault.what.contains(char::is_control));
    }
}

#[test]
fn places_of_refusals_count_as_editors_do() {
    let refused = unreadable("\u{FEFF}Scene(\r\n \u{1F680}\u{e9} ]");
    assert_eq!(refused.place, Some(Place { line: 2, column: 5 }));
}

/// Pieces of scenes, in any order.
fn pieces() -> impl Strategy<Value = String> {
    let piece = prop::sample::select(vec![
        "Scene(",
        "(",
        ")",
        "[",
        "]",
        "{",
        "}",
        ",",
        ":",
        "\"",
        "\\",
        "//",
        "/*",
        "*/",
        "\n",
        "\r",
        "r#\"",
        "\"#",
        "'",
        "format: 1,",
        "base: \"b\",",
        "events: {",
        "\"a\": ",
        "At(",
        "t: 0",
        "x: ",
        "Beta(",
        "state: ",
        "particles: {",
        "AtRest",
        "panels: [",
        "plates: {",
        "1e5",
        "-",
        "\u{e9}",
        "label: \"",
        "\\xC3",
        "\\u{",
        "of: ",
        "signals",
        "\u{FEFF}",
        " ",
    ]);
    prop::collection::vec(piece, 0..60).prop_map(|pieces| pieces.concat())
}

/// Reads and asks for a place of everything; says nothing of what comes out.
fn survives(text: &str) {
    if let Ok(reading) = read(text) {
        assert!(reading.faults.iter().all(|fault| fault.place.is_some()));
        for object in &reading.unread {
            assert!(reading.places.find(object, "t", 5).is_some());
        }
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn any_text_is_survived(text in any::<String>(), inner in any::<String>()) {
        survives(&text);
        survives(&with(&inner));
    }

    #[test]
    fn any_order_of_pieces_is_survived(text in pieces()) {
        survives(&text);
        survives(&with(&text));
        survives(&with(&format!("events: {{ \"a\": At({text}) }}")));
    }

    #[test]
    fn a_cut_scene_is_survived(from in 0..RELAY.len(), to in 0..RELAY.len()) {
        let (from, to) = (from.min(to), from.max(to));
        survives(&RELAY[..from]);
        survives(&RELAY[to..]);
        survives(&[&RELAY[..from], &RELAY[to..]].concat());
        survives(&[&RELAY[to..], &RELAY[from..to], &RELAY[..from]].concat());
    }

    #[test]
    fn flipped_bytes_are_survived(flips in prop::collection::vec((0..RELAY.len(), any::<u8>()), 1..6)) {
        let mut bytes = RELAY.as_bytes().to_vec();
        for (at, byte) in flips {
            bytes[at] = byte;
        }
        survives(&String::from_utf8_lossy(&bytes));
    }
}
