//! What every handler is given: the store, the clock, the source of ids, and where the signing key lies.

use crate::PageError;
use crate::visitor::Signed;
use commissioning::journal::{Act, Deed};
use commissioning::{ActId, Timestamp};
use std::fmt;
use std::path::Path;
use std::sync::Arc;
use store::{Proof, Receipt, Store};
use uuid::Uuid;

/// The application, cheap to clone.
#[derive(Clone)]
pub struct App {
    /// Journal, projections, photos, sessions.
    pub store: Store,
    /// Only the program knows what time it is.
    pub clock: Arc<dyn Fn() -> Timestamp + Send + Sync>,
    /// Fresh ids, version 7.
    pub ids: Arc<dyn Fn() -> Uuid + Send + Sync>,
    /// File of the installation's signing key; `None` where packages are not signed.
    pub signing_key: Option<Arc<Path>>,
    /// Whether pages are served under TLS: cookies are then marked `Secure`.
    pub secure: bool,
    /// A sentence under the sign-in form, for instance the demo's sign-ins.
    pub welcome: Option<Arc<str>>,
}

impl fmt::Debug for App {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.debug_struct("App").field("secure", &self.secure).finish_non_exhaustive()
    }
}

impl App {
    /// Now.
    #[must_use]
    pub fn now(&self) -> Timestamp {
        (self.clock)()
    }

    /// A fresh id.
    #[must_use]
    pub fn fresh(&self) -> Uuid {
        (self.ids)()
    }

    /// Performs one act of the person signed in, without a password proved again.
    ///
    /// # Errors
    /// What the store answers, as a page error.
    pub async fn perform(&self, signed: &Signed, id: ActId, deed: Deed) -> Result<Receipt, PageError> {
        self.perform_with(signed, id, deed, Proof { password_proved: false }).await
    }

    /// Performs one act of the person signed in.
    ///
    /// # Errors
    /// What the store answers, as a page error.
    pub async fn perform_with(
        &self,
        signed: &Signed,
        id: ActId,
        deed: Deed,
        proof: Proof,
    ) -> Result<Receipt, PageError> {
        let act = Act { id, tablet: None, deed };
        self.store.perform(Some(signed.person.id), act, proof, self.now()).await.map_err(PageError::from)
    }
}
