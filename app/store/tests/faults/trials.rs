//! The trials on a recording: kills at every point and power cuts; each seen to fail on a planted fault.

use super::examine::{Told, faults_of};
use super::power::Chance;
use super::recording::{Call, read};
use super::replay::Disk;
use super::running::{place, recorded};
use std::sync::LazyLock;

/// Set to anything: every point of every loop, and ten thousand power cuts. The last figures are in docs/faults.md.
const LONG: &str = "ASLEFT_LONG_TRIALS";

/// One recording of the walk as it is, for all trials.
static CALLS: LazyLock<Vec<Call>> = LazyLock::new(|| recording(false));

fn recording(hasty: bool) -> Vec<Call> {
    let folder = place();
    let text = recorded(folder.path(), hasty);
    read(&text, folder.path())
}

/// Whether the long form is asked for.
pub(super) fn long() -> bool {
    std::env::var_os(LONG).is_some()
}

/// Whether a kill just before this call can leave what a kill just before its neighbours does not: around syncs, names,
/// cuts and answers always; of the writes in between one in 24, unless every one is asked for.
fn telling(calls: &[Call], n: usize) -> bool {
    let plain = |n: usize| matches!(calls.get(n), Some(Call::Written { .. } | Call::Made(_) | Call::Folder(_)));
    long() || !plain(n) || (n > 0 && !plain(n - 1)) || n.is_multiple_of(24)
}

/// Looks at what a kill before each telling call leaves. How many points, and those at which something was wrong.
fn killed_everywhere(calls: &[Call]) -> (usize, Vec<String>) {
    let (mut disk, mut told) = (Disk::default(), Told::default());
    let (mut points, mut wrong) = (0, Vec::new());
    for (n, call) in calls.iter().enumerate() {
        if telling(calls, n) {
            points += 1;
            let folder = place();
            disk.lay_out(folder.path());
            wrong.extend(faults_of(folder.path(), &told).into_iter().map(|fault| format!("before call {n}: {fault}")));
        }
        disk.apply(call);
        if let Call::Told(line) = call {
            told.hear(line);
        }
    }
    (points, wrong)
}

/// Looks at so many power cuts, spread evenly over the walk; gives those after which something was wrong.
fn power_cuts(calls: &[Call], cuts: usize) -> Vec<String> {
    let (mut disk, mut told) = (Disk::default(), Told::default());
    let mut wrong = Vec::new();
    let mut cut = 0;
    for (n, call) in calls.iter().enumerate() {
        disk.apply(call);
        if let Call::Told(line) = call {
            told.hear(line);
        }
        while cut < cuts && cut * calls.len() / cuts <= n {
            let folder = place();
            disk.lay_out_after_power_cut(folder.path(), &mut Chance::of(cut as u64));
            let faults = faults_of(folder.path(), &told);
            wrong.extend(faults.first().map(|fault| format!("cut {cut} after call {n}: {fault}")));
            cut += 1;
        }
    }
    assert_eq!(cut, cuts);
    wrong
}

#[test]
fn killed_before_any_call_nothing_acknowledged_is_lost_and_nothing_is_half_there() {
    let (points, wrong) = killed_everywhere(&CALLS);
    assert!(points > 100, "only {points} points");
    assert_eq!(wrong, Vec::<String>::new());
}

#[test]
fn a_power_cut_loses_nothing_acknowledged() {
    let cuts = if long() { 10_000 } else { 100 };
    assert_eq!(power_cuts(&CALLS, cuts), Vec::<String>::new());
}

/// Planted: the answer goes out while the act is on its way.
#[test]
fn an_answer_before_its_commit_is_found_by_the_kills() {
    let (points, wrong) = killed_everywhere(&recording(true));
    assert!(wrong.len() * 4 > points, "{} of {points}", wrong.len());
}

/// Planted: the log is not synced at a commit, as under `synchronous=NORMAL`; a photo's folder is not synced.
#[test]
fn a_sync_left_out_is_found_by_the_power_cuts() {
    for (name, least) in [("store/store.sqlite-wal", 20), ("store/photos", 5), ("", 5)] {
        let without: Vec<Call> = CALLS.iter().filter(|c| **c != Call::Synced(name.into())).cloned().collect();
        assert!(without.len() < CALLS.len(), "{name} was never synced");
        let wrong = power_cuts(&without, 50).len();
        assert!(wrong >= least, "{name}: {wrong} of 50");
    }
}
