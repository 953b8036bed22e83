//! Tables as text.

use super::page::wrapped;
use crate::report::document::{Align, Table, plain};

const GAP: &str = "  ";

/// The table in at most `columns` characters a line.
pub(super) fn render(table: &Table, columns: usize) -> String {
    let cells: Vec<Vec<String>> =
        table.rows.iter().map(|row| row.iter().map(|c| plain(c)).collect()).collect();
    let heads: Vec<String> = table.columns.iter().map(|c| plain(&c.head)).collect();
    let widths = widths(table, &heads, &cells, columns);
    let mut text = String::from("\n");
    text.push_str(&row(&heads, table, &widths));
    let rules: Vec<String> = widths.iter().map(|w| "-".repeat(*w)).collect();
    text.push_str(&rules.join(GAP));
    text.push('\n');
    for cells in &cells {
        text.push_str(&row(cells, table, &widths));
    }
    text
}

/// Columns of numbers get what they need, since a number must not be broken;
/// columns of words share the rest by weight, and what narrow ones leave goes
/// to the others.
fn widths(table: &Table, heads: &[String], cells: &[Vec<String>], columns: usize) -> Vec<usize> {
    let room = columns.saturating_sub(GAP.len() * table.columns.len().saturating_sub(1)) as f64;
    let need: Vec<f64> = (0..heads.len())
        .map(|i| {
            let longest = cells.iter().filter_map(|r| r.get(i)).map(|c| c.chars().count()).max().unwrap_or(0);
            longest.max(heads[i].chars().count()) as f64
        })
        .collect();
    let mut width = vec![0.0; heads.len()];
    let is_number = |i: &usize| table.columns[*i].align == Align::Right && need[*i] < room / 4.0;
    let (numbers, mut open): (Vec<usize>, Vec<usize>) = (0..heads.len()).partition(is_number);
    numbers.iter().for_each(|i| width[*i] = need[*i]);
    let mut left = room - numbers.iter().map(|i| need[*i]).sum::<f64>();
    while !open.is_empty() {
        let weight: f64 = open.iter().map(|i| table.columns[*i].weight).sum();
        let share = |i: usize| left * table.columns[i].weight / weight;
        let (fits, rest): (Vec<usize>, Vec<usize>) = open.iter().partition(|i| need[**i] <= share(**i));
        if fits.is_empty() {
            rest.iter().for_each(|i| width[*i] = share(*i));
            break;
        }
        fits.iter().for_each(|i| width[*i] = need[*i]);
        left -= fits.iter().map(|i| need[*i]).sum::<f64>();
        open = rest;
    }
    width.iter().map(|w| (*w as usize).max(3)).collect()
}

fn row(cells: &[String], table: &Table, widths: &[usize]) -> String {
    let wrapped: Vec<Vec<String>> = widths
        .iter()
        .enumerate()
        .map(|(i, width)| self::wrapped(cells.get(i).map_or("", String::as_str), *width))
        .collect();
    let height = wrapped.iter().map(Vec::len).max().unwrap_or(0);
    let mut text = String::new();
    for line in 0..height {
        let mut parts = Vec::new();
        for (i, lines) in wrapped.iter().enumerate() {
            let cell = lines.get(line).map_or("", String::as_str);
            let pad = " ".repeat(widths[i].saturating_sub(cell.chars().count()));
            parts.push(match table.columns.get(i).map(|c| c.align) {
                Some(Align::Right) => format!("{pad}{cell}"),
                _ => format!("{cell}{pad}"),
            });
        }
        text.push_str(parts.join(GAP).trim_end());
        text.push('\n');
    }
    text
}
