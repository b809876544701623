//! The invented days: a clock that only goes forwards, keeps working hours, and has arrived before the moment given.

use commissioning::Timestamp;
use time::{Duration, Time};

/// How many days before the given moment the story begins.
const DAYS: i64 = 27;
/// Work begins and ends at these hours, UTC.
const MORNING: u8 = 6;
const EVENING: u8 = 16;

/// The clock of the story.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Calendar {
    first: Timestamp,
    at: Timestamp,
}

impl Calendar {
    /// Begins on the morning of the first day.
    pub(crate) fn before(now: Timestamp) -> Self {
        let first = Timestamp::new(now.moment().replace_time(Time::MIDNIGHT) - Duration::days(DAYS));
        let at = Timestamp::new(first.moment() + Duration::hours(i64::from(MORNING)));
        Self { first, at }
    }

    /// The moment it stands at.
    pub(crate) const fn at(&self) -> Timestamp {
        self.at
    }

    /// Goes to the morning of a day of the story, counted from 0, unless it is later already.
    pub(crate) fn day(&mut self, day: i64) {
        let morning = self.first.moment() + Duration::days(day) + Duration::hours(i64::from(MORNING));
        self.at = self.at.max(Timestamp::new(morning));
    }

    /// Lets seconds pass; what falls after working hours goes on next morning.
    pub(crate) fn pass(&mut self, seconds: i64) -> Timestamp {
        let mut moment = self.at.moment() + Duration::seconds(seconds);
        if moment.hour() >= EVENING {
            let midnight = moment.replace_time(Time::MIDNIGHT);
            moment = midnight + Duration::days(1) + Duration::hours(i64::from(MORNING)) + Duration::minutes(20);
        }
        self.at = Timestamp::new(moment);
        self.at
    }
}
