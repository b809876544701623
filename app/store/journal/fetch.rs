//! Gives whole chains and the stream's head to packages and pages.

use super::stream::stream_head;
use crate::answer::Answer;
use crate::fault::ReadFault;
use crate::states::sealed_of;
use crate::store::Store;
use commissioning::journal::{Chain, Head, Sealed};

impl Store {
    /// A whole chain, first event first; empty when there is none.
    pub fn chain(&self, chain: Chain) -> Answer<Vec<Sealed>, ReadFault> {
        self.read(move |desk| sealed_of(&desk.connection, chain))
    }

    /// As `chain`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn chain_blocking(&self, chain: Chain) -> Result<Vec<Sealed>, ReadFault> {
        self.chain(chain).wait()
    }

    /// The end of the installation's stream.
    pub fn stream_head(&self) -> Answer<Head, ReadFault> {
        self.read(|desk| stream_head(&desk.connection))
    }

    /// As `stream_head`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn stream_head_blocking(&self) -> Result<Head, ReadFault> {
        self.stream_head().wait()
    }
}
