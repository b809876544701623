//! Writes a drive's row from its state, in the transaction that changed it.

use super::row::{BoardRow, PhaseCell, StatusKey, Written};
use crate::fault::Fault;
use crate::states::procedure_of;
use crate::work::Desk;
use commissioning::journal::{Chain, Event, Fact};
use commissioning::judge::{Counts, View};
use commissioning::people::Installation;
use commissioning::plant::Site;
use commissioning::procedure::Procedure;
use commissioning::record::{Drive, FindingState, Meaning, Status};
use commissioning::{DriveId, SiteId, agenda, judge};
use rusqlite::{Connection, named_params};

/// Writes a drive's row and who contributed to its record.
pub(crate) fn project(
    connection: &Connection,
    drive: &Drive,
    site: &Site,
    procedure: Option<&Procedure>,
) -> Result<(), Fault> {
    write(connection, &listed(drive, site, procedure))?;
    let id = drive.id.to_string();
    connection
        .prepare_cached("DELETE FROM contributors WHERE drive = :drive")?
        .execute(named_params! { ":drive": id })?;
    let mut add = connection.prepare_cached("INSERT INTO contributors (drive, person) VALUES (:drive, :person)")?;
    for person in drive.record.iter().flat_map(|r| &r.contributors) {
        add.execute(named_params! { ":drive": id, ":person": person.to_string() })?;
    }
    Ok(())
}

/// As `project`, with site and procedure as this connection sees them.
pub(crate) fn project_now(desk: &Desk, drive: &Drive) -> Result<(), Fault> {
    let installation = desk.installation()?;
    let site = desk
        .site(drive.site)?
        .ok_or_else(|| Fault::Broken(format!("drive {} belongs to a site that is not here", drive.id)))?;
    project(&desk.connection, drive, &site, procedure_of(drive, &installation).map(std::convert::AsRef::as_ref))
}

/// Writes the rows of all drives of a site: its supply and its rules judge them.
pub(crate) fn project_site(desk: &Desk, site: SiteId) -> Result<(), Fault> {
    let site = desk.site(site)?.ok_or_else(|| Fault::Broken(format!("site {site} is not here")))?;
    for drive in site.drives.values() {
        if let Some(drive) = desk.drive(*drive)? {
            project_now(desk, &drive)?;
        }
    }
    Ok(())
}

/// Writes the rows of all drives without a record: a new procedure is the one they will begin with.
pub(crate) fn project_not_begun(desk: &Desk, installation: &Installation) -> Result<(), Fault> {
    for site in installation.sites.values() {
        let Some(site) = desk.site(*site)? else { continue };
        for drive in site.drives.values() {
            if let Some(drive) = desk.drive(*drive)?.filter(|d| d.record.is_none()) {
                project_now(desk, &drive)?;
            }
        }
    }
    Ok(())
}

/// Writes a signature's row; the database refuses an acceptance by a contributor.
pub(crate) fn project_signature(connection: &Connection, event: &Event) -> Result<(), Fault> {
    let (Fact::Signed { meaning, revision, .. }, Chain::Drive(drive)) = (&event.fact, event.chain) else {
        return Ok(());
    };
    let meaning = match meaning {
        Meaning::Performed => "performed",
        Meaning::Accepted => "accepted",
    };
    connection
        .prepare_cached(
            "INSERT INTO signatures (event, drive, revision, meaning, person, received)
             VALUES (:event, :drive, :revision, :meaning, :person, :received)",
        )?
        .execute(named_params! {
            ":event": event.id.0,
            ":drive": DriveId::to_string(&drive),
            ":revision": revision,
            ":meaning": meaning,
            ":person": event.person.to_string(),
            ":received": event.received.to_string(),
        })?;
    Ok(())
}

fn listed(drive: &Drive, site: &Site, procedure: Option<&Procedure>) -> Written {
    let record = drive.record.as_ref();
    let view = procedure.map(|procedure| View { drive, site, procedure });
    let agenda = view.as_ref().map(agenda::of);
    let phases = agenda.as_ref().map(cells).unwrap_or_default();
    let counts = match (record.and_then(|r| r.frozen.as_deref()), &view, &agenda) {
        (Some(frozen), ..) => Counts::of(frozen),
        (None, Some(view), Some(agenda)) => Counts::of(&judge::reached(judge::all(view), agenda)),
        _ => Counts::of(&[]),
    };
    let open = record.map_or(0, |r| r.findings.values().filter(|f| f.state == FindingState::Open).count());
    let signed_at = match record.map(|r| &r.status) {
        Some(Status::Signed { at }) => Some(*at),
        _ => None,
    };
    let signed_by = record.filter(|_| signed_at.is_some()).and_then(|r| {
        r.signatures
            .iter()
            .rev()
            .find(|s| s.meaning == Meaning::Performed && !s.superseded)
            .map(|s| s.printed_name.clone())
    });
    Written {
        row: BoardRow {
            drive: drive.id,
            site: drive.site,
            tag: drive.tag.clone(),
            name: drive.name.clone(),
            status: StatusKey::of(record.map(|r| &r.status)),
            revision: record.map_or(0, |r| r.revision),
            phases,
            counts,
            open_findings: count(open),
            last_change: drive.last_change,
        },
        signed_at,
        signed_by,
    }
}

fn cells(agenda: &agenda::Agenda) -> Vec<PhaseCell> {
    let cell = |phase: &agenda::PhaseAgenda| PhaseCell {
        id: phase.id.clone(),
        short: phase.short.clone(),
        left: count(phase.left()),
        settled: count(phase.settled()),
        waits: !phase.open(),
    };
    agenda.phases.iter().map(cell).collect()
}

fn count(number: usize) -> u32 {
    u32::try_from(number).unwrap_or(u32::MAX)
}

fn write(connection: &Connection, written: &Written) -> Result<(), Fault> {
    let row = &written.row;
    connection
        .prepare_cached(
            "INSERT INTO drives (id, site, tag, name, tag_order, tag_search, name_search, status, revision, phases,
                                 counts, open_findings, last_change, signed_at, signed_by)
             VALUES (:id, :site, :tag, :name, :tag_order, :tag_search, :name_search, :status, :revision, :phases,
                     :counts, :open_findings, :last_change, :signed_at, :signed_by)
             ON CONFLICT (id) DO UPDATE SET
                 site = excluded.site, tag = excluded.tag, name = excluded.name, tag_order = excluded.tag_order,
                 tag_search = excluded.tag_search, name_search = excluded.name_search, status = excluded.status,
                 revision = excluded.revision, phases = excluded.phases, counts = excluded.counts,
                 open_findings = excluded.open_findings, last_change = excluded.last_change,
                 signed_at = excluded.signed_at, signed_by = excluded.signed_by",
        )?
        .execute(named_params! {
            ":id": row.drive.to_string(),
            ":site": row.site.to_string(),
            ":tag": row.tag,
            ":name": row.name,
            ":tag_order": written.tag_order(),
            ":tag_search": written.tag_search(),
            ":name_search": written.name_search(),
            ":status": row.status.key(),
            ":revision": row.revision,
            ":phases": serde_json::to_string(&row.phases)?,
            ":counts": serde_json::to_string(&row.counts)?,
            ":open_findings": row.open_findings,
            ":last_change": row.last_change.to_string(),
            ":signed_at": written.signed_at.map(|t| t.to_string()),
            ":signed_by": written.signed_by,
        })?;
    Ok(())
}
