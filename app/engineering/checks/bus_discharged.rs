//! # bus-discharged
//!
//! Volts left on the DC bus after the waiting time: between its poles and, where entered, from each pole to earth.
//!
//! Limit 50 V; 60 V where the site applies IEC 60204-1; the lowest of that, of the drive's manual and of the site's own
//! counts. A reading that,
//! with its instrument's doubt, can lie above the limit is outside. Below it the check gives a figure and never a
//! verdict: waiting and one measurement do not prove a circuit dead. Measure by the drive's manual and local rules.

use crate::formulas::plausible::{finite_reading, positive};
use crate::formulas::residual_volts::{Residual, state_limit, weigh};
use crate::limit::Limit;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Capacitance, Voltage};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::bus::{DC_07, DC_11, DC_12};

/// Name in the catalogue.
pub const NAME: &str = "bus-discharged";

/// Residual volts by default, the lower of the published figures.
pub const USUAL: Limit = Limit { name: "residual voltage", value: 50.0, unit: "V", source: DC_11 };
/// Residual volts where the site applies IEC 60204-1.
pub const MACHINES: Limit = Limit { name: "residual voltage of a machine", value: 60.0, unit: "V", source: DC_07 };
/// Charge in coulombs below which IEC 60204-1 asks for nothing.
const EXEMPT_CHARGE: f64 = 60e-6;

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Between DC+ and DC−.
    pub between_poles: Option<Reading<Voltage>>,
    /// DC+ to protective earth.
    pub plus_to_earth: Option<Reading<Voltage>>,
    /// DC− to protective earth.
    pub minus_to_earth: Option<Reading<Voltage>>,
    /// Whether the site applies IEC 60204-1.
    pub site_applies_iec_60204: Option<bool>,
    /// Limit of the drive's manual.
    pub maker_limit: Option<Voltage>,
    /// A limit that the site names itself.
    pub site_limit: Option<Voltage>,
}

/// Whether IEC 60204-1 asks for a durable warning with the waiting time: volts five seconds after switching off above
/// 60 V, unless the capacitor holds no more than 60 µC then.
#[must_use]
pub fn needs_waiting_time_marked(after_five_seconds: Voltage, capacitance: Option<Capacitance>) -> bool {
    let volts = after_five_seconds.volts().abs();
    let exempt = capacitance.is_some_and(|c| c.farads() * volts <= EXEMPT_CHARGE);
    volts > MACHINES.value && !exempt
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(DC_12);
    b.note("A figure below the limit proves nothing by itself: test the tester before and after, on every pole, by the drive's manual and local rules.");
    let rule = if inputs.site_applies_iec_60204 == Some(true) { MACHINES } else { USUAL };
    b.cite(rule.source);
    let mut limit = rule.value;
    let mut words = rule.source.text;
    let own_limits =
        [(inputs.maker_limit, "limit of the drive's manual"), (inputs.site_limit, "limit named by the site")];
    for (own, whose) in own_limits {
        let Some(own) = own else { continue };
        let Some(own) = positive(&mut b, Some(own), whose) else { return b.not_assessed() };
        // Whoever names one may ask for less than the rule, never allow more.
        if own.volts() < limit {
            limit = own.volts();
            words = whose;
        } else {
            b.note(format!(
                "The {whose}, {} V, is not below another one; the lowest stands.",
                significant(own.volts(), 3)
            ));
        }
    }
    let limit_shown = significant(limit, 3);
    state_limit(&mut b, Voltage::from_volts(limit), words);
    let Some(between) = finite_reading(&mut b, inputs.between_poles.as_ref(), "DC bus volts between the poles") else {
        return b.not_assessed();
    };
    let mut taken = vec![("between the poles", between)];
    for (name, reading) in [("DC+ to earth", &inputs.plus_to_earth), ("DC− to earth", &inputs.minus_to_earth)] {
        if let Some(reading) = reading {
            let Some(reading) = finite_reading(&mut b, Some(reading), &format!("DC bus volts {name}")) else {
                return b.not_assessed();
            };
            taken.push((name, reading));
        } else {
            b.note(format!("No reading {name}."));
        }
    }
    let Residual { above, too_near, highest } = weigh(&mut b, Voltage::from_volts(limit), &taken, "", "DC bus ");
    if above.is_empty() {
        return b.as_figure(format!(
            "{} V left on the DC bus at most; the limit is {limit_shown} V. This is a figure, not a proof.",
            significant(highest, 3)
        ));
    }
    let doubtful = if too_near { ", or too near to tell" } else { "" };
    b.judged(
        Verdict::Outside,
        format!("{}: above {} V{doubtful}. The DC bus is live. Keep out, wait on, measure again; if it stays, a discharge path may be open: follow the drive's manual.", above.join(", "), limit_shown.trim_end_matches(".0")),
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn left(volts: f64) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 1.0,
            digits: 0.0,
            resolution: 0.1,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs { between_poles: Some(Reading::with(Voltage::from_volts(volts), meter)), ..Inputs::default() }
    }

    #[test]
    fn above_is_outside_and_below_never_more_than_a_figure() {
        // 1 % of 50 V makes U = 0.476 V.
        for (volts, verdict) in [
            (0.0, Verdict::Figure),
            (49.5, Verdict::Figure),
            (49.6, Verdict::Outside),
            (50.0, Verdict::Outside),
            (560.0, Verdict::Outside),
            (-560.0, Verdict::Outside),
        ] {
            assert_eq!(check(&left(volts)).verdict, verdict, "{volts}");
        }
        let bare = Inputs { between_poles: Some(Reading::bare(Voltage::from_volts(3.0))), ..Inputs::default() };
        assert_eq!(check(&bare).verdict, Verdict::Figure);
        assert!(check(&bare).rule.expect("ruler").bands.is_empty());
    }

    #[test]
    fn a_reading_clearly_above_is_called_so_and_a_near_one_is_not() {
        let said = |volts| check(&left(volts)).summary;
        assert!(said(560.0).starts_with("560 V between the poles: above 50 V. The DC bus is live."), "{}", said(560.0));
        assert!(said(49.8).contains("above 50 V, or too near to tell."), "{}", said(49.8));
    }

    /// IEC 60204-1:2016 clause 6.2.4 (row DC-07): 60 V; NFPA 70 460.6 (row DC-11): 50 V.
    #[test]
    fn the_rule_applied_is_the_lower_unless_the_site_says_otherwise() {
        let machine = Inputs { site_applies_iec_60204: Some(true), ..left(55.0) };
        assert_eq!((check(&left(55.0)).verdict, check(&machine).verdict), (Verdict::Outside, Verdict::Figure));
        let maker = |volts| Inputs { maker_limit: Some(Voltage::from_volts(volts)), ..left(45.0) };
        assert_eq!(check(&maker(42.0)).verdict, Verdict::Outside);
        assert_eq!(check(&maker(75.0)).limit, "not above 50.0 V");
        let both = |maker, site| {
            let outcome = check(&Inputs {
                maker_limit: Some(Voltage::from_volts(maker)),
                site_limit: Some(Voltage::from_volts(site)),
                ..left(28.0)
            });
            (outcome.verdict, outcome.limit, outcome.working[0].formula.clone())
        };
        let said = |words: &str| (Verdict::Outside, "not above 25.0 V".to_owned(), words.to_owned());
        assert_eq!(both(30.0, 25.0), said("limit named by the site"));
        assert_eq!(both(25.0, 30.0), said("limit of the drive's manual"));
    }

    /// C-DC-008 and C-DC-009 (IEC 60204-1:2016 clause 6.2.4).
    #[test]
    fn published_marking_rule() {
        assert!(needs_waiting_time_marked(Voltage::from_volts(350.0), None));
        assert!(!needs_waiting_time_marked(Voltage::from_volts(45.0), None));
        assert!(!needs_waiting_time_marked(Voltage::from_volts(350.0), Some(Capacitance::from_farads(0.1e-6))));
    }

    #[test]
    fn a_pole_to_earth_counts_and_a_missing_reading_is_named() {
        let earth = Inputs { minus_to_earth: Some(Reading::bare(Voltage::from_volts(-280.0))), ..left(2.0) };
        assert_eq!(check(&earth).verdict, Verdict::Outside);
        let none = check(&Inputs::default());
        assert_eq!(
            (none.verdict, none.limit.as_str(), none.rule.is_some()),
            (Verdict::NotAssessed, "not above 50.0 V", true)
        );
        assert_eq!(check(&left(f64::NAN)).verdict, Verdict::NotAssessed);
    }
}
