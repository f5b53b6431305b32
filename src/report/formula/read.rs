//! Reads plain-text formulas.

use super::Node;

/// Brackets may stand so deep.
const DEPTH: usize = 40;

#[derive(Clone, Debug, PartialEq)]
enum Token {
    Number(String),
    Name(String),
    Sign(&'static str),
}

/// Signs of two or more characters first.
const SIGNS: [(&str, &str); 27] = [
    ("...", "…"),
    ("..", "…"),
    ("<=", "≤"),
    (">=", "≥"),
    ("->", "→"),
    ("±", "±"),
    ("+/-", "±"),
    ("≤", "≤"),
    ("≥", "≥"),
    ("≈", "≈"),
    ("~", "≈"),
    ("=", "="),
    ("<", "<"),
    (">", ">"),
    ("+", "+"),
    ("-", "−"),
    ("−", "−"),
    ("*", "*"),
    ("·", "*"),
    ("×", "*"),
    ("/", "/"),
    ("^", "^"),
    ("(", "("),
    (")", ")"),
    ("[", "["),
    ("]", "]"),
    ("|", "|"),
];
const MORE_SIGNS: [(&str, &str); 8] = [
    ("{", "{"),
    ("}", "}"),
    (",", ","),
    (";", ";"),
    (":", ":"),
    ("²", "²"),
    ("³", "³"),
    ("%", "%"),
];

const RELATIONS: [&str; 8] = ["=", "≤", "≥", "<", ">", "≈", "→", "…"];
const BREAKS: [&str; 3] = [",", ";", ":"];
const JOINTS: [&str; 12] = [
    "for",
    "if",
    "where",
    "else",
    "and",
    "with",
    "in",
    "at",
    "or",
    "otherwise",
    "from",
    "to",
];
const FUNCTIONS: [&str; 20] = [
    "lg", "ln", "log", "log10", "exp", "sqrt", "sin", "cos", "tan", "asin", "acos", "atan",
    "arcsin", "arccos", "arctan", "min", "max", "abs", "tanh", "inv",
];

pub(super) fn formula(text: &str) -> Option<Node> {
    let tokens = tokens(text)?;
    let mut reader = Reader {
        tokens,
        at: 0,
        depth: 0,
    };
    let node = reader.clauses()?;
    (reader.at == reader.tokens.len()).then_some(node)
}

fn tokens(text: &str) -> Option<Vec<Token>> {
    let mut out = Vec::new();
    let mut rest = text.trim_start();
    if rest.is_empty() {
        return None;
    }
    while let Some(first) = rest.chars().next() {
        let taken = if first.is_ascii_digit()
            || (first == '.' && rest[1..].starts_with(|c: char| c.is_ascii_digit()))
        {
            number(rest)
        } else if first.is_alphabetic() {
            name(rest)
        } else {
            let sign = SIGNS
                .iter()
                .chain(&MORE_SIGNS)
                .find(|(raw, _)| rest.starts_with(raw))?;
            out.push(Token::Sign(sign.1));
            rest = rest[sign.0.len()..].trim_start();
            continue;
        };
        let word = &rest[..taken];
        out.push(if first.is_alphabetic() {
            Token::Name(word.into())
        } else {
            Token::Number(word.into())
        });
        rest = rest[taken..].trim_start();
    }
    Some(out)
}

/// Length of the number at the start: digits, a point, an exponent.
fn number(text: &str) -> usize {
    let bytes = text.as_bytes();
    let digits = |from: usize| {
        bytes[from..]
            .iter()
            .take_while(|b| b.is_ascii_digit())
            .count()
    };
    let mut len = digits(0);
    if bytes.get(len) == Some(&b'.') && bytes.get(len + 1).is_some_and(u8::is_ascii_digit) {
        len += 1 + digits(len + 1);
    }
    if matches!(bytes.get(len), Some(b'e' | b'E')) {
        let sign = usize::from(matches!(bytes.get(len + 1), Some(b'-' | b'+')));
        let power = bytes
            .get(len + 1 + sign)
            .map_or(0, |_| digits(len + 1 + sign));
        if power > 0 {
            len += 1 + sign + power;
        }
    }
    len
}

/// Length of the name at the start: letters, digits, `_`, primes.
fn name(text: &str) -> usize {
    text.char_indices()
        .find(|(_, c)| {
            !(c.is_alphanumeric() && !matches!(c, '²' | '³') || matches!(c, '_' | '\'' | '′'))
        })
        .map_or(text.len(), |(i, _)| i)
}

struct Reader {
    tokens: Vec<Token>,
    at: usize,
    depth: usize,
}

impl Reader {
    fn peek(&self) -> Option<&Token> {
        self.tokens.get(self.at)
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

    /// Formulas parted by commas and joining words.
    fn clauses(&mut self) -> Option<Node> {
        let mut parts = Vec::new();
        loop {
            while let Some(words) = self.words() {
                parts.push(words);
            }
            if self.peek().is_some() {
                parts.push(self.relation()?);
            }
            if let Some(mark) = self.take_any(&BREAKS) {
                parts.push(Node::Sign(mark));
            } else if self.peek().is_none() {
                break;
            } else if !self.at_words() {
                return None;
            }
        }
        (!parts.is_empty()).then(|| one(parts))
    }

    fn at_words(&self) -> bool {
        matches!(self.peek(), Some(Token::Name(n)) if JOINTS.contains(&n.as_str()))
    }

    fn words(&mut self) -> Option<Node> {
        if !self.at_words() {
            return None;
        }
        let Some(Token::Name(word)) = self.peek().cloned() else {
            return None;
        };
        self.at += 1;
        Some(Node::Words(word))
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
                factors.push(self.power()?);
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
        for (open, close) in [("(", ")"), ("[", "]"), ("{", "}"), ("|", "|")] {
            if self.take(open) {
                let inside = self.deeper(Self::arguments)?;
                return self
                    .take(close)
                    .then(|| Node::Group(open, Box::new(inside), close));
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
