//! Tells a picture's kind from its first bytes; what a sender calls it does not count.

/// The media type of JPEG, PNG or WebP; `None` for anything else.
///
/// The marks are those of ITU-T T.81 (start of image, then a marker), the PNG specification's signature (5.2) and
/// RFC 9649 (RIFF container with the form `WEBP`).
#[must_use]
pub fn media_of(bytes: &[u8]) -> Option<&'static str> {
    if bytes.starts_with(&[0xFF, 0xD8, 0xFF]) {
        Some("image/jpeg")
    } else if bytes.starts_with(&[0x89, b'P', b'N', b'G', 0x0D, 0x0A, 0x1A, 0x0A]) {
        Some("image/png")
    } else if bytes.starts_with(b"RIFF") && bytes.get(8..12) == Some(b"WEBP") {
        Some("image/webp")
    } else {
        None
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn only_three_kinds_are_pictures_here() {
        assert_eq!(media_of(&[0xFF, 0xD8, 0xFF, 0xE0, 0]), Some("image/jpeg"));
        assert_eq!(media_of(b"\x89PNG\r\n\x1a\n...."), Some("image/png"));
        assert_eq!(media_of(b"RIFF\x10\0\0\0WEBPVP8 "), Some("image/webp"));
        for other in [&b"<svg xmlns"[..], b"GIF89a", b"RIFF\x10\0\0\0WAVE", b"\0\0\0\x18ftypheic", b"", b"\xFF\xD8"] {
            assert_eq!(media_of(other), None);
        }
    }
}
