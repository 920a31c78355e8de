//! Reading a table without ever holding more than a bounded row.

use std::cell::Cell;
use std::io::{self, Read};
use std::rc::Rc;

/// The longest row that is read, bytes. A quotation mark that is never closed, or a file that is
/// no table, would otherwise be read into memory whole.
const LONGEST_ROW_BYTES: usize = 1024 * 1024;

/// Passes a reader on, and fails once more has been read since the last row than a row may hold.
pub(super) struct Bounded<R> {
    inner: R,
    since_row: RowMark,
}

/// Told whenever a row has come out.
#[derive(Clone, Default)]
pub(super) struct RowMark(Rc<Cell<usize>>);

impl RowMark {
    /// A row has come out: the count begins anew.
    pub fn row(&self) {
        self.0.set(0);
    }
}

impl<R: Read> Bounded<R> {
    pub fn new(inner: R, since_row: RowMark) -> Self {
        Self { inner, since_row }
    }
}

impl<R: Read> Read for Bounded<R> {
    fn read(&mut self, buffer: &mut [u8]) -> io::Result<usize> {
        let count = self.inner.read(buffer)?;
        let since_row = self.since_row.0.get() + count;
        self.since_row.0.set(since_row);
        if since_row > LONGEST_ROW_BYTES {
            return Err(io::Error::other(format!(
                "a row is longer than {LONGEST_ROW_BYTES} bytes; is a quotation mark left open?"
            )));
        }
        Ok(count)
    }
}
