use super::*;

const FILE: FileId = FileId(0);

fn tree(text: &str) -> Node {
    let gated = read(FILE, text);
    assert_eq!(gated.faults, [], "{text}");
    assert!(gated.complete);
    gated.root.expect("not empty")
}

fn refused(text: &str) -> (FaultKind, &str) {
    let gated = read(FILE, text);
    let fault = gated.faults.into_iter().next().expect("refused");
    let span = fault.span.start as usize..fault.span.end as usize;
    (fault.kind, &text[span])
}

fn syntax(text: &str) -> (Syntax, &str) {
    match refused(text) {
        (FaultKind::Syntax(s), marked) => (s, marked),
        (other, _) => panic!("{other:?} in {text}"),
    }
}

/// The value under a path of keys and item numbers.
fn at<'n>(mut node: &'n Node, path: &[&str]) -> &'n Node {
    for step in path {
        node = match &node.kind {
            NodeKind::Map(entries) => {
                &entries
                    .iter()
                    .find(|e| e.key.text == *step)
                    .expect("key is there")
                    .value
            }
            NodeKind::Seq(items) => &items[step.parse::<usize>().expect("a number")],
            _ => panic!("no {step}"),
        };
    }
    node
}

fn slice<'t>(text: &'t str, node: &Node) -> &'t str {
    &text[node.span.start as usize..node.span.end as usize]
}

#[test]
fn every_scalar_stays_text_with_its_exact_bytes() {
    let text = "tag: 0104\nno: no\ntime: 12:30\nµ: 3 µm # rise\nlong: a\n  b\nq: \"say \\\"x\\\"\"\n\
                s: 'it''s'\nblock: |\n  one\n  two\n\nempty:\nlast: ~\n";
    let root = tree(text);
    for (key, read, written) in [
        ("tag", "0104", "0104"),
        ("no", "no", "no"),
        ("time", "12:30", "12:30"),
        ("µ", "3 µm", "3 µm"),
        ("long", "a b", "a\n  b"),
        ("q", "say \"x\"", "\"say \\\"x\\\"\""),
        ("s", "it's", "'it''s'"),
        ("block", "one\ntwo\n", "|\n  one\n  two"),
        ("empty", "", ""),
        ("last", "~", "~"),
    ] {
        let node = at(&root, &[key]);
        assert_eq!(node.text(), Some(read), "{key}");
        assert_eq!(slice(text, node), written, "{key}");
    }
    assert!(at(&root, &["empty"]).is_blank());
    assert_eq!(
        &text[..at(&root, &["empty"]).span.start as usize][..],
        &text[..text.find("empty:").expect("there") + 6]
    );
}

#[test]
fn values_with_commas_quotes_and_ranges_are_one_text() {
    let text = "rise: 42 K, measured 2026-07-18, \"92 % load, one reading\"\n\
                bearing: { bore: 95 mm, outside: 170 mm }\n\
                points: [220 mm2/s at 40 degC, 26.4 mm2/s at 100 degC, test \"20 h, roller\"]\n";
    let root = tree(text);
    assert_eq!(
        at(&root, &["rise"]).text(),
        Some("42 K, measured 2026-07-18, \"92 % load, one reading\"")
    );
    assert_eq!(
        slice(text, at(&root, &["bearing"])),
        "{ bore: 95 mm, outside: 170 mm }"
    );
    assert_eq!(at(&root, &["bearing", "outside"]).text(), Some("170 mm"));
    // A bracketed list splits at every comma; the reader joins the clause behind again.
    assert_eq!(at(&root, &["points"]).items().map(<[Node]>::len), Some(4));
    assert_eq!(at(&root, &["points", "3"]).text(), Some("roller\""));
}

#[test]
fn parts_of_a_text_find_their_bytes() {
    for (text, part, want) in [
        ("a: 42 degC rise\n", "degC", "degC"),
        ("a: \"42 degC\"\n", "degC", "degC"),
        ("a: 42\n   degC µ\n", "degC", "degC"),
        ("a: 42\n   degC µ\n", "42 degC", "42\n   degC"),
        ("a: 'it''s so'\n", "so", "'it''s so'"),
    ] {
        let root = tree(text);
        let node = at(&root, &["a"]);
        let read = node.text().expect("text");
        let from = read.find(part).expect("part");
        let span = node.part(text, from..from + part.len());
        assert_eq!(
            &text[span.start as usize..span.end as usize],
            want,
            "{text}"
        );
    }
}

#[test]
fn refuses_what_would_give_a_value_two_origins() {
    for (text, kind, marked) in [
        ("a: &x 1\n", FaultKind::Anchor("x".into()), "&x"),
        ("a: *x\n", FaultKind::Alias("x".into()), "*x"),
        ("<<: { a: 1 }\n", FaultKind::Merge, "<<"),
        ("a: !t 3\n", FaultKind::Tag("!t".into()), "!t "),
        ("a: 1\n---\nb: 2\n", FaultKind::SecondDocument, "---"),
        ("%YAML 1.2\n---\na: 1\n", FaultKind::Directive, "%YAML 1.2"),
        ("? [a, b]\n: c\n", FaultKind::KeyNotText, "[a, b]"),
        ("# nothing\n", FaultKind::Empty, ""),
    ] {
        assert_eq!(refused(text), (kind, marked), "{text}");
    }
}

#[test]
fn refuses_depth_at_once_and_stays_below_it() {
    let nested = |n: usize| format!("{}{}", "[".repeat(n), "]".repeat(n));
    assert!(read(FILE, &nested(MAX_DEPTH)).faults.is_empty());
    for text in [
        nested(MAX_DEPTH + 1),
        "[".repeat(400_000),
        "- ".repeat(400_000),
    ] {
        assert!(matches!(refused(&text).0, FaultKind::Depth { limit: 64 }));
    }
}

#[test]
fn bad_form_is_named_and_marked() {
    for (text, want, marked) in [
        ("a:\n\tb: 1\n", Syntax::Tab, "b"),
        ("a:\n  b: 1\n c: 2\n", Syntax::Indent, "c: 2"),
        ("a: 1\n  b: 2\n", Syntax::Indent, "b: 2"),
        ("a: - b\n", Syntax::Indent, "a: - b"),
        ("a: \"abc\nb: 1\n", Syntax::QuoteOpen, "\"abc"),
        ("a: \"x\" y\n", Syntax::QuoteTail, "y"),
        ("a: \"\\q\"\n", Syntax::Escape, "\"\\q\""),
        ("a: Foo: bar # c\n", Syntax::Colon, "Foo: bar"),
        (
            "a:\n  speed:236 r/min\n  b: 1\n",
            Syntax::ColonSpace,
            "speed:236 r/min",
        ),
        ("a: 1\nb\nc: 2\n", Syntax::KeyWanted, "b"),
        ("a: @x\n", Syntax::Character('@'), "@"),
        ("a: , x\n", Syntax::Character(','), ","),
        ("a: b\u{7}c\n", Syntax::Character('\u{7}'), "b"),
    ] {
        assert_eq!(syntax(text), (want, marked), "{text}");
    }
    let bracket = |open, close| Syntax::Bracket { open, close };
    assert_eq!(syntax("a: [1, 2\nb: 3\n"), (bracket(Some('['), None), "["));
    assert_eq!(syntax("a: {b: 1\n"), (bracket(Some('{'), None), "{"));
    assert_eq!(syntax("a: [1}\n"), (bracket(Some('['), Some('}')), "["));
    assert_eq!(syntax("a: ]\n"), (bracket(None, Some(']')), "]"));
}

#[test]
fn what_stands_before_a_break_is_still_read() {
    let gated = read(FILE, "a: 1\nb:\n  c: 2\n d: 3\n");
    assert!(!gated.complete);
    let root = gated.root.expect("some of it");
    assert_eq!(at(&root, &["a"]).text(), Some("1"));
}

proptest::proptest! {
    #[test]
    fn no_text_breaks_the_gate(text in "(\\PC|[-:#\\[\\]{}&*!|>'\"%@`,? \n\t]){0,60}") {
        let gated = read(FILE, &text);
        for fault in &gated.faults {
            let span = fault.span.start as usize..fault.span.end as usize;
            proptest::prop_assert!(span.end <= text.len() + 1);
        }
    }

    #[test]
    fn spans_of_plain_values_are_their_text(value in "[a-z0-9][a-z0-9 .,/%µ°+-]{0,20}[a-z0-9]") {
        let text = format!("key: {value}\n");
        let root = tree(&text);
        let node = at(&root, &["key"]);
        proptest::prop_assert_eq!(node.text(), Some(value.as_str()));
        proptest::prop_assert_eq!(slice(&text, node), value.as_str());
    }
}
