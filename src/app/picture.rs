//! Pictures that a user brings: a photograph of the skyline, a plan of the grounds.

use super::palette::Look;
use crate::words::Words;
use eframe::egui::ColorImage;
use image::ImageReader;
use std::path::Path;

/// Larger pictures are refused, pixels.
const MOST_PIXELS: u64 = 100_000_000;
/// The longest side that is kept, pixels: what graphics can show anywhere.
pub const MOST_SIDE: u32 = 4096;

/// Why a picture cannot be used.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum PictureFlaw {
    /// It cannot be read; the system's reason.
    Unreadable(String),
    /// It is no PNG or JPEG, or a damaged one.
    NoPicture,
    /// It has so many megapixels.
    TooLarge(u64),
}

impl PictureFlaw {
    /// In one sentence.
    pub fn sentence(&self, words: &Words, path: &Path) -> String {
        let file = path.to_string_lossy();
        match self {
            Self::Unreadable(reason) => words
                .text_with::<&str>("picture-unreadable", &[("file", &file), ("reason", reason)]),
            Self::NoPicture => words.text_with::<&str>("picture-none", &[("file", &file)]),
            Self::TooLarge(megapixels) => words.text_with::<&str>(
                "picture-too-large",
                &[("file", &file), ("size", &megapixels.to_string())],
            ),
        }
    }
}

/// A picture's width and height in pixels, from its header alone.
///
/// # Errors
/// It cannot be read, is no PNG or JPEG, or has more than 100 megapixels.
pub fn size_px(path: &Path) -> Result<[u32; 2], PictureFlaw> {
    let reader = ImageReader::open(path)
        .and_then(ImageReader::with_guessed_format)
        .map_err(|error| PictureFlaw::Unreadable(error.to_string()))?;
    let (width, height) = reader
        .into_dimensions()
        .map_err(|_| PictureFlaw::NoPicture)?;
    let pixels = u64::from(width) * u64::from(height);
    if pixels > MOST_PIXELS {
        return Err(PictureFlaw::TooLarge(pixels.div_ceil(1_000_000)));
    }
    if pixels == 0 {
        return Err(PictureFlaw::NoPicture);
    }
    Ok([width, height])
}

/// A picture as it is kept.
pub struct Picture {
    /// Its size as the file has it, pixels.
    pub size_px: [u32; 2],
    image: ColorImage,
}

impl Picture {
    /// It as the theme shows it.
    pub fn image_for(&self, look: &Look) -> ColorImage {
        let mut image = self.image.clone();
        for pixel in &mut image.pixels {
            *pixel = look.texel(*pixel);
        }
        image
    }
}

/// Reads a picture and keeps it no longer than `most_side` pixels a side.
///
/// # Errors
/// As [`size_px`], or it is damaged.
pub fn read(path: &Path, most_side: u32) -> Result<Picture, PictureFlaw> {
    let size_px = size_px(path)?;
    let decoded = ImageReader::open(path)
        .and_then(ImageReader::with_guessed_format)
        .map_err(|error| PictureFlaw::Unreadable(error.to_string()))?
        .decode()
        .map_err(|_| PictureFlaw::NoPicture)?;
    let is_large = size_px.into_iter().any(|side| side > most_side);
    let decoded = if is_large {
        decoded.thumbnail(most_side, most_side)
    } else {
        decoded
    };
    let rgba = decoded.into_rgba8();
    let size = [rgba.width() as usize, rgba.height() as usize];
    Ok(Picture {
        size_px,
        image: ColorImage::from_rgba_unmultiplied(size, rgba.as_raw()),
    })
}

#[cfg(test)]
mod tests {
    use super::{MOST_SIDE, PictureFlaw, read, size_px};

    #[test]
    fn a_large_picture_is_kept_smaller_but_counted_in_its_own_pixels() {
        let folder = tempfile::tempdir().expect("a temporary folder");
        let file = folder.path().join("wide.png");
        image::RgbImage::new(9000, 30).save(&file).expect("saved");
        let picture = read(&file, MOST_SIDE).expect("a picture");
        assert_eq!(picture.size_px, [9000, 30]);
        assert_eq!(picture.image.size[0], 4096);
    }

    #[test]
    fn what_is_no_picture_or_too_large_is_refused() {
        let folder = tempfile::tempdir().expect("a temporary folder");
        let file = folder.path().join("notes.png");
        std::fs::write(&file, "no picture").expect("written");
        assert_eq!(size_px(&file), Err(PictureFlaw::NoPicture));
        // The header of a PNG of 20 000 x 10 000 pixels, and nothing behind it.
        let mut header = b"\x89PNG\r\n\x1a\n\0\0\0\rIHDR".to_vec();
        let about: [u8; 13] = [0, 0, 0x4e, 0x20, 0, 0, 0x27, 0x10, 8, 2, 0, 0, 0];
        header.extend(about);
        header.extend(crc(b"IHDR", &about).to_be_bytes());
        // The decoder reads on to where the picture itself begins.
        header.extend(b"\0\0\0\0IDAT");
        header.extend(crc(b"IDAT", &[]).to_be_bytes());
        std::fs::write(&file, &header).expect("written");
        assert_eq!(size_px(&file), Err(PictureFlaw::TooLarge(200)));
        let missing = size_px(&folder.path().join("missing.png"));
        assert!(matches!(missing, Err(PictureFlaw::Unreadable(_))));
    }

    /// The check sum of a PNG chunk (ISO/IEC 15948, annex D).
    fn crc(kind: &[u8], data: &[u8]) -> u32 {
        let step = |crc: u32, byte: &u8| {
            (0..8).fold(crc ^ u32::from(*byte), |crc, _| {
                if crc & 1 == 1 {
                    0xedb8_8320 ^ (crc >> 1)
                } else {
                    crc >> 1
                }
            })
        };
        !kind.iter().chain(data).fold(u32::MAX, step)
    }
}
