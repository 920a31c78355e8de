//! Lines and tables of plain text.

/// Which side of its column a text keeps to.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Side {
    Left,
    Right,
}

/// A page of plain text.
#[derive(Clone, Debug, Default)]
pub(super) struct Page {
    text: String,
}

impl Page {
    pub fn line(&mut self, line: &str) {
        self.text.push_str(line);
        self.text.push('\n');
    }

    /// An empty line, unless there is one already.
    pub fn gap(&mut self) {
        if !self.text.is_empty() && !self.text.ends_with("\n\n") {
            self.text.push('\n');
        }
    }

    /// A table: each column as wide as its widest text, two spaces between columns.
    pub fn table(&mut self, head: &[String], rows: &[Vec<String>], sides: &[Side]) {
        let width = |column: usize| {
            let texts = rows.iter().filter_map(|row| row.get(column));
            let all = texts.chain(head.get(column));
            all.map(|text| text.chars().count()).max().unwrap_or(0)
        };
        for row in std::iter::once(head).chain(rows.iter().map(Vec::as_slice)) {
            let cells = row.iter().enumerate().map(|(column, text)| {
                let space = " ".repeat(width(column) - text.chars().count());
                match sides.get(column) {
                    Some(Side::Right) => format!("{space}{text}"),
                    _ => format!("{text}{space}"),
                }
            });
            let line = cells.collect::<Vec<_>>().join("  ");
            self.line(line.trim_end());
        }
    }

    pub fn text(self) -> String {
        self.text
    }
}

#[cfg(test)]
mod tests {
    use super::{Page, Side};

    #[test]
    fn columns_line_up_by_characters() {
        let mut page = Page::default();
        let texts = |row: [&str; 2]| row.map(str::to_owned).to_vec();
        let rows = [texts(["Venus", "\u{2212}4.9"]), texts(["Mars", "10.0"])];
        page.table(&texts(["body", "mag"]), &rows, &[Side::Left, Side::Right]);
        assert_eq!(
            page.text(),
            "body    mag\nVenus  \u{2212}4.9\nMars   10.0\n"
        );
    }
}
