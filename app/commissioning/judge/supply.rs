//! Inputs of the supply, DC bus and earthing checks.

use super::{Runs, View, once};
use crate::plant::Sheet::{Cable, Drive, DrivePlate, Further, Site, Supply};
use engineering::checks::{
    bus_discharged, bus_voltage, disconnection, line_current_balance, pe_conductor, short_circuit_rating,
    supply_unbalance, supply_voltage,
};
use engineering::formulas::copper::Conductor;
use engineering::quantity::Quantity;
use engineering::{CrossSection, Current, Ratio, Reading, Voltage};

fn lines<Q: Quantity>(view: &View<'_>, items: [&str; 3]) -> [Option<Reading<Q>>; 3] {
    items.map(|item| view.reading(item))
}

pub(super) fn supply_voltage(view: &View<'_>) -> Runs {
    let widened = |field: &str, tolerance: &str, sign: f64| -> Option<Voltage> {
        let volts = view.plate::<Voltage>(DrivePlate, field)?;
        let share = view.plate::<Ratio>(DrivePlate, tolerance).map_or(0.0, Ratio::fraction);
        Some(Voltage::from_volts(volts.volts() * (1.0 + sign * share)))
    };
    once(supply_voltage::check(&supply_voltage::Inputs {
        lines: lines(view, ["supply-u12", "supply-u23", "supply-u31"]),
        nominal: view.plate(Supply, "volts"),
        drive_lowest: widened("input-volts-low", "input-tolerance-low", -1.0),
        drive_highest: widened("input-volts-high", "input-tolerance-high", 1.0),
    }))
}

pub(super) fn supply_unbalance(view: &View<'_>) -> Runs {
    use supply_unbalance::{Definition, DriveLimit, Inputs, check};
    let definition = match view.choice(DrivePlate, "unbalance-definition") {
        Some("negative-sequence") => Definition::NegativeSequence,
        _ => Definition::LargestDeviation,
    };
    let drive_limit =
        view.plate(DrivePlate, "unbalance-limit").map(|value| DriveLimit { value, definition }).or_else(|| {
            let value = view.plate(Further, "unbalance-site-limit")?;
            Some(DriveLimit { value, definition: Definition::LargestDeviation })
        });
    once(check(&Inputs {
        lines: lines(view, ["supply-u12", "supply-u23", "supply-u31"]),
        drive_limit,
        bypass: view.flag(Drive, "bypass"),
    }))
}

pub(super) fn line_current_balance(view: &View<'_>) -> Runs {
    once(line_current_balance::check(&line_current_balance::Inputs {
        lines: lines(view, ["input-i-1", "input-i-2", "input-i-3"]),
    }))
}

pub(super) fn bus_discharged(view: &View<'_>, step: &str) -> Runs {
    let maker_limit = view.plate(DrivePlate, "bus-limit").or_else(|| view.plate(Site, "residual-voltage-other"));
    if step == "isolate-for-exchange" && view.chosen("exchange-isolation") == Some("not-needed") {
        return Vec::new();
    }
    let first = step == "prove-dead" || step.is_empty();
    let between = match step {
        "isolate-for-exchange" => "exchange-bus-after-waiting",
        "isolate-to-couple" => "couple-bus-after-waiting",
        _ => "bus-after-waiting",
    };
    once(bus_discharged::check(&bus_discharged::Inputs {
        between_poles: view.reading(between),
        plus_to_earth: view.reading("bus-plus-to-earth").filter(|_| first),
        minus_to_earth: view.reading("bus-minus-to-earth").filter(|_| first),
        site_applies_iec_60204: view.choice(Site, "residual-voltage").map(|rule| rule == "60"),
        maker_limit,
    }))
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

pub(super) fn pe_conductor(view: &View<'_>) -> Runs {
    use pe_conductor::{Inputs, Routing, check};
    let routing = match view.flag(Cable, "pe-in-cable") {
        Some(true) => Some(Routing::InCable),
        Some(false) => Some(Routing::SeparateUnprotected),
        None => None,
    };
    let parallel = |section: Option<CrossSection>, count: &str| {
        let times = view.count(Cable, count).unwrap_or(1).max(1);
        section.map(|s| CrossSection::from_square_millimetres(s.square_millimetres() * f64::from(times)))
    };
    // A class of leakage stands for a figure on its side of the threshold where no figure is printed.
    let by_class = match view.choice(DrivePlate, "touch-current") {
        Some("above") => Some(Current::from_amperes(0.0036)),
        Some("below") => Some(Current::from_amperes(0.0)),
        _ => None,
    };
    once(check(&Inputs {
        phase_section: parallel(view.plate(Cable, "cross-section"), "parallel"),
        pe_section: parallel(view.plate(Cable, "pe-cross-section"), "pe-parallel"),
        metal: metal(view.choice(Cable, "pe-metal")),
        routing,
        touch_current_ac: view.plate(DrivePlate, "touch-current-ac").or(by_class),
        touch_current_dc: view.plate(DrivePlate, "touch-current-dc").or(by_class.map(|_| Current::from_amperes(0.0))),
        second_pe: view.flag(Cable, "second-pe"),
        disconnects_on_break: view.flag(Cable, "pe-monitored"),
        maker_section: view.plate(DrivePlate, "pe-minimum"),
    }))
}

pub(super) fn disconnection(view: &View<'_>) -> Runs {
    // Line to earth of an earthed star supply; a corner-earthed or IT supply is for the design's own proof.
    let earthed = !matches!(view.choice(Supply, "earthing"), Some("it" | "corner-earthed" | "high-resistance"));
    let to_earth = view
        .plate::<Voltage>(Supply, "volts")
        .filter(|_| earthed)
        .map(|v| Voltage::from_volts(v.volts() / 3.0_f64.sqrt()));
    once(disconnection::check(&disconnection::Inputs {
        loop_impedance: view.reading("loop-impedance"),
        voltage_to_earth: to_earth,
        operating_current: view.plate(Supply, "device-trip-current"),
        stated_limit: None,
        proved_by_design: view.chosen("disconnection-proof").map(|proof| proof == "design"),
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
