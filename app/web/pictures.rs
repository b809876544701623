//! Pictures as they arrive and as they are shown: magic bytes, size before decoding, full decode, an upright copy without metadata.

use crate::PageError;
use image::codecs::jpeg::JpegEncoder;
use image::{DynamicImage, ImageDecoder, ImageReader, Limits};
use std::io::Cursor;
use tokio::sync::{Semaphore, SemaphorePermit};

/// Most pixels of a picture.
pub const MOST_PIXELS: u64 = 50_000_000;
/// Longest edge of the copy that is shown.
const SHOWN_EDGE: u32 = 1600;

/// Two pictures are unpacked at once, for keeping and for showing together: a large one takes a tenth of a gigabyte.
static TURNS: Semaphore = Semaphore::const_new(2);
/// Forms with pictures held in memory at once, 32 MB each at most.
static FORMS: Semaphore = Semaphore::const_new(8);

/// A turn to unpack a picture; taken before its bytes are loaded.
///
/// # Errors
/// Never while the program runs.
pub async fn turn() -> Result<SemaphorePermit<'static>, PageError> {
    TURNS.acquire().await.map_err(PageError::broken)
}

/// Room for one form with pictures; given back when the form is done with.
///
/// # Errors
/// Never while the program runs.
pub async fn room() -> Result<SemaphorePermit<'static>, PageError> {
    FORMS.acquire().await.map_err(PageError::broken)
}

/// All turns at once, so that a test sees who waits for one.
#[cfg(test)]
pub async fn every_turn() -> SemaphorePermit<'static> {
    TURNS.acquire_many(2).await.expect("never closed")
}

/// Whether a picture may be kept; the error is a sentence for the person.
///
/// # Errors
/// When it is too large, of another kind, or does not decode to its end.
pub fn check(bytes: &[u8]) -> Result<(), String> {
    if bytes.len() > store::LARGEST_PHOTO {
        return Err("This picture is over 15 MB. Take it again at a smaller size.".to_owned());
    }
    if store::photo_media(bytes).is_none() {
        return Err(if is_heif(bytes) {
            "This is a HEIC picture, which browsers cannot show. Set the camera to “most compatible” (JPEG), take it again and send that.".to_owned()
        } else {
            "This is no JPEG, PNG or WebP picture. Save it as one of these and send it again.".to_owned()
        });
    }
    decode(bytes).map(|_| ())
}

/// ISO base media container with one of the HEIF brands.
fn is_heif(bytes: &[u8]) -> bool {
    let brand = bytes.get(8..12).unwrap_or_default();
    bytes.get(4..8) == Some(b"ftyp".as_slice())
        && [b"heic", b"heix", b"hevc", b"mif1", b"msf1", b"heim", b"avif"].iter().any(|b| brand == b.as_slice())
}

/// Decodes; the size stands in the header and is judged before a pixel is unpacked.
fn decode(bytes: &[u8]) -> Result<DynamicImage, String> {
    let cut = |_| "This picture cannot be read to its end; it may have been cut on its way. Send it again.".to_owned();
    let reader = ImageReader::new(Cursor::new(bytes))
        .with_guessed_format()
        .map_err(|_| "This picture cannot be read.".to_owned())?;
    let mut decoder = reader.into_decoder().map_err(cut)?;
    let (width, height) = decoder.dimensions();
    if u64::from(width) * u64::from(height) > MOST_PIXELS {
        return Err(format!(
            "This picture has {width} × {height} pixels, more than 50 million. Take it again at a smaller size."
        ));
    }
    let mut limits = Limits::default();
    // Sixteen bits in four channels at most, and as much again for the decoder's own work.
    limits.max_alloc = Some(MOST_PIXELS * 16);
    decoder.set_limits(limits).map_err(cut)?;
    let turned = decoder.orientation().map_err(cut)?;
    let mut picture = DynamicImage::from_decoder(decoder).map_err(cut)?;
    picture.apply_orientation(turned);
    Ok(picture)
}

/// The copy that pages show: upright, at most 1600 pixels along an edge, JPEG, no metadata and so no position.
///
/// # Errors
/// When the picture does not decode.
pub fn display_copy(bytes: &[u8]) -> Result<Vec<u8>, String> {
    let picture = decode(bytes)?;
    let smaller = picture.width() > SHOWN_EDGE || picture.height() > SHOWN_EDGE;
    let picture = if smaller { picture.thumbnail(SHOWN_EDGE, SHOWN_EDGE) } else { picture };
    let mut out = Vec::new();
    let encoded = picture.to_rgb8().write_with_encoder(JpegEncoder::new_with_quality(&mut out, 82));
    encoded.map_err(|e| e.to_string())?;
    Ok(out)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A picture of this size in a format that browsers show.
    fn picture(width: u32, height: u32, format: image::ImageFormat) -> Vec<u8> {
        let mut bytes = Cursor::new(Vec::new());
        DynamicImage::new_rgb8(width, height).write_to(&mut bytes, format).expect("encodes");
        bytes.into_inner()
    }

    #[test]
    fn the_three_kinds_are_taken_and_shown_as_small_jpeg() {
        for format in [image::ImageFormat::Jpeg, image::ImageFormat::Png, image::ImageFormat::WebP] {
            let bytes = picture(40, 20, format);
            assert_eq!(check(&bytes), Ok(()), "{format:?}");
            assert_eq!(store::photo_media(&display_copy(&bytes).expect("shown")), Some("image/jpeg"));
        }
        let copy = display_copy(&picture(3200, 800, image::ImageFormat::Jpeg)).expect("shown");
        let read = image::load_from_memory(&copy).expect("reads");
        assert_eq!((read.width(), read.height()), (1600, 400));
    }

    #[test]
    fn what_is_cut_other_or_too_large_is_refused_in_words() {
        let whole = picture(64, 64, image::ImageFormat::Png);
        assert!(check(&whole[..whole.len() * 9 / 10]).expect_err("cut").contains("cut on its way"));
        assert!(check(b"\0\0\0\x18ftypheic\0\0\0\0").expect_err("heic").contains("HEIC"));
        assert!(check(b"<svg xmlns=\"http://www.w3.org/2000/svg\"/>").is_err() && check(b"").is_err());
        let mut bomb = picture(1, 1, image::ImageFormat::Png);
        // Width and height stand at bytes 16 to 23 of a PNG (its IHDR chunk); the checksum after them no longer fits,
        // which is found in reading the header too.
        bomb[16..24].copy_from_slice(&[0, 1, 0, 0, 0, 1, 0, 0]);
        assert!(check(&bomb).is_err());
        let flat = picture(8000, 7000, image::ImageFormat::Png);
        assert!(check(&flat).expect_err("56 million pixels").contains("8000 × 7000"));
    }
}
