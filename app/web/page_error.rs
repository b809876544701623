//! What can go wrong between a request and its page: one error, one status each, a way forward for every one.

use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::{Conflict, FieldError, Refusal};
use std::sync::Arc;
use store::{PerformFault, ReadFault};

/// What can go wrong.
#[derive(Debug, thiserror::Error)]
pub enum PageError {
    /// Nobody is signed in; answered with the sign-in page.
    #[error("sign in first")]
    SignInFirst {
        /// Address of the sign-in page, with the way back.
        sign_in: String,
    },
    /// No such page, site, drive, step.
    #[error("{what} is not here")]
    NotFound {
        /// What, as a sentence's beginning: "A drive with the tag “FN-9”".
        what: String,
    },
    /// The address exists, but not for this method.
    #[error("this address does not take that request")]
    WrongMethod,
    /// Not by this person.
    #[error("{why}")]
    NotAllowed {
        /// In a sentence.
        why: String,
    },
    /// The form came from elsewhere, or is older than the session.
    #[error("the form's token is not this session's")]
    FormToken,
    /// The form cannot be read.
    #[error("{why}")]
    BadForm {
        /// In a sentence.
        why: String,
    },
    /// More than the address takes.
    #[error("more was sent than this address takes (at most {most})")]
    TooLarge {
        /// "1 MB".
        most: &'static str,
    },
    /// Fields are wrong. Pages with a form show these at the fields; here they are listed.
    #[error("{} field(s) need attention", errors.len())]
    Fields {
        /// Each field's error.
        errors: Vec<FieldError>,
    },
    /// Somebody else changed a field meanwhile. Pages with a form answer with the conflict page.
    #[error("somebody else changed {} field(s) meanwhile", conflicts.len())]
    Stale {
        /// Mine and theirs.
        conflicts: Vec<Conflict>,
    },
    /// Not in this state of things.
    #[error("{why}")]
    NotNow {
        /// In a sentence, with what to do first.
        why: String,
    },
    /// The same act id with other content.
    #[error("this form was already sent with other content")]
    OtherContent,
    /// The store cannot say whether it is kept.
    #[error("it is not known yet whether this was recorded")]
    NotKnown,
    /// The store takes no writing at present.
    #[error("nothing can be recorded at present")]
    ReadOnly,
    /// A fault of the program.
    #[error("{cause}")]
    Broken {
        /// For the log, never for the page.
        cause: String,
    },
}

impl PageError {
    /// A fault of the program, for the log.
    pub fn broken(cause: impl ToString) -> Self {
        Self::Broken { cause: cause.to_string() }
    }

    /// Something that is not here.
    pub fn not_found(what: impl Into<String>) -> Self {
        Self::NotFound { what: what.into() }
    }

    /// The status each is answered with.
    #[must_use]
    pub const fn status(&self) -> StatusCode {
        match self {
            Self::SignInFirst { .. } => StatusCode::SEE_OTHER,
            Self::NotFound { .. } => StatusCode::NOT_FOUND,
            Self::WrongMethod => StatusCode::METHOD_NOT_ALLOWED,
            Self::NotAllowed { .. } | Self::FormToken => StatusCode::FORBIDDEN,
            Self::BadForm { .. } => StatusCode::BAD_REQUEST,
            Self::TooLarge { .. } => StatusCode::PAYLOAD_TOO_LARGE,
            Self::Fields { .. } | Self::OtherContent => StatusCode::UNPROCESSABLE_ENTITY,
            Self::Stale { .. } => StatusCode::PRECONDITION_FAILED,
            Self::NotNow { .. } => StatusCode::CONFLICT,
            Self::NotKnown | Self::ReadOnly => StatusCode::SERVICE_UNAVAILABLE,
            Self::Broken { .. } => StatusCode::INTERNAL_SERVER_ERROR,
        }
    }
}

impl From<Refusal> for PageError {
    fn from(refusal: Refusal) -> Self {
        match refusal {
            Refusal::Fields { errors } => Self::Fields { errors },
            Refusal::Stale { conflicts } => Self::Stale { conflicts },
            Refusal::NotAllowed { why } => Self::NotAllowed { why },
            Refusal::NotNow { why } => Self::NotNow { why },
            Refusal::Unknown { what } => Self::NotFound { what },
        }
    }
}

impl From<PerformFault> for PageError {
    fn from(fault: PerformFault) -> Self {
        match fault {
            PerformFault::Refused(refusal) => refusal.into(),
            PerformFault::OtherContent => Self::OtherContent,
            PerformFault::Unknown => Self::NotKnown,
            PerformFault::ReadOnly => Self::ReadOnly,
            PerformFault::Broken(cause) => Self::Broken { cause },
        }
    }
}

impl From<ReadFault> for PageError {
    fn from(fault: ReadFault) -> Self {
        Self::broken(fault)
    }
}

/// The page is rendered on the way out by [`crate::visitor::recognise`], which knows who asked.
impl IntoResponse for PageError {
    fn into_response(self) -> Response {
        if let Self::SignInFirst { sign_in } = &self {
            return Redirect::to(sign_in).into_response();
        }
        let mut response = self.status().into_response();
        response.extensions_mut().insert(Arc::new(self));
        response
    }
}
