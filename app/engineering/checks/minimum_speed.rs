//! # minimum-speed
//!
//! The lowest output frequency set, as a speed, against what motor cooling, gearbox and driven load ask for.
//!
//! n_min = n_s·f_min/f_N (row MN-01). Bounds at the motor shaft: the motor maker's lowest continuous speed when it
//! cools itself (no universal figure, row VF-07), the gearbox's lowest input speed (splash lubrication), the load's
//! lowest speed times the ratio. And below the maximum that is set. A bound that nobody states is missing by name.

use crate::decision::Measured;
use crate::formulas::synchronous::{pole_pairs, synchronous_speed};
use crate::formulas::{marking, plausible};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Frequency, Ratio, Speed};
use crate::rounding::significant;
use crate::sources::settings::{MN_01, OL_07, VF_07};

/// Name in the catalogue.
pub const NAME: &str = "minimum-speed";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Lowest output frequency as set.
    pub minimum_frequency: Option<Frequency>,
    /// Highest output frequency as set.
    pub maximum_frequency: Option<Frequency>,
    /// Rated frequency.
    pub rated_frequency: Option<Frequency>,
    /// Rated speed.
    pub rated_speed: Option<Speed>,
    /// Whether the motor has a fan on its own shaft.
    pub self_cooled: Option<bool>,
    /// Lowest continuous speed of a self-cooled motor under this load, from its maker.
    pub motor_minimum: Option<Speed>,
    /// Motor speed over load speed; none when coupled directly.
    pub gear_ratio: Option<Ratio>,
    /// Lowest input speed of the gearbox.
    pub gearbox_minimum: Option<Speed>,
    /// Lowest speed of the driven load, at its own shaft; zero when it may stand still.
    pub load_minimum: Option<Speed>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MN_01);
    b.cite(VF_07);
    b.cite(OL_07);
    let rated_frequency = plausible::positive(&mut b, inputs.rated_frequency, "rated frequency");
    let rated_speed = plausible::positive(&mut b, inputs.rated_speed, "rated speed");
    let plate = rated_frequency.zip(rated_speed);
    let pairs = plate.and_then(|(f, n)| pole_pairs(f, n));
    if plate.is_some() && pairs.is_none() {
        return b.not_judged("Not assessed: rated speed and rated frequency do not fit together. Check the nameplate.");
    }
    let ratio = match inputs.gear_ratio {
        Some(ratio) => plausible::positive(&mut b, Some(ratio), "gear ratio"),
        None => Some(b.assume(None, Ratio::from_fraction(1.0), "gear ratio", "1, coupled directly")),
    };
    let self_cooled =
        b.assume(inputs.self_cooled, true, "cooling of the motor", "a fan on its own shaft, the cautious case");
    let geared = inputs.gear_ratio.is_some() || inputs.gearbox_minimum.is_some();
    let load = inputs.load_minimum.zip(ratio).map(|(n, i)| Speed::from_rpm(n.rpm() * i.fraction()));
    let candidates = [
        ("motor cooling", "lowest continuous speed of the self-cooled motor", inputs.motor_minimum, self_cooled),
        ("gearbox", "lowest input speed of the gearbox", inputs.gearbox_minimum, geared),
        ("driven load", "lowest speed of the driven load", load, true),
    ];
    let mut bounds = Vec::new();
    for (name, what, stated, there) in candidates {
        if there && let Some(speed) = plausible::not_negative(&mut b, stated, what) {
            bounds.push((name, speed.rpm()));
        }
    }
    let most = bounds.iter().map(|(_, rpm)| *rpm).max_by(f64::total_cmp);
    if let Some(most) = most {
        let shown = significant(most, 3);
        b.limit(format!("at least {shown} rpm at the motor shaft"));
        let rule = LimitRule::linear("rpm").at_least(most, format!("≥ {shown} rpm"));
        b.rule(bounds.iter().filter(|(_, rpm)| *rpm < most).fold(rule, |rule, (name, rpm)| rule.tick(*rpm, *name)));
    }
    let frequency = plausible::not_negative(&mut b, inputs.minimum_frequency, "minimum frequency as set");
    let maximum = plausible::positive(&mut b, inputs.maximum_frequency, "maximum frequency as set");
    let (Some(frequency), Some(pairs)) = (frequency, pairs) else { return b.not_assessed() };

    let speed = synchronous_speed(frequency, pairs).rpm();
    let (hertz, shown) = (significant(frequency.hertz(), 3), significant(speed, 3));
    b.line("lowest speed", "n_min = 60·f_min/p", format!("60 × {hertz} Hz / {pairs}"), format!("{shown} rpm"));
    b.figure("lowest motor speed", speed, 3, "rpm");
    if let Some(maximum) = maximum {
        if frequency.hertz() >= maximum.hertz() {
            return b.judged(
                Verdict::Outside,
                format!(
                    "The minimum of {hertz} Hz is not below the maximum of {} Hz: exchange or correct them.",
                    significant(maximum.hertz(), 3)
                ),
            );
        }
        b.figure("maximum over minimum", maximum.hertz() / frequency.hertz().max(1e-3), 3, "");
    }
    for (name, rpm) in &bounds {
        let holds = if marking::up_to(*rpm, speed) { "holds" } else { "broken" };
        b.line(
            &format!("bound of the {name}"),
            "n_min ≥ bound",
            format!("{shown} rpm against {} rpm", significant(*rpm, 3)),
            holds,
        );
    }
    let broken: Vec<&str> =
        bounds.iter().filter(|(_, rpm)| !marking::up_to(*rpm, speed)).map(|(name, _)| *name).collect();
    let verdict = if broken.is_empty() { Verdict::Within } else { Verdict::Outside };
    if verdict == Verdict::Within
        && (maximum.is_none() || bounds.len() < 1 + usize::from(self_cooled) + usize::from(geared))
    {
        return b.not_assessed();
    }
    marking::mark(&mut b, &Measured::exact(speed), format!("{shown} rpm"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Within => format!("{hertz} Hz turns the motor at {shown} rpm, enough for cooling, gearbox and load."),
            _ => format!("{hertz} Hz turns the motor at {shown} rpm, too slow for the {}. Raise the minimum, or provide a separate fan or lubrication.", broken.join(" and the ")),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(hertz: f64) -> Inputs {
        Inputs {
            minimum_frequency: Some(Frequency::from_hertz(hertz)),
            maximum_frequency: Some(Frequency::from_hertz(50.0)),
            rated_frequency: Some(Frequency::from_hertz(50.0)),
            rated_speed: Some(Speed::from_rpm(1475.0)),
            self_cooled: Some(true),
            motor_minimum: Some(Speed::from_rpm(300.0)),
            load_minimum: Some(Speed::from_rpm(200.0)),
            ..Inputs::default()
        }
    }

    /// Synchronous speed: row MN-01; four poles at 10 Hz turn at 300 rpm.
    #[test]
    fn at_just_inside_and_just_outside() {
        for (hertz, verdict) in [
            (10.0, Verdict::Within),
            (10.1, Verdict::Within),
            (9.9, Verdict::Outside),
            (50.0, Verdict::Outside),
            (0.0, Verdict::Outside),
        ] {
            assert_eq!(check(&of(hertz)).verdict, verdict, "{hertz}");
        }
        let fan = Inputs { self_cooled: Some(false), motor_minimum: None, ..of(6.7) };
        assert_eq!(check(&fan).verdict, Verdict::Within);
        assert_eq!(check(&Inputs { load_minimum: Some(Speed::from_rpm(0.0)), ..fan }).verdict, Verdict::Within);
    }

    #[test]
    fn gear_missing_and_impossible() {
        let geared = Inputs {
            gear_ratio: Some(Ratio::from_fraction(10.0)),
            load_minimum: Some(Speed::from_rpm(20.0)),
            ..of(10.0)
        };
        let outcome = check(&geared);
        assert_eq!(
            (outcome.verdict, outcome.missing[0].what.as_str()),
            (Verdict::NotAssessed, "lowest input speed of the gearbox")
        );
        let splash = Inputs { gearbox_minimum: Some(Speed::from_rpm(400.0)), ..geared };
        assert!(check(&splash).summary.contains("gearbox"));
        let outcome = check(&Inputs { minimum_frequency: None, self_cooled: None, ..of(1.0) });
        assert!(
            outcome.limit == "at least 300 rpm at the motor shaft"
                && outcome.rule.is_some()
                && outcome.assumed.len() == 2
        );
        assert_eq!(
            check(&Inputs { rated_speed: Some(Speed::from_rpm(0.0)), ..of(10.0) }).verdict,
            Verdict::NotAssessed
        );
    }
}
