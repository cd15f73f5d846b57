//! From a typical scene to a laid-out plate, and each format of it.

use std::hint::black_box;

use conewright::export::{Format, Options, write};
use conewright::plate::Override;
use conewright::{scene, solve, task};
use criterion::{Criterion, criterion_group, criterion_main};

const SCENES: [(&str, &str); 2] = [
    (
        "tug-and-beacon",
        include_str!("../scenes/tug-and-beacon.ron"),
    ),
    (
        "kaon-on-proton",
        include_str!("../scenes/kaon-on-proton.ron"),
    ),
];

fn stages(c: &mut Criterion) {
    for (name, text) in SCENES {
        let Ok(opened) = task::open_text(text) else {
            continue;
        };
        let Some(laid) = task::lay_out(&opened, None, &Override::default()) else {
            continue;
        };
        let mut group = c.benchmark_group(name);
        group.bench_function("read", |b| b.iter(|| scene::read(black_box(text))));
        group.bench_function("solve", |b| {
            b.iter(|| solve::solve(black_box(&opened.scene), &[]));
        });
        group.bench_function("lay out", |b| {
            b.iter(|| task::lay_out(black_box(&opened), None, &Override::default()));
        });
        for (format, word) in [
            (Format::Svg, "svg"),
            (Format::Pdf, "pdf"),
            (Format::Png, "png at 300 dpi"),
            (Format::Tikz, "tex"),
        ] {
            let options = Options {
                dpi: 300.0,
                ..Options::default()
            };
            group.bench_function(word, |b| {
                b.iter(|| write(black_box(&laid.sheet), format, &options));
            });
        }
        group.finish();
    }
}

criterion_group!(benches, stages);
criterion_main!(benches);
