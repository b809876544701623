//! Motor, gear and load as one: the inertia and the torque that the motor's shaft feels.

use super::gear::{Flow, Gear};
use super::load_torque::LoadTorque;
use crate::quantity::{Inertia, Speed, Torque};

/// Everything that turns.
#[derive(Clone, Debug, PartialEq)]
pub struct Train {
    /// The motor's own inertia and the load's, both at the motor's shaft.
    pub inertia: Inertia,
    /// The load's torque at its own shaft.
    pub load: LoadTorque,
    /// Torque at the load's own shaft to set it moving at all, when it is more than its curve begins with.
    pub breakaway: Option<Torque>,
    /// What stands between.
    pub gear: Gear,
}

impl Train {
    /// J = J_M + J_L/i² (row RM-02).
    #[must_use]
    pub fn new(motor: Inertia, load_inertia: Inertia, load: LoadTorque, breakaway: Option<Torque>, gear: Gear) -> Self {
        let reflected = gear.reflected_inertia(load_inertia).kilogram_square_metres();
        let inertia = Inertia::from_kilogram_square_metres(motor.kilogram_square_metres() + reflected);
        Self { inertia, load, breakaway, gear }
    }

    /// Load torque at the motor's shaft while the motor drives; an overhauling load is negative.
    #[must_use]
    pub fn opposing(&self, motor: Speed) -> Torque {
        let load = self.load.at(self.gear.load_speed(motor));
        let flow = if load.newton_metres() < 0.0 { Flow::Regenerating } else { Flow::Motoring };
        self.gear.reflected_torque(load, flow)
    }

    /// Load torque at the motor's shaft while the motor brakes: less by the gear's losses, whichever way it acts.
    #[must_use]
    pub fn slowing(&self, motor: Speed) -> Torque {
        self.gear.reflected_torque(self.load.at(self.gear.load_speed(motor)), Flow::Regenerating)
    }

    /// Torque at the motor's shaft to set it moving: breakaway or the start of the curve, whichever is more.
    #[must_use]
    pub fn to_start(&self) -> Torque {
        let curve = self.opposing(Speed::from_rpm(0.0)).newton_metres();
        let breakaway = self.breakaway.map_or(curve, |t| self.gear.reflected_torque(t, Flow::Motoring).newton_metres());
        Torque::from_newton_metres(curve.max(breakaway))
    }
}
