//! Guarded limits and the probability of conforming (rows DU-01, DU-02).

use crate::quantity::{Quantity, Ratio};

/// Which side of a limit conforms.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Side {
    /// At least the limit.
    Lower,
    /// At most the limit.
    Upper,
}

/// The limit moved inwards by r·U: a reading at or inside it is accepted.
#[must_use]
pub fn acceptance_limit<Q: Quantity>(limit: Q, side: Side, expanded: Q, multiplier: Ratio) -> Q {
    let guard = multiplier.fraction() * expanded.coherent();
    Q::from_coherent(limit.coherent() + if side == Side::Lower { guard } else { -guard })
}

/// Whether the reading lies at or inside the limit.
#[must_use]
pub fn accepts<Q: Quantity>(limit: Q, side: Side, reading: Q) -> bool {
    if side == Side::Lower { reading.coherent() >= limit.coherent() } else { reading.coherent() <= limit.coherent() }
}

/// Φ of the distance to the limit in standard uncertainties: how probably the true value conforms.
#[must_use]
pub fn probability<Q: Quantity>(limit: Q, side: Side, reading: Q, standard: Q) -> Ratio {
    let inside = (reading.coherent() - limit.coherent()) * if side == Side::Lower { 1.0 } else { -1.0 };
    Ratio::from_fraction(0.5 * libm::erfc(-inside / (standard.coherent() * core::f64::consts::SQRT_2)))
}
