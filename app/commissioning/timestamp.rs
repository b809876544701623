//! A moment in UTC to the millisecond, written the same way everywhere.

use serde::{Deserialize, Deserializer, Serialize, Serializer};
use std::fmt;
use time::OffsetDateTime;
use time::format_description::BorrowedFormatItem;
use time::format_description::well_known::Rfc3339;
use time::macros::format_description;

const WRITTEN: &[BorrowedFormatItem<'_>] =
    format_description!("[year]-[month]-[day]T[hour]:[minute]:[second].[subsecond digits:3]Z");
const SHOWN: &[BorrowedFormatItem<'_>] = format_description!("[year]-[month]-[day] [hour]:[minute]");

/// A moment; compares and sorts in time.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Timestamp(OffsetDateTime);

impl Timestamp {
    /// The first moment of 1970, for where a moment must stand and none counts.
    pub const EPOCH: Self = Self(OffsetDateTime::UNIX_EPOCH);

    /// From a moment; what is finer than a millisecond is dropped, the offset becomes UTC.
    #[must_use]
    pub fn new(moment: OffsetDateTime) -> Self {
        let utc = moment.to_offset(time::UtcOffset::UTC);
        Self(utc.replace_millisecond(utc.millisecond()).unwrap_or(utc))
    }

    /// From RFC 3339 text.
    #[must_use]
    pub fn parse(text: &str) -> Option<Self> {
        OffsetDateTime::parse(text, &Rfc3339).ok().map(Self::new)
    }

    /// The moment.
    #[must_use]
    pub const fn moment(self) -> OffsetDateTime {
        self.0
    }

    /// `2026-11-17 16:42` in UTC, as screens and packages show it.
    #[must_use]
    pub fn shown(self) -> String {
        self.0.format(SHOWN).unwrap_or_default()
    }

    /// `2026-11-17`.
    #[must_use]
    pub fn date(self) -> String {
        self.shown().chars().take(10).collect()
    }
}

impl fmt::Display for Timestamp {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0.format(WRITTEN).unwrap_or_default())
    }
}

impl Serialize for Timestamp {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.collect_str(self)
    }
}

impl<'de> Deserialize<'de> for Timestamp {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        let text = String::deserialize(deserializer)?;
        Self::parse(&text).ok_or_else(|| serde::de::Error::custom(format!("`{text}` is not a moment as in RFC 3339")))
    }
}
