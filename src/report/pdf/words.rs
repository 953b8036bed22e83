//! Words: where a text may be broken.
//!
//! In: a sentence with subscript marks. Out: its words, which hold together,
//! and the places where a word may be cut in need. Never measures.

use super::super::document::runs;

/// A character and whether it stands in a subscript.
pub type Atom = (bool, char);

/// What stands between words.
pub const SPACE: Atom = (false, ' ');

/// The words: runs of characters between spaces. An operator keeps to the word
/// after it, so that a row which goes on begins with it. An equals sign keeps to
/// the word before it, at the very start to the word after it: so no row but the
/// first of a text begins with an equals sign.
pub fn words(text: &str) -> Vec<Vec<Atom>> {
    let mut words: Vec<Vec<Atom>> = Vec::new();
    let mut binds = false;
    for word in bare_words(text) {
        let equals = word == [(false, '=')];
        let operator = matches!(word.as_slice(), [(false, '+' | '−' | '·' | '×' | '±')]);
        let first = words.is_empty();
        match words.last_mut() {
            Some(last) if equals || binds => {
                last.push(SPACE);
                last.extend(word);
            }
            _ => words.push(word),
        }
        binds = operator || (equals && first);
    }
    words
}

fn bare_words(text: &str) -> Vec<Vec<Atom>> {
    let mut words = vec![Vec::new()];
    for (subscript, part) in runs(text) {
        for character in part.chars() {
            if !character.is_ascii_whitespace() {
                if let Some(word) = words.last_mut() {
                    word.push((subscript, character));
                }
            } else if subscript {
                if let Some(word) = words.last_mut() {
                    word.push((true, ' '));
                }
            } else {
                words.push(Vec::new());
            }
        }
    }
    words.retain(|word| !word.is_empty());
    words
}

/// The atoms before and after a place in a word.
fn around(word: &[Atom], at: usize) -> Option<(Atom, Atom)> {
    let before = at.checked_sub(1).and_then(|index| word.get(index))?;
    Some((*before, *word.get(at)?))
}

/// A space that may end a row: not one beside an equals sign.
pub fn at_space(word: &[Atom], at: usize) -> bool {
    let after = word.get(at + 1).map(|atom| atom.1);
    around(word, at).is_some_and(|(before, space)| space == SPACE && before.1 != '=')
        && !matches!(after, None | Some('='))
}

/// A place between characters that may be parted in need.
pub fn may_cut(word: &[Atom], at: usize) -> bool {
    let in_number = |atom: Atom| atom.1.is_ascii_digit() || matches!(atom.1, '.' | ',');
    around(word, at).is_some_and(|(before, after)| {
        let number = in_number(before) && in_number(after);
        let space = before == SPACE || after == SPACE;
        !number && !space && !after.0
    })
}
