//! What is recorded at a step: entries, isolation, releases, steps settled otherwise.

use crate::people::Instrument;
use crate::plant::Recorded;
use crate::{Timestamp, Typed};
use serde::{Deserialize, Serialize};

/// Where an entry stands: the item's key, and the row in a table (0 outside tables).
#[derive(Clone, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct EntryPlace {
    /// Item key, unique in the procedure.
    pub item: String,
    /// Row, from 0.
    pub row: u16,
}

impl EntryPlace {
    /// Whether it is a direction seen, or the encoder's sign, which was judged against one.
    #[must_use]
    pub fn is_direction(&self) -> bool {
        self.item.starts_with("direction-") || self.item == "encoder-sign"
    }

    /// Outside a table.
    pub fn new(item: impl Into<String>) -> Self {
        Self { item: item.into(), row: 0 }
    }

    /// In a row of a table.
    pub fn in_row(item: impl Into<String>, row: u16) -> Self {
        Self { item: item.into(), row }
    }
}

/// The instrument as it was on the day; kept whole, so that the drive's chain stands alone.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(transparent)]
pub struct InstrumentUsed(pub Instrument);

/// A picture: known by the hash of its bytes.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Photo {
    /// SHA-256 of the original bytes, lower-case hexadecimal.
    pub hash: String,
    /// `image/jpeg`, `image/png` or `image/webp`.
    pub media: String,
    /// Size in bytes.
    pub bytes: u64,
    /// Caption.
    #[serde(default)]
    pub caption: String,
}

/// What was recorded at an item.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Entry {
    /// As typed; for a confirmation `yes`, for a choice its key, for a photo its caption.
    pub value: Typed,
    /// The instrument, for a reading that names one.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub instrument: Option<InstrumentUsed>,
    /// The picture, for a photo.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub photo: Option<Photo>,
    /// Arrived before its hold point was released.
    #[serde(default)]
    pub out_of_order: bool,
    /// Outside what is believable, accepted with this reason.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub accepted_because: Option<String>,
}

/// A stretch of "isolated and proved dead".
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Isolation {
    /// The step at which it was entered.
    pub step: String,
    /// Who entered it.
    pub by_name: String,
    /// When it came into force.
    pub from: Timestamp,
    /// The same as a place in the drive's chain.
    pub from_sequence: u64,
    /// When and by whom it was lifted.
    pub lifted: Option<(Timestamp, String)>,
    /// The place in the drive's chain at which it was lifted; 0 while in force.
    pub lifted_sequence: u64,
}

/// A hold point released by name.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Release {
    /// Before which phase.
    pub phase: String,
    /// In which role.
    pub role: ReleaseRole,
    /// Printed name of who releases: the person signed in, or the witness.
    pub printed_name: String,
    /// Who recorded it.
    pub by_name: String,
    /// When.
    pub received: Timestamp,
}

/// In which role a hold point is released.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum ReleaseRole {
    /// The startup engineer, in their own name.
    Engineer,
    /// A witness from the client, printed name recorded by the engineer.
    Witness,
}

/// How a step was once settled without its entries, and who ended that: reasons once given stay readable.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct OnceOtherwise {
    /// Which step.
    pub step: String,
    /// How and why, by whom and when.
    pub settled: Recorded<(SettledOtherwise, String)>,
    /// By whom and when it was resumed, or settled otherwise anew.
    pub ended: Recorded<()>,
}

/// A step settled without its entries.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum SettledOtherwise {
    /// Does not apply to this drive, with a reason.
    NotApplicable,
    /// Could not be done, with a reason; raises a finding.
    CouldNotBeDone,
}
