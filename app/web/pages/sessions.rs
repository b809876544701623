//! Coming and going: set-up, sign-in, sign-out, invitations, passwords, the theme.

pub mod invitation;
pub mod password;
pub mod set_up;
pub mod sign_in;
pub mod sign_out;
pub mod theme;

use commissioning::FieldError;
use store::PasswordFault;

/// A refused password, as an error at the field it was typed in.
///
/// # Errors
/// What is no fault of the password.
pub fn password_error(fault: PasswordFault, field: &str) -> Result<FieldError, crate::PageError> {
    if let PasswordFault::Storage(cause) = fault {
        return Err(crate::PageError::broken(cause));
    }
    let message = fault.to_string();
    Ok(FieldError { field: field.to_owned(), label: "Password".to_owned(), message })
}

/// The two inputs of a new password.
#[must_use]
pub fn new_password_fields(posted: &crate::posted::Posted, errors: &[FieldError]) -> maud::Markup {
    use crate::components::{FieldInput, InputKind, field};
    let input = |name: &str, label: &str| {
        FieldInput::new(name, label, InputKind::Html("password"))
            .autocomplete("new-password")
            .needed()
            .sent_back(posted, errors)
    };
    maud::html! {
        (field(&input("new", "New password").hint("At least 12 characters; several words do well.")))
        (field(&input("again", "The same once more")))
    }
}

/// An error when the two do not agree.
#[must_use]
pub fn unlike(posted: &crate::posted::Posted) -> Option<FieldError> {
    (posted.text("new") != posted.text("again")).then(|| FieldError {
        field: "again".to_owned(),
        label: "The same once more".to_owned(),
        message: "The two passwords are not the same. Type both again.".to_owned(),
    })
}
