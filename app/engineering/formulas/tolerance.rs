//! What IEC 60034-1 clause 12 allows a motor to differ from its declared values (row MN-11).

use crate::quantity::{Power, Ratio};

/// Up to this power the efficiency may fall short by 15 % of the losses' share, above it by 10 %.
const STEP_WATTS: f64 = 150_000.0;

/// By how much the efficiency may fall short of the declared one.
#[must_use]
pub fn of_efficiency(power: Power, declared: Ratio) -> Ratio {
    let share = if power.watts() <= STEP_WATTS { 0.15 } else { 0.10 };
    Ratio::from_fraction(share * (1.0 - declared.fraction()))
}

/// By how much the power factor may fall short: a sixth of what it lacks to one, at least 0.02, at most 0.07.
#[must_use]
pub fn of_power_factor(declared: Ratio) -> Ratio {
    Ratio::from_fraction(((1.0 - declared.fraction()) / 6.0).clamp(0.02, 0.07))
}

/// By how much the slip may differ either way: 20 % of it from 1 kW, 30 % below.
#[must_use]
pub fn of_slip(power: Power, declared: Ratio) -> Ratio {
    Ratio::from_fraction(declared.fraction() * if power.watts() >= 1000.0 { 0.2 } else { 0.3 })
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-MN-027 and C-MN-028 (IEC 60034-1 cl. 12, computed): 15 kW and 200 kW.
    #[test]
    fn lowest_values_of_two_motors() {
        let near = |a: f64, b: f64| (a - b).abs() < 1e-5;
        for (watts, eta, eta_low, cos, cos_low, slip, slip_low) in [
            (15_000.0, 0.921, 0.909_15, 0.85, 0.825, 0.02, 0.016),
            (200_000.0, 0.958, 0.9538, 0.92, 0.9, 0.008, 0.0064),
        ] {
            let power = Power::from_watts(watts);
            assert!(near(eta - of_efficiency(power, Ratio::from_fraction(eta)).fraction(), eta_low));
            assert!(near(cos - of_power_factor(Ratio::from_fraction(cos)).fraction(), cos_low));
            assert!(near(slip - of_slip(power, Ratio::from_fraction(slip)).fraction(), slip_low));
        }
    }
}
