//! Lifts the lock that three wrong passwords at signing put on a person.

use super::edit::AccountAt;
use crate::posted::Posted;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::response::Redirect;

/// Lifts it.
///
/// # Errors
/// When the store cannot keep it.
pub async fn make(State(app): State<App>, AccountAt(account): AccountAt, _: Posted) -> Result<Redirect, PageError> {
    app.store.unlock_signing(account.person.id).await?;
    Ok(Redirect::to(&links::person(&account.person.login)))
}
