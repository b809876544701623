//! Every site, with how its drives stand.

use crate::components::{Page, empty, main_link};
use crate::pages::home::card;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use commissioning::people::Role;
use maud::{Markup, html};

/// Shows the list.
///
/// # Errors
/// When the store cannot be read.
pub async fn show(State(app): State<App>, signed: Signed) -> Result<Markup, PageError> {
    let sites = app.store.sites().await?;
    let keeper = signed.visitor.is_any(&[Role::Engineer, Role::Supervisor, Role::Administrator]);
    let add = || html! { @if keeper { (main_link(&links::new_site(), "Create a site")) } };
    let body = html! {
        @if sites.is_empty() { (empty("No site yet", "A site holds its supply and its drives. Create the first one, then add its drives.", add())) }
        @else { ul.cards { @for site in &sites { li { (card(site)) } } } div.row { (add()) } }
    };
    Ok(Page::new("Sites", body).render(&signed.visitor))
}
