//! Adds events to their chains and to the stream, and brings the states and lists along.

use super::stream::{link, stream_head};
use crate::drives::project as drives;
use crate::fault::Fault;
use crate::people;
use crate::sites;
use crate::states::{Fold, head_of};
use crate::work::Desk;
use commissioning::journal::{Chain, Event, Fact, Head, Sealed, seal};
use commissioning::people::Installation;
use commissioning::plant::Site;
use commissioning::record::Drive;
use rusqlite::named_params;
use std::collections::BTreeMap;
use std::sync::Arc;

/// An event with its chain, sealed as that chain's next.
pub(crate) type Next<'a> = (Chain, &'a Event, Sealed);

/// Seals events one after another, each onto its own chain.
pub(crate) fn seal_all<'a>(desk: &Desk, events: &'a [Event]) -> Result<Vec<Next<'a>>, Fault> {
    let mut heads: BTreeMap<Chain, Head> = BTreeMap::new();
    let mut sealed = Vec::with_capacity(events.len());
    for event in events {
        let head = match heads.get(&event.chain) {
            Some(head) => head.clone(),
            None => head_of(&desk.connection, event.chain)?,
        };
        let next = seal(&head, event)?;
        heads.insert(event.chain, next.head());
        sealed.push((event.chain, event, next));
    }
    Ok(sealed)
}

/// Writes sealed events to their chains and to the stream.
pub(crate) fn append_all(desk: &Desk, sealed: &[Next<'_>]) -> Result<(), Fault> {
    let mut to_events = desk.connection.prepare_cached(
        "INSERT INTO events (chain, sequence, previous, hash, bytes, event, act)
         VALUES (:chain, :sequence, :previous, :hash, :bytes, :event, :act)",
    )?;
    let mut to_stream = desk.connection.prepare_cached(
        "INSERT INTO stream (sequence, chain, chain_sequence, hash, previous, stream_hash)
         VALUES (:sequence, :chain, :chain_sequence, :hash, :previous, :stream_hash)",
    )?;
    let mut end = stream_head(&desk.connection)?;
    for (chain, event, next) in sealed {
        let chain = chain.to_string();
        to_events.execute(named_params! {
            ":chain": chain,
            ":sequence": signed(next.sequence)?,
            ":previous": next.previous,
            ":hash": next.hash,
            ":bytes": next.bytes,
            ":event": event.id.0,
            ":act": event.act.to_string(),
        })?;
        let after = Head { sequence: end.sequence + 1, hash: link(&end.hash, &next.hash) };
        to_stream.execute(named_params! {
            ":sequence": signed(after.sequence)?,
            ":chain": chain,
            ":chain_sequence": signed(next.sequence)?,
            ":hash": next.hash,
            ":previous": end.hash,
            ":stream_hash": after.hash,
        })?;
        end = after;
    }
    Ok(())
}

/// Folds the new events into the states and writes the lists' rows, in the same transaction.
pub(crate) fn bring_lists_along(desk: &Desk, sealed: &[Next<'_>]) -> Result<(), Fault> {
    // In the order installation, sites, drives: a drive's row names its site.
    let mut by_chain: BTreeMap<Chain, Vec<&Next<'_>>> = BTreeMap::new();
    for next in sealed {
        by_chain.entry(next.0).or_default().push(next);
    }
    for (chain, news) in &by_chain {
        match chain {
            Chain::Installation => {
                let installation = advance::<Installation>(desk, *chain, news)?;
                for person in news.iter().filter_map(|(_, event, _)| person_of(&event.fact)) {
                    people::project(&desk.connection, person)?;
                }
                if news.iter().any(|(_, event, _)| matches!(event.fact, Fact::ProcedureLoaded { .. })) {
                    drives::project_not_begun(desk, &installation)?;
                }
            }
            Chain::Site(id) => {
                let site = advance::<Site>(desk, *chain, news)?;
                sites::project(&desk.connection, &site)?;
                if news.iter().any(|(_, event, _)| matches!(event.fact, Fact::SiteFieldSet { .. })) {
                    drives::project_site(desk, *id)?;
                }
            }
            Chain::Drive(_) => {
                for (_, event, _) in news {
                    drives::project_signature(&desk.connection, event)?;
                }
                let drive = advance::<Drive>(desk, *chain, news)?;
                drives::project_now(desk, &drive)?;
            }
        }
    }
    Ok(())
}

fn person_of(fact: &Fact) -> Option<&commissioning::people::Person> {
    match fact {
        Fact::PersonKept { person } => Some(person),
        _ => None,
    }
}

/// The state of a chain after its new events, put on the shelf under its new head.
fn advance<T: Fold>(desk: &Desk, chain: Chain, news: &[&Next<'_>]) -> Result<Arc<T>, Fault> {
    let none = || Fault::Broken(format!("the chain {chain} came to nothing"));
    let (_, _, first) = news.first().ok_or_else(none)?;
    let (_, _, last) = news.last().ok_or_else(none)?;
    let before = Head { sequence: first.sequence - 1, hash: first.previous.clone() };
    let shelf = T::shelf(&desk.shelves);
    let state = match (before.sequence, shelf.get(chain, &before)) {
        (0, _) => None,
        (_, Some(state)) => Some(state),
        // Not on the shelf: the whole chain, new events and all, is read back.
        (_, None) => return desk.state(chain)?.ok_or_else(none),
    };
    let mut state = state.map(|s| T::clone(&s));
    for (_, event, sealed) in news {
        T::after(&mut state, event, &sealed.head())?;
    }
    let state = Arc::new(state.ok_or_else(none)?);
    shelf.put(chain, &last.head(), Arc::clone(&state));
    Ok(state)
}

fn signed(sequence: u64) -> Result<i64, Fault> {
    i64::try_from(sequence).map_err(|_| Fault::Broken("a sequence number is beyond what can be kept".to_owned()))
}
