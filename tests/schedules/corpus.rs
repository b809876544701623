//! Every messy file of this folder is read, and what is made of it is what stands beside it in NAME.expected.
//!
//! The expected outcomes were checked by eye against what `make.py` puts into each file. After a deliberate change:
//! `ASLEFT_WRITE_EXPECTED=1 cargo test -p exchange --test schedules`, and read the differences.
#![expect(clippy::expect_used, reason = "a test stops at what it cannot go on from")]

mod mutated;
mod speed;

use exchange::code_sheet::{CodeEntry, CodeSheet};
use exchange::readout::{self, Joined};
use exchange::rows::{self, Answers, Outcome, Site};
use exchange::schedule::{Target, UnitFrom, best_sheet, propose};
use exchange::sheets;
use std::collections::BTreeMap;
use std::fmt::Write;
use std::path::{Path, PathBuf};

const SITE: Site<'static> = Site { tag: "larch-ferry", name: "Larch Ferry" };

fn folder() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("../../tests/schedules")
}

/// The files, by name in order, with their bytes.
fn files() -> Vec<(String, Vec<u8>)> {
    let mut found: Vec<(String, Vec<u8>)> = std::fs::read_dir(folder())
        .expect("folder")
        .map(|entry| entry.expect("entry").path())
        .filter(|p| {
            let ending = p.extension().and_then(|e| e.to_str()).unwrap_or_default();
            ["xlsx", "xlsm", "xls", "ods", "csv", "txt"].contains(&ending)
        })
        .map(|p| (p.file_name().expect("name").to_string_lossy().into_owned(), std::fs::read(&p).expect("file")))
        .collect();
    found.sort();
    assert!(found.len() >= 40, "the corpus is there: {}", found.len());
    found
}

/// What is made of a schedule, in lines.
fn schedule(name: &str, bytes: &[u8]) -> String {
    let mut out = String::new();
    let book = match sheets::read(bytes, name) {
        Ok(book) => book,
        Err(why) => return format!("refused: {why}\n"),
    };
    for notice in &book.notices {
        let _ = writeln!(out, "notice: {notice}");
    }
    let Some(sheet) = best_sheet(&book).and_then(|index| book.sheets.get(index)) else { return out };
    if book.sheets.len() > 1 {
        let _ = writeln!(out, "sheet: {}", sheet.name);
    }
    let proposal = propose(sheet);
    match proposal.header_rows {
        Some((first, last)) => writeln!(out, "header: rows {} to {}", first + 1, last + 1),
        None => writeln!(out, "header: none found"),
    }
    .expect("written");
    for column in &proposal.columns {
        let target = column.target.as_ref().map_or("-".to_owned(), Target::key);
        let from = match column.unit_from {
            UnitFrom::Assumed if column.unit.is_empty() => "",
            UnitFrom::Header => "",
            UnitFrom::Cells => " (from the cells)",
            UnitFrom::Assumed => " (assumed)",
        };
        let _ = writeln!(
            out,
            "column {} “{}”: {target} {}{from}",
            sheets::column_letters(column.column),
            column.header,
            column.unit
        );
    }
    for fault in proposal.mapping().faults() {
        let _ = writeln!(out, "fault: {fault}");
    }
    for row in rows::read(sheet, &proposal.mapping(), &Answers::new(), SITE) {
        match row.outcome {
            Outcome::Blank => {
                let _ = writeln!(out, "row {}: blank", row.number);
            }
            Outcome::Left(why) => {
                let _ = writeln!(out, "row {}: left: {why}", row.number);
            }
            Outcome::Refused(why) => {
                let _ = writeln!(out, "row {}: refused: {why}", row.number);
            }
            Outcome::Drive(drive) => {
                let _ = writeln!(out, "row {}: {} “{}”", row.number, drive.tag, drive.name);
                for value in &drive.values {
                    let typed = &value.typed;
                    let si = typed.si.as_deref().map_or(String::new(), |si| format!(" = {si}"));
                    let _ = writeln!(out, "    {} “{}” {} {}{si}", value.place, value.as_typed, value.text, value.unit);
                }
                for problem in &drive.problems {
                    let _ = writeln!(out, "    problem {}", problem.sentence);
                }
                for question in &drive.questions {
                    let ways: Vec<String> = question
                        .readings
                        .iter()
                        .map(|r| {
                            format!(
                                "{} {}{}",
                                r.text,
                                r.unit,
                                if r.impossible.is_some() { " (impossible)" } else { "" }
                            )
                        })
                        .collect();
                    let _ = writeln!(out, "    question {} [{}]", question.sentence, ways.join(" | "));
                }
                if let Some(sentence) = &drive.contradiction {
                    let _ = writeln!(out, "    contradiction {sentence}");
                }
            }
        }
    }
    out
}

/// The code sheet that the read-outs are joined with; its codes are invented.
fn codes() -> CodeSheet {
    let entry = |function: &str, code: &str, unit: &str, meanings: &[(&str, &str)]| CodeEntry {
        function: function.to_owned(),
        code: code.to_owned(),
        unit: unit.to_owned(),
        meanings: meanings.iter().map(|(m, w)| ((*m).to_owned(), (*w).to_owned())).collect(),
        ..CodeEntry::default()
    };
    CodeSheet {
        drive_type: "KX".to_owned(),
        entries: vec![
            entry("acceleration-time", "A10", "s", &[]),
            entry("deceleration-time", "A11", "s", &[]),
            entry("stop-mode", "A20", "", &[("ramp", "0"), ("coast", "1")]),
            entry("motor-rpm", "B04", "rpm", &[]),
            entry("current-limit", "B07", "%", &[]),
        ],
    }
}

/// What is made of a read-out, in lines.
fn read_out(name: &str, bytes: &[u8]) -> String {
    let mut out = String::new();
    let found = match readout::read(bytes, name) {
        Ok(found) => found,
        Err(why) => return format!("refused: {why}\n"),
    };
    let _ = writeln!(out, "lines without code and value: {:?}", found.left);
    for joined in readout::join(&found.lines, &codes(), &BTreeMap::new()) {
        let line = match joined {
            Joined::Function { function, text, unit, typed, .. } => {
                format!("{} {text} {unit} = {}", function.key, typed.si.unwrap_or_default())
            }
            Joined::Question { sentence, readings, .. } => {
                format!("question {sentence} {:?}", readings.iter().map(|r| r.text.as_str()).collect::<Vec<_>>())
            }
            Joined::Problem { sentence, .. } => format!("problem {sentence}"),
            Joined::Free { line } => format!("free row {} {} {}", line.code, line.value.text(), line.unit),
        };
        let _ = writeln!(out, "{line}");
    }
    out
}

#[test]
fn every_file_is_understood_as_expected() {
    let write = std::env::var_os("ASLEFT_WRITE_EXPECTED").is_some();
    let mut differ = Vec::new();
    for (name, bytes) in files() {
        let made = if name.contains("readout") { read_out(&name, &bytes) } else { schedule(&name, &bytes) };
        let beside = folder().join(format!("{name}.expected"));
        if write {
            std::fs::write(&beside, &made).expect("written");
        }
        let expected = std::fs::read_to_string(&beside).unwrap_or_default();
        if made != expected {
            differ.push(format!("== {name}\n-- expected\n{expected}-- made\n{made}"));
        }
    }
    assert!(differ.is_empty(), "{} files differ:\n{}", differ.len(), differ.join("\n"));
}

#[test]
fn every_expected_outcome_belongs_to_a_file() {
    let names: Vec<String> = files().into_iter().map(|(name, _)| name).collect();
    for entry in std::fs::read_dir(folder()).expect("folder") {
        let path = entry.expect("entry").path();
        if path.extension().is_some_and(|e| e == "expected") {
            let stem = path.file_stem().expect("stem").to_string_lossy().into_owned();
            assert!(names.contains(&stem), "{stem} is gone");
        }
    }
}
