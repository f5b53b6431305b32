//! The only door to files, clock, environment and terminal.

use std::collections::BTreeMap;
use std::io;
use std::path::{Path, PathBuf};

/// What a run may ask of the machine it runs on.
pub trait Host {
    /// The bytes of a file.
    ///
    /// # Errors
    /// Whatever the system says.
    fn read(&self, path: &Path) -> io::Result<Vec<u8>>;
    /// The names in a folder, sorted; folders end with `/`.
    ///
    /// # Errors
    /// Whatever the system says.
    fn list(&self, folder: &Path) -> io::Result<Vec<String>>;
    /// Writes a whole file under a temporary name, then renames it.
    ///
    /// # Errors
    /// Whatever the system says.
    fn write(&mut self, path: &Path, bytes: &[u8]) -> io::Result<()>;
    /// Writes a whole file that comes in parts, in the same way.
    ///
    /// # Errors
    /// Whatever the system says.
    fn write_in_parts(
        &mut self,
        path: &Path,
        parts: &mut dyn Iterator<Item = String>,
    ) -> io::Result<()>;
    /// Removes a file the program made.
    ///
    /// # Errors
    /// Whatever the system says.
    fn remove(&mut self, path: &Path) -> io::Result<()>;
    /// Size of a file, bytes, without reading it.
    ///
    /// # Errors
    /// Whatever the system says.
    fn size(&self, path: &Path) -> io::Result<u64>;
    /// Whether a file or folder is there.
    fn exists(&self, path: &Path) -> bool;
    /// The working folder.
    fn working_folder(&self) -> PathBuf;
    /// Today, `2026-12-01`.
    fn today(&self) -> String;
    /// An environment variable.
    fn variable(&self, name: &str) -> Option<String>;
    /// Results go here.
    fn out(&mut self, text: &str);
    /// Notes, warnings, errors and progress go here.
    fn err(&mut self, text: &str);
    /// Whether standard error is a terminal.
    fn err_is_terminal(&self) -> bool;
    /// Whether standard output is a terminal.
    fn out_is_terminal(&self) -> bool;
    /// Columns of the terminal; 80 when piped.
    fn width(&self) -> usize;
    /// All of standard input.
    ///
    /// # Errors
    /// Whatever the system says.
    fn input(&mut self) -> io::Result<Vec<u8>>;
    /// Milliseconds since the run began, for progress only.
    fn elapsed_ms(&self) -> u128;
    /// Shows how far the run is, in one line rewritten in place.
    fn progress(&mut self, says: &str, done: usize, of: usize);
    /// Takes that line away.
    fn progress_end(&mut self);
}

/// The real machine.
pub struct System {
    began: std::time::Instant,
    out: io::BufWriter<io::Stdout>,
    broken: bool,
    bar: Option<indicatif::ProgressBar>,
}

#[expect(
    clippy::disallowed_methods,
    reason = "the Host is where files, clock and environment are"
)]
impl System {
    /// The machine the program runs on.
    pub fn new() -> Self {
        let out = io::BufWriter::with_capacity(1 << 16, io::stdout());
        Self {
            began: std::time::Instant::now(),
            out,
            broken: false,
            bar: None,
        }
    }

    /// Flushes standard output; a closed pipe is not an error.
    pub fn finish(&mut self) {
        drop(io::Write::flush(&mut self.out));
    }
}

impl Default for System {
    fn default() -> Self {
        Self::new()
    }
}

#[expect(
    clippy::disallowed_methods,
    reason = "the Host is where files, clock and environment are"
)]
impl Host for System {
    fn read(&self, path: &Path) -> io::Result<Vec<u8>> {
        std::fs::read(path)
    }

    fn list(&self, folder: &Path) -> io::Result<Vec<String>> {
        let mut names = Vec::new();
        for entry in std::fs::read_dir(folder)? {
            let entry = entry?;
            let mut name = entry.file_name().to_string_lossy().into_owned();
            if entry.path().is_dir() {
                name.push('/');
            }
            names.push(name);
        }
        names.sort();
        Ok(names)
    }

    fn write(&mut self, path: &Path, bytes: &[u8]) -> io::Result<()> {
        let mut file = temporary(path)?;
        io::Write::write_all(&mut file, bytes)?;
        keep(file, path)
    }

    fn write_in_parts(
        &mut self,
        path: &Path,
        parts: &mut dyn Iterator<Item = String>,
    ) -> io::Result<()> {
        let mut file = io::BufWriter::with_capacity(1 << 16, temporary(path)?);
        for part in parts {
            io::Write::write_all(&mut file, part.as_bytes())?;
        }
        let file = file.into_inner().map_err(io::IntoInnerError::into_error)?;
        keep(file, path)
    }

    fn remove(&mut self, path: &Path) -> io::Result<()> {
        std::fs::remove_file(path)
    }

    fn size(&self, path: &Path) -> io::Result<u64> {
        std::fs::metadata(path).map(|m| m.len())
    }

    fn exists(&self, path: &Path) -> bool {
        path.exists()
    }

    fn working_folder(&self) -> PathBuf {
        std::env::current_dir().unwrap_or_else(|_| PathBuf::from("."))
    }

    fn today(&self) -> String {
        jiff::Timestamp::try_from(std::time::SystemTime::now())
            .map_or_else(|_| "1970-01-01".into(), |t| date_of(t.as_second()))
    }

    fn variable(&self, name: &str) -> Option<String> {
        std::env::var(name).ok()
    }

    fn out(&mut self, text: &str) {
        if !self.broken {
            self.broken = io::Write::write_all(&mut self.out, text.as_bytes()).is_err();
        }
    }

    fn err(&mut self, text: &str) {
        // Where both go to one place, what was said first stands first.
        self.finish();
        drop(io::Write::write_all(&mut io::stderr(), text.as_bytes()));
    }

    fn err_is_terminal(&self) -> bool {
        io::IsTerminal::is_terminal(&io::stderr())
    }

    fn out_is_terminal(&self) -> bool {
        io::IsTerminal::is_terminal(&io::stdout())
    }

    fn width(&self) -> usize {
        if self.out_is_terminal() {
            self.variable("COLUMNS")
                .and_then(|c| c.parse().ok())
                .unwrap_or(100)
        } else {
            80
        }
    }

    fn input(&mut self) -> io::Result<Vec<u8>> {
        let mut bytes = Vec::new();
        io::Read::read_to_end(&mut io::stdin(), &mut bytes)?;
        Ok(bytes)
    }

    fn elapsed_ms(&self) -> u128 {
        self.began.elapsed().as_millis()
    }

    fn progress(&mut self, says: &str, done: usize, of: usize) {
        let bar = self.bar.get_or_insert_with(|| {
            let target = indicatif::ProgressDrawTarget::stderr_with_hz(5);
            let bar = indicatif::ProgressBar::with_draw_target(None, target);
            bar.with_style(
                indicatif::ProgressStyle::with_template("{msg} {pos} of {len}")
                    .unwrap_or_else(|_| indicatif::ProgressStyle::default_bar()),
            )
        });
        bar.set_length(of as u64);
        bar.set_message(says.to_owned());
        bar.set_position(done as u64);
    }

    fn progress_end(&mut self) {
        if let Some(bar) = self.bar.take() {
            bar.finish_and_clear();
        }
    }
}

/// A file beside the one to be written, in a folder that is made where it is not there.
#[expect(
    clippy::disallowed_methods,
    reason = "the Host is where files, clock and environment are"
)]
fn temporary(path: &Path) -> io::Result<tempfile::NamedTempFile> {
    let folder = match path.parent() {
        Some(p) if !p.as_os_str().is_empty() => p.to_path_buf(),
        _ => PathBuf::from("."),
    };
    std::fs::create_dir_all(&folder)?;
    tempfile::NamedTempFile::new_in(&folder)
}

/// Gives a written file its name.
fn keep(file: tempfile::NamedTempFile, path: &Path) -> io::Result<()> {
    make_readable(file.as_file())?;
    file.persist(path).map_err(|e| e.error)?;
    Ok(())
}

/// A temporary file is private by default; a report is to be read by others.
#[cfg(unix)]
fn make_readable(file: &std::fs::File) -> io::Result<()> {
    use std::os::unix::fs::PermissionsExt;
    file.set_permissions(std::fs::Permissions::from_mode(0o644))
}

#[cfg(not(unix))]
fn make_readable(_: &std::fs::File) -> io::Result<()> {
    Ok(())
}

/// The UTC date of a Unix time, ISO form.
pub fn date_of(seconds: i64) -> String {
    jiff::Timestamp::from_second(seconds).map_or_else(
        |_| "1970-01-01".into(),
        |t| jiff::tz::Offset::UTC.to_datetime(t).date().to_string(),
    )
}

/// A machine in memory, for tests: files in a map, a fixed date, captured output.
#[derive(Clone, Debug, Default)]
pub struct MemoryHost {
    /// Files by path.
    pub files: BTreeMap<PathBuf, Vec<u8>>,
    /// Environment variables.
    pub variables: BTreeMap<String, String>,
    /// What was written to standard output.
    pub stdout: String,
    /// What was written to standard error.
    pub stderr: String,
    /// What standard input holds.
    pub stdin: Vec<u8>,
    /// Today.
    pub date: String,
    /// Whether standard error is a terminal.
    pub terminal: bool,
    /// What the clock shows, ms.
    pub clock_ms: u128,
    /// Progress shown.
    pub shown: Vec<String>,
}

impl MemoryHost {
    /// A machine without files, on a fixed day.
    pub fn new() -> Self {
        Self {
            date: "2026-11-02".into(),
            ..Self::default()
        }
    }

    /// Adds a file.
    #[must_use]
    pub fn with(mut self, path: &str, text: &str) -> Self {
        self.files
            .insert(PathBuf::from(path), text.as_bytes().to_vec());
        self
    }

    fn missing(path: &Path) -> io::Error {
        io::Error::new(
            io::ErrorKind::NotFound,
            format!("{} is not there", path.display()),
        )
    }
}

/// Paths are kept relative to the one folder there is.
fn plain(path: &Path) -> PathBuf {
    path.components()
        .filter(|c| matches!(c, std::path::Component::Normal(_)))
        .collect()
}

impl Host for MemoryHost {
    fn read(&self, path: &Path) -> io::Result<Vec<u8>> {
        self.files
            .get(&plain(path))
            .cloned()
            .ok_or_else(|| Self::missing(path))
    }

    fn list(&self, folder: &Path) -> io::Result<Vec<String>> {
        let folder = plain(folder);
        let mut names = std::collections::BTreeSet::new();
        for path in self.files.keys() {
            if let Ok(rest) = path.strip_prefix(&folder) {
                let mut parts = rest.iter();
                if let Some(first) = parts.next() {
                    let mut name = first.to_string_lossy().into_owned();
                    if parts.next().is_some() {
                        name.push('/');
                    }
                    names.insert(name);
                }
            }
        }
        if names.is_empty() && !folder.as_os_str().is_empty() {
            return Err(Self::missing(&folder));
        }
        Ok(names.into_iter().collect())
    }

    fn write(&mut self, path: &Path, bytes: &[u8]) -> io::Result<()> {
        self.files.insert(plain(path), bytes.to_vec());
        Ok(())
    }

    fn write_in_parts(
        &mut self,
        path: &Path,
        parts: &mut dyn Iterator<Item = String>,
    ) -> io::Result<()> {
        let whole: String = parts.collect();
        self.write(path, whole.as_bytes())
    }

    fn remove(&mut self, path: &Path) -> io::Result<()> {
        let gone = self.files.remove(&plain(path));
        gone.map(drop).ok_or_else(|| Self::missing(path))
    }

    fn size(&self, path: &Path) -> io::Result<u64> {
        self.read(path).map(|b| b.len() as u64)
    }

    fn exists(&self, path: &Path) -> bool {
        let path = plain(path);
        self.files.contains_key(&path) || self.files.keys().any(|p| p.starts_with(&path))
    }

    fn working_folder(&self) -> PathBuf {
        PathBuf::new()
    }

    fn today(&self) -> String {
        self.date.clone()
    }

    fn variable(&self, name: &str) -> Option<String> {
        self.variables.get(name).cloned()
    }

    fn out(&mut self, text: &str) {
        self.stdout.push_str(text);
    }

    fn err(&mut self, text: &str) {
        self.stderr.push_str(text);
    }

    fn err_is_terminal(&self) -> bool {
        self.terminal
    }

    fn out_is_terminal(&self) -> bool {
        false
    }

    fn width(&self) -> usize {
        80
    }

    fn input(&mut self) -> io::Result<Vec<u8>> {
        Ok(std::mem::take(&mut self.stdin))
    }

    fn elapsed_ms(&self) -> u128 {
        self.clock_ms
    }

    fn progress(&mut self, says: &str, done: usize, of: usize) {
        self.shown.push(format!("{says} {done} of {of}"));
    }

    fn progress_end(&mut self) {}
}
