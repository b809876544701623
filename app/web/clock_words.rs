//! Moments as screens say them: date, time and zone, the same everywhere.

use commissioning::Timestamp;

/// `2026-11-17 10:42 UTC`.
#[must_use]
pub fn moment(then: Timestamp) -> String {
    then.shown() + " UTC"
}
