//! Ramps that have a formula: rows RM-01, RM-03 and RM-04. The integration is tested against them.

use super::available_torque::angular;
use crate::quantity::{Duration, Inertia, Speed, Torque};

/// t = J·Δω/(T_M − T_L) (RM-01); none without spare torque.
#[must_use]
pub fn constant_torque_time(inertia: Inertia, motor: Torque, load: Torque, change: Speed) -> Option<Duration> {
    let spare = motor.newton_metres() - load.newton_metres();
    (spare > 0.0).then(|| Duration::from_seconds(inertia.kilogram_square_metres() * angular(change) / spare))
}

/// t = J·ω_N/√(T_M·T_N)·artanh(x·√(T_N/T_M)), x = ω/ω_N (RM-04); none where the load takes all of T_M on the way.
#[must_use]
pub fn quadratic_load_time(inertia: Inertia, motor: Torque, load: Torque, rated: Speed, to: Speed) -> Option<Duration> {
    let (tm, tn) = (motor.newton_metres(), load.newton_metres());
    let argument = to.rpm() / rated.rpm() * (tn / tm).sqrt();
    (tm > 0.0 && tn > 0.0 && argument < 1.0).then(|| {
        Duration::from_seconds(
            inertia.kilogram_square_metres() * angular(rated) / (tm * tn).sqrt() * libm::atanh(argument),
        )
    })
}

/// The trade's t = WK²·Δn/(308·T) in lb·ft², rpm and lbf·ft, with quantities converted (RM-03). The constant is a
/// rounding of 307.24, so the result is 0.25 % short; kept to compare with sheets that use it.
#[must_use]
pub fn wk2_time(inertia: Inertia, change: Speed, spare: Torque) -> Option<Duration> {
    /// The rounded constant.
    const TRADE: f64 = 308.0;
    /// kg·m² in one lb·ft².
    const POUND_FOOT_SQUARED: f64 = 0.042_140_110_093_805;
    /// N·m in one lbf·ft.
    const POUND_FOOT: f64 = 1.355_817_948_331_400_4;
    let (wk2, torque) = (inertia.kilogram_square_metres() / POUND_FOOT_SQUARED, spare.newton_metres() / POUND_FOOT);
    (torque > 0.0).then(|| Duration::from_seconds(wk2 * change.rpm() / (TRADE * torque)))
}
