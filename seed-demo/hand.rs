//! The hand that acts: one person's deed after the other, each with its own identifier and moment.

use crate::DemoFault;
use crate::calendar::Calendar;
use commissioning::journal::{Act, Deed};
use commissioning::record::Drive;
use commissioning::{ActId, DriveId, PersonId};
use sha2::{Digest, Sha256};
use std::sync::Arc;
use store::{DriveView, Proof, Receipt, Store};
use uuid::Uuid;

/// Performs the deeds of the story.
pub(crate) struct Hand<'a> {
    /// Where they go.
    pub(crate) store: &'a Store,
    /// When.
    pub(crate) calendar: Calendar,
    acts: u64,
}

/// An identifier that is the same at every loading: made from a name, not from the clock.
pub(crate) fn named(name: &str) -> Uuid {
    let digest = Sha256::digest(format!("asleft demo: {name}").as_bytes());
    let mut bytes = [0u8; 16];
    bytes.iter_mut().zip(digest.iter()).for_each(|(b, d)| *b = *d);
    uuid::Builder::from_custom_bytes(bytes).into_uuid()
}

impl<'a> Hand<'a> {
    /// With nothing done so far.
    pub(crate) const fn new(store: &'a Store, calendar: Calendar) -> Self {
        Self { store, calendar, acts: 0 }
    }

    /// Does a deed as somebody, `seconds` after the one before. `place` says where it stopped if it is refused.
    pub(crate) fn act(
        &mut self,
        who: Option<PersonId>,
        deed: Deed,
        seconds: i64,
        place: &str,
    ) -> Result<Receipt, DemoFault> {
        self.send(who, deed, Proof::none(), seconds, place)
    }

    /// The same with the password typed again.
    pub(crate) fn signed(
        &mut self,
        who: PersonId,
        deed: Deed,
        seconds: i64,
        place: &str,
    ) -> Result<Receipt, DemoFault> {
        self.send(Some(who), deed, Proof::password(), seconds, place)
    }

    fn send(
        &mut self,
        who: Option<PersonId>,
        deed: Deed,
        proof: Proof,
        seconds: i64,
        place: &str,
    ) -> Result<Receipt, DemoFault> {
        self.acts += 1;
        let id = ActId(named(&format!("act {}", self.acts)));
        let act = Act { id, tablet: None, deed };
        let now = self.calendar.pass(seconds);
        let receipt = self.store.perform_blocking(who, act, proof, now);
        receipt.map_err(|fault| DemoFault::Stopped(place.to_owned(), told(&fault)))
    }

    /// A drive as it stands.
    pub(crate) fn drive(&self, id: DriveId) -> Result<Arc<Drive>, DemoFault> {
        Ok(self.view(id)?.drive)
    }

    /// A drive with all that a check looks at.
    pub(crate) fn view(&self, id: DriveId) -> Result<DriveView, DemoFault> {
        let stopped = |why: String| DemoFault::Stopped("reading a drive".to_owned(), why);
        let view = self.store.drive_view_by_id_blocking(id).map_err(|e| stopped(e.to_string()))?;
        view.ok_or_else(|| stopped("the drive is not there".to_owned()))
    }
}

/// A fault with every field's message, since the list says more than its length.
fn told(fault: &store::PerformFault) -> String {
    match fault {
        store::PerformFault::Refused(commissioning::Refusal::Fields { errors }) => {
            errors.iter().map(|e| format!("{}: {}", e.field, e.message)).collect::<Vec<_>>().join(" ")
        }
        other => other.to_string(),
    }
}
