//! # bus-voltage
//!
//! DC bus of a drive with a diode bridge, running light, against what its measured line volts make:
//! from 3√2/π·U − 3 % (mean of the bridge) to √2·U + 2 % (capacitor at the peak), U the mean of the three line volts.
//! The allowances are common practice. A lost phase hardly shows here: the capacitor keeps its peak. With an active
//! front end the bus is regulated and not assessed.

use std::f64::consts::SQRT_2;

use crate::decision::Measured;
use crate::formulas::marking::mark;
use crate::formulas::plausible::positive_reading;
use crate::formulas::rectifier;
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Voltage;
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::bus::{BUS_ALLOWANCE, DC_01, DC_02, DC_04};

use super::supply_voltage::LINES;

/// Name in the catalogue.
pub const NAME: &str = "bus-voltage";

/// How far below the mean of the bridge.
pub const BELOW: Limit = Limit { name: "below the bridge's mean", value: 0.03, unit: "1", source: BUS_ALLOWANCE };
/// How far above the peak.
pub const ABOVE: Limit = Limit { name: "above the peak", value: 0.02, unit: "1", source: BUS_ALLOWANCE };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// DC bus, as measured or as the drive shows it.
    pub bus: Option<Reading<Voltage>>,
    /// Line volts L1-L2, L2-L3, L3-L1, taken at the same time.
    pub lines: [Option<Reading<Voltage>>; 3],
    /// Whether the drive has an active front end.
    pub active_front_end: Option<bool>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    for source in [DC_01, DC_02, DC_04, BUS_ALLOWANCE] {
        b.cite(source);
    }
    if inputs.active_front_end == Some(true) {
        return b
            .not_judged("Not assessed: an active front end regulates the DC bus; compare it with the drive's manual.");
    }
    let mut lines = Vec::new();
    for (reading, name) in inputs.lines.iter().zip(LINES) {
        lines.extend(positive_reading(&mut b, reading.as_ref(), name));
    }
    let bus = positive_reading(&mut b, inputs.bus.as_ref(), "DC bus volts");
    if lines.len() < 3 {
        b.limit("3√2/π·U − 3 % to √2·U + 2 % of the measured line volts");
        return b.not_assessed();
    }
    let line = lines.iter().map(Reading::number).sum::<f64>() / 3.0;
    let (low_factor, high_factor) = (rectifier::MEAN * (1.0 - BELOW.value), SQRT_2 * (1.0 + ABOVE.value));
    let (low, high) = (line * low_factor, line * high_factor);
    let (low_shown, high_shown) = (significant(low, 4), significant(high, 4));
    b.limit(format!("{low_shown} to {high_shown} V dc at {} V between lines", significant(line, 4)));
    b.rule(LimitRule::linear("V").between(low, low_shown.clone(), high, high_shown.clone()));
    let shown_line = significant(line, 4);
    b.line("lowest", "3√2/π·U·0.97", format!("1.3505 × {shown_line} V × 0.97"), format!("{low_shown} V"));
    b.line("highest", "√2·U·1.02", format!("1.4142 × {shown_line} V × 1.02"), format!("{high_shown} V"));
    let Some(bus) = bus else { return b.not_assessed() };

    // The window moves with the line volts, so their doubt counts beside the bus reading's.
    let against = |factor: f64| {
        let mut terms: Vec<_> =
            lines.iter().map(|l| (l.standard_uncertainty().map(|u| u * factor / 3.0), l.doubt())).collect();
        terms.push((bus.standard_uncertainty(), bus.doubt()));
        Measured::combined(bus.number(), &terms)
    };
    let (at_low, at_high) = (against(low_factor), against(high_factor));
    let verdict = at_low.at_least(low).worse(at_high.at_most(high));
    let shown = significant(bus.number(), 4);
    b.figure("DC bus over line volts", bus.number() / line, 4, "");
    b.line("measured", "U_dc/U", format!("{shown} V/{shown_line} V"), significant(bus.number() / line, 4));
    mark(&mut b, &at_high, format!("{shown} V"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside if bus.number() < low => format!("DC bus {shown} V, below {low_shown} V. Isolate; look for a lost or loaded phase, a blown fuse, or a pre-charge that has not closed."),
            Verdict::Outside => format!("DC bus {shown} V, above {high_shown} V. Compare line volts and display with a second instrument; regeneration or a swell raises the bus."),
            Verdict::Marginal => format!("DC bus {shown} V: the instruments cannot tell it from {low_shown} to {high_shown} V, or their accuracy is in doubt."),
            _ => format!("DC bus {shown} V lies between {low_shown} and {high_shown} V."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn running(bus: f64, line: f64) -> Inputs {
        let exact = Accuracy {
            percent_of_reading: 0.05,
            digits: 0.0,
            resolution: 0.1,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            bus: Some(Reading::with(Voltage::from_volts(bus), exact)),
            lines: [line; 3].map(|v| Some(Reading::with(Voltage::from_volts(v), exact))),
            active_front_end: Some(false),
        }
    }

    /// Rows DC-01 and DC-02: at 400 V the bus lies between 540 and 566 V; 480 V: 648 and 679 V; 690 V: 932 and 976 V.
    #[test]
    fn published_windows_are_within() {
        for (line, low, high) in
            [(400.0, 540.0, 566.0), (480.0, 648.0, 679.0), (230.0, 311.0, 325.0), (690.0, 932.0, 976.0)]
        {
            assert_eq!(check(&running(low, line)).verdict, Verdict::Within);
            assert_eq!(check(&running(high, line)).verdict, Verdict::Within);
        }
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        // 540.19 × 0.97 = 523.98 and 565.69 × 1.02 = 577.00.
        for (bus, verdict) in [
            (524.6, Verdict::Within),
            (524.0, Verdict::Marginal),
            (523.0, Verdict::Outside),
            (576.2, Verdict::Within),
            (577.0, Verdict::Marginal),
            (578.0, Verdict::Outside),
        ] {
            assert_eq!(check(&running(bus, 400.0)).verdict, verdict, "{bus}");
        }
    }

    #[test]
    fn the_window_is_there_before_the_bus_and_an_active_front_end_has_none() {
        let outcome = check(&Inputs { bus: None, ..running(0.0, 400.0) });
        assert_eq!(outcome.limit, "524.0 to 577.0 V dc at 400.0 V between lines");
        assert_eq!((outcome.missing[0].what.as_str(), outcome.rule.is_some()), ("DC bus volts", true));
        let regulated = check(&Inputs { active_front_end: Some(true), ..running(650.0, 400.0) });
        assert_eq!(regulated.verdict, Verdict::NotAssessed);
        assert_eq!(check(&running(0.0, 400.0)).verdict, Verdict::NotAssessed);
        let shown = Inputs { bus: Some(Reading::bare(Voltage::from_volts(560.0))), ..running(0.0, 400.0) };
        assert_eq!(check(&shown).verdict, Verdict::Marginal);
    }
}
