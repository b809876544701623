//! Whatever a record holds, no check panics, none says a number that is none, and a better instrument undoes no verdict.
//!
//! A few hundred records on every run; for longer, `ASLEFT_FUZZ_SECONDS=600 cargo test -p commissioning --lib fuzz`.
//! Each record is named by a number; one that ever found a fault stays in [`FOUND`].

mod absurd;

use crate::judge::{Counts, Judged, View, all};
use crate::procedure::built_in::built_in;
use absurd::{Absurd, Sound};
use engineering::{Outcome, Verdict};
use std::collections::{BTreeMap, BTreeSet};
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::time::{Duration, Instant};

/// Numbers of records that found a fault once.
const FOUND: &[u64] = &[202_028, 201_032, 204_411, 204_303, 203_145, 201_741];

/// How many records an ordinary run takes.
const ORDINARY: u64 = 150;

/// The records to look at: those that found a fault, then fresh ones; as long as the environment asks, from the number
/// it names.
fn numbers() -> impl Iterator<Item = u64> {
    let asked = |name: &str| std::env::var(name).ok().and_then(|text| text.parse::<u64>().ok());
    let (begun, seconds) = (Instant::now(), asked("ASLEFT_FUZZ_SECONDS").map(Duration::from_secs));
    let first = asked("ASLEFT_FUZZ_FROM").unwrap_or(0);
    let fresh = (first..).take_while(move |n| match seconds {
        Some(seconds) => begun.elapsed() < seconds,
        None => *n < first + ORDINARY,
    });
    FOUND.iter().copied().chain(fresh)
}

/// Faults by check and kind: how often, and the first record that showed it.
#[derive(Default)]
struct Faults(BTreeMap<String, (u32, u64, String)>);

impl Faults {
    fn add(&mut self, check: &str, kind: &str, number: u64, shown: String) {
        self.0.entry(format!("{check}: {kind}")).or_insert((0, number, shown)).0 += 1;
    }

    fn none(&self) {
        let lines =
            self.0.iter().map(|(what, (n, first, shown))| format!("{what} ({n} times, first {first}): {shown}"));
        assert!(self.0.is_empty(), "{}", lines.collect::<Vec<_>>().join("\n"));
    }
}

/// All outcomes of a record; a check that panics is a fault like another.
fn judged(faults: &mut Faults, number: u64, record: &Absurd) -> Vec<Judged> {
    let view = View { drive: &record.drive, site: &record.site, procedure: &record.procedure };
    catch_unwind(AssertUnwindSafe(|| all(&view))).unwrap_or_else(|_| {
        faults.add("some check", "panics", number, String::new());
        Vec::new()
    })
}

/// Every text that an outcome shows.
fn texts(outcome: &Outcome) -> Vec<&str> {
    let mut texts = vec![outcome.summary.as_str(), &outcome.limit, &outcome.needed];
    texts.extend(outcome.figures.iter().flat_map(|f| [f.name.as_str(), &f.value, &f.unit]));
    texts.extend(outcome.working.iter().flat_map(|l| [l.what.as_str(), &l.formula, &l.numbers, &l.result]));
    texts.extend(outcome.assumed.iter().flat_map(|a| [a.what.as_str(), &a.taken]));
    texts.extend(outcome.missing.iter().map(|m| m.what.as_str()));
    texts.extend(outcome.notes.iter().map(String::as_str));
    if let Some(rule) = &outcome.rule {
        texts.extend(rule.ticks.iter().map(|t| t.label.as_str()));
        texts.extend(rule.markers.iter().map(|m| m.label.as_str()));
    }
    texts
}

/// What is wrong with how an outcome reads.
fn fault(outcome: &Outcome) -> Option<String> {
    for text in texts(outcome) {
        let word = |w: &str| text.split(|c: char| !c.is_alphanumeric()).any(|part| part == w);
        if word("NaN") || word("inf") || text.contains("not a number") || text.contains("∞") {
            return Some(format!("says “{text}”"));
        }
    }
    if outcome.summary.is_empty() {
        return Some("says nothing".to_owned());
    }
    if !outcome.rule.as_ref().is_none_or(engineering::LimitRule::is_finite) {
        return Some("has a ruler that cannot be drawn".to_owned());
    }
    let passed = outcome.verdict == Verdict::Within && !outcome.missing.is_empty();
    passed.then(|| format!("is within without {:?}", outcome.missing))
}

#[test]
fn no_record_stops_a_check_or_makes_it_say_a_number_that_is_none() {
    let (procedure, sound) = (built_in().unwrap(), Sound::read());
    let (mut records, mut faults) = (0u32, Faults::default());
    let mut verdicts = BTreeMap::<String, BTreeSet<&str>>::new();
    for number in numbers() {
        let outcomes = judged(&mut faults, number, &Absurd::of(number, &procedure, &sound));
        for one in &outcomes {
            if let Some(wrong) = fault(&one.outcome) {
                faults.add(&one.outcome.check, "reads wrong", number, format!("{} {}: {wrong}", one.step, one.of));
            }
            verdicts.entry(one.outcome.check.clone()).or_default().insert(one.outcome.verdict.words());
        }
        let counts = Counts::of(&outcomes);
        let sum = counts.within + counts.marginal + counts.outside + counts.not_assessed + counts.figure;
        assert_eq!(sum, outcomes.len());
        records += 1;
    }
    println!("{records} records, {} checks: {verdicts:?}", verdicts.len());
    faults.none();
    // What only ever answers one way was not looked at.
    let idle: Vec<_> = verdicts.iter().filter(|(_, v)| v.len() < 2).collect();
    assert!(records >= 100 && idle.is_empty(), "{records} records, {idle:?} answered one way only");
}

/// Checks of whether something is dead: too near to tell counts as live, so a better tester can lift that verdict.
const CAUTIOUS: &[&str] = &["terminals-dead", "bus-discharged"];

#[test]
fn a_better_instrument_undoes_no_verdict_and_none_passes_nothing() {
    let (procedure, sound) = (built_in().unwrap(), Sound::read());
    let (mut compared, mut doubted, mut faults) = (0u32, 0u32, Faults::default());
    for number in numbers() {
        let as_is = Absurd::of(number, &procedure, &sound);
        let mut by_place = |record: &Absurd| -> BTreeMap<(String, String, String), Outcome> {
            let judged = judged(&mut faults, number, record);
            judged.into_iter().map(|j| ((j.outcome.check.clone(), j.step, j.of), j.outcome)).collect()
        };
        let (plain, better, none) =
            (by_place(&as_is), by_place(&as_is.with_instruments(0.2)), by_place(&as_is.with_instruments(0.0)));
        for (place, outcome) in &plain {
            let may_lift = CAUTIOUS.contains(&place.0.as_str()) && outcome.verdict == Verdict::Outside;
            let definite = matches!(outcome.verdict, Verdict::Within | Verdict::Outside) && !may_lift;
            if let Some(other) = better.get(place).filter(|_| definite) {
                // Numbers near the largest there is can leave the range with any instrument.
                let beyond = other.summary.contains("the arithmetic leaves its range");
                if outcome.verdict != other.verdict && !beyond {
                    faults.add(&place.0, "undone", number, format!("{place:?}\n  {outcome:?}\n  {other:?}"));
                }
                compared += 1;
            }
            // Where the instruments made any difference, nothing is within without one.
            if let Some(bare) = none.get(place).filter(|bare| *bare != outcome) {
                if bare.verdict == Verdict::Within {
                    faults.add(&place.0, "within without", number, format!("{place:?}\n  {outcome:?}\n  {bare:?}"));
                }
                doubted += 1;
            }
        }
    }
    println!("{compared} compared, {doubted} in doubt");
    faults.none();
    assert!(compared > 1000 && doubted > 500, "{compared} compared, {doubted} in doubt");
}

/// Readings that a verdict may take as they stand: test volts are what the tester was switched to.
const AS_THEY_STAND: &[(&str, &str)] =
    &[("insulation-test-voltage", "test-voltage"), ("insulation-resistance", "test-voltage")];

/// Every reading a verdict rests on counts with its own doubt, the thermometer behind a correction too: without its
/// instrument nothing that moves with the reading stays within.
#[test]
fn a_verdict_rests_on_every_reading_that_moves_it() {
    let (procedure, sound) = (built_in().unwrap(), Sound::read());
    let (mut rested, mut faults) = (BTreeSet::new(), Faults::default());
    for number in 0..2 {
        let record = Absurd::sound(number, &procedure, &sound);
        let mut within = |record: &Absurd| -> BTreeMap<(String, String, String), Outcome> {
            let judged = judged(&mut faults, number as u64, record);
            judged.into_iter().map(|j| ((j.outcome.check.clone(), j.step, j.of), j.outcome)).collect()
        };
        let before = within(&record);
        let mut left = Vec::new();
        for place in record.readings() {
            let named = record.drive.record.as_ref().unwrap().entry(&place).unwrap().value.instrument.is_some();
            if !named {
                continue;
            }
            let moved = within(&record.with_entry(&place, |entry| {
                let number = entry.value.number().unwrap() * 1.003;
                entry.value.si = Some(number.to_string());
            }));
            let bare = within(&record.with_entry(&place, |entry| entry.instrument = None));
            for (at, outcome) in before.iter().filter(|(_, o)| o.verdict == Verdict::Within) {
                let figures = |o: Option<&Outcome>| o.map(|o| (o.figures.clone(), o.rule.clone()));
                if figures(moved.get(at)) == figures(Some(outcome)) {
                    continue;
                }
                rested.insert((at.0.clone(), place.item.clone()));
                if bare.get(at).is_some_and(|o| o.verdict == Verdict::Within) {
                    left.push((at.0.clone(), place.item.clone()));
                }
            }
        }
        left.retain(|(check, item)| !AS_THEY_STAND.contains(&(check.as_str(), item.as_str())));
        for (check, item) in left {
            faults.add(&check, &format!("rests on {item} without its instrument"), number as u64, String::new());
        }
    }
    println!("{} rest: {rested:?}", rested.len());
    faults.none();
    assert!(rested.len() > 40, "only {} readings moved anything", rested.len());
}

/// The other way round: a record that says a number that is none must be noticed.
#[test]
fn a_number_that_is_none_would_be_noticed() {
    let mut outcome = engineering::OutcomeBuilder::new("x").as_figure("A figure.");
    assert_eq!(fault(&outcome), None);
    for text in ["about NaN V", "at most inf A", "between -inf and 3", "not a number"] {
        outcome.notes = vec![text.to_owned()];
        assert!(fault(&outcome).is_some(), "{text}");
    }
    outcome.notes = vec!["Information of the infeed.".to_owned()];
    assert_eq!(fault(&outcome), None);
}
