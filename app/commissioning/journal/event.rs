//! An event: what an act made true. Old kinds are read for ever.

use crate::journal::Chain;
use crate::journal::Head;
use crate::judge::Judged;
use crate::people::{Instrument, Person};
use crate::plant::Place;
use crate::record::canonical::SitePart;
use crate::record::{Entry, EntryPlace, Meaning, ParameterPlace, ReleaseRole, SettledOtherwise, Severity};
use crate::{ActId, DriveId, EventId, FindingId, PersonId, SiteId, Timestamp, Typed};
use serde::{Deserialize, Serialize};

/// What an act made true.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Event {
    /// Act and place among its events.
    pub id: EventId,
    /// The act.
    pub act: ActId,
    /// The chain it belongs to.
    pub chain: Chain,
    /// Who.
    pub person: PersonId,
    /// Printed name at the time.
    pub person_name: String,
    /// Receipt time of the server.
    pub received: Timestamp,
    /// The tablet's own time.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub tablet: Option<Timestamp>,
    /// Events it supersedes.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub supersedes: Vec<EventId>,
    /// Why, where a reason was asked.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub reason: Option<String>,
    /// What became true.
    pub fact: Fact,
}

/// What became true.
#[expect(clippy::large_enum_variant, reason = "an event is made, written and let go; none are kept in bulk")]
#[expect(missing_docs, reason = "each variant says what its fields are; their names are the glossary's")]
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(tag = "kind", rename_all = "kebab-case", deny_unknown_fields)]
pub enum Fact {
    // Installation chain: people, instruments, procedures, list of sites.
    /// The installation was set up.
    SetUp { firm: String },
    /// A person was added or changed; the whole person as it stands.
    PersonKept { person: Person },
    /// An instrument was added or changed; the whole instrument as it stands.
    InstrumentKept { instrument: Instrument },
    /// A procedure version was loaded.
    ProcedureLoaded { procedure: Box<crate::procedure::Procedure> },
    /// A site was added to the list.
    SiteListed { site: SiteId, tag: String },
    /// The installation's signing key changed: public keys and both signatures in hexadecimal.
    KeyRotated { old: String, new: String, by_old: String, by_new: String },

    // Site chain.
    /// The site began.
    SiteCreated { tag: String, name: String },
    /// A field of the site was set (`None`: taken back).
    SiteFieldSet { place: Place, value: Option<Typed> },
    /// A drive was added to the site.
    DriveListed { drive: DriveId, tag: String },

    // Drive chain.
    /// The drive began.
    DriveCreated { site: SiteId, tag: String, name: String },
    /// A field of the drive was set (`None`: taken back).
    FieldSet { place: Place, value: Option<Typed> },
    /// The record began.
    RecordBegun { procedure: u32 },
    /// An entry was made.
    EntryMade { place: EntryPlace, step: String, entry: Entry },
    /// An entry was taken back (an optional item emptied again).
    EntryTakenBack { place: EntryPlace, step: String },
    /// A step was settled otherwise.
    StepSettled { step: String, how: SettledOtherwise },
    /// That was taken back.
    StepResumed { step: String },
    /// Isolated and proved dead.
    IsolationEntered { step: String },
    /// Isolation lifted.
    IsolationLifted { step: String },
    /// Leads, channels or the output sequence were exchanged: directions observed before count as not observed.
    DirectionsVoided { step: String },
    /// A hold point was released.
    HoldReleased { phase: String, role: ReleaseRole, printed_name: String },
    /// A parameter was set (`None`: taken back).
    ParameterSet { place: ParameterPlace, value: Option<Typed> },
    /// A free row was added to the parameter record.
    ParameterRowAdded { key: String, label: String },
    /// A finding was raised.
    FindingRaised { finding: FindingId, number: u32, severity: Severity, text: String, step: Option<String> },
    /// A finding was put right.
    FindingSettled { finding: FindingId, how: String },
    /// A finding was accepted as it is.
    FindingAccepted { finding: FindingId },
    /// A remark.
    RemarkMade { step: String, text: String },
    /// A signature, with the verdicts and the site it froze.
    Signed {
        meaning: Meaning,
        revision: u32,
        digest: String,
        head: Head,
        catalogue: u32,
        verdicts: Vec<Judged>,
        site: Box<SitePart>,
    },
    /// A signed record was sent back.
    Returned,
    /// An accepted record was reopened.
    Reopened { revision: u32 },
}
