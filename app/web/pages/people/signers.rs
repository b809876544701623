//! Who can sign what, since when, and when they were last here (integrity E22).

use super::codes;
use crate::components::{Page, empty};
use crate::visitor::Signed;
use crate::{App, PageError};
use axum::extract::State;
use commissioning::people::Role;
use commissioning::record::Meaning;
use maud::{Markup, html};

/// Shows the list.
///
/// # Errors
/// When the store cannot be read.
pub async fn show(State(app): State<App>, signed: Signed) -> Result<Markup, PageError> {
    let accounts = app.store.accounts().await?;
    let signers: Vec<_> =
        accounts.iter().filter(|a| a.person.is(Role::Engineer) || a.person.is(Role::Supervisor)).collect();
    let body = html! {
        p.lead { "A signature shows the printed name, the moment and its meaning, and asks for the password each time. Whoever holds a one-time code can set a new password and sign under that name: every code is listed here with who made it. Whoever entered something in a record cannot accept it." }
        @if signers.is_empty() { (empty("Nobody can sign yet", "An administrator adds startup engineers and supervisors under People.", html! {})) }
        @else {
            div.scroll { table.list {
                thead { tr { th { "Name" } th { "May sign" } th { "Able since" } th { "Last here" } th { "One-time codes" } } }
                tbody { @for row in &signers { tr {
                    td data-label="Name" { (row.person.name) }
                    td data-label="May sign" {
                        @if row.person.is(Role::Engineer) { "“" (Meaning::Performed.words()) "”" }
                        @if row.person.is(Role::Engineer) && row.person.is(Role::Supervisor) { ", " }
                        @if row.person.is(Role::Supervisor) { "“" (Meaning::Accepted.words()) "”" }
                    }
                    td data-label="Able since" { @match row.password_set { Some(t) => { (t.shown()) " UTC" }, None => "not yet: no password set" } }
                    td data-label="Last here" {
                        @match row.last_sign_in { Some(t) => { (t.shown()) " UTC" }, None => "never" }
                        @if row.signing_locked_until.is_some_and(|u| u > app.now()) { " · signing locked" }
                    }
                    td data-label="One-time codes" { @if row.codes.is_empty() { "none" } @for code in &row.codes { p { (codes::words(code)) } } }
                } } }
            } }
        }
    };
    Ok(Page::new("Who can sign", body).render(&signed.visitor))
}
