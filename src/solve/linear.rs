//! Systems of linear equations: scaled, factored once, solved for many right sides.
//!
//! Small ones are factored densely, with partial pivoting (Golub and Van Loan, Matrix Computations, 4th edition, section
//! 3.4); large ones by the sparse LU of `faer`. Columns are scaled by the size of their unknown and rows by their largest
//! entry, without which a sparse solution loses half its figures.

use faer::prelude::Solve;
use faer::sparse::linalg::solvers::{Lu, SymbolicLu};
use faer::sparse::{SparseColMat, Triplet};

/// Up to this many unknowns a matrix is factored densely.
const LARGEST_DENSE: usize = 48;

/// One entry of a sparse matrix.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Entry {
    pub(super) row: u32,
    pub(super) column: u32,
    pub(super) value: f64,
}

#[derive(Clone, Debug)]
enum Kind {
    Dense { entries: Vec<f64>, order: Vec<usize> },
    Sparse(Box<Lu<usize, f64>>),
}

/// The factors of a square matrix.
#[derive(Clone, Debug)]
pub(super) struct Factors {
    kind: Kind,
    row_weights: Vec<f64>,
    column_scales: Vec<f64>,
}

/// What can be kept between matrices of one pattern.
#[derive(Clone, Default)]
pub(super) struct Symbolic(Option<SymbolicLu<usize>>);

impl Factors {
    /// Factors the matrix of `entries`, of which those at one place are added; `None` where it is singular. `scales` are the
    /// sizes of the unknowns.
    pub(super) fn of(entries: &[Entry], scales: &[f64], symbolic: &mut Symbolic) -> Option<Self> {
        let n = scales.len();
        let mut largest = vec![0.0f64; n];
        for entry in entries {
            let place = &mut largest[entry.row as usize];
            *place = place.max((entry.value * scales[entry.column as usize]).abs());
        }
        if largest.iter().any(|largest| !(largest.is_finite() && *largest > 0.0)) {
            return None;
        }
        let row_weights: Vec<f64> = largest.iter().map(|largest| 1.0 / largest).collect();
        let scaled = |entry: &Entry| entry.value * scales[entry.column as usize] * row_weights[entry.row as usize];
        let kind = if n <= LARGEST_DENSE {
            let mut dense = vec![0.0; n * n];
            for entry in entries {
                dense[entry.row as usize * n + entry.column as usize] += scaled(entry);
            }
            let order = factor_dense(&mut dense, n)?;
            Kind::Dense { entries: dense, order }
        } else {
            let triplets: Vec<Triplet<usize, usize, f64>> =
                entries.iter().map(|entry| Triplet::new(entry.row as usize, entry.column as usize, scaled(entry))).collect();
            let matrix = SparseColMat::<usize, f64>::try_new_from_triplets(n, n, &triplets).ok()?;
            if symbolic.0.is_none() {
                symbolic.0 = SymbolicLu::try_new(matrix.symbolic()).ok();
            }
            Kind::Sparse(Box::new(Lu::try_new_with_symbolic(symbolic.0.clone()?, matrix.as_ref()).ok()?))
        };
        Some(Self { kind, row_weights, column_scales: scales.to_vec() })
    }

    /// Solves for a right side; a singular matrix that went unnoticed gives no number, which the caller has to look for.
    pub(super) fn solve(&self, right: &[f64]) -> Vec<f64> {
        let n = self.column_scales.len();
        let weighted = |row: usize| right[row] * self.row_weights[row];
        let mut x: Vec<f64> = match &self.kind {
            Kind::Dense { entries, order } => {
                let mut x: Vec<f64> = order.iter().map(|row| weighted(*row)).collect();
                for row in 0..n {
                    for at in 0..row {
                        x[row] -= entries[row * n + at] * x[at];
                    }
                }
                for row in (0..n).rev() {
                    for at in row + 1..n {
                        x[row] -= entries[row * n + at] * x[at];
                    }
                    x[row] /= entries[row * n + row];
                }
                x
            }
            Kind::Sparse(factors) => {
                let right = faer::Col::from_fn(n, weighted);
                let x = factors.solve(&right);
                (0..n).map(|row| x[row]).collect()
            }
        };
        x.iter_mut().zip(&self.column_scales).for_each(|(x, scale)| *x *= scale);
        x
    }
}

/// Factors a matrix in place, rows one behind the other; the order of its rows, `None` where it is singular.
fn factor_dense(entries: &mut [f64], n: usize) -> Option<Vec<usize>> {
    let mut order: Vec<usize> = (0..n).collect();
    for column in 0..n {
        let pivot = (column..n).max_by(|a, b| entries[a * n + column].abs().total_cmp(&entries[b * n + column].abs()))?;
        let value = entries[pivot * n + column];
        // Rows are scaled to a largest entry of 1: a pivot of the square of rounding is none.
        if !value.is_finite() || value.abs() <= f64::EPSILON * f64::EPSILON {
            return None;
        }
        if pivot != column {
            order.swap(pivot, column);
            for at in 0..n {
                entries.swap(pivot * n + at, column * n + at);
            }
        }
        for row in column + 1..n {
            let factor = entries[row * n + column] / value;
            entries[row * n + column] = factor;
            if factor != 0.0 {
                for at in column + 1..n {
                    entries[row * n + at] -= factor * entries[column * n + at];
                }
            }
        }
    }
    Some(order)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn entries(rows: &[&[f64]]) -> Vec<Entry> {
        let mut found = Vec::new();
        for (row, values) in rows.iter().enumerate() {
            for (column, value) in values.iter().enumerate().filter(|(_, value)| **value != 0.0) {
                found.push(Entry { row: row as u32, column: column as u32, value: *value });
            }
        }
        found
    }

    #[test]
    fn a_system_that_needs_its_rows_exchanged_is_solved() {
        let matrix = entries(&[&[0.0, 2.0, 1.0], &[1.0, 1.0, 0.0], &[3.0, 0.0, 1.0]]);
        let factors = Factors::of(&matrix, &[1.0; 3], &mut Symbolic::default()).expect("regular");
        for (found, expected) in factors.solve(&[7.0, 3.0, 6.0]).iter().zip([1.0, 2.0, 3.0]) {
            assert!((found - expected).abs() < 1e-14);
        }
    }

    #[test]
    fn a_singular_matrix_is_refused() {
        assert!(Factors::of(&entries(&[&[1.0, 2.0], &[2.0, 4.0]]), &[1.0; 2], &mut Symbolic::default()).is_none());
    }

    #[test]
    fn a_large_system_of_ill_scaled_unknowns_is_solved_to_the_last_figures() {
        let n = 400;
        let size = |at: usize| if at.is_multiple_of(2) { 1e6 } else { 1e-4 };
        let expected: Vec<f64> = (0..n).map(|at| size(at) * (1.0 + at as f64 / n as f64)).collect();
        let mut matrix = Vec::new();
        let mut right = vec![0.0; n];
        for (row, sum) in right.iter_mut().enumerate() {
            for (column, factor) in [(row, 4.0), ((row + 1) % n, -1.0), ((row + 7) % n, 1.5)] {
                let value = factor / size(column) * if row.is_multiple_of(3) { 1e3 } else { 1.0 };
                matrix.push(Entry { row: row as u32, column: column as u32, value });
                *sum += value * expected[column];
            }
        }
        let scales: Vec<f64> = (0..n).map(size).collect();
        let factors = Factors::of(&matrix, &scales, &mut Symbolic::default()).expect("regular");
        for (found, expected) in factors.solve(&right).iter().zip(&expected) {
            assert!((found / expected - 1.0).abs() < 1e-13);
        }
    }
}
