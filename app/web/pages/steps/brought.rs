//! What a record made outside at other steps: found by comparing before and after, carried by the address, said by name.

use super::at::StepAt;
use crate::components::check_title;
use crate::links;
use commissioning::judge::{self, Judged, View};
use commissioning::plant::Sheet;
use engineering::Verdict;
use maud::{Markup, html};

/// As an address carries a verdict: nobody can make it say what does not stand, since only what is outside is shown.
fn name(judged: &Judged) -> String {
    format!("{}~{}", judged.outcome.check, judged.step)
}

/// What is outside after and was not before, other than what the step `here` itself shows.
#[must_use]
pub fn of(before: &View<'_>, after: &View<'_>, here: &str) -> String {
    let (was, own) = (judge::all(before), judge::step(after, here));
    let outside = |j: &Judged| j.outcome.verdict == Verdict::Outside;
    let stood = |j: &Judged| was.iter().any(|w| outside(w) && w.of == j.of && name(w) == name(j));
    let shown = |j: &Judged| j.step == here || own.iter().any(|o| o.of == j.of && o.outcome == j.outcome);
    let mut new: Vec<String> =
        judge::all(after).iter().filter(|j| outside(j) && !stood(j) && !shown(j)).map(name).collect();
    new.dedup();
    new.join(",")
}

/// Those of them that are outside still, each with a link to where it is shown.
#[must_use]
pub fn list(at: &StepAt, brought: &str) -> Markup {
    if brought.is_empty() {
        return html! {};
    }
    let (site, drive) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str());
    let named: Vec<&str> = brought.split(',').collect();
    let mut judged = judge::all(&at.at.view());
    judged.retain(|j| j.outcome.verdict == Verdict::Outside && named.contains(&name(j).as_str()));
    let address = |j: &Judged| match j.step.as_str() {
        "" => links::sheet(site, drive, Sheet::Motor),
        step => links::step(site, drive, step),
    };
    let place = |j: &Judged| match at.at.procedure.step(&j.step) {
        Some((_, step)) => format!(" at “{}”", step.title),
        None => " on the plates".to_owned(),
    };
    html! {
        @if !judged.is_empty() {
            p { b { "With what was just recorded this is outside now, elsewhere:" } }
            ul { @for j in &judged { li { a href=(address(j)) { (check_title(&j.outcome.check)) @if !j.of.is_empty() { " · " (j.of) } (place(j)) } ": " (j.outcome.summary) } } }
        }
    }
}
