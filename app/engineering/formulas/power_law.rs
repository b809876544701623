//! The exponent of a power law through measured points: least squares on logarithms, with its 95 % interval.

use crate::quantity::{Quantity, Ratio};

/// Student's t, two-sided 95 %, for 1 to 10 degrees of freedom (statistical tables).
const STUDENT: [f64; 10] = [12.706, 4.303, 3.182, 2.776, 2.571, 2.447, 2.365, 2.306, 2.262, 2.228];

/// t for more than ten degrees of freedom: a cautious step function of the same tables.
const STUDENT_MORE: [(usize, f64); 4] = [(15, 2.228), (20, 2.131), (30, 2.086), (usize::MAX, 2.042)];

/// y = a·xᵖ.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PowerLaw {
    /// The exponent p.
    pub exponent: Ratio,
    /// Half the width of its 95 % interval; `None` with two points.
    pub half_interval: Option<Ratio>,
    /// ln a.
    pub intercept: f64,
    /// Points used.
    pub points: usize,
}

/// Fits the points (x, y), each above zero; `None` with fewer than two different x, or impossible numbers.
#[must_use]
pub fn fit<X: Quantity, Y: Quantity>(points: &[(X, Y)]) -> Option<PowerLaw> {
    fit_numbers(&points.iter().map(|(x, y)| (x.coherent(), y.coherent())).collect::<Vec<_>>())
}

fn fit_numbers(points: &[(f64, f64)]) -> Option<PowerLaw> {
    let sound = |v: f64| v.is_finite() && v > 0.0;
    if points.len() < 2 || !points.iter().all(|(x, y)| sound(*x) && sound(*y)) {
        return None;
    }
    let logs: Vec<(f64, f64)> = points.iter().map(|(x, y)| (libm::log(*x), libm::log(*y))).collect();
    let count = logs.len() as f64;
    let mean_x = logs.iter().map(|p| p.0).sum::<f64>() / count;
    let mean_y = logs.iter().map(|p| p.1).sum::<f64>() / count;
    let sxx: f64 = logs.iter().map(|p| (p.0 - mean_x) * (p.0 - mean_x)).sum();
    let sxy: f64 = logs.iter().map(|p| (p.0 - mean_x) * (p.1 - mean_y)).sum();
    if sxx < 1e-12 {
        return None;
    }
    let exponent = sxy / sxx;
    let intercept = mean_y - exponent * mean_x;
    let rest: f64 = logs.iter().map(|p| p.1 - intercept - exponent * p.0).map(|e| e * e).sum();
    let half_interval =
        student(points.len() - 2).map(|t| Ratio::from_fraction(t * (rest / (count - 2.0) / sxx).sqrt()));
    Some(PowerLaw { exponent: Ratio::from_fraction(exponent), half_interval, intercept, points: points.len() })
}

/// Student's t for this many degrees of freedom.
fn student(freedom: usize) -> Option<f64> {
    match freedom {
        0 => None,
        1..=10 => Some(STUDENT[freedom - 1]),
        _ => STUDENT_MORE.iter().find(|(up_to, _)| freedom < *up_to).map(|(_, t)| *t),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Affinity laws (row RM-07): torque of a fan with the square of speed, exactly.
    #[test]
    fn an_exact_square_has_exponent_two() {
        let points: Vec<_> = [10.0, 20.0, 30.0, 40.0].map(|x: f64| (x, 0.02 * x * x)).to_vec();
        let found = fit_numbers(&points).expect("fits");
        assert!((found.exponent.fraction() - 2.0).abs() < 1e-9);
        assert!(found.half_interval.expect("three or more").fraction() < 1e-6);
        assert!((libm::exp(found.intercept) - 0.02).abs() < 1e-9);
    }

    /// By hand: logs (0, 0), (1, 1), (2, 3): slope 1.5, residuals ⅙, −⅓, ⅙, s = √(1/6), t₁ = 12.706, half 3.668.
    #[test]
    fn interval_by_hand() {
        let e = core::f64::consts::E;
        let found = fit_numbers(&[(1.0, 1.0), (e, e), (e * e, e * e * e)]).expect("fits");
        assert!((found.exponent.fraction() - 1.5).abs() < 1e-9);
        assert!((found.half_interval.expect("three").fraction() - 12.706 * (1.0_f64 / 12.0).sqrt()).abs() < 1e-6);
    }

    #[test]
    fn impossible_points_have_no_fit() {
        for points in [
            vec![],
            vec![(1.0, 1.0)],
            vec![(1.0, 1.0), (1.0, 2.0)],
            vec![(0.0, 1.0), (2.0, 2.0)],
            vec![(1.0, -1.0), (2.0, 2.0)],
        ] {
            assert!(fit_numbers(&points).is_none(), "{points:?}");
        }
        assert!(fit_numbers(&[(1.0, 1.0), (2.0, 2.0)]).expect("two").half_interval.is_none());
        assert_eq!(student(11), Some(2.228));
        assert_eq!(student(1000), Some(2.042));
    }
}
