//! The page behind every error: what happened, what is kept, the way forward, and a reference number where the log has more.

use crate::components::{self, Page};
use crate::page_error::PageError;
use crate::visitor::Visitor;
use crate::{App, links};
use axum::response::{IntoResponse, Response};
use maud::{Markup, html};

/// Renders it and logs what is the program's own fault, once.
#[must_use]
pub fn render(app: &App, visitor: &Visitor, fault: &PageError) -> Response {
    let reference = app.fresh().simple().to_string().chars().skip(20).collect::<String>();
    match fault {
        PageError::Broken { cause } => tracing::error!(%reference, %cause, "a page failed"),
        PageError::NotKnown | PageError::ReadOnly => tracing::warn!(%reference, %fault, "the store did not answer"),
        _ => {}
    }
    let (title, body) = words(visitor, fault, &reference);
    let page = Page::new(title, body).narrow().render(visitor);
    (fault.status(), page).into_response()
}

fn words(visitor: &Visitor, fault: &PageError, reference: &str) -> (&'static str, Markup) {
    let home = components::link_button(&links::home(), "Go to the start page");
    match fault {
        PageError::NotFound { what } => ("Not found", not_found(visitor, what)),
        PageError::SignInFirst { sign_in } => (
            "Sign in first",
            html! { p { "This page is for people who are signed in." } (components::link_button(sign_in, "Sign in")) },
        ),
        PageError::WrongMethod => ("Not here", html! { p { "This address does not take that request." } (home) }),
        PageError::NotAllowed { why } => (
            "Not yours to do",
            html! { p { (why) } p.quiet { "If it should be, ask an administrator to change what your account may do." } (home) },
        ),
        PageError::FormToken => (
            "The form was too old",
            html! {
                p { "This form was made before you signed in, or came from another page, so nothing was recorded." }
                p { "Go back, load the page again, and send it once more. What you typed is still in the form you came from." }
                (home)
            },
        ),
        PageError::BadForm { why } => (
            "The form could not be read",
            html! { p { (why) } p { "Nothing was recorded. Go back; what you typed is still there." } (home) },
        ),
        PageError::TooLarge { most } => (
            "Too large",
            html! { p { "More was sent than fits here: at most " (most) ". Nothing was recorded." } (home) },
        ),
        PageError::Fields { errors } => (
            "Some fields need attention",
            html! {
                p { "Nothing was recorded yet. Go back; what you typed is still there." }
                dl.faults { @for e in errors { dt { (e.label) } dd { (e.message) } } }
            },
        ),
        PageError::Stale { conflicts } => (
            "Somebody else changed this meanwhile",
            html! { p { "Go back and load the page again to see what stands now." } ul { @for c in conflicts { li { (c.label) } } } },
        ),
        PageError::NotNow { why } => ("Not at this point", html! { p { (why) } (home) }),
        PageError::OtherContent => (
            "Already sent",
            html! { p { "This form was already sent once, with other content. The first sending counts." } p { "Load the page again to see what is recorded, and enter the change there." } (home) },
        ),
        PageError::NotKnown => (
            "Not known yet",
            html! {
                p { "The disk did not confirm in time whether this was recorded. Send the same form again: if it was kept, it is not kept twice." }
                p.quiet { "Reference " code { (reference) } }
            },
        ),
        PageError::ReadOnly => (
            "Nothing can be recorded at present",
            html! {
                p { "The disk of the server refuses to write. Reading still works. Keep this form open and send it again later; tell whoever keeps the server." }
                p.quiet { "Reference " code { (reference) } }
            },
        ),
        PageError::Broken { .. } => (
            "Something broke here",
            html! {
                p { "This is a fault of the program, not of what you entered. Nothing half done was kept." }
                p { "Try again. If it happens again, give this reference to whoever keeps the server: " code { (reference) } }
                (home)
            },
        ),
    }
}

fn not_found(visitor: &Visitor, what: &str) -> Markup {
    html! {
        p { (what) " is not here. It may be spelt otherwise, or belong to another site." }
        @if visitor.person.is_some() {
            (components::search_box(""))
            p { a href=(links::sites()) { "See all sites" } " or " a href=(links::home()) { "go to the start page" } "." }
        } @else {
            (components::link_button(&links::home(), "Go to the start page"))
        }
    }
}
