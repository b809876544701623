//! Signing, accepting, returning, reopening.

use crate::journal::{Change, Deed, Event, Fact};
use crate::plant::Sheet;
use crate::record::{EntryPlace, Meaning, Severity, Status};
use crate::world::*;
use crate::{EventId, FindingId, Refusal};
use uuid::Uuid;

const FINDING: FindingId = FindingId(Uuid::from_u128(0xF1));

fn raise(severity: Severity) -> Deed {
    Deed::RaiseFinding { drive: DRIVE, finding: FINDING, severity, text: "Label worn.".into(), step: None }
}

#[test]
fn signing_asks_for_every_step_the_digest_shown_and_the_password() {
    let mut world = World::begun();
    let said = why(world.sign(ERIN, Meaning::Performed));
    assert!(said.contains("1 in “Make safe”"), "{said}");
    let mut world = World::complete();
    world.password_proved = false;
    assert_eq!(fields(world.sign(ERIN, Meaning::Performed)), ["password"]);
    world.password_proved = true;
    let shown = world.file().digest();
    let note = world.enter(ERIN, "prove-dead", &[("isolation-note", "lamp out")]);
    assert_eq!(note.len(), 1);
    let deed = Deed::Sign { drive: DRIVE, meaning: Meaning::Performed, digest: shown };
    assert!(why(world.attempt(Some(ERIN), deed)).contains("changed since it was shown"));
    world.sign(ERIN, Meaning::Performed).unwrap();
    assert!(matches!(world.record().status, Status::Signed { .. }));
    assert_eq!(world.record().signatures[0].printed_name, "Erin Alder");
}

/// integrity.md E 14: whoever entered or signed something in a record does not accept it.
#[test]
fn nobody_accepts_what_they_entered_or_signed() {
    let mut world = World::complete();
    world.enter(EBBE, "prove-dead", &[("isolation-note", "seen by me too")]);
    world.sign(ERIN, Meaning::Performed).unwrap();
    assert!(why(world.sign(EBBE, Meaning::Accepted)).contains("another supervisor"));
    let mut world = World::complete();
    world.sign(EBBE, Meaning::Performed).unwrap();
    assert!(why(world.sign(EBBE, Meaning::Accepted)).contains("another supervisor"));
    let mut world = World::signed();
    world.does(EBBE, Deed::Remark { drive: DRIVE, step: String::new(), text: "Neat work.".into() });
    world.does(EBBE, Deed::Return { drive: DRIVE, reason: "Photo?".into() });
    world.answer("None could be taken there.");
    world.sign(ERIN, Meaning::Performed).unwrap();
    world.sign(EBBE, Meaning::Accepted).unwrap();
    assert!(!world.record().contributors.contains(&EBBE), "remarks and returns do not count");
}

#[test]
fn open_findings_are_signed_with_but_not_accepted() {
    for severity in [Severity::BeforeHandover, Severity::StopsStartUp] {
        let mut world = World::complete();
        world.does(ERIN, raise(severity));
        world.sign(ERIN, Meaning::Performed).unwrap();
        assert!(why(world.sign(SUNE, Meaning::Accepted)).contains("Findings are open: 1"));
        world.does(SUNE, Deed::AcceptFinding { drive: DRIVE, finding: FINDING, reason: "Ordered.".into() });
        world.sign(SUNE, Meaning::Accepted).unwrap();
    }
    let mut world = World::complete();
    world.does(ERIN, raise(Severity::Information));
    world.sign(ERIN, Meaning::Performed).unwrap();
    world.sign(SUNE, Meaning::Accepted).unwrap();
}

#[test]
fn a_return_and_a_reopening_keep_earlier_signatures_as_superseded() {
    let mut world = World::accepted();
    assert_eq!(world.record().signatures.iter().filter(|s| !s.superseded).count(), 2);
    assert_eq!(fields(world.attempt(Some(SUNE), Deed::Reopen { drive: DRIVE, reason: String::new() })), ["reason"]);
    world.does(SUNE, Deed::Reopen { drive: DRIVE, reason: "Motor replaced.".into() });
    assert_eq!((world.record().revision, world.record().signatures.len()), (2, 2));
    assert!(world.record().signatures.iter().all(|s| s.superseded));
    assert!(world.record().frozen.is_none() && world.record().ever_signed);
    world.sign(ERIN, Meaning::Performed).unwrap();
    assert_eq!(fields(world.attempt(Some(SUNE), Deed::Return { drive: DRIVE, reason: " ".into() })), ["reason"]);
    world.does(SUNE, Deed::Return { drive: DRIVE, reason: "Photo?".into() });
    assert_eq!((world.record().revision, world.record().signatures.len()), (2, 3));
    assert_eq!(world.record().history.len(), 5);
    let said = why(world.sign(ERIN, Meaning::Performed));
    assert!(said.starts_with("Nothing was changed since this record was returned for: Photo? Put"), "{said}");
    world.answer("None could be taken there.");
    world.sign(ERIN, Meaning::Performed).unwrap();
    world.sign(SUNE, Meaning::Accepted).unwrap();
    assert_eq!(world.record().signatures.iter().filter(|s| !s.superseded).count(), 2);
}

#[test]
fn a_site_that_changes_after_the_signing_changes_no_signed_record() {
    let mut world = World::signed();
    let before = world.file();
    let change = Change {
        place: (0, "volts".into()),
        text: "690".into(),
        unit: "V".into(),
        instrument: None,
        photo: None,
        seen: vec![],
    };
    world.does(
        SUNE,
        Deed::SetSiteFields { site: SITE, sheet: Sheet::Supply, changes: vec![change], reason: String::new() },
    );
    assert_eq!(world.file(), before);
    world.sign(SUNE, Meaning::Accepted).unwrap();
    world.does(SUNE, Deed::Reopen { drive: DRIVE, reason: "Supply changed.".into() });
    assert_eq!(world.file().site.fields.len(), 1, "in progress, the site of today counts");
}

#[test]
fn a_return_is_answered_by_a_change_of_the_drive_or_of_its_site() {
    let returned = || {
        let mut world = World::signed();
        world.does(SUNE, Deed::Return { drive: DRIVE, reason: "Supply volts are wrong.".into() });
        assert!(why(world.sign(ERIN, Meaning::Performed)).contains("Nothing was changed"));
        world
    };
    let mut world = returned();
    let entry = world.change(EntryPlace::new("isolation-note"), "lamp");
    world.record_changes(ERIN, "prove-dead", vec![entry], "").unwrap();
    world.sign(ERIN, Meaning::Performed).unwrap();
    let mut world = returned();
    let place = (0, "volts".into());
    let volts = Change { place, text: "690".into(), unit: "V".into(), instrument: None, photo: None, seen: vec![] };
    let changes = vec![volts];
    world.does(SUNE, Deed::SetSiteFields { site: SITE, sheet: Sheet::Supply, changes, reason: String::new() });
    world.sign(ERIN, Meaning::Performed).unwrap();
}

#[test]
fn a_record_is_not_signed_while_it_is_open_which_options_are_fitted() {
    let mut world = World::complete();
    let mut no = |option: &str, text: &str| {
        let place = crate::plant::Place::new(Sheet::Drive, option);
        let seen = world.drive().fields[&place].seen();
        let place = (0, option.to_owned());
        let change = Change { place, text: text.into(), unit: String::new(), instrument: None, photo: None, seen };
        let (sheet, reason) = (Sheet::Drive, "Not looked at.".to_owned());
        world.does(ERIN, Deed::SetDriveFields { drive: DRIVE, sheet, changes: vec![change], reason });
        world.sign(ERIN, Meaning::Performed)
    };
    let said = why(no("bypass", ""));
    assert!(
        said.starts_with("1 step waits for an answer: which options are fitted? Say yes or no on: sheet “"),
        "{said}"
    );
    assert!(said.contains("bypass"), "{said}");
    let said = why(no("brake-chopper", ""));
    assert!(said.starts_with("2 steps wait") && said.contains("chopper"), "{said}");
    assert!(why(no("bypass", "no")).starts_with("1 step waits"));
    no("brake-chopper", "no").unwrap();
}

/// Two installations changed the same field; both stand until someone chooses.
#[test]
fn what_needs_a_choice_blocks_the_signature_until_someone_chooses() {
    let mut world = World::complete();
    let place = EntryPlace::new("ir-60s");
    let mut entry = world.record().entry(&place).unwrap().value.clone();
    entry.value = crate::Typed::quantity("790", "MΩ", engineering::Kind::Resistance).unwrap();
    let first = world.chains.values().flatten().map(|s| s.event().unwrap());
    let first: Vec<Event> =
        first.filter(|e| matches!(&e.fact, Fact::EntryMade { place: p, .. } if *p == place)).collect();
    let other = Event {
        id: EventId("from-the-site-laptop.1".into()),
        person: EBBE,
        person_name: "Ebbe Birch".into(),
        fact: Fact::EntryMade { place: place.clone(), step: "insulation".into(), entry },
        ..first[0].clone()
    };
    world.apply(&other);
    assert!(world.record().entry(&place).is_none() && world.record().entries[&place].needs_choice());
    let agenda = crate::agenda::of(&world.view());
    assert_eq!(agenda.step("insulation").unwrap().1.missing, ["At one minute: needs a choice"]);
    assert!(why(world.sign(ERIN, Meaning::Performed)).contains("still to be settled"));
    // Choosing one of the two is a change, though its text stands already.
    let choose = vec![world.change(place.clone(), "812")];
    assert_eq!(fields(world.record_changes(ERIN, "insulation", choose.clone(), "")), ["reason"]);
    world.record_changes(ERIN, "insulation", choose, "mine was read off the tester").unwrap();
    assert_eq!(world.record().entries[&place].earlier().len(), 2);
    world.sign(ERIN, Meaning::Performed).unwrap();
}

#[test]
fn an_act_about_what_is_not_there_says_so() {
    let mut world = World::begun();
    let deed = Deed::BeginRecord { drive: crate::DriveId(Uuid::from_u128(0xDD)) };
    assert!(matches!(world.attempt(Some(ERIN), deed), Err(Refusal::Unknown { .. })));
    let digest = world.file().digest();
    world.site = None;
    let deed = Deed::Sign { drive: DRIVE, meaning: Meaning::Performed, digest };
    assert!(matches!(world.attempt(Some(ERIN), deed), Err(Refusal::Unknown { .. })));
}
