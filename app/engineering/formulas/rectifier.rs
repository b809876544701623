//! Direct voltage and ideal harmonics of a six-pulse diode bridge (rows DC-01 to DC-04, SP-06 and TF-02).

use std::f64::consts::{PI, SQRT_2};

use crate::quantity::{Frequency, Ratio, Voltage};

/// Mean of the unsmoothed bridge over the line volts, 3√2/π.
pub const MEAN: f64 = 3.0 * SQRT_2 / PI;

/// Mean of the unsmoothed bridge: 3√2/π·U.
#[must_use]
pub fn mean(line: Voltage) -> Voltage {
    Voltage::from_volts(MEAN * line.volts())
}

/// Peak to which a capacitor charges at light load: √2·U.
#[must_use]
pub fn peak(line: Voltage) -> Voltage {
    Voltage::from_volts(SQRT_2 * line.volts())
}

/// Peak-to-peak ripple of the unsmoothed bridge: √2·U·(1 − cos 30°).
#[must_use]
pub fn ripple(line: Voltage) -> Voltage {
    Voltage::from_volts(SQRT_2 * line.volts() * (1.0 - 3.0_f64.sqrt() / 2.0))
}

/// R.m.s. ripple of the unsmoothed bridge over its mean.
#[must_use]
pub fn ripple_of_mean() -> Ratio {
    let mean_square = 1.0 + 3.0 * 3.0_f64.sqrt() / (2.0 * PI);
    Ratio::from_fraction((mean_square / (MEAN * MEAN) - 1.0).sqrt())
}

/// Mean of the unsmoothed bridge with one phase lost: 2√2/π·U.
#[must_use]
pub fn mean_with_a_phase_lost(line: Voltage) -> Voltage {
    Voltage::from_volts(2.0 * SQRT_2 / PI * line.volts())
}

/// Ripple frequency: six pulses a cycle, two with a phase lost.
#[must_use]
pub fn ripple_frequency(supply: Frequency, phase_lost: bool) -> Frequency {
    Frequency::from_hertz(supply.hertz() * if phase_lost { 2.0 } else { 6.0 })
}

/// Characteristic orders 6k ± 1 up to and including `highest`.
#[must_use]
pub fn characteristic_orders(highest: u32) -> Vec<u32> {
    (5..=highest).filter(|h| h % 6 == 1 || h % 6 == 5).collect()
}

/// Total harmonic distortion of the ideal line current over the characteristic orders up to `highest`.
#[must_use]
pub fn ideal_distortion(highest: u32) -> Ratio {
    let squares: f64 = characteristic_orders(highest).into_iter().map(|h| 1.0 / (f64::from(h) * f64::from(h))).sum();
    Ratio::from_fraction(squares.sqrt())
}

/// Fundamental over total r.m.s. of the ideal line current, 3/π.
#[must_use]
pub fn distortion_factor() -> Ratio {
    Ratio::from_fraction(3.0 / PI)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-DC-001 to C-DC-004 (rows DC-01 to DC-04, arithmetic).
    #[test]
    fn voltages_of_the_bridge() {
        for (line, mean_volts, peak_volts, ripple_volts) in [
            (400.0, 540.189_79, 565.685_42, 75.787_476),
            (480.0, 648.227_75, 678.822_51, 90.944_972),
            (230.0, 310.609_13, 325.269_12, 43.577_799),
        ] {
            let line = Voltage::from_volts(line);
            assert!((mean(line).volts() - mean_volts).abs() < 0.05);
            assert!((peak(line).volts() - peak_volts).abs() < 0.05);
            assert!((ripple(line).volts() - ripple_volts).abs() < 0.05);
        }
        assert!((ripple_of_mean().fraction() * 100.0 - 4.196_661_4).abs() < 0.01);
        assert!((mean_with_a_phase_lost(Voltage::from_volts(400.0)).volts() - 360.126_53).abs() < 0.1);
        // C-TF-002: six pulses a cycle.
        assert!((ripple_frequency(Frequency::from_hertz(60.0), false).hertz() - 360.0).abs() < 1e-9);
        assert!((ripple_frequency(Frequency::from_hertz(50.0), true).hertz() - 100.0).abs() < 1e-9);
    }

    /// C-SP-008 (row SP-06, published ideal spectrum; distortion computed).
    #[test]
    fn ideal_spectrum() {
        assert_eq!(characteristic_orders(25), [5, 7, 11, 13, 17, 19, 23, 25]);
        assert!((ideal_distortion(25).fraction() * 100.0 - 29.036_259).abs() < 0.01);
        assert!((ideal_distortion(50).fraction() * 100.0 - 30.015_291).abs() < 0.01);
        assert!((ideal_distortion(100_000).fraction() * 100.0 - 31.084_194).abs() < 0.01);
        assert!((distortion_factor().fraction() - 0.954_929_66).abs() < 1e-5);
    }
}
