//! # brake-resistor-ohms
//!
//! The brake resistor measured cold against its plate, and against the least that the drive's chopper stands.
//!
//! Plate ± tolerance, 10 % where none is printed (common practice, row BR-01). Never below the drive's minimum ohms
//! (row RM-06), whatever the plate says. Measure with the resistor disconnected from the drive.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Ratio, Resistance};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::motion::RM_06;
use crate::sources::settings::RESISTOR_TOLERANCE;

/// Name in the catalogue.
pub const NAME: &str = "brake-resistor-ohms";

/// Tolerance where the plate prints none.
pub const TOLERANCE: Limit =
    Limit { name: "brake resistor off its plate", value: 10.0, unit: "%", source: RESISTOR_TOLERANCE };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Resistance measured, disconnected.
    pub reading: Option<Reading<Resistance>>,
    /// Resistance on its plate.
    pub nominal: Option<Resistance>,
    /// Tolerance on its plate.
    pub tolerance: Option<Ratio>,
    /// Smallest resistance that the drive allows.
    pub drive_minimum: Option<Resistance>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(RM_06);
    b.cite(RESISTOR_TOLERANCE);
    b.note("Measure with the resistor disconnected and the bus proved dead; the drive's manual has the last word on its minimum.");
    let nominal = plausible::positive(&mut b, inputs.nominal, "brake resistor's plate value");
    let minimum = plausible::positive(&mut b, inputs.drive_minimum, "smallest brake resistance of the drive");
    let usual = Ratio::from_fraction(TOLERANCE.value / 100.0);
    let tolerance =
        b.assume(inputs.tolerance, usual, "tolerance of the brake resistor", "10 %, common practice").fraction();
    if !(0.0..1.0).contains(&tolerance) {
        return b.not_judged("Not assessed: a tolerance lies between 0 and 100 %.");
    }
    let plate = nominal.map(|n| (n.ohms() * (1.0 - tolerance), n.ohms() * (1.0 + tolerance)));
    let floor = minimum.map(Resistance::ohms);
    if let Some((low, high)) = plate {
        let least = floor.map_or(low, |m| m.max(low));
        let (l, h) = (significant(least, 3), significant(high, 3));
        b.line(
            "span of the plate",
            "R_N·(1 ± tolerance)",
            format!("{} Ω ± {} %", significant(high / (1.0 + tolerance), 3), significant(tolerance * 100.0, 2)),
            format!("{} to {h} Ω", significant(low, 3)),
        );
        b.limit(format!("{l} to {h} Ω"));
        let rule = LimitRule::linear("Ω").between(least, format!("≥ {l} Ω"), high, format!("≤ {h} Ω"));
        b.rule(match floor.filter(|m| *m < low) {
            Some(m) => rule.tick(m, "drive's minimum"),
            None => rule,
        });
    } else if let Some(m) = floor {
        b.limit(format!("at least {} Ω, the drive's minimum", significant(m, 3)));
        b.rule(LimitRule::linear("Ω").at_least(m, "drive's minimum"));
    }
    let Some(reading) = plausible::reading_not_negative(&mut b, inputs.reading.as_ref(), "brake resistance") else {
        return b.not_assessed();
    };
    let measured = Measured::direct(&reading);
    let shown = significant(measured.value, 3);
    b.figure("brake resistance", measured.value, 3, "Ω");
    let against_drive = floor.map(|m| measured.at_least(m));
    let against_plate = plate.map(|(low, high)| measured.between(low, high));
    if let (Some(m), Some(verdict)) = (floor, against_drive) {
        b.line("against the drive", "R ≥ R_min", format!("{shown} Ω against {} Ω", significant(m, 3)), verdict.words());
    }
    if let (Some((low, high)), Some(verdict)) = (plate, against_plate) {
        b.line(
            "against the plate",
            "in the span",
            format!("{shown} Ω in {} to {} Ω", significant(low, 3), significant(high, 3)),
            verdict.words(),
        );
    }
    let verdict = [against_drive, against_plate].into_iter().flatten().fold(Verdict::Within, Verdict::worse);
    if verdict != Verdict::Outside && (floor.is_none() || plate.is_none()) {
        return b.not_assessed();
    }
    marking::mark(&mut b, &measured, format!("{shown} Ω"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside if against_drive == Some(Verdict::Outside) => format!("{shown} Ω is below the drive's minimum: the chopper would fail. Do not connect it."),
            Verdict::Outside => format!("{shown} Ω does not fit the plate. Look for a broken or shorted element or a wrong connection of several."),
            Verdict::Marginal => format!("{shown} Ω: the meter cannot tell it from a limit, or its accuracy is in doubt."),
            _ => format!("{shown} Ω fits the plate and the drive."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(ohms: f64) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 0.5,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            reading: Some(Reading::with(Resistance::from_ohms(ohms), meter)),
            nominal: Some(Resistance::from_ohms(40.0)),
            tolerance: Some(Ratio::from_fraction(0.1)),
            drive_minimum: Some(Resistance::from_ohms(35.0)),
        }
    }

    /// Tolerance: common practice, no source (row BR-01). Minimum: arithmetic (row RM-06).
    #[test]
    fn at_just_inside_and_just_outside() {
        for (ohms, verdict) in [
            (40.0, Verdict::Within),
            (36.3, Verdict::Within),
            (36.0, Verdict::Marginal),
            (35.7, Verdict::Outside),
            (43.7, Verdict::Within),
            (44.0, Verdict::Marginal),
            (44.4, Verdict::Outside),
        ] {
            assert_eq!(check(&of(ohms)).verdict, verdict, "{ohms}");
        }
    }

    #[test]
    fn the_drive_has_the_last_word() {
        let strict = Inputs { drive_minimum: Some(Resistance::from_ohms(41.0)), ..of(40.0) };
        let outcome = check(&strict);
        assert!(outcome.verdict == Verdict::Outside && outcome.summary.contains("Do not connect"));
        let unknown = Inputs { drive_minimum: None, tolerance: None, ..of(40.0) };
        let outcome = check(&unknown);
        assert_eq!(
            (outcome.verdict, outcome.missing[0].what.as_str()),
            (Verdict::NotAssessed, "smallest brake resistance of the drive")
        );
        assert!(outcome.rule.is_some() && outcome.assumed.len() == 1);
        assert_eq!(check(&Inputs { reading: None, ..of(40.0) }).limit, "36.0 to 44.0 Ω");
        assert_eq!(check(&of(0.0)).verdict, Verdict::Outside);
        assert_eq!(check(&of(f64::NAN)).verdict, Verdict::NotAssessed);
    }
}
