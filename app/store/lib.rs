//! The store: each public write is one act of the trade in one transaction; journal first, lists beside it in the same one.
//!
//! The journal (acts, events, stream) is the truth. What a drive is now is the fold of its chain, kept in memory by
//! its head; the tables for lists are rebuilt from the events at any time and compared by `check_store`. Nothing here
//! decides anything: `commissioning::decide` does, inside the transaction. No type of the database leaves this crate,
//! and no statement asks the database for the time.

mod acts;
mod answer;
mod columns;
mod drives;
mod fault;
mod journal;
mod keeping;
mod opening;
mod people;
mod photos;
mod sites;
mod states;
mod store;
mod work;

#[cfg(test)]
mod tests;

pub use acts::{PerformFault, Proof, Receipt};
pub use answer::Answer;
pub use drives::{BoardFilter, BoardRow, FoundRow, Page, PhaseCell, QueueRow, StatusKey};
pub use fault::ReadFault;
pub use journal::Witnessed;
pub use keeping::{BackupFault, BackupReceipt, Report, ReportLine, Space, backup_beside, check_store};
pub use opening::OpenFault;
pub use people::{AccountRow, CodeMade, PasswordAnswer, PasswordFault, Session, SessionKind, SignIn, password_will_do};
pub use photos::{LARGEST_PHOTO, PhotoFault, media_of as photo_media};
pub use sites::SiteRow;
pub use states::DriveView;
pub use store::Store;
