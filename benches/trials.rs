//! The demo's whole chain: trials a second, beside the cost of drawing the
//! same inputs alone and beside the same chain in vectorised NumPy.
//!
//! `cargo bench --bench trials` runs criterion's groups and then prints the
//! ratios, measured in turns in the same run; `cargo bench --bench trials --
//! ratios` prints the ratios only.

use criterion::{Criterion, Throughput};
use rayon::{ThreadPool, ThreadPoolBuilder};
use retrodict::case::{Checked, read};
use retrodict::method::WIDTH;
use retrodict::plan::{Block, Plan, SlotId, backward};
use retrodict::stats::{Generator, Ziggurat};
use retrodict::uncertainty::{Sampled, Sampling, Trials, Wanted, sample};
use serde_json::Value;
use std::error::Error;
use std::hint::black_box;
use std::path::Path;
use std::process::Command;
use std::time::Instant;

/// Trials in one go of the groups without quantiles.
const TRIALS: usize = 100_000;
/// Trials of one sampling with quantiles.
const SAMPLED: u64 = 1_000_000;
/// Turns in which everything is timed; the best counts.
const TURNS: usize = 5;

type Fallible<T> = Result<T, Box<dyn Error>>;

fn main() -> Fallible<()> {
    let demo = Demo::new()?;
    let pools = [pool(1)?, pool(2)?];
    let mut criterion = Criterion::default().configure_from_args();
    groups(&mut criterion, &demo, &pools);
    criterion.final_summary();
    // Without --bench criterion only tries whether everything runs.
    if std::env::args().any(|a| a == "--bench") { ratios(&demo, &pools) } else { Ok(()) }
}

fn pool(threads: usize) -> Fallible<ThreadPool> {
    Ok(ThreadPoolBuilder::new().num_threads(threads).build()?)
}

/// The plan of the demo and what is asked of it.
struct Demo {
    plan: Plan,
    wanted: Vec<Wanted>,
    ziggurat: Ziggurat,
}

impl Demo {
    fn new() -> Fallible<Self> {
        let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("cases");
        let beside = |name: &str| std::fs::read_to_string(folder.join(name)).map_err(|e| e.to_string());
        let text = beside("quarry-road.toml")?;
        let Checked { case, .. } =
            read("quarry-road.toml", &text, &retrodict::analysis::method_errors(), &beside);
        let case = case.ok_or("the demo has faults")?;
        let plan = backward(&case).plan;
        let values = plan.evaluate(&plan.estimates()).values;
        let wanted = plan.results.iter().map(|r| {
            let scale = case.identity.system.unit(plan.slot(r.slot).kind).1;
            Wanted {
                slot: r.slot,
                stage: r.stage,
                centre: values[r.slot.0],
                scale,
                floor: f64::NEG_INFINITY,
                limits: Vec::new(),
            }
        });
        let wanted = wanted.collect();
        Ok(Demo { plan, wanted, ziggurat: Ziggurat::default() })
    }

    fn block(&self) -> (Block, Generator) {
        let slots: Vec<SlotId> = self.wanted.iter().map(|w| w.slot).collect();
        (Block::new(&self.plan, &slots), Generator::new(1, 0))
    }

    fn draw(&self, (block, rng): &mut (Block, Generator)) {
        for _ in 0..TRIALS / WIDTH {
            block.draw(&self.plan, &self.ziggurat, rng);
            black_box(&*block);
        }
    }

    fn chain(&self, (block, rng): &mut (Block, Generator)) {
        for _ in 0..TRIALS / WIDTH {
            block.draw(&self.plan, &self.ziggurat, rng);
            block.compute(&self.plan);
            black_box(&*block);
        }
    }

    fn sample(&self, pool: &ThreadPool) -> Sampling {
        let trials = Trials::Fixed(SAMPLED);
        pool.install(|| sample(&self.plan, &self.wanted, 1, trials))
    }
}

fn groups(criterion: &mut Criterion, demo: &Demo, pools: &[ThreadPool; 2]) {
    let mut group = criterion.benchmark_group("one thread");
    group.throughput(Throughput::Elements(TRIALS as u64));
    let mut workspace = demo.block();
    group.bench_function("draws alone", |b| b.iter(|| demo.draw(&mut workspace)));
    group.bench_function("draws and chain", |b| b.iter(|| demo.chain(&mut workspace)));
    group.finish();
    let mut group = criterion.benchmark_group("with quantiles");
    group.throughput(Throughput::Elements(SAMPLED)).sample_size(10);
    for pool in pools {
        let name = format!("{} thread(s)", pool.current_num_threads());
        group.bench_function(name, |b| b.iter(|| black_box(demo.sample(pool))));
    }
    group.finish();
}

/// Best trials a second of each kind of work.
#[derive(Default)]
struct Rates {
    draws: f64,
    chain: f64,
    sampling: [f64; 2],
    numpy: Option<Value>,
}

fn ratios(demo: &Demo, pools: &[ThreadPool; 2]) -> Fallible<()> {
    let mut rates = Rates::default();
    let mut workspace = demo.block();
    for _ in 0..TURNS {
        for _ in 0..TURNS {
            rates.draws = rates.draws.max(rate(TRIALS as f64, || demo.draw(&mut workspace)));
            rates.chain = rates.chain.max(rate(TRIALS as f64, || demo.chain(&mut workspace)));
        }
        for (best, pool) in rates.sampling.iter_mut().zip(pools) {
            *best = best.max(rate(SAMPLED as f64, || demo.sample(pool)));
        }
        let speed = |v: &Option<Value>| v.as_ref().map_or(0.0, |v| number(v, "chain"));
        let numpy = numpy()?;
        if speed(&numpy) > speed(&rates.numpy) {
            rates.numpy = numpy;
        }
    }
    print_rates(&rates);
    match &rates.numpy {
        None => println!("beside NumPy: skipped, python3 has no NumPy"),
        Some(numpy) => beside_numpy(&rates, numpy, demo, &demo.sample(&pools[1])),
    }
    Ok(())
}

/// Trials a second of some work.
fn rate<T>(trials: f64, mut work: impl FnMut() -> T) -> f64 {
    let start = Instant::now();
    black_box(work());
    trials / start.elapsed().as_secs_f64()
}

/// What benches/numpy_chain.py prints; `None` without NumPy.
fn numpy() -> Fallible<Option<Value>> {
    if !Command::new("python3").args(["-c", "import numpy"]).output().is_ok_and(|o| o.status.success()) {
        return Ok(None);
    }
    let script = Path::new(env!("CARGO_MANIFEST_DIR")).join("benches/numpy_chain.py");
    let mut command = Command::new("python3");
    for variable in ["OMP_NUM_THREADS", "OPENBLAS_NUM_THREADS", "MKL_NUM_THREADS"] {
        command.env(variable, "1");
    }
    let output = command.arg(script).output()?;
    if !output.status.success() {
        return Err(String::from_utf8_lossy(&output.stderr).into());
    }
    Ok(Some(serde_json::from_slice(&output.stdout)?))
}

fn number(value: &Value, key: &str) -> f64 {
    value[key].as_f64().unwrap_or(f64::NAN)
}

fn print_rates(rates: &Rates) {
    let [one, two] = rates.sampling.map(|r| r / 1e6);
    println!("\nMillions of trials a second, best of {TURNS} turns");
    println!("  draws alone                  {:6.2}", rates.draws / 1e6);
    println!("  draws and chain              {:6.2}", rates.chain / 1e6);
    println!("  with quantiles, one thread   {one:6.2}");
    println!("  with quantiles, two threads  {two:6.2}");
    println!("time of draws and chain, in draws alone: {:.2} (aim: at most 2)", rates.draws / rates.chain);
    println!("two threads against one: {:.2}", two / one);
}

fn beside_numpy(rates: &Rates, numpy: &Value, demo: &Demo, own: &Sampling) {
    let theirs = number(numpy, "chain");
    println!("  NumPy {}, draws alone      {:6.2}", numpy["numpy"], number(numpy, "draws") / 1e6);
    println!("  NumPy, draws and chain       {:6.2} in batches of {}", theirs / 1e6, numpy["batch"]);
    println!("draws and chain against NumPy, per core: {:.2} (aim: 3.5)", rates.chain / theirs);
    println!("two threads with quantiles against NumPy: {:.2}", rates.sampling[1] / theirs);
    let worst = demo.plan.results.iter().zip(&own.results).map(|(named, sampled)| {
        let gap = sampled.as_ref().map_or(f64::NAN, |s| distance(s, numpy, &named.id));
        assert!(gap < 5.0, "{}: the means differ by {gap} standard errors", named.id);
        gap
    });
    println!("means agree with NumPy's within {:.1} standard errors", worst.fold(0.0, f64::max));
}

/// How far two means are apart, in standard errors of their difference.
fn distance(own: &Sampled, numpy: &Value, id: &str) -> f64 {
    let error = number(&numpy["errors"], id);
    let together = (own.errors[0] * own.errors[0] + error * error).sqrt();
    (own.value - number(&numpy["means"], id)).abs() / together
}
