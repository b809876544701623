//! Faults put on a running walk: real kills and real errors of the disk, to show that the recording tells the truth.

use super::super::stage::at;
use super::examine::{Told, faults_of};
use super::running::{disturbed, place};
use super::trials::long;
use crate::Store;

/// One walk disturbed at one call, into a store that was opened once before: strace counts the calls of each thread by
/// itself, and so it is the writing thread that comes to the call. In the long form into an empty folder too.
fn one(call: &str, inject: &str, opened_before: bool) -> (bool, Told, Vec<String>) {
    let folder = place();
    if opened_before {
        drop(Store::open(&folder.path().join("store"), at(0)).unwrap());
    }
    let ended = disturbed(folder.path(), call, inject);
    let told = Told::read(&folder.path().join("told"));
    let faults = faults_of(folder.path(), &told);
    let wrong = faults.into_iter().map(|fault| format!("{call} {inject} {opened_before}: {fault}")).collect();
    (ended, told, wrong)
}

fn all(points: &[(&str, String)]) -> Vec<(bool, Told, Vec<String>)> {
    let before: &[bool] = if long() { &[true, false] } else { &[true] };
    points.iter().flat_map(|(call, inject)| before.iter().map(move |b| one(call, inject, *b))).collect()
}

#[test]
fn killed_for_real_it_is_as_the_recording_says() {
    let points: Vec<(&str, usize)> = if long() {
        [("pwrite64", 450), ("fsync", 30), ("rename", 3), ("ftruncate", 3), ("unlink", 4)]
            .into_iter()
            .flat_map(|(call, end)| (1..end).map(move |n| (call, n)))
            .collect()
    } else {
        vec![("pwrite64", 2), ("pwrite64", 111), ("pwrite64", 302), ("fsync", 6), ("fsync", 13), ("rename", 1)]
    };
    let points: Vec<_> = points.into_iter().map(|(call, n)| (call, format!("signal=KILL:when={n}"))).collect();
    let got = all(&points);
    let killed = got.iter().filter(|(ended, _, _)| !ended).count();
    assert!(killed >= 6, "only {killed} of {} walks were killed", got.len());
    println!("{killed} of {} walks killed", got.len());
    assert_eq!(got.into_iter().flat_map(|(_, _, wrong)| wrong).collect::<Vec<_>>(), Vec::<String>::new());
}

/// The disk refuses a call once, or from then on. What was acknowledged stays; a failed sync is "not known", never
/// "not recorded", and the same act sent again gets the true answer.
#[test]
fn after_an_error_of_the_disk_every_answer_was_true() {
    let points: Vec<(&str, String)> = if long() {
        let each = |call, error, end: usize| {
            (1..end).flat_map(move |n| ["", "+"].map(|sticky| (call, format!("error={error}:when={n}{sticky}"))))
        };
        each("pwrite64", "EIO", 450).chain(each("pwrite64", "ENOSPC", 450)).chain(each("fsync", "EIO", 30)).collect()
    } else {
        [
            ("fsync", "EIO:when=7"),
            ("fsync", "EIO:when=12+"),
            ("pwrite64", "ENOSPC:when=200+"),
            ("pwrite64", "EIO:when=90"),
        ]
        .map(|(call, error)| (call, format!("error={error}")))
        .to_vec()
    };
    let got = all(&points);
    let unknown = got.iter().filter(|(_, told, _)| told.lost.iter().any(|l| l.starts_with("unknown"))).count();
    println!("{unknown} of {} walks were told of the error", got.len());
    assert!(unknown >= 3, "{unknown} of {} walks were told of the error", got.len());
    assert_eq!(got.into_iter().flat_map(|(_, _, wrong)| wrong).collect::<Vec<_>>(), Vec::<String>::new());
}
