//! People: who has an account, what they may be, who can sign.

pub mod codes;
pub mod create;
pub mod edit;
pub mod invite;
pub mod list;
pub mod signers;
pub mod unlock;

use crate::posted::Posted;
use commissioning::FieldError;
use commissioning::people::Role;
use maud::{Markup, html};
use std::collections::BTreeSet;

/// Tick boxes for the roles; `held` are ticked unless the form came back with its own.
#[must_use]
pub fn role_boxes(held: &[&str], posted: &Posted, errors: &[FieldError]) -> Markup {
    let sent: BTreeSet<&str> = posted.all("role").collect();
    let came_back = !posted.pairs().is_empty();
    let error = errors.iter().find(|e| e.field == "roles" || e.field == "role");
    html! {
        fieldset.field.bad[error.is_some()] {
            legend { "Roles" span.needed { " needed" } }
            div.ticks {
                @for role in Role::ALL {
                    label.tick { input type="checkbox" name="role" value=(role.key()) checked[if came_back { sent.contains(role.key()) } else { held.contains(&role.key()) }]; span { b { (role.words()) } " " span.quiet { (what(role)) } } }
                }
            }
            @if let Some(error) = error { p.error { (error.message) } }
        }
    }
}

const fn what(role: Role) -> &'static str {
    match role {
        Role::Engineer => "works on drives, records and signs",
        Role::Supervisor => "reviews, accepts, returns, reopens",
        Role::Administrator => "people, instruments, sites, backups",
        Role::Reader => "reads records and packages",
    }
}

/// The roles ticked in a form.
#[must_use]
pub fn roles(posted: &Posted) -> Vec<Role> {
    Role::ALL.into_iter().filter(|r| posted.all("role").any(|key| key == r.key())).collect()
}

/// The error's field as the form names it: refusals speak of `roles`.
#[must_use]
pub fn words(roles: &BTreeSet<Role>) -> String {
    roles.iter().map(|r| r.words()).collect::<Vec<_>>().join(", ")
}
