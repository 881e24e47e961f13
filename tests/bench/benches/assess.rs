//! The whole line, the data load, and a reference load of plain arithmetic that the ratios are taken to.

use criterion::{Criterion, criterion_group, criterion_main};
use std::hint::black_box;

fn benches(c: &mut Criterion) {
    let session = leeway_api::Session::new(leeway_dataset::TEXT).expect("data");
    let line = leeway_bench::line(7);
    let answer = session.assess(&line).expect("a line");
    let c0 = answer.summary.counts;
    println!("findings: {} ({} without data)", answer.findings.len(), c0.no_data);
    c.bench_function("reference: a million multiply-adds", |b| {
        b.iter(|| (0..1_000_000u32).fold(black_box(1.0f64), |x, i| x * 0.999_999 + f64::from(i)))
    });
    c.bench_function("assess 8 zones x 12 changes", |b| b.iter(|| session.assess(black_box(&line))));
    c.bench_function("assess and write JSON", |b| b.iter(|| serde_json::to_string(&session.assess(black_box(&line)).expect("a line"))));
    c.bench_function("load the data", |b| b.iter(|| leeway_api::Session::new(black_box(leeway_dataset::TEXT))));
}

criterion_group! { name = all; config = Criterion::default().sample_size(20); targets = benches }
criterion_main!(all);
