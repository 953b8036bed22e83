//! The words the program understands.

use crate::analysis::Options;
use crate::uncertainty::Trials;
use clap::{Args, Parser, Subcommand};
use std::path::PathBuf;

/// Work backward from a measured crash scene to the speeds before impact.
#[derive(Debug, Parser)]
#[command(
    name = "retrodict",
    version,
    about = "Work backward from a measured crash scene to the speeds before impact",
    long_about = "Work backward from a measured crash scene to the speeds before impact, with bands, sources and a \
                  worksheet that a second expert can check line by line.\n\nA calculation aid and record, not an \
                  opinion: a licensed or accredited reconstructionist must adopt, change or reject every result.",
    after_help = "Examples:\n  retrodict check cases/quarry-road.toml\n  retrodict solve cases/quarry-road.toml\n  \
                  retrodict print cases/quarry-road.toml -o quarry-road.pdf\n\nExit status: 0 done, 1 done with \
                  unanswered warnings, 2 refused."
)]
pub struct Arguments {
    /// What to do.
    #[command(subcommand)]
    pub command: Command,
}

/// What to do.
#[derive(Debug, Subcommand)]
pub enum Command {
    /// Check a case file and report all its faults and what the rules say.
    #[command(after_help = "Example:\n  retrodict check cases/quarry-road.toml")]
    Check(CheckArgs),
    /// Work a case backward and show the worksheet.
    #[command(after_help = "Examples:\n  retrodict solve cases/quarry-road.toml\n  retrodict solve \
                            cases/quarry-road.toml --json > quarry-road.json\n  retrodict solve \
                            cases/quarry-road.toml --seed 7 --trials 1000000")]
    Solve(SolveArgs),
    /// Work a case backward and write the worksheet as a PDF file.
    #[command(after_help = "Examples:\n  retrodict print cases/quarry-road.toml\n  retrodict print \
                            cases/quarry-road.toml -o worksheet.pdf")]
    Print(PrintArgs),
    /// Write a starter case to fill in.
    #[command(
        after_help = "Examples:\n  retrodict new crossing\n  retrodict new to-rest my-case.toml\n\nThen: \
                            retrodict check crossing.toml; whole examples: cases/quarry-road.toml and its neighbours."
    )]
    New(NewArgs),
    /// Show the methods: formulas, symbols, limits, sources, method errors.
    #[command(
        after_help = "Examples:\n  retrodict methods\n  retrodict methods braking\n\nWhat they are used for: \
                            retrodict solve cases/quarry-road.toml"
    )]
    Methods(MethodsArgs),
    /// List what differs between two versions of a case, entry by entry.
    #[command(after_help = "Example:\n  retrodict changes cases/quarry-road.toml new-version.toml")]
    Changes(ChangesArgs),
    /// Print a completion script for a shell.
    #[command(
        after_help = "Example:\n  retrodict completions bash > retrodict.bash\n\nThen: retrodict check \
                            cases/quarry-road.toml"
    )]
    Completions(CompletionsArgs),
}

/// Arguments of `new`.
#[derive(Debug, Args)]
pub struct NewArgs {
    /// Kind of case: crossing, in-line or to-rest; asked at a terminal.
    pub kind: Option<String>,
    /// The file to write; without it, the kind with .toml, here.
    pub file: Option<PathBuf>,
}

/// Arguments of `methods`.
#[derive(Debug, Args)]
pub struct MethodsArgs {
    /// The method to show; without it, all in a list.
    pub name: Option<String>,
}

/// Arguments of `changes`.
#[derive(Debug, Args)]
pub struct ChangesArgs {
    /// The earlier version.
    pub old: PathBuf,
    /// The later version.
    pub new: PathBuf,
}

/// Arguments of `completions`.
#[derive(Debug, Args)]
pub struct CompletionsArgs {
    /// The shell.
    pub shell: clap_complete::Shell,
}

/// Arguments of `check`.
#[derive(Debug, Args)]
pub struct CheckArgs {
    /// The case file.
    pub case: PathBuf,
}

/// Arguments of `solve`.
#[derive(Debug, Args)]
pub struct SolveArgs {
    /// The case file.
    pub case: PathBuf,
    /// Print one JSON object, values in SI units.
    #[arg(long)]
    pub json: bool,
    /// How to draw.
    #[command(flatten)]
    pub draws: DrawArgs,
}

/// Arguments of `print`.
#[derive(Debug, Args)]
pub struct PrintArgs {
    /// The case file.
    pub case: PathBuf,
    /// The PDF file to write; without it, the case's name with .pdf, here.
    #[arg(short, long)]
    pub output: Option<PathBuf>,
    /// How to draw.
    #[command(flatten)]
    pub draws: DrawArgs,
}

/// How the random numbers are drawn.
#[derive(Debug, Args)]
pub struct DrawArgs {
    /// Seed of the random numbers.
    #[arg(long, default_value_t = 1)]
    pub seed: u64,
    /// Trials, rounded up to blocks of 10 000 [default: until every printed digit is stable]
    #[arg(long, value_parser = clap::value_parser!(u64).range(1..=1_000_000_000))]
    pub trials: Option<u64>,
}

impl DrawArgs {
    /// The same as options of an analysis.
    pub fn options(&self) -> Options {
        Options { seed: self.seed, trials: self.trials.map_or(Trials::UntilStable, Trials::Fixed) }
    }
}
