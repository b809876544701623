//! # joint-resistance
//!
//! Similar joints, compared with the lowest of them.
//!
//! R_i/R_min ≤ 1.5 (common practice, row WB-03). Only like joints of one kind and size belong together. A maker's
//! largest resistance, where one is given, goes first.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Resistance;
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::windings::JOINTS;

/// Name in the catalogue.
pub const NAME: &str = "joint-resistance";

/// Largest over lowest.
pub const OVER_LOWEST: Limit = Limit { name: "joint over the lowest", value: 1.5, unit: "1", source: JOINTS };

/// One joint.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Joint {
    /// Its label, for instance `L1 in`.
    pub label: String,
    /// Its resistance.
    pub reading: Option<Reading<Resistance>>,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Similar joints, two or more.
    pub joints: Vec<Joint>,
    /// The maker's own largest resistance.
    pub maker_maximum: Option<Resistance>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(JOINTS);
    let own = inputs.maker_maximum.filter(|m| m.ohms().is_finite() && m.ohms() > 0.0);
    if let Some(own) = own {
        let microhms = significant(own.ohms() * 1e6, 3);
        b.limit(format!("at most {microhms} µΩ, the maker's"));
        b.rule(LimitRule::linear("µΩ").at_most(own.ohms() * 1e6, format!("≤ {microhms} µΩ")));
        b.note("The maker's own limit is used.");
    } else {
        b.limit("at most 1.5 times the lowest of similar joints (common practice)");
        b.rule(LimitRule::linear("").at_most(OVER_LOWEST.value, "≤ 1.5 × lowest"));
    }
    let fewest = if own.is_some() { 1 } else { 2 };
    if inputs.joints.len() < fewest {
        let _ = b.need(None::<Resistance>, if own.is_some() { "a joint" } else { "two or more similar joints" });
    }
    let readings: Vec<_> = inputs
        .joints
        .iter()
        .map(|joint| {
            plausible::positive_reading(&mut b, joint.reading.as_ref(), &format!("resistance of joint {}", joint.label))
        })
        .collect();
    let known: Vec<(&str, &Reading<Resistance>)> =
        inputs.joints.iter().zip(&readings).filter_map(|(j, r)| Some((j.label.as_str(), r.as_ref()?))).collect();
    let Some(lowest) = known.iter().min_by(|x, y| x.1.number().total_cmp(&y.1.number())).copied() else {
        return b.not_assessed();
    };
    if known.len() < fewest {
        return b.not_assessed();
    }

    let mut verdict = Verdict::Within;
    let mut worst = ("", f64::NEG_INFINITY);
    let mut doubt = None;
    for (label, reading) in &known {
        let microhms = reading.number() * 1e6;
        let measured = if own.is_some() { Measured::scaled(reading, 1e6) } else { over(reading, lowest.1) };
        let limit = own.map_or(OVER_LOWEST.value, |m| m.ohms() * 1e6);
        // The lowest over itself is one, whatever its instrument: only its doubt counts.
        let this = measured.at_most(limit);
        verdict = verdict.worse(this);
        let (unit, shown) = (if own.is_some() { " µΩ" } else { "" }, significant(measured.value, 3));
        b.line(
            &format!("joint {label}"),
            if own.is_some() { "R" } else { "R/R_min" },
            if own.is_some() {
                String::new()
            } else {
                format!("{} µΩ / {} µΩ", significant(microhms, 3), significant(lowest.1.number() * 1e6, 3))
            },
            format!("{shown}{unit}"),
        );
        doubt = doubt.or_else(|| measured.doubt.clone());
        marking::mark(&mut b, &Measured { doubt: None, ..measured.clone() }, *label, this);
        if measured.value > worst.1 {
            worst = (label, measured.value);
        }
    }
    if let Some(doubt) = doubt {
        b.note(format!("Marginal at best: {doubt}."));
    }
    let (label, shown) = (worst.0, significant(worst.1, 3));
    let unit = if own.is_some() { "µΩ" } else { "times the lowest" };
    b.figure("highest joint", worst.1, 3, if own.is_some() { "µΩ" } else { "" });
    b.text_figure("highest joint is", label);
    if known.len() < inputs.joints.len() && verdict != Verdict::Outside {
        return b.not_assessed();
    }
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("Joint {label}: {shown} {unit}. Isolate, open, clean and remake it to the maker's torque, then measure again."),
            Verdict::Marginal => format!("Joint {label}: {shown} {unit}; the instrument cannot tell it from the limit, or its accuracy is in doubt."),
            _ => format!("Highest joint {label}: {shown} {unit}."),
        },
    )
}

/// A joint over the lowest, with the doubt of both.
fn over(reading: &Reading<Resistance>, lowest: &Reading<Resistance>) -> Measured {
    let ratio = reading.number() / lowest.number();
    if core::ptr::eq(reading, lowest) {
        return Measured { value: 1.0, expanded: 0.0, doubt: reading.doubt() };
    }
    let relative = |r: &Reading<Resistance>| (r.standard_uncertainty().map(|u| ratio * u / r.number()), r.doubt());
    Measured::combined(ratio, &[relative(reading), relative(lowest)])
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(microhms: &[f64]) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 0.5,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let joint = |(i, r): (usize, &f64)| Joint {
            label: format!("L{}", i + 1),
            reading: Some(Reading::with(Resistance::from_ohms(r * 1e-6), meter)),
        };
        Inputs { joints: microhms.iter().enumerate().map(joint).collect(), maker_maximum: None }
    }

    /// Common practice, no source (row WB-03).
    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of(&[50.0, 60.0, 74.0])).verdict, Verdict::Within);
        assert_eq!(check(&of(&[50.0, 60.0, 75.0])).verdict, Verdict::Marginal);
        let bad = check(&of(&[50.0, 60.0, 76.0]));
        assert!(bad.verdict == Verdict::Outside && bad.summary.starts_with("Joint L3"));
    }

    #[test]
    fn maker_missing_and_impossible() {
        let own = Inputs { maker_maximum: Some(Resistance::from_ohms(55e-6)), ..of(&[50.0, 60.0]) };
        assert_eq!(check(&own).verdict, Verdict::Outside);
        assert_eq!(check(&of(&[50.0])).missing[0].what, "two or more similar joints");
        let mut partial = of(&[50.0, 60.0]);
        partial.joints.push(Joint { label: "L3".to_owned(), reading: None });
        let outcome = check(&partial);
        assert_eq!(
            (outcome.verdict, outcome.missing[0].what.as_str()),
            (Verdict::NotAssessed, "resistance of joint L3")
        );
        assert!(outcome.rule.is_some());
        assert_eq!(check(&of(&[0.0, 60.0, f64::NAN])).verdict, Verdict::NotAssessed);
    }
}
