//! A remark on a step or on the whole record.

use super::Surroundings;
use super::words;
use super::writer::Writer;
use crate::Refusal;
use crate::journal::{Act, Chain, Event, Fact};
use crate::record::Status;

/// Makes a remark; also while the record waits for review.
pub(super) fn make(act: &Act, around: &Surroundings<'_>, step: &str, text: &str) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record(act)?;
    if !matches!(record.status, Status::Signed { .. }) {
        super::in_progress(record)?;
    }
    let view = around.view(drive, record)?;
    if !step.is_empty() && view.procedure.step(step).is_none() {
        return Err(Refusal::Unknown { what: format!("The step “{}”", crate::typed::shorten(step)) });
    }
    let text = words::passage(text, "what you remark").map_err(|m| Refusal::field("text", "remark", m))?;
    let mut writer = Writer::new(act, around);
    writer.add(Chain::Drive(drive.id), Fact::RemarkMade { step: step.to_owned(), text });
    Ok(writer.done())
}
