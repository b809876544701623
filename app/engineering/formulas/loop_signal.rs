//! A 4 to 20 mA signal: its linear scale (row AN-01), its error (AN-03) and its failure levels (AN-02).

use crate::quantity::{Current, Quantity, Ratio};

/// The five points of a loop check, in milliamperes.
pub const POINTS: [f64; 5] = [4.0, 8.0, 12.0, 16.0, 20.0];

/// What a loop current says about the transmitter, after NAMUR NE 43.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum State {
    /// 3.8 to 20.5 mA.
    Valid,
    /// At or below 3.6 mA.
    FailureLow,
    /// At or above 21 mA.
    FailureHigh,
    /// Between: neither; the last judgement stands.
    Neither,
}

/// The state at a loop current; what is not a number is a low failure.
#[must_use]
pub fn state(current: Current) -> State {
    let milliamperes = current.amperes() * 1e3;
    // A last binary digit of the conversion decides nothing.
    let hair = 1e-9;
    if milliamperes >= 21.0 - hair {
        State::FailureHigh
    } else if milliamperes <= 3.6 + hair || milliamperes.is_nan() {
        State::FailureLow
    } else if (3.8 - hair..=20.5 + hair).contains(&milliamperes) {
        State::Valid
    } else {
        State::Neither
    }
}

/// value = low + (I − 4)/16·(high − low).
#[must_use]
pub fn value<Q: Quantity>(current: Current, low: Q, high: Q) -> Q {
    value_between(current, (Current::from_amperes(4e-3), Current::from_amperes(20e-3)), low, high)
}

/// value = low + (I − I_low)/(I_high − I_low)·(high − low), for a signal with other ends.
#[must_use]
pub fn value_between<Q: Quantity>(current: Current, ends: (Current, Current), low: Q, high: Q) -> Q {
    let span = ends.1.amperes() - ends.0.amperes();
    let share = (current.amperes() - ends.0.amperes()) / span;
    Q::from_coherent(low.coherent() + share * (high.coherent() - low.coherent()))
}

/// (measured − ideal)/16 mA, as a share of the span.
#[must_use]
pub fn error_of_span(measured: Current, ideal: Current) -> Ratio {
    Ratio::from_fraction((measured.amperes() - ideal.amperes()) * 1e3 / 16.0)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Frequency;

    fn milliamperes(value: f64) -> Current {
        Current::from_amperes(value / 1e3)
    }

    /// C-AN-001 to C-AN-005 (IEC 60381-1, NAMUR NE 43).
    #[test]
    fn scaled_values_and_states_are_the_reference_ones() {
        for (ma, low, high, published, expected) in [
            (12.0, 0.0, 50.0, 25.0, State::Valid),
            (8.0, 10.0, 60.0, 22.5, State::Valid),
            (3.9, 0.0, 50.0, -0.3125, State::Valid),
            (3.5, 0.0, 50.0, -1.5625, State::FailureLow),
            (21.5, 0.0, 60.0, 65.625, State::FailureHigh),
        ] {
            let found = value(milliamperes(ma), Frequency::from_hertz(low), Frequency::from_hertz(high));
            assert!((found.hertz() - published).abs() < 0.001);
            assert_eq!(state(milliamperes(ma)), expected);
        }
        assert_eq!(state(milliamperes(3.7)), State::Neither);
        assert_eq!(state(milliamperes(3.6)), State::FailureLow);
        assert_eq!(state(milliamperes(21.0)), State::FailureHigh);
    }

    /// C-AN-006 (row AN-03).
    #[test]
    fn loop_errors_are_the_reference_ones() {
        for ((ideal, measured), percent) in
            POINTS.iter().zip([4.01, 8.0, 11.98, 16.02, 20.03]).zip([0.0625, 0.0, -0.125, 0.125, 0.1875])
        {
            let found = error_of_span(milliamperes(measured), milliamperes(*ideal));
            assert!((found.fraction() * 100.0 - percent).abs() < 0.001);
        }
    }
}
