//! Supply, bus and earthing: sheets and entries in, verdict and limit out. Limits by the sources of the checks.

use super::case::{Case, Field, hold};
use crate::plant::Sheet::{Cable, DrivePlate, Further, Motor, Site, Supply};
use engineering::Verdict::{Figure, Marginal, NotAssessed, Outside, Within};

/// IEC 60038: ±10 %; ANSI C84.1 range A: ±5 % (both from memory).
#[test]
fn supply_voltage_by_the_range_of_the_site() {
    let read: &[_] = &[("supply-u12", "375"), ("supply-u23", "399"), ("supply-u31", "402")];
    hold(
        "supply-voltage",
        &[(Supply, "volts", "400")],
        &[
            (&[], read, Within, "360.0 to 440.0 V between lines"),
            (&[(Site, "supply-range", "five-percent")], read, Outside, "380.0 to 420.0 V between lines"),
        ],
    );
}

/// Hubert, Ex. 5.14: 2.58 % by the largest deviation, 2.65 % negative sequence.
#[test]
fn supply_unbalance_by_manual_and_specification() {
    let read: &[_] = &[("supply-u12", "460"), ("supply-u23", "455"), ("supply-u31", "440")];
    let manual = (DrivePlate, "unbalance-limit", "3");
    let meant = (DrivePlate, "unbalance-definition", "largest-deviation");
    let specified = (Further, "unbalance-site-limit", "2");
    let both =
        "Largest deviation from the mean at most 3.00 %; Unbalance by the larger of both definitions at most 2.00 %";
    hold(
        "supply-unbalance",
        &[],
        &[
            (&[manual, meant], read, Within, "Largest deviation from the mean at most 3.00 %"),
            (&[manual, meant, specified], read, Outside, both),
        ],
    );
}

/// NFPA 70 460.6: 50 V; the lower one of maker and site goes first.
#[test]
fn bus_discharged_by_the_lowest_limit() {
    let read: &[_] = &[("bus-after-waiting", "28")];
    let (maker, site) = ((DrivePlate, "bus-limit", "40"), (Site, "residual-voltage-other", "25"));
    hold(
        "bus-discharged",
        &[],
        &[
            (&[], read, Figure, "not above 50.0 V"),
            (&[maker], read, Figure, "not above 40.0 V"),
            (&[maker, site], read, Outside, "not above 25.0 V"),
        ],
    );
}

/// IEC 61800-5-1, rows PE-03 and PE-04: by phase section, and 10 mm² copper where the touch current is high.
#[test]
fn pe_conductor_to_the_drive_and_to_the_motor() {
    let sections: &[Field] = &[
        (Cable, "supply-cross-section", "2.5"),
        (Cable, "supply-pe-cross-section", "2.5"),
        (Cable, "supply-pe-metal", "copper"),
        (Cable, "cross-section", "4"),
        (Cable, "pe-cross-section", "4"),
        (Cable, "pe-metal", "copper"),
        (Cable, "pe-in-cable", "yes"),
    ];
    let said = |more: &[Field]| -> Vec<_> {
        let runs = Case::of(&[sections, more].concat(), &[]).runs("pe-conductor");
        runs.into_iter().map(|(of, o)| (of, o.verdict, o.limit)).collect()
    };
    let drive = |verdict, limit: &str| ("to the drive".to_owned(), verdict, limit.to_owned());
    let motor = ("to the motor".to_owned(), Within, "at least 4.00 mm²".to_owned());
    let (above, figure) = ((DrivePlate, "touch-current", "above"), (DrivePlate, "touch-current-ac", "2"));
    // The printed figure does not talk the class down, and half of the two figures is no class.
    assert_eq!(said(&[above, figure]), [drive(Outside, "at least 10.0 mm²"), motor.clone()]);
    assert_eq!(said(&[figure]), [drive(Outside, "at least 10.0 mm²"), motor.clone()]);
    assert_eq!(said(&[(DrivePlate, "touch-current", "below")]), [drive(Within, "at least 2.50 mm²"), motor.clone()]);
    assert_eq!(said(&[above, (Cable, "second-pe", "yes")]), [drive(Within, "at least 2.50 mm²"), motor]);
    // 25 mm² copper phases ask 16 mm² of copper, and as much conductance of aluminium.
    let mixed = said(&[
        (Cable, "cross-section", "25"),
        (Cable, "metal", "copper"),
        (Cable, "pe-cross-section", "16"),
        (Cable, "pe-metal", "aluminium"),
    ]);
    assert_eq!((mixed[1].1, mixed[1].2.as_str()), (Outside, "at least 26.2 mm²"));
}

/// IEC 60364-4-41 clause 411.4 (from memory): 400/√3 V over 320 A allow 0.722 Ω; a loop measured cold 2/3 of it
/// (IEC 60364-6, informative annex, from memory), unless the site names its own share.
#[test]
fn disconnection_of_an_earthed_star_only() {
    let (limit, whole) = ("loop impedance at most 0.481 Ω", "loop impedance at most 0.722 Ω");
    let base: &[Field] = &[(Supply, "volts", "400"), (Supply, "device-trip-current", "320")];
    let (tn, it) = ((Supply, "earthing", "tn-s"), (Supply, "earthing", "it"));
    let measured: &[_] = &[("loop-impedance", "0.45")];
    let reckoned = (Supply, "loop-impedance", "0.9");
    let by_design: &[_] = &[("disconnection-proof", "design")];
    let times: &[Field] = &[tn, (Supply, "device-trip-time", "5"), (Site, "disconnection-time", "0.4")];
    hold(
        "disconnection",
        base,
        &[
            (&[tn], measured, Within, limit),
            (&[], measured, NotAssessed, ""),
            (&[], &[("loop-impedance", "0.45"), ("earthing-found", "tn")], Within, limit),
            (&[it], measured, NotAssessed, ""),
            (&[tn], &[("loop-impedance", "0.45"), ("earthing-found", "it")], NotAssessed, ""),
            (times, measured, NotAssessed, ""),
            (&[tn], by_design, Figure, ""),
            (&[tn], &[("loop-impedance", "0.5")], Outside, limit),
            (&[tn, (Site, "loop-share", "100")], &[("loop-impedance", "0.5")], Within, whole),
            (&[tn, reckoned], by_design, Outside, whole),
            (&[tn, (Site, "disconnection-rule", "loop-impedance")], by_design, NotAssessed, limit),
        ],
    );
}

/// Geometry: 400 V line to line are 231 V to an earthed star point, and 0, 400 and 400 V with a corner earthed.
#[test]
fn volts_to_earth_fit_the_earthing_chosen() {
    let star: &[_] = &[("supply-u1-pe", "231"), ("supply-u2-pe", "230"), ("supply-u3-pe", "232")];
    let corner: &[_] = &[("supply-u1-pe", "0.5"), ("supply-u2-pe", "399"), ("supply-u3-pe", "401")];
    let earthing = |key| [(Supply, "earthing", key)];
    let limit = "earthed star point: each 208 to 254 V";
    hold(
        "earth-voltages",
        &[(Supply, "volts", "400")],
        &[
            (&earthing("tn-s"), star, Within, limit),
            (&earthing("tt"), corner, Outside, limit),
            (&earthing("corner-earthed"), corner, Within, "earthed corner: one at most 40.0 V, two 360 to 440 V"),
            (&earthing("it"), star, Figure, "none: the system is not earthed"),
            (&[], star, NotAssessed, ""),
            (&[], &[star, &[("earthing-found", "tn")]].concat(), Within, limit),
            (&earthing("tn-c"), &[], NotAssessed, limit),
        ],
    );
    let both = Case::of(
        &[(Supply, "volts", "400"), (Supply, "earthing", "it")],
        &[star, &[("earthing-found", "corner-earthed")]].concat(),
    );
    let said: Vec<_> = both.runs("earth-voltages").into_iter().map(|(of, o)| (of, o.verdict)).collect();
    assert_eq!(said, [("by the supply sheet".to_owned(), Figure), ("as found".to_owned(), Outside)]);
}

/// Common practice, no source: within 10 % of the maker's torque; the maker's own range goes first.
#[test]
fn terminal_torque_against_the_drive_sheet() {
    let stated: &[Field] = &[(DrivePlate, "terminal-torque", "3.2")];
    let range: &[Field] = &[(DrivePlate, "terminal-torque", "3.2"), (DrivePlate, "terminal-torque-high", "4.5")];
    let limit = "2.88 to 3.52 N·m, the maker's figure ± 10 % (common practice)";
    hold(
        "terminal-torque",
        &[],
        &[
            (stated, &[("torque-input", "3.2"), ("torque-output", "3.2")], Within, limit),
            (stated, &[("torque-input", "3.2"), ("torque-output", "4.4")], Outside, limit),
            (range, &[("torque-output", "4.4")], Within, "3.20 to 4.50 N·m, the maker's range"),
            (stated, &[], Figure, limit),
        ],
    );
    let by_resistance = Case::of(stated, &[("joint-method", "ohmmeter")]);
    assert!(by_resistance.runs("terminal-torque").is_empty(), "nobody used a wrench");
}

/// IEEE 43-2013, table 1 (row IR-01) and row IR-11: the test itself decides what its reading is worth.
#[test]
fn insulation_tested_with_the_wrong_voltage_or_in_dew_is_marginal_at_best() {
    let plate: &[Field] = &[(Motor, "volts", "400")];
    let said = |volts, humidity| {
        let entered = [
            ("ir-60s", "900"),
            ("winding-temperature", "20"),
            ("ambient-temperature", "20"),
            ("relative-humidity", humidity),
            ("test-voltage", volts),
        ];
        Case::of(plate, &entered).once("insulation-resistance").verdict
    };
    assert_eq!([said("500", "50"), said("250", "50"), said("500", "100")], [Within, Marginal, Marginal]);
}
