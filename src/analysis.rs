//! One analysis: a checked case and options in; plan, worksheet, bands and
//! notices out.
//!
//! What the command line and library users call. It hands numbers from one
//! step to the next, so that the steps need not know each other.

use crate::case::{Case, Checked, Question};
use crate::diag::{Notice, Notices, Severity, SourceFile, nearest};
use crate::method::MethodError;
use crate::physics::METHODS;
use crate::plan::{Evaluation, Named, Plan, Planned, SlotId, SlotRefusal, Sought, Stage, backward};
use crate::rules::{Facts, Withheld, apply};
use crate::sheet::{Line, Numbering, Row, lines, register};
use crate::uncertainty::{Band, Sampling, Trials, Wanted, bands, linear, sample, standard_uncertainty};
use sha2::{Digest, Sha256};

/// What an analysis may be told.
#[derive(Debug, Clone, Copy)]
pub struct Options {
    /// Seed of the random numbers.
    pub seed: u64,
    /// How many trials.
    pub trials: Trials,
}

impl Default for Options {
    fn default() -> Self {
        Options { seed: 1, trials: Trials::UntilStable }
    }
}

/// A result that stands.
#[derive(Debug, Clone)]
pub struct Answered {
    /// Its name.
    pub named: Named,
    /// Its band.
    pub band: Band,
    /// The number of the line that gives it; `None` for an entry.
    pub line: Option<usize>,
}

/// A question about a limit, with what the trials say.
#[derive(Debug, Clone)]
pub struct Asked {
    /// The question.
    pub question: Question,
    /// The result asked about; `None` when it does not stand.
    pub about: Option<Named>,
    /// Probability that it was above the limit, with its standard error; no
    /// number where the result does not stand, nor is the next.
    pub probability: (f64, f64),
    /// Exceeded with a probability of 95 %, SI.
    pub least: f64,
}

/// Everything an analysis found.
#[derive(Debug)]
pub struct Analysis {
    /// The case.
    pub case: Case,
    /// The plan.
    pub plan: Plan,
    /// The plan at the best estimates.
    pub evaluation: Evaluation,
    /// Results that stand, in the order of the plan.
    pub results: Vec<Answered>,
    /// Results that were refused or withheld, with the reason.
    pub refused: Vec<(Named, String)>,
    /// The register of entries.
    pub register: Vec<Row>,
    /// The worked lines.
    pub lines: Vec<Line>,
    /// Questions with their probabilities.
    pub questions: Vec<Asked>,
    /// The sampling.
    pub sampling: Sampling,
    /// The seed used.
    pub seed: u64,
}

/// What came of a case file.
#[derive(Debug)]
pub struct Outcome {
    /// The analysis, unless the file itself has faults.
    pub analysis: Option<Analysis>,
    /// Everything there is to say.
    pub notices: Notices,
    /// The files it was read from; the case file first.
    pub files: Vec<SourceFile>,
}

impl Outcome {
    /// Exit status of the program: 0 done, 1 done with unanswered warnings,
    /// 2 refused.
    pub fn status(&self) -> u8 {
        if self.notices.any_stop() { 2 } else { u8::from(self.notices.any_open_warning()) }
    }

    /// SHA-256 of one of the files, in hexadecimal.
    pub fn sha256(&self, file: usize) -> String {
        let digest = Sha256::digest(self.files.get(file).map_or(&[] as &[u8], |f| f.text.as_bytes()));
        digest.iter().map(|byte| format!("{byte:02x}")).collect()
    }
}

/// The method errors that a case may change.
pub fn method_errors() -> Vec<MethodError> {
    METHODS.iter().flat_map(|m| m.errors.iter().copied()).collect()
}

/// Reads and analyses a case file; `load` gives the text of files it names.
pub fn analyse(name: &str, text: &str, load: crate::case::Load<'_>, options: Options) -> Outcome {
    let Checked { case, mut notices, files } = crate::case::read(name, text, &method_errors(), load);
    let Some(case) = case else { return Outcome { analysis: None, notices, files } };
    let Planned { plan, notices: planned } = backward(&case);
    // What was not planned for another reason is no slip of the question.
    let whole = !planned.any_stop();
    notices.extend(planned);
    if whole {
        notices.extend(unknown_results(&case, &plan));
    }
    let (analysis, found) = evaluate(case, plan, options);
    notices.extend(found);
    let notices = answered(notices, &analysis.case).sorted();
    Outcome { analysis: Some(analysis), notices, files }
}

fn evaluate(case: Case, plan: Plan, options: Options) -> (Analysis, Vec<Notice>) {
    let evaluation = plan.evaluate(&plan.estimates());
    let standing: Vec<usize> =
        (0..plan.results.len()).filter(|i| evaluation.value(plan.results[*i].slot).is_some()).collect();
    let wanted = wanted(&case, &plan, &evaluation, &standing);
    let sampling = if wanted.is_empty() {
        Sampling::default()
    } else {
        sample(&plan, &wanted, options.seed, options.trials)
    };
    let propagated = wanted.iter().map(|w| linear(&plan, &evaluation, w.slot)).collect();
    let mut all: Vec<Option<Band>> = vec![None; plan.results.len()];
    for (index, band) in standing.iter().zip(bands(propagated, &sampling, &wanted)) {
        all[*index] = band;
    }
    let facts = Facts {
        case: &case,
        plan: &plan,
        evaluation: &evaluation,
        bands: &all,
        sampling: &sampling,
        trials: options.trials,
    };
    let findings = apply(&facts);
    let (kept, refused) = withhold(&plan, &evaluation, &all, &findings);
    let mut shown: Vec<SlotId> = kept.iter().map(|(n, _)| n.slot).collect();
    if !findings.iter().any(|f| f.withheld != Withheld::Nothing) {
        shown.extend(plan.checks());
    }
    let questions = asked(&case, &kept, &standing, &plan, &sampling);
    let numbering = Numbering::new(&plan, &shown);
    let u: Vec<f64> =
        (0..plan.slots.len()).map(|s| standard_uncertainty(&plan, &evaluation, SlotId(s))).collect();
    let lines = lines(&plan, &evaluation, &u, &numbering, case.identity.system);
    let results = kept
        .into_iter()
        .map(|(named, band)| {
            let line = plan.call_of(named.slot).and_then(|c| numbering.line(c));
            Answered { named, band, line }
        })
        .collect();
    let register = register(&plan, &shown);
    let notices = findings.into_iter().map(|f| f.notice).collect();
    let analysis = Analysis {
        case,
        plan,
        evaluation,
        results,
        refused,
        register,
        lines,
        questions,
        sampling,
        seed: options.seed,
    };
    (analysis, notices)
}

/// A result that stands, with its band.
type Kept = (Named, Band);
/// A result that does not, with the reason.
type Refused = (Named, String);

/// What is to be known of each result that has a value.
fn wanted(case: &Case, plan: &Plan, evaluation: &Evaluation, standing: &[usize]) -> Vec<Wanted> {
    let of = |i: &usize| {
        let Named { slot, stage, sought, ref id, .. } = plan.results[*i];
        let floor = if sought == Sought::ImpactSpeed { 0.0 } else { f64::NEG_INFINITY };
        let scale = case.identity.system.unit(plan.slot(slot).kind).1;
        let limits = case.questions.iter().filter(|q| q.of == *id).map(|q| q.above.dist.estimate());
        Wanted { slot, stage, centre: evaluation.values[slot.0], scale, floor, limits: limits.collect() }
    };
    standing.iter().map(of).collect()
}

/// Questions about results that the case does not give.
fn unknown_results(case: &Case, plan: &Plan) -> Vec<Notice> {
    let known: Vec<&str> = plan.results.iter().map(|r| r.id.as_str()).collect();
    let unknown = case.questions.iter().filter(|q| !known.contains(&q.of.as_str()));
    unknown
        .map(|q| {
            let message = format!("the question is about '{}', which is no result of this case", q.of);
            let notice = Notice::stop("CF-7", message).at(q.above.place);
            let mut notice = notice.expected(format!("one of: {}", known.join(", ")));
            notice.hint = nearest(&q.of, known.iter().copied()).map(|n| format!("did you mean {n}?"));
            notice
        })
        .collect()
}

/// Puts to each question what the trials say of it; a question whose result
/// does not stand is kept without an answer.
fn asked(case: &Case, kept: &[Kept], standing: &[usize], plan: &Plan, sampling: &Sampling) -> Vec<Asked> {
    let answer = |question: &Question, index: usize| {
        // The limits of a result were handed over in the order of its questions.
        let earlier = case.questions.iter().take(index).filter(|q| q.of == question.of).count();
        let result = standing.iter().position(|i| plan.results[*i].id == question.of)?;
        let probability = *sampling.above.get(result)?.get(earlier)?;
        let least = sampling.results.get(result)?.as_ref()?.least;
        let (about, _) = kept.iter().find(|(named, _)| named.id == question.of)?;
        Some(Asked { question: question.clone(), about: Some(about.clone()), probability, least })
    };
    let unanswered = |question: &Question| Asked {
        question: question.clone(),
        about: None,
        probability: (f64::NAN, f64::NAN),
        least: f64::NAN,
    };
    let questions = case.questions.iter().enumerate();
    questions.map(|(index, q)| answer(q, index).unwrap_or_else(|| unanswered(q))).collect()
}

/// Separates the results that stand from those that were refused or that a
/// stop takes away.
fn withhold(
    plan: &Plan,
    evaluation: &Evaluation,
    bands: &[Option<Band>],
    findings: &[crate::rules::Finding],
) -> (Vec<Kept>, Vec<Refused>) {
    let mut kept = Vec::new();
    let mut refused = Vec::new();
    for (named, band) in plan.results.iter().zip(bands) {
        let touches = |w: Withheld| match w {
            Withheld::Nothing => false,
            Withheld::All => true,
            Withheld::Impact => named.stage == Stage::Impact,
        };
        let stop = findings.iter().find(|f| f.notice.severity == Severity::Stop && touches(f.withheld));
        match (band, stop) {
            (_, Some(finding)) => refused.push((named.clone(), finding.notice.message.clone())),
            (Some(band), None) => kept.push((named.clone(), band.clone())),
            (None, None) => refused.push((named.clone(), reason(plan, evaluation, named.slot))),
        }
    }
    (kept, refused)
}

fn reason(plan: &Plan, evaluation: &Evaluation, slot: SlotId) -> String {
    let here = |slot: SlotId| match evaluation.refusals[slot.0] {
        Some(SlotRefusal::Here(refusal)) => Some(refusal.reason.to_string()),
        _ => None,
    };
    match evaluation.refusals[slot.0] {
        Some(SlotRefusal::Earlier(call)) => plan.calls.get(call).and_then(|c| here(c.out)),
        _ => here(slot),
    }
    .unwrap_or_else(|| "too few physically possible trials".into())
}

/// Puts the case's answers to the warnings they answer. An answer to nothing,
/// or to several warnings at once, answers none and is noted.
fn answered(mut notices: Notices, case: &Case) -> Notices {
    let mut unused = Vec::new();
    for answer in &case.answers {
        let about = |n: &Notice| answer.about.as_ref().is_none_or(|words| n.message.contains(words.as_str()));
        let mine = |n: &Notice| n.code == answer.code && n.severity == Severity::Warn && about(n);
        let count = notices.iter().filter(|n| mine(n)).count();
        if count == 1 {
            let text = format!("{} ({})", answer.reason, answer.by);
            for notice in notices.iter_mut().filter(|n| mine(n)) {
                notice.answer = Some(match notice.answer.take() {
                    Some(earlier) => format!("{earlier}; {text}"),
                    None => text.clone(),
                });
            }
            continue;
        }
        let stopped = notices.iter().any(|n| n.code == answer.code && n.severity == Severity::Stop);
        let message = match (count, stopped) {
            (0, true) => {
                format!("the answer to {} has no effect: a STOP cannot be answered away", answer.code)
            }
            (0, false) => format!("the answer to {} answers no warning of this case", answer.code),
            _ => format!("the answer to {} fits {count} warnings and answers none of them", answer.code),
        };
        let hint = "about = \"words of the warning\" says which one is meant";
        let notice = Notice::note("CF-10", message).at(answer.place);
        unused.push(if count > 1 { notice.hint(hint) } else { notice });
    }
    notices.extend(unused);
    notices
}
