//! Walks every chain and the stream, and tells everything that does not fit.

use super::stream::link;
use crate::fault::Fault;
use crate::states::sealed_of;
use commissioning::journal::{Chain, Head, verify_chain};
use commissioning::{DriveId, SiteId};
use rusqlite::Connection;

/// Every chain there is: installation, sites, drives.
pub(crate) fn chains(connection: &Connection) -> Result<Vec<Chain>, Fault> {
    let mut statement = connection.prepare("SELECT DISTINCT chain FROM events ORDER BY chain")?;
    let names = statement.query_map([], |row| row.get::<_, String>("chain"))?.collect::<Result<Vec<_>, _>>()?;
    let mut chains = names.iter().map(|name| named(name)).collect::<Result<Vec<_>, _>>()?;
    chains.sort_unstable();
    Ok(chains)
}

fn named(name: &str) -> Result<Chain, Fault> {
    let site = |id: &str| id.parse::<SiteId>().ok().map(Chain::Site);
    let drive = |id: &str| id.parse::<DriveId>().ok().map(Chain::Drive);
    match name.split_once(':') {
        None if name == "installation" => Some(Chain::Installation),
        Some(("site", id)) => site(id),
        Some(("drive", id)) => drive(id),
        _ => None,
    }
    .ok_or_else(|| Fault::Broken(format!("`{name}` is the name of no chain")))
}

/// Every fault in chains and stream, in sentences; and how many events there are.
pub(crate) fn verify_journal(connection: &Connection) -> Result<(Vec<String>, u64), Fault> {
    let mut faults = Vec::new();
    let mut events = 0;
    for chain in chains(connection)? {
        let sealed = sealed_of(connection, chain)?;
        events += sealed.len() as u64;
        if let Err(fault) = verify_chain(&sealed) {
            faults.push(format!("chain {chain}: {fault}"));
        }
        for one in &sealed {
            match one.event() {
                Ok(event) if event.chain != chain => {
                    faults.push(format!("chain {chain}: event {} says it belongs to {}", one.sequence, event.chain));
                }
                Ok(_) => {}
                Err(fault) => faults.push(format!("chain {chain}: {fault}")),
            }
        }
    }
    verify_stream(connection, events, &mut faults)?;
    verify_columns(connection, &mut faults)?;
    Ok((faults, events))
}

fn verify_stream(connection: &Connection, events: u64, faults: &mut Vec<String>) -> Result<(), Fault> {
    let mut statement = connection.prepare(
        "SELECT stream.sequence AS sequence, stream.previous AS previous, stream.hash AS hash,
                stream.stream_hash AS stream_hash, events.hash AS event_hash
         FROM stream LEFT JOIN events ON events.chain = stream.chain AND events.sequence = stream.chain_sequence
         ORDER BY stream.sequence",
    )?;
    let mut rows = statement.query([])?;
    let mut head = Head::empty();
    while let Some(row) = rows.next()? {
        let sequence = row.get::<_, i64>("sequence")?.unsigned_abs();
        let (previous, hash): (String, String) = (row.get("previous")?, row.get("hash")?);
        let stream_hash: String = row.get("stream_hash")?;
        if sequence != head.sequence + 1 {
            faults.push(format!("stream: {sequence} stands where {} belongs", head.sequence + 1));
        }
        if previous != head.hash || link(&previous, &hash) != stream_hash {
            faults.push(format!("stream: {sequence} does not follow what stands before it"));
        }
        if row.get::<_, Option<String>>("event_hash")?.as_deref() != Some(hash.as_str()) {
            faults.push(format!("stream: {sequence} has another hash than its event"));
        }
        head = Head { sequence, hash: stream_hash };
    }
    if head.sequence != events {
        faults.push(format!("the stream counts {} events, the chains hold {events}", head.sequence));
    }
    Ok(())
}

/// The columns beside the bytes say what the bytes say.
fn verify_columns(connection: &Connection, faults: &mut Vec<String>) -> Result<(), Fault> {
    let mut statement = connection.prepare(
        "SELECT chain, sequence FROM events
         WHERE event <> json_extract(bytes, '$.id') OR act <> json_extract(bytes, '$.act')",
    )?;
    let mut rows = statement.query([])?;
    while let Some(row) = rows.next()? {
        let (chain, sequence): (String, i64) = (row.get("chain")?, row.get("sequence")?);
        faults.push(format!("chain {chain}: event {sequence} is filed under another id than it bears"));
    }
    Ok(())
}
