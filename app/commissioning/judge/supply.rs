//! Inputs of the supply, DC bus and earthing checks.

use super::{Runs, View, once};
use crate::plant::Sheet::{Cable, Drive, DrivePlate, Further, Site, Supply};
use engineering::checks::{
    bus_discharged, bus_voltage, disconnection, earth_voltages, line_current_balance, pe_conductor,
    short_circuit_rating, supply_unbalance, supply_voltage, terminals_dead, waiting_time,
};
use engineering::formulas::copper::Conductor;
use engineering::quantity::Quantity;
use engineering::{CrossSection, Ratio, Reading, Voltage};

fn lines<Q: Quantity>(view: &View<'_>, items: [&str; 3]) -> [Option<Reading<Q>>; 3] {
    items.map(|item| view.reading(item))
}

pub(super) fn supply_voltage(view: &View<'_>) -> Runs {
    let widened = |field: &str, tolerance: &str, sign: f64| -> Option<Voltage> {
        let volts = view.plate::<Voltage>(DrivePlate, field)?;
        let share = view.plate::<Ratio>(DrivePlate, tolerance).map_or(0.0, Ratio::fraction);
        Some(Voltage::from_volts(volts.volts() * (1.0 + sign * share)))
    };
    let site_range = match view.choice(Site, "supply-range") {
        Some("five-percent") => Some(supply_voltage::Range::FivePercent),
        Some("ten-percent") => Some(supply_voltage::Range::TenPercent),
        _ => None,
    };
    once(supply_voltage::check(&supply_voltage::Inputs {
        lines: lines(view, ["supply-u12", "supply-u23", "supply-u31"]),
        nominal: view.plate(Supply, "volts"),
        site_range,
        drive_lowest: widened("input-volts-low", "input-tolerance-low", -1.0),
        drive_highest: widened("input-volts-high", "input-tolerance-high", 1.0),
    }))
}

pub(super) fn supply_unbalance(view: &View<'_>) -> Runs {
    use supply_unbalance::{Definition, DriveLimit, Inputs, check};
    let definition = match view.choice(DrivePlate, "unbalance-definition") {
        Some("negative-sequence") => Definition::NegativeSequence,
        Some("largest-deviation") => Definition::LargestDeviation,
        _ => Definition::Larger,
    };
    once(check(&Inputs {
        lines: lines(view, ["supply-u12", "supply-u23", "supply-u31"]),
        drive_limit: view.plate(DrivePlate, "unbalance-limit").map(|value| DriveLimit { value, definition }),
        // Nobody enters by which definition the specification means its figure.
        specified_limit: view
            .plate(Further, "unbalance-site-limit")
            .map(|value| DriveLimit { value, definition: Definition::Larger }),
        bypass: view.flag(Drive, "bypass"),
    }))
}

pub(super) fn line_current_balance(view: &View<'_>) -> Runs {
    once(line_current_balance::check(&line_current_balance::Inputs {
        lines: lines(view, ["input-i-1", "input-i-2", "input-i-3"]),
    }))
}

pub(super) fn waiting_time(view: &View<'_>) -> Runs {
    once(waiting_time::check(&waiting_time::Inputs {
        waited: view.entered("waited", 0),
        label: view.plate(DrivePlate, "waiting-time"),
    }))
}

/// What the item keys of a proof begin with: each time it is made again it has its own.
fn proof(step: &str) -> &'static str {
    match step {
        "isolate-for-exchange" => "exchange-",
        "isolate-to-couple" => "couple-",
        _ => "",
    }
}

/// Whether the proof was left alone, since no lead is exchanged.
fn no_proof_needed(view: &View<'_>, step: &str) -> bool {
    step == "isolate-for-exchange" && view.chosen("exchange-isolation") == Some("not-needed")
}

pub(super) fn bus_discharged(view: &View<'_>, step: &str) -> Runs {
    if no_proof_needed(view, step) {
        return Vec::new();
    }
    let read = |point: &str| view.reading(&format!("{}{point}", proof(step)));
    once(bus_discharged::check(&bus_discharged::Inputs {
        between_poles: read("bus-after-waiting"),
        plus_to_earth: read("bus-plus-to-earth"),
        minus_to_earth: read("bus-minus-to-earth"),
        site_applies_iec_60204: view.choice(Site, "residual-voltage").map(|rule| rule == "60"),
        maker_limit: view.plate(DrivePlate, "bus-limit"),
        site_limit: view.plate(Site, "residual-voltage-other"),
    }))
}

pub(super) fn terminals_dead(view: &View<'_>, step: &str) -> Runs {
    if no_proof_needed(view, step) {
        return Vec::new();
    }
    let read = |point: &str| view.reading(&format!("{}{point}", proof(step)));
    once(terminals_dead::check(&terminals_dead::Inputs {
        supply: read("input-dead"),
        output: read("output-dead"),
        site_limit: view.plate(Site, "residual-voltage-other"),
    }))
}

/// The earthing that a choice names.
fn earthing(key: &str) -> Option<earth_voltages::Earthing> {
    use earth_voltages::Earthing::{CornerEarthed, EarthedStar, HighResistance, Insulated};
    match key {
        "tn" | "tn-s" | "tn-c-s" | "tn-c" | "tt" => Some(EarthedStar),
        "corner-earthed" => Some(CornerEarthed),
        "it" => Some(Insulated),
        "high-resistance" => Some(HighResistance),
        _ => None,
    }
}

/// Once for the earthing chosen; for the sheet's and for the one found apart where the two differ.
pub(super) fn earth_voltages(view: &View<'_>) -> Runs {
    let sheet = view.choice(Supply, "earthing").and_then(earthing);
    let found = view.chosen("earthing-found").and_then(earthing);
    let run = |earthing| {
        earth_voltages::check(&earth_voltages::Inputs {
            to_earth: lines(view, ["supply-u1-pe", "supply-u2-pe", "supply-u3-pe"]),
            lines: lines(view, ["supply-u12", "supply-u23", "supply-u31"]),
            nominal: view.plate(Supply, "volts"),
            earthing,
        })
    };
    match (sheet, found) {
        (Some(sheet), Some(found)) if sheet != found => {
            vec![("by the supply sheet".to_owned(), run(Some(sheet))), ("as found".to_owned(), run(Some(found)))]
        }
        _ => once(run(sheet.or(found))),
    }
}

pub(super) fn bus_voltage(view: &View<'_>) -> Runs {
    // The volts of the same moment where they were read, otherwise those of the phase "Identify".
    let now = lines(view, ["energised-u12", "energised-u23", "energised-u31"]);
    let complete = now.iter().all(Option::is_some);
    once(bus_voltage::check(&bus_voltage::Inputs {
        bus: view.reading("bus-energised"),
        lines: if complete { now } else { lines(view, ["supply-u12", "supply-u23", "supply-u31"]) },
        active_front_end: view.flag(Drive, "active-front-end"),
    }))
}

/// A conductor's metal from a sheet.
pub(super) fn metal(key: Option<&str>) -> Option<Conductor> {
    match key {
        Some("copper") => Some(Conductor::Copper),
        Some("aluminium") => Some(Conductor::Aluminium),
        _ => None,
    }
}

/// Once for the conductor to the drive, with the rule for touch current, and once for the one on to the motor.
pub(super) fn pe_conductor(view: &View<'_>) -> Runs {
    use pe_conductor::{Inputs, Leg, Routing, check};
    let parallel = |section: Option<CrossSection>, count: &str| {
        let times = view.count(Cable, count).unwrap_or(1).max(1);
        section.map(|s| CrossSection::from_square_millimetres(s.square_millimetres() * f64::from(times)))
    };
    let to_drive = check(&Inputs {
        leg: Leg::ToDrive,
        phase_section: view.plate(Cable, "supply-cross-section"),
        phase_metal: metal(view.choice(Supply, "feeder-metal")),
        pe_section: view.plate(Cable, "supply-pe-cross-section"),
        metal: metal(view.choice(Cable, "supply-pe-metal")),
        routing: None,
        touch_current_above: match view.choice(DrivePlate, "touch-current") {
            Some("above") => Some(true),
            Some("below") => Some(false),
            _ => None,
        },
        touch_current_ac: view.plate(DrivePlate, "touch-current-ac"),
        touch_current_dc: view.plate(DrivePlate, "touch-current-dc"),
        second_pe: view.flag(Cable, "second-pe"),
        disconnects_on_break: view.flag(Cable, "pe-monitored"),
        maker_section: view.plate(DrivePlate, "pe-minimum"),
    });
    let to_motor = check(&Inputs {
        leg: Leg::ToMotor,
        phase_section: parallel(view.plate(Cable, "cross-section"), "parallel"),
        phase_metal: metal(view.choice(Cable, "metal")),
        pe_section: parallel(view.plate(Cable, "pe-cross-section"), "pe-parallel"),
        metal: metal(view.choice(Cable, "pe-metal")),
        routing: match view.flag(Cable, "pe-in-cable") {
            Some(true) => Some(Routing::InCable),
            Some(false) => Some(Routing::SeparateUnprotected),
            None => None,
        },
        ..Inputs::default()
    });
    vec![("to the drive".to_owned(), to_drive), ("to the motor".to_owned(), to_motor)]
}

/// Whether the supply is a star with earthed neutral, by the sheet and by what was found; one word against it is enough.
fn earthed_star(view: &View<'_>) -> Option<bool> {
    let says = |key: Option<&str>| match key {
        Some("tn" | "tn-s" | "tn-c-s" | "tn-c" | "tt") => Some(true),
        Some("it" | "corner-earthed" | "high-resistance") => Some(false),
        _ => None,
    };
    let sheet = says(view.choice(Supply, "earthing"));
    let found = says(view.chosen("earthing-found"));
    if sheet == Some(false) || found == Some(false) { Some(false) } else { sheet.or(found) }
}

pub(super) fn disconnection(view: &View<'_>) -> Runs {
    let accepted_proof = match view.choice(Site, "disconnection-rule") {
        Some("loop-impedance") => Some(disconnection::Proof::MeasuredLoop),
        Some("design") => Some(disconnection::Proof::Design),
        _ => None,
    };
    once(disconnection::check(&disconnection::Inputs {
        loop_impedance: view.reading("loop-impedance"),
        earthed_star: earthed_star(view),
        voltage_to_earth: view
            .plate::<Voltage>(Supply, "volts")
            .map(|v| Voltage::from_volts(v.volts() / 3.0_f64.sqrt())),
        operating_current: view.plate(Supply, "device-trip-current"),
        operating_time: view.plate(Supply, "device-trip-time"),
        longest_time: view.plate(Site, "disconnection-time"),
        design_impedance: view.plate(Supply, "loop-impedance"),
        proved_by_design: view.chosen("disconnection-proof").map(|proof| proof == "design"),
        accepted_proof,
        site_share: view.plate(Site, "loop-share"),
    }))
}

pub(super) fn short_circuit_rating(view: &View<'_>) -> Runs {
    use engineering::formulas::fault_current::Transformer;
    use short_circuit_rating::{Inputs, check};
    let transformer = match (view.plate(Supply, "transformer-rating"), view.plate(Supply, "transformer-impedance")) {
        (Some(rating), Some(impedance)) => view
            .plate(Supply, "transformer-volts")
            .or_else(|| view.plate(Supply, "volts"))
            .map(|voltage| Transformer { rating, secondary: voltage, impedance }),
        _ => None,
    };
    once(check(&Inputs {
        rating: view.plate(DrivePlate, "short-circuit-rating"),
        stated_prospective: view.plate(Supply, "fault-current"),
        transformer,
        source_level: view.plate(Supply, "source-fault-power"),
        cable_length: view.plate(Supply, "feeder-length"),
        cable_section: view.plate(Supply, "feeder-cross-section"),
        parallel: view.count(Supply, "feeder-parallel"),
        motors_full_load: view.plate(Supply, "motors-full-load"),
    }))
}
