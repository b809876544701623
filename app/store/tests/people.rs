//! Accounts: passwords, failures, sessions, invitations, the set-up code.

use super::stage::*;
use crate::{PasswordAnswer, PasswordFault, SessionKind, SignIn, Store};
use commissioning::Timestamp;
use commissioning::journal::Deed;
use commissioning::people::Role;
use time::Duration;

const GOOD: &str = "seven otters by the weir";

fn seconds_after(now: Timestamp, seconds: i64) -> Timestamp {
    Timestamp::new(now.moment() + Duration::seconds(seconds))
}

fn with_password() -> Store {
    let store = stage();
    store.set_password_blocking(ROWAN, GOOD, at(5)).unwrap();
    store
}

#[test]
fn a_password_that_everyone_tries_is_refused() {
    let store = stage();
    for (password, fault) in [
        ("eleven char", PasswordFault::TooShort),
        ("Password1234", PasswordFault::TooCommon),
        ("aaaaaaaaaaaaaaaa", PasswordFault::TooCommon),
        ("my name is Rowan", PasswordFault::HoldsLogin),
    ] {
        assert_eq!(store.set_password_blocking(ROWAN, password, at(5)), Err(fault));
    }
    assert_eq!(store.set_password_blocking(ROWAN, &"x1y2z".repeat(50), at(5)), Err(PasswordFault::TooLong));
    let stranger = commissioning::PersonId(fresh());
    assert_eq!(store.set_password_blocking(stranger, GOOD, at(5)), Err(PasswordFault::Unknown));
}

#[test]
fn rowan_signs_in_with_name_and_password() {
    let store = with_password();
    let right = store.sign_in_blocking(" Rowan", "10.0.0.7", GOOD, at(6)).unwrap();
    assert!(matches!(right, SignIn::Right(person) if person.id == ROWAN));
    assert_eq!(store.sign_in_blocking("rowan", "10.0.0.7", "seven otters by the wier", at(6)).unwrap(), SignIn::Wrong);
    // Maren never set one; nobody is called Nils: the same answer.
    assert_eq!(store.sign_in_blocking("maren", "10.0.0.7", GOOD, at(6)).unwrap(), SignIn::Wrong);
    assert_eq!(store.sign_in_blocking("nils", "10.0.0.7", GOOD, at(6)).unwrap(), SignIn::Wrong);
    let account = store.accounts_blocking().unwrap().into_iter().find(|a| a.person.id == ROWAN).unwrap();
    assert_eq!((account.password_set, account.last_sign_in), (Some(at(5)), Some(at(6))));
}

#[test]
fn an_account_that_is_off_does_not_come_in() {
    let store = with_password();
    let token = store.open_session_blocking(ROWAN, SessionKind::Enrolled, at(6)).unwrap();
    let off =
        Deed::ChangePerson { person: ROWAN, name: "Rowan Vale".to_owned(), roles: vec![Role::Engineer], active: false };
    done(&store, IDA, off, at(7));
    assert_eq!(store.sign_in_blocking("rowan", "10.0.0.7", GOOD, at(8)).unwrap(), SignIn::Wrong);
    assert_eq!(store.session_blocking(&token, at(8)).unwrap(), None);
    assert_eq!(store.check_password_blocking(ROWAN, GOOD, at(8)).unwrap(), PasswordAnswer::Wrong);
}

#[test]
fn each_further_failure_costs_twice_the_time_for_unknown_names_too() {
    for login in ["rowan", "nobody"] {
        let store = with_password();
        let mut now = at(10);
        for wait in [0, 0, 2, 4, 8] {
            assert_eq!(store.sign_in_blocking(login, "10.0.0.7", "wrong wrong wrong", now).unwrap(), SignIn::Wrong);
            if wait > 0 {
                let until = seconds_after(now, wait);
                let early = seconds_after(now, wait - 1);
                assert_eq!(store.sign_in_blocking(login, "10.0.0.7", GOOD, early).unwrap(), SignIn::Locked { until });
            }
            now = seconds_after(now, wait);
        }
    }
}

#[test]
fn the_right_password_ends_the_count_of_the_name() {
    let store = with_password();
    for _ in 0..2 {
        store.sign_in_blocking("rowan", "10.0.0.7", "wrong wrong wrong", at(10)).unwrap();
    }
    assert!(matches!(store.sign_in_blocking("rowan", "10.0.0.7", GOOD, at(10)).unwrap(), SignIn::Right(_)));
    assert_eq!(store.sign_in_blocking("rowan", "10.0.0.7", "wrong wrong wrong", at(10)).unwrap(), SignIn::Wrong);
    assert!(matches!(store.sign_in_blocking("rowan", "10.0.0.7", GOOD, at(10)).unwrap(), SignIn::Right(_)));
}

#[test]
fn an_address_that_tries_many_names_is_slowed() {
    let store = with_password();
    for n in 0..10 {
        store.sign_in_blocking(&format!("guess-{n}"), "10.0.0.66", "wrong wrong wrong", at(10)).unwrap();
    }
    assert!(matches!(store.sign_in_blocking("rowan", "10.0.0.66", GOOD, at(10)).unwrap(), SignIn::Locked { .. }));
    assert!(matches!(store.sign_in_blocking("rowan", "10.0.0.7", GOOD, at(10)).unwrap(), SignIn::Right(_)));
}

#[test]
fn the_third_failure_at_signing_locks_it_until_it_is_unlocked_or_a_quarter_of_an_hour_passed() {
    let store = with_password();
    let typed = |text: &str, minute| store.check_password_blocking(ROWAN, text, at(minute)).unwrap();
    assert_eq!(typed(GOOD, 10), PasswordAnswer::Right);
    assert_eq!((typed("wrong", 10), typed("wrong", 10)), (PasswordAnswer::Wrong, PasswordAnswer::Wrong));
    assert_eq!(typed("wrong", 10), PasswordAnswer::Locked { until: at(25) });
    assert_eq!(typed(GOOD, 24), PasswordAnswer::Locked { until: at(25) });
    let seen = store.accounts_blocking().unwrap().into_iter().find(|a| a.person.id == ROWAN).unwrap();
    assert_eq!((seen.failed, seen.signing_locked_until), (3, Some(at(25))));
    assert_eq!(typed("wrong", 25), PasswordAnswer::Wrong, "the count begins anew");
    assert_eq!(
        (typed("wrong", 25), typed("wrong", 25)),
        (PasswordAnswer::Wrong, PasswordAnswer::Locked { until: at(40) })
    );
    store.unlock_signing_blocking(ROWAN).unwrap();
    assert_eq!(typed(GOOD, 26), PasswordAnswer::Right);
}

#[test]
fn a_session_on_a_strange_device_ends_after_half_an_hour_without_use() {
    let store = stage();
    let token = store.open_session_blocking(ROWAN, SessionKind::Strange, at(0)).unwrap();
    assert_eq!(token.len(), 64);
    let here = |minute| store.session_blocking(&token, at(minute)).unwrap().is_some();
    assert!(here(29));
    // Use is written down behind the answer; the next act waits its turn after it.
    store.unlock_signing_blocking(ROWAN).unwrap();
    assert!(here(58));
    store.unlock_signing_blocking(ROWAN).unwrap();
    assert!(!here(88));
}

#[test]
fn a_session_on_a_tablet_of_the_firm_ends_after_a_shift() {
    let store = stage();
    let token = store.open_session_blocking(ROWAN, SessionKind::Enrolled, at(0)).unwrap();
    assert!(store.session_blocking(&token, at(719)).unwrap().is_some());
    assert!(store.session_blocking(&token, at(720)).unwrap().is_none());
}

#[test]
fn a_token_is_renewed_and_closed_and_never_stored() {
    let store = with_password();
    let first = store.open_session_blocking(ROWAN, SessionKind::Enrolled, at(0)).unwrap();
    let second = store.renew_session_blocking(&first, at(1)).unwrap().unwrap();
    assert_ne!(first, second);
    assert!(store.session_blocking(&first, at(1)).unwrap().is_none());
    assert_eq!(store.session_blocking(&second, at(1)).unwrap().unwrap().person.id, ROWAN);
    let files = ["store.sqlite", "store.sqlite-wal"].map(|f| std::fs::read(store.folder().join(f)).unwrap());
    for secret in [first.as_str(), second.as_str(), GOOD] {
        let secret = secret.as_bytes();
        assert!(files.iter().all(|bytes| !bytes.windows(secret.len()).any(|w| w == secret)));
    }
    store.close_session_blocking(&second).unwrap();
    assert!(store.session_blocking(&second, at(1)).unwrap().is_none());
    assert_eq!(store.renew_session_blocking(&second, at(1)).unwrap(), None);
    let third = store.open_session_blocking(ROWAN, SessionKind::Enrolled, at(2)).unwrap();
    store.set_password_blocking(ROWAN, "eight herons on the wall", at(3)).unwrap();
    assert!(store.session_blocking(&third, at(3)).unwrap().is_none(), "a new password closes sessions");
}

#[test]
fn the_set_up_code_works_while_nobody_is_here() {
    let store = Store::in_memory(at(0)).unwrap();
    let old = store.setup_code_blocking().unwrap().unwrap();
    let code = store.setup_code_blocking().unwrap().unwrap();
    assert_eq!(store.setup_code_fits_blocking(&old, at(1)).unwrap(), PasswordAnswer::Wrong);
    assert_eq!(
        store.setup_code_fits_blocking(&code.to_lowercase().replace('-', " "), at(1)).unwrap(),
        PasswordAnswer::Right
    );
    set_up(&store);
    assert_eq!(store.setup_code_fits_blocking(&code, at(2)).unwrap(), PasswordAnswer::Wrong);
    assert_eq!(store.setup_code_blocking().unwrap(), None);
}

#[test]
fn guessing_the_set_up_code_costs_time() {
    let store = Store::in_memory(at(0)).unwrap();
    let code = store.setup_code_blocking().unwrap().unwrap();
    for _ in 0..3 {
        assert_eq!(store.setup_code_fits_blocking("0000", at(1)).unwrap(), PasswordAnswer::Wrong);
    }
    assert!(matches!(store.setup_code_fits_blocking(&code, at(1)).unwrap(), PasswordAnswer::Locked { .. }));
    assert_eq!(store.setup_code_fits_blocking(&code, at(2)).unwrap(), PasswordAnswer::Right);
}

#[test]
fn maren_sets_her_own_password_by_invitation_once() {
    let store = stage();
    let first = store.invite_blocking(MAREN, Some(IDA), at(5)).unwrap();
    let code = store.invite_blocking(MAREN, Some(IDA), at(6)).unwrap();
    assert_eq!(store.invited_blocking(&first, at(7)).unwrap(), None);
    assert_eq!(store.invited_blocking(&code, at(7)).unwrap().unwrap().id, MAREN);
    assert_eq!(store.invited_blocking(&code, at(6 + 7 * 24 * 60)).unwrap(), None);
    assert_eq!(store.redeem_blocking(&code, "short", at(8)), Err(PasswordFault::TooShort));
    assert_eq!(store.redeem_blocking(&code, GOOD, at(8)).unwrap(), MAREN);
    assert_eq!(store.redeem_blocking(&code, "another long one here", at(9)), Err(PasswordFault::Unknown));
    assert!(matches!(store.sign_in_blocking("maren", "10.0.0.7", GOOD, at(9)).unwrap(), SignIn::Right(_)));
}

#[test]
fn every_code_made_for_somebody_is_kept_with_who_made_it_and_whether_it_was_used() {
    let store = with_password();
    let of = |who| store.accounts_blocking().unwrap().into_iter().find(|a| a.person.id == who).unwrap().codes;
    assert!(of(ROWAN).is_empty());
    store.invite_blocking(ROWAN, Some(IDA), at(6)).unwrap();
    let code = store.invite_blocking(ROWAN, None, at(7)).unwrap();
    assert_eq!(store.redeem_blocking(&code, "short", at(8)), Err(PasswordFault::TooShort));
    assert_eq!(of(ROWAN)[0].redeemed, None, "a refused password uses nothing up");
    store.redeem_blocking(&code, "nine herons on a wall", at(9)).unwrap();
    let codes = of(ROWAN);
    let said: Vec<_> = codes.iter().map(|c| (c.made_by.as_deref(), c.made, c.had_password, c.redeemed)).collect();
    assert_eq!(said, [(None, at(7), true, Some(at(9))), (Some("Ida Berg"), at(6), true, None)]);
    assert_eq!(store.codes_made_blocking(ROWAN).unwrap(), codes);
    assert!(of(IDA).is_empty());
    store.invite_blocking(MAREN, Some(IDA), at(10)).unwrap();
    assert!(!of(MAREN)[0].had_password, "the first password takes nobody's place");
}
