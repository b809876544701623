//! The phases and steps of the report: values with who, when, instrument; earlier ones struck through; verdicts with their working.

use super::{changed, remark};
use crate::clock_words::moment;
use crate::components::{charts_at, counts, verdict_panels_to_review};
use crate::extract::DriveAt;
use crate::links;
use crate::pages::steps::at::{items, places};
use crate::pages::steps::inputs::words;
use crate::pages::steps::notices::once_in_words;
use crate::verdicts;
use crate::visitor::Signed;
use commissioning::agenda::{PhaseAgenda, StepAgenda, StepState};
use commissioning::judge::{Counts, Judged};
use commissioning::plant::{Recorded, Slot};
use commissioning::procedure::{Item, Step};
use commissioning::record::{Entry, Record};
use engineering::Verdict;
use maud::{Markup, html};

/// What the report is made from, and how.
#[derive(Clone, Copy, Debug)]
pub struct Shown<'a> {
    /// Every verdict.
    pub judged: &'a [Judged],
    /// Every chart.
    pub charts: &'a [drawing::charts::StepChart],
    /// Whether the working of all of them lies open.
    pub in_full: bool,
    /// Whether every part lies open, to be read through or printed.
    pub whole: bool,
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
            details.report-fold open[shown.whole || asks_for_eyes(at, phase, shown)] {
                summary { h2 { (phase.title) } (in_short(at, phase, shown)) }
                @for step in &phase.steps { @if let Some((_, described)) = at.procedure.step(&step.id) { (one(signed, at, step, described, shown)) } }
            }
        }
    }
}

fn of_phase<'a>(phase: &'a PhaseAgenda, shown: Shown<'a>) -> impl Iterator<Item = &'a Judged> {
    shown.judged.iter().filter(|j| phase.steps.iter().any(|s| s.id == j.step))
}

/// Something is outside, begun and not finished, or changed since the record was sent back.
fn asks_for_eyes(at: &DriveAt, phase: &PhaseAgenda, shown: Shown<'_>) -> bool {
    let outside = of_phase(phase, shown).any(|j| j.outcome.verdict == Verdict::Outside);
    let begun = phase.steps.iter().any(|s| s.state != StepState::Open);
    outside || (begun && phase.left() > 0) || changed_in(at, phase) > 0
}

fn changed_in(at: &DriveAt, phase: &PhaseAgenda) -> usize {
    let changes = changed::list(&at.drive, &at.procedure);
    changes.iter().filter(|(step, _)| phase.steps.iter().any(|s| s.id == *step)).count()
}

/// A phase on one line: steps, verdicts, open findings, changes.
fn in_short(at: &DriveAt, phase: &PhaseAgenda, shown: Shown<'_>) -> Markup {
    let own: Vec<Judged> = of_phase(phase, shown).cloned().collect();
    let here = |step: Option<&str>| phase.steps.iter().any(|s| Some(s.id.as_str()) == step);
    let findings = at.drive.record.iter().flat_map(|r| r.findings.values());
    let open = findings.filter(|f| f.is_open() && here(f.step.as_deref())).count();
    let changed = changed_in(at, phase);
    html! {
        span.quiet { (phase.settled()) " of " (phase.steps.len()) " steps settled" }
        (counts(&verdicts::numbers(&Counts::of(&own))))
        @if open > 0 { b { (open) @if open == 1 { " open finding" } @else { " open findings" } } }
        @if changed > 0 { span.mark-changed { (changed) " changed" } }
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
            (charts_at(shown.charts, &step.id))
            (remark::list(at, &step.id))
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
        @if let Some(settled) = record.otherwise.get(&step.id) { p.quiet { "settled so " (moment(settled.received)) " by " (settled.by_name) } }
        @for once in record.once_otherwise.iter().filter(|o| o.step == step.id) { p.quiet.once { (once_in_words(once)) } }
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
