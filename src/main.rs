//! The program: see [`retrodict::cli`].

#![forbid(unsafe_code)]

fn main() -> std::process::ExitCode {
    retrodict::cli::run().into()
}
