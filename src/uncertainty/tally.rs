//! What one block of trials says about one result.
//!
//! A coverage interval needs only the tails of the sorted trials (JCGM 101,
//! 7.7), so only those are sorted.

/// Estimates from one block.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Tally {
    pub(super) mean: f64,
    pub(super) variance: f64,
    pub(super) low: f64,
    pub(super) high: f64,
    pub(super) short_low: f64,
    pub(super) short_high: f64,
    /// One trial in twenty lies below it.
    pub(super) least: f64,
}

/// Takes the estimates from the possible trials of a block; reorders them.
/// `None` for fewer than 100 trials, whose tails say nothing.
pub(super) fn tally(trials: &mut [f64]) -> Option<Tally> {
    let n = trials.len();
    if n < 100 {
        return None;
    }
    let mean = total(trials, |x| x) / n as f64;
    let variance = total(trials, |x| (x - mean) * (x - mean)) / (n - 1) as f64;
    // q = pM trials lie in the interval, r = (M − q)/2 below it (7.7.2).
    let inside = (0.95 * n as f64 + 0.5) as usize;
    let outside = n - inside;
    let below = (outside as f64 / 2.0 + 0.5) as usize;
    sort_tails(trials, outside);
    // The r-th smallest, counted from 1, and the one `inside` places on.
    let low = trials[below.max(1) - 1];
    let high = trials[(below.max(1) - 1 + inside).min(n - 1)];
    let (short_low, short_high) = shortest(trials, inside);
    let least = trials[outside.max(1) - 1];
    Some(Tally { mean, variance, low, high, short_low, short_high, least })
}

/// The sum over the trials, in eight sums side by side: one sum would wait for
/// each addition to end.
fn total(trials: &[f64], of: impl Fn(f64) -> f64) -> f64 {
    let mut sums = [0.0; 8];
    let chunks = trials.chunks_exact(8);
    let rest: f64 = chunks.remainder().iter().map(|x| of(*x)).sum();
    for chunk in chunks {
        sums.iter_mut().zip(chunk).for_each(|(sum, x)| *sum += of(*x));
    }
    sums.iter().sum::<f64>() + rest
}

/// Sorts the `count` smallest and the `count` largest into their places.
fn sort_tails(trials: &mut [f64], count: usize) {
    let n = trials.len();
    let count = count.clamp(1, n / 2);
    trials.select_nth_unstable_by(count - 1, f64::total_cmp);
    trials[..count].sort_unstable_by(f64::total_cmp);
    trials[count..].select_nth_unstable_by(n - 2 * count, f64::total_cmp);
    trials[n - count..].sort_unstable_by(f64::total_cmp);
}

/// The shortest interval that holds `inside` steps (7.7.4). Its lower end lies
/// in the lower tail and its upper end in the upper.
fn shortest(trials: &[f64], inside: usize) -> (f64, f64) {
    let n = trials.len();
    let mut best = (trials[0], trials[inside.min(n - 1)]);
    for r in 0..n - inside {
        let ends = (trials[r], trials[r + inside]);
        if ends.1 - ends.0 < best.1 - best.0 {
            best = ends;
        }
    }
    best
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn tails_are_where_a_full_sort_puts_them() {
        let mut trials: Vec<f64> = (0..10_000).map(|i| f64::from((i * 7919) % 10_007) - 3.0).collect();
        let mut sorted = trials.clone();
        sorted.sort_unstable_by(f64::total_cmp);
        let t = tally(&mut trials).unwrap();
        assert_eq!((t.low, t.high), (sorted[249], sorted[9749]));
        assert_eq!(trials[..500], sorted[..500]);
        assert_eq!(trials[9500..], sorted[9500..]);
    }

    #[test]
    fn the_shortest_interval_leans_to_the_dense_side() {
        let mut trials: Vec<f64> = (0..10_000).map(|i| f64::from(i) * f64::from(i)).collect();
        let t = tally(&mut trials).unwrap();
        assert_eq!(t.short_low, 0.0);
        assert!(t.short_high < t.high);
    }
}
