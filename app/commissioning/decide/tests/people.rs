//! Setting up, people, instruments, sites, drives and procedures.

use crate::journal::Deed;
use crate::people::{AccuracyRow, Instrument, Role};
use crate::world::*;
use crate::{DriveId, InstrumentId, PersonId, Refusal, SiteId};
use engineering::Kind;
use uuid::Uuid;

fn person(n: u128) -> PersonId {
    PersonId(Uuid::from_u128(n))
}

#[test]
fn setting_up_needs_an_administrator_and_happens_once() {
    let deed = |roles: Vec<Role>, login: &str| Deed::SetUp {
        firm: "Larchwood".into(),
        person: ADA,
        login: login.into(),
        name: "Ada Larch".into(),
        roles,
    };
    let mut world = World::empty();
    assert_eq!(fields(world.attempt(None, deed(vec![Role::Engineer], "A"))), ["roles", "login"]);
    assert_eq!(world.attempt(None, deed(vec![Role::Administrator], "ada")).unwrap().len(), 2);
    assert!(world.installation.people[&ADA].is(Role::Administrator));
    assert!(why(world.attempt(None, deed(vec![Role::Administrator], "ada"))).contains("already"));
}

#[test]
fn a_sign_in_name_is_small_unique_and_never_reused() {
    let mut world = World::new();
    let add = |n, login: &str| Deed::AddPerson {
        person: person(n),
        login: login.into(),
        name: "Zoe Elm".into(),
        roles: vec![Role::Reader],
    };
    for wrong in ["", "z", "Zoe", "zoe elm", "zö", "42", &"z".repeat(41)] {
        assert_eq!(fields(world.attempt(Some(ADA), add(0x91, wrong))), ["login"], "{wrong}");
    }
    world.does(
        ADA,
        Deed::ChangePerson { person: RUTH, name: "Ruth Hazel".into(), roles: vec![Role::Reader], active: false },
    );
    assert_eq!(fields(world.attempt(Some(ADA), add(0x91, "ruth"))), ["login"], "taken by an account switched off");
    world.does(ADA, add(0x91, "zo"));
    assert!(why(world.attempt(Some(ADA), add(0x91, "zoe"))).contains("never reused"));
}

#[test]
fn one_administrator_remains() {
    let mut world = World::new();
    let change = |active, roles| Deed::ChangePerson { person: ADA, name: "Ada Larch".into(), roles, active };
    assert_eq!(fields(world.attempt(Some(ADA), change(false, vec![Role::Administrator]))), ["roles"]);
    assert_eq!(fields(world.attempt(Some(ADA), change(true, vec![Role::Reader]))), ["roles"]);
    assert!(world.does(ADA, change(true, vec![Role::Administrator])).is_empty(), "nothing changed, no event");
    world.does(
        ADA,
        Deed::ChangePerson { person: SUNE, name: "Sune Rowan".into(), roles: vec![Role::Administrator], active: true },
    );
    assert_eq!(world.does(ADA, change(false, vec![Role::Administrator])).len(), 1);
    assert!(why(world.attempt(Some(ADA), change(true, vec![Role::Administrator]))).contains("switched off"));
}

#[test]
fn tags_are_addressable_and_unique_whatever_the_case() {
    let mut world = World::new();
    let drive = |n, tag: &str| Deed::CreateDrive {
        site: SITE,
        drive: DriveId(Uuid::from_u128(n)),
        tag: tag.into(),
        name: "Pump".into(),
    };
    for wrong in ["", "M/1", "M 1", "..", "-", "Mö", "m-2104", &"M".repeat(25)] {
        assert_eq!(fields(world.attempt(Some(ERIN), drive(0xD5, wrong))), ["tag"], "{wrong}");
    }
    let mut other = world.clone();
    other.drive = None;
    other.does(ERIN, drive(0xD5, "P_1.2-b"));
    let site =
        |n, tag: &str| Deed::CreateSite { site: SiteId(Uuid::from_u128(n)), tag: tag.into(), name: "Quay".into() };
    world.site = None;
    for wrong in ["", "Alder", "alder quay", "-alder", "alder-", "a/b", "a.b", "larch-ferry"] {
        assert_eq!(fields(world.attempt(Some(ERIN), site(0x55, wrong))), ["tag"], "{wrong}");
    }
}

#[test]
fn a_stale_form_of_an_instrument_is_refused_with_mine_and_theirs() {
    let mut world = World::new();
    let row = AccuracyRow {
        kind: Kind::Resistance,
        unit: "MΩ".into(),
        percent_of_reading: "5,5".into(),
        digits: String::new(),
        resolution: "0.1".into(),
        percent_of_full_scale: "-1".into(),
        full_scale: "x".into(),
    };
    let mut tester = Instrument {
        id: InstrumentId(Uuid::from_u128(0x17)),
        mark: "IT-07".into(),
        description: "Insulation tester".into(),
        serial: "4471".into(),
        due: "2027-02-30".into(),
        accuracy: vec![row],
        active: true,
    };
    let keep = |tester: &Instrument, seen| Deed::KeepInstrument { instrument: tester.clone(), seen };
    let wrong = fields(world.attempt(Some(ADA), keep(&tester, Vec::new())));
    assert_eq!(wrong, ["due", "accuracy.0.percent_of_full_scale", "accuracy.0.full_scale"]);
    "2027-03-31".clone_into(&mut tester.due);
    tester.accuracy[0].percent_of_full_scale.clear();
    tester.accuracy[0].full_scale = "200".into();
    world.does(ADA, keep(&tester, Vec::new()));
    let kept = world.installation.instruments[&tester.id].clone();
    assert_eq!((kept.accuracy[0].percent_of_reading.as_str(), kept.accuracy[0].digits.as_str()), ("5.5", "0"));
    assert!(world.does(ERIN, keep(&kept, Vec::new())).is_empty(), "unchanged");
    "4472".clone_into(&mut tester.serial);
    let Err(Refusal::Stale { conflicts }) = world.attempt(Some(ERIN), keep(&tester, Vec::new())) else {
        panic!("stale")
    };
    assert_eq!(conflicts[0].theirs[0].by, "Ada Larch");
    world.does(ERIN, keep(&tester, conflicts[0].seen.clone()));
    let twin = Instrument { id: InstrumentId(Uuid::from_u128(0x18)), mark: "it-07".into(), ..tester };
    assert_eq!(fields(world.attempt(Some(ERIN), keep(&twin, Vec::new()))), ["mark"]);
}

#[test]
fn a_procedure_version_never_changes_and_must_hold_together() {
    let mut world = World::new();
    let load = |p: &crate::procedure::Procedure| Deed::LoadProcedure { procedure: Box::new(p.clone()) };
    let same = procedure();
    assert!(world.attempt(None, load(&same)).unwrap().is_empty(), "the same again changes nothing");
    let mut other = procedure();
    "Reworded".clone_into(&mut other.phases[0].title);
    assert!(why(world.attempt(None, load(&other))).contains("Raise the version"));
    other.version = 2;
    let mut broken = other.clone();
    let twin = broken.phases[0].steps[0].clone();
    broken.phases[1].steps.push(twin);
    broken.phases[2].hold.as_mut().unwrap().conditions =
        vec![crate::procedure::Condition::StepSettled { step: "nowhere".into() }];
    let said = format!("{:?}", world.attempt(None, load(&broken)).unwrap_err());
    for part in ["step “prove-dead” stands twice", "item “tester-proved” stands twice", "before “turn” asks"]
    {
        assert!(said.contains(part), "{part}: {said}");
    }
    assert_eq!(world.attempt(None, load(&other)).unwrap().len(), 1);
    assert!(
        why(world.attempt(None, load(&World::new().installation.procedures[&1].as_ref().clone().older())))
            .contains("older")
    );
    world.does(ERIN, Deed::BeginRecord { drive: DRIVE });
    assert_eq!(world.record().procedure, 2, "the newest");
}

impl crate::procedure::Procedure {
    /// Version 0 does not exist, so that any loaded one is newer.
    fn older(mut self) -> Self {
        self.version = 0;
        self
    }
}

fn row(
    percent: &str,
    digits: &str,
    resolution: &str,
    of_full_scale: &str,
    full_scale: &str,
    unit: &str,
) -> AccuracyRow {
    AccuracyRow {
        kind: Kind::Resistance,
        unit: unit.into(),
        percent_of_reading: percent.into(),
        digits: digits.into(),
        resolution: resolution.into(),
        percent_of_full_scale: of_full_scale.into(),
        full_scale: full_scale.into(),
    }
}

/// A row that amounts to nothing would make every reading exact; one quantity may have a row for each range.
#[test]
fn an_accuracy_amounts_to_something_and_stands_once_for_a_range() {
    let mut world = World::new();
    let mut keep = |accuracy: &[AccuracyRow]| {
        let tester = Instrument {
            id: InstrumentId(Uuid::from_u128(0x17)),
            mark: "IT-07".into(),
            description: "Insulation tester".into(),
            serial: "4471".into(),
            due: "2027-03-31".into(),
            accuracy: accuracy.to_vec(),
            active: true,
        };
        world.attempt(Some(ADA), Deed::KeepInstrument { instrument: tester, seen: Vec::new() })
    };
    for (wrong, field) in [
        (row("", "", "", "", "", "Ω"), "accuracy.0.percent_of_reading"),
        (row("0", "0,0", "0.1", "0", "1000", "Ω"), "accuracy.0.percent_of_reading"),
        (row("", "2", "", "", "", "Ω"), "accuracy.0.resolution"),
        (row("1.5", "2", "0", "", "", "Ω"), "accuracy.0.resolution"),
        (row("", "", "", "1", "", "Ω"), "accuracy.0.full_scale"),
        (row("1.5", "", "", "1", "0", "Ω"), "accuracy.0.full_scale"),
    ] {
        assert_eq!(fields(keep(&[wrong])), [field]);
    }
    let low = row("2", "2", "0.01", "", "20", "Ω");
    for twice in [row("3", "", "", "", "20,0", "Ω"), row("3", "", "", "", "20000", "mΩ")] {
        assert_eq!(fields(keep(&[low.clone(), twice])), ["accuracy.1.kind"]);
    }
    let open = row("3", "", "", "", "", "MΩ");
    assert_eq!(fields(keep(&[open.clone(), low.clone(), open.clone()])), ["accuracy.2.kind"]);
    assert_eq!(keep(&[open, low, row("3", "3", "1", "", "200", "MΩ")]).unwrap().len(), 1);
}
