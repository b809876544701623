//! # voltage-drop
//!
//! Voltage drop along the motor cable: ΔU = √3·I·l·(R·cos φ + X·sin φ), in percent of the motor's rated volts.
//!
//! R of IEC 60228 at the conductor's temperature, factor 0.00393 per kelvin. Up to 3 % within, beyond 5 % outside, between
//! marginal (recommendations: NEC 3 % branch and 5 % in all, IEC 60364-5-52 5 %); a site limit replaces both. Not
//! stated: assumed 70 °C, class 2, one conductor, 0.08 Ω/km reactance, power factor 0.85.

use crate::decision::Measured;
use crate::formulas::conductor::{Build, at_temperature, largest_per_kilometre};
use crate::formulas::marking::{graded, mark};
use crate::formulas::plausible::{finite, not_negative, positive, proper_fraction};
use crate::formulas::voltage_drop::voltage_drop;
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{CrossSection, Current, Length, Ratio, Resistance, Temperature, Voltage};
use crate::rounding::significant;
use crate::sources::supply::{CB_09, CB_10, CB_12};

/// Name in the catalogue.
pub const NAME: &str = "voltage-drop";

/// Good without reserve.
pub const BRANCH: Limit = Limit { name: "voltage drop of a branch", value: 0.03, unit: "1", source: CB_12 };
/// At most.
pub const TOTAL: Limit = Limit { name: "voltage drop in all", value: 0.05, unit: "1", source: CB_12 };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Current, usually the motor's rated one.
    pub current: Option<Current>,
    /// Length of the cable.
    pub length: Option<Length>,
    /// Section of one conductor, copper.
    pub section: Option<CrossSection>,
    /// Build of the conductor.
    pub build: Option<Build>,
    /// Conductors in parallel.
    pub parallel: Option<u32>,
    /// Reactance of one kilometre.
    pub reactance: Option<Resistance>,
    /// Power factor of the motor.
    pub power_factor: Option<Ratio>,
    /// Conductor temperature under load.
    pub temperature: Option<Temperature>,
    /// Rated line volts of the motor.
    pub rated_voltage: Option<Voltage>,
    /// Largest drop that the site allows.
    pub site_limit: Option<Ratio>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    for source in [CB_12, CB_09, CB_10] {
        b.cite(source);
    }
    let (good, bad) = match inputs.site_limit {
        Some(own) => {
            let Some(own) = positive(&mut b, Some(own), "voltage drop that the site allows") else {
                return b.not_assessed();
            };
            b.line(
                "limit",
                "as the site states",
                String::new(),
                format!("{} %", significant(own.fraction() * 100.0, 3)),
            );
            (own.fraction() * 100.0, own.fraction() * 100.0)
        }
        None => (BRANCH.value * 100.0, TOTAL.value * 100.0),
    };
    let (good_shown, bad_shown) = (significant(good, 3), significant(bad, 3));
    b.limit(if good < bad {
        format!("at most {good_shown} %; beyond {bad_shown} % outside")
    } else {
        format!("at most {good_shown} %")
    });
    b.rule(LimitRule::linear("%").at_most(good, format!("≤ {good_shown} %")).tick(bad, format!("{bad_shown} %")));
    let Some((drop, percent)) = drop(&mut b, inputs) else { return b.not_assessed() };
    let measured = Measured::exact(percent);
    let verdict = graded(&measured, good, bad);
    let shown = significant(percent, 3);
    b.figure("voltage drop", drop, 3, "V");
    b.figure("voltage drop", percent, 3, "%");
    mark(&mut b, &measured, format!("{shown} %"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("The cable takes {shown} %, more than {bad_shown} %: the motor lacks volts near base speed. Use a larger section, or lower the base frequency to suit."),
            Verdict::Marginal => format!("The cable takes {shown} %, between {good_shown} and {bad_shown} %. Judge it together with the drop ahead of the drive."),
            _ => format!("The cable takes {shown} %, at most {good_shown} %."),
        },
    )
}

/// Drop in volts and in percent, with its working.
fn drop(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<(f64, f64)> {
    let current = positive(b, inputs.current, "motor current");
    let length = positive(b, inputs.length, "length of the motor cable");
    let section = positive(b, inputs.section, "section of the motor cable");
    let rated = positive(b, inputs.rated_voltage, "rated motor voltage");
    let build = b.assume(inputs.build, Build::Class2, "build of the conductor", "class 2, stranded");
    let parallel = b.assume(inputs.parallel, 1, "conductors in parallel", "one");
    let reactance =
        b.assume(inputs.reactance, Resistance::from_ohms(0.08), "reactance of the motor cable", "0.08 Ω/km, as usual");
    let cosine = b.assume(inputs.power_factor, Ratio::from_fraction(0.85), "power factor", "0.85, as usual");
    let temperature = b.assume(
        inputs.temperature,
        Temperature::from_celsius(70.0),
        "conductor temperature",
        "70 °C, the limit of PVC",
    );
    let parallel = b.need((parallel > 0).then_some(parallel), "conductors in parallel above zero");
    let reactance = not_negative(b, Some(reactance), "reactance of the motor cable");
    // A power factor of one is a limit case that the formula stands.
    let cosine = if cosine.fraction() == 1.0 { Some(cosine) } else { proper_fraction(b, Some(cosine), "power factor") };
    let temperature = finite(b, Some(temperature), "conductor temperature");
    let (current, length, section, rated) = (current?, length?, section?, rated?);
    let (parallel, reactance, cosine, temperature) = (f64::from(parallel?), reactance?, cosine?, temperature?);
    let listed = b.need(largest_per_kilometre(section, build), "section on the list of IEC 60228")?;
    let hot = positive(b, Some(at_temperature(listed, temperature)), "conductor resistance")?;
    b.line(
        "resistance of one kilometre",
        "R₂₀·(1 + 0.00393·(T − 20))",
        format!("{} Ω/km, T = {} °C", significant(listed.ohms(), 3), significant(temperature.celsius(), 3)),
        format!("{} Ω/km", significant(hot.ohms(), 4)),
    );
    let each = Current::from_amperes(current.amperes() / parallel);
    let volts = voltage_drop(each, length, hot, reactance, cosine).volts();
    b.line(
        "voltage drop",
        "√3·I·l·(R·cos φ + X·sin φ)",
        format!(
            "√3 × {} A × {} km × ({} × {} + {} × sin φ)",
            significant(each.amperes(), 4),
            significant(length.metres() / 1000.0, 3),
            significant(hot.ohms(), 4),
            significant(cosine.fraction(), 3),
            significant(reactance.ohms(), 3)
        ),
        format!("{} V", significant(volts, 4)),
    );
    let percent = volts / rated.volts() * 100.0;
    b.line(
        "in percent",
        "ΔU/U",
        format!("{} V/{} V", significant(volts, 4), significant(rated.volts(), 4)),
        format!("{} %", significant(percent, 3)),
    );
    Some((volts, percent))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn cable(amperes: f64, metres: f64, mm2: f64, cosine: f64) -> Inputs {
        Inputs {
            current: Some(Current::from_amperes(amperes)),
            length: Some(Length::from_metres(metres)),
            section: Some(CrossSection::from_square_millimetres(mm2)),
            power_factor: Some(Ratio::from_fraction(cosine)),
            rated_voltage: Some(Voltage::from_volts(400.0)),
            ..Inputs::default()
        }
    }

    /// C-CB-007 and C-CB-008 (computed from IEC 60228 and row CB-12): 3.519 % and 3.956 %.
    #[test]
    fn published_cables() {
        for (inputs, volts, percent) in
            [(cable(32.0, 80.0, 6.0, 0.85), "14.1", "3.52"), (cable(105.0, 150.0, 35.0, 0.86), "15.8", "3.96")]
        {
            let outcome = check(&inputs);
            assert_eq!((outcome.figures[0].value.as_str(), outcome.figures[1].value.as_str()), (volts, percent));
            assert_eq!((outcome.verdict, outcome.assumed.len()), (Verdict::Marginal, 4));
        }
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        // 3.519 % at 80 m, so 3 % at 68.2 m and 5 % at 113.7 m.
        for (metres, verdict) in
            [(68.1, Verdict::Within), (68.3, Verdict::Marginal), (113.6, Verdict::Marginal), (113.8, Verdict::Outside)]
        {
            assert_eq!(check(&cable(32.0, metres, 6.0, 0.85)).verdict, verdict, "{metres}");
        }
        let site = Inputs { site_limit: Some(Ratio::from_fraction(0.035)), ..cable(32.0, 80.0, 6.0, 0.85) };
        assert_eq!(check(&site).verdict, Verdict::Outside);
        assert_eq!(check(&Inputs { parallel: Some(2), ..site }).verdict, Verdict::Within);
    }

    #[test]
    fn missing_and_impossible_inputs_are_named_with_the_limit_in_place() {
        let waiting = check(&Inputs { length: None, ..cable(32.0, 80.0, 6.0, 0.85) });
        assert_eq!((waiting.limit.as_str(), waiting.rule.is_some()), ("at most 3.00 %; beyond 5.00 % outside", true));
        assert_eq!(waiting.missing[0].what, "length of the motor cable");
        assert_eq!(check(&cable(32.0, 80.0, 7.0, 0.85)).missing[0].what, "section on the list of IEC 60228");
        for bad in [
            cable(0.0, 80.0, 6.0, 0.85),
            cable(32.0, f64::NAN, 6.0, 0.85),
            cable(32.0, 80.0, 6.0, 1.2),
            Inputs { parallel: Some(0), ..cable(32.0, 80.0, 6.0, 0.85) },
        ] {
            assert_eq!(check(&bad).verdict, Verdict::NotAssessed);
        }
    }
}
