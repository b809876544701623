//! Chance that is the same at every run: a power cut is told by its number.

/// Numbers drawn one after another from a seed (SplitMix64, by Steele, Lea and Flood, 2014).
#[derive(Clone, Debug)]
pub(super) struct Chance(u64);

impl Chance {
    /// The chance of one power cut.
    pub(super) const fn of(number: u64) -> Self {
        Self(number.wrapping_mul(0x9E37_79B9_7F4A_7C15))
    }

    /// A number from 0 to below this one.
    pub(super) fn below(&mut self, end: usize) -> usize {
        self.0 = self.0.wrapping_add(0x9E37_79B9_7F4A_7C15);
        let mut z = self.0;
        z = (z ^ (z >> 30)).wrapping_mul(0xBF58_476D_1CE4_E5B9);
        z = (z ^ (z >> 27)).wrapping_mul(0x94D0_49BB_1331_11EB);
        usize::try_from((z ^ (z >> 31)) % u64::try_from(end).unwrap()).unwrap()
    }
}
