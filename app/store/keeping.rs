//! Keeping the store: backups that were checked, restoring, and the check of everything.

mod backup;
mod check;
mod compare;
mod copy;
mod fault;
mod report;
mod restore;
mod signatures;
mod space;

pub use backup::{BackupReceipt, backup_beside};
pub use check::check_store;
pub(crate) use copy::copy_checked;
#[cfg(test)]
pub(crate) use copy::sound;
pub use fault::BackupFault;
pub use report::{Report, ReportLine};
pub use space::Space;
