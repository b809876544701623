//! # load-current
//!
//! The motor current that a load torque takes, from the nameplate; and the torque behind a measured current. A figure.
//!
//! I = √((I_m/r)² + (I_N² − I_m²)·(x·r)²), x = T/T_N, r = f/f_N but at least 1 (row NL-05). The bracket of I_m
//! (rows NL-01, NL-02) is carried through, so the answer is a span. Good up to about 1.1 times rated load.

use crate::decision::Measured;
use crate::formulas::load_current::{current_between, torque_between};
use crate::formulas::{magnetising, plausible};
use crate::outcome::{Outcome, OutcomeBuilder};
use crate::quantity::{Current, Frequency, Power, Ratio, Speed, Torque};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::motion::RATED_TORQUE;
use crate::sources::runs::{NL_05, TF_03};

/// Name in the catalogue.
pub const NAME: &str = "load-current";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Motor current measured under load.
    pub reading: Option<Reading<Current>>,
    /// Load torque at the motor shaft, when known.
    pub load_torque: Option<Torque>,
    /// Output frequency during the run.
    pub frequency: Option<Frequency>,
    /// Rated frequency.
    pub rated_frequency: Option<Frequency>,
    /// Rated current.
    pub rated_current: Option<Current>,
    /// Rated power factor.
    pub power_factor: Option<Ratio>,
    /// Breakdown over rated torque, λ.
    pub breakdown: Option<Ratio>,
    /// Rated shaft power.
    pub rated_power: Option<Power>,
    /// Rated speed.
    pub rated_speed: Option<Speed>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(NL_05);
    b.cite(RATED_TORQUE);
    b.cite(TF_03);
    b.limit("a figure: no limit");
    let bracket = magnetising::work_out(&mut b, inputs.rated_current, inputs.power_factor, inputs.breakdown);
    let frequency = plausible::positive(&mut b, inputs.frequency, "output frequency of the run");
    let rated_frequency = plausible::positive(&mut b, inputs.rated_frequency, "rated frequency");
    let rated_torque = plausible::rated_torque(&mut b, inputs.rated_power, inputs.rated_speed);
    // Either of the two is enough: one is worked out from the other.
    if inputs.reading.is_none() && inputs.load_torque.is_none() {
        let _ = b.need(None::<Current>, "load torque or motor current under load");
    }
    let load = inputs.load_torque.and_then(|t| plausible::not_negative(&mut b, Some(t), "load torque"));
    let reading = inputs
        .reading
        .as_ref()
        .and_then(|r| plausible::reading_not_negative(&mut b, Some(r), "motor current under load"));
    let (Some(bracket), Some(f), Some(f_n), Some(rated_torque), Some(power), Some(speed), Some(rated)) = (
        bracket,
        frequency,
        rated_frequency,
        rated_torque,
        inputs.rated_power,
        inputs.rated_speed,
        inputs.rated_current,
    ) else {
        return b.not_assessed();
    };
    if load.is_none() && reading.is_none() {
        return b.not_assessed();
    }

    let rated_torque = rated_torque.newton_metres();
    let t_n = significant(rated_torque, 4);
    b.line(
        "rated torque",
        "T_N = P/(2π·n/60)",
        format!("{} W at {} rpm", significant(power.watts(), 4), significant(speed.rpm(), 4)),
        format!("{t_n} N·m"),
    );
    let r = Ratio::from_fraction((f.hertz() / f_n.hertz()).max(1.0));
    if !r.fraction().is_finite() {
        return b.not_judged("Not assessed: output frequency and rated frequency do not fit together.");
    }
    let mut said = Vec::new();
    if let Some(load) = load {
        let x = load.newton_metres() / rated_torque;
        let Some((low, high)) = current_between(rated, bracket, Ratio::from_fraction(x), r) else {
            return b.not_judged("Not assessed: with these nameplate values the arithmetic leaves its range.");
        };
        let (l, h) = (significant(low.amperes(), 3), significant(high.amperes(), 3));
        b.line(
            "current that the load takes, both ends of I_m",
            "I = √((I_m/r)² + (I_N² − I_m²)·(T/T_N·r)²)",
            format!(
                "T = {} N·m, T/T_N = {}, r = {}",
                significant(load.newton_metres(), 4),
                significant(x, 3),
                significant(r.fraction(), 3)
            ),
            format!("{l} to {h} A"),
        );
        b.figure("predicted current, least", low.amperes(), 3, "A");
        b.figure("predicted current, most", high.amperes(), 3, "A");
        if x > 1.1 {
            b.note("Above about 1.1 times rated load the prediction is low.");
        }
        said.push(format!("{} N·m takes {l} to {h} A", significant(load.newton_metres(), 3)));
    }
    if let Some(reading) = reading {
        let measured = Measured::direct(&reading);
        let Some((low, high)) = torque_between(rated, bracket, reading.value, r) else {
            return b.not_judged("Not assessed: with these nameplate values the arithmetic leaves its range.");
        };
        let shown = significant(measured.value, 3);
        let (l, h) = (significant(low.fraction() * 100.0, 3), significant(high.fraction() * 100.0, 3));
        b.figure("measured current", measured.value, 3, "A");
        b.figure("measured over rated current", measured.value / rated.amperes() * 100.0, 3, "%");
        b.line(
            "torque behind the measured current, both ends of I_m",
            "T/T_N = √(I² − (I_m/r)²)/(r·√(I_N² − I_m²))",
            format!("I = {shown} A, r = {}", significant(r.fraction(), 3)),
            format!("{l} to {h} % of rated torque"),
        );
        b.figure("torque behind it, least", low.fraction() * 100.0, 3, "%");
        b.figure("torque behind it, most", high.fraction() * 100.0, 3, "%");
        if let Some(doubt) = measured.doubt {
            b.note(format!("The measured current is uncertain: {doubt}."));
        }
        said.push(format!("the measured {shown} A means {l} to {h} % of rated torque"));
    }
    let mut summary = said.join("; ");
    if let Some(first) = summary.get(0..1).map(str::to_uppercase) {
        summary.replace_range(0..1, &first);
    }
    b.as_figure(format!("{summary}."))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::outcome::Verdict;

    fn of(load: Option<f64>, amperes: Option<f64>) -> Inputs {
        Inputs {
            reading: amperes.map(|a| Reading::bare(Current::from_amperes(a))),
            load_torque: load.map(Torque::from_newton_metres),
            frequency: Some(Frequency::from_hertz(60.0)),
            rated_frequency: Some(Frequency::from_hertz(60.0)),
            rated_current: Some(Current::from_amperes(25.415_483)),
            power_factor: Some(Ratio::from_fraction(0.895_415)),
            breakdown: Some(Ratio::from_fraction(2.707_525_1)),
            rated_power: Some(Power::from_watts(7460.0)),
            rated_speed: Some(Speed::from_rpm(1164.6)),
        }
    }

    fn figure(outcome: &Outcome, name: &str) -> f64 {
        outcome.figures.iter().find(|f| f.name == name).expect("present").value.parse().expect("number")
    }

    /// Fitzgerald Ex. 6.2 machine at half its rated power (C-NL-006): 14.937 A solved exactly lies in the span.
    #[test]
    fn the_solved_half_load_current_lies_in_the_span() {
        let outcome = check(&of(Some(61.169 / 2.0), None));
        assert_eq!(outcome.verdict, Verdict::Figure);
        let span = figure(&outcome, "predicted current, least")..=figure(&outcome, "predicted current, most");
        assert!(span.contains(&14.937), "{span:?}");
    }

    /// At rated torque both ends meet at rated current, whatever I_m (row NL-05).
    #[test]
    fn rated_torque_takes_rated_current() {
        let outcome = check(&of(Some(61.169), Some(25.415_483)));
        assert!((figure(&outcome, "predicted current, least") - 25.4).abs() < 0.06);
        assert!((figure(&outcome, "predicted current, most") - 25.4).abs() < 0.06);
        assert!((figure(&outcome, "torque behind it, least") - 100.0).abs() < 0.2);
        assert!(outcome.summary.starts_with("61.2 N·m takes"));
    }

    #[test]
    fn missing_and_impossible_are_named() {
        assert_eq!(check(&of(None, None)).missing[0].what, "load torque or motor current under load");
        let still = Inputs { rated_speed: Some(Speed::from_rpm(0.0)), ..of(Some(10.0), None) };
        assert_eq!(check(&still).verdict, Verdict::NotAssessed);
        assert!(check(&of(None, Some(0.0))).summary.starts_with("The measured 0 A"));
        assert_eq!(check(&of(Some(f64::NAN), None)).verdict, Verdict::NotAssessed);
    }
}
