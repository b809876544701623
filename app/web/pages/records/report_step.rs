//! The phases and steps of the report: values with who, when, instrument; earlier ones struck through; verdicts with their working.

use super::{changed, remark};
use crate::components::verdict_panels_to_review;
use crate::extract::DriveAt;
use crate::links;
use crate::pages::steps::at::{items, places};
use crate::pages::steps::inputs::words;
use crate::visitor::Signed;
use commissioning::Timestamp;
use commissioning::agenda::{PhaseAgenda, StepAgenda, StepState};
use commissioning::judge::Judged;
use commissioning::plant::{Recorded, Slot};
use commissioning::procedure::{Item, Step};
use commissioning::record::{Entry, Record};
use maud::{Markup, html};

/// What the report is made from, and how.
#[derive(Clone, Copy, Debug)]
pub struct Shown<'a> {
    /// Every verdict.
    pub judged: &'a [Judged],
    /// Whether the working of all of them lies open.
    pub in_full: bool,
    /// Now.
    pub now: Timestamp,
}

/// A phase with its hold point and steps.
#[must_use]
pub fn phase(signed: &Signed, at: &DriveAt, phase: &PhaseAgenda, shown: Shown<'_>) -> Markup {
    html! {
        section.report-phase {
            @if let Some(hold) = &phase.hold {
                p.hold.open[hold.open] {
                    b { "Hold point: " (hold.title) } " "
                    @match &hold.released {
                        Some(r) => { "released " (r.received.shown()) " UTC by " (r.printed_name) @if r.printed_name != r.by_name { " (witness; recorded by " (r.by_name) ")" } },
                        None => { "not released" }
                    }
                }
            }
            h2 { (phase.title) }
            @for step in &phase.steps { @if let Some((_, described)) = at.procedure.step(&step.id) { (one(signed, at, step, described, shown)) } }
        }
    }
}

fn one(signed: &Signed, at: &DriveAt, step: &StepAgenda, described: &Step, shown: Shown<'_>) -> Markup {
    let own: Vec<Judged> = shown.judged.iter().filter(|j| j.step == step.id).cloned().collect();
    let since = at.drive.record.as_ref().and_then(changed::since);
    html! {
        section.report-step id=(format!("step-{}", step.id)) {
            h3 { a href=(links::step(&at.site.tag, &at.drive.tag, &step.id)) { (step.title) } span.quiet { " " (state(&step.state)) } }
            @if let Some(record) = &at.drive.record { (values(at, record, described, since)) }
            @if let Some(sheet) = crate::pages::steps::sheet::of(described) { p.quiet { a href="#plates" { (sheet.words()) } ", above" } }
            @if described.parameters.is_some() { p.quiet { a href="#settings" { "Parameter record" } ", below" } }
            (verdict_panels_to_review(&own, shown.in_full))
            (remark::list(at, &step.id, shown.now))
            (remark::form(signed, at, &step.id))
        }
    }
}

fn state(state: &StepState) -> String {
    match state {
        StepState::Open => "not settled".to_owned(),
        StepState::Begun => "not settled; something is missing".to_owned(),
        StepState::Settled => String::new(),
        StepState::NotApplicable(reason) => format!("does not apply: {reason}"),
        StepState::CouldNotBeDone(reason) => format!("could not be done: {reason}"),
    }
}

fn values(at: &DriveAt, record: &Record, step: &Step, since: Option<u64>) -> Markup {
    let of_item =
        |item: &&Item| places(step, item).filter_map(|p| Some((p.row, record.entries.get(&p)?))).collect::<Vec<_>>();
    let items = items(at, step);
    let rows: Vec<(&&Item, u16, &Slot<Entry>)> =
        items.iter().flat_map(|item| of_item(item).into_iter().map(move |(row, slot)| (item, row, slot))).collect();
    html! {
        @if !rows.is_empty() {
            div.scroll {
                table.list.report-table {
                    thead { tr { th { "entry" } th { "value" } th { "recorded" } th { "instrument" } } }
                    tbody { @for (item, row, slot) in rows { (value(item, step.rows.get(usize::from(row)), slot, since)) } }
                }
            }
        }
        @if let Some(settled) = record.otherwise.get(&step.id) { p.quiet { "settled so " (settled.received.shown()) " UTC by " (settled.by_name) } }
    }
}

fn value(item: &Item, row: Option<&String>, slot: &Slot<Entry>, since: Option<u64>) -> Markup {
    let changed = slot.standing().iter().any(|r| changed::is_after(r, since));
    html! {
        tr.changed[changed] {
            td data-label="entry" { (item.label) @if let Some(row) = row { ", " (row) } }
            td data-label="value" {
                @for r in slot.earlier() { s { (bare(item, &r.value)) } " " }
                @for r in slot.standing() { (standing(item, &r.value)) " " }
                @if slot.standing().is_empty() { span.quiet { "taken back" } }
                @if changed { span.mark-changed { "changed" } }
            }
            td data-label="recorded" { @for r in slot.standing() { (who(r)) } @for r in slot.taken_back() { span.quiet { "taken back " (r.received.shown()) " UTC, " (r.by_name) " " } } }
            td data-label="instrument" { @for r in slot.standing() { @if let Some(i) = &r.value.instrument { (i.0.mark) ", " (i.0.description) @if !i.0.serial.is_empty() { ", no. " (i.0.serial) } @if !i.0.due.is_empty() { ", calibration due " (i.0.due) } } } }
        }
    }
}

fn bare(item: &Item, entry: &Entry) -> String {
    words(item, &Entry { instrument: None, ..entry.clone() })
}

fn standing(item: &Item, entry: &Entry) -> Markup {
    html! {
        b { (bare(item, entry)) }
        @if let Some(photo) = &entry.photo { " " a href=(links::photo(&photo.hash)) { "look at it" } }
        @if entry.out_of_order { " · out of order" }
        @if let Some(because) = &entry.accepted_because { " · believed because: " (because) }
    }
}

/// Who and when; what the tablet's own clock said is told when it was minutes apart.
fn who(r: &Recorded<Entry>) -> Markup {
    let minutes = r.tablet.map(|t| (r.received.moment() - t.moment()).whole_minutes()).filter(|m| m.abs() > 5);
    html! {
        (r.received.shown()) " UTC, " (r.by_name)
        @if let Some(minutes) = minutes { " (arrived " (minutes) " min after the tablet’s time)" }
        @if let Some(reason) = &r.reason { ": " (reason) }
        " "
    }
}
