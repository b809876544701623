//! The invented people of the demo and their passwords.

use crate::hand::{Hand, named};
use crate::{Demo, DemoFault, DemoPerson};
use commissioning::PersonId;
use commissioning::journal::Deed;
use commissioning::people::Role;

/// The firm that starts up the drives.
const FIRM: &str = "Brackenfold Start-up Works";

/// An invented person.
struct Member {
    login: &'static str,
    name: &'static str,
    password: &'static str,
    roles: &'static [Role],
}

/// Everyone; the first sets the installation up.
const CREW: &[Member] = &[
    Member { login: "odile", name: "Odile Farthing", password: "kettle-lantern-oars", roles: &[Role::Administrator] },
    Member { login: "bram", name: "Bram Ashdown", password: "grey-heron-at-noon", roles: &[Role::Engineer] },
    Member { login: "sunniva", name: "Sunniva Marsh", password: "copper-tide-clock", roles: &[Role::Engineer] },
    Member { login: "lucan", name: "Lucan Thwaite", password: "nine-quiet-bollards", roles: &[Role::Supervisor] },
    Member { login: "petra", name: "Petra Quayle", password: "rope-salt-and-rain", roles: &[Role::Reader] },
];

/// The account of an invented person.
pub(crate) fn account(login: &str) -> PersonId {
    PersonId(named(&format!("person {login}")))
}

/// Sets the installation up and adds everyone.
pub(crate) fn sign_on(hand: &mut Hand<'_>) -> Result<(), DemoFault> {
    for (n, member) in CREW.iter().enumerate() {
        let (person, login, name) = (account(member.login), member.login.to_owned(), member.name.to_owned());
        let roles = member.roles.to_vec();
        let (actor, deed) = if n == 0 {
            (None, Deed::SetUp { firm: FIRM.to_owned(), person, login, name, roles })
        } else {
            (CREW.first().map(|first| account(first.login)), Deed::AddPerson { person, login, name, roles })
        };
        hand.act(actor, deed, 90, member.login)?;
    }
    // All at once: a password's hash takes its time by design, and the store works on several.
    let now = hand.calendar.at();
    let asked: Vec<_> =
        CREW.iter().map(|m| (m.login, hand.store.set_password(account(m.login), m.password, now))).collect();
    for (login, answer) in asked {
        answer.wait().map_err(|e| DemoFault::Stopped(format!("the password of {login}"), e.to_string()))?;
    }
    Ok(())
}

/// What to tell whoever looks at the demo.
pub(crate) fn told(site_tag: &str) -> Demo {
    let people = CREW.iter().map(|m| DemoPerson {
        login: m.login.to_owned(),
        password: m.password.to_owned(),
        name: m.name.to_owned(),
        role: m.roles.iter().map(|r| r.words()).collect::<Vec<_>>().join(", "),
    });
    Demo { site_tag: site_tag.to_owned(), people: people.collect() }
}
