//! Recording entries at a step: nothing typed is refused for its order, but order and isolation leave their marks.

use super::changes::{Form, Weighed, as_typed, same};
use super::entry_value::{self, Understood};
use super::writer::Writer;
use super::{Surroundings, isolation, isolation_proof};
use crate::agenda::{self, step_parts};
use crate::journal::{Act, Chain, Change, Event, Fact};
use crate::judge::View;
use crate::procedure::{IsolationAct, Item, ItemKind, Step};
use crate::record::{Entry, EntryPlace, Finding, Record, Severity};
use crate::{EventId, Refusal};
use std::collections::BTreeSet;

/// What one change of the form does.
struct Made {
    place: EntryPlace,
    entry: Option<Entry>,
    supersedes: Vec<EventId>,
    /// Nothing stood here that still counts: this is no correction.
    new: bool,
}

/// Records entries at a step.
pub(super) fn record(
    act: &Act,
    around: &Surroundings<'_>,
    step: &str,
    changes: &[Change<EntryPlace>],
    reason: &str,
) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record_in_progress(act)?;
    let view = around.view(drive, record)?;
    let unknown = || Refusal::Unknown { what: format!("The step “{}”", crate::typed::shorten(step)) };
    let (phase, step) = view.procedure.step(step).ok_or_else(unknown)?;
    let turn = isolation::due(record, step);
    let made = weigh(around, record, step, changes, reason, turn)?;
    let mut writer = Writer::new(act, around);
    if made.is_empty() {
        return Ok(writer.done());
    }
    let chain = Chain::Drive(drive.id);
    let early = agenda::of(&view).phases.iter().any(|p| p.id == phase.id && !p.open());
    if record.otherwise.contains_key(&step.id) {
        writer.add(chain, Fact::StepResumed { step: step.id.clone() });
    }
    let chosen = |item: &str| {
        let sent = made.iter().find(|m| m.place.item == item);
        let standing = || record.entry(&EntryPlace::new(item)).map(|e| e.value.value.text.as_str());
        sent.map_or_else(standing, |m| m.entry.as_ref().map(|e| e.value.text.as_str()))
    };
    let alone = step.left_alone(chosen);
    if step.voids_directions && !alone {
        // First, so that a direction seen in this same act, after the exchange, counts.
        writer.add(chain, Fact::DirectionsVoided { step: step.id.clone() });
    }
    let (mut there, mut gone) = (BTreeSet::new(), BTreeSet::new());
    let any_new = made.iter().any(|m| m.new && m.entry.is_some());
    for Made { place, entry, supersedes, new } in made {
        let before = record.entry(&place).map(|e| e.value.out_of_order);
        let kept = if entry.is_some() { &mut there } else { &mut gone };
        kept.insert(place.clone());
        let step = step.id.clone();
        let fact = match entry {
            Some(mut entry) => {
                entry.out_of_order = if new { early } else { before.unwrap_or(early) };
                Fact::EntryMade { place, step, entry }
            }
            None => Fact::EntryTakenBack { place, step },
        };
        writer.put(chain, fact, supersedes, reason);
    }
    if let Some(turn) = turn.filter(|t| !alone && t.complete(record, step, &view.flags(), &there, &gone)) {
        let speaks_against = match turn.to {
            IsolationAct::Enter => isolation_proof::against(around, step, writer.so_far())?,
            IsolationAct::Lift => None,
        };
        let id = step.id.clone();
        match (turn.to, speaks_against) {
            (IsolationAct::Enter, None) => writer.add(chain, Fact::IsolationEntered { step: id }),
            (IsolationAct::Lift, _) => writer.add(chain, Fact::IsolationLifted { step: id }),
            (IsolationAct::Enter, Some(why)) => raise_not_dead(&mut writer, chain, record, step, &why),
        }
    }
    if any_new {
        raise_for_order(&mut writer, &view, record, step, early, alone);
    }
    super::outside::raise_stops(&mut writer, around, record, step)?;
    Ok(writer.done())
}

/// Everything was entered, but the readings do not prove it dead: isolation stays out of force, and a finding says why.
fn raise_not_dead(writer: &mut Writer<'_>, chain: Chain, record: &Record, step: &Step, why: &str) {
    let title = &step.title;
    let text = format!("“{title}” was recorded, but “isolated and proved dead” is not in force: {why}");
    let same = |f: &Finding| f.is_open() && f.step.as_ref() == Some(&step.id) && f.text == text;
    if record.findings.values().any(same) {
        return;
    }
    let (finding, number) = (writer.finding(record, "not-dead", &step.id), super::findings::next_number(record));
    let (severity, step) = (Severity::StopsStartUp, Some(step.id.clone()));
    writer.add(chain, Fact::FindingRaised { finding, number, severity, text, step });
}

/// Raises what entries out of order or without isolation leave open, unless the same stands open at this step already.
fn raise_for_order(writer: &mut Writer<'_>, view: &View<'_>, record: &Record, step: &Step, early: bool, alone: bool) {
    let title = &step.title;
    let faults = [
        (
            early,
            "out-of-order",
            format!(
                "“{title}” was recorded before its hold point was released. Judge whether it may stand or must be done again."
            ),
        ),
        (
            step.needs_isolation && !alone && !record.isolated(),
            "without-isolation",
            format!(
                "“{title}” was recorded while “isolated and proved dead” was not in force. Find out how the work was done."
            ),
        ),
    ];
    let raised = writer.so_far().iter().filter(|e| matches!(e.fact, Fact::FindingRaised { .. })).count();
    let mut number = super::findings::next_number(record) + u32::try_from(raised).unwrap_or(0);
    for (_, what, text) in faults.into_iter().filter(|(is, ..)| *is) {
        let (severity, at) = (Severity::BeforeHandover, Some(&step.id));
        let same = |f: &Finding| f.is_open() && f.severity == severity && f.step.as_ref() == at && f.text == text;
        if record.findings.values().any(same) {
            continue;
        }
        let finding = writer.finding(record, what, &step.id);
        let step = Some(step.id.clone());
        writer.add(Chain::Drive(view.drive.id), Fact::FindingRaised { finding, number, severity, text, step });
        number += 1;
    }
}

/// What the changes of a form do; refused with every error or conflict together.
fn weigh(
    around: &Surroundings<'_>,
    record: &Record,
    step: &Step,
    changes: &[Change<EntryPlace>],
    reason: &str,
    turn: Option<isolation::Turn>,
) -> Result<Vec<Made>, Refusal> {
    let mut form = Form::of(changes.len())?;
    let mut sent = BTreeSet::new();
    let mut done = Vec::new();
    for change in changes {
        let place = &change.place;
        let name = format!("{}.{}", place.item, place.row);
        let item = step.items.iter().find(|i| i.key == place.item && step_parts::places(step, i).any(|p| p == *place));
        let Some(item) = item else {
            form.errors.add(name, place.item.as_str(), "This step has no such field. Load the page again.");
            continue;
        };
        let label = step_parts::label(step, item, place.row);
        if !sent.insert(place.clone()) {
            form.errors.add(name, label, "This field was sent twice. Load the page again.");
            continue;
        }
        // A direction seen before an exchange counts as not observed: seeing the same again is a new entry.
        let voided = record.entry(place).is_some() && record.observed(place).is_none();
        let again = voided || turn.is_some_and(|t| t.outdates(record, place));
        if let Some(made) = one(around, &mut form, record, (item, &label, &name), change, reason, again) {
            done.push(made);
        }
    }
    form.settle(reason)?;
    Ok(done)
}

/// What one change does; `None` when it changes nothing or is at fault, which `form` then knows.
fn one(
    around: &Surroundings<'_>,
    form: &mut Form,
    record: &Record,
    (item, label, name): (&Item, &str, &str),
    change: &Change<EntryPlace>,
    reason: &str,
    again: bool,
) -> Option<Made> {
    let slot = record.entries.get(&change.place);
    let standing = record.entry(&change.place).map(|e| &e.value);
    if !again && standing.is_some_and(|e| unchanged(item, e, change)) {
        return None;
    }
    let Understood { mut entry, unbelievable } =
        match entry_value::understand(item, change, standing, around.installation) {
            Ok(understood) => understood,
            Err((part, message)) => {
                form.errors.add(format!("{name}{part}"), label, message);
                return None;
            }
        };
    match (unbelievable, &mut entry) {
        (Some(sentence), _) if reason.trim().is_empty() => form.errors.add(name, label, sentence),
        (Some(_), Some(entry)) => entry.accepted_because = Some(reason.trim().to_owned()),
        _ => {}
    }
    let mine = (entry.as_ref().map(|e| e.value.clone()), change.seen.as_slice());
    let is_same = |stands: &Entry| !again && entry.as_ref().is_some_and(|e| alike(stands, e));
    let Weighed::Change { supersedes } = form.weigh(name, label, slot, mine, is_same, |e| Some(e.value.clone())) else {
        return None;
    };
    let reading = matches!(item.kind, ItemKind::Reading { .. });
    if !supersedes.is_empty() && !again && (reading || record.ever_signed) {
        // The figure stays as it is, yet another meter gives it another doubt: that wants its reason too.
        let only_instrument = standing.zip(entry.as_ref()).is_some_and(|(s, e)| s.value == e.value);
        if only_instrument { form.overwrites(&format!("{label}, its instrument")) } else { form.overwrites(label) }
    }
    let new = supersedes.is_empty() || again;
    Some(Made { place: change.place.clone(), entry, supersedes, new })
}

/// Whether what was sent, as text, is what stands.
fn unchanged(item: &Item, stands: &Entry, change: &Change<EntryPlace>) -> bool {
    if let ItemKind::Photo = item.kind {
        return false;
    }
    let named = stands.instrument.as_ref().map(|i| i.0.id);
    let asked = matches!(item.kind, ItemKind::Reading { instrument: true, .. });
    let words = same(Some(&stands.value), &as_typed(&change.text), &change.unit);
    words && (!asked || named == change.instrument)
}

/// Whether two entries say the same, whatever the instrument's data have become since.
fn alike(a: &Entry, b: &Entry) -> bool {
    let instrument = |e: &Entry| e.instrument.as_ref().map(|i| i.0.id);
    a.value == b.value && instrument(a) == instrument(b) && a.photo == b.photo
}
