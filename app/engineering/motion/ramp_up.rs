//! Speeding up: the least time, the shortest even ramp, and the trace of the set ramp.

use super::available_torque::Motor;
use super::set_ramp::{STRAIGHT, SetRamp, done, slope};
use super::time_to_speed::{Place, STEPS, acceleration, walk_in};
use super::trace::{End, Sample, Trace};
use super::train::Train;
use crate::quantity::{Current, Duration, Ratio, Speed, Torque};

/// A run up, ready to be worked out.
#[derive(Clone, Debug, PartialEq)]
pub struct RampUp {
    /// The motor.
    pub motor: Motor,
    /// What it turns.
    pub train: Train,
    /// The drive's current limit.
    pub limit: Current,
    /// Where it starts.
    pub from: Speed,
    /// Where it should end.
    pub to: Speed,
}

/// The largest torque that a set ramp asks of the motor, whatever any limit would leave of it: the load's torque and
/// J·dω/dt together.
#[must_use]
pub fn asked(train: &Train, from: Speed, to: Speed, set: impl Into<SetRamp>) -> Torque {
    let (set, change) = (set.into(), to.rpm() - from.rpm());
    let mean = change / set.time.seconds() / acceleration(1.0, train.inertia);
    let torque = |i: u32| {
        let x = f64::from(i) / f64::from(2 * STEPS);
        let n = Speed::from_rpm(from.rpm() + change * done(set.s_curve, x));
        train.opposing(n).newton_metres() + mean * slope(set.s_curve, x)
    };
    Torque::from_newton_metres((0..=2 * STEPS).map(torque).fold(f64::NEG_INFINITY, f64::max))
}

/// The place on a ramp where the torque is scarcest.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Tightest {
    /// Where.
    pub speed: Speed,
    /// What is left there over and above the load.
    pub spare: Torque,
    /// The ramp's acceleration there over its mean one; 1 all along a straight ramp.
    pub slope: Ratio,
}

impl RampUp {
    /// Torque over and above the load at this speed.
    #[must_use]
    pub fn spare(&self, speed: Speed) -> Torque {
        let available = self.motor.available(self.limit, speed).newton_metres();
        Torque::from_newton_metres(available - self.train.opposing(speed).newton_metres())
    }

    /// Where a ramp with this S-curve share first meets the current limit: the least spare torque, for the
    /// acceleration that the ramp has there.
    #[must_use]
    pub fn tightest(&self, s_curve: Ratio) -> Tightest {
        let change = self.to.rpm() - self.from.rpm();
        let place = |i: u32| {
            let x = f64::from(i) / f64::from(2 * STEPS);
            let speed = Speed::from_rpm(self.from.rpm() + change * done(s_curve, x));
            Tightest { speed, spare: self.spare(speed), slope: Ratio::from_fraction(slope(s_curve, x)) }
        };
        Tightest::least((0..=2 * STEPS).map(place)).unwrap_or_else(|| place(0))
    }

    /// The shortest straight ramp that never meets the current limit; none where it stalls.
    #[must_use]
    pub fn shortest_even_ramp(&self) -> Option<Duration> {
        self.shortest_ramp(STRAIGHT)
    }

    /// The shortest ramp with this S-curve share that never meets the current limit; none where it stalls.
    #[must_use]
    pub fn shortest_ramp(&self, s_curve: Ratio) -> Option<Duration> {
        let tightest = self.tightest(s_curve);
        let possible = acceleration(tightest.spare.newton_metres(), self.train.inertia);
        let change = self.to.rpm() - self.from.rpm();
        (possible > 0.0).then(|| Duration::from_seconds(change * tightest.slope.fraction() / possible))
    }

    /// The run with all the torque that the limit leaves; its time is the least there is.
    #[must_use]
    pub fn fastest(&self) -> Trace {
        self.run(None)
    }

    /// The run on a ramp set like this.
    #[must_use]
    pub fn on_ramp(&self, set: impl Into<SetRamp>) -> Trace {
        self.run(Some(set.into()))
    }

    fn run(&self, set: Option<SetRamp>) -> Trace {
        if self.from.rpm() == 0.0 {
            let (available, asked) = (self.motor.available(self.limit, self.from), self.train.to_start());
            if available.newton_metres() <= asked.newton_metres() {
                return Trace { samples: Vec::new(), end: End::HeldAtStandstill { available, asked } };
            }
        }
        let possible = |n: Speed| acceleration(self.spare(n).newton_metres(), self.train.inertia);
        let sample = |seconds: f64, place: Place| {
            let load = self.train.opposing(place.speed);
            let moving = place.rate / acceleration(1.0, self.train.inertia);
            let torque = Torque::from_newton_metres(load.newton_metres() + moving);
            Sample {
                time: Duration::from_seconds(seconds),
                speed: place.speed,
                torque,
                load,
                current: self.motor.current(torque, place.speed),
                bus: None,
                limited: place.limited,
            }
        };
        let mut samples = Vec::new();
        let mut seconds = 0.0;
        let walked = walk_in(STEPS, (self.from, self.to), set, possible, |step| {
            if samples.is_empty() {
                samples.push(sample(0.0, step.places[0]));
            }
            seconds += step.seconds;
            samples.push(sample(seconds, step.places[2]));
        });
        let end = walked.map_or_else(|at| End::Stalled { at }, |()| End::Reached);
        Trace { samples, end }
    }
}

impl Tightest {
    /// The first of those with the least room.
    pub(super) fn least(places: impl Iterator<Item = Self>) -> Option<Self> {
        places.min_by(|a, b| a.room().total_cmp(&b.room()))
    }

    /// Spare torque over the slope that has to be had of it; what is not there at all comes first.
    fn room(&self) -> f64 {
        let spare = self.spare.newton_metres();
        if spare > 0.0 { spare / self.slope.fraction() } else { spare }
    }
}

#[cfg(test)]
pub(crate) mod tests {
    use super::*;
    use crate::motion::available_torque::tests::motor;
    use crate::motion::closed_form::{constant_torque_time, quadratic_load_time};
    use crate::motion::gear::Gear;
    use crate::motion::load_torque::LoadTorque;
    use crate::quantity::Inertia;
    use proptest::prelude::*;

    pub(crate) fn ramp(inertia: f64, load: LoadTorque, limit: f64, to: f64) -> RampUp {
        let inertia = Inertia::from_kilogram_square_metres(inertia);
        let train = Train::new(inertia, Inertia::from_kilogram_square_metres(0.0), load, None, Gear::DIRECT);
        RampUp {
            motor: motor(),
            train,
            limit: Current::from_amperes(limit),
            from: Speed::from_rpm(0.0),
            to: Speed::from_rpm(to),
        }
    }

    fn quadratic(torque: f64) -> LoadTorque {
        LoadTorque::Quadratic { torque: Torque::from_newton_metres(torque), speed: Speed::from_rpm(1470.0) }
    }

    fn constant(torque: f64) -> LoadTorque {
        LoadTorque::Constant(Torque::from_newton_metres(torque))
    }

    /// Row RM-01: constant torques, t = J·Δω/(T_M − T_L), to 0.1 %.
    #[test]
    fn constant_torques_match_the_closed_form() {
        let run = ramp(1.2, constant(40.0), 28.5, 1470.0);
        let available = run.motor.available(run.limit, Speed::from_rpm(0.0));
        let exact = constant_torque_time(run.train.inertia, available, Torque::from_newton_metres(40.0), run.to)
            .expect("spare")
            .seconds();
        let found = run.fastest().time().expect("reached").seconds();
        assert!((found / exact - 1.0).abs() < 1e-3, "{found} {exact}");
    }

    /// Row RM-04: quadratic load, t = J·ω_N/√(T_M·T_N)·artanh(x·√(T_N/T_M)), to 0.1 %, even with little to spare.
    #[test]
    fn a_quadratic_load_matches_the_closed_form() {
        for torque in [50.0, 90.0, 96.0] {
            let run = ramp(12.0, quadratic(torque), 28.5, 1470.0);
            let (available, load) =
                (run.motor.available(run.limit, Speed::from_rpm(0.0)), Torque::from_newton_metres(torque));
            let rated = Speed::from_rpm(1470.0);
            let exact =
                quadratic_load_time(run.train.inertia, available, load, rated, run.to).expect("spare").seconds();
            let found = run.fastest().time().expect("reached").seconds();
            assert!((found / exact - 1.0).abs() < 1e-3, "{torque}: {found} {exact}");
        }
    }

    #[test]
    fn a_long_ramp_is_followed_a_short_one_stretched_an_impossible_one_stalls() {
        let run = ramp(1.2, quadratic(60.0), 35.0, 1470.0);
        let even = run.shortest_even_ramp().expect("spare").seconds();
        let long = run.on_ramp(Duration::from_seconds(even * 1.01));
        assert!(!long.is_limited());
        assert!((long.time().expect("reached").seconds() / (even * 1.01) - 1.0).abs() < 1e-9);
        let short = run.on_ramp(Duration::from_seconds(even * 0.8));
        assert!(short.is_limited() && short.time().expect("reached").seconds() > even * 0.8);
        assert!((short.peak_current().amperes() - 35.0).abs() < 1e-6);
        let (from, to) = short.limited_between().expect("limited");
        assert!(from.rpm() > 100.0 && (to.rpm() - 1470.0).abs() < 1e-6);
        let End::Stalled { at } = ramp(1.2, quadratic(150.0), 28.5, 1470.0).on_ramp(Duration::from_seconds(10.0)).end
        else {
            panic!("stalls")
        };
        // 97.44 = 150·x², x = 0.806.
        assert!((at.rpm() / 1470.0 - 0.806).abs() < 0.002, "{at:?}");
    }

    #[test]
    fn breakaway_can_hold_it_at_standstill() {
        let mut run = ramp(1.2, quadratic(60.0), 28.5, 1470.0);
        run.train.breakaway = Some(Torque::from_newton_metres(98.0));
        assert!(matches!(run.fastest().end, End::HeldAtStandstill { .. }));
        run.train.breakaway = Some(Torque::from_newton_metres(96.0));
        assert_eq!(run.fastest().end, End::Reached);
    }

    pub(crate) fn any_load() -> impl Strategy<Value = LoadTorque> {
        (0..4, 5.0..120.0f64).prop_map(|(kind, torque)| {
            let (torque, speed) = (Torque::from_newton_metres(torque), Speed::from_rpm(1470.0));
            match kind {
                0 => LoadTorque::Constant(torque),
                1 => LoadTorque::Linear { torque, speed },
                2 => LoadTorque::Quadratic { torque, speed },
                _ => LoadTorque::Constant(Torque::from_newton_metres(-torque.newton_metres() / 4.0)),
            }
        })
    }

    fn seconds(trace: &Trace) -> f64 {
        trace.time().map_or(f64::INFINITY, Duration::seconds)
    }

    proptest! {
        // A failing case is printed; a file of it would land among the crates.
        #![proptest_config(ProptestConfig { failure_persistence: None, ..ProptestConfig::default() })]

        #[test]
        fn more_inertia_is_never_faster(load in any_load(), inertia in 0.05..50.0f64, more in 1.0..4.0f64, limit in 15.0..80.0f64, set in 0.1..60.0f64, to in 100.0..2600.0f64) {
            let (light, heavy) = (ramp(inertia, load.clone(), limit, to), ramp(inertia * more, load, limit, to));
            prop_assert!(seconds(&heavy.fastest()) >= seconds(&light.fastest()));
            let set = Duration::from_seconds(set);
            prop_assert!(seconds(&heavy.on_ramp(set)) >= seconds(&light.on_ramp(set)));
        }

        #[test]
        fn more_current_is_never_slower(load in any_load(), inertia in 0.05..50.0f64, limit in 5.0..80.0f64, more in 1.0..2.0f64, set in 0.1..60.0f64, to in 100.0..2600.0f64) {
            let (low, high) = (ramp(inertia, load.clone(), limit, to), ramp(inertia, load, limit * more, to));
            prop_assert!(seconds(&high.fastest()) <= seconds(&low.fastest()));
            let set = Duration::from_seconds(set);
            prop_assert!(seconds(&high.on_ramp(set)) <= seconds(&low.on_ramp(set)));
        }

        #[test]
        fn a_trace_is_finite_ordered_and_within_the_limit(load in any_load(), inertia in 0.05..50.0f64, limit in 16.0..80.0f64, set in 0.1..60.0f64, to in 100.0..2600.0f64) {
            let trace = ramp(inertia, load, limit, to).on_ramp(Duration::from_seconds(set));
            prop_assert!(trace.samples.len() <= STEPS as usize + 1);
            prop_assert!(trace.samples.windows(2).all(|w| w[0].time.seconds() < w[1].time.seconds() && w[0].speed.rpm() < w[1].speed.rpm()));
            prop_assert!(trace.samples.iter().all(|s| s.time.seconds().is_finite() && s.torque.newton_metres().is_finite()));
            // Below the magnetising current (15 A) there is no torque to speak of, and none of the braking one is limited.
            prop_assert!(trace.samples.iter().filter(|s| s.torque.newton_metres() >= 0.0).all(|s| s.current.amperes() <= limit + 1e-6));
        }
    }
}
