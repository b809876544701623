//! # encoder-scaling
//!
//! The speed that the drive makes of its encoder, against an independent measurement of the shaft.
//!
//! |n_drive/n − 1| ≤ 0.5 % (common practice, row EN-04), or the site's own tolerance. n = 60·f_pulse/PPR (row EN-01); a wrong count shows as the
//! ratio of pulse numbers, a missing or doubled edge count as 2 or 4. Direction belongs to the rotation check.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Frequency, Ratio, Speed};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::sensors::{EN_01, ENCODER_AGREEMENT};

/// Name in the catalogue.
pub const NAME: &str = "encoder-scaling";

/// Largest error.
pub const ERROR: Limit =
    Limit { name: "encoder speed against measured speed", value: 0.5, unit: "%", source: ENCODER_AGREEMENT };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Speed that the drive shows from its encoder, without its sign.
    pub shown: Option<Speed>,
    /// Speed of the same shaft, measured independently.
    pub measured: Option<Reading<Speed>>,
    /// Pulses a revolution as set.
    pub pulses_set: Option<u32>,
    /// Pulses a revolution on the encoder's plate.
    pub pulses_plate: Option<u32>,
    /// Largest error that the site allows.
    pub own_tolerance: Option<Ratio>,
    /// Turns of the encoder for one turn of the motor.
    pub turns_ratio: Option<Ratio>,
}

/// n = 60·f_pulse/PPR; `None` without pulses.
#[must_use]
pub fn speed_from_pulses(pulses: Frequency, per_revolution: u32) -> Option<Speed> {
    (per_revolution > 0).then(|| Speed::from_rpm(60.0 * pulses.hertz() / f64::from(per_revolution)))
}

/// Pulse frequency at a speed, and the rate of counted edges (row EN-02).
#[must_use]
pub fn pulse_and_count_rate(speed: Speed, per_revolution: u32, edges: u32) -> (Frequency, Frequency) {
    let pulses = f64::from(per_revolution) * speed.rpm() / 60.0;
    (Frequency::from_hertz(pulses), Frequency::from_hertz(pulses * f64::from(edges)))
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(EN_01);
    b.cite(ENCODER_AGREEMENT);
    let allowed = match inputs.own_tolerance {
        Some(own) => {
            let Some(own) = plausible::positive(&mut b, Some(own), "scaling error allowed") else {
                return b.not_assessed();
            };
            own.fraction() * 100.0
        }
        None => ERROR.value,
    };
    let allowed_shown = significant(allowed, 2);
    let whose = if inputs.own_tolerance.is_some() { "as entered" } else { "common practice" };
    b.limit(format!("at most {allowed_shown} % apart ({whose})"));
    b.rule(LimitRule::linear("%").between(
        -allowed,
        format!("−{allowed_shown} %"),
        allowed,
        format!("+{allowed_shown} %"),
    ));
    if let (Some(set), Some(plate)) = (inputs.pulses_set, inputs.pulses_plate) {
        b.line(
            "pulses a revolution",
            "set = plate",
            format!("{set} against {plate}"),
            if set == plate { "equal" } else { "different" },
        );
    }
    let shown = plausible::not_negative(&mut b, inputs.shown, "speed that the drive shows from its encoder");
    let reading = plausible::positive_reading(&mut b, inputs.measured.as_ref(), "shaft speed measured independently");
    let (Some(shown), Some(reading)) = (shown, reading) else { return b.not_assessed() };

    let ratio = shown.rpm() / reading.number();
    let error = (ratio - 1.0) * 100.0;
    let off = significant(error, 2);
    b.line(
        "error",
        "n_drive/n − 1",
        format!("{} rpm / {} rpm − 1", significant(shown.rpm(), 5), significant(reading.number(), 5)),
        format!("{off} %"),
    );
    b.figure("encoder speed off", error, 2, "%");
    let measured = Measured { value: error, ..Measured::scaled(&reading, 100.0 * ratio / reading.number()) };
    let verdict = measured.between(-allowed, allowed);
    marking::mark(&mut b, &measured, format!("{off} %"), verdict);
    let cause = cause(ratio, inputs);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("The encoder's speed is {off} % off: {cause}. Correct it before closing the speed loop."),
            Verdict::Marginal => format!("The encoder's speed is {off} % off: the tachometer cannot tell it from {allowed_shown} %, or its accuracy is in doubt."),
            _ => format!("The encoder's speed is {off} % off the measured one."),
        },
    )
}

/// What would explain the ratio of shown to measured speed.
fn cause(ratio: f64, inputs: &Inputs) -> String {
    let near = |value: f64| (ratio / value - 1.0).abs() < 0.01;
    if ratio.abs() < 1e-9 {
        return "no pulses arrive".to_owned();
    }
    if let (Some(set), Some(plate)) = (inputs.pulses_set, inputs.pulses_plate)
        && set > 0
        && set != plate
        && near(f64::from(plate) / f64::from(set))
    {
        return format!("{set} pulses set, {plate} on the plate");
    }
    if let Some(turns) = inputs.turns_ratio.map(Ratio::fraction).filter(|r| (r - 1.0).abs() > 0.01)
        && near(turns)
    {
        return format!(
            "the encoder turns {} times for one turn of the motor, which the drive does not reckon with",
            significant(turns, 3)
        );
    }
    match [
        (2.0, "edges counted twice"),
        (4.0, "edges counted four times"),
        (0.5, "half the pulses arrive"),
        (0.25, "a quarter of the pulses arrives"),
    ]
    .iter()
    .find(|(r, _)| near(*r))
    {
        Some((_, words)) => format!("{words}, or the pulse number is wrong"),
        None => "pulse number, a gear between encoder and shaft, slipping coupling or interference".to_owned(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(shown: f64, measured: f64) -> Inputs {
        let tachometer = Accuracy {
            percent_of_reading: 0.05,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            shown: Some(Speed::from_rpm(shown)),
            measured: Some(Reading::with(Speed::from_rpm(measured), tachometer)),
            pulses_set: Some(1024),
            pulses_plate: Some(1024),
            ..Inputs::default()
        }
    }

    /// C-EN-001 and C-EN-002 (rows EN-01, EN-02).
    #[test]
    fn reference_pulses() {
        let (pulses, counts) = pulse_and_count_rate(Speed::from_rpm(1480.0), 1024, 4);
        assert!((pulses.hertz() - 25_258.667).abs() < 0.01 && (counts.hertz() - 101_034.67).abs() < 0.01);
        let speed = speed_from_pulses(Frequency::from_hertz(25_250.0), 1024).expect("pulses").rpm();
        assert!((speed - 1479.4922).abs() < 0.01);
        assert!(((speed / 1480.0 - 1.0) * 100.0 + 0.034_311_655).abs() < 0.001);
        assert!(speed_from_pulses(Frequency::from_hertz(1.0), 0).is_none());
    }

    /// Common practice, no source (row EN-04).
    #[test]
    fn at_just_inside_and_just_outside() {
        for (shown, verdict) in [
            (1000.0, Verdict::Within),
            (1004.4, Verdict::Within),
            (1005.0, Verdict::Marginal),
            (1005.6, Verdict::Outside),
            (994.4, Verdict::Outside),
        ] {
            assert_eq!(check(&of(shown, 1000.0)).verdict, verdict, "{shown}");
        }
    }

    #[test]
    fn the_cause_is_named() {
        assert!(check(&of(4000.0, 1000.0)).summary.contains("four times"));
        assert!(check(&of(0.0, 1000.0)).summary.contains("no pulses"));
        let wrong = Inputs { pulses_plate: Some(2500), ..of(2441.4, 1000.0) };
        assert!(check(&wrong).summary.contains("1024 pulses set, 2500 on the plate"));
        let geared = Inputs { turns_ratio: Some(Ratio::from_fraction(2.5)), ..of(2500.0, 1000.0) };
        assert!(check(&geared).summary.contains("turns 2.50 times"), "{}", check(&geared).summary);
        let own =
            |percent: f64| Inputs { own_tolerance: Some(Ratio::from_fraction(percent / 100.0)), ..of(1003.0, 1000.0) };
        assert_eq!((check(&own(0.1)).verdict, check(&own(1.0)).verdict), (Verdict::Outside, Verdict::Within));
        assert_eq!(check(&own(0.1)).limit, "at most 0.10 % apart (as entered)");
    }

    #[test]
    fn limit_first_missing_named_and_impossible() {
        let outcome = check(&Inputs { measured: None, ..of(1000.0, 1000.0) });
        assert_eq!(outcome.missing[0].what, "shaft speed measured independently");
        assert!(outcome.rule.is_some());
        assert_eq!(check(&of(1000.0, 0.0)).verdict, Verdict::NotAssessed);
    }
}
