//! The one place that asks the clock and makes identifiers; everything below takes them as parameters.

use commissioning::Timestamp;
use uuid::Uuid;

/// Now.
#[expect(clippy::disallowed_methods, reason = "the program is where time comes in")]
pub fn now() -> Timestamp {
    Timestamp::new(time::OffsetDateTime::now_utc())
}

/// A fresh identifier.
#[expect(clippy::disallowed_methods, reason = "the program is where identifiers come in")]
pub fn fresh_id() -> Uuid {
    Uuid::now_v7()
}
