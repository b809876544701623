//! Moments as screens say them: the time alone for today, the date before it otherwise; always UTC.

use commissioning::Timestamp;

/// `10:42` today, `2026-11-17 10:42` on another day.
#[must_use]
pub fn moment(then: Timestamp, now: Timestamp) -> String {
    let shown = then.shown();
    if then.date() == now.date() { shown.chars().skip(11).collect::<String>() + " UTC" } else { shown + " UTC" }
}
