//! Quantities that cannot be mixed up: the unit stands in the constructor, the number is private.
//!
//! A constructor takes any number; a number that is not finite ends in an outcome that is not assessed
//! (see [`crate::OutcomeBuilder`]), never in a verdict.

macro_rules! quantities {
    ($($(#[$doc:meta])* $name:ident, $from:ident, $read:ident, $symbol:literal;)*) => {$(
        $(#[$doc])*
        #[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
        pub struct $name(f64);

        impl $name {
            /// The unit's symbol, as shown in workings.
            pub const SYMBOL: &'static str = $symbol;

            #[doc = concat!("From a number in ", $symbol, ".")]
            #[must_use]
            pub const fn $from(value: f64) -> Self {
                Self(value)
            }

            #[doc = concat!("The number in ", $symbol, ".")]
            #[must_use]
            pub const fn $read(self) -> f64 {
                self.0
            }
        }

        impl crate::quantity::Quantity for $name {
            const SYMBOL: &'static str = $symbol;

            fn from_coherent(value: f64) -> Self {
                Self(value)
            }

            fn coherent(self) -> f64 {
                self.0
            }
        }
    )*};
}

/// What every quantity can do: give and take its number in the unit that the calculations use.
pub trait Quantity: Copy {
    /// The unit's symbol.
    const SYMBOL: &'static str;
    /// From a number in that unit.
    fn from_coherent(value: f64) -> Self;
    /// The number in that unit.
    fn coherent(self) -> f64;
}

quantities! {
    /// Electric potential difference, r.m.s. for alternating and mean for direct voltage.
    Voltage, from_volts, volts, "V";
    /// Electric current, r.m.s. for alternating current.
    Current, from_amperes, amperes, "A";
    /// Active or mechanical power.
    Power, from_watts, watts, "W";
    /// Apparent power.
    ApparentPower, from_volt_amperes, volt_amperes, "VA";
    /// Frequency.
    Frequency, from_hertz, hertz, "Hz";
    /// Rotational speed.
    Speed, from_rpm, rpm, "rpm";
    /// A plain ratio: power factor, efficiency, slip, gear ratio. 0.86, not 86.
    Ratio, from_fraction, fraction, "1";
    /// Electric resistance or impedance magnitude.
    Resistance, from_ohms, ohms, "Ω";
    /// Temperature on the Celsius scale.
    Temperature, from_celsius, celsius, "°C";
    /// A difference or rise of temperature.
    TemperatureRise, from_kelvins, kelvins, "K";
    /// A duration.
    Duration, from_seconds, seconds, "s";
    /// A length or an altitude.
    Length, from_metres, metres, "m";
    /// A conductor's cross-section.
    CrossSection, from_square_millimetres, square_millimetres, "mm²";
    /// Moment of inertia.
    Inertia, from_kilogram_square_metres, kilogram_square_metres, "kg·m²";
    /// Torque.
    Torque, from_newton_metres, newton_metres, "N·m";
    /// Electric capacitance.
    Capacitance, from_farads, farads, "F";
    /// Energy.
    Energy, from_joules, joules, "J";
    /// Vibration velocity, broadband r.m.s.
    VibrationVelocity, from_millimetres_per_second, millimetres_per_second, "mm/s";
    /// Mass.
    Mass, from_kilograms, kilograms, "kg";
    /// Linear speed.
    LinearSpeed, from_metres_per_second, metres_per_second, "m/s";
    /// Volts per hertz.
    VoltsPerHertz, from_volts_per_hertz, volts_per_hertz, "V/Hz";
}
