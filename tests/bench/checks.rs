//! All checks of a full record, with and without the ramps, against the same formulas with nothing around them.

use super::{alternate, bare_formulas};
use commissioning::judge;
use std::hint::black_box;

/// Checks that run a ramp, or read one.
const MOTION: [&str; 8] = [
    "acceleration-time",
    "deceleration-time",
    "braking",
    "current-limit",
    "overload-fit",
    "measured-acceleration",
    "measured-deceleration",
    "bus-peak",
];

pub fn run() {
    let file = super::document::accepted();
    let rebuilt = file.rebuild().expect("the demo's record rebuilds");
    let view = judge::View { drive: &rebuilt.drive, site: &rebuilt.site, procedure: &rebuilt.procedure };
    let all = alternate::medians(
        200,
        || {
            black_box(judge::all(black_box(&view)));
        },
        || {
            bare_formulas::at_rest();
            bare_formulas::motion();
        },
    );
    alternate::line(
        "all checks of a full record, ramps included (baseline: the bare formulas)",
        &all,
        "≤ 1 ms, ratio ≤ 10",
    );

    let still: Vec<&str> = judge::catalogue::names().filter(|name| !MOTION.contains(name)).collect();
    let without = alternate::medians(
        200,
        || {
            for name in &still {
                black_box(judge::one(black_box(&view), name));
            }
        },
        bare_formulas::at_rest,
    );
    alternate::line("all checks of a full record but the ramps (baseline: the bare formulas)", &without, "≤ 200 µs");
}
