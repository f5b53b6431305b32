//! Pages: the templates, the values they see, and the page around them.
//!
//! A document is an opening, sheets, and a closing ([`Templates::open`], [`Templates::sheet`],
//! [`Templates::close`]), so that a site of any size can be written sheet by sheet. A page of its
//! own is one of each.

mod drawn;
mod outline;
mod style;

use crate::assets;
use crate::report::escape::{self, Markup};
use crate::report::model::{Body, Frame, NavLink, Sheet};
use crate::report::{formula, markdown};
use std::fmt;
use tera::{Context, ErrorKind, Kwargs, State, Tera, TeraResult, Value};

/// The folder of the report's templates.
const FOLDER: &str = "report/";

/// Where a built-in template stands, for a user's own of the same name to go before it.
const PREFIX: &str = "builtin/";

/// The templates, built in and the user's.
#[derive(Debug)]
pub struct Templates {
    tera: Tera,
    /// The style sheet, close set: the same on every page.
    style: String,
}

/// What is wrong with a template, and where.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct TemplateProblem {
    /// The template's name; that of a built-in one starts with `<builtin>/`.
    pub template: String,
    /// Line, from 1; 0 where none is known.
    pub line: usize,
    /// Column, from 1; 0 where none is known.
    pub column: usize,
    /// What is wrong.
    pub message: String,
}

impl fmt::Display for TemplateProblem {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if self.line == 0 {
            write!(f, "{}: {}", self.template, self.message)
        } else {
            write!(
                f,
                "{}:{}:{}: {}",
                self.template, self.line, self.column, self.message
            )
        }
    }
}

impl std::error::Error for TemplateProblem {}

impl TemplateProblem {
    fn new(error: &tera::Error, template: &str) -> Self {
        if let ErrorKind::SyntaxError(report) | ErrorKind::RenderingError(report) = error.kind() {
            return Self {
                template: shown_name(report.filename()),
                line: report.span().start_line,
                column: report.span().start_col + 1,
                message: report.message().to_owned(),
            };
        }
        let mut message = error.to_string();
        let mut source = std::error::Error::source(error);
        while let Some(inner) = source {
            message = format!("{message}: {inner}");
            source = inner.source();
        }
        Self {
            template: shown_name(template),
            line: 0,
            column: 0,
            message,
        }
    }
}

/// A template's name without its folder.
fn plain_name(path: &str) -> &str {
    path.strip_prefix(FOLDER).unwrap_or(path)
}

fn shown_name(name: &str) -> String {
    name.strip_prefix(PREFIX).map_or_else(
        || name.to_owned(),
        |plain| format!("<builtin>/templates/report/{plain}"),
    )
}

/// Whether a sheet is a page of its own, and if not, whether it is the first of its document.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Position {
    /// Alone on its page, or the first of several: its name is the page's main heading.
    Leading,
    /// After others.
    Following,
}

impl Templates {
    /// The built-in templates, and the user's own as name and text (`sheet.html`); one of the same
    /// name stands in the place of the built-in.
    ///
    /// # Errors
    /// If a template is not understood; template, line and column are named.
    pub fn new(own: &[(String, String)]) -> Result<Self, TemplateProblem> {
        let mut tera = Tera::new();
        tera.autoescape_on([".html", ".svg"]);
        tera.set_escape_fn(escape_into);
        tera.register_filter("formula", |text: &str, _: Kwargs, _: &State<'_>| {
            safe(&formula::mathml(text))
        });
        tera.register_filter("whole", |text: &str, _: Kwargs, _: &State<'_>| {
            safe(&escape::whole(text))
        });
        tera.register_filter(
            "markdown",
            |text: &str, options: Kwargs, _: &State<'_>| -> TeraResult<Value> {
                let under = options.get::<u8>("under")?.unwrap_or(2);
                Ok(safe(&markdown::to_html(text, under)))
            },
        );
        tera.set_fallback_prefixes([PREFIX])
            .map_err(|e| TemplateProblem::new(&e, "templates"))?;
        let built_in = assets::templates(FOLDER);
        let built_in = built_in.iter().map(|file| {
            (
                format!("{PREFIX}{}", plain_name(&file.path)),
                file.text.as_str(),
            )
        });
        let own = own.iter().map(|(name, text)| (name.clone(), text.as_str()));
        let all: Vec<(String, &str)> = built_in.chain(own).collect();
        tera.add_raw_templates(all)
            .map_err(|e| TemplateProblem::new(&e, "templates"))?;
        let css = tera
            .render("style.css", &Context::new())
            .map_err(|e| TemplateProblem::new(&e, "style.css"))?;
        let style = style::close_set(&css);
        Ok(Self { tera, style })
    }

    /// Names of the built-in templates, sorted.
    pub fn built_in() -> Vec<String> {
        let files = assets::templates(FOLDER);
        files
            .iter()
            .map(|file| plain_name(&file.path).to_owned())
            .collect()
    }

    /// One sheet as a page of its own.
    ///
    /// # Errors
    /// If a template fails.
    pub fn page(&self, frame: &Frame, sheet: &Sheet) -> Result<String, TemplateProblem> {
        let mut out = self.open(frame, &sheet.title, Some(sheet), &sheet.nav)?;
        out.push_str(&self.sheet(frame, sheet, Position::Leading)?);
        out.push_str(&self.close(frame)?);
        Ok(out)
    }

    /// Everything before the first sheet. `only` is the sheet, where the page has but one: its
    /// number then stands in the foot of the printed page.
    ///
    /// # Errors
    /// If a template fails.
    pub fn open(
        &self,
        frame: &Frame,
        title: &str,
        only: Option<&Sheet>,
        nav: &[NavLink],
    ) -> Result<String, TemplateProblem> {
        let style = format!("{}{}", self.style, style::paper(frame, only));
        let mut context = Context::new();
        insert(&mut context, "frame", frame)?;
        insert(&mut context, "nav", nav)?;
        insert(&mut context, "title", title)?;
        let main = only.map_or_else(|| "main".to_owned(), |sheet| sheet.place.id("sheet"));
        insert(&mut context, "main", &main)?;
        context.insert_value("policy", Value::from(style::policy(&style)));
        context.insert_value("style", Value::safe_string(&style));
        context.insert_value("shared", safe(&super::draw::marks::shared()));
        self.render("open.html", &context)
    }

    /// One sheet.
    ///
    /// # Errors
    /// If a template fails.
    pub fn sheet(
        &self,
        frame: &Frame,
        sheet: &Sheet,
        position: Position,
    ) -> Result<String, TemplateProblem> {
        let mut context = Context::new();
        insert(&mut context, "frame", frame)?;
        insert(&mut context, "sheet", sheet)?;
        insert(&mut context, "prefix", &sheet.place.prefix)?;
        match &sheet.body {
            Body::Overview(body) => insert(&mut context, "body", body)?,
            Body::Area(body) => insert(&mut context, "body", body)?,
            Body::Machine(body) => insert(&mut context, "body", body)?,
            Body::Oil(body) => insert(&mut context, "body", body)?,
            Body::Audit(body) => insert(&mut context, "body", body)?,
            Body::Revision(body) => insert(&mut context, "body", body)?,
            Body::Methods(body) => insert(&mut context, "body", body)?,
            Body::Rules(body) => insert(&mut context, "body", body)?,
            Body::Glossary(body) => insert(&mut context, "body", body)?,
        }
        let outline = outline::outline(sheet);
        insert(&mut context, "outline", &outline)?;
        insert(
            &mut context,
            "h",
            &if position == Position::Leading {
                1_u8
            } else {
                2
            },
        )?;
        context.insert_value("drawn", drawn::all(sheet));
        context.insert_value("numbers", drawn::numbers(sheet));
        self.render("sheet.html", &context)
    }

    /// Everything after the last sheet.
    ///
    /// # Errors
    /// If a template fails.
    pub fn close(&self, frame: &Frame) -> Result<String, TemplateProblem> {
        let mut context = Context::new();
        insert(&mut context, "frame", frame)?;
        self.render("close.html", &context)
    }

    /// The style sheet, with the paper and the foot of the printed page.
    fn render(&self, name: &str, context: &Context) -> Result<String, TemplateProblem> {
        self.tera
            .render(name, context)
            .map_err(|e| TemplateProblem::new(&e, name))
    }
}

fn safe(markup: &Markup) -> Value {
    Value::safe_string(markup.as_str())
}

fn insert<T: serde::Serialize + ?Sized>(
    context: &mut Context,
    key: &'static str,
    value: &T,
) -> Result<(), TemplateProblem> {
    let value = Value::try_from_serializable(value).map_err(|e| TemplateProblem::new(&e, key))?;
    context.insert_value(key, value);
    Ok(())
}

fn escape_into(text: &str, out: &mut dyn std::io::Write) -> std::io::Result<()> {
    out.write_all(escape::text(text).as_bytes())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_users_template_goes_first_and_its_faults_are_placed() {
        let own = vec![(
            "close.html".to_owned(),
            "<p>{{ frame.site }}</p>".to_owned(),
        )];
        let templates = Templates::new(&own).expect("sound");
        let frame = Frame {
            site: "A < B".into(),
            ..Frame::default()
        };
        assert_eq!(templates.close(&frame).expect("renders"), "<p>A &lt; B</p>");

        let own = vec![(
            "close.html".to_owned(),
            "<p>\n  {{ frame.sight }}</p>".to_owned(),
        )];
        let problem = Templates::new(&own)
            .expect("sound")
            .close(&frame)
            .expect_err("no such field");
        assert_eq!((problem.template.as_str(), problem.line), ("close.html", 2));
        assert!(problem.message.contains("sight"), "{problem}");

        let own = vec![("close.html".to_owned(), "{% if %}".to_owned())];
        let problem = Templates::new(&own).expect_err("not a template");
        assert_eq!((problem.template.as_str(), problem.line), ("close.html", 1));
    }
}
