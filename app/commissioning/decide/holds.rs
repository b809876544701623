//! Releasing a hold point by name.

use super::Surroundings;
use super::words::{self, Errors};
use super::writer::Writer;
use crate::Refusal;
use crate::agenda;
use crate::journal::{Act, Chain, Event, Fact};
use crate::record::ReleaseRole;

/// Releases the hold point before a phase: its conditions are met and everything is declared.
pub(super) fn release(
    act: &Act,
    around: &Surroundings<'_>,
    phase: &str,
    role: ReleaseRole,
    printed_name: &str,
    declared: &[bool],
) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record_in_progress(act)?;
    let view = around.view(drive, record)?;
    let unknown = || Refusal::Unknown { what: format!("The phase “{}”", crate::typed::shorten(phase)) };
    let phase = view.procedure.phase(phase).ok_or_else(unknown)?;
    let Some(hold) = &phase.hold else {
        return Err(Refusal::not_now(format!("“{}” has no hold point; it is open.", phase.title)));
    };
    let agenda = agenda::of(&view);
    let stands = agenda.phases.iter().find(|p| p.id == phase.id).and_then(|p| p.hold.as_ref());
    if let Some(stands) = stands {
        if let (true, Some(release)) = (stands.open, &stands.released) {
            let name = &release.printed_name;
            return Err(Refusal::not_now(format!("{name} released this hold point already.")));
        }
        if !stands.unmet.is_empty() {
            let list = stands.unmet.join(" ");
            return Err(Refusal::not_now(format!("The hold point {} waits: {list}", hold.title)));
        }
    }
    let mut errors = Errors::default();
    for (n, sentence) in hold.declare.iter().enumerate() {
        if declared.get(n) != Some(&true) {
            errors.add(
                format!("declared.{n}"),
                sentence.as_str(),
                "This must be confirmed before release. Tick it when it is so.",
            );
        }
    }
    let name = match (role, around.actor) {
        (ReleaseRole::Engineer, Some(actor)) => actor.name.clone(),
        _ => errors.keep("printed_name", "witness's printed name", words::line(printed_name, 80)).unwrap_or_default(),
    };
    errors.none()?;
    let mut writer = Writer::new(act, around);
    let fact = Fact::HoldReleased { phase: phase.id.clone(), role, printed_name: name };
    writer.add(Chain::Drive(drive.id), fact);
    Ok(writer.done())
}
