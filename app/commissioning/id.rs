//! Identifiers: made where the thing is made, never reused, never mixed up.

use serde::{Deserialize, Serialize};
use std::fmt;
use uuid::Uuid;

macro_rules! identifiers {
    ($($(#[$doc:meta])* $name:ident;)*) => {$(
        $(#[$doc])*
        #[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
        #[serde(transparent)]
        pub struct $name(pub Uuid);

        impl fmt::Display for $name {
            fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
                self.0.fmt(f)
            }
        }

        impl std::str::FromStr for $name {
            type Err = uuid::Error;

            fn from_str(text: &str) -> Result<Self, Self::Err> {
                Uuid::parse_str(text).map(Self)
            }
        }
    )*};
}

identifiers! {
    /// An act: made by the tablet or page where the entry was made, frozen at its first sending.
    ActId;
    /// A site.
    SiteId;
    /// A drive.
    DriveId;
    /// A person; accounts are never reused.
    PersonId;
    /// An instrument.
    InstrumentId;
    /// A finding.
    FindingId;
}

/// An event: its act and its place among the act's events.
#[derive(Clone, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(transparent)]
pub struct EventId(pub String);

impl EventId {
    /// The `n`th event of an act, counted from one.
    #[must_use]
    pub fn of(act: ActId, n: usize) -> Self {
        Self(format!("{act}.{n}"))
    }
}

impl fmt::Display for EventId {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0)
    }
}
