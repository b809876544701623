//! Sources on the DC bus.

use crate::source::{Source, Status};

const fn grave(id: &'static str, text: &'static str, status: Status) -> Source {
    Source { id, text, status, safety: true }
}

/// Mean of the unsmoothed bridge.
pub const DC_01: Source = Source {
    id: "DC-01",
    text: "textbook: 3√2/π·U, six-pulse bridge without smoothing",
    status: Status::Confirmed,
    safety: false,
};
/// Peak at light load.
pub const DC_02: Source = grave("DC-02", "physics: √2·U, capacitor charged to the peak", Status::Confirmed);
/// A lost phase hides in the mean.
pub const DC_04: Source = Source {
    id: "DC-04",
    text: "physics: with a phase lost the capacitor still charges to the same peak",
    status: Status::Confirmed,
    safety: false,
};
/// Pre-charge.
pub const DC_05: Source = Source {
    id: "DC-05",
    text: "physics: τ = R·C, 95 % after 3.00·τ, energy ½·C·V² in the resistor",
    status: Status::Confirmed,
    safety: false,
};
/// Residual voltage of machines.
pub const DC_07: Source = grave(
    "DC-07",
    "IEC 60204-1:2016, clause 6.2.4: 60 V or less; otherwise a warning with the waiting time",
    Status::Confirmed,
);
/// The lower figure.
pub const DC_11: Source = grave("DC-11", "NFPA 70 460.6: 50 V or less", Status::Confirmed);
/// Waiting proves nothing.
pub const DC_12: Source = grave(
    "DC-12",
    "EN 50110-1, proving dead: wait the marked time and measure; waiting alone proves nothing",
    Status::CommonPractice,
);
/// How far the running bus may lie beyond its window.
pub const BUS_ALLOWANCE: Source = Source {
    id: "DC-13",
    text: "common practice: 3 % below the mean of the bridge for drops, 2 % above its peak for display and unbalance",
    status: Status::CommonPractice,
    safety: false,
};
