//! # braking
//!
//! What the brake resistor has to take on the set ramp, and whether the one that is fitted can.
//!
//! T = J·ω/t − T_L, peak power the highest T·ω on the way, energy its integral; rounded ends within the set time (an
//! S-curve share s of it) ask 1/(1 − s/2) of the mean slowing down between them. Losses of motor and inverter are left
//! out, so all are upper bounds (row RM-05). The resistor lies between the chopper's minimum and V²/P_peak (row RM-06).
//! Mean power over the cycle, ramp and any time the load pushes at full speed together, is at most the resistor's
//! rating. Minimum ohms and chopper volts are the drive maker's; duty beyond the printed one is the resistor maker's to
//! allow.

use crate::decision::Measured;
use crate::formulas::plausible;
use crate::limit_rule::LimitRule;
use crate::motion::braking::{Returned, even_ramp};
use crate::motion::machine::newton_metres;
use crate::motion::set_ramp::{s_curve, steepness};
use crate::motion::{Machine, SetRamp, Train, resistor};
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Duration, Energy, Power, Ratio, Resistance, Speed, Torque, Voltage};
use crate::rounding::significant;
use crate::sources::motion::{RM_05, RM_06};

/// Name in the catalogue.
pub const NAME: &str = "braking";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Load, inertias and gear; motor and current limit are not asked.
    pub machine: Machine,
    /// Motor speed at which braking begins; the motor's rated speed is assumed.
    pub from_speed: Option<Speed>,
    /// Motor speed at which it ends; standstill is assumed.
    pub to_speed: Option<Speed>,
    /// Set time for this very change of speed.
    pub set_time: Option<Duration>,
    /// S-curve share of that time; a straight ramp is assumed.
    pub s_curve: Option<Ratio>,
    /// Time in each cycle during which an overhauling load is held at the first speed; asked only of such a load.
    pub holding_time: Option<Duration>,
    /// From one braking to the next.
    pub cycle_time: Option<Duration>,
    /// Voltage at which the chopper conducts.
    pub chopper_voltage: Option<Voltage>,
    /// Smallest resistor that the drive allows.
    pub minimum_resistor: Option<Resistance>,
    /// The resistor that is fitted.
    pub resistor: Option<Resistance>,
    /// Its continuous rating.
    pub resistor_power: Option<Power>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(RM_05);
    b.cite(RM_06);
    b.note("Losses in motor and inverter are left out; the real figures are lower.");
    b.note("The makers of drive and resistor go first on minimum ohms, wiring, duty and surroundings: a brake resistor gets hot enough to burn.");
    let ramp = ramp(&mut b, inputs);
    let chopper = plausible::positive(&mut b, inputs.chopper_voltage, "chopper voltage");
    let minimum = plausible::positive(&mut b, inputs.minimum_resistor, "smallest resistor that the drive allows");
    let fitted = plausible::positive(&mut b, inputs.resistor, "ohms of the brake resistor");
    let Some((train, from, to, set)) = ramp else { return b.not_assessed() };

    let back = even_ramp(&train, from, to, set);
    if back.peak.watts() <= 0.0 {
        return b.as_figure("Nothing comes back: on this ramp the load alone slows down faster than set, and the motor drives all the way.");
    }
    figures(&mut b, &train, from, to, set, &back);
    let (mean, known) = cycle(&mut b, inputs, &train, from, set, &back);
    let (Some(chopper), Some(minimum)) = (chopper, minimum) else { return b.not_assessed() };
    let Some(largest) = resistor::largest(chopper, back.peak) else { return b.not_assessed() };
    let (low, high) = (minimum.ohms(), largest.ohms());
    let (low_words, high_words) = (significant(low, 3), significant(high, 3));
    b.line(
        "largest resistor",
        "R = V²/P",
        format!("({} V)²/{} W", significant(chopper.volts(), 3), significant(back.peak.watts(), 4)),
        format!("{high_words} Ω"),
    );
    b.figure("largest resistor", high, 3, "Ω");
    b.limit(format!("{low_words} Ω (the drive's minimum) to {high_words} Ω (V²/P)"));
    if low > high {
        b.rule(LimitRule::linear("Ω").tick(low, format!("≥ {low_words} Ω")).tick(high, format!("≤ {high_words} Ω")));
        return b.judged(
            Verdict::Outside,
            format!("No resistor fits: this ramp asks for {high_words} Ω or less, the drive for {low_words} Ω or more. Lengthen the ramp."),
        );
    }
    b.rule(LimitRule::linear("Ω").between(low, format!("≥ {low_words} Ω"), high, format!("≤ {high_words} Ω")));
    let Some(fitted) = fitted else { return b.not_assessed() };
    let by_ohms = Measured::exact(fitted.ohms()).between(low, high);
    let by_power = match (mean, inputs.resistor_power) {
        (Some(mean), Some(rating)) if known => Measured::exact(mean.watts()).at_most(rating.watts()),
        _ => Verdict::NotAssessed,
    };
    let verdict = by_ohms.worse(by_power);
    let shown = significant(fitted.ohms(), 3);
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(fitted.ohms(), 0.0, format!("{shown} Ω"), verdict));
    }
    if verdict == Verdict::NotAssessed {
        return b.not_assessed();
    }
    b.judged(verdict, sentence(by_ohms, by_power, &shown, (&low_words, &high_words)))
}

fn ramp(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<(Train, Speed, Speed, SetRamp)> {
    let train = inputs.machine.braked_train(b);
    let from = match (inputs.from_speed, inputs.machine.rated_speed) {
        (None, Some(rated)) => Some(b.assume(None, rated, "speed at the start", "the motor's rated speed")),
        (given, _) => given,
    };
    let from = plausible::positive(b, from, "speed at the start");
    let to = b.assume(inputs.to_speed, Speed::from_rpm(0.0), "speed at the end", "standstill");
    let to = plausible::not_negative(b, Some(to), "speed at the end");
    let set = plausible::positive(b, inputs.set_time, "set deceleration time");
    let share = s_curve(b, inputs.s_curve);
    let (train, from, to, set) = (train?, from?, to?, SetRamp { time: set?, s_curve: share? });
    let from = b.need((from.rpm() > to.rpm()).then_some(from), "speed at the start above the speed at the end")?;
    Some((train, from, to, set))
}

fn figures(b: &mut OutcomeBuilder, train: &Train, from: Speed, to: Speed, set: SetRamp, back: &Returned) {
    let (formula, steep) = steepness(b, set.s_curve, back.slope);
    b.line(
        &format!("braking torque, highest on the way, at {} rpm", significant(back.at.rpm(), 4)),
        &format!("T = {formula}J·2π·Δn/(60·t) − T_L"),
        format!(
            "{steep}{} kg·m² × 2π × {} rpm/(60 × {} s) − {}",
            significant(train.inertia.kilogram_square_metres(), 4),
            significant(from.rpm() - to.rpm(), 4),
            significant(set.time.seconds(), 3),
            newton_metres(train.slowing(back.at))
        ),
        newton_metres(back.torque),
    );
    b.line(
        "peak braking power",
        "P = T·ω, highest on the way",
        format!("from {} rpm", significant(from.rpm(), 4)),
        format!("{} W", significant(back.peak.watts(), 4)),
    );
    b.figure("braking torque", back.torque.newton_metres(), 4, "N·m");
    b.figure("peak braking power", back.peak.watts(), 4, "W");
    b.figure("braking energy of one ramp", back.energy.joules(), 4, "J");
    b.figure("mean power during the ramp", resistor::mean_power(back.energy, set.time).watts(), 4, "W");
}

/// Mean power over the cycle, when it can be said, and whether it can be held against a rating.
fn cycle(
    b: &mut OutcomeBuilder,
    inputs: &Inputs,
    train: &Train,
    from: Speed,
    set: SetRamp,
    back: &Returned,
) -> (Option<Power>, bool) {
    let pull = -train.slowing(from).newton_metres();
    let hold = if pull > 0.0 {
        plausible::not_negative(b, inputs.holding_time, "time that the pulling load is held in each cycle")
            .map(Duration::seconds)
    } else {
        Some(0.0)
    };
    let cycle = plausible::positive(b, inputs.cycle_time, "time from one braking to the next");
    let rating = plausible::positive(b, inputs.resistor_power, "continuous rating of the brake resistor");
    let (Some(hold), Some(cycle)) = (hold, cycle) else { return (None, false) };
    let held = resistor::shaft_power(Torque::from_newton_metres(pull.max(0.0)), from).watts() * hold;
    let all = Energy::from_joules(back.energy.joules() + held);
    let mean = resistor::mean_power(all, cycle);
    let duty = resistor::duty(Duration::from_seconds(set.time.seconds() + hold), cycle);
    let duty = b
        .need(Some(duty).filter(|d| d.fraction() <= 1.0), "time from one braking to the next, longer than the braking");
    let Some(duty) = duty else { return (None, false) };
    b.line(
        "mean power over the cycle",
        "P = E/t",
        format!("{} J/{} s", significant(all.joules(), 4), significant(cycle.seconds(), 3)),
        format!("{} W", significant(mean.watts(), 4)),
    );
    b.figure("mean power over the cycle", mean.watts(), 4, "W");
    b.figure("duty", duty.fraction() * 100.0, 3, "%");
    (Some(mean), rating.is_some())
}

fn sentence(by_ohms: Verdict, by_power: Verdict, shown: &str, (low, high): (&str, &str)) -> String {
    let ohms = if by_ohms == Verdict::Outside {
        format!(
            "{shown} Ω is not between {low} and {high} Ω: below, the chopper is overloaded; above, the bus trips on this ramp."
        )
    } else {
        format!("{shown} Ω lies between {low} and {high} Ω.")
    };
    match by_power {
        Verdict::Outside => {
            format!("{ohms} Its mean power is above its rating: a larger one, a longer ramp or a longer cycle.")
        }
        Verdict::NotAssessed => format!("{ohms} Its mean power is not assessed."),
        _ => format!("{ohms} Its mean power is within its rating."),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::motion::{Gear, LoadTorque};
    use crate::quantity::Inertia;

    /// C-RM-008 (rows RM-05, RM-06): 1.5 kg·m², 1480 rpm in 5 s, 10 N·m, chopper at 780 V.
    fn example(ohms: f64, watts: f64) -> Inputs {
        Inputs {
            machine: Machine {
                motor_inertia: Some(Inertia::from_kilogram_square_metres(0.1)),
                load_inertia: Some(Inertia::from_kilogram_square_metres(1.4)),
                load: Some(LoadTorque::Constant(Torque::from_newton_metres(10.0))),
                gear: Some(Gear::DIRECT),
                ..Machine::default()
            },
            from_speed: Some(Speed::from_rpm(1480.0)),
            set_time: Some(Duration::from_seconds(5.0)),
            cycle_time: Some(Duration::from_seconds(60.0)),
            chopper_voltage: Some(Voltage::from_volts(780.0)),
            minimum_resistor: Some(Resistance::from_ohms(40.0)),
            resistor: Some(Resistance::from_ohms(ohms)),
            resistor_power: Some(Power::from_watts(watts)),
            ..Inputs::default()
        }
    }

    fn figure(outcome: &Outcome, name: &str) -> f64 {
        outcome.figures.iter().find(|f| f.name == name).expect("there").value.parse().expect("number")
    }

    #[test]
    fn the_figures_are_the_published_ones() {
        let outcome = check(&example(80.0, 300.0));
        assert!((figure(&outcome, "braking torque") - 36.50).abs() < 0.0365);
        assert!((figure(&outcome, "peak braking power") - 5656.0).abs() < 5.66);
        assert!((figure(&outcome, "braking energy of one ramp") - 14_140.0).abs() < 14.1);
        assert!((figure(&outcome, "largest resistor") - 108.0).abs() < 0.51);
        assert!((figure(&outcome, "mean power over the cycle") - 235.7).abs() < 0.3);
        assert!((figure(&outcome, "duty") - 8.33).abs() < 0.01);
        assert_eq!(outcome.verdict, Verdict::Within, "{}", outcome.summary);
    }

    /// At most V²/P = 107.56 Ω, at least the drive's 40 Ω; at least 235.7 W.
    #[test]
    fn at_just_inside_and_just_outside() {
        for (ohms, watts, verdict) in [
            (107.5, 300.0, Verdict::Within),
            (107.7, 300.0, Verdict::Outside),
            (40.0, 300.0, Verdict::Within),
            (39.9, 300.0, Verdict::Outside),
            (80.0, 236.0, Verdict::Within),
            (80.0, 235.0, Verdict::Outside),
        ] {
            assert_eq!(check(&example(ohms, watts)).verdict, verdict, "{ohms} Ω, {watts} W");
        }
        let strong = Inputs { minimum_resistor: Some(Resistance::from_ohms(120.0)), ..example(110.0, 300.0) };
        assert!(check(&strong).summary.contains("No resistor fits"));
    }

    #[test]
    fn a_pulling_load_asks_how_long_it_is_held() {
        let mut inputs = example(80.0, 5000.0);
        inputs.machine.load = Some(LoadTorque::Constant(Torque::from_newton_metres(-10.0)));
        assert_eq!(check(&inputs).missing[0].what, "time that the pulling load is held in each cycle");
        inputs.holding_time = Some(Duration::from_seconds(20.0));
        // (10 + 56.5) N·m peak; 10 N·m × 155 rad/s × 20 s = 31.0 kJ besides the ramp's (56.5 N·m × 155 rad/s × 5 s)/2.
        let mean = figure(&check(&inputs), "mean power over the cycle");
        assert!((mean - (31.0e3 + 21.9e3) / 60.0).abs() < 2.0, "{mean}");
    }

    #[test]
    fn missing_and_impossible_inputs_give_no_verdict_but_the_limit() {
        let outcome = check(&Inputs { resistor: None, ..example(1.0, 300.0) });
        assert_eq!(outcome.verdict, Verdict::NotAssessed);
        assert!(outcome.rule.is_some() && outcome.limit.starts_with("40.0 Ω"));
        assert_eq!(check(&Inputs { resistor_power: None, ..example(80.0, 1.0) }).verdict, Verdict::NotAssessed);
        assert_eq!(
            check(&Inputs { set_time: Some(Duration::from_seconds(f64::NAN)), ..example(80.0, 300.0) }).verdict,
            Verdict::NotAssessed
        );
        assert_eq!(check(&example(0.0, 300.0)).verdict, Verdict::NotAssessed);
        assert_eq!(
            check(&Inputs { set_time: Some(Duration::from_seconds(1000.0)), ..example(80.0, 300.0) }).verdict,
            Verdict::Figure
        );
    }
}
