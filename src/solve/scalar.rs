//! All roots of a function of one unknown in a range: sampled, bracketed, refined.
//!
//! A refined root comes from Newton's method kept inside its bracket by bisection (Press et al., Numerical Recipes, 3rd
//! edition, section 9.4: the safeguard, not the code), so it is found to the last digits whatever the function does. Roots
//! that the function only touches are found where its slope changes sign.

/// Samples over a range, evenly.
const EVENLY: usize = 64;

/// Samples in each decade.
const PER_DECADE: usize = 8;

/// Decades that are sampled towards zero.
const DECADES_DOWN: usize = 24;

/// Steps of a refinement at the most; bisection alone needs fewer.
const MOST_STEPS: u32 = 200;

/// Roots nearer to each other than this, relative to their size, are one.
const SAME_ROOT: f64 = 1e-7;

/// How far from its place, relative, a root that is only touched may lie for the function not quite to reach zero.
const TOUCHING: f64 = 1e-7;

/// Residual over the size of its terms below which an end of a bracket is a root and not a jump or a pole.
const ROOT_RESIDUAL: f64 = 1e-7;

/// What is asked of the function at a point: its value, its slope, and the size of its terms.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Sample {
    pub(super) value: f64,
    pub(super) slope: f64,
    pub(super) magnitude: f64,
}

/// A function of one unknown.
pub(super) trait Function {
    /// Its value, not a number where it has none.
    fn value(&mut self, x: f64) -> f64;
    /// Value, slope and size.
    fn sample(&mut self, x: f64) -> Sample;
}

/// The roots of `function` in `low..=high`, ascending. `hints` are values close to which a root may be; `size` is the usual
/// size of the unknown.
pub(super) fn roots(function: &mut impl Function, low: f64, high: f64, hints: &[f64], size: f64) -> Vec<f64> {
    let mut found: Vec<f64> = Vec::new();
    // The last two points and their values.
    let mut before: Option<(f64, f64)> = None;
    let mut earlier: Option<(f64, f64)> = None;
    for x in points(low, high, hints) {
        let here = function.value(x);
        if let Some((x_before, value_before)) = before {
            match (value_before.is_finite(), here.is_finite()) {
                (true, true) => between(function, (x_before, value_before), (x, here), &mut found),
                // The function begins or ends between the two: look up to its edge.
                (true, false) => {
                    let edge = edge(function, x_before, x);
                    let at_edge = function.value(edge);
                    between(function, (x_before, value_before), (edge, at_edge), &mut found);
                }
                (false, true) => {
                    let edge = edge(function, x, x_before);
                    let at_edge = function.value(edge);
                    between(function, (edge, at_edge), (x, here), &mut found);
                }
                (false, false) => {}
            }
        }
        if here == 0.0 {
            found.push(x);
        }
        if let (Some((x_a, a)), Some((_, b))) = (earlier, before)
            && [a, b, here].into_iter().all(f64::is_finite)
            && a.signum() == b.signum()
            && b.signum() == here.signum()
            && b.abs() <= a.abs()
            && b.abs() <= here.abs()
            && let Some(root) = touching(function, x_a, x, size)
        {
            found.push(root);
        }
        earlier = before;
        before = Some((x, here));
    }
    found.sort_by(f64::total_cmp);
    found.dedup_by(|a, b| (*a - *b).abs() <= SAME_ROOT * a.abs().max(b.abs()).max(1e-9 * size));
    found
}

/// Where to look: evenly, by decades, about the hints.
fn points(low: f64, high: f64, hints: &[f64]) -> Vec<f64> {
    let mut points = Vec::with_capacity(EVENLY + PER_DECADE * DECADES_DOWN + 2 * 10 * hints.len() + 4);
    let span = high - low;
    points.extend((0..=EVENLY).map(|at| low + span * at as f64 / EVENLY as f64));
    let largest = low.abs().max(high.abs());
    if largest > 0.0 {
        // By decades from the larger end down, kept to the range.
        let step = crate::units::math::pow(0.1, 1.0 / PER_DECADE as f64);
        let mut size = largest;
        for _ in 0..=PER_DECADE * DECADES_DOWN {
            if size >= low && size <= high {
                points.push(size);
            }
            if -size >= low && -size <= high {
                points.push(-size);
            }
            size *= step;
        }
        points.push(0.0);
    }
    for hint in hints {
        for step in [0.0, 1e-6, 1e-4, 1e-3, 1e-2, 0.03, 0.1, 0.2, 0.3, 0.5] {
            points.extend([hint * (1.0 + step), hint * (1.0 - step)]);
        }
    }
    points.retain(|x| *x >= low && *x <= high);
    points.sort_unstable_by(f64::total_cmp);
    points.dedup();
    points
}

/// The last point from `inside` towards `outside` at which the function is a number.
fn edge(function: &mut impl Function, inside: f64, outside: f64) -> f64 {
    let (mut inside, mut outside) = (inside, outside);
    for _ in 0..60 {
        let middle = 0.5 * (inside + outside);
        if middle == inside || middle == outside {
            break;
        }
        if function.value(middle).is_finite() {
            inside = middle;
        } else {
            outside = middle;
        }
    }
    inside
}

fn between(function: &mut impl Function, a: (f64, f64), b: (f64, f64), found: &mut Vec<f64>) {
    if b.1 == 0.0 && a.1 != 0.0 && b.0 != a.0 {
        found.push(b.0);
    } else if a.1 * b.1 < 0.0
        && let Some(root) = refine(function, a, b)
    {
        found.push(root);
    }
}

/// The root inside a bracket; `None` where the sign changes by a jump or over a pole.
fn refine(function: &mut impl Function, a: (f64, f64), b: (f64, f64)) -> Option<f64> {
    let (mut low, mut high) = (a.0, b.0);
    let rising = a.1 < 0.0;
    let mut x = if a.1.abs() < b.1.abs() { a.0 } else { b.0 };
    let mut here = function.sample(x);
    let mut last_step = high - low;
    for _ in 0..MOST_STEPS {
        let newton = x - here.value / here.slope;
        let inside = newton.is_finite() && newton > low && newton < high;
        let step = (newton - x).abs();
        let next = if inside && step < 0.5 * last_step { newton } else { 0.5 * (low + high) };
        last_step = (next - x).abs();
        if next == x || next == low || next == high {
            // The bracket cannot shrink further; the better end is the root.
            break;
        }
        x = next;
        here = function.sample(x);
        if here.value == 0.0 {
            break;
        }
        if !here.value.is_finite() {
            return None;
        }
        if (here.value < 0.0) == rising {
            low = x;
        } else {
            high = x;
        }
        if last_step <= f64::EPSILON * x.abs() {
            break;
        }
    }
    let steep = 16.0 * f64::EPSILON * (here.slope * x).abs();
    let small = here.value.abs() <= ROOT_RESIDUAL * here.magnitude;
    (small || (here.value.abs() <= steep && here.value.abs() <= a.1.abs().max(b.1.abs()))).then_some(x)
}

/// A root that the function only touches between two points of one sign.
fn touching(function: &mut impl Function, from: f64, to: f64, size: f64) -> Option<f64> {
    let (a, b) = (function.sample(from), function.sample(to));
    if a.slope * b.slope > 0.0 || !a.slope.is_finite() || !b.slope.is_finite() {
        return None;
    }
    let (mut low, mut high) = (from, to);
    let rising = a.slope < 0.0;
    let mut x = 0.5 * (low + high);
    let mut here = function.sample(x);
    for _ in 0..MOST_STEPS {
        if !here.value.is_finite() || here.value == 0.0 || x == low || x == high {
            break;
        }
        if (here.slope < 0.0) == rising {
            low = x;
        } else {
            high = x;
        }
        x = 0.5 * (low + high);
        here = function.sample(x);
    }
    // The curvature at the place itself: further out it may be anything.
    let beside = 1e-5 * x.abs().max(1e-3 * size);
    let curvature = (function.sample(x + beside).slope - function.sample(x - beside).slope).abs() / (2.0 * beside);
    let reach = TOUCHING * x.abs().max(1e-3 * size);
    let close = here.value.abs() <= 0.5 * curvature * reach * reach;
    close.then_some(x)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Value, slope and size as three functions.
    struct Of(fn(f64) -> [f64; 3]);

    impl Function for Of {
        fn value(&mut self, x: f64) -> f64 {
            (self.0)(x)[0]
        }

        fn sample(&mut self, x: f64) -> Sample {
            let [value, slope, magnitude] = (self.0)(x);
            Sample { value, slope, magnitude }
        }
    }

    fn roots_of(function: fn(f64) -> [f64; 3], low: f64, high: f64) -> Vec<f64> {
        roots(&mut Of(function), low, high, &[], 1.0)
    }

    #[test]
    fn all_roots_of_a_cubic_are_found_to_the_last_digits() {
        let found =
            roots_of(|x| [(x - 1.0) * (x - 2.0) * (x + 3.0), 3.0 * x * x - 7.0, (x * x * x).abs() + 7.0 * x.abs() + 6.0], -10.0, 10.0);
        assert_eq!(found.len(), 3);
        for (root, expected) in found.iter().zip([-3.0, 1.0, 2.0]) {
            assert!((root - expected).abs() < 4e-15, "{root}");
        }
    }

    #[test]
    fn a_root_far_below_the_range_is_found() {
        let found = roots_of(|x| [x - 1e-10, 1.0, x.abs() + 1e-10], 0.0, 1.0);
        assert!((found[0] / 1e-10 - 1.0).abs() < 1e-12, "{found:?}");
    }

    #[test]
    fn a_pole_is_no_root() {
        let found = roots_of(|x| [1.0 / (x - 0.3), -1.0 / ((x - 0.3) * (x - 0.3)), (1.0 / (x - 0.3)).abs()], 0.0, 1.0);
        assert!(found.is_empty(), "{found:?}");
    }

    #[test]
    fn a_root_that_is_only_touched_is_found() {
        let found = roots_of(|x| [(x - 0.37) * (x - 0.37), 2.0 * (x - 0.37), x * x + 0.14], 0.0, 1.0);
        assert_eq!(found.len(), 1);
        assert!((found[0] - 0.37).abs() < 1e-7);
    }

    #[test]
    fn a_function_that_does_not_reach_zero_has_no_root() {
        let found = roots_of(|x| [(x - 0.37) * (x - 0.37) + 1e-6, 2.0 * (x - 0.37), x * x + 0.14], 0.0, 1.0);
        assert!(found.is_empty(), "{found:?}");
    }

    #[test]
    fn a_root_beside_the_edge_of_the_function_is_found() {
        let found = roots_of(|x| [(x - 0.123_45).sqrt() - 1e-4, 0.5 / (x - 0.123_45).sqrt(), 1.0], 0.0, 1.0);
        assert!((found[0] - 0.123_45 - 1e-8).abs() < 1e-12, "{found:?}");
    }
}
