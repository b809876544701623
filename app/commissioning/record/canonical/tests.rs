//! Tests of record.json: every leaf is signed, nothing unknown is read, what is read rebuilds.

use super::*;
use crate::journal::{Change, Deed};
use crate::people::Instrument;
use crate::plant::Sheet;
use crate::record::{
    EntryPlace, Meaning, ParameterColumn, ParameterPlace, Photo, ReleaseRole, SettledOtherwise, Severity,
};
use crate::world::*;
use crate::{FindingId, InstrumentId};
use serde::Deserialize as _;
use serde_json::Value;
use uuid::Uuid;

/// An accepted record with something of everything in it; made once and copied.
pub(super) fn full() -> World {
    static MADE: std::sync::LazyLock<World> = std::sync::LazyLock::new(make_full);
    MADE.clone()
}

fn make_full() -> World {
    let mut world = World::begun();
    world.set_field(ERIN, Sheet::Motor, "volts", "400", "V").unwrap();
    world.set_field(ERIN, Sheet::Motor, "volts", "690", "V").unwrap();
    for option in ["brake-chopper", "bypass"] {
        world.set_field(ERIN, Sheet::Drive, option, "no", "").unwrap();
    }
    let volts = Change {
        place: (0, "volts".into()),
        text: "690".into(),
        unit: "V".into(),
        instrument: None,
        photo: None,
        seen: vec![],
    };
    world.does(
        SUNE,
        Deed::SetSiteFields { site: SITE, sheet: Sheet::Supply, changes: vec![volts], reason: String::new() },
    );
    let id = InstrumentId(Uuid::from_u128(0x17));
    let tester = Instrument {
        id,
        mark: "IT-07".into(),
        description: "Insulation tester".into(),
        serial: "4471".into(),
        due: "2027-03-31".into(),
        accuracy: Vec::new(),
        active: true,
    };
    world.does(ADA, Deed::KeepInstrument { instrument: tester, seen: Vec::new() });
    world.enter(
        ERIN,
        "prove-dead",
        &[("tester-proved", "yes"), ("bus-after-waiting", "3"), ("isolation-note", "lamp")],
    );
    world.enter(EBBE, "prove-dead", &[("isolation-note", "")]);
    let names = Deed::ReleaseHold {
        drive: DRIVE,
        phase: "inspect".into(),
        role: ReleaseRole::Witness,
        printed_name: "Wanda Ash".into(),
        declared: vec![true, true],
    };
    world.does(ERIN, names);
    let mut picture = world.change(EntryPlace::new("terminal-photo"), "Terminals");
    picture.photo = Some(Photo { hash: "ab".repeat(32), media: "image/jpeg".into(), bytes: 9, caption: String::new() });
    let tight = world.change(EntryPlace::new("terminals-tight"), "yes");
    world.record_changes(ERIN, "terminals", vec![picture, tight], "").unwrap();
    let mut reading = world.change(EntryPlace::new("ir-60s"), "0.0001");
    (reading.instrument, reading.unit) = (Some(id), "MΩ".into());
    world.record_changes(ERIN, "insulation", vec![reading], "wet winding, dried next").unwrap();
    let again = vec![world.change(EntryPlace::new("ir-60s"), "812")];
    world.record_changes(ERIN, "insulation", again, "after drying").unwrap();
    world.enter(ERIN, "lift", &[("isolation-removed", "yes")]);
    world.release("turn");
    world.enter(ERIN, "direction", &[("direction-seen", "clockwise")]);
    let otherwise =
        |how, reason: &str| Deed::SettleStep { drive: DRIVE, step: "run".into(), how, reason: reason.into() };
    world.does(ERIN, otherwise(SettledOtherwise::NotApplicable, "No machine here."));
    world.does(ERIN, Deed::ResumeStep { drive: DRIVE, step: "run".into() });
    world.does(ERIN, otherwise(SettledOtherwise::CouldNotBeDone, "No load yet."));
    world.does(ERIN, Deed::AddParameterRow { drive: DRIVE, label: "Fan run-on".into() });
    let place = ParameterPlace { function: "acceleration-time".into(), column: ParameterColumn::Intended };
    let ramp = Change { place, text: "20".into(), unit: "s".into(), instrument: None, photo: None, seen: vec![] };
    world.does(ERIN, Deed::SetParameters { drive: DRIVE, changes: vec![ramp], reason: String::new() });
    let worn = FindingId(Uuid::from_u128(0xF1));
    let raise = Deed::RaiseFinding {
        drive: DRIVE,
        finding: worn,
        severity: Severity::Information,
        text: "Worn.".into(),
        step: None,
    };
    world.does(ERIN, raise);
    world.does(ERIN, Deed::SettleFinding { drive: DRIVE, finding: worn, how: "New label.".into() });
    world.does(ERIN, Deed::Remark { drive: DRIVE, step: "run".into(), text: "Load comes in May.".into() });
    world.sign(ERIN, Meaning::Performed).unwrap();
    world.does(SUNE, Deed::Remark { drive: DRIVE, step: String::new(), text: "Seen.".into() });
    let open = world.record().findings.values().find(|f| f.is_open()).unwrap().id;
    world.does(SUNE, Deed::AcceptFinding { drive: DRIVE, finding: open, reason: "Load run in May.".into() });
    world.sign(SUNE, Meaning::Accepted).unwrap();
    world
}

fn leaves(value: &Value, path: String, found: &mut Vec<String>) {
    match value {
        Value::Object(map) => {
            map.iter().for_each(|(k, v)| leaves(v, format!("{path}/{}", k.replace('/', "~1")), found))
        }
        Value::Array(list) => list.iter().enumerate().for_each(|(n, v)| leaves(v, format!("{path}/{n}"), found)),
        _ => found.push(path),
    }
}

/// Another value of the same kind, so that the change is seen by the digest rather than by the reader where possible.
fn other(value: &Value) -> Value {
    match value {
        Value::Null => Value::from("x"),
        Value::Bool(flag) => Value::from(!flag),
        Value::Number(n) => {
            n.as_u64().map_or_else(|| Value::from(n.as_f64().unwrap() * 2.0 + 1.0), |n| Value::from(n + 1))
        }
        Value::String(text) if Uuid::parse_str(text).is_ok() => Value::from(Uuid::from_u128(0xABCD).to_string()),
        Value::String(text) if text.starts_with("2026-") => Value::from(text.replacen("2026-", "2025-", 1)),
        Value::String(text) => Value::from(format!("{text}9")),
        Value::Array(_) | Value::Object(_) => panic!("not a leaf"),
    }
}

/// Whether a file is found out: it cannot be read, contradicts itself, or a standing signature does not fit. Read from
/// its values rather than its text, which takes half as long; the text is read in the tests further down.
fn found_out(forged: &Value) -> bool {
    let Ok(file) = RecordFile::deserialize(forged) else { return true };
    if file.rebuild().is_err() {
        return true;
    }
    let signatures = file.record.iter().flat_map(|r| &r.signatures).enumerate();
    signatures.filter(|(_, s)| !s.superseded).any(|(n, s)| file.digest_at(n).as_ref() != Some(&s.digest))
}

/// Only the chain itself proves these: they say where in it something stands, or when it was last added to.
fn told_by_the_chain(path: &str) -> bool {
    let history = path.starts_with("/record/history/") && ["/event", "/sequence"].iter().any(|end| path.ends_with(end));
    let own_head = path == "/record/signatures/1/head/hash";
    history || own_head || ["/head/hash", "/head/sequence", "/drive/last_change"].contains(&path)
}

/// integrity.md E 10: change any signed field, unit, photo hash or procedure version, and verification fails, n of n.
#[test]
fn every_leaf_of_a_signed_record_is_found_out_when_it_is_changed() {
    let file = full().file();
    let mut value = serde_json::to_value(&file).unwrap();
    assert!(!found_out(&value), "unchanged, everything fits");
    let mut paths = Vec::new();
    leaves(&value, String::new(), &mut paths);
    for part in [
        "/photo/hash",
        "/value/unit",
        "/value/si",
        "/procedure/version",
        "/site/fields/",
        "/verdicts",
        "/instrument/due",
        "/catalogue",
    ] {
        assert!(part == "/verdicts" || paths.iter().any(|p| p.contains(part)), "nothing of {part} in the record");
    }
    let (mut changed, mut apart) = (0, 0);
    for path in &paths {
        if told_by_the_chain(path) {
            apart += 1;
            continue;
        }
        let leaf = value.pointer_mut(path).unwrap();
        let forged = other(leaf);
        let signed = std::mem::replace(leaf, forged);
        assert!(found_out(&value), "{path} was changed and nobody noticed");
        *value.pointer_mut(path).unwrap() = signed;
        changed += 1;
    }
    assert!(changed > 400, "{changed} leaves");
    assert!(apart <= 8, "{apart} leaves are left to the chain");
}

#[test]
fn what_is_left_out_or_slipped_in_is_found_out() {
    let file = full().file();
    for list in [
        "entries",
        "otherwise",
        "once_otherwise",
        "isolations",
        "releases",
        "parameters",
        "free_rows",
        "findings",
        "remarks",
        "contributors",
        "history",
        "signatures",
    ] {
        let mut forged = serde_json::to_value(&file).unwrap();
        let items = forged["record"][list].as_array_mut().unwrap();
        let last = items.pop().unwrap();
        assert!(found_out(&forged), "the last of {list} left out");
        let items = forged["record"][list].as_array_mut().unwrap();
        items.extend([last.clone(), last]);
        let twice = found_out(&forged);
        assert!(twice || list == "contributors", "the last of {list} twice");
    }
}

#[test]
fn what_this_version_does_not_know_is_refused_with_its_path() {
    let file = full().file();
    let value = serde_json::to_value(&file).unwrap();
    let fault = |change: &dyn Fn(&mut Value)| {
        let mut changed = value.clone();
        change(&mut changed);
        RecordFile::read(&changed.to_string()).unwrap_err()
    };
    let unknown = fault(&|v| v["record"]["entries"][1]["slot"]["standing"][0]["mood"] = Value::from("good"));
    assert_eq!(unknown.path, "record.entries[1].slot.standing[0].mood");
    assert!(unknown.message.contains("unknown field `mood`"), "{unknown}");
    assert_eq!(fault(&|v| v["version"] = Value::from(2)).path, "version");
    assert_eq!(fault(&|v| v["format"] = Value::from("other")).path, "format");
    assert_eq!(fault(&|v| v["drive"]["last_change"] = Value::from("yesterday")).path, "drive.last_change");
    let item = fault(&|v| v["procedure"]["phases"][0]["step"][0]["item"][0]["colour"] = Value::from("red"));
    assert!(item.path.starts_with("procedure.phases[0].step[0].item[0]"), "{item}");
    let trailing = format!("{} true", file.to_json());
    assert!(RecordFile::read(&trailing).is_err());
    for nonsense in ["", "[]", "null", "{}", "\u{feff}{}", &"[".repeat(100_000)] {
        assert!(RecordFile::read(nonsense).is_err());
    }
}

#[test]
fn a_place_stands_once() {
    let mut file = full().file();
    let twin = file.drive.fields[2].clone();
    file.drive.fields.push(twin);
    assert!(file.rebuild().unwrap_err().contains("drive.fields[3] stands a second time"));
}

#[test]
fn text_is_the_same_every_time_and_ends_with_a_line_feed() {
    let (one, two) = (full().file().to_json(), full().file().to_json());
    assert_eq!(one, two);
    assert!(one.ends_with("}\n") && !one.ends_with("\n\n"));
}

#[test]
fn a_superseded_signature_has_no_digest_to_compare() {
    let mut world = World::accepted();
    assert!(world.file().digest_at(0).is_some() && world.file().digest_at(2).is_none());
    world.does(SUNE, Deed::Reopen { drive: DRIVE, reason: "Motor replaced.".into() });
    assert!(world.file().digest_at(0).is_none());
}

/// Why a file contradicts itself once a value in it is another.
fn contradiction(file: &RecordFile, path: &str, forged: impl Into<Value>) -> String {
    let mut value = serde_json::to_value(file).unwrap();
    *value.pointer_mut(path).unwrap_or_else(|| panic!("no {path}")) = forged.into();
    RecordFile::deserialize(&value).unwrap().rebuild().unwrap_err()
}

#[test]
fn whoever_filled_in_a_plate_after_the_beginning_is_a_contributor() {
    let mut world = World::new();
    world.set_field(SUNE, Sheet::Motor, "volts", "400", "V").unwrap();
    world.does(ERIN, Deed::BeginRecord { drive: DRIVE });
    world.set_field(EBBE, Sheet::Motor, "amps", "21", "A").unwrap();
    let file = world.file();
    let listed = file.record.as_ref().unwrap().contributors.clone();
    assert_eq!(listed, [EBBE], "Sune filled in a plate before there was a record");
    let said = contradiction(&file, "/record/contributors", Vec::<Value>::new());
    assert!(said.contains("contributors lacks"), "{said}");
}

#[test]
fn nobody_accepts_what_they_contributed_to() {
    let file = World::accepted().file();
    assert!(file.rebuild().is_ok());
    let both = vec![Value::from(ERIN.to_string()), Value::from(SUNE.to_string())];
    let said = contradiction(&file, "/record/contributors", both);
    assert!(said.contains("accepted by somebody who contributed"), "{said}");
}

#[test]
fn a_number_follows_from_its_text_and_unit() {
    let file = full().file();
    let entries = &file.record.as_ref().unwrap().entries;
    let reading = entries.iter().position(|e| e.place.item == "ir-60s").unwrap();
    for (path, place) in [
        (format!("/record/entries/{reading}/slot/standing/0/value/value"), "ir-60s.0"),
        (format!("/record/entries/{reading}/slot/earlier/0/value/value"), "ir-60s.0"),
        ("/record/parameters/0/slot/standing/0/value".to_owned(), "acceleration-time.intended"),
        ("/drive/fields/2/slot/standing/0/value".to_owned(), "motor.0.volts"),
        ("/site/fields/0/slot/standing/0/value".to_owned(), "supply.0.volts"),
    ] {
        for (part, forged) in [("si", "5000000"), ("text", "77"), ("si", "many")] {
            let said = contradiction(&file, &format!("{path}/{part}"), forged);
            assert!(said.contains(place) && said.contains("does not follow"), "{path}: {said}");
        }
        assert!(contradiction(&file, &format!("{path}/si"), Value::Null).contains(place));
    }
    let words = entries.iter().position(|e| e.place.item == "terminals-tight").unwrap();
    let said = contradiction(
        &file,
        &format!("/record/entries/{words}/slot/standing/0/value/value"),
        serde_json::json!({ "text": "yes", "si": "1" }),
    );
    assert!(said.contains("terminals-tight.0"), "{said}");
}

/// integrity.md: nothing that was said is lost; why a step was left out stays readable when it is taken up again.
#[test]
fn why_a_step_was_settled_otherwise_stays_when_it_is_resumed() {
    let file = full().file();
    let part = file.record.as_ref().unwrap();
    let once: Vec<_> = part.once_otherwise.iter().map(|o| (o.step.as_str(), o.settled.value.1.as_str())).collect();
    assert_eq!(once, [("run", "No machine here.")]);
    assert_eq!(part.once_otherwise[0].ended.by_name, "Erin Alder");
    assert_eq!(part.otherwise[0].settled.value.1, "No load yet.");
    // A record of before has no such list, and its text and digest stay what they were.
    let before = World::accepted().file();
    assert!(!before.to_json().contains("once_otherwise") && RecordFile::read(&before.to_json()).unwrap() == before);
}
