//! # overload-setting
//!
//! The motor overload current set in the drive, or on a separate device, against the motor's nameplate.
//!
//! Setting ≤ rated current (common practice, row OL-08; on a drive the service factor counts as 1.0, row MN-15).
//! Where the site applies NFPA 70 430.32: ≤ 125 % with service factor 1.15 and above or marked rise up to 40 K,
//! else 115 %; 140 % or 130 % when the motor will not start with that (row MN-14). The maker's maximum goes first.
//! A trip class is shown with its meaning: from cold at 7.2 times the setting (IEC, OL-02), 6 times (NEMA, OL-05).

use crate::decision::Measured;
use crate::formulas::trip_class::TripClass;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Current, Duration, Ratio, TemperatureRise};
use crate::rounding::significant;
use crate::sources::settings::{MN_14, MN_15, OL_02, OL_05, OL_07, RATED_OVERLOAD};

/// Name in the catalogue.
pub const NAME: &str = "overload-setting";

/// Plain rule.
pub const RATED: Limit =
    Limit { name: "overload setting over rated current", value: 1.0, unit: "1", source: RATED_OVERLOAD };
/// NFPA 70, service factor 1.15 and above or marked rise up to 40 K.
pub const GENEROUS: Limit = Limit { name: "430.32(A)(1), higher", value: 1.25, unit: "1", source: MN_14 };
/// NFPA 70, all other motors.
pub const STRICT: Limit = Limit { name: "430.32(A)(1), lower", value: 1.15, unit: "1", source: MN_14 };
/// NFPA 70, will not start, higher.
pub const GENEROUS_START: Limit = Limit { name: "430.32(C), higher", value: 1.40, unit: "1", source: MN_14 };
/// NFPA 70, will not start, lower.
pub const STRICT_START: Limit = Limit { name: "430.32(C), lower", value: 1.30, unit: "1", source: MN_14 };

/// Which rule the site applies.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Rule {
    /// Not above rated current.
    RatedCurrent,
    /// NFPA 70 430.32.
    Nfpa70,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Overload current as set.
    pub setting: Option<Current>,
    /// Rated motor current.
    pub rated_current: Option<Current>,
    /// Rule the site applies.
    pub rule: Option<Rule>,
    /// Service factor on the plate.
    pub service_factor: Option<Ratio>,
    /// Temperature rise marked on the plate.
    pub marked_rise: Option<TemperatureRise>,
    /// Whether the motor was seen not to start with the ordinary setting.
    pub will_not_start: Option<bool>,
    /// Trip class as set.
    pub trip_class: Option<TripClass>,
    /// Predicted or measured time to accelerate.
    pub acceleration_time: Option<Duration>,
    /// The maker's own maximum.
    pub maker_maximum: Option<Current>,
}

/// The NFPA 70 430.32 factor; either condition is enough for the higher one.
#[must_use]
pub fn nfpa_factor(service_factor: Option<Ratio>, marked_rise: Option<TemperatureRise>, will_not_start: bool) -> Limit {
    let generous = service_factor.is_some_and(|s| s.fraction() >= 1.15 - 1e-9)
        || marked_rise.is_some_and(|r| r.kelvins() <= 40.0 && r.kelvins() > 0.0);
    match (generous, will_not_start) {
        (true, false) => GENEROUS,
        (false, false) => STRICT,
        (true, true) => GENEROUS_START,
        (false, true) => STRICT_START,
    }
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(OL_07);
    b.note("An overload that sees current only does not see lost cooling at low speed.");
    let maximum = maximum(&mut b, inputs);
    if let Some(maximum) = maximum {
        let shown = significant(maximum, 4);
        b.limit(format!("at most {shown} A"));
        b.rule(LimitRule::linear("A").at_most(maximum, format!("≤ {shown} A")));
    }
    let setting = plausible::positive(&mut b, inputs.setting, "overload setting");
    if let Some(class) = inputs.trip_class {
        class_figures(&mut b, class, inputs.acceleration_time);
    }
    let (Some(maximum), Some(setting)) = (maximum, setting) else { return b.not_assessed() };

    let amperes = setting.amperes();
    let (shown, limit) = (significant(amperes, 4), significant(maximum, 4));
    b.figure("overload setting", amperes, 4, "A");
    if let Some(rated) = inputs.rated_current.filter(|r| r.amperes() > 0.0) {
        b.figure("setting over rated current", amperes / rated.amperes() * 100.0, 3, "%");
        if amperes < 0.8 * rated.amperes() {
            b.note("The setting is below 80 % of rated current: the motor may trip before it reaches its rated load.");
        }
    }
    let verdict = if marking::up_to(amperes, maximum) { Verdict::Within } else { Verdict::Outside };
    marking::mark(&mut b, &Measured::exact(amperes), format!("{shown} A"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!(
                "Overload set at {shown} A, above {limit} A: the motor is not protected. Set it to {limit} A or less."
            ),
            _ => format!("Overload set at {shown} A, at most {limit} A."),
        },
    )
}

/// The largest setting in amperes with its line of working.
fn maximum(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<f64> {
    if let Some(own) = inputs.maker_maximum {
        let own = plausible::positive(b, Some(own), "the maker's maximum setting")?;
        b.line("limit", "the maker's", String::new(), format!("{} A", significant(own.amperes(), 4)));
        b.note("The maker's own maximum is used.");
        return Some(own.amperes());
    }
    let rule = b.assume(
        inputs.rule,
        Rule::RatedCurrent,
        "rule for the overload setting",
        "not above rated current, the cautious one",
    );
    let rated = plausible::positive(b, inputs.rated_current, "rated motor current");
    let (factor, words) = match rule {
        Rule::RatedCurrent => {
            b.cite(MN_15);
            (RATED, "setting at most rated current; a service factor counts as 1.0 on a drive")
        }
        Rule::Nfpa70 => {
            if !inputs.marked_rise.is_some_and(|r| r.kelvins() > 0.0 && r.kelvins() <= 40.0) {
                let _ =
                    b.assume(inputs.service_factor, Ratio::from_fraction(1.0), "service factor", "1.0, none entered");
            }
            (
                nfpa_factor(inputs.service_factor, inputs.marked_rise, inputs.will_not_start == Some(true)),
                "NFPA 70 430.32",
            )
        }
    };
    b.cite(factor.source);
    let rated = rated?.amperes();
    let maximum = rated * factor.value;
    b.line(
        words,
        "I_set ≤ k·I_N",
        format!("{} × {} A", significant(factor.value, 3), significant(rated, 4)),
        format!("{} A", significant(maximum, 4)),
    );
    Some(maximum)
}

/// What the class means, and whether an acceleration could meet it.
fn class_figures(b: &mut OutcomeBuilder, class: TripClass, acceleration: Option<Duration>) {
    b.cite(OL_02);
    b.cite(OL_05);
    let (low, high) = class.span();
    b.text_figure("trip class", class.words());
    let (low, high) = (significant(low.seconds(), 2), significant(high.seconds(), 2));
    b.line(
        "trip class",
        "from cold at 7.2 times the setting (IEC)",
        format!("class {}", class.words()),
        format!("more than {low} s, up to {high} s"),
    );
    b.note("NEMA tests its classes at 6 times the setting: compare like with like.");
    if let Some(seconds) = acceleration.map(Duration::seconds).filter(|s| *s > class.span().0.seconds()) {
        b.note(format!(
            "Acceleration takes {} s; in bypass, at locked-rotor current, class {} may trip first.",
            significant(seconds, 3),
            class.words()
        ));
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(setting: f64, rated: f64) -> Inputs {
        Inputs {
            setting: Some(Current::from_amperes(setting)),
            rated_current: Some(Current::from_amperes(rated)),
            rule: Some(Rule::RatedCurrent),
            ..Inputs::default()
        }
    }

    fn nfpa(setting: f64, rated: f64, factor: f64, rise: Option<f64>) -> Inputs {
        Inputs {
            rule: Some(Rule::Nfpa70),
            service_factor: Some(Ratio::from_fraction(factor)),
            marked_rise: rise.map(TemperatureRise::from_kelvins),
            ..of(setting, rated)
        }
    }

    /// NFPA 70 430.32 (row MN-14): C-MN-033 17.75 A, C-MN-034 16.33 A, C-MN-035 37.5 A.
    #[test]
    fn reference_cases_at_and_just_outside() {
        for (rated, factor, rise, limit) in
            [(14.2, 1.15, None, 17.75), (14.2, 1.0, None, 16.33), (30.0, 1.0, Some(40.0), 37.5)]
        {
            assert_eq!(check(&nfpa(limit, rated, factor, rise)).verdict, Verdict::Within, "{limit}");
            assert_eq!(check(&nfpa(limit + 0.01, rated, factor, rise)).verdict, Verdict::Outside, "{limit}");
        }
        let stubborn = Inputs { will_not_start: Some(true), ..nfpa(14.2 * 1.3, 14.2, 1.0, None) };
        assert_eq!(check(&stubborn).verdict, Verdict::Within);
    }

    /// Common practice, no source (row OL-08).
    #[test]
    fn the_plain_rule_is_rated_current() {
        assert_eq!(check(&of(21.0, 21.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(20.9, 21.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(21.1, 21.0)).verdict, Verdict::Outside);
        let own = Inputs { maker_maximum: Some(Current::from_amperes(20.0)), ..of(20.9, 21.0) };
        assert_eq!(check(&own).verdict, Verdict::Outside);
    }

    #[test]
    fn limit_first_missing_named_and_class_shown() {
        let outcome =
            check(&Inputs { setting: None, rule: None, trip_class: Some(TripClass::Class10), ..of(0.0, 21.0) });
        assert_eq!(outcome.missing[0].what, "overload setting");
        assert_eq!(outcome.limit, "at most 21.00 A");
        assert!(outcome.rule.is_some() && outcome.assumed.len() == 1);
        assert_eq!(outcome.figures[0].value, "10");
        assert_eq!(check(&of(21.0, 0.0)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&of(f64::INFINITY, 21.0)).verdict, Verdict::NotAssessed);
    }
}
