//! What would change in a text, line by line, in the unified form that patch tools and people read.

/// Lines around a change that are shown.
const CONTEXT: usize = 3;

/// Insertions and deletions beyond which no shortest way is looked for: the changed part is then shown whole.
const MOST_STEPS: usize = 1_000;

/// One line of the way from the old text to the new.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Step {
    /// In both.
    Keep,
    /// In the old only.
    Remove,
    /// In the new only.
    Add,
}

/// The change from `old` to `new` in unified form; empty where there is none.
pub(super) fn unified(path: &str, old: &str, new: &str) -> String {
    let old_lines: Vec<&str> = old.split_inclusive('\n').collect();
    let new_lines: Vec<&str> = new.split_inclusive('\n').collect();
    let steps = steps(&old_lines, &new_lines);
    if steps.iter().all(|step| *step == Step::Keep) {
        return String::new();
    }
    let mut shown = format!("--- {path}\n+++ {path}\n");
    for hunk in hunks(&steps) {
        write_hunk(&mut shown, &steps, hunk, &old_lines, &new_lines);
    }
    shown
}

/// Ranges of steps that belong together: changes with their context.
fn hunks(steps: &[Step]) -> Vec<std::ops::Range<usize>> {
    let mut hunks: Vec<std::ops::Range<usize>> = Vec::new();
    for (at, _) in steps.iter().enumerate().filter(|(_, step)| **step != Step::Keep) {
        let (start, end) = (at.saturating_sub(CONTEXT), (at + 1 + CONTEXT).min(steps.len()));
        match hunks.last_mut() {
            Some(last) if start <= last.end => last.end = end,
            _ => hunks.push(start..end),
        }
    }
    hunks
}

fn write_hunk(shown: &mut String, steps: &[Step], hunk: std::ops::Range<usize>, old: &[&str], new: &[&str]) {
    let count = |range: &[Step], without: Step| range.iter().filter(|step| **step != without).count();
    let (before, inside) = (&steps[..hunk.start], &steps[hunk]);
    let (mut old_at, mut new_at) = (count(before, Step::Add), count(before, Step::Remove));
    let (n_old, n_new) = (count(inside, Step::Add), count(inside, Step::Remove));
    // An empty range names the line before it.
    let first = |at: usize, count: usize| if count == 0 { at } else { at + 1 };
    shown.push_str(&format!("@@ -{},{n_old} +{},{n_new} @@\n", first(old_at, n_old), first(new_at, n_new)));
    for step in inside {
        let (sign, line) = match step {
            Step::Add => ('+', new[new_at]),
            Step::Remove => ('-', old[old_at]),
            Step::Keep => (' ', old[old_at]),
        };
        shown.push(sign);
        shown.push_str(&crate::diagnostic::visible(line.trim_end_matches('\n')));
        shown.push_str(if line.ends_with('\n') { "\n" } else { "\n\\ No newline at end of file\n" });
        old_at += usize::from(*step != Step::Add);
        new_at += usize::from(*step != Step::Remove);
    }
}

/// The way from old to new.
fn steps(old: &[&str], new: &[&str]) -> Vec<Step> {
    let same_start = old.iter().zip(new).take_while(|(a, b)| a == b).count();
    let (old_rest, new_rest) = (&old[same_start..], &new[same_start..]);
    let same_end = old_rest.iter().rev().zip(new_rest.iter().rev()).take_while(|(a, b)| a == b).count();
    let (old_middle, new_middle) = (&old_rest[..old_rest.len() - same_end], &new_rest[..new_rest.len() - same_end]);
    let mut steps = vec![Step::Keep; same_start];
    steps.extend(shortest_way(old_middle, new_middle).unwrap_or_else(|| replaced(old_middle.len(), new_middle.len())));
    steps.extend(std::iter::repeat_n(Step::Keep, same_end));
    steps
}

/// All of the old out, all of the new in.
fn replaced(n_old: usize, n_new: usize) -> Vec<Step> {
    std::iter::repeat_n(Step::Remove, n_old).chain(std::iter::repeat_n(Step::Add, n_new)).collect()
}

/// The way with the fewest insertions and deletions, by the greedy algorithm of E. W. Myers, An O(ND) Difference
/// Algorithm and Its Variations, Algorithmica 1 (1986) 251; `None` where it needs more than [`MOST_STEPS`].
fn shortest_way(old: &[&str], new: &[&str]) -> Option<Vec<Step>> {
    let (n_old, n_new) = (old.len() as isize, new.len() as isize);
    let most = (old.len() + new.len()).min(MOST_STEPS) as isize;
    let offset = most + 1;
    // `furthest[k]` is the furthest old line that is reached on diagonal k (old line less new line).
    let mut furthest = vec![0_isize; 2 * most as usize + 3];
    let mut rounds: Vec<Vec<isize>> = Vec::new();
    let reached = |furthest: &[isize], k: isize| furthest[(k + offset) as usize];
    for depth in 0..=most {
        for k in (-depth..=depth).step_by(2) {
            let down = k == -depth || (k != depth && reached(&furthest, k - 1) < reached(&furthest, k + 1));
            let mut old_at = if down { reached(&furthest, k + 1) } else { reached(&furthest, k - 1) + 1 };
            let mut new_at = old_at - k;
            while old_at < n_old && new_at < n_new && new_at >= 0 && old[old_at as usize] == new[new_at as usize] {
                (old_at, new_at) = (old_at + 1, new_at + 1);
            }
            furthest[(k + offset) as usize] = old_at;
            if old_at >= n_old && new_at >= n_new {
                return Some(walk_back(&rounds, depth, n_old, n_new));
            }
        }
        let used = ((offset - depth) as usize)..((offset + depth + 1) as usize);
        rounds.push(furthest[used].to_vec());
    }
    None
}

/// The steps from the furthest places of each round, found from the end.
fn walk_back(rounds: &[Vec<isize>], depth: isize, n_old: isize, n_new: isize) -> Vec<Step> {
    let (mut old_at, mut new_at) = (n_old, n_new);
    let mut steps = Vec::new();
    for depth in (1..=depth).rev() {
        let before = &rounds[depth as usize - 1];
        // Round `depth - 1` holds the diagonals from `1 - depth` to `depth - 1`.
        let reached = |k: isize| before.get((k + depth - 1) as usize).copied().unwrap_or(-1);
        let k = old_at - new_at;
        let down = k == -depth || (k != depth && reached(k - 1) < reached(k + 1));
        let from = if down { k + 1 } else { k - 1 };
        let (old_from, new_from) = (reached(from), reached(from) - from);
        let (old_after, new_after) = if down { (old_from, new_from + 1) } else { (old_from + 1, new_from) };
        while old_at > old_after && new_at > new_after {
            steps.push(Step::Keep);
            (old_at, new_at) = (old_at - 1, new_at - 1);
        }
        steps.push(if down { Step::Add } else { Step::Remove });
        (old_at, new_at) = (old_from, new_from);
    }
    steps.extend(std::iter::repeat_n(Step::Keep, old_at as usize));
    steps.reverse();
    steps
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;

    #[test]
    fn equal_texts_have_no_change() {
        assert_eq!(unified("a.gw", "x\ny\n", "x\ny\n"), "");
    }

    #[test]
    fn a_changed_line_stands_between_its_neighbours() {
        let old = "1\n2\n3\n4\n5\n6\n7\n8\n9\n";
        let new = old.replace("5\n", "five\n");
        assert_eq!(unified("a.gw", old, &new), "--- a.gw\n+++ a.gw\n@@ -2,7 +2,7 @@\n 2\n 3\n 4\n-5\n+five\n 6\n 7\n 8\n");
    }

    #[test]
    fn a_missing_last_line_end_is_told() {
        assert_eq!(unified("a.gw", "x", "x\n"), "--- a.gw\n+++ a.gw\n@@ -1,1 +1,1 @@\n-x\n\\ No newline at end of file\n+x\n");
    }

    #[test]
    fn lines_from_and_to_nothing() {
        assert_eq!(unified("a.gw", "", "x\n"), "--- a.gw\n+++ a.gw\n@@ -0,0 +1,1 @@\n+x\n");
        assert_eq!(unified("a.gw", "x\n", ""), "--- a.gw\n+++ a.gw\n@@ -1,1 +0,0 @@\n-x\n");
    }

    #[test]
    fn texts_with_nothing_in_common_are_replaced_whole() {
        let old: String = (0..5_000).map(|line| format!("old {line}\n")).collect();
        let new: String = (0..5_000).map(|line| format!("new {line}\n")).collect();
        let shown = unified("a.gw", &old, &new);
        assert_eq!(shown.lines().count(), 3 + 10_000);
    }

    fn walk<'a>(steps: &[Step], old: &[&'a str], new: &[&'a str]) -> (Vec<&'a str>, Vec<&'a str>) {
        let (mut from, mut to) = (Vec::new(), Vec::new());
        let (mut old_at, mut new_at) = (0, 0);
        for step in steps {
            if *step != Step::Add {
                from.push(old[old_at]);
                old_at += 1;
            }
            if *step != Step::Remove {
                to.push(new[new_at]);
                new_at += 1;
            }
            if *step == Step::Keep {
                assert_eq!(from.last(), to.last());
            }
        }
        (from, to)
    }

    proptest! {
        #[test]
        fn the_steps_lead_from_the_old_text_to_the_new(old in "[abc\n]{0,60}", new in "[abc\n]{0,60}") {
            let old: Vec<&str> = old.split_inclusive('\n').collect();
            let new: Vec<&str> = new.split_inclusive('\n').collect();
            let steps = steps(&old, &new);
            let (from, to) = walk(&steps, &old, &new);
            prop_assert_eq!(from, old);
            prop_assert_eq!(to, new);
        }
    }
}
