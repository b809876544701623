//! What a warm motor stands beyond rated current for a short while (row OL-09): 1.5 times rated current for 2 min.

use crate::limit::Limit;
use crate::quantity::{Duration, Ratio};
use crate::sources::motion::EXCESS_CURRENT;

/// Multiple of rated current that is stood.
pub const MULTIPLE: Limit = Limit {
    name: "current that a warm motor stands for 2 min, over rated",
    value: 1.5,
    unit: "1",
    source: EXCESS_CURRENT,
};
/// For how many seconds.
pub const LASTING: Limit = Limit {
    name: "how long a warm motor stands 1.5 times rated current",
    value: 120.0,
    unit: "s",
    source: EXCESS_CURRENT,
};

/// (1.5² − 1) × 120 s: heat beyond rated current in seconds of rated heat, none of it given off meanwhile.
pub const STOOD: Duration = Duration::from_seconds((MULTIPLE.value * MULTIPLE.value - 1.0) * LASTING.value);

/// Heat beyond rated current, over what is stood.
#[must_use]
pub fn share(excess: Duration) -> Ratio {
    Ratio::from_fraction(excess.seconds() / STOOD.seconds())
}

#[cfg(test)]
mod tests {
    use super::*;

    /// IEC 60034-1 (row OL-09, from memory): 1.5 I_N for 2 min is all of it, (1.5² − 1) × 120 s = 150 s; twice rated
    /// current, (2² − 1) = 3, gets there in 50 s.
    #[test]
    fn two_minutes_at_one_and_a_half_are_all_of_it() {
        assert!((STOOD.seconds() - 150.0).abs() < 1e-12);
        assert!((share(Duration::from_seconds(1.25 * 120.0)).fraction() - 1.0).abs() < 1e-12);
        assert!((share(Duration::from_seconds(3.0 * 50.0)).fraction() - 1.0).abs() < 1e-12);
    }
}
