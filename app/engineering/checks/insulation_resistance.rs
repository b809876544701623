//! # insulation-resistance
//!
//! Winding insulation to earth after one minute, corrected to 40 °C, against the minimum of IEEE 43.
//!
//! R₄₀ = R·K. Thermoplastic: K = 0.5^((40 − T)/10). Thermosetting, 10 to 85 °C only:
//! K = exp(−4230·(1/(T + 273) − 1/313)) from 40 °C up, K = exp(−1245·(1/(T + 273) − 1/313)) below.
//! System unknown: the smaller of the two factors; outside 10 to 85 °C the halving rule, and only below 10 °C. The
//! thermometer counts as an instrument: without its word the verdict is marginal at best.
//! Minimum: 5 MΩ random-wound or below 1 kV; 100 MΩ most form-wound windings after about 1970;
//! kV + 1 for older ones. Measured with its cable, the limit is the pair's. The motor maker's limit goes first.
//! Taken with a test voltage other than the one asked for (insulation-test-voltage), or with the winding at or below the
//! dew point of its air, the reading is marginal at best.

use super::insulation_test_voltage;
use crate::decision::Measured;
use crate::formulas::dew_point::dew_point;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Ratio, Resistance, Temperature, Voltage};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::insulation::{IR_01, IR_02, IR_03, IR_04, IR_11};
use crate::sources::windings::MAGNUS;

/// Name in the catalogue.
pub const NAME: &str = "insulation-resistance";

/// The insulation system, which decides the temperature correction.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum System {
    /// Asphaltic, shellac and similar; the halving rule.
    Thermoplastic,
    /// Epoxy, polyester; most windings since about 1970.
    Thermosetting,
}

/// How the winding is made, which decides the minimum.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Construction {
    /// Random-wound, or form-wound below 1 kV.
    RandomWound,
    /// Form-wound, after about 1970.
    FormWound,
    /// Made before about 1970.
    Old,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Reading at one minute.
    pub reading: Option<Reading<Resistance>>,
    /// Winding temperature during the test.
    pub winding_temperature: Option<Reading<Temperature>>,
    /// Rated line-to-line voltage.
    pub rated_voltage: Option<Voltage>,
    /// Insulation system, when the maker tells.
    pub system: Option<System>,
    /// Construction, when known.
    pub construction: Option<Construction>,
    /// The motor maker's own minimum at 40 °C.
    pub maker_minimum: Option<Resistance>,
    /// Direct voltage set on the tester.
    pub test_voltage: Option<Voltage>,
    /// The motor maker's own test voltage.
    pub maker_test_voltage: Option<Voltage>,
    /// Air temperature at the motor.
    pub air_temperature: Option<Temperature>,
    /// Relative humidity of that air.
    pub humidity: Option<Ratio>,
}

/// Worst-case factor and the words for the rule applied; `None` where no rule corrects.
#[must_use]
pub fn correction(system: Option<System>, celsius: f64) -> Option<(f64, &'static str)> {
    let halving = libm::pow(0.5, (40.0 - celsius) / 10.0);
    let thermosetting = (10.0..85.0).contains(&celsius).then(|| {
        let span = 1.0 / (celsius + 273.0) - 1.0 / 313.0;
        libm::exp(if celsius >= 40.0 { -4230.0 * span } else { -1245.0 * span })
    });
    match system {
        Some(System::Thermoplastic) => Some((halving, "thermoplastic: halved for every 10 K")),
        Some(System::Thermosetting) => thermosetting.map(|k| (k, "thermosetting equations")),
        None if celsius < 10.0 => Some((halving, "insulation system not stated, below 10 °C: the halving rule")),
        None => thermosetting.map(|k| (k.min(halving), "insulation system not stated: the smaller of the two rules")),
    }
}

/// How much the factor changes for one kelvin; zero where no rule corrects on both sides.
pub(crate) fn slope(system: Option<System>, celsius: f64) -> f64 {
    match (correction(system, celsius + 0.5), correction(system, celsius - 0.5)) {
        (Some((above, _)), Some((below, _))) => (above - below).abs(),
        _ => 0.0,
    }
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(IR_02);
    b.note("The motor maker's own limit goes first where there is one.");
    let Some(minimum) = minimum(&mut b, inputs) else { return b.not_assessed() };
    let limit = minimum / 1e6;
    b.limit(format!("at least {} MΩ at 40 °C", significant(limit, 3)));
    b.rule(LimitRule::logarithmic("MΩ").at_least(limit, format!("≥ {} MΩ", significant(limit, 3))));
    let temperature = b.need(inputs.winding_temperature.clone(), "winding temperature");
    let reading = b.need(inputs.reading.clone(), "insulation resistance at 1 min");
    let Some(temperature) = temperature else { return b.not_assessed() };

    let celsius = temperature.number();
    let Some((k, rule)) = correction(inputs.system, celsius) else {
        return b.not_judged(format!(
            "Not assessed: no published correction holds at {} °C. Repeat the test with the winding between 10 and 85 °C.",
            significant(celsius, 3)
        ));
    };
    if inputs.system != Some(System::Thermosetting) {
        b.cite(IR_03)
    }
    if inputs.system != Some(System::Thermoplastic) {
        b.cite(IR_04)
    }
    let at_this = limit / k;
    b.limit(format!(
        "at least {} MΩ at 40 °C, so {} MΩ at {} °C",
        significant(limit, 3),
        significant(at_this, 3),
        significant(celsius, 3)
    ));
    b.line(
        &format!("correction to 40 °C, {rule}"),
        "K(T)",
        format!("T = {} °C", significant(celsius, 3)),
        significant(k, 3),
    );
    let Some(reading) = reading else { return b.not_assessed() };

    let megohms = reading.number() / 1e6;
    // The thermometer's doubt moves K, so its word counts as much as the tester's.
    let slope = slope(inputs.system, celsius);
    let measured = Measured::combined(
        megohms * k,
        &[
            (reading.standard_uncertainty().map(|u| u / 1e6 * k), reading.doubt()),
            (temperature.standard_uncertainty().map(|u| u * slope * megohms), temperature.doubt()),
        ],
    );
    if let Some(doubt) = &measured.doubt {
        b.note(format!("Marginal at best: {doubt}."));
    } else if measured.value > 0.0 {
        // Nothing can be said of the tester from a reading of zero.
        b.needed(format!(
            "With this tester {} MΩ is within",
            significant(at_this * (1.0 + measured.expanded / measured.value), 3)
        ));
    }
    let circumstances = circumstances(&mut b, inputs, celsius);
    let verdict = measured.at_least(limit);
    let verdict = if circumstances.is_empty() { verdict } else { verdict.worse(Verdict::Marginal) };
    let shown = significant(measured.value, 3);
    b.figure("insulation resistance at 40 °C", measured.value, 3, "MΩ");
    b.figure("correction factor", k, 3, "");
    b.line(
        "result",
        "R₄₀ = R·K",
        format!("{} MΩ × {}", significant(megohms, 3), significant(k, 3)),
        format!("{shown} MΩ ± {} MΩ", significant(measured.expanded, 2)),
    );
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(measured.value, measured.expanded, format!("{shown} MΩ"), verdict));
    }
    let limit = significant(limit, 3);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("At 40 °C: {shown} MΩ, below {limit} MΩ. Look for moisture, dirt or a damaged cable; test the cable alone; do not energise until the cause is known."),
            Verdict::Marginal if !circumstances.is_empty() => format!("At 40 °C: {shown} MΩ against {limit} MΩ, but marginal at best: {}. Put that right and repeat the test.", circumstances.join("; ")),
            Verdict::Marginal => format!("At 40 °C: {shown} MΩ. The instrument cannot tell it from the {limit} MΩ limit, or its accuracy is in doubt."),
            _ => format!("At 40 °C: {shown} MΩ, at least {limit} MΩ."),
        },
    )
}

/// Why the reading is marginal at best, whatever its size: how the test was made.
fn circumstances(b: &mut OutcomeBuilder, inputs: &Inputs, winding: f64) -> Vec<String> {
    let mut why = Vec::new();
    let tested = insulation_test_voltage::check(&insulation_test_voltage::Inputs {
        test_voltage: inputs.test_voltage,
        rated_voltage: inputs.rated_voltage,
        maker_test_voltage: inputs.maker_test_voltage,
    });
    if let (Verdict::Outside, Some(volts)) = (tested.verdict, inputs.test_voltage) {
        b.cite(IR_01);
        let volts = significant(volts.volts(), 4);
        why.push(format!("the test voltage was {volts} V, where {} is asked for", tested.limit));
    }
    if let Some(dew) = inputs.air_temperature.zip(inputs.humidity).and_then(|(air, humidity)| dew_point(air, humidity))
        && winding <= dew.celsius()
    {
        b.cite(IR_11);
        b.cite(MAGNUS);
        let (winding, dew) = (significant(winding, 3), significant(dew.celsius(), 3));
        why.push(format!("the winding at {winding} °C was not above the dew point of {dew} °C and may have been wet"));
    }
    for one in &why {
        b.note(format!("Marginal at best: {one}."));
    }
    why
}

/// Minimum at 40 °C in ohms, with its line of working.
fn minimum(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<f64> {
    if let Some(own) = inputs.maker_minimum {
        b.line("limit", "the maker's", String::new(), format!("{} MΩ", significant(own.ohms() / 1e6, 3)));
        return Some(own.ohms());
    }
    let kilovolts = b.need(inputs.rated_voltage, "rated motor voltage")?.volts() / 1000.0;
    let construction = b.assume(
        inputs.construction,
        Construction::RandomWound,
        "winding construction",
        "random-wound, as nearly all low-voltage motors are",
    );
    let megohms = match construction {
        Construction::FormWound if kilovolts >= 1.0 => 100.0,
        Construction::RandomWound | Construction::FormWound => 5.0,
        Construction::Old => kilovolts + 1.0,
    };
    b.line(
        "limit",
        "minimum at 40 °C",
        format!("{} kV", significant(kilovolts, 3)),
        format!("{} MΩ", significant(megohms, 3)),
    );
    Some(megohms * 1e6)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn reading(megohms: f64, celsius: f64) -> Inputs {
        let tester = Accuracy {
            percent_of_reading: 5.0,
            digits: 3.0,
            resolution: 0.01e6,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            reading: Some(Reading::with(Resistance::from_ohms(megohms * 1e6), tester)),
            winding_temperature: Some(Reading::with(
                Temperature::from_celsius(celsius),
                Accuracy { percent_of_reading: 0.0, digits: 5.0, resolution: 0.1, ..tester },
            )),
            rated_voltage: Some(Voltage::from_volts(400.0)),
            ..Inputs::default()
        }
    }

    /// IEEE 43-2013 cl. 6.3, check values of row IR-04: 0.762 at 20 °C, 2.252 at 60 °C, 4.624 at 80 °C.
    #[test]
    fn thermosetting_factors_are_the_published_ones() {
        for (celsius, published) in
            [(20.0, 0.762), (30.0, 0.877), (50.0, 1.520), (60.0, 2.252), (70.0, 3.260), (80.0, 4.624)]
        {
            let (k, _) = correction(Some(System::Thermosetting), celsius).expect("in range");
            assert!((k - published).abs() < 0.001, "{celsius}: {k}");
        }
    }

    #[test]
    fn unknown_system_takes_the_smaller_factor_on_both_sides_of_40() {
        assert!((correction(None, 20.0).expect("rule").0 - 0.25).abs() < 1e-12);
        assert!((correction(None, 60.0).expect("rule").0 - 2.252).abs() < 0.001);
        assert!(correction(None, 90.0).is_none());
        assert!((correction(None, 0.0).expect("rule").0 - 0.0625).abs() < 1e-12);
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&reading(40.0, 20.0)).verdict, Verdict::Within);
        assert_eq!(check(&reading(20.5, 20.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&reading(12.0, 20.0)).verdict, Verdict::Outside);
    }

    #[test]
    fn a_thermometer_that_nobody_named_makes_it_marginal_at_best() {
        let bare = |megohms| Inputs {
            winding_temperature: Some(Reading::bare(Temperature::from_celsius(20.0))),
            ..reading(megohms, 20.0)
        };
        assert_eq!(check(&bare(400.0)).verdict, Verdict::Marginal);
        assert!(check(&bare(400.0)).notes.iter().any(|n| n.contains("no instrument is named")));
        assert_eq!(check(&bare(12.0)).verdict, Verdict::Outside);
    }

    /// IEEE 43-2013, table 1 (row IR-01): 500 V up to 1 kV; and clause 5 (row IR-11): winding above the dew point.
    #[test]
    fn the_wrong_test_voltage_or_a_wet_winding_makes_it_marginal_at_best_and_says_why() {
        let volts = |v| Some(Voltage::from_volts(v));
        let tested = |v| check(&Inputs { test_voltage: volts(v), ..reading(400.0, 20.0) });
        assert_eq!((tested(500.0).verdict, tested(250.0).verdict), (Verdict::Within, Verdict::Marginal));
        let said = tested(250.0).summary;
        assert!(said.contains("the test voltage was 250.0 V, where 500 V dc is asked for"), "{said}");
        let own = Inputs { test_voltage: volts(1000.0), maker_test_voltage: volts(1000.0), ..reading(400.0, 20.0) };
        assert_eq!(check(&own).verdict, Verdict::Within, "the maker asked for it");
        // 20 °C and 100 % humidity: the dew point is the air's own 20 °C.
        let damp = |humidity| {
            let (air_temperature, humidity) =
                (Some(Temperature::from_celsius(20.0)), Some(Ratio::from_fraction(humidity)));
            check(&Inputs { air_temperature, humidity, ..reading(400.0, 20.0) })
        };
        assert_eq!((damp(0.5).verdict, damp(1.0).verdict), (Verdict::Within, Verdict::Marginal));
        assert!(damp(1.0).summary.contains("not above the dew point of 20.0 °C"), "{}", damp(1.0).summary);
        let low = Inputs { test_voltage: volts(250.0), ..reading(12.0, 20.0) };
        assert_eq!(check(&low).verdict, Verdict::Outside, "outside stays outside");
    }

    #[test]
    fn a_reading_of_zero_is_outside_and_says_no_number_that_is_none() {
        let outcome = check(&reading(0.0, 20.0));
        assert_eq!((outcome.verdict, outcome.needed.as_str()), (Verdict::Outside, ""));
        assert!(!format!("{outcome:?}").contains("not a number"));
    }

    #[test]
    fn the_limit_is_there_before_the_reading() {
        let outcome = check(&Inputs { reading: None, ..reading(1.0, 20.0) });
        assert_eq!(outcome.verdict, Verdict::NotAssessed);
        assert_eq!(outcome.limit, "at least 5.00 MΩ at 40 °C, so 20.0 MΩ at 20.0 °C");
        assert!(outcome.rule.is_some());
        assert_eq!(outcome.missing[0].what, "insulation resistance at 1 min");
    }
}
