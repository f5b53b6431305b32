//! Plain bearings and losses, from a site file to the word: floors and ceilings against published
//! examples, candidates at the temperature of their own losses.

mod bearings;
mod losses;
mod shares;

use crate::scenario::{Ran, on};
use filmwright::cli::host::MemoryHost;
use serde_json::Value;

/// The oils, one a line.
pub(crate) fn oils() -> String {
    let line = |id: &str, kind: &str, base: &str, nu: (f64, f64), rest: &str| {
        format!(
            "{id}: {{ kind: {kind}, base: \"{base}\", viscosity: [{} mm2/s at 40 degC, {} mm2/s at \
             100 degC], pour point: -30 degC{rest} }}\n",
            nu.0, nu.1
        )
    };
    let gear = ", classes: [CKC], additives: [EP], sulphur: inactive";
    let mut text = String::from("file: oils 1\n");
    for (id, nu) in [
        ("TU-5", (5.0, 1.7)),
        ("TU-10", (10.0, 2.6)),
        ("TU-32", (32.0, 5.4)),
        ("TU-46", (46.0, 6.8)),
        ("TU-100", (100.0, 11.2)),
        ("TU-320", (320.0, 24.0)),
    ] {
        text.push_str(&line(
            id,
            "circulating",
            "mineral II",
            nu,
            ", density: 870 kg/m3 at 15 degC",
        ));
    }
    text.push_str(&line(
        "HV-46",
        "hydraulic",
        "mineral I, polymer-thickened",
        (46.0, 8.2),
        "",
    ));
    for (id, nu) in [("GO-220", (220.0, 19.0)), ("GO-460", (460.0, 30.5))] {
        text.push_str(&line(id, "gear", "mineral I", nu, gear));
    }
    text
}

/// Machines as they stand below `machines:`, with what stands before it.
pub(crate) fn host(head: &str, machines: &str) -> MemoryHost {
    let text = format!("file: site 1\nsite: Plain bearings\n{head}machines:\n{machines}");
    MemoryHost::new()
        .with("site.yaml", &text)
        .with("oils.yaml", &oils())
}

/// A run on such a site.
pub(crate) fn ran(head: &str, machines: &str, arguments: &str) -> Ran {
    on(host(head, machines), arguments)
}

/// The demands of the only machine.
pub(crate) fn needs(head: &str, machines: &str) -> Value {
    ran(head, machines, "need -f json -q").json()
}

/// The demand of a rule.
pub(crate) fn demand<'v>(needs: &'v Value, rule: &str) -> &'v Value {
    let list = needs["demands"].as_array().expect("a list");
    list.iter()
        .find(|d| d["rule"].as_str().is_some_and(|r| r.ends_with(rule)))
        .unwrap_or_else(|| panic!("no {rule}: {list:#?}"))
}

/// The value of a step by its symbol.
pub(crate) fn step(needs: &Value, symbol: &str) -> f64 {
    let steps = needs["steps"][0]["steps"].as_array().expect("steps");
    let found = steps.iter().find(|s| s["symbol"] == symbol);
    found.unwrap_or_else(|| panic!("no step {symbol}: {steps:#?}"))["result"]["value"]
        .as_f64()
        .expect("a number")
}

/// The judgement of an oil.
pub(crate) fn judged<'v>(document: &'v Value, oil: &str) -> &'v Value {
    let list = document["judgements"].as_array().expect("a list");
    let found = list.iter().find(|j| j["oil"] == oil);
    found.unwrap_or_else(|| panic!("{oil} is not weighed"))
}

pub(crate) fn near(found: f64, want: f64, tolerance: f64) {
    assert!(
        (found / want - 1.0).abs() <= tolerance,
        "{found} where {want} is expected"
    );
}
