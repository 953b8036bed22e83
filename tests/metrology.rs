//! Uncertainty against published metrology: the Guide (JCGM 100), its
//! supplement on Monte Carlo (JCGM 101), Type A evaluations.
//!
//! Plans are built by hand, with formulas defined here, so that the engine's
//! own propagation is tested and nothing of crashes.
//!
//! Not covered, because the arithmetic of formulas or the inputs do not offer
//! it: ln of a rectangular quantity (NPL DEM-ES-011 9.2), correlated inputs,
//! 99 % intervals, sensitivity indices (Ishigami), network adjustment.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod common;

use common::{near, outcome, printed, prints};
use retrodict::diag::Severity;
use retrodict::formula;
use retrodict::method::Node;
use retrodict::plan::{Builder, Input, Plan, Role, SlotId, Sought, Stage};
use retrodict::stats::{Dist, TypeA, student_t_two_sided, type_a, welch_satterthwaite};
use retrodict::uncertainty::{Band, Basis, Linear, Sampled, Trials, Wanted, bands, linear, sample};

// ---- Plans by hand ----------------------------------------------------------

/// A plan of one formula applied to inputs of its own; its result's slot.
fn plan(node: &'static dyn Node, inputs: &[Dist]) -> (Plan, SlotId) {
    let mut b = Builder::default();
    let ports = node.card().inputs;
    assert_eq!(ports.len(), inputs.len(), "{}", node.card().id);
    let slots: Vec<SlotId> = ports
        .iter()
        .zip(inputs)
        .map(|(port, dist)| {
            let input = Input {
                slot: SlotId(0),
                dist: *dist,
                role: Role::Measured,
                bounds: (f64::NEG_INFINITY, f64::INFINITY),
                name: port.name.into(),
                entered: String::new(),
                source: None,
                note: None,
                place: None,
            };
            b.input(port.symbol, port.kind, input)
        })
        .collect();
    b.section("test");
    let out = b.call(node, &slots, "y", "result", None);
    b.result((Sought::ClosingSpeed, Stage::Impact), None, "result", out, None);
    (b.finish(), out)
}

fn propagated(node: &'static dyn Node, inputs: &[Dist]) -> Linear {
    let (plan, out) = plan(node, inputs);
    linear(&plan, &plan.evaluate(&plan.estimates()), out).expect("a value")
}

/// Both propagations and the band made of them, with this many trials.
fn both(node: &'static dyn Node, inputs: &[Dist], trials: u64) -> (Linear, Sampled, Band) {
    let (plan, out) = plan(node, inputs);
    let evaluation = plan.evaluate(&plan.estimates());
    let line = linear(&plan, &evaluation, out).expect("a value");
    let wanted = [Wanted {
        slot: out,
        stage: Stage::Impact,
        centre: line.value,
        scale: 1.0,
        floor: f64::NEG_INFINITY,
        limits: Vec::new(),
    }];
    let sampling = sample(&plan, &wanted, 101, Trials::Fixed(trials));
    assert_eq!((sampling.trials, sampling.impossible), (trials, 0));
    let band = bands(vec![Some(line.clone())], &sampling, &wanted).remove(0).expect("a band");
    (line, sampling.results[0].expect("a distribution"), band)
}

/// A Monte Carlo figure against a published one: three standard errors of our
/// own, plus half a unit of the published last digit.
#[track_caller]
fn sampled_prints(what: &str, got: f64, error: f64, unit: f64, figure: &str) {
    let p = printed(figure);
    near(what, got / unit, p.value, 3.0 * error / unit + p.half_unit);
}

fn rectangular(centre: f64, half: f64) -> Dist {
    Dist::Rectangular { lo: centre - half, hi: centre + half }
}

fn normal(mean: f64, sd: f64) -> Dist {
    Dist::Normal { mean, sd }
}

// ---- JCGM 100 -----------------------------------------------------------------

formula! {
    /// JCGM 100 H.1.2, equation H.3: an end gauge against a standard of 20 °C.
    EndGauge, "end-gauge", "test", "Length of an end gauge at 20 °C";
    in ls: Length "l_{S}" "length of the standard", d: Length "d" "mean of five differences",
       d1: Length "d_{1}" "random effects of the comparator", d2: Length "d_{2}" "its systematic effects",
       alpha: Ratio "α_{S}" "expansion of the standard", dalpha: Ratio "δα" "difference of expansion",
       theta: Ratio "θ" "departure from 20 °C", dtheta: Ratio "δθ" "difference of temperature";
    out Length "l" "length at 20 °C";
    undefined "no length";
    source "JCGM 100 H.1.2, equation H.3";
    = ls + d + d1 + d2 - ls * (dalpha * theta + alpha * dtheta)
}

const NM: f64 = 1e-9;

/// The inputs of JCGM 100 H.1 (found: PyPI suncal 1.7.1, ex_endgauge.yaml).
/// The split of d's 25.6 degrees of freedom into 24, 5 and 8 is H.1.3.2's,
/// from memory; that it gives 25.6 is tested below.
fn end_gauge() -> [Dist; 8] {
    let t = |mean: f64, scale: f64, dof: u32| Dist::StudentT { mean, scale, dof };
    // A rectangular quantity whose width is known to ν degrees of freedom.
    let root3 = 3_f64.sqrt();
    [
        t(50_000_623.0 * NM, 25.0 * NM, 18),
        t(215.0 * NM, 5.8 * NM, 24),
        t(0.0, 3.9 * NM, 5),
        t(0.0, 6.7 * NM, 8),
        rectangular(11.5e-6, 2e-6),
        t(0.0, 1e-6 / root3, 50),
        normal(-0.1, 0.41),
        t(0.0, 0.05 / root3, 2),
    ]
}

/// JCGM 100 H.1: u_c = 32 nm, ν_eff = 16 (found; the Guide cuts ν to the whole
/// number below, G.4.1). l = 50.000838 mm from memory.
#[test]
fn gum_h1_end_gauge() {
    let line = propagated(EndGauge::NODE, &end_gauge());
    prints("u", line.u, NM, "32");
    near("whole degrees of freedom", line.dof.floor(), 16.0, 0.0);
    prints("l", line.value, 1e-3, "50.000838");
    // Table G.2 for 95 %: 2.12 at 16 degrees of freedom, 2.11 at 17.
    assert!(line.k < 2.125 && line.k > 2.105, "k = {}", line.k);
    // Contributions as H.1.3 prints them (memory): 25, 16.6 and 2.9 nm; that of
    // the standard's expansion and of the mean temperature is zero.
    let part = |input: usize| line.shares.iter().find(|s| s.input == input).map(|s| s.part.abs());
    prints("standard", part(0).unwrap(), NM, "25");
    prints("difference of temperature", part(7).unwrap(), NM, "16.6");
    prints("difference of expansion", part(5).unwrap(), NM, "2.9");
    assert_eq!((part(4), part(6)), (None, None));
    near("shares add up", line.shares.iter().map(|s| s.of_variance).sum(), 1.0, 1e-12);
}

/// The three parts of d: 9.7 nm with 25.6 degrees of freedom (found, same).
#[test]
fn gum_h1_effective_degrees_of_freedom_of_the_difference() {
    let parts = [(5.8, Some(24.0)), (3.9, Some(5.0)), (6.7, Some(8.0))];
    let u = parts.iter().map(|(u, _)| u * u).sum::<f64>().sqrt();
    prints("u", u, 1.0, "9.7");
    // The Guide goes on with its rounded 9.7, whose fourth power counts.
    let rounded = 9.7 / u;
    prints("dof", welch_satterthwaite(parts) * rounded * rounded * rounded * rounded, 1.0, "25.6");
}

/// Found (suncal 1.7.1 test): 0.57 with 9 degrees of freedom and 0.25 with
/// infinitely many give 12.8; here through a plan.
#[test]
fn welch_satterthwaite_through_a_plan() {
    let inputs = [Dist::StudentT { mean: 1.0, scale: 0.57, dof: 9 }, normal(2.0, 0.25)];
    let line = propagated(retrodict::physics::path::LongerPath::NODE, &inputs);
    prints("dof", line.dof, 1.0, "12.8");
    near("u", line.u, 0.57_f64.hypot(0.25), 1e-15);
}

/// JCGM 100 H.2 (data found in suncal 1.7.1, test_GUMH2.csv; verified): five
/// simultaneous readings of V, I and φ. Inputs of the program are independent,
/// these are correlated, so this is the Guide's second approach (H.2.4): R, X
/// and Z of each set of readings, then their Type A evaluation.
#[test]
fn gum_h2_resistance_reactance_impedance() {
    let v = [5.007, 4.994, 5.005, 4.990, 4.999];
    let i = [19.663e-3, 19.639e-3, 19.640e-3, 19.685e-3, 19.678e-3];
    let phi = [1.0456, 1.0438, 1.0468, 1.0428, 1.0433];
    let each = |of: fn(f64) -> f64| -> TypeA {
        let sets: Vec<f64> = (0..5).map(|k| v[k] / i[k] * of(phi[k])).collect();
        type_a(&sets).unwrap()
    };
    let [r, x, z] = [each(libm::cos), each(libm::sin), each(|_| 1.0)];
    prints("R", r.mean, 1.0, "127.732");
    prints("X", x.mean, 1.0, "219.847");
    prints("Z", z.mean, 1.0, "254.260");
    prints("u(R)", r.of_the_mean(), 1.0, "0.071");
    prints("u(Z)", z.of_the_mean(), 1.0, "0.236");
    // The Guide prints 0.295 for 0.2956 (recomputed), cut and not rounded.
    near("u(X)", x.of_the_mean(), 0.295, 0.001);
    // The recomputed figures are those of the first approach. The two differ by
    // terms of second order: ½ Z s², s the largest relative scatter, that of φ.
    let s = type_a(&phi).unwrap().s;
    let second_order = 0.5 * z.mean * s * s;
    for (what, got, first) in [("R", r, 0.071_071_41), ("X", x, 0.295_581_68), ("Z", z, 0.236_336_13)] {
        near(what, got.of_the_mean(), first, second_order);
        assert_eq!(got.dof(), 4);
    }
}

// ---- JCGM 101 -----------------------------------------------------------------

formula! {
    /// JCGM 101, 9.2: the sum of four.
    FourSum, "four-sum", "test", "Sum of four";
    in a: Ratio "X_{1}" "first", b: Ratio "X_{2}" "second", c: Ratio "X_{3}" "third", d: Ratio "X_{4}" "fourth";
    out Ratio "Y" "sum";
    undefined "no sum";
    source "JCGM 101, 9.2.1";
    = a + b + c + d
}

formula! {
    /// JCGM 101, 9.4: comparison loss in microwave power meter calibration.
    ComparisonLoss, "comparison-loss", "test", "Comparison loss";
    in a: Ratio "X_{1}" "real part", b: Ratio "X_{2}" "imaginary part";
    out Ratio "Y" "loss";
    undefined "no loss";
    source "JCGM 101, 9.4.1";
    = a.squared() + b.squared()
}

const MILLION: u64 = 1_000_000;

/// JCGM 101, 9.2.2: four standard normals; u 2.0, interval ±3.92 by both
/// (found: suncal 1.7.1 test; verified).
#[test]
fn jcgm101_four_normals() {
    let (line, mc, band) = both(FourSum::NODE, &[normal(0.0, 1.0); 4], MILLION);
    prints("linear u", line.u, 1.0, "2.0");
    prints("linear interval", line.high(), 1.0, "3.92");
    sampled_prints("u", mc.u, mc.errors[1], 1.0, "2.0");
    sampled_prints("high", mc.high, mc.errors[3], 1.0, "3.92");
    sampled_prints("low", mc.low, mc.errors[2], 1.0, "-3.92");
    sampled_prints("mean", mc.value, mc.errors[0], 1.0, "0.0");
    assert_eq!(band.basis, Basis::Linear);
    // Closed form: the errors themselves are those of a million trials.
    near("standard error of the mean", mc.errors[0], 2.0 / 1000.0, 0.3 * 2.0 / 1000.0);
}

/// JCGM 101, 9.2.3: four rectangular quantities of standard deviation 1; u
/// 2.0, interval ±3.88, by linear propagation ±3.92 (found; verified).
#[test]
fn jcgm101_four_rectangulars() {
    let (line, mc, _) = both(FourSum::NODE, &[rectangular(0.0, 3_f64.sqrt()); 4], MILLION);
    prints("linear u", line.u, 1.0, "2.0");
    prints("linear interval", line.high(), 1.0, "3.92");
    sampled_prints("u", mc.u, mc.errors[1], 1.0, "2.0");
    sampled_prints("high", mc.high, mc.errors[3], 1.0, "3.88");
    sampled_prints("low", mc.low, mc.errors[2], 1.0, "-3.88");
    // The test can tell the two apart.
    assert!(3.0 * mc.errors[3] + 0.005 < 0.04, "too few trials: {:?}", mc.errors);
}

/// JCGM 101, 9.2.4 (memory): as before, the fourth with standard deviation 10;
/// u 10.1, interval ±17.0, by linear propagation ±19.9.
#[test]
fn jcgm101_one_dominating_rectangular() {
    let (line, mc, _) = dominated();
    prints("linear u", line.u, 1.0, "10.1");
    prints("linear interval", line.high(), 1.0, "19.9");
    sampled_prints("u", mc.u, mc.errors[1], 1.0, "10.1");
    sampled_prints("high", mc.high, mc.errors[3], 1.0, "17.0");
    sampled_prints("low", mc.low, mc.errors[2], 1.0, "-17.0");
}

fn dominated() -> (Linear, Sampled, Band) {
    let unit = rectangular(0.0, 3_f64.sqrt());
    both(FourSum::NODE, &[unit, unit, unit, rectangular(0.0, 300_f64.sqrt())], MILLION)
}

/// In that example linear propagation is not validated (JCGM 101, 9.2.4, from
/// memory: δ = 0.5 with two digits of u): its interval is 17 % too wide.
#[test]
fn jcgm101_one_dominating_rectangular_is_not_left_to_linear_propagation() {
    let (_, _, band) = dominated();
    assert_eq!(band.basis, Basis::MonteCarlo, "difference and what is allowed: {:?}", band.difference);
}

/// JCGM 101, 9.4, table 6 (memory; verified): X₁ = 0 and 0.010, X₂ = 0, u =
/// 0.005 each, uncorrelated; shortest 95 % intervals, values times 1e-6.
#[test]
fn jcgm101_comparison_loss_is_left_to_monte_carlo() {
    let unit = 1e-6;
    for (x1, y, u, high, exact_y, exact_u, line) in [
        (0.0, "50", "50", "150", 50.0, 50.0, ["0", "0", "0", "0"]),
        (0.010, "150", "112", "367", 150.0, 12_500_f64.sqrt(), ["100", "100", "-96", "296"]),
    ] {
        let (linear, mc, band) =
            both(ComparisonLoss::NODE, &[normal(x1, 0.005), normal(0.0, 0.005)], MILLION);
        for (what, got, figure) in [
            ("linear y", linear.value, line[0]),
            ("linear u", linear.u, line[1]),
            ("linear low", linear.low(), line[2]),
            ("linear high", linear.high(), line[3]),
        ] {
            prints(what, got, unit, figure);
        }
        sampled_prints("y", mc.value, mc.errors[0], unit, y);
        sampled_prints("u", mc.u, mc.errors[1], unit, u);
        // Closed forms: mean x₁² + 2 u², variance 4 u² x₁² + 4 u⁴.
        near("y, exact", mc.value / unit, exact_y, 3.0 * mc.errors[0] / unit);
        near("u, exact", mc.u / unit, exact_u, 3.0 * mc.errors[1] / unit);
        // The shortest interval starts at the impossible-below zero. Its ends
        // carry the error of the upper end of the other interval.
        near("shortest, low", mc.shortest.0 / unit, 0.0, 0.5);
        sampled_prints("shortest, high", mc.shortest.1, mc.errors[3], unit, high);
        assert!(mc.shortest.1 - mc.shortest.0 < mc.high - mc.low, "the shortest interval is not the shorter");
        assert_eq!(band.basis, Basis::MonteCarlo);
        assert!(band.difference.0 > band.difference.1, "{:?}", band.difference);
        assert!(band.low >= 0.0 && (band.high, band.u) == (mc.high, mc.u), "{band:?}");
    }
}

formula! {
    /// NIST TN 1900, example E13: thermal expansion coefficient.
    Expansion, "expansion", "test", "Thermal expansion coefficient";
    in l0: Length "L_{0}" "length at first", t0: Ratio "T_{0}" "temperature at first", l1: Length "L_{1}" "length at last",
       t1: Ratio "T_{1}" "temperature at last";
    out Ratio "α" "expansion coefficient";
    undefined "no coefficient";
    source "NIST TN 1900, example E13";
    = (l1 - l0) / (l0 * (t1 - t0))
}

fn expansion(shrink: f64) -> [Dist; 4] {
    let t = |mean: f64, scale: f64| Dist::StudentT { mean, scale: scale * shrink, dof: 3 };
    [t(1.4999, 0.0001), t(288.15, 0.02), t(1.5021, 0.0002), t(373.10, 0.05)]
}

/// NIST TN 1900, E13 (found: suncal 1.7.1 test): all inputs t with 3 degrees
/// of freedom; linear 1.7266e-5, u 1.76e-6.
#[test]
fn tn1900_expansion_coefficient_linear() {
    let line = propagated(Expansion::NODE, &expansion(1.0));
    prints("y", line.value, 1.0, "1.7266e-5");
    prints("u", line.u, 1.0, "1.76e-6");
    // Welch–Satterthwaite: nearly all from the two lengths, with u 1 and 2.
    near("dof", line.dof, 3.0 * 25.0 / 17.0, 0.01);
}

/// The same by Monte Carlo: 1.7268e-5 (found, same). There the figures are
/// standard deviations; for 3 degrees of freedom a t's standard deviation is
/// √3 times its scale (JCGM 101, 6.4.9.4), so scales are these over √3. The
/// result is almost linear in its inputs, so that its standard deviation is the
/// linear 1.76e-6; the 1.74e-6 printed there is one run of an estimate whose
/// own variance is infinite (a t's fourth moment with 3 degrees of freedom),
/// and is not compared.
#[test]
fn tn1900_expansion_coefficient_sampled() {
    let (_, mc, _) = both(Expansion::NODE, &expansion(1.0 / 3_f64.sqrt()), MILLION);
    sampled_prints("y", mc.value, mc.errors[0], 1.0, "1.7268e-5");
    sampled_prints("u", mc.u, mc.errors[1], 1.0, "1.76e-6");
}

/// A scaled and shifted t by itself: its standard deviation and the ends of
/// its interval (JCGM 101, 6.4.9; table G.2 of JCGM 100: 2.26 at 9).
#[test]
fn a_students_t_comes_out_as_it_went_in() {
    let inputs = [Dist::StudentT { mean: 25.0, scale: 0.5, dof: 9 }, Dist::Exact(0.0)];
    let (line, mc, _) = both(retrodict::physics::path::LongerPath::NODE, &inputs, MILLION);
    near("linear u is the scale", line.u, 0.5, 1e-15);
    near("standard deviation", mc.u, 0.5 * (9.0_f64 / 7.0).sqrt(), 3.0 * mc.errors[1]);
    sampled_prints("high", mc.high - 25.0, mc.errors[3], 0.5, "2.26");
    sampled_prints("low", mc.low - 25.0, mc.errors[2], 0.5, "-2.26");
}

// ---- Type A ----------------------------------------------------------------------

/// The half-width of the 95 % interval of a mean, from a plan whose one
/// uncertain input is the Type A evaluation.
fn half_width(t: TypeA) -> f64 {
    let inputs = [Dist::StudentT { mean: t.mean, scale: t.of_the_mean(), dof: t.dof() }, Dist::Exact(0.0)];
    let line = propagated(retrodict::physics::path::LongerPath::NODE, &inputs);
    near("mean", line.value, t.mean, 1e-12);
    line.high() - line.value
}

/// Ten pulls of a drag sled: the readings are a published worked sample's
/// (Masory & Wright, Statistics, tarorigin.com); mean 25.0, s 1.83, t 2.262 at 9 degrees
/// of freedom and half-width 1.31 are derived there.
#[test]
fn ten_pulls_of_a_sled() {
    let t = type_a(&[25.0, 23.0, 22.0, 24.0, 25.0, 28.0, 27.0, 26.0, 26.0, 24.0]).unwrap();
    prints("mean", t.mean, 1.0, "25.0");
    prints("s", t.s, 1.0, "1.83");
    prints("t", student_t_two_sided(9.0), 1.0, "2.262");
    prints("half-width", half_width(t), 1.0, "1.31");
}

/// E29, http://tarorigin.com/art/Omasory/Dragfactor/dsled.html: mean 39.9, s
/// 1.52, t 2.26, half-width 1.08 to 1.09 (found); 1.523884 and 1.090045
/// recomputed.
#[test]
fn e29_ten_pulls_of_a_sled() {
    let t = type_a(&[42.0, 40.0, 40.0, 38.0, 38.0, 40.0, 42.0, 38.0, 40.0, 41.0]).unwrap();
    prints("mean", t.mean, 1.0, "39.9");
    prints("s", t.s, 1.0, "1.52");
    prints("s, recomputed", t.s, 1.0, "1.523884");
    prints("half-width", half_width(t), 1.0, "1.09");
    // Recomputed with t = 2.262 to four digits; half a unit of t is 0.0002.
    near("half-width, recomputed", half_width(t), 1.090_045, 5e-4 * t.of_the_mean() + 5e-7);
}

/// A case whose friction comes from these test skids.
fn skids(readings: &str) -> String {
    format!(
        "format = 1\n[case]\nnumber = \"M\"\ntitle = \"test skids\"\n[friction_test.F]\nsurface = \"road\"\n\
         braking = \"locked\"\ndrag_factor = {readings}\nstands_for = \"surface mean\"\n[unit.A]\n\
         [[unit.A.to_rest.travel]]\ndistance = \"20 m\"\nwheels = \"all locked\"\nfriction = \"F\"\n"
    )
}

/// A published example took t = 4.30, which is that of three readings, for two
/// skids (JCGM 100 table G.2 has 12.7); fewer than four are refused (rule B-3).
#[test]
fn two_or_three_test_skids_are_refused() {
    prints("t of two", student_t_two_sided(1.0), 1.0, "12.7");
    prints("t of three", student_t_two_sided(2.0), 1.0, "4.30");
    for (readings, refused) in [
        ("[0.72]", true),
        ("[0.71, 0.74]", true),
        ("[0.71, 0.74, 0.72]", true),
        ("[0.71, 0.74, 0.72, 0.73]", false),
    ] {
        let o = outcome(&skids(readings));
        let b3 = o.notices.iter().any(|n| n.code == "B-3" && n.severity == Severity::Stop);
        assert_eq!((b3, o.analysis.is_none()), (refused, refused), "{readings}\n{}", common::notices(&o));
    }
}

/// Four readings by hand through a case: mean, s/√n for the surface's mean and
/// t's 3 degrees of freedom (JCGM 100, 4.2; table G.2: 3.18).
#[test]
fn four_test_skids_carry_their_own_t() {
    let o = outcome(&skids("[0.70, 0.72, 0.74, 0.76]"));
    let analysis = o.analysis.expect("an analysis");
    let input = analysis.plan.inputs.iter().find(|i| i.name.contains("friction test F")).unwrap();
    let Dist::StudentT { mean, scale, dof } = input.dist else { panic!("{:?}", input.dist) };
    near("mean", mean, 0.73, 1e-15);
    // s² = (9 + 1 + 1 + 9)e-4/3; u² = s²/4.
    near("u", scale, (20e-4_f64 / 12.0).sqrt(), 1e-15);
    assert_eq!(dof, 3);
    prints("t", student_t_two_sided(3.0), 1.0, "3.18");
}

// ---- The same bytes -----------------------------------------------------------------

/// All bits of a sampling and of a whole report, on this many threads.
fn bits(threads: usize, seed: u64) -> (Vec<u64>, String) {
    let pool = rayon::ThreadPoolBuilder::new().num_threads(threads).build().unwrap();
    pool.install(|| {
        let inputs = [
            rectangular(0.0, 1.0),
            normal(0.0, 1.0),
            Dist::StudentT { mean: 0.0, scale: 1.0, dof: 3 },
            normal(1.0, 2.0),
        ];
        let (plan, out) = plan(FourSum::NODE, &inputs);
        let wanted = [Wanted {
            slot: out,
            stage: Stage::Impact,
            centre: 1.0,
            scale: 1.0,
            floor: f64::NEG_INFINITY,
            limits: Vec::new(),
        }];
        let sampling = sample(&plan, &wanted, seed, Trials::Fixed(170_000));
        let s = sampling.results[0].unwrap();
        let all = [s.value, s.u, s.low, s.high, s.shortest.0, s.shortest.1].into_iter().chain(s.errors);
        let text = skids("[0.70, 0.72, 0.74, 0.76]");
        let options = retrodict::analysis::Options { seed, trials: Trials::UntilStable };
        let o = retrodict::analysis::analyse("c.toml", &text, &|_| Err("no file".into()), options);
        (all.map(f64::to_bits).collect(), retrodict::report::json::render(&o))
    })
}

/// Same seed, same bytes, whatever the number of threads (methods 12); another
/// seed gives others.
#[test]
fn the_same_seed_gives_the_same_bytes_on_one_thread_and_on_two() {
    let one = bits(1, 7);
    assert_eq!(one, bits(2, 7));
    assert_eq!(one, bits(1, 7));
    let other = bits(2, 8);
    assert!(one.0.iter().zip(&other.0).all(|(a, b)| a != b), "another seed gives the same numbers");
    assert_ne!(one.1, other.1);
}

/// On the demo linear propagation and Monte Carlo agree for every speed within
/// the tolerance of JCGM 101, 8.1 (one meaningful digit of u, at most u/5); for
/// the directions of force and the energy they do not, and the notices say so.
#[test]
fn on_the_demo_both_propagations_agree_for_every_speed() {
    let o = common::case_file("quarry-road.toml", Trials::Fixed(1_000_000));
    let said = common::notices(&o);
    for r in &o.analysis.unwrap().results {
        let is_speed = r.named.id.contains("speed") || r.named.id.ends_with("delta_v");
        if is_speed {
            assert_eq!(r.band.basis, Basis::Linear, "{}: {:?}", r.named.id, r.band.difference);
            assert!(r.band.difference.0 <= r.band.difference.1, "{}", r.named.id);
        }
        let named =
            said.contains(&r.named.label) && said.contains("differ by more than the numerical tolerance");
        if r.band.basis == Basis::MonteCarlo {
            assert!(r.band.difference.0 > r.band.difference.1 && named, "{}", r.named.id);
        }
    }
}
