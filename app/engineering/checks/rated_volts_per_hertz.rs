//! # rated-volts-per-hertz
//!
//! Volts per hertz at which the motor has its rated flux: U/f from one column of the plate. A figure. Physics.

use crate::formulas::plausible::positive;
use crate::outcome::{Outcome, OutcomeBuilder};
use crate::quantity::{Frequency, Voltage, VoltsPerHertz};
use crate::rounding::significant;
use crate::sources::settings::VF_01;

/// Name in the catalogue.
pub const NAME: &str = "rated-volts-per-hertz";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Rated line volts of the connection in use.
    pub rated_voltage: Option<Voltage>,
    /// Rated frequency of the same column.
    pub rated_frequency: Option<Frequency>,
}

/// U/f.
#[must_use]
pub fn volts_per_hertz(voltage: Voltage, frequency: Frequency) -> VoltsPerHertz {
    VoltsPerHertz::from_volts_per_hertz(voltage.volts() / frequency.hertz())
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(VF_01);
    let voltage = positive(&mut b, inputs.rated_voltage, "rated motor voltage");
    let frequency = positive(&mut b, inputs.rated_frequency, "rated motor frequency");
    let (Some(voltage), Some(frequency)) = (voltage, frequency) else { return b.not_assessed() };
    let ratio = volts_per_hertz(voltage, frequency).volts_per_hertz();
    let shown = significant(ratio, 4);
    b.line(
        "volts per hertz",
        "U/f",
        format!("{} V/{} Hz", significant(voltage.volts(), 4), significant(frequency.hertz(), 4)),
        format!("{shown} V/Hz"),
    );
    b.figure("volts per hertz", ratio, 4, "V/Hz");
    b.as_figure(format!("Rated flux at {shown} V/Hz."))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::outcome::Verdict;

    /// Row VF-01: 400/50 = 8.000, 460/60 = 7.667, 230/60 = 3.833, 690/50 = 13.80, 575/60 = 9.583.
    #[test]
    fn published_ratios() {
        for (volts, hertz, shown) in [
            (400.0, 50.0, "8.000"),
            (460.0, 60.0, "7.667"),
            (230.0, 60.0, "3.833"),
            (690.0, 50.0, "13.80"),
            (575.0, 60.0, "9.583"),
        ] {
            let outcome = check(&Inputs {
                rated_voltage: Some(Voltage::from_volts(volts)),
                rated_frequency: Some(Frequency::from_hertz(hertz)),
            });
            assert_eq!((outcome.verdict, outcome.figures[0].value.as_str()), (Verdict::Figure, shown));
        }
    }

    #[test]
    fn zero_hertz_and_missing_volts_are_named() {
        let outcome = check(&Inputs { rated_voltage: None, rated_frequency: Some(Frequency::from_hertz(0.0)) });
        assert_eq!(outcome.verdict, Verdict::NotAssessed);
        assert_eq!(outcome.missing.len(), 2);
    }
}
