//! What holds of every ramp, whatever its figures: longer, heavier, weaker is never quicker, and rounded ends cost torque.

use super::available_torque::angular;
use super::ramp_up::tests::{any_load, ramp};
use super::ramp_up::{RampUp, asked};
use super::set_ramp::SetRamp;
use super::{Bus, LoadTorque, Trace, ramp_down};
use crate::quantity::{Capacitance, Duration, Quantity, Ratio, Speed, Torque, Voltage};
use proptest::prelude::*;

fn eased(seconds: f64, share: f64) -> SetRamp {
    SetRamp { time: Duration::from_seconds(seconds), s_curve: Ratio::from_fraction(share) }
}

fn seconds(trace: &Trace) -> f64 {
    trace.time().map_or(f64::INFINITY, Duration::seconds)
}

fn torque(newton_metres: f64) -> Torque {
    Torque::from_newton_metres(newton_metres)
}

/// The load with so much more torque at every speed.
fn heavier(load: &LoadTorque, more: f64) -> LoadTorque {
    let raised = |t: &Torque| torque(t.newton_metres() + more);
    match load {
        LoadTorque::Linear { torque, speed } => LoadTorque::Linear { torque: raised(torque), speed: *speed },
        LoadTorque::Quadratic { torque, speed } => LoadTorque::Quadratic { torque: raised(torque), speed: *speed },
        LoadTorque::Constant(torque) => LoadTorque::Constant(raised(torque)),
        other => other.clone(),
    }
}

/// Closed form: without a load an S-curve of share s asks J·Δω/(t·(1 − s/2)); a constant load comes on top. 1.2 kg·m²
/// over 1470 rpm in 5 s: 36.945 N·m straight, 46.181 N·m at s = 0.4, 73.890 N·m at s = 1.
#[test]
fn rounded_ends_ask_the_torque_of_the_closed_form_and_take_the_same_time() {
    for (share, moving) in [(0.0, 36.945), (0.4, 46.181), (1.0, 73.890)] {
        for load in [0.0, 40.0] {
            let run = ramp(1.2, LoadTorque::Constant(torque(load)), 80.0, 1470.0);
            let (set, exact) = (eased(5.0, share), 1.2 * angular(run.to) / (5.0 * (1.0 - share / 2.0)) + load);
            assert!((exact - moving - load).abs() < 1e-3, "by hand: {exact}");
            let trace = run.on_ramp(set);
            assert!(!trace.is_limited(), "{share}");
            assert!((seconds(&trace) - 5.0).abs() < 1e-9);
            assert!((trace.peak_torque().newton_metres() / exact - 1.0).abs() < 1e-9);
            assert!((asked(&run.train, run.from, run.to, set).newton_metres() / exact - 1.0).abs() < 1e-9);
        }
    }
}

/// Closed form: with a constant load the shortest ramp is J·Δω/((T − T_L)·(1 − s/2)), and it is just not limited.
#[test]
fn the_shortest_s_curve_is_the_straight_one_over_one_less_half_the_share() {
    let run = ramp(1.2, LoadTorque::Constant(torque(40.0)), 28.5, 1470.0);
    let spare = run.motor.available(run.limit, run.from).newton_metres() - 40.0;
    for share in [0.0, 0.2, 0.5, 1.0] {
        let exact = 1.2 * angular(run.to) / spare / (1.0 - share / 2.0);
        let found = run.shortest_ramp(Ratio::from_fraction(share)).expect("spare").seconds();
        assert!((found / exact - 1.0).abs() < 1e-9, "{share}: {found} {exact}");
        assert!(!run.on_ramp(eased(found * 1.000_001, share)).is_limited());
        assert!(run.on_ramp(eased(found * 0.98, share)).is_limited());
    }
}

/// Closed form of a limited S-curve: with a constant spare torque a = (T − T_L)/J and share 1, the eased ends up to the
/// acceleration a take half the time to it and half back, and the rest of Δω goes at a. With the steepest 2·Δω/t at
/// 2·a: the profile reaches a after t/4, having done Δω/8; both ends Δω/4 in t/2, the rest ¾·Δω/a = 3·t/4.
#[test]
fn a_limited_s_curve_takes_the_time_of_its_closed_form() {
    let run = ramp(1.2, LoadTorque::Constant(torque(40.0)), 28.5, 1470.0);
    let spare = run.motor.available(run.limit, run.from).newton_metres() - 40.0;
    let set = 1.2 * angular(run.to) / spare;
    let found = seconds(&run.on_ramp(eased(set, 1.0)));
    assert!((found / (set * 1.25) - 1.0).abs() < 1e-3, "{found} {set}");
}

/// Row RM-01 and the definition of the root mean square: a constant load on a straight ramp takes one current all
/// along, so peak and r.m.s. are that current and the heat is ((I/I_N)² − 1)·t.
#[test]
fn the_heat_of_an_even_start_is_the_closed_form() {
    let run = ramp(1.2, LoadTorque::Constant(torque(40.0)), 80.0, 1470.0);
    let trace = run.on_ramp(Duration::from_seconds(2.0));
    let current = run.motor.current(torque(40.0 + 1.2 * angular(run.to) / 2.0), run.from).amperes();
    assert!(current > 30.0 && (trace.peak_current().amperes() - current).abs() < 1e-9);
    assert!((trace.root_mean_square_current().expect("time").amperes() - current).abs() < 1e-9);
    let excess = ((current / 28.5) * (current / 28.5) - 1.0) * 2.0;
    assert!((trace.excess_heat(run.motor.rated_current).seconds() - excess).abs() < 1e-9);
    assert!(run.on_ramp(Duration::from_seconds(30.0)).excess_heat(run.motor.rated_current).seconds().abs() < 1e-12);
}

fn up(inertia: f64, load: &LoadTorque, limit: f64, to: f64) -> RampUp {
    ramp(inertia, load.clone(), limit, to)
}

proptest! {
    // A failing case is printed; a file of it would land among the crates.
    #![proptest_config(ProptestConfig { failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn a_longer_ramp_never_asks_more_torque_nor_more_current(load in any_load(), inertia in 0.05..50.0f64, limit in 16.0..80.0f64, set in 0.1..60.0f64, more in 1.0..5.0f64, share in 0.0..=1.0f64, to in 100.0..2600.0f64) {
        let run = up(inertia, &load, limit, to);
        let (short, long) = (run.on_ramp(eased(set, share)), run.on_ramp(eased(set * more, share)));
        let hair = 1.0 + 1e-12;
        // A hoist that pulls is held with more torque the gentler it is let go.
        if !matches!(load, LoadTorque::Constant(t) if t.newton_metres() < 0.0) {
            prop_assert!(long.peak_torque().newton_metres() <= short.peak_torque().newton_metres() * hair);
            prop_assert!(long.peak_current().amperes() <= short.peak_current().amperes() * hair);
        }
        let asks = |seconds: f64| asked(&run.train, run.from, run.to, eased(seconds, share)).newton_metres();
        prop_assert!(asks(set * more) <= asks(set));
        prop_assert!(seconds(&long) >= seconds(&short));
    }

    #[test]
    fn more_rounding_never_asks_less_torque_nor_a_shorter_ramp(load in any_load(), inertia in 0.05..50.0f64, limit in 16.0..80.0f64, set in 0.1..60.0f64, share in 0.0..=1.0f64, more in 0.0..=1.0f64, to in 100.0..2600.0f64) {
        let (run, more) = (up(inertia, &load, limit, to), share.max(more));
        if let LoadTorque::Constant(_) = load {
            let asks = |share: f64| asked(&run.train, run.from, run.to, eased(set, share)).newton_metres();
            prop_assert!(asks(more) >= asks(share) - asks(share).abs() * 1e-9);
        }
        // Never shorter than with all the torque there is, nor than what is set.
        let least = seconds(&run.fastest());
        for share in [share, more] {
            let taken = seconds(&run.on_ramp(eased(set, share)));
            prop_assert!(taken >= set * (1.0 - 1e-9) && taken >= least * (1.0 - 5e-3), "{taken} {set} {least}");
        }
        prop_assert_eq!(run.shortest_ramp(Ratio::from_fraction(more)).is_some(), run.shortest_ramp(Ratio::from_fraction(share)).is_some());
    }

    #[test]
    fn more_load_is_never_faster_up(load in any_load(), more in 0.0..60.0f64, inertia in 0.05..50.0f64, limit in 16.0..80.0f64, set in 0.1..60.0f64, share in 0.0..=1.0f64, to in 100.0..2600.0f64) {
        let (light, heavy) = (up(inertia, &load, limit, to), up(inertia, &heavier(&load, more), limit, to));
        prop_assert!(seconds(&heavy.fastest()) >= seconds(&light.fastest()));
        prop_assert!(seconds(&heavy.on_ramp(eased(set, share))) >= seconds(&light.on_ramp(eased(set, share))));
    }

    #[test]
    fn more_load_is_never_slower_down_nor_fills_the_bus_more(load in -20.0..80.0f64, more in 0.0..60.0f64, inertia in 0.05..50.0f64, limit in 20.0..80.0f64, set in 0.2..60.0f64, share in 0.0..=1.0f64) {
        let (light, heavy) = (ramp_down::tests::run(inertia, load, limit), ramp_down::tests::run(inertia, load + more, limit));
        let set = eased(set, share);
        prop_assert!(seconds(&heavy.on_ramp(set)) <= seconds(&light.on_ramp(set)));
        prop_assert!(seconds(&heavy.fastest()) <= seconds(&light.fastest()));
        // Only a ramp that both follow is the same ramp; a limited one is another.
        if !light.on_ramp(set).is_limited() {
            let peak = |run: &ramp_down::RampDown| run.on_ramp(set).peak_bus().map_or(0.0, Quantity::coherent);
            prop_assert!(peak(&heavy) <= peak(&light) * (1.0 + 1e-12));
        }
    }

    #[test]
    fn more_capacitance_never_lets_the_bus_rise_more(load in -20.0..80.0f64, inertia in 0.05..50.0f64, limit in 20.0..80.0f64, set in 0.2..60.0f64, share in 0.0..=1.0f64, capacitance in 1e-4..1e-2f64, more in 1.0..10.0f64) {
        let peak = |farads: f64, trip: Option<f64>| {
            let run = ramp_down::tests::run(inertia, load, limit);
            let bus = run.bus.map(|bus| Bus { capacitance: Some(Capacitance::from_farads(farads)), trip: trip.map(Voltage::from_volts), ..bus });
            let run = ramp_down::RampDown { bus, ..run };
            let shortest = run.shortest_without_chopper(Ratio::from_fraction(share)).map_or(f64::INFINITY, Duration::seconds);
            (run.on_ramp(eased(set, share)).peak_bus().map_or(f64::INFINITY, Quantity::coherent), shortest)
        };
        prop_assert!(peak(capacitance * more, None).0 <= peak(capacitance, None).0);
        prop_assert!(peak(capacitance * more, Some(800.0)).1 <= peak(capacitance, Some(800.0)).1);
    }

    #[test]
    fn an_s_curve_with_more_inertia_or_less_current_is_never_faster(load in any_load(), inertia in 0.05..50.0f64, more in 1.0..4.0f64, limit in 15.0..80.0f64, set in 0.1..60.0f64, share in 0.0..=1.0f64, to in 100.0..2600.0f64) {
        let taken = |inertia: f64, limit: f64| seconds(&up(inertia, &load, limit, to).on_ramp(eased(set, share)));
        prop_assert!(taken(inertia * more, limit) >= taken(inertia, limit));
        prop_assert!(taken(inertia, limit * more) <= taken(inertia, limit));
        let trace = up(inertia, &load, limit, to).on_ramp(eased(set, share));
        prop_assert!(trace.samples.windows(2).all(|w| w[0].time.seconds() < w[1].time.seconds() && w[0].speed.rpm() < w[1].speed.rpm()));
        prop_assert!(trace.samples.iter().filter(|s| s.torque.newton_metres() >= 0.0).all(|s| s.current.amperes() <= limit + 1e-6));
        if let Some(last) = trace.samples.last().filter(|_| trace.time().is_some()) {
            prop_assert!((last.speed.rpm() - Speed::from_rpm(to).rpm()).abs() < 1e-6);
        }
    }
}
