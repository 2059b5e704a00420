//! Where the program writes: results to standard output, notes for people to standard error.

use std::io::{self, BufWriter, ErrorKind, IsTerminal, Write};

use super::ExitCode;
use crate::diagnostic::visible;

/// The two streams of a run, and how they are written to.
pub(crate) struct Console {
    results: Box<dyn Write>,
    notes: Box<dyn Write>,
    /// Whether findings for people carry colour.
    pub(crate) colour: bool,
    /// How many threads may work; all cores where `None`.
    pub(crate) threads: Option<usize>,
    /// Whether people see how far a long run has come: where standard error is a terminal.
    pub(crate) progress: bool,
    failed: bool,
}

impl Console {
    /// The streams of the process.
    pub(crate) fn process() -> Self {
        Self::new(Box::new(BufWriter::with_capacity(1 << 16, io::stdout())), Box::new(io::stderr()))
    }

    /// Other streams.
    pub(crate) fn new(results: Box<dyn Write>, notes: Box<dyn Write>) -> Self {
        Self { results, notes, colour: false, threads: None, progress: false, failed: false }
    }

    /// Writes a result as it is.
    pub(crate) fn result(&mut self, text: &str) {
        let written = self.results.write_all(text.as_bytes());
        self.judge(written);
    }

    /// Writes a result and a line end, unless it ends with one.
    pub(crate) fn result_line(&mut self, text: &str) {
        self.result(text);
        if !text.ends_with('\n') {
            self.result("\n");
        }
    }

    /// Writes out what is held back.
    pub(crate) fn flush(&mut self) {
        let written = self.results.flush();
        self.judge(written);
    }

    /// Writes a note for people, after everything that was written before it.
    pub(crate) fn note(&mut self, text: &str) {
        let written = self.results.flush();
        self.judge(written);
        // There is nowhere left to tell that standard error cannot be written.
        let _ = self.notes.write_all(text.as_bytes());
    }

    /// Says what is wrong with the command line or a file; the text must be made visible by the caller where it quotes a
    /// sheet, and is made so here.
    pub(crate) fn wrong(&mut self, message: &str) -> ExitCode {
        let lines: Vec<_> = message.lines().map(visible).collect();
        self.note(&format!("gaswright: {}\n", lines.join("\n  ")));
        ExitCode::WrongUse
    }

    /// Ends the run: what is still held back is written.
    pub(crate) fn finish(mut self, code: ExitCode) -> ExitCode {
        let written = self.results.flush();
        self.judge(written);
        let _ = self.notes.flush();
        if self.failed { code.graver(ExitCode::WrongUse) } else { code }
    }

    /// A reader that closed its end has what it wanted: the rest goes nowhere. Any other failure is told once.
    fn judge(&mut self, written: io::Result<()>) {
        let Err(error) = written else { return };
        self.results = Box::new(io::sink());
        if error.kind() != ErrorKind::BrokenPipe {
            self.failed = true;
            let _ = writeln!(self.notes, "gaswright: standard output cannot be written: {error}");
        }
    }
}

/// Whether standard error is a terminal.
pub(crate) fn notes_go_to_a_terminal() -> bool {
    io::stderr().is_terminal()
}

/// Whether standard error is a terminal that shows colour: not where `NO_COLOR` holds a text, nor where the terminal says
/// that it is a dumb one.
pub(crate) fn terminal_has_colour() -> bool {
    let no_colour = std::env::var_os("NO_COLOR").is_some_and(|value| !value.is_empty());
    let dumb = std::env::var_os("TERM").is_some_and(|value| value == "dumb");
    !no_colour && !dumb && io::stderr().is_terminal()
}

#[cfg(test)]
pub(crate) mod tests {
    use std::sync::{Arc, Mutex};

    use super::*;

    /// A stream that keeps what is written to it.
    #[derive(Clone, Default)]
    pub(crate) struct Kept(Arc<Mutex<Vec<u8>>>);

    impl Kept {
        pub(crate) fn text(&self) -> String {
            String::from_utf8(self.0.lock().unwrap().clone()).unwrap()
        }
    }

    impl Write for Kept {
        fn write(&mut self, bytes: &[u8]) -> io::Result<usize> {
            self.0.lock().unwrap().extend_from_slice(bytes);
            Ok(bytes.len())
        }

        fn flush(&mut self) -> io::Result<()> {
            Ok(())
        }
    }

    struct Failing(ErrorKind);

    impl Write for Failing {
        fn write(&mut self, _: &[u8]) -> io::Result<usize> {
            Err(self.0.into())
        }

        fn flush(&mut self) -> io::Result<()> {
            Ok(())
        }
    }

    #[test]
    fn a_closed_pipe_is_no_failure_and_a_full_disk_is() {
        for (kind, code) in [(ErrorKind::BrokenPipe, ExitCode::Fails), (ErrorKind::StorageFull, ExitCode::WrongUse)] {
            let notes = Kept::default();
            let mut console = Console::new(Box::new(Failing(kind)), Box::new(notes.clone()));
            console.result_line("28.2 kg");
            console.result_line("7.9 bar gauge");
            assert_eq!(console.finish(ExitCode::Fails), code);
            assert_eq!(notes.text().lines().count(), usize::from(code == ExitCode::WrongUse));
        }
    }

    #[test]
    fn what_is_wrong_is_told_with_controls_escaped() {
        let (results, notes) = (Kept::default(), Kept::default());
        let mut console = Console::new(Box::new(results.clone()), Box::new(notes.clone()));
        assert_eq!(console.wrong("a\u{1b}.gw: no such file"), ExitCode::WrongUse);
        assert_eq!(notes.text(), "gaswright: a\\u{1b}.gw: no such file\n");
        assert_eq!(results.text(), "");
    }
}
