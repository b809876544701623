//! A bounded shelf of folded states, found by chain and head.
//!
//! A state is a function of its chain up to a head, and the head's hash covers all of it: a state put here by an act
//! that was undone is never asked for, so nothing has to be taken back.

use commissioning::journal::{Chain, Head};
use commissioning::people::Installation;
use commissioning::plant::Site;
use commissioning::record::Drive;
use std::collections::HashMap;
use std::sync::{Arc, Mutex, PoisonError};

struct Kept<T> {
    state: Arc<T>,
    used: u64,
}

/// The clock of use, and what was kept by chain and hash of the head.
type Inside<T> = (u64, HashMap<(Chain, String), Kept<T>>);

/// Folded states, the least recently used going first.
pub(crate) struct Shelf<T> {
    room: usize,
    inside: Mutex<Inside<T>>,
}

impl<T> Shelf<T> {
    /// With room for so many.
    pub(crate) fn with_room(room: usize) -> Self {
        Self { room, inside: Mutex::new((0, HashMap::new())) }
    }

    /// The state of a chain at a head, if it is here.
    pub(crate) fn get(&self, chain: Chain, head: &Head) -> Option<Arc<T>> {
        let mut inside = self.inside.lock().unwrap_or_else(PoisonError::into_inner);
        inside.0 += 1;
        let tick = inside.0;
        let kept = inside.1.get_mut(&(chain, head.hash.clone()))?;
        kept.used = tick;
        Some(Arc::clone(&kept.state))
    }

    /// Puts a state here.
    pub(crate) fn put(&self, chain: Chain, head: &Head, state: Arc<T>) {
        let mut inside = self.inside.lock().unwrap_or_else(PoisonError::into_inner);
        inside.0 += 1;
        let used = inside.0;
        inside.1.insert((chain, head.hash.clone()), Kept { state, used });
        while inside.1.len() > self.room {
            let Some(oldest) = inside.1.iter().min_by_key(|(_, k)| k.used).map(|(key, _)| key.clone()) else { break };
            inside.1.remove(&oldest);
        }
    }
}

/// The three kinds of state, shared by the writing thread and the reading ones.
pub(crate) struct Shelves {
    pub(crate) installation: Shelf<Installation>,
    pub(crate) sites: Shelf<Site>,
    pub(crate) drives: Shelf<Drive>,
}

impl Default for Shelves {
    fn default() -> Self {
        Self { installation: Shelf::with_room(4), sites: Shelf::with_room(64), drives: Shelf::with_room(512) }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_least_recently_used_goes_first() {
        let shelf = Shelf::with_room(2);
        let head = |n: u64| Head { sequence: n, hash: format!("hash {n}") };
        shelf.put(Chain::Installation, &head(1), Arc::new(1));
        shelf.put(Chain::Installation, &head(2), Arc::new(2));
        assert!(shelf.get(Chain::Installation, &head(1)).is_some());
        shelf.put(Chain::Installation, &head(3), Arc::new(3));
        let here = [1, 2, 3].map(|n| shelf.get(Chain::Installation, &head(n)).map(|s| *s));
        assert_eq!(here, [Some(1), None, Some(3)]);
    }
}
