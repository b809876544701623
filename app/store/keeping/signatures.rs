//! Recomputes what every signature binds, from the events alone, and tells where the record as it stood is another.

use crate::fault::Fault;
use crate::journal::chains;
use crate::states::{Shelves, sealed_of, state};
use commissioning::SiteId;
use commissioning::journal::{Chain, Event, Fact};
use commissioning::judge::View;
use commissioning::people::Installation;
use commissioning::plant::Site;
use commissioning::record::canonical::{RecordFile, SitePart};
use commissioning::record::{Drive, apply};
use rusqlite::{Connection, named_params};
use std::collections::BTreeMap;

/// Every signature ever put, superseded ones too: faults in sentences, and how many there are.
pub(crate) fn check_signatures(connection: &Connection) -> Result<(Vec<String>, usize), Fault> {
    // Shelves of its own: what is compared with must not come from memory.
    let installation = state::<Installation>(connection, &Shelves::default(), Chain::Installation)?.unwrap_or_default();
    let (mut faults, mut count) = (Vec::new(), 0);
    // Signed sites, looked at together afterwards, so that each site's chain is folded once.
    let mut sites: BTreeMap<SiteId, Vec<SignedSite>> = BTreeMap::new();
    for chain in chains(connection)? {
        if !matches!(chain, Chain::Drive(_)) {
            continue;
        }
        let signed = signatures_of(connection, chain, &installation, &mut faults);
        // One broken chain must not hide what is wrong with the others.
        match signed {
            Ok(signed) => {
                count += signed.len();
                for (site, one) in signed {
                    sites.entry(site).or_default().push(one);
                }
            }
            Err(fault) => faults.push(format!("{chain}: its signatures cannot be recomputed: {fault}")),
        }
    }
    for (id, signed) in sites {
        faults.extend(other_sites(connection, id, signed)?);
    }
    Ok((faults, count))
}

/// Looks at every signature of a drive's chain; gives the site that each one froze.
fn signatures_of(
    connection: &Connection,
    chain: Chain,
    installation: &Installation,
    faults: &mut Vec<String>,
) -> Result<Vec<(SiteId, SignedSite)>, Fault> {
    let mut signed = Vec::new();
    let mut drive: Option<Drive> = None;
    for sealed in sealed_of(connection, chain)? {
        let event = sealed.event()?;
        let before = if matches!(event.fact, Fact::Signed { .. }) { drive.clone() } else { None };
        apply::to_drive(&mut drive, &event, &sealed.head()).map_err(|e| Fault::Broken(e.to_string()))?;
        let (Some(before), Some(after), Fact::Signed { site, .. }) = (before, &drive, &event.fact) else { continue };
        let whose = of_whom(after, &event);
        if let Some(fault) = binds_another(&before, after, &event, installation) {
            faults.push(format!("{whose} {fault}"));
        }
        let place = place_in_stream(connection, chain, sealed.sequence)?;
        let first = before.record.as_ref().is_none_or(|r| r.frozen_site.is_none());
        signed.push((after.site, SignedSite { place, first, site: (**site).clone(), whose }));
    }
    Ok(signed)
}

/// The site as a signature froze it.
struct SignedSite {
    /// Place of the signature in the installation's stream.
    place: i64,
    /// The signature froze the site itself; a later one takes over what the first froze.
    first: bool,
    site: SitePart,
    whose: String,
}

fn of_whom(drive: &Drive, event: &Event) -> String {
    let revision = drive.record.as_ref().map_or(0, |r| r.revision);
    format!("drive {} ({}), record revision {revision}: the signature of {}", drive.tag, drive.id, event.person_name)
}

/// What does not fit between a signature and the record that it was put on; `None` when all does.
fn binds_another(before: &Drive, after: &Drive, event: &Event, installation: &Installation) -> Option<String> {
    let Fact::Signed { revision, digest, head, site, .. } = &event.fact else { return None };
    let (Some(record), Some(stood)) = (&after.record, &before.record) else {
        return Some("stands on no record".to_owned());
    };
    if *head != before.head {
        return Some(format!(
            "names event {} as the one before it, it follows event {}",
            head.sequence, before.head.sequence
        ));
    }
    if *revision != stood.revision {
        return Some(format!("is for revision {revision}, the record was at {}", stood.revision));
    }
    if stood.frozen_site.as_ref().is_some_and(|frozen| frozen != &**site) {
        return Some("froze another site than the signature before it".to_owned());
    }
    let Some(procedure) = installation.procedures.get(&record.procedure) else {
        return Some(format!("is for procedure version {}, which is not kept", record.procedure));
    };
    // The signed site and verdicts are in the event itself, so that the present site is asked for nothing but its place.
    let place = Site {
        id: site.id,
        tag: site.tag.clone(),
        name: site.name.clone(),
        fields: BTreeMap::new(),
        drives: BTreeMap::new(),
        events: 0,
        last_change: event.received,
    };
    let view = View { drive: after, site: &place, procedure };
    let recomputed = RecordFile::of(&view, record.frozen.as_deref().unwrap_or_default())
        .digest_at(record.signatures.len().saturating_sub(1));
    (recomputed.as_ref() != Some(digest)).then(|| "binds another content than the events give".to_owned())
}

fn place_in_stream(connection: &Connection, chain: Chain, sequence: u64) -> Result<i64, Fault> {
    let sequence = i64::try_from(sequence).unwrap_or(i64::MAX);
    Ok(connection
        .prepare_cached("SELECT sequence FROM stream WHERE chain = :chain AND chain_sequence = :sequence")?
        .query_row(named_params! { ":chain": chain.to_string(), ":sequence": sequence }, |row| row.get("sequence"))?)
}

/// Signatures that froze a site otherwise than it stood at that place of the stream.
fn other_sites(connection: &Connection, id: SiteId, mut signed: Vec<SignedSite>) -> Result<Vec<String>, Fault> {
    signed.retain(|s| s.first);
    signed.sort_by_key(|s| s.place);
    let chain = Chain::Site(id);
    let mut faults = Vec::new();
    let mut site: Option<Site> = None;
    let mut waiting = signed.into_iter().peekable();
    let mut compare = |site: &Option<Site>, upto: i64, faults: &mut Vec<String>| {
        while let Some(next) = waiting.next_if(|s| s.place < upto) {
            if site.as_ref().map(SitePart::of) != Some(next.site) {
                faults.push(format!("{} froze another site than the one that stood then", next.whose));
            }
        }
    };
    for sealed in sealed_of(connection, chain)? {
        compare(&site, place_in_stream(connection, chain, sealed.sequence)?, &mut faults);
        apply::to_site(&mut site, &sealed.event()?).map_err(|e| Fault::Broken(e.to_string()))?;
    }
    compare(&site, i64::MAX, &mut faults);
    Ok(faults)
}
