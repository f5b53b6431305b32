//! A run of the program in memory: files and arguments in, output and exit code out.

use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use filmwright::cli::run::run;

/// What a run gave.
pub(crate) struct Ran {
    /// Exit code.
    pub exit: Exit,
    /// Standard output.
    pub out: String,
    /// Standard error.
    pub err: String,
    /// The host, with the files written.
    pub host: MemoryHost,
}

/// Runs `filmwright ARGUMENTS`, split at spaces; a quoted argument keeps its spaces.
pub(crate) fn filmwright(arguments: &str) -> Ran {
    on(MemoryHost::new(), arguments)
}

/// The same on a host with files.
pub(crate) fn on(mut host: MemoryHost, arguments: &str) -> Ran {
    let exit = run(split(arguments), &mut host);
    Ran {
        exit,
        out: host.stdout.clone(),
        err: host.stderr.clone(),
        host,
    }
}

fn split(arguments: &str) -> Vec<String> {
    let mut words = vec!["filmwright".to_owned()];
    let mut word = String::new();
    let (mut quoted, mut begun) = (false, false);
    for c in arguments.chars() {
        match c {
            '"' => {
                quoted = !quoted;
                begun = true;
            }
            ' ' if !quoted => {
                if begun {
                    words.push(std::mem::take(&mut word));
                }
                begun = false;
            }
            c => {
                word.push(c);
                begun = true;
            }
        }
    }
    if begun {
        words.push(word);
    }
    words
}

impl Ran {
    /// The output as JSON.
    pub(crate) fn json(&self) -> serde_json::Value {
        serde_json::from_str(&self.out)
            .unwrap_or_else(|e| panic!("not JSON: {e}\n{}\n{}", self.out, self.err))
    }
}
