//! The formulas of the catalogue once each, with fixed figures and nothing around them: no limits in words, no working,
//! no missing inputs. What the checks of a full record are measured against.

use engineering::formulas::magnetising::Bracket;
use engineering::formulas::{
    capacitor, conductor, copper, derating, dew_point, fault_current, load_current, magnetising, power_flow, rectifier,
    reflection, synchronous, torque, unbalance, variable_frequency,
};
use engineering::motion::available_torque::Motor;
use engineering::motion::gear::Gear;
use engineering::motion::load_torque::LoadTorque;
use engineering::motion::ramp_down::RampDown;
use engineering::motion::ramp_up::RampUp;
use engineering::motion::train::Train;
use engineering::quantity::{
    ApparentPower, Capacitance, Current, Duration, Frequency, Inertia, Length, Power, Ratio, Resistance, Speed,
    Temperature, Torque, Voltage,
};
use std::hint::black_box;

/// A ramp up and a ramp down, each as the quickest, as set and as the shortest even one, for two columns of settings.
pub fn motion() {
    for seconds in [20.0, 25.0] {
        let (power, speed) = (Power::from_watts(15e3), Speed::from_rpm(1465.0));
        let (rated, breakdown) = (Current::from_amperes(28.5), Ratio::from_fraction(2.6));
        let Some(bracket) = magnetising::bracket(rated, Ratio::from_fraction(0.84), breakdown) else { return };
        let motor = Motor::from_plate(power, speed, rated, breakdown, bracket);
        let load = LoadTorque::Quadratic { torque: Torque::from_newton_metres(85.0), speed };
        let inertia = Inertia::from_kilogram_square_metres;
        let train = Train::new(inertia(0.1), inertia(1.5), load, None, Gear::DIRECT);
        let (limit, rest, set) = (Current::from_amperes(34.0), Speed::from_rpm(0.0), Duration::from_seconds(seconds));
        let up = RampUp { motor, train: train.clone(), limit, from: rest, to: speed };
        black_box((up.fastest(), up.on_ramp(black_box(set)), up.shortest_even_ramp()));
        let down = RampDown { motor, train, limit, bus: None, from: speed, to: rest };
        black_box((down.fastest(), down.on_ramp(black_box(set)), down.shortest_even_ramp()));
    }
}

/// Everything that is no ramp.
pub fn at_rest() {
    let volts = |v: f64| Voltage::from_volts(black_box(v));
    let amperes = |a: f64| Current::from_amperes(black_box(a));
    let ohms = |r: f64| Resistance::from_ohms(black_box(r));
    let share = |f: f64| Ratio::from_fraction(black_box(f));
    let celsius = |t: f64| Temperature::from_celsius(black_box(t));
    let (power, speed) = (Power::from_watts(black_box(15e3)), Speed::from_rpm(black_box(1465.0)));
    let (hertz, rated) = (Frequency::from_hertz(black_box(50.0)), amperes(28.5));
    let section = engineering::quantity::CrossSection::from_square_millimetres(black_box(6.0));

    black_box(synchronous::pole_pairs(hertz, speed));
    let turning = synchronous::synchronous_speed(hertz, 2);
    black_box((synchronous::slip(turning, speed), torque::torque(power, speed)));
    let taken = power_flow::apparent(volts(400.0), rated);
    black_box((power_flow::power_factor(power, taken), power_flow::input(power, share(0.921))));
    for line in [398.0, 401.0, 402.0] {
        black_box((rectifier::mean(volts(line)), rectifier::peak(volts(line)), rectifier::ripple(volts(line))));
    }
    black_box(unbalance::negative_sequence([volts(398.0), volts(401.0), volts(402.0)]));
    for _ in 0..6 {
        black_box(unbalance::negative_sequence([amperes(21.0), amperes(21.4), amperes(21.2)]));
    }
    black_box(unbalance::load_factor(share(0.01)));
    let bank = Capacitance::from_farads(black_box(1.2e-3));
    black_box((capacitor::time_constant(ohms(50e3), bank), capacitor::energy(bank, volts(565.0))));
    black_box(capacitor::discharge_time(ohms(50e3), bank, volts(565.0), volts(50.0)));
    black_box(
        (derating::by_altitude(Length::from_metres(black_box(200.0)), Length::from_metres(1000.0), share(0.01)),),
    );
    black_box(dew_point::dew_point(celsius(18.0), share(0.6)));
    for column in [0.42, 0.425, 0.421] {
        black_box(copper::resistance_at(ohms(column), celsius(18.0), celsius(40.0), copper::Conductor::Copper));
    }
    let unit = conductor::per_kilometre(section, copper::Conductor::Copper);
    let warm = conductor::at_temperature(unit, celsius(60.0));
    black_box(conductor::of_length(warm, Length::from_metres(45.0)));
    black_box(reflection::critical_length(Length::from_metres(1.5e8), Duration::from_seconds(black_box(1e-7))));
    let (long, critical) = (Length::from_metres(45.0), Length::from_metres(7.5));
    black_box(reflection::peak(volts(565.0), reflection::usual_coefficient(power), long, critical));
    black_box(fault_current::base_impedance(share(0.05), volts(400.0), ApparentPower::from_volt_amperes(630e3)));
    if let Some(Bracket { low, .. }) = magnetising::bracket(rated, share(0.84), share(2.6)) {
        for part in [0.1, 0.25, 0.4, 0.6, 0.8, 1.0] {
            black_box(load_current::current_for(rated, low, share(part), share(1.0)));
            black_box(load_current::current_for(rated, low, share(part), share(1.2)));
        }
    }
    for output in [5.0, 10.0, 25.0, 40.0, 50.0, 60.0] {
        let output = Frequency::from_hertz(black_box(output));
        black_box(variable_frequency::voltage(volts(400.0), hertz, output));
        black_box(variable_frequency::torque_share(hertz, output));
        black_box(variable_frequency::speed(output, 2, Speed::from_rpm(35.0), share(0.8)));
    }
}
