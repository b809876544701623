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

/// Every check of the catalogue, a line each: name, title, where it is shown, what takes its inputs.
#[rustfmt::skip]
pub(super) const CATALOGUE: &[(&str, &str, Group, Runner)] = &[
    ("pole-pairs", "Pole pairs and slip", Plate, Anywhere(nameplate::pole_pairs)),
    ("power-balance", "Nameplate power balance", Plate, Anywhere(nameplate::power_balance)),
    ("misreading", "Nameplate figures against each other", Plate, Anywhere(nameplate::misreading)),
    ("efficiency-class", "Efficiency against its class", Plate, Anywhere(nameplate::efficiency_class)),
    ("full-load-current", "Table full-load current", Plate, Anywhere(nameplate::full_load_current)),
    ("rated-torque", "Rated torque", Plate, Anywhere(nameplate::rated_torque)),
    ("rated-volts-per-hertz", "Rated volts per hertz", Plate, Anywhere(nameplate::rated_volts_per_hertz)),
    ("connection-fit", "Winding connection", Plate, Anywhere(nameplate::connection_fit)),
    ("drive-current-fit", "Drive current for this motor", Plate, Anywhere(nameplate::drive_current_fit)),
    ("overload-fit", "Drive overload for this start", Plate, Anywhere(nameplate::overload_fit)),
    ("low-speed-cooling", "Cooling at low speed", Plate, Anywhere(nameplate::low_speed_cooling)),
    ("short-circuit-rating", "Short-circuit rating", Plate, Anywhere(supply::short_circuit_rating)),
    ("pe-conductor", "Protective conductor size", Plate, Anywhere(supply::pe_conductor)),
    ("voltage-drop", "Voltage drop in the motor cable", Plate, Anywhere(cable::voltage_drop)),
    ("reflected-wave", "Voltage peaks at the motor", Plate, Anywhere(cable::reflected_wave)),
    ("supply-voltage", "Supply voltage", Step, Anywhere(supply::supply_voltage)),
    ("supply-unbalance", "Supply unbalance", Step, Anywhere(supply::supply_unbalance)),
    ("earth-voltages", "Supply volts to earth", Step, Anywhere(supply::earth_voltages)),
    ("line-current-balance", "Input current balance", Step, Anywhere(supply::line_current_balance)),
    ("waiting-time", "Waiting time", Step, Anywhere(supply::waiting_time)),
    ("bus-discharged", "DC bus after waiting", Step, AtStep(supply::bus_discharged)),
    ("terminals-dead", "Terminals proved dead", Step, AtStep(supply::terminals_dead)),
    ("bus-voltage", "DC bus, energised", Step, Anywhere(supply::bus_voltage)),
    ("precharge", "Pre-charge", Step, Anywhere(cable::precharge)),
    ("pe-continuity", "Protective conductor continuity", Step, Anywhere(cable::pe_continuity)),
    ("disconnection", "Automatic disconnection", Step, Anywhere(supply::disconnection)),
    ("harmonic-distortion", "Harmonic distortion", Step, Anywhere(cable::harmonic_distortion)),
    ("above-dew-point", "Winding above the dew point", Step, Anywhere(windings::above_dew_point)),
    ("insulation-test-voltage", "Insulation test voltage", Step, Anywhere(windings::insulation_test_voltage)),
    ("insulation-resistance", "Insulation resistance", Step, Anywhere(windings::insulation_resistance)),
    ("dielectric-absorption", "Dielectric absorption", Step, Anywhere(windings::dielectric_absorption)),
    ("polarization-index", "Polarization index", Step, Anywhere(windings::polarization_index)),
    ("discharge-time", "Discharge after the test", Step, Anywhere(windings::discharge_time)),
    ("winding-balance", "Winding resistance balance", Step, Anywhere(windings::winding_balance)),
    ("terminal-torque", "Terminal torque", Step, Anywhere(windings::terminal_torque)),
    ("joint-resistance", "Joint resistance", Step, Anywhere(windings::joint_resistance)),
    ("sensor-resistance", "Motor sensor resistance", Step, Anywhere(windings::sensor_resistance)),
    ("brake-resistor-ohms", "Brake resistor", Step, Anywhere(windings::brake_resistor_ohms)),
    ("identified-resistance", "Identified stator resistance", Step, Anywhere(windings::identified_resistance)),
    ("motor-data-settings", "Motor data as set", Setting, Anywhere(settings::motor_data_settings)),
    ("volts-per-hertz", "Volts per hertz as set", Setting, Anywhere(settings::volts_per_hertz)),
    ("maximum-speed", "Maximum speed", Setting, Anywhere(settings::maximum_speed)),
    ("minimum-speed", "Minimum speed", Setting, Anywhere(settings::minimum_speed)),
    ("acceleration-time", "Acceleration time", Setting, Anywhere(motion::acceleration_time)),
    ("deceleration-time", "Deceleration time", Setting, Anywhere(motion::deceleration_time)),
    ("braking", "Braking", Setting, Anywhere(motion::braking)),
    ("current-limit", "Current limit", Setting, Anywhere(settings::current_limit)),
    ("overload-setting", "Motor overload", Setting, Anywhere(settings::overload_setting)),
    ("switching-frequency", "Switching frequency", Setting, Anywhere(settings::switching_frequency)),
    ("skip-bands", "Skip bands", Setting, Anywhere(settings::skip_bands)),
    ("restart", "Automatic restart", Setting, Anywhere(settings::restart)),
    ("loss-of-reference", "Loss of reference", Setting, Anywhere(settings::loss_of_reference)),
    ("rotation", "Rotation", Step, Anywhere(motion::rotation)),
    ("no-load-current", "No-load current", Step, Anywhere(runs::no_load_current)),
    ("current-balance", "Motor current balance", Step, AtStep(runs::current_balance)),
    ("slip-at-no-load", "Slip at no load", Step, Anywhere(runs::slip_at_no_load)),
    ("encoder-scaling", "Encoder scaling", Step, Anywhere(runs::encoder_scaling)),
    ("stop-time", "Stop time", Step, AtStep(motion::stop_time)),
    ("reference-scaling", "Reference scaling", Step, Anywhere(settings::reference_scaling)),
    ("measured-acceleration", "Measured acceleration", Step, Anywhere(motion::measured_acceleration)),
    ("measured-deceleration", "Measured deceleration", Step, Anywhere(motion::measured_deceleration)),
    ("bus-peak", "DC bus peak", Step, Anywhere(motion::bus_peak)),
    ("load-current", "Current under load", Step, Anywhere(runs::load_current)),
    ("load-profile", "Load profile", Step, Anywhere(runs::load_profile)),
    ("vibration", "Vibration", Step, Anywhere(runs::vibration)),
    ("temperature-rise", "Temperature rise", Step, Anywhere(runs::temperature_rise)),
    ("test-settings-restored", "Test settings restored", Step, Anywhere(settings::test_settings_restored)),
    ("instrument-calibration", "Instrument calibration", Step, Anywhere(runs::instrument_calibration)),
];

/// Every name, in the order of the list.
pub fn names() -> impl Iterator<Item = &'static str> {
    CATALOGUE.iter().map(|(name, ..)| *name)
}

/// A check's title as screens and packages show it; the name itself for one that this catalogue no longer has.
#[must_use]
pub fn title(name: &str) -> &str {
    CATALOGUE.iter().find(|(known, ..)| *known == name).map_or(name, |(_, title, ..)| title)
}
