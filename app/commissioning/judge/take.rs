//! Takes a check's inputs out of the record: fields, readings with their instrument, settings.

use super::View;
use crate::Typed;
use crate::people::Instrument;
use crate::plant::{Place, Sheet};
use crate::procedure::ItemKind;
use crate::record::{Entry, EntryPlace, ParameterColumn, ParameterPlace};
use engineering::quantity::Quantity;
use engineering::{Accuracy, Calibration, Kind, Reading};
use std::cell::Cell;

thread_local! {
    /// Whether the check that runs now took anything from the rating column in use.
    static COLUMN_ASKED: Cell<bool> = const { Cell::new(false) };
}

/// Runs a check's taking of inputs; tells besides whether it took anything from the rating column in use.
pub(super) fn noting_column<T>(run: impl FnOnce() -> T) -> (T, bool) {
    COLUMN_ASKED.set(false);
    let done = run();
    (done, COLUMN_ASKED.get())
}

impl<'a> View<'a> {
    /// The standing value of a field: the drive's own, and for site and supply the site's where the drive has none.
    pub(crate) fn value(&self, sheet: Sheet, column: u8, field: &str) -> Option<&'a Typed> {
        let place = Place::in_column(sheet, column, field);
        self.drive.field(&place).or_else(|| self.site.fields.get(&place)?.current()?.value.as_ref())
    }

    /// A quantity from a sheet.
    pub(crate) fn plate<Q: Quantity>(&self, sheet: Sheet, field: &str) -> Option<Q> {
        self.value(sheet, 0, field)?.number().map(Q::from_coherent)
    }

    /// A choice's key from a sheet.
    pub(crate) fn choice(&self, sheet: Sheet, field: &str) -> Option<&'a str> {
        Some(self.value(sheet, 0, field)?.text.as_str())
    }

    /// A yes or no from a sheet.
    pub(crate) fn flag(&self, sheet: Sheet, field: &str) -> Option<bool> {
        Some(self.choice(sheet, field)? == "yes")
    }

    /// A count from a sheet.
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "bounded just above")]
    pub(crate) fn count(&self, sheet: Sheet, field: &str) -> Option<u32> {
        let number = self.value(sheet, 0, field)?.number()?;
        (0.0..1e9).contains(&number).then(|| number.round() as u32)
    }

    /// The rating column in use, from 0; the first where none was chosen.
    pub(crate) fn column_in_use(&self) -> u8 {
        self.choice(Sheet::Motor, "column-in-use").and_then(|t| t.parse::<u8>().ok()).map_or(0, |n| n.saturating_sub(1))
    }

    /// Whether the plate has several rating columns and nobody said which one is in use.
    pub(crate) fn column_is_assumed(&self) -> bool {
        let filled = |c: &u8| {
            self.drive.fields.keys().any(|p| p.sheet == Sheet::Motor && p.column == *c && self.drive.field(p).is_some())
        };
        self.choice(Sheet::Motor, "column-in-use").is_none() && (1..Sheet::Motor.columns()).any(|c| filled(&c))
    }

    /// A quantity from the motor's rating column in use.
    pub(crate) fn motor<Q: Quantity>(&self, field: &str) -> Option<Q> {
        COLUMN_ASKED.set(true);
        self.motor_in(self.column_in_use(), field)
    }

    /// A quantity from one rating column of the motor.
    pub(crate) fn motor_in<Q: Quantity>(&self, column: u8, field: &str) -> Option<Q> {
        self.value(Sheet::Motor, column, field)?.number().map(Q::from_coherent)
    }

    /// The standing entry at an item's row.
    pub(crate) fn entry(&self, item: &str, row: u16) -> Option<&'a crate::plant::Recorded<Entry>> {
        self.drive.record.as_ref()?.entry(&EntryPlace::in_row(item, row))
    }

    /// A choice's key, or `yes`, from an entry.
    pub(crate) fn chosen(&self, item: &str) -> Option<&'a str> {
        Some(self.entry(item, 0)?.value.value.text.as_str())
    }

    /// A direction that still counts as observed: leads exchanged later make it void.
    pub(crate) fn observed(&self, item: &str) -> Option<&'a str> {
        Some(self.drive.record.as_ref()?.observed(&EntryPlace::new(item))?.value.value.text.as_str())
    }

    /// A reading outside tables, with its instrument's word.
    pub(crate) fn reading<Q: Quantity>(&self, item: &str) -> Option<Reading<Q>> {
        self.reading_in(item, 0)
    }

    /// A reading in a row of a table.
    pub(crate) fn reading_in<Q: Quantity>(&self, item: &str, row: u16) -> Option<Reading<Q>> {
        let recorded = self.entry(item, row)?;
        let value = Q::from_coherent(recorded.value.value.number()?);
        let kind = match self.procedure.item(item)?.1.kind {
            ItemKind::Reading { quantity, .. } => quantity,
            _ => return None,
        };
        let calibration = match &recorded.value.instrument {
            None => Calibration::NoInstrument,
            Some(used) => calibration(&used.0, kind, &recorded.received.date(), value.coherent()),
        };
        Some(Reading { value, calibration })
    }

    /// A number from an entry where no instrument matters.
    pub(crate) fn entered<Q: Quantity>(&self, item: &str, row: u16) -> Option<Q> {
        self.entry(item, row)?.value.value.number().map(Q::from_coherent)
    }

    /// How many rows the table of this item has.
    pub(crate) fn rows_of(&self, item: &str) -> Vec<String> {
        self.procedure.item(item).map(|(step, _)| step.rows.clone()).unwrap_or_default()
    }

    /// A value of the parameter record.
    pub(crate) fn parameter(&self, function: &str, column: ParameterColumn) -> Option<&'a Typed> {
        self.drive.record.as_ref()?.parameter(&ParameterPlace { function: function.to_owned(), column })
    }

    /// A quantity set in the parameter record.
    pub(crate) fn setting<Q: Quantity>(&self, function: &str, column: ParameterColumn) -> Option<Q> {
        self.parameter(function, column)?.number().map(Q::from_coherent)
    }

    /// A choice set in the parameter record.
    pub(crate) fn set_choice(&self, function: &str, column: ParameterColumn) -> Option<&'a str> {
        Some(self.parameter(function, column)?.text.as_str())
    }

    /// What is or will be in the drive: as left where it stands, otherwise intended.
    pub(crate) fn in_force<Q: Quantity>(&self, function: &str) -> Option<Q> {
        self.setting(function, ParameterColumn::AsLeft).or_else(|| self.setting(function, ParameterColumn::Intended))
    }
}

/// What an instrument's word is worth for a reading of this kind on a day: the row of the smallest range that holds it.
fn calibration(instrument: &Instrument, kind: Kind, on: &str, value: f64) -> Calibration {
    let Some(accuracy) = accuracy_at(instrument, kind, value) else { return Calibration::AccuracyUnknown };
    if instrument.due.is_empty() {
        Calibration::Expired(accuracy, "a day nobody entered".to_owned())
    } else if instrument.due.as_str() < on {
        Calibration::Expired(accuracy, instrument.due.clone())
    } else {
        Calibration::Valid(accuracy)
    }
}

/// The accuracy that holds for this value; a row that cannot be read or that amounts to nothing promises nothing.
fn accuracy_at(instrument: &Instrument, kind: Kind, value: f64) -> Option<Accuracy> {
    let ranges = instrument.accuracy.iter().filter(|row| row.kind == kind).filter_map(|row| {
        let unit = kind.unit(&row.unit)?;
        let number = |text: &str| match text.trim() {
            "" => Some(0.0),
            text => text.parse::<f64>().ok().filter(|n| n.is_finite() && *n >= 0.0),
        };
        let full = number(&row.full_scale)?;
        let end = if full > 0.0 { unit.to_coherent(full).abs() } else { f64::INFINITY };
        let accuracy = Accuracy {
            percent_of_reading: number(&row.percent_of_reading)?,
            digits: number(&row.digits)?,
            resolution: number(&row.resolution)? * unit.factor,
            percent_of_full_scale: number(&row.percent_of_full_scale)?,
            full_scale: full * unit.factor,
        };
        (value.abs() <= end * (1.0 + 1e-9)).then_some((end, accuracy))
    });
    let (_, accuracy) = ranges.min_by(|(a, _), (b, _)| a.total_cmp(b))?;
    let width = accuracy.half_width(value);
    (width.is_finite() && width > 0.0).then_some(accuracy)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::InstrumentId;
    use crate::people::AccuracyRow;

    fn row(percent: &str, digits: &str, resolution: &str, full_scale: &str, unit: &str) -> AccuracyRow {
        AccuracyRow {
            kind: Kind::Resistance,
            unit: unit.into(),
            percent_of_reading: percent.into(),
            digits: digits.into(),
            resolution: resolution.into(),
            percent_of_full_scale: String::new(),
            full_scale: full_scale.into(),
        }
    }

    /// The half-width A that is taken at a value in ohms; `None` where the accuracy is unknown.
    fn half_width(accuracy: &[AccuracyRow], ohms: f64) -> Option<f64> {
        let instrument = Instrument {
            id: InstrumentId(uuid::Uuid::nil()),
            mark: "IT-07".into(),
            description: "Insulation tester".into(),
            serial: "4471".into(),
            due: "2027-03-31".into(),
            accuracy: accuracy.to_vec(),
            active: true,
        };
        match calibration(&instrument, Kind::Resistance, "2026-11-17", ohms) {
            Calibration::Valid(a) => Some(a.half_width(ohms)),
            Calibration::AccuracyUnknown => None,
            other => panic!("{other:?}"),
        }
    }

    /// A data sheet gives its figures range by range; half-width as rows DU-03 and DU-04 of the reference values.
    #[test]
    fn the_smallest_range_that_holds_the_value_counts() {
        let ranges =
            [row("3", "5", "1", "2000", "MΩ"), row("2", "2", "0.01", "20", "Ω"), row("2", "3", "0.1", "200", "MΩ")];
        let near = |ohms: f64, expected: f64| {
            let width = half_width(&ranges, ohms).unwrap();
            assert!((width - expected).abs() < 1e-9 * expected, "{ohms}: {width}");
        };
        near(0.5, 0.01 + 0.02);
        near(20.0, 0.4 + 0.02);
        near(150e6, 3e6 + 0.3e6);
        near(201e6, 6.03e6 + 5e6);
        assert_eq!(half_width(&ranges, 2.1e9), None, "beyond the highest range");
        let open = [row("3", "", "", "", "MΩ"), ranges[1].clone()];
        assert_eq!(half_width(&open, 2.1e9), Some(2.1e9 * 3.0 / 100.0), "without a full scale it has no end");
    }

    #[test]
    fn a_row_that_amounts_to_nothing_or_cannot_be_read_promises_nothing() {
        for nothing in [row("", "", "", "", "Ω"), row("0", "2", "", "", "Ω"), row("0", "", "0.1", "200", "MΩ")] {
            assert_eq!(half_width(&[nothing], 5.0), None);
        }
        for garbled in [row("two", "1", "0.1", "", "Ω"), row("2", "1", "0.1", "-5", "Ω"), row("2", "", "", "", "V")] {
            assert_eq!(half_width(&[garbled], 5.0), None);
        }
        assert_eq!(half_width(&[row("2", "", "", "", "Ω")], 0.0), None, "2 % of nought");
    }
}
