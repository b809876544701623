//! Stop categories, the drive functions they go with, and which may serve an emergency stop (rows ST-01 to ST-03).

/// IEC 60204-1:2016, 9.2.2.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum StopCategory {
    /// Power is removed at once.
    Zero,
    /// Brought to rest under control, then power is removed.
    One,
    /// Brought to rest under control, power stays.
    Two,
}

impl StopCategory {
    /// The drive safety function of IEC 61800-5-2 that corresponds. None of them isolates.
    #[must_use]
    pub const fn drive_function(self) -> &'static str {
        match self {
            Self::Zero => "STO",
            Self::One => "SS1",
            Self::Two => "SS2",
        }
    }

    /// Whether ISO 13850 admits it for an emergency stop.
    #[must_use]
    pub const fn serves_emergency_stop(self) -> bool {
        matches!(self, Self::Zero | Self::One)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// ISO 13850:2015 (row ST-02): category 0 or 1 only.
    #[test]
    fn category_two_does_not_serve_an_emergency_stop() {
        assert!(!StopCategory::Two.serves_emergency_stop() && StopCategory::One.serves_emergency_stop());
    }
}
