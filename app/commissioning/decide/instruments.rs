//! Keeping instruments: marks, calibration dates and accuracies.

use super::Surroundings;
use super::words::{self, Errors};
use super::writer::Writer;
use crate::journal::{Act, Chain, Event, Fact};
use crate::people::{AccuracyRow, Instrument};
use crate::plant::field;
use crate::refusal::Standing;
use crate::typed::numeral;
use crate::{Conflict, EventId, Refusal, Typed};
use engineering::Kind;

/// Adds or changes an instrument.
pub(super) fn keep(
    act: &Act,
    around: &Surroundings<'_>,
    instrument: &Instrument,
    seen: &[EventId],
) -> Result<Vec<Event>, Refusal> {
    let kept = checked(around, instrument)?;
    let standing = around.installation.instruments.get(&kept.id);
    let last = around.installation.instrument_seen.get(&kept.id);
    let mut writer = Writer::new(act, around);
    if standing == Some(&kept) {
        return Ok(writer.done());
    }
    if last.into_iter().ne(seen) {
        return Err(stale(around, &kept));
    }
    writer.add_over(
        Chain::Installation,
        Fact::InstrumentKept { instrument: kept },
        last.cloned().into_iter().collect(),
        "",
    );
    Ok(writer.done())
}

fn stale(around: &Surroundings<'_>, mine: &Instrument) -> Refusal {
    let words =
        |i: &Instrument| Typed::words(format!("{}, serial {}, calibration due {}", i.description, i.serial, i.due));
    let theirs = around.installation.instruments.get(&mine.id);
    let kept = around.installation.instrument_kept.get(&mine.id);
    let standing = theirs.zip(kept).map(|(theirs, (by, received))| Standing {
        value: Some(words(theirs)),
        by: by.clone(),
        received: *received,
    });
    Refusal::Stale {
        conflicts: vec![Conflict {
            field: "instrument".to_owned(),
            label: format!("instrument {}", mine.mark),
            mine: Some(words(mine)),
            theirs: standing.into_iter().collect(),
            seen: around.installation.instrument_seen.get(&mine.id).cloned().into_iter().collect(),
        }],
    }
}

fn checked(around: &Surroundings<'_>, given: &Instrument) -> Result<Instrument, Refusal> {
    let mut errors = Errors::default();
    let mut kept = given.clone();
    kept.mark = errors.keep("mark", "mark", words::line(&given.mark, 24)).unwrap_or_default();
    kept.description =
        errors.keep("description", "description", words::line(&given.description, 80)).unwrap_or_default();
    kept.serial = errors.keep("serial", "serial number", field::words(given.serial.trim(), 60)).unwrap_or_default();
    given.due.trim().clone_into(&mut kept.due);
    let lower = kept.mark.to_lowercase();
    if around.installation.instruments.values().any(|i| i.id != given.id && i.mark.to_lowercase() == lower) {
        errors.add("mark", "mark", format!("The mark “{}” is on another instrument. Choose another.", kept.mark));
    }
    if !kept.due.is_empty() && crate::Timestamp::parse(&format!("{}T00:00:00Z", kept.due)).is_none() {
        errors.add("due", "calibration due", "This is not a date. Write year, month and day, as in 2027-03-31.");
    }
    for (n, row) in kept.accuracy.iter_mut().enumerate() {
        accuracy(&mut errors, n, row);
    }
    for (n, row) in kept.accuracy.iter().enumerate() {
        if kept.accuracy.iter().take(n).any(|earlier| same_range(earlier, row)) {
            let message = format!(
                "The accuracy for {} stands twice for one range. Keep one row, or give each range its own full scale.",
                row.kind.words()
            );
            errors.add(format!("accuracy.{n}.kind"), "quantity", message);
        }
    }
    errors.none()?;
    Ok(kept)
}

/// Checks a row and writes its numbers as plain decimals.
fn accuracy(errors: &mut Errors, n: usize, row: &mut AccuracyRow) {
    if row.kind.unit(&row.unit).is_none() {
        let list: Vec<&str> = row.kind.units().iter().map(|u| u.symbol).collect();
        let message = format!("This is no unit of {}. Pick one of: {}.", row.kind.words(), list.join(", "));
        errors.add(format!("accuracy.{n}.unit"), "unit", message);
    }
    let numbers = [
        ("percent_of_reading", "percent of reading", &mut row.percent_of_reading),
        ("digits", "digits", &mut row.digits),
        ("resolution", "resolution", &mut row.resolution),
        ("percent_of_full_scale", "percent of full scale", &mut row.percent_of_full_scale),
        ("full_scale", "full scale", &mut row.full_scale),
    ];
    let mut understood = true;
    for (key, label, text) in numbers {
        if text.trim().is_empty() {
            "0".clone_into(text);
            continue;
        }
        let number = numeral::understand(text, Kind::Number).and_then(|number| {
            if number >= 0.0 { Ok(number) } else { Err("This cannot be negative. Leave out the sign.".to_owned()) }
        });
        match errors.keep(&format!("accuracy.{n}.{key}"), label, number) {
            Some(number) => *text = numeral::twelve_digits(number),
            None => understood = false,
        }
    }
    if understood && let Err((key, label, message)) = amounts(row) {
        errors.add(format!("accuracy.{n}.{key}"), label, message);
    }
}

/// Whether two rows are for the same quantity and range: the same full scale, or none in both.
fn same_range(a: &AccuracyRow, b: &AccuracyRow) -> bool {
    let end = |row: &AccuracyRow| Some(row.kind.unit(&row.unit)?.factor * row.full_scale.parse::<f64>().ok()?);
    a.kind == b.kind && end(a).zip(end(b)).is_some_and(|(a, b)| (a - b).abs() <= 1e-9 * a.abs().max(b.abs()))
}

/// A row that amounts to nothing would make every reading exact: each part needs what it is counted in.
fn amounts(row: &AccuracyRow) -> Result<(), (&'static str, &'static str, &'static str)> {
    let some = |text: &str| text.parse::<f64>().is_ok_and(|n| n > 0.0);
    if some(&row.digits) && !some(&row.resolution) {
        return Err(("resolution", "one digit is", "Digits are given. Say what one digit is worth on this range."));
    }
    if some(&row.percent_of_full_scale) && !some(&row.full_scale) {
        return Err(("full_scale", "full scale", "A percentage of full scale is given. Say what full scale is."));
    }
    if some(&row.percent_of_reading) || some(&row.digits) || some(&row.percent_of_full_scale) {
        return Ok(());
    }
    Err((
        "percent_of_reading",
        "percent of reading",
        "This row gives no accuracy at all. Enter a figure from the data sheet, or take the row out.",
    ))
}
