//! Monte Carlo propagation of distributions, in blocks until stable.
//!
//! Source: JCGM 101, 7.9 (adaptive procedure). One deviation: the estimates
//! are means over blocks of 10 000 trials, as the procedure's own stability
//! test takes them, instead of being taken once more from all trials at the
//! end. That keeps memory constant; the bias of a block's quantile is of the
//! order of u/10 000.

use super::tally::{Tally, tally};
use crate::method::WIDTH;
use crate::plan::{Block, Plan, SlotId, Stage};
use crate::stats::{Generator, Ziggurat};
use crate::units::{Kind, decimals_for};
use rayon::prelude::*;

/// Trials in one block (JCGM 101, 7.9.4: at least 10 000).
pub const BLOCK: usize = 10_000;
/// Fewest blocks: 10⁴/(1 − p) trials for p = 0.95 (JCGM 101, 7.2.2, note 1).
const FEWEST: usize = 20;
/// Most blocks that the adaptive procedure takes.
const MOST: usize = 400;
/// Blocks between two looks at the stability.
const STEP: usize = 20;

/// How many trials to make.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Trials {
    /// Until every printed digit is stable, at most four million.
    UntilStable,
    /// This many, rounded up to whole blocks.
    Fixed(u64),
    /// One block, to see what the entries reach; bands are not judged by it.
    Look,
}

/// One result's distribution.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Sampled {
    /// Mean.
    pub value: f64,
    /// Standard deviation.
    pub u: f64,
    /// Lower end of the probabilistically symmetric 95 % interval.
    pub low: f64,
    /// Upper end.
    pub high: f64,
    /// Ends of the shortest 95 % interval.
    pub shortest: (f64, f64),
    /// Exceeded with a probability of 95 %: the one-sided lower bound.
    pub least: f64,
    /// Standard errors of value, u, low and high.
    pub errors: [f64; 4],
}

/// All results' distributions.
#[derive(Debug, Clone, Default)]
pub struct Sampling {
    /// Trials made.
    pub trials: u64,
    /// Trials that were physically impossible in some result.
    pub impossible: u64,
    /// Those that were so in a travel already.
    pub impossible_travel: u64,
    /// Whether every printed digit is stable.
    pub stable: bool,
    /// The results, in the order asked for; `None` where too few trials were
    /// possible.
    pub results: Vec<Option<Sampled>>,
    /// For each result the probability of each of its limits being exceeded,
    /// with its standard error.
    pub above: Vec<Vec<(f64, f64)>>,
}

/// A slot whose distribution is wanted.
#[derive(Debug, Clone)]
pub struct Wanted {
    /// The slot.
    pub slot: SlotId,
    /// What it hangs on: results of an impact are possible together or not.
    pub stage: Stage,
    /// Its value at the best estimates; angles are counted from there, so that
    /// none is cut at ±180°.
    pub centre: f64,
    /// The reader's unit (SI per unit), to which the stability of printed
    /// digits refers.
    pub scale: f64,
    /// Least value that is physically possible, SI: a speed at impact below
    /// zero would have come from the other side.
    pub floor: f64,
    /// Limits (SI) whose probability of being exceeded is wanted.
    pub limits: Vec<f64>,
}

/// One block's estimates of all results.
struct BlockTally {
    impossible: (u64, u64),
    results: Vec<Option<Tally>>,
    /// Trials kept of each result, and how many of them exceed each limit.
    counts: Vec<(usize, Vec<usize>)>,
}

/// Draws and evaluates until the wanted slots are known to `trials`' demand.
pub fn sample(plan: &Plan, wanted: &[Wanted], seed: u64, trials: Trials) -> Sampling {
    let ziggurat = Ziggurat::default();
    let run = |first: usize, count: usize| -> Vec<BlockTally> {
        (first..first + count)
            .into_par_iter()
            .map_init(|| Workspace::new(plan, wanted), |w, block| w.run(plan, wanted, seed, block, &ziggurat))
            .collect()
    };
    let mut blocks = Vec::new();
    loop {
        let count = match trials {
            Trials::Fixed(n) => {
                usize::try_from(n.div_ceil(BLOCK as u64)).unwrap_or(usize::MAX).clamp(1, 100_000)
            }
            Trials::Look => 1,
            Trials::UntilStable if blocks.is_empty() => FEWEST,
            Trials::UntilStable => STEP,
        };
        blocks.extend(run(blocks.len(), count));
        let sampling = summed(&blocks, wanted);
        let enough = trials != Trials::UntilStable || blocks.len() >= MOST;
        if enough || sampling.stable {
            return sampling;
        }
    }
}

/// Columns that one thread reuses.
struct Workspace {
    block: Block,
    columns: Vec<Vec<f64>>,
}

impl Workspace {
    fn new(plan: &Plan, wanted: &[Wanted]) -> Self {
        let slots: Vec<SlotId> = wanted.iter().map(|w| w.slot).collect();
        Workspace { block: Block::new(plan, &slots), columns: vec![Vec::with_capacity(BLOCK); wanted.len()] }
    }

    fn run(
        &mut self,
        plan: &Plan,
        wanted: &[Wanted],
        seed: u64,
        block: usize,
        ziggurat: &Ziggurat,
    ) -> BlockTally {
        let mut rng = Generator::new(seed, block as u64);
        self.columns.iter_mut().for_each(Vec::clear);
        let mut impossible = (0, 0);
        for _ in 0..BLOCK / WIDTH {
            self.block.draw(plan, ziggurat, &mut rng);
            self.block.compute(plan);
            let (any, travel) = self.keep(wanted);
            impossible = (impossible.0 + any, impossible.1 + travel);
        }
        for (column, w) in self.columns.iter_mut().zip(wanted) {
            if plan.slot(w.slot).kind == Kind::Angle {
                column.iter_mut().for_each(|v| *v = near(*v, w.centre));
            }
        }
        let over = |column: &[f64], limit: f64| column.iter().filter(|v| **v > limit).count();
        let counts = self
            .columns
            .iter()
            .zip(wanted)
            .map(|(c, w)| (c.len(), w.limits.iter().map(|limit| over(c, *limit)).collect()))
            .collect();
        BlockTally { impossible, results: self.columns.iter_mut().map(|c| tally(c)).collect(), counts }
    }

    /// Keeps the possible trials of one batch and counts the others. A crash
    /// that is impossible in one result of its impact is possible in none of
    /// them; what was found before the impact was looked at stands by itself.
    /// Gives the impossible trials, and those that were so in a travel already.
    fn keep(&mut self, wanted: &[Wanted]) -> (u64, u64) {
        // Zero where every result of the stage is a number, else not a number.
        let (mut travel, mut impact) = ([0.0; WIDTH], [0.0; WIDTH]);
        for w in wanted {
            let sum = if w.stage == Stage::Impact { &mut impact } else { &mut travel };
            let possible = |v: f64| if v >= w.floor { 0.0 } else { f64::NAN };
            sum.iter_mut().zip(self.block.trials(w.slot)).for_each(|(sum, v)| *sum += possible(*v));
        }
        let joint: Vec<usize> = (0..WIDTH).filter(|t| impact[*t] == 0.0).collect();
        for (column, w) in self.columns.iter_mut().zip(wanted) {
            let trials = self.block.trials(w.slot);
            match w.stage {
                Stage::Impact => column.extend(joint.iter().map(|t| trials[*t])),
                Stage::Travel => column.extend(trials.iter().filter(|v| v.is_finite())),
            }
        }
        let any = travel.iter().zip(&impact).filter(|(t, i)| **t + **i != 0.0).count();
        (any as u64, travel.iter().filter(|t| **t != 0.0).count() as u64)
    }
}

/// The same direction, at most half a turn from `centre`.
fn near(angle: f64, centre: f64) -> f64 {
    let turns = (angle - centre) / std::f64::consts::TAU;
    angle - libm::round(turns) * std::f64::consts::TAU
}

/// Joins the blocks in the order of their numbers.
fn summed(blocks: &[BlockTally], wanted: &[Wanted]) -> Sampling {
    let impossible = blocks.iter().map(|b| b.impossible.0).sum();
    let impossible_travel = blocks.iter().map(|b| b.impossible.1).sum();
    let mut stable = true;
    let results = (0..wanted.len())
        .map(|i| {
            let tallies: Option<Vec<Tally>> =
                blocks.iter().map(|b| b.results.get(i).copied().flatten()).collect();
            let sampled = join(&tallies?);
            stable &= is_stable(&sampled, wanted[i].scale);
            Some(sampled)
        })
        .collect();
    let above = (0..wanted.len()).map(|i| exceeded(blocks, i, wanted[i].limits.len())).collect();
    Sampling { trials: (blocks.len() * BLOCK) as u64, impossible, impossible_travel, stable, results, above }
}

/// Shares of the trials of result `i` above each of its limits, with the
/// standard errors of counting.
fn exceeded(blocks: &[BlockTally], i: usize, limits: usize) -> Vec<(f64, f64)> {
    let kept: usize = blocks.iter().map(|b| b.counts[i].0).sum();
    let share = |limit: usize| {
        let over: usize = blocks.iter().map(|b| b.counts[i].1[limit]).sum();
        let p = over as f64 / kept.max(1) as f64;
        (p, (p * (1.0 - p) / kept.max(1) as f64).sqrt())
    };
    (0..limits).map(share).collect()
}

fn join(tallies: &[Tally]) -> Sampled {
    let (value, value_error) = mean_and_error(tallies, |t| t.mean);
    let (variance, variance_error) = mean_and_error(tallies, |t| t.variance);
    let (low, low_error) = mean_and_error(tallies, |t| t.low);
    let (high, high_error) = mean_and_error(tallies, |t| t.high);
    let (short_low, _) = mean_and_error(tallies, |t| t.short_low);
    let (short_high, _) = mean_and_error(tallies, |t| t.short_high);
    let (least, _) = mean_and_error(tallies, |t| t.least);
    let u = variance.max(0.0).sqrt();
    let u_error = if u > 0.0 { variance_error / (2.0 * u) } else { 0.0 };
    let errors = [value_error, u_error, low_error, high_error];
    Sampled { value, u, low, high, shortest: (short_low, short_high), least, errors }
}

/// Mean over blocks and its standard error (7.9.4, steps f and g).
fn mean_and_error(tallies: &[Tally], of: impl Fn(&Tally) -> f64) -> (f64, f64) {
    let h = tallies.len() as f64;
    let mean = tallies.iter().map(&of).sum::<f64>() / h;
    let squares: f64 = tallies.iter().map(|t| (of(t) - mean) * (of(t) - mean)).sum();
    if tallies.len() < 2 {
        // One block says nothing about its own error.
        return (mean, f64::INFINITY);
    }
    (mean, (squares / (h * (h - 1.0))).sqrt())
}

/// Twice the standard error lies within half a unit of the last printed digit
/// (7.9.2 and 7.9.4, step i).
fn is_stable(s: &Sampled, scale: f64) -> bool {
    let Some(decimals) = decimals_for(s.u / scale) else { return true };
    let half_unit = 0.5 * libm::pow(10.0, f64::from(-decimals)) * scale;
    s.errors.iter().all(|e| 2.0 * e < half_unit)
}
