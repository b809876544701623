//! Times two things alternately, so that a noisy machine disturbs both alike, and compares their medians.

use std::time::{Duration, Instant};

/// Medians of both.
pub struct Medians {
    /// Of ours.
    pub ours: Duration,
    /// Of the baseline.
    pub baseline: Duration,
}

/// Runs each `rounds` times, in turn, after one round that does not count.
pub fn medians(rounds: usize, mut ours: impl FnMut(), mut baseline: impl FnMut()) -> Medians {
    ours();
    baseline();
    let mut times = (Vec::with_capacity(rounds), Vec::with_capacity(rounds));
    for _ in 0..rounds {
        times.0.push(timed(&mut ours));
        times.1.push(timed(&mut baseline));
    }
    Medians { ours: median(&mut times.0), baseline: median(&mut times.1) }
}

/// How long one run takes.
fn timed(run: &mut impl FnMut()) -> Duration {
    let begun = Instant::now();
    run();
    begun.elapsed()
}

/// The middle one.
fn median(times: &mut [Duration]) -> Duration {
    times.sort_unstable();
    times[times.len() / 2]
}

/// A line of the table.
pub fn line(measure: &str, both: &Medians, target: &str) {
    let ratio = both.ours.as_secs_f64() / both.baseline.as_secs_f64().max(1e-12);
    println!("| {measure} | {:.3?} | {:.3?} | {ratio:.2} | {target} |", both.ours, both.baseline);
}
