//! Time from one speed to another under a torque that depends on speed: t = J·∫dω/T(ω), by Simpson's rule.
//!
//! Every weight is positive, so a larger inertia or a smaller torque lengthens each single step: no step size can
//! turn "more inertia" into "faster".

use super::available_torque::angular;
use super::set_ramp::{SetRamp, done, slope};
use crate::quantity::{Duration, Inertia, Speed, Torque};

/// Steps of a ramp; even ones, in speed.
pub const STEPS: u32 = 400;

/// Steps of a run that only answers yes or no in a search: Simpson's rule loses little by it.
pub(crate) const COARSE_STEPS: u32 = 48;

/// One step: its ends and middle, and how long it takes.
pub(crate) struct Step {
    pub seconds: f64,
    /// At both ends and in the middle.
    pub places: [Place; 3],
}

/// One place on the way.
#[derive(Clone, Copy)]
pub(crate) struct Place {
    pub speed: Speed,
    /// Acceleration, rpm/s, signed.
    pub rate: f64,
    /// How long the step would take if all of it were like this place.
    pub pace: f64,
    /// Whether the torque, not the set ramp, governs here.
    pub limited: bool,
}

/// Walks from one speed to the other; `possible` is the acceleration in rpm/s that the torque allows, `set` the ramp
/// that must not be outrun. Stops at the first place where the torque does not lead towards `to`, and gives that speed
/// back. Steps are even in the set ramp's time, without one even in speed.
pub(crate) fn walk_in(
    steps: u32,
    (from, to): (Speed, Speed),
    set: Option<SetRamp>,
    possible: impl Fn(Speed) -> f64,
    mut visit: impl FnMut(&Step),
) -> Result<(), Speed> {
    let change = to.rpm() - from.rpm();
    if change == 0.0 {
        return Ok(());
    }
    let place = |halves: u32| {
        let x = f64::from(halves) / f64::from(2 * steps);
        let speed = Speed::from_rpm(from.rpm() + change * set.map_or(x, |s| done(s.s_curve, x)));
        let possible = possible(speed);
        if possible * change <= 0.0 || possible.is_nan() {
            return Err(speed);
        }
        // Time for the whole change at this acceleration; the set ramp's own slope may be zero at its ends.
        let (least, asked) = set.map_or((0.0, 1.0), |s| (s.time.seconds(), slope(s.s_curve, x)));
        let by_torque = change * asked / possible;
        let limited = set.is_none() || by_torque > least;
        let rate = if limited { possible } else { change * asked / least };
        Ok(Place { speed, rate, pace: by_torque.max(least) / f64::from(steps), limited })
    };
    let mut first = place(0)?;
    for step in 0..steps {
        let (middle, last) = (place(2 * step + 1)?, place(2 * step + 2)?);
        let seconds = (first.pace + 4.0 * middle.pace + last.pace) / 6.0;
        visit(&Step { seconds, places: [first, middle, last] });
        first = last;
    }
    Ok(())
}

/// Acceleration in rpm/s of a net torque on an inertia.
pub(crate) fn acceleration(net: f64, inertia: Inertia) -> f64 {
    net / (inertia.kilogram_square_metres() * angular(Speed::from_rpm(1.0)))
}

/// How long it takes, or at which speed the net torque no longer leads there (row RM-08).
///
/// # Errors
/// The speed at which the net torque is zero or points the other way.
pub fn time_to_speed(
    inertia: Inertia,
    from: Speed,
    to: Speed,
    net: impl Fn(Speed) -> Torque,
) -> Result<Duration, Speed> {
    let mut seconds = 0.0;
    let possible = |n| acceleration(net(n).newton_metres(), inertia);
    walk_in(STEPS, (from, to), None, possible, |step| seconds += step.seconds)?;
    Ok(Duration::from_seconds(seconds))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Dubey Ex. 2.2 (C-RM-007): reversal from 666.7 rpm to 95 % of it the other way, 25.75 s exact, 25.5 s printed.
    #[test]
    fn a_reversal_takes_the_published_time() {
        let start = 100.0 / 0.15;
        let net = |n: Speed| Torque::from_newton_metres(-100.0 - 0.15 * n.rpm());
        let inertia = Inertia::from_kilogram_square_metres(10.0);
        let time = time_to_speed(inertia, Speed::from_rpm(start), Speed::from_rpm(-0.95 * start), net)
            .expect("torque all the way");
        assert!((time.seconds() - 25.753_237).abs() < 0.02, "{time:?}");
    }

    #[test]
    fn where_no_torque_is_left_it_says_at_which_speed() {
        let net = |n: Speed| Torque::from_newton_metres(50.0 - n.rpm());
        let stalled =
            time_to_speed(Inertia::from_kilogram_square_metres(1.0), Speed::from_rpm(0.0), Speed::from_rpm(100.0), net);
        let at = stalled.expect_err("stalls").rpm();
        assert!((50.0..=50.2).contains(&at), "{at}");
    }
}
