//! Out and in again is the identity; the same tables are the same bytes.

use super::*;
use crate::rows::{Answers, Outcome, Site};
use crate::schedule::{Target, propose};
use crate::sheets::{Address, CellValue, read};
use commissioning::plant::{FieldKind, Place};
use commissioning::{Timestamp, Typed};
use proptest::prelude::*;
use std::collections::BTreeMap;

fn table(rows: Vec<Vec<OutCell>>) -> Table {
    let width = rows.iter().map(Vec::len).max().unwrap_or(0);
    let headings = (0..width).map(|n| Heading::with_unit(&format!("column {n}"), "A")).collect();
    Table { name: "Table".into(), headings, rows }
}

#[test]
fn words_that_look_like_formulas_stay_words_and_numbers_stay_numbers() {
    let words =
        ["=1+1", "+5", "-x", "@sum", "'=quoted", "\t=1", " blank", "0012", "-10.5 V", "line\nbreak", "say \"x\""];
    let mut rows: Vec<Vec<OutCell>> = words.iter().map(|w| vec![OutCell::text(*w)]).collect();
    rows.push(vec![OutCell::decimal("-10.5")]);
    rows.push(vec![OutCell::decimal("50.0")]);
    rows.push(vec![OutCell::decimal("0012")]);
    let out = table(rows);
    let book = read(&xlsx("Title & more", std::slice::from_ref(&out), Timestamp::EPOCH).unwrap(), "a.xlsx").unwrap();
    let text = read(&csv(&out), "a.csv").unwrap();
    for (row, word) in (1..).zip(words) {
        assert_eq!(book.sheets[0].cell(Address::new(row, 0)), &CellValue::Text(word.into()), "xlsx");
        assert_eq!(text.sheets[0].cell(Address::new(row, 0)), &CellValue::Text(word.into()), "csv");
    }
    let last = u32::try_from(words.len()).unwrap() + 1;
    assert_eq!(book.sheets[0].cell(Address::new(last, 0)), &CellValue::Number(-10.5));
    assert_eq!(book.sheets[0].cell(Address::new(last + 1, 0)), &CellValue::Number(50.0));
    assert_eq!(book.sheets[0].cell(Address::new(last + 2, 0)), &CellValue::Text("0012".into()), "a leading nought");
    assert_eq!(text.sheets[0].cell(Address::new(last, 0)).text(), "-10.5");
    let raw = String::from_utf8(csv(&out)).unwrap();
    assert!(raw.contains("\"'=1+1\"") && raw.contains("\r\n-10.5\r\n") && raw.contains("\r\n50.0\r\n"), "{raw}");
}

#[test]
fn a_number_in_text_cannot_be_taken_for_a_grouped_one() {
    let out = table(vec![vec![OutCell::decimal("1.485")], vec![OutCell::decimal("0.863")]]);
    let raw = String::from_utf8(csv(&out)).unwrap();
    assert!(raw.contains("1.4850") && raw.contains("0.863\r"), "{raw}");
}

#[test]
fn the_same_book_is_the_same_bytes_and_its_moment_counts() {
    let out = [table(vec![vec![OutCell::text("M-01"), OutCell::decimal("75")]])];
    let first = xlsx("Site", &out, Timestamp::EPOCH).unwrap();
    assert_eq!(first, xlsx("Site", &out, Timestamp::EPOCH).unwrap());
    let later = Timestamp::parse("2026-11-17T16:42:00Z").unwrap();
    assert_ne!(first, xlsx("Site", &out, later).unwrap());
}

#[test]
fn the_sheets_of_a_site_have_frozen_headings_and_filters() {
    let line = ParameterLine {
        function: "acceleration-time".into(),
        label: "acceleration time".into(),
        code: "=A10".into(),
        ..ParameterLine::default()
    };
    let site = SiteBook {
        site: "Larch Ferry".into(),
        drives: vec![DriveLine { tag: "M-01".into(), within: 31, ..DriveLine::default() }],
        verdicts: vec![VerdictLine { tag: "M-01".into(), check: "power-balance".into(), ..VerdictLine::default() }],
        findings: vec![FindingLine { tag: "M-01".into(), number: 1, text: "@home".into(), ..FindingLine::default() }],
        parameters: vec![("M-01".into(), line)],
        ..SiteBook::default()
    };
    let bytes = site.xlsx(Timestamp::EPOCH).unwrap();
    let book = read(&bytes, "site.xlsx").unwrap();
    let names: Vec<&str> = book.sheets.iter().map(|s| s.name.as_str()).collect();
    assert_eq!(names, ["Drives", "Nameplates", "Verdicts", "Findings", "Parameters"]);
    assert_eq!(book.sheets[0].cell(Address::new(1, 5)), &CellValue::Number(31.0));
    assert_eq!(book.sheets[4].cell(Address::new(1, 3)), &CellValue::Text("=A10".into()));
    let mut archive = zip::ZipArchive::new(std::io::Cursor::new(bytes)).unwrap();
    let mut xml = String::new();
    std::io::Read::read_to_string(&mut archive.by_name("xl/worksheets/sheet1.xml").unwrap(), &mut xml).unwrap();
    for part in ["state=\"frozen\"", "<autoFilter", "orientation=\"landscape\"", "fitToHeight=\"0\""] {
        assert!(xml.contains(part), "{part}: {xml}");
    }
}

/// A value of a field, made from a number between its limits, with a unit of its kind.
fn value(target: &Target, seed: u32, pick: usize) -> Option<Typed> {
    let field = target.description()?;
    let text = match field.kind {
        FieldKind::Quantity { kind, low, high, .. } => {
            let units = kind.units();
            let unit = &units[pick % units.len()];
            let coherent = low + (high - low) * f64::from(seed % 1000) / 1000.0;
            let text = engineering::rounding::significant(unit.from_coherent(coherent), 4);
            return field.understand(&text, unit.symbol).ok().flatten();
        }
        FieldKind::Choice(options) => options[pick % options.len()].0.to_owned(),
        FieldKind::Flag => ["yes", "no"][pick % 2].to_owned(),
        FieldKind::Text(_) => ["=cmd", "+1", "K 7-x", "0071", "12", "x, y; \"z\"", "'s"][pick % 7].to_owned(),
        FieldKind::Table => return None,
    };
    field.understand(&text, "").ok().flatten()
}

proptest! {
    #![proptest_config(ProptestConfig { failure_persistence: None, cases: 24, ..ProptestConfig::default() })]

    #[test]
    fn cells_come_back_as_they_went_out(
        rows in prop::collection::vec(prop::collection::vec(prop_oneof![
            Just(OutCell::Empty),
            "[ -~äéΩ²µφ–\n\t]{0,11}[!-~]".prop_map(OutCell::text),
            any::<i32>().prop_map(|n| OutCell::Number(f64::from(n) / 1000.0, 3)),
        ], 3), 1..8),
    ) {
        let out = table(rows.clone());
        let book = read(&xlsx("T", std::slice::from_ref(&out), Timestamp::EPOCH).unwrap(), "a").unwrap();
        let text = read(&csv(&out), "a").unwrap();
        for (row, cells) in (1..).zip(&rows) {
            for (column, cell) in (0..).zip(cells) {
                let at = Address::new(row, column);
                let (office, words) = (book.sheets[0].cell(at).text(), text.sheets[0].cell(at).text());
                match cell {
                    OutCell::Empty => prop_assert!(office.is_empty() && words.is_empty()),
                    OutCell::Text(text) => {
                        prop_assert_eq!(&office, text);
                        prop_assert_eq!(&words, text);
                    }
                    OutCell::Number(number, _) => {
                        prop_assert_eq!(office.parse::<f64>(), Ok(*number));
                        prop_assert_eq!(words.parse::<f64>(), Ok(*number));
                    }
                }
            }
        }
    }

    #[test]
    fn nameplates_come_back_through_the_import(seeds in prop::collection::vec((any::<u32>(), any::<usize>()), 2..5)) {
        let targets = Target::all();
        let lines: Vec<PlateLine> = (1..).zip(&seeds).map(|(n, (seed, pick))| {
            let fields: BTreeMap<Place, Typed> = targets.iter().enumerate().filter_map(|(index, target)| {
                let Target::Field(place) = target else { return None };
                let chosen = (seed.rotate_left(u32::try_from(index % 31).unwrap())) % 3 == 0;
                let typed = value(target, seed.wrapping_add(u32::try_from(index).unwrap()), pick.wrapping_add(index))?;
                chosen.then(|| (place.clone(), typed))
            }).collect();
            PlateLine { tag: format!("M-{n}"), name: format!("=Drive {n}"), fields }
        }).collect();
        let out = super::plates::table(&lines);
        for bytes in [xlsx("T", std::slice::from_ref(&out), Timestamp::EPOCH).unwrap(), csv(&out)] {
            let sheet = read(&bytes, "a").unwrap().sheets.remove(0);
            let proposal = propose(&sheet);
            let rows = crate::rows::read(&sheet, &proposal.mapping(), &Answers::new(), Site { tag: "s", name: "S" });
            for (line, row) in lines.iter().zip(&rows) {
                let Outcome::Drive(drive) = &row.outcome else { panic!("{row:?}") };
                prop_assert_eq!(&drive.tag, &line.tag);
                prop_assert_eq!(&drive.name, &line.name);
                prop_assert!(drive.is_ready(), "{:?} {:?}", drive.problems, drive.questions);
                prop_assert_eq!(drive.values.len(), line.fields.len());
                for (place, typed) in &line.fields {
                    let back = drive.value(place).expect("came back");
                    match (&back.typed.si, &typed.si) {
                        (Some(back), Some(out)) => prop_assert_eq!(back, out, "{}", place),
                        _ => prop_assert_eq!(&back.typed.text, &typed.text),
                    }
                }
            }
        }
    }
}

#[test]
fn a_parameter_workbook_is_a_read_out_again() {
    use crate::code_sheet::{CodeEntry, CodeSheet};
    use crate::readout::{self, Joined};
    let value = |function: &str, text: &str, unit: &str| {
        let function = commissioning::record::functions::find(function).unwrap();
        crate::code_sheet::as_field(function).understand(text, unit).unwrap()
    };
    let lines = [
        ("acceleration-time", "=A10", "1.485", "min"),
        ("deceleration-time", "A11", "50.0", "s"),
        ("stop-mode", "A20", "coast", ""),
        ("slip-compensation", "A21", "yes", ""),
        ("relay-1", "R1", "-fault", ""),
    ];
    let book = DriveBook {
        tag: "M-01".into(),
        lines: lines
            .iter()
            .map(|(function, code, text, unit)| ParameterLine {
                function: (*function).to_owned(),
                code: (*code).to_owned(),
                as_left: value(function, text, unit),
                ..ParameterLine::default()
            })
            .collect(),
    };
    let entry = |(function, code, ..): &(&str, &str, &str, &str)| CodeEntry {
        function: (*function).to_owned(),
        code: (*code).to_owned(),
        ..CodeEntry::default()
    };
    let codes = CodeSheet { drive_type: "KX".into(), entries: lines.iter().map(entry).collect() };
    for bytes in [book.xlsx(Timestamp::EPOCH).unwrap(), book.csv()] {
        let found = readout::read(&bytes, "parameters").unwrap();
        let joined = readout::join(&found.lines, &codes, &BTreeMap::new());
        assert_eq!(joined.len(), lines.len(), "{joined:?}");
        for (joined, line) in joined.iter().zip(&book.lines) {
            let Joined::Function { function, typed, .. } = joined else { panic!("{joined:?}") };
            let left = line.as_left.as_ref().unwrap();
            assert_eq!((function.key, &typed.si), (line.function.as_str(), &left.si));
            assert!(typed.si.is_some() || typed.text == left.text, "{typed:?}");
        }
    }
}
