//! Pictures that a user brings: a photograph of the skyline, a plan of the grounds.

use eframe::egui::{ColorImage, Context, TextureHandle, TextureOptions};
use image::{ImageReader, imageops::FilterType};
use std::fs::File;
use std::io::BufReader;
use std::path::Path;

/// Most pixels that a picture may have: what is larger would fill the memory when decoded.
const MOST_PIXELS: u64 = 100_000_000;
/// The longest side that is kept, pixels: what graphics can show anywhere.
const LONGEST_SIDE: u32 = 4096;

/// A picture ready to be drawn.
pub struct LoadedPicture {
    /// Its width and height in the file, pixels: what places in it are counted in.
    pub size: (u32, u32),
    /// It, at most [`LONGEST_SIDE`] long.
    pub texture: TextureHandle,
}

impl LoadedPicture {
    /// Reads a PNG or JPEG file.
    ///
    /// # Errors
    /// The file is missing, no picture of these kinds, damaged or too large: one sentence naming
    /// it.
    pub fn load(ctx: &Context, path: &Path) -> Result<Self, String> {
        let (size, image) = decoded(path).map_err(|why| format!("{}: {why}", path.display()))?;
        let texture = ctx.load_texture("picture", image, TextureOptions::LINEAR);
        Ok(Self { size, texture })
    }
}

/// The picture's size in the file, and itself no larger than can be shown.
fn decoded(path: &Path) -> Result<((u32, u32), ColorImage), String> {
    let about =
        std::fs::metadata(path).map_err(|_| "there is no such file that may be read".to_owned())?;
    if !about.is_file() {
        return Err("it is not a plain file: choose a PNG or JPEG picture".into());
    }
    let opened = || -> std::io::Result<ImageReader<BufReader<File>>> {
        ImageReader::new(BufReader::new(File::open(path)?)).with_guessed_format()
    };
    let not_a_picture = "it is not a PNG or JPEG picture: save it as one of these";
    let size = opened()
        .map_err(|error| format!("it cannot be read: {error}"))?
        .into_dimensions()
        .map_err(|_| not_a_picture.to_owned())?;
    let pixels = u64::from(size.0) * u64::from(size.1);
    if pixels > MOST_PIXELS {
        return Err(format!(
            "it has {} megapixels, but may have at most {}: save it smaller",
            pixels / 1_000_000,
            MOST_PIXELS / 1_000_000
        ));
    }
    if size.0 < 2 || size.1 < 2 {
        return Err("it is smaller than two pixels".into());
    }
    let mut reader = opened().map_err(|error| format!("it cannot be read: {error}"))?;
    // The size is known to be bearable; what is left out guards against damaged files alone.
    reader.no_limits();
    let image = reader
        .decode()
        .map_err(|_| "it is damaged and cannot be decoded: save it again".to_owned())?;
    let image = if size.0.max(size.1) > LONGEST_SIDE {
        image.resize(LONGEST_SIDE, LONGEST_SIDE, FilterType::Triangle)
    } else {
        image
    };
    let rgba = image.to_rgba8();
    let shown = [rgba.width() as usize, rgba.height() as usize];
    Ok((size, ColorImage::from_rgba_unmultiplied(shown, &rgba)))
}

#[cfg(test)]
mod tests {
    use super::decoded;
    use std::path::Path;

    #[test]
    fn a_large_picture_is_kept_smaller_but_counted_in_its_own_pixels() {
        let folder = tempfile::tempdir().expect("a temporary folder");
        let file = folder.path().join("wide.png");
        image::RgbImage::new(9000, 30).save(&file).expect("saved");
        let (size, image) = decoded(&file).expect("a picture");
        assert_eq!(size, (9000, 30));
        assert_eq!(image.size[0], 4096);
    }

    #[test]
    fn what_is_no_picture_or_too_large_is_refused_in_a_sentence() {
        let folder = tempfile::tempdir().expect("a temporary folder");
        let file = folder.path().join("notes.png");
        std::fs::write(&file, "no picture").expect("written");
        let why = decoded(&file).expect_err("no picture");
        assert!(why.contains("PNG or JPEG"), "{why}");
        // The header of a PNG of 20 000 x 10 000 pixels, and nothing behind it.
        let mut header = b"\x89PNG\r\n\x1a\n\0\0\0\rIHDR".to_vec();
        let about: [u8; 13] = [0, 0, 0x4e, 0x20, 0, 0, 0x27, 0x10, 8, 2, 0, 0, 0];
        header.extend(about);
        header.extend(crc(b"IHDR", &about).to_be_bytes());
        std::fs::write(&file, &header).expect("written");
        let why = decoded(&file).expect_err("too large");
        assert!(why.contains("200 megapixels"), "{why}");
        assert!(decoded(Path::new("not/there.png")).is_err());
        assert!(decoded(folder.path()).is_err());
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
