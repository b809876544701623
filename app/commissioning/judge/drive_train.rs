//! The drive train as the sheets tell of it: motor, gear, load, what is moved in a line, and which settings it runs on.

use super::{Runs, View};
use crate::plant::Sheet::{Drive, Further, Load, Motor};
use crate::record::ParameterColumn;
use engineering::formulas::synchronous;
use engineering::motion::gear::EFFICIENCY_TAKEN;
use engineering::motion::{Flow, Gear, Linear, LoadTorque, Machine, TorqueTable};
use engineering::outcome::Assumption;
use engineering::quantity::Quantity;
use engineering::{Frequency, Inertia, Power, Ratio, Speed, Torque};

/// Which settings count.
#[derive(Clone, Copy)]
pub(super) enum Settings {
    /// Those of one column, and of no other.
    Column(ParameterColumn),
    /// Function by function as left where that stands, otherwise as intended.
    InForce,
}

impl Settings {
    /// A quantity that is set.
    pub(super) fn quantity<Q: Quantity>(self, view: &View<'_>, function: &str) -> Option<Q> {
        match self {
            Self::Column(column) => view.setting(function, column),
            Self::InForce => view.in_force(function),
        }
    }

    /// A choice that is set.
    pub(super) fn choice<'a>(self, view: &View<'a>, function: &str) -> Option<&'a str> {
        match self {
            Self::Column(column) => view.set_choice(function, column),
            Self::InForce => view
                .set_choice(function, ParameterColumn::AsLeft)
                .or_else(|| view.set_choice(function, ParameterColumn::Intended)),
        }
    }
}

/// Rated torque of the column in use.
pub(super) fn rated_torque(view: &View<'_>) -> Option<Torque> {
    let (power, speed): (Power, Speed) = (view.motor("power")?, view.motor("rpm")?);
    (speed.rpm() > 0.0).then(|| engineering::formulas::torque::torque(power, speed))
}

/// The frequency up to which the drive keeps rated flux: the base frequency that is set, or the plate's.
pub(super) fn base_frequency(view: &View<'_>, set: Settings) -> Option<Frequency> {
    set.quantity(view, "base-frequency")
        .or_else(|| view.plate(Further, "design-base-hertz"))
        .or_else(|| view.motor("hertz"))
}

/// Rated power and speed at the end of the range of rated torque: with a raised base frequency (87 Hz way) both are
/// higher than on the plate, at the same torque and the same slip speed.
fn rated_at_base(view: &View<'_>, set: Settings) -> Option<(Power, Speed)> {
    let (power, speed): (Power, Speed) = (view.motor("power")?, view.motor("rpm")?);
    let (plate, base): (Frequency, Frequency) = (view.motor("hertz")?, base_frequency(view, set)?);
    if plate.hertz() <= 0.0 || base.hertz() <= plate.hertz() * 1.02 {
        return Some((power, speed));
    }
    let pairs = synchronous::pole_pairs(plate, speed)?;
    let slip_speed = synchronous::synchronous_speed(plate, pairs).rpm() - speed.rpm();
    let raised = synchronous::synchronous_speed(base, pairs).rpm() - slip_speed;
    Some((Power::from_watts(power.watts() * raised / speed.rpm()), Speed::from_rpm(raised)))
}

/// The gear; its efficiency stays open where nobody entered it, except on a ratio of 1, which is a coupling.
fn gear(view: &View<'_>) -> Option<Gear> {
    let ratio = view.plate::<Ratio>(Load, "gear-ratio")?;
    let coupling = || ((ratio.fraction() - 1.0).abs() < 1e-9).then(|| Ratio::from_fraction(1.0));
    Some(Gear { ratio, efficiency: view.plate(Load, "gear-efficiency").or_else(coupling) })
}

/// The load's own speed at which its torque is known: the one entered, or its highest working speed.
fn at_speed(view: &View<'_>) -> Option<Speed> {
    view.plate(Load, "at-speed").or_else(|| view.plate(Load, "speed-high"))
}

/// The load's own torque curve, at the load's shaft.
fn load(view: &View<'_>) -> Option<LoadTorque> {
    let speed = at_speed(view);
    let torque: Option<Torque> = view.plate(Load, "torque").or_else(|| {
        let (power, speed): (Power, Speed) = (view.plate(Load, "power")?, speed?);
        (speed.rpm() > 0.0).then(|| engineering::formulas::torque::torque(power, speed))
    });
    let profile = view.choice(Load, "profile")?;
    match profile {
        "constant" => Some(LoadTorque::Constant(torque?)),
        "linear" | "quadratic" => {
            let (torque, speed, square) = (torque?, speed?, profile == "quadratic");
            let stays = view.plate::<Ratio>(Load, "static-torque").map(Ratio::fraction).filter(|share| *share > 0.0);
            Some(match stays {
                Some(share) => {
                    let at_rest = Torque::from_newton_metres(torque.newton_metres() * share);
                    LoadTorque::Lifted { at_rest, torque, speed, square }
                }
                None if square => LoadTorque::Quadratic { torque, speed },
                None => LoadTorque::Linear { torque, speed },
            })
        }
        "constant-power" => {
            let power = view.plate(Load, "power")?;
            Some(LoadTorque::ConstantPower { power, from: view.plate(Load, "speed-low").or(speed)? })
        }
        "table" => {
            let pairs = crate::plant::field::table(view.choice(Load, "torque-table")?).ok()?;
            let (top, full) = (speed?.rpm() / 100.0, torque?.newton_metres() / 100.0);
            let points: Vec<(Speed, Torque)> = pairs
                .into_iter()
                .map(|(n, t)| (Speed::from_rpm(n * top), Torque::from_newton_metres(t * full)))
                .collect();
            TorqueTable::new(&points).map(LoadTorque::Table)
        }
        _ => None,
    }
}

/// The load's torque at its working speed, brought to the motor's shaft.
pub(super) fn load_torque_at_shaft(view: &View<'_>) -> Option<Torque> {
    let own = load(view)?.at(at_speed(view).unwrap_or(Speed::from_rpm(0.0)));
    Some(gear(view).map_or(own, |g| g.reflected_torque(own, Flow::Motoring)))
}

/// What the load's curve asks of the motor's shaft at a motor speed.
pub(super) fn load_at_motor_speed(view: &View<'_>, speed: Speed) -> Option<Torque> {
    let curve = load(view)?;
    Some(match gear(view) {
        Some(g) => g.reflected_torque(curve.at(g.load_speed(speed)), Flow::Motoring),
        None => curve.at(speed),
    })
}

/// Breakaway at the load's shaft: a share of the load's torque at working speed.
fn breakaway(view: &View<'_>) -> Option<Torque> {
    let share: Ratio = view.plate(Load, "breakaway")?;
    let speed = at_speed(view).unwrap_or(Speed::from_rpm(0.0));
    Some(Torque::from_newton_metres(load(view)?.at(speed).newton_metres() * share.fraction()))
}

/// Breakaway, brought to the motor's shaft.
pub(super) fn breakaway_at_shaft(view: &View<'_>) -> Option<Torque> {
    breakaway(view).map(|t| gear(view).map_or(t, |g| g.reflected_torque(t, Flow::Motoring)))
}

/// What is moved in a line; its speed goes with the highest working speed of the load.
fn linear(view: &View<'_>) -> Option<Linear> {
    let mass = view.plate(Load, "linear-mass")?;
    let top: Option<Speed> = view.plate(Load, "speed-high").or_else(|| at_speed(view));
    let ratio = gear(view).map_or(1.0, |g| g.ratio.fraction());
    let motor = top.map(|n| Speed::from_rpm(n.rpm() * ratio));
    Some(Linear { mass: Some(mass), speed: view.plate(Load, "linear-speed"), motor })
}

/// Whether the load can drive the motor: as its sheet says, and where that is silent a load that can hang does.
fn overhauling(view: &View<'_>) -> bool {
    let hangs = || view.flag(Drive, "hoisting") == Some(true) || view.choice(Load, "kind") == Some("hoist");
    view.flag(Load, "overhauling").unwrap_or_else(hangs)
}

/// Motor, load, gear and current limit as one machine.
pub(super) fn machine(view: &View<'_>, set: Settings) -> Machine {
    let at_base = rated_at_base(view, set);
    let own: Option<Inertia> = view.plate(Motor, "inertia");
    let beside: Option<Inertia> = view.plate(Load, "motor-side-inertia");
    let motor_inertia = own.map(|j| {
        let beside = beside.map_or(0.0, Inertia::kilogram_square_metres);
        Inertia::from_kilogram_square_metres(j.kilogram_square_metres() + beside)
    });
    Machine {
        rated_power: at_base.map(|(power, _)| power),
        rated_speed: at_base.map(|(_, speed)| speed),
        rated_current: view.motor("amps"),
        power_factor: view.motor("power-factor"),
        breakdown: view.plate(Motor, "breakdown-torque"),
        magnetising_current: None,
        current_limit: set.quantity(view, "current-limit"),
        motor_inertia,
        load_inertia: view.plate(Load, "inertia"),
        load: load(view),
        breakaway: breakaway(view),
        gear: gear(view),
        linear: linear(view),
        overhauling: overhauling(view),
        overhauling_torque: view.plate(Load, "overhauling-torque"),
    }
}

/// Speed of the motor at a frequency with its rated slip.
pub(super) fn speed_at(view: &View<'_>, frequency: Frequency) -> Option<Speed> {
    let (plate, speed): (Frequency, Speed) = (view.motor("hertz")?, view.motor("rpm")?);
    let pairs = synchronous::pole_pairs(plate, speed)?;
    let lost = synchronous::synchronous_speed(plate, pairs).rpm() - speed.rpm();
    Some(Speed::from_rpm((synchronous::synchronous_speed(frequency, pairs).rpm() - lost).max(0.0)))
}

/// Says openly what stands in for figures of the load sheet that nobody entered, in the outcomes that rest on them.
pub(super) fn told(view: &View<'_>, mut runs: Runs) -> Runs {
    let mut assumed = Vec::new();
    let by_power = view.plate::<Torque>(Load, "torque").is_none();
    let by_speed = by_power || view.choice(Load, "profile").is_some_and(|profile| profile != "constant");
    let entered = view.plate::<Speed>(Load, "at-speed").is_some();
    if let Some(speed) = at_speed(view).filter(|_| by_speed && !entered) {
        let rpm = engineering::rounding::significant(speed.rpm(), 4);
        assumed.push(("speed at which the load's torque holds", format!("{rpm} rpm, the highest working speed")));
    }
    if gear(view).is_some_and(|gear| gear.efficiency.is_none()) {
        assumed.push(("gear efficiency", EFFICIENCY_TAKEN.to_owned()));
    }
    for (_, outcome) in &mut runs {
        for (what, taken) in &assumed {
            if !outcome.assumed.iter().any(|a| a.what == *what) {
                outcome.assumed.push(Assumption { what: (*what).to_owned(), taken: taken.clone() });
            }
        }
    }
    runs
}
