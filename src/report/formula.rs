//! Formulas in plain text, as the relations' records have them, set as MathML.
//!
//! `nu1 = 45000 n^-0.83 Dpw^-0.5` is read by a small grammar ([`Formula::parse`]): sums, products
//! written side by side or with `*`, fractions, powers, functions, relations between sides, Greek
//! names, subscripts in the trade's habit (`h_min`, `Dpw`, `e_C`, `r1x`). A text the grammar does
//! not know is shown as it stands, never dropped; a test holds every formula of the crate to it.

mod read;
mod symbol;
mod write;

use crate::report::escape::{Markup, text};

/// A formula that was understood.
#[derive(Clone, Debug, PartialEq)]
pub struct Formula {
    node: Node,
}

/// What a formula is made of.
#[derive(Clone, Debug, PartialEq)]
enum Node {
    /// A number as written.
    Number(String),
    /// A quantity's symbol.
    Symbol(String),
    /// Words between formulas: `for`, `where`.
    Words(String),
    /// Parts side by side, as written, with signs between them.
    Row(Vec<Node>),
    /// A sign of operation, relation or punctuation.
    Sign(&'static str),
    /// A product; the factors are written side by side.
    Product(Vec<Node>),
    /// A fraction.
    Fraction(Box<Node>, Box<Node>),
    /// A power.
    Power(Box<Node>, Box<Node>),
    /// A root.
    Root(Box<Node>),
    /// A function of something.
    Function(String, Box<Node>),
    /// Something in brackets: opening, inside, closing.
    Group(&'static str, Box<Node>, &'static str),
}

impl Formula {
    /// Reads a formula; `None` if it is not of the grammar.
    pub fn parse(text: &str) -> Option<Self> {
        read::formula(text).map(|node| Self { node })
    }

    /// The formula as MathML.
    pub fn mathml(&self) -> Markup {
        write::math(&self.node, &[])
    }

    /// The formula with numbers in place of symbols, `None` if none of them occurs. The side
    /// before the first sign of equality, the quantity worked out, keeps its symbol.
    pub fn with_numbers(&self, numbers: &[(&str, &str)]) -> Option<Markup> {
        let mut node = self.node.clone();
        let count = write::put(&mut node, numbers);
        (count > 0).then(|| write::math(&node, numbers))
    }
}

/// A formula as MathML, or the text itself where it is not of the grammar.
pub fn mathml(formula: &str) -> Markup {
    Formula::parse(formula).map_or_else(|| as_text(formula), |f| f.mathml())
}

/// A text inside MathML.
fn as_text(raw: &str) -> Markup {
    Markup::trusted(format!("<math><mtext>{}</mtext></math>", text(raw)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use proptest::prelude::*;

    fn set(formula: &str) -> String {
        Formula::parse(formula)
            .expect("of the grammar")
            .mathml()
            .as_str()
            .replace("<math>", "")
            .replace("</math>", "")
    }

    #[test]
    fn reference_viscosity() {
        // ISO 281:2007, reference viscosity below 1000 r/min
        assert_eq!(
            set("nu1 = 45000 n^-0.83 Dpw^-0.5"),
            "<mrow><msub><mi>ν</mi><mn>1</mn></msub><mo>=</mo><mrow><mn>45 000</mn><mo>\u{2062}</mo><msup><mi>n</mi><mrow><mo>−</mo><mn>0.83</mn></mrow></msup><mo>\u{2062}</mo><msup><msub><mi>D</mi><mi>pw</mi></msub><mrow><mo>−</mo><mn>0.5</mn></mrow></msup></mrow></mrow>".replace("45 000", "45\u{202f}000")
        );
    }

    #[test]
    fn fractions_take_what_stands_before_and_one_after() {
        assert_eq!(
            set("h = a b / c d"),
            "<mrow><mi>h</mi><mo>=</mo><mrow><mfrac><mrow><mi>a</mi><mo>\u{2062}</mo><mi>b</mi></mrow><mi>c</mi></mfrac><mo>\u{2062}</mo><mi>d</mi></mrow></mrow>"
        );
    }

    #[test]
    fn functions_roots_and_groups() {
        let d341 = set("lg lg(nu + 0.7) = A - B lg T");
        assert!(
            d341.contains("<mi>lg</mi>") && d341.contains("<mi>ν</mi>"),
            "{d341}"
        );
        assert!(set("x = sqrt(a^2 + b^2)").contains("<msqrt>"));
        assert!(set("k = 1.03 (Ry/Rx)^0.64").contains("<mfrac>"));
        assert!(set("a = 0.1 [1 - exp(-x)]^-9.3").contains("<mo>[</mo>"));
        assert!(set("E' = 2 / ((1 - nu1^2)/E1 + (1 - nu2^2)/E2)").contains("<mi>E</mi><mo form="));
        assert!(set("|x| <= 3, kappa >= 1").contains("<mo>≤</mo>"));
    }

    #[test]
    fn numbers_put_in() {
        let f = Formula::parse("nu1 = 45000 n^-0.83 Dpw^-0.5").expect("of the grammar");
        let shown = f
            .with_numbers(&[("n", "236"), ("Dpw", "140"), ("nu1", "40.8")])
            .expect("some");
        assert!(shown.as_str().contains("<mn>236</mn>") && shown.as_str().contains("<mo>×</mo>"));
        assert!(
            shown.as_str().contains("<mi>ν</mi>"),
            "the left side keeps its symbol"
        );
        assert!(f.with_numbers(&[("q", "1")]).is_none());
    }

    #[test]
    fn what_is_not_understood_is_shown_as_it_stands() {
        assert!(Formula::parse("see table 3 ?!").is_none());
        assert_eq!(
            mathml("a ? <b>").as_str(),
            "<math><mtext>a ? &lt;b&gt;</mtext></math>"
        );
    }

    proptest! {
        #[test]
        fn no_text_stops_it(raw in ".{0,80}") {
            let shown = mathml(&raw);
            prop_assert!(shown.as_str().starts_with("<math>") && shown.as_str().ends_with("</math>"));
        }

        #[test]
        fn deep_nesting_is_refused_not_followed(depth in 1_usize..5000) {
            let raw = format!("{}x{}", "(".repeat(depth), ")".repeat(depth));
            prop_assert_eq!(Formula::parse(&raw).is_some(), depth <= 40);
        }
    }
}
