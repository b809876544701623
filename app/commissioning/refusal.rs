//! Why an act was refused, in words for the person: which field, what was wrong, what would be right.

use crate::Typed;
use crate::id::EventId;
use serde::{Deserialize, Serialize};

/// One field's error.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
pub struct FieldError {
    /// The form's name of the field.
    pub field: String,
    /// The field as the screen names it.
    pub label: String,
    /// What was wrong and what would be right, one or two sentences.
    pub message: String,
}

/// A field that somebody else changed since the form was shown: both stay until the person chooses.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
pub struct Conflict {
    /// The form's name of the field.
    pub field: String,
    /// The field as the screen names it.
    pub label: String,
    /// What this person sent.
    pub mine: Option<Typed>,
    /// What stands now: value, who, when. Several when the record needs a choice.
    pub theirs: Vec<Standing>,
    /// What to send as `seen` to overwrite it knowingly.
    pub seen: Vec<EventId>,
}

/// A value that stands, with who and when.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
pub struct Standing {
    /// The value; `None` where it was cleared.
    pub value: Option<Typed>,
    /// Printed name.
    pub by: String,
    /// Receipt time.
    pub received: crate::Timestamp,
}

/// Why an act did not happen.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize, thiserror::Error)]
#[serde(tag = "refusal", rename_all = "kebab-case")]
pub enum Refusal {
    /// Fields are wrong; all of them are listed, what was typed is kept by the sender.
    #[error("{} field(s) need attention", errors.len())]
    Fields {
        /// Every field's error.
        errors: Vec<FieldError>,
    },
    /// The form was stale.
    #[error("somebody else changed {} field(s) meanwhile", conflicts.len())]
    Stale {
        /// Mine and theirs.
        conflicts: Vec<Conflict>,
    },
    /// This person may not do this.
    #[error("{why}")]
    NotAllowed {
        /// In a sentence.
        why: String,
    },
    /// The state of things does not allow it now.
    #[error("{why}")]
    NotNow {
        /// In a sentence, with what to do first.
        why: String,
    },
    /// What it speaks of does not exist.
    #[error("{what} does not exist here")]
    Unknown {
        /// What.
        what: String,
    },
}

impl Refusal {
    /// A single field's error.
    pub fn field(field: impl Into<String>, label: impl Into<String>, message: impl Into<String>) -> Self {
        Self::Fields { errors: vec![FieldError { field: field.into(), label: label.into(), message: message.into() }] }
    }

    /// Not in this state.
    pub fn not_now(why: impl Into<String>) -> Self {
        Self::NotNow { why: why.into() }
    }

    /// Not by this person.
    pub fn not_allowed(why: impl Into<String>) -> Self {
        Self::NotAllowed { why: why.into() }
    }
}
