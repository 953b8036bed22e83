//! Numbers within a quantity's text.

use super::notation::{Fault, Piece, UNREADABLE};

/// A number as written.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Number {
    /// Its value.
    pub(super) value: f64,
    /// Standard uncertainty given in the last digit, as in `18.4(3)`.
    pub(super) last_digit: Option<f64>,
}

/// Without blanks at either end.
pub(super) fn trim(piece: Piece<'_>) -> Piece<'_> {
    let start = piece.text.len() - piece.text.trim_start().len();
    Piece { text: piece.text.trim(), from: piece.from + start }
}

/// Splits a leading number from what follows it, which is its unit.
pub(super) fn number(piece: Piece<'_>) -> Result<(Number, Piece<'_>), Fault> {
    let end = number_end(piece.text);
    let digits = piece.text[..end].replace('−', "-");
    let value = match digits.parse::<f64>() {
        Ok(value) if value.is_finite() && digits.contains(|c: char| c.is_ascii_digit()) => value,
        _ => return Err(no_number(piece)),
    };
    let rest = &piece.text[end..];
    if rest.starts_with(',') && rest[1..].starts_with(|c: char| c.is_ascii_digit()) {
        let mut fault =
            piece.fault(UNREADABLE, "a comma inside a number", "a decimal point and no thousands mark");
        fault.hint = Some("write a decimal comma as a point, and leave a thousands comma out".into());
        return Err(fault);
    }
    let (last_digit, used) = in_last_digit(&digits, rest, piece)?;
    let unit = trim(Piece { text: &rest[used..], from: piece.from + end + used });
    Ok((Number { value, last_digit }, unit))
}

/// Where the number at the start of `text` ends.
fn number_end(text: &str) -> usize {
    let mut end = 0;
    let mut seen_digit = false;
    for (at, c) in text.char_indices() {
        let exponent_sign = |c: char| matches!(c, '+' | '-' | '−') && text[..at].ends_with(['e', 'E']);
        let ok = match c {
            '0'..='9' => {
                seen_digit = true;
                true
            }
            '.' => !text[at..].starts_with(".."),
            '+' | '-' | '−' => at == 0 || exponent_sign(c),
            // Only an exponent when a digit or a sign follows: `5 e` is no number.
            'e' | 'E' => {
                seen_digit
                    && text[at + 1..]
                        .trim_start_matches(['+', '-', '−'])
                        .starts_with(|d: char| d.is_ascii_digit())
            }
            _ => false,
        };
        if !ok {
            break;
        }
        end = at + c.len_utf8();
    }
    end
}

/// The `(3)` of `18.4(3)`: its value in units of the last digit.
fn in_last_digit(digits: &str, rest: &str, piece: Piece<'_>) -> Result<(Option<f64>, usize), Fault> {
    let Some(inside) = rest.strip_prefix('(') else { return Ok((None, 0)) };
    let parsed = inside.split_once(')').and_then(|(n, _)| Some((n.parse::<f64>().ok()?, n.len())));
    let plain = |n: f64, length: usize| n > 0.0 && inside[..length].bytes().all(|b| b.is_ascii_digit());
    let in_digits = !digits.contains(['e', 'E']);
    let Some((count, length)) = parsed.filter(|(n, length)| in_digits && plain(*n, *length)) else {
        return Err(piece.fault(
            UNREADABLE,
            "brackets on a number hold the standard uncertainty of its last digit",
            "whole digits after a plain number, such as 18.4(3) m; else write 18.4 ± 0.3 m (1 sd)",
        ));
    };
    let decimals = digits.split_once('.').map_or(0, |(_, d)| d.len());
    // Parsing is exact to the last bit where repeated division is not.
    let unit: f64 = format!("1e-{decimals}").parse().unwrap_or(1.0);
    Ok((Some(count * unit), length + 2))
}

fn no_number(piece: Piece<'_>) -> Fault {
    let message = if piece.text.is_empty() {
        "a number is missing".to_string()
    } else {
        format!("'{}' does not start with a number", piece.text)
    };
    piece.fault(UNREADABLE, message, "a finite number and its unit, such as 18.4 ± 0.3 m (95 %)")
}
