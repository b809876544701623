//! # supply-unbalance
//!
//! Unbalance of three line volts, by both definitions, against the limits of the drive's manual and the specification.
//!
//! Largest deviation from the mean over the mean (NEMA MG 1); negative over positive sequence (IEC 61000-4-30):
//! √((1 − √(3 − 6β))/(1 + √(3 − 6β))), β = ΣU⁴/(ΣU²)². The two differ by up to 15.5 % and are never compared with each
//! other's limit; a limit that does not say which it means is compared with the larger. Of two limits the worse verdict
//! counts. Neither limit: assumed 1 % negative sequence, the lowest published (IEC 60034-1).
//! With a bypass: the load factor of the line-fed motor after MG 1, and outside beyond 5 %.

use crate::decision::Measured;
use crate::formulas::plausible::{positive, positive_reading};
use crate::formulas::triple::spread;
use crate::formulas::unbalance::{load_factor, negative_sequence};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Ratio, Voltage};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::runs::UB_01;
use crate::sources::supply::{UB_02, UB_04, UB_08};

use super::supply_voltage::LINES;

/// Name in the catalogue.
pub const NAME: &str = "supply-unbalance";

/// Negative sequence accepted where the drive's manual is silent.
pub const USUAL: Limit = Limit { name: "negative-sequence unbalance", value: 0.01, unit: "1", source: UB_08 };
/// Largest deviation beyond which a line-fed motor is not to run.
pub const LINE_FED: Limit =
    Limit { name: "largest deviation for a line-fed motor", value: 0.05, unit: "1", source: UB_04 };

/// By which definition a limit is meant.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Definition {
    /// Largest deviation from the mean (NEMA).
    LargestDeviation,
    /// Negative over positive sequence (IEC).
    NegativeSequence,
    /// Not said: the larger of the two is compared.
    Larger,
}

/// A limit of the drive's manual.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct DriveLimit {
    /// The number: 0.03 for 3 %.
    pub value: Ratio,
    /// By which definition.
    pub definition: Definition,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Line volts L1-L2, L2-L3, L3-L1.
    pub lines: [Option<Reading<Voltage>>; 3],
    /// The limit of the drive's manual.
    pub drive_limit: Option<DriveLimit>,
    /// The limit of the specification.
    pub specified_limit: Option<DriveLimit>,
    /// Whether the motor can run straight from the line.
    pub bypass: Option<bool>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(UB_01);
    b.cite(UB_02);
    let Some(limits) = limits(&mut b, inputs) else { return b.not_assessed() };
    let said: Vec<String> = limits
        .iter()
        .map(|(l, percent)| format!("{} at most {} %", words(l.definition), significant(*percent, 3)))
        .collect();
    b.limit(said.join("; "));
    // Until the volts are read the smaller number is the one to keep.
    if let Some((_, percent)) = limits.iter().min_by(|a, b| a.1.total_cmp(&b.1)) {
        b.rule(ruler(*percent));
    }
    let mut readings = Vec::new();
    for (reading, name) in inputs.lines.iter().zip(LINES) {
        readings.extend(positive_reading(&mut b, reading.as_ref(), name));
    }
    let Ok(readings) = <[Reading<Voltage>; 3]>::try_from(readings) else { return b.not_assessed() };
    let Some(found) = spread(&readings) else { return b.not_assessed() };

    let negative = sequence(&readings);
    let listed = readings.iter().map(|r| significant(r.number(), 4)).collect::<Vec<_>>().join(", ");
    b.line("mean", "(U₁ + U₂ + U₃)/3", format!("{listed} V"), format!("{} V", significant(found.mean, 5)));
    b.line(
        "largest deviation",
        "max|U − mean|/mean",
        format!(
            "|{} − {}|/{}",
            significant(readings[found.farthest].number(), 4),
            significant(found.mean, 5),
            significant(found.mean, 5)
        ),
        format!("{} %", significant(found.largest.value, 3)),
    );
    b.line(
        "negative sequence",
        "√((1 − √(3 − 6β))/(1 + √(3 − 6β))), β = ΣU⁴/(ΣU²)²",
        format!("{listed} V"),
        format!("{} %", significant(negative.value, 3)),
    );
    b.figure("largest deviation (NEMA)", found.largest.value, 3, "%");
    b.figure("negative sequence (IEC)", negative.value, 3, "%");
    let by = |definition| match definition {
        Definition::LargestDeviation => found.largest.clone(),
        Definition::NegativeSequence => negative.clone(),
        Definition::Larger if negative.value > found.largest.value => negative.clone(),
        Definition::Larger => found.largest.clone(),
    };
    let worst = limits.iter().max_by(|(one, a), (other, b)| {
        let (one, other) = (by(one.definition), by(other.definition));
        let verdicts = one.at_most(*a).cmp(&other.at_most(*b));
        verdicts.then((one.value / a).total_cmp(&(other.value / b)))
    });
    let Some((limit, allowed)) = worst else { return b.not_assessed() };
    let (measured, allowed) = (by(limit.definition), *allowed);
    let (words, allowed_shown) = (words(limit.definition), significant(allowed, 3));
    b.rule(ruler(allowed));
    if let Some(doubt) = &measured.doubt {
        b.note(format!("Marginal at best: {doubt}."));
    }
    let mut verdict = measured.at_most(allowed);
    let shown = significant(measured.value, 3);
    let mut summary = match verdict {
        Verdict::Outside => format!(
            "{words} {shown} %, above {allowed_shown} %. Look for single-phase load or a bad joint ahead of the drive; the drive's input currents will be far more unequal."
        ),
        Verdict::Marginal => format!(
            "{words} {shown} %: the instrument cannot tell it from the {allowed_shown} % limit, or its accuracy is in doubt."
        ),
        _ => format!("{words} {shown} %, at most {allowed_shown} %."),
    };
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(measured.value, measured.expanded, format!("{shown} %"), verdict));
    }
    if inputs.bypass == Some(true) {
        b.cite(UB_04);
        let line_fed = found.largest.at_most(LINE_FED.value * 100.0);
        match load_factor(Ratio::from_fraction(found.largest.value / 100.0)) {
            Some(factor) => {
                b.figure("load factor on bypass", factor.fraction(), 3, "");
                summary.push_str(&format!(
                    " On bypass load the motor to at most {} of its rating.",
                    significant(factor.fraction(), 2)
                ));
            }
            None => summary.push_str(" Beyond 5 % by the largest deviation the motor is not to run on bypass."),
        }
        // Below five percent the load factor is the answer; near and beyond it the motor's rule counts beside the drive's.
        if line_fed == Verdict::Marginal {
            summary.push_str(" The instrument cannot tell whether the 5 % for a line-fed motor hold.");
        }
        verdict = verdict.worse(line_fed);
    }
    b.judged(verdict, summary)
}

/// The limits that hold, each with its percent; the assumed one where neither manual nor specification names any.
fn limits(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<Vec<(DriveLimit, f64)>> {
    let mut entered: Vec<DriveLimit> = inputs.drive_limit.into_iter().chain(inputs.specified_limit).collect();
    if entered.is_empty() {
        b.cite(UB_08);
        let usual = DriveLimit { value: Ratio::from_fraction(USUAL.value), definition: Definition::NegativeSequence };
        entered.push(b.assume(
            None,
            usual,
            "unbalance limit of the drive's manual",
            "1 % negative sequence, the lowest published (IEC 60034-1, long run)",
        ));
    }
    entered
        .into_iter()
        .map(|l| Some((l, positive(b, Some(l.value), "unbalance limit above zero")?.fraction() * 100.0)))
        .collect()
}

fn ruler(percent: f64) -> LimitRule {
    LimitRule::linear("%").at_most(percent, format!("≤ {} %", significant(percent, 3)))
}

const fn words(definition: Definition) -> &'static str {
    match definition {
        Definition::LargestDeviation => "Largest deviation from the mean",
        Definition::NegativeSequence => "Negative sequence",
        Definition::Larger => "Unbalance by the larger of both definitions",
    }
}

/// Negative sequence in percent, with what the readings' doubts do to it.
fn sequence(readings: &[Reading<Voltage>; 3]) -> Measured {
    let volts = [readings[0].number(), readings[1].number(), readings[2].number()];
    let of = |volts: [f64; 3]| negative_sequence(volts.map(Voltage::from_volts)).fraction() * 100.0;
    let middle = of(volts);
    // Near balance the slope has a kink, so each reading is moved by its own uncertainty, both ways.
    let terms: Vec<_> = readings
        .iter()
        .enumerate()
        .map(|(i, reading)| {
            let moved = |by: f64| {
                let mut other = volts;
                other[i] += by;
                (of(other) - middle).abs()
            };
            (reading.standard_uncertainty().map(|u| moved(u).max(moved(-u))), reading.doubt())
        })
        .collect();
    Measured::combined(middle, &terms)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn lines(volts: [f64; 3]) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 0.1,
            digits: 0.0,
            resolution: 0.1,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs { lines: volts.map(|v| Some(Reading::with(Voltage::from_volts(v), meter))), ..Inputs::default() }
    }

    fn manual(percent: f64, definition: Definition) -> Option<DriveLimit> {
        Some(DriveLimit { value: Ratio::from_fraction(percent / 100.0), definition })
    }

    /// C-UB-001: Hubert, Ex. 5.14 (2.58 %); C-UB-005: 1.61 %, whose printed answer overlooks the lower deviation.
    #[test]
    fn published_unbalances() {
        for (volts, nema, negative) in
            [([460.0, 455.0, 440.0], "2.58", "2.65"), ([400.0, 395.0, 388.0], "1.61", "1.76")]
        {
            let outcome = check(&lines(volts));
            assert_eq!((outcome.figures[0].value.as_str(), outcome.figures[1].value.as_str()), (nema, negative));
            assert_eq!((outcome.verdict, outcome.assumed.len()), (Verdict::Outside, 1));
        }
    }

    #[test]
    fn at_just_inside_and_just_outside_by_the_named_definition() {
        let measured = |percent, definition| {
            check(&Inputs { drive_limit: manual(percent, definition), ..lines([460.0, 455.0, 440.0]) }).verdict
        };
        assert_eq!(measured(3.0, Definition::LargestDeviation), Verdict::Within);
        assert_eq!(measured(2.6, Definition::LargestDeviation), Verdict::Marginal);
        assert_eq!(measured(2.4, Definition::LargestDeviation), Verdict::Outside);
        assert_eq!(measured(2.65, Definition::NegativeSequence), Verdict::Marginal);
        assert_eq!(check(&lines([400.0; 3])).verdict, Verdict::Within);
    }

    /// Hubert, Ex. 5.14 (C-UB-001): 2.58 % largest deviation, 2.65 % negative sequence.
    #[test]
    fn the_specification_counts_beside_the_manual() {
        let both = |drive: f64, specified: f64| {
            check(&Inputs {
                drive_limit: manual(drive, Definition::LargestDeviation),
                specified_limit: manual(specified, Definition::Larger),
                ..lines([460.0, 455.0, 440.0])
            })
        };
        assert_eq!(both(3.0, 4.0).verdict, Verdict::Within);
        for (drive, specified) in [(3.0, 2.0), (2.0, 3.0)] {
            let outcome = both(drive, specified);
            assert_eq!(outcome.verdict, Verdict::Outside);
            assert!(outcome.summary.contains("above 2.00 %"), "{}", outcome.summary);
        }
        assert!(both(3.0, 2.0).limit.contains("at most 3.00 %") && both(3.0, 2.0).limit.contains("at most 2.00 %"));
        let unsaid = Inputs { drive_limit: manual(2.62, Definition::Larger), ..lines([460.0, 455.0, 440.0]) };
        assert!(check(&unsaid).summary.contains("2.65 %"), "{}", check(&unsaid).summary);
    }

    /// C-UB-008 and C-UB-009 (NEMA MG 1 figure 14-1): 0.88 at 3 %, not to run beyond 5 %.
    #[test]
    fn the_bypass_has_its_own_rule() {
        let three = Inputs {
            bypass: Some(true),
            drive_limit: manual(4.0, Definition::LargestDeviation),
            ..lines([400.0, 388.0, 412.0])
        };
        let outcome = check(&three);
        assert_eq!(outcome.figures[2].value, "0.880");
        assert_eq!(outcome.verdict, Verdict::Within);
        let bad = Inputs {
            bypass: Some(true),
            drive_limit: manual(10.0, Definition::LargestDeviation),
            ..lines([400.0, 378.0, 422.0])
        };
        assert_eq!(check(&bad).verdict, Verdict::Outside);
        assert_eq!(check(&Inputs { bypass: Some(false), ..bad.clone() }).verdict, Verdict::Within);
        let near = Inputs { lines: lines([400.0, 380.0, 420.0]).lines, ..bad };
        assert_eq!(check(&near).verdict, Verdict::Marginal);
    }

    #[test]
    fn the_limit_is_there_before_the_readings() {
        let outcome = check(&Inputs::default());
        assert_eq!(outcome.limit, "Negative sequence at most 1.00 %");
        assert_eq!((outcome.missing.len(), outcome.rule.is_some()), (3, true));
        assert_eq!(check(&lines([400.0, 0.0, 400.0])).verdict, Verdict::NotAssessed);
        assert_eq!(
            check(&Inputs { drive_limit: manual(f64::NAN, Definition::NegativeSequence), ..lines([400.0; 3]) }).verdict,
            Verdict::NotAssessed
        );
    }
}
