//! # misreading
//!
//! Whether all figures of the plate can belong together, and which single misreading would explain it when they cannot.
//!
//! Every relation that the printed figures form is worked out with the rounding of each figure and the tolerances of
//! IEC 60034-1: P = √3·U·I·cos φ·η, synchronous speed and slip, printed poles, the share of the losses that the slip
//! puts into the rotor, the efficiency class tables, and the columns against each other. Ratings by name (11 kW, 400 V,
//! 50 Hz) count as exact. A relation of physics or of the plate's own words that breaks: outside; one of common
//! practice: marginal. Then every figure in turn is taken as misread: kW for hp, volts or amperes of the other
//! connection, 50 for 60 Hz, a speed of other poles, two digits exchanged, one lost or doubled, the decimal point,
//! power factor and efficiency exchanged. What mends every relation is told, likeliest first; nothing is changed.

use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::plate::relation::{Relates, Relation};
use crate::plate::{Column, Name, Plate};
use crate::rounding::significant;
use crate::sources::nameplate::{CLASS_RANGE, MISREADINGS, MN_05, MN_08, MN_11, PLAUSIBLE_PRODUCT, SLIP_LOSSES};
use crate::sources::settings::MN_01;

/// Name in the catalogue.
pub const NAME: &str = "misreading";

/// What the check takes: the whole plate.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Inputs {
    /// The plate.
    pub plate: Plate,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let plate = &inputs.plate;
    let mut b = OutcomeBuilder::new(NAME);
    b.limit("every relation within the rounding of its figures and the tolerances of IEC 60034-1");
    let relations = plate.relations();
    if !relations.iter().any(|r| compares(r.relates)) {
        let first = plate.columns.iter().find(|c| **c != Column::default()).copied().unwrap_or_default();
        for name in [Name::Volts, Name::Amps, Name::Hertz, Name::Speed, Name::Power] {
            b.need(first.get(name), &format!("rated {}", name.words()));
        }
        return b.not_assessed();
    }
    let several = plate.has_several();
    for relation in &relations {
        cite(&mut b, relation.relates);
        b.line(&place(relation, several), relation.relates.formula(), "", result(relation));
    }
    let broken: Vec<&Relation> = relations.iter().filter(|r| r.is_broken()).collect();
    let Some(worst) = broken
        .iter()
        .max_by(|x, y| (x.firm, x.excess()).partial_cmp(&(y.firm, y.excess())).unwrap_or(std::cmp::Ordering::Equal))
    else {
        return b.judged(
            Verdict::Within,
            format!("The figures of the plate agree with each other in {} relations.", relations.len()),
        );
    };
    b.cite(MISREADINGS);
    let told = plate.misreadings();
    for (rank, proposal) in told.iter().enumerate() {
        b.note(format!("{} · {}", rank + 1, proposal.sentence(several)));
    }
    let (verdict, opening) = if worst.firm {
        (Verdict::Outside, "The plate contradicts itself")
    } else {
        (Verdict::Marginal, "The plate would be an unusual one")
    };
    let closing = match told.len() {
        0 => "No single misreading explains it. Read every figure again, from one column and one connection.",
        1 => "One single misreading would explain it. Read that figure again.",
        _ => "Single misreadings that would explain it, the likeliest first, are listed. Read those figures again.",
    };
    b.judged(verdict, format!("{opening}: {} {}. {closing}", place(worst, several), result(worst)))
}

/// Whether it takes figures that a person can mix up; a lone power factor or pole count compares nothing.
fn compares(relates: Relates) -> bool {
    !matches!(relates, Relates::PowerFactor | Relates::PoleCount)
}

fn place(relation: &Relation, several: bool) -> String {
    let words = relation.relates.words();
    match relation.columns {
        (a, Some(b)) => format!("{words} (columns {} and {})", a + 1, b + 1),
        (a, None) if several => format!("{words} (column {})", a + 1),
        _ => words.to_owned(),
    }
}

/// The value and what is possible, in percent where that is how people say it.
fn result(relation: &Relation) -> String {
    let (value, (low, high)) = (relation.value, relation.possible);
    match relation.relates {
        Relates::Slip => {
            let percent = |v: f64| significant(v * 100.0, 2);
            format!("{} %, possible above 0 to {} %", percent(value), percent(high))
        }
        Relates::RotorShare => {
            let percent = |v: f64| significant(v * 100.0, 2);
            format!("{} %, possible {} to {} %", percent(value), percent(low), percent(high))
        }
        Relates::Poles => format!("{}, printed {}", significant(value, 2), significant(low, 2)),
        Relates::PoleCount => {
            format!("{}, usually {} to {}", significant(value, 2), significant(low, 1), significant(high, 2))
        }
        _ => format!("{}, possible {} to {}", significant(value, 3), significant(low, 3), significant(high, 3)),
    }
}

fn cite(b: &mut OutcomeBuilder, relates: Relates) {
    match relates {
        Relates::Product => {
            b.cite(MN_05);
            b.cite(MN_11);
        }
        Relates::ImpliedEfficiency => {
            b.cite(MN_05);
            b.cite(PLAUSIBLE_PRODUCT);
            b.cite(CLASS_RANGE);
        }
        Relates::ImpliedPowerFactor | Relates::Ratings => {
            b.cite(MN_05);
            b.cite(PLAUSIBLE_PRODUCT);
        }
        Relates::PartOfOne | Relates::PowerFactor => b.cite(PLAUSIBLE_PRODUCT),
        Relates::Slip | Relates::Poles => b.cite(MN_01),
        Relates::PoleCount | Relates::RotorShare => b.cite(SLIP_LOSSES),
        Relates::ClassTable => {
            b.cite(MN_08);
            b.cite(CLASS_RANGE);
        }
        Relates::PolesOfColumns | Relates::SpeedsOfColumns | Relates::ApparentOfColumns | Relates::PowersOfColumns => {
            b.cite(SLIP_LOSSES);
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::plate::Mark;
    use crate::plate::proposal::Mistake;

    /// A column: volts, amperes, hertz, speed, power with its unit, power factor, efficiency in percent.
    fn column(figures: [&str; 7]) -> Column {
        Name::OF_A_COLUMN.into_iter().zip(figures).fold(Column::default(), |column, (name, text)| {
            let (text, unit) = text.split_once(' ').unwrap_or((text, name.kind().usual().symbol));
            column.with(name, Mark::read(name, text, unit))
        })
    }

    fn plate(figures: &[[&str; 7]]) -> Plate {
        let mut plate = Plate::default();
        for (at, figures) in figures.iter().enumerate() {
            plate.columns[at] = column(*figures);
        }
        plate
    }

    fn run(figures: &[[&str; 7]]) -> Outcome {
        check(&Inputs { plate: plate(figures) })
    }

    /// C-MN-017 (row MN-06): 11 kW, 400 V, 20.9 A, 0.83, 91.4 % (the IE3 figure of IEC 60034-30-1 for 4 poles).
    const GOOD: [&str; 7] = ["400", "20.9", "50", "1470", "11", "0.83", "91.4"];

    #[test]
    fn a_published_plate_agrees_and_each_misreading_is_found() {
        let good = run(&[GOOD]);
        assert_eq!((good.verdict, good.notes.len()), (Verdict::Within, 0), "{good:?}");
        for (at, wrong, told) in [
            (1, "12.1", "Current read as 12.1 A; about 21.0 A would fit: the amperes of the other connection."),
            (1, "209", "Current read as 209 A; 20.9 A would fit: the decimal point."),
            (1, "29.0", "Current read as 29.0 A; 20.9 A would fit: two digits exchanged."),
            (2, "60", "Frequency read as 60 Hz; 50 Hz would fit: the other frequency."),
            (3, "4170", "Speed read as 4170 rpm; 1470 rpm would fit: two digits exchanged."),
            (3, "14.7", "Speed read as 14.7 rpm; 1470 rpm would fit: the decimal point."),
            (4, "11 hp", "Power read as 11 hp; 11 kW would fit: the unit."),
            (4, "111", "Power read as 111 kW; 11 kW would fit: a digit written twice."),
            (0, "40", "Voltage read as 40 V; 400 V would fit: the decimal point."),
            (5, "0.38", "Power factor read as 0.38; 0.83 would fit: two digits exchanged."),
            (6, "9.4", "Efficiency read as 9.4 %; 94 % would fit: the decimal point."),
        ] {
            let mut figures = GOOD;
            figures[at] = wrong;
            let said = run(&[figures]);
            assert_eq!(said.verdict, Verdict::Outside, "{wrong}: {}", said.summary);
            let three: Vec<&str> = said.notes.iter().take(3).map(|n| n.split_once(" · ").expect("ranked").1).collect();
            assert!(three.contains(&told), "{wrong}: {three:?}");
        }
        let horsepower = run(&[["400", "27,5", "50", "1470", "20", "0.86", "91.8"]]);
        assert_eq!(horsepower.notes[0], "1 · Power read as 20 kW; 20 hp would fit: the unit.");
        let exchanged = run(&[["400", "20.9", "50", "1470", "11", "0.914", "63"]]);
        assert_eq!(exchanged.verdict, Verdict::Outside, "{exchanged:?}");
        let exchanged = run(&[["400", "26.4", "50", "1470", "11", "0.914", "66"]]);
        assert_eq!(
            exchanged.notes[0],
            "1 · Power factor 0.914 and efficiency 66 % exchanged would fit: power factor 0.66, efficiency 91.4 %."
        );
    }

    /// Star and delta of one winding: volts apart by √3, amperes the other way.
    #[test]
    fn the_columns_of_one_plate_hold_each_other() {
        let delta = ["230", "36.2", "50", "1470", "11", "", ""];
        let star = ["400", "20.9", "50", "1470", "11", "", ""];
        assert_eq!(run(&[delta, star]).verdict, Verdict::Within);
        let mut wrong = star;
        wrong[3] = "1740";
        let said = run(&[delta, wrong]);
        assert_ne!(said.verdict, Verdict::Within);
        assert!(said.notes[0].contains("column 2, speed read as 1740 rpm; 1470 rpm"), "{:?}", said.notes);
    }

    /// Plates for two speeds (Dahlander) and for two duties print columns that differ, in step with their powers.
    #[test]
    fn two_speeds_and_two_duties_are_no_contradiction() {
        let slow = ["400", "14.9", "50", "965", "7", "0.80", "85"];
        let fast = ["400", "20.9", "50", "1470", "11", "0.83", "91.4"];
        assert_eq!(run(&[fast, slow]).verdict, Verdict::Within, "{:?}", run(&[fast, slow]).summary);
        let copied = ["400", "20.9", "50", "980", "11", "0.83", "91.4"];
        assert_ne!(run(&[fast, copied]).verdict, Verdict::Within);
        let short_time = ["400", "28.4", "50", "1455", "15", "0.84", "90.8"];
        assert_eq!(run(&[fast, short_time]).verdict, Verdict::Within, "{:?}", run(&[fast, short_time]).summary);
    }

    #[test]
    fn printed_poles_and_impossible_parts_count() {
        let mut poles = plate(&[GOOD]);
        poles.poles = Mark::read(Name::Poles, "6", "");
        let said = check(&Inputs { plate: poles });
        assert_eq!(said.verdict, Verdict::Outside, "{said:?}");
        assert!(poles.misreadings().iter().any(|p| p.mistake == Mistake::PoleNumber), "{:?}", said.notes);
        let mut above = GOOD;
        above[6] = "914";
        assert!(run(&[above]).notes[0].contains("91.4 %"), "{:?}", run(&[above]).notes);
    }

    #[test]
    fn a_plate_without_relations_waits_and_one_beyond_repair_says_so() {
        let waiting = run(&[["400", "", "", "", "11", "", ""]]);
        assert_eq!(waiting.verdict, Verdict::NotAssessed);
        assert_eq!(waiting.missing[0].what, "rated current");
        assert!(!waiting.limit.is_empty());
        let lost = run(&[["400", "2", "60", "2222", "11", "0.2", "20"]]);
        assert_eq!((lost.verdict, lost.notes.len()), (Verdict::Outside, 0), "{:?}", lost.notes);
        assert!(lost.summary.contains("No single misreading"), "{}", lost.summary);
    }

    proptest::proptest! {
        #![proptest_config(proptest::test_runner::Config { failure_persistence: None, cases: 64, ..Default::default() })]

        /// Whatever is typed, the check answers in words, and what it tells mends the plate.
        #[test]
        fn what_is_told_mends_the_plate(figures in proptest::array::uniform7("[0-9]{0,4}([.,][0-9]{1,3})?")) {
            let plate = plate(&[figures.each_ref().map(String::as_str)]);
            let said = check(&Inputs { plate });
            let words = [&said.summary, &said.limit].into_iter().chain(&said.notes);
            assert!(words.into_iter().all(|w| !w.contains("not a number") && !w.contains("inf")), "{:?}", said);
            for told in plate.misreadings() {
                assert!(!told.applied(&plate).relations().iter().any(Relation::is_broken), "{:?}", told);
            }
        }
    }
}
