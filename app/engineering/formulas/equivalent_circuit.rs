//! The induction motor's equivalent circuit, per phase in star, solved exactly (row NL-04).

use crate::formulas::synchronous::synchronous_speed;
use crate::formulas::torque::torque;
use crate::quantity::{Current, Frequency, Power, Ratio, Resistance, Speed, Torque, Voltage};

/// The circuit at one voltage and frequency.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Circuit {
    /// Line-to-line voltage.
    pub voltage: Voltage,
    /// Of the supply.
    pub frequency: Frequency,
    /// Pole pairs.
    pub pole_pairs: u32,
    /// Stator resistance and leakage reactance.
    pub stator: (Resistance, Resistance),
    /// Rotor resistance and leakage reactance, referred to the stator.
    pub rotor: (Resistance, Resistance),
    /// Magnetising reactance.
    pub magnetising: Resistance,
    /// Resistance that stands for the iron loss, if the circuit has one.
    pub iron: Option<Resistance>,
    /// Friction, windage and stray loss.
    pub rotational: Power,
}

/// One running point.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Point {
    /// Of the shaft.
    pub speed: Speed,
    /// Line current.
    pub current: Current,
    /// Lagging.
    pub power_factor: Ratio,
    /// Taken from the line.
    pub input: Power,
    /// Through the air gap.
    pub air_gap: Power,
    /// At the shaft.
    pub shaft: Power,
}

/// A number with a right-angled part.
#[derive(Clone, Copy)]
struct Complex(f64, f64);

impl Complex {
    fn plus(self, other: Self) -> Self {
        Self(self.0 + other.0, self.1 + other.1)
    }

    fn inverse(self) -> Self {
        let square = self.0 * self.0 + self.1 * self.1;
        Self(self.0 / square, -self.1 / square)
    }

    fn beside(self, other: Self) -> Self {
        self.inverse().plus(other.inverse()).inverse()
    }

    fn size(self) -> f64 {
        self.0.hypot(self.1)
    }
}

impl Circuit {
    /// Speed of the field.
    #[must_use]
    pub fn synchronous(&self) -> Speed {
        synchronous_speed(self.frequency, self.pole_pairs)
    }

    fn phase_volts(&self) -> f64 {
        self.voltage.volts() / 3.0_f64.sqrt()
    }

    fn shunt(&self) -> Complex {
        let magnetising = Complex(0.0, self.magnetising.ohms());
        self.iron.map_or(magnetising, |iron| magnetising.beside(Complex(iron.ohms(), 0.0)))
    }

    fn stator_impedance(&self) -> Complex {
        Complex(self.stator.0.ohms(), self.stator.1.ohms())
    }

    /// The running point at a slip above zero.
    #[must_use]
    pub fn at(&self, slip: Ratio) -> Point {
        let s = slip.fraction();
        let rotor = Complex(self.rotor.0.ohms() / s, self.rotor.1.ohms());
        let field = rotor.beside(self.shunt());
        let whole = self.stator_impedance().plus(field);
        let current = self.phase_volts() / whole.size();
        let rotor_current = current * field.size() / rotor.size();
        let air_gap = 3.0 * rotor_current * rotor_current * rotor.0;
        Point {
            speed: Speed::from_rpm(self.synchronous().rpm() * (1.0 - s)),
            current: Current::from_amperes(current),
            power_factor: Ratio::from_fraction(whole.0 / whole.size()),
            input: Power::from_watts(3.0 * current * current * whole.0),
            air_gap: Power::from_watts(air_gap),
            shaft: Power::from_watts(air_gap * (1.0 - s) - self.rotational.watts()),
        }
    }

    /// Current at synchronous speed, where the rotor takes none.
    #[must_use]
    pub fn ideal_no_load_current(&self) -> Current {
        Current::from_amperes(self.phase_volts() / self.stator_impedance().plus(self.shunt()).size())
    }

    /// Air-gap torque at a slip above zero.
    #[must_use]
    pub fn torque(&self, slip: Ratio) -> Torque {
        torque(self.at(slip).air_gap, self.synchronous())
    }

    /// Slip and air-gap torque at breakdown, after Thévenin.
    #[must_use]
    pub fn breakdown(&self) -> (Ratio, Torque) {
        let source = self.stator_impedance().beside(self.shunt());
        let slip = self.rotor.0.ohms() / Complex(source.0, source.1 + self.rotor.1.ohms()).size();
        (Ratio::from_fraction(slip), self.torque(Ratio::from_fraction(slip)))
    }

    /// The slip, below breakdown, at which the shaft gives this power; none if it never does.
    #[must_use]
    pub fn slip_for(&self, shaft: Power) -> Option<Ratio> {
        // Shaft power has its own highest point, a little below the breakdown slip; look for it by thirds.
        let power = |s: f64| self.at(Ratio::from_fraction(s)).shaft.watts();
        let (mut left, mut right) = (1e-9, self.breakdown().0.fraction());
        for _ in 0..200 {
            let third = (right - left) / 3.0;
            if power(left + third) < power(right - third) { left += third } else { right -= third }
        }
        let (mut low, mut high) = (1e-9, right);
        if !(power(low) <= shaft.watts() && shaft.watts() <= power(high)) {
            return None;
        }
        for _ in 0..200 {
            let middle = (low + high) / 2.0;
            if power(middle) < shaft.watts() { low = middle } else { high = middle }
        }
        Some(Ratio::from_fraction(high))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Fitzgerald, Electric Machinery, Ex. 6.2 and 6.3 (C-EC-001, C-EC-004).
    #[test]
    fn a_textbook_machine_is_solved_as_published() {
        let ohms = Resistance::from_ohms;
        let machine = Circuit {
            voltage: Voltage::from_volts(220.0),
            frequency: Frequency::from_hertz(60.0),
            pole_pairs: 3,
            stator: (ohms(0.294), ohms(0.503)),
            rotor: (ohms(0.144), ohms(0.209)),
            magnetising: ohms(13.25),
            iron: None,
            rotational: Power::from_watts(403.0),
        };
        let point = machine.at(Ratio::from_fraction(0.02));
        assert!((point.current.amperes() - 18.778_194).abs() < 0.0376);
        assert!((point.shaft.watts() - 5221.6).abs() < 10.4);
        let (slip, highest) = machine.breakdown();
        assert!(
            (slip.fraction() - 0.191_811_17).abs() < 5.75e-4 && (highest.newton_metres() - 174.564_31).abs() < 0.524
        );
        let rated = machine.slip_for(Power::from_watts(7460.0)).expect("within its power");
        assert!((machine.at(rated).shaft.watts() - 7460.0).abs() < 1e-3);
        assert!(machine.slip_for(Power::from_watts(1e6)).is_none());
    }
}
