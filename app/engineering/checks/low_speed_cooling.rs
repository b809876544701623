//! # low-speed-cooling
//!
//! Continuous torque of a self-cooled motor at its lowest working speed against what the load asks there.
//!
//! The motor maker's curve goes first, then the speed range at rated torque that the maker prints. Without either, and
//! below that range, common practice (row VF-07): 75 to 85 % at half speed, 50 to 70 % at a fifth, straight lines
//! between. Up to the lower line within, above the upper line outside, between them marginal. Below a fifth of rated
//! speed and below the maker's curve nothing is judged. A motor without a fan or in the load's air stream counts as
//! self-cooled. Load torque not stated: assumed rated torque throughout, and then marginal at worst.

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
    /// By its surface alone, or by air that the load moves.
    ByItsPlace,
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
    /// The motor maker's continuous torque: speed over rated speed, torque over rated torque, speeds rising.
    pub maker_curve: Vec<(Ratio, Ratio)>,
    /// The motor maker's speed range at rated torque: 10 for 10:1.
    pub turndown: Option<Ratio>,
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

/// Continuous torque on the maker's curve: between its points on straight lines, above its last point as there;
/// `None` below its first.
#[must_use]
pub fn on_curve(curve: &[(Ratio, Ratio)], speed: Ratio) -> Option<Ratio> {
    let part = speed.fraction();
    let along = |pair: &[(Ratio, Ratio)]| {
        let (low, high) = (pair.first()?, pair.get(1)?);
        let span = high.0.fraction() - low.0.fraction();
        let share = if span > 0.0 { (part - low.0.fraction()) / span } else { 0.0 };
        Some(Ratio::from_fraction(low.1.fraction() + share * (high.1.fraction() - low.1.fraction())))
    };
    let between = curve.windows(2).find(|pair| pair[0].0.fraction() <= part && part <= pair[1].0.fraction());
    match between {
        Some(pair) => along(pair),
        None => curve.last().filter(|last| part >= last.0.fraction()).map(|last| last.1),
    }
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
    if cooling == Cooling::ByItsPlace {
        b.note("Without a fan of its own, or in air that the load moves, it counts as cooled by its shaft; the maker's word on that place goes first.");
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
    let (low, high) = if !inputs.maker_curve.is_empty() {
        let Some(own) = on_curve(&inputs.maker_curve, Ratio::from_fraction(part)) else {
            return b.not_judged(format!("Not assessed: {part_shown} % speed lies below the motor maker's curve. Ask the maker, or raise the minimum speed."));
        };
        let Some(own) = positive(&mut b, Some(own), "the maker's continuous torque") else { return b.not_assessed() };
        b.line("limit", "the maker's curve", String::new(), format!("{} %", significant(own.fraction() * 100.0, 3)));
        (own.fraction(), own.fraction())
    } else if let Some(range) = inputs.turndown.filter(|range| part * range.fraction() >= 1.0 - 1e-9) {
        b.line(
            "limit",
            "rated torque over the maker's speed range",
            format!("{}:1", significant(range.fraction(), 3)),
            "100 %",
        );
        (1.0, 1.0)
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
    // What nobody stated can ask for a look, but it condemns nothing.
    let assumed = inputs.load_torque.is_none() && verdict == Verdict::Outside;
    let verdict = if assumed { Verdict::Marginal } else { verdict };
    let shown = significant(load, 3);
    b.figure("continuous torque at the lowest speed", low, 3, "%");
    mark(&mut b, &measured, format!("{shown} %"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("The load asks {shown} % of rated torque at {part_shown} % speed, more than {high_shown} %. Raise the minimum speed, fit a separate fan, or ask the motor's maker."),
            Verdict::Marginal if assumed => format!("A load that asks rated torque at {part_shown} % speed would be more than the {high_shown} % that practice allows. State the load's torque at its lowest speed."),
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
            ..Inputs::default()
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
        let curve =
            [(0.1, 0.5), (0.5, 0.9), (1.0, 1.0)].map(|(n, t)| (Ratio::from_fraction(n), Ratio::from_fraction(t)));
        let own = |hertz, load| check(&Inputs { maker_curve: curve.to_vec(), ..run(hertz, load) });
        // Straight between its points: 0.7 at 0.3 of rated speed.
        assert_eq!((own(15.0, 0.70).verdict, own(15.0, 0.701).verdict), (Verdict::Within, Verdict::Outside));
        assert_eq!(own(15.0, 0.5).limit, "at most 70.0 % of rated torque at 30.0 % speed");
        assert_eq!((own(60.0, 1.0).verdict, own(4.9, 0.1).verdict), (Verdict::Within, Verdict::NotAssessed));
        let range = |hertz| check(&Inputs { turndown: Some(Ratio::from_fraction(4.0)), ..run(hertz, 1.0) }).verdict;
        assert_eq!((range(12.5), range(12.0)), (Verdict::Within, Verdict::Outside));
        let by_place = check(&Inputs { cooling: Some(Cooling::ByItsPlace), ..run(10.0, 1.0) });
        assert_eq!(by_place.verdict, Verdict::Outside);
        assert!(by_place.notes.iter().any(|n| n.contains("air that the load moves")));
        assert_eq!(check(&Inputs { cooling: Some(Cooling::Separate), ..run(2.0, 1.0) }).verdict, Verdict::Figure);
    }

    #[test]
    fn what_is_not_stated_is_assumed_or_missing_by_name() {
        let bare = check(&Inputs { cooling: None, load_torque: None, ..run(25.0, 0.0) });
        assert_eq!((bare.verdict, bare.assumed.len()), (Verdict::Marginal, 2), "assumed, so not condemned");
        assert!(bare.summary.contains("State the load's torque"), "{}", bare.summary);
        let waiting = check(&Inputs { lowest_frequency: None, ..run(0.0, 0.5) });
        assert_eq!(waiting.missing[0].what, "lowest working frequency");
        assert_eq!(check(&run(25.0, f64::NAN)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&run(0.0, 0.5)).verdict, Verdict::NotAssessed);
    }
}
