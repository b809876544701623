//! Takes a check's inputs out of the record: fields, readings with their instrument, settings.

use super::View;
use crate::Typed;
use crate::people::Instrument;
use crate::plant::{Place, Sheet};
use crate::procedure::ItemKind;
use crate::record::{Entry, EntryPlace, ParameterColumn, ParameterPlace};
use engineering::quantity::Quantity;
use engineering::{Accuracy, Calibration, Kind, Reading};

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

    /// A quantity from the motor's rating column in use.
    pub(crate) fn motor<Q: Quantity>(&self, field: &str) -> Option<Q> {
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
            Some(used) => calibration(&used.0, kind, &recorded.received.date()),
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

/// What an instrument's word is worth for a kind of quantity on a day.
fn calibration(instrument: &Instrument, kind: Kind, on: &str) -> Calibration {
    let Some(row) = instrument.accuracy.iter().find(|r| r.kind == kind) else { return Calibration::AccuracyUnknown };
    let Some(unit) = kind.unit(&row.unit) else { return Calibration::AccuracyUnknown };
    let number = |text: &str| text.trim().parse::<f64>().unwrap_or(0.0);
    let accuracy = Accuracy {
        percent_of_reading: number(&row.percent_of_reading),
        digits: number(&row.digits),
        resolution: number(&row.resolution) * unit.factor,
        percent_of_full_scale: number(&row.percent_of_full_scale),
        full_scale: number(&row.full_scale) * unit.factor,
    };
    if instrument.due.is_empty() {
        Calibration::Expired(accuracy, "a day nobody entered".to_owned())
    } else if instrument.due.as_str() < on {
        Calibration::Expired(accuracy, instrument.due.clone())
    } else {
        Calibration::Valid(accuracy)
    }
}
