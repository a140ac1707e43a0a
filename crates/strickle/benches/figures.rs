//! How long the exact way takes, beside a plain way that does less: `cargo bench -p strickle`.
//!
//! Absolute times depend on the machine; the ratios that are printed at the end hardly do. They are medians of runs of
//! the two that take turns.
#![expect(
    clippy::unwrap_used,
    clippy::print_stdout,
    reason = "a benchmark that cannot be set up has failed, and its result is printed"
)]

use criterion::{BatchSize, Criterion};
use profile::{DVec2, Region};
use std::fmt::Write as _;
use std::hint::black_box;
use std::time::{Duration, Instant};

/// A part file whose outline has `edges` edges: a bored roller with grooves of three lines and an arc.
fn roller(edges: usize) -> String {
    let grooves = (edges - 4) / 4;
    let mut text = String::from(
        "format = 1\n[part]\nname = \"Roller\"\nunit = \"mm\"\n[[body]]\nname = \"roller\"\nmaterial = \"S235JR\"\n\
         outline = [\n  { d = 40, z = 0 },\n  { d = 100 },\n",
    );
    for _ in 0..grooves {
        text.push_str(
            "  { dz = 1, name = \"land\" },\n  { dr = -1 },\n  { dz = 1, arc = 2, centre_on = \"right\" },\n  { dr = 1 },\n",
        );
    }
    let top = 2 * grooves + 1;
    writeln!(text, "  {{ z = {top} }},\n  {{ d = 40 }},\n]").unwrap();
    text
}

/// A part whose outline needs no file beside it.
struct Alone;

impl part::Neighbours for Alone {
    fn read(&self, _file: &str) -> std::io::Result<Vec<u8>> {
        Err(std::io::ErrorKind::NotFound.into())
    }
}

fn read(text: &str) -> part::Part {
    part::read("roller.toml", text.as_bytes(), &[], &Alone).unwrap()
}

/// The section of a roller with `edges` edges.
fn section(edges: usize) -> Region {
    let region = read(&roller(edges)).bodies.remove(0).region;
    assert_eq!(region.edges().count(), edges);
    region
}

fn full_turn(region: &Region) -> f64 {
    exact::solid(black_box(region), std::f64::consts::TAU).volume
}

/// The plain way: area and first moment of the polygon through the corners, nothing else.
fn shoelace(corners: &[DVec2]) -> (f64, f64) {
    let next = corners.iter().cycle().skip(1);
    black_box(corners)
        .iter()
        .zip(next)
        .map(|(p, q)| (p.perp_dot(*q), p.x + q.x))
        .fold((0.0, 0.0), |(area, moment), (twice, sum)| {
            (area + 0.5 * twice, moment + twice * sum / 6.0)
        })
}

/// The plain way: the text's tables, no figure understood and nothing checked.
fn toml_alone(text: &str) -> usize {
    toml::from_str::<toml::Table>(black_box(text))
        .unwrap()
        .len()
}

fn corners(region: &Region) -> Vec<DVec2> {
    region.edges().map(profile::Edge::start).collect()
}

/// Criterion's own measurement of each.
fn absolute(criterion: &mut Criterion, sizes: &[usize]) {
    for &edges in sizes {
        let text = roller(edges);
        let region = section(edges);
        let corners = corners(&region);
        let mut group = criterion.benchmark_group(format!("{edges} edges"));
        if edges > 1000 {
            group.sample_size(10);
        }
        group.bench_function("exact figures", |b| b.iter(|| full_turn(&region)));
        group.bench_function("polygon's area alone", |b| b.iter(|| shoelace(&corners)));
        group.bench_function("reading and checking", |b| {
            b.iter_batched(|| (), |()| read(black_box(&text)), BatchSize::LargeInput);
        });
        group.bench_function("TOML alone", |b| b.iter(|| toml_alone(&text)));
        group.finish();
    }
}

/// How many times as long `work` takes as `peer`: medians of `rounds` turns of `batch` runs each.
fn ratio<A, B>(
    rounds: usize,
    batch: usize,
    mut work: impl FnMut() -> A,
    mut peer: impl FnMut() -> B,
) -> f64 {
    let mut times: [Vec<Duration>; 2] = [Vec::new(), Vec::new()];
    for _ in 0..rounds {
        let start = Instant::now();
        for _ in 0..batch {
            black_box(work());
        }
        times[0].push(start.elapsed());
        let start = Instant::now();
        for _ in 0..batch {
            black_box(peer());
        }
        times[1].push(start.elapsed());
    }
    let [work, peer] = times.map(|mut times| {
        times.sort();
        times[times.len() / 2].as_secs_f64()
    });
    work / peer
}

fn ratios() {
    for (edges, rounds, batch) in [(100, 51, 200), (100_000, 11, 1)] {
        let text = roller(edges);
        let region = section(edges);
        let corners = corners(&region);
        let figures = ratio(rounds, batch, || full_turn(&region), || shoelace(&corners));
        let reading = ratio(
            rounds,
            batch.div_ceil(10),
            || read(&text),
            || toml_alone(&text),
        );
        println!("{edges} edges: exact figures take {figures:.1} times the polygon's area alone");
        println!("{edges} edges: reading and checking takes {reading:.1} times TOML alone");
    }
}

fn main() {
    // `cargo test` runs a benchmark once and unoptimised, to see that it runs: neither a long one nor a ratio is of use.
    let in_earnest = std::env::args().any(|argument| argument == "--bench");
    let sizes: &[usize] = if in_earnest { &[100, 100_000] } else { &[100] };
    let mut criterion = Criterion::default().configure_from_args();
    absolute(&mut criterion, sizes);
    criterion.final_summary();
    if in_earnest {
        ratios();
    }
}
