//! How much room the disk has left.

use crate::fault::ReadFault;
use crate::store::Store;

/// Room on the disk of the data folder, in bytes.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Space {
    /// Free to this program.
    pub free: u64,
    /// All of it.
    pub total: u64,
    /// Under 1 GB or under 5 %: say so before anything is lost.
    pub low: bool,
}

impl Space {
    pub(crate) const fn of(free: u64, total: u64) -> Self {
        Self { free, total, low: free < 1_000_000_000 || free < total / 20 }
    }

    pub(crate) fn at(folder: &std::path::Path) -> Result<Self, ReadFault> {
        let disk =
            rustix::fs::statvfs(folder).map_err(|e| ReadFault(format!("the disk does not say its room: {e}")))?;
        Ok(Self::of(disk.f_bavail.saturating_mul(disk.f_frsize), disk.f_blocks.saturating_mul(disk.f_frsize)))
    }
}

impl Store {
    /// Room on the disk of the data folder.
    ///
    /// # Errors
    /// When the system does not say.
    pub fn space(&self) -> Result<Space, ReadFault> {
        Space::at(self.folder())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn it_warns_below_a_gigabyte_and_below_a_twentieth() {
        assert!(Space::of(999_999_999, 10_000_000_000).low);
        assert!(Space::of(4_000_000_000, 100_000_000_000).low);
        assert!(!Space::of(6_000_000_000, 100_000_000_000).low);
    }
}
