//! The scripts: those of the command line, and behind them the names of the working folder.

use crate::cli::{Cli, Shell};
use clap::{Arg, Command, CommandFactory as _};
use clap_complete::generate;
use std::fmt::Write as _;

/// What names an argument takes.
fn names_of(arg: &Arg) -> Option<&'static str> {
    let value = arg
        .get_value_names()
        .and_then(|v| v.first())
        .map(|v| v.to_string().to_uppercase());
    let value = value.as_deref().unwrap_or("");
    if matches!(value, "FILE" | "DIR" | "KIND") {
        return None;
    }
    match (arg.get_id().as_str(), value) {
        ("tags" | "tag" | "only" | "at_machine" | "machine" | "machines", _) | (_, "TAG") => {
            Some("tags")
        }
        ("oil" | "with" | "keep" | "drop", _) | (_, "OIL") => Some("oils"),
        ("rules", _) | (_, "RULE") => Some("rules"),
        _ => None,
    }
}

/// A command, what names its positional arguments take, and its options.
type Place = (String, Vec<&'static str>, Vec<(String, &'static str)>);

/// Commands with the names their arguments take: positional, and by option.
fn places(command: &Command) -> Vec<Place> {
    command
        .get_subcommands()
        .map(|sub| {
            let positional = sub.get_positionals().filter_map(names_of).collect();
            let options = sub
                .get_opts()
                .filter_map(|a| Some((format!("--{}", a.get_long()?), names_of(a)?)))
                .collect();
            (sub.get_name().to_owned(), positional, options)
        })
        .collect()
}

/// The script of a shell.
pub(super) fn of(shell: Shell) -> String {
    let mut command = Cli::command();
    command.build();
    let mut bytes = Vec::new();
    let kind = match shell {
        Shell::Bash => clap_complete::Shell::Bash,
        Shell::Zsh => clap_complete::Shell::Zsh,
        Shell::Fish => clap_complete::Shell::Fish,
        Shell::PowerShell => clap_complete::Shell::PowerShell,
    };
    generate(kind, &mut Cli::command(), "filmwright", &mut bytes);
    let plain = String::from_utf8_lossy(&bytes).into_owned();
    match shell {
        Shell::Bash => bash(plain, &command),
        Shell::Zsh => zsh(&plain, &command),
        Shell::Fish => fish(plain, &command),
        Shell::PowerShell => power_shell(&plain, &command),
    }
}

fn bash(mut script: String, command: &Command) -> String {
    script.push_str(
        r#"
# Names of the working folder: a line each, the name before a tab.
_filmwright_names() {
    local cur="${COMP_WORDS[COMP_CWORD]}" prev="${COMP_WORDS[COMP_CWORD-1]}" kind="" name
    case "${COMP_WORDS[1]} ${prev}" in
"#,
    );
    for (name, _, options) in places(command) {
        for (option, kind) in options {
            let _ = writeln!(script, "        \"{name} {option}\") kind={kind} ;;");
        }
    }
    script.push_str("    esac\n    if [[ -z $kind && $cur != -* ]]; then\n        local n=0 i\n");
    script.push_str("        for ((i = 2; i < COMP_CWORD; i++)); do [[ ${COMP_WORDS[i]} != -* ]] && ((n++)); done\n");
    script.push_str("        case \"${COMP_WORDS[1]}\" in\n");
    for (name, positional, _) in places(command) {
        match positional.as_slice() {
            [] => {}
            [one] => {
                let _ = writeln!(script, "            {name}) kind={one} ;;");
            }
            [first, second, ..] => {
                let _ = writeln!(
                    script,
                    "            {name}) if ((n == 0)); then kind={first}; else kind={second}; fi ;;"
                );
            }
        }
    }
    script.push_str(
        r#"        esac
    fi
    [[ -z $kind ]] && return
    while IFS=$'\t' read -r name _; do
        [[ $name == "$cur"* ]] && COMPREPLY+=("$(printf '%q' "$name")")
    done < <(filmwright completions --names "$kind" 2>/dev/null)
}
_filmwright_all() {
    _filmwright "$@"
    _filmwright_names
}
complete -F _filmwright_all -o nosort -o bashdefault -o default filmwright
"#,
    );
    script
}

fn zsh(script: &str, command: &Command) -> String {
    let mut out = String::new();
    for line in script.lines() {
        let mut line = line.to_owned();
        if line.contains(":_default") {
            for arg in command.get_subcommands().flat_map(Command::get_arguments) {
                let Some(kind) = names_of(arg) else { continue };
                let id = arg.get_id().as_str();
                let value = arg
                    .get_value_names()
                    .and_then(|v| v.first())
                    .map(ToString::to_string)
                    .unwrap_or_default();
                let option = arg.get_long().is_some_and(|l| {
                    line.contains(&format!("--{l}=[")) || line.contains(&format!("--{l}["))
                });
                let positional = arg.get_long().is_none()
                    && (line.contains(&format!("::{id} -- "))
                        || line.contains(&format!("':{id} -- "))
                        || line.contains(&format!(":{value} -- ")));
                if option || positional {
                    line = line.replace(":_default", &format!(":_filmwright_{kind}"));
                    break;
                }
            }
        }
        // The functions stand before the first call.
        if line.starts_with("if [ \"$funcstack[1]\"") {
            out.push_str(ZSH);
        }
        out.push_str(&line);
        out.push('\n');
    }
    out
}

const ZSH: &str = r#"_filmwright_named() {
    local -a names
    local name says
    while IFS=$'\t' read -r name says; do
        names+=("${name//:/\\:}:${says}")
    done < <(filmwright completions --names $1 2>/dev/null)
    _describe -t $1 $1 names
}
_filmwright_tags() { _filmwright_named tags }
_filmwright_oils() { _filmwright_named oils }
_filmwright_rules() { _filmwright_named rules }

"#;

fn fish(mut script: String, command: &Command) -> String {
    for (name, positional, options) in places(command) {
        let on = format!("__fish_filmwright_using_subcommand {name}");
        let list = |kind: &str| format!("(filmwright completions --names {kind} 2>/dev/null)");
        for kind in positional {
            let _ = writeln!(
                script,
                "complete -c filmwright -n \"{on}\" -f -a \"{}\"",
                list(kind)
            );
        }
        for (option, kind) in options {
            let long = option.trim_start_matches('-');
            let _ = writeln!(
                script,
                "complete -c filmwright -n \"{on}\" -l {long} -x -a \"{}\"",
                list(kind)
            );
        }
    }
    script
}

fn power_shell(script: &str, command: &Command) -> String {
    let mut names = String::from("    $kinds = switch ($command) {\n");
    for (name, positional, options) in places(command) {
        let mut kinds: Vec<&str> = positional;
        kinds.extend(options.iter().map(|(_, k)| *k));
        kinds.sort_unstable();
        kinds.dedup();
        if !kinds.is_empty() {
            let list: Vec<String> = kinds.iter().map(|k| format!("'{k}'")).collect();
            let _ = writeln!(
                names,
                "        'filmwright;{name}' {{ {} }}",
                list.join(", ")
            );
        }
    }
    names.push_str(
        r#"    }
    $completions = @($completions) + @(foreach ($kind in $kinds) {
        foreach ($line in (filmwright completions --names $kind 2>$null)) {
            $name, $says = $line -split "`t", 2
            if (-not $says) { $says = $name }
            $text = if ($name -match '[^\w./-]') { "'" + $name.Replace("'", "''") + "'" } else { $name }
            [CompletionResult]::new($text, $name, [CompletionResultType]::ParameterValue, $says)
        }
    })

"#,
    );
    match script.find("    $completions.Where{") {
        Some(at) => format!("{}{names}{}", &script[..at], &script[at..]),
        None => script.to_owned(),
    }
}
