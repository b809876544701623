//! The parameter record: settings and sheets in, verdict and limit out.

use super::case::{Case, Field, Typing};
use crate::plant::Sheet::{DrivePlate, Further, Load, Motor};
use crate::record::ParameterColumn::{self, AsFound, AsLeft, Intended};
use engineering::Verdict::{Marginal, NotAssessed, Outside, Within};
use engineering::{Outcome, Verdict};

type Keyed = (&'static str, ParameterColumn, &'static str);

fn case(set: &[Field], entered: &[Typing], keyed: &[Keyed]) -> Case {
    let mut case = Case::of(set, entered);
    for (function, column, text) in keyed {
        case.keyed(function, *column, text);
    }
    case
}

fn one(set: &[Field], entered: &[Typing], keyed: &[Keyed], check: &str) -> Outcome {
    case(set, entered, keyed).once(check)
}

/// The motor of C-NL-001 with rated torque of C-MN-010, and a load of 70 N·m with 4 kg·m².
const MACHINE: &[Field] = &[
    (Motor, "amps", "21"),
    (Motor, "hertz", "50"),
    (Motor, "rpm", "1470"),
    (Motor, "power", "15"),
    (Motor, "power-factor", "0.85"),
    (Motor, "breakdown-torque", "3.0"),
    (Motor, "inertia", "0.1"),
    (Load, "profile", "constant"),
    (Load, "torque", "70"),
    (Load, "at-speed", "1470"),
    (Load, "breakaway", "100"),
    (Load, "inertia", "3.9"),
    (Load, "coupling-torque", "400"),
    (DrivePlate, "continuous-current", "32"),
    (DrivePlate, "overload", "150"),
    (DrivePlate, "overload-time", "60"),
    (DrivePlate, "overload-period", "600"),
];

/// Rows RM-01 and NL-05: in 10 s the ramp asks 131.6 N·m, 27.3 A or more; whatever is set, a limit below is too low.
#[test]
fn a_current_limit_is_held_against_the_torque_that_the_ramp_asks() {
    let said = |limit, ramp| {
        let keyed = [("current-limit", Intended, limit), ("acceleration-time", Intended, ramp)];
        one(MACHINE, &[], &keyed, "current-limit")
    };
    let short = said("20", "10");
    assert_eq!(short.verdict, Outside);
    assert!(short.summary.contains("too low for acceleration"), "{}", short.summary);
    assert_eq!(said("30", "10").verdict, Within, "{}", said("30", "10").summary);
    assert_eq!(said("20", "100").verdict, Within, "{}", said("20", "100").summary);
    assert!(short.limit.starts_with("from 27.") && short.limit.contains("(acceleration)"), "{}", short.limit);
    // Each column by its own ramp.
    let both = case(
        MACHINE,
        &[],
        &[
            ("current-limit", Intended, "20"),
            ("acceleration-time", Intended, "100"),
            ("current-limit", AsLeft, "20"),
            ("acceleration-time", AsLeft, "10"),
        ],
    );
    let verdicts: Vec<_> = both.runs("current-limit").into_iter().map(|(of, o)| (of, o.verdict)).collect();
    assert_eq!(verdicts, [("intended".to_owned(), Within), ("as left".to_owned(), Outside)]);
}

/// A peak of a few seconds is no sixty-second overload: 150 % of 24 A bound it, not 60 A.
#[test]
fn the_smaller_of_overload_and_peak_bounds_the_current_limit() {
    let keyed = [("current-limit", Intended, "50"), ("acceleration-time", Intended, "10")];
    for (peak, bound) in [("60", "36.0 A (the drive's overload"), ("33", "33.0 A (the drive's overload")] {
        let set = [MACHINE, &[(DrivePlate, "continuous-current", "24"), (DrivePlate, "peak-current", peak)]].concat();
        let outcome = one(&set, &[], &keyed, "current-limit");
        assert!(outcome.verdict == Outside && outcome.limit.contains(bound), "{}", outcome.limit);
    }
}

/// NAMUR NE 43 (row AN-02) for a live zero; a network is watched by its own function and tried at its own step.
#[test]
fn loss_of_reference_by_where_the_reference_comes_from() {
    let said = |source, set: &[Field], entered: &[Typing], more: &[Keyed]| {
        let keyed = [&[("reference-source", Intended, source)], more].concat();
        one(set, entered, &keyed, "loss-of-reference")
    };
    let signal: &[Field] = &[(Further, "reference-signal", "4-20")];
    let loop_tried: &[Typing] = &[("reference-loss-right", "yes")];
    let network_tried: &[Typing] = &[("communication-loss-right", "yes")];
    let trips: &[Keyed] = &[("loss-of-reference", Intended, "trip"), ("loss-of-reference-level", Intended, "3.6")];
    let network: &[Keyed] = &[("loss-of-communication", Intended, "ramp")];
    for (source, set, entered, keyed, verdict) in [
        ("analogue", signal, loop_tried, trips, Within),
        ("controller", signal, loop_tried, trips, Within),
        ("analogue", &[(Further, "reference-signal", "0-10")], loop_tried, trips, Marginal),
        ("analogue", &[], loop_tried, trips, NotAssessed),
        ("analogue", signal, network_tried, trips, NotAssessed),
        ("network", &[], network_tried, network, Within),
        ("network", &[], loop_tried, network, NotAssessed),
        ("network", signal, loop_tried, trips, NotAssessed),
        ("network", &[], network_tried, &[("loss-of-communication", Intended, "none")], Outside),
        ("fixed", &[], &[], &[], Within),
    ] as [(&str, &[Field], &[Typing], &[Keyed], Verdict); 10]
    {
        let outcome = said(source, set, entered, keyed);
        assert_eq!(outcome.verdict, verdict, "{source} {set:?} {entered:?} {keyed:?}: {}", outcome.summary);
    }
    assert_eq!(said("analogue", &[], loop_tried, trips).missing[0].what, "kind of speed reference");
    let specified: &[Field] = &[(Further, "loss-of-reference-action", "trip")];
    assert_eq!(said("network", specified, network_tried, network).limit, "as specified: trip and coast; tried once");
    assert_eq!(said("network", specified, network_tried, network).verdict, Outside);
}

/// Row AN-01: on 0 to 20 mA the five points stand at a fifth to the whole of the span. Limit: row AN-03.
#[test]
fn reference_scaling_by_the_ends_of_the_signal() {
    let base: &[Field] = &[(Further, "reference-low-hertz", "0"), (Further, "reference-high-hertz", "50")];
    let typed = |hertz: [&'static str; 5]| {
        let rows = ["ref-hz/0", "ref-hz/1", "ref-hz/2", "ref-hz/3", "ref-hz/4"];
        let applied = [
            ("ref-applied/0", "4"),
            ("ref-applied/1", "8"),
            ("ref-applied/2", "12"),
            ("ref-applied/3", "16"),
            ("ref-applied/4", "20"),
        ];
        [rows.into_iter().zip(hertz).collect::<Vec<_>>(), applied.to_vec()].concat()
    };
    let (live, dead) = (typed(["0", "12.5", "25", "37.5", "50"]), typed(["10", "20", "30", "40", "50"]));
    let limit = "at most 0.50 % of span at every point (common practice)";
    for (set, entered, verdict) in [
        (vec![], &live, Within),
        (vec![], &dead, Outside),
        (vec![(Further, "reference-signal", "0-20")], &dead, Within),
        (vec![(Further, "reference-low", "0")], &dead, Within),
        (vec![(Further, "reference-signal", "0-20")], &live, Outside),
        (vec![(Further, "reference-signal", "0-10")], &dead, NotAssessed),
    ] as [(Vec<Field>, &Vec<Typing>, Verdict); 6]
    {
        let outcome = one(&[base, &set].concat(), entered, &[], "reference-scaling");
        assert_eq!((outcome.verdict, outcome.limit.as_str()), (verdict, limit), "{set:?}: {}", outcome.summary);
    }
}

/// Common practice (row TS-01): what was changed for a test is back, and nobody may stay silent about it.
#[test]
fn test_settings_by_what_the_record_says_was_changed() {
    let said = |entered: &[Typing], keyed: &[Keyed]| one(&[], entered, keyed, "test-settings-restored");
    let silent = said(&[], &[]);
    assert_eq!((silent.verdict, silent.limit.as_str()), (NotAssessed, "each as intended"));
    assert_eq!(silent.missing[0].what, "settings changed for a test, or that none was");
    let none = said(&[], &[("test-other", Intended, "None")]);
    assert_eq!((none.verdict, none.summary.as_str()), (Within, "Nothing was changed for a test."));
    let mut left_out = case(&[], &[], &[]);
    left_out.leave_out("lower-limits");
    assert_eq!(left_out.once("test-settings-restored").verdict, NotAssessed);
    left_out.leave_out("overload-trip");
    assert_eq!(left_out.once("test-settings-restored").verdict, Within);

    let lowered: &[Typing] = &[("limits-lowered", "yes")];
    let unlisted = said(lowered, &[("test-other", Intended, "none")]);
    assert_eq!(unlisted.verdict, NotAssessed);
    assert_eq!(unlisted.missing[0].what, "test settings that were lowered for the first turn");
    let rows: &[Keyed] =
        &[("test-current-limit", AsFound, "12"), ("current-limit", Intended, "33"), ("current-limit", AsLeft, "33.0")];
    assert_eq!(said(lowered, rows).verdict, Within, "{}", said(lowered, rows).summary);
    let own = [rows, &[("test-current-limit", AsLeft, "12")]].concat();
    let own = said(lowered, &own);
    assert_eq!(own.verdict, Outside);
    assert!(own.summary.contains("by its test row"), "{}", own.summary);
    let other: &[Keyed] = &[("test-other", AsFound, "slip compensation off"), ("test-other", Intended, "on")];
    assert_eq!(said(&[], other).verdict, NotAssessed);
    assert_eq!(said(&[], &[other, &[("test-other", AsLeft, "on")]].concat()).verdict, Within);
    assert_eq!(said(&[], &[other, &[("test-other", AsLeft, "off")]].concat()).verdict, Outside);

    let set: &[Keyed] = &[("overload-current", Intended, "20.7"), ("overload-current", AsLeft, "20.7")];
    for (restored, verdict) in [("20.7", Within), ("8.9", Outside)] {
        let outcome = said(&[("overload-trip-set", "8.9"), ("overload-restored", restored)], set);
        assert_eq!(outcome.verdict, verdict, "{}", outcome.summary);
    }
    let open = said(&[("overload-trip-set", "8.9")], set);
    assert_eq!(open.missing[0].what, "overload current setting after its trip as left");
}

/// One row a check of this file, by the sources in its heading: what is set and what bounds it in, verdict and limit out.
#[test]
fn the_other_settings_each_against_their_bound() {
    let plate: &[Field] =
        &[(Motor, "volts", "400"), (Motor, "amps", "20"), (Motor, "hertz", "50"), (Motor, "rpm", "1465")];
    for (check, set, keyed, verdict, limit) in [
        ("motor-data-settings", &[], &[("motor-amps", Intended, "32")], Outside, "each as on the plate"),
        (
            "volts-per-hertz",
            &[],
            &[("base-volts", Intended, "400"), ("base-frequency", Intended, "87")],
            Outside,
            "8.000 V/Hz",
        ),
        (
            "volts-per-hertz",
            &[],
            &[("base-volts", Intended, "400"), ("base-frequency", Intended, "50")],
            Within,
            "8.000 V/Hz",
        ),
        (
            "maximum-speed",
            &[(Motor, "maximum-speed", "2000"), (Load, "speed-limit", "2000")],
            &[("maximum-frequency", Intended, "80")],
            Outside,
            "at most 2000 rpm",
        ),
        (
            "minimum-speed",
            &[(Motor, "minimum-speed", "600"), (Load, "speed-least", "600")],
            &[("minimum-frequency", Intended, "10")],
            Outside,
            "at least 600 rpm",
        ),
        ("overload-setting", &[], &[("overload-current", Intended, "21")], Outside, "at most 20.00 A"),
        (
            "switching-frequency",
            &[(DrivePlate, "switching-rated", "4")],
            &[("switching-frequency", Intended, "8")],
            Outside,
            "at most 4.0 kHz",
        ),
        (
            "skip-bands",
            &[],
            &[
                ("skip-1-low", Intended, "20"),
                ("skip-1-high", Intended, "24"),
                ("fixed-speed-1", Intended, "22"),
                ("minimum-frequency", Intended, "5"),
                ("maximum-frequency", Intended, "50"),
            ],
            Outside,
            "no working speed inside a band",
        ),
        (
            "restart",
            &[(Further, "auto-restart-allowed", "no")],
            &[("auto-restart", Intended, "yes"), ("restart-after-power", Intended, "no")],
            Outside,
            "off, or allowed in writing",
        ),
    ] as [(&str, &[Field], &[Keyed], Verdict, &str); 9]
    {
        let outcome = one(&[plate, set].concat(), &[], keyed, check);
        assert_eq!(outcome.verdict, verdict, "{check}: {} {:?}", outcome.summary, outcome.missing);
        assert!(outcome.limit.contains(limit), "{check}: {}", outcome.limit);
    }
}
