//! Inputs of the checks on the motor cable, the protective conductor's path and the DC bus's charge.

use super::{Runs, View, once};
use crate::plant::Sheet::{Cable, Drive, DrivePlate, Further, Motor, Site, Supply};
use engineering::checks::{harmonic_distortion, pe_continuity, precharge, reflected_wave, voltage_drop};
use engineering::formulas::conductor::Build;
use engineering::formulas::distortion_limit::{Edition, of_order, short_circuit_ratio};
use engineering::{Current, Length, Ratio, Resistance};

pub(super) fn pe_continuity(view: &View<'_>) -> Runs {
    let times = f64::from(view.count(Cable, "pe-parallel").unwrap_or(1).max(1));
    let section = view
        .plate::<engineering::CrossSection>(Cable, "pe-cross-section")
        .map(|s| engineering::CrossSection::from_square_millimetres(s.square_millimetres() * times));
    once(pe_continuity::check(&pe_continuity::Inputs {
        reading: view.reading("pe-ohms"),
        length: view.plate(Cable, "pe-length").or_else(|| view.plate(Cable, "length")),
        section,
        metal: super::supply::metal(view.choice(Cable, "pe-metal")),
        temperature: view.plate(Cable, "pe-temperature"),
        design_maximum: view.plate(Further, "pe-resistance-limit"),
    }))
}

pub(super) fn voltage_drop(view: &View<'_>) -> Runs {
    let build = match view.choice(Cable, "build") {
        Some("class-2") => Some(Build::Class2),
        Some("class-5") => Some(Build::Class5),
        _ => None,
    };
    let section = view.plate(Cable, "cross-section");
    if view.choice(Cable, "metal") == Some("aluminium") {
        let mut b = engineering::OutcomeBuilder::new(voltage_drop::NAME);
        b.note("The published resistances used here are those of copper.");
        return once(b.not_judged(
            "Not assessed: the conductor is aluminium, for which no table is held. Use the cable maker's figure.",
        ));
    }
    once(voltage_drop::check(&voltage_drop::Inputs {
        current: view.motor("amps"),
        length: view.plate(Cable, "length"),
        section,
        build,
        parallel: view.count(Cable, "parallel"),
        reactance: view.plate::<Resistance>(Cable, "reactance-per-km"),
        power_factor: view.motor("power-factor"),
        temperature: view.plate(Cable, "conductor-temperature"),
        rated_voltage: view.motor("volts"),
        site_limit: view.plate(Cable, "drop-limit").or_else(|| view.plate(Site, "voltage-drop-limit")),
    }))
}

/// The longest motor cable that drive or filter allows; of two figures the smaller where the kind of cable is not told.
fn longest_cable(view: &View<'_>) -> Option<Length> {
    if matches!(view.choice(Drive, "output-filter"), Some("sine" | "dv-dt")) {
        return view.plate(DrivePlate, "cable-length-filtered");
    }
    let screened: Option<Length> = view.plate(DrivePlate, "cable-length-screened");
    let unscreened: Option<Length> = view.plate(DrivePlate, "cable-length-unscreened");
    match view.choice(Cable, "type") {
        Some("screened" | "screened-symmetrical") => screened,
        Some("unscreened") => unscreened,
        _ => screened.into_iter().chain(unscreened).min_by(|a, b| a.metres().total_cmp(&b.metres())),
    }
}

pub(super) fn reflected_wave(view: &View<'_>) -> Runs {
    use reflected_wave::{Filter, Inputs, Withstand, check};
    let withstand = match view.choice(Motor, "withstand") {
        Some("mg1-30") => Some(Withstand::GeneralPurpose),
        Some("mg1-31") => Some(Withstand::InverterDuty),
        Some("iec-a") => Some(Withstand::CategoryA),
        Some("iec-b") => Some(Withstand::CategoryB),
        Some("iec-c") => Some(Withstand::CategoryC),
        Some("iec-d") => Some(Withstand::CategoryD),
        Some("maker") => match (view.plate(Motor, "peak-limit"), view.plate(Motor, "rise-limit")) {
            (Some(peak), Some(rise)) => Some(Withstand::Maker(peak, rise)),
            _ => None,
        },
        _ => None,
    };
    let rise_time = view.plate(Cable, "rise-time");
    let filter = match view.choice(Drive, "output-filter") {
        Some("sine") => Some(Filter::Sine),
        Some("dv-dt") => rise_time.map(Filter::SlowedRise),
        Some("none") => Some(Filter::None),
        _ => None,
    };
    let travelled = view.value(Cable, 0, "wave-speed").and_then(crate::Typed::number).map(Length::from_metres);
    once(check(&Inputs {
        cable_length: view.plate(Cable, "length"),
        withstand,
        rated_voltage: view.motor("volts"),
        rated_power: view.motor("power"),
        bus_voltage: view.plate(DrivePlate, "chopper-volts"),
        supply_voltage: view.plate(Supply, "volts"),
        rise_time,
        travelled_in_a_second: travelled,
        motor_impedance: view.plate(Cable, "motor-surge-impedance"),
        cable_impedance: view.plate(Cable, "cable-surge-impedance"),
        filter,
        longest_cable: longest_cable(view),
    }))
}

pub(super) fn precharge(view: &View<'_>) -> Runs {
    once(precharge::check(&precharge::Inputs {
        capacitance: view.plate(DrivePlate, "bus-capacitance"),
        resistance: view.plate(DrivePlate, "precharge-resistor"),
        bus_voltage: super::motion::bus_volts(view),
    }))
}

/// Limit of each single order, turned from the demand current to the fundamental that was read; none where none holds.
#[must_use]
pub fn harmonic_limits(view: &View<'_>) -> Vec<(u32, Ratio)> {
    let judged = view.choice(Site, "harmonic-rule") != Some("none");
    let there = view.chosen("distortion-place") == Some("common-coupling");
    let demand: Option<Current> = view.plate(Supply, "demand-current").filter(|i: &Current| i.amperes() > 0.0);
    let fault: Option<Current> = view.plate(Supply, "coupling-fault-current");
    let read: Option<Current> = view.entered("input-fundamental", 0).filter(|i: &Current| i.amperes() > 0.0);
    let (true, true, Some(demand), Some(fault), Some(read)) = (judged, there, demand, fault, read) else {
        return Vec::new();
    };
    let ratio = short_circuit_ratio(fault, demand);
    // All of these are odd, on which the editions agree.
    [5, 7, 11, 13]
        .into_iter()
        .filter_map(|order| Some((order, of_order(ratio, order, Edition::Of2014)?)))
        .map(|(order, limit)| (order, Ratio::from_fraction(limit.fraction() * demand.amperes() / read.amperes())))
        .collect()
}

pub(super) fn harmonic_distortion(view: &View<'_>) -> Runs {
    let harmonics = [(5, "input-h5"), (7, "input-h7"), (11, "input-h11"), (13, "input-h13")]
        .into_iter()
        .filter_map(|(order, item)| view.reading(item).map(|part| harmonic_distortion::Harmonic { order, part }))
        .collect();
    let edition = match view.choice(Site, "harmonic-rule") {
        Some("ieee-519-2014") => Some(Edition::Of2014),
        Some("ieee-519-2022") => Some(Edition::Of2022),
        _ => None,
    };
    let at_common_coupling = view.chosen("distortion-place").map(|place| place == "common-coupling");
    let not_judged = view.choice(Site, "harmonic-rule") == Some("none") && at_common_coupling == Some(true);
    let mut outcome = harmonic_distortion::check(&harmonic_distortion::Inputs {
        distortion: view.reading("input-thdi"),
        fundamental: view.reading("input-fundamental"),
        harmonics,
        at_common_coupling: at_common_coupling.map(|there| there && !not_judged),
        demand: view.plate(Supply, "demand-current"),
        short_circuit: view.plate(Supply, "coupling-fault-current"),
        edition,
        // It holds at the drive's input, not at the point of common coupling.
        specified_maximum: view.plate(Further, "distortion-limit").filter(|_| at_common_coupling != Some(true)),
    });
    if not_judged {
        outcome.limit = "none: the site has current distortion shown as a figure".to_owned();
    }
    once(outcome)
}
