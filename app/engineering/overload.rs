//! A drive's overload as its plate or manual prints it: percent, seconds, and how often.

use crate::formulas::plausible::positive;
use crate::outcome::OutcomeBuilder;
use crate::quantity::{Current, Duration, Ratio};

/// The overload that belongs to a continuous rating.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Overload {
    /// Multiple of the continuous current: 1.5 for 150 %.
    pub multiple: Ratio,
    /// For how long.
    pub lasting: Duration,
    /// Once in how long.
    pub every: Duration,
}

impl Overload {
    /// Normal duty as the trade names it: 110 % for 60 s every 10 min (row OL-01, common practice).
    pub const NORMAL: Self = Self::minute_of_ten(1.1);
    /// Heavy duty: 150 % for 60 s every 10 min (row OL-01, common practice).
    pub const HEAVY: Self = Self::minute_of_ten(1.5);

    const fn minute_of_ten(multiple: f64) -> Self {
        Self {
            multiple: Ratio::from_fraction(multiple),
            lasting: Duration::from_seconds(60.0),
            every: Duration::from_seconds(600.0),
        }
    }

    /// Gives itself back when all three of its numbers can be true; names those that cannot.
    #[must_use]
    pub fn sound(self, b: &mut OutcomeBuilder) -> Option<Self> {
        let multiple = positive(b, Some(self.multiple), "overload of the drive in percent");
        let lasting = positive(b, Some(self.lasting), "overload of the drive in seconds");
        let every = positive(b, Some(self.every), "period of the drive's overload");
        (multiple.is_some() && lasting.is_some() && every.is_some()).then_some(self)
    }

    /// The overload current of a drive with this continuous current.
    #[must_use]
    pub fn current(&self, continuous: Current) -> Current {
        Current::from_amperes(continuous.amperes() * self.multiple.fraction())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-OL-008 and C-OL-009 (row OL-01, common practice): 72 A at 110 % is 79.2 A; 61 A at 150 % is 91.5 A.
    #[test]
    fn normal_and_heavy_duty() {
        assert!((Overload::NORMAL.current(Current::from_amperes(72.0)).amperes() - 79.2).abs() < 0.01);
        assert!((Overload::HEAVY.current(Current::from_amperes(61.0)).amperes() - 91.5).abs() < 0.01);
    }
}
