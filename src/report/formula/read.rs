//! Reads plain-text formulas.

mod prose;
mod tokens;

use super::Node;
use prose::{FUNCTIONS, JOINTS, prose};
use tokens::{Placed, Token, tokens};

/// Brackets may stand so deep.
const DEPTH: usize = 40;

const RELATIONS: [&str; 8] = ["=", "≤", "≥", "<", ">", "≈", "→", "…"];
const BREAKS: [&str; 3] = [",", ";", ":"];
pub(super) fn formula(text: &str) -> Option<Node> {
    let tokens = tokens(text)?;
    let mut reader = Reader {
        text,
        tokens,
        at: 0,
        depth: 0,
        bars: 0,
    };
    let node = reader.clauses()?;
    (reader.at == reader.tokens.len()).then_some(node)
}

struct Reader<'a> {
    text: &'a str,
    tokens: Vec<Placed>,
    at: usize,
    depth: usize,
    /// How many bars of absolute values are open.
    bars: usize,
}

impl Reader<'_> {
    fn peek(&self) -> Option<&Token> {
        self.tokens.get(self.at).map(|placed| &placed.token)
    }

    fn take(&mut self, sign: &str) -> bool {
        let found = matches!(self.peek(), Some(Token::Sign(s)) if *s == sign);
        self.at += usize::from(found);
        found
    }

    fn take_any(&mut self, signs: &[&'static str]) -> Option<&'static str> {
        let found = match self.peek() {
            Some(Token::Sign(s)) => signs.iter().find(|wanted| *wanted == s).copied(),
            _ => None,
        };
        self.at += usize::from(found.is_some());
        found
    }

    /// Formulas and prose, parted by commas and joining words.
    fn clauses(&mut self) -> Option<Node> {
        let mut parts = Vec::new();
        while self.peek().is_some() {
            let end = self.clause_end();
            if end == self.at {
                parts.push(self.words_to(self.at + 1));
            } else if prose(&self.tokens[self.at..end]) {
                parts.push(self.words_to(end));
            } else {
                parts.push(self.relation()?);
                if self.at != end {
                    return None;
                }
            }
            if let Some(mark) = self.take_any(&BREAKS) {
                parts.push(Node::Sign(mark));
            }
        }
        Some(one(parts))
    }

    /// Where the clause under way ends: before a joining word or a break outside all brackets.
    fn clause_end(&self) -> usize {
        let mut depth = 0_usize;
        for (i, placed) in self.tokens.iter().enumerate().skip(self.at) {
            match &placed.token {
                Token::Sign("(" | "[" | "{") => depth += 1,
                Token::Sign(")" | "]" | "}") => depth = depth.saturating_sub(1),
                Token::Sign(s) if depth == 0 && BREAKS.contains(s) => return i,
                Token::Name(n) if depth == 0 && JOINTS.contains(&n.as_str()) => return i,
                _ => {}
            }
        }
        self.tokens.len()
    }

    /// The text up to that token, as it was written.
    fn words_to(&mut self, end: usize) -> Node {
        let from = self.tokens[self.at].from;
        let to = self.tokens[end - 1].to;
        self.at = end;
        Node::Words(self.text[from..to].to_owned())
    }

    /// Sides with signs of relation between them.
    fn relation(&mut self) -> Option<Node> {
        let mut parts = vec![self.sum()?];
        while let Some(sign) = self.take_any(&RELATIONS) {
            parts.push(Node::Sign(sign));
            parts.push(self.sum()?);
        }
        Some(one(parts))
    }

    fn sum(&mut self) -> Option<Node> {
        let mut parts = Vec::new();
        if let Some(sign) = self.take_any(&["+", "−", "±"]) {
            parts.push(Node::Sign(sign));
        }
        parts.push(self.product()?);
        while let Some(sign) = self.take_any(&["+", "−", "±"]) {
            parts.push(Node::Sign(sign));
            parts.push(self.product()?);
        }
        Some(one(parts))
    }

    /// Factors side by side; a fraction stroke takes all before it and the one factor after.
    fn product(&mut self) -> Option<Node> {
        let mut factors = vec![self.power()?];
        loop {
            if self.take("*") {
                if self.starts_factor() {
                    factors.push(self.power()?);
                } else {
                    // a star on the symbol before it
                    let starred = factors.pop()?;
                    factors.push(Node::Power(Box::new(starred), Box::new(Node::Sign("∗"))));
                }
            } else if self.take("/") {
                let below = unwrapped(self.power()?);
                let above = unwrapped(factor(factors));
                factors = vec![Node::Fraction(Box::new(above), Box::new(below))];
            } else if self.starts_factor() {
                factors.push(self.power()?);
            } else {
                return Some(factor(factors));
            }
        }
    }

    fn starts_factor(&self) -> bool {
        match self.peek() {
            Some(Token::Number(_)) => true,
            Some(Token::Name(n)) => !JOINTS.contains(&n.as_str()),
            Some(Token::Sign("|")) => self.bars == 0,
            Some(Token::Sign(s)) => ["(", "[", "{"].contains(s),
            None => false,
        }
    }

    fn power(&mut self) -> Option<Node> {
        let base = self.atom()?;
        if let Some(sign) = self.take_any(&["²", "³"]) {
            let exponent = Node::Number(if sign == "²" { "2" } else { "3" }.into());
            return Some(Node::Power(Box::new(base), Box::new(exponent)));
        }
        if self.take("%") {
            return Some(Node::Row(vec![base, Node::Sign("%")]));
        }
        if !self.take("^") {
            return Some(base);
        }
        let minus = self.take("−");
        let exponent = unwrapped(self.deeper(Self::power)?);
        let exponent = if minus {
            Node::Row(vec![Node::Sign("−"), exponent])
        } else {
            exponent
        };
        Some(Node::Power(Box::new(base), Box::new(exponent)))
    }

    fn deeper(&mut self, read: fn(&mut Self) -> Option<Node>) -> Option<Node> {
        if self.depth == DEPTH {
            return None;
        }
        self.depth += 1;
        let node = read(self);
        self.depth -= 1;
        node
    }

    fn atom(&mut self) -> Option<Node> {
        match self.peek()?.clone() {
            Token::Number(n) => {
                self.at += 1;
                Some(Node::Number(n))
            }
            Token::Name(n) => {
                self.at += 1;
                self.named(n)
            }
            Token::Sign(_) => self.bracketed(),
        }
    }

    fn named(&mut self, name: String) -> Option<Node> {
        let bracket = matches!(self.peek(), Some(Token::Sign("(" | "[" | "{")));
        if !FUNCTIONS.contains(&name.as_str()) || !(bracket || self.starts_factor()) {
            return Some(Node::Symbol(name));
        }
        // `lg lg(x)` and `lg T`: the one factor after belongs to the function, and its power too
        let argument = self.deeper(Self::power)?;
        if name == "sqrt" {
            return Some(Node::Root(Box::new(unwrapped(argument))));
        }
        Some(Node::Function(name, Box::new(argument)))
    }

    fn bracketed(&mut self) -> Option<Node> {
        for (open, close) in [("(", ")"), ("[", "]"), ("{", "}")] {
            if self.take(open) {
                let end = self.closing(open, close)?;
                let inside = if end > self.at && self.told(end) {
                    self.words_to(end)
                } else {
                    let bars = std::mem::take(&mut self.bars);
                    let inside = self.deeper(Self::arguments)?;
                    self.bars = bars;
                    inside
                };
                return self
                    .take(close)
                    .then(|| Node::Group(open, Box::new(inside), close));
            }
        }
        if self.bars == 0 && self.take("|") {
            self.bars += 1;
            let inside = self.deeper(Self::arguments)?;
            self.bars -= 1;
            return self
                .take("|")
                .then(|| Node::Group("|", Box::new(inside), "|"));
        }
        None
    }

    /// Whether what stands before `end` is prose.
    fn told(&self, end: usize) -> bool {
        let inside = &self.tokens[self.at..end];
        let joined = inside
            .iter()
            .any(|t| matches!(&t.token, Token::Name(n) if JOINTS.contains(&n.as_str())));
        joined || prose(inside)
    }

    /// Where the bracket just opened closes.
    fn closing(&self, open: &str, close: &str) -> Option<usize> {
        let mut depth = 1_usize;
        for (i, placed) in self.tokens.iter().enumerate().skip(self.at) {
            match &placed.token {
                Token::Sign(s) if *s == open => depth += 1,
                Token::Sign(s) if *s == close => depth -= 1,
                _ => {}
            }
            if depth == 0 {
                return Some(i);
            }
        }
        None
    }

    fn arguments(&mut self) -> Option<Node> {
        let mut parts = vec![self.relation()?];
        while let Some(mark) = self.take_any(&BREAKS) {
            parts.push(Node::Sign(mark));
            parts.push(self.relation()?);
        }
        Some(one(parts))
    }
}

fn one(mut parts: Vec<Node>) -> Node {
    if parts.len() == 1 {
        parts.remove(0)
    } else {
        Node::Row(parts)
    }
}

fn factor(mut factors: Vec<Node>) -> Node {
    if factors.len() == 1 {
        factors.remove(0)
    } else {
        Node::Product(factors)
    }
}

/// What a round bracket holds, where a fraction, root or exponent already keeps it together.
fn unwrapped(node: Node) -> Node {
    match node {
        Node::Group("(", inside, _) => *inside,
        other => other,
    }
}
