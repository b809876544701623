//! The proof: every changed byte is found, the printed commands really run, and a better formula is no fault.

use super::document::{accepted, key};
use super::plant::{Stage, pump};
use super::tools::{Folder, run, succeed};
use commissioning::journal::Fact;
use engineering::Verdict;
use handover::package::{DOCUMENT, DRIVE_EVENTS, RECORD, SIGNATURE, SUMS};
use handover::verify::verify_with;
use handover::{AssembleFault, assemble, verify};

fn written() -> Folder {
    let folder = Folder::new();
    accepted().1.to_folder(folder.path()).unwrap();
    folder
}

#[test]
fn a_package_as_made_verifies_as_folder_and_as_archive() {
    let folder = written();
    let report = verify(folder.path());
    assert_eq!(report.faults, []);
    assert_eq!(report.differences, []);
    assert!(report.ok && report.tag == "PU-101" && report.status == "accepted" && report.revision == 1);
    assert_eq!(report.fingerprint, accepted().1.fingerprint().0);
    let zip = folder.path().with_extension("zip");
    std::fs::write(&zip, accepted().1.to_zip().unwrap()).unwrap();
    let from_zip = verify(&zip);
    std::fs::remove_file(&zip).unwrap();
    assert_eq!(from_zip, report);
}

#[test]
fn one_changed_byte_in_any_file_is_found_and_the_file_named() {
    let folder = written();
    let files = accepted().1.files();
    assert!(files.len() >= 10, "{:?}", files.keys());
    for (name, bytes) in files {
        for at in [0, bytes.len() / 2, bytes.len() - 1] {
            let mut changed = bytes.clone();
            changed[at] ^= 1;
            std::fs::write(folder.path().join(name), &changed).unwrap();
            let report = verify(folder.path());
            let named = if name == SUMS { SIGNATURE } else { name };
            assert!(!report.ok && report.faults.iter().any(|f| f.file == named), "{name} at {at}: {:?}", report.faults);
            std::fs::write(folder.path().join(name), bytes).unwrap();
        }
        std::fs::remove_file(folder.path().join(name)).unwrap();
        assert!(verify(folder.path()).faults.iter().any(|f| f.file == *name), "{name} was taken out");
        std::fs::write(folder.path().join(name), bytes).unwrap();
    }
    std::fs::write(folder.path().join("added.txt"), "x").unwrap();
    assert!(verify(folder.path()).faults.iter().any(|f| f.file == "added.txt"));
    std::fs::remove_file(folder.path().join("added.txt")).unwrap();
    assert!(verify(folder.path()).ok, "put back, all is well again");
}

/// By somebody who has the key: sums and signature fit, and yet the document is another.
#[test]
fn a_document_replaced_under_fitting_sums_is_named() {
    let (material, package) = accepted();
    let mut earlier = pump(Stage::InProgress);
    earlier.event(Fact::RemarkMade { step: String::new(), text: "half way".into() }, None);
    let other = assemble(&earlier.material(), &key()).unwrap();
    assert_ne!(other.document(), package.document());
    let cut = package.document()[..package.document().len() / 2].to_vec();
    let text = b"%PDF-1.7\nnot much\n".to_vec();
    for (document, what) in [
        (other.document().to_vec(), "attached to it is not the one beside it"),
        (cut, ""),
        (text, "it is no PDF that can be read"),
        (Vec::new(), "it is no PDF that can be read"),
    ] {
        let folder = written();
        std::fs::write(folder.path().join(DOCUMENT), &document).unwrap();
        signed_anew(folder.path());
        let report = verify(folder.path());
        let named: Vec<_> = report.faults.iter().filter(|f| f.file == DOCUMENT).collect();
        assert_eq!((named.len(), report.faults.len()), (1, 1), "{:?}", report.faults);
        assert!(named[0].what.contains(what) && !report.ok, "{:?}", report.faults);
    }
    let folder = written();
    std::fs::remove_file(folder.path().join(DOCUMENT)).unwrap();
    signed_anew(folder.path());
    assert!(verify(folder.path()).faults.iter().any(|f| f.file == DOCUMENT && f.what == "it is missing"));
    // And nothing else was the reason: the sums made anew over the right document are fine.
    let folder = written();
    signed_anew(folder.path());
    assert_eq!(verify(folder.path()).faults, [], "{}", material.record.drive.tag);
}

/// Sums and signature over the folder as it is now.
fn signed_anew(folder: &std::path::Path) {
    let names = succeed("sh", &["-c", "find * -type f ! -name 'SHA256SUMS*' | LC_ALL=C sort"], folder);
    let names: Vec<&str> = names.lines().collect();
    let sums = succeed("sha256sum", &names, folder);
    std::fs::write(folder.join(SUMS), &sums).unwrap();
    std::fs::write(folder.join(SIGNATURE), handover::key::sign(&key(), sums.as_bytes())).unwrap();
}

/// With the key itself in hand, a changed record or a thinned chain still does not fit the rest.
#[test]
fn what_the_holder_of_the_key_changes_in_one_place_contradicts_the_other() {
    let (material, _) = accepted();
    let mut other = material.clone();
    let entry = other.record.record.as_mut().unwrap().entries.first_mut().unwrap();
    let text =
        serde_json::to_string(&entry.slot).unwrap().replace("clockwise", "counter-clockwise").replace("20", "21");
    entry.slot = serde_json::from_str(&text).unwrap();
    let folder = Folder::new();
    assemble(&other, &key()).unwrap().to_folder(folder.path()).unwrap();
    let report = verify(folder.path());
    assert!(report.faults.iter().any(|f| f.file == RECORD && f.what.contains("journal")), "{:?}", report.faults);
    assert!(report.faults.iter().any(|f| f.what.contains("binds another content")), "{:?}", report.faults);

    let mut cut = material.clone();
    cut.chain.pop();
    assert!(matches!(assemble(&cut, &key()), Err(AssembleFault::Head { .. })));
    cut.chain.remove(3);
    assert!(matches!(assemble(&cut, &key()), Err(AssembleFault::Chain("drive", _))));
    let mut without = material.clone();
    without.photos.clear();
    assert!(matches!(assemble(&without, &key()), Err(AssembleFault::Photo(_))) || material.photos.is_empty());
}

#[test]
fn the_commands_of_how_to_verify_run_and_say_so() {
    let folder = written();
    let how = std::fs::read_to_string(folder.path().join("how-to-verify.txt")).unwrap();
    let commands: Vec<&str> = how.lines().filter_map(|l| l.strip_prefix("    ")).collect();
    assert_eq!(commands.len(), 5);
    let said: Vec<String> = commands.iter().map(|c| succeed("sh", &["-c", c], folder.path())).collect();
    assert_eq!(said[0].matches(": OK").count(), accepted().1.files().len() - 2);
    assert!(said[1].contains("Signature Verified Successfully"), "{}", said[1]);
    assert!(said[2].starts_with(&accepted().1.fingerprint().0) && how.contains(&accepted().1.fingerprint().0));
    let head = &accepted().0.record.head;
    assert!(said[3].contains(&format!("{DRIVE_EVENTS} ends at {} {}", head.sequence, head.hash)), "{}", said[3]);
    assert!(!said[3].contains("does not follow") && how.contains(&head.hash));
    assert!(said[4].contains("equal"));

    // The walk over the links is no empty gesture: an event taken out is named.
    let path = folder.path().join(DRIVE_EVENTS);
    let events = std::fs::read_to_string(&path).unwrap();
    let thinned: String = events.lines().enumerate().filter(|(n, _)| *n != 4).map(|(_, l)| format!("{l}\n")).collect();
    std::fs::write(&path, thinned).unwrap();
    assert!(succeed("sh", &["-c", commands[3]], folder.path()).contains("event 6 does not follow"));
    assert!(!run("sh", &["-c", commands[0]], folder.path()).status.success());
}

#[test]
fn a_verdict_judged_otherwise_today_is_told_apart_from_a_fault() {
    let folder = written();
    let report = verify_with(folder.path(), |file| {
        let mut today = file.verdicts.clone();
        if let Some(first) = today.first_mut() {
            first.outcome.verdict = Verdict::Outside;
            first.outcome.summary = "judged otherwise".to_owned();
        }
        today.pop();
        Ok(today)
    });
    assert!(report.ok, "{:?}", report.faults);
    assert_eq!(report.differences.len(), 2, "{:?}", report.differences);
    assert_eq!(report.differences[0].today, "outside: judged otherwise");
    assert_eq!(report.differences[1].today, "");
}

#[test]
fn a_record_in_progress_gives_a_draft_that_verifies_too() {
    let mut plant = pump(Stage::InProgress);
    plant.event(Fact::RemarkMade { step: String::new(), text: "half way".into() }, None);
    let folder = Folder::new();
    assemble(&plant.material(), &key()).unwrap().to_folder(folder.path()).unwrap();
    let report = verify(folder.path());
    assert_eq!(report.faults, []);
    assert_eq!(report.status, "in progress");
}

#[test]
fn no_private_key_and_no_formula_leaves_in_a_package() {
    let (_, package) = accepted();
    let seed = key().to_bytes();
    for (name, bytes) in package.files() {
        assert!(!bytes.windows(32).any(|w| w == seed), "{name} holds the key");
        assert!(!String::from_utf8_lossy(bytes).contains("PRIVATE KEY"), "{name}");
    }
    let csv = String::from_utf8(package.files()["parameters.csv"].clone()).unwrap();
    assert!(csv.contains(",'=row 31,146,A,146,146,A,146,225,A,225,"), "{csv}");
    assert!(csv.contains("acceleration-time,") && csv.contains("row-1,display line 2 shows,,motor amps,"), "{csv}");
}

#[test]
fn what_is_no_package_is_refused_in_words() {
    let folder = Folder::new();
    assert!(!verify(folder.path()).ok);
    assert!(!verify(&folder.path().join("nothing")).ok);
    let file = folder.path().join("a.zip");
    std::fs::write(&file, b"PK\x05\x06").unwrap();
    assert!(!verify(&file).ok);
    std::os::unix::fs::symlink("/etc/hostname", folder.path().join("record.json")).unwrap();
    let report = verify(folder.path());
    assert!(report.faults.iter().any(|f| f.what.contains("no plain file")), "{:?}", report.faults);
}
