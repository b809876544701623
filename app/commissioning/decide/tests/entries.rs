//! Recording entries: stale forms, reasons, believable ranges, pictures, order.

use crate::journal::{Deed, Fact};
use crate::people::Instrument;
use crate::record::{EntryPlace, Photo, SettledOtherwise};
use crate::world::*;
use crate::{EventId, InstrumentId, Refusal};
use uuid::Uuid;

const BUS: &str = "bus-after-waiting";

#[test]
fn what_is_unchanged_makes_no_event_and_is_never_stale() {
    let mut world = World::begun();
    world.enter(ERIN, "prove-dead", &[(BUS, "3"), ("isolation-note", "one\r\ntwo")]);
    let mut same =
        vec![world.change(EntryPlace::new(BUS), "3"), world.change(EntryPlace::new("isolation-note"), "one\ntwo")];
    same.iter_mut().for_each(|c| c.seen = vec![EventId("older.1".into())]);
    // Isolation is not in force here, but what was entered since counts: the same again is the same.
    assert!(world.record_changes(ERIN, "prove-dead", same, "").unwrap().is_empty());
    let empty = vec![world.change(EntryPlace::new("tester-proved"), "")];
    assert!(world.record_changes(ERIN, "prove-dead", empty, "").unwrap().is_empty());
}

/// A prefix typed counts in ohms, so that the form that comes back with another unit picked changes nothing.
#[test]
fn half_a_megohm_typed_with_a_prefix_is_never_five_hundred_gigohm() {
    let mut world = World::begun();
    world.enter(ERIN, "insulation", &[("ir-60s", "500k")]);
    let place = EntryPlace::new("ir-60s");
    let value = world.record().entry(&place).unwrap().value.value.clone();
    assert_eq!((value.number(), value.shown().as_str()), (Some(5e5), "500 kΩ"), "the item's unit is MΩ");
    let mut again = world.change(place, "500k");
    again.unit = "GΩ".into();
    assert!(world.record_changes(ERIN, "insulation", vec![again], "").unwrap().is_empty());
}

#[test]
fn a_stale_form_gets_every_conflict_with_who_and_what() {
    let mut world = World::begun();
    let mine = vec![world.change(EntryPlace::new(BUS), "4"), world.change(EntryPlace::new("isolation-note"), "mine")];
    world.enter(EBBE, "prove-dead", &[(BUS, "3"), ("isolation-note", "theirs")]);
    let Err(Refusal::Stale { conflicts }) = world.record_changes(ERIN, "prove-dead", mine.clone(), "misread") else {
        panic!("stale")
    };
    assert_eq!(conflicts.len(), 2);
    assert_eq!(
        (conflicts[0].field.as_str(), conflicts[0].theirs[0].by.as_str()),
        ("bus-after-waiting.0", "Ebbe Birch")
    );
    assert_eq!(conflicts[0].mine.as_ref().unwrap().shown(), "4 V");
    assert_eq!(conflicts[0].theirs[0].value.as_ref().unwrap().shown(), "3 V");
    let mut chosen = mine;
    for (change, conflict) in chosen.iter_mut().zip(conflicts) {
        change.seen = conflict.seen;
    }
    assert_eq!(world.record_changes(ERIN, "prove-dead", chosen, "misread").unwrap().len(), 2);
    assert_eq!(world.record().entries[&EntryPlace::new(BUS)].earlier().len(), 1, "theirs stays readable");
}

#[test]
fn what_was_taken_back_meanwhile_is_a_conflict_too() {
    let mut world = World::begun();
    world.enter(ERIN, "prove-dead", &[("isolation-note", "one")]);
    let mine = vec![world.change(EntryPlace::new("isolation-note"), "two")];
    world.enter(EBBE, "prove-dead", &[("isolation-note", "")]);
    let Err(Refusal::Stale { conflicts }) = world.record_changes(ERIN, "prove-dead", mine, "") else { panic!("stale") };
    assert_eq!((conflicts[0].theirs[0].by.as_str(), &conflicts[0].theirs[0].value), ("Ebbe Birch", &None));
}

/// integrity.md E 7: a reason is required for overwriting a measured value, and for any overwrite after a signature.
#[test]
fn overwriting_a_reading_always_wants_a_reason_and_all_else_after_the_first_signature() {
    let mut world = World::complete();
    let place = EntryPlace::new("ir-60s");
    let change = |world: &World, text: &str| vec![world.change(EntryPlace::new("ir-60s"), text)];
    let (overwrite, emptied) = (change(&world, "815"), change(&world, ""));
    assert_eq!(fields(world.record_changes(ERIN, "insulation", overwrite.clone(), " ")), ["reason"]);
    assert_eq!(fields(world.record_changes(ERIN, "insulation", emptied, "")), ["reason"]);
    world.record_changes(ERIN, "insulation", overwrite, "read off wrongly").unwrap();
    assert_eq!(world.record().entry(&place).unwrap().reason.as_deref(), Some("read off wrongly"));
    world.enter(ERIN, "direction", &[("direction-seen", "counter")]);
    world.sign(ERIN, crate::record::Meaning::Performed).unwrap();
    world.does(SUNE, Deed::Return { drive: DRIVE, reason: "Direction?".into() });
    let choice = vec![world.change(EntryPlace::new("direction-seen"), "clockwise")];
    assert_eq!(fields(world.record_changes(ERIN, "direction", choice.clone(), "")), ["reason"]);
    world.record_changes(ERIN, "direction", choice, "seen again").unwrap();
}

/// The figure stays and only the meter changes: the refusal is at `reason` and names what it is about.
#[test]
fn another_instrument_alone_wants_a_reason_too() {
    let mut world = World::begun();
    let meter = Instrument {
        id: InstrumentId(Uuid::from_u128(0x77)),
        mark: "MM-77".into(),
        description: "Meter".into(),
        serial: "1".into(),
        due: "2027-03-31".into(),
        accuracy: Vec::new(),
        active: true,
    };
    let id = meter.id;
    world.does(ADA, Deed::KeepInstrument { instrument: meter, seen: Vec::new() });
    world.enter(ERIN, "prove-dead", &[(BUS, "3")]);
    let mut change = world.change(EntryPlace::new(BUS), "3");
    change.instrument = Some(id);
    let Err(Refusal::Fields { errors }) = world.record_changes(ERIN, "prove-dead", vec![change.clone()], "") else {
        panic!("a reason is due")
    };
    assert_eq!((errors.len(), errors[0].field.as_str()), (1, "reason"));
    assert!(errors[0].message.contains("DC bus, its instrument"), "{}", errors[0].message);
    world.record_changes(ERIN, "prove-dead", vec![change], "read with the other meter").unwrap();
    let entry = world.record().entry(&EntryPlace::new(BUS)).unwrap();
    assert_eq!(entry.value.instrument.as_ref().map(|i| i.0.id), Some(id));
}

/// integrity.md E 5: what is hard to believe needs "accept with reason", which stays with the entry.
#[test]
fn what_is_hard_to_believe_wants_a_reason_and_keeps_it() {
    let mut world = World::begun();
    let far = vec![world.change(EntryPlace::new(BUS), "2500")];
    let refused = world.record_changes(ERIN, "prove-dead", far.clone(), "").unwrap_err();
    assert!(format!("{refused:?}").contains("between 0 and 2000 V"), "{refused:?}");
    world.record_changes(ERIN, "prove-dead", far, "probe on the ten-fold divider").unwrap();
    let entry = &world.record().entry(&EntryPlace::new(BUS)).unwrap().value;
    assert_eq!(entry.accepted_because.as_deref(), Some("probe on the ten-fold divider"));
    assert_eq!(entry.value.text, "2500");
}

#[test]
fn all_faults_of_a_form_are_told_together() {
    let mut world = World::begun();
    let mut changes = vec![
        world.change(EntryPlace::new(BUS), "1,234"),
        world.change(EntryPlace::new("tester-proved"), "maybe"),
        world.change(EntryPlace::in_row("isolation-note", 1), "no such row"),
        world.change(EntryPlace::new("ir-60s"), "5"),
        world.change(EntryPlace::new("isolation-note"), "one"),
        world.change(EntryPlace::new("isolation-note"), "two"),
    ];
    changes[0].unit = "A".into();
    let at_fault = fields(world.record_changes(ERIN, "prove-dead", changes, ""));
    let expected = ["bus-after-waiting.0", "tester-proved.0", "isolation-note.1", "ir-60s.0", "isolation-note.0"];
    assert_eq!(at_fault, expected);
    let choice = vec![world.change(EntryPlace::new("direction-seen"), "upwards")];
    assert_eq!(fields(world.record_changes(ERIN, "direction", choice, "")), ["direction-seen.0"]);
}

#[test]
fn an_instrument_is_kept_as_it_was_on_the_day() {
    let mut world = World::begun();
    let id = InstrumentId(Uuid::from_u128(0x17));
    let mut meter = Instrument {
        id,
        mark: "MM-3".into(),
        description: "Multimeter".into(),
        serial: "88".into(),
        due: "2027-03-31".into(),
        accuracy: Vec::new(),
        active: true,
    };
    let mut change = world.change(EntryPlace::new(BUS), "3");
    change.instrument = Some(id);
    assert_eq!(
        fields(world.record_changes(ERIN, "prove-dead", vec![change.clone()], "")),
        ["bus-after-waiting.0.instrument"]
    );
    world.does(ADA, Deed::KeepInstrument { instrument: meter.clone(), seen: Vec::new() });
    world.record_changes(ERIN, "prove-dead", vec![change.clone()], "").unwrap();
    meter.active = false;
    "2028-03-31".clone_into(&mut meter.due);
    let seen = vec![world.installation.instrument_seen[&id].clone()];
    world.does(ADA, Deed::KeepInstrument { instrument: meter, seen });
    let used = world.record().entry(&EntryPlace::new(BUS)).unwrap().value.instrument.clone().unwrap();
    assert_eq!(used.0.due, "2027-03-31");
    assert!(
        world.record_changes(ERIN, "prove-dead", vec![change.clone()], "").unwrap().is_empty(),
        "the same instrument"
    );
    change.place = EntryPlace::new("ir-60s");
    assert_eq!(fields(world.record_changes(ERIN, "insulation", vec![change], "")), ["ir-60s.0.instrument"], "put away");
}

#[test]
fn a_picture_stays_where_it_is_when_the_form_sends_none() {
    let mut world = World::begun();
    let place = EntryPlace::new("terminal-photo");
    let photo = Photo { hash: "ab".repeat(32), media: "image/jpeg".into(), bytes: 9, caption: String::new() };
    let mut change = world.change(place.clone(), "Terminals");
    assert_eq!(fields(world.record_changes(ERIN, "terminals", vec![change.clone()], "")), ["terminal-photo.0"]);
    change.photo = Some(Photo { media: "image/svg+xml".into(), ..photo.clone() });
    assert_eq!(fields(world.record_changes(ERIN, "terminals", vec![change.clone()], "")), ["terminal-photo.0"]);
    change.photo = Some(photo);
    world.record_changes(ERIN, "terminals", vec![change], "").unwrap();
    let (none, caption) = (world.change(place.clone(), ""), world.change(place.clone(), "Terminals, lid off"));
    assert!(world.record_changes(ERIN, "terminals", vec![none], "").unwrap().is_empty());
    world.record_changes(ERIN, "terminals", vec![caption], "").unwrap();
    let kept = world.record().entry(&place).unwrap().value.photo.clone().unwrap();
    assert_eq!((kept.caption.as_str(), kept.hash.as_str()), ("Terminals, lid off", "ab".repeat(32).as_str()));
}

#[test]
fn an_entry_at_a_step_settled_otherwise_resumes_it() {
    let mut world = World::begun();
    let how = SettledOtherwise::NotApplicable;
    world.does(
        ERIN,
        Deed::SettleStep { drive: DRIVE, step: "prove-dead".into(), how, reason: "No voltage here.".into() },
    );
    let events = world.enter(ERIN, "prove-dead", &[(BUS, "3")]);
    assert!(matches!(events[0].fact, Fact::StepResumed { .. }));
    assert!(world.record().otherwise.is_empty());
}
