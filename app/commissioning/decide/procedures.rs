//! Loading a procedure version: it must hold together, and a version once loaded never changes.

use super::Surroundings;
use super::writer::Writer;
use crate::Refusal;
use crate::journal::{Act, Chain, Event, Fact};
use crate::plant::Sheet;
use crate::procedure::{Condition, Procedure};
use std::collections::BTreeSet;

/// Loads a version; loading the same again changes nothing.
pub(super) fn load(act: &Act, around: &Surroundings<'_>, procedure: &Procedure) -> Result<Vec<Event>, Refusal> {
    let version = procedure.version;
    let mut writer = Writer::new(act, around);
    if let Some(loaded) = around.installation.procedures.get(&version) {
        if **loaded == *procedure {
            return Ok(writer.done());
        }
        let why =
            format!("Version {version} of the procedure is loaded already with other content. Raise the version.");
        return Err(Refusal::not_now(why));
    }
    if let Some(newest) = around.installation.newest_procedure().filter(|p| p.version > version) {
        let why =
            format!("Version {version} is older than version {}, which is loaded. Raise the version.", newest.version);
        return Err(Refusal::not_now(why));
    }
    let faults = faults(procedure);
    if !faults.is_empty() {
        return Err(Refusal::field("procedure", "procedure", faults.join(" ")));
    }
    writer.add(Chain::Installation, Fact::ProcedureLoaded { procedure: Box::new(procedure.clone()) });
    Ok(writer.done())
}

/// What does not hold together in a procedure, a sentence each.
fn faults(procedure: &Procedure) -> Vec<String> {
    let mut faults = Vec::new();
    if procedure.version == 0 || procedure.phases.is_empty() || procedure.steps().next().is_none() {
        faults.push("A procedure has a version from 1 and at least one step.".to_owned());
    }
    let mut known = BTreeSet::new();
    let phases = procedure.phases.iter().map(|p| ("phase", &p.id));
    let steps = procedure.steps().map(|(_, s)| ("step", &s.id));
    let items = procedure.steps().flat_map(|(_, s)| &s.items).map(|i| ("item", &i.key));
    for (what, id) in phases.chain(steps).chain(items) {
        if !addressable(id) {
            faults.push(format!("The {what} “{id}” may have only small letters, digits and hyphens in its name."));
        }
        if !known.insert((what, id)) {
            faults.push(format!("The {what} “{id}” stands twice."));
        }
    }
    for (_, step) in procedure.steps() {
        if step.sheet.as_deref().is_some_and(|s| Sheet::from_key(s).is_none()) {
            faults.push(format!("The step “{}” names a sheet that does not exist.", step.id));
        }
        if step.rows.len() > 100 || step.items.len() > 100 {
            faults.push(format!("The step “{}” has more than 100 rows or items.", step.id));
        }
    }
    for (phase, condition) in procedure
        .phases
        .iter()
        .filter_map(|p| p.hold.as_ref().map(|h| (p, h)))
        .flat_map(|(p, h)| h.conditions.iter().map(move |c| (p, c)))
    {
        let lost = match condition {
            Condition::PhaseSettled { phase } => procedure.phase(phase).is_none(),
            Condition::StepSettled { step } => procedure.step(step).is_none(),
            Condition::ChecksJudged { checks } | Condition::NoneOutside { checks } => {
                !checks.iter().all(|c| procedure.steps().any(|(_, s)| s.checks.contains(c)))
            }
            Condition::IsolationInForce | Condition::IsolationLifted | Condition::NoFindingStopsStartUp => false,
        };
        if lost {
            faults.push(format!("The hold point before “{}” asks for something that no step or phase has.", phase.id));
        }
    }
    faults
}

fn addressable(id: &str) -> bool {
    (1..=60).contains(&id.len()) && id.bytes().all(|b| b.is_ascii_lowercase() || b.is_ascii_digit() || b == b'-')
}
