//! The page of a step, whole or as it comes back with what was wrong.

use super::at::{StepAt, items, may_record, places};
use super::inputs::{self, Inputs};
use super::{footer, notices, sheet, stay};
use crate::components::{Page, caution, charts_at, check_title, notice, seal, verdict_panels};
use crate::pages::parameters::inputs as parameter_inputs;
use crate::pages::parameters::list;
use crate::sheet_form::{self, Back};
use crate::visitor::Signed;
use crate::{PageError, links, progress, verdicts};
use commissioning::agenda::{self, Agenda};
use commissioning::judge::Judged;
use commissioning::procedure::{ItemKind, Phase, Step};
use commissioning::record::EntryPlace;
use maud::{Markup, html};

/// The page; `told` is a sentence about what was just recorded. `stays` is there where one stayed after recording: the
/// verdicts elsewhere that this brought about, as addresses carry them.
///
/// # Errors
/// Never for a step that is there.
pub fn page(
    signed: &Signed,
    at: &StepAt,
    back: &Back<'_>,
    told: Option<&str>,
    stays: Option<&str>,
) -> Result<Markup, PageError> {
    let (phase, step) = at.step()?;
    let agenda = agenda::of(&at.at.view());
    let judged = verdicts::at_step(&at.at.view(), step);
    let may = may_record(signed, &at.at) && agenda.step(&at.id).is_some();
    let inputs = Inputs { signed, at, step, back: *back, fixed: !may, said: false };
    let has_form = !items(&at.at, step).is_empty() || step.parameters.is_some();
    let wide = !step.rows.is_empty() || step.parameters.is_some();
    let body = html! {
        @if let Some(told) = told { (notice(told)) (sheet_form::faults(back.errors, "What you typed is still here.")) }
        @else { (sheet_form::summary(back.errors)) }
        @if let Some(brought) = stays.filter(|_| may) { (stay::outside(at, &agenda, &judged, brought)) }
        div.step.split[!judged.is_empty() && !wide].wide[wide] {
            section {
                (heading(at, phase, step, &agenda))
                (notices::all(signed, at, step, &agenda, may))
                @for words in &step.cautions { (caution(words)) }
                (limits(&judged))
                @if let Some(of) = sheet::of(step) { (sheet::summary(at, of, agenda.step(&at.id).map_or(&[][..], |(_, s)| &s.missing))) }
                @if has_form && may { (form(&inputs)) }
                @if has_form && !may { (as_words(&inputs)) }
                (charts_at(&drawing::charts::at(&at.at.view(), step), &step.id))
                @if !step.why.is_empty() { details.why { summary { "Why and how" } p { (step.why) } } }
            }
            @if !judged.is_empty() { aside.verdicts aria-label="Verdicts" { div data-live aria-live="polite" { (panels(&judged)) } } }
        }
    };
    let strip = progress::phase_strip(&at.at, &agenda, Some(&phase.id));
    Ok(Page::new(step.title.clone(), body)
        .own_heading()
        .plate(at.at.plate())
        .strip(strip)
        .actions(footer::bar(at, &agenda, may, has_form))
        .render(&signed.visitor))
}

fn heading(at: &StepAt, phase: &Phase, step: &Step, agenda: &Agenda) -> Markup {
    let place =
        agenda.step(&at.id).and_then(|(p, _)| Some((p.steps.iter().position(|s| s.id == at.id)? + 1, p.steps.len())));
    html! {
        p.where-in { (phase.title) @if let Some((n, of)) = place { " · " (n) " of " (of) } }
        h1 { (step.title) }
        p.instruction { (step.instruction) }
    }
}

/// What will be asked of the reading, before it is taken.
fn limits(judged: &[Judged]) -> Markup {
    let known: Vec<&Judged> = judged.iter().filter(|j| !j.outcome.limit.is_empty()).collect();
    let mut said: Vec<(&str, String)> = Vec::new();
    for j in known {
        if !said.iter().any(|(limit, _)| *limit == j.outcome.limit) {
            said.push((j.outcome.limit.as_str(), check_title(&j.outcome.check)));
        }
    }
    html! { @if !said.is_empty() { dl.limits { @for (limit, check) in said { div { dt { (check) } dd { (limit) } } } } } }
}

/// What stands at a step, for somebody who may not record here.
fn as_words(i: &Inputs<'_>) -> Markup {
    html! {
        div.as-words {
            @if let Some(group) = &i.step.parameters { (list::values(&i.at.at, group)) }
            (inputs::all(i))
        }
    }
}

/// Whether anything stands at the step, so that its form can overwrite it.
fn has_values(i: &Inputs<'_>) -> bool {
    let stands = |place: &EntryPlace| {
        i.at.at.drive.record.as_ref().and_then(|r| r.entries.get(place)).is_some_and(|slot| !slot.standing().is_empty())
    };
    i.step.items.iter().any(|item| places(i.step, item).any(|place| stands(&place)))
        || i.step.parameters.as_deref().is_some_and(|group| parameter_inputs::has_values(&i.at.at, group))
}

fn form(i: &Inputs<'_>) -> Markup {
    let (site, drive) = (i.at.at.site.tag.as_str(), i.at.at.drive.tag.as_str());
    let pictures = i.step.items.iter().any(|item| matches!(item.kind, ItemKind::Photo));
    html! {
        form method="post" action=(links::step(site, drive, &i.at.id)) id="step" enctype=[pictures.then_some("multipart/form-data")] data-judge=(links::step_live(site, drive, &i.at.id)) {
            (seal(&i.signed.visitor))
            @if let Some(group) = &i.step.parameters { (parameter_inputs::group(&i.at.at, group, &i.back)) }
            (inputs::all(i))
            (sheet_form::reason(&i.back, has_values(i)))
        }
    }
}

/// What the checks of a step say: the fragment that is replaced while typing.
#[must_use]
pub fn panels(judged: &[Judged]) -> Markup {
    verdict_panels(judged)
}
