//! `completions`: a script that lets a shell complete the commands.

use super::args::{Arguments, CompletionsArgs};
use super::load::put;
use clap::CommandFactory;

pub(super) fn run(args: &CompletionsArgs) -> u8 {
    let mut script = Vec::new();
    clap_complete::generate(args.shell, &mut Arguments::command(), "retrodict", &mut script);
    put(&String::from_utf8_lossy(&script));
    0
}
