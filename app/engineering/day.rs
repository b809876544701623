//! A day of the calendar, passed in from outside: nothing here asks a clock.

use std::fmt;

/// A day of the Gregorian calendar.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub struct Day {
    year: i32,
    month: u32,
    day: u32,
}

impl Day {
    /// From year, month and day of the month; `None` when the calendar has no such day.
    #[must_use]
    pub const fn new(year: i32, month: u32, day: u32) -> Option<Self> {
        let leap = year % 4 == 0 && (year % 100 != 0 || year % 400 == 0);
        let length = match month {
            1 | 3 | 5 | 7 | 8 | 10 | 12 => 31,
            4 | 6 | 9 | 11 => 30,
            2 if leap => 29,
            2 => 28,
            _ => 0,
        };
        if day >= 1 && day <= length && year >= 0 && year <= 9999 { Some(Self { year, month, day }) } else { None }
    }

    /// Days from `earlier` to this day; negative when it is later.
    #[must_use]
    pub fn days_since(self, earlier: Self) -> i64 {
        self.number() - earlier.number()
    }

    /// Days since the first of March of the year 0.
    fn number(self) -> i64 {
        // The year is taken to begin in March, so that the leap day is its last.
        let month = i64::from((self.month + 9) % 12);
        let year = i64::from(self.year) - i64::from(self.month <= 2);
        365 * year + year.div_euclid(4) - year.div_euclid(100)
            + year.div_euclid(400)
            + (month * 306 + 5) / 10
            + i64::from(self.day)
            - 1
    }
}

impl fmt::Display for Day {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{:04}-{:02}-{:02}", self.year, self.month, self.day)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn day(year: i32, month: u32, day: u32) -> Day {
        Day::new(year, month, day).expect("a day of the calendar")
    }

    #[test]
    fn days_are_counted_over_leap_years_and_centuries() {
        assert_eq!(day(2024, 3, 1).days_since(day(2024, 2, 28)), 2);
        assert_eq!(day(2023, 3, 1).days_since(day(2023, 2, 28)), 1);
        assert_eq!(day(2000, 3, 1).days_since(day(2000, 2, 28)), 2);
        assert_eq!(day(2100, 3, 1).days_since(day(2100, 2, 28)), 1);
        assert_eq!(day(2026, 1, 1).days_since(day(2025, 1, 1)), 365);
        assert_eq!(day(2025, 12, 31).days_since(day(2026, 1, 1)), -1);
        // The Gregorian calendar repeats after 400 years, which are 146 097 days.
        assert_eq!(day(2400, 1, 1).days_since(day(2000, 1, 1)), 146_097);
    }

    #[test]
    fn impossible_days_are_refused() {
        assert_eq!(Day::new(2023, 2, 29), None);
        assert_eq!(Day::new(2023, 13, 1), None);
        assert_eq!(Day::new(2023, 4, 31), None);
        assert_eq!(day(2026, 5, 3).to_string(), "2026-05-03");
    }
}
