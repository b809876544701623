//! # terminal-torque
//!
//! Torque to which the drive's power terminals were tightened, against the figure of its maker.
//!
//! Within the range that the maker gives; where it gives one figure, within 10 % of that (common practice, no source).
//! Without the maker's figure the torque is a figure to compare with later, and without a torque there is no verdict:
//! joints may be judged by their resistance instead.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Torque;
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::windings::TERMINAL_TORQUE;

/// Name in the catalogue.
pub const NAME: &str = "terminal-torque";

/// Deviation from the maker's figure.
pub const DEVIATION: Limit =
    Limit { name: "deviation from the maker's torque", value: 0.10, unit: "1", source: TERMINAL_TORQUE };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// At the supply terminals.
    pub input: Option<Reading<Torque>>,
    /// At the output terminals.
    pub output: Option<Reading<Torque>>,
    /// The maker's figure, or the low end of its range.
    pub stated: Option<Torque>,
    /// The high end, where the maker gives a range.
    pub stated_highest: Option<Torque>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(TERMINAL_TORQUE);
    b.note("The manual of drive, terminal or lug goes first.");
    let given = [("supply terminals", &inputs.input), ("output terminals", &inputs.output)];
    let mut taken = Vec::new();
    for (name, reading) in given {
        if reading.is_some() {
            let Some(reading) = plausible::positive_reading(&mut b, reading.as_ref(), &format!("torque of the {name}"))
            else {
                return b.not_assessed();
            };
            b.figure(&format!("torque, {name}"), reading.number(), 3, "N·m");
            taken.push((name, reading));
        }
    }
    let Some(stated) = inputs.stated else {
        return b.as_figure(if taken.is_empty() {
            "No torque entered, and no maker's figure to compare with.".to_owned()
        } else {
            "No maker's torque is on the drive's sheet; what was reached is kept as a figure.".to_owned()
        });
    };
    let Some(stated) = plausible::positive(&mut b, Some(stated), "the maker's torque") else { return b.not_assessed() };
    if inputs.stated_highest.is_some_and(|h| h.newton_metres() <= stated.newton_metres()) {
        b.need(None::<f64>, "the maker's highest torque, above the lowest");
        return b.not_assessed();
    }
    let (low, high, words) = match inputs.stated_highest {
        Some(highest) => (stated.newton_metres(), highest.newton_metres(), "the maker's range"),
        None => {
            let figure = stated.newton_metres();
            (
                figure * (1.0 - DEVIATION.value),
                figure * (1.0 + DEVIATION.value),
                "the maker's figure ± 10 % (common practice)",
            )
        }
    };
    let (low_shown, high_shown) = (significant(low, 3), significant(high, 3));
    b.limit(format!("{low_shown} to {high_shown} N·m, {words}"));
    b.rule(LimitRule::linear("N·m").between(low, format!("≥ {low_shown} N·m"), high, format!("≤ {high_shown} N·m")));
    b.line(
        "limit",
        words,
        format!("{} N·m", significant(stated.newton_metres(), 3)),
        format!("{low_shown} to {high_shown} N·m"),
    );
    if taken.is_empty() {
        return b.as_figure(format!("No torque entered; {low_shown} to {high_shown} N·m is asked for."));
    }
    let mut verdict = Verdict::Within;
    let mut said = Vec::new();
    for (name, reading) in &taken {
        let measured = Measured::direct(reading);
        let this = measured.between(low, high);
        verdict = verdict.worse(this);
        let shown = significant(measured.value, 3);
        marking::mark(&mut b, &measured, format!("{name} {shown}"), this);
        said.push(format!("{shown} N·m at the {name}"));
    }
    let said = said.join(", ");
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("{said}: outside {low_shown} to {high_shown} N·m. Isolate and tighten to the maker's torque; a terminal tightened too far may have to be renewed."),
            Verdict::Marginal => format!("{said}: closer to the ends of {low_shown} to {high_shown} N·m than the wrench can tell, or its accuracy is in doubt."),
            _ => format!("{said}; {low_shown} to {high_shown} N·m is asked for."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn at(newton_metres: f64) -> Option<Reading<Torque>> {
        let wrench = Accuracy {
            percent_of_reading: 4.0,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Some(Reading::with(Torque::from_newton_metres(newton_metres), wrench))
    }

    fn of(input: f64, output: f64, stated: f64) -> Inputs {
        Inputs {
            input: at(input),
            output: at(output),
            stated: Some(Torque::from_newton_metres(stated)),
            stated_highest: None,
        }
    }

    /// Common practice, no source: 10 % of 3.2 N·m is 2.88 to 3.52; a wrench of 4 % makes U = 0.12 N·m at 3.2 N·m.
    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of(3.2, 3.2, 3.2)).verdict, Verdict::Within);
        assert_eq!(check(&of(3.2, 3.45, 3.2)).verdict, Verdict::Marginal);
        let loose = check(&of(2.0, 3.2, 3.2));
        assert!(loose.verdict == Verdict::Outside && loose.summary.contains("2.00 N·m at the supply terminals"));
        assert_eq!(check(&of(3.2, 4.0, 3.2)).verdict, Verdict::Outside);
        let bare = Inputs { output: Some(Reading::bare(Torque::from_newton_metres(3.2))), ..of(3.2, 0.0, 3.2) };
        assert_eq!(check(&bare).verdict, Verdict::Marginal);
    }

    #[test]
    fn the_makers_range_goes_first_and_the_limit_is_there_before_the_torque() {
        let range = Inputs { stated_highest: Some(Torque::from_newton_metres(4.5)), ..of(4.2, 4.0, 3.2) };
        assert_eq!(check(&range).verdict, Verdict::Within);
        let before = check(&Inputs { input: None, output: None, ..of(0.0, 0.0, 3.2) });
        assert_eq!(before.limit, "2.88 to 3.52 N·m, the maker's figure ± 10 % (common practice)");
        assert!(before.verdict == Verdict::Figure && before.rule.is_some());
        assert_eq!(check(&Inputs { stated: None, ..of(3.0, 3.0, 0.0) }).verdict, Verdict::Figure);
        assert_eq!(check(&of(0.0, 3.2, 3.2)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&of(3.2, 3.2, f64::NAN)).verdict, Verdict::NotAssessed);
    }
}
