//! Several sheets through one step, in parallel, with what comes out in the order of the command line.

use std::path::PathBuf;
use std::time::{Duration, Instant};

use rayon::prelude::*;

use super::console::Console;
use super::sheet_file::SheetFile;

/// Sheets whose results are held at once, for each thread: enough to keep all of them busy, few enough to bound memory.
const SHEETS_PER_THREAD: usize = 32;

/// A run shorter than this shows no progress.
const PATIENCE: Duration = Duration::from_secs(1);

/// Stack of a thread, as large as that of the main thread: whether a sheet is too deep must not depend on which thread reads it.
const STACK_BYTES: usize = 8 * 1024 * 1024;

/// Takes each file through `step` and hands the results to `show` in the order of `paths`.
///
/// No thread is started for one file. How many there are changes nothing that is shown.
pub(crate) fn each_sheet<T: Send>(
    console: &mut Console,
    paths: &[PathBuf],
    step: impl Fn(Result<SheetFile, String>) -> T + Sync,
    mut show: impl FnMut(&mut Console, T),
) {
    let threads = console.threads.or_else(|| std::thread::available_parallelism().ok().map(usize::from)).unwrap_or(1).min(paths.len());
    let pool = (threads > 1).then(|| rayon::ThreadPoolBuilder::new().num_threads(threads).stack_size(STACK_BYTES).build().ok()).flatten();
    let Some(pool) = pool else {
        for path in paths {
            let result = step(SheetFile::read(path));
            show(console, result);
        }
        return;
    };
    let begun = Instant::now();
    let mut done = 0;
    for some in paths.chunks(threads * SHEETS_PER_THREAD) {
        let shown = console.progress && begun.elapsed() >= PATIENCE;
        if shown {
            console.note(&format!("{done} of {} sheets", paths.len()));
        }
        let results: Vec<T> = pool.install(|| some.par_iter().with_max_len(1).map(|path| step(SheetFile::read(path))).collect());
        if shown {
            // Back to the start of the line, and clear it.
            console.note("\r\x1b[K");
        }
        results.into_iter().for_each(|result| show(console, result));
        done += some.len();
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn results_come_in_the_order_of_the_paths_whatever_the_threads() {
        let paths: Vec<PathBuf> = (0..200).map(|number| PathBuf::from(format!("no-such-sheet-{number}.gw"))).collect();
        for threads in [1, 2, 7] {
            let mut console = Console::new(Box::new(std::io::sink()), Box::new(std::io::sink()));
            console.threads = Some(threads);
            let mut shown = Vec::new();
            each_sheet(&mut console, &paths, |read| read.err().unwrap_or_default(), |_, message| shown.push(message));
            let expected: Vec<String> = paths.iter().map(|path| format!("{}: no such file or folder", path.display())).collect();
            assert_eq!(shown, expected);
        }
    }
}
