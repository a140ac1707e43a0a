//! Rows of cells whose columns line up.

use anstyle::Style;
use unicode_width::{UnicodeWidthChar as _, UnicodeWidthStr as _};

/// One cell.
#[derive(Debug, Clone, Default)]
pub(crate) struct Cell {
    text: String,
    to_the_right: bool,
    style: Style,
}

impl Cell {
    /// A text, set to the left.
    pub(crate) fn left(text: impl Into<String>) -> Self {
        Self {
            text: text.into(),
            ..Self::default()
        }
    }

    /// A text or number, set to the right.
    pub(crate) fn right(text: impl Into<String>) -> Self {
        Self {
            text: text.into(),
            to_the_right: true,
            ..Self::default()
        }
    }

    /// The same in a style; the style does not count as width.
    pub(crate) fn styled(mut self, style: Style) -> Self {
        self.style = style;
        self
    }

    /// The text set in `width` columns.
    fn set(&self, width: usize) -> String {
        let blank = " ".repeat(width.saturating_sub(self.text.width()));
        let (style, text) = (self.style, &self.text);
        if self.to_the_right {
            format!("{blank}{style}{text}{style:#}")
        } else {
            format!("{style}{text}{style:#}{blank}")
        }
    }
}

/// Rows of cells.
#[derive(Debug, Clone)]
pub(crate) struct Grid {
    rows: Vec<Vec<Cell>>,
    gap: usize,
}

impl Grid {
    /// An empty grid with `gap` blanks between its columns.
    pub(crate) fn new(gap: usize) -> Self {
        Self {
            rows: Vec::new(),
            gap,
        }
    }

    /// Adds a row; cells that are missing at its end are empty.
    pub(crate) fn row(&mut self, cells: impl IntoIterator<Item = Cell>) {
        self.rows.push(cells.into_iter().collect());
    }

    /// The rows as lines, each with its end, each column as wide as its widest cell.
    pub(crate) fn lines(&self) -> String {
        let columns = self.rows.iter().map(Vec::len).max().unwrap_or(0);
        let widths: Vec<usize> = (0..columns)
            .map(|column| {
                self.rows
                    .iter()
                    .filter_map(|row| row.get(column))
                    .map(|cell| cell.text.width())
                    .max()
                    .unwrap_or(0)
            })
            .collect();
        let mut lines = String::new();
        for row in &self.rows {
            // Nothing but blanks follows the last cell that has a text.
            let last = row.iter().rposition(|cell| !cell.text.is_empty());
            for (index, (cell, width)) in row.iter().zip(&widths).enumerate() {
                match last {
                    Some(last) if index < last => {
                        lines.push_str(&cell.set(*width));
                        lines.push_str(&" ".repeat(self.gap));
                    }
                    Some(last) if index == last && cell.to_the_right => {
                        lines.push_str(&cell.set(*width));
                    }
                    Some(last) if index == last => lines.push_str(&cell.set(0)),
                    _ => {}
                }
            }
            lines.push('\n');
        }
        lines
    }
}

/// `text` in at most `width` columns; what is cut off is marked.
pub(crate) fn shortened(text: &str, width: usize) -> String {
    const MARK: &str = "...";
    if text.width() <= width {
        return text.to_owned();
    }
    let mut left = width.saturating_sub(MARK.len());
    let kept: String = text
        .chars()
        .take_while(|c| {
            let columns = c.width().unwrap_or(0);
            let fits = columns <= left;
            left = left.saturating_sub(columns);
            fits
        })
        .collect();
    kept.trim_end().to_owned() + MARK
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn columns_line_up_and_lines_end_without_blanks() {
        let mut grid = Grid::new(1);
        grid.row([Cell::left("body"), Cell::right("kg"), Cell::left("note")]);
        grid.row([Cell::left("wheel"), Cell::right("56.625"), Cell::left("")]);
        grid.row([Cell::left("Nabe Ø"), Cell::right("0.560")]);
        assert_eq!(
            grid.lines(),
            "body       kg note\nwheel  56.625\nNabe Ø  0.560\n"
        );
    }

    #[test]
    fn a_style_is_no_width() {
        let mut grid = Grid::new(1);
        grid.row([
            Cell::left("a").styled(Style::new().bold()),
            Cell::right("1"),
        ]);
        grid.row([Cell::left("bcd"), Cell::right("22")]);
        assert_eq!(
            anstream::adapter::strip_str(&grid.lines()).to_string(),
            "a    1\nbcd 22\n"
        );
    }

    #[test]
    fn wide_letters_count_two_columns() {
        let mut grid = Grid::new(1);
        grid.row([Cell::left("鐘"), Cell::left("x")]);
        grid.row([Cell::left("abc"), Cell::left("x")]);
        assert_eq!(grid.lines(), "鐘  x\nabc x\n");
    }

    #[test]
    fn a_long_text_is_shortened_to_the_width() {
        assert_eq!(shortened("fog bell", 8), "fog bell");
        assert_eq!(shortened("fog bell", 7), "fog...");
        assert_eq!(shortened("鐘鐘鐘鐘", 6), "鐘...");
        assert_eq!(shortened("abcd", 2), "...");
    }
}
