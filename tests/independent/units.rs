//! Every unit that can be picked against pint; one that the file does not know is a fault of the file.

use crate::{cases, near, number};
use engineering::Kind;
use std::collections::BTreeSet;

#[test]
fn every_unit_is_what_another_library_makes_of_it() {
    let mut wrong = Vec::new();
    let mut seen = BTreeSet::new();
    for case in cases(include_str!("units.json"), 138) {
        let (kind, symbol) = (case["kind"].as_str().expect("a kind"), case["symbol"].as_str().expect("a symbol"));
        let known = Kind::ALL.iter().find(|k| k.words() == kind).unwrap_or_else(|| panic!("no kind {kind}"));
        let unit = known.unit(symbol).unwrap_or_else(|| panic!("{kind} has no {symbol}"));
        let (typed, coherent) = (number(&case, "number"), number(&case["expected"], "coherent"));
        near(&mut wrong, &format!("{typed} {symbol} of {kind}"), unit.to_coherent(typed), coherent, 1e-11, 1e-11);
        near(&mut wrong, &format!("{symbol} of {kind}, back"), unit.from_coherent(coherent), typed, 1e-10, 1e-10);
        seen.insert((known.words(), unit.symbol));
    }
    for kind in Kind::ALL {
        for unit in kind.units() {
            assert!(
                seen.contains(&(kind.words(), unit.symbol)),
                "{} of {} is compared with nothing",
                unit.symbol,
                kind.words()
            );
        }
    }
    assert!(wrong.is_empty(), "{} figures differ:\n{}", wrong.len(), wrong.join("\n"));
}
