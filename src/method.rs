//! What a formula is: one definition that is computed, differentiated, run
//! over many trials and printed.
//!
//! In: a function generic over the scalar, with its card. Out: a [`Node`],
//! which the plan can call without knowing what it computes. Never holds a
//! formula's text: text comes from running the function at a tracing scalar.

use crate::scalar::{Arena, Dual, Expression, Lane, Real};
use crate::stats::Dist;
use crate::units::Kind;
use std::array::from_fn;
use std::marker::PhantomData;

/// Trials that are computed together.
pub const WIDTH: usize = 400;

/// One value for each of [`WIDTH`] trials.
pub type Lanes = [f64; WIDTH];

/// A quantity that enters or leaves a formula.
#[derive(Debug, Clone, Copy)]
pub struct Port {
    /// Symbol in the general formula.
    pub symbol: &'static str,
    /// Kind of quantity.
    pub kind: Kind,
    /// Name in words.
    pub name: &'static str,
}

/// What a limit is about.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum About {
    /// The input with this index.
    Input(usize),
    /// The result.
    Output,
}

/// A range outside which a formula refuses.
#[derive(Debug, Clone, Copy)]
pub struct Limit {
    /// The quantity that must lie in the range.
    pub about: About,
    /// Least value allowed.
    pub lo: f64,
    /// Greatest value allowed.
    pub hi: f64,
    /// Why, and what to look at.
    pub reason: &'static str,
}

/// What is known about a formula besides the formula itself.
#[derive(Debug, Clone, Copy)]
pub struct Card {
    /// Stable name.
    pub id: &'static str,
    /// Name of the method it belongs to.
    pub method: &'static str,
    /// What it finds.
    pub title: &'static str,
    /// What goes in.
    pub inputs: &'static [Port],
    /// What comes out.
    pub output: Port,
    /// Where it refuses.
    pub limits: &'static [Limit],
    /// Why there may be no number at all.
    pub undefined: &'static str,
    /// Where it comes from.
    pub source: &'static str,
}

/// Why a formula gives no result.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Refusal {
    /// The reason, and what to look at.
    pub reason: &'static str,
    /// The offending value, SI, if it is a number.
    pub value: f64,
    /// Its kind.
    pub kind: Kind,
}

/// A closed formula with `N` inputs and one result, in SI units.
pub trait Formula<const N: usize>: Send + Sync + 'static {
    /// Its card.
    const CARD: Card;
    /// The formula.
    fn eval<R: Real>(x: [R; N]) -> R;
}

/// A column of trials of one input; sine and cosine are filled for angles.
#[derive(Debug, Clone, Copy)]
pub struct Column<'a> {
    /// The values.
    pub value: &'a Lanes,
    /// Their sines.
    pub sin: &'a Lanes,
    /// Their cosines.
    pub cos: &'a Lanes,
}

/// A formula whose type has been forgotten.
pub trait Node: Send + Sync {
    /// Its card.
    fn card(&self) -> &'static Card;
    /// The value at SI inputs, or why there is none.
    fn value(&self, x: &[f64]) -> Result<f64, Refusal>;
    /// The value and its derivative by each input.
    fn gradient(&self, x: &[f64]) -> Result<(f64, Vec<f64>), Refusal>;
    /// The values of many trials; a trial outside the limits, or one with an
    /// input that is not a number, is not a number. An infinite result is
    /// made not a number at once, so that no formula meets an infinity.
    fn batch(&self, x: &[Column<'_>], y: &mut Lanes);
    /// The formula itself.
    fn expression(&self) -> Expression;
}

/// Makes a [`Node`] of a formula's type.
pub struct Of<F, const N: usize>(PhantomData<fn() -> F>);

impl<F: Formula<N>, const N: usize> Of<F, N> {
    /// The node.
    pub const NODE: Self = Of(PhantomData);
}

impl<F: Formula<N>, const N: usize> Node for Of<F, N> {
    fn card(&self) -> &'static Card {
        &F::CARD
    }

    fn value(&self, x: &[f64]) -> Result<f64, Refusal> {
        let y = <&[f64; N]>::try_from(x).map_or(f64::NAN, |x| F::eval(*x));
        check(&F::CARD, x, y).map(|()| y)
    }

    fn gradient(&self, x: &[f64]) -> Result<(f64, Vec<f64>), Refusal> {
        let Ok(inputs) = <&[f64; N]>::try_from(x) else {
            return check(&F::CARD, x, f64::NAN).map(|()| (f64::NAN, Vec::new()));
        };
        let dual = F::eval(from_fn(|i| Dual::<N>::variable(inputs[i], i)));
        check(&F::CARD, x, dual.value).map(|()| (dual.value, dual.slopes.to_vec()))
    }

    fn batch(&self, x: &[Column<'_>], y: &mut Lanes) {
        let Ok(columns) = <&[Column<'_>; N]>::try_from(x) else {
            return y.fill(f64::NAN);
        };
        for (t, y) in y.iter_mut().enumerate() {
            let lane = |i: usize| {
                let c = &columns[i];
                // The kind is a constant of the formula: no branch is left.
                if matches!(F::CARD.inputs[i].kind, Kind::Angle) {
                    Lane::angle(c.value[t], c.sin[t], c.cos[t])
                } else {
                    Lane::plain(c.value[t])
                }
            };
            let result = F::eval::<Lane>(from_fn(lane)).value;
            *y = refused(F::CARD.limits, |i| columns[i].value[t], result);
        }
    }

    fn expression(&self) -> Expression {
        let arena = Arena::default();
        let root = F::eval(from_fn(|i| arena.leaf(i)));
        arena.expression(root)
    }
}

/// The result, or not a number where it is infinite or a limit is not kept.
#[inline(always)]
fn refused(limits: &[Limit], input: impl Fn(usize) -> f64, y: f64) -> f64 {
    // Zero for numbers, not a number for infinities.
    let mut kept = y + 0.0 * y;
    for limit in limits {
        let limited = match limit.about {
            About::Input(i) => input(i),
            About::Output => y,
        };
        kept = if limited >= limit.lo && limited <= limit.hi { kept } else { f64::NAN };
    }
    kept
}

/// The first limit that is not kept; a result that is no finite number is
/// always refused.
fn check(card: &'static Card, x: &[f64], y: f64) -> Result<(), Refusal> {
    for limit in card.limits {
        let (value, kind) = match limit.about {
            About::Output => (y, card.output.kind),
            About::Input(i) => match (x.get(i), card.inputs.get(i)) {
                (Some(v), Some(port)) => (*v, port.kind),
                _ => continue,
            },
        };
        if value < limit.lo || value > limit.hi {
            return Err(Refusal { reason: limit.reason, value, kind });
        }
    }
    if y.is_finite() && x.iter().all(|x| x.is_finite()) {
        Ok(())
    } else {
        Err(Refusal { reason: card.undefined, value: y, kind: card.output.kind })
    }
}

/// A family of formulas that together answer a question.
#[derive(Debug, Clone, Copy)]
pub struct Method {
    /// Stable name.
    pub id: &'static str,
    /// Name in words.
    pub title: &'static str,
    /// The question it answers.
    pub answers: &'static str,
    /// Where it holds and when it errs.
    pub holds: &'static str,
    /// Where it comes from.
    pub source: &'static str,
    /// The scatter of the method itself, beyond its inputs.
    pub errors: &'static [MethodError],
}

/// A method's own scatter, as a variable of the calculation.
#[derive(Debug, Clone, Copy)]
pub struct MethodError {
    /// Stable name, under which a case may change it.
    pub id: &'static str,
    /// What it stands for.
    pub title: &'static str,
    /// What is known about it, SI.
    pub dist: Dist,
    /// Its kind.
    pub kind: Kind,
    /// Where the figure comes from.
    pub source: &'static str,
}

/// Defines a formula: its card and its one expression.
///
/// Symbols may carry subscripts as `_{…}`.
#[macro_export]
macro_rules! formula {
    (
        $(#[$doc:meta])*
        $name:ident, $id:literal, $method:expr, $title:literal;
        in $($x:ident: $kind:ident $symbol:literal $what:literal),+;
        out $out_kind:ident $out_symbol:literal $out_what:literal;
        $(limits $limits:expr;)?
        undefined $undefined:literal;
        source $source:literal;
        = $body:expr
    ) => {
        $(#[$doc])*
        pub struct $name;

        impl $crate::method::Formula<{ [$(stringify!($x)),+].len() }> for $name {
            const CARD: $crate::method::Card = $crate::method::Card {
                id: $id,
                method: $method,
                title: $title,
                inputs: &[$($crate::method::Port {
                    symbol: $symbol,
                    kind: $crate::units::Kind::$kind,
                    name: $what,
                }),+],
                output: $crate::method::Port {
                    symbol: $out_symbol,
                    kind: $crate::units::Kind::$out_kind,
                    name: $out_what,
                },
                limits: $crate::formula!(@limits $($limits)?),
                undefined: $undefined,
                source: $source,
            };

            #[inline(always)]
            fn eval<R: $crate::scalar::Real>([$($x),+]: [R; [$(stringify!($x)),+].len()]) -> R {
                $body
            }
        }

        impl $name {
            /// The formula as a node of the plan.
            pub const NODE: &'static dyn $crate::method::Node =
                &$crate::method::Of::<$name, { [$(stringify!($x)),+].len() }>::NODE;
        }
    };
    (@limits) => { &[] };
    (@limits $limits:expr) => { $limits };
}

impl Limit {
    /// A range for an input.
    pub const fn input(index: usize, lo: f64, hi: f64, reason: &'static str) -> Self {
        Limit { about: About::Input(index), lo, hi, reason }
    }

    /// A range for the result.
    pub const fn output(lo: f64, hi: f64, reason: &'static str) -> Self {
        Limit { about: About::Output, lo, hi, reason }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::physics::formulas;

    /// A block looks at its results only: so what is no number must come
    /// through every formula, and no infinity may get lost on the way.
    #[test]
    fn no_number_and_infinity_give_no_number() {
        let ones = [0.9; WIDTH];
        for node in formulas() {
            for (i, port) in node.card().inputs.iter().enumerate() {
                for odd in [f64::NAN, f64::INFINITY] {
                    let bad = [odd; WIDTH];
                    let mut columns =
                        vec![Column { value: &ones, sin: &ones, cos: &ones }; node.card().inputs.len()];
                    // Sine and cosine of either are not a number.
                    columns[i] = Column { value: &bad, sin: &[f64::NAN; WIDTH], cos: &[f64::NAN; WIDTH] };
                    let mut y = [1.0; WIDTH];
                    node.batch(&columns, &mut y);
                    let through = if odd.is_nan() { y[0].is_nan() } else { !y[0].is_infinite() };
                    assert!(through, "{} with {odd} for {}", node.card().id, port.symbol);
                }
            }
        }
    }
}
