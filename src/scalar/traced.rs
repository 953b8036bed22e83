//! A number that remembers how it was made, so that a formula can be printed
//! from the very code that computes it.

use super::Real;
use std::cell::RefCell;
use std::ops::{Add, Div, Mul, Neg, Sub};

#[derive(Debug, Clone, Copy, PartialEq)]
enum Id {
    Constant(f64),
    Node(usize),
}

#[derive(Debug, Clone, Copy)]
enum Node {
    Leaf(usize),
    Add(Id, Id),
    Sub(Id, Id),
    Mul(Id, Id),
    Div(Id, Id),
    Neg(Id),
    Sqrt(Id),
    Sin(Id),
    Cos(Id),
    Atan2(Id, Id),
}

/// Holds the nodes of one recorded expression.
#[derive(Debug, Default)]
pub struct Arena(RefCell<Vec<Node>>);

impl Arena {
    fn add(&self, node: Node) -> Id {
        let mut nodes = self.0.borrow_mut();
        nodes.push(node);
        Id::Node(nodes.len() - 1)
    }

    /// The formula's input number `index`.
    pub fn leaf(&self, index: usize) -> Traced<'_> {
        Traced { arena: Some(self), id: self.add(Node::Leaf(index)) }
    }

    /// The recorded expression that ends in `root`.
    pub fn expression(&self, root: Traced<'_>) -> Expression {
        Expression { nodes: self.0.borrow().clone(), root: root.id }
    }
}

/// A number that records the operations applied to it.
#[derive(Debug, Clone, Copy)]
pub struct Traced<'a> {
    arena: Option<&'a Arena>,
    id: Id,
}

impl<'a> Traced<'a> {
    fn one(self, make: impl Fn(Id) -> Node) -> Self {
        match self.arena {
            Some(arena) => Traced { arena: self.arena, id: arena.add(make(self.id)) },
            None => self,
        }
    }

    fn two(self, other: Self, make: impl Fn(Id, Id) -> Node) -> Self {
        match self.arena.or(other.arena) {
            Some(arena) => Traced { arena: Some(arena), id: arena.add(make(self.id, other.id)) },
            None => self,
        }
    }
}

impl Add for Traced<'_> {
    type Output = Self;
    fn add(self, o: Self) -> Self {
        self.two(o, Node::Add)
    }
}

impl Sub for Traced<'_> {
    type Output = Self;
    fn sub(self, o: Self) -> Self {
        self.two(o, Node::Sub)
    }
}

impl Mul for Traced<'_> {
    type Output = Self;
    fn mul(self, o: Self) -> Self {
        self.two(o, Node::Mul)
    }
}

impl Div for Traced<'_> {
    type Output = Self;
    fn div(self, o: Self) -> Self {
        self.two(o, Node::Div)
    }
}

impl Neg for Traced<'_> {
    type Output = Self;
    fn neg(self) -> Self {
        self.one(Node::Neg)
    }
}

impl Real for Traced<'_> {
    fn of(value: f64) -> Self {
        Traced { arena: None, id: Id::Constant(value) }
    }

    fn sqrt(self) -> Self {
        self.one(Node::Sqrt)
    }

    fn sin(self) -> Self {
        self.one(Node::Sin)
    }

    fn cos(self) -> Self {
        self.one(Node::Cos)
    }

    fn atan2(self, x: Self) -> Self {
        self.two(x, Node::Atan2)
    }
}

/// A recorded expression.
#[derive(Debug, Clone)]
pub struct Expression {
    nodes: Vec<Node>,
    root: Id,
}

// How tightly an operation binds: a part that binds less tightly than its
// surroundings stands in brackets.
const NEGATIVE: u8 = 0;
const SUM: u8 = 1;
const PRODUCT: u8 = 2;
const ATOM: u8 = 4;

/// How the leaves of an expression are written.
struct Writer<'a> {
    nodes: &'a [Node],
    leaves: &'a [String],
    times: &'static str,
    bare: bool,
}

impl Expression {
    /// The formula in symbols: factors stand side by side, `2 g f d`.
    pub fn in_symbols(&self, symbols: &[String]) -> String {
        self.write(symbols, " ", true)
    }

    /// The formula with numbers put in: `2 × 9.80665 m/s² × …`.
    pub fn in_numbers(&self, numbers: &[String]) -> String {
        self.write(numbers, " × ", false)
    }

    /// The constants written into the formula.
    pub fn constants(&self) -> Vec<f64> {
        let mut found = Vec::new();
        let mut keep = |id: &Id| {
            if let Id::Constant(c) = id {
                found.push(*c);
            }
        };
        for node in &self.nodes {
            match node {
                Node::Leaf(_) => {}
                Node::Neg(a) | Node::Sqrt(a) | Node::Sin(a) | Node::Cos(a) => keep(a),
                Node::Add(a, b) | Node::Sub(a, b) | Node::Mul(a, b) | Node::Div(a, b) | Node::Atan2(a, b) => {
                    keep(a);
                    keep(b);
                }
            }
        }
        found
    }

    fn write(&self, leaves: &[String], times: &'static str, bare: bool) -> String {
        Writer { nodes: &self.nodes, leaves, times, bare }.text(self.root).0
    }
}

impl Writer<'_> {
    fn text(&self, id: Id) -> (String, u8) {
        let node = match id {
            Id::Constant(c) => return (constant(c, self.bare), ATOM),
            Id::Node(index) => self.nodes[index],
        };
        match node {
            Node::Leaf(index) => self.leaf(index),
            Node::Add(a, b) => (format!("{} + {}", self.within(a, NEGATIVE), self.within(b, SUM)), SUM),
            Node::Sub(a, b) => (format!("{} − {}", self.within(a, NEGATIVE), self.within(b, PRODUCT)), SUM),
            Node::Mul(a, b) if a == b => (format!("{}²", self.power(a)), ATOM),
            Node::Mul(a, b) => self.product(a, b),
            Node::Div(a, b) => (format!("{} / {}", self.within(a, PRODUCT), self.within(b, ATOM)), PRODUCT),
            Node::Neg(a) => (format!("−{}", self.within(a, ATOM)), SUM),
            Node::Sqrt(a) => (format!("√({})", self.text(a).0), ATOM),
            Node::Sin(a) => (self.function("sin", a), ATOM),
            Node::Cos(a) => (self.function("cos", a), ATOM),
            Node::Atan2(a, b) => (format!("atan2({}, {})", self.text(a).0, self.text(b).0), ATOM),
        }
    }

    /// A leaf; a negative number is no atom, so that it gets brackets.
    fn leaf(&self, index: usize) -> (String, u8) {
        let text = self.leaves.get(index).cloned().unwrap_or_else(|| "?".into());
        let binding = if text.starts_with('−') { NEGATIVE } else { ATOM };
        (text, binding)
    }

    /// In symbols, a quotient inside a product keeps its brackets, since
    /// `a / b c` can be read two ways.
    fn product(&self, a: Id, b: Id) -> (String, u8) {
        let right = match b {
            Id::Node(index) if matches!(self.nodes[index], Node::Div(..)) => format!("({})", self.text(b).0),
            _ => self.within(b, PRODUCT),
        };
        let left = match a {
            Id::Node(index) if matches!(self.nodes[index], Node::Div(..)) => format!("({})", self.text(a).0),
            _ => self.within(a, PRODUCT),
        };
        (format!("{left}{}{right}", self.times), PRODUCT)
    }

    /// The base of a square: a symbol stands bare, a number with its unit in
    /// brackets.
    fn power(&self, id: Id) -> String {
        let (text, binding) = self.text(id);
        let is_leaf = matches!(id, Id::Node(index) if matches!(self.nodes[index], Node::Leaf(_)));
        if binding == ATOM && is_leaf && (self.bare || !text.contains(' ')) {
            text
        } else {
            format!("({text})")
        }
    }

    /// Function brackets are left out round a lone symbol.
    fn function(&self, name: &str, id: Id) -> String {
        let (text, binding) = self.text(id);
        if self.bare && binding == ATOM { format!("{name} {text}") } else { format!("{name}({text})") }
    }

    fn within(&self, id: Id, least: u8) -> String {
        let (text, binding) = self.text(id);
        if binding < least { format!("({text})") } else { text }
    }
}

/// A constant of a formula: whole numbers and halves as they are spoken.
fn constant(c: f64, spoken: bool) -> String {
    if c == 0.5 && spoken {
        "½".into()
    } else if c < 0.0 {
        format!("(−{})", -c)
    } else {
        format!("{c}")
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn braked<R: Real>(v: R, g: R, f: R, d: R) -> R {
        (v.squared() + R::of(2.0) * g * f * d).sqrt()
    }

    fn words(list: &[&str]) -> Vec<String> {
        list.iter().map(|s| s.to_string()).collect()
    }

    #[test]
    fn one_function_gives_symbols_numbers_and_value() {
        let arena = Arena::default();
        let [v, g, f, d] = std::array::from_fn(|i| arena.leaf(i));
        let expression = arena.expression(braked(v, g, f, d));
        assert_eq!(expression.in_symbols(&words(&["v_{1}", "g", "f", "d"])), "√(v_{1}² + 2 g f d)");
        assert_eq!(
            expression.in_numbers(&words(&["9.15 m/s", "9.80665 m/s²", "0.7", "12.4 m"])),
            "√((9.15 m/s)² + 2 × 9.80665 m/s² × 0.7 × 12.4 m)"
        );
        assert_eq!(expression.constants(), vec![2.0]);
    }

    #[test]
    fn brackets_stand_where_they_are_needed_and_only_there() {
        let arena = Arena::default();
        let [a, b, c] = std::array::from_fn(|i| arena.leaf(i));
        let text = |t: Traced<'_>| arena.expression(t).in_symbols(&words(&["a", "b", "c"]));
        assert_eq!(text(a * (b + c)), "a (b + c)");
        assert_eq!(text(a - (b - c)), "a − (b − c)");
        assert_eq!(text(a - (b + c)), "a − (b + c)");
        assert_eq!(text(a / (b * c)), "a / (b c)");
        assert_eq!(text((a / b) * c), "(a / b) c");
        assert_eq!(text(-(a + b)), "−(a + b)");
        assert_eq!(text((a - b).sin() * c), "sin(a − b) c");
        assert_eq!(text(Traced::of(0.5) * a), "½ a");
        assert_eq!(text((a + b).squared()), "(a + b)²");
        let numbers = arena.expression(a - b).in_numbers(&words(&["2 m", "−3 m", "c"]));
        assert_eq!(numbers, "2 m − (−3 m)");
    }
}
