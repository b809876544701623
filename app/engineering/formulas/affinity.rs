//! Flow, head and power of a fan or centrifugal pump by speed, without static head (row RM-07).

use crate::quantity::Ratio;

/// Q₂/Q₁ = n₂/n₁.
#[must_use]
pub const fn flow(speed: Ratio) -> Ratio {
    speed
}

/// H₂/H₁ = (n₂/n₁)².
#[must_use]
pub const fn head(speed: Ratio) -> Ratio {
    Ratio::from_fraction(speed.fraction() * speed.fraction())
}

/// P₂/P₁ = (n₂/n₁)³.
#[must_use]
pub const fn power(speed: Ratio) -> Ratio {
    Ratio::from_fraction(speed.fraction() * speed.fraction() * speed.fraction())
}
