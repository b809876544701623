//! Current distortion limits of IEEE 519 at the point of common coupling, 120 V to 69 kV (rows SP-07 and SP-08).

use crate::quantity::{Current, Ratio};

/// Isc/I_L from which a row holds, then percent for orders below 11, 17, 23, 35, up to 50, and in all.
const ROWS: [(f64, [f64; 6]); 5] = [
    (0.0, [4.0, 2.0, 1.5, 0.6, 0.3, 5.0]),
    (20.0, [7.0, 3.5, 2.5, 1.0, 0.5, 8.0]),
    (50.0, [10.0, 4.5, 4.0, 1.5, 0.7, 12.0]),
    (100.0, [12.0, 5.5, 5.0, 2.0, 1.0, 15.0]),
    (1000.0, [15.0, 7.0, 6.0, 2.5, 1.4, 20.0]),
];

/// Edition of IEEE 519, which decides the limit of even orders.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Edition {
    /// 2014: a quarter of the odd limit.
    Of2014,
    /// 2022: half of it up to the sixth order, all of it above.
    Of2022,
}

/// Short-circuit over demand current.
#[must_use]
pub fn short_circuit_ratio(short_circuit: Current, demand: Current) -> Ratio {
    Ratio::from_fraction(short_circuit.amperes() / demand.amperes())
}

fn row(ratio: Ratio) -> [f64; 6] {
    // The last row begins above 1000, not at it.
    let holds = |from: f64| if from >= 1000.0 { ratio.fraction() > from } else { ratio.fraction() >= from };
    ROWS.iter().rev().find(|(from, _)| holds(*from)).map_or(ROWS[0].1, |(_, limits)| *limits)
}

/// Limit of the total demand distortion.
#[must_use]
pub fn total(ratio: Ratio) -> Ratio {
    Ratio::from_fraction(row(ratio)[5] / 100.0)
}

/// Limit of one order over the demand current; `None` below 2 and above 50.
#[must_use]
pub fn of_order(ratio: Ratio, order: u32, edition: Edition) -> Option<Ratio> {
    let band = match order {
        2..=10 => 0,
        11..=16 => 1,
        17..=22 => 2,
        23..=34 => 3,
        35..=50 => 4,
        _ => return None,
    };
    let part = match (order % 2, edition) {
        (0, Edition::Of2014) => 0.25,
        (0, Edition::Of2022) if order <= 6 => 0.5,
        _ => 1.0,
    };
    Some(Ratio::from_fraction(row(ratio)[band] * part / 100.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-SP-009 and C-SP-010: IEEE 519-2014/2022, table 2.
    #[test]
    fn published_rows() {
        for (short_circuit, demand, ratio, in_all, low) in
            [(20_000.0, 800.0, 25.0, 0.08, 0.07), (12_000.0, 800.0, 15.0, 0.05, 0.04)]
        {
            let found = short_circuit_ratio(Current::from_amperes(short_circuit), Current::from_amperes(demand));
            assert!((found.fraction() - ratio).abs() < 0.01);
            assert!((total(found).fraction() - in_all).abs() < 1e-12);
            assert!((of_order(found, 5, Edition::Of2014).expect("listed").fraction() - low).abs() < 1e-12);
        }
    }

    #[test]
    fn edges_of_rows_orders_and_editions() {
        let at = |ratio: f64| total(Ratio::from_fraction(ratio)).fraction();
        assert_eq!([19.9, 20.0, 50.0, 100.0, 1000.0, 1000.1].map(at), [0.05, 0.08, 0.12, 0.15, 0.15, 0.20]);
        let order =
            |h, edition| of_order(Ratio::from_fraction(25.0), h, edition).map(|l| (l.fraction() * 1e5).round() / 1e3);
        assert_eq!([10, 11, 17, 23, 35].map(|h| order(h, Edition::Of2022)), [7.0, 3.5, 2.5, 1.0, 0.5].map(Some));
        assert_eq!(
            (order(6, Edition::Of2014), order(6, Edition::Of2022), order(8, Edition::Of2022)),
            (Some(1.75), Some(3.5), Some(7.0))
        );
        assert_eq!((order(1, Edition::Of2014), order(51, Edition::Of2014)), (None, None));
    }
}
