//! Kinds of quantity and the units a person may pick for each: what turns typed text into a coherent number.

/// A kind of quantity: which units may stand beside a field.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(rename_all = "kebab-case"))]
pub enum Kind {
    /// Volts.
    Voltage,
    /// Amperes.
    Current,
    /// Loop current of an analogue signal; coherent unit is the ampere, typed in milliamperes.
    LoopCurrent,
    /// Active or mechanical power.
    Power,
    /// Apparent power.
    ApparentPower,
    /// Hertz.
    Frequency,
    /// Rotational speed.
    Speed,
    /// A pure number: power factor, service factor, gear ratio, torque multiple.
    Number,
    /// A fraction usually typed in percent: efficiency, unbalance, humidity, impedance.
    Percent,
    /// A count: pole number, pulses, cables in parallel.
    Count,
    /// Ohms.
    Resistance,
    /// Degrees Celsius.
    Temperature,
    /// Kelvins of difference.
    TemperatureRise,
    /// Seconds.
    Time,
    /// Metres.
    Length,
    /// Conductor cross-section.
    CrossSection,
    /// Moment of inertia.
    Inertia,
    /// Torque.
    Torque,
    /// Capacitance.
    Capacitance,
    /// Energy.
    Energy,
    /// Vibration velocity, r.m.s.
    Vibration,
    /// Rise time of a voltage edge; coherent unit is the second.
    RiseTime,
    /// Mass.
    Mass,
    /// Linear speed.
    LinearSpeed,
}

/// A unit: its symbol and how to reach the coherent unit, `coherent = number × factor + offset`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Unit {
    /// As shown and stored: `kW`, `MΩ`, `°F`.
    pub symbol: &'static str,
    /// Multiplier to the coherent unit.
    pub factor: f64,
    /// Added after multiplying.
    pub offset: f64,
}

const fn unit(symbol: &'static str, factor: f64) -> Unit {
    Unit { symbol, factor, offset: 0.0 }
}

impl Unit {
    /// The coherent number.
    #[must_use]
    pub fn to_coherent(&self, number: f64) -> f64 {
        number * self.factor + self.offset
    }

    /// The number in this unit.
    #[must_use]
    pub fn from_coherent(&self, coherent: f64) -> f64 {
        (coherent - self.offset) / self.factor
    }
}

impl Kind {
    /// The units a person may pick, the usual one first. Horsepower: NIST SP 811 B.8 (row MN-07).
    #[must_use]
    #[rustfmt::skip]
    pub const fn units(self) -> &'static [Unit] {
        match self {
            Self::Voltage => const { &[unit("V", 1.0), unit("kV", 1e3), unit("mV", 1e-3)] },
            Self::Current => const { &[unit("A", 1.0), unit("mA", 1e-3), unit("kA", 1e3)] },
            Self::LoopCurrent => const { &[unit("mA", 1e-3), unit("A", 1.0)] },
            Self::Power => const { &[unit("kW", 1e3), unit("W", 1.0), unit("MW", 1e6), unit("hp", 745.699_871_582_270_2), unit("PS", 735.498_75)] },
            Self::ApparentPower => const { &[unit("kVA", 1e3), unit("VA", 1.0), unit("MVA", 1e6)] },
            Self::Frequency => const { &[unit("Hz", 1.0), unit("kHz", 1e3)] },
            Self::Speed => const { &[unit("rpm", 1.0), unit("1/s", 60.0)] },
            Self::Number => const { &[unit("", 1.0)] },
            Self::Percent => const { &[unit("%", 0.01), unit("of 1", 1.0)] },
            Self::Count => const { &[unit("", 1.0)] },
            Self::Resistance => const { &[unit("Ω", 1.0), unit("mΩ", 1e-3), unit("µΩ", 1e-6), unit("kΩ", 1e3), unit("MΩ", 1e6), unit("GΩ", 1e9), unit("TΩ", 1e12)] },
            Self::Temperature => const { &[unit("°C", 1.0), Unit { symbol: "°F", factor: 5.0 / 9.0, offset: -160.0 / 9.0 }, Unit { symbol: "K", factor: 1.0, offset: -273.15 }] },
            Self::TemperatureRise => const { &[unit("K", 1.0), unit("°F", 5.0 / 9.0)] },
            Self::Time => const { &[unit("s", 1.0), unit("ms", 1e-3), unit("min", 60.0), unit("h", 3600.0)] },
            Self::Length => const { &[unit("m", 1.0), unit("mm", 1e-3), unit("km", 1e3), unit("ft", 0.3048)] },
            Self::CrossSection => const { &[unit("mm²", 1.0), unit("kcmil", 0.506_707_479_097_497_8)] },
            Self::Inertia => const { &[unit("kg·m²", 1.0), unit("lb·ft²", 0.042_140_110_093_805), unit("kg·cm²", 1e-4)] },
            Self::Torque => const { &[unit("N·m", 1.0), unit("kN·m", 1e3), unit("lbf·ft", 1.355_817_948_331_400_4), unit("lbf·in", 0.112_984_829_027_616_7)] },
            Self::Capacitance => const { &[unit("µF", 1e-6), unit("mF", 1e-3), unit("F", 1.0)] },
            Self::Energy => const { &[unit("J", 1.0), unit("kJ", 1e3), unit("kWh", 3.6e6)] },
            Self::Vibration => const { &[unit("mm/s", 1.0), unit("in/s", 25.4)] },
            Self::RiseTime => const { &[unit("µs", 1e-6), unit("ns", 1e-9)] },
            Self::Mass => const { &[unit("kg", 1.0), unit("t", 1e3), unit("lb", 0.453_592_37)] },
            Self::LinearSpeed => const { &[unit("m/s", 1.0), unit("m/min", 1.0 / 60.0), unit("ft/min", 0.005_08)] },
        }
    }

    /// The unit of this symbol, if this kind has it.
    #[must_use]
    pub fn unit(self, symbol: &str) -> Option<&'static Unit> {
        self.units().iter().find(|u| u.symbol == symbol)
    }

    /// The usual unit.
    #[must_use]
    pub fn usual(self) -> &'static Unit {
        &self.units()[0]
    }

    /// What it is called in messages.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Voltage => "voltage",
            Self::Current => "current",
            Self::LoopCurrent => "loop current",
            Self::Power => "power",
            Self::ApparentPower => "apparent power",
            Self::Frequency => "frequency",
            Self::Speed => "speed",
            Self::Number => "number",
            Self::Percent => "percentage",
            Self::Count => "count",
            Self::Resistance => "resistance",
            Self::Temperature => "temperature",
            Self::TemperatureRise => "temperature difference",
            Self::Time => "time",
            Self::Length => "length",
            Self::CrossSection => "cross-section",
            Self::Inertia => "moment of inertia",
            Self::Torque => "torque",
            Self::Capacitance => "capacitance",
            Self::Energy => "energy",
            Self::Vibration => "vibration velocity",
            Self::RiseTime => "rise time",
            Self::Mass => "mass",
            Self::LinearSpeed => "linear speed",
        }
    }

    /// Every kind, for tests and lists.
    pub const ALL: &'static [Self] = &[
        Self::Voltage,
        Self::Current,
        Self::LoopCurrent,
        Self::Power,
        Self::ApparentPower,
        Self::Frequency,
        Self::Speed,
        Self::Number,
        Self::Percent,
        Self::Count,
        Self::Resistance,
        Self::Temperature,
        Self::TemperatureRise,
        Self::Time,
        Self::Length,
        Self::CrossSection,
        Self::Inertia,
        Self::Torque,
        Self::Capacitance,
        Self::Energy,
        Self::Vibration,
        Self::RiseTime,
        Self::Mass,
        Self::LinearSpeed,
    ];
}

#[cfg(test)]
mod tests {
    use super::*;

    /// NIST SP 811 App. B.8 (row MN-07): 1 hp (550 ft·lbf/s) = 745.6999 W, metric 735.49875 W.
    #[test]
    fn horsepower_is_the_published_figure() {
        let hp = Kind::Power.unit("hp").expect("listed");
        assert!((hp.to_coherent(10.0) - 7456.9987).abs() < 0.001);
        let f = Kind::Temperature.unit("°F").expect("listed");
        assert!((f.to_coherent(212.0) - 100.0).abs() < 1e-9);
        assert!((f.from_coherent(40.0) - 104.0).abs() < 1e-9);
    }

    #[test]
    fn every_kind_has_distinct_unit_symbols() {
        for kind in Kind::ALL {
            for (i, u) in kind.units().iter().enumerate() {
                assert!(u.factor > 0.0, "{kind:?}");
                assert!(kind.units()[i + 1..].iter().all(|v| v.symbol != u.symbol), "{kind:?} {}", u.symbol);
            }
        }
    }
}
