//! # restart
//!
//! Whether the drive starts again by itself, after a trip or when the supply returns, and whether the site allows it.
//!
//! Off: within. On and allowed in writing by the site's risk assessment: within. On without that: outside, since an
//! unexpected start can hurt (ISO 14118, IEC 60204-1 clause 7.5, row RS-01).

use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::sources::settings::UNEXPECTED_START;

/// Name in the catalogue.
pub const NAME: &str = "restart";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Inputs {
    /// Whether the drive clears a trip and starts again by itself.
    pub after_trip: Option<bool>,
    /// How many times in a row, when it does.
    pub attempts: Option<u32>,
    /// Whether it starts by itself when the supply returns with the run command standing.
    pub after_supply_return: Option<bool>,
    /// Whether the site's risk assessment allows a start by itself, in writing.
    pub allowed: Option<bool>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(UNEXPECTED_START);
    b.limit("off, or allowed in writing by the site's risk assessment");
    b.note("Local rules and the site's risk assessment decide; a warning sign at the machine is usual where it is on.");
    let trip = b.need(inputs.after_trip, "whether the drive restarts after a trip");
    let supply = b.need(inputs.after_supply_return, "whether the drive restarts when the supply returns");
    let words = |on: Option<bool>| match on {
        Some(true) => "on",
        Some(false) => "off",
        None => "not entered",
    };
    b.text_figure("restart after a trip", words(trip));
    b.text_figure("restart when the supply returns", words(supply));
    if trip == Some(true)
        && let Some(attempts) = inputs.attempts
    {
        b.text_figure("attempts", attempts.to_string());
    }
    let on = trip == Some(true) || supply == Some(true);
    if !on {
        return match trip.zip(supply) {
            Some(_) => b.judged(Verdict::Within, "The drive does not start again by itself."),
            None => b.not_assessed(),
        };
    }
    match b.need(inputs.allowed, "whether the risk assessment allows a start by itself") {
        Some(false) => b.judged(Verdict::Outside, "The drive starts again by itself, and the risk assessment does not allow it. Switch it off before handover."),
        Some(true) if trip.zip(supply).is_some() => b.judged(Verdict::Within, "The drive starts again by itself; the risk assessment allows it. Mark the machine so."),
        Some(true) | None => b.not_assessed(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(trip: Option<bool>, supply: Option<bool>, allowed: Option<bool>) -> Inputs {
        Inputs { after_trip: trip, attempts: Some(3), after_supply_return: supply, allowed }
    }

    /// ISO 14118 and IEC 60204-1 clause 7.5 (row RS-01, from memory).
    #[test]
    fn only_an_allowed_restart_is_within() {
        let (on, off) = (Some(true), Some(false));
        assert_eq!(check(&of(off, off, None)).verdict, Verdict::Within);
        assert_eq!(check(&of(on, off, on)).verdict, Verdict::Within);
        assert_eq!(check(&of(on, off, off)).verdict, Verdict::Outside);
        assert_eq!(check(&of(None, on, off)).verdict, Verdict::Outside);
        assert_eq!(check(&of(on, off, None)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&of(None, on, on)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&of(off, None, on)).missing[0].what, "whether the drive restarts when the supply returns");
        assert!(!check(&Inputs::default()).limit.is_empty());
    }
}
