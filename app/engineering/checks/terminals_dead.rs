//! # terminals-dead
//!
//! Volts found at the drive's supply terminals and at its output terminals when it is proved dead: the highest of all
//! pairs and to protective earth.
//!
//! Limit 50 V, the upper end of extra-low voltage; a lower one that the site names goes first. A reading that, with its
//! instrument's doubt, can lie above the limit is outside: the terminals are live. Below it the check gives a figure
//! and never a verdict: a point without voltage proves neither another point nor the tester. The drive's manual, local
//! rules and licensed practice decide.

use crate::formulas::plausible::{finite_reading, positive};
use crate::formulas::residual_volts::{Residual, state_limit, weigh};
use crate::limit::Limit;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Voltage;
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::bus::DC_12;
use crate::sources::earthing::EXTRA_LOW_VOLTAGE;

/// Name in the catalogue.
pub const NAME: &str = "terminals-dead";

/// Volts above which a terminal counts as live.
pub const LIVE: Limit =
    Limit { name: "volts at a terminal proved dead", value: 50.0, unit: "V", source: EXTRA_LOW_VOLTAGE };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Highest at the supply terminals.
    pub supply: Option<Reading<Voltage>>,
    /// Highest at the output terminals.
    pub output: Option<Reading<Voltage>>,
    /// A lower limit that the site names.
    pub site_limit: Option<Voltage>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(EXTRA_LOW_VOLTAGE);
    b.cite(DC_12);
    b.note("A figure below the limit proves nothing by itself: test the tester before and after, on every point, by the drive's manual and local rules.");
    let (mut limit, mut words) = (LIVE.value, LIVE.source.text);
    if inputs.site_limit.is_some() {
        let Some(own) = positive(&mut b, inputs.site_limit, "limit named by the site") else { return b.not_assessed() };
        // The site may ask for less than the rule, never allow more.
        if own.volts() < limit {
            (limit, words) = (own.volts(), "limit named by the site");
        }
    }
    let limit_shown = significant(limit, 3);
    state_limit(&mut b, Voltage::from_volts(limit), words);
    let supply = finite_reading(&mut b, inputs.supply.as_ref(), "volts at the supply terminals");
    let output = finite_reading(&mut b, inputs.output.as_ref(), "volts at the output terminals");
    let taken: Vec<_> = [("supply terminals", supply), ("output terminals", output)]
        .into_iter()
        .filter_map(|(n, r)| Some((n, r?)))
        .collect();
    let Residual { above: live, too_near, highest } = weigh(&mut b, Voltage::from_volts(limit), &taken, "at the ", "");
    if !live.is_empty() {
        let doubtful = if too_near { ", or too near to tell" } else { "" };
        return b.judged(
            Verdict::Outside,
            format!("{}: above {} V{doubtful}. These terminals are live. Keep out and find where the voltage comes from: another feed, a bypass, a turning motor, a point that was not opened.", live.join(", "), limit_shown.trim_end_matches(".0")),
        );
    }
    if taken.len() < 2 {
        return b.not_assessed();
    }
    b.as_figure(format!(
        "{} V at the terminals at most; the limit is {limit_shown} V. This is a figure, not a proof.",
        significant(highest, 3)
    ))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn at(volts: f64) -> Reading<Voltage> {
        let meter = Accuracy {
            percent_of_reading: 1.0,
            digits: 0.0,
            resolution: 0.1,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Reading::with(Voltage::from_volts(volts), meter)
    }

    fn of(supply: f64, output: f64) -> Inputs {
        Inputs { supply: Some(at(supply)), output: Some(at(output)), site_limit: None }
    }

    /// 50 V alternating (IEC 60364-4-41, from memory); 1 % of 50 V makes U = 0.476 V.
    #[test]
    fn a_live_terminal_is_outside_and_a_dead_one_never_more_than_a_figure() {
        for (supply, output, verdict) in [
            (0.2, 0.3, Verdict::Figure),
            (49.5, 0.3, Verdict::Figure),
            (49.6, 0.3, Verdict::Outside),
            (0.2, 230.0, Verdict::Outside),
            (-400.0, 0.0, Verdict::Outside),
        ] {
            assert_eq!(check(&of(supply, output)).verdict, verdict, "{supply} {output}");
        }
        let said = check(&of(231.0, 0.3)).summary;
        assert!(said.starts_with("231 V at the supply terminals: above 50 V. These"), "{said}");
        assert!(check(&of(0.0, 0.0)).rule.expect("ruler").bands.is_empty());
    }

    #[test]
    fn the_site_may_ask_for_less_and_a_missing_point_is_named() {
        let site = |volts| Inputs { site_limit: Some(Voltage::from_volts(volts)), ..of(30.0, 1.0) };
        assert_eq!(
            (check(&site(25.0)).verdict, check(&site(60.0)).limit.as_str()),
            (Verdict::Outside, "not above 50.0 V")
        );
        let one = check(&Inputs { output: None, ..of(0.2, 0.0) });
        assert_eq!(
            (one.verdict, one.missing[0].what.as_str()),
            (Verdict::NotAssessed, "volts at the output terminals")
        );
        assert_eq!(
            check(&Inputs { output: None, ..of(230.0, 0.0) }).verdict,
            Verdict::Outside,
            "one live point is enough"
        );
        let none = check(&Inputs::default());
        assert_eq!((none.limit.as_str(), none.rule.is_some()), ("not above 50.0 V", true));
        assert_eq!(check(&of(f64::NAN, 0.0)).verdict, Verdict::NotAssessed);
    }
}
