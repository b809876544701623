//! Nameplates, fit and cable: sheets in, verdict and limit out. Limits by the sources of the checks.

use super::case::{Case, Field, hold};
use crate::plant::Sheet::{Cable, Drive, DrivePlate, Further, Motor, Site, Supply};
use engineering::Verdict::{Marginal, NotAssessed, Outside, Within};

const MOTOR: &[Field] = &[
    (Motor, "volts", "400"),
    (Motor, "amps", "14.5"),
    (Motor, "hertz", "50"),
    (Motor, "rpm", "1460"),
    (Motor, "power", "7.5"),
    (Motor, "connection", "star"),
];

/// IEC 60034-1 clause 7.3 (row MN-13): only links that somebody looked at count.
#[test]
fn connection_fit_by_the_links_found() {
    let limit = "flux within ±5 % of rated, at most ±10 %";
    let base = [MOTOR, &[(Supply, "volts", "400")]].concat();
    hold(
        "connection-fit",
        &base,
        &[
            (&[], &[], NotAssessed, limit),
            (&[], &[("links-found", "star")], Within, limit),
            (&[], &[("links-found", "single")], Within, limit),
            (&[], &[("links-found", "delta")], NotAssessed, limit),
        ],
    );
}

/// Row VF-07 (common practice): 75 to 85 % at half speed; the maker's curve and speed range go first.
#[test]
fn low_speed_cooling_by_kind_of_cooling_and_maker() {
    use crate::record::{ParameterColumn, ParameterPlace};
    let said = |set: &[Field]| {
        let mut case = Case::of(&[MOTOR, set].concat(), &[]);
        let place = ParameterPlace { function: "minimum-frequency".to_owned(), column: ParameterColumn::Intended };
        case.parameter(place, "25", engineering::Kind::Frequency);
        let outcome = case.once("low-speed-cooling");
        (outcome.verdict, outcome.limit)
    };
    // The load is not stated: rated torque is assumed, and an assumption condemns nothing.
    let usual = (engineering::Verdict::Marginal, "at most 75.0 % of rated torque at 50.0 % speed".to_owned());
    for cooling in ["self", "surface", "air-stream"] {
        assert_eq!(said(&[(Motor, "cooling", cooling)]), usual, "{cooling}");
    }
    for cooling in ["separate", "liquid"] {
        assert_eq!(said(&[(Motor, "cooling", cooling)]).0, engineering::Verdict::Figure, "{cooling}");
    }
    let full = (Within, "at most 100 % of rated torque at 50.0 % speed".to_owned());
    assert_eq!(said(&[(Motor, "turndown", "2")]), full);
    assert_eq!(said(&[(Motor, "low-speed-torque", "20 ; 100\n100 ; 100")]), full);
    assert_eq!(said(&[(Motor, "low-speed-torque", "60 ; 100\n100 ; 100")]).0, NotAssessed);
}

/// Row DR-02 (common practice): what is lost is reckoned from the drive's own rating.
#[test]
fn drive_current_fit_from_the_rating_of_the_drive() {
    let base = [MOTOR, &[(DrivePlate, "continuous-current", "16"), (Drive, "ambient-high", "50")]].concat();
    let at = |celsius| (DrivePlate, "ambient-rated", celsius);
    hold(
        "drive-current-fit",
        &base,
        &[
            (&[], &[], Outside, "motor current at most 12.00 A"),
            (&[at("50")], &[], Within, "motor current at most 16.00 A"),
            (&[(Drive, "altitude", "1500")], &[], Outside, "motor current at most 11.40 A"),
            (
                &[at("50"), (Drive, "altitude", "1500"), (DrivePlate, "altitude-rated", "2000")],
                &[],
                Within,
                "motor current at most 16.00 A",
            ),
        ],
    );
}

/// A plate with two columns and none chosen: the first is taken, and said so (hint of the field).
#[test]
fn the_column_in_use_is_said_where_it_was_assumed() {
    let assumed = |case: &Case| {
        let outcome = case.once("rated-torque");
        outcome.assumed.iter().any(|a| a.what == "rating column in use")
    };
    let mut case = Case::of(MOTOR, &[]);
    assert!(!assumed(&case), "one column leaves nothing to choose");
    case.set(Motor, 1, "volts", "230");
    assert!(assumed(&case));
    assert!(!case.once("supply-voltage").assumed.iter().any(|a| a.what.contains("column")), "it reads no column");
    case.set(Motor, 0, "column-in-use", "1");
    assert!(!assumed(&case));
}

/// Row MN-06 (common practice): a ratio of √3 between two columns is star and delta; figures of every column are read,
/// with digits, unit, poles and class as typed.
#[test]
fn misreading_reads_every_column_and_names_the_likeliest() {
    let said = |set: &[Field], second: &[(&str, &str)]| {
        let mut case =
            Case::of(&[MOTOR, &[(Motor, "power-factor", "0.83"), (Motor, "efficiency", "90.4")], set].concat(), &[]);
        for (key, text) in second {
            case.set(Motor, 1, key, text);
        }
        let outcome = case.once("misreading");
        (outcome.verdict, outcome.notes)
    };
    let delta = [("volts", "230"), ("amps", "25.1"), ("hertz", "50"), ("rpm", "1460"), ("power", "7.5")];
    assert_eq!(said(&[], &delta), (Within, Vec::new()));
    let (verdict, notes) = said(&[(Motor, "amps", "145")], &[]);
    assert_eq!(verdict, Outside);
    assert_eq!(notes[0], "1 · Current read as 145 A; 14.5 A would fit: the decimal point.");
    let (verdict, notes) = said(&[(Motor, "poles", "6")], &[]);
    assert_eq!(verdict, Outside);
    assert!(notes.iter().any(|n| n.contains("Number of poles read as 6; 4 would fit")), "{notes:?}");
    let mut star = delta;
    star[1].1 = "14.5";
    let (verdict, notes) = said(&[], &star);
    assert_ne!(verdict, Within);
    assert!(notes.iter().any(|n| n.contains("Rating column 2, current read as 14.5 A; about 25.1 A")), "{notes:?}");
    assert_eq!(said(&[(Motor, "efficiency", "84"), (Motor, "amps", "15.6")], &[]).0, Within);
    let (verdict, notes) =
        said(&[(Motor, "efficiency", "84"), (Motor, "amps", "15.6"), (Motor, "efficiency-class", "ie3")], &[]);
    assert_eq!(verdict, Marginal, "{notes:?}");
}

/// A rating by name is exact: 4 kW is not open from 3.5 to 4.5 kW, or horsepower read as kilowatts would fit into it.
#[test]
fn power_balance_takes_a_rating_as_exact() {
    let plate: &[Field] = &[
        (Motor, "volts", "400"),
        (Motor, "amps", "8.80"),
        (Motor, "power", "4"),
        (Motor, "power-factor", "0.81"),
        (Motor, "efficiency", "88.6"),
    ];
    assert_eq!(Case::of(plate, &[]).once("power-balance").verdict, Outside);
    let fits = [plate, &[(Motor, "amps", "8.05")]].concat();
    assert_eq!(Case::of(&fits, &[]).once("power-balance").verdict, Within);
    let rounded = [plate, &[(Motor, "power", "4.3")]].concat();
    assert_eq!(Case::of(&rounded, &[]).once("power-balance").verdict, Within);
}

/// The maker's longest cable goes first; MG 1 part 31 (row CB-07) after it.
#[test]
fn reflected_wave_by_the_makers_longest_cable() {
    let base = [
        MOTOR,
        &[
            (Motor, "withstand", "mg1-31"),
            (Supply, "volts", "400"),
            (Cable, "length", "80"),
            (Cable, "type", "screened"),
            (DrivePlate, "cable-length-unscreened", "200"),
        ],
    ]
    .concat();
    let screened = |metres| (DrivePlate, "cable-length-screened", metres);
    let filtered: &[Field] = &[
        screened("50"),
        (Drive, "output-filter", "dv-dt"),
        (DrivePlate, "cable-length-filtered", "150"),
        (Cable, "rise-time", "0.5"),
    ];
    let by_winding = "peak at most 1240 V, rise not below 0.10 µs";
    hold(
        "reflected-wave",
        &base,
        &[
            (&[screened("100")], &[], Within, by_winding),
            (&[screened("50")], &[], Outside, "cable at most 50.0 m, by the maker"),
            (filtered, &[], Within, by_winding),
        ],
    );
}

/// Row PE-10 (common practice) 0.05 Ω over the conductor; the design's own limit besides.
#[test]
fn pe_continuity_by_conductor_and_design() {
    let base: &[Field] = &[(Cable, "length", "30"), (Cable, "pe-cross-section", "10"), (Cable, "pe-metal", "copper")];
    hold(
        "pe-continuity",
        base,
        &[
            (&[], &[("pe-ohms", "0.12")], Marginal, "at most 0.102 Ω; beyond 0.203 Ω outside"),
            (
                &[(Further, "pe-resistance-limit", "0.1")],
                &[("pe-ohms", "0.12")],
                Outside,
                "at most 0.100 Ω; beyond 0.100 Ω outside",
            ),
        ],
    );
}

/// IEEE 519 says nothing at a drive's terminals; the specification may, and the site may want a figure only.
#[test]
fn harmonic_distortion_by_specification_and_site() {
    let specified = (Further, "distortion-limit", "40");
    let at = |place| [("input-thdi", "45"), ("distortion-place", place)];
    hold(
        "harmonic-distortion",
        &[],
        &[
            (&[], &at("drive"), engineering::Verdict::Figure, "no limit at the drive's own terminals"),
            (&[specified], &at("drive"), Outside, "total harmonic distortion at most 40.0 %, by the specification"),
            (&[specified], &at("common-coupling"), NotAssessed, ""),
            (
                &[(Site, "harmonic-rule", "none")],
                &at("common-coupling"),
                engineering::Verdict::Figure,
                "none: the site has current distortion shown as a figure",
            ),
        ],
    );
}

/// IEEE 519 table 2, Isc/I_L = 25: 7 % of the demand current for orders below 11, 3.5 % from 11. The chart shows parts of
/// the fundamental, here half the demand current: twice as much.
#[test]
fn limits_of_single_harmonics_hold_at_the_common_coupling_only() {
    let plates = [(Supply, "demand-current", "800"), (Supply, "coupling-fault-current", "20")];
    let limits = |set: &[Field], place| {
        let case = Case::of(&[&plates, set].concat(), &[("input-fundamental", "400"), ("distortion-place", place)]);
        crate::judge::harmonic_limits(&case.view())
            .into_iter()
            .map(|(order, limit)| (order, (limit.fraction() * 1e5).round() / 1e3))
            .collect::<Vec<_>>()
    };
    assert_eq!(limits(&[], "common-coupling"), [(5, 14.0), (7, 14.0), (11, 7.0), (13, 7.0)]);
    assert!(limits(&[], "drive").is_empty());
    assert!(limits(&[(Site, "harmonic-rule", "none")], "common-coupling").is_empty());
}
