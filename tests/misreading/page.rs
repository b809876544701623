//! The page of the engineering basis that tells how far the cross-examination can be trusted.

use super::proof::{Count, Row};
use engineering::plate::proposal::Mistake;
use std::fmt::Write as _;
use std::fs;
use std::path::PathBuf;

const OPENING: &str = "# Misreadings of a plate, and how many are found

Plates are made from the published tables, copied wrongly in every way, and examined. This page is made by the test
`misreading` of the engineering crate and held up to date by it.

**The plates.** Efficiency from IEC 60034-30-1 (50 Hz) and 10 CFR 431.25 (60 Hz), power factor from the amperes of
NFPA 70 table 430.250 (as printed, or 0.04 or 0.08 more), slip from 12 to 26 % of the losses in the rotor, amperes up to
1.5 % off the exact ones (both common practice, no source). Twelve forms: one column, star and delta, 50 and 60 Hz,
three volts of a range, 230 and 460 V; with and without poles, class, power factor and efficiency.

**Material.** A misreading is material when it moves a relation of the true plate by more than half the range that
tolerances and rounding leave it, or makes one that cannot be (a power factor above one). What moves less, no arithmetic
on the plate can tell from a true figure.

**Named.** The true cause counts as named when the figure that was misread is proposed with its true value: to the last
digit where digits were exchanged, doubled or the point moved; within 1.5 % for amperes of another connection or a speed
of other poles; within 5 % for a lost digit, of which nobody can know more.

**What this does not show.** The plates keep to the common practice that the ranking leans on; a real plate may be odder
than these, and more than one figure of it misread. No figure is ever changed by the program.

**Beyond its own tolerance** counts what leaves the tolerance of the figure taken alone (IEC 60034-1 for efficiency, power
factor and slip, 5 % for volts and amperes, 2 % for hertz and power), whether or not the plate prints anything that holds
it. A speed of another number of poles is a possible plate in itself where no poles and no second column are printed.
";

fn percent(part: usize, of: usize) -> String {
    if of == 0 { "–".to_owned() } else { format!("{:.1} %", part as f64 * 100.0 / of as f64) }
}

fn line(page: &mut String, name: &str, row: &Row) {
    let _ = writeln!(
        page,
        "| {name} | {} | {} | {} | {} | {} | {} | {} |",
        row.made,
        row.material,
        percent(row.noticed, row.material),
        percent(row.first, row.noticed),
        percent(row.among_three, row.noticed),
        row.beyond_own,
        percent(row.beyond_own_noticed, row.beyond_own)
    );
}

/// The whole page.
pub fn write(count: &Count) -> String {
    let mut page = OPENING.to_owned();
    let _ = write!(
        page,
        "\n## Untouched plates\n\n{} of {} plates are accused.\n\n## Plates misread\n\n\
         | misread | made | material | of them noticed | true cause first | among the first three | beyond its own tolerance | of them noticed |\n\
         |---|---|---|---|---|---|---|---|\n",
        count.accused, count.plates
    );
    let mut all = Row::default();
    for (mistake, row) in &count.rows {
        line(&mut page, mistake.words(), row);
        all.made += row.made;
        all.material += row.material;
        all.noticed += row.noticed;
        all.first += row.first;
        all.among_three += row.among_three;
        all.beyond_own += row.beyond_own;
        all.beyond_own_noticed += row.beyond_own_noticed;
    }
    line(&mut page, "**all**", &all);
    page.push_str("\n## What was named first\n\nRows: how the plate was misread. Columns: what stood first, for those noticed.\n\n| misread |");
    let told: Vec<Option<Mistake>> = Mistake::ALL.into_iter().map(Some).chain([None]).collect();
    let words = |mistake: Option<Mistake>| mistake.map_or("nothing", Mistake::words);
    for mistake in &told {
        let _ = write!(page, " {} |", words(*mistake));
    }
    page.push_str("\n|---|");
    page.push_str(&"---|".repeat(told.len()));
    page.push('\n');
    for (mistake, row) in &count.rows {
        let _ = write!(page, "| {} |", mistake.words());
        for mistake in &told {
            let _ = write!(page, " {} |", row.named.get(mistake).copied().unwrap_or(0));
        }
        page.push('\n');
    }
    page
}

/// Fails when the page is not what is kept; writes it anew when asked.
pub fn hold(page: &str) {
    let path = PathBuf::from(env!("CARGO_MANIFEST_DIR")).join("../../docs/engineering-basis/misreading.md");
    if std::env::var_os("ASLEFT_WRITE_DOCS").is_some() {
        fs::write(&path, page).expect("written");
    }
    let kept = fs::read_to_string(&path).unwrap_or_default();
    assert!(
        kept == page,
        "docs/engineering-basis/misreading.md is out of date: write it anew with ASLEFT_WRITE_DOCS=1 cargo test -p engineering --test misreading"
    );
}
