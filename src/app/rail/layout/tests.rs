//! The rail's layout by its rules.

use proptest::prelude::*;

use super::*;
use crate::fault::ObjectId;

const WIDTH: f32 = 1280.0;

fn things(names: &[(&str, f64)]) -> Vec<RapidityTick> {
    names
        .iter()
        .map(|&(name, rapidity)| RapidityTick {
            object: ObjectId::new(Kind::Line, name),
            rapidity,
            across: 0.0,
            is_base: false,
        })
        .collect()
}

fn base(name: &str) -> RapidityTick {
    RapidityTick {
        object: ObjectId::new(Kind::Frame, name),
        rapidity: 0.0,
        across: 0.0,
        is_base: true,
    }
}

/// Seven points a character, as the desk's captions are on average.
fn measure(text: &str) -> f32 {
    text.chars().count() as f32 * 7.0
}

fn axis(ticks: &[Tick]) -> Scale {
    let (low, high) = whole(ticks.iter().map(|t| t.rapidity));
    Scale {
        low,
        high,
        left: END,
        right: WIDTH - END,
    }
}

fn buoys() -> Vec<RapidityTick> {
    let names: Vec<String> = (1..=40).map(|i| format!("buoy {i:02}")).collect();
    let mut all = vec![base("station")];
    all.extend(names.iter().enumerate().flat_map(|(i, name)| {
        let wobble = [0.0, 0.0011, -0.0007][i % 3];
        things(&[(name, 0.6 + i as f64 * 0.1 / 39.0 + wobble)])
    }));
    all.extend(things(&[("tender", 1.05)]));
    all
}

#[test]
fn things_at_one_rapidity_share_a_tick_base_first() {
    let mut all = things(&[("relay", 0.0), ("scout", -0.4)]);
    all.push(base("station"));
    all.extend(things(&[("station", 0.0)]));
    let ticks = gather(&all);
    let texts: Vec<String> = ticks.iter().map(Tick::text).collect();
    assert_eq!(texts, ["scout", "station, relay"]);
    assert_eq!(ticks[1].kind, TickKind::Base);
}

#[test]
fn more_than_three_names_are_counted() {
    let all = things(&[("a", 0.1), ("b", 0.1), ("c", 0.1), ("d", 0.1), ("e", 0.1)]);
    assert_eq!(gather(&all)[0].text(), "a and 4 more");
}

#[test]
fn motion_across_is_said() {
    let mut all = things(&[("K", 0.3)]);
    all[0].across = 0.2431;
    let tick = &gather(&all)[0];
    assert_eq!(tick.text(), format!("K {ACROSS} 0.24 c"));
    assert_eq!(tick.words(), "K across 0.24 c");
}

#[test]
fn the_axis_is_whole_in_halves_and_two_wide() {
    assert_eq!(whole([]), (-1.0, 1.0));
    assert_eq!(whole([0.0]), (-1.0, 1.0));
    assert_eq!(whole([-0.31, 1.56]), (-0.5, 2.0));
    assert_eq!(whole([0.0, 18.0]), (-0.5, 18.5));
}

#[test]
fn graduation_has_numbers_every_half_and_strokes_every_tenth() {
    let scale = Scale {
        low: -0.5,
        high: 2.0,
        left: 100.0,
        right: 1340.0,
    };
    let graduation = graduate(&scale);
    let numbers: Vec<&str> = graduation.numbers.iter().map(|n| n.1.as_str()).collect();
    assert_eq!(numbers, ["\u{2212}0.5", "0.0", "0.5", "1.0", "1.5", "2.0"]);
    assert_eq!(graduation.strokes.len(), 26);
}

#[test]
fn numbers_stand_64_points_apart_on_any_span() {
    for span in [1e-9, 3e-4, 0.113, 0.7, 2.5, 19.0, 70.0] {
        let scale = Scale {
            low: 0.6,
            high: 0.6 + span,
            left: 16.0,
            right: 1264.0,
        };
        let numbers = graduate(&scale).numbers;
        assert!(numbers.len() > 2, "{span}: {numbers:?}");
        for pair in numbers.windows(2) {
            assert!(pair[1].0 - pair[0].0 > 63.9, "{span}");
            assert_ne!(pair[0].1, pair[1].1, "{span}");
        }
    }
}

#[test]
fn pooling_keeps_the_mean_of_a_touching_pair() {
    // Two boxes 40 wide that both want 100, 12 apart: least squares puts them evenly about 100.
    let placed = spread(&[100.0, 100.0], &[40.0, 40.0], 12.0, (0.0, 1000.0));
    assert_eq!(placed, [74.0, 126.0]);
}

#[test]
fn forty_names_within_a_tenth_become_one_bracket() {
    let all = buoys();
    let ticks = gather(&all);
    let names = names(&ticks, &all, &axis(&ticks), WIDTH, &measure);
    let texts: Vec<&str> = names.iter().map(|n| n.text.as_str()).collect();
    assert_eq!(texts, ["station", "40 lines within 0.1", "tender"]);
}

#[test]
fn a_close_up_of_forty_names_overlaps_nowhere() {
    let all = buoys();
    let ticks = gather(&all);
    let names = names(&ticks, &all, &axis(&ticks), WIDTH, &measure);
    let bracket = names.iter().find(|n| n.is_bracket()).unwrap();
    let close = close_up(bracket, &ticks, WIDTH, &measure);
    assert_eq!(close.names.len(), 40);
    for (i, a) in close.names.iter().enumerate() {
        assert!(a.left >= 16.0 && a.right <= WIDTH - 16.0, "{a:?}");
        for b in &close.names[i + 1..] {
            let apart = a.row != b.row || a.right + 4.0 <= b.left || b.right + 4.0 <= a.left;
            assert!(apart, "{a:?} {b:?}");
            assert!(
                a.leader < b.leader && a.x <= b.x,
                "leaders cross: {a:?} {b:?}"
            );
            // A leader comes down through the rows below its name.
            let through = b.row > a.row && (a.left..=a.right).contains(&b.leader);
            let back = a.row > b.row && (b.left..=b.right).contains(&a.leader);
            assert!(!through && !back, "leader through a name: {a:?} {b:?}");
        }
    }
}

#[test]
fn a_close_up_with_too_many_names_leaves_some_out_evenly() {
    let names: Vec<String> = (1..=150).map(|i| format!("buoy {i:03}")).collect();
    let all: Vec<RapidityTick> = names
        .iter()
        .enumerate()
        .flat_map(|(i, n)| things(&[(n, 0.6 + i as f64 * 1e-3)]))
        .collect();
    let ticks = gather(&all);
    let placed = super::names(&ticks, &all, &axis(&ticks), WIDTH, &measure);
    let close = close_up(&placed[0], &ticks, WIDTH, &measure);
    let steps: Vec<usize> = close
        .names
        .windows(2)
        .map(|w| w[1].tick - w[0].tick)
        .collect();
    assert!(steps.iter().all(|&s| s == steps[0] && s > 1), "{steps:?}");
}

#[test]
fn ticks_under_two_points_apart_merge_to_a_bar() {
    let placed = bars([10.0, 11.5, 13.0, 20.0].into_iter());
    assert_eq!(placed, [(10.0, 13.0), (20.0, 20.0)]);
}

#[test]
fn a_key_moves_a_hundredth_of_the_span() {
    assert_eq!(key_step(2.0), 0.02);
    assert_eq!(key_step(2.5), 0.02);
    assert_eq!(key_step(19.0), 0.1);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(128))]

    #[test]
    fn names_never_overlap_and_stand_over_their_ticks(
        rapidities in proptest::collection::vec(-3.0..3.0_f64, 1..40),
    ) {
        let names_of: Vec<String> = (0..rapidities.len()).map(|i| format!("probe {i}")).collect();
        let all: Vec<RapidityTick> = names_of.iter().zip(&rapidities)
            .flat_map(|(n, &r)| things(&[(n, r)])).collect();
        let ticks = gather(&all);
        let placed = names(&ticks, &all, &axis(&ticks), WIDTH, &measure);
        let named: usize = placed.iter().map(|n| n.ticks.len()).sum();
        prop_assert_eq!(named, ticks.len());
        for pair in placed.windows(2) {
            let gap = (pair[1].at - pair[1].width / 2.0) - (pair[0].at + pair[0].width / 2.0);
            prop_assert!(gap > 11.9);
        }
        if placed.len() > 1 {
            for name in &placed {
                prop_assert!(name.covers() || name.at < 60.0 || name.at > WIDTH - 60.0);
            }
        }
    }

    #[test]
    fn pixels_and_rapidities_go_back_and_forth(x in 100.0..1180.0_f32) {
        let scale = Scale { low: -0.5, high: 2.0, left: 100.0, right: 1180.0 };
        prop_assert!((scale.x(scale.rapidity(x)) - x).abs() < 1e-3);
        prop_assert!((scale.x(scale.pointed(x)) - x).abs() <= 1.0);
    }
}
