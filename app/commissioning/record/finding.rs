//! Findings: something wrong or open.

use crate::{FindingId, Timestamp};
use serde::{Deserialize, Serialize};

/// What an open finding holds up.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum Severity {
    /// For information.
    Information,
    /// Must be closed before handover.
    BeforeHandover,
    /// Stops start-up: no voltage on the motor until it is settled.
    StopsStartUp,
}

impl Severity {
    /// All, gravest first.
    pub const ALL: [Self; 3] = [Self::StopsStartUp, Self::BeforeHandover, Self::Information];

    /// As screens name it.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Information => "for information",
            Self::BeforeHandover => "to be closed before handover",
            Self::StopsStartUp => "stops start-up",
        }
    }

    /// As forms name it.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::Information => "information",
            Self::BeforeHandover => "before-handover",
            Self::StopsStartUp => "stops-start-up",
        }
    }
}

/// Where a finding stands.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(tag = "state", rename_all = "kebab-case", deny_unknown_fields)]
pub enum FindingState {
    /// Nobody has settled it.
    Open,
    /// Put right: what was done, by whom, when.
    Settled {
        /// What was done.
        how: String,
        /// Printed name.
        by_name: String,
        /// When.
        received: Timestamp,
        /// Its place in the drive's chain.
        sequence: u64,
    },
    /// Accepted as it is, by name, with a reason.
    Accepted {
        /// Why it may stay.
        reason: String,
        /// Printed name.
        by_name: String,
        /// When.
        received: Timestamp,
        /// Its place in the drive's chain.
        sequence: u64,
    },
}

/// A finding.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Finding {
    /// Its identifier.
    pub id: FindingId,
    /// Its number in the record, from 1.
    pub number: u32,
    /// What it holds up.
    pub severity: Severity,
    /// What is wrong or open.
    pub text: String,
    /// The step it arose at.
    pub step: Option<String>,
    /// Who raised it.
    pub by_name: String,
    /// When.
    pub received: Timestamp,
    /// Where it stands.
    pub state: FindingState,
}

impl Finding {
    /// Whether nobody has settled or accepted it.
    #[must_use]
    pub const fn is_open(&self) -> bool {
        matches!(self.state, FindingState::Open)
    }

    /// The place in the drive's chain at which it was settled or accepted.
    #[must_use]
    pub const fn closed_at(&self) -> Option<u64> {
        match self.state {
            FindingState::Open => None,
            FindingState::Settled { sequence, .. } | FindingState::Accepted { sequence, .. } => Some(sequence),
        }
    }
}
