//! Motion: the torque a current limit leaves, what the load takes, how long a ramp really lasts, what comes back.
//!
//! Everything is integrated along the speed: dt = J·dω/T, or the set ramp's own step of time where that is longer. The
//! count of steps is fixed, a stall is a place where no torque is left over, and more inertia or less current can only
//! lengthen each step.

pub mod available_torque;
pub mod braking;
pub mod bus;
pub mod closed_form;
pub mod gear;
pub mod load_torque;
pub mod machine;
pub mod measured_ramp;
pub mod ramp_down;
pub mod ramp_up;
pub mod resistor;
pub mod set_ramp;
pub mod time_to_speed;
pub mod trace;
pub mod train;

#[cfg(test)]
mod odd_inputs;
#[cfg(test)]
mod properties;

pub use available_torque::Motor;
pub use bus::Bus;
pub use gear::{Flow, Gear};
pub use load_torque::{LoadTorque, TorqueTable};
pub use machine::{Linear, Machine};
pub use set_ramp::SetRamp;
pub use trace::{End, Sample, Trace};
pub use train::Train;
