//! # rotation
//!
//! Which way the shaft turns on the drive and on the bypass, and which two leads to exchange when it is the wrong way.
//!
//! Exchanging any two leads reverses a three-phase motor (row UB-06). A drive makes its own output sequence, which does
//! not follow the order of its supply leads; a bypass does follow it (row UB-07). Wrong on both: two leads at the motor.
//! On the drive only: two at the drive's output. On the bypass only: two at the bypass's own input, not ahead of it,
//! where fans and pumps fed from the line would turn too. Put right by a parameter alone: marginal, since a replaced or
//! reset drive turns the wrong way again; outside when the bypass is wrong as well. Wrong with that parameter in
//! force: outside; taken back, the drive turns as required. The encoder's sign is compared with the shaft last, in
//! open loop. Direction as seen from the drive end.

use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::sources::motion::{EN_03, UB_06, UB_07};

/// Name in the catalogue.
pub const NAME: &str = "rotation";

/// A direction, as seen from the motor's drive end.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(rename_all = "kebab-case"))]
pub enum Direction {
    /// With the hands of a clock.
    Clockwise,
    /// Against them.
    CounterClockwise,
}

impl Direction {
    /// In words.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Clockwise => "clockwise",
            Self::CounterClockwise => "counter-clockwise",
        }
    }

    /// The other one.
    #[must_use]
    pub const fn reversed(self) -> Self {
        match self {
            Self::Clockwise => Self::CounterClockwise,
            Self::CounterClockwise => Self::Clockwise,
        }
    }
}

/// What feeds the motor.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Feed {
    /// The drive.
    Drive,
    /// The line, through the bypass.
    Bypass,
}

/// A place where two leads may be exchanged.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Exchange {
    /// At the motor's terminals.
    AtMotor,
    /// At the drive's output terminals, before the bypass joins.
    AtDriveOutput,
    /// At the input of the bypass, after the drive's supply has branched off.
    AtBypassInput,
    /// In the supply ahead of drive and bypass.
    AheadOfBoth,
}

impl Exchange {
    /// Whether it reverses the motor on this feed.
    #[must_use]
    pub const fn reverses(self, feed: Feed) -> bool {
        match (self, feed) {
            (Self::AtMotor, _) | (Self::AtDriveOutput, Feed::Drive) => true,
            (Self::AtBypassInput | Self::AheadOfBoth, Feed::Bypass) => true,
            (Self::AtDriveOutput, Feed::Bypass) | (Self::AtBypassInput | Self::AheadOfBoth, Feed::Drive) => false,
        }
    }

    /// The direction after it.
    #[must_use]
    pub const fn turns(self, direction: Direction, feed: Feed) -> Direction {
        if self.reverses(feed) { direction.reversed() } else { direction }
    }

    /// The two leads and where, as an instruction.
    #[must_use]
    pub const fn instruction(self) -> &'static str {
        match self {
            Self::AtMotor => "exchange the cable leads on U and V in the motor's terminal box",
            Self::AtDriveOutput => "exchange the leads on U and V at the drive's output terminals",
            Self::AtBypassInput => {
                "exchange the leads on L1 and L2 at the input of the bypass itself, not ahead of it, where line-fed fans would turn too"
            }
            Self::AheadOfBoth => "exchange the leads on L1 and L2 in the supply ahead of drive and bypass",
        }
    }
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// The way the load has to turn.
    pub required: Option<Direction>,
    /// The way it turns on the drive, with leads and settings as they are.
    pub on_drive: Option<Direction>,
    /// Whether there is a bypass.
    pub has_bypass: Option<bool>,
    /// The way it turned on the bypass.
    pub on_bypass: Option<Direction>,
    /// Whether a parameter of the drive exchanges its output sequence, so that it and not the leads makes the direction.
    pub corrected_by_parameter: Option<bool>,
    /// Whether there is an encoder.
    pub has_encoder: Option<bool>,
    /// Whether the encoder's sign agreed with the shaft, running in open loop.
    pub encoder_agrees: Option<bool>,
}

/// The exchange that puts right what is wrong on the drive and on the bypass; none when nothing is.
#[must_use]
pub const fn remedy(drive_wrong: bool, bypass_wrong: bool) -> Option<Exchange> {
    match (drive_wrong, bypass_wrong) {
        (true, true) => Some(Exchange::AtMotor),
        (true, false) => Some(Exchange::AtDriveOutput),
        (false, true) => Some(Exchange::AtBypassInput),
        (false, false) => None,
    }
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(UB_06);
    b.cite(UB_07);
    b.note("Isolate and prove dead before exchanging leads; look at the shaft again afterwards, uncoupled or where the load may turn either way.");
    let required = b.need(inputs.required, "required direction");
    if let Some(required) = required {
        b.limit(format!("{} on every feed, seen from the drive end", required.words()));
    }
    let on_drive = b.need(inputs.on_drive, "direction observed on the drive");
    let has_bypass = b.need(inputs.has_bypass.or(inputs.on_bypass.map(|_| true)), "whether there is a bypass");
    let on_bypass =
        if has_bypass == Some(true) { b.need(inputs.on_bypass, "direction observed on the bypass") } else { None };
    let by_parameter = b.need(inputs.corrected_by_parameter, "whether a parameter put the direction right");
    let encoder = match (inputs.has_encoder, inputs.encoder_agrees) {
        (Some(false), _) => None,
        (None, None) => b.assume(None, None, "encoder", "none"),
        (_, agrees) => b.need(agrees, "whether the encoder's sign agrees with the shaft"),
    };
    let complete =
        on_bypass.is_some() == (has_bypass == Some(true)) && (encoder.is_some() || inputs.has_encoder != Some(true));
    let (Some(required), Some(on_drive), Some(has_bypass), Some(by_parameter), true) =
        (required, on_drive, has_bypass, by_parameter, complete)
    else {
        return b.not_assessed();
    };

    let observed = |feed: &str, seen: Direction, b: &mut OutcomeBuilder| {
        let result = if seen == required { "as required" } else { "the wrong way" };
        b.line(
            &format!("on the {feed}"),
            "observed against required",
            format!("{} against {}", seen.words(), required.words()),
            result,
        );
        seen != required
    };
    let drive_wrong = observed("drive", on_drive, &mut b);
    let bypass_wrong = on_bypass.is_some_and(|seen| observed("bypass", seen, &mut b));
    let (mut verdict, mut summary) = leads(drive_wrong, bypass_wrong, by_parameter, has_bypass, required);
    if verdict != Verdict::Within && encoder == Some(true) {
        b.note(
            "Exchanging motor leads turns the shaft against the encoder as well: compare its sign again afterwards.",
        );
    }
    if encoder == Some(false) {
        b.cite(EN_03);
        verdict = Verdict::Outside;
        summary = format!(
            "{summary} The encoder counts against the shaft: when the leads are as they stay, exchange its A and B channels or its sign in the drive, in open loop, before closing the loop."
        );
    }
    b.judged(verdict, summary)
}

fn leads(
    drive_wrong: bool,
    bypass_wrong: bool,
    by_parameter: bool,
    has_bypass: bool,
    required: Direction,
) -> (Verdict, String) {
    if by_parameter {
        // Without the parameter the drive turns the other way: that, and the bypass, say which leads to exchange.
        let exchange = match remedy(!drive_wrong, bypass_wrong) {
            Some(place) => format!("Isolated and proved dead, {}, and take the parameter back.", place.instruction()),
            None => "Take the parameter back and look at the shaft again; no lead is exchanged.".to_owned(),
        };
        let (verdict, why) = match (drive_wrong, bypass_wrong) {
            (true, true) => (Verdict::Outside, "Turns the wrong way on drive and bypass, with the parameter in force"),
            (true, false) => (Verdict::Outside, "Turns the wrong way on the drive, with the parameter in force"),
            (false, true) => {
                (Verdict::Outside, "The parameter hides it on the drive, and the bypass turns the wrong way")
            }
            (false, false) => (
                Verdict::Marginal,
                "It turns as required only as long as a parameter says so; a replaced or reset drive turns the wrong way",
            ),
        };
        return (verdict, format!("{why}. {exchange}"));
    }
    let Some(place) = remedy(drive_wrong, bypass_wrong) else {
        let feeds = if has_bypass { "on drive and bypass" } else { "on the drive" };
        return (Verdict::Within, format!("Turns {} {feeds}, as required.", required.words()));
    };
    let wrong = match (drive_wrong, bypass_wrong) {
        (true, true) => "on drive and bypass",
        (true, false) => "on the drive",
        _ => "on the bypass",
    };
    (Verdict::Outside, format!("Turns the wrong way {wrong}. Isolated and proved dead, {}.", place.instruction()))
}

#[cfg(test)]
mod tests {
    use super::*;
    use Direction::{Clockwise, CounterClockwise};

    fn seen(on_drive: Direction, on_bypass: Option<Direction>, by_parameter: bool) -> Inputs {
        Inputs {
            required: Some(Clockwise),
            on_drive: Some(on_drive),
            has_bypass: Some(on_bypass.is_some()),
            on_bypass,
            corrected_by_parameter: Some(by_parameter),
            has_encoder: Some(false),
            encoder_agrees: None,
        }
    }

    /// C-RT-001 and C-RT-002 (rows UB-06, UB-07): motor leads reverse it, supply leads ahead of the drive do not.
    #[test]
    fn leads_do_what_is_published() {
        assert_eq!(Exchange::AtMotor.turns(Clockwise, Feed::Drive), CounterClockwise);
        assert_eq!(Exchange::AheadOfBoth.turns(Clockwise, Feed::Drive), Clockwise);
        assert_eq!(Exchange::AheadOfBoth.turns(Clockwise, Feed::Bypass), CounterClockwise);
    }

    #[test]
    fn every_remedy_puts_right_what_is_wrong_and_nothing_else() {
        for drive_wrong in [false, true] {
            for bypass_wrong in [false, true] {
                let after =
                    |wrong: bool, feed| wrong != remedy(drive_wrong, bypass_wrong).is_some_and(|e| e.reverses(feed));
                assert!(
                    !after(drive_wrong, Feed::Drive) && !after(bypass_wrong, Feed::Bypass),
                    "{drive_wrong} {bypass_wrong}"
                );
            }
        }
    }

    #[test]
    fn the_summary_names_the_two_leads() {
        for (inputs, verdict, words) in [
            (seen(Clockwise, None, false), Verdict::Within, "as required"),
            (seen(Clockwise, Some(Clockwise), false), Verdict::Within, "on drive and bypass"),
            (
                seen(CounterClockwise, Some(CounterClockwise), false),
                Verdict::Outside,
                "U and V in the motor's terminal box",
            ),
            (seen(CounterClockwise, Some(Clockwise), false), Verdict::Outside, "U and V at the drive's output"),
            (seen(CounterClockwise, None, false), Verdict::Outside, "U and V at the drive's output"),
            (seen(Clockwise, Some(CounterClockwise), false), Verdict::Outside, "L1 and L2 at the input of the bypass"),
            (seen(Clockwise, None, true), Verdict::Marginal, "U and V at the drive's output"),
            (seen(Clockwise, Some(Clockwise), true), Verdict::Marginal, "replaced or reset"),
            (seen(Clockwise, Some(CounterClockwise), true), Verdict::Outside, "U and V in the motor's terminal box"),
            (seen(CounterClockwise, None, true), Verdict::Outside, "no lead is exchanged"),
            (seen(CounterClockwise, Some(Clockwise), true), Verdict::Outside, "no lead is exchanged"),
            (seen(CounterClockwise, Some(CounterClockwise), true), Verdict::Outside, "L1 and L2 at the input"),
        ] {
            let outcome = check(&inputs);
            assert_eq!(outcome.verdict, verdict, "{inputs:?}");
            assert!(outcome.summary.contains(words), "{}", outcome.summary);
        }
    }

    #[test]
    fn the_encoder_is_compared_last() {
        let with = |agrees| Inputs { has_encoder: Some(true), encoder_agrees: agrees, ..seen(Clockwise, None, false) };
        assert_eq!(check(&with(Some(true))).verdict, Verdict::Within);
        assert!(check(&with(Some(false))).summary.contains("A and B"));
        assert_eq!(check(&with(None)).missing[0].what, "whether the encoder's sign agrees with the shaft");
        let turned =
            Inputs { has_encoder: Some(true), encoder_agrees: Some(true), ..seen(CounterClockwise, None, false) };
        assert!(check(&turned).notes.iter().any(|n| n.contains("against the encoder")));
    }

    #[test]
    fn what_is_missing_is_named_and_the_limit_is_there() {
        let outcome = check(&Inputs { required: Some(Clockwise), ..Inputs::default() });
        assert_eq!(outcome.limit, "clockwise on every feed, seen from the drive end");
        assert_eq!(outcome.verdict, Verdict::NotAssessed);
        assert_eq!(outcome.missing.len(), 3);
        let outcome = check(&Inputs { on_bypass: None, has_bypass: Some(true), ..seen(Clockwise, None, false) });
        assert_eq!(outcome.missing[0].what, "direction observed on the bypass");
    }
}
