//! `methods`: what the program computes with, and where it comes from.

use super::args::MethodsArgs;
use super::load::{put, say, styled};
use crate::physics::METHODS;
use crate::report::{method_list, method_page, terminal};
use std::io::IsTerminal;

pub(super) fn run(args: &MethodsArgs) -> u8 {
    let document = match &args.name {
        None => method_list(),
        Some(name) => match method_page(name) {
            Some(document) => document,
            None => {
                let near = crate::diag::nearest(name, METHODS.iter().map(|m| m.id));
                let hint = near.map_or(String::new(), |n| format!("did you mean {n}?\n"));
                say(&format!("'{name}' is not a method of this program\n{hint}see: retrodict methods\n"));
                return 2;
            }
        },
    };
    put(&terminal::render(&document, styled(std::io::stdout().is_terminal())));
    0
}
