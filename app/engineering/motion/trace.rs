//! A ramp as it will run: speed, torque, current and bus volts against time, and how it ends.

use crate::quantity::{Current, Duration, Speed, Torque, Voltage};

/// One moment of a ramp.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Sample {
    /// Since the ramp began.
    pub time: Duration,
    /// Of the motor's shaft.
    pub speed: Speed,
    /// Of the motor; negative brakes.
    pub torque: Torque,
    /// Of the load, at the motor's shaft.
    pub load: Torque,
    /// Of the motor.
    pub current: Current,
    /// Of the direct-current bus, while slowing down and when its capacitance is known.
    pub bus: Option<Voltage>,
    /// Whether the current limit, not the set ramp, governs this moment.
    pub limited: bool,
}

/// How a ramp ends.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum End {
    /// At the wanted speed.
    Reached,
    /// The load does not even start to move: this torque is there, that one is asked.
    HeldAtStandstill {
        /// What the motor gives.
        available: Torque,
        /// What breaking away takes.
        asked: Torque,
    },
    /// No torque is left over at this speed; it stays there, or runs away when slowing down.
    Stalled {
        /// Where.
        at: Speed,
    },
    /// The bus reaches its trip voltage.
    BusTripped {
        /// When.
        after: Duration,
        /// At which speed.
        at: Speed,
    },
}

/// The whole ramp.
#[derive(Clone, Debug, PartialEq)]
pub struct Trace {
    /// Moments in order of time.
    pub samples: Vec<Sample>,
    /// How it ends.
    pub end: End,
}

impl Trace {
    /// How long it lasts, if it reaches its speed.
    #[must_use]
    pub fn time(&self) -> Option<Duration> {
        (self.end == End::Reached).then(|| self.samples.last().map_or(Duration::from_seconds(0.0), |s| s.time))
    }

    /// Whether the current limit governs anywhere.
    #[must_use]
    pub fn is_limited(&self) -> bool {
        self.end != End::Reached || self.samples.iter().any(|s| s.limited)
    }

    /// The speeds between which the current limit governs.
    #[must_use]
    pub fn limited_between(&self) -> Option<(Speed, Speed)> {
        let mut limited = self.samples.iter().filter(|s| s.limited);
        let first = limited.next()?;
        Some((first.speed, limited.next_back().unwrap_or(first).speed))
    }

    /// The highest current.
    #[must_use]
    pub fn peak_current(&self) -> Current {
        Current::from_amperes(self.samples.iter().map(|s| s.current.amperes()).fold(0.0, f64::max))
    }

    /// The highest bus voltage, where one is known.
    #[must_use]
    pub fn peak_bus(&self) -> Option<Voltage> {
        self.samples.iter().filter_map(|s| s.bus).map(Voltage::volts).reduce(f64::max).map(Voltage::from_volts)
    }
}
