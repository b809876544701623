//! The rows of a sheet, one after the other, with a mapping and the answers given so far.

use super::cell::{self, Outcome as Cell};
use super::{DriveRow, Outcome, Problem, Question, Row, Value, contradiction, decimal, figure, kind};
use crate::schedule::{DecimalSign, MappedColumn, Mapping, Target, bare, folded};
use crate::sheets::{Address, CellValue, Sheet};
use commissioning::typed::shorten;
use std::collections::BTreeMap;

/// Longest name of a drive, as the form takes it.
const LONGEST_NAME: usize = 80;

/// How many rows of the same tag are named.
const TWINS_NAMED: usize = 6;

/// Answers to questions: the cell, and which reading; `None` leaves the value out.
pub type Answers = BTreeMap<Address, Option<usize>>;

/// The site that rows are read for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Site<'a> {
    /// Its tag.
    pub tag: &'a str,
    /// Its name.
    pub name: &'a str,
}

/// Reads every row below the header.
#[must_use]
pub fn read(sheet: &Sheet, mapping: &Mapping, answers: &Answers, site: Site<'_>) -> Vec<Row> {
    let first = mapping.first_row();
    let signs: Vec<Option<DecimalSign>> = mapping.columns.iter().map(|c| sign(sheet, first, c)).collect();
    let mut rows: Vec<Row> = (first..sheet.height())
        .map(|row| {
            let outcome = if sheet.rows.get(row as usize).is_none_or(|r| r.iter().all(CellValue::is_empty)) {
                Outcome::Blank
            } else {
                one(sheet, row, mapping, &signs, answers, site)
            };
            Row { number: row.saturating_add(1), outcome }
        })
        .collect();
    refuse_twins(&mut rows);
    rows
}

/// The decimal sign of a column: settled by a person, or shown by its figures.
fn sign(sheet: &Sheet, first: u32, column: &MappedColumn) -> Option<DecimalSign> {
    if column.decimal.is_some() {
        return column.decimal;
    }
    let (kind, _) = column.target.as_ref()?.quantity()?;
    let figures: Vec<String> = (first..sheet.height())
        .filter_map(|row| match sheet.cell(Address::new(row, column.column)) {
            CellValue::Text(text) => Some(figure::find(&bare(text), kind)),
            _ => None,
        })
        .flat_map(|found| match found {
            figure::Found::One(figure) | figure::Found::Conductors(figure) => vec![figure.digits],
            figure::Found::Several(figures) => figures.into_iter().map(|f| f.digits).collect(),
            figure::Found::None(_) => Vec::new(),
        })
        .collect();
    decimal::column_sign(figures.iter().map(String::as_str))
}

fn one(
    sheet: &Sheet,
    row: u32,
    mapping: &Mapping,
    signs: &[Option<DecimalSign>],
    answers: &Answers,
    site: Site<'_>,
) -> Outcome {
    let Some(tag_column) = mapping.column_of(&Target::Tag) else {
        return Outcome::Refused("No column gives the plant tag. Pick the one that does.".to_owned());
    };
    if let Some(why) = kind::left_out(sheet, row, mapping, tag_column.column) {
        return Outcome::Left(why);
    }
    let at = Address::new(row, tag_column.column);
    let cell = sheet.cell(at);
    let tag = match cell {
        CellValue::Error(_) | CellValue::Unsolved | CellValue::Date(_) => {
            return Outcome::Refused(format!("{at}: “{}” is no plant tag. Correct it in the file.", cell.text()));
        }
        _ => cell.text(),
    };
    if cell.is_empty() || kind::said_unknown(&tag) {
        return Outcome::Refused(format!("{at}: the row has no plant tag. Fill it in, in the file."));
    }
    let tag = match commissioning::decide::drive_tag(&tag) {
        Ok(tag) => tag,
        Err(sentence) => return Outcome::Refused(format!("{at}: “{}”. {sentence}", shorten(&bare(&tag)))),
    };
    let mut drive = DriveRow { tag, ..DriveRow::default() };
    for (column, sign) in mapping.columns.iter().zip(signs) {
        let at = Address::new(row, column.column);
        let cell = sheet.cell(at);
        match &column.target {
            Some(Target::Site) if !cell.is_empty() && !is_site(&cell.text(), site) => {
                return Outcome::Refused(format!(
                    "{at}: the row belongs to “{}”, not to {}. Import it there.",
                    shorten(&cell.text()),
                    site.name
                ));
            }
            Some(Target::Name) => name(&mut drive, at, cell),
            Some(Target::Field(_)) => value(&mut drive, at, cell, column, *sign, answers),
            _ => {}
        }
    }
    drive.contradiction = contradiction::of(&drive);
    Outcome::Drive(Box::new(drive))
}

fn is_site(text: &str, site: Site<'_>) -> bool {
    let plain = folded(text);
    plain == folded(site.tag) || plain == folded(site.name)
}

fn name(drive: &mut DriveRow, at: Address, cell: &CellValue) {
    let text = bare(&cell.text());
    if matches!(cell, CellValue::Error(_) | CellValue::Unsolved) {
        let sentence = format!("{at}: “{text}” is no name. Correct it in the file.");
        drive.problems.push(Problem { at, target: Target::Name, sentence });
        return;
    }
    match commissioning::plant::field::words(&text, LONGEST_NAME) {
        Ok(text) => drive.name = text,
        Err(sentence) => {
            let sentence = format!("{at}: {sentence}");
            drive.problems.push(Problem { at, target: Target::Name, sentence });
        }
    }
}

fn value(
    drive: &mut DriveRow,
    at: Address,
    cell: &CellValue,
    column: &MappedColumn,
    sign: Option<DecimalSign>,
    answers: &Answers,
) {
    let Some(target @ Target::Field(place)) = &column.target else { return };
    let Some(field) = target.description() else { return };
    let as_typed = cell.text();
    let mut keep = |text: String, unit: String, typed| {
        let (place, as_typed) = (place.clone(), as_typed.clone());
        drive.values.push(Value { place, at, as_typed, text, unit, typed });
    };
    match cell::understand(cell, Some(place), field, &column.unit, sign) {
        Cell::Nothing => {}
        Cell::Value(text, unit, typed) => keep(text, unit, typed),
        Cell::Problem(sentence) => {
            let sentence = format!("{at}: {sentence}");
            drive.problems.push(Problem { at, target: target.clone(), sentence });
        }
        Cell::Question(sentence, readings) => match answers.get(&at) {
            Some(None) => {}
            Some(Some(chosen)) if readings.get(*chosen).is_some() => {
                let Some(reading) = readings.get(*chosen) else { return };
                match field.understand(&reading.text, &reading.unit) {
                    Ok(Some(typed)) => keep(reading.text.clone(), reading.unit.clone(), typed),
                    Ok(None) => {}
                    Err(sentence) => {
                        let sentence = format!("{at}: {sentence}");
                        drive.problems.push(Problem { at, target: target.clone(), sentence });
                    }
                }
            }
            _ => {
                let sentence = format!("{at}: {sentence}");
                drive.questions.push(Question { at, target: target.clone(), as_typed, sentence, readings });
            }
        },
    }
}

/// A tag that stands twice is refused in every row it stands in; large and small letters are the same tag.
fn refuse_twins(rows: &mut [Row]) {
    let mut numbers: BTreeMap<String, Vec<u32>> = BTreeMap::new();
    for row in rows.iter() {
        if let Outcome::Drive(drive) = &row.outcome {
            numbers.entry(drive.tag.to_ascii_lowercase()).or_default().push(row.number);
        }
    }
    for row in rows {
        let Outcome::Drive(drive) = &row.outcome else { continue };
        let Some(list) = numbers.get(&drive.tag.to_ascii_lowercase()).filter(|l| l.len() > 1) else { continue };
        let words: Vec<String> = list.iter().take(TWINS_NAMED).map(u32::to_string).collect();
        let (last, before) = words.split_last().map_or(("", &[][..]), |(l, b)| (l.as_str(), b));
        let last = match list.len().saturating_sub(TWINS_NAMED) {
            0 => last.to_owned(),
            more => format!("{last}, and {more} more"),
        };
        row.outcome = Outcome::Refused(format!(
            "“{}” stands in rows {} and {last}. A plant tag may stand once; correct the file.",
            drive.tag,
            before.join(", ")
        ));
    }
}
