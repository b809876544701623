//! # supply-voltage
//!
//! Three line-to-line volts of the supply against nominal ±10 % (IEC 60038, EN 50160), or ±5 % where the site has chosen
//! that (ANSI C84.1), and the range of the drive's manual: the narrower end of both counts. Without a nominal voltage
//! the drive's range stands alone.

use crate::decision::Measured;
use crate::formulas::plausible::{positive, positive_reading};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Ratio, Voltage};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::supply::{SP_04, SUPPLY_RANGE_A};

/// Name in the catalogue.
pub const NAME: &str = "supply-voltage";

/// Deviation from nominal.
pub const DEVIATION: Limit =
    Limit { name: "deviation from nominal supply voltage", value: 0.10, unit: "1", source: SP_04 };

/// Deviation from nominal where the site has chosen the narrower range.
pub const NARROW: Limit =
    Limit { name: "deviation from nominal supply voltage, range A", value: 0.05, unit: "1", source: SUPPLY_RANGE_A };

/// By which published range the site judges its supply.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Range {
    /// ±10 %.
    TenPercent,
    /// ±5 %.
    FivePercent,
}

/// Names of the three readings.
pub const LINES: [&str; 3] = ["supply volts L1-L2", "supply volts L2-L3", "supply volts L3-L1"];

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Line volts L1-L2, L2-L3, L3-L1.
    pub lines: [Option<Reading<Voltage>>; 3],
    /// Nominal line volts.
    pub nominal: Option<Voltage>,
    /// Range chosen by the site; ±10 % until it has chosen.
    pub site_range: Option<Range>,
    /// Lowest line volts by the drive's manual.
    pub drive_lowest: Option<Voltage>,
    /// Highest line volts by the drive's manual.
    pub drive_highest: Option<Voltage>,
}

/// U/U_N − 1.
#[must_use]
pub fn deviation(measured: Voltage, nominal: Voltage) -> Ratio {
    Ratio::from_fraction(measured.volts() / nominal.volts() - 1.0)
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    let Some((low, high)) = limits(&mut b, inputs) else { return b.not_assessed() };
    if low >= high {
        return b.not_judged("Not assessed: the drive's range and the nominal supply voltage do not meet. Check both; the drive may be for another supply.");
    }
    let (low_shown, high_shown) = (significant(low, 4), significant(high, 4));
    b.limit(format!("{low_shown} to {high_shown} V between lines"));
    let mut rule = LimitRule::linear("V").between(low, low_shown.clone(), high, high_shown.clone());
    b.rule(rule.clone());
    let mut readings = Vec::new();
    for (reading, name) in inputs.lines.iter().zip(LINES) {
        readings.extend(positive_reading(&mut b, reading.as_ref(), name));
    }
    if readings.len() < 3 {
        return b.not_assessed();
    }
    let mut verdict = Verdict::Within;
    let mut worst = String::new();
    for (reading, name) in readings.iter().zip(LINES) {
        let measured = Measured::direct(reading);
        let one = measured.between(low, high);
        let shown = significant(measured.value, 4);
        rule = rule.reading(measured.value, measured.expanded, format!("{shown} V"), one);
        if one > verdict {
            verdict = one;
            worst = format!("{name}: {shown} V");
        }
        if let Some(doubt) = measured.doubt {
            b.note(format!("Marginal at best, {name}: {doubt}."));
        }
        if let Some(nominal) = inputs.nominal {
            let percent = deviation(reading.value, nominal).fraction() * 100.0;
            b.line(
                name,
                "U/U_N − 1",
                format!("{shown} V/{} V − 1", significant(nominal.volts(), 4)),
                format!("{} %", significant(percent, 3)),
            );
            b.figure(&format!("deviation {name}"), percent, 3, "%");
        } else {
            b.line(name, "U", String::new(), format!("{shown} V"));
        }
    }
    b.rule(rule);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("{worst}, outside {low_shown} to {high_shown} V. Ask the supply's operator or change the transformer tap before energising the drive."),
            Verdict::Marginal => format!("{worst}: the instrument cannot tell it from the limit, or its accuracy is in doubt ({low_shown} to {high_shown} V)."),
            _ => format!("All three lines lie between {low_shown} and {high_shown} V."),
        },
    )
}

/// The narrower ends of the site's range around nominal and of the drive's range.
fn limits(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<(f64, f64)> {
    let drive_only = inputs.drive_lowest.is_some() && inputs.drive_highest.is_some();
    let mut span = (f64::NEG_INFINITY, f64::INFINITY);
    if inputs.nominal.is_some() || !drive_only {
        let allowed = match inputs.site_range {
            Some(Range::FivePercent) => NARROW,
            Some(Range::TenPercent) | None => DEVIATION,
        };
        b.cite(allowed.source);
        let nominal = positive(b, inputs.nominal, "nominal supply voltage")?.volts();
        span = (nominal * (1.0 - allowed.value), nominal * (1.0 + allowed.value));
        let percent = significant(allowed.value * 100.0, 2);
        b.line(
            "supply",
            &format!("U_N ± {percent} %"),
            format!("{} V ± {percent} %", significant(nominal, 4)),
            format!("{} to {} V", significant(span.0, 4), significant(span.1, 4)),
        );
    }
    if let Some(lowest) = inputs.drive_lowest {
        let lowest = positive(b, Some(lowest), "lowest volts of the drive")?.volts();
        b.line("drive, lowest", "the maker's", String::new(), format!("{} V", significant(lowest, 4)));
        span.0 = span.0.max(lowest);
    }
    if let Some(highest) = inputs.drive_highest {
        let highest = positive(b, Some(highest), "highest volts of the drive")?.volts();
        b.line("drive, highest", "the maker's", String::new(), format!("{} V", significant(highest, 4)));
        span.1 = span.1.min(highest);
    }
    if inputs.drive_lowest.is_none() || inputs.drive_highest.is_none() {
        b.note("The drive's own range is not entered in full; its manual goes first.");
    }
    Some(span)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn supply(nominal: f64, lines: [f64; 3]) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 0.5,
            digits: 2.0,
            resolution: 0.1,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            lines: lines.map(|v| Some(Reading::with(Voltage::from_volts(v), meter))),
            nominal: Some(Voltage::from_volts(nominal)),
            ..Inputs::default()
        }
    }

    /// C-SP-011 and C-SP-012 (row SP-04): 419 V on 400 V is +4.75 %, within; 204 V on 230 V is −11.3 %, outside.
    #[test]
    fn published_deviations() {
        let good = check(&supply(400.0, [419.0, 400.0, 400.0]));
        assert_eq!((good.verdict, good.figures[0].value.as_str()), (Verdict::Within, "4.75"));
        let bad = check(&supply(230.0, [230.0, 204.0, 230.0]));
        assert_eq!((bad.verdict, bad.figures[1].value.as_str()), (Verdict::Outside, "-11.3"));
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        // 0.5 % of 440 V and two digits of 0.1 V make A = 2.4 V and U = 2.29 V.
        for (volts, verdict) in [
            (437.6, Verdict::Within),
            (440.0, Verdict::Marginal),
            (442.2, Verdict::Marginal),
            (442.5, Verdict::Outside),
        ] {
            assert_eq!(check(&supply(400.0, [400.0, 400.0, volts])).verdict, verdict, "{volts}");
        }
    }

    /// ANSI C84.1, range A (from memory): 375 V on 400 V is −6.25 %, which ±10 % lets pass.
    #[test]
    fn the_range_that_the_site_has_chosen_counts() {
        let low = supply(400.0, [400.0, 400.0, 375.0]);
        assert_eq!(check(&low).verdict, Verdict::Within);
        let narrow = check(&Inputs { site_range: Some(Range::FivePercent), ..low });
        assert_eq!((narrow.verdict, narrow.limit.as_str()), (Verdict::Outside, "380.0 to 420.0 V between lines"));
        assert!(narrow.sources.iter().any(|s| s.text.contains("C84.1")));
    }

    #[test]
    fn the_narrower_end_counts() {
        let drive = |low: f64, high: f64| Inputs {
            drive_lowest: Some(Voltage::from_volts(low)),
            drive_highest: Some(Voltage::from_volts(high)),
            ..supply(400.0, [420.0; 3])
        };
        assert_eq!(check(&drive(323.0, 528.0)).limit, "360.0 to 440.0 V between lines");
        assert_eq!(check(&drive(323.0, 415.0)).verdict, Verdict::Outside);
        assert_eq!(check(&Inputs { nominal: None, ..drive(323.0, 528.0) }).limit, "323.0 to 528.0 V between lines");
        assert_eq!(check(&drive(180.0, 264.0)).verdict, Verdict::NotAssessed);
    }

    #[test]
    fn the_limit_is_there_before_the_readings() {
        let outcome = check(&Inputs { lines: [None, None, None], ..supply(400.0, [0.0; 3]) });
        assert_eq!((outcome.missing.len(), outcome.rule.is_some()), (3, true));
        assert_eq!(check(&supply(400.0, [400.0, f64::NAN, 400.0])).missing[0].what, "supply volts L2-L3 above zero");
        let bare = Inputs {
            lines: [400.0; 3].map(|v| Some(Reading::bare(Voltage::from_volts(v)))),
            ..supply(400.0, [0.0; 3])
        };
        assert_eq!(check(&bare).verdict, Verdict::Marginal);
    }
}
