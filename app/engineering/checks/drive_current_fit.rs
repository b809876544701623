//! # drive-current-fit
//!
//! Continuous current of the drive at the chosen overload, reduced for altitude and heat, against the motor's rated
//! current: I_drive·k ≥ I_motor.
//!
//! The maker's reduction goes first. Otherwise (common practice, row DR-02) 1 % for each 100 m above 1000 m and 2.5 %
//! for each kelvin above 40 °C, the stricter end of what is usual, from the altitude and air of the drive's rating where
//! they are entered; beyond 4000 m, or 50 °C and the rating, only the maker's figure counts. Place not stated: assumed up
//! to 1000 m and 40 °C.

use crate::decision::Measured;
use crate::formulas::derating;
use crate::formulas::plausible::{finite, positive, proper_fraction};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::overload::Overload;
use crate::quantity::{Current, Length, Ratio, Temperature};
use crate::rounding::significant;
use crate::sources::nameplate::{DR_01, DR_02, OL_01};

/// Name in the catalogue.
pub const NAME: &str = "drive-current-fit";

/// Highest place for which a usual reduction is known.
const HIGHEST_METRES: f64 = 4000.0;
/// Hottest place for which a usual reduction is known.
const HOTTEST_CELSIUS: f64 = 50.0;

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Continuous output current of the drive that goes with the chosen overload.
    pub drive_current: Option<Current>,
    /// The chosen overload, as printed; shown beside the result.
    pub overload: Option<Overload>,
    /// Rated motor current of the connection in use.
    pub motor_current: Option<Current>,
    /// The drive maker's reduction for this place and switching frequency, 1 for none; replaces the usual ones.
    pub maker_reduction: Option<Ratio>,
    /// Altitude of the site.
    pub altitude: Option<Length>,
    /// Hottest air at the drive.
    pub ambient: Option<Temperature>,
    /// Altitude up to which the drive has its full current; 1000 m is usual.
    pub altitude_rated: Option<Length>,
    /// Hottest air in which the drive has its full current; 40 °C is usual.
    pub ambient_rated: Option<Temperature>,
    /// Part of the current lost for every 100 m above 1000 m.
    pub lost_per_hundred_metres: Option<Ratio>,
    /// Part of the current lost for every kelvin above 40 °C.
    pub lost_per_kelvin: Option<Ratio>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.note("The drive's manual goes first, also on what a higher switching frequency takes off.");
    let drive = positive(&mut b, inputs.drive_current, "continuous drive current");
    let factor = match reduction(&mut b, inputs) {
        Ok(factor) => factor,
        Err(why) => return b.not_judged(why),
    };
    if let Some(overload) = inputs.overload {
        let Some(overload) = overload.sound(&mut b) else { return b.not_assessed() };
        b.cite(OL_01);
        b.text_figure(
            "chosen overload",
            format!(
                "{} % for {} s, once in {} s",
                significant(overload.multiple.fraction() * 100.0, 3),
                significant(overload.lasting.seconds(), 3),
                significant(overload.every.seconds(), 3)
            ),
        );
    } else {
        b.note("The overload that the continuous current belongs to is not entered; a drive has several.");
    }
    let (Some(drive), Some(factor)) = (drive, factor) else { return b.not_assessed() };
    let limit = drive.amperes() * factor;
    let limit_shown = significant(limit, 4);
    b.limit(format!("motor current at most {limit_shown} A"));
    b.rule(LimitRule::linear("A").at_most(limit, format!("≤ {limit_shown} A")));
    b.line(
        "continuous current at this place",
        "I_drive·k",
        format!("{} A × {}", significant(drive.amperes(), 4), significant(factor, 4)),
        format!("{limit_shown} A"),
    );
    b.figure("continuous drive current at this place", limit, 4, "A");
    let Some(motor) = positive(&mut b, inputs.motor_current, "rated motor current") else { return b.not_assessed() };
    let shown = significant(motor.amperes(), 4);
    // A last binary digit decides nothing between two entered numbers.
    let verdict = Measured::exact(motor.amperes()).at_most(limit * (1.0 + 1e-9));
    b.figure("margin", (limit / motor.amperes() - 1.0) * 100.0, 3, "%");
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(motor.amperes(), 0.0, format!("{shown} A"), verdict));
    }
    b.judged(
        verdict,
        if verdict == Verdict::Within {
            format!("The drive gives {limit_shown} A here, the motor is rated {shown} A.")
        } else {
            format!("The motor is rated {shown} A, the drive gives {limit_shown} A here. Check the overload rating chosen and the connection of the motor; otherwise the motor cannot be loaded fully.")
        },
    )
}

/// What is left of the drive's current at this place; the error is a sentence.
fn reduction(b: &mut OutcomeBuilder, inputs: &Inputs) -> Result<Option<f64>, String> {
    if let Some(own) = inputs.maker_reduction {
        let sound = own.fraction() == 1.0 || proper_fraction(b, Some(own), "the maker's reduction").is_some();
        b.line("reduction", "the maker's", String::new(), significant(own.fraction(), 4));
        return Ok(sound.then_some(own.fraction()));
    }
    b.cite(DR_01);
    let altitude = b.assume(inputs.altitude, Length::from_metres(1000.0), "altitude", "up to 1000 m, nothing lost");
    let ambient =
        b.assume(inputs.ambient, Temperature::from_celsius(40.0), "ambient temperature", "up to 40 °C, nothing lost");
    let (altitude, ambient) =
        match (finite(b, Some(altitude), "altitude"), finite(b, Some(ambient), "ambient temperature")) {
            (Some(altitude), Some(ambient)) => (altitude, ambient),
            _ => return Ok(None),
        };
    let high = inputs.altitude_rated.unwrap_or(derating::FREE_ALTITUDE);
    let hot = inputs.ambient_rated.unwrap_or(derating::FREE_AMBIENT);
    let (Some(high), Some(hot)) =
        (finite(b, Some(high), "altitude of the drive's rating"), finite(b, Some(hot), "air of the drive's rating"))
    else {
        return Ok(None);
    };
    let (high_shown, hot_shown) = (significant(high.metres(), 4), significant(hot.celsius(), 3));
    if altitude.metres() > HIGHEST_METRES.max(high.metres()) || ambient.celsius() > HOTTEST_CELSIUS.max(hot.celsius()) {
        return Err("Not assessed: above 4000 m or 50 °C only the drive maker's reduction counts. Enter it.".to_owned());
    }
    let mut factor = 1.0;
    if altitude.metres() > high.metres() {
        b.cite(DR_02);
        let rate = b.assume(
            inputs.lost_per_hundred_metres,
            Ratio::from_fraction(0.01),
            "loss for each 100 m",
            "1 % above the altitude of the rating, common practice",
        );
        let Some(rate) = proper_fraction(b, Some(rate), "loss for each 100 m") else { return Ok(None) };
        factor *= derating::by_altitude(altitude, high, rate).fraction();
        b.line(
            "altitude",
            &format!("1 − (h − {high_shown} m)/100 m·a"),
            format!("h = {} m, a = {} %", significant(altitude.metres(), 4), significant(rate.fraction() * 100.0, 3)),
            significant(factor, 4),
        );
    }
    if ambient.celsius() > hot.celsius() {
        b.cite(DR_02);
        let rate = b.assume(
            inputs.lost_per_kelvin,
            Ratio::from_fraction(0.025),
            "loss for each kelvin",
            "2.5 % above the air of the rating, the strict end of common practice",
        );
        let Some(rate) = proper_fraction(b, Some(rate), "loss for each kelvin") else { return Ok(None) };
        let left = derating::by_ambient(ambient, hot, rate).fraction();
        b.line(
            "heat",
            &format!("1 − (T − {hot_shown} °C)·a"),
            format!("T = {} °C, a = {} %", significant(ambient.celsius(), 3), significant(rate.fraction() * 100.0, 3)),
            significant(left, 4),
        );
        factor *= left;
    }
    Ok(Some(factor))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Duration;

    fn fit(drive: f64, motor: f64) -> Inputs {
        Inputs {
            drive_current: Some(Current::from_amperes(drive)),
            motor_current: Some(Current::from_amperes(motor)),
            overload: Some(Overload {
                multiple: Ratio::from_fraction(1.1),
                lasting: Duration::from_seconds(60.0),
                every: Duration::from_seconds(600.0),
            }),
            altitude: Some(Length::from_metres(1800.0)),
            ambient: Some(Temperature::from_celsius(45.0)),
            lost_per_hundred_metres: Some(Ratio::from_fraction(0.01)),
            lost_per_kelvin: Some(Ratio::from_fraction(0.01)),
            altitude_rated: None,
            ambient_rated: None,
            maker_reduction: None,
        }
    }

    /// C-DR-001 (row DR-02, common practice): 100 A at 1800 m and 45 °C leave 87.4 A.
    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&fit(100.0, 87.4)).verdict, Verdict::Within);
        assert_eq!(check(&fit(100.0, 87.39)).verdict, Verdict::Within);
        assert_eq!(check(&fit(100.0, 87.41)).verdict, Verdict::Outside);
    }

    /// Row DR-02 (common practice) from another foot: a drive rated for 30 °C loses 15 K at 45 °C, one for 50 °C none.
    #[test]
    fn the_drives_own_rating_is_where_the_reduction_begins() {
        let rated = |metres: f64, celsius: f64| {
            check(&Inputs {
                altitude_rated: Some(Length::from_metres(metres)),
                ambient_rated: Some(Temperature::from_celsius(celsius)),
                ..fit(100.0, 80.0)
            })
            .limit
        };
        assert_eq!(rated(2000.0, 50.0), "motor current at most 100.0 A");
        assert_eq!(rated(1000.0, 30.0), "motor current at most 78.20 A");
    }

    #[test]
    fn the_maker_goes_first_and_the_unknown_place_is_assumed() {
        let own = Inputs { maker_reduction: Some(Ratio::from_fraction(0.95)), ..fit(100.0, 94.0) };
        assert_eq!(check(&own).verdict, Verdict::Within);
        let outcome = check(&Inputs { altitude: None, ambient: None, ..fit(100.0, 100.0) });
        assert_eq!((outcome.verdict, outcome.assumed.len()), (Verdict::Within, 2));
        assert_eq!(
            check(&Inputs { altitude: Some(Length::from_metres(4500.0)), ..fit(100.0, 50.0) }).verdict,
            Verdict::NotAssessed
        );
    }

    #[test]
    fn the_limit_is_there_before_the_motor_and_bad_numbers_are_named() {
        let outcome = check(&Inputs { motor_current: None, ..fit(100.0, 0.0) });
        assert_eq!(outcome.limit, "motor current at most 87.40 A");
        assert!(outcome.rule.is_some());
        assert_eq!(outcome.missing[0].what, "rated motor current");
        for bad in [0.0, -5.0, f64::NAN] {
            assert_eq!(check(&fit(bad, 20.0)).verdict, Verdict::NotAssessed);
            assert_eq!(check(&fit(20.0, bad)).verdict, Verdict::NotAssessed);
        }
        let mut odd = fit(100.0, 50.0);
        odd.overload = odd.overload.map(|o| Overload { multiple: Ratio::from_fraction(f64::NAN), ..o });
        assert_eq!(check(&odd).missing[0].what, "overload of the drive in percent above zero");
        let hot = Inputs { ambient: Some(Temperature::from_celsius(f64::INFINITY)), ..fit(20.0, 10.0) };
        assert_eq!(check(&hot).verdict, Verdict::NotAssessed);
    }
}
