//! The equivalent circuit from a direct-current, a no-load and a locked-rotor test (row NL-04).

use crate::quantity::{Current, Frequency, Power, Ratio, Resistance, Voltage};

/// What the three tests gave; the winding is taken as star.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Tests {
    /// Direct voltage between two terminals and the current it drives.
    pub direct: (Voltage, Current),
    /// Line voltage, current, power and frequency with the rotor locked.
    pub locked: (Voltage, Current, Power, Frequency),
    /// Line voltage, current, power and frequency without load.
    pub no_load: (Voltage, Current, Power, Frequency),
    /// Share of the leakage reactance that belongs to the stator, by design letter.
    pub stator_share: Ratio,
}

/// The circuit at the no-load frequency.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Found {
    /// Stator resistance and leakage reactance.
    pub stator: (Resistance, Resistance),
    /// Rotor resistance and leakage reactance.
    pub rotor: (Resistance, Resistance),
    /// Magnetising reactance.
    pub magnetising: Resistance,
}

/// Works the circuit out.
#[must_use]
pub fn circuit(tests: &Tests) -> Found {
    let stator = tests.direct.0.volts() / (2.0 * tests.direct.1.amperes());
    let (series, leakage) = parts(tests.locked.0, tests.locked.1, tests.locked.2);
    let leakage = leakage * tests.no_load.3.hertz() / tests.locked.3.hertz();
    let at_stator = leakage * tests.stator_share.fraction();
    let (_, whole) = parts(tests.no_load.0, tests.no_load.1, tests.no_load.2);
    let ohms = Resistance::from_ohms;
    Found {
        stator: (ohms(stator), ohms(at_stator)),
        rotor: (ohms(series - stator), ohms(leakage - at_stator)),
        magnetising: ohms(whole - at_stator),
    }
}

/// Resistance and reactance per phase of a balanced load in star.
fn parts(line: Voltage, current: Current, power: Power) -> (f64, f64) {
    let amperes = current.amperes();
    let impedance = line.volts() / 3.0_f64.sqrt() / amperes;
    let resistance = power.watts() / (3.0 * amperes * amperes);
    (resistance, (impedance * impedance - resistance * resistance).max(0.0).sqrt())
}
