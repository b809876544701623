//! What the driven load asks at its own shaft, by speed. Positive opposes the motion; negative drives it.

use crate::quantity::{Power, Speed, Torque};

/// The kind of load, with the figures that fix its curve.
#[derive(Clone, Debug, PartialEq)]
pub enum LoadTorque {
    /// The same at every speed: hoists, conveyors, piston pumps. Negative: an overhauling load.
    Constant(Torque),
    /// Proportional to speed: calenders, eddy-current loads.
    Linear {
        /// Torque at that speed.
        torque: Torque,
        /// Speed at which it is known.
        speed: Speed,
    },
    /// Proportional to the square of speed: fans and centrifugal pumps (row RM-07).
    Quadratic {
        /// Torque at that speed.
        torque: Torque,
        /// Speed at which it is known.
        speed: Speed,
    },
    /// What stays at standstill, and on top of it what rises with speed: a pump against a static head.
    Lifted {
        /// Torque that stays at very low speed.
        at_rest: Torque,
        /// Torque at that speed.
        torque: Torque,
        /// Speed at which it is known.
        speed: Speed,
        /// Whether the rest rises with the square of speed; otherwise in proportion.
        square: bool,
    },
    /// The same power from a speed up, and below it the torque of that speed: winders, spindles.
    ConstantPower {
        /// The power.
        power: Power,
        /// The lowest speed at which it is taken.
        from: Speed,
    },
    /// Points from the load's maker, straight lines between them, held level beyond both ends.
    Table(TorqueTable),
}

impl LoadTorque {
    /// Torque at the load's own speed.
    #[must_use]
    pub fn at(&self, speed: Speed) -> Torque {
        let n = speed.rpm().abs();
        Torque::from_newton_metres(match self {
            Self::Constant(torque) => torque.newton_metres(),
            Self::Linear { torque, speed } => torque.newton_metres() * n / speed.rpm(),
            Self::Quadratic { torque, speed } => torque.newton_metres() * (n / speed.rpm()) * (n / speed.rpm()),
            Self::Lifted { at_rest, torque, speed, square } => {
                let part = n / speed.rpm();
                let share = if *square { part * part } else { part };
                let rest = at_rest.newton_metres();
                (rest + (torque.newton_metres() - rest) * share).max(0.0)
            }
            Self::ConstantPower { power, from } => {
                power.watts() / super::available_torque::angular(Speed::from_rpm(n.max(from.rpm())))
            }
            Self::Table(table) => table.at(n),
        })
    }

    /// Whether every number in it can be calculated with.
    #[must_use]
    pub fn is_sound(&self) -> bool {
        match self {
            Self::Constant(torque) => torque.newton_metres().is_finite(),
            Self::Linear { torque, speed } | Self::Quadratic { torque, speed } => {
                torque.newton_metres().is_finite() && speed.rpm().is_finite() && speed.rpm() > 0.0
            }
            Self::Lifted { at_rest, torque, speed, .. } => {
                at_rest.newton_metres().is_finite()
                    && torque.newton_metres().is_finite()
                    && speed.rpm().is_finite()
                    && speed.rpm() > 0.0
            }
            Self::ConstantPower { power, from } => {
                power.watts().is_finite() && from.rpm().is_finite() && from.rpm() > 0.0
            }
            Self::Table(_) => true,
        }
    }

    /// In words, for the working.
    #[must_use]
    pub const fn words(&self) -> &'static str {
        match self {
            Self::Constant(_) => "constant torque",
            Self::Linear { .. } => "torque proportional to speed",
            Self::Quadratic { .. } => "torque with the square of speed",
            Self::Lifted { square: true, .. } => "torque at standstill, the rest with the square of speed",
            Self::Lifted { .. } => "torque at standstill, the rest proportional to speed",
            Self::ConstantPower { .. } => "constant power",
            Self::Table(_) => "torque by table",
        }
    }
}

/// Torque by speed; its points are sorted and finite, which its constructor sees to.
#[derive(Clone, Debug, PartialEq)]
pub struct TorqueTable {
    points: Vec<(f64, f64)>,
}

impl TorqueTable {
    /// From at least one point; `None` if a number is not finite or a speed negative.
    #[must_use]
    pub fn new(points: &[(Speed, Torque)]) -> Option<Self> {
        let mut points: Vec<(f64, f64)> = points.iter().map(|(n, t)| (n.rpm(), t.newton_metres())).collect();
        let sound = !points.is_empty() && points.iter().all(|(n, t)| n.is_finite() && *n >= 0.0 && t.is_finite());
        points.sort_by(|a, b| a.0.total_cmp(&b.0));
        sound.then_some(Self { points })
    }

    fn at(&self, n: f64) -> f64 {
        let after = self.points.partition_point(|(speed, _)| *speed < n);
        match (after.checked_sub(1).and_then(|i| self.points.get(i)), self.points.get(after)) {
            (Some((n0, t0)), Some((n1, t1))) => t0 + (t1 - t0) * (n - n0) / (n1 - n0),
            (Some((_, t)), None) | (None, Some((_, t))) => *t,
            (None, None) => 0.0,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn at(load: &LoadTorque, rpm: f64) -> f64 {
        load.at(Speed::from_rpm(rpm)).newton_metres()
    }

    #[test]
    fn each_kind_has_its_curve() {
        let (torque, speed) = (Torque::from_newton_metres(90.0), Speed::from_rpm(1480.0));
        assert!((at(&LoadTorque::Constant(torque), 10.0) - 90.0).abs() < 1e-12);
        assert!((at(&LoadTorque::Linear { torque, speed }, 740.0) - 45.0).abs() < 1e-12);
        assert!((at(&LoadTorque::Quadratic { torque, speed }, 740.0) - 22.5).abs() < 1e-12);
        let at_rest = Torque::from_newton_metres(30.0);
        for (square, half) in [(true, 45.0), (false, 60.0)] {
            let load = LoadTorque::Lifted { at_rest, torque, speed, square };
            assert!((at(&load, 0.0) - 30.0).abs() < 1e-12 && (at(&load, 740.0) - half).abs() < 1e-12);
            assert!((at(&load, 1480.0) - 90.0).abs() < 1e-12);
        }
        let power = LoadTorque::ConstantPower { power: Power::from_watts(15e3), from: Speed::from_rpm(735.0) };
        // T = P/ω (row MN-04): 97.44 N·m at 1470 rpm, twice that at half the speed and no more below.
        assert!((at(&power, 1470.0) - 97.441_802).abs() < 0.01);
        assert!((at(&power, 735.0) - 194.883_604).abs() < 0.02 && (at(&power, 10.0) - at(&power, 735.0)).abs() < 1e-9);
    }

    #[test]
    fn a_table_is_sorted_interpolated_and_held_at_its_ends() {
        let point = |n: f64, t: f64| (Speed::from_rpm(n), Torque::from_newton_metres(t));
        let table = LoadTorque::Table(
            TorqueTable::new(&[point(1000.0, 50.0), point(0.0, 20.0), point(500.0, 10.0)]).expect("sound"),
        );
        for (n, t) in [(0.0, 20.0), (250.0, 15.0), (500.0, 10.0), (750.0, 30.0), (1000.0, 50.0), (2000.0, 50.0)] {
            assert!((at(&table, n) - t).abs() < 1e-9, "{n} rpm");
        }
        assert!(TorqueTable::new(&[]).is_none() && TorqueTable::new(&[point(f64::NAN, 1.0)]).is_none());
    }
}
