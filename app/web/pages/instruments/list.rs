//! Every instrument, those whose calibration ran out first to be seen.

use crate::components::{Page, empty, main_link};
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use commissioning::people::{Instrument, Role};
use maud::{Markup, html};

/// Shows the list.
///
/// # Errors
/// When the store cannot be read.
pub async fn show(State(app): State<App>, signed: Signed) -> Result<Markup, PageError> {
    let installation = app.store.installation().await?;
    let today = app.now().date();
    let mut instruments: Vec<&Instrument> = installation.instruments.values().collect();
    instruments.sort_by(|a, b| (!a.active, &a.mark).cmp(&(!b.active, &b.mark)));
    let keeper = signed.visitor.is_any(&[Role::Engineer, Role::Supervisor, Role::Administrator]);
    let add = || html! { @if keeper { (main_link(&links::new_instrument(), "Add an instrument")) } };
    let body = html! {
        p.lead { "A verdict knows its instrument: a reading that the instrument cannot tell from the limit is marginal, not a pass." }
        @if instruments.is_empty() { (empty("No instrument yet", "Readings without a named instrument can be marginal at best. Add them here, with their accuracy.", add())) }
        @else {
            div.row { (add()) }
            div.scroll { table.list {
                thead { tr { th { "Mark" } th { "What it is" } th { "Serial number" } th { "Calibration due" } th { "Accuracy entered for" } } }
                tbody { @for i in instruments { tr.away[!i.active] {
                    td data-label="Mark" { a href=(links::instrument(i.id)) { (i.mark) } @if !i.active { " (put away)" } }
                    td data-label="What it is" { (i.description) }
                    td data-label="Serial number" { (i.serial) }
                    td data-label="Calibration due" { (due(&i.due, &today)) }
                    td data-label="Accuracy entered for" { @if i.accuracy.is_empty() { "nothing yet" } @else { (i.accuracy.iter().map(|a| a.kind.words()).collect::<Vec<_>>().join(", ")) } }
                } } }
            } }
        }
    };
    Ok(Page::new("Instruments", body).render(&signed.visitor))
}

fn due(due: &str, today: &str) -> Markup {
    html! {
        @if due.is_empty() { "never calibrated" }
        @else if due < today { strong { (due) " · ran out" } }
        @else { (due) }
    }
}
