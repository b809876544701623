//! The list that ties a check's name to the function that takes its inputs out of the record.

use super::{Runs, View, cable, motion, nameplate, runs, settings, supply, windings};

/// Where a check is shown apart from its steps.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Group {
    /// Beside the nameplates and sheets: needs nothing measured.
    Plate,
    /// At its steps only.
    Step,
    /// Beside the parameter record, for what is intended and what was left.
    Setting,
}

/// How a check runs: most are the same at every step.
pub(super) enum Runner {
    /// The same wherever it is shown.
    Anywhere(fn(&View<'_>) -> Runs),
    /// Takes other entries at other steps.
    AtStep(fn(&View<'_>, &str) -> Runs),
}

use Group::{Plate, Setting, Step};
use Runner::{Anywhere, AtStep};

/// Every check of the catalogue: a line each.
#[rustfmt::skip]
pub(super) const CATALOGUE: &[(&str, Group, Runner)] = &[
    ("pole-pairs", Plate, Anywhere(nameplate::pole_pairs)),
    ("power-balance", Plate, Anywhere(nameplate::power_balance)),
    ("efficiency-class", Plate, Anywhere(nameplate::efficiency_class)),
    ("full-load-current", Plate, Anywhere(nameplate::full_load_current)),
    ("rated-torque", Plate, Anywhere(nameplate::rated_torque)),
    ("rated-volts-per-hertz", Plate, Anywhere(nameplate::rated_volts_per_hertz)),
    ("connection-fit", Plate, Anywhere(nameplate::connection_fit)),
    ("drive-current-fit", Plate, Anywhere(nameplate::drive_current_fit)),
    ("overload-fit", Plate, Anywhere(nameplate::overload_fit)),
    ("low-speed-cooling", Plate, Anywhere(nameplate::low_speed_cooling)),
    ("short-circuit-rating", Plate, Anywhere(supply::short_circuit_rating)),
    ("pe-conductor", Plate, Anywhere(supply::pe_conductor)),
    ("voltage-drop", Plate, Anywhere(cable::voltage_drop)),
    ("reflected-wave", Plate, Anywhere(cable::reflected_wave)),
    ("supply-voltage", Step, Anywhere(supply::supply_voltage)),
    ("supply-unbalance", Step, Anywhere(supply::supply_unbalance)),
    ("line-current-balance", Step, Anywhere(supply::line_current_balance)),
    ("bus-discharged", Step, AtStep(supply::bus_discharged)),
    ("bus-voltage", Step, Anywhere(supply::bus_voltage)),
    ("precharge", Step, Anywhere(cable::precharge)),
    ("pe-continuity", Step, Anywhere(cable::pe_continuity)),
    ("disconnection", Step, Anywhere(supply::disconnection)),
    ("harmonic-distortion", Step, Anywhere(cable::harmonic_distortion)),
    ("above-dew-point", Step, Anywhere(windings::above_dew_point)),
    ("insulation-test-voltage", Step, Anywhere(windings::insulation_test_voltage)),
    ("insulation-resistance", Step, Anywhere(windings::insulation_resistance)),
    ("dielectric-absorption", Step, Anywhere(windings::dielectric_absorption)),
    ("polarization-index", Step, Anywhere(windings::polarization_index)),
    ("winding-balance", Step, Anywhere(windings::winding_balance)),
    ("joint-resistance", Step, Anywhere(windings::joint_resistance)),
    ("sensor-resistance", Step, Anywhere(windings::sensor_resistance)),
    ("brake-resistor-ohms", Step, Anywhere(windings::brake_resistor_ohms)),
    ("identified-resistance", Step, Anywhere(windings::identified_resistance)),
    ("motor-data-settings", Setting, Anywhere(settings::motor_data_settings)),
    ("volts-per-hertz", Setting, Anywhere(settings::volts_per_hertz)),
    ("maximum-speed", Setting, Anywhere(settings::maximum_speed)),
    ("minimum-speed", Setting, Anywhere(settings::minimum_speed)),
    ("acceleration-time", Setting, Anywhere(motion::acceleration_time)),
    ("deceleration-time", Setting, Anywhere(motion::deceleration_time)),
    ("braking", Setting, Anywhere(motion::braking)),
    ("current-limit", Setting, Anywhere(settings::current_limit)),
    ("overload-setting", Setting, Anywhere(settings::overload_setting)),
    ("switching-frequency", Setting, Anywhere(settings::switching_frequency)),
    ("skip-bands", Setting, Anywhere(settings::skip_bands)),
    ("restart", Setting, Anywhere(settings::restart)),
    ("loss-of-reference", Setting, Anywhere(settings::loss_of_reference)),
    ("rotation", Step, Anywhere(motion::rotation)),
    ("no-load-current", Step, Anywhere(runs::no_load_current)),
    ("current-balance", Step, AtStep(runs::current_balance)),
    ("slip-at-no-load", Step, Anywhere(runs::slip_at_no_load)),
    ("encoder-scaling", Step, Anywhere(runs::encoder_scaling)),
    ("stop-time", Step, AtStep(motion::stop_time)),
    ("reference-scaling", Step, Anywhere(settings::reference_scaling)),
    ("measured-acceleration", Step, Anywhere(motion::measured_acceleration)),
    ("measured-deceleration", Step, Anywhere(motion::measured_deceleration)),
    ("bus-peak", Step, Anywhere(motion::bus_peak)),
    ("load-current", Step, Anywhere(runs::load_current)),
    ("load-profile", Step, Anywhere(runs::load_profile)),
    ("vibration", Step, Anywhere(runs::vibration)),
    ("temperature-rise", Step, Anywhere(runs::temperature_rise)),
    ("test-settings-restored", Step, Anywhere(settings::test_settings_restored)),
    ("instrument-calibration", Step, Anywhere(runs::instrument_calibration)),
];

/// Every name, in the order of the list.
pub fn names() -> impl Iterator<Item = &'static str> {
    CATALOGUE.iter().map(|(name, ..)| *name)
}
