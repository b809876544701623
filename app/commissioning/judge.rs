//! Which check takes which entries: from a drive's fields, entries and parameters to the catalogue's outcomes.

mod cable;
pub mod catalogue;
mod drive_train;
pub mod motion;
mod nameplate;
mod runs;
mod settings;
mod supply;
mod take;
#[cfg(test)]
mod tests;
mod windings;

use crate::agenda::{Agenda, StepState};
use crate::plant::{Sheet, Site, flags_of};
use crate::procedure::{Procedure, applies};
use crate::record::{Drive, ParameterColumn};
pub use cable::harmonic_limits;
use engineering::{Outcome, Verdict};
use serde::{Deserialize, Serialize};
use std::collections::BTreeSet;

/// A check's outcome for one thing it was run for.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Judged {
    /// The step it is shown at; empty for nameplate checks.
    pub step: String,
    /// What it was run for, where a check runs more than once: "50 %", "as left", "rating column 2".
    #[serde(default)]
    pub of: String,
    /// What it says.
    pub outcome: Outcome,
}

/// Everything a check may look at.
#[derive(Clone, Copy, Debug)]
pub struct View<'a> {
    /// The drive with its record.
    pub drive: &'a Drive,
    /// Its site: supply and site rules.
    pub site: &'a Site,
    /// The procedure of its record, or the newest.
    pub procedure: &'a Procedure,
}

impl View<'_> {
    /// Fitted options of the drive, and those of the site's supply where the drive has no value of its own.
    #[must_use]
    pub fn flags(&self) -> BTreeSet<String> {
        let mut fields = self.drive.fields.clone();
        for (place, slot) in &self.site.fields {
            let own = fields.get(place).and_then(|s| s.current()).is_some_and(|r| r.value.is_some());
            if place.sheet == Sheet::Supply && !own {
                fields.insert(place.clone(), slot.clone());
            }
        }
        flags_of(&fields)
    }
}

/// What a check said for each thing it was run for: "50 %", "as left"; empty where it runs once.
type Runs = Vec<(String, Outcome)>;

/// A check that runs once.
fn once(outcome: Outcome) -> Runs {
    vec![(String::new(), outcome)]
}

/// Runs a check for every row of a table in which the item was entered; once, for its limit, while none was.
fn per_row(view: &View<'_>, item: &str, run: impl Fn(u16) -> Outcome) -> Runs {
    let rows = view.rows_of(item);
    let entered: Runs = (0u16..)
        .zip(rows)
        .filter(|(row, _)| view.entry(item, *row).is_some())
        .map(|(row, label)| (label, run(row)))
        .collect();
    if entered.is_empty() { once(run(0)) } else { entered }
}

/// Runs a settings check for what is intended and, once anything it reads was left, for what was left.
fn both_columns(view: &View<'_>, functions: &[&str], run: impl Fn(ParameterColumn) -> Outcome) -> Runs {
    let stands = |column| functions.iter().any(|f| view.parameter(f, column).is_some());
    let mut runs = Vec::new();
    for column in [ParameterColumn::Intended, ParameterColumn::AsLeft] {
        if stands(column) {
            runs.push((column.words().to_owned(), run(column)));
        }
    }
    if runs.is_empty() {
        runs.push((ParameterColumn::Intended.words().to_owned(), run(ParameterColumn::Intended)));
    }
    runs
}

/// Runs one check of the catalogue as shown at a step.
pub(crate) fn run(view: &View<'_>, name: &str, step: &str) -> Vec<Judged> {
    let Some((.., runner)) = catalogue::CATALOGUE.iter().find(|(known, ..)| *known == name) else {
        return Vec::new();
    };
    let (mut runs, column_asked) = take::noting_column(|| match runner {
        catalogue::Runner::Anywhere(run) => run(view),
        catalogue::Runner::AtStep(run) => run(view, step),
    });
    if column_asked && view.column_is_assumed() {
        for (_, outcome) in &mut runs {
            outcome.assumed.push(engineering::outcome::Assumption {
                what: "rating column in use".to_owned(),
                taken: "column 1, the first; the plate has several, and the motor sheet does not say which".to_owned(),
            });
        }
    }
    runs.into_iter().map(|(of, outcome)| Judged { step: step.to_owned(), of, outcome }).collect()
}

fn group(view: &View<'_>, group: catalogue::Group) -> Vec<Judged> {
    catalogue::CATALOGUE.iter().filter(|(_, _, g, _)| *g == group).flat_map(|(name, ..)| run(view, name, "")).collect()
}

/// All checks of a drive with their outcomes, in the order of the procedure. A check that says the same at several
/// steps is listed at the first of them; one that no applicable step shows is listed with the nameplates, before all.
#[must_use]
pub fn all(view: &View<'_>) -> Vec<Judged> {
    let flags = view.flags();
    let mut judged: Vec<Judged> = Vec::new();
    let mut ran: BTreeSet<&str> = BTreeSet::new();
    for (_, step) in view.procedure.steps().filter(|(_, s)| applies(&s.when, &flags)) {
        for name in &step.checks {
            // One that is the same wherever it is shown would only be worked out again to be left out below.
            if !ran.insert(name) && is_the_same_anywhere(name) {
                continue;
            }
            let fresh = run(view, name, &step.id);
            let new = |one: &Judged| !judged.iter().any(|j| j.of == one.of && j.outcome == one.outcome);
            let fresh: Vec<Judged> = fresh.into_iter().filter(new).collect();
            judged.extend(fresh);
        }
    }
    let mut unshown = plates(view);
    unshown.retain(|p| !judged.iter().any(|j| j.outcome.check == p.outcome.check));
    unshown.extend(judged);
    unshown
}

fn is_the_same_anywhere(name: &str) -> bool {
    let runner = catalogue::CATALOGUE.iter().find(|(known, ..)| *known == name).map(|(.., runner)| runner);
    matches!(runner, Some(catalogue::Runner::Anywhere(_)))
}

/// One check of the catalogue, as shown at the first step that has it.
#[must_use]
pub fn one(view: &View<'_>, name: &str) -> Vec<Judged> {
    let at = view.procedure.steps().find(|(_, s)| s.checks.iter().any(|c| c == name));
    run(view, name, at.map_or("", |(_, s)| s.id.as_str()))
}

/// The checks shown at a step.
#[must_use]
pub fn step(view: &View<'_>, step: &str) -> Vec<Judged> {
    let Some((_, found)) = view.procedure.step(step) else { return Vec::new() };
    found.checks.iter().flat_map(|name| run(view, name, &found.id)).collect()
}

/// The checks of the nameplates and sheets.
#[must_use]
pub fn plates(view: &View<'_>) -> Vec<Judged> {
    group(view, catalogue::Group::Plate)
}

/// The checks of the parameter record; `of` tells which column.
#[must_use]
pub fn parameters(view: &View<'_>) -> Vec<Judged> {
    group(view, catalogue::Group::Setting)
}

/// Leaves out what is not assessed only because its step was not reached yet: what lists and boards count.
#[must_use]
pub fn reached(mut judged: Vec<Judged>, agenda: &Agenda) -> Vec<Judged> {
    let begun = |step: &str| agenda.step(step).is_some_and(|(_, s)| s.state != StepState::Open);
    judged.retain(|j| j.outcome.verdict != Verdict::NotAssessed || begun(&j.step));
    judged
}

/// How many outcomes there are of each verdict.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Counts {
    /// Within.
    pub within: usize,
    /// Marginal.
    pub marginal: usize,
    /// Outside.
    pub outside: usize,
    /// Not assessed.
    pub not_assessed: usize,
    /// Figures, which have no verdict.
    pub figure: usize,
}

impl Counts {
    /// Counts these.
    #[must_use]
    pub fn of(judged: &[Judged]) -> Self {
        let mut counts = Self::default();
        for one in judged {
            match one.outcome.verdict {
                Verdict::Within => counts.within += 1,
                Verdict::Marginal => counts.marginal += 1,
                Verdict::Outside => counts.outside += 1,
                Verdict::NotAssessed => counts.not_assessed += 1,
                Verdict::Figure => counts.figure += 1,
            }
        }
        counts
    }
}
