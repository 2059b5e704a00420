//! A table of a page: its numbers aligned on the decimal sign, its cells named for narrow screens.

use pulldown_cmark::Alignment;

use crate::report::formula::escape;
use crate::report::typeset::{NO_BREAK, THIN};

/// A table that is being read, row by row; the first row is its head.
pub(in crate::report) struct Grid {
    right: Vec<bool>,
    /// Its head is a row like the others.
    headless: bool,
    pub(in crate::report) rows: Vec<Vec<Cell>>,
    open: Option<Cell>,
}

/// A cell: what it shows, and its words alone.
#[derive(Clone, Debug)]
pub(in crate::report) struct Cell {
    pub(in crate::report) html: String,
    pub(in crate::report) text: String,
}

impl Grid {
    pub(in crate::report) fn new(alignments: &[Alignment], headless: bool) -> Self {
        Self { right: alignments.iter().map(|alignment| *alignment == Alignment::Right).collect(), headless, rows: Vec::new(), open: None }
    }

    pub(in crate::report) fn begin_cell(&mut self) {
        self.open = Some(Cell::empty());
    }

    pub(in crate::report) fn open_cell(&mut self) -> Option<&mut Cell> {
        self.open.as_mut()
    }

    pub(in crate::report) fn end_cell(&mut self) {
        if let (Some(row), Some(cell)) = (self.rows.last_mut(), self.open.take()) {
            row.push(cell);
        }
    }

    /// The table as HTML, in a box that scrolls where the screen is too narrow.
    pub(in crate::report) fn write(mut self, out: &mut String) {
        let n_columns = self.right.len();
        let first = usize::from(!self.headless);
        let columns: Vec<Column> = (0..n_columns).map(|at| self.column(at, first)).collect();
        out.push_str("<div class=\"scroll\"><table>\n");
        let head = if self.headless || self.rows.is_empty() { Vec::new() } else { self.rows.remove(0) };
        if head.iter().any(|cell| !cell.html.is_empty()) {
            out.push_str("<thead><tr>");
            for (cell, column) in head.iter().zip(&columns) {
                out.push_str(&format!("<th scope=\"col\"{}>{}</th>", column.class(), cell.html));
            }
            out.push_str("</tr></thead>\n");
        }
        out.push_str("<tbody>\n");
        for row in &self.rows {
            out.push_str("<tr>");
            for (at, (cell, column)) in row.iter().zip(&columns).enumerate() {
                out.push_str(&format!("<td{}", column.class()));
                if let Some(label) = head.get(at).map(|cell| cell.text.trim()).filter(|label| !label.is_empty()) {
                    out.push_str(" data-label=\"");
                    escape(label, out);
                    out.push('"');
                }
                out.push('>');
                column.write_cell(cell, out);
                out.push_str("</td>");
            }
            out.push_str("</tr>\n");
        }
        out.push_str("</tbody></table></div>\n");
    }

    fn column(&self, at: usize, first: usize) -> Column {
        if !self.right[at] {
            return Column::Words;
        }
        let cells = || self.rows.iter().skip(first).filter_map(|row| row.get(at));
        let widths: Vec<f64> = cells().filter_map(|cell| whole_part(&cell.html)).map(|(_, whole)| width(whole)).collect();
        // A column of which every other cell holds no number has no decimal sign to align.
        if widths.is_empty() || 2 * widths.len() < cells().filter(|cell| !cell.html.is_empty()).count() {
            return Column::Edge;
        }
        Column::Decimal(widths.into_iter().fold(0.0, f64::max))
    }
}

/// How the cells of a column stand.
#[derive(Clone, Copy)]
enum Column {
    /// Flush left.
    Words,
    /// Flush right.
    Edge,
    /// On the decimal sign, with so much room before it, in widths of a digit.
    Decimal(f64),
}

impl Column {
    fn class(self) -> &'static str {
        match self {
            Self::Words => "",
            Self::Edge => " class=\"edge\"",
            Self::Decimal(_) => " class=\"num\"",
        }
    }

    fn write_cell(self, cell: &Cell, out: &mut String) {
        match (self, whole_part(&cell.html)) {
            (Self::Decimal(room), Some((before, whole))) => {
                let rest = &cell.html[before.len() + whole.len()..];
                out.push_str(&format!("{before}<span class=\"whole\" style=\"min-width:{room:.2}ch\">{whole}</span>{rest}"));
            }
            _ => out.push_str(&cell.html),
        }
    }
}

/// What stands before the decimal sign of the number that a cell begins with, and what opens before it.
fn whole_part(html: &str) -> Option<(&str, &str)> {
    let mut start = 0;
    for opened in ["<strong>", "<em>"] {
        if html[start..].starts_with(opened) {
            start += opened.len();
        }
    }
    let number = &html[start..];
    let end = number.find(|c: char| !(c.is_ascii_digit() || matches!(c, '−' | '±' | THIN | NO_BREAK))).unwrap_or(number.len());
    // The space before a unit belongs to the unit.
    let whole = number[..end].trim_end_matches(NO_BREAK);
    whole.chars().any(|c| c.is_ascii_digit()).then(|| (&html[..start], whole))
}

/// Width in digits.
fn width(whole: &str) -> f64 {
    whole
        .chars()
        .map(|character| match character {
            THIN => 0.4,
            NO_BREAK => 0.5,
            _ => 1.05,
        })
        .sum()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_whole_part_ends_before_the_decimal_sign_or_the_unit() {
        assert_eq!(whole_part("2.40\u{a0}m³"), Some(("", "2")));
        assert_eq!(whole_part("<strong>−8.0\u{a0}°C</strong>"), Some(("<strong>", "−8")));
        assert_eq!(whole_part("1\u{202f}061.2\u{a0}kPa"), Some(("", "1\u{202f}061")));
        assert_eq!(whole_part("±\u{a0}0.02\u{a0}m³"), Some(("", "±\u{a0}0")));
        assert_eq!(whole_part("12\u{a0}m"), Some(("", "12")));
        assert_eq!(whole_part("none"), None);
        assert_eq!(whole_part("<a href=\"#line-3\">3</a>"), None);
    }

    #[test]
    fn numbers_of_a_column_get_the_same_room_before_their_sign() {
        let cell = |html: &str| Cell { html: html.into(), text: html.into() };
        let mut grid = Grid::new(&[Alignment::Left, Alignment::Right], false);
        grid.rows = vec![vec![cell("What"), cell("Value")], vec![cell("V"), cell("2.40 m³")], vec![cell("p"), cell("101.2 kPa")]];
        let mut out = String::new();
        grid.write(&mut out);
        assert_eq!(
            out,
            concat!(
                "<div class=\"scroll\"><table>\n<thead><tr><th scope=\"col\">What</th><th scope=\"col\" class=\"num\">Value</th></tr></thead>\n<tbody>\n",
                "<tr><td data-label=\"What\">V</td><td class=\"num\" data-label=\"Value\"><span class=\"whole\" style=\"min-width:3.15ch\">2</span>.40 m³</td></tr>\n",
                "<tr><td data-label=\"What\">p</td><td class=\"num\" data-label=\"Value\"><span class=\"whole\" style=\"min-width:3.15ch\">101</span>.2 kPa</td></tr>\n",
                "</tbody></table></div>\n"
            )
        );
    }
}
