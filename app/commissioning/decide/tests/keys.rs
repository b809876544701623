//! The signing key: each follows the one before, none comes back, and the journal keeps them all.

use crate::journal::Deed;
use crate::world::*;

fn change(old: &str, new: &str) -> Deed {
    Deed::RotateKey { old: old.repeat(32), new: new.repeat(32), by_old: "c3".repeat(64), by_new: "d4".repeat(64) }
}

#[test]
fn a_key_follows_the_one_before_and_none_comes_back() {
    let mut world = World::new();
    world.does(ADA, change("a1", "b2"));
    assert!(why(world.attempt(Some(ADA), change("a1", "e5"))).contains("not the one that the journal names last"));
    assert!(why(world.attempt(Some(ADA), change("b2", "a1"))).contains("in use before"));
    assert!(why(world.attempt(Some(ADA), change("b2", "b2"))).contains("is the old one"));
    world.does(ADA, change("b2", "e5"));
    let kept: Vec<_> = world.installation.key_changes.iter().map(|c| (&c.old[..2], &c.new[..2])).collect();
    assert_eq!(kept, [("a1", "b2"), ("b2", "e5")]);
    assert_eq!(world.installation.key_changes[0].by_name, world.installation.people[&ADA].name);
}

#[test]
fn what_is_no_key_or_no_signature_is_refused() {
    let mut world = World::new();
    for (old, new) in [("A1", "b2"), ("a1", "b"), ("a1", "g2"), ("", "b2")] {
        assert!(why(world.attempt(Some(ADA), change(old, new))).contains("hexadecimal"), "{old} {new}");
    }
    let Deed::RotateKey { old, new, by_old, .. } = change("a1", "b2") else { unreachable!() };
    let short = Deed::RotateKey { old, new, by_old, by_new: "d4".repeat(63) };
    assert!(why(world.attempt(Some(ADA), short)).contains("hexadecimal"));
}
