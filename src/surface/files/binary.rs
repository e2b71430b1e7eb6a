//! Numbers of a binary file, in either byte order.

use super::FormatError;
use crate::surface::Point;

/// Reads numbers one after the other.
#[derive(Debug, Clone)]
pub(super) struct Cursor<'a> {
    bytes: &'a [u8],
    at: usize,
    big_endian: bool,
}

impl<'a> Cursor<'a> {
    /// A cursor that starts `at` bytes into the file.
    pub fn new(bytes: &'a [u8], at: usize, big_endian: bool) -> Self {
        Self { bytes, at: at.min(bytes.len()), big_endian }
    }

    /// How many bytes have been read.
    pub fn position(&self) -> usize {
        self.at
    }

    /// How many bytes are left.
    pub fn left(&self) -> usize {
        self.bytes.len() - self.at
    }

    /// Refuses `count` things of at least `size` bytes each if the rest of the file can't hold them.
    pub fn check_room(&self, count: u64, size: usize, what: &'static str) -> Result<(), FormatError> {
        let room = (self.left() / size.max(1)) as u64;
        if count > room { Err(FormatError::CountTooLarge { what, stated: count, room }) } else { Ok(()) }
    }

    /// The next bytes, in little-endian order.
    pub fn take<const N: usize>(&mut self, reading: &'static str) -> Result<[u8; N], FormatError> {
        let Some(bytes) = self.bytes.get(self.at..).and_then(|rest| rest.first_chunk::<N>()) else {
            return Err(FormatError::Truncated { reading });
        };
        self.at += N;
        let mut bytes = *bytes;
        if self.big_endian {
            bytes.reverse();
        }
        Ok(bytes)
    }

    pub fn skip(&mut self, count: usize, reading: &'static str) -> Result<(), FormatError> {
        if count > self.left() {
            return Err(FormatError::Truncated { reading });
        }
        self.at += count;
        Ok(())
    }

    pub fn i32(&mut self, reading: &'static str) -> Result<i32, FormatError> {
        self.take(reading).map(i32::from_le_bytes)
    }

    pub fn u64(&mut self, reading: &'static str) -> Result<u64, FormatError> {
        self.take(reading).map(u64::from_le_bytes)
    }

    pub fn f32(&mut self, reading: &'static str) -> Result<f32, FormatError> {
        self.take(reading).map(f32::from_le_bytes)
    }

    pub fn f64(&mut self, reading: &'static str) -> Result<f64, FormatError> {
        self.take(reading).map(f64::from_le_bytes)
    }

    /// Three single-precision numbers.
    pub fn point_f32(&mut self, reading: &'static str) -> Result<Point, FormatError> {
        Ok(Point::new(self.f32(reading)?.into(), self.f32(reading)?.into(), self.f32(reading)?.into()))
    }

    /// Three double-precision numbers.
    pub fn point_f64(&mut self, reading: &'static str) -> Result<Point, FormatError> {
        Ok(Point::new(self.f64(reading)?, self.f64(reading)?, self.f64(reading)?))
    }
}
