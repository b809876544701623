//! # insulation-test-voltage
//!
//! The direct voltage chosen on the insulation tester against the span for the motor's rated voltage.
//!
//! Up to 1000 V rated (not included): 500 V. To 2500 V: 500 to 1000 V. To 5000 V: 1000 to 2500 V.
//! To 12 000 V: 2500 to 5000 V. Above: 5000 to 10 000 V. Source: IEEE 43-2013, table 1 (row IR-01).
//! The setting of the tester is taken as it stands. The motor maker's test voltage goes first.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Voltage;
use crate::rounding::significant;
use crate::sources::insulation::{IR_01, IR_18};

/// Name in the catalogue.
pub const NAME: &str = "insulation-test-voltage";

/// Rated volts up to which (included, except the first) a span of test volts holds.
const SPANS: [(f64, f64, f64); 4] =
    [(1000.0, 500.0, 500.0), (2500.0, 500.0, 1000.0), (5000.0, 1000.0, 2500.0), (12_000.0, 2500.0, 5000.0)];
/// The span above the last row.
const ABOVE: (f64, f64) = (5000.0, 10_000.0);

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Direct voltage set on the tester.
    pub test_voltage: Option<Voltage>,
    /// Rated line-to-line voltage of the motor.
    pub rated_voltage: Option<Voltage>,
    /// The motor maker's own test voltage.
    pub maker_test_voltage: Option<Voltage>,
}

/// Smallest and largest test voltage for a rated voltage; `None` unless it is above zero.
#[must_use]
pub fn span(rated: Voltage) -> Option<(Voltage, Voltage)> {
    let volts = rated.volts();
    if !(volts.is_finite() && volts > 0.0) {
        return None;
    }
    let (low, high) =
        match SPANS.iter().enumerate().find(|(i, row)| if *i == 0 { volts < row.0 } else { volts <= row.0 }) {
            Some((_, row)) => (row.1, row.2),
            None => ABOVE,
        };
    Some((Voltage::from_volts(low), Voltage::from_volts(high)))
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(IR_01);
    b.cite(IR_18);
    b.note("Disconnect the drive first: no insulation tester on drive terminals.");
    b.note("The motor maker's own limit goes first where there is one.");
    let Some((low, high)) = limits(&mut b, inputs) else {
        let _ = b.need(inputs.test_voltage, "insulation test voltage");
        return b.not_assessed();
    };
    let words = if low < high { format!("{low:.0} to {high:.0} V dc") } else { format!("{high:.0} V dc") };
    b.limit(words.clone());
    b.rule(LimitRule::linear("V").between(low, format!("≥ {low:.0} V"), high, format!("≤ {high:.0} V")));
    let Some(set) = plausible::positive(&mut b, inputs.test_voltage, "insulation test voltage") else {
        return b.not_assessed();
    };
    let volts = set.volts();
    let shown = significant(volts, 4);
    let measured = Measured::exact(volts);
    let verdict = measured.between(low, high);
    b.figure("test voltage", volts, 4, "V");
    b.line("set on the tester", "U_test", format!("{shown} V"), format!("{words} asked for"));
    marking::mark(&mut b, &measured, format!("{shown} V"), verdict);
    let summary = if verdict == Verdict::Within {
        format!("Test voltage {shown} V, as asked for ({words}).")
    } else if volts > high {
        format!(
            "Test voltage {shown} V is above {words}: it may harm the winding. Set the tester to {words} and repeat."
        )
    } else {
        format!(
            "Test voltage {shown} V is below {words}: the reading proves little. Set the tester to {words} and repeat."
        )
    };
    b.judged(verdict, summary)
}

/// Low and high end in volts with their line of working.
fn limits(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<(f64, f64)> {
    if let Some(own) = inputs.maker_test_voltage {
        let own = plausible::positive(b, Some(own), "the maker's test voltage")?.volts();
        b.line("limit", "the maker's", String::new(), format!("{} V", significant(own, 4)));
        return Some((own, own));
    }
    let rated = plausible::positive(b, inputs.rated_voltage, "rated motor voltage")?;
    let (low, high) = span(rated)?;
    b.line(
        "limit",
        "span for the rated voltage",
        format!("{} V rated", significant(rated.volts(), 4)),
        format!("{:.0} to {:.0} V dc", low.volts(), high.volts()),
    );
    Some((low.volts(), high.volts()))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(rated: f64, test: f64) -> Inputs {
        let volts = |v| Some(Voltage::from_volts(v));
        Inputs { test_voltage: volts(test), rated_voltage: volts(rated), maker_test_voltage: None }
    }

    /// IEEE 43-2013 table 1 (row IR-01): C-IR-012, C-IR-013, C-IR-014 and both sides of each step.
    #[test]
    fn spans_are_the_published_ones() {
        for (rated, low, high) in [
            (460.0, 500.0, 500.0),
            (999.9, 500.0, 500.0),
            (1000.0, 500.0, 1000.0),
            (2300.0, 500.0, 1000.0),
            (4160.0, 1000.0, 2500.0),
            (12_000.0, 2500.0, 5000.0),
            (13_800.0, 5000.0, 10_000.0),
        ] {
            let found = span(Voltage::from_volts(rated)).expect("above zero");
            assert_eq!((found.0.volts(), found.1.volts()), (low, high), "{rated}");
        }
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of(460.0, 500.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(460.0, 1000.0)).verdict, Verdict::Outside);
        assert_eq!(check(&of(460.0, 250.0)).verdict, Verdict::Outside);
        assert_eq!(check(&of(2300.0, 999.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(2300.0, 1001.0)).verdict, Verdict::Outside);
    }

    #[test]
    fn the_maker_goes_first_and_what_is_missing_is_named() {
        let own = Inputs { maker_test_voltage: Some(Voltage::from_volts(1000.0)), ..of(460.0, 1000.0) };
        assert_eq!(check(&own).verdict, Verdict::Within);
        let outcome = check(&Inputs { test_voltage: None, ..of(460.0, 0.0) });
        assert_eq!(outcome.missing[0].what, "insulation test voltage");
        assert_eq!(outcome.limit, "500 V dc");
        assert!(outcome.rule.is_some());
        assert_eq!(check(&of(-400.0, 500.0)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&of(f64::NAN, 500.0)).verdict, Verdict::NotAssessed);
    }
}
