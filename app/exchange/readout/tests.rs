//! Read-outs as drives and their tools write them. Codes here are invented.

use super::*;
use crate::code_sheet::{CodeEntry, CodeSheet};
use crate::sheets::Address;
use std::collections::BTreeMap;

fn sheet() -> CodeSheet {
    let entry = |function: &str, code: &str, unit: &str| CodeEntry {
        function: function.into(),
        code: code.into(),
        unit: unit.into(),
        ..CodeEntry::default()
    };
    CodeSheet {
        drive_type: "KX".into(),
        entries: vec![
            CodeEntry { lowest: "0".into(), highest: "60".into(), ..entry("acceleration-time", "A10", "s") },
            entry("deceleration-time", "A11", "s"),
            CodeEntry {
                meanings: vec![("ramp".into(), "0".into()), ("coast".into(), "1".into())],
                ..entry("stop-mode", "A20", "")
            },
            entry("current-limit", "B07", "%"),
            entry("motor-rpm", "B04", "rpm"),
            entry("slip-compensation", "B05", ""),
        ],
    }
}

fn shown(joined: &[Joined]) -> Vec<String> {
    joined
        .iter()
        .map(|j| match j {
            Joined::Function { function, text, unit, notice, .. } => {
                format!("{}={text} {unit}{}", function.key, if notice.is_some() { " beyond" } else { "" })
            }
            Joined::Question { function, readings, .. } => format!("{}? {}", function.key, readings.len()),
            Joined::Problem { function, sentence, .. } => format!("{}! {sentence}", function.key),
            Joined::Free { line } => format!("free {} {} {}", line.code, line.value.text(), line.unit),
        })
        .collect()
}

fn joined(text: &str) -> Vec<String> {
    shown(&join(&read(text.as_bytes(), "readout.txt").unwrap().lines, &sheet(), &BTreeMap::new()))
}

#[test]
fn lines_of_words_with_units_and_without() {
    let found = joined("Read-out of today\nA10 12,5 s\nA11 = 1000 ms\na 20: 1\n\nA20\t1\nB04 1485\nC99 on\n");
    assert_eq!(
        found,
        [
            "acceleration-time=12,5 s",
            "deceleration-time=1000 ms",
            "stop-mode=coast ",
            "motor-rpm=1485 rpm",
            "free C99 on "
        ]
    );
    let out = read(b"Read-out of today\nA10 12,5 s\na 20: 1\n", "r.txt").unwrap();
    assert_eq!(out.left, [1, 3], "a title, and a word without a digit, are no code and value");
}

#[test]
fn tables_with_headings_and_without() {
    let headed = "Parameter;Name;Value;Unit\nA10;accel;12.5;s\nB05;slip;yes;\nZ1;other;7;V\n";
    assert_eq!(joined(headed), ["acceleration-time=12.5 s", "slip-compensation=yes ", "free Z1 7 V"]);
    let bare = "A10;12.5;s\nA11;20;s\nA20;0;\n";
    assert_eq!(joined(bare), ["acceleration-time=12.5 s", "deceleration-time=20 s", "stop-mode=ramp "]);
}

#[test]
fn what_cannot_be_taken_is_said_and_nothing_is_guessed() {
    let found = joined("A10 70 s\nB07 110 %\nB04 1.485 rpm\nA20 7\nA11 5 s\nA11 6 s\n");
    assert_eq!(found[0], "acceleration-time=70 s beyond");
    assert!(
        found[1].starts_with("current-limit! A2 (B07): the drive counts") || found[1].contains("no unit"),
        "{}",
        found[1]
    );
    assert_eq!(found[2], "motor-rpm? 2");
    assert!(found[3].starts_with("stop-mode! A4 (A20): “7” is none of the choices"), "{}", found[3]);
    assert!(found[4].contains("stands again in A6") && found[5].contains("stands again in A5"));
    let lines = read(b"B04 1.485 rpm\n", "r.txt").unwrap().lines;
    let answered = join(&lines, &sheet(), &BTreeMap::from([(Address::new(0, 0), Some(1))]));
    assert_eq!(shown(&answered), ["motor-rpm=1485 rpm"]);
    assert!(join(&lines, &sheet(), &BTreeMap::from([(Address::new(0, 0), None)])).is_empty());
    let proved = joined("B04 1.485 rpm\nA10 12,5 s\n");
    assert_eq!(proved[0], "motor-rpm=1485 rpm", "the whole read-out shows its decimal sign");
}
