//! Signatures: printed name, time and meaning, bound to the content by a digest and to the chain by its head.

use crate::journal::Head;
use crate::{PersonId, Timestamp};
use serde::{Deserialize, Serialize};

/// What a signature says.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum Meaning {
    /// "Performed and recorded".
    Performed,
    /// "Reviewed and accepted".
    Accepted,
}

impl Meaning {
    /// As it is printed wherever the signature appears.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Performed => "performed and recorded",
            Self::Accepted => "reviewed and accepted",
        }
    }
}

/// A signature on a revision of a record.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Signature {
    /// What it says.
    pub meaning: Meaning,
    /// Who.
    pub person: PersonId,
    /// Printed name.
    pub printed_name: String,
    /// When, by the server.
    pub received: Timestamp,
    /// The revision signed.
    pub revision: u32,
    /// SHA-256 over the canonical record at signing.
    pub digest: String,
    /// The drive chain's head before the signature.
    pub head: Head,
    /// Version of the check catalogue that gave the frozen verdicts.
    pub catalogue: u32,
    /// Superseded by a return or a reopening: it stays, shown as such.
    pub superseded: bool,
}
