//! The torque a motor gives within a current limit, and the current a torque takes.
//!
//! T = T_N·(1/r)·√(I_lim² − (I_m/r)²)/√(I_N² − I_m²), r = n/n_N but at least 1, and never above λ·T_N/(1.3·r²):
//! flux falls as 1/r above base speed (row VF-02) and the breakdown torque with its square (row VF-03). I_m is a
//! bracket (rows NL-01, NL-02); the end that gives less torque counts. A drive on plain volts per hertz without
//! boost does not reach this near standstill (row VF-04).

use crate::formulas::load_current::{current_between, torque_between};
use crate::formulas::magnetising::Bracket;
use crate::formulas::torque::torque;
use crate::quantity::{Current, Power, Ratio, Speed, Torque};

/// Distance kept from the breakdown torque: common practice (row VF-03).
pub const BREAKDOWN_MARGIN: f64 = 1.3;

/// What the motor's nameplate says about torque.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Motor {
    /// Torque at rated power and rated speed.
    pub rated_torque: Torque,
    /// Current at rated torque.
    pub rated_current: Current,
    /// Speed at rated torque; base speed, from which the field is weakened.
    pub rated_speed: Speed,
    /// Breakdown over rated torque, λ.
    pub breakdown: Ratio,
    /// Between which currents the magnetising current lies at rated flux.
    pub magnetising: Bracket,
}

impl Motor {
    /// From rated power, by T = P/ω (row MN-04).
    #[must_use]
    pub fn from_plate(power: Power, speed: Speed, current: Current, breakdown: Ratio, magnetising: Bracket) -> Self {
        let rated_torque = torque(power, speed);
        Self { rated_torque, rated_current: current, rated_speed: speed, breakdown, magnetising }
    }

    /// Depth of field weakening: 1 up to base speed, then the speed over base speed.
    #[must_use]
    pub fn weakening(&self, speed: Speed) -> Ratio {
        Ratio::from_fraction((speed.rpm().abs() / self.rated_speed.rpm()).max(1.0))
    }

    /// λ·T_N/(1.3·r²), which no current exceeds.
    #[must_use]
    pub fn ceiling(&self, speed: Speed) -> Torque {
        let r = self.weakening(speed).fraction();
        Torque::from_newton_metres(
            self.breakdown.fraction() * self.rated_torque.newton_metres() / (BREAKDOWN_MARGIN * r * r),
        )
    }

    /// Torque at this speed within this current: the end of the bracket that gives less, and never above the ceiling.
    #[must_use]
    pub fn available(&self, limit: Current, speed: Speed) -> Torque {
        let share = torque_between(self.rated_current, self.magnetising, limit, self.weakening(speed));
        let least = share.map_or(0.0, |(least, _)| least.fraction() * self.rated_torque.newton_metres());
        Torque::from_newton_metres(least.min(self.ceiling(speed).newton_metres()))
    }

    /// Current that this torque takes at this speed; the end of the bracket that takes more.
    #[must_use]
    pub fn current(&self, torque: Torque, speed: Speed) -> Current {
        let share = Ratio::from_fraction(torque.newton_metres() / self.rated_torque.newton_metres());
        let found = current_between(self.rated_current, self.magnetising, share, self.weakening(speed));
        found.map_or(Current::from_amperes(f64::INFINITY), |(_, most)| most)
    }
}

/// Radians per second.
pub(crate) fn angular(speed: Speed) -> f64 {
    speed.rpm() * core::f64::consts::TAU / 60.0
}

#[cfg(test)]
pub(crate) mod tests {
    use super::*;
    use crate::formulas::magnetising::bracket;

    /// 15 kW, four poles, the plate used throughout these tests.
    pub(crate) fn motor() -> Motor {
        let (current, breakdown) = (Current::from_amperes(28.5), Ratio::from_fraction(3.0));
        let magnetising = bracket(current, Ratio::from_fraction(0.85), breakdown).expect("plausible");
        Motor::from_plate(Power::from_watts(15e3), Speed::from_rpm(1470.0), current, breakdown, magnetising)
    }

    fn at(amperes: f64, rpm: f64) -> f64 {
        motor().available(Current::from_amperes(amperes), Speed::from_rpm(rpm)).newton_metres()
    }

    /// Rated current at rated speed is rated torque: 97.44 N·m (C-MN-010).
    #[test]
    fn rated_current_gives_rated_torque() {
        assert!((at(28.5, 1470.0) - 97.441_802).abs() < 0.01);
        assert!((at(28.5, 0.0) - 97.441_802).abs() < 0.01);
    }

    #[test]
    fn no_torque_is_left_at_the_magnetising_current_and_none_beyond_the_ceiling() {
        let high = motor().magnetising.high.amperes();
        assert!(at(high * 0.999, 100.0).abs() < 1e-9);
        assert!((at(1000.0, 0.0) - 3.0 * 97.441_802 / 1.3).abs() < 0.01);
        assert!((at(1000.0, 2940.0) - 3.0 * 97.441_802 / 1.3 / 4.0).abs() < 0.01);
    }

    /// Row VF-02: above base speed torque falls about as 1/r; the smaller magnetising current leaves a little more.
    #[test]
    fn above_base_speed_torque_falls_about_as_one_over_r() {
        let torque = at(28.5, 2205.0);
        assert!(torque > 97.44 / 1.5 && torque < 97.44 / 1.5 * 1.2, "{torque}");
    }

    #[test]
    fn the_current_of_the_available_torque_is_the_limit() {
        for (amperes, rpm) in [(28.5, 700.0), (35.0, 0.0), (30.0, 2000.0), (20.0, 1000.0)] {
            let torque = motor().available(Current::from_amperes(amperes), Speed::from_rpm(rpm));
            let current = motor().current(torque, Speed::from_rpm(rpm)).amperes();
            assert!((current - amperes).abs() < 1e-6, "{amperes} A at {rpm} rpm: {current} A");
        }
    }
}
