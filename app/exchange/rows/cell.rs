//! One cell for one field: a value, nothing, a question or a problem.

use super::figure::{self, Figure, Found};
use super::{Reading, choices, decimal};
use crate::schedule::{DecimalSign, bare};
use crate::sheets::CellValue;
use commissioning::Typed;
use commissioning::plant::{Field, FieldKind, Place};
use commissioning::typed::{numeral, shorten};
use engineering::Kind;

/// What a cell gives.
#[derive(Clone, Debug, PartialEq)]
pub(crate) enum Outcome {
    /// Nothing stands there, or only a mark for “not known”.
    Nothing,
    /// A value: text and unit as a form would send them, and as understood.
    Value(String, String, Typed),
    /// More than one reading: why, and which.
    Question(String, Vec<Reading>),
    /// It cannot be this field; the sentence names fault and remedy, without the cell.
    Problem(String),
}

/// Understands a cell; `unit` counts where the cell states none, `sign` is the column's decimal sign where known.
pub(crate) fn understand(
    cell: &CellValue,
    place: Option<&Place>,
    field: &Field,
    unit: &str,
    sign: Option<DecimalSign>,
) -> Outcome {
    match cell {
        CellValue::Empty => return Outcome::Nothing,
        CellValue::Error(error) => {
            return Outcome::Problem(format!("The spreadsheet shows the error {error}. Correct it there."));
        }
        CellValue::Unsolved => {
            return Outcome::Problem(
                "A formula stands here whose result is not in the file. Open the file in a spreadsheet program, save it, and send it again.".to_owned(),
            );
        }
        CellValue::Text(text) if text.trim().is_empty() => return Outcome::Nothing,
        // “Not known” is a choice of its own in some fields.
        CellValue::Text(text) if super::said_unknown(text) && !is_choice(field, place, text) => {
            return Outcome::Nothing;
        }
        _ => {}
    }
    match field.kind {
        FieldKind::Quantity { kind, .. } => quantity(cell, field, kind, unit, sign),
        FieldKind::Choice(options) => {
            let text = bare(&cell.text());
            match choices::find(place, options, &text) {
                Some(key) => sent(field, key, ""),
                None => sent(field, &text, ""),
            }
        }
        FieldKind::Flag => {
            let text = cell.text();
            sent(field, choices::yes_or_no(&text).unwrap_or(&text), "")
        }
        FieldKind::Text(_) => sent(field, cell.text().trim(), ""),
        FieldKind::Table => {
            Outcome::Problem("A curve cannot stand in one cell. Enter it on the sheet itself.".to_owned())
        }
    }
}

fn is_choice(field: &Field, place: Option<&Place>, text: &str) -> bool {
    matches!(field.kind, FieldKind::Choice(options) if choices::find(place, options, text).is_some())
}

/// As the form would take it.
fn sent(field: &Field, text: &str, unit: &str) -> Outcome {
    match field.understand(text, unit) {
        Ok(Some(typed)) => Outcome::Value(text.to_owned(), unit.to_owned(), typed),
        Ok(None) => Outcome::Nothing,
        Err(sentence) => Outcome::Problem(sentence),
    }
}

fn quantity(cell: &CellValue, field: &Field, kind: Kind, unit: &str, sign: Option<DecimalSign>) -> Outcome {
    match cell {
        CellValue::Number(_) => sent(field, &cell.text(), unit),
        CellValue::Percent(number) if kind == Kind::Percent => sent(field, &crate::sheets::decimal(*number), "%"),
        CellValue::Percent(number) if kind == Kind::Number => {
            sent(field, &crate::sheets::decimal(number / 100.0), unit)
        }
        CellValue::Percent(_) => Outcome::Problem(format!("{} is a percentage; {} is none.", cell.text(), field.label)),
        CellValue::Date(date) => Outcome::Problem(format!(
            "The spreadsheet holds the date {date} where {} is due; it may have taken a typed number for one. Type the number there again, as text.",
            field.label
        )),
        CellValue::Flag(_) => {
            Outcome::Problem(format!("Yes or no stands where {} is due. Type the number.", field.label))
        }
        _ => words(&cell.text(), field, kind, unit, sign),
    }
}

fn words(text: &str, field: &Field, kind: Kind, unit: &str, sign: Option<DecimalSign>) -> Outcome {
    let text = bare(text);
    match figure::find(&text, kind) {
        Found::One(figure) => {
            let unit = figure.unit.unwrap_or(unit);
            match (decimal::shown(&figure.digits), sign) {
                (decimal::Shown::Either, None) => Outcome::Question(
                    format!(
                        "“{}” can be read two ways, and no other figure of the column shows its decimal sign.",
                        shorten(&text)
                    ),
                    [DecimalSign::Point, DecimalSign::Comma]
                        .iter()
                        .filter_map(|s| decimal::plain(&figure.digits, *s))
                        .map(|t| reading(field, &t, unit))
                        .collect(),
                ),
                (decimal::Shown::Either, Some(sign)) | (decimal::Shown::Proves(sign), _) => {
                    as_read(field, kind, &figure.digits, sign, unit)
                }
                _ => as_read(field, kind, &figure.digits, DecimalSign::Point, unit),
            }
        }
        Found::Several(figures) => {
            let mut readings: Vec<Reading> = figures.iter().flat_map(|f| ways(field, f, unit, sign)).collect();
            if let [over, under] = figures.as_slice()
                && text.contains('/')
                && let (Ok(a), Ok(b)) = (over.digits.parse::<u8>(), under.digits.parse::<u8>())
                && (1..b).contains(&a)
                && b <= 16
            {
                let share = f64::from(a) / f64::from(b);
                readings.insert(
                    0,
                    reading(field, &crate::sheets::decimal(share), figures.last().and_then(|f| f.unit).unwrap_or(unit)),
                );
            }
            readings.dedup();
            Outcome::Question(
                format!("“{}” holds several figures. Choose the one that is {}.", shorten(&text), field.label),
                readings,
            )
        }
        Found::Conductors(figure) => Outcome::Question(
            format!("“{}” counts conductors. Confirm the cross-section of a phase conductor.", shorten(&text)),
            ways(field, &figure, unit, sign),
        ),
        Found::None(beside) => {
            // A resistance may carry its prefix alone (500k), which the field itself understands.
            if let Ok(Some(typed)) = field.understand(&text, unit) {
                return Outcome::Value(text, unit.to_owned(), typed);
            }
            let known: Vec<&str> = kind.units().iter().map(|u| u.symbol).filter(|s| !s.is_empty()).collect();
            Outcome::Problem(match (beside.is_empty() || beside == text, known.is_empty()) {
                (true, _) => format!(
                    "“{}” is not a number for {}. Type the number alone, or with its unit.",
                    shorten(&text),
                    field.label
                ),
                (false, true) => format!(
                    "“{}” stands beside the number; {} has no unit. Type the number alone.",
                    shorten(&beside),
                    field.label
                ),
                (false, false) => format!(
                    "“{}” stands beside the number and is no unit of {}. Use one of: {}.",
                    shorten(&beside),
                    field.label,
                    known.join(", ")
                ),
            })
        }
    }
}

/// Both readings of a figure that has two, else the one.
fn ways(field: &Field, figure: &Figure, unit: &str, sign: Option<DecimalSign>) -> Vec<Reading> {
    let unit = figure.unit.unwrap_or(unit);
    let signs = match (decimal::shown(&figure.digits), sign) {
        (decimal::Shown::Proves(sign), _) | (decimal::Shown::Either, Some(sign)) => vec![sign],
        (decimal::Shown::Either, None) => vec![DecimalSign::Point, DecimalSign::Comma],
        _ => vec![DecimalSign::Point],
    };
    signs.into_iter().filter_map(|s| decimal::plain(&figure.digits, s)).map(|t| reading(field, &t, unit)).collect()
}

fn reading(field: &Field, text: &str, unit: &str) -> Reading {
    let impossible = field.understand(text, unit).err();
    Reading { text: text.to_owned(), unit: unit.to_owned(), impossible }
}

/// The digits as typed where the field reads them the same way, else without what could be misread.
fn as_read(field: &Field, kind: Kind, digits: &str, sign: DecimalSign, unit: &str) -> Outcome {
    let Some(plain) = decimal::plain(digits, sign) else {
        return Outcome::Problem(format!(
            "“{}” is not a number. Type digits with one decimal comma or point.",
            shorten(digits)
        ));
    };
    let same = numeral::understand(digits, kind).is_ok_and(|read| plain.parse() == Ok(read));
    sent(field, if same { digits } else { &plain }, unit)
}
