//! Inputs of the insulation and winding checks.

use super::{Runs, View, once};
use crate::plant::Sheet::{Cable, DrivePlate, Motor, Site};
use engineering::checks::insulation_resistance::{Construction, System};
use engineering::checks::{
    above_dew_point, brake_resistor_ohms, dielectric_absorption, discharge_time, identified_resistance,
    insulation_resistance, insulation_test_voltage, joint_resistance, polarization_index, sensor_resistance,
    terminal_torque, winding_balance,
};
use engineering::{Duration, Power, Resistance};

fn system(view: &View<'_>) -> Option<System> {
    match view.choice(Motor, "insulation-system") {
        Some("thermosetting") => Some(System::Thermosetting),
        Some("thermoplastic") => Some(System::Thermoplastic),
        _ => None,
    }
}

fn construction(view: &View<'_>) -> Option<Construction> {
    match view.choice(Motor, "construction") {
        Some("random-wound") => Some(Construction::RandomWound),
        Some("form-wound") => Some(Construction::FormWound),
        Some("before-1970") => Some(Construction::Old),
        _ => None,
    }
}

/// The class to which the motor is used: the lower one of the rise where the plate prints it.
pub(super) fn thermal_class(view: &View<'_>) -> Option<polarization_index::ThermalClass> {
    use polarization_index::ThermalClass;
    match view.choice(Motor, "rise-class").or_else(|| view.choice(Motor, "thermal-class"))? {
        "105" | "120" => Some(ThermalClass::A),
        "130" => Some(ThermalClass::B),
        "155" => Some(ThermalClass::F),
        "180" | "200" => Some(ThermalClass::H),
        _ => None,
    }
}

pub(super) fn above_dew_point(view: &View<'_>) -> Runs {
    once(above_dew_point::check(&above_dew_point::Inputs {
        winding_temperature: view.reading("winding-temperature"),
        air_temperature: view.reading("ambient-temperature"),
        humidity: view.reading("relative-humidity"),
    }))
}

pub(super) fn insulation_test_voltage(view: &View<'_>) -> Runs {
    once(insulation_test_voltage::check(&insulation_test_voltage::Inputs {
        test_voltage: view.entered("test-voltage", 0),
        rated_voltage: view.motor("volts"),
        maker_test_voltage: view.plate(Motor, "insulation-test-volts"),
    }))
}

pub(super) fn insulation_resistance(view: &View<'_>) -> Runs {
    once(insulation_resistance::check(&insulation_resistance::Inputs {
        reading: view.reading("ir-60s"),
        winding_temperature: view.reading("winding-temperature"),
        rated_voltage: view.motor("volts"),
        system: system(view),
        construction: construction(view),
        maker_minimum: view.plate(Motor, "insulation-minimum"),
        test_voltage: view.entered("test-voltage", 0),
        maker_test_voltage: view.plate(Motor, "insulation-test-volts"),
        air_temperature: view.entered("ambient-temperature", 0),
        humidity: view.entered("relative-humidity", 0),
    }))
}

pub(super) fn dielectric_absorption(view: &View<'_>) -> Runs {
    let thirty = view.reading::<Resistance>("ir-30s");
    let (early, at) = match thirty {
        Some(reading) => (Some(reading), 30.0),
        None => match view.reading("ir-15s") {
            Some(reading) => (Some(reading), 15.0),
            None => (None, 30.0),
        },
    };
    once(dielectric_absorption::check(&dielectric_absorption::Inputs {
        early,
        late: view.reading("ir-60s"),
        early_time: Some(Duration::from_seconds(at)),
    }))
}

pub(super) fn polarization_index(view: &View<'_>) -> Runs {
    use polarization_index::{Inputs, check};
    let ran = view.entry("ir-10min", 0).is_some();
    let from: Option<Power> = view.plate(Site, "polarization-from");
    let mut outcome = check(&Inputs {
        one_minute: view.reading("ir-60s"),
        ten_minutes: view.reading("ir-10min"),
        winding_temperature: view.reading("winding-temperature"),
        system: system(view),
        construction: construction(view),
        thermal_class: thermal_class(view),
        maker_minimum: view.plate(Motor, "polarization-minimum"),
    });
    if let (Some(from), false) = (from, ran) {
        outcome.notes.push(format!(
            "The site asks for it from {} kW up.",
            engineering::rounding::significant(from.watts() / 1e3, 3)
        ));
    }
    once(outcome)
}

pub(super) fn discharge_time(view: &View<'_>) -> Runs {
    // The voltage stood on the winding for one minute, or for ten where the ten-minute run was made.
    let minutes = match (view.entry("ir-10min", 0), view.entry("ir-60s", 0)) {
        (Some(_), _) => Some(10.0),
        (None, Some(_)) => Some(1.0),
        (None, None) => None,
    };
    once(discharge_time::check(&discharge_time::Inputs {
        earthed: view.entered("discharge-time", 0),
        test: minutes.map(|m| Duration::from_seconds(m * 60.0)),
    }))
}

pub(super) fn winding_balance(view: &View<'_>) -> Runs {
    once(winding_balance::check(&winding_balance::Inputs {
        u_v: view.reading("winding-r-uv"),
        v_w: view.reading("winding-r-vw"),
        w_u: view.reading("winding-r-wu"),
        construction: construction(view),
        maker_maximum: view.plate(Motor, "balance-maximum"),
    }))
}

/// Not where the joints were judged by their resistance alone and nobody entered a torque.
pub(super) fn terminal_torque(view: &View<'_>) -> Runs {
    let (input, output) = (view.reading("torque-input"), view.reading("torque-output"));
    if view.chosen("joint-method") == Some("ohmmeter") && input.is_none() && output.is_none() {
        return Vec::new();
    }
    once(terminal_torque::check(&terminal_torque::Inputs {
        input,
        output,
        stated: view.plate(DrivePlate, "terminal-torque"),
        stated_highest: view.plate(DrivePlate, "terminal-torque-high"),
    }))
}

pub(super) fn joint_resistance(view: &View<'_>) -> Runs {
    let joints = [
        ("joint-l1", "L1"),
        ("joint-l2", "L2"),
        ("joint-l3", "L3"),
        ("joint-u", "U"),
        ("joint-v", "V"),
        ("joint-w", "W"),
    ]
    .into_iter()
    .filter(|(item, _)| view.entry(item, 0).is_some())
    .map(|(item, label)| joint_resistance::Joint { label: label.to_owned(), reading: view.reading(item) })
    .collect();
    let by_wrench = view.chosen("joint-method") == Some("torque-wrench");
    let joints: Vec<_> = joints;
    if by_wrench && joints.is_empty() {
        return Vec::new();
    }
    once(joint_resistance::check(&joint_resistance::Inputs {
        joints,
        maker_maximum: view.plate(crate::plant::Sheet::Further, "joint-resistance-limit"),
    }))
}

pub(super) fn sensor_resistance(view: &View<'_>) -> Runs {
    use sensor_resistance::{Inputs, Sensor, check};
    let sensor = match view.choice(crate::plant::Sheet::Drive, "motor-sensor") {
        Some("ptc") => Some(Sensor::Thermistor),
        Some("pt100") => Some(Sensor::Pt100),
        Some("switch") => Some(Sensor::Switch),
        _ => None,
    };
    once(check(&Inputs {
        sensor,
        reading: view.reading("sensor-ohms"),
        in_series: view.count(Motor, "sensor-count"),
        winding_temperature: view.reading("sensor-winding-temperature").or_else(|| view.reading("winding-temperature")),
        lead_resistance: view.plate(Motor, "sensor-lead"),
        maker_least: view.plate(Motor, "sensor-low"),
        maker_most: view.plate(Motor, "sensor-high"),
    }))
}

pub(super) fn brake_resistor_ohms(view: &View<'_>) -> Runs {
    once(brake_resistor_ohms::check(&brake_resistor_ohms::Inputs {
        reading: view.reading("brake-ohms"),
        nominal: view.plate(DrivePlate, "resistor"),
        tolerance: view.plate(DrivePlate, "resistor-tolerance"),
        drive_minimum: view.plate(DrivePlate, "resistor-minimum"),
    }))
}

pub(super) fn identified_resistance(view: &View<'_>) -> Runs {
    use identified_resistance::{Inputs, Shown, check};
    let shown = match view.chosen("identified-as") {
        Some("star-phase") => Some(Shown::StarPhase),
        Some("line-to-line") => Some(Shown::LineToLine),
        _ => None,
    };
    once(check(&Inputs {
        identified: view.entered("identified-resistance", 0).or_else(|| view.in_force("identified-stator-resistance")),
        shown,
        u_v: view.reading("winding-r-uv"),
        v_w: view.reading("winding-r-vw"),
        w_u: view.reading("winding-r-wu"),
        measured_at: view.reading("winding-temperature"),
        identified_at: view.entered("identified-at-temperature", 0),
        // Measured at the drive's end of the cable, the cable is in the reading already.
        cable_conductor: cable_conductor(view).filter(|_| view.chosen("winding-r-place") != Some("cable")),
    }))
}

/// Resistance of one cable conductor, both at 20 °C, when the sheet tells section and length.
pub(super) fn cable_conductor(view: &View<'_>) -> Option<Resistance> {
    use engineering::formulas::conductor;
    let metal =
        super::supply::metal(view.choice(Cable, "metal")).unwrap_or(engineering::formulas::copper::Conductor::Copper);
    let per_kilometre = conductor::per_kilometre(view.plate(Cable, "cross-section")?, metal);
    let whole = conductor::of_length(per_kilometre, view.plate(Cable, "length")?);
    Some(Resistance::from_ohms(whole.ohms() / f64::from(view.count(Cable, "parallel").unwrap_or(1).max(1))))
}
