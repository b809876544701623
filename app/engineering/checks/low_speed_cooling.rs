//! # low-speed-cooling
//!
//! Continuous torque of a self-cooled motor at its lowest working speed against what the load asks there.
//!
//! The motor maker's curve goes first. Without it common practice (row VF-07): 75 to 85 % at half speed, 50 to 70 % at a
//! fifth, straight lines between. Up to the lower line within, above the upper line outside, between them marginal.
//! Below a fifth of rated speed only the maker's figure counts. Load torque not stated: assumed rated torque throughout.

use crate::decision::Measured;
use crate::formulas::marking::{graded, mark, up_to};
use crate::formulas::plausible::{not_negative, positive};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Frequency, Ratio};
use crate::rounding::significant;
use crate::sources::settings::VF_07;

/// Name in the catalogue.
pub const NAME: &str = "low-speed-cooling";

/// Part of rated speed, then continuous torque by the lower and by the upper line (common practice).
const PRACTICE: [(f64, f64, f64); 3] = [(0.2, 0.50, 0.70), (0.5, 0.75, 0.85), (1.0, 1.0, 1.0)];

/// How the motor is cooled.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Cooling {
    /// By a fan on its own shaft.
    SelfCooled,
    /// By a fan with a drive of its own, or by water.
    Separate,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// How the motor is cooled.
    pub cooling: Option<Cooling>,
    /// Lowest frequency at which it runs for long.
    pub lowest_frequency: Option<Frequency>,
    /// Rated frequency.
    pub rated_frequency: Option<Frequency>,
    /// Continuous load torque there over rated torque.
    pub load_torque: Option<Ratio>,
    /// Continuous torque there over rated torque by the motor's maker.
    pub maker_torque: Option<Ratio>,
}

/// Continuous torque by common practice, lower and upper line; `None` below a fifth of rated speed.
#[must_use]
pub fn usual_torque(speed: Ratio) -> Option<(Ratio, Ratio)> {
    let part = speed.fraction().min(1.0);
    let pair = PRACTICE.windows(2).find(|pair| (pair[0].0..=pair[1].0).contains(&part))?;
    let along = (part - pair[0].0) / (pair[1].0 - pair[0].0);
    let between = |a: f64, b: f64| Ratio::from_fraction(a + along * (b - a));
    Some((between(pair[0].1, pair[1].1), between(pair[0].2, pair[1].2)))
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(VF_07);
    let cooling =
        b.assume(inputs.cooling, Cooling::SelfCooled, "cooling of the motor", "by a fan on its shaft, the harder case");
    if cooling == Cooling::Separate {
        return b.as_figure(
            "Cooled apart from its speed: no reduction at low speed, as long as that cooling runs and is interlocked.",
        );
    }
    let lowest = positive(&mut b, inputs.lowest_frequency, "lowest working frequency");
    let rated = positive(&mut b, inputs.rated_frequency, "rated motor frequency");
    let (Some(lowest), Some(rated)) = (lowest, rated) else { return b.not_assessed() };
    let part = Ratio::from_fraction(lowest.hertz() / rated.hertz());
    let Some(part) = positive(&mut b, Some(part), "lowest frequency over rated frequency") else {
        return b.not_assessed();
    };
    let part = part.fraction();
    let part_shown = significant(part * 100.0, 3);
    b.line(
        "lowest speed",
        "f/f_N",
        format!("{} Hz/{} Hz", significant(lowest.hertz(), 3), significant(rated.hertz(), 3)),
        format!("{part_shown} %"),
    );
    let (low, high) = if let Some(own) = inputs.maker_torque {
        let Some(own) = positive(&mut b, Some(own), "the maker's continuous torque") else { return b.not_assessed() };
        b.line("limit", "the maker's", String::new(), format!("{} %", significant(own.fraction() * 100.0, 3)));
        (own.fraction(), own.fraction())
    } else {
        let Some((low, high)) = usual_torque(Ratio::from_fraction(part)) else {
            return b.not_judged(format!("Not assessed: at {part_shown} % speed only the motor maker's figure counts. Enter it, or fit a separate fan."));
        };
        b.note("The lines are common practice without a source; the motor maker's curve goes first.");
        (low.fraction(), high.fraction())
    };
    let (low, high) = (low * 100.0, high * 100.0);
    let (low_shown, high_shown) = (significant(low, 3), significant(high, 3));
    b.limit(format!("at most {low_shown} % of rated torque at {part_shown} % speed"));
    b.rule(LimitRule::linear("%").at_most(low, format!("≤ {low_shown} %")).tick(high, format!("{high_shown} %")));
    b.line(
        "continuous torque, self-cooled",
        "straight lines of common practice, or the maker's",
        format!("{part_shown} % speed"),
        format!("{low_shown} to {high_shown} %"),
    );
    let load = b.assume(
        inputs.load_torque,
        Ratio::from_fraction(1.0),
        "load torque at the lowest speed",
        "rated torque, as of a constant-torque load",
    );
    let Some(load) = not_negative(&mut b, Some(load), "load torque at the lowest speed") else {
        return b.not_assessed();
    };
    let load = load.fraction() * 100.0;
    let measured = Measured::exact(load);
    let verdict = if up_to(load, low) { Verdict::Within } else { graded(&measured, low, high) };
    let shown = significant(load, 3);
    b.figure("continuous torque at the lowest speed", low, 3, "%");
    mark(&mut b, &measured, format!("{shown} %"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("The load asks {shown} % of rated torque at {part_shown} % speed, more than {high_shown} %. Raise the minimum speed, fit a separate fan, or ask the motor's maker."),
            Verdict::Marginal => format!("The load asks {shown} % of rated torque at {part_shown} % speed; practice allows {low_shown} to {high_shown} %. Ask the motor's maker and watch the winding temperature."),
            _ => format!("The load asks {shown} % of rated torque at {part_shown} % speed, at most {low_shown} %."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;

    fn run(hertz: f64, load: f64) -> Inputs {
        Inputs {
            cooling: Some(Cooling::SelfCooled),
            lowest_frequency: Some(Frequency::from_hertz(hertz)),
            rated_frequency: Some(Frequency::from_hertz(50.0)),
            load_torque: Some(Ratio::from_fraction(load)),
            maker_torque: None,
        }
    }

    /// Row VF-07 (common practice): 75 to 85 % at half speed, 50 to 70 % at a fifth.
    #[test]
    fn at_just_inside_and_just_outside() {
        for (hertz, load, verdict) in [
            (25.0, 0.75, Verdict::Within),
            (25.0, 0.751, Verdict::Marginal),
            (25.0, 0.851, Verdict::Outside),
            (10.0, 0.50, Verdict::Within),
            (10.0, 0.71, Verdict::Outside),
            (50.0, 1.0, Verdict::Within),
            (60.0, 1.0, Verdict::Within),
            (9.9, 0.1, Verdict::NotAssessed),
        ] {
            assert_eq!(check(&run(hertz, load)).verdict, verdict, "{hertz} {load}");
        }
    }

    #[test]
    fn the_maker_goes_first_and_a_separate_fan_is_a_figure() {
        let own = |part| Inputs { maker_torque: Some(Ratio::from_fraction(part)), ..run(5.0, 0.6) };
        assert_eq!((check(&own(0.6)).verdict, check(&own(0.59)).verdict), (Verdict::Within, Verdict::Outside));
        assert_eq!(check(&Inputs { cooling: Some(Cooling::Separate), ..run(2.0, 1.0) }).verdict, Verdict::Figure);
    }

    #[test]
    fn what_is_not_stated_is_assumed_or_missing_by_name() {
        let bare = check(&Inputs { cooling: None, load_torque: None, ..run(25.0, 0.0) });
        assert_eq!((bare.verdict, bare.assumed.len()), (Verdict::Outside, 2));
        let waiting = check(&Inputs { lowest_frequency: None, ..run(0.0, 0.5) });
        assert_eq!(waiting.missing[0].what, "lowest working frequency");
        assert_eq!(check(&run(25.0, f64::NAN)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&run(0.0, 0.5)).verdict, Verdict::NotAssessed);
    }
}
