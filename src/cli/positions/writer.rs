//! Rows of a table as CSV, or as the items of a JSON list.

use super::columns::write_csv_header;
use super::row::Row;
use crate::cli::JSON_VERSION;
use crate::cli::fault::Fault;
use std::io::Write;

/// Output is handed on in pieces of about this many bytes.
const PIECE_BYTES: usize = 64 * 1024;

/// Writes rows one by one.
pub(super) struct RowWriter<'a> {
    is_json: bool,
    out: &'a mut dyn Write,
    piece: Vec<u8>,
    rows: u64,
}

impl<'a> RowWriter<'a> {
    /// Starts the document, in memory only.
    pub fn new(is_json: bool, out: &'a mut dyn Write) -> Self {
        let mut piece = Vec::with_capacity(PIECE_BYTES + 2048);
        if is_json {
            let head = format!("{{\"dimmet\":{JSON_VERSION},\"bodies\":[");
            piece.extend_from_slice(head.as_bytes());
        } else {
            piece.extend_from_slice(b"id,");
            write_csv_header(&mut piece);
        }
        Self {
            is_json,
            out,
            piece,
            rows: 0,
        }
    }

    pub fn row(&mut self, id: &[u8], row: &Row) -> Result<(), Fault> {
        let piece = &mut self.piece;
        if self.is_json {
            let start: &[u8] = if self.rows == 0 { b"" } else { b"," };
            piece.extend_from_slice(start);
            piece.extend_from_slice(b"\n{\"id\":");
            let id = String::from_utf8_lossy(id);
            serde_json::to_writer(&mut *piece, &id).map_err(std::io::Error::from)?;
            piece.push(b',');
            row.write_json(piece);
            piece.push(b'}');
        } else {
            write_csv_text(piece, id);
            piece.push(b',');
            row.write_csv(piece);
        }
        self.rows += 1;
        if self.piece.len() >= PIECE_BYTES {
            self.hand_on()?;
        }
        Ok(())
    }

    /// Ends the document. Where a bad row stopped it, nothing at all is written unless rows went
    /// before, and JSON then says that it is not complete.
    pub fn finish(&mut self, is_complete: bool) -> Result<(), Fault> {
        if !is_complete && self.rows == 0 {
            return Ok(());
        }
        let end: &[u8] = match (self.is_json, is_complete) {
            (false, _) => b"",
            (true, true) => b"\n]}\n",
            (true, false) => b"\n],\"complete\":false}\n",
        };
        self.piece.extend_from_slice(end);
        self.hand_on()?;
        Ok(self.out.flush()?)
    }

    fn hand_on(&mut self) -> Result<(), Fault> {
        self.out.write_all(&self.piece)?;
        self.piece.clear();
        Ok(())
    }
}

/// A field of CSV, in quotes where it needs them.
fn write_csv_text(out: &mut Vec<u8>, text: &[u8]) {
    if !text.iter().any(|byte| b",\"\r\n".contains(byte)) {
        out.extend_from_slice(text);
        return;
    }
    out.push(b'"');
    for byte in text {
        if *byte == b'"' {
            out.push(b'"');
        }
        out.push(*byte);
    }
    out.push(b'"');
}
