//! A drawn picture in place of a photo: the links of a terminal box in star, as a small PNG made in code.

/// Width and height in dots.
const SIZE: (usize, usize) = (180, 120);
const PAPER: u8 = 0xF0;
const BOX: u8 = 0xB0;
const BRASS: u8 = 0x40;

/// Six terminals, the lower three joined by one bar: links in star.
pub(crate) fn star_links() -> Vec<u8> {
    let shade = |x: usize, y: usize| {
        let edge = !(6..SIZE.0 - 6).contains(&x) || !(6..SIZE.1 - 6).contains(&y);
        let bar = (34..146).contains(&x) && (78..90).contains(&y);
        let stud = [45usize, 90, 135]
            .iter()
            .any(|cx| [36usize, 84].iter().any(|cy| x.abs_diff(*cx).pow(2) + y.abs_diff(*cy).pow(2) < 121));
        match (edge, stud || bar) {
            (true, _) => BOX,
            (_, true) => BRASS,
            _ => PAPER,
        }
    };
    let rows = (0..SIZE.1).flat_map(|y| std::iter::once(0).chain((0..SIZE.0).map(move |x| shade(x, y))));
    png(&rows.collect::<Vec<u8>>())
}

/// A grey PNG of 8 bits a dot from filtered rows, stored without compression (W3C PNG, RFC 1950, RFC 1951).
fn png(rows: &[u8]) -> Vec<u8> {
    let mut file = vec![0x89, b'P', b'N', b'G', 0x0D, 0x0A, 0x1A, 0x0A];
    let mut header = Vec::new();
    for side in [SIZE.0, SIZE.1] {
        header.extend(u32::try_from(side).unwrap_or(0).to_be_bytes());
    }
    header.extend([8, 0, 0, 0, 0]);
    chunk(&mut file, *b"IHDR", &header);
    let mut packed = vec![0x78, 0x01];
    let mut parts = rows.chunks(0xFFFF).peekable();
    while let Some(part) = parts.next() {
        let length = u16::try_from(part.len()).unwrap_or(u16::MAX);
        packed.push(u8::from(parts.peek().is_none()));
        packed.extend(length.to_le_bytes());
        packed.extend((!length).to_le_bytes());
        packed.extend(part);
    }
    packed.extend(adler(rows).to_be_bytes());
    chunk(&mut file, *b"IDAT", &packed);
    chunk(&mut file, *b"IEND", &[]);
    file
}

fn chunk(file: &mut Vec<u8>, kind: [u8; 4], content: &[u8]) {
    file.extend(u32::try_from(content.len()).unwrap_or(u32::MAX).to_be_bytes());
    let start = file.len();
    file.extend(kind);
    file.extend(content);
    let sum = crc(file.get(start..).unwrap_or_default());
    file.extend(sum.to_be_bytes());
}

fn crc(bytes: &[u8]) -> u32 {
    let step = |sum: u32| if sum & 1 == 1 { 0xEDB8_8320 ^ (sum >> 1) } else { sum >> 1 };
    !bytes.iter().fold(u32::MAX, |sum, byte| (0..8).fold(sum ^ u32::from(*byte), |s, _| step(s)))
}

fn adler(bytes: &[u8]) -> u32 {
    let (low, high) = bytes.iter().fold((1u32, 0u32), |(low, high), byte| {
        let low = (low + u32::from(*byte)) % 65_521;
        (low, (high + low) % 65_521)
    });
    high << 16 | low
}

#[cfg(test)]
mod tests {
    use super::*;

    /// RFC 1950: Adler-32 begins at 1, "abc" is worked out by its sums; the check word of "123456789" under CRC-32 is 0xCBF43926 (W3C PNG,
    /// annex D, the same polynomial as ISO 3309).
    #[test]
    fn the_check_words_are_the_published_ones() {
        assert_eq!(crc(b"123456789"), 0xCBF4_3926);
        assert_eq!(adler(b""), 1);
        assert_eq!(adler(b"abc"), 0x024D_0127);
    }

    #[test]
    fn the_store_takes_it_for_a_png() {
        assert_eq!(store::photo_media(&star_links()), Some("image/png"));
    }
}
