//! Why a record was returned: shown wherever the engineer opens it.

use crate::clock_words::moment;
use commissioning::record::{Record, Status, Turn};
use maud::{Markup, html};

/// The reason of the return that is still to be answered.
#[must_use]
pub fn reason(record: &Record) -> Option<&str> {
    match &record.status {
        Status::InProgress { returned: Some(reason) } => Some(reason),
        _ => None,
    }
}

/// The reason with who returned it and when; nothing where it was not returned.
#[must_use]
pub fn notice(record: &Record) -> Markup {
    let turn = record.history.iter().rev().find(|t| matches!(t.value, Turn::Returned(_)));
    html! {
        @if let Some(reason) = reason(record) {
            p.notice.returned { b { "Returned" } @if let Some(turn) = turn { " by " (turn.by_name) ", " (moment(turn.received)) } ": " (reason) }
        }
    }
}
