//! Time from one speed to another under a torque that depends on speed: t = J·∫dω/T(ω), by Simpson's rule.
//!
//! Every weight is positive, so a larger inertia or a smaller torque lengthens each single step: no step size can
//! turn "more inertia" into "faster".

use super::available_torque::angular;
use crate::quantity::{Duration, Inertia, Speed, Torque};

/// Steps of a ramp; even ones, in speed.
pub const STEPS: u32 = 400;

/// Steps of a run that only answers yes or no in a search: Simpson's rule loses little by it.
pub(crate) const COARSE_STEPS: u32 = 48;

/// One step: its ends and middle, and how long it takes.
pub(crate) struct Step {
    pub from: Speed,
    pub middle: Speed,
    pub to: Speed,
    pub seconds: f64,
    /// Acceleration at the two ends and in the middle, rpm/s, signed.
    pub rates: [f64; 3],
}

/// Walks from one speed to the other; `rate` is the acceleration in rpm/s and `visit` is told each step. Stops at the
/// first place where the rate does not lead towards `to`, and gives that speed back.
pub(crate) fn walk(from: Speed, to: Speed, rate: impl Fn(Speed) -> f64, visit: impl FnMut(&Step)) -> Result<(), Speed> {
    walk_in(STEPS, from, to, rate, visit)
}

/// The same in a given number of steps.
pub(crate) fn walk_in(
    steps: u32,
    from: Speed,
    to: Speed,
    rate: impl Fn(Speed) -> f64,
    mut visit: impl FnMut(&Step),
) -> Result<(), Speed> {
    let change = to.rpm() - from.rpm();
    if change == 0.0 {
        return Ok(());
    }
    let leads = |r: f64| (r * change > 0.0).then_some(r);
    let place = |halves: u32| Speed::from_rpm(from.rpm() + change * f64::from(halves) / f64::from(2 * steps));
    let mut first = leads(rate(from)).ok_or(from)?;
    for step in 0..steps {
        let (start, middle, end) = (place(2 * step), place(2 * step + 1), place(2 * step + 2));
        let half = leads(rate(middle)).ok_or(middle)?;
        let last = leads(rate(end)).ok_or(end)?;
        let seconds = change / f64::from(steps) / 6.0 * (1.0 / first + 4.0 / half + 1.0 / last);
        visit(&Step { from: start, middle, to: end, seconds, rates: [first, half, last] });
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
    walk(from, to, |n| acceleration(net(n).newton_metres(), inertia), |step| seconds += step.seconds)?;
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
