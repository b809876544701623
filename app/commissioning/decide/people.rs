//! Setting up, and keeping people.

use super::Surroundings;
use super::words::{self, Errors};
use super::writer::Writer;
use crate::journal::{Act, Chain, Deed, Event, Fact};
use crate::people::{Person, Role};
use crate::{PersonId, Refusal};
use std::collections::BTreeSet;

/// Longest name of a person or firm.
const LONGEST_NAME: usize = 80;

/// Names the firm and makes the first administrator.
pub(super) fn set_up(act: &Act, around: &Surroundings<'_>) -> Result<Vec<Event>, Refusal> {
    let Deed::SetUp { firm, person, login, name, roles } = &act.deed else { return Ok(Vec::new()) };
    if !around.installation.people.is_empty() || !around.installation.firm.is_empty() {
        return Err(Refusal::not_now("This installation is set up already. Sign in instead."));
    }
    let mut errors = Errors::default();
    let firm = errors.keep("firm", "firm", words::line(firm, LONGEST_NAME));
    if !roles.contains(&Role::Administrator) {
        errors.add("roles", "roles", "The first person must be an administrator. Tick administrator.");
    }
    let person = checked(&mut errors, around, *person, login, name, roles);
    errors.none()?;
    let mut writer = Writer::new(act, around).in_name_of(person.id, &person.name);
    writer.add(Chain::Installation, Fact::SetUp { firm: firm.unwrap_or_default() });
    writer.add(Chain::Installation, Fact::PersonKept { person });
    Ok(writer.done())
}

/// Adds a person.
pub(super) fn add(act: &Act, around: &Surroundings<'_>) -> Result<Vec<Event>, Refusal> {
    let Deed::AddPerson { person, login, name, roles } = &act.deed else { return Ok(Vec::new()) };
    if around.installation.people.contains_key(person) {
        return Err(Refusal::not_now("This account exists already; accounts are never reused. Add a new one."));
    }
    let mut errors = Errors::default();
    let person = checked(&mut errors, around, *person, login, name, roles);
    errors.none()?;
    let mut writer = Writer::new(act, around);
    writer.add(Chain::Installation, Fact::PersonKept { person });
    Ok(writer.done())
}

/// Changes name, roles, or whether the account works.
pub(super) fn change(act: &Act, around: &Surroundings<'_>) -> Result<Vec<Event>, Refusal> {
    let Deed::ChangePerson { person, name, roles, active } = &act.deed else { return Ok(Vec::new()) };
    let known = around.installation.people.get(person);
    let known = known.ok_or_else(|| Refusal::Unknown { what: "This person".to_owned() })?;
    let mut errors = Errors::default();
    let name = errors.keep("name", "name", words::line(name, LONGEST_NAME)).unwrap_or_default();
    let roles = checked_roles(&mut errors, roles);
    let changed = Person { name, roles, active: *active, ..known.clone() };
    let others = around.installation.people.values().filter(|p| p.id != changed.id);
    if !others.chain([&changed]).any(|p| p.is(Role::Administrator)) {
        errors.add(
            "roles",
            "roles",
            "At least one administrator must remain. Make somebody else an administrator first.",
        );
    }
    errors.none()?;
    let mut writer = Writer::new(act, around);
    if changed != *known {
        writer.add(Chain::Installation, Fact::PersonKept { person: changed });
    }
    Ok(writer.done())
}

fn checked(
    errors: &mut Errors,
    around: &Surroundings<'_>,
    id: PersonId,
    login: &str,
    name: &str,
    roles: &[Role],
) -> Person {
    let login = errors.keep("login", "sign-in name", words::login(login)).unwrap_or_default();
    if around.installation.people.values().any(|p| p.login == login) {
        errors.add(
            "login",
            "sign-in name",
            format!("“{login}” is taken, perhaps by an account that is switched off. Choose another."),
        );
    }
    let name = errors.keep("name", "name", words::line(name, LONGEST_NAME)).unwrap_or_default();
    Person { id, login, name, roles: checked_roles(errors, roles), active: true }
}

fn checked_roles(errors: &mut Errors, roles: &[Role]) -> BTreeSet<Role> {
    if roles.is_empty() {
        errors.add("roles", "roles", "No role was ticked. Tick at least one.");
    }
    roles.iter().copied().collect()
}
