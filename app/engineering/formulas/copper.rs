//! Winding resistance and temperature (row MN-19).

use crate::quantity::{Resistance, Temperature, TemperatureRise};

/// What the winding is made of.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Conductor {
    /// Copper.
    Copper,
    /// Aluminium.
    Aluminium,
}

impl Conductor {
    /// The constant k in kelvins: copper 235 after IEC 60034-1, aluminium 225.
    #[must_use]
    pub const fn constant(self) -> f64 {
        match self {
            Self::Copper => 235.0,
            Self::Aluminium => 225.0,
        }
    }
}

/// R₂ = R₁·(k + T₂)/(k + T₁).
#[must_use]
pub fn resistance_at(at: Resistance, from: Temperature, to: Temperature, conductor: Conductor) -> Resistance {
    let k = conductor.constant();
    Resistance::from_ohms(at.ohms() * (k + to.celsius()) / (k + from.celsius()))
}

/// T₂ = R₂/R₁·(k + T₁) − k.
#[must_use]
pub fn temperature_from(cold: Resistance, cold_at: Temperature, hot: Resistance, conductor: Conductor) -> Temperature {
    temperature_by_constant(cold, cold_at, hot, TemperatureRise::from_kelvins(conductor.constant()))
}

/// k of copper after IEEE 112 and NEMA MG 1, half a kelvin less than that of IEC 60034-1.
pub const COPPER_IEEE: TemperatureRise = TemperatureRise::from_kelvins(234.5);

/// The same with a constant k of one's own choice, which has to be stated with the result.
#[must_use]
pub fn temperature_by_constant(
    cold: Resistance,
    cold_at: Temperature,
    hot: Resistance,
    k: TemperatureRise,
) -> Temperature {
    let k = k.kelvins();
    Temperature::from_celsius(hot.ohms() / cold.ohms() * (k + cold_at.celsius()) - k)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-MN-039 (IEC 60034-1 cl. 8.6.2): 0.5 Ω at 20 °C, 0.65 Ω hot, 96.5 °C.
    #[test]
    fn the_reference_winding() {
        let (cold, hot) = (Resistance::from_ohms(0.5), Resistance::from_ohms(0.65));
        let found = temperature_from(cold, Temperature::from_celsius(20.0), hot, Conductor::Copper);
        assert!((found.celsius() - 96.5).abs() < 0.01);
        let back = resistance_at(cold, Temperature::from_celsius(20.0), found, Conductor::Copper);
        assert!((back.ohms() - 0.65).abs() < 1e-12);
    }
}
