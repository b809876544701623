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

    /// The highest torque of the motor in size.
    #[must_use]
    pub fn peak_torque(&self) -> Torque {
        Torque::from_newton_metres(self.samples.iter().map(|s| s.torque.newton_metres().abs()).fold(0.0, f64::max))
    }

    /// √(∫I²·dt/t), what an unchanging current of the same heat would be (row RM-09); none on a run of no length.
    #[must_use]
    pub fn root_mean_square_current(&self) -> Option<Current> {
        let time = self.samples.last()?.time.seconds();
        let squares = self.over_time(|s| s.current.amperes() * s.current.amperes());
        (time > 0.0).then(|| Current::from_amperes((squares / time).sqrt()))
    }

    /// ∫((I/I_N)² − 1)·dt while the current is above rated: heat beyond what the motor stands all the time, in seconds
    /// of rated heat. What is below rated current gives nothing back.
    #[must_use]
    pub fn excess_heat(&self, rated: Current) -> Duration {
        Duration::from_seconds(self.over_time(|s| {
            let load = s.current.amperes() / rated.amperes();
            (load * load - 1.0).max(0.0)
        }))
    }

    /// By trapezoids over the samples.
    fn over_time(&self, value: impl Fn(&Sample) -> f64) -> f64 {
        let step =
            |(a, b): (&Sample, &Sample)| (b.time.seconds() - a.time.seconds()) * f64::midpoint(value(a), value(b));
        self.samples.iter().zip(self.samples.iter().skip(1)).map(step).sum()
    }

    /// The highest bus voltage, where one is known.
    #[must_use]
    pub fn peak_bus(&self) -> Option<Voltage> {
        self.samples.iter().filter_map(|s| s.bus).map(Voltage::volts).reduce(f64::max).map(Voltage::from_volts)
    }
}
