//! # overload-fit
//!
//! Whether the drive's overload covers what breakaway and acceleration take.
//!
//! I = √(I_m² + (I_N² − I_m²)·(T/T_N)²) for each torque (row NL-05), at the end of the bracket of I_m that takes more.
//! The larger of the two must not exceed overload × continuous current. Above the continuous current the acceleration
//! must be over within the overload's seconds, and starts must not follow closer than its period (not stated: assumed
//! not closer). The drive's manual governs (common practice, row OL-01).

use crate::formulas::load_current::current_between;
use crate::formulas::torque::torque;
use crate::formulas::{magnetising, marking, plausible};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::overload::Overload;
use crate::quantity::{Current, Duration, Power, Ratio, Speed, Torque};
use crate::rounding::significant;
use crate::sources::motion::RATED_TORQUE;
use crate::sources::nameplate::OL_01;
use crate::sources::runs::NL_05;

/// Name in the catalogue.
pub const NAME: &str = "overload-fit";

/// What the check takes. Torques at the motor shaft.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Continuous output current of the drive that goes with the overload.
    pub drive_current: Option<Current>,
    /// The overload as printed.
    pub overload: Option<Overload>,
    /// Rated motor current.
    pub rated_current: Option<Current>,
    /// Rated power factor.
    pub power_factor: Option<Ratio>,
    /// Breakdown over rated torque, λ.
    pub breakdown: Option<Ratio>,
    /// Rated shaft power.
    pub rated_power: Option<Power>,
    /// Rated speed.
    pub rated_speed: Option<Speed>,
    /// Torque to break away.
    pub breakaway_torque: Option<Torque>,
    /// Largest torque while accelerating: load and inertia together.
    pub acceleration_torque: Option<Torque>,
    /// Duration of the acceleration.
    pub acceleration_time: Option<Duration>,
    /// Shortest time from start to start.
    pub time_between_starts: Option<Duration>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    for source in [OL_01, NL_05, RATED_TORQUE] {
        b.cite(source);
    }
    b.note("The drive's manual governs; on plain volts per hertz without boost a motor gives less torque at breakaway than this current suggests.");
    let continuous = plausible::positive(&mut b, inputs.drive_current, "continuous drive current");
    let overload = b.need(inputs.overload, "overload of the drive").and_then(|o| o.sound(&mut b));
    let ceiling = continuous.zip(overload).map(|(i, o)| o.current(i).amperes());
    if let (Some(ceiling), Some(overload)) = (ceiling, overload) {
        let (amperes, seconds, period) = (
            significant(ceiling, 4),
            significant(overload.lasting.seconds(), 3),
            significant(overload.every.seconds(), 3),
        );
        b.limit(format!("at most {amperes} A for {seconds} s, once in {period} s"));
        b.rule(LimitRule::linear("A").at_most(ceiling, format!("≤ {amperes} A")));
        b.line(
            "overload current",
            "I·k",
            format!(
                "{} A × {}",
                significant(continuous.map_or(0.0, Current::amperes), 4),
                significant(overload.multiple.fraction(), 3)
            ),
            format!("{amperes} A"),
        );
    }
    let needed = needed(&mut b, inputs);
    let (Some(continuous), Some(overload), Some(ceiling), Some(needed)) = (continuous, overload, ceiling, needed)
    else {
        return b.not_assessed();
    };

    let shown = significant(needed, 3);
    b.figure("current needed", needed, 3, "A");
    b.figure("overload current", ceiling, 3, "A");
    let mut broken = Vec::new();
    if !marking::up_to(needed, ceiling) {
        broken.push(format!("{shown} A is more than the overload gives ({} A)", significant(ceiling, 4)));
    }
    // At or below the continuous current neither time matters.
    if !marking::up_to(needed, continuous.amperes()) {
        let Some(time) = plausible::positive(&mut b, inputs.acceleration_time, "acceleration time") else {
            return b.not_assessed();
        };
        if !marking::up_to(time.seconds(), overload.lasting.seconds()) {
            broken.push(format!(
                "it lasts {} s, longer than {} s",
                significant(time.seconds(), 3),
                significant(overload.lasting.seconds(), 3)
            ));
        }
        let apart = b.assume(
            inputs.time_between_starts,
            overload.every,
            "time between starts",
            "as long as the overload's period",
        );
        let Some(apart) = plausible::positive(&mut b, Some(apart), "time between starts") else {
            return b.not_assessed();
        };
        if !marking::up_to(overload.every.seconds(), apart.seconds()) {
            broken.push(format!(
                "starts follow after {} s, sooner than {} s",
                significant(apart.seconds(), 3),
                significant(overload.every.seconds(), 3)
            ));
        }
    }
    let verdict = if broken.is_empty() { Verdict::Within } else { Verdict::Outside };
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(needed, 0.0, format!("{shown} A"), verdict));
    }
    b.judged(
        verdict,
        if verdict == Verdict::Within {
            format!("Starting takes up to {shown} A; the overload gives {} A for long enough.", significant(ceiling, 4))
        } else {
            format!(
                "Starting takes up to {shown} A: {}. Lengthen the ramp, choose the heavier duty, or a larger drive.",
                broken.join("; ")
            )
        },
    )
}

/// The larger current of breakaway and acceleration, with its working.
fn needed(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<f64> {
    let bracket = magnetising::work_out(b, inputs.rated_current, inputs.power_factor, inputs.breakdown);
    let power = plausible::positive(b, inputs.rated_power, "rated power");
    let speed = plausible::positive(b, inputs.rated_speed, "rated speed");
    let away = plausible::not_negative(b, inputs.breakaway_torque, "breakaway torque");
    let acceleration = plausible::not_negative(b, inputs.acceleration_torque, "acceleration torque");
    let (bracket, power, speed) = (bracket?, power?, speed?);
    let (rated, away, acceleration) = (inputs.rated_current?, away?, acceleration?);
    let rated_torque = plausible::positive(b, Some(torque(power, speed)), "rated torque")?.newton_metres();
    b.line(
        "rated torque",
        "T_N = 60·P/(2π·n)",
        format!("{} W, {} rpm", significant(power.watts(), 5), significant(speed.rpm(), 5)),
        format!("{} N·m", significant(rated_torque, 4)),
    );
    let mut largest = 0.0_f64;
    for (name, torque) in [("breakaway", away), ("acceleration", acceleration)] {
        let part = Ratio::from_fraction(torque.newton_metres() / rated_torque);
        let span = current_between(rated, bracket, part, Ratio::from_fraction(1.0));
        let (_, high) = b.need(span, &format!("{name} torque that fits the rated torque"))?;
        b.line(
            &format!("current for {name}"),
            "I = √(I_m² + (I_N² − I_m²)·(T/T_N)²)",
            format!("T/T_N = {} N·m/{} N·m", significant(torque.newton_metres(), 4), significant(rated_torque, 4)),
            format!("{} A", significant(high.amperes(), 4)),
        );
        largest = largest.max(high.amperes());
    }
    Some(largest)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn start(torque: f64, drive: f64) -> Inputs {
        Inputs {
            drive_current: Some(Current::from_amperes(drive)),
            overload: Some(Overload {
                multiple: Ratio::from_fraction(1.5),
                lasting: Duration::from_seconds(60.0),
                every: Duration::from_seconds(600.0),
            }),
            rated_current: Some(Current::from_amperes(21.0)),
            power_factor: Some(Ratio::from_fraction(0.85)),
            breakdown: Some(Ratio::from_fraction(3.0)),
            rated_power: Some(Power::from_watts(11_000.0)),
            rated_speed: Some(Speed::from_rpm(1460.0)),
            breakaway_torque: Some(Torque::from_newton_metres(torque)),
            acceleration_torque: Some(Torque::from_newton_metres(50.0)),
            acceleration_time: Some(Duration::from_seconds(20.0)),
            time_between_starts: Some(Duration::from_seconds(900.0)),
        }
    }

    /// Rated torque 71.95 N·m; at 1.4 times it the lower end of I_m of case C-NL-001 (8.0 A) takes
    /// √(8.0² + (21² − 8.0²)·1.96) = 28.32 A, so 18.9 A × 1.5 is just enough and 18.8 A is not (row OL-01).
    #[test]
    fn at_just_inside_and_just_outside() {
        let rated = torque(Power::from_watts(11_000.0), Speed::from_rpm(1460.0)).newton_metres();
        assert_eq!(check(&start(1.4 * rated, 18.9)).verdict, Verdict::Within);
        assert_eq!(check(&start(1.4 * rated, 18.8)).verdict, Verdict::Outside);
        let exact = start(rated, 14.0);
        assert_eq!(check(&exact).verdict, Verdict::Within, "21 A needed and 21 A given");
    }

    #[test]
    fn seconds_and_period_count_above_the_continuous_current_only() {
        let long = |drive| Inputs { acceleration_time: Some(Duration::from_seconds(61.0)), ..start(71.0, drive) };
        assert_eq!((check(&long(18.0)).verdict, check(&long(22.0)).verdict), (Verdict::Outside, Verdict::Within));
        let often = Inputs { time_between_starts: Some(Duration::from_seconds(599.0)), ..start(71.0, 18.0) };
        assert_eq!(check(&often).verdict, Verdict::Outside);
        let unstated = check(&Inputs { time_between_starts: None, ..start(71.0, 18.0) });
        assert_eq!((unstated.verdict, unstated.assumed.len()), (Verdict::Within, 1));
    }

    #[test]
    fn the_limit_is_there_before_the_torque() {
        let outcome = check(&Inputs { breakaway_torque: None, ..start(0.0, 18.0) });
        assert_eq!(
            (outcome.limit.as_str(), outcome.rule.is_some()),
            ("at most 27.00 A for 60.0 s, once in 600 s", true)
        );
        assert_eq!(outcome.missing[0].what, "breakaway torque");
        for bad in [0.0, -1.0, f64::NAN] {
            assert_eq!(check(&start(50.0, bad)).verdict, Verdict::NotAssessed);
        }
    }
}
