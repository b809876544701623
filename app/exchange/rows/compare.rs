//! Rows against the drives that exist: new, changed, unchanged, or not to be touched.

use super::{DriveRow, Outcome, Row};
use commissioning::Typed;
use commissioning::plant::Place;
use std::collections::BTreeMap;

/// A drive of the site as it stands.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Known {
    /// Plant tag.
    pub tag: String,
    /// What it drives, in words.
    pub name: String,
    /// Whether its record is signed or accepted: nothing of it can be changed then.
    pub signed: bool,
    /// What its fields hold.
    pub fields: BTreeMap<Place, Typed>,
}

/// How a row stands to the drives that exist.
#[derive(Clone, Debug, PartialEq)]
pub enum Standing {
    /// No drive has this tag yet.
    New,
    /// These fields would change or be filled.
    Changed(Vec<FieldChange>),
    /// The drive holds all of it already.
    Unchanged,
    /// It cannot be taken; the sentence says why.
    Refused(String),
}

/// One field that would change.
#[derive(Clone, Debug, PartialEq)]
pub struct FieldChange {
    /// Which field.
    pub place: Place,
    /// What it holds, with its unit; `None` when it is empty.
    pub from: Option<String>,
    /// What the row gives, with its unit.
    pub to: String,
}

/// A row compared.
#[derive(Clone, Debug, PartialEq)]
pub struct Compared {
    /// As the spreadsheet counts, from 1.
    pub number: u32,
    /// Plant tag, as the drive has it when it exists.
    pub tag: String,
    /// How it stands.
    pub standing: Standing,
    /// The drive's name where the row gives another; a name is not changed by an import.
    pub other_name: Option<String>,
}

/// Compares the drives of these rows with those that exist.
#[must_use]
pub fn compare(rows: &[Row], known: &[Known]) -> Vec<Compared> {
    let by_tag: BTreeMap<String, &Known> = known.iter().map(|k| (k.tag.to_ascii_lowercase(), k)).collect();
    rows.iter()
        .filter_map(|row| match &row.outcome {
            Outcome::Drive(drive) => Some(one(row.number, drive, by_tag.get(&drive.tag.to_ascii_lowercase()).copied())),
            _ => None,
        })
        .collect()
}

/// Tags of existing drives that no row names.
#[must_use]
pub fn absent<'a>(rows: &[Row], known: &'a [Known]) -> Vec<&'a str> {
    let named: std::collections::BTreeSet<String> = rows
        .iter()
        .filter_map(|r| match &r.outcome {
            Outcome::Drive(drive) => Some(drive.tag.to_ascii_lowercase()),
            _ => None,
        })
        .collect();
    known.iter().map(|k| k.tag.as_str()).filter(|t| !named.contains(&t.to_ascii_lowercase())).collect()
}

fn one(number: u32, drive: &DriveRow, known: Option<&Known>) -> Compared {
    let Some(known) = known else {
        let standing = Standing::New;
        return Compared { number, tag: drive.tag.clone(), standing, other_name: None };
    };
    let changes: Vec<FieldChange> = drive
        .values
        .iter()
        .filter(|v| known.fields.get(&v.place).is_none_or(|held| !same(held, &v.typed)))
        .map(|v| FieldChange {
            place: v.place.clone(),
            from: known.fields.get(&v.place).map(Typed::shown),
            to: v.typed.shown(),
        })
        .collect();
    let standing = match (changes.is_empty(), known.signed) {
        (true, _) => Standing::Unchanged,
        (false, true) => Standing::Refused(format!(
            "Row {number}: the record of {} is signed; {} of its values would change. Reopen the record first, with a reason.",
            known.tag,
            changes.len()
        )),
        (false, false) => Standing::Changed(changes),
    };
    let other_name = (!drive.name.is_empty() && drive.name != known.name).then(|| known.name.clone());
    Compared { number, tag: known.tag.clone(), standing, other_name }
}

/// The same value, whatever unit or spelling it is written in.
fn same(held: &Typed, given: &Typed) -> bool {
    match (&held.si, &given.si) {
        (Some(held), Some(given)) => held == given,
        _ => held.text.trim() == given.text.trim(),
    }
}
