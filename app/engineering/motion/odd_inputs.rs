//! Whatever is typed, no check of this area panics, hangs, or judges with a number that is none.

use crate::checks::{acceleration_time, braking, bus_peak, deceleration_time, measured_acceleration, stop_time};
use crate::motion::{Gear, Linear, LoadTorque, Machine, TorqueTable};
use crate::outcome::{Outcome, Verdict};
use crate::quantity::{
    Capacitance, Current, Duration, Inertia, LinearSpeed, Mass, Power, Quantity, Ratio, Resistance, Speed, Torque,
    Voltage,
};
use crate::reading::Reading;
use proptest::prelude::*;

/// Nothing, something usual, or something that cannot be.
fn any<Q: Quantity + core::fmt::Debug>(low: f64, high: f64) -> impl Strategy<Value = Option<Q>> {
    let odd = prop::sample::select(vec![
        0.0,
        -1.0,
        1e-300,
        1e300,
        f64::NAN,
        f64::INFINITY,
        f64::NEG_INFINITY,
        f64::MIN_POSITIVE,
    ]);
    prop_oneof![
        1 => Just(None),
        60 => (low..high).prop_map(|x| Some(Q::from_coherent(x))),
        2 => odd.prop_map(|x| Some(Q::from_coherent(x))),
    ]
}

fn any_load() -> impl Strategy<Value = Option<LoadTorque>> {
    (0..6, any::<Torque>(-50.0, 150.0), any::<Speed>(100.0, 3000.0), any::<Power>(100.0, 3e4)).prop_map(
        |(kind, torque, speed, power)| {
            let (torque, speed) = (torque?, speed?);
            Some(match kind {
                0 => LoadTorque::Constant(torque),
                1 => LoadTorque::Linear { torque, speed },
                2 | 3 => LoadTorque::Quadratic { torque, speed },
                4 => LoadTorque::ConstantPower { power: power?, from: speed },
                _ => LoadTorque::Table(TorqueTable::new(&[
                    (speed, torque),
                    (Speed::from_rpm(10.0), Torque::from_newton_metres(5.0)),
                ])?),
            })
        },
    )
}

fn any_machine() -> impl Strategy<Value = Machine> {
    (
        (
            any::<Power>(500.0, 1e5),
            any::<Speed>(500.0, 3000.0),
            any::<Current>(1.0, 200.0),
            any::<Ratio>(0.6, 0.95),
            any::<Ratio>(1.6, 4.0),
        ),
        (any::<Current>(1.0, 50.0), any::<Current>(1.0, 300.0), any::<Inertia>(1e-3, 5.0), any::<Inertia>(0.0, 100.0)),
        (any_load(), any::<Torque>(0.0, 100.0), any::<Ratio>(0.2, 40.0), any::<Ratio>(0.3, 1.0)),
        prop::bool::ANY,
        (
            prop::bool::ANY,
            any::<Mass>(0.0, 1e4),
            any::<LinearSpeed>(0.0, 10.0),
            any::<Speed>(100.0, 3000.0),
            prop::bool::ANY,
        ),
    )
        .prop_map(|(plate, drive, load, known, line)| Machine {
            rated_power: plate.0,
            rated_speed: plate.1,
            rated_current: plate.2,
            power_factor: plate.3,
            breakdown: plate.4,
            magnetising_current: if known { drive.0 } else { None },
            current_limit: drive.1,
            motor_inertia: drive.2,
            load_inertia: drive.3,
            load: load.0,
            breakaway: load.1,
            gear: load.2.map(|ratio| Gear { ratio, efficiency: load.3 }),
            linear: line.0.then_some(Linear { mass: line.1, speed: line.2, motor: line.3 }),
            overhauling: line.4,
            overhauling_torque: load.1,
        })
}

fn sound(outcome: &Outcome) -> bool {
    let judged = matches!(outcome.verdict, Verdict::Within | Verdict::Marginal | Verdict::Outside);
    let texts =
        outcome.figures.iter().map(|f| f.value.as_str()).chain([outcome.summary.as_str(), outcome.limit.as_str()]);
    let clean = texts.into_iter().all(|t| !t.contains("not a number") && !t.contains("NaN") && !t.contains("inf "));
    !outcome.summary.is_empty() && (!judged || clean) && outcome.rule.as_ref().is_none_or(crate::LimitRule::is_finite)
}

proptest! {
    #![proptest_config(ProptestConfig { failure_persistence: None, cases: 200, ..ProptestConfig::default() })]

    #[test]
    fn ramps_and_brakes_stay_sound(
        machine in any_machine(),
        share in any::<Ratio>(0.0, 1.0),
        speeds in (any::<Speed>(0.0, 3000.0), any::<Speed>(100.0, 3000.0)),
        times in (any::<Duration>(0.1, 100.0), any::<Duration>(0.0, 100.0), any::<Duration>(1.0, 1000.0)),
        bus in (any::<Voltage>(300.0, 600.0), any::<Capacitance>(1e-4, 1e-2), any::<Voltage>(600.0, 900.0), any::<Voltage>(600.0, 900.0), any::<Power>(0.0, 1e4)),
        brake in (any::<Resistance>(5.0, 100.0), any::<Resistance>(5.0, 500.0), any::<Power>(10.0, 1e5)),
    ) {
        let up = acceleration_time::Inputs {
            machine: machine.clone(), from_speed: speeds.0, to_speed: speeds.1, set_time: times.0, s_curve: share, plain_volts_per_hertz: None,
        };
        let outcome = acceleration_time::check(&up);
        prop_assert!(sound(&outcome), "{outcome:?}");
        let down = deceleration_time::Inputs {
            machine: machine.clone(), from_speed: speeds.1, to_speed: speeds.0, set_time: times.0, s_curve: share,
            bus_voltage: bus.0, bus_capacitance: bus.1, trip_voltage: bus.2, chopper_voltage: bus.3.filter(|v| v.volts() > 700.0), losses: bus.4,
        };
        let outcome = deceleration_time::check(&down);
        prop_assert!(sound(&outcome), "{outcome:?}");
        let stop = braking::Inputs {
            machine, from_speed: speeds.1, to_speed: speeds.0, set_time: times.0, s_curve: share, holding_time: times.1, cycle_time: times.2,
            chopper_voltage: bus.3, minimum_resistor: brake.0, resistor: brake.1, resistor_power: brake.2,
        };
        let outcome = braking::check(&stop);
        prop_assert!(sound(&outcome), "{outcome:?}");
    }

    #[test]
    fn readings_stay_sound(time in any::<Duration>(0.1, 100.0), set in any::<Duration>(0.1, 100.0), volts in any::<Voltage>(300.0, 900.0), trip in any::<Voltage>(600.0, 900.0)) {
        let measured = measured_acceleration::Inputs { measured: time.map(Reading::bare), set_time: set, predicted_time: set };
        prop_assert!(sound(&measured_acceleration::check(&measured)));
        let stop = stop_time::Inputs { measured: time.map(Reading::bare), specified: set, began: stop_time::Began::TopSpeed };
        prop_assert!(sound(&stop_time::check(&stop)));
        let peak = bus_peak::Inputs { peak: volts.map(Reading::bare), trip };
        prop_assert!(sound(&bus_peak::check(&peak)));
    }
}
