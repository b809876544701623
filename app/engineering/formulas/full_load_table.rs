//! Full-load current of three-phase motors for sizing, NFPA 70 table 430.250 (row MN-12).

use crate::quantity::{Current, Power, Voltage};

/// One horsepower in watts (row MN-07).
const HORSEPOWER: f64 = 745.699_871_582_270_2;

/// The columns: lowest and highest system volts, and the heading.
const COLUMNS: [(f64, f64, f64); 6] = [
    (110.0, 120.0, 115.0),
    (200.0, 200.0, 200.0),
    (208.0, 208.0, 208.0),
    (220.0, 240.0, 230.0),
    (440.0, 480.0, 460.0),
    (550.0, 600.0, 575.0),
];

/// Horsepower, then amperes under each heading; 0 is no entry.
const AMPERES: [(f64, [f64; 6]); 27] = [
    (0.5, [4.4, 2.5, 2.4, 2.2, 1.1, 0.9]),
    (0.75, [6.4, 3.7, 3.5, 3.2, 1.6, 1.3]),
    (1.0, [8.4, 4.8, 4.6, 4.2, 2.1, 1.7]),
    (1.5, [12.0, 6.9, 6.6, 6.0, 3.0, 2.4]),
    (2.0, [13.6, 7.8, 7.5, 6.8, 3.4, 2.7]),
    (3.0, [0.0, 11.0, 10.6, 9.6, 4.8, 3.9]),
    (5.0, [0.0, 17.5, 16.7, 15.2, 7.6, 6.1]),
    (7.5, [0.0, 25.3, 24.2, 22.0, 11.0, 9.0]),
    (10.0, [0.0, 32.2, 30.8, 28.0, 14.0, 11.0]),
    (15.0, [0.0, 48.3, 46.2, 42.0, 21.0, 17.0]),
    (20.0, [0.0, 62.1, 59.4, 54.0, 27.0, 22.0]),
    (25.0, [0.0, 78.2, 74.8, 68.0, 34.0, 27.0]),
    (30.0, [0.0, 92.0, 88.0, 80.0, 40.0, 32.0]),
    (40.0, [0.0, 120.0, 114.0, 104.0, 52.0, 41.0]),
    (50.0, [0.0, 150.0, 143.0, 130.0, 65.0, 52.0]),
    (60.0, [0.0, 177.0, 169.0, 154.0, 77.0, 62.0]),
    (75.0, [0.0, 221.0, 211.0, 192.0, 96.0, 77.0]),
    (100.0, [0.0, 285.0, 273.0, 248.0, 124.0, 99.0]),
    (125.0, [0.0, 359.0, 343.0, 312.0, 156.0, 125.0]),
    (150.0, [0.0, 414.0, 396.0, 360.0, 180.0, 144.0]),
    (200.0, [0.0, 552.0, 528.0, 480.0, 240.0, 192.0]),
    (250.0, [0.0, 0.0, 0.0, 0.0, 302.0, 242.0]),
    (300.0, [0.0, 0.0, 0.0, 0.0, 361.0, 289.0]),
    (350.0, [0.0, 0.0, 0.0, 0.0, 414.0, 336.0]),
    (400.0, [0.0, 0.0, 0.0, 0.0, 477.0, 382.0]),
    (450.0, [0.0, 0.0, 0.0, 0.0, 515.0, 412.0]),
    (500.0, [0.0, 0.0, 0.0, 0.0, 590.0, 472.0]),
];

/// An entry of the table.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Entry {
    /// Horsepower of the row, for display.
    pub horsepower: f64,
    /// Volts of the heading.
    pub column: Voltage,
    /// Full-load current.
    pub current: Current,
}

/// Whether the table has a column for these volts.
#[must_use]
pub fn has_column(voltage: Voltage) -> bool {
    column(voltage).is_some()
}

/// The entry for a motor: the row that its power meets to 2 % (kilowatt plates round), otherwise the next larger row.
#[must_use]
pub fn entry(power: Power, voltage: Voltage) -> Option<Entry> {
    let horsepower = power.watts() / HORSEPOWER;
    if !(horsepower.is_finite() && horsepower > 0.0) {
        return None;
    }
    let column = column(voltage)?;
    let row = AMPERES.iter().find(|row| row.0 * 1.02 >= horsepower)?;
    let amperes = row.1[column];
    (amperes > 0.0).then(|| Entry {
        horsepower: row.0,
        column: Voltage::from_volts(COLUMNS[column].2),
        current: Current::from_amperes(amperes),
    })
}

fn column(voltage: Voltage) -> Option<usize> {
    COLUMNS.iter().position(|(low, high, _)| (*low..=*high).contains(&voltage.volts()))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn amperes(horsepower: f64, volts: f64) -> Option<f64> {
        entry(Power::from_watts(horsepower * HORSEPOWER), Voltage::from_volts(volts)).map(|e| e.current.amperes())
    }

    /// C-MN-029 to C-MN-032: NFPA 70, table 430.250.
    #[test]
    fn published_entries() {
        for (horsepower, volts, published) in
            [(10.0, 460.0, 14.0), (50.0, 230.0, 130.0), (100.0, 575.0, 99.0), (1.5, 575.0, 2.4)]
        {
            assert_eq!(amperes(horsepower, volts), Some(published));
        }
        assert_eq!(amperes(10.0, 480.0), Some(14.0));
        assert_eq!(amperes(500.0, 460.0), Some(590.0));
    }

    #[test]
    fn between_rows_the_larger_and_beyond_them_nothing() {
        assert_eq!(amperes(12.0, 460.0), Some(21.0));
        assert_eq!(amperes(10.06, 460.0), Some(14.0));
        assert_eq!((amperes(600.0, 460.0), amperes(250.0, 230.0), amperes(3.0, 115.0)), (None, None, None));
        assert_eq!((amperes(10.0, 400.0), amperes(f64::NAN, 460.0), amperes(-1.0, 460.0)), (None, None, None));
    }

    #[test]
    fn more_power_never_takes_less_current() {
        for pair in AMPERES.windows(2) {
            for (smaller, larger) in pair[0].1.iter().zip(pair[1].1) {
                assert!(larger == 0.0 || larger > *smaller);
            }
        }
    }
}
