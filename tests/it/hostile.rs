//! Files that mean harm, or were harmed: an error or a drawing, never a panic, never a hang.

use std::fs;
use std::process::{Command, Stdio};

use crate::program::examples;

/// Mutilated copies, all told.
const COPIES: usize = 500;
/// Seconds that one may take.
const SECONDS: &str = "5";
/// Memory that one may take, KiB.
const MEMORY: &str = "512000";

/// A small generator with a seed (xorshift64*).
struct Chance(u64);

impl Chance {
    fn next(&mut self) -> u64 {
        self.0 ^= self.0 >> 12;
        self.0 ^= self.0 << 25;
        self.0 ^= self.0 >> 27;
        self.0.wrapping_mul(0x2545_f491_4f6c_dd1d)
    }

    fn below(&mut self, n: usize) -> usize {
        usize::try_from(self.next() % n.max(1) as u64).unwrap()
    }
}

/// Runs the program on a file under limits of time and memory: its exit code and its words.
fn limited(verb: &[&str]) -> (i32, String) {
    let script = format!("ulimit -v {MEMORY}; exec timeout {SECONDS} \"$@\"");
    let output = Command::new("sh")
        .args(["-c", &script, "sh", env!("CARGO_BIN_EXE_conewright")])
        .args(verb)
        .env_remove("DISPLAY")
        .stdin(Stdio::null())
        .output()
        .unwrap();
    let words = String::from_utf8_lossy(&output.stderr).into_owned();
    (output.status.code().unwrap_or(-1), words)
}

fn survives(bytes: &[u8], what: &str) {
    let folder = tempfile::tempdir().unwrap();
    let scene = folder.path().join("scene.ron");
    fs::write(&scene, bytes).unwrap();
    let to = folder.path().join("figure.svg");
    let (code, words) = limited(&[
        "draw",
        scene.to_str().unwrap(),
        "--to",
        to.to_str().unwrap(),
    ]);
    let kept = || {
        let copy = std::env::temp_dir().join("conewright-mutilated.ron");
        fs::write(&copy, bytes).unwrap();
        copy
    };
    assert!(
        (0..=2).contains(&code),
        "{what}: exit {code}: {words}: {}",
        kept().display()
    );
    assert!(
        !words.contains("panicked"),
        "{what}: {words}: {}",
        kept().display()
    );
    assert!(
        code == 0 || !words.is_empty(),
        "{what}: exit {code} without words: {}",
        kept().display()
    );
    assert_eq!(
        code != 2,
        to.exists(),
        "{what}: {words}: {}",
        kept().display()
    );
}

/// The start of each word that could be a field's or a form's name.
fn words_of(text: &str) -> Vec<(usize, usize)> {
    let mut found = Vec::new();
    let mut start = None;
    for (i, c) in text.char_indices() {
        match (c.is_ascii_alphabetic() || c == '_', start) {
            (true, None) => start = Some(i),
            (false, Some(s)) => {
                found.push((s, i));
                start = None;
            }
            _ => {}
        }
    }
    found
}

/// The spans of values: what stands between `: ` and the next comma or closing bracket.
fn values_of(text: &str) -> Vec<(usize, usize)> {
    text.match_indices(": ")
        .map(|(i, _)| {
            let rest = &text[i + 2..];
            let end = rest.find([',', ')', '}', '\n']).unwrap_or(rest.len());
            (i + 2, i + 2 + end)
        })
        .collect()
}

fn mutilated(text: &str, chance: &mut Chance) -> Vec<u8> {
    let mut bytes = text.as_bytes().to_vec();
    match chance.below(6) {
        0 => bytes.truncate(chance.below(text.len())),
        1 => {
            for _ in 0..=chance.below(8) {
                let i = chance.below(bytes.len());
                bytes[i] ^= 1 << chance.below(8);
            }
        }
        2 => {
            let words = words_of(text);
            let (a, b) = words[chance.below(words.len())];
            let (c, d) = words[chance.below(words.len())];
            return format!("{}{}{}", &text[..a], &text[c..d], &text[b..]).into_bytes();
        }
        3 => {
            let values = values_of(text);
            let (a, b) = values[chance.below(values.len())];
            let (c, d) = values[chance.below(values.len())];
            return format!("{}{}{}", &text[..a], &text[c..d], &text[b..]).into_bytes();
        }
        4 => {
            let odd = [
                "1e999",
                "-0",
                "\"9^9^9\"",
                "\"1/0\"",
                "1e-300",
                "1e150",
                "\"tanh(40)\"",
                "inf",
                "NaN",
                "[]",
                "()",
                "\"\"",
                "\"1e308 ns\"",
                "-1e99",
                "\"sqrt(-1)\"",
                "true",
                "None",
                "Some(1)",
                "'x'",
                "1e15",
            ];
            let values = values_of(text);
            let (a, b) = values[chance.below(values.len())];
            return format!(
                "{}{}{}",
                &text[..a],
                odd[chance.below(odd.len())],
                &text[b..]
            )
            .into_bytes();
        }
        _ => {
            let (from, length) = (chance.below(bytes.len()), chance.below(60));
            let piece: Vec<u8> = bytes.iter().skip(from).take(length).copied().collect();
            let at = chance.below(bytes.len());
            bytes.splice(at..at, piece);
        }
    }
    bytes
}

#[test]
fn mutilated_examples_end_in_an_error_or_a_drawing() {
    let texts: Vec<String> = examples()
        .iter()
        .map(|p| fs::read_to_string(p).unwrap())
        .collect();
    let workers = 2;
    std::thread::scope(|scope| {
        for worker in 0..workers {
            let texts = &texts;
            scope.spawn(move || {
                for seed in (worker..COPIES).step_by(workers) {
                    let mut chance = Chance((seed as u64 + 1).wrapping_mul(0x9e37_79b9_7f4a_7c15));
                    let text = &texts[seed % texts.len()];
                    survives(&mutilated(text, &mut chance), &format!("copy {seed}"));
                }
            });
        }
    });
}

#[test]
fn a_hundred_thousand_brackets_end_in_words() {
    let deep = "[".repeat(100_000);
    for text in [
        deep.clone(),
        format!("Scene(format: 1, base: \"b\", events: {{ \"e\": At(t: {deep}"),
        format!(
            "Scene(format: 1, base: \"b\", events: {{ \"e\": At(t: {deep}{}, x: 0) }})",
            "]".repeat(100_000)
        ),
        format!(
            "Scene(format: 1, base: \"b\", events: {{ \"e\": At(t: \"{}1\", x: 0) }})",
            "(".repeat(100_000)
        ),
        format!(
            "Scene(format: 1, base: \"b\", events: {{ \"e\": At(t: 0, x: 0, label: \"{}\") }})",
            "{".repeat(900)
        ),
        "/*".repeat(50_000),
    ] {
        survives(text.as_bytes(), "deep");
    }
}

#[test]
fn sizes_beyond_the_limits_end_in_words() {
    use std::fmt::Write as _;
    survives(&vec![b' '; 17 * 1024 * 1024], "17 MiB");
    let mut many = String::from("Scene(format: 1, base: \"b\", events: {");
    for i in 0..100_001 {
        write!(many, "\"e{i}\":At(t:0,x:0),").unwrap();
    }
    many.push_str("})");
    survives(many.as_bytes(), "100,001 objects");
    survives(&[0xff, 0xfe, 0, 0], "binary");
    survives(b"", "empty");
    let wide = |width: &str| {
        format!(
            "Scene(format: 1, base: \"b\", plates: {{ \"p\": (width: \"{width}\", panels: [(view: Spacetime)]) }})"
        )
    };
    for width in ["6000 mm", "0 mm", "-5 cm", "1e300 in", "1e-9 mm"] {
        survives(wide(width).as_bytes(), width);
    }
}

#[test]
fn extreme_scenes_draw_or_say_why_not() {
    for (t, x, beta) in [
        ("1e140", "1e140", "0.999999999999"),
        ("1e-140", "0", "\"1 - 1e-30\""),
        ("\"1e150\"", "-1e150", "0"),
        ("0", "0", "\"-1 + 1e-200\""),
    ] {
        let text = format!(
            "Scene(format: 1, base: \"b\", events: {{ \"o\": At(t: 0, x: 0), \"e\": At(t: {t}, x: {x}) }},
            lines: {{ \"l\": Free(through: \"e\", velocity: Beta({beta})), \"m\": Free(through: \"o\", velocity: Beta(0)) }},
            frames: {{ \"f\": RestOf(line: \"l\") }},
            plates: {{ \"p\": (panels: [(view: Spacetime, frame: \"f\", cones: [\"o\"], axes: [\"l\", \"b\"], hyperbolas: true), (view: Spacetime)]) }})"
        );
        survives(text.as_bytes(), &text);
    }
}
