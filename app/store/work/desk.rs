//! A connection with the states kept in memory: what every read and every write works with.

use crate::fault::Fault;
use crate::states::Shelves;
use rusqlite::Connection;
use std::sync::Arc;

/// A connection and the states folded so far.
pub(crate) struct Desk {
    pub(crate) connection: Connection,
    pub(crate) shelves: Arc<Shelves>,
}

impl Desk {
    /// Runs a read in one short read transaction, so that all it sees is of one moment.
    pub(crate) fn at_one_moment<T>(&self, read: impl FnOnce(&Self) -> Result<T, Fault>) -> Result<T, Fault> {
        let moment = self.connection.unchecked_transaction()?;
        let got = read(self);
        drop(moment);
        got
    }
}
