//! Windings, sensors and runs: sheets and entries in, verdict and limit out. Limits by the sources of the checks.

use super::case::{Case, Field, hold};
use crate::plant::Sheet::{Drive, Further, Load, Motor, Site};
use engineering::Verdict::{Figure, Marginal, Outside, Within};

/// DIN 44081 (row TH-02): 20 to 250 Ω each; the maker's cold resistance goes first.
#[test]
fn sensor_resistance_by_kind_and_maker() {
    let base: &[Field] = &[(Drive, "motor-sensor", "ptc"), (Motor, "sensor-count", "3")];
    let read: &[_] = &[("sensor-ohms", "200")];
    let usual = "60.0 to 750 Ω cold for 3 in series; below 20 Ω in total a short";
    let own: &[Field] = &[(Motor, "sensor-low", "90"), (Motor, "sensor-high", "180")];
    let said = "90.0 to 180 Ω cold for 3 in series; below 20 Ω in total a short";
    hold("sensor-resistance", base, &[(&[], read, Within, usual), (own, read, Outside, said)]);
}

/// IEC 60034-1 (row IR-01 by IEEE 43): 5 MΩ at 40 °C for a random-wound motor below 1 kV.
#[test]
fn insulation_resistance_brought_to_forty_degrees() {
    let base: &[Field] = &[(Motor, "volts", "400"), (Motor, "construction", "random-wound")];
    let at_forty = |ohms| [("ir-60s", ohms), ("winding-temperature", "40")];
    let case = |ohms| Case::of(base, &at_forty(ohms)).once("insulation-resistance");
    assert_eq!((case("20").verdict, case("2").verdict), (Within, Outside));
    assert!(case("20").limit.contains("5.0"), "{}", case("20").limit);
}

/// Common practice (no source): 5 and 10 %; the maker's limit replaces both.
#[test]
fn current_balance_by_practice_and_maker() {
    let read: &[_] = &[("run-i-u", "9.4"), ("run-i-v", "10"), ("run-i-w", "10.6"), ("run-meter", "true-rms")];
    let said = |set: &[Field]| {
        let runs = Case::of(set, read).runs("current-balance");
        (runs[0].1.verdict, runs[0].1.limit.clone())
    };
    assert_eq!(said(&[]), (Marginal, "at most 5 % off the mean; beyond 10 % is outside (common practice)".to_owned()));
    let own = said(&[(Motor, "current-unbalance-maximum", "4")]);
    assert_eq!(own, (Outside, "at most 4.00 % off the mean, the maker's".to_owned()));
}

/// Row EN-04 (common practice): 0.5 %; the entered tolerance replaces it, the ratio names the cause.
#[test]
fn encoder_scaling_by_tolerance_and_ratio() {
    let said = |set: &[Field], shown: &'static str| {
        let base: &[Field] = &[(Drive, "encoder", "yes")];
        let read = [("run-encoder-rpm", shown), ("run-rpm", "1000")];
        Case::of(&[base, set].concat(), &read).runs("encoder-scaling").remove(0).1
    };
    assert_eq!(said(&[], "1003").verdict, Within);
    let tight = said(&[(Further, "encoder-tolerance", "0.1")], "1003");
    assert_eq!((tight.verdict, tight.limit.as_str()), (Outside, "at most 0.10 % apart (as entered)"));
    assert!(said(&[(Further, "encoder-ratio", "2.5")], "2500").summary.contains("turns 2.50 times"));
}

/// ISO 20816-3:2022 (row VB-01): group 2 rigid 1.4, 2.8, 4.5 mm/s; below 15 kW a figure.
#[test]
fn vibration_by_site_height_and_makers() {
    let said = |set: &[Field]| {
        let base: &[Field] = &[(Motor, "power", "75"), (Load, "foundation", "rigid"), (Motor, "shaft-height", "250")];
        let read = [("vibration-drive-end", "2.0")];
        let (_, outcome) = Case::of(&[base, set].concat(), &read).runs("vibration").remove(0);
        (outcome.verdict, outcome.limit)
    };
    assert_eq!(said(&[]), (Within, "at most 2.8 mm/s (zones A and B); beyond 4.5 mm/s is outside".to_owned()));
    let strict = "at most 1.4 mm/s (zone A, as the site accepts); beyond 2.8 mm/s is outside";
    assert_eq!(said(&[(Site, "vibration-boundary", "a-b")]), (Marginal, strict.to_owned()));
    assert_eq!(said(&[(Motor, "power", "11")]), (Figure, "a figure: the standard's zones do not apply".to_owned()));
    let makers: &[Field] = &[(Motor, "vibration-maximum", "2.8"), (Load, "vibration-limit", "1.8")];
    assert_eq!(said(makers), (Outside, "at most 1.8 mm/s, the maker's".to_owned()));
}

/// IEC 60034-1 (row MN-18, from memory): class F 105 K, 95 K for a plate of 50 °C.
#[test]
fn temperature_rise_by_class_and_plate() {
    let base: &[Field] = &[(Motor, "thermal-class", "155")];
    let read: &[_] = &[("thermal-method", "sensor"), ("thermal-sensor", "120"), ("thermal-ambient", "20")];
    let plate: &[Field] = &[(Motor, "ambient", "50")];
    hold("temperature-rise", base, &[(&[], read, Within, "at most 105 K"), (plate, read, Outside, "at most 95.0 K")]);
}
