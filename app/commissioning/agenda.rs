//! What is next: which steps apply, which are settled, which phases wait and for what.

mod hold;
mod parameters;
pub(crate) mod step_parts;
#[cfg(test)]
mod tests;
mod trouble;
mod unanswered;

pub use hold::unmet_of;
pub(crate) use hold::{counts, newest};
pub use parameters::{Difference, differs, left_of_group};
pub use trouble::with_outcomes;
pub use unanswered::{Unanswered, unanswered};

use crate::judge::View;
use crate::procedure::applies;
use crate::record::Release;

/// The whole procedure as it stands for one drive.
#[derive(Clone, Debug, PartialEq)]
pub struct Agenda {
    /// Phases in order.
    pub phases: Vec<PhaseAgenda>,
}

/// A phase as it stands.
#[derive(Clone, Debug, PartialEq)]
pub struct PhaseAgenda {
    /// Identifier.
    pub id: String,
    /// Full title.
    pub title: String,
    /// One word.
    pub short: String,
    /// Its hold point, if it has one.
    pub hold: Option<HoldAgenda>,
    /// An earlier phase whose hold point is not released: this one stands behind it too.
    pub behind: Option<String>,
    /// The steps that apply, in order.
    pub steps: Vec<StepAgenda>,
    /// A finding that stops start-up is open at one of its steps, or a verdict there is outside: a strip draws such a
    /// phase differently, settled or not. Outside verdicts count only in an agenda of [`with_outcomes`], since `of`
    /// judges nothing.
    pub troubled: bool,
}

/// A hold point as it stands.
#[derive(Clone, Debug, PartialEq)]
pub struct HoldAgenda {
    /// What it guards.
    pub title: String,
    /// What it waits for, a sentence each; also what was true at its release and no longer is.
    pub unmet: Vec<String>,
    /// By whom it was released.
    pub released: Option<Release>,
    /// Released, and nothing that must keep holding is broken.
    pub open: bool,
}

/// A step as it stands.
#[derive(Clone, Debug, PartialEq)]
pub struct StepAgenda {
    /// Identifier.
    pub id: String,
    /// What it is.
    pub title: String,
    /// Where it stands.
    pub state: StepState,
    /// Labels of what is still to be entered.
    pub missing: Vec<String>,
    /// Hands inside, and isolation is not in force.
    pub waits_for_isolation: bool,
}

/// Where a step stands.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum StepState {
    /// Nothing entered.
    Open,
    /// Something entered, something missing.
    Begun,
    /// All entered.
    Settled,
    /// Does not apply here, for this reason.
    NotApplicable(String),
    /// Could not be done, for this reason.
    CouldNotBeDone(String),
}

/// The agenda of a drive.
#[must_use]
pub fn of(view: &View<'_>) -> Agenda {
    let flags = view.flags();
    let mut agenda = Agenda { phases: Vec::new() };
    for phase in &view.procedure.phases {
        let applying = phase.steps.iter().filter(|s| applies(&s.when, &flags));
        agenda.phases.push(PhaseAgenda {
            id: phase.id.clone(),
            title: phase.title.clone(),
            short: phase.short.clone(),
            hold: None,
            behind: None,
            steps: applying.map(|s| step_parts::of(view, s, &flags)).collect(),
            troubled: trouble::stopped(view, phase),
        });
    }
    // Hold points ask how other phases stand, so that every step comes first.
    let holds: Vec<_> = view.procedure.phases.iter().map(|p| hold::of(view, p, &agenda)).collect();
    for (phase, hold) in agenda.phases.iter_mut().zip(holds) {
        phase.hold = hold;
    }
    let mut closed: Option<String> = None;
    for phase in &mut agenda.phases {
        phase.behind.clone_from(&closed);
        if closed.is_none() && phase.hold.as_ref().is_some_and(|h| h.released.is_none()) {
            closed = Some(phase.title.clone());
        }
    }
    agenda
}

impl StepState {
    /// Whether nothing more is asked here.
    #[must_use]
    pub const fn is_settled(&self) -> bool {
        matches!(self, Self::Settled | Self::NotApplicable(_) | Self::CouldNotBeDone(_))
    }
}

impl PhaseAgenda {
    /// How many steps are still to be settled.
    #[must_use]
    pub fn left(&self) -> usize {
        self.steps.iter().filter(|s| !s.state.is_settled()).count()
    }

    /// How many steps are settled.
    #[must_use]
    pub fn settled(&self) -> usize {
        self.steps.len() - self.left()
    }

    /// Whether its work may go ahead.
    #[must_use]
    pub fn open(&self) -> bool {
        self.behind.is_none() && self.hold.as_ref().is_none_or(|h| h.open)
    }
}

impl Agenda {
    /// The first step that is not settled in an open phase.
    #[must_use]
    pub fn next(&self) -> Option<&StepAgenda> {
        self.phases.iter().filter(|p| p.open()).flat_map(|p| &p.steps).find(|s| !s.state.is_settled())
    }

    /// The step of this id with its phase; `None` when it does not apply.
    #[must_use]
    pub fn step(&self, id: &str) -> Option<(&PhaseAgenda, &StepAgenda)> {
        self.phases.iter().flat_map(|p| p.steps.iter().map(move |s| (p, s))).find(|(_, s)| s.id == id)
    }

    /// Whether every step that applies is settled.
    #[must_use]
    pub fn complete(&self) -> bool {
        self.left() == 0
    }

    /// How many steps are still to be settled.
    #[must_use]
    pub fn left(&self) -> usize {
        self.phases.iter().map(PhaseAgenda::left).sum()
    }
}
