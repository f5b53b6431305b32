//! The laboratory's tables of a run: found by their maps or named on the command line.

use super::exit::Exit;
use super::load::{Loaded, feed_fingerprint};
use super::session::Session;
use crate::assets;
use crate::audit::bottle::Bottle;
use crate::audit::read::read;
use crate::model::sample::SampleMap;
use crate::problem::{Code, Problem, Problems, Write};
use crate::source::Place;
use crate::table::limits::{Limit, TEXT_FILE_BYTES};
use crate::table::{self, Fault, Stated};
use std::path::{Path, PathBuf};

/// A table to be read.
struct Wanted {
    /// The map it is read by, by place in the site.
    map: Option<usize>,
    /// What it is called in messages.
    name: String,
    /// Where its bytes are; none for the demonstration's.
    path: Option<PathBuf>,
}

/// Bottles of all tables, and what was left aside.
#[derive(Debug, Default)]
pub struct Bottles {
    /// The bottles, in the order of tables and rows.
    pub list: Vec<Bottle>,
    /// The tables read, by name, with the headings of columns that are not read.
    pub tables: Vec<(String, Vec<String>)>,
}

impl Session<'_> {
    /// Reads every laboratory table of the run.
    ///
    /// # Errors
    /// A table that cannot be read, or is none; everything wrong with it has been told.
    pub fn bottles(
        &mut self,
        loaded: &mut Loaded,
        decimal_comma: Option<bool>,
    ) -> Result<Bottles, Exit> {
        let wanted = self.wanted_tables(loaded);
        let mut found = Bottles::default();
        let mut problems = Problems::new();
        for one in wanted {
            self.one_table(loaded, &one, decimal_comma, &mut found, &mut problems)?;
        }
        if self.shared.strict {
            problems.make_strict();
        }
        if problems.failed().is_some() {
            return Err(self.told(&loaded.sources, &problems));
        }
        self.warn(&loaded.sources, &problems);
        for problem in problems.sorted() {
            loaded.problems.push(problem.clone());
        }
        Ok(found)
    }

    /// Tells problems that were found with the bottles.
    ///
    /// # Errors
    /// One of them is an error, or counts as one; all have been told.
    pub fn bottle_problems(&mut self, loaded: &Loaded, list: Vec<Problem>) -> Result<(), Exit> {
        let mut problems = Problems::new();
        for problem in list {
            problems.push(problem);
        }
        if self.shared.strict {
            problems.make_strict();
        }
        if problems.failed().is_some() {
            return Err(self.told(&loaded.sources, &problems));
        }
        self.warn(&loaded.sources, &problems);
        Ok(())
    }

    fn wanted_tables(&self, loaded: &Loaded) -> Vec<Wanted> {
        let maps = &loaded.site.samples;
        let named: Vec<&String> = self.shared.samples.iter().filter(|n| !is_yaml(n)).collect();
        if !named.is_empty() {
            let tables = named.into_iter().map(|name| Wanted {
                map: (!maps.is_empty()).then_some(0),
                name: name.replace('\\', "/"),
                path: Some(PathBuf::from(name)),
            });
            return tables.collect();
        }
        let with_table = maps
            .iter()
            .enumerate()
            .filter_map(|(i, m)| Some((i, m, m.read.as_ref()?)));
        with_table
            .map(|(i, map, read)| Wanted {
                map: Some(i),
                name: read.value.clone(),
                path: loaded
                    .folder
                    .as_ref()
                    .map(|folder| self.beside(folder, loaded, map).join(&read.value)),
            })
            .collect()
    }

    /// The folder a map stands in.
    fn beside(&self, folder: &Path, loaded: &Loaded, map: &SampleMap) -> PathBuf {
        let Place::Text(span) = &map.origin.place else {
            return folder.to_path_buf();
        };
        let name = loaded
            .sources
            .file(span.file)
            .map_or("", |f| f.path.as_str());
        let parent = Path::new(name)
            .parent()
            .map(Path::to_path_buf)
            .unwrap_or_default();
        if self.shared.samples.is_empty() {
            folder.join(parent)
        } else {
            parent
        }
    }

    fn one_table(
        &mut self,
        loaded: &mut Loaded,
        wanted: &Wanted,
        decimal_comma: Option<bool>,
        found: &mut Bottles,
        problems: &mut Problems,
    ) -> Result<(), Exit> {
        let file = loaded.sources.add(&wanted.name, "");
        let place = wanted
            .map
            .and_then(|i| loaded.site.samples[i].read.as_ref())
            .map_or(Place::Program, |r| r.origin.place.clone());
        let bytes = match self.table_bytes(wanted) {
            Ok(Some(bytes)) => bytes,
            Ok(None) => {
                let fault = Fault::TooLarge {
                    limit: Limit::TextFileBytes,
                    at: None,
                };
                problems.error(fault.problem(&wanted.name, place));
                return Ok(());
            }
            Err(why) if matches!(place, Place::Text(_)) => {
                problems.error(
                    Problem::new(
                        Code::FileMissing,
                        format!("{} cannot be read: {why}", wanted.name),
                        place,
                    )
                    .write(Write::words(
                        "read: the path of the table, beside this file",
                    )),
                );
                return Err(self.file_error(loaded, problems));
            }
            Err(why) => {
                self.fail(&format!("{} cannot be read: {why}", wanted.name));
                return Err(Exit::File);
            }
        };
        feed_fingerprint(&mut loaded.fingerprint, &wanted.name, &bytes);
        let mut map = wanted.map.map(|i| loaded.site.samples[i].clone());
        if let (Some(map), Some(comma)) = (&mut map, decimal_comma) {
            map.decimal_comma = comma;
        }
        if map.is_none() && decimal_comma == Some(true) {
            map = Some(plain_map());
        }
        let stated = Stated {
            sheet: map.as_ref().and_then(|m| m.sheet.clone()),
            encoding: map.as_ref().and_then(|m| m.encoding.clone()),
            delimiter: map.as_ref().and_then(|m| m.delimiter),
        };
        let book = match table::read(&bytes, &stated) {
            Ok(book) => book,
            Err(fault) => {
                problems.error(fault.problem(&wanted.name, place));
                return Ok(());
            }
        };
        let Some(sheet) = book.sheets.iter().find(|s| s.read && !s.rows.is_empty()) else {
            problems.error(Fault::Empty.problem(&wanted.name, place));
            return Ok(());
        };
        let table = read(map.as_ref(), sheet, &wanted.name, file);
        for problem in table.problems {
            problems.push(problem);
        }
        found.list.extend(table.bottles);
        found.tables.push((wanted.name.clone(), table.unused));
        Ok(())
    }

    fn file_error(&mut self, loaded: &Loaded, problems: &Problems) -> Exit {
        self.told(&loaded.sources, problems);
        Exit::File
    }

    /// The bytes of a table; `None` where it is larger than is read.
    fn table_bytes(&self, wanted: &Wanted) -> Result<Option<Vec<u8>>, String> {
        let Some(path) = &wanted.path else {
            let text = assets::template(&format!("demo/{}", wanted.name));
            return text
                .map(|t| Some(t.as_bytes().to_vec()))
                .ok_or_else(|| "it is not there".to_owned());
        };
        if self
            .host
            .size(path)
            .is_ok_and(|size| size > TEXT_FILE_BYTES as u64)
        {
            return Ok(None);
        }
        self.host.read(path).map(Some).map_err(|e| e.to_string())
    }
}

/// A map that says nothing, for a table read by its headings with decimal commas.
fn plain_map() -> SampleMap {
    SampleMap {
        read: None,
        sheet: None,
        delimiter: None,
        encoding: None,
        decimal_comma: true,
        columns: Vec::new(),
        units: Vec::new(),
        dates: None,
        aliases: Vec::new(),
        origin: crate::source::Origin::flag("--decimal"),
    }
}

fn is_yaml(name: &str) -> bool {
    let end = Path::new(name).extension();
    end.is_some_and(|e| e.eq_ignore_ascii_case("yaml") || e.eq_ignore_ascii_case("yml"))
}
