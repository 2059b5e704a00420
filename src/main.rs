//! The program `gaswright`.

fn main() -> std::process::ExitCode {
    gaswright::cli::run(std::env::args_os()).into()
}
