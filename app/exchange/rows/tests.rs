//! Rows as projects send them, and what is made of each cell.

use super::*;
use crate::schedule::{DecimalSign, Mapping, propose};
use crate::sheets::{CellValue, Sheet, read as read_sheet};
use commissioning::plant::Sheet as Part;

const SITE: Site<'static> = Site { tag: "larch-ferry", name: "Larch Ferry" };

fn sheet(text: &str) -> (Sheet, Mapping) {
    let sheet = read_sheet(text.as_bytes(), "list.csv").unwrap().sheets.remove(0);
    let mapping = propose(&sheet).mapping();
    (sheet, mapping)
}

fn drives(rows: &[Row]) -> Vec<&DriveRow> {
    rows.iter().filter_map(|r| if let Outcome::Drive(drive) = &r.outcome { Some(&**drive) } else { None }).collect()
}

fn motor(drive: &DriveRow, field: &str) -> Option<(String, String)> {
    drive.value(&Place::new(Part::Motor, field)).map(|v| (v.text.clone(), v.unit.clone()))
}

fn pair(text: &str, unit: &str) -> Option<(String, String)> {
    Some((text.to_owned(), unit.to_owned()))
}

#[test]
fn a_figure_that_reads_two_ways_is_asked_and_never_guessed() {
    let (list, mut mapping) = sheet("Tag;Speed rpm;kW\nM-01;1.485;75\nM-02;2970;90\n");
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    let question = &drives(&rows)[0].questions[0];
    assert_eq!((question.at.to_string(), question.as_typed.as_str()), ("B2".into(), "1.485"));
    let texts: Vec<&str> = question.readings.iter().map(|r| r.text.as_str()).collect();
    assert_eq!(texts, ["1.485", "1485"]);
    assert!(question.readings[0].impossible.is_some(), "1.485 rpm is no speed of a motor; still it is asked");
    assert_eq!(motor(drives(&rows)[0], "rpm"), None);
    let answered = read(&list, &mapping, &Answers::from([(question.at, Some(1))]), SITE);
    assert_eq!(motor(drives(&answered)[0], "rpm"), pair("1485", "rpm"));
    assert!(drives(&answered)[0].is_ready());
    let left = read(&list, &mapping, &Answers::from([(question.at, None)]), SITE);
    assert!(drives(&left)[0].is_ready() && motor(drives(&left)[0], "rpm").is_none());
    mapping.columns[1].decimal = Some(DecimalSign::Comma);
    let settled = read(&list, &mapping, &Answers::new(), SITE);
    assert_eq!(motor(drives(&settled)[0], "rpm"), pair("1485", "rpm"));
}

#[test]
fn a_column_that_shows_its_decimal_sign_decides_for_itself_only() {
    let (list, mapping) = sheet("Tag;Speed;kW;FLC\nM-01;1.485;0,75;1.485\nM-02;1.472,5;1.100;1.250\n");
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    let drives = drives(&rows);
    assert_eq!(motor(drives[0], "rpm"), pair("1485", "rpm"));
    assert_eq!(motor(drives[1], "rpm"), pair("1.472,5", "rpm"), "kept as typed where it is read the same");
    assert_eq!(motor(drives[1], "power"), pair("1100", "kW"));
    assert_eq!(drives[0].questions[0].target.key(), "motor.0.amps", "its own column shows nothing");
}

#[test]
fn units_in_cells_go_before_the_columns() {
    let (list, mapping) = sheet(
        "Tag;Power;Voltage;Speed;Cos phi;Cable size\nM-01;75 kW;400V;1 485 rpm;0,86;70\nM-02;100 HP;0.4 kV;1485 1/min;0.9;3x95+50\nM-03;75;400/690 V;n/a;;4 AWG\n",
    );
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    let drives = drives(&rows);
    assert_eq!(motor(drives[0], "power"), pair("75", "kW"));
    assert_eq!(motor(drives[1], "power"), pair("100", "hp"));
    assert_eq!(motor(drives[1], "volts"), pair("0.4", "kV"));
    assert_eq!(motor(drives[0], "rpm"), pair("1 485", "rpm"));
    assert_eq!(drives[0].values[0].as_typed, "75 kW");
    assert!(drives[1].questions[0].sentence.contains("conductors"));
    assert_eq!(drives[1].questions[0].readings[0].text, "95");
    let volts: Vec<&str> = drives[2].questions[0].readings.iter().map(|r| r.text.as_str()).collect();
    assert_eq!(volts, ["400", "690"]);
    assert!(drives[2].problems[0].sentence.starts_with("F4: “AWG”"), "{:?}", drives[2].problems);
    assert!(motor(drives[2], "rpm").is_none() && drives[2].problems.len() == 1, "n/a says nothing, and is no fault");
}

#[test]
fn the_fields_own_limits_and_the_cells_faults_are_told_by_cell() {
    let (mut list, mapping) = sheet("Tag;kW;Speed;Hz;PF\nM-01;75;5;50;1.2\nM-02;90;1485;50;0.86\n");
    list.rows[2][2] = CellValue::Date("2024-05-01".into());
    list.rows[2][1] = CellValue::Error("#REF!".into());
    list.rows[2][3] = CellValue::Unsolved;
    list.rows[2][4] = CellValue::Percent(86.0);
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    let drives = drives(&rows);
    let said: Vec<&str> = drives.iter().flat_map(|d| d.problems.iter().map(|p| p.sentence.as_str())).collect();
    assert_eq!(said.len(), 5, "{said:?}");
    assert!(said[0].starts_with("C2: 5 rpm cannot be") && said[0].contains("between 10"), "{}", said[0]);
    assert!(said[1].starts_with("E2: 1.2"), "{}", said[1]);
    assert!(said[2].contains("#REF!") && said[3].contains("2024-05-01") && said[4].contains("formula"), "{said:?}");
    assert_eq!(motor(drives[1], "power-factor"), pair("0.86", ""));
}

#[test]
fn rows_that_are_no_drive_are_said_and_twins_are_named() {
    let (list, mapping) = sheet(
        "Tag;Description;kW;V\nPump house;;;\nM-01;Feed;75;400\n;;;\n;Subtotal;75;\nTag;Description;kW;V\n;Fan;90;400\nM 02/A;Fan;90;400\nm-01;Again;11;400\nTotal;;176;\n",
    );
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    let said: Vec<String> = rows
        .iter()
        .map(|r| match &r.outcome {
            Outcome::Blank => "blank".to_owned(),
            Outcome::Left(why) | Outcome::Refused(why) => why.clone(),
            Outcome::Drive(drive) => drive.tag.clone(),
        })
        .collect();
    let starts = [
        "Row 2 holds only “Pump house”",
        "“M-01” stands in rows 3 and 9",
        "blank",
        "Row 5 is a sum: “Subtotal” in B5",
        "Row 6 is the header again",
        "A7: the row has no plant tag",
        "A8: “M 02/A”. A plant tag has",
        "“m-01” stands in rows 3 and 9",
        "Row 10 is a sum",
    ];
    assert_eq!(said.len(), starts.len(), "{said:#?}");
    for (said, start) in said.iter().zip(starts) {
        assert!(said.starts_with(start), "{said} / {start}");
    }
}

#[test]
fn a_row_of_another_site_is_refused() {
    let (list, mapping) = sheet("Site;Tag;kW\nLarch Ferry;M-01;75\nlarch-ferry;M-02;75\nElm Quay;M-03;75\n");
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    assert_eq!(drives(&rows).len(), 2);
    assert!(matches!(&rows[2].outcome, Outcome::Refused(why) if why.contains("Elm Quay") && why.starts_with("A4")));
}

/// Published plate C-MN-017/018 (row MN-06): 11 kW, 400 V, 20.9 A agrees; the 36.2 A of the 230 V connection does not.
#[test]
fn a_plate_that_contradicts_itself_is_flagged() {
    let (list, mapping) = sheet("Tag;kW;V;A;PF;Eff %\nM-01;11;400;20.9;0.83;91.4\nM-02;11;400;36.2;0.83;91.4\n");
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    let drives = drives(&rows);
    assert_eq!(drives[0].contradiction, None);
    assert!(drives[1].contradiction.as_deref().is_some_and(|s| s.contains("contradicts")), "{:?}", drives[1]);
}

#[test]
fn rows_are_compared_with_the_drives_that_exist() {
    let (list, mapping) =
        sheet("Tag;Description;kW;V\nM-01;Feed;75;400\nM-02;Fan;100 HP;400\nM-03;Belt;11;400\nM-04;Mill;11;400\n");
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    let known = |tag: &str, name: &str, power: &str, unit: &str, signed: bool| Known {
        tag: tag.to_owned(),
        name: name.to_owned(),
        signed,
        fields: [("power", power, unit), ("volts", "400", "V")]
            .into_iter()
            .map(|(field, text, unit)| {
                let place = Place::new(Part::Motor, field);
                let target = crate::schedule::Target::Field(place.clone());
                (place, target.description().unwrap().understand(text, unit).unwrap().unwrap())
            })
            .collect(),
    };
    let known = [
        known("m-01", "Feed", "75000", "W", true),
        known("M-02", "Old fan", "75", "kW", false),
        known("M-03", "Belt", "15", "kW", true),
        known("M-09", "Gone", "15", "kW", false),
    ];
    let compared = compare(&rows, &known);
    assert_eq!(compared[0].standing, Standing::Unchanged, "75 kW is 75 000 W");
    assert_eq!(compared[0].tag, "m-01", "the drive's own spelling");
    let change =
        FieldChange { place: Place::new(Part::Motor, "power"), from: Some("75 kW".into()), to: "100 hp".into() };
    assert_eq!(compared[1].standing, Standing::Changed(vec![change]));
    assert_eq!(compared[1].other_name.as_deref(), Some("Old fan"));
    assert!(matches!(&compared[2].standing, Standing::Refused(why) if why.contains("signed")), "{compared:?}");
    assert_eq!(compared[3].standing, Standing::New);
    assert_eq!(absent(&rows, &known), ["M-09"]);
}

#[test]
fn not_known_is_nothing_unless_it_is_a_choice() {
    let (list, mapping) = sheet("Tag;kW;Load type;Maker\nM-01;not known;pump;unknown\n");
    let mut mapping = mapping;
    mapping.columns[2].target = Some(crate::schedule::Target::Field(Place::new(Part::Motor, "construction")));
    let mut list = list;
    list.rows[1][2] = CellValue::Text("not known".into());
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    let drive = drives(&rows)[0];
    assert_eq!(drive.values.len(), 1, "{drive:?}");
    assert_eq!(motor(drive, "construction"), pair("not-known", ""));
    assert!(drive.is_ready());
}

#[test]
fn long_cells_and_many_twins_cost_no_more_than_they_should() {
    let long = "1 ".repeat(16_000);
    let (list, mapping) = sheet(&format!("Tag;kW\nM-01;{long}\n"));
    let begun = std::time::Instant::now();
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    assert!(drives(&rows)[0].problems[0].sentence.len() < 300);
    let (list, mapping) = sheet(&format!("Tag;kW\n{}", "M-01;75\n".repeat(2000)));
    let rows = read(&list, &mapping, &Answers::new(), SITE);
    let Outcome::Refused(why) = &rows[7].outcome else { panic!("{:?}", rows[7]) };
    assert!(why.starts_with("“M-01” stands in rows 2, 3, 4, 5, 6 and 7, and 1994 more"), "{why}");
    assert!(begun.elapsed() < std::time::Duration::from_secs(20), "{:?}", begun.elapsed());
}
