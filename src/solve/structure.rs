//! The structure of a system of relations: which relation finds which quantity, what is too many, what is missing, and what
//! has to be solved together. No value is looked at here.
//!
//! Relations are rows, unknown quantities are columns. A maximum matching (augmenting paths with a look ahead: Duff 1981,
//! ACM TOMS 7, 315) pairs them; alternating paths from the rows and columns that stay alone give the over-determined and the
//! under-determined part (Dulmage and Mendelsohn 1958, Can. J. Math. 10, 517); the strong components of the rest are the
//! blocks that must be solved together (Tarjan 1972, SIAM J. Comput. 1, 146). Nothing here recurses, so that the depth of a
//! sheet is no limit.

/// No partner.
const NONE: u32 = u32::MAX;

/// A sparse pattern of rows and columns, with its rows in order of preference: what is left over is left late.
#[derive(Clone, Debug, Default)]
pub struct Pattern {
    starts: Vec<u32>,
    columns: Vec<u32>,
    n_columns: usize,
}

impl Pattern {
    /// An empty pattern with `n_columns` columns.
    #[must_use]
    pub fn new(n_columns: usize) -> Self {
        Self { starts: vec![0], columns: Vec::new(), n_columns }
    }

    /// Adds a row; columns that repeat count once.
    pub fn push(&mut self, columns: &[u32]) {
        let from = self.columns.len();
        for column in columns {
            if !self.columns[from..].contains(column) {
                self.columns.push(*column);
            }
        }
        self.starts.push(self.columns.len() as u32);
    }

    /// The columns of a row.
    #[must_use]
    pub fn row(&self, row: u32) -> &[u32] {
        &self.columns[self.starts[row as usize] as usize..self.starts[row as usize + 1] as usize]
    }

    /// How many rows there are.
    #[must_use]
    pub fn n_rows(&self) -> usize {
        self.starts.len() - 1
    }

    /// How many columns there are.
    #[must_use]
    pub fn n_columns(&self) -> usize {
        self.n_columns
    }

    /// The rows of every column.
    fn transposed(&self) -> Self {
        let mut counts = vec![0u32; self.n_columns + 1];
        for column in &self.columns {
            counts[*column as usize + 1] += 1;
        }
        for at in 1..counts.len() {
            counts[at] += counts[at - 1];
        }
        let mut next = counts.clone();
        let mut rows = vec![0; self.columns.len()];
        for row in 0..self.n_rows() as u32 {
            for column in self.row(row) {
                let place = &mut next[*column as usize];
                rows[*place as usize] = row;
                *place += 1;
            }
        }
        Self { starts: counts, columns: rows, n_columns: self.n_rows() }
    }
}

/// A group of rows and columns.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Part {
    /// Rows, ascending.
    pub rows: Vec<u32>,
    /// Columns, ascending.
    pub columns: Vec<u32>,
}

/// What the structure of a pattern is.
#[derive(Clone, Debug, Default)]
pub struct Structure {
    /// Rows that no column is left for, each with the smallest part that has one row too many because of it.
    pub surplus: Vec<(u32, Part)>,
    /// Connected parts with columns that no row is left for.
    pub missing: Vec<Part>,
    /// Blocks in the order in which they can be solved: rows and columns are as many. Rows that are surplus and parts that
    /// are missing something are left out.
    pub blocks: Vec<Part>,
}

/// Finds the structure of `pattern`.
#[must_use]
pub fn structure(pattern: &Pattern) -> Structure {
    let (row_of, column_of) = matching(pattern);
    let transposed = pattern.transposed();
    let surplus = (0..pattern.n_rows() as u32)
        .filter(|row| column_of[*row as usize] == NONE)
        .map(|row| (row, reach_rows(pattern, &row_of, row)))
        .collect();
    let (under_rows, under_columns) = under_determined(pattern, &transposed, &row_of, &column_of);
    let missing = connected(pattern, &transposed, &under_rows, &under_columns);
    let blocks = blocks(pattern, &row_of, &column_of, &under_rows);
    Structure { surplus, missing, blocks }
}

/// A maximum matching: the row of every column and the column of every row.
///
/// Rows are tried once in their order. A row whose search fails can never be matched later, and neither can what its search
/// visited serve another row, so visited columns of failed searches stay closed: all failed searches together cost one
/// pass.
fn matching(pattern: &Pattern) -> (Vec<u32>, Vec<u32>) {
    let n_rows = pattern.n_rows();
    let mut row_of = vec![NONE; pattern.n_columns()];
    let mut column_of = vec![NONE; n_rows];
    // Columns of a row before `ahead` have been seen to be taken.
    let mut ahead = vec![0u32; n_rows];
    let mut next = vec![0u32; n_rows];
    let mut visited = vec![NONE; pattern.n_columns()];
    let mut closed = vec![false; pattern.n_columns()];
    let mut path: Vec<u32> = Vec::new();
    for root in 0..n_rows as u32 {
        path.clear();
        path.push(root);
        next[root as usize] = 0;
        let mut seen = Vec::new();
        let mut end = None;
        'search: while let Some(&row) = path.last() {
            let columns = pattern.row(row);
            let mut at = ahead[row as usize] as usize;
            while at < columns.len() {
                let column = columns[at];
                at += 1;
                if row_of[column as usize] == NONE {
                    ahead[row as usize] = at as u32;
                    end = Some(column);
                    break 'search;
                }
            }
            ahead[row as usize] = at as u32;
            let mut found = None;
            let mut at = next[row as usize] as usize;
            while at < columns.len() {
                let column = columns[at];
                at += 1;
                if visited[column as usize] != root && !closed[column as usize] {
                    visited[column as usize] = root;
                    seen.push(column);
                    found = Some(row_of[column as usize]);
                    break;
                }
            }
            next[row as usize] = at as u32;
            match found {
                Some(deeper) => {
                    next[deeper as usize] = 0;
                    path.push(deeper);
                }
                None => {
                    path.pop();
                }
            }
        }
        match end {
            Some(mut column) => {
                while let Some(row) = path.pop() {
                    let before = column_of[row as usize];
                    row_of[column as usize] = row;
                    column_of[row as usize] = column;
                    column = before;
                }
            }
            None => {
                for column in seen {
                    closed[column as usize] = true;
                }
            }
        }
    }
    (row_of, column_of)
}

/// The rows and columns that alternating paths reach from an unmatched row: the smallest part with one row too many.
fn reach_rows(pattern: &Pattern, row_of: &[u32], root: u32) -> Part {
    let mut part = Part { rows: vec![root], columns: Vec::new() };
    let mut seen = std::collections::BTreeSet::new();
    let mut open = vec![root];
    while let Some(row) = open.pop() {
        for column in pattern.row(row) {
            if seen.insert(*column) {
                part.columns.push(*column);
                let next = row_of[*column as usize];
                if next != NONE {
                    part.rows.push(next);
                    open.push(next);
                }
            }
        }
    }
    part.rows.sort_unstable();
    part.columns.sort_unstable();
    part
}

/// The rows and columns that alternating paths reach from unmatched columns.
fn under_determined(pattern: &Pattern, transposed: &Pattern, row_of: &[u32], column_of: &[u32]) -> (Vec<bool>, Vec<bool>) {
    let mut rows = vec![false; pattern.n_rows()];
    let mut columns = vec![false; pattern.n_columns()];
    let mut open: Vec<u32> = (0..pattern.n_columns() as u32).filter(|column| row_of[*column as usize] == NONE).collect();
    for column in &open {
        columns[*column as usize] = true;
    }
    while let Some(column) = open.pop() {
        for row in transposed.row(column) {
            if !std::mem::replace(&mut rows[*row as usize], true) {
                let next = column_of[*row as usize];
                if next != NONE && !std::mem::replace(&mut columns[next as usize], true) {
                    open.push(next);
                }
            }
        }
    }
    (rows, columns)
}

/// The connected parts of some rows and columns.
fn connected(pattern: &Pattern, transposed: &Pattern, rows: &[bool], columns: &[bool]) -> Vec<Part> {
    let mut done = vec![false; columns.len()];
    let mut row_done = vec![false; rows.len()];
    let mut parts = Vec::new();
    for start in 0..columns.len() as u32 {
        if !columns[start as usize] || std::mem::replace(&mut done[start as usize], true) {
            continue;
        }
        let mut part = Part { rows: Vec::new(), columns: vec![start] };
        let mut open = vec![start];
        while let Some(column) = open.pop() {
            for row in transposed.row(column) {
                if !rows[*row as usize] || std::mem::replace(&mut row_done[*row as usize], true) {
                    continue;
                }
                part.rows.push(*row);
                for other in pattern.row(*row) {
                    if columns[*other as usize] && !std::mem::replace(&mut done[*other as usize], true) {
                        part.columns.push(*other);
                        open.push(*other);
                    }
                }
            }
        }
        part.rows.sort_unstable();
        part.columns.sort_unstable();
        parts.push(part);
    }
    parts
}

/// The strong components of the matched rows outside the under-determined part, in the order in which they can be solved: a
/// row follows the rows that find its other columns.
fn blocks(pattern: &Pattern, row_of: &[u32], column_of: &[u32], under: &[bool]) -> Vec<Part> {
    let n = pattern.n_rows();
    let takes_part = |row: u32| row != NONE && column_of[row as usize] != NONE && !under[row as usize];
    let mut index = vec![NONE; n];
    let mut low = vec![0u32; n];
    let mut on_stack = vec![false; n];
    let mut stack: Vec<u32> = Vec::new();
    let mut work: Vec<(u32, u32)> = Vec::new();
    let mut counter = 0;
    let mut found = Vec::new();
    for root in 0..n as u32 {
        if !takes_part(root) || index[root as usize] != NONE {
            continue;
        }
        work.push((root, 0));
        while let Some((row, at)) = work.pop() {
            let this = row as usize;
            if at == 0 {
                index[this] = counter;
                low[this] = counter;
                counter += 1;
                stack.push(row);
                on_stack[this] = true;
            }
            let columns = pattern.row(row);
            let mut at = at as usize;
            let mut deeper = None;
            while at < columns.len() {
                let next = row_of[columns[at] as usize];
                at += 1;
                if next == row || !takes_part(next) {
                    continue;
                }
                if index[next as usize] == NONE {
                    deeper = Some(next);
                    break;
                }
                if on_stack[next as usize] {
                    low[this] = low[this].min(index[next as usize]);
                }
            }
            if let Some(next) = deeper {
                work.push((row, at as u32));
                work.push((next, 0));
                continue;
            }
            if low[this] == index[this] {
                let mut part = Part::default();
                while let Some(member) = stack.pop() {
                    on_stack[member as usize] = false;
                    part.rows.push(member);
                    part.columns.push(column_of[member as usize]);
                    if member == row {
                        break;
                    }
                }
                part.rows.sort_unstable();
                part.columns.sort_unstable();
                found.push(part);
            }
            if let Some((parent, _)) = work.last() {
                low[*parent as usize] = low[*parent as usize].min(low[this]);
            }
        }
    }
    found
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(n_columns: usize, rows: &[&[u32]]) -> Structure {
        let mut pattern = Pattern::new(n_columns);
        for row in rows {
            pattern.push(row);
        }
        structure(&pattern)
    }

    #[test]
    fn a_chain_is_solved_in_its_order_however_it_is_written() {
        let found = of(3, &[&[1, 2], &[0, 1], &[0]]);
        let order: Vec<u32> = found.blocks.iter().map(|block| block.columns[0]).collect();
        assert_eq!(order, [0, 1, 2]);
    }

    #[test]
    fn what_hangs_together_is_one_block() {
        let found = of(3, &[&[0, 1], &[0, 1], &[1, 2]]);
        assert_eq!(found.blocks[0], Part { rows: vec![0, 1], columns: vec![0, 1] });
        assert_eq!(found.blocks[1], Part { rows: vec![2], columns: vec![2] });
    }

    #[test]
    fn too_many_here_and_too_few_there_are_told_apart() {
        let found = of(3, &[&[0], &[0], &[1, 2]]);
        assert_eq!(found.surplus, [(1, Part { rows: vec![0, 1], columns: vec![0] })]);
        assert_eq!(found.missing, [Part { rows: vec![2], columns: vec![1, 2] }]);
        assert_eq!(found.blocks, [Part { rows: vec![0], columns: vec![0] }]);
    }

    #[test]
    fn the_row_that_is_left_over_is_the_latest_that_can_be() {
        let found = of(2, &[&[0, 1], &[0], &[1]]);
        assert_eq!(found.surplus[0].0, 2);
        assert_eq!(found.surplus[0].1.rows, [0, 1, 2]);
    }

    #[test]
    fn a_row_without_columns_is_surplus() {
        assert_eq!(of(0, &[&[]]).surplus.len(), 1);
    }
}
