//! The bar at the foot of a step: back, settle otherwise, record and go on.

use super::at::StepAt;
use crate::components::{link_button, main_link};
use crate::{links, progress};
use commissioning::agenda::Agenda;
use maud::{Markup, html};

/// The bar. `has_form` tells whether there is anything to record on this screen.
#[must_use]
pub fn bar(at: &StepAt, agenda: &Agenda, may: bool, has_form: bool) -> Markup {
    let (site, drive) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str());
    let back =
        progress::before(agenda, &at.id).map_or_else(|| links::drive(site, drive), |s| links::step(site, drive, &s.id));
    let here = agenda.step(&at.id);
    let unsettled = here.is_some_and(|(_, s)| !s.state.is_settled());
    html! {
        (link_button(&back, "Back"))
        @if may && unsettled {
            (link_button(&links::otherwise(site, drive, &at.id, "could-not-be-done"), "Could not be done …"))
            (link_button(&links::otherwise(site, drive, &at.id, "not-applicable"), "Does not apply …"))
        }
        @if may && has_form && here.is_some() { button.b.go type="submit" form="step" { "Record and go on" } }
        @else { (main_link(&progress::after(agenda, &at.id).address(site, drive), "Go on")) }
    }
}
