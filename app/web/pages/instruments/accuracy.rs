//! The accuracy rows of an instrument's form: one per quantity and range, from the data sheet.

use crate::components::{FieldInput, InputKind, field};
use crate::posted::Posted;
use commissioning::FieldError;
use commissioning::people::AccuracyRow;
use engineering::Kind;
use maud::{Markup, html};

/// Rows the form offers beyond those in use.
const SPARE: usize = 2;
/// Most rows one instrument has.
const MOST: usize = 24;

/// The columns: key, label, in the row's unit or not.
const COLUMNS: [(&str, &str); 5] = [
    ("percent", "% of reading"),
    ("digits", "digits"),
    ("resolution", "one digit is"),
    ("full-percent", "% of full scale"),
    ("full-scale", "full scale"),
];

fn key(kind: Kind) -> String {
    kind.words().replace(' ', "-")
}

/// Reads the rows that have a quantity; the domain judges them.
#[must_use]
pub fn read(posted: &Posted) -> Vec<AccuracyRow> {
    (0..MOST)
        .filter_map(|n| {
            let kind = Kind::ALL.iter().copied().find(|k| key(*k) == posted.text(&format!("accuracy.{n}.kind")))?;
            let text = |column: &str| posted.text(&format!("accuracy.{n}.{column}")).trim().replace(',', ".");
            let decimal = |column: &str| Some(text(column)).filter(|t| !t.is_empty()).unwrap_or_else(|| "0".to_owned());
            let unit = Some(posted.text(&format!("accuracy.{n}.unit")))
                .filter(|u| kind.unit(u).is_some())
                .unwrap_or(kind.usual().symbol);
            Some(AccuracyRow {
                kind,
                unit: unit.to_owned(),
                percent_of_reading: decimal("percent"),
                digits: decimal("digits"),
                resolution: decimal("resolution"),
                percent_of_full_scale: decimal("full-percent"),
                full_scale: decimal("full-scale"),
            })
        })
        .collect()
}

/// The rows as inputs; the refusals' fields are named like the inputs.
#[must_use]
pub fn inputs(rows: &[AccuracyRow], posted: &Posted, errors: &[FieldError]) -> Markup {
    let sent = (0..MOST).filter(|n| !posted.text(&format!("accuracy.{n}.kind")).is_empty()).max().map_or(0, |n| n + 1);
    let shown = (rows.len().max(sent) + SPARE).min(MOST);
    html! {
        fieldset.group {
            legend { "Accuracy, from its data sheet" }
            p.hint { "A row per quantity, or one for each of its ranges: of the reading, in digits of the last place, and of full scale, where the range ends. What the sheet does not state stays empty and counts as nought." }
            @for n in 0..shown { (row(n, rows.get(n), posted, errors)) }
            @for e in errors.iter().filter(|e| e.field == "accuracy") { p.error { (e.message) } }
        }
    }
}

fn row(n: usize, row: Option<&AccuracyRow>, posted: &Posted, errors: &[FieldError]) -> Markup {
    let values =
        row.map(|r| [&r.percent_of_reading, &r.digits, &r.resolution, &r.percent_of_full_scale, &r.full_scale]);
    let kinds = Kind::ALL.iter().map(|k| (key(*k), k.words().to_owned())).collect();
    let kind = FieldInput::new(format!("accuracy.{n}.kind"), "Quantity", InputKind::Choice(kinds))
        .with(&row.map_or_else(String::new, |r| key(r.kind)));
    let unit = FieldInput::new(format!("accuracy.{n}.unit"), "Unit of one digit and full scale", InputKind::Line(10))
        .with(row.map_or("", |r| r.unit.as_str()));
    html! {
        div.accuracy {
            (field(&kind.sent_back(posted, errors)))
            @for (c, (column, label)) in COLUMNS.iter().enumerate() {
                (field(&FieldInput::new(format!("accuracy.{n}.{column}"), *label, InputKind::Quantity(Kind::Number)).with(values.map_or("", |v| v[c].as_str())).sent_back(posted, errors)))
            }
            (field(&unit.sent_back(posted, errors)))
        }
    }
}
