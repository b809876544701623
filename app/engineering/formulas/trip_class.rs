//! Trip classes of overload devices (row OL-02) and the thermal model behind them (row OL-04).

use crate::quantity::{Current, Duration, Ratio};

/// Trip classes after IEC 60947-4-1, from cold at 7.2 times the setting.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum TripClass {
    /// 10A.
    Class10A,
    /// 10.
    Class10,
    /// 20.
    Class20,
    /// 30.
    Class30,
}

impl TripClass {
    /// As printed.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Class10A => "10A",
            Self::Class10 => "10",
            Self::Class20 => "20",
            Self::Class30 => "30",
        }
    }

    /// Longest time that does not trip yet, and longest time to trip: the span is open below, closed above.
    #[must_use]
    pub const fn span(self) -> (Duration, Duration) {
        let (low, high) = match self {
            Self::Class10A => (2.0, 10.0),
            Self::Class10 => (4.0, 10.0),
            Self::Class20 => (6.0, 20.0),
            Self::Class30 => (9.0, 30.0),
        };
        (Duration::from_seconds(low), Duration::from_seconds(high))
    }

    /// Whether a device of this class may trip in this time.
    #[must_use]
    pub fn admits(self, trip: Duration) -> bool {
        let (low, high) = self.span();
        trip.seconds() > low.seconds() && trip.seconds() <= high.seconds()
    }
}

/// t = τ·ln((I² − I_p²)/(I² − (k·I_B)²)), the cold curve with I_p = 0; `None` when it never trips.
#[must_use]
pub fn time_to_trip(tau: Duration, k: Ratio, basic: Current, current: Current, previous: Current) -> Option<Duration> {
    let (i, p, limit) = (current.amperes(), previous.amperes(), k.fraction() * basic.amperes());
    if !(tau.seconds() > 0.0 && limit > 0.0 && i > limit && p >= 0.0 && p < i) {
        return None;
    }
    let seconds = tau.seconds() * libm::log((i * i - p * p) / (i * i - limit * limit));
    (seconds.is_finite()).then(|| Duration::from_seconds(seconds.max(0.0)))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-OL-001 to C-OL-003 (IEC 60947-4-1, row OL-02).
    #[test]
    fn classes_admit_the_published_spans() {
        let s = Duration::from_seconds;
        assert!(TripClass::Class10.admits(s(7.0)) && !TripClass::Class10.admits(s(3.5)));
        assert!(TripClass::Class10A.admits(s(3.5)) && !TripClass::Class20.admits(s(21.0)));
        assert!(TripClass::Class30.admits(s(30.0)) && !TripClass::Class30.admits(s(9.0)));
    }

    /// C-OL-004 to C-OL-007 (IEC 60255-149, row OL-04).
    #[test]
    fn thermal_model_is_the_reference_curve() {
        let a = Current::from_amperes;
        for (tau, k, basic, i, p, published) in [
            (600.0, 1.05, 100.0, 150.0, 0.0, 404.006_73),
            (600.0, 1.05, 100.0, 150.0, 100.0, 51.334_733),
            (1800.0, 1.1, 40.0, 240.0, 0.0, 61.540_109),
        ] {
            let t = time_to_trip(Duration::from_seconds(tau), Ratio::from_fraction(k), a(basic), a(i), a(p))
                .expect("trips");
            assert!((t.seconds() / published - 1.0).abs() < 0.001, "{t:?}");
        }
        assert!(
            time_to_trip(Duration::from_seconds(600.0), Ratio::from_fraction(1.05), a(100.0), a(104.0), a(0.0))
                .is_none()
        );
    }
}
