//! A set ramp: how long it lasts, and how much of that goes into easing the acceleration in and out.
//!
//! The S-curve share s is the part of the ramp's time, both ends together, in which the acceleration itself rises and
//! falls evenly. Between the ends it is 1/(1 − s/2) of the mean: the same change in the same time with rounded ends
//! asks up to twice the acceleration (s = 1). An end covers s/(4 − 2s) of the change of speed. Where the torque does not
//! suffice the run falls behind and goes on, from the speed it has, with the acceleration that belongs to that speed.

use crate::outcome::OutcomeBuilder;
use crate::quantity::{Duration, Ratio};
use crate::rounding::significant;
use crate::sources::motion::S_CURVE;

/// How a drive is told to change its speed.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SetRamp {
    /// From start to end, the rounded ends included.
    pub time: Duration,
    /// The S-curve share, from 0 (straight) to 1 (no straight part left).
    pub s_curve: Ratio,
}

impl From<Duration> for SetRamp {
    fn from(time: Duration) -> Self {
        Self { time, s_curve: STRAIGHT }
    }
}

/// The share of a straight ramp.
pub const STRAIGHT: Ratio = Ratio::from_fraction(0.0);

impl SetRamp {
    /// The highest acceleration over the mean one: 1/(1 − s/2).
    #[must_use]
    pub fn steepest(&self) -> Ratio {
        Ratio::from_fraction(1.0 / (1.0 - share(self.s_curve) / 2.0))
    }

    /// Part of the change of speed that is done after a part of the time, both from 0 to 1.
    #[must_use]
    pub fn part_done(&self, part_of_time: f64) -> f64 {
        done(self.s_curve, part_of_time.clamp(0.0, 1.0))
    }
}

fn share(s_curve: Ratio) -> f64 {
    s_curve.fraction().clamp(0.0, 1.0)
}

/// Part of the change of speed that is done after a part of the time.
pub(crate) fn done(s_curve: Ratio, x: f64) -> f64 {
    let (s, end) = (share(s_curve), share(s_curve) / 2.0);
    let steepest = 1.0 / (1.0 - s / 2.0);
    if x < end {
        steepest * x * x / s
    } else if x > 1.0 - end {
        1.0 - steepest * (1.0 - x) * (1.0 - x) / s
    } else {
        steepest * (x - end / 2.0)
    }
}

/// Acceleration over the mean one, after a part of the time.
pub(crate) fn slope(s_curve: Ratio, x: f64) -> f64 {
    let end = share(s_curve) / 2.0;
    let steepest = 1.0 / (1.0 - end);
    if x < end {
        steepest * x / end
    } else if x > 1.0 - end {
        steepest * (1.0 - x) / end
    } else {
        steepest
    }
}

/// The S-curve share for a check: a straight ramp is assumed, openly; one that cannot be is named.
pub fn s_curve(b: &mut OutcomeBuilder, given: Option<Ratio>) -> Option<Ratio> {
    let given = b.assume(given, STRAIGHT, "S-curve share of the ramp", "none, a straight ramp");
    let sound = (0.0..=1.0).contains(&given.fraction());
    b.need(sound.then_some(given), "S-curve share of the ramp from 0 to 100 %")
}

/// What a shortest ramp is multiplied by: as a letter of the formula and as a number; both empty on a straight ramp.
pub(crate) fn steepness(b: &mut OutcomeBuilder, share: Ratio, there: Ratio) -> (&'static str, String) {
    if share.fraction() <= 0.0 {
        return ("", String::new());
    }
    b.cite(S_CURVE);
    let slope = significant(there.fraction(), 4);
    b.line(
        "acceleration there, over the ramp's mean",
        "k, at most 1/(1 − s/2)",
        format!("s = {}", significant(share.fraction(), 3)),
        slope.clone(),
    );
    ("k·", format!("{slope} × "))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// By hand: s = 0.4 eases for 0.2 of the time at each end. Steepest 1/0.8 = 1.25; each end covers
    /// 1.25 × 0.2/2 = 0.125 of the change, the same as s/(4 − 2s) = 0.4/3.2; the straight part 1.25 × 0.6 = 0.75.
    #[test]
    fn the_ends_and_the_straight_part_are_as_by_hand() {
        let s = Ratio::from_fraction(0.4);
        let ramp = SetRamp { time: Duration::from_seconds(10.0), s_curve: s };
        assert!((ramp.steepest().fraction() - 1.25).abs() < 1e-12);
        for (x, part, steep) in [
            (0.0, 0.0, 0.0),
            (0.1, 0.031_25, 0.625),
            (0.2, 0.125, 1.25),
            (0.5, 0.5, 1.25),
            (0.8, 0.875, 1.25),
            (0.9, 0.968_75, 0.625),
            (1.0, 1.0, 0.0),
        ] {
            assert!((done(s, x) - part).abs() < 1e-12 && (slope(s, x) - steep).abs() < 1e-12, "{x}");
        }
    }

    /// The slope is the derivative of the part done, for straight, partly and wholly rounded ramps.
    #[test]
    fn the_slope_belongs_to_the_curve() {
        for share in [0.0, 0.3, 0.75, 1.0].map(Ratio::from_fraction) {
            for i in 1..100 {
                let (x, h) = (f64::from(i) / 100.0 + 0.000_3, 1e-6);
                let by_difference = (done(share, x + h) - done(share, x - h)) / (2.0 * h);
                assert!((by_difference - slope(share, x)).abs() < 1e-5, "{share:?} at {x}");
            }
            assert!((done(share, 1.0) - 1.0).abs() < 1e-12 && done(share, 0.0).abs() < 1e-12);
        }
    }

    #[test]
    fn a_share_that_cannot_be_is_named_and_none_is_assumed_openly() {
        let mut b = OutcomeBuilder::new("x");
        for bad in [-0.1, 1.1, f64::NAN] {
            assert!(s_curve(&mut b, Some(Ratio::from_fraction(bad))).is_none());
        }
        assert_eq!(s_curve(&mut b, None), Some(STRAIGHT));
        let outcome = b.not_assessed();
        assert_eq!(outcome.missing[0].what, "S-curve share of the ramp from 0 to 100 %");
        assert_eq!(outcome.assumed[0].taken, "none, a straight ramp");
    }
}
