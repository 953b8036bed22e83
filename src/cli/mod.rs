//! The command line: words to calls.
//!
//! In: arguments, files, the environment. Out: text, files, an exit status.
//! The only folder that reads files or the environment. No arithmetic.
//! A new command is one file here and one variant in `args.rs`.

mod args;
mod changes;
mod check;
mod completions;
mod load;
mod methods;
mod new;
mod print;
mod save;
mod solve;

pub use args::Arguments;

use args::Command;
use clap::Parser;

/// Runs the program on its arguments and gives its exit status: 0 done, 1 done
/// with unanswered warnings, 2 refused.
pub fn run() -> u8 {
    match Arguments::try_parse() {
        Ok(arguments) => match arguments.command {
            Command::Check(args) => check::run(&args),
            Command::Solve(args) => solve::run(&args),
            Command::Print(args) => print::run(&args),
            Command::New(args) => new::run(&args),
            Command::Methods(args) => methods::run(&args),
            Command::Changes(args) => changes::run(&args),
            Command::Completions(args) => completions::run(&args),
        },
        Err(error) => {
            // Printing help to a closed pipe is no fault.
            let _ = error.print();
            if error.use_stderr() { 2 } else { 0 }
        }
    }
}
