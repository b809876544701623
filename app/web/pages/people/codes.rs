//! One-time codes in words: whoever holds one can sign under that name, so that nobody makes one unseen.

use commissioning::Timestamp;
use store::CodeMade;
use time::Duration;

/// How long a code works.
const VALID: Duration = Duration::days(7);
/// How long the person whose password one replaced is told so.
const TOLD_FOR: Duration = Duration::days(90);

/// A code in a list.
#[must_use]
pub fn words(code: &CodeMade) -> String {
    let made = format!("made by {}, {} UTC", maker(code), code.made.shown());
    match code.redeemed {
        Some(used) => format!("{made}; password set with it {} UTC", used.shown()),
        None => format!("{made}; not used"),
    }
}

/// What a person is told about codes that stand in place of a password they had: the latest first.
#[must_use]
pub fn to_tell(codes: &[CodeMade], now: Timestamp) -> Vec<String> {
    let after = |then: Timestamp| now.moment() - then.moment();
    let mut told = Vec::new();
    for (n, code) in codes.iter().enumerate().filter(|(_, c)| c.had_password) {
        match code.redeemed {
            Some(used) if after(used) < TOLD_FOR => told.push(format!(
                "Your password was replaced {} UTC, with a one-time code made by {}, {} UTC. If that was not you, tell a supervisor at once: whoever did it could sign under your name.",
                used.shown(),
                maker(code),
                code.made.shown()
            )),
            // A later code takes the place of one not used.
            None if n == 0 && after(code.made) < VALID => told.push(format!(
                "A one-time code for your account was made by {}, {} UTC, and has not been used. Whoever holds it can set a new password and sign under your name. If you did not ask for it, tell a supervisor.",
                maker(code),
                code.made.shown()
            )),
            _ => {}
        }
    }
    told
}

fn maker(code: &CodeMade) -> &str {
    code.made_by.as_deref().unwrap_or("whoever keeps the server")
}

#[cfg(test)]
mod tests {
    use super::*;

    fn day(n: i64) -> Timestamp {
        Timestamp::new(Timestamp::EPOCH.moment() + Duration::days(n))
    }

    fn code(made: i64, redeemed: Option<i64>, had_password: bool) -> CodeMade {
        CodeMade { made_by: Some("Ada Quist".to_owned()), made: day(made), had_password, redeemed: redeemed.map(day) }
    }

    #[test]
    fn who_had_a_password_is_told_of_codes_that_work_or_worked() {
        assert!(to_tell(&[code(1, Some(2), false)], day(3)).is_empty(), "a first password takes nobody's place");
        let told = to_tell(&[code(5, None, true), code(4, None, true), code(1, Some(2), true)], day(6));
        assert_eq!(told.len(), 2, "{told:?}");
        assert!(told[0].contains("has not been used") && told[1].contains("was replaced"), "{told:?}");
        assert!(told.iter().all(|t| t.contains("Ada Quist")));
        assert!(to_tell(&[code(5, None, true)], day(13)).is_empty(), "it works no longer");
        assert!(to_tell(&[code(1, Some(2), true)], day(93)).is_empty());
    }
}
