//! Settling a step otherwise, and taking that back.

use super::Surroundings;
use super::findings::next_number;
use super::words;
use super::writer::Writer;
use crate::Refusal;
use crate::agenda;
use crate::journal::{Act, Chain, Event, Fact};
use crate::record::{SettledOtherwise, Severity};

/// Settles a step as not applicable or as one that could not be done. The latter raises a finding; so does leaving out
/// a step that guards start-up, since nobody else would look at the reason before voltage is applied.
pub(super) fn settle(
    act: &Act,
    around: &Surroundings<'_>,
    step: &str,
    how: SettledOtherwise,
    reason: &str,
) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record_in_progress(act)?;
    let view = around.view(drive, record)?;
    let unknown = || Refusal::Unknown { what: format!("The step “{}”", crate::typed::shorten(step)) };
    let (_, step) = view.procedure.step(step).ok_or_else(unknown)?;
    if agenda::of(&view).step(&step.id).is_none() {
        return Err(Refusal::not_now(
            "This step does not apply with the options fitted to this drive; it is out of the count already.",
        ));
    }
    if let Some(settled) = record.otherwise.get(&step.id) {
        let by = &settled.by_name;
        return Err(Refusal::not_now(format!("{by} settled this step otherwise already. Resume it first.")));
    }
    let what = match how {
        SettledOtherwise::NotApplicable => "why this step does not apply here",
        SettledOtherwise::CouldNotBeDone => "why this step could not be done",
    };
    let reason = words::reason(reason, what)?;
    let mut writer = Writer::new(act, around);
    let chain = Chain::Drive(drive.id);
    writer.add_over(chain, Fact::StepSettled { step: step.id.clone(), how }, Vec::new(), &reason);
    let severity = if step.stops_start_up { Severity::StopsStartUp } else { Severity::BeforeHandover };
    let found = match how {
        SettledOtherwise::CouldNotBeDone => {
            Some(("could-not-be-done", format!("“{}” could not be done: {reason}", step.title)))
        }
        SettledOtherwise::NotApplicable if step.stops_start_up => Some((
            "not-applicable",
            format!("“{}” guards start-up and was settled as not applicable: {reason}", step.title),
        )),
        SettledOtherwise::NotApplicable => None,
    };
    if let Some((what, text)) = found {
        let finding = writer.finding(record, what, &step.id);
        let (number, step) = (next_number(record), Some(step.id.clone()));
        writer.add(chain, Fact::FindingRaised { finding, number, severity, text, step });
    }
    Ok(writer.done())
}

/// Takes back that a step was settled otherwise; a finding it raised stays until it is settled.
pub(super) fn resume(act: &Act, around: &Surroundings<'_>, step: &str) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record_in_progress(act)?;
    let Some(settled) = record.otherwise.get(step) else {
        return Err(Refusal::not_now("This step was not settled otherwise; there is nothing to take back."));
    };
    let mut writer = Writer::new(act, around);
    let fact = Fact::StepResumed { step: step.to_owned() };
    writer.add_over(Chain::Drive(drive.id), fact, vec![settled.event.clone()], "");
    Ok(writer.done())
}
