//! # deceleration-time
//!
//! Whether the set ramp down can be followed: braking torque within the current limit, bus volts below the trip.
//!
//! Braking torque J·dω/dt less what the load does; the load helps less by the gear's losses (row RM-02). A load that
//! can drive the motor does not help: it is judged pulling all the way, with the torque that its sheet gives. What comes
//! back fills the bus capacitors: V₂ = √(V₁² + 2·E/C) (row DC-09). What motor and inverter lose on the way is a
//! bracket unless it is entered: nothing, to 15 % of rated power (common practice). With a chopper the bus is held at
//! its voltage; what the resistor has to stand is the check `braking`. Within: the limit does not act, and the bus
//! stays below 95 % of the trip without any losses. Outside: the bus trips whatever the losses, or the load cannot be
//! slowed at all. Marginal: all between, such as a ramp that the limit stretches.

use crate::checks::bus_peak::MARGIN;
use crate::decision::Measured;
use crate::formulas::plausible;
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::motion::bus::energy_between;
use crate::motion::machine::newton_metres;
use crate::motion::ramp_down::RampDown;
use crate::motion::set_ramp::{s_curve, steepness};
use crate::motion::{Bus, End, Machine, SetRamp, Trace};
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Capacitance, Duration, Power, Ratio, Speed, Voltage};
use crate::rounding::significant;
use crate::sources::motion::{BRAKING_LOSSES, BUS_MARGIN, DC_09, RM_05, RM_08};

/// Name in the catalogue.
pub const NAME: &str = "deceleration-time";

/// The most that motor and inverter are taken to lose while braking, over rated power.
pub const MOST_LOST: Limit =
    Limit { name: "losses while braking, at most", value: 0.15, unit: "1", source: BRAKING_LOSSES };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Motor, load, gear and current limit.
    pub machine: Machine,
    /// Motor speed at which the ramp begins; rated speed is assumed.
    pub from_speed: Option<Speed>,
    /// Motor speed at which it ends; standstill is assumed.
    pub to_speed: Option<Speed>,
    /// Set time for this very change of speed.
    pub set_time: Option<Duration>,
    /// S-curve share of that time; a straight ramp is assumed.
    pub s_curve: Option<Ratio>,
    /// Bus voltage before braking.
    pub bus_voltage: Option<Voltage>,
    /// Bus capacitance.
    pub bus_capacitance: Option<Capacitance>,
    /// Bus voltage at which the drive trips.
    pub trip_voltage: Option<Voltage>,
    /// Voltage at which the brake chopper conducts; none is taken as no chopper.
    pub chopper_voltage: Option<Voltage>,
    /// What motor and inverter lose while braking; a bracket is assumed.
    pub losses: Option<Power>,
}

/// The bus with the least and with the most losses; the same twice where they are entered.
struct Ends {
    least: Bus,
    most: Bus,
}

/// The ramp as it will run, with its bus volts where they are known; none while an input is missing. Where the losses
/// are not entered the larger ones count, so that it ends in a trip only where one is certain.
#[must_use]
pub fn trace(inputs: &Inputs) -> Option<Trace> {
    let mut b = OutcomeBuilder::new(NAME);
    let run = run_down(&mut b, inputs)?;
    let time = plausible::positive(&mut b, inputs.set_time, "set deceleration time")?;
    let set = SetRamp { time, s_curve: s_curve(&mut b, inputs.s_curve)? };
    let bus = bus(&mut b, inputs).map(|ends| ends.most);
    Some(RampDown { bus, ..run }.on_ramp(set))
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    for source in [RM_05, RM_08, DC_09, BUS_MARGIN] {
        b.cite(source);
    }
    b.note("A drive that holds its ramp when the bus rises takes longer than set instead of tripping.");
    let run = run_down(&mut b, inputs);
    let set = plausible::positive(&mut b, inputs.set_time, "set deceleration time");
    let ends = bus(&mut b, inputs);
    let share = s_curve(&mut b, inputs.s_curve);
    let (Some(run), Some(share)) = (run, share) else { return b.not_assessed() };
    let tightest = run.tightest(share);
    let (place, torque) = (tightest.speed, tightest.spare);
    b.line(
        &format!("least torque to slow down with, at {} rpm ({})", significant(place.rpm(), 4), run.train.load.words()),
        "T + T_L",
        format!(
            "{} + {}",
            newton_metres(run.motor.available(run.limit, place)),
            newton_metres(run.train.slowing(place))
        ),
        newton_metres(torque),
    );
    let Some(even) = run.shortest_ramp(share).map(Duration::seconds) else {
        b.limit("more braking torque than the load's pull, at every speed on the way");
        return b.judged(
            Verdict::Outside,
            "The load pulls harder than the current limit lets the motor hold. Look at the limit and the gear before any run with this load.",
        );
    };
    let (formula, steep) = steepness(&mut b, share, tightest.slope);
    b.line(
        "shortest even ramp within the current limit",
        &format!("t = {formula}J·2π·Δn/(60·(T + T_L))"),
        format!(
            "{steep}{} kg·m² × 2π × {} rpm/(60 × {})",
            significant(run.train.inertia.kilogram_square_metres(), 4),
            significant(run.from.rpm() - run.to.rpm(), 4),
            newton_metres(torque)
        ),
        format!("{} s", significant(even, 3)),
    );
    b.figure("shortest even ramp within the current limit", even, 3, "s");
    limits(&mut b, inputs, &run, ends.as_ref(), (share, even));
    let (Some(set), Some(ends)) = (set, ends) else { return b.not_assessed() };
    judge(b, &run, &ends, SetRamp { time: set, s_curve: share }, even)
}

/// Limit and ruler, before the setting is there.
fn limits(b: &mut OutcomeBuilder, inputs: &Inputs, run: &RampDown, ends: Option<&Ends>, (share, even): (Ratio, f64)) {
    let shortest =
        |bus: Bus| RampDown { bus: Some(bus), ..run.clone() }.shortest_without_chopper(share).map(Duration::seconds);
    let trip = ends.and_then(|ends| ends.least.trip);
    let ends = ends.filter(|_| inputs.chopper_voltage.is_none());
    if let Some((ends, capacitance)) = ends.and_then(|e| Some((e, e.least.capacitance?)))
        && let Some(trip) = ends.least.trip
    {
        b.line(
            "what the capacitors take up to the trip",
            "E = ½·C·(V_trip² − V²)",
            format!(
                "½ × {} µF × (({} V)² − ({} V)²)",
                significant(capacitance.farads() * 1e6, 4),
                significant(trip.volts(), 3),
                significant(ends.least.voltage.volts(), 3)
            ),
            format!("{} J", significant(energy_between(ends.least.voltage, trip, capacitance).joules(), 3)),
        );
    }
    let (safe, possible) = (ends.and_then(|e| shortest(e.least)), ends.and_then(|e| shortest(e.most)));
    let longest = safe.map_or(even, |t| t.max(even));
    let mut rule = LimitRule::linear("s").at_least(longest, format!("≥ {} s", significant(longest, 3)));
    let mut words = format!("at least {} s", significant(longest, 3));
    if let Some(possible) = possible {
        let with_losses = possible.max(even);
        b.figure("shortest ramp below the bus trip, most losses", with_losses, 3, "s");
        if with_losses < longest {
            rule = rule.tick(with_losses, format!("with losses {} s", significant(with_losses, 3)));
            words = format!(
                "{words} without any losses, at least {} s with the most that are assumed",
                significant(with_losses, 3)
            );
        }
    }
    if let Some(safe) = safe {
        b.figure("shortest ramp below the bus trip, no losses", safe, 3, "s");
    }
    if let Some(trip) = trip {
        words = format!(
            "{words}, and a bus peak below {} V, 95 % of the trip",
            significant(trip.volts() * MARGIN.value, 3)
        );
    }
    b.limit(words);
    b.rule(rule);
}

fn run_down(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<RampDown> {
    let (motor, train, limit) = (inputs.machine.motor(b), inputs.machine.braked_train(b), inputs.machine.limit(b));
    let to = b.assume(inputs.to_speed, Speed::from_rpm(0.0), "speed at the end", "standstill");
    let to = plausible::not_negative(b, Some(to), "speed at the end");
    let motor = motor?;
    let from = b.assume(inputs.from_speed, motor.rated_speed, "speed at the start", "rated speed");
    let from = plausible::positive(b, Some(from), "speed at the start");
    let (from, to) = (from?, to?);
    let from = b.need((from.rpm() > to.rpm()).then_some(from), "speed at the start above the speed at the end")?;
    Some(RampDown { motor, train: train?, limit: limit?, bus: None, from, to })
}

/// The bus: with a chopper its capacitance and trip matter little, without one they decide.
fn bus(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<Ends> {
    let voltage = plausible::positive(b, inputs.bus_voltage, "bus voltage before braking");
    let rated = inputs.machine.rated_power.map_or(0.0, Power::watts);
    let assumed = (Power::from_watts(0.0), Power::from_watts(MOST_LOST.value * rated));
    if inputs.losses.is_none() {
        b.cite(BRAKING_LOSSES);
    }
    let given = inputs.losses.map(|losses| (losses, losses));
    let (least, most) = b.assume(given, assumed, "losses while braking", "between none and 15 % of rated power");
    let least = plausible::not_negative(b, Some(least), "losses while braking");
    let (capacitance, trip) = if let Some(chopper) = inputs.chopper_voltage {
        let above = chopper.volts().is_finite() && inputs.bus_voltage.is_none_or(|v| chopper.volts() > v.volts());
        b.need(above.then_some(chopper), "chopper voltage above the bus voltage")?;
        (inputs.bus_capacitance, inputs.trip_voltage)
    } else {
        b.assume(None, (), "brake chopper", "none");
        let capacitance = plausible::positive(b, inputs.bus_capacitance, "bus capacitance");
        let trip = plausible::positive(b, inputs.trip_voltage, "bus trip voltage");
        (Some(capacitance?), Some(trip?))
    };
    let sound = |x: f64| x.is_finite() && x > 0.0;
    let bus = Bus {
        voltage: voltage?,
        capacitance: capacitance.filter(|c| sound(c.farads())),
        trip: trip.filter(|t| sound(t.volts())),
        chopper: inputs.chopper_voltage,
        losses: least?,
    };
    if let Some(trip) = bus.trip {
        b.need((trip.volts() > bus.voltage.volts()).then_some(()), "bus trip voltage above the bus voltage")?;
    }
    Some(Ends { least: bus, most: Bus { losses: most, ..bus } })
}

fn judge(mut b: OutcomeBuilder, run: &RampDown, ends: &Ends, set: SetRamp, even: f64) -> Outcome {
    let seconds = set.time.seconds();
    let shown = significant(seconds, 3);
    let [worst, best] = [ends.least, ends.most].map(|bus| RampDown { bus: Some(bus), ..run.clone() }.on_ramp(set));
    let mut verdict = Verdict::Within;
    let mut words = Vec::new();
    if Measured::exact(seconds).at_least(even) != Verdict::Within {
        verdict = Verdict::Marginal;
        let time = RampDown { bus: None, ..run.clone() }.on_ramp(set).time().map_or(f64::NAN, Duration::seconds);
        words.push(format!("the current limit stretches it to {} s", significant(time, 3)));
    }
    match (worst.end, best.end) {
        (_, End::BusTripped { after, at }) => {
            verdict = Verdict::Outside;
            let (after, at) = (significant(after.seconds(), 3), significant(at.rpm(), 3));
            words.push(format!("the bus reaches its trip after {after} s at {at} rpm, losses counted in"));
        }
        (End::BusTripped { .. }, _) => {
            verdict = Verdict::Marginal;
            words.push("whether the bus reaches its trip hangs on the losses".to_owned());
        }
        _ => {
            let peak = worst.peak_bus().map_or(0.0, Voltage::volts);
            if ends.least.trip.is_some_and(|trip| peak > trip.volts() * MARGIN.value) {
                verdict = Verdict::Marginal;
                words.push(format!("the bus may rise to {} V, within 5 % of the trip", significant(peak, 3)));
            }
        }
    }
    if let Some(time) = best.time() {
        b.figure("predicted time on the set ramp", time.seconds(), 3, "s");
    }
    if let (Some(peak), End::Reached) = (worst.peak_bus(), worst.end) {
        b.figure("bus peak on the set ramp, least losses", peak.volts(), 3, "V");
        let from = format!("from {} V, step by step", significant(ends.least.voltage.volts(), 3));
        b.line("bus rise, least losses", "V₂ = √(V₁² + 2·E/C)", from, format!("{} V", significant(peak.volts(), 3)));
    }
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(seconds, 0.0, format!("set {shown} s"), verdict));
    }
    b.judged(
        verdict,
        if words.is_empty() {
            format!("The set {shown} s can be followed.")
        } else {
            format!(
                "Set {shown} s: {}. Lengthen the ramp, or see whether a brake resistor is meant to be there.",
                words.join(", and ")
            )
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::motion::LoadTorque;
    use crate::motion::machine::tests::fan;
    use crate::quantity::{Inertia, Torque};

    /// The published braking example C-RM-008 on a 15 kW motor: 1.5 kg·m², 10 N·m, 1480 rpm, 3300 µF, 565 V.
    fn example(seconds: f64) -> Inputs {
        let mut machine = fan();
        machine.motor_inertia = Some(Inertia::from_kilogram_square_metres(0.1));
        machine.load_inertia = Some(Inertia::from_kilogram_square_metres(1.4));
        machine.load = Some(LoadTorque::Constant(Torque::from_newton_metres(10.0)));
        Inputs {
            machine,
            from_speed: Some(Speed::from_rpm(1480.0)),
            set_time: Some(Duration::from_seconds(seconds)),
            bus_voltage: Some(Voltage::from_volts(565.0)),
            bus_capacitance: Some(Capacitance::from_farads(3300e-6)),
            trip_voltage: Some(Voltage::from_volts(800.0)),
            losses: Some(Power::from_watts(0.0)),
            ..Inputs::default()
        }
    }

    fn figure(outcome: &Outcome, name: &str) -> f64 {
        outcome.figures.iter().find(|f| f.name == name).expect("there").value.parse().expect("number")
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        let trips = check(&example(5.0));
        assert_eq!(trips.verdict, Verdict::Outside);
        assert!(trips.summary.contains("reaches its trip"), "{}", trips.summary);
        let shortest = figure(&trips, "shortest ramp below the bus trip, no losses");
        assert_eq!(check(&example(shortest * 0.99)).verdict, Verdict::Outside);
        assert_eq!(check(&example(shortest * 1.002)).verdict, Verdict::Marginal);
        assert_eq!(check(&example(24.0)).verdict, Verdict::Within);
    }

    /// C-RM-008: without a chopper, and without a trip in reach, the bus would reach 2981 V.
    #[test]
    fn the_bus_rise_is_the_published_one() {
        let inputs = Inputs { trip_voltage: Some(Voltage::from_volts(4000.0)), ..example(5.0) };
        assert!((figure(&check(&inputs), "bus peak on the set ramp, least losses") - 2980.0).abs() < 11.0);
        let peak = trace(&inputs).expect("complete").peak_bus().expect("known");
        assert!((peak.volts() - 2981.4993).abs() < 0.5);
    }

    /// The lossless 5 s example brings back 5.7 kW at first; 15 % of 15 kW is 2.25 kW, so 5 s trips and 12 s may not.
    #[test]
    fn losses_not_entered_are_a_bracket() {
        let open = |seconds| Inputs { losses: None, ..example(seconds) };
        assert_eq!(check(&open(5.0)).verdict, Verdict::Outside);
        let hangs = check(&open(12.0));
        assert_eq!(hangs.verdict, Verdict::Marginal);
        assert!(hangs.summary.contains("hangs on the losses"), "{}", hangs.summary);
        assert_eq!(check(&open(24.0)).verdict, Verdict::Within);
        assert_eq!(trace(&open(12.0)).expect("complete").end, End::Reached);
    }

    #[test]
    fn a_chopper_holds_the_bus_and_the_limit_may_stretch_the_ramp() {
        let with = |seconds| Inputs { chopper_voltage: Some(Voltage::from_volts(740.0)), ..example(seconds) };
        let followed = check(&with(5.0));
        assert_eq!(followed.verdict, Verdict::Within, "{}", followed.summary);
        let stretched = check(&with(1.0));
        assert_eq!(stretched.verdict, Verdict::Marginal);
        assert!(stretched.summary.contains("stretches"), "{}", stretched.summary);
    }

    #[test]
    fn what_is_missing_is_named_and_the_limit_is_there_before_the_setting() {
        let outcome = check(&Inputs { set_time: None, ..example(1.0) });
        assert_eq!(outcome.verdict, Verdict::NotAssessed);
        assert!(outcome.rule.is_some() && outcome.limit.starts_with("at least "));
        let outcome = check(&Inputs { bus_capacitance: None, ..example(5.0) });
        assert_eq!(outcome.missing[0].what, "bus capacitance");
        assert_eq!(check(&example(f64::NAN)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&example(0.0)).verdict, Verdict::NotAssessed);
    }

    #[test]
    fn an_overhauling_load_beyond_the_limit_is_outside() {
        let mut inputs = example(10.0);
        inputs.machine.load = Some(LoadTorque::Constant(Torque::from_newton_metres(-300.0)));
        assert_eq!(check(&inputs).verdict, Verdict::Outside);
    }

    /// The load of C-RM-008 helps to stop; the same one pulling fills the bus (rows RM-05, DC-09).
    #[test]
    fn a_load_that_can_drive_the_motor_never_helps_to_stop() {
        assert_eq!(check(&example(24.0)).verdict, Verdict::Within);
        let mut inputs = example(24.0);
        inputs.machine.overhauling = true;
        assert_eq!(check(&inputs).missing[0].what, "torque of the load when it drives the motor");
        inputs.machine.overhauling_torque = Some(Torque::from_newton_metres(10.0));
        assert_eq!(check(&inputs).verdict, Verdict::Outside);
        inputs.chopper_voltage = Some(Voltage::from_volts(750.0));
        let held = check(&inputs);
        assert_eq!(held.verdict, Verdict::Within, "{}", held.summary);
        assert!(held.notes.iter().any(|n| n.contains("pulling")));
    }
}
