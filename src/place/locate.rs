//! Where a word stands in a RON text, for errors that no parser position goes with.

/// What to look for: the so-manieth occurrence of a name or of a text in quotes.
pub(super) struct Token {
    text: String,
    occurrence: usize,
}

impl Token {
    /// A field's name.
    pub(super) fn word(word: &str) -> Self {
        Self {
            text: word.into(),
            occurrence: 0,
        }
    }

    /// A text in quotes; 0 is its first occurrence.
    pub(super) fn quoted(text: &str, occurrence: usize) -> Self {
        Self {
            text: format!("{text:?}"),
            occurrence,
        }
    }

    /// Line and column (both from 1, in characters) of the token outside comments; `None` where
    /// the text spells it differently, with escapes of its own.
    pub(super) fn position(&self, text: &str) -> Option<(usize, usize)> {
        let offset = tokens(text)
            .filter(|(_, token)| *token == self.text)
            .nth(self.occurrence)?
            .0;
        let before = &text[..offset];
        let line_start = before.rfind('\n').map_or(0, |newline| newline + 1);
        Some((
            before.matches('\n').count() + 1,
            before[line_start..].chars().count() + 1,
        ))
    }
}

/// Names, quoted texts and single other characters, with their byte offsets; comments are passed
/// over.
fn tokens(text: &str) -> impl Iterator<Item = (usize, &str)> {
    let mut offset = 0;
    std::iter::from_fn(move || {
        loop {
            let rest = &text[offset..];
            let first = rest.chars().next()?;
            let length = token_length(rest, first);
            let start = offset;
            offset += length;
            if !(rest.starts_with("//") || rest.starts_with("/*") || first.is_whitespace()) {
                return Some((start, &rest[..length]));
            }
        }
    })
}

/// Length in bytes of the token or comment at the start of `rest`; at least one character.
fn token_length(rest: &str, first: char) -> usize {
    let is_in_word = |c: char| c.is_alphanumeric() || c == '_';
    if rest.starts_with("//") {
        rest.find('\n').unwrap_or(rest.len())
    } else if let Some(comment) = rest.strip_prefix("/*") {
        comment.find("*/").map_or(rest.len(), |end| end + 4)
    } else if first == '"' {
        let mut is_escaped = false;
        let end = rest[1..].find(|c: char| {
            let is_end = c == '"' && !is_escaped;
            is_escaped = c == '\\' && !is_escaped;
            is_end
        });
        end.map_or(rest.len(), |end| end + 2)
    } else if is_in_word(first) {
        rest.find(|c: char| !is_in_word(c)).unwrap_or(rest.len())
    } else {
        first.len_utf8()
    }
}
