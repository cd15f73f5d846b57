//! Boosting a million events, beside copying the same bytes.

use std::hint::black_box;

use conewright::geometry::{Boost, Displacement, Rapidity};
use criterion::{Criterion, criterion_group, criterion_main};

const EVENTS: usize = 1_000_000;

fn boost_a_million(c: &mut Criterion) {
    let events: Vec<Displacement> = (0..EVENTS)
        .map(|i| {
            let t = i as f64;
            Displacement::from_tx(t + 1.0, 0.25 * t)
        })
        .collect();
    let boost = Boost::along_x(Rapidity::new(0.7).unwrap_or_default());
    let mut group = c.benchmark_group("a million events");
    group.sample_size(20);
    group.bench_function("copied", |b| b.iter(|| black_box(events.clone())));
    group.bench_function("boosted", |b| {
        b.iter(|| -> Vec<Displacement> {
            black_box(events.iter().filter_map(|&d| boost.apply(d).ok()).collect())
        });
    });
    group.finish();
}

criterion_group!(benches, boost_a_million);
criterion_main!(benches);
