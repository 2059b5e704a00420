//! Lists for people: rows in aligned columns.

/// How the cells of a column are aligned.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Column {
    /// To the left.
    Text,
    /// On the decimal point.
    Number,
}

/// Blanks between columns.
const GAP: &str = "  ";

/// The rows with their cells aligned, one a line, without blanks at the ends.
pub(super) fn aligned(columns: &[Column], rows: impl IntoIterator<Item = Vec<String>>) -> String {
    let rows: Vec<Vec<String>> = rows.into_iter().collect();
    let parts = |column: Column, cell: &str| match column {
        Column::Text => (0, cell.chars().count()),
        Column::Number => {
            let before = cell.find(['.', 'e', ' ']).unwrap_or(cell.len());
            (before, cell.chars().count() - before)
        }
    };
    let mut widths = vec![(0, 0); columns.len()];
    for row in &rows {
        for ((width, column), cell) in widths.iter_mut().zip(columns).zip(row) {
            let (before, after) = parts(*column, cell);
            *width = (width.0.max(before), width.1.max(after));
        }
    }
    let mut text = String::new();
    for row in &rows {
        let mut line = String::new();
        for ((width, column), cell) in widths.iter().zip(columns).zip(row) {
            let (before, after) = parts(*column, cell);
            line.push_str(&" ".repeat(width.0 - before));
            line.push_str(cell);
            line.push_str(&" ".repeat(width.1 - after));
            line.push_str(GAP);
        }
        text.push_str(line.trim_end());
        text.push('\n');
    }
    text
}

/// A number of a table with at most so many significant figures, none that the table does not have.
pub(super) fn number(value: f64, figures: usize) -> String {
    let rounded = format!("{value:.0$e}", figures.saturating_sub(1)).parse::<f64>().unwrap_or(value);
    let size = rounded.abs();
    if size != 0.0 && !(1e-4..1e10).contains(&size) { format!("{rounded:e}") } else { rounded.to_string() }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_stand_on_their_decimal_point() {
        let rows = [["a", "126.192", "K"], ["long", "0.5", "m"], ["b", "12", ""]].map(|row| row.map(str::to_owned).to_vec());
        assert_eq!(aligned(&[Column::Text, Column::Number, Column::Text], rows), "a     126.192  K\nlong    0.5    m\nb      12\n");
    }

    #[test]
    fn numbers_show_what_the_table_has() {
        assert_eq!(number(28.014 * 1e-3 * 1e3, 10), "28.014");
        assert_eq!(number(0.028_013_999_999_999_998, 10), "0.028014");
        assert_eq!(number(1e-6, 10), "1e-6");
        assert_eq!(number(101_325.0, 10), "101325");
        assert_eq!(number(0.0, 10), "0");
    }
}
