//! Where the work stands: what comes next, and the phase strip that stands on every page of a record.

use crate::components::{StripCell, strip};
use crate::extract::DriveAt;
use crate::{links, verdicts};
use commissioning::agenda::{Agenda, PhaseAgenda, StepAgenda};
use commissioning::judge::Judged;
use commissioning::record::Severity;
use engineering::Verdict;
use maud::{Markup, html};

/// What comes next.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Next {
    /// A step.
    Step {
        /// Its id.
        id: String,
        /// Its title.
        title: String,
    },
    /// A hold point.
    Hold {
        /// The phase behind it.
        phase: String,
        /// What it guards.
        title: String,
        /// Nothing is left to wait for but its release.
        ready: bool,
    },
    /// Everything is settled: the signature.
    Signature,
}

impl Next {
    /// The address to go to.
    #[must_use]
    pub fn address(&self, site: &str, drive: &str) -> String {
        match self {
            Self::Step { id, .. } => links::step(site, drive, id),
            Self::Hold { phase, .. } => links::hold(site, drive, phase),
            Self::Signature => links::sign(site, drive),
        }
    }

    /// What it is, for a button.
    #[must_use]
    pub fn words(&self) -> String {
        match self {
            Self::Step { title, .. } => title.clone(),
            Self::Hold { title, ready: true, .. } => format!("Hold point: {title}"),
            Self::Hold { title, ready: false, .. } => format!("Hold point waits: {title}"),
            Self::Signature => "All steps are settled: sign".to_owned(),
        }
    }
}

fn step(step: &StepAgenda) -> Next {
    Next::Step { id: step.id.clone(), title: step.title.clone() }
}

fn hold(phase: &PhaseAgenda) -> Next {
    let hold = phase.hold.as_ref();
    Next::Hold {
        phase: phase.id.clone(),
        title: hold.map(|h| h.title.clone()).unwrap_or_default(),
        ready: hold.is_some_and(|h| h.unmet.is_empty()),
    }
}

/// What comes next of all: the first unsettled step of the first phase that is open, or the hold point before it as
/// soon as only its release is missing.
#[must_use]
pub fn next(agenda: &Agenda) -> Next {
    let mut waits = None;
    for phase in agenda.phases.iter().filter(|p| p.left() > 0) {
        match phase.steps.iter().find(|s| !s.state.is_settled()) {
            Some(first) if phase.open() => return step(first),
            _ => {}
        }
        let here = hold(phase);
        if matches!(here, Next::Hold { ready: true, .. }) {
            return here;
        }
        waits.get_or_insert(here);
    }
    waits.unwrap_or(Next::Signature)
}

/// What comes after a step: the next unsettled one of its phase, then one before it there, then the next phase that has
/// any left, through its hold point; whatever comes next of all where nothing is left from here on. That holds out of
/// order too: who works ahead is not sent back to where the others are.
#[must_use]
pub fn after(agenda: &Agenda, id: &str) -> Next {
    let Some(here) = agenda.phases.iter().position(|p| p.steps.iter().any(|s| s.id == id)) else { return next(agenda) };
    let mut phases = agenda.phases.iter().skip(here);
    let own = phases.next().map(|p| p.steps.as_slice()).unwrap_or_default();
    let (earlier, later) = own.split_at(own.iter().position(|s| s.id == id).unwrap_or_default());
    let rest = later.iter().skip(1).chain(earlier).find(|s| !s.state.is_settled());
    rest.map(step).or_else(|| phases.find_map(first_of)).unwrap_or_else(|| next(agenda))
}

/// Where a phase that has anything left is entered: its hold point while that is closed, else its first unsettled step.
fn first_of(phase: &PhaseAgenda) -> Option<Next> {
    let first = phase.steps.iter().find(|s| !s.state.is_settled())?;
    Some(if phase.hold.as_ref().is_some_and(|h| !h.open) { hold(phase) } else { step(first) })
}

/// The step before this one in the order of the procedure.
#[must_use]
pub fn before<'a>(agenda: &'a Agenda, id: &str) -> Option<&'a StepAgenda> {
    let steps: Vec<&StepAgenda> = agenda.phases.iter().flat_map(|p| &p.steps).collect();
    let at = steps.iter().position(|s| s.id == id)?;
    at.checked_sub(1).and_then(|n| steps.get(n).copied())
}

/// Whether the hold point before a phase holds up work.
#[must_use]
pub fn waits(phase: &PhaseAgenda) -> bool {
    !phase.open() && phase.left() > 0
}

/// Where a tap on a phase leads: its hold point while that waits, its first unsettled step, or its first one.
#[must_use]
pub fn entrance(phase: &PhaseAgenda, site: &str, drive: &str) -> String {
    if waits(phase) {
        return links::hold(site, drive, &phase.id);
    }
    let first = phase.steps.iter().find(|s| !s.state.is_settled()).or(phase.steps.first());
    first.map_or_else(|| links::drive(site, drive), |s| links::step(site, drive, &s.id))
}

/// What keeps a settled phase from being a clean one: something outside at one of its steps, or an open finding there
/// that stops start-up; a shape and its word.
#[must_use]
pub fn trouble(at: &DriveAt, phase: &PhaseAgenda, judged: &[Judged]) -> Option<(&'static str, &'static str)> {
    let here = |step: &str| phase.steps.iter().any(|s| s.id == step);
    if judged.iter().any(|j| j.outcome.verdict == Verdict::Outside && here(&j.step)) {
        return Some((Verdict::Outside.shape(), Verdict::Outside.words()));
    }
    let mut findings = at.drive.record.iter().flat_map(|r| r.findings.values());
    let stops =
        findings.any(|f| f.is_open() && f.severity == Severity::StopsStartUp && f.step.as_deref().is_some_and(here));
    stops.then_some(("!", Severity::StopsStartUp.words()))
}

/// The phase strip; nothing before the record is begun.
#[must_use]
pub fn phase_strip(at: &DriveAt, agenda: &Agenda, now: Option<&str>) -> Markup {
    if at.drive.record.is_none() {
        return html! {};
    }
    let judged = verdicts::all(&at.view());
    let cells: Vec<StripCell> = agenda
        .phases
        .iter()
        .map(|phase| StripCell {
            short: phase.short.clone(),
            title: phase.title.clone(),
            address: entrance(phase, &at.site.tag, &at.drive.tag),
            left: phase.left(),
            waits: waits(phase),
            trouble: trouble(at, phase, &judged),
            now: now == Some(phase.id.as_str()),
        })
        .collect();
    strip(&cells)
}
