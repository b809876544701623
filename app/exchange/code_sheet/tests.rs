//! Code sheets in, validated, and out again. Codes here are invented.

use super::*;
use crate::sheets::read as read_book;
use commissioning::Timestamp;

const LIST: &str = "Code sheet of drive type KX (invented)\n\nfunction;code;unit;resolution;default;min;max;values\n\
    acceleration-time;A 10;s;0,1;10;0;3600;\ndeceleration time;A11;s;0.1;10;0;3600;\nstop mode;A20;;;0;;;ramps down = 0; \n\
    Motor rated amps;B03;A;0.1;;0.5;100;\nwarp factor;Z9;;;;;;\nslip compensation;-;;;;;;\n";

fn sheet() -> (CodeSheet, Vec<CodeProblem>) {
    // The last column holds a semicolon of its own, so it is quoted.
    let list = LIST.replace("ramps down = 0; ", "\"ramps down = 0; coast = 1\"");
    read(&read_book(list.as_bytes(), "codes.csv").unwrap().sheets[0], "KX")
}

#[test]
fn a_sheet_is_read_by_key_and_by_words() {
    let (found, problems) = sheet();
    let keys: Vec<&str> = found.entries.iter().map(|e| e.function.as_str()).collect();
    assert_eq!(keys, ["motor-amps", "acceleration-time", "deceleration-time", "stop-mode"], "in the sheet's own order");
    assert_eq!(problems.len(), 1);
    assert!(problems[0].sentence.starts_with("A8: “warp factor”"), "{problems:?}");
    assert_eq!(found.faults(), Vec::<String>::new());
    let stop = found.by_function("stop-mode").unwrap();
    assert_eq!((stop.meaning_of("1"), stop.word_for("ramp")), (Some("coast"), Some("0")));
    assert_eq!(found.by_code("a10").map(|e| e.resolution.as_str()), Some("0.1"));
}

#[test]
fn faults_are_said_one_by_one() {
    let entry =
        |function: &str, code: &str| CodeEntry { function: function.into(), code: code.into(), ..CodeEntry::default() };
    let found = CodeSheet {
        drive_type: " ".into(),
        entries: vec![
            CodeEntry {
                resolution: "0".into(),
                default: "5".into(),
                lowest: "10".into(),
                highest: "20".into(),
                ..entry("acceleration-time", "A1")
            },
            CodeEntry {
                lowest: "9".into(),
                highest: "2".into(),
                default: "x".into(),
                ..entry("deceleration-time", "a 1")
            },
            CodeEntry {
                meanings: vec![("ramp".into(), "0".into()), ("coast".into(), "0".into()), ("up".into(), String::new())],
                ..entry("stop-mode", "")
            },
            entry("stop-mode", "A9"),
            entry("nonsense", "A7"),
            CodeEntry { lowest: "5000".into(), unit: "kHz".into(), ..entry("maximum-frequency", "A5") },
            CodeEntry { meanings: vec![("a".into(), "b".into())], ..entry("relay-1", "R1") },
        ],
    };
    let faults = found.faults().join("\n");
    for word in [
        "resolution must be above",
        "default is not between",
        "lowest setting is not below",
        "“x” is no plain number",
        "own code is missing",
        "stands for two meanings",
        "“up” is none of its meanings",
        "word for “up” is missing",
        "“stop-mode” stands twice",
        "Code “A1” is given for acceleration-time and deceleration-time",
        "“nonsense” is no function",
        "Check the unit",
        "has no choices",
        "for which type",
    ] {
        assert!(faults.contains(word), "{word} is not among:\n{faults}");
    }
}

#[test]
fn out_and_in_again_is_the_same_sheet() {
    let (found, _) = sheet();
    for bytes in [found.csv(), found.xlsx(Timestamp::EPOCH).unwrap()] {
        let book = read_book(&bytes, "codes").unwrap();
        let (again, problems) = read(&book.sheets[0], "KX");
        assert_eq!(problems, []);
        assert_eq!(again, found);
    }
    let written = serde_json::to_string(&found).unwrap();
    assert_eq!(serde_json::from_str::<CodeSheet>(&written).unwrap(), found);
}

#[test]
fn a_table_without_headings_says_what_it_needs() {
    let (found, problems) = read(&read_book(b"1;2\n3;4\n", "x.csv").unwrap().sheets[0], "KX");
    assert!(found.entries.is_empty() && problems[0].sentence.contains("function"));
}
