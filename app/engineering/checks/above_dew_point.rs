//! # above-dew-point
//!
//! Winding temperature over the dew point of the air around it, during the insulation test.
//!
//! T_d = B·γ/(A − γ), γ = ln φ + A·T/(B + T), A = 17.62, B = 243.12 °C (Magnus, row DP-01). At least 3 K above it
//! (common practice, row DP-02); IEEE 43 asks for a winding above the dew point (row IR-11).

use crate::decision::Measured;
use crate::formulas::dew_point::dew_point;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Ratio, Temperature};
use crate::reading::Reading;
use crate::rounding::{decimals, significant};
use crate::sources::insulation::IR_11;
use crate::sources::windings::{DEW_MARGIN, MAGNUS};

/// Name in the catalogue.
pub const NAME: &str = "above-dew-point";

/// Least distance from the dew point.
pub const MARGIN: Limit = Limit { name: "winding above the dew point", value: 3.0, unit: "K", source: DEW_MARGIN };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Winding temperature during the test.
    pub winding_temperature: Option<Reading<Temperature>>,
    /// Air temperature at the motor.
    pub air_temperature: Option<Reading<Temperature>>,
    /// Relative humidity of that air.
    pub humidity: Option<Reading<Ratio>>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MAGNUS);
    b.cite(DEW_MARGIN);
    b.cite(IR_11);
    b.limit("at least 3 K above the dew point (common practice)");
    b.rule(LimitRule::linear("K").at_least(MARGIN.value, "≥ 3 K").tick(0.0, "dew point"));
    let winding = plausible::finite_reading(&mut b, inputs.winding_temperature.as_ref(), "winding temperature");
    let air = plausible::finite_reading(&mut b, inputs.air_temperature.as_ref(), "air temperature");
    let humidity = plausible::positive_reading(&mut b, inputs.humidity.as_ref(), "relative humidity");
    let (Some(winding), Some(air), Some(humidity)) = (winding, air, humidity) else { return b.not_assessed() };
    let (t, phi) = (air.number(), humidity.number());
    let Some(dew) = dew_point(air.value, humidity.value).map(Temperature::celsius) else {
        return b.not_judged(format!(
            "Not assessed: the formula holds from −45 to 60 °C and up to 100 % humidity, not at {} °C and {} %.",
            significant(t, 3),
            significant(phi * 100.0, 3)
        ));
    };

    let above = winding.number() - dew;
    let (shown, at) = (decimals(above, 1), decimals(dew, 1));
    b.line(
        "dew point",
        "T_d = B·γ/(A − γ), γ = ln φ + A·T/(B + T)",
        format!("T = {} °C, φ = {} %", decimals(t, 1), decimals(phi * 100.0, 0)),
        format!("{at} °C"),
    );
    b.line(
        "winding above it",
        "ΔT = T_w − T_d",
        format!("{} °C − {at} °C", decimals(winding.number(), 1)),
        format!("{shown} K"),
    );
    b.figure("dew point", dew, 3, "°C");
    b.figure("winding above the dew point", above, 3, "K");
    // How far one unit of each air reading moves the dew point, by a small step down.
    let moved = |air: f64, humidity: f64| {
        dew_point(Temperature::from_celsius(air), Ratio::from_fraction(humidity))
            .map_or(0.0, |d| (dew - d.celsius()).abs())
    };
    let by_air = moved(t - 0.1, phi) / 0.1;
    let by_humidity = moved(t, phi * 0.999) / (phi * 0.001);
    let measured = Measured::combined(
        above,
        &[
            (winding.standard_uncertainty(), winding.doubt()),
            (air.standard_uncertainty().map(|u| u * by_air), air.doubt()),
            (humidity.standard_uncertainty().map(|u| u * by_humidity), humidity.doubt()),
        ],
    );
    let verdict = measured.at_least(MARGIN.value);
    marking::mark(&mut b, &measured, format!("{shown} K"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("The winding is {shown} K above the dew point of {at} °C, less than 3 K: it may be wet. Warm it and repeat the insulation test."),
            Verdict::Marginal => format!("The winding is {shown} K above the dew point of {at} °C: closer to 3 K than the instruments can tell, or their accuracy is in doubt."),
            _ => format!("The winding is {shown} K above the dew point of {at} °C."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(winding: f64, air: f64, humidity: f64) -> Inputs {
        let fine = |resolution: f64| Accuracy {
            percent_of_reading: 0.0,
            digits: 1.0,
            resolution,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let celsius = |t: f64| Some(Reading::with(Temperature::from_celsius(t), fine(0.1)));
        Inputs {
            winding_temperature: celsius(winding),
            air_temperature: celsius(air),
            humidity: Some(Reading::with(Ratio::from_fraction(humidity), fine(0.005))),
        }
    }

    /// 20 °C and 50 %: 9.26 °C (psychrometric tables, from memory: 9.3 °C), so the border is a winding at 12.3 °C.
    #[test]
    fn at_just_inside_and_just_outside() {
        let outcome = check(&of(20.0, 20.0, 0.5));
        assert_eq!((outcome.verdict, outcome.figures[0].value.as_str()), (Verdict::Within, "9.26"));
        assert_eq!(check(&of(12.7, 20.0, 0.5)).verdict, Verdict::Within);
        assert_eq!(check(&of(12.3, 20.0, 0.5)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(11.8, 20.0, 0.5)).verdict, Verdict::Outside);
    }

    #[test]
    fn missing_bare_and_impossible() {
        let outcome = check(&Inputs { humidity: None, ..of(20.0, 20.0, 0.5) });
        assert_eq!(outcome.missing[0].what, "relative humidity");
        assert!(outcome.rule.is_some() && !outcome.limit.is_empty());
        let bare = Inputs { humidity: Some(Reading::bare(Ratio::from_fraction(0.5))), ..of(20.0, 20.0, 0.5) };
        assert_eq!(check(&bare).verdict, Verdict::Marginal);
        for (t, phi) in [(20.0, 50.0), (20.0, 0.0), (90.0, 0.5), (f64::NAN, 0.5)] {
            assert_eq!(check(&of(20.0, t, phi)).verdict, Verdict::NotAssessed, "{t} {phi}");
        }
    }
}
