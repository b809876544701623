//! # dielectric-absorption
//!
//! Insulation resistance after 60 s over that after 30 s, against what the trade usually expects.
//!
//! DAR = R(60 s)/R(30 s). At least 1.4: within. Below 1.0 the resistance falls while the voltage stands: outside.
//! Between: marginal. Common practice, no standard limit (row IR-10). Other pairs of times give a figure.
//! Small random-wound motors may come near 1 with sound insulation, since absorption dies away in seconds (IR-08).

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Duration, Resistance};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::insulation::{IR_08, IR_10};

/// Name in the catalogue.
pub const NAME: &str = "dielectric-absorption";

/// From here up: good.
pub const GOOD: Limit = Limit { name: "good dielectric absorption ratio", value: 1.4, unit: "1", source: IR_10 };
/// Below this: poor.
pub const POOR: Limit = Limit { name: "poor dielectric absorption ratio", value: 1.0, unit: "1", source: IR_10 };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// The earlier reading.
    pub early: Option<Reading<Resistance>>,
    /// The reading at 60 s, same test.
    pub late: Option<Reading<Resistance>>,
    /// When the earlier reading was taken; 30 s or 15 s.
    pub early_time: Option<Duration>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(IR_10);
    b.cite(IR_08);
    let usual = Duration::from_seconds(30.0);
    let time =
        b.assume(inputs.early_time, usual, "time of the earlier reading", "30 s, the usual pair with 60 s").seconds();
    if !(time > 0.0 && time < 60.0) {
        return b.not_judged("Not assessed: the earlier reading has to be taken between 0 and 60 s.");
    }
    let judged = (time - 30.0).abs() < 0.5;
    let seconds = significant(time, 2);
    if judged {
        b.limit("at least 1.4; below 1.0 is outside (common practice)");
        b.rule(LimitRule::linear("").at_least(GOOD.value, "≥ 1.4").tick(POOR.value, "1.0"));
        b.note("Common practice, no source: no standard limits this ratio.");
    }
    let early =
        plausible::positive_reading(&mut b, inputs.early.as_ref(), &format!("insulation resistance at {seconds} s"));
    let late = plausible::positive_reading(&mut b, inputs.late.as_ref(), "insulation resistance at 60 s");
    let (Some(early), Some(late)) = (early, late) else { return b.not_assessed() };

    let ratio = late.number() / early.number();
    let shown = significant(ratio, 3);
    b.figure("dielectric absorption ratio", ratio, 3, "");
    b.line(
        "dielectric absorption ratio",
        "DAR = R(60 s)/R(early)",
        format!(
            "{} MΩ / {} MΩ at {seconds} s",
            significant(late.number() / 1e6, 3),
            significant(early.number() / 1e6, 3)
        ),
        shown.clone(),
    );
    if !judged {
        return b.as_figure(format!(
            "Dielectric absorption ratio {shown} from {seconds} s to 60 s; only the pair 30 s and 60 s is judged."
        ));
    }
    let relative = |r: &Reading<Resistance>| (r.standard_uncertainty().map(|u| ratio * u / r.number()), r.doubt());
    let measured = Measured::combined(ratio, &[relative(&early), relative(&late)]);
    let verdict = match (measured.at_least(GOOD.value), measured.at_least(POOR.value)) {
        (Verdict::Within, _) => Verdict::Within,
        (_, Verdict::Outside) => Verdict::Outside,
        _ => Verdict::Marginal,
    };
    marking::mark(&mut b, &measured, format!("DAR {shown}"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("Dielectric absorption ratio {shown}: the resistance falls while the voltage stands. Look for moisture or dirt before energising."),
            Verdict::Marginal => format!("Dielectric absorption ratio {shown}: doubtful, or the tester's accuracy is in doubt. Judge it together with the insulation resistance; a small random-wound motor may come near 1."),
            _ => format!("Dielectric absorption ratio {shown}, at least 1.4."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(early: f64, late: f64) -> Inputs {
        let tester = Accuracy {
            percent_of_reading: 1.0,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let reading = |m: f64| Some(Reading::with(Resistance::from_ohms(m * 1e6), tester));
        Inputs { early: reading(early), late: reading(late), early_time: Some(Duration::from_seconds(30.0)) }
    }

    /// Common practice, no source (row IR-10).
    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of(100.0, 145.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(100.0, 140.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(100.0, 120.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(100.0, 100.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(100.0, 97.0)).verdict, Verdict::Outside);
    }

    #[test]
    fn other_times_are_a_figure_and_what_is_missing_is_named() {
        let other = Inputs { early_time: Some(Duration::from_seconds(15.0)), ..of(100.0, 97.0) };
        assert_eq!(check(&other).verdict, Verdict::Figure);
        let outcome = check(&Inputs { early: None, early_time: None, ..of(1.0, 1.0) });
        assert_eq!(outcome.missing[0].what, "insulation resistance at 30 s");
        assert_eq!(outcome.assumed.len(), 1);
        assert!(outcome.rule.is_some());
        assert_eq!(check(&of(0.0, 97.0)).verdict, Verdict::NotAssessed);
    }
}
