//! # loss-of-reference
//!
//! What the drive does when its speed reference is lost: defined, as specified, and able to be noticed.
//!
//! Ignored: outside. Other than specified: outside. A signal without a live zero cannot tell a broken wire from zero:
//! marginal. The threshold for 4 to 20 mA lies above 3.6 mA and below 3.8 mA, where the measuring range begins
//! (NAMUR NE 43, row AN-02); elsewhere marginal. Not tried: marginal.

use crate::decision::Measured;
use crate::formulas::marking;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Current;
use crate::rounding::significant;
use crate::sources::settings::AN_02;

/// Name in the catalogue.
pub const NAME: &str = "loss-of-reference";

/// How the reference comes.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Signal {
    /// 4 to 20 mA, or another signal with a live zero.
    LiveZero,
    /// 0 to 10 V or 0 to 20 mA.
    DeadZero,
    /// Over a network: lost when it falls silent.
    Network,
    /// From the drive's own panel.
    Panel,
}

/// What the drive does when the reference is lost.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Action {
    /// Stops along its ramp.
    RampStop,
    /// Trips and coasts.
    Trip,
    /// Keeps the last reference.
    HoldLast,
    /// Goes to a preset speed.
    PresetSpeed,
    /// Nothing is set: it follows the dead signal.
    Ignored,
}

impl Action {
    /// In words.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::RampStop => "stop along the ramp",
            Self::Trip => "trip and coast",
            Self::HoldLast => "keep the last reference",
            Self::PresetSpeed => "go to a preset speed",
            Self::Ignored => "nothing: follow the dead signal",
        }
    }
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// How the reference comes.
    pub signal: Option<Signal>,
    /// What is set to happen.
    pub action: Option<Action>,
    /// What the specification asks for.
    pub specified: Option<Action>,
    /// Loop current below which the drive calls the reference lost.
    pub threshold: Option<Current>,
    /// Whether the loss was tried and the drive did it.
    pub tried: Option<bool>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(AN_02);
    b.limit(
        inputs
            .specified
            .map_or("defined, and tried once".to_owned(), |s| format!("as specified: {}; tried once", s.words())),
    );
    if inputs.signal == Some(Signal::LiveZero) {
        b.rule(LimitRule::linear("mA").between(3.6, "≥ 3.6 mA", 3.8, "≤ 3.8 mA"));
    }
    let signal = b.need(inputs.signal, "kind of speed reference");
    if signal == Some(Signal::Panel) {
        return b.judged(Verdict::Within, "The reference comes from the drive's own panel: no signal can be lost.");
    }
    let (lost, follows) = match signal {
        Some(Signal::Network) => ("network", "goes on with the last command"),
        _ => ("reference", "follows the dead signal"),
    };
    let action = b.need(inputs.action, &format!("what the drive does when the {lost} is lost"));
    let Some(action) = action else { return b.not_assessed() };
    if action == Action::Ignored {
        b.text_figure(&format!("when the {lost} is lost"), "nothing");
        return b.judged(
            Verdict::Outside,
            format!("Nothing is set for a lost {lost}: the drive {follows}. Decide with the operator what it has to do, and set that."),
        );
    }
    b.text_figure(&format!("when the {lost} is lost"), action.words());
    if let Some(specified) = inputs.specified.filter(|s| *s != action) {
        return b.judged(
            Verdict::Outside,
            format!(
                "Set: {}. Specified: {}. Correct the setting or have the specification changed.",
                action.words(),
                specified.words()
            ),
        );
    }
    let tried = b.need(inputs.tried, &format!("whether the loss of the {lost} was tried"));
    let (Some(signal), Some(tried)) = (signal, tried) else { return b.not_assessed() };
    let mut doubts = Vec::new();
    if signal == Signal::DeadZero {
        doubts.push("a signal without a live zero cannot tell a broken wire from zero".to_owned());
    }
    if signal == Signal::LiveZero {
        match inputs.threshold.map(|t| t.amperes() * 1e3).filter(|t| t.is_finite()) {
            Some(milliamperes) => {
                let sound = (3.6 - 1e-9..=3.8 + 1e-9).contains(&milliamperes);
                let shown = significant(milliamperes, 3);
                b.figure("threshold", milliamperes, 3, "mA");
                let verdict = if sound { Verdict::Within } else { Verdict::Marginal };
                marking::mark(&mut b, &Measured::exact(milliamperes), format!("{shown} mA"), verdict);
                if !sound {
                    doubts.push(format!("a threshold of {shown} mA lies outside 3.6 to 3.8 mA"));
                }
            }
            None => b.note("Nobody entered the loop current below which the drive calls the reference lost."),
        }
    }
    if !tried {
        doubts.push("the loss was not tried".to_owned());
    }
    if doubts.is_empty() {
        return b.judged(Verdict::Within, format!("When the {lost} is lost the drive does this: {}.", action.words()));
    }
    b.judged(
        Verdict::Marginal,
        format!("When the {lost} is lost the drive is set to {}, but {}.", action.words(), doubts.join(", and ")),
    )
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(signal: Signal, action: Action) -> Inputs {
        Inputs {
            signal: Some(signal),
            action: Some(action),
            specified: None,
            threshold: Some(Current::from_amperes(3.7e-3)),
            tried: Some(true),
        }
    }

    /// NAMUR NE 43 (row AN-02): failure at 3.6 mA and below, measuring range from 3.8 mA.
    #[test]
    fn threshold_at_just_inside_and_just_outside() {
        for (ma, verdict) in [
            (3.6, Verdict::Within),
            (3.8, Verdict::Within),
            (3.59, Verdict::Marginal),
            (3.81, Verdict::Marginal),
            (1.0, Verdict::Marginal),
        ] {
            let inputs =
                Inputs { threshold: Some(Current::from_amperes(ma / 1e3)), ..of(Signal::LiveZero, Action::RampStop) };
            assert_eq!(check(&inputs).verdict, verdict, "{ma}");
        }
    }

    #[test]
    fn undefined_other_than_specified_dead_zero_untried() {
        assert_eq!(check(&of(Signal::LiveZero, Action::Ignored)).verdict, Verdict::Outside);
        let other = Inputs { specified: Some(Action::HoldLast), ..of(Signal::LiveZero, Action::Trip) };
        assert_eq!(check(&other).verdict, Verdict::Outside);
        assert_eq!(check(&of(Signal::DeadZero, Action::Trip)).verdict, Verdict::Marginal);
        assert_eq!(
            check(&Inputs { tried: Some(false), ..of(Signal::Network, Action::Trip) }).verdict,
            Verdict::Marginal
        );
        assert_eq!(check(&of(Signal::Network, Action::HoldLast)).verdict, Verdict::Within);
        assert_eq!(check(&Inputs { action: None, ..of(Signal::Panel, Action::Trip) }).verdict, Verdict::Within);
        let silent = check(&of(Signal::Network, Action::Ignored));
        assert!(silent.verdict == Verdict::Outside && silent.summary.contains("last command"), "{}", silent.summary);
        let outcome = check(&Inputs { tried: None, ..of(Signal::Network, Action::Trip) });
        assert_eq!(outcome.missing[0].what, "whether the loss of the network was tried");
        let outcome = check(&Inputs { signal: None, ..of(Signal::LiveZero, Action::Trip) });
        assert_eq!(
            (outcome.verdict, outcome.missing[0].what.as_str()),
            (Verdict::NotAssessed, "kind of speed reference")
        );
        let outcome = check(&Inputs { action: None, ..of(Signal::LiveZero, Action::Trip) });
        assert_eq!(outcome.missing[0].what, "what the drive does when the reference is lost");
        assert!(outcome.rule.is_some());
    }
}
