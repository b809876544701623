//! Torque from power and speed (row MN-04).

use crate::quantity::{Power, Speed, Torque};

/// One pound-force foot in newton metres.
const POUND_FORCE_FOOT: f64 = 1.355_817_948_331_400_4;

/// T = 60·P/(2π·n).
#[must_use]
pub fn torque(power: Power, speed: Speed) -> Torque {
    Torque::from_newton_metres(60.0 * power.watts() / (2.0 * std::f64::consts::PI * speed.rpm()))
}

/// The same torque as a number of pound-force feet, for display beside the newton metres.
#[must_use]
pub fn pound_force_feet(torque: Torque) -> f64 {
    torque.newton_metres() / POUND_FORCE_FOOT
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-MN-010 and C-MN-011 (row MN-04); C-MN-012: Hubert, Ex. 4.6, 100 hp at 1176 rpm is 446.6 lbf·ft.
    #[test]
    fn published_torques() {
        let t = torque(Power::from_watts(15_000.0), Speed::from_rpm(1470.0)).newton_metres();
        assert!((t - 97.441_802).abs() < 0.009_74);
        let t = torque(Power::from_watts(750.0), Speed::from_rpm(1395.0)).newton_metres();
        assert!((t - 5.134_030_4).abs() < 0.000_513);
        let t = torque(Power::from_watts(74_569.987), Speed::from_rpm(1176.0));
        assert!((pound_force_feet(t) - 446.608_26).abs() < 0.05);
    }
}
