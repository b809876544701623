//! # maximum-speed
//!
//! The highest output frequency set, as a speed, against what motor, gearbox and driven load may turn.
//!
//! n_max = n_s·f_max/f_N, n_s = 60·f_N/p (row MN-01): synchronous, since slip compensation lets the shaft reach it.
//! Each bound is taken at the motor shaft: the gearbox input as it is, the load times the ratio i. A bound that nobody
//! states is assumed at the speed of rated frequency, and missing above it (common practice, row SB-01).

use crate::decision::Measured;
use crate::formulas::synchronous::{pole_pairs, synchronous_speed};
use crate::formulas::{marking, plausible};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Frequency, Ratio, Speed};
use crate::rounding::significant;
use crate::sources::settings::{MN_01, SPEED_BOUNDS};

/// Name in the catalogue.
pub const NAME: &str = "maximum-speed";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Highest output frequency as set.
    pub maximum_frequency: Option<Frequency>,
    /// Rated frequency.
    pub rated_frequency: Option<Frequency>,
    /// Rated speed.
    pub rated_speed: Option<Speed>,
    /// Highest mechanical speed of the motor, from its maker.
    pub motor_maximum: Option<Speed>,
    /// Motor speed over load speed; none when coupled directly.
    pub gear_ratio: Option<Ratio>,
    /// Highest input speed of the gearbox.
    pub gearbox_maximum: Option<Speed>,
    /// Highest speed of the driven load, at its own shaft.
    pub load_maximum: Option<Speed>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MN_01);
    b.cite(SPEED_BOUNDS);
    b.note("The makers of motor, gearbox and load have the last word on speed.");
    let rated_frequency = plausible::positive(&mut b, inputs.rated_frequency, "rated frequency");
    let rated_speed = plausible::positive(&mut b, inputs.rated_speed, "rated speed");
    let frequency = plausible::positive(&mut b, inputs.maximum_frequency, "maximum frequency as set");
    let ratio = match inputs.gear_ratio {
        Some(ratio) => plausible::positive(&mut b, Some(ratio), "gear ratio"),
        None => Some(b.assume(None, Ratio::from_fraction(1.0), "gear ratio", "1, coupled directly")),
    };
    let plate = rated_frequency.zip(rated_speed);
    let pairs = plate.and_then(|(f, n)| pole_pairs(f, n));
    if plate.is_some() && pairs.is_none() {
        return b.not_judged("Not assessed: rated speed and rated frequency do not fit together. Check the nameplate.");
    }
    let base = rated_frequency.zip(pairs).map(|(f, p)| synchronous_speed(f, p).rpm());
    let top = frequency.zip(pairs).map(|(f, p)| synchronous_speed(f, p).rpm());
    let bounds = ratio.map(|ratio| bounds(&mut b, inputs, ratio.fraction(), base, top)).unwrap_or_default();
    if let Some(least) = bounds.iter().map(|(_, rpm)| *rpm).min_by(f64::total_cmp) {
        let shown = significant(least, 4);
        b.limit(format!("at most {shown} rpm at the motor shaft"));
        let rule = LimitRule::linear("rpm").at_most(least, format!("≤ {shown} rpm"));
        b.rule(bounds.iter().filter(|(_, rpm)| *rpm > least).fold(rule, |rule, (name, rpm)| rule.tick(*rpm, *name)));
    }
    let (Some(frequency), Some(pairs), Some(top)) = (frequency, pairs, top) else { return b.not_assessed() };

    let (hertz, shown) = (significant(frequency.hertz(), 4), significant(top, 4));
    b.line("highest speed", "n_max = 60·f_max/p", format!("60 × {hertz} Hz / {pairs}"), format!("{shown} rpm"));
    b.figure("highest motor speed", top, 4, "rpm");
    for (name, rpm) in &bounds {
        let holds = if marking::up_to(top, *rpm) { "holds" } else { "exceeded" };
        b.line(
            &format!("bound of the {name}"),
            "n_max ≤ bound",
            format!("{shown} rpm against {} rpm", significant(*rpm, 4)),
            holds,
        );
    }
    let exceeded: Vec<&str> =
        bounds.iter().filter(|(_, rpm)| !marking::up_to(top, *rpm)).map(|(name, _)| *name).collect();
    if !exceeded.is_empty() {
        marking::mark(&mut b, &Measured::exact(top), format!("{shown} rpm"), Verdict::Outside);
        let summary = format!(
            "{hertz} Hz turns the motor at {shown} rpm, above the bound of the {}. Lower the maximum before running.",
            exceeded.join(" and the ")
        );
        return b.judged(Verdict::Outside, summary);
    }
    if bounds.len() < expected(inputs) {
        return b.not_assessed();
    }
    marking::mark(&mut b, &Measured::exact(top), format!("{shown} rpm"), Verdict::Within);
    b.judged(Verdict::Within, format!("{hertz} Hz turns the motor at {shown} rpm, within every bound."))
}

/// How many bounds there are to meet.
fn expected(inputs: &Inputs) -> usize {
    if inputs.gear_ratio.is_some() || inputs.gearbox_maximum.is_some() { 3 } else { 2 }
}

/// The bounds at the motor shaft; one that nobody states is assumed up to `base` and missing above.
fn bounds(
    b: &mut OutcomeBuilder,
    inputs: &Inputs,
    ratio: f64,
    base: Option<f64>,
    top: Option<f64>,
) -> Vec<(&'static str, f64)> {
    let mut found = Vec::new();
    let geared = expected(inputs) == 3;
    let candidates = [
        ("motor", "highest speed of the motor", inputs.motor_maximum.map(Speed::rpm), true),
        ("gearbox", "highest input speed of the gearbox", inputs.gearbox_maximum.map(Speed::rpm), geared),
        ("driven load", "highest speed of the driven load", inputs.load_maximum.map(|n| n.rpm() * ratio), true),
    ];
    for (name, what, stated, there) in candidates {
        let at_rated = base.filter(|base| top.is_none_or(|top| marking::up_to(top, *base)));
        if !there {
            continue;
        } else if stated.is_none()
            && let Some(base) = at_rated
        {
            let taken = format!("{} rpm at the motor shaft, the speed of rated frequency", significant(base, 4));
            found.push((name, b.assume(None, base, what, &taken)));
        } else if let Some(rpm) = plausible::positive(b, stated.map(Speed::from_rpm), what) {
            found.push((name, rpm.rpm()));
        }
    }
    found
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(hertz: f64) -> Inputs {
        Inputs {
            maximum_frequency: Some(Frequency::from_hertz(hertz)),
            rated_frequency: Some(Frequency::from_hertz(50.0)),
            rated_speed: Some(Speed::from_rpm(1475.0)),
            motor_maximum: Some(Speed::from_rpm(2400.0)),
            load_maximum: Some(Speed::from_rpm(1800.0)),
            ..Inputs::default()
        }
    }

    /// Synchronous speed: row MN-01 (Bird Ex. 22.1): four poles, 60 Hz, 1800 rpm.
    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of(60.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(59.9)).verdict, Verdict::Within);
        assert_eq!(check(&of(60.1)).verdict, Verdict::Outside);
        assert_eq!(check(&of(60.0)).figures[0].value, "1800");
    }

    #[test]
    fn a_gear_moves_the_load_and_adds_a_bound() {
        let geared = Inputs {
            gear_ratio: Some(Ratio::from_fraction(20.0)),
            gearbox_maximum: Some(Speed::from_rpm(1700.0)),
            load_maximum: Some(Speed::from_rpm(95.0)),
            ..of(56.0)
        };
        assert_eq!(check(&geared).verdict, Verdict::Within);
        let fast = check(&Inputs { maximum_frequency: Some(Frequency::from_hertz(58.0)), ..geared.clone() });
        assert_eq!(fast.verdict, Verdict::Outside);
        assert!(fast.summary.contains("gearbox"));
        let unknown = check(&Inputs { gearbox_maximum: None, ..geared });
        assert_eq!(unknown.missing[0].what, "highest input speed of the gearbox");
        assert_eq!(unknown.verdict, Verdict::NotAssessed);
    }

    #[test]
    fn unstated_bounds_are_assumed_at_rated_and_missing_above() {
        let plain = Inputs { motor_maximum: None, load_maximum: None, ..of(50.0) };
        let outcome = check(&plain);
        assert_eq!((outcome.verdict, outcome.assumed.len()), (Verdict::Within, 3));
        let above = check(&Inputs { maximum_frequency: Some(Frequency::from_hertz(51.0)), ..plain });
        assert_eq!((above.verdict, above.missing.len()), (Verdict::NotAssessed, 2));
        let outcome = check(&Inputs { maximum_frequency: None, ..of(50.0) });
        assert!(outcome.rule.is_some() && outcome.limit == "at most 1800 rpm at the motor shaft");
        let impossible = Inputs { rated_speed: Some(Speed::from_rpm(0.0)), ..of(50.0) };
        assert_eq!(check(&impossible).verdict, Verdict::NotAssessed);
        assert_eq!(
            check(&Inputs { rated_speed: Some(Speed::from_rpm(3100.0)), ..of(50.0) }).verdict,
            Verdict::NotAssessed
        );
    }
}
