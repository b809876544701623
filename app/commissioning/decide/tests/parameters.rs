//! The parameter record: values, free rows, and what is left to explain.

use crate::agenda::{self, left_of_group};
use crate::journal::{Change, Deed};
use crate::record::{ParameterColumn, ParameterPlace, functions};
use crate::world::*;

fn place(function: &str, column: ParameterColumn) -> ParameterPlace {
    ParameterPlace { function: function.into(), column }
}

fn set(
    world: &mut World,
    function: &str,
    column: ParameterColumn,
    text: &str,
    unit: &str,
) -> Result<usize, crate::Refusal> {
    let place = place(function, column);
    let seen = world.record().parameters.get(&place).map(|s| s.seen()).unwrap_or_default();
    let change = Change { place, text: text.into(), unit: unit.into(), instrument: None, photo: None, seen };
    let deed = Deed::SetParameters { drive: DRIVE, changes: vec![change], reason: String::new() };
    world.attempt(Some(ERIN), deed).map(|events| events.len())
}

#[test]
fn as_left_is_compared_by_value_and_a_difference_is_explained() {
    use ParameterColumn::{AsLeft, Explanation, Intended};
    let mut world = World::begun();
    let group = functions::find("acceleration-time").unwrap().group;
    assert_eq!(left_of_group(Some(world.record()), group), ["intended values"]);
    set(&mut world, "acceleration-time", Intended, "60", "s").unwrap();
    assert!(left_of_group(Some(world.record()), group).is_empty(), "while setting, what is intended is enough");
    assert_eq!(left_of_group(Some(world.record()), "*").len(), 1);
    set(&mut world, "acceleration-time", AsLeft, "1", "min").unwrap();
    assert!(left_of_group(Some(world.record()), "*").is_empty(), "one minute is sixty seconds");
    set(&mut world, "acceleration-time", AsLeft, "90", "s").unwrap();
    assert!(left_of_group(Some(world.record()), "*")[0].contains("why"));
    set(&mut world, "acceleration-time", Explanation, "Belt slipped at 60 s.", "").unwrap();
    assert!(left_of_group(Some(world.record()), "*").is_empty());
    assert_eq!(agenda::differs(None, None), agenda::Difference::Unknown);
}

#[test]
fn free_rows_are_numbered_and_named_once() {
    let mut world = World::begun();
    let row = |label: &str| Deed::AddParameterRow { drive: DRIVE, label: label.into() };
    assert_eq!(fields(world.attempt(Some(ERIN), row(""))), ["label"]);
    world.does(ERIN, row("Fan run-on"));
    assert_eq!(fields(world.attempt(Some(ERIN), row("fan RUN-ON"))), ["label"]);
    assert_eq!(world.record().free_rows, [("row-1".to_owned(), "Fan run-on".to_owned())]);
    set(&mut world, "row-1", ParameterColumn::Intended, "120 s", "").unwrap();
    assert_eq!(left_of_group(Some(world.record()), "*"), ["Fan run-on, as left"]);
    assert_eq!(fields(set(&mut world, "row-2", ParameterColumn::Code, "x", "")), ["row-2.code"]);
    assert_eq!(
        fields(set(&mut world, "acceleration-time", ParameterColumn::AsLeft, "fast", "s")),
        ["acceleration-time.as-left"]
    );
    assert!(world.record().contributors.contains(&ERIN));
}
