//! Nominal efficiency of a class at 50 Hz and at 60 Hz (rows MN-08 to MN-10).

use crate::quantity::{Power, Ratio};

/// An efficiency class.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Class {
    /// IE1.
    Ie1,
    /// IE2.
    Ie2,
    /// IE3.
    Ie3,
    /// IE4.
    Ie4,
}

impl Class {
    /// All of them, the lowest first.
    pub const ALL: [Self; 4] = [Self::Ie1, Self::Ie2, Self::Ie3, Self::Ie4];

    /// As printed on plates.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Ie1 => "IE1",
            Self::Ie2 => "IE2",
            Self::Ie3 => "IE3",
            Self::Ie4 => "IE4",
        }
    }
}

/// One horsepower in watts (row MN-07).
const HORSEPOWER: f64 = 745.699_871_582_270_2;

/// Class, poles, and A, B, C, D of η = A·x³ + B·x² + C·x + D in percent, x = log₁₀(P/kW), 0.75 to 200 kW at 50 Hz.
const FROM_750_WATTS: [(Class, u32, [f64; 4]); 15] = [
    (Class::Ie1, 2, [0.5234, -5.0499, 17.418, 74.3171]),
    (Class::Ie1, 4, [0.5234, -5.0499, 17.418, 74.3171]),
    (Class::Ie1, 6, [0.0786, -3.5838, 17.2918, 72.2383]),
    (Class::Ie2, 2, [0.2972, -3.3454, 13.0651, 79.077]),
    (Class::Ie2, 4, [0.0278, -1.9247, 10.4395, 80.9761]),
    (Class::Ie2, 6, [0.0148, -2.4978, 13.247, 77.5603]),
    (Class::Ie2, 8, [2.1311, -12.029, 26.719, 69.735]),
    (Class::Ie3, 2, [0.3569, -3.3076, 11.6108, 82.2503]),
    (Class::Ie3, 4, [0.0773, -1.8951, 9.2984, 83.7025]),
    (Class::Ie3, 6, [0.1252, -2.613, 11.9963, 80.4769]),
    (Class::Ie3, 8, [0.7189, -5.1678, 15.705, 77.074]),
    (Class::Ie4, 2, [0.34, -3.0479, 10.293, 84.8208]),
    (Class::Ie4, 4, [0.2412, -2.3608, 8.446, 86.8321]),
    (Class::Ie4, 6, [0.3598, -3.2107, 10.7933, 84.107]),
    (Class::Ie4, 8, [0.6556, -4.7229, 13.977, 80.247]),
];

/// The same for 0.12 kW to below 0.75 kW.
const BELOW_750_WATTS: [(Class, u32, [f64; 4]); 12] = [
    (Class::Ie2, 2, [22.4864, 27.7603, 37.8091, 82.458]),
    (Class::Ie2, 4, [17.2751, 23.978, 35.5822, 84.9935]),
    (Class::Ie2, 6, [-15.9218, -30.258, 16.6861, 79.1838]),
    (Class::Ie2, 8, [6.4855, 9.4748, 36.852, 70.762]),
    (Class::Ie3, 2, [6.8532, 6.2006, 25.1317, 84.0392]),
    (Class::Ie3, 4, [7.6356, 4.8236, 21.0903, 86.0998]),
    (Class::Ie3, 6, [-17.361, -44.538, -3.0554, 79.1318]),
    (Class::Ie3, 8, [-0.5896, -25.526, 4.2884, 75.831]),
    (Class::Ie4, 2, [-8.8538, -20.3352, 8.9002, 85.0641]),
    (Class::Ie4, 4, [8.432, 2.6888, 14.6236, 87.6153]),
    (Class::Ie4, 6, [-13.0355, -36.9497, -4.3621, 82.0009]),
    (Class::Ie4, 8, [-4.9735, -21.453, 2.6653, 79.055]),
];

/// Horsepower, then percent at 60 Hz for 2, 4 and 6 poles: level of IE2, level of IE3 (enclosed motors).
const SIXTY_HERTZ: [(f64, [f64; 3], [f64; 3]); 19] = [
    (1.0, [75.5, 82.5, 80.0], [77.0, 85.5, 82.5]),
    (1.5, [82.5, 84.0, 85.5], [84.0, 86.5, 87.5]),
    (2.0, [84.0, 84.0, 86.5], [85.5, 86.5, 88.5]),
    (3.0, [85.5, 87.5, 87.5], [86.5, 89.5, 89.5]),
    (5.0, [87.5, 87.5, 87.5], [88.5, 89.5, 89.5]),
    (7.5, [88.5, 89.5, 89.5], [89.5, 91.7, 91.0]),
    (10.0, [89.5, 89.5, 89.5], [90.2, 91.7, 91.0]),
    (15.0, [90.2, 91.0, 90.2], [91.0, 92.4, 91.7]),
    (20.0, [90.2, 91.0, 90.2], [91.0, 93.0, 91.7]),
    (25.0, [91.0, 92.4, 91.7], [91.7, 93.6, 93.0]),
    (30.0, [91.0, 92.4, 91.7], [91.7, 93.6, 93.0]),
    (40.0, [91.7, 93.0, 93.0], [92.4, 94.1, 94.1]),
    (50.0, [92.4, 93.0, 93.0], [93.0, 94.5, 94.1]),
    (60.0, [93.0, 93.6, 93.6], [93.6, 95.0, 94.5]),
    (75.0, [93.0, 94.1, 93.6], [93.6, 95.4, 94.5]),
    (100.0, [93.6, 94.5, 94.1], [94.1, 95.4, 95.0]),
    (125.0, [94.5, 94.5, 94.1], [95.0, 95.4, 95.0]),
    (150.0, [94.5, 95.0, 95.0], [95.0, 95.8, 95.8]),
    (200.0, [95.0, 95.0, 95.0], [95.4, 96.2, 95.8]),
];

/// Nominal efficiency at 50 Hz; `None` outside 0.12 to 1000 kW or for poles without a figure. From 200 kW it stays.
#[must_use]
pub fn at_50_hertz(class: Class, power: Power, poles: u32) -> Option<Ratio> {
    let kilowatts = power.watts() / 1000.0;
    if !(0.12..=1000.0).contains(&kilowatts) {
        return None;
    }
    let list: &[_] = if kilowatts < 0.75 { &BELOW_750_WATTS } else { &FROM_750_WATTS };
    let [a, b, c, d] = list.iter().find(|row| row.0 == class && row.1 == poles)?.2;
    let x = libm::log10(kilowatts.min(200.0));
    Some(Ratio::from_fraction((((a * x + b) * x + c) * x + d) / 100.0))
}

/// Nominal efficiency at 60 Hz of the IE2 and IE3 level, enclosed motors; `None` outside 1 to 200 hp (midpoints
/// counted to the higher row), for other classes, and for other poles.
#[must_use]
pub fn at_60_hertz(class: Class, power: Power, poles: u32) -> Option<Ratio> {
    let horsepower = power.watts() / HORSEPOWER;
    let column = match poles {
        2 => 0,
        4 => 1,
        6 => 2,
        _ => return None,
    };
    // A plate in kilowatts rounds its horsepower; beyond that much the list has an end.
    if !(0.97..=206.0).contains(&horsepower) {
        return None;
    }
    let next = SIXTY_HERTZ.iter().position(|row| row.0 >= horsepower).unwrap_or(SIXTY_HERTZ.len() - 1);
    let below = next.saturating_sub(1);
    let middle = (SIXTY_HERTZ[below].0 + SIXTY_HERTZ[next].0) / 2.0;
    let row = SIXTY_HERTZ[if horsepower >= middle { next } else { below }];
    let percent = match class {
        Class::Ie2 => row.1[column],
        Class::Ie3 => row.2[column],
        Class::Ie1 | Class::Ie4 => return None,
    };
    Some(Ratio::from_fraction(percent / 100.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// IEC 60034-30-1:2014, tables at 50 Hz: kW, then IE1 2/4p and 6p, IE2, IE3, IE4 each 2p, 4p, 6p, 8p; 0 is no entry.
    #[rustfmt::skip]
    const PUBLISHED: [(f64, [f64; 14]); 27] = [
            (0.12, [0.0, 0.0, 53.6, 59.1, 50.6, 39.8, 60.8, 64.8, 57.7, 50.7, 66.5, 69.8, 64.9, 62.3]),
            (0.18, [0.0, 0.0, 60.4, 64.7, 56.6, 45.9, 65.9, 69.9, 63.9, 58.7, 70.8, 74.7, 70.1, 67.2]),
            (0.25, [0.0, 0.0, 64.8, 68.5, 61.6, 50.6, 69.7, 73.5, 68.6, 64.1, 74.3, 77.9, 74.1, 70.8]),
            (0.37, [0.0, 0.0, 69.5, 72.7, 67.6, 56.1, 73.8, 77.3, 73.5, 69.3, 78.1, 81.1, 78.0, 74.3]),
            (0.55, [0.0, 0.0, 74.1, 77.1, 73.1, 61.7, 77.8, 80.8, 77.2, 73.0, 81.5, 83.9, 80.9, 77.0]),
            (0.75, [72.1, 70.0, 77.4, 79.6, 75.9, 66.2, 80.7, 82.5, 78.9, 75.0, 83.5, 85.7, 82.7, 78.4]),
            (1.1, [75.0, 72.9, 79.6, 81.4, 78.1, 70.8, 82.7, 84.1, 81.0, 77.7, 85.2, 87.2, 84.5, 80.8]),
            (1.5, [77.2, 75.2, 81.3, 82.8, 79.8, 74.1, 84.2, 85.3, 82.5, 79.7, 86.5, 88.2, 85.9, 82.6]),
            (2.2, [79.7, 77.7, 83.2, 84.3, 81.8, 77.6, 85.9, 86.7, 84.3, 81.9, 88.0, 89.5, 87.4, 84.5]),
            (3.0, [81.5, 79.7, 84.6, 85.5, 83.3, 80.0, 87.1, 87.7, 85.6, 83.5, 89.1, 90.4, 88.6, 85.9]),
            (4.0, [83.1, 81.4, 85.8, 86.6, 84.6, 81.9, 88.1, 88.6, 86.8, 84.8, 90.0, 91.1, 89.5, 87.1]),
            (5.5, [84.7, 83.1, 87.0, 87.7, 86.0, 83.8, 89.2, 89.6, 88.0, 86.2, 90.9, 91.9, 90.5, 88.3]),
            (7.5, [86.0, 84.7, 88.1, 88.7, 87.2, 85.3, 90.1, 90.4, 89.1, 87.3, 91.7, 92.6, 91.3, 89.3]),
            (11.0, [87.6, 86.4, 89.4, 89.8, 88.7, 86.9, 91.2, 91.4, 90.3, 88.6, 92.6, 93.3, 92.3, 90.4]),
            (15.0, [88.7, 87.7, 90.3, 90.6, 89.7, 88.0, 91.9, 92.1, 91.2, 89.6, 93.3, 93.9, 92.9, 91.2]),
            (18.5, [89.3, 88.6, 90.9, 91.2, 90.4, 88.6, 92.4, 92.6, 91.7, 90.1, 93.7, 94.2, 93.4, 91.7]),
            (22.0, [89.9, 89.2, 91.3, 91.6, 90.9, 89.1, 92.7, 93.0, 92.2, 90.6, 94.0, 94.5, 93.7, 92.1]),
            (30.0, [90.7, 90.2, 92.0, 92.3, 91.7, 89.8, 93.3, 93.6, 92.9, 91.3, 94.5, 94.9, 94.2, 92.7]),
            (37.0, [91.2, 90.8, 92.5, 92.7, 92.2, 90.3, 93.7, 93.9, 93.3, 91.8, 94.8, 95.2, 94.5, 93.1]),
            (45.0, [91.7, 91.4, 92.9, 93.1, 92.7, 90.7, 94.0, 94.2, 93.7, 92.2, 95.0, 95.4, 94.8, 93.4]),
            (55.0, [92.1, 91.9, 93.2, 93.5, 93.1, 91.0, 94.3, 94.6, 94.1, 92.5, 95.3, 95.7, 95.1, 93.7]),
            (75.0, [92.7, 92.6, 93.8, 94.0, 93.7, 91.6, 94.7, 95.0, 94.6, 93.1, 95.6, 96.0, 95.4, 94.2]),
            (90.0, [93.0, 92.9, 94.1, 94.2, 94.0, 91.9, 95.0, 95.2, 94.9, 93.4, 95.8, 96.1, 95.6, 94.4]),
            (110.0, [93.3, 93.3, 94.3, 94.5, 94.3, 92.3, 95.2, 95.4, 95.1, 93.7, 96.0, 96.3, 95.8, 94.7]),
            (132.0, [93.5, 93.5, 94.6, 94.7, 94.6, 92.6, 95.4, 95.6, 95.4, 94.0, 96.2, 96.4, 96.0, 94.9]),
            (160.0, [93.8, 93.8, 94.8, 94.9, 94.8, 93.0, 95.6, 95.8, 95.6, 94.3, 96.3, 96.6, 96.2, 95.1]),
            (200.0, [94.0, 94.0, 95.0, 95.1, 95.0, 93.5, 95.8, 96.0, 95.8, 94.6, 96.5, 96.7, 96.3, 95.4]),
    ];

    #[test]
    fn every_published_figure_at_50_hertz() {
        let columns: Vec<(Class, u32)> = [(Class::Ie1, 4), (Class::Ie1, 6)]
            .into_iter()
            .chain([Class::Ie2, Class::Ie3, Class::Ie4].into_iter().flat_map(|c| [2, 4, 6, 8].map(|p| (c, p))))
            .collect();
        for (kilowatts, row) in PUBLISHED {
            for ((class, poles), percent) in columns.iter().zip(row) {
                let found = at_50_hertz(*class, Power::from_watts(kilowatts * 1000.0), *poles);
                match found {
                    Some(found) => assert!(
                        (found.fraction() * 100.0 - percent).abs() < 0.0501,
                        "{class:?} {poles} {kilowatts}: {found:?}"
                    ),
                    None => assert!(percent == 0.0, "{class:?} {poles} {kilowatts}"),
                }
            }
        }
    }

    /// C-MN-025 (315 kW as 200 kW) and C-MN-026 (17 kW, between the rows: 92.4185 %).
    #[test]
    fn between_and_beyond_the_rows() {
        let percent =
            |kw: f64| at_50_hertz(Class::Ie3, Power::from_watts(kw * 1000.0), 4).map(|e| e.fraction() * 100.0);
        assert!((percent(315.0).expect("listed") - 96.0).abs() < 0.05);
        assert!((percent(17.0).expect("listed") - 92.418_519).abs() < 0.0001);
        assert_eq!((percent(0.1), percent(1001.0), percent(f64::NAN)), (None, None, None));
    }

    /// C-MN-040 and C-MN-041: 10 CFR 431.25, 10 hp 4 poles 91.7 %, 50 hp 6 poles 94.1 %; midpoints after 431.25(b).
    #[test]
    fn published_figures_at_60_hertz() {
        let percent = |hp: f64, poles| {
            at_60_hertz(Class::Ie3, Power::from_watts(hp * HORSEPOWER), poles)
                .map(|e| (e.fraction() * 1000.0).round() / 10.0)
        };
        assert_eq!((percent(10.0, 4), percent(50.0, 6)), (Some(91.7), Some(94.1)));
        assert_eq!((percent(12.4, 4), percent(12.5, 4)), (Some(91.7), Some(92.4)));
        assert_eq!(
            (percent(1.0, 4), percent(200.0, 2), percent(250.0, 4), percent(10.0, 8)),
            (Some(85.5), Some(95.4), None, None)
        );
    }
}
