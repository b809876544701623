//! Test voltage and least insulation resistance of installation circuits (row IR-14).

use crate::quantity::{Resistance, Voltage};

/// IEC 60364-6:2016, 6.4.3.3, table 6.1: test voltage and least resistance, by nominal voltage and whether the
/// circuit is SELV or PELV.
#[must_use]
pub fn requirement(nominal: Voltage, extra_low: bool) -> (Voltage, Resistance) {
    let (volts, megohms) = if extra_low {
        (250.0, 0.5)
    } else if nominal.volts() <= 500.0 {
        (500.0, 1.0)
    } else {
        (1000.0, 1.0)
    };
    (Voltage::from_volts(volts), Resistance::from_ohms(megohms * 1e6))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// IEC 60364-6:2016 table 6.1 (row IR-14): the step lies above 500 V.
    #[test]
    fn the_step_lies_above_500_volts() {
        let at = |volts| requirement(Voltage::from_volts(volts), false).0.volts();
        assert!((at(500.0) - 500.0).abs() < 1e-9 && (at(690.0) - 1000.0).abs() < 1e-9);
    }
}
