//! What every command shares: where results go, how they look, what the run is dated.

use super::exit::Exit;
use super::host::Host;
use super::{Format, Marks, Shared, UnitSystem, When};
use crate::quantity::show::Units;
use crate::results::csv::{Dialect, Table, write};
use std::path::{Path, PathBuf};

/// A run: its host and its shared options.
pub struct Session<'h> {
    /// The machine it runs on.
    pub host: &'h mut dyn Host,
    /// Shared options.
    pub shared: Shared,
    /// Notes for standard error, printed at the end.
    notes: Vec<String>,
}

impl<'h> Session<'h> {
    /// A run.
    pub fn new(host: &'h mut dyn Host, shared: Shared) -> Self {
        Self {
            host,
            shared,
            notes: Vec::new(),
        }
    }

    /// Units of the output.
    pub fn units(&self) -> Units {
        match self.shared.units {
            UnitSystem::Si => Units::Si,
            UnitSystem::Us => Units::Us,
        }
    }

    /// Verdict marks.
    pub fn marks(&self) -> Marks {
        self.shared.marks
    }

    /// Columns of the output.
    pub fn width(&self) -> usize {
        if self.shared.out.is_some() {
            100
        } else {
            self.host.width().max(60)
        }
    }

    /// Whether the output is coloured.
    pub fn colour(&self) -> bool {
        match self.shared.color {
            When::Always => true,
            When::Never => false,
            When::Auto => {
                let quiet = self
                    .host
                    .variable("NO_COLOR")
                    .is_some_and(|v| !v.is_empty())
                    || self.host.variable("TERM").as_deref() == Some("dumb");
                !quiet && self.host.err_is_terminal()
            }
        }
    }

    /// The date of judgement: `--on`, `reviewed`, `SOURCE_DATE_EPOCH`, today.
    pub fn date(&self, reviewed: Option<&str>) -> String {
        if let Some(on) = &self.shared.on {
            return on.clone();
        }
        if let Some(reviewed) = reviewed {
            return reviewed.to_owned();
        }
        let epoch = self
            .host
            .variable("SOURCE_DATE_EPOCH")
            .and_then(|v| v.trim().parse().ok());
        match epoch {
            Some(seconds) => super::host::date_of(seconds),
            None => self.host.today(),
        }
    }

    /// The folder files are looked for in.
    pub fn folder(&self) -> PathBuf {
        if let Some(dir) = &self.shared.dir {
            return PathBuf::from(dir);
        }
        let start = self.host.working_folder();
        let mut at: &Path = &start;
        loop {
            if self.host.exists(&at.join("site.yaml")) {
                return at.to_path_buf();
            }
            match at.parent() {
                Some(up) => at = up,
                None => return start,
            }
        }
    }

    /// Writes results: to standard output, or to the file of `--out`.
    pub fn result(&mut self, text: &str) -> Exit {
        match self.shared.out.clone() {
            Some(path) if path != "-" => self.file(Path::new(&path), text.as_bytes()),
            _ => {
                self.host.out(text);
                Exit::Done
            }
        }
    }

    /// Writes results that come in parts.
    pub fn result_in_parts(&mut self, parts: &mut dyn Iterator<Item = String>) -> Exit {
        match self.shared.out.clone() {
            Some(path) if path != "-" => {
                let path = Path::new(&path);
                if let Err(exit) = self.may_write(path) {
                    return exit;
                }
                match self.host.write_in_parts(path, parts) {
                    Ok(()) => Exit::Done,
                    Err(error) => self.unwritten(path, &error),
                }
            }
            _ => {
                for part in parts {
                    self.host.out(&part);
                }
                Exit::Done
            }
        }
    }

    fn unwritten(&mut self, path: &Path, error: &std::io::Error) -> Exit {
        self.fail(&format!("{} cannot be written: {error}", path.display()));
        Exit::File
    }

    /// Writes a file of the program's own making.
    pub fn file(&mut self, path: &Path, bytes: &[u8]) -> Exit {
        match self.may_write(path).and_then(|()| self.put(path, bytes)) {
            Ok(()) => Exit::Done,
            Err(exit) => exit,
        }
    }

    /// Whether a file may be written: it is not there, the program made it, or the user said so.
    ///
    /// # Errors
    /// It may not; that has been told.
    pub fn may_write(&mut self, path: &Path) -> Result<(), Exit> {
        if !self.shared.replace && self.host.exists(path) && !self.is_ours(path) {
            self.fail(&format!(
                "{} exists and was not made by filmwright\n  write  --replace to replace it, or another name after --out",
                path.display()
            ));
            return Err(Exit::File);
        }
        Ok(())
    }

    /// Whether a workbook may be written; it carries the program's mark inside.
    ///
    /// # Errors
    /// It may not; that has been told.
    pub fn may_write_book(&mut self, path: &Path) -> Result<(), Exit> {
        let packed = self
            .host
            .read(path)
            .is_ok_and(|b| crate::results::xlsx::is_ours(&b));
        if packed { Ok(()) } else { self.may_write(path) }
    }

    /// Writes a file that may be written.
    ///
    /// # Errors
    /// It cannot be written; that has been told.
    pub fn put(&mut self, path: &Path, bytes: &[u8]) -> Result<(), Exit> {
        let written = self.host.write(path, bytes);
        written.map_err(|error| self.unwritten(path, &error))
    }

    /// Whether a file carries the program's mark in its first or last kilobyte.
    fn is_ours(&self, path: &Path) -> bool {
        let Ok(bytes) = self.host.read(path) else {
            return false;
        };
        let mark = b"filmwright";
        let head = &bytes[..bytes.len().min(4096)];
        let tail = &bytes[bytes.len().saturating_sub(1024)..];
        let has = |part: &[u8]| part.windows(mark.len()).any(|w| w == mark);
        bytes.is_empty() || has(head) || has(tail)
    }

    /// A table as text in the dialect asked for.
    pub fn csv(&self, table: &Table) -> String {
        let dialect = if self.shared.csv_excel {
            Dialect::Spreadsheet
        } else {
            Dialect::Plain
        };
        write(table, dialect)
    }

    /// A table in the dialect asked for.
    pub fn table(&mut self, table: &Table) -> Exit {
        let text = self.csv(table);
        self.result(&text)
    }

    /// Shows how far the run is: on a terminal, after two seconds, in one line.
    pub fn progress(&mut self, says: &str, done: usize, of: usize) {
        /// Runs shorter than this show no progress, ms.
        const PATIENCE: u128 = 2000;
        let quiet = self.shared.quiet || !self.host.err_is_terminal();
        if !quiet && self.host.elapsed_ms() > PATIENCE {
            self.host.progress(says, done, of);
        }
    }

    /// Whether a format was asked for.
    pub fn wants(&self, format: Format) -> bool {
        self.shared.format == format
    }

    /// An error of the run itself.
    pub fn fail(&mut self, message: &str) {
        self.host.err(&format!("error: {message}\n"));
    }

    /// A note, unless the user wants none.
    pub fn note(&mut self, message: &str) {
        if !self.shared.quiet {
            self.notes.push(message.to_owned());
        }
    }

    /// Prints the notes gathered.
    pub fn finish(&mut self) {
        for note in std::mem::take(&mut self.notes) {
            self.host.err(&format!("{note}\n"));
        }
    }
}
