//! Reads ids, moments and JSON from columns.

use crate::fault::Fault;
use commissioning::Timestamp;
use rusqlite::Row;
use rusqlite::types::Type;
use std::str::FromStr;

/// An id from its column.
pub(crate) fn parsed<T: FromStr>(row: &Row<'_>, column: &str) -> rusqlite::Result<T> {
    let text: String = row.get(column)?;
    text.parse().map_err(|_| unreadable(column, text))
}

/// A moment from its column.
pub(crate) fn moment(row: &Row<'_>, column: &str) -> rusqlite::Result<Timestamp> {
    let text: String = row.get(column)?;
    Timestamp::parse(&text).ok_or_else(|| unreadable(column, text))
}

/// A moment from a column that may be empty.
pub(crate) fn moment_if_any(row: &Row<'_>, column: &str) -> rusqlite::Result<Option<Timestamp>> {
    match row.get::<_, Option<String>>(column)? {
        None => Ok(None),
        Some(text) => Timestamp::parse(&text).map(Some).ok_or_else(|| unreadable(column, text)),
    }
}

/// JSON from its column.
pub(crate) fn json<T: serde::de::DeserializeOwned>(row: &Row<'_>, column: &str) -> rusqlite::Result<T> {
    let text: String = row.get(column)?;
    serde_json::from_str(&text).map_err(|e| unreadable(column, e.to_string()))
}

/// What a column holds is no such thing.
pub(crate) fn unreadable(column: &str, what: String) -> rusqlite::Error {
    let fault = Fault::Broken(format!("column {column} cannot be read: {what}"));
    rusqlite::Error::FromSqlConversionFailure(0, Type::Text, fault.to_string().into())
}
