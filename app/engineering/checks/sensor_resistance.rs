//! # sensor-resistance
//!
//! The motor's temperature sensor read cold: is it there, neither open nor shorted, and plausible?
//!
//! Thermistors: in total below 20 Ω a short, above 250 Ω each too high or open, 20 to 250 Ω each as it should be
//! (rows TH-02, TH-04); measure with 2.5 V at most (TH-01). Pt100, Pt1000: temperature by IEC 60751 (TH-05), within
//! 5 K of a thermometer on the resting motor (common practice, TH-07; a two-wire lead adds a kelvin for each 0.385 Ω,
//! TH-06). Switch that opens when hot: at most 10 Ω closed, more than 100 Ω open (common practice, TH-08). Where the
//! maker gives the cold resistance, its ends replace those of the span and bound a platinum sensor besides.

use crate::decision::Measured;
use crate::formulas::{marking, platinum, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Resistance, Temperature};
use crate::reading::Reading;
use crate::rounding::{decimals, significant};
use crate::sources::sensors::{SENSOR_AGREEMENT, SENSOR_SWITCH, TH_01, TH_02, TH_04, TH_05, TH_06};

/// Name in the catalogue.
pub const NAME: &str = "sensor-resistance";

/// A short circuit, in total.
pub const SHORT: Limit = Limit { name: "shorted thermistors, in total", value: 20.0, unit: "Ω", source: TH_04 };
/// Least for each cold thermistor.
pub const COLD_LEAST: Limit = Limit { name: "cold thermistor, least", value: 20.0, unit: "Ω", source: TH_02 };
/// Most for each cold thermistor.
pub const COLD_MOST: Limit = Limit { name: "cold thermistor, most", value: 250.0, unit: "Ω", source: TH_02 };
/// Platinum sensor against a thermometer.
pub const AGREEMENT: Limit =
    Limit { name: "sensor against thermometer", value: 5.0, unit: "K", source: SENSOR_AGREEMENT };
/// A closed switch.
pub const CLOSED: Limit = Limit { name: "closed switch", value: 10.0, unit: "Ω", source: SENSOR_SWITCH };
/// An open switch.
pub const OPEN: Limit = Limit { name: "open switch", value: 100.0, unit: "Ω", source: SENSOR_SWITCH };

/// What kind of sensor it is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Sensor {
    /// Thermistors in series.
    Thermistor,
    /// Platinum, 100 Ω at 0 °C.
    Pt100,
    /// Platinum, 1000 Ω at 0 °C.
    Pt1000,
    /// A switch that opens when hot.
    Switch,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Kind of sensor.
    pub sensor: Option<Sensor>,
    /// Resistance at the terminals, in total.
    pub reading: Option<Reading<Resistance>>,
    /// How many thermistors in series; three is usual.
    pub in_series: Option<u32>,
    /// Winding temperature from another thermometer, for a platinum sensor.
    pub winding_temperature: Option<Reading<Temperature>>,
    /// Resistance of both leads together, for a two-wire platinum sensor.
    pub lead_resistance: Option<Resistance>,
    /// Least cold resistance in total by the maker.
    pub maker_least: Option<Resistance>,
    /// Largest cold resistance in total by the maker.
    pub maker_most: Option<Resistance>,
}

/// Largest resistance of cold thermistors in series.
#[must_use]
pub fn cold_most(in_series: u32) -> Resistance {
    Resistance::from_ohms(COLD_MOST.value * f64::from(in_series))
}

/// Bounds around the response temperature for thermistors in series: at most at −5 K, at least at +5 K, at +15 K.
#[must_use]
pub fn response_bounds(in_series: u32) -> [Resistance; 3] {
    [550.0, 1330.0, 4000.0].map(|each| Resistance::from_ohms(each * f64::from(in_series)))
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    let Some(sensor) = b.need(inputs.sensor, "kind of temperature sensor") else {
        let _ = b.need(inputs.reading.as_ref(), "sensor resistance");
        return b.not_assessed();
    };
    for (own, what) in [(inputs.maker_least, "least cold resistance"), (inputs.maker_most, "largest cold resistance")] {
        let Some(own) = own else { continue };
        let Some(own) = plausible::positive(&mut b, Some(own), &format!("{what} by the maker")) else {
            return b.not_assessed();
        };
        b.line(what, "the maker's", String::new(), format!("{} Ω", significant(own.ohms(), 3)));
    }
    match sensor {
        Sensor::Thermistor => thermistor(b, inputs),
        Sensor::Pt100 => platinum_sensor(b, inputs, 100.0),
        Sensor::Pt1000 => platinum_sensor(b, inputs, 1000.0),
        Sensor::Switch => switch(b, inputs),
    }
}

fn thermistor(mut b: OutcomeBuilder, inputs: &Inputs) -> Outcome {
    b.cite(TH_01);
    b.cite(TH_02);
    b.cite(TH_04);
    b.note("Measure with 2.5 V at most: a higher voltage harms thermistors.");
    let count = b.assume(inputs.in_series, 3, "thermistors in series", "3, one in each phase");
    if !(1..=12).contains(&count) {
        return b.not_judged("Not assessed: between 1 and 12 thermistors in series make sense.");
    }
    let low = inputs.maker_least.map_or(COLD_LEAST.value * f64::from(count), Resistance::ohms);
    let high = inputs.maker_most.map_or(cold_most(count).ohms(), Resistance::ohms);
    if low >= high {
        return b.not_judged(
            "Not assessed: the maker's cold resistance does not meet the count of thermistors. Check both.",
        );
    }
    let (l, h) = (significant(low, 3), significant(high, 3));
    b.limit(format!("{l} to {h} Ω cold for {count} in series; below 20 Ω in total a short"));
    b.rule(
        LimitRule::logarithmic("Ω")
            .between(low, format!("≥ {l} Ω"), high, format!("≤ {h} Ω"))
            .tick(SHORT.value, "short"),
    );
    b.line("cold span", "20·n to 250·n", format!("n = {count}"), format!("{l} to {h} Ω"));
    let Some(reading) = plausible::reading_not_negative(&mut b, inputs.reading.as_ref(), "sensor resistance") else {
        return b.not_assessed();
    };
    let measured = Measured::direct(&reading);
    let shown = significant(measured.value, 3);
    // Between the short and the span: low, but nobody calls it a fault.
    let verdict = measured.at_most(high).worse(match (measured.at_least(low), measured.at_least(SHORT.value)) {
        (Verdict::Outside, Verdict::Outside) => Verdict::Outside,
        (Verdict::Within, _) => Verdict::Within,
        _ => Verdict::Marginal,
    });
    b.figure("sensor resistance", measured.value, 3, "Ω");
    b.figure("each", measured.value / f64::from(count), 3, "Ω");
    b.text_figure(
        "state",
        if measured.value < SHORT.value {
            "short circuit"
        } else if measured.value > high {
            "too high, or open"
        } else {
            "plausible"
        },
    );
    mark_if_drawable(&mut b, &measured, &shown, verdict);
    let summary = match verdict {
        Verdict::Outside if measured.value > high => format!(
            "{shown} Ω cold, above {h} Ω: open circuit, a hot winding or more thermistors than entered. Find out before starting."
        ),
        Verdict::Outside => {
            format!("{shown} Ω: a short circuit. The winding is not protected; find it before starting.")
        }
        Verdict::Marginal => format!(
            "{shown} Ω: close to an end of {l} to {h} Ω, below it, or the meter's accuracy is in doubt. Check the count of sensors and the leads."
        ),
        _ => format!("{shown} Ω cold, between {l} and {h} Ω."),
    };
    b.judged(verdict, summary)
}

fn platinum_sensor(mut b: OutcomeBuilder, inputs: &Inputs, ohms_at_zero: f64) -> Outcome {
    b.cite(TH_05);
    b.cite(TH_06);
    b.cite(SENSOR_AGREEMENT);
    b.limit("within 5 K of a thermometer on the resting motor (common practice)");
    b.rule(LimitRule::linear("K").between(-AGREEMENT.value, "−5 K", AGREEMENT.value, "+5 K"));
    let zero = Resistance::from_ohms(0.0);
    let leads =
        b.assume(inputs.lead_resistance, zero, "resistance of both leads", "0 Ω, as with three or four wires").ohms();
    let reading = plausible::reading_not_negative(&mut b, inputs.reading.as_ref(), "sensor resistance");
    let other = plausible::finite_reading(
        &mut b,
        inputs.winding_temperature.as_ref(),
        "winding temperature from a thermometer",
    );
    let Some(reading) = reading else { return b.not_assessed() };
    let r0 = Resistance::from_ohms(ohms_at_zero);
    let shown = significant(reading.number(), 4);
    let found = platinum::temperature(r0, Resistance::from_ohms(reading.number() - leads))
        .filter(|t| (-60.0..=250.0).contains(&t.celsius()));
    let Some(found) = found.map(Temperature::celsius) else {
        return b.judged(Verdict::Outside, format!("{shown} Ω means no temperature that a motor can have: open, shorted or another kind of sensor. Find out before starting."));
    };
    b.line(
        "temperature of the sensor",
        "R = R₀·(1 + A·T + B·T²)",
        format!("R = {shown} Ω − {} Ω leads, R₀ = {} Ω", significant(leads, 3), significant(ohms_at_zero, 4)),
        format!("{} °C", decimals(found, 1)),
    );
    b.figure("temperature of the sensor", found, 3, "°C");
    b.figure("tolerance of class B", platinum::class_b(Temperature::from_celsius(found)).kelvins(), 2, "K");
    let by_maker = maker_span(inputs, &reading);
    if by_maker == Verdict::Outside {
        return b.judged(Verdict::Outside, format!("{shown} Ω is not the cold resistance that the maker gives. Check the kind of sensor, its leads and its wiring."));
    }
    let Some(other) = other else { return b.not_assessed() };
    let apart = found - other.number();
    let off = decimals(apart, 1);
    b.line(
        "against the thermometer",
        "T − T_ref",
        format!("{} °C − {} °C", decimals(found, 1), decimals(other.number(), 1)),
        format!("{off} K"),
    );
    let per_kelvin = 3.9083e-3 * ohms_at_zero;
    let measured = Measured::combined(
        apart,
        &[
            (reading.standard_uncertainty().map(|u| u / per_kelvin), reading.doubt()),
            (other.standard_uncertainty(), other.doubt()),
        ],
    );
    let verdict = marking::hint(measured.between(-AGREEMENT.value, AGREEMENT.value)).worse(by_maker);
    marking::mark(&mut b, &measured, format!("{off} K"), verdict);
    let summary = match verdict {
        Verdict::Within => format!("The sensor says {} °C, {off} K off the thermometer.", decimals(found, 1)),
        _ => format!(
            "The sensor says {} °C, {off} K off the thermometer: more than 5 K, close to it or to the maker's ends, or an instrument's accuracy is in doubt. Check leads and wiring, and let the motor rest.",
            decimals(found, 1)
        ),
    };
    b.judged(verdict, summary)
}

/// A platinum sensor against the maker's cold resistance; within where the maker gives none.
fn maker_span(inputs: &Inputs, reading: &Reading<Resistance>) -> Verdict {
    let measured = Measured::direct(reading);
    let low = inputs.maker_least.map_or(Verdict::Within, |least| measured.at_least(least.ohms()));
    low.worse(inputs.maker_most.map_or(Verdict::Within, |most| measured.at_most(most.ohms())))
}

fn switch(mut b: OutcomeBuilder, inputs: &Inputs) -> Outcome {
    b.cite(SENSOR_SWITCH);
    let (closed, open) = inputs.maker_most.map_or((CLOSED.value, OPEN.value), |most| (most.ohms(), most.ohms()));
    if inputs.maker_most.is_some() {
        let shown = significant(closed, 3);
        b.limit(format!("at most {shown} Ω cold, the maker's"));
        b.rule(LimitRule::logarithmic("Ω").at_most(closed, format!("≤ {shown} Ω")));
    } else {
        b.limit("at most 10 Ω cold with its leads; above 100 Ω is open (common practice)");
        b.rule(LimitRule::logarithmic("Ω").at_most(CLOSED.value, "≤ 10 Ω").tick(OPEN.value, "open"));
    }
    let Some(reading) = plausible::reading_not_negative(&mut b, inputs.reading.as_ref(), "sensor resistance") else {
        return b.not_assessed();
    };
    let measured = Measured::direct(&reading);
    let shown = significant(measured.value, 3);
    let verdict = marking::graded(&measured, closed, open);
    b.figure("sensor resistance", measured.value, 3, "Ω");
    b.line(
        "closed when cold",
        &format!("R ≤ {} Ω", significant(closed, 3)),
        format!("{shown} Ω"),
        if measured.value <= closed {
            "closed"
        } else if measured.value > open {
            "open"
        } else {
            "neither"
        },
    );
    mark_if_drawable(&mut b, &measured, &shown, verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!(
                "{shown} Ω cold: the switch is open. The motor is hot, a lead is off, or it is another kind of sensor."
            ),
            Verdict::Marginal => {
                format!("{shown} Ω cold: a poor contact, long leads, or the meter's accuracy is in doubt.")
            }
            _ => format!("{shown} Ω cold: the switch is closed."),
        },
    )
}

/// A ruler in decades has no place for zero ohms: such a reading stays off it.
fn mark_if_drawable(b: &mut OutcomeBuilder, measured: &Measured, shown: &str, verdict: Verdict) {
    if measured.value > 0.0 {
        marking::mark(b, measured, format!("{shown} Ω"), verdict);
    } else if let Some(doubt) = &measured.doubt {
        b.note(format!("Marginal at best: {doubt}."));
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(sensor: Sensor, ohms: f64) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 0.2,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            sensor: Some(sensor),
            reading: Some(Reading::with(Resistance::from_ohms(ohms), meter)),
            in_series: Some(3),
            winding_temperature: Some(Reading::with(
                Temperature::from_celsius(20.0),
                Accuracy { percent_of_reading: 0.0, digits: 1.0, resolution: 0.1, ..meter },
            )),
            lead_resistance: Some(Resistance::from_ohms(0.0)),
            maker_least: None,
            maker_most: None,
        }
    }

    /// DIN 44081, 44082 (rows TH-01, TH-02, TH-04): C-TH-005 to C-TH-008.
    #[test]
    fn thermistors_of_the_reference_cases() {
        for (ohms, verdict, state) in [
            (210.0, Verdict::Within, "plausible"),
            (12.0, Verdict::Outside, "short circuit"),
            (2400.0, Verdict::Outside, "too high, or open"),
        ] {
            let outcome = check(&of(Sensor::Thermistor, ohms));
            assert_eq!((outcome.verdict, outcome.figures[2].value.as_str()), (verdict, state));
        }
        assert!((cold_most(3).ohms() - 750.0).abs() < 1e-9);
        assert_eq!(response_bounds(3).map(Resistance::ohms), [1650.0, 3990.0, 12_000.0]);
        for (ohms, verdict) in [
            (61.0, Verdict::Within),
            (60.0, Verdict::Marginal),
            (40.0, Verdict::Marginal),
            (19.0, Verdict::Outside),
            (747.0, Verdict::Within),
            (750.0, Verdict::Marginal),
            (752.0, Verdict::Outside),
            (0.0, Verdict::Outside),
        ] {
            assert_eq!(check(&of(Sensor::Thermistor, ohms)).verdict, verdict, "{ohms}");
        }
    }

    /// IEC 60751 (row TH-05): 107.79 Ω at 20 °C; 138.51 Ω is 100 °C.
    #[test]
    fn platinum_against_the_thermometer() {
        assert_eq!(check(&of(Sensor::Pt100, 107.79)).verdict, Verdict::Within);
        assert_eq!(check(&of(Sensor::Pt1000, 1077.9)).verdict, Verdict::Within);
        assert_eq!(check(&of(Sensor::Pt100, 138.51)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(Sensor::Pt100, 0.3)).verdict, Verdict::Outside);
        assert_eq!(check(&of(Sensor::Pt100, 1e9)).verdict, Verdict::Outside);
        let leads = Inputs { lead_resistance: Some(Resistance::from_ohms(3.85)), ..of(Sensor::Pt100, 111.64) };
        assert_eq!(check(&leads).verdict, Verdict::Within);
    }

    /// Common practice, no source (row TH-08).
    #[test]
    fn switch_closed_and_open() {
        for (ohms, verdict) in [
            (0.4, Verdict::Within),
            (9.9, Verdict::Within),
            (10.0, Verdict::Marginal),
            (100.0, Verdict::Marginal),
            (101.0, Verdict::Outside),
            (0.0, Verdict::Within),
        ] {
            assert_eq!(check(&of(Sensor::Switch, ohms)).verdict, verdict, "{ohms}");
        }
    }

    /// The maker's figures go first (standing rule); 200 Ω would pass by DIN 44081 (row TH-02).
    #[test]
    fn the_makers_cold_resistance_replaces_the_span() {
        let ohms = |r| Some(Resistance::from_ohms(r));
        let own = |sensor, r, least, most| {
            check(&Inputs { maker_least: ohms(least), maker_most: ohms(most), ..of(sensor, r) })
        };
        assert_eq!(own(Sensor::Thermistor, 200.0, 90.0, 180.0).verdict, Verdict::Outside);
        assert!(own(Sensor::Thermistor, 200.0, 90.0, 180.0).limit.starts_with("90.0 to 180 Ω"));
        assert_eq!(own(Sensor::Thermistor, 150.0, 90.0, 180.0).verdict, Verdict::Within);
        assert_eq!(own(Sensor::Pt100, 107.79, 100.0, 105.0).verdict, Verdict::Outside);
        assert_eq!(own(Sensor::Switch, 3.0, 0.1, 2.0).verdict, Verdict::Outside);
        assert_eq!(own(Sensor::Thermistor, 150.0, 180.0, 90.0).verdict, Verdict::NotAssessed);
    }

    #[test]
    fn limit_first_and_missing_named() {
        let outcome = check(&Inputs { reading: None, in_series: None, ..of(Sensor::Thermistor, 1.0) });
        assert_eq!(outcome.missing[0].what, "sensor resistance");
        assert!(outcome.rule.is_some() && outcome.limit.starts_with("60.0 to 750 Ω") && outcome.assumed.len() == 1);
        assert_eq!(check(&Inputs::default()).missing.len(), 2);
        assert_eq!(
            check(&Inputs { in_series: Some(0), ..of(Sensor::Thermistor, 210.0) }).verdict,
            Verdict::NotAssessed
        );
    }
}
