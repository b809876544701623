//! A reading knows its instrument: the number, and how far the instrument can be trusted with it.

use crate::quantity::Quantity;

/// What the instrument's data sheet promises.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Accuracy {
    /// Percent of the reading.
    pub percent_of_reading: f64,
    /// Digits of the last place.
    pub digits: f64,
    /// What one digit is worth, in the coherent unit of the quantity.
    pub resolution: f64,
    /// Percent of full scale.
    pub percent_of_full_scale: f64,
    /// Full scale, in the coherent unit of the quantity.
    pub full_scale: f64,
}

impl Accuracy {
    /// The rectangular half-width A at a reading (rows DU-03 and DU-04).
    #[must_use]
    pub fn half_width(&self, value: f64) -> f64 {
        value.abs() * self.percent_of_reading / 100.0
            + self.digits * self.resolution
            + self.percent_of_full_scale / 100.0 * self.full_scale
    }
}

/// Whether the instrument's word counts.
#[derive(Clone, Debug, PartialEq)]
pub enum Calibration {
    /// In calibration on the day, with this accuracy.
    Valid(Accuracy),
    /// Named, but its calibration had run out on the day; the date as text.
    Expired(Accuracy, String),
    /// Named, but nobody entered its accuracy for this quantity.
    AccuracyUnknown,
    /// No instrument named.
    NoInstrument,
}

/// A measured quantity with its instrument.
#[derive(Clone, Debug, PartialEq)]
pub struct Reading<Q> {
    /// What was read.
    pub value: Q,
    /// How far to trust it.
    pub calibration: Calibration,
}

impl<Q: Quantity> Reading<Q> {
    /// A reading without a named instrument.
    #[must_use]
    pub fn bare(value: Q) -> Self {
        Self { value, calibration: Calibration::NoInstrument }
    }

    /// A reading taken with an instrument of this accuracy, in calibration.
    #[must_use]
    pub fn with(value: Q, accuracy: Accuracy) -> Self {
        Self { value, calibration: Calibration::Valid(accuracy) }
    }

    /// The number in the coherent unit.
    #[must_use]
    pub fn number(&self) -> f64 {
        self.value.coherent()
    }

    /// The rectangular half-width A, when the instrument gives one.
    #[must_use]
    pub fn half_width(&self) -> Option<f64> {
        match &self.calibration {
            Calibration::Valid(a) | Calibration::Expired(a, _) => Some(a.half_width(self.number())),
            Calibration::AccuracyUnknown | Calibration::NoInstrument => None,
        }
    }

    /// Standard uncertainty u = A/√3, when the instrument gives one.
    #[must_use]
    pub fn standard_uncertainty(&self) -> Option<f64> {
        self.half_width().map(|a| a / 3.0_f64.sqrt())
    }

    /// Why this reading can be `marginal` at best, if so.
    #[must_use]
    pub fn doubt(&self) -> Option<String> {
        match &self.calibration {
            Calibration::Valid(_) => None,
            Calibration::Expired(_, due) => Some(format!("the instrument's calibration ran out on {due}")),
            Calibration::AccuracyUnknown => {
                Some("the instrument's accuracy for this quantity is not entered".to_owned())
            }
            Calibration::NoInstrument => Some("no instrument is named".to_owned()),
        }
    }
}
