//! The event files: one event a line, sequence, hash before, hash, canonical bytes, parted by tabulators.

use commissioning::journal::Sealed;

/// What stands for the hash before the first event.
const NONE: &str = "-";

/// A chain as text; canonical JSON holds no tabulator and no line feed.
#[must_use]
pub fn write(chain: &[Sealed]) -> String {
    use std::fmt::Write as _;
    chain.iter().fold(String::new(), |mut text, e| {
        let previous = if e.previous.is_empty() { NONE } else { &e.previous };
        let _ = writeln!(text, "{}\t{previous}\t{}\t{}", e.sequence, e.hash, e.bytes);
        text
    })
}

/// A chain from text; the error says which line and what is wrong.
pub(crate) fn read(text: &str) -> Result<Vec<Sealed>, String> {
    if !text.is_empty() && !text.ends_with('\n') {
        return Err("the last line is not ended; the file was cut".to_owned());
    }
    text.lines()
        .enumerate()
        .map(|(n, line)| {
            let wrong = |what: &str| format!("line {}: {what}", n + 1);
            let mut parts = line.splitn(4, '\t');
            let mut next = || parts.next().ok_or_else(|| wrong("four columns parted by tabulators belong here"));
            let (sequence, previous, hash, bytes) = (next()?, next()?, next()?, next()?);
            let sequence = sequence.parse().map_err(|_| wrong("the first column is no sequence number"))?;
            let previous = if previous == NONE { String::new() } else { previous.to_owned() };
            Ok(Sealed { sequence, previous, hash: hash.to_owned(), bytes: bytes.to_owned() })
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_chain_survives_its_file() {
        let chain = vec![
            Sealed { sequence: 1, previous: String::new(), hash: "aa".into(), bytes: r#"{"a":"\t"}"#.into() },
            Sealed { sequence: 2, previous: "aa".into(), hash: "bb".into(), bytes: "{}".into() },
        ];
        assert_eq!(read(&write(&chain)), Ok(chain));
        assert_eq!(read(""), Ok(Vec::new()));
        assert!(read("1\t-\taa\t{}").is_err() && read("1 - aa {}\n").is_err() && read("x\t-\taa\t{}\n").is_err());
    }
}
