//! Every deed by every role: the table of product.md, written out a second time and compared.

use crate::decide::roles;
use crate::journal::Deed;
use crate::people::Role;
use crate::plant::Sheet;
use crate::world::*;
use crate::{PersonId, Refusal};

use super::moves::every_deed;

/// Which of engineer, supervisor, administrator, reader may do each deed.
const TABLE: &[(&str, [bool; 4])] = &[
    ("add-person", [false, false, true, false]),
    ("change-person", [false, false, true, false]),
    ("keep-instrument", [true, true, true, false]),
    ("load-procedure", [false, false, true, false]),
    ("create-site", [true, true, true, false]),
    ("set-site-fields", [true, true, false, false]),
    ("create-drive", [true, true, false, false]),
    ("set-drive-fields", [true, false, false, false]),
    ("begin-record", [true, false, false, false]),
    ("record-entries", [true, false, false, false]),
    ("settle-step", [true, false, false, false]),
    ("resume-step", [true, false, false, false]),
    ("release-hold", [true, false, false, false]),
    ("set-parameters", [true, false, false, false]),
    ("add-parameter-row", [true, false, false, false]),
    ("raise-finding", [true, false, false, false]),
    ("settle-finding", [true, false, false, false]),
    ("accept-finding", [false, true, false, false]),
    ("remark", [true, true, false, false]),
    ("sign-performed", [true, false, false, false]),
    ("sign-accepted", [false, true, false, false]),
    ("return", [false, true, false, false]),
    ("reopen", [false, true, false, false]),
    ("rotate-key", [false, false, true, false]),
];

#[test]
fn each_role_may_do_what_the_table_says_and_no_more() {
    let world = World::signed();
    let mut checked = 0;
    for (name, deed) in every_deed(&world) {
        let Some((_, row)) = TABLE.iter().find(|(n, _)| *n == name) else {
            assert_eq!(name, "set-up", "a deed without a row");
            continue;
        };
        let act = world.clone().next_act(deed);
        for (role, may) in Role::ALL.into_iter().zip(row) {
            let mut person = world.installation.people[&RUTH].clone();
            person.id = PersonId(uuid::Uuid::from_u128(0x77));
            person.roles = [role].into();
            let refused = matches!(world.ask(Some(&person), &act), Err(Refusal::NotAllowed { .. }));
            assert_eq!(!refused, *may, "{name} by {}", role.words());
            person.active = false;
            assert!(why(world.ask(Some(&person), &act)).contains("switched off"), "{name} by an account switched off");
            checked += 1;
        }
        if name != "load-procedure" {
            assert!(why(world.ask(None, &act)).contains("Sign in"), "{name} by nobody");
        }
    }
    assert_eq!(checked, TABLE.len() * 4);
}

#[test]
fn a_supervisor_fills_in_a_drive_only_until_its_record_is_begun() {
    let mut world = World::new();
    world.set_field(SUNE, Sheet::Motor, "volts", "400", "V").unwrap();
    world.does(ERIN, Deed::BeginRecord { drive: DRIVE });
    assert!(why(world.set_field(SUNE, Sheet::Motor, "hertz", "50", "Hz")).contains("only a startup engineer"));
    assert!(world.record().contributors.is_empty());
    world.set_field(EBBE, Sheet::Motor, "hertz", "50", "Hz").unwrap();
    assert!(world.record().contributors.contains(&EBBE), "a plate value entered in the record counts");
}

#[test]
fn an_administrator_enters_no_results_as_administrator_only() {
    for (_, deed) in every_deed(&World::signed()) {
        let (needed, verb) = roles::needed(&deed);
        let results = ["record", "settle", "release", "sign", "raise", "begin", "keep the parameter", "accept"];
        if results.iter().any(|r| verb.starts_with(r)) {
            assert!(!needed.contains(&Role::Administrator), "{verb}");
        }
    }
}
