//! Hash chains: each event's hash covers its stored bytes and the hash before it.

use crate::{DriveId, SiteId};
use serde::{Deserialize, Serialize};
use sha2::{Digest, Sha256};
use std::fmt;

use super::event::Event;

/// Which chain an event belongs to.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(tag = "of", content = "id", rename_all = "kebab-case")]
pub enum Chain {
    /// People, instruments, procedures, list of sites.
    Installation,
    /// One site.
    Site(SiteId),
    /// One drive, with its plates and records.
    Drive(DriveId),
}

/// As the store keys it: `installation`, `site:…`, `drive:…`.
impl fmt::Display for Chain {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Installation => f.write_str("installation"),
            Self::Site(id) => write!(f, "site:{id}"),
            Self::Drive(id) => write!(f, "drive:{id}"),
        }
    }
}

/// The end of a chain: how many events, and the hash of the last.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Head {
    /// Count of events; 0 for an empty chain.
    pub sequence: u64,
    /// Hash of the last event, lower-case hexadecimal; empty for an empty chain.
    pub hash: String,
}

impl Head {
    /// Of an empty chain.
    #[must_use]
    pub const fn empty() -> Self {
        Self { sequence: 0, hash: String::new() }
    }
}

/// An event as stored: its place, the hash before, its own hash, and the canonical bytes that the hash covers.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Sealed {
    /// Place in its chain, from 1.
    pub sequence: u64,
    /// Hash of the event before; empty for the first.
    pub previous: String,
    /// SHA-256 over `previous`, a line feed, and `bytes`; lower-case hexadecimal.
    pub hash: String,
    /// Canonical JSON of the event (RFC 8785), one line without line feed.
    pub bytes: String,
}

/// What is wrong with a chain, and where.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum ChainFault {
    /// The numbers do not run on.
    #[error("event {found} stands where event {expected} belongs")]
    Gap {
        /// The number due.
        expected: u64,
        /// The number there.
        found: u64,
    },
    /// The hash before is not the one the event names.
    #[error("event {0} does not follow the event before it")]
    Link(u64),
    /// The bytes do not have the hash.
    #[error("event {0} was changed: its hash does not fit its content")]
    Hash(u64),
    /// The bytes are no event.
    #[error("event {0} cannot be read: {1}")]
    Unreadable(u64, String),
}

/// Seals an event as the next of its chain.
///
/// # Errors
/// Only if the event cannot be written as JSON.
pub fn seal(head: &Head, event: &Event) -> Result<Sealed, serde_json::Error> {
    let bytes = serde_json_canonicalizer::to_string(event)?;
    let hash = link_hash(&head.hash, &bytes);
    Ok(Sealed { sequence: head.sequence + 1, previous: head.hash.clone(), hash, bytes })
}

impl Sealed {
    /// The head after this event.
    #[must_use]
    pub fn head(&self) -> Head {
        Head { sequence: self.sequence, hash: self.hash.clone() }
    }

    /// The event, read from its bytes.
    ///
    /// # Errors
    /// When the bytes are no event.
    pub fn event(&self) -> Result<Event, ChainFault> {
        serde_json::from_str(&self.bytes).map_err(|e| ChainFault::Unreadable(self.sequence, e.to_string()))
    }
}

/// Walks a whole chain from its first event; gives the head.
///
/// # Errors
/// The first fault found.
pub fn verify_chain<'a>(events: impl IntoIterator<Item = &'a Sealed>) -> Result<Head, ChainFault> {
    let mut head = Head::empty();
    for sealed in events {
        if sealed.sequence != head.sequence + 1 {
            return Err(ChainFault::Gap { expected: head.sequence + 1, found: sealed.sequence });
        }
        if sealed.previous != head.hash {
            return Err(ChainFault::Link(sealed.sequence));
        }
        if link_hash(&sealed.previous, &sealed.bytes) != sealed.hash {
            return Err(ChainFault::Hash(sealed.sequence));
        }
        head = sealed.head();
    }
    Ok(head)
}

/// SHA-256 over the hash before, a line feed, and the bytes.
fn link_hash(previous: &str, bytes: &str) -> String {
    let mut hasher = Sha256::new();
    hasher.update(previous.as_bytes());
    hasher.update(b"\n");
    hasher.update(bytes.as_bytes());
    hexadecimal(&hasher.finalize())
}

/// Lower-case hexadecimal.
#[must_use]
pub fn hexadecimal(bytes: &[u8]) -> String {
    use fmt::Write as _;
    bytes.iter().fold(String::with_capacity(bytes.len() * 2), |mut text, byte| {
        let _ = write!(text, "{byte:02x}");
        text
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::world::{DRIVE, World};

    fn chain() -> Vec<Sealed> {
        World::complete().chains[&Chain::Drive(DRIVE)].clone()
    }

    #[test]
    fn a_whole_chain_gives_its_head_and_any_change_is_located() {
        let whole = chain();
        assert_eq!(verify_chain(&whole), Ok(whole.last().unwrap().head()));
        assert_eq!(verify_chain(&[]), Ok(Head::empty()));
        for n in 0..whole.len() {
            let place = n as u64 + 1;
            let mut forged = whole.clone();
            forged[n].bytes = forged[n].bytes.replacen("Erin", "Evil", 1).replacen("Sune", "Evil", 1);
            assert_eq!(verify_chain(&forged), Err(ChainFault::Hash(place)), "content changed");
            let mut resealed = whole.clone();
            let head = if n == 0 { Head::empty() } else { whole[n - 1].head() };
            let mut event = whole[n].event().unwrap();
            event.person_name = "Evil".to_owned();
            resealed[n] = seal(&head, &event).unwrap();
            let expected = if n + 1 == whole.len() { Ok(resealed[n].head()) } else { Err(ChainFault::Link(place + 1)) };
            assert_eq!(
                verify_chain(&resealed),
                expected,
                "resealed alone: the next event, or the head kept elsewhere, tells"
            );
            let mut short = whole.clone();
            short.remove(n);
            if n + 1 < whole.len() {
                assert_eq!(verify_chain(&short), Err(ChainFault::Gap { expected: place, found: place + 1 }));
            }
        }
    }

    #[test]
    fn an_event_reads_back_to_the_byte_and_refuses_what_it_does_not_know() {
        for sealed in chain() {
            let event = sealed.event().unwrap();
            assert_eq!(serde_json_canonicalizer::to_string(&event).unwrap(), sealed.bytes);
            let slipped = Sealed { bytes: sealed.bytes.replacen('{', "{\"mood\":\"good\",", 1), ..sealed };
            assert!(matches!(slipped.event(), Err(ChainFault::Unreadable(..))));
        }
    }
}
