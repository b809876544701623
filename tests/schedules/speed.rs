//! A schedule of two thousand drives is previewed in a moment.

use super::SITE;
use commissioning::Timestamp;
use exchange::rows::{self, Answers, Outcome};
use exchange::schedule::propose;
use exchange::sheets;
use exchange::workbook::{Heading, OutCell, Table, csv, xlsx};
use std::time::{Duration, Instant};

const DRIVES: u32 = 2000;

fn table() -> Table {
    let headings = [
        "Tag",
        "Description",
        "kW",
        "V",
        "A",
        "rpm",
        "PF",
        "Efficiency %",
        "Cable length m",
        "Location",
        "Load type",
        "Remarks",
    ];
    let row = |n: u32| {
        let words = [format!("M-{n:04}"), format!("Pump {n}")];
        let figures = ["75", "400", "131.5", "1485", "0.87", "95.0", "85"].map(OutCell::decimal);
        let after = [format!("Hall {}", n % 9), "pump".to_owned(), "as drawn".to_owned()];
        words.into_iter().map(OutCell::text).chain(figures).chain(after.into_iter().map(OutCell::text)).collect()
    };
    Table {
        name: "Motors".into(),
        headings: headings.iter().map(|h| Heading::new(h)).collect(),
        rows: (1..=DRIVES).map(row).collect(),
    }
}

/// Two seconds are the aim on a free machine; the test leaves room for a busy one and still catches work that grows
/// with the square of the rows.
#[test]
fn two_thousand_rows_are_previewed_in_a_moment() {
    let table = table();
    let files = [xlsx("Motors", std::slice::from_ref(&table), Timestamp::EPOCH).unwrap(), csv(&table)];
    for bytes in files {
        let begun = Instant::now();
        let sheet = sheets::read(&bytes, "motors").unwrap().sheets.remove(0);
        let reading = begun.elapsed();
        let mapping = propose(&sheet).mapping();
        let proposing = begun.elapsed() - reading;
        let rows = rows::read(&sheet, &mapping, &Answers::new(), SITE);
        let took = begun.elapsed();
        let ready =
            rows.iter().filter(|r| matches!(&r.outcome, Outcome::Drive(d) if d.is_ready() && d.values.len() == 9));
        assert_eq!(ready.count(), DRIVES as usize);
        println!(
            "{} kB previewed in {} ms: read in {reading:?}, proposed in {proposing:?}",
            bytes.len() / 1024,
            took.as_millis()
        );
        assert!(took < Duration::from_secs(8), "{took:?}");
    }
}
