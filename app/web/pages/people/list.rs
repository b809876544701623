//! Everyone who ever had an account, with what they may be and when they were last here.

use super::words;
use crate::components::{Page, link_button, main_link};
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use maud::{Markup, html};

/// Shows the list.
///
/// # Errors
/// When the store cannot be read.
pub async fn show(State(app): State<App>, signed: Signed) -> Result<Markup, PageError> {
    let accounts = app.store.accounts().await?;
    let body = html! {
        div.row { (main_link(&links::new_person(), "Add a person")) (link_button(&links::signers(), "Who can sign")) }
        div.scroll { table.list {
            thead { tr { th { "Name" } th { "Signs in as" } th { "Roles" } th { "Account" } th { "Last here" } } }
            tbody { @for row in &accounts { tr {
                td data-label="Name" { a href=(links::person(&row.person.login)) { (row.person.name) } }
                td data-label="Signs in as" { (row.person.login) }
                td data-label="Roles" { (words(&row.person.roles)) }
                td data-label="Account" { @if !row.person.active { "switched off" } @else if row.password_set.is_none() { "no password yet" } @else if row.signing_locked_until.is_some_and(|u| u > app.now()) { "signing locked" } @else { "works" } }
                td data-label="Last here" { @match row.last_sign_in { Some(then) => { (then.shown()) " UTC" }, None => "never" } }
            } } }
        } }
    };
    Ok(Page::new("People", body).render(&signed.visitor))
}
