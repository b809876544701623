//! Names, tags, logins and reasons as people type them: what is right, and what to say when it is not.

use crate::plant::field;
use crate::{FieldError, Refusal};

/// Collects every field's error, so that all are told together.
#[derive(Default)]
pub(super) struct Errors(Vec<FieldError>);

impl Errors {
    /// Adds one.
    pub(super) fn add(&mut self, field: impl Into<String>, label: impl Into<String>, message: impl Into<String>) {
        self.0.push(FieldError { field: field.into(), label: label.into(), message: message.into() });
    }

    /// Keeps the value, or the error and nothing.
    pub(super) fn keep<T>(&mut self, field: &str, label: &str, value: Result<T, String>) -> Option<T> {
        value.map_err(|message| self.add(field, label, message)).ok()
    }

    /// Refuses if there is any.
    pub(super) fn none(self) -> Result<(), Refusal> {
        if self.0.is_empty() { Ok(()) } else { Err(Refusal::Fields { errors: self.0 }) }
    }
}

/// Words that must be there, trimmed, at most this long, on one line.
pub(super) fn line(text: &str, longest: usize) -> Result<String, String> {
    let text = text.trim();
    if text.is_empty() {
        return Err("Nothing was entered. Fill this in.".to_owned());
    }
    if text.contains(['\n', '\r', '\t']) {
        return Err("This must fit on one line. Take out the line breaks.".to_owned());
    }
    field::words(text, longest)
}

/// Words that must be there, perhaps on several lines.
pub(super) fn passage(text: &str, what: &str) -> Result<String, String> {
    let text = text.trim().replace("\r\n", "\n");
    if text.is_empty() {
        return Err(format!("Nothing was entered. Say {what}."));
    }
    field::words(&text, 2_000)
}

/// A reason that must be given, as a refusal of that field.
pub(super) fn reason(text: &str, what: &str) -> Result<String, Refusal> {
    passage(text, what).map_err(|message| Refusal::field("reason", "reason", message))
}

/// A drive's plant tag: 1 to 24 letters, digits, `-`, `_` and `.`.
///
/// # Errors
/// A sentence that says what a tag may have.
pub fn drive_tag(text: &str) -> Result<String, String> {
    let text = text.trim();
    let right = (1..=24).contains(&text.chars().count())
        && text.chars().all(|c| c.is_ascii_alphanumeric() || matches!(c, '-' | '_' | '.'))
        && text.chars().any(|c| c.is_ascii_alphanumeric());
    if right {
        return Ok(text.to_owned());
    }
    Err("A plant tag has 1 to 24 letters (A to Z), digits, hyphens, underscores and points, as in M-2104.".to_owned())
}

/// A site's tag, which becomes part of addresses.
pub(super) fn site_tag(text: &str) -> Result<String, String> {
    let text = text.trim();
    let right = (1..=24).contains(&text.len())
        && text.bytes().all(|b| b.is_ascii_lowercase() || b.is_ascii_digit() || b == b'-')
        && !text.starts_with('-')
        && !text.ends_with('-');
    if right {
        return Ok(text.to_owned());
    }
    Err("A site's tag has 1 to 24 small letters, digits and hyphens between them, as in larch-ferry.".to_owned())
}

/// A name to sign in with.
pub(super) fn login(text: &str) -> Result<String, String> {
    let text = text.trim();
    let right = (2..=40).contains(&text.len())
        && text.bytes().all(|b| b.is_ascii_lowercase() || b.is_ascii_digit() || matches!(b, b'-' | b'_' | b'.'))
        && text.bytes().any(|b| b.is_ascii_lowercase());
    if right {
        return Ok(text.to_owned());
    }
    Err("A sign-in name has 2 to 40 small letters, digits, hyphens, underscores and points, as in m.rowan.".to_owned())
}
