//! Sheets of site and drive: scope, stale forms, columns, reasons.

use crate::journal::{Change, Deed};
use crate::plant::{Place, Sheet};
use crate::record::Meaning;
use crate::world::*;
use crate::{PersonId, Refusal};

fn change(column: u8, key: &str, text: &str, unit: &str) -> Change<(u8, String)> {
    Change {
        place: (column, key.into()),
        text: text.into(),
        unit: unit.into(),
        instrument: None,
        photo: None,
        seen: Vec::new(),
    }
}

fn set(world: &mut World, who: PersonId, sheet: Sheet, changes: Vec<Change<(u8, String)>>) -> Result<usize, Refusal> {
    world
        .attempt(Some(who), Deed::SetDriveFields { drive: DRIVE, sheet, changes, reason: String::new() })
        .map(|e| e.len())
}

/// procedure.md, Scope: refused with a sentence where a check would be wrong.
#[test]
fn what_is_outside_the_scope_is_refused_on_its_field() {
    let mut world = World::new();
    for (sheet, key, text, unit, field) in [
        (Sheet::Motor, "machine", "permanent-magnet", "", "motor.0.machine"),
        (Sheet::Motor, "volts", "3.3", "kV", "motor.0.volts"),
        (Sheet::Supply, "feed", "single-phase", "", "supply.0.feed"),
        (Sheet::Supply, "feed", "common-dc-bus", "", "supply.0.feed"),
        (Sheet::DrivePlate, "converter", "matrix", "", "drive-plate.0.converter"),
    ] {
        assert_eq!(fields(set(&mut world, ERIN, sheet, vec![change(0, key, text, unit)])), [field]);
    }
    let site = Deed::SetSiteFields {
        site: SITE,
        sheet: Sheet::Supply,
        changes: vec![change(0, "volts", "11", "kV")],
        reason: String::new(),
    };
    assert_eq!(fields(world.attempt(Some(SUNE), site)), ["supply.0.volts"]);
    assert_eq!(
        set(
            &mut world,
            ERIN,
            Sheet::Motor,
            vec![change(0, "volts", "690", "V"), change(0, "machine", "induction", "")]
        )
        .unwrap(),
        2
    );
}

#[test]
fn columns_belong_to_the_fields_of_rating_columns_only() {
    let mut world = World::new();
    let changes = vec![
        change(3, "volts", "690", ""),
        change(4, "volts", "690", ""),
        change(1, "machine", "induction", ""),
        change(0, "nonsense", "1", ""),
    ];
    let at_fault = fields(set(&mut world, ERIN, Sheet::Motor, changes));
    assert_eq!(at_fault, ["motor.4.volts", "motor.1.machine", "motor.0.nonsense"]);
    assert!(matches!(set(&mut world, ERIN, Sheet::Site, vec![]), Err(Refusal::Unknown { .. })));
    let site = Deed::SetSiteFields { site: SITE, sheet: Sheet::Motor, changes: vec![], reason: String::new() };
    assert!(matches!(world.attempt(Some(ERIN), site), Err(Refusal::Unknown { .. })));
}

#[test]
fn a_unit_is_part_of_the_value_and_text_stays_as_typed() {
    let mut world = World::new();
    world.set_field(ERIN, Sheet::Motor, "power", "15", "hp").unwrap();
    assert!(world.set_field(ERIN, Sheet::Motor, "power", "15", "hp").unwrap().is_empty());
    let stale = set(&mut world, EBBE, Sheet::Motor, vec![change(0, "power", "15", "kW")]);
    let Err(Refusal::Stale { conflicts }) = stale else { panic!("another unit is another value") };
    assert_eq!(conflicts[0].field, "motor.0.power");
    assert_eq!(world.set_field(ERIN, Sheet::Motor, "power", "15", "kW").unwrap().len(), 1);
    world.set_field(ERIN, Sheet::Motor, "power", "15.0", "kW").unwrap();
    let slot = &world.drive().fields[&Place::new(Sheet::Motor, "power")];
    assert_eq!(slot.current().unwrap().value.as_ref().unwrap().text, "15.0");
    assert_eq!(slot.earlier().len(), 2);
    world.set_field(ERIN, Sheet::Motor, "power", "", "").unwrap();
    assert!(world.drive().field(&Place::new(Sheet::Motor, "power")).is_none());
}

#[test]
fn after_a_signature_overwriting_a_plate_wants_a_reason_but_filling_a_gap_does_not() {
    let mut world = World::complete();
    world.set_field(ERIN, Sheet::Motor, "volts", "400", "V").unwrap();
    world.set_field(ERIN, Sheet::Motor, "volts", "380", "V").unwrap();
    world.sign(ERIN, Meaning::Performed).unwrap();
    assert!(why(world.set_field(ERIN, Sheet::Motor, "volts", "415", "V")).contains("return"));
    world.does(SUNE, Deed::Return { drive: DRIVE, reason: "Which volts?".into() });
    assert_eq!(fields(world.set_field(ERIN, Sheet::Motor, "volts", "415", "V")), ["reason"]);
    world.set_field(ERIN, Sheet::Motor, "hertz", "50", "Hz").unwrap();
}

#[test]
fn one_form_has_a_largest_size() {
    let mut world = World::new();
    let many = (0..501).map(|n| change(0, &format!("f{n}"), "1", "")).collect();
    assert!(why(set(&mut world, ERIN, Sheet::Motor, many)).contains("at most 500"));
}
