//! Which of several sister drives stands out: the modified z-score of Iglewicz and Hoaglin, 1993.
//!
//! z = 0.6745·(x − median)/MAD, MAD the median of |x − median|; above 3.5 in size it stands out. Where more than half
//! are equal MAD is zero; then the mean absolute deviation stands in, z = (x − median)/(1.253314·MeanAD).

use crate::limit::Limit;
use crate::quantity::Quantity;
use crate::sources::runs::SISTERS;

/// Beyond this size a value stands out.
pub const STANDS_OUT: Limit = Limit { name: "modified z-score", value: 3.5, unit: "1", source: SISTERS };

/// Fewest sisters for which a score means anything.
pub const FEWEST: usize = 4;

/// What the sisters tell.
#[derive(Clone, Debug, PartialEq)]
pub struct Spread {
    /// Their median.
    pub median: f64,
    /// Median absolute deviation.
    pub mad: f64,
    /// Score of each, in the order given.
    pub scores: Vec<f64>,
}

impl Spread {
    /// Which ones stand out, by position.
    #[must_use]
    pub fn standing_out(&self) -> Vec<usize> {
        (0..self.scores.len()).filter(|i| self.scores[*i].abs() > STANDS_OUT.value).collect()
    }
}

/// Scores of like readings of one quantity; `None` with fewer than four, or when one is not a number.
#[must_use]
pub fn spread<Q: Quantity>(values: &[Q]) -> Option<Spread> {
    scores(&values.iter().map(|value| value.coherent()).collect::<Vec<_>>())
}

fn scores(values: &[f64]) -> Option<Spread> {
    if values.len() < FEWEST || !values.iter().all(|v| v.is_finite()) {
        return None;
    }
    let median_of = |mut numbers: Vec<f64>| {
        numbers.sort_by(f64::total_cmp);
        let half = numbers.len() / 2;
        if numbers.len() % 2 == 1 { numbers[half] } else { f64::midpoint(numbers[half - 1], numbers[half]) }
    };
    let median = median_of(values.to_vec());
    let deviations: Vec<f64> = values.iter().map(|v| (v - median).abs()).collect();
    let mean = deviations.iter().sum::<f64>() / deviations.len() as f64;
    let mad = median_of(deviations);
    let scale = if mad > 0.0 { mad / 0.6745 } else { 1.253_314 * mean };
    let scores = values.iter().map(|v| if scale > 0.0 { (v - median) / scale } else { 0.0 }).collect();
    Some(Spread { median, mad, scores })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Current;

    fn amperes(values: &[f64]) -> Option<Spread> {
        spread(&values.iter().map(|v| Current::from_amperes(*v)).collect::<Vec<_>>())
    }

    /// By hand from the definition (row SZ-01): deviations 0, 0, 0.02, 0.05, 0.05, 0.099 and 5.96, so MAD is 0.05.
    #[test]
    fn scores_by_hand() {
        let found = amperes(&[3.02, 3.04, 3.09, 2.99, 3.04, 3.139, 9.0]).expect("enough");
        assert!((found.median - 3.04).abs() < 1e-12 && (found.mad - 0.05).abs() < 1e-9);
        assert!((found.scores[5] - 0.6745 * 0.099 / 0.05).abs() < 1e-6);
        assert_eq!(found.standing_out(), vec![6]);
    }

    /// Iglewicz and Hoaglin 1993: 3.5 is the border, and a score at it does not stand out.
    #[test]
    fn at_and_just_beyond_the_border() {
        let sisters = |last: f64| amperes(&[-1.0, -1.0, 0.0, 0.0, 1.0, 1.0, last]).expect("enough");
        let border = 3.5 / 0.6745;
        assert!(sisters(border - 0.01).standing_out().is_empty());
        assert_eq!(sisters(border + 0.01).standing_out(), vec![6]);
    }

    #[test]
    fn equal_sisters_and_one_other() {
        assert!(amperes(&[5.0; 6]).expect("enough").standing_out().is_empty());
        assert_eq!(amperes(&[5.0, 5.0, 5.0, 5.0, 5.0, 6.0]).expect("enough").standing_out(), vec![5]);
        assert!(amperes(&[1.0, 2.0, 3.0]).is_none());
        assert!(amperes(&[1.0, 2.0, 3.0, f64::NAN]).is_none());
    }
}
