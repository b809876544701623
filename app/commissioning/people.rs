//! People, what they may be, and the instruments they use.

use crate::{EventId, InstrumentId, PersonId, Timestamp};
use engineering::Kind;
use serde::{Deserialize, Serialize};
use std::collections::{BTreeMap, BTreeSet};

/// What a person may be; one person can be several.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum Role {
    /// Works on drives, records and signs.
    Engineer,
    /// Reviews, accepts, returns, reopens.
    Supervisor,
    /// People, instruments, sites, backups; enters no results as administrator.
    Administrator,
    /// Reads records and packages.
    Reader,
}

impl Role {
    /// All, in the order screens list them.
    pub const ALL: [Self; 4] = [Self::Engineer, Self::Supervisor, Self::Administrator, Self::Reader];

    /// As screens name it.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Engineer => "startup engineer",
            Self::Supervisor => "supervisor",
            Self::Administrator => "administrator",
            Self::Reader => "reader",
        }
    }

    /// As forms and events name it.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::Engineer => "engineer",
            Self::Supervisor => "supervisor",
            Self::Administrator => "administrator",
            Self::Reader => "reader",
        }
    }
}

/// A person with an account.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Person {
    /// Never reused.
    pub id: PersonId,
    /// Name to sign in with, lower case.
    pub login: String,
    /// Printed name.
    pub name: String,
    /// What they may be.
    pub roles: BTreeSet<Role>,
    /// Whether the account works.
    pub active: bool,
}

impl Person {
    /// Whether they hold this role and their account works.
    #[must_use]
    pub fn is(&self, role: Role) -> bool {
        self.active && self.roles.contains(&role)
    }
}

/// Accuracy of an instrument for one kind of quantity, as decimals in the unit named. Where it differs from range to
/// range there is a row for each, told apart by full scale.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct AccuracyRow {
    /// Which quantity.
    pub kind: Kind,
    /// Unit of resolution and full scale.
    pub unit: String,
    /// Percent of reading, decimal.
    pub percent_of_reading: String,
    /// Digits of the last place, decimal.
    pub digits: String,
    /// What one digit is worth in `unit`.
    pub resolution: String,
    /// Percent of full scale, decimal.
    pub percent_of_full_scale: String,
    /// Full scale in `unit`: also where the range ends for which this row holds; 0 for no end.
    pub full_scale: String,
}

/// A tester or meter.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Instrument {
    /// Never reused.
    pub id: InstrumentId,
    /// The firm's own mark: `IT-07`.
    pub mark: String,
    /// What it is: insulation tester, multimeter.
    pub description: String,
    /// Serial number.
    pub serial: String,
    /// Calibration due date, `2027-03-31`; empty when never calibrated.
    pub due: String,
    /// Accuracy per quantity.
    pub accuracy: Vec<AccuracyRow>,
    /// In use, or put away.
    pub active: bool,
}

/// A change of the installation's signing key: public keys and both signatures in lower-case hexadecimal.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct KeyChange {
    /// The key that was replaced.
    pub old: String,
    /// The key in its place.
    pub new: String,
    /// Signature of the old key over the change.
    pub by_old: String,
    /// Signature of the new key over the change.
    pub by_new: String,
    /// Who changed it.
    pub by_name: String,
    /// When.
    pub received: Timestamp,
}

/// The installation's people, instruments and procedures: the fold of its own chain.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Installation {
    /// Name of the firm; empty before set-up.
    pub firm: String,
    /// Everyone who ever had an account.
    pub people: BTreeMap<PersonId, Person>,
    /// Every instrument.
    pub instruments: BTreeMap<InstrumentId, Instrument>,
    /// The event each instrument last came from, to tell a stale form.
    pub instrument_seen: BTreeMap<InstrumentId, EventId>,
    /// Who last kept each instrument, and when.
    pub instrument_kept: BTreeMap<InstrumentId, (String, Timestamp)>,
    /// Every procedure version, by number.
    pub procedures: BTreeMap<u32, std::sync::Arc<crate::procedure::Procedure>>,
    /// Sites by tag.
    pub sites: BTreeMap<String, crate::SiteId>,
    /// Every change of the signing key, oldest first; former keys stay known, so that old packages can be told.
    pub key_changes: Vec<KeyChange>,
    /// When the chain was last added to.
    pub last_change: Option<Timestamp>,
}

impl Installation {
    /// The newest procedure.
    #[must_use]
    pub fn newest_procedure(&self) -> Option<&std::sync::Arc<crate::procedure::Procedure>> {
        self.procedures.values().next_back()
    }
}
