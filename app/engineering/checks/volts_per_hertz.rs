//! # volts-per-hertz
//!
//! Base voltage over base frequency as set in the drive, against the plate: the ratio decides the flux.
//!
//! k = U/f; deviation k_set/k_N − 1 (row VF-01). Up to what the drive's resolution can do: within. Up to 5 %, which
//! IEC 60034-1 zone A lets the voltage differ (row MN-13): marginal. Beyond: outside. A motor in delta run beyond its
//! rated frequency keeps its ratio (row VF-05): enter the plate values of the connection in use.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Frequency, Voltage, VoltsPerHertz};
use crate::rounding::significant;
use crate::sources::settings::{MN_13, VF_01};

/// Name in the catalogue.
pub const NAME: &str = "volts-per-hertz";

/// Beyond this the flux is wrong.
pub const WRONG: Limit = Limit { name: "deviation of volts per hertz", value: 5.0, unit: "%", source: MN_13 };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Base voltage as set.
    pub set_voltage: Option<Voltage>,
    /// Base frequency as set.
    pub set_frequency: Option<Frequency>,
    /// Rated voltage, in the connection in use.
    pub rated_voltage: Option<Voltage>,
    /// Rated frequency.
    pub rated_frequency: Option<Frequency>,
    /// Smallest step of the drive's voltage setting.
    pub voltage_resolution: Option<Voltage>,
    /// Smallest step of the drive's frequency setting.
    pub frequency_resolution: Option<Frequency>,
}

/// U/f; `None` unless both are above zero.
#[must_use]
pub fn ratio(voltage: Voltage, frequency: Frequency) -> Option<VoltsPerHertz> {
    let ratio = voltage.volts() / frequency.hertz();
    (voltage.volts() > 0.0 && frequency.hertz() > 0.0 && ratio.is_finite())
        .then(|| VoltsPerHertz::from_volts_per_hertz(ratio))
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(VF_01);
    b.cite(MN_13);
    let rated_voltage = plausible::positive(&mut b, inputs.rated_voltage, "rated motor voltage");
    let rated_frequency = plausible::positive(&mut b, inputs.rated_frequency, "rated frequency");
    let step_v = b
        .assume(inputs.voltage_resolution, Voltage::from_volts(1.0), "step of the voltage setting", "1 V")
        .volts()
        .abs();
    let step_f = b
        .assume(inputs.frequency_resolution, Frequency::from_hertz(0.1), "step of the frequency setting", "0.1 Hz")
        .hertz()
        .abs();
    let plate = rated_voltage.zip(rated_frequency).and_then(|(v, f)| Some((v, f, ratio(v, f)?.volts_per_hertz())));
    let mut good = 0.0;
    if let Some((v, f, k)) = plate {
        // Half a step of each setting is as close as the drive can come.
        good = (0.5 * step_v / v.volts() + 0.5 * step_f / f.hertz()) * 100.0;
        b.limit(format!(
            "{} V/Hz ± {} %; beyond {} % is outside",
            significant(k, 4),
            significant(good, 2),
            significant(WRONG.value, 2)
        ));
        b.rule(
            LimitRule::linear("V/Hz")
                .between(
                    k * (1.0 - good / 100.0),
                    format!("≥ {}", significant(k * (1.0 - good / 100.0), 4)),
                    k * (1.0 + good / 100.0),
                    format!("≤ {}", significant(k * (1.0 + good / 100.0), 4)),
                )
                .tick(k * (1.0 - WRONG.value / 100.0), "−5 %")
                .tick(k * (1.0 + WRONG.value / 100.0), "+5 %"),
        );
        b.line(
            "from the plate",
            "k_N = U_N/f_N",
            format!("{} V / {} Hz", significant(v.volts(), 4), significant(f.hertz(), 4)),
            format!("{} V/Hz", significant(k, 4)),
        );
    }
    let set_voltage = plausible::positive(&mut b, inputs.set_voltage, "base voltage as set");
    let set_frequency = plausible::positive(&mut b, inputs.set_frequency, "base frequency as set");
    let (Some((_, _, k)), Some(v), Some(f)) = (plate, set_voltage, set_frequency) else { return b.not_assessed() };
    let Some(set) = ratio(v, f).map(VoltsPerHertz::volts_per_hertz) else { return b.not_assessed() };

    let deviation = (set / k - 1.0) * 100.0;
    let (shown, off) = (significant(set, 4), significant(deviation, 2));
    b.line(
        "as set",
        "k = U/f",
        format!("{} V / {} Hz", significant(v.volts(), 4), significant(f.hertz(), 4)),
        format!("{shown} V/Hz"),
    );
    b.line("deviation", "k/k_N − 1", format!("{shown} / {} − 1", significant(k, 4)), format!("{off} %"));
    b.figure("volts per hertz as set", set, 4, "V/Hz");
    b.figure("volts per hertz of the plate", k, 4, "V/Hz");
    b.figure("deviation", deviation, 2, "%");
    let size = deviation.abs();
    let verdict = if marking::up_to(size, good + 1e-9) {
        Verdict::Within
    } else if marking::up_to(size, WRONG.value) {
        Verdict::Marginal
    } else {
        Verdict::Outside
    };
    marking::mark(&mut b, &Measured::exact(set), format!("{shown} V/Hz"), verdict);
    let effect = if deviation > 0.0 {
        "too much flux: high current and heat without load"
    } else {
        "too little flux: less torque and more current under load"
    };
    b.judged(
        verdict,
        match verdict {
            Verdict::Within => format!("{shown} V/Hz set, as the plate asks."),
            Verdict::Marginal => format!("{shown} V/Hz set, {off} % off the plate: {effect}. Correct it unless it is meant so."),
            _ => format!("{shown} V/Hz set, {off} % off the plate: {effect}. Check plate, connection and both base settings before running."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(volts: f64, hertz: f64, rated: (f64, f64)) -> Inputs {
        Inputs {
            set_voltage: Some(Voltage::from_volts(volts)),
            set_frequency: Some(Frequency::from_hertz(hertz)),
            rated_voltage: Some(Voltage::from_volts(rated.0)),
            rated_frequency: Some(Frequency::from_hertz(rated.1)),
            voltage_resolution: Some(Voltage::from_volts(1.0)),
            frequency_resolution: Some(Frequency::from_hertz(0.1)),
        }
    }

    /// C-VF-001, C-VF-002 (row VF-01): 8.000 and 7.6667 V/Hz.
    #[test]
    fn reference_ratios() {
        let (v, f) = (Voltage::from_volts, Frequency::from_hertz);
        assert!((ratio(v(400.0), f(50.0)).expect("plausible").volts_per_hertz() - 8.0).abs() < 1e-9);
        assert!((ratio(v(460.0), f(60.0)).expect("plausible").volts_per_hertz() - 7.666_666_7).abs() < 1e-4);
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        let plate = (400.0, 50.0);
        assert_eq!(check(&of(400.0, 50.0, plate)).verdict, Verdict::Within);
        assert_eq!(check(&of(400.8, 50.0, plate)).verdict, Verdict::Within);
        assert_eq!(check(&of(402.0, 50.0, plate)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(380.0, 50.0, plate)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(420.0, 50.0, plate)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(421.0, 50.0, plate)).verdict, Verdict::Outside);
        assert_eq!(check(&of(400.0, 60.0, plate)).verdict, Verdict::Outside);
    }

    /// Row VF-05, C-VF-003: 230 V 50 Hz in delta, 400 V at 86.96 Hz, keeps the ratio; √3·50 = 86.6 Hz nearly.
    #[test]
    fn delta_beyond_rated_frequency_keeps_the_ratio() {
        assert_eq!(check(&of(400.0, 87.0, (230.0, 50.0))).verdict, Verdict::Within);
        assert_eq!(check(&of(400.0, 86.6, (230.0, 50.0))).verdict, Verdict::Marginal);
    }

    #[test]
    fn limit_first_missing_named_and_impossible() {
        let outcome = check(&Inputs { set_voltage: None, voltage_resolution: None, ..of(1.0, 50.0, (400.0, 50.0)) });
        assert_eq!(outcome.missing[0].what, "base voltage as set");
        assert!(outcome.limit.starts_with("8.000 V/Hz") && outcome.rule.is_some());
        assert_eq!(outcome.assumed.len(), 1);
        assert_eq!(check(&of(400.0, 0.0, (400.0, 50.0))).verdict, Verdict::NotAssessed);
        assert_eq!(check(&of(400.0, 50.0, (400.0, f64::INFINITY))).verdict, Verdict::NotAssessed);
    }
}
