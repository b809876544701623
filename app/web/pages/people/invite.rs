//! Makes a one-time code and shows it once, on the answer itself: it is in no address and no log.

use super::edit::{AccountAt, page};
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError};
use axum::extract::State;
use maud::Markup;

/// Makes it.
///
/// # Errors
/// When the store cannot keep it, or the account is switched off.
pub async fn make(
    State(app): State<App>,
    signed: Signed,
    AccountAt(account): AccountAt,
    _: Posted,
) -> Result<Markup, PageError> {
    if !account.person.active {
        return Err(PageError::NotNow { why: "This account is switched off. Switch it on first.".to_owned() });
    }
    let code = app.store.invite(account.person.id, Some(signed.person.id), app.now()).await?;
    Ok(page(&app, &signed, &account, &Posted::default(), &[], Some(&code)))
}
