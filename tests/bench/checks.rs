//! All checks of a full record, predicted ramps included, against walking the same record's JSON once.

use super::alternate;
use commissioning::judge;
use commissioning::record::canonical::RecordFile;
use std::hint::black_box;

pub fn run() {
    let file = super::document::accepted();
    let rebuilt = file.rebuild().expect("the demo's record rebuilds");
    let view = judge::View { drive: &rebuilt.drive, site: &rebuilt.site, procedure: &rebuilt.procedure };
    let json = file.to_json();
    let both = alternate::medians(
        50,
        || {
            black_box(judge::all(black_box(&view)));
        },
        || {
            black_box(RecordFile::read(black_box(&json)).expect("reads"));
        },
    );
    alternate::line("all checks of a full record (baseline: reading its record.json)", &both, "≤ 1 ms");
}
