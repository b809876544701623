//! The charts of a record, each built from its numbers by one function.

mod insulation;
mod load_run;
mod of_record;
mod ramp;
mod torque_speed;
mod volts_per_hertz;

pub use insulation::insulation_over_time;
pub use load_run::{harmonics, load_run};
pub use of_record::{StepChart, at, of};
pub use ramp::{Ramp, ramp};
pub use torque_speed::{TorqueSpeed, torque_against_speed};
pub use volts_per_hertz::volts_per_hertz;

#[cfg(test)]
#[path = "chart_tests.rs"]
mod tests;
