//! What plates usually print: rated volts and powers by name, and the power factors and slips to expect (common practice).

use crate::quantity::{Frequency, Power, Ratio};
use crate::unit::Unit;

/// Rated line volts in common use (common practice, no source).
pub const VOLTS: [f64; 28] = [
    115.0, 127.0, 200.0, 208.0, 220.0, 230.0, 240.0, 255.0, 265.0, 290.0, 346.0, 380.0, 400.0, 415.0, 420.0, 440.0,
    460.0, 480.0, 500.0, 525.0, 550.0, 575.0, 600.0, 660.0, 690.0, 720.0, 796.0, 1000.0,
];

/// Preferred ratings in kilowatts (IEC 60072-1, from memory).
const KILOWATTS: [f64; 43] = [
    0.06, 0.09, 0.12, 0.18, 0.25, 0.37, 0.55, 0.75, 1.1, 1.5, 1.8, 2.2, 3.0, 3.7, 4.0, 5.5, 7.5, 9.2, 11.0, 15.0, 18.5,
    22.0, 30.0, 37.0, 45.0, 55.0, 75.0, 90.0, 110.0, 132.0, 150.0, 160.0, 185.0, 200.0, 220.0, 250.0, 280.0, 300.0,
    315.0, 355.0, 400.0, 450.0, 500.0,
];

/// Ratings in horsepower (NEMA MG 1, from memory; 10 CFR 431.25 and NFPA 70 table 430.250 list most of them).
const HORSEPOWER: [f64; 30] = [
    0.25, 0.33, 0.5, 0.75, 1.0, 1.5, 2.0, 3.0, 5.0, 7.5, 10.0, 15.0, 20.0, 25.0, 30.0, 40.0, 50.0, 60.0, 75.0, 100.0,
    125.0, 150.0, 200.0, 250.0, 300.0, 350.0, 400.0, 450.0, 500.0, 600.0,
];

/// Whether a power as printed is a rating by name, and so exact as it stands.
#[must_use]
pub fn is_rating(number: f64, unit: Unit) -> bool {
    let list: &[f64] = match unit.symbol {
        "kW" => &KILOWATTS,
        "hp" | "PS" => &HORSEPOWER,
        _ => return false,
    };
    holds(list, number, 1e-6)
}

/// Whether a voltage is one in common use.
pub(crate) fn is_usual_voltage(volts: f64) -> bool {
    holds(&VOLTS, volts, 1e-6)
}

/// The voltage in common use within 2 % of this one, or this one.
pub(crate) fn nearest_voltage(volts: f64) -> f64 {
    let off = |v: &f64| (v / volts - 1.0).abs();
    VOLTS.into_iter().filter(|v| off(v) < 0.02).min_by(|a, b| off(a).total_cmp(&off(b))).unwrap_or(volts)
}

fn holds(list: &[f64], number: f64, within: f64) -> bool {
    list.iter().any(|n| (n / number - 1.0).abs() < within)
}

/// The power factor to expect of a size and a number of pole pairs, good to about 0.08 (common practice, no source).
#[must_use]
pub fn power_factor(power: Power, pole_pairs: u32) -> Ratio {
    let by_size = match power.watts() {
        w if w < 370.0 => 0.66,
        w if w < 1500.0 => 0.74,
        w if w < 7500.0 => 0.81,
        _ => 0.85,
    };
    // Each pole pair beyond two magnetises with a little more current.
    Ratio::from_fraction(by_size - 0.03 * (f64::from(pole_pairs.min(6)) - 2.0))
}

/// Whether a frequency is that of a public supply.
#[must_use]
pub fn is_supply(frequency: Frequency) -> bool {
    [50.0, 60.0].into_iter().any(|f| (frequency.hertz() / f - 1.0_f64).abs() < 1e-6)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::unit::Kind;

    /// The kilowatts of IEC 60034-30-1 and the horsepower of 10 CFR 431.25 are ratings by name; what lies between is not.
    #[test]
    fn published_ratings_are_exact_and_others_rounded() {
        let unit = |symbol| *Kind::Power.unit(symbol).expect("listed");
        for kilowatts in [0.12, 0.75, 18.5, 132.0, 200.0] {
            assert!(is_rating(kilowatts, unit("kW")));
        }
        assert!(is_rating(7.5, unit("hp")) && is_rating(125.0, unit("hp")));
        assert!(!is_rating(5.5, unit("hp")) && !is_rating(12.6, unit("kW")) && !is_rating(750.0, unit("W")));
        assert_eq!((nearest_voltage(692.8), nearest_voltage(230.9), nearest_voltage(100.0)), (690.0, 230.0, 100.0));
    }
}
