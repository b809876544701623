//! The model of a record's states: every deed in every state, against a table written by hand.

use crate::journal::{Change, Deed};
use crate::people::{Instrument, Role};
use crate::plant::Sheet;
use crate::record::{EntryPlace, Meaning, ParameterColumn, ParameterPlace, SettledOtherwise, Severity, Status};
use crate::world::*;
use crate::{DriveId, FindingId, InstrumentId, PersonId, Refusal, SiteId};
use uuid::Uuid;

fn fresh<P>(place: P, text: &str) -> Change<P> {
    Change { place, text: text.into(), unit: String::new(), instrument: None, photo: None, seen: Vec::new() }
}

const OPEN: FindingId = FindingId(Uuid::from_u128(0xF1));

/// The name of a deed; the compiler asks for a line here when a deed is added.
fn name(deed: &Deed) -> &'static str {
    match deed {
        Deed::SetUp { .. } => "set-up",
        Deed::AddPerson { .. } => "add-person",
        Deed::ChangePerson { .. } => "change-person",
        Deed::KeepInstrument { .. } => "keep-instrument",
        Deed::LoadProcedure { .. } => "load-procedure",
        Deed::CreateSite { .. } => "create-site",
        Deed::SetSiteFields { .. } => "set-site-fields",
        Deed::CreateDrive { .. } => "create-drive",
        Deed::SetDriveFields { .. } => "set-drive-fields",
        Deed::BeginRecord { .. } => "begin-record",
        Deed::RecordEntries { .. } => "record-entries",
        Deed::SettleStep { .. } => "settle-step",
        Deed::ResumeStep { .. } => "resume-step",
        Deed::ReleaseHold { .. } => "release-hold",
        Deed::SetParameters { .. } => "set-parameters",
        Deed::AddParameterRow { .. } => "add-parameter-row",
        Deed::RaiseFinding { .. } => "raise-finding",
        Deed::SettleFinding { .. } => "settle-finding",
        Deed::AcceptFinding { .. } => "accept-finding",
        Deed::Remark { .. } => "remark",
        Deed::Sign { meaning: Meaning::Performed, .. } => "sign-performed",
        Deed::Sign { meaning: Meaning::Accepted, .. } => "sign-accepted",
        Deed::Return { .. } => "return",
        Deed::Reopen { .. } => "reopen",
        Deed::RotateKey { .. } => "rotate-key",
    }
}

/// One deed of each kind that is right in itself in this world, with its name.
pub(super) fn every_deed(world: &World) -> Vec<(&'static str, Deed)> {
    let drive = DRIVE;
    let digest = world.file().digest();
    let instrument = Instrument {
        id: InstrumentId(Uuid::from_u128(0x17)),
        mark: "IT-07".into(),
        description: "Insulation tester".into(),
        serial: "4471".into(),
        due: "2027-03-31".into(),
        accuracy: Vec::new(),
        active: true,
    };
    let new = |n: u128| Uuid::from_u128(n);
    let parameter = ParameterPlace { function: "acceleration-time".into(), column: ParameterColumn::Intended };
    let reason = || "because of a loose terminal".to_owned();
    let mut newer = procedure();
    newer.version = 2;
    let person = PersonId(new(0x99));
    [
        Deed::SetUp {
            firm: "Other".into(),
            person,
            login: "zoe".into(),
            name: "Zoe Elm".into(),
            roles: vec![Role::Administrator],
        },
        Deed::AddPerson { person, login: "zoe".into(), name: "Zoe Elm".into(), roles: vec![Role::Reader] },
        Deed::ChangePerson { person: RUTH, name: "Ruth Yew".into(), roles: vec![Role::Reader], active: true },
        Deed::KeepInstrument { instrument, seen: Vec::new() },
        Deed::LoadProcedure { procedure: Box::new(newer) },
        Deed::CreateSite { site: SiteId(new(0x52)), tag: "alder-quay".into(), name: "Alder Quay".into() },
        Deed::SetSiteFields {
            site: SITE,
            sheet: Sheet::Supply,
            changes: vec![fresh((0, "volts".into()), "400")],
            reason: String::new(),
        },
        Deed::CreateDrive { site: SITE, drive: DriveId(new(0xD2)), tag: "M-2105".into(), name: "Pump".into() },
        Deed::SetDriveFields {
            drive,
            sheet: Sheet::Motor,
            changes: vec![fresh((0, "volts".into()), "400")],
            reason: String::new(),
        },
        Deed::BeginRecord { drive },
        Deed::RecordEntries {
            drive,
            step: "prove-dead".into(),
            changes: vec![fresh(EntryPlace::new("isolation-note"), "seen")],
            reason: String::new(),
        },
        Deed::SettleStep { drive, step: "run".into(), how: SettledOtherwise::NotApplicable, reason: reason() },
        Deed::ResumeStep { drive, step: "direction".into() },
        release("inspect"),
        Deed::SetParameters { drive, changes: vec![fresh(parameter, "10")], reason: String::new() },
        Deed::AddParameterRow { drive, label: "Fan run-on".into() },
        Deed::RaiseFinding {
            drive,
            finding: FindingId(new(0xF9)),
            severity: Severity::Information,
            text: "Label worn.".into(),
            step: None,
        },
        Deed::SettleFinding { drive, finding: OPEN, how: "Tightened.".into() },
        Deed::AcceptFinding { drive, finding: OPEN, reason: reason() },
        Deed::Remark { drive, step: String::new(), text: "Seen on site.".into() },
        Deed::Sign { drive, meaning: Meaning::Performed, digest: digest.clone() },
        Deed::Sign { drive, meaning: Meaning::Accepted, digest },
        Deed::Return { drive, reason: reason() },
        Deed::Reopen { drive, reason: reason() },
        Deed::RotateKey {
            old: "a1".repeat(32),
            new: "b2".repeat(32),
            by_old: "c3".repeat(64),
            by_new: "d4".repeat(64),
        },
    ]
    .into_iter()
    .map(|deed| (name(&deed), deed))
    .collect()
}

/// What is allowed, by state: not begun, in progress, signed, returned, accepted, reopened.
const MODEL: &[(&str, [bool; 6])] = &[
    ("set-drive-fields", [true, true, false, true, false, true]),
    ("begin-record", [true, false, false, false, false, false]),
    ("record-entries", [false, true, false, true, false, true]),
    ("settle-step", [false, true, false, true, false, true]),
    ("resume-step", [false, true, false, true, false, true]),
    ("release-hold", [false, true, false, true, false, true]),
    ("set-parameters", [false, true, false, true, false, true]),
    ("add-parameter-row", [false, true, false, true, false, true]),
    ("raise-finding", [false, true, false, true, false, true]),
    ("settle-finding", [false, true, false, true, false, true]),
    ("accept-finding", [false, true, true, true, false, true]),
    ("remark", [false, true, true, true, false, true]),
    ("sign-performed", [false, true, false, true, false, true]),
    ("sign-accepted", [false, false, true, false, false, false]),
    ("return", [false, false, true, false, false, false]),
    ("reopen", [false, false, false, false, true, false]),
];

/// A record on which every deed of the table is right in itself: steps settled but one otherwise, isolated again,
/// an open finding for information.
fn ready() -> World {
    let mut world = World::complete();
    let finding = Deed::RaiseFinding {
        drive: DRIVE,
        finding: OPEN,
        severity: Severity::Information,
        text: "Worn.".into(),
        step: None,
    };
    world.does(ERIN, finding);
    world.enter(ERIN, "prove-dead", &[("tester-proved", "yes"), ("bus-after-waiting", "2")]);
    let how = SettledOtherwise::NotApplicable;
    world.does(ERIN, Deed::SettleStep { drive: DRIVE, step: "direction".into(), how, reason: "Not coupled.".into() });
    world
}

#[test]
fn every_deed_in_every_state_is_allowed_or_refused_as_the_model_says() {
    let mut worlds = [World::new(), ready(), ready(), ready(), ready(), ready()];
    for world in &mut worlds[2..] {
        world.sign(ERIN, Meaning::Performed).unwrap();
    }
    worlds[3].does(SUNE, Deed::Return { drive: DRIVE, reason: "Photo missing.".into() });
    worlds[3].answer("None could be taken there.");
    for world in &mut worlds[4..] {
        world.sign(SUNE, Meaning::Accepted).unwrap();
    }
    worlds[5].does(SUNE, Deed::Reopen { drive: DRIVE, reason: "Motor replaced.".into() });
    assert!(matches!(worlds[3].record().status, Status::InProgress { returned: Some(_) }));
    assert_eq!(worlds[5].record().revision, 2);
    for (state, world) in worlds.iter().enumerate() {
        for (name, deed) in every_deed(world) {
            let Some((_, row)) = MODEL.iter().find(|(n, _)| *n == name) else { continue };
            // "Inspect" is released and settled in every state; only a hold point that is shut can be released.
            let mut world = world.clone();
            if name == "release-hold" && state > 0 {
                world.drive.as_mut().unwrap().record.as_mut().unwrap().releases.clear();
            }
            let mut someone = world.installation.people[&SUNE].clone();
            someone.roles = Role::ALL.into();
            let act = world.next_act(deed);
            let answer = world.ask(Some(&someone), &act);
            assert!(!matches!(answer, Err(Refusal::NotAllowed { .. })), "{name} {answer:?}");
            assert_eq!(answer.is_ok(), row[state], "{name} in state {state}: {answer:?}");
            assert!(
                answer.is_ok() || matches!(answer, Err(Refusal::NotNow { .. })),
                "{name} in state {state}: {answer:?}"
            );
        }
    }
}

#[test]
fn every_deed_on_a_drive_has_a_row_in_the_model() {
    for (name, deed) in every_deed(&World::begun()) {
        let of_drive = deed.drive().is_some() && name != "create-drive";
        assert_eq!(of_drive, MODEL.iter().any(|(n, _)| *n == name), "{name}");
    }
}
