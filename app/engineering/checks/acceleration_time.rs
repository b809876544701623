//! # acceleration-time
//!
//! How long the load really takes to speed up, against the time that is set.
//!
//! The motor's torque within the current limit is T = T_N·(1/r)·√(I_lim² − (I_m/r)²)/√(I_N² − I_m²), r = n/n_N but at
//! least 1, and never above λ·T_N/(1.3·r²). What the load leaves of it speeds up the inertia: dt = J·dω/(T − T_L),
//! integrated in 400 steps. The shortest even ramp is J·Δω over the least spare torque on the way; rounded ends within
//! the set time (an S-curve share s of it) ask 1/(1 − s/2) of the mean acceleration between them. Set at least that: within. Shorter: the limit stretches the ramp, marginal. Shorter than the least time there is,
//! stalled on the way, or held at standstill: outside. A plate without λ counts as 1.6, a gear not stated as a direct
//! coupling. The start's r.m.s. current and heat are figures: heat beyond rated current over (1.5² − 1) × 120 s, which
//! IEC 60034-1 asks a warm motor to stand, with no heat given off meanwhile (row OL-09, from memory). Inertia and load come from their makers; nothing here replaces the first careful run.

use crate::decision::Measured;
use crate::formulas::{excess_current, plausible};
use crate::limit_rule::LimitRule;
use crate::motion::machine::newton_metres;
use crate::motion::ramp_up::{RampUp, asked};
use crate::motion::set_ramp::{STRAIGHT, s_curve, steepness};
use crate::motion::{End, Machine, SetRamp, Trace};
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Duration, Ratio, Speed, Torque};
use crate::rounding::significant;
use crate::sources::motion::{EXCESS_CURRENT, RM_01, RM_08, RM_09, VF_04};

/// Name in the catalogue.
pub const NAME: &str = "acceleration-time";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Motor, load, gear and current limit.
    pub machine: Machine,
    /// Motor speed at which the ramp begins; standstill is assumed.
    pub from_speed: Option<Speed>,
    /// Motor speed at which it ends; rated speed is assumed.
    pub to_speed: Option<Speed>,
    /// Set time for this very change of speed.
    pub set_time: Option<Duration>,
    /// S-curve share of that time; a straight ramp is assumed.
    pub s_curve: Option<Ratio>,
    /// Whether the drive runs on plain volts per hertz without boost.
    pub plain_volts_per_hertz: Option<bool>,
}

/// The ramp as it will run; none while an input is missing.
#[must_use]
pub fn trace(inputs: &Inputs) -> Option<Trace> {
    let mut b = OutcomeBuilder::new(NAME);
    let run = run_up(&mut b, inputs)?;
    let time = plausible::positive(&mut b, inputs.set_time, "set acceleration time")?;
    Some(run.on_ramp(SetRamp { time, s_curve: s_curve(&mut b, inputs.s_curve)? }))
}

/// The largest torque at the motor's shaft that the set ramp asks, not cut by the current limit: what a current limit
/// is to be judged by. None while an input is missing.
#[must_use]
pub fn torque_asked(inputs: &Inputs) -> Option<Torque> {
    let mut b = OutcomeBuilder::new(NAME);
    let train = inputs.machine.train(&mut b)?;
    let from = plausible::not_negative(&mut b, inputs.from_speed.or(Some(Speed::from_rpm(0.0))), "speed at the start")?;
    let to = plausible::positive(&mut b, inputs.to_speed.or(inputs.machine.rated_speed), "speed at the end")?;
    let time = plausible::positive(&mut b, inputs.set_time, "set acceleration time")?;
    let set = SetRamp { time, s_curve: s_curve(&mut b, inputs.s_curve)? };
    (to.rpm() > from.rpm()).then(|| asked(&train, from, to, set)).filter(|t| t.newton_metres().is_finite())
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(RM_01);
    b.cite(RM_08);
    let run = run_up(&mut b, inputs);
    let share = s_curve(&mut b, inputs.s_curve);
    let set = plausible::positive(&mut b, inputs.set_time, "set acceleration time");
    if inputs.plain_volts_per_hertz != Some(false) {
        b.cite(VF_04);
        b.note("Plain volts per hertz without boost does not reach this torque at breakaway.");
    }
    let (Some(run), Some(share)) = (run, share) else { return b.not_assessed() };

    let standstill = Speed::from_rpm(0.0);
    let at_start = run.motor.available(run.limit, standstill);
    // The end of the bracket that gives less: the lower one in overload, the upper one below rated current.
    let overload = run.limit.amperes() >= run.motor.rated_current.amperes();
    let magnetising = if overload { run.motor.magnetising.low } else { run.motor.magnetising.high };
    let (limit, rated, m) = (
        significant(run.limit.amperes(), 4),
        significant(run.motor.rated_current.amperes(), 4),
        significant(magnetising.amperes(), 4),
    );
    b.line(
        "torque within the limit up to base speed",
        "T = T_N·√(I_lim² − I_m²)/√(I_N² − I_m²), at most λ·T_N/1.3",
        format!(
            "{} × √({limit}² − {m}²)/√({rated}² − {m}²), at most {}",
            newton_metres(run.motor.rated_torque),
            newton_metres(run.motor.ceiling(standstill))
        ),
        newton_metres(at_start),
    );
    let tightest = run.tightest(share);
    let (place, spare) = (tightest.speed, tightest.spare);
    b.line(
        &format!("least spare torque, at {} rpm ({})", significant(place.rpm(), 4), run.train.load.words()),
        "T − T_L",
        format!(
            "{} − {}",
            newton_metres(run.motor.available(run.limit, place)),
            newton_metres(run.train.opposing(place))
        ),
        newton_metres(spare),
    );
    b.figure("least spare torque", spare.newton_metres(), 3, "N·m");
    let fastest = run.fastest();
    let (Some(even), Some(least)) = (run.shortest_ramp(share), fastest.time()) else {
        return cannot(b, &run, &fastest.end);
    };
    let (even, least) = (even.seconds(), least.seconds());
    let (formula, steep) = steepness(&mut b, share, tightest.slope);
    b.line(
        "shortest even ramp",
        &format!("t = {formula}J·2π·Δn/(60·(T − T_L))"),
        format!(
            "{steep}{} kg·m² × 2π × {} rpm/(60 × {})",
            significant(run.train.inertia.kilogram_square_metres(), 4),
            significant(run.to.rpm() - run.from.rpm(), 4),
            newton_metres(spare)
        ),
        format!("{} s", significant(even, 3)),
    );
    b.line(
        "least time, always in the limit",
        "t = J·∫dω/(T − T_L)",
        "400 steps of speed",
        format!("{} s", significant(least, 3)),
    );
    b.figure("shortest even ramp", even, 3, "s");
    b.figure("least time", least, 3, "s");
    b.limit(format!("at least {} s, the shortest even ramp that stays out of the current limit", significant(even, 3)));
    b.rule(
        LimitRule::linear("s")
            .at_least(even, format!("≥ {} s", significant(even, 3)))
            .tick(least, format!("least {} s", significant(least, 3))),
    );
    let Some(set) = set else { return b.not_assessed() };
    judge(b, &run, SetRamp { time: set, s_curve: share }, even, least)
}

fn run_up(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<RampUp> {
    let (motor, train, limit) = (inputs.machine.motor(b), inputs.machine.train(b), inputs.machine.limit(b));
    b.assume(inputs.machine.breakaway.map(|_| ()), (), "breakaway torque", "none beyond the start of the load's curve");
    let from = b.assume(inputs.from_speed, Speed::from_rpm(0.0), "speed at the start", "standstill");
    let from = plausible::not_negative(b, Some(from), "speed at the start");
    let motor = motor?;
    let to = b.assume(inputs.to_speed, motor.rated_speed, "speed at the end", "rated speed");
    let to = plausible::positive(b, Some(to), "speed at the end");
    let (from, to) = (from?, to?);
    let to = b.need((to.rpm() > from.rpm()).then_some(to), "speed at the end above the speed at the start")?;
    Some(RampUp { motor, train: train?, limit: limit?, from, to })
}

/// No setting helps: the load is held or stalls with all the torque that the limit leaves.
fn cannot(mut b: OutcomeBuilder, run: &RampUp, end: &End) -> Outcome {
    b.limit("more torque than the load asks, at every speed on the way");
    let place = run.tightest(STRAIGHT).speed;
    let (available, asked, because) = match end {
        End::HeldAtStandstill { available, asked } => (
            *available,
            *asked,
            format!(
                "The load needs {} to break away and the limit leaves {}",
                newton_metres(*asked),
                newton_metres(*available)
            ),
        ),
        End::Stalled { at } => (
            run.motor.available(run.limit, place),
            run.train.opposing(place),
            format!(
                "The run stalls at {} rpm: the limit leaves no torque over and above the load",
                significant(at.rpm(), 4)
            ),
        ),
        End::Reached | End::BusTripped { .. } => {
            (run.motor.available(run.limit, place), run.train.opposing(place), "No torque is left over".to_owned())
        }
    };
    b.rule(LimitRule::linear("N·m").at_least(asked.newton_metres(), format!("> {}", newton_metres(asked))).reading(
        available.newton_metres(),
        0.0,
        newton_metres(available),
        Verdict::Outside,
    ));
    b.judged(
        Verdict::Outside,
        format!("{because}. Look at the current limit, the load and the gear; a longer ramp does not help."),
    )
}

fn judge(mut b: OutcomeBuilder, run: &RampUp, set: SetRamp, even: f64, least: f64) -> Outcome {
    let predicted = run.on_ramp(set);
    let seconds = set.time.seconds();
    let taken = predicted.time().map_or(f64::NAN, Duration::seconds);
    b.figure("predicted time on the set ramp", taken, 3, "s");
    b.figure("highest current on the set ramp", predicted.peak_current().amperes(), 3, "A");
    let verdict = match Measured::exact(seconds).at_least(even) {
        Verdict::Within => Verdict::Within,
        _ if seconds < least => Verdict::Outside,
        _ => Verdict::Marginal,
    };
    let (set, taken, even) = (significant(seconds, 3), significant(taken, 3), significant(even, 3));
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(seconds, 0.0, format!("set {set} s"), verdict));
    }
    b.line(
        "on the set ramp",
        "dn/dt = the set one, or what the limit leaves",
        format!("{set} s set"),
        format!("{taken} s"),
    );
    heat(&mut b, run, &predicted);
    let between = predicted.limited_between().map_or_else(String::new, |(from, to)| {
        format!(" from {} to {} rpm", significant(from.rpm(), 3), significant(to.rpm(), 3))
    });
    b.judged(
        verdict,
        match verdict {
            Verdict::Within => format!("The set {set} s can be followed; the current limit acts below {even} s."),
            Verdict::Outside => format!(
                "Set {set} s; the load takes {} s at least, in the current limit all the way or nearly. Set {even} s or more.",
                significant(least, 3)
            ),
            _ => format!("Set {set} s; the current limit acts{between} and stretches it to {taken} s. Set {even} s or more."),
        },
    )
}

/// Peak and r.m.s. current of the start, and its heat against what a warm motor stands; figures, no verdict.
fn heat(b: &mut OutcomeBuilder, run: &RampUp, start: &Trace) {
    let rated = run.motor.rated_current;
    let Some(mean) = start.root_mean_square_current() else { return };
    b.cite(RM_09);
    b.cite(EXCESS_CURRENT);
    let (peak, amperes) = (significant(start.peak_current().amperes(), 3), significant(mean.amperes(), 3));
    b.line("r.m.s. current over the start", "I = √(∫I²·dt/t)", format!("peak {peak} A"), format!("{amperes} A"));
    b.figure("r.m.s. current over the start", mean.amperes(), 3, "A");
    let excess = start.excess_heat(rated);
    let share = excess_current::share(excess).fraction() * 100.0;
    let (beyond, stood) = (significant(excess.seconds(), 3), significant(excess_current::STOOD.seconds(), 3));
    b.line(
        "heat beyond rated current, over what a warm motor stands",
        "∫((I/I_N)² − 1)·dt/((1.5² − 1)·120 s)",
        format!("{beyond} s/{stood} s"),
        format!("{} %", significant(share, 3)),
    );
    b.figure("heat of the start, over what a warm motor stands", share, 3, "%");
    b.note("Heat of the start: motor at working temperature, no heat given off meanwhile, 1.5 times rated current for 2 min counted as 100 %. Ask the maker above 315 kW, and for frequent starts.");
    if share > 100.0 {
        b.note("The start heats the motor more than the standard asks every motor to stand: ask its maker, or set a longer ramp with less current.");
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::motion::LoadTorque;
    use crate::motion::machine::tests::fan;
    use crate::quantity::{Current, Inertia, Torque};

    fn set(seconds: f64) -> Inputs {
        Inputs { machine: fan(), set_time: Some(Duration::from_seconds(seconds)), ..Inputs::default() }
    }

    fn figure(outcome: &Outcome, name: &str) -> f64 {
        outcome.figures.iter().find(|f| f.name == name).expect("there").value.parse().expect("number")
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        let first = check(&set(60.0));
        let (even, least) = (figure(&first, "shortest even ramp"), figure(&first, "least time"));
        assert_eq!(first.verdict, Verdict::Within);
        assert!(least < even, "{least} {even}");
        assert_eq!(check(&set(even * 1.01)).verdict, Verdict::Within);
        let stretched = check(&set(even * 0.9));
        assert_eq!(stretched.verdict, Verdict::Marginal);
        assert!(figure(&stretched, "predicted time on the set ramp") > even * 0.9);
        assert_eq!(check(&set(least * 0.99)).verdict, Verdict::Outside);
    }

    /// Row RM-01, C-RM-003 by its figures: 1.2 kg·m², 97 N·m against 40 N·m, 1470 rpm: 3.24 s.
    #[test]
    fn a_constant_load_takes_the_published_time() {
        let mut inputs = set(60.0);
        inputs.machine.motor_inertia = Some(Inertia::from_kilogram_square_metres(0.2));
        inputs.machine.load_inertia = Some(Inertia::from_kilogram_square_metres(1.0));
        inputs.machine.load = Some(LoadTorque::Constant(Torque::from_newton_metres(40.0)));
        // Rated current: 97.44 N·m, so 3.2408 s × 57/57.44.
        inputs.machine.current_limit = Some(Current::from_amperes(28.5));
        let outcome = check(&inputs);
        assert!((figure(&outcome, "least time") - 3.216).abs() < 0.011, "{outcome:?}");
        assert!((figure(&outcome, "shortest even ramp") - 3.216).abs() < 0.011);
    }

    /// Row RM-01: J·Δω/t + T_L = 4 kg·m² × 153.94 rad/s/10 s + 70 N·m = 131.6 N·m, whatever the current limit is.
    #[test]
    fn the_torque_that_a_ramp_asks_does_not_know_the_limit() {
        for limit in [Some(12.0), Some(31.0), None] {
            let mut inputs = set(10.0);
            inputs.machine.current_limit = limit.map(Current::from_amperes);
            assert!((torque_asked(&inputs).expect("complete").newton_metres() - 131.575).abs() < 0.01);
        }
        assert!(torque_asked(&Inputs::default()).is_none());
    }

    /// Arithmetic (row RM-14): at a share of 100 % the steepest part is twice the mean, so a constant load needs twice
    /// the shortest straight ramp; what was within is then stretched by the limit.
    #[test]
    fn rounded_ends_within_the_set_time_need_a_longer_one() {
        let eased = |share: f64| {
            let mut inputs = Inputs { s_curve: Some(Ratio::from_fraction(share)), ..set(30.0) };
            inputs.machine.load = Some(LoadTorque::Constant(Torque::from_newton_metres(70.0)));
            check(&inputs)
        };
        let (straight, round) = (figure(&eased(0.0), "shortest even ramp"), figure(&eased(1.0), "shortest even ramp"));
        assert!((round / straight - 2.0).abs() < 0.01, "{straight} {round}");
        assert!(straight < 30.0 && round > 30.0);
        assert_eq!((eased(0.0).verdict, eased(1.0).verdict), (Verdict::Within, Verdict::Marginal));
        assert!(eased(1.0).working.iter().any(|line| line.formula.starts_with("t = k·J")));
        assert_eq!(eased(1.5).verdict, Verdict::NotAssessed);
        assert!(check(&set(30.0)).assumed.iter().any(|a| a.what == "S-curve share of the ramp"));
    }

    /// Row OL-09 by hand: 31 A on a motor of 28.5 A all along is ((31/28.5)² − 1)/150 s = 0.1221 % for each second.
    #[test]
    fn the_start_tells_its_current_and_its_heat() {
        let outcome = check(&set(1.0));
        let taken = figure(&outcome, "predicted time on the set ramp");
        assert!((figure(&outcome, "r.m.s. current over the start") - 31.0).abs() < 0.05);
        let heat = figure(&outcome, "heat of the start, over what a warm motor stands");
        assert!((heat / (0.1221 * taken) - 1.0).abs() < 0.01, "{heat} {taken}");
        assert_eq!(figure(&check(&set(60.0)), "heat of the start, over what a warm motor stands"), 0.0);
    }

    #[test]
    fn the_limit_is_there_before_the_setting() {
        let outcome = check(&Inputs { set_time: None, ..set(1.0) });
        assert_eq!(outcome.verdict, Verdict::NotAssessed);
        assert!(outcome.limit.starts_with("at least ") && outcome.rule.is_some());
        assert_eq!(outcome.missing[0].what, "set acceleration time");
    }

    #[test]
    fn breakaway_and_stall_are_outside_whatever_is_set() {
        let mut inputs = set(600.0);
        inputs.machine.breakaway = Some(Torque::from_newton_metres(200.0));
        let outcome = check(&inputs);
        assert_eq!(outcome.verdict, Verdict::Outside);
        assert!(outcome.summary.contains("break away"), "{}", outcome.summary);
        let mut inputs = set(600.0);
        inputs.machine.load =
            Some(LoadTorque::Quadratic { torque: Torque::from_newton_metres(150.0), speed: Speed::from_rpm(1470.0) });
        assert!(check(&inputs).summary.contains("stalls at"), "{}", check(&inputs).summary);
    }

    #[test]
    fn impossible_numbers_are_not_assessed() {
        for bad in [0.0, -3.0, f64::NAN, f64::INFINITY] {
            assert_eq!(check(&set(bad)).verdict, Verdict::NotAssessed);
            let mut inputs = set(10.0);
            inputs.to_speed = Some(Speed::from_rpm(bad));
            assert_eq!(check(&inputs).verdict, Verdict::NotAssessed);
            inputs = set(10.0);
            inputs.machine.motor_inertia = Some(Inertia::from_kilogram_square_metres(bad));
            assert_eq!(check(&inputs).verdict, Verdict::NotAssessed);
        }
        assert!(trace(&Inputs::default()).is_none() && trace(&set(10.0)).is_some());
    }
}
