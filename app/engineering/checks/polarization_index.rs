//! # polarization-index
//!
//! Insulation resistance after ten minutes over that after one, against the minimum of the thermal class.
//!
//! PI = R(10 min)/R(1 min), no temperature correction. Minimum 1.5 in class A, 2.0 in classes B, F, H (row IR-06).
//! Above 5000 MΩ at 40 °C after one minute it is not judged (IR-07); marginal where tester and thermometer cannot tell
//! on which side of that the winding is. Random-wound: a figure, since absorption dies away within minutes (IR-08). Both tests must be met (IR-11). The motor maker's minimum goes first.

use crate::checks::insulation_resistance::{Construction, System, correction, slope};
use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Ratio, Resistance, Temperature};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::insulation::{IR_05, IR_06, IR_07, IR_08, IR_09, IR_11};

/// Name in the catalogue.
pub const NAME: &str = "polarization-index";

/// Minimum in class A (105).
pub const CLASS_A: Limit = Limit { name: "least polarization index, class A", value: 1.5, unit: "1", source: IR_06 };
/// Minimum in classes B, F and H.
pub const CLASS_B_TO_H: Limit =
    Limit { name: "least polarization index, classes B, F, H", value: 2.0, unit: "1", source: IR_06 };
/// One-minute resistance at 40 °C above which the index is not judged.
pub const NOT_JUDGED_ABOVE: Limit =
    Limit { name: "resistance above which the index is not judged", value: 5000.0, unit: "MΩ", source: IR_07 };
/// Index above which the insulation may be dry and brittle.
pub const SUSPICIOUS: Limit =
    Limit { name: "suspiciously high polarization index", value: 8.0, unit: "1", source: IR_09 };

/// Thermal class of the insulation, as on the plate.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum ThermalClass {
    /// 105.
    A,
    /// 130.
    B,
    /// 155.
    F,
    /// 180.
    H,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Resistance to earth at one minute.
    pub one_minute: Option<Reading<Resistance>>,
    /// Resistance to earth at ten minutes, same test.
    pub ten_minutes: Option<Reading<Resistance>>,
    /// Winding temperature during the test.
    pub winding_temperature: Option<Reading<Temperature>>,
    /// Insulation system, when the maker tells.
    pub system: Option<System>,
    /// Construction, when known.
    pub construction: Option<Construction>,
    /// Thermal class.
    pub thermal_class: Option<ThermalClass>,
    /// The motor maker's own minimum.
    pub maker_minimum: Option<Ratio>,
}

/// Minimum for a thermal class.
#[must_use]
pub const fn minimum(class: ThermalClass) -> Limit {
    match class {
        ThermalClass::A => CLASS_A,
        ThermalClass::B | ThermalClass::F | ThermalClass::H => CLASS_B_TO_H,
    }
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(IR_05);
    let limit = limit(&mut b, inputs);
    if let Some(limit) = limit {
        b.limit(format!("at least {}", significant(limit, 2)));
        b.rule(LimitRule::linear("").at_least(limit, format!("≥ {}", significant(limit, 2))));
        b.cite(IR_11);
        b.note("For operation the index and the insulation resistance must both be met.");
    }
    let one = plausible::positive_reading(&mut b, inputs.one_minute.as_ref(), "insulation resistance at 1 min");
    let ten = plausible::positive_reading(&mut b, inputs.ten_minutes.as_ref(), "insulation resistance at 10 min");
    let temperature = if limit.is_some() && inputs.maker_minimum.is_none() {
        plausible::finite_reading(&mut b, inputs.winding_temperature.as_ref(), "winding temperature").map(Some)
    } else {
        Some(None)
    };
    let (Some(one), Some(ten), Some(temperature)) = (one, ten, temperature) else { return b.not_assessed() };

    let index = ten.number() / one.number();
    let (r1, r10) = (significant(one.number() / 1e6, 3), significant(ten.number() / 1e6, 3));
    let shown = significant(index, 3);
    b.line("polarization index", "PI = R(10 min)/R(1 min)", format!("{r10} MΩ / {r1} MΩ"), shown.clone());
    b.figure("polarization index", index, 3, "");
    if index > SUSPICIOUS.value {
        b.cite(IR_09);
        b.note("Above 8 the insulation may be dry and brittle, mostly in old varnish and mica windings.");
    }
    let Some(limit) = limit else {
        return b.as_figure(format!(
            "Polarization index {shown}, a figure only: in a random-wound motor the absorption current dies away too early."
        ));
    };
    if let Some(temperature) = temperature {
        let celsius = temperature.number();
        let Some((k, rule)) = correction(inputs.system, celsius) else {
            return b.not_judged(format!(
                "Not assessed: no published correction holds at {} °C, so nobody can say whether the winding is above 5000 MΩ at 40 °C.",
                significant(celsius, 3)
            ));
        };
        let corrected = one.number() / 1e6 * k;
        b.line(
            &format!("one minute at 40 °C, {rule}"),
            "R₄₀ = R·K",
            format!("{r1} MΩ × {}", significant(k, 3)),
            format!("{} MΩ", significant(corrected, 3)),
        );
        let edge = Measured::combined(
            corrected,
            &[
                (one.standard_uncertainty().map(|u| u / 1e6 * k), one.doubt()),
                (
                    temperature.standard_uncertainty().map(|u| u * slope(inputs.system, celsius) * one.number() / 1e6),
                    temperature.doubt(),
                ),
            ],
        );
        match edge.at_least(NOT_JUDGED_ABOVE.value) {
            Verdict::Within => {
                b.cite(IR_07);
                return b.as_figure(format!(
                    "Polarization index {shown}, not judged: above 5000 MΩ at 40 °C it means little."
                ));
            }
            Verdict::Marginal => {
                b.cite(IR_07);
                if let Some(doubt) = &edge.doubt {
                    b.note(format!("Marginal at best: {doubt}."));
                }
                marking::mark(&mut b, &Measured::exact(index), format!("PI {shown}"), Verdict::Marginal);
                return b.judged(
                    Verdict::Marginal,
                    format!(
                        "Polarization index {shown}: tester and thermometer cannot tell whether the winding is above 5000 MΩ at 40 °C, where the index is not judged."
                    ),
                );
            }
            _ => {}
        }
    }
    let relative = |r: &Reading<Resistance>| (r.standard_uncertainty().map(|u| index * u / r.number()), r.doubt());
    let measured = Measured::combined(index, &[relative(&one), relative(&ten)]);
    let verdict = measured.at_least(limit);
    marking::mark(&mut b, &measured, format!("PI {shown}"), verdict);
    let limit = significant(limit, 2);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("Polarization index {shown}, below {limit}: moisture or dirt. Dry and clean the winding and repeat; do not energise until the cause is known."),
            Verdict::Marginal => format!("Polarization index {shown}: the tester cannot tell it from the {limit} limit, or its accuracy is in doubt."),
            _ => format!("Polarization index {shown}, at least {limit}."),
        },
    )
}

/// The minimum, or `None` where the index is a figure.
fn limit(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<f64> {
    if let Some(own) = inputs.maker_minimum.filter(|m| m.fraction().is_finite() && m.fraction() > 0.0) {
        b.line("limit", "the maker's", String::new(), significant(own.fraction(), 3));
        b.note("The maker's own minimum is used.");
        return Some(own.fraction());
    }
    let usual = "random-wound, as nearly all low-voltage motors are";
    let construction = b.assume(inputs.construction, Construction::RandomWound, "winding construction", usual);
    if construction == Construction::RandomWound {
        b.cite(IR_08);
        return None;
    }
    b.cite(IR_06);
    let class =
        b.assume(inputs.thermal_class, ThermalClass::F, "thermal class", "F: classes B, F and H ask for the same");
    Some(minimum(class).value)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(one: f64, ten: f64, class: ThermalClass) -> Inputs {
        let tester = Accuracy {
            percent_of_reading: 2.0,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            one_minute: Some(Reading::with(Resistance::from_ohms(one * 1e6), tester)),
            ten_minutes: Some(Reading::with(Resistance::from_ohms(ten * 1e6), tester)),
            winding_temperature: Some(Reading::with(
                Temperature::from_celsius(40.0),
                Accuracy { percent_of_reading: 0.0, digits: 5.0, resolution: 0.1, ..tester },
            )),
            construction: Some(Construction::FormWound),
            thermal_class: Some(class),
            ..Inputs::default()
        }
    }

    /// IEEE 43-2013 (rows IR-05 to IR-07): C-IR-015, C-IR-016, C-IR-017.
    #[test]
    fn reference_cases() {
        let good = check(&of(800.0, 2400.0, ThermalClass::F));
        assert_eq!((good.verdict, good.figures[0].value.as_str()), (Verdict::Within, "3.00"));
        assert_eq!(check(&of(300.0, 480.0, ThermalClass::B)).verdict, Verdict::Outside);
        assert_eq!(check(&of(6000.0, 6600.0, ThermalClass::F)).verdict, Verdict::Figure);
        assert!((minimum(ThermalClass::A).value - 1.5).abs() < 1e-12);
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of(100.0, 210.0, ThermalClass::F)).verdict, Verdict::Within);
        assert_eq!(check(&of(100.0, 200.0, ThermalClass::F)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(100.0, 190.0, ThermalClass::F)).verdict, Verdict::Outside);
        assert_eq!(check(&of(100.0, 160.0, ThermalClass::A)).verdict, Verdict::Within);
        assert_eq!(check(&of(4600.0, 5060.0, ThermalClass::F)).verdict, Verdict::Outside);
        assert_eq!(check(&of(5000.0, 5500.0, ThermalClass::F)).verdict, Verdict::Marginal);
    }

    #[test]
    fn without_a_thermometer_nobody_knows_that_it_is_above_the_edge() {
        let bare = |one: f64| Inputs {
            winding_temperature: Some(Reading::bare(Temperature::from_celsius(40.0))),
            ..of(one, one * 1.1, ThermalClass::F)
        };
        let outcome = check(&bare(6000.0));
        assert_eq!(outcome.verdict, Verdict::Marginal);
        assert!(outcome.notes.iter().any(|n| n.contains("no instrument is named")));
        assert_eq!(check(&bare(300.0)).verdict, Verdict::Outside);
    }

    #[test]
    fn random_wound_is_a_figure_and_what_is_missing_is_named() {
        let random = Inputs { construction: None, ..of(300.0, 330.0, ThermalClass::F) };
        assert_eq!(check(&random).verdict, Verdict::Figure);
        let own = Inputs { maker_minimum: Some(Ratio::from_fraction(2.0)), ..random };
        assert_eq!(check(&own).verdict, Verdict::Outside);
        let outcome = check(&Inputs { ten_minutes: None, ..of(300.0, 330.0, ThermalClass::F) });
        assert_eq!(outcome.missing[0].what, "insulation resistance at 10 min");
        assert!(outcome.rule.is_some() && outcome.limit == "at least 2.0");
        assert_eq!(check(&of(0.0, 330.0, ThermalClass::F)).verdict, Verdict::NotAssessed);
    }
}
