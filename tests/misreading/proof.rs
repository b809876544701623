//! Counts what is noticed and what is named, over every plate and every misreading.

use super::corpus::{Draw, Printed, plates};
use super::corruption::{Misread, all};
use super::page;
use engineering::formulas::tolerance;
use engineering::plate::proposal::{Mistake, Proposal};
use engineering::plate::relation::Relation;
use engineering::plate::{Name, Plate};
use engineering::{Power, Ratio};
use std::collections::BTreeMap;
use std::time::{Duration, Instant};

/// What became of the misreadings of one kind.
#[derive(Clone, Debug, Default)]
pub struct Row {
    pub made: usize,
    /// Those that move a relation of the true plate by more than its band.
    pub material: usize,
    pub noticed: usize,
    pub first: usize,
    pub among_three: usize,
    /// Those that leave the tolerance of the figure itself, whether or not a relation holds it; and of them noticed.
    pub beyond_own: usize,
    pub beyond_own_noticed: usize,
    /// Which kind stood first, for those that are material and noticed.
    pub named: BTreeMap<Option<Mistake>, usize>,
}

/// All counts.
#[derive(Default)]
pub struct Count {
    pub plates: usize,
    pub accused: usize,
    pub rows: BTreeMap<Mistake, Row>,
    pub longest: Duration,
    pub whole: Duration,
    pub searched: u32,
}

impl Count {
    pub fn sum(&self, of: impl Fn(&Row) -> usize) -> usize {
        self.rows.values().map(of).sum()
    }
}

fn is_noticed(plate: &Plate) -> bool {
    plate.relations().iter().any(Relation::is_broken)
}

/// Whether the misread figures leave the band in which the true plate holds them: some relation of the true plate moves
/// by more than half its possible range, rounding included, or can no longer be formed.
fn is_material(truth: &[Relation], misread: &Plate) -> bool {
    let now = misread.relations();
    truth.iter().any(|was| {
        let band = was.half_width() + (was.open.1 - was.open.0) / 2.0;
        let single = was.possible.1 - was.possible.0 < 1e-9;
        let same = |r: &&Relation| r.columns == was.columns && r.relates == was.relates;
        match now.iter().find(same) {
            Some(r) => (r.value - was.value).abs() > if single { 1e-9 } else { band },
            None => false,
        }
    }) || now.iter().any(|r| r.is_broken() && !truth.iter().any(|t| t.relates == r.relates))
}

/// Whether the figure leaves its own tolerance: IEC 60034-1 for efficiency, power factor and slip; 5 % for volts and
/// amperes, 2 % for hertz and power (common practice, no source).
fn is_beyond_its_own(truth: &Printed, misread: &Misread) -> bool {
    let (was, is) = (truth.plate(), misread.plate.plate());
    let value = |plate: &Plate| {
        let mark = plate.get(misread.column, misread.name).expect("printed");
        mark.number() * if misread.name == Name::Efficiency { 0.01 } else { 1.0 }
    };
    let (a, b) = (value(&was), value(&is));
    let watts = was.get(misread.column, Name::Power).map_or(1000.0, |p| p.number() * 1000.0);
    match misread.name {
        Name::Efficiency => {
            (a - b).abs() > tolerance::of_efficiency(Power::from_watts(watts), Ratio::from_fraction(a)).fraction()
        }
        Name::PowerFactor => (a - b).abs() > tolerance::of_power_factor(Ratio::from_fraction(a)).fraction(),
        Name::Speed => {
            let slip = a * truth.slip / (1.0 - truth.slip);
            (a - b).abs() > slip * if watts >= 1000.0 { 0.2 } else { 0.3 }
        }
        Name::Volts | Name::Amps => (b / a - 1.0).abs() > 0.05,
        Name::Hertz => (b / a - 1.0).abs() > 0.02,
        Name::Power | Name::Poles => misread.mistake == Mistake::Unit || (b / a - 1.0).abs() > 0.02,
    }
}

/// Whether a proposal is the true cause: the figure that was misread, and its true value. Digits exchanged, doubled or
/// moved have one true value; of a digit lost or a figure of another connection or pole number only so much can be known.
fn is_the_cause(truth: &Printed, misread: &Misread, proposal: &Proposal) -> bool {
    if misread.mistake == Mistake::FactorsExchanged {
        return proposal.mistake == Mistake::FactorsExchanged && proposal.change.0 == misread.column;
    }
    let (column, name, _, would_be) = proposal.change;
    if (column, name) != (misread.column, misread.name)
        || proposal.with.is_some_and(|_| proposal.mistake == Mistake::FactorsExchanged)
    {
        return false;
    }
    let was = truth.plate().get(column, name).expect("printed");
    let off = (would_be.number() / was.number() - 1.0).abs();
    match proposal.mistake {
        Mistake::Unit => misread.mistake == Mistake::Unit && would_be.shown(name) == was.shown(name),
        Mistake::DigitLost => misread.mistake == Mistake::DigitLost && off < 0.05,
        Mistake::OtherConnection | Mistake::SpeedOfOtherPoles | Mistake::SpeedOfOtherFrequency => off < 0.015,
        _ => off < 1e-6,
    }
}

fn count() -> Count {
    let mut count = Count::default();
    for (n, printed) in plates().iter().enumerate() {
        let truth = printed.plate();
        let relations = truth.relations();
        count.plates += 1;
        if is_noticed(&truth) {
            count.accused += 1;
            println!("accused: {} {:?}", printed.of, relations.iter().filter(|r| r.is_broken()).collect::<Vec<_>>());
        }
        for misread in all(printed, &mut Draw::new(n as u64 + 7001)) {
            let plate = misread.plate.plate();
            let (material, noticed) = (is_material(&relations, &plate), is_noticed(&plate));
            let beyond = is_beyond_its_own(printed, &misread);
            let row = count.rows.entry(misread.mistake).or_default();
            row.made += 1;
            row.beyond_own += usize::from(beyond);
            row.beyond_own_noticed += usize::from(beyond && noticed);
            if !material {
                continue;
            }
            row.material += 1;
            if !noticed {
                if std::env::var_os("ASLEFT_SHOW").is_some() {
                    println!(
                        "unnoticed: {} {:?} {:?} {:?} {:?}",
                        printed.of,
                        misread.mistake,
                        misread.name,
                        printed.at(misread.column, misread.name),
                        misread.plate.at(misread.column, misread.name)
                    );
                }
                continue;
            }
            row.noticed += 1;
            let begun = Instant::now();
            let told = plate.misreadings();
            let took = begun.elapsed();
            count.whole += took;
            count.longest = count.longest.max(took);
            count.searched += 1;
            *row.named.entry(told.first().map(|p| p.mistake)).or_default() += 1;
            let place = told.iter().position(|p| is_the_cause(printed, &misread, p));
            row.first += usize::from(place == Some(0));
            row.among_three += usize::from(place.is_some_and(|p| p < 3));
            if std::env::var_os("ASLEFT_SHOW").is_some() && place.is_none_or(|p| p >= 3) {
                println!(
                    "missed: {} {:?} {:?} {:?} at {place:?}: {:?}",
                    printed.of,
                    misread.mistake,
                    misread.name,
                    misread.plate.at(misread.column, misread.name),
                    told.iter().map(|p| p.sentence(false)).collect::<Vec<_>>()
                );
            }
        }
    }
    count
}

fn share(part: usize, of: usize) -> f64 {
    part as f64 / of.max(1) as f64
}

#[test]
fn misreadings_are_noticed_named_and_nobody_is_accused() {
    let count = count();
    let made = page::write(&count);
    println!("{made}");
    println!("{} searched, {:?} on average, {:?} at most", count.searched, count.whole / count.searched, count.longest);
    assert!(count.plates >= 300, "{} plates", count.plates);
    assert!(share(count.accused, count.plates) < 0.01, "{} of {} accused", count.accused, count.plates);
    let (material, noticed) = (count.sum(|r| r.material), count.sum(|r| r.noticed));
    assert!(share(noticed, material) >= 0.95, "{noticed} of {material} noticed");
    let named = count.sum(|r| r.among_three);
    assert!(share(named, noticed) >= 0.90, "{named} of {noticed} named");
    // On average: a single one may be interrupted.
    assert!(count.whole / count.searched < Duration::from_millis(5), "{:?}", count.whole / count.searched);
    page::hold(&made);
}
