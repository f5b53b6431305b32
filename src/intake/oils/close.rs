//! An oil when its row is read: its viscosity, and what its name tells.

use super::{Row, about};
use crate::intake::finding::Kind;
use crate::intake::lubricant;
use crate::intake::yaml::item;

impl Row<'_, '_> {
    /// Viscosity from points, else from a grade; families and bases the name tells.
    pub(super) fn finish(mut self) {
        self.points.sort_by(|a, b| a.0.total_cmp(&b.0));
        let read = lubricant::read(&self.name);
        if self.record.get("additives").is_none() && !read.families.is_empty() {
            self.record
                .set("additives", format!("[{}]", read.families.join(", ")));
            let says = format!(
                "additives {} are taken from the name",
                read.families.join(", ")
            );
            let name = self.name.clone();
            self.say(Kind::ReadAs, None, &name, says);
        }
        let mut base = self
            .record
            .get("base")
            .map(str::to_owned)
            .or_else(|| read.base.map(str::to_owned));
        if base.as_deref() == Some("PAG") {
            let name = self.name.clone();
            self.say(
                Kind::Question,
                None,
                &name,
                "a PAG: water-soluble or oil-soluble? The base stays unknown",
            );
            base = None;
        }
        let grade = self
            .grade
            .clone()
            .or_else(|| read.grade.map(|g| format!("ISO VG {g}")));
        let viscosity = match (self.points.as_slice(), grade, &self.vi) {
            ([_, _, ..], ..) => {
                let points: Vec<String> = self.points.iter().map(|(_, p)| item(p)).collect();
                Some(format!("[{}]", points.join(", ")))
            }
            ([(_, one)], _, Some(vi)) => Some(format!("[{}, VI {vi}]", item(one))),
            (_, Some(grade), Some(vi)) => Some(format!("[{grade}, VI {vi}]")),
            (_, Some(grade), None) => {
                if base.is_none() {
                    self.say(Kind::Question, None, "", format!("only {grade} is known; mineral is assumed: which base is it, and what is its index?"));
                    self.record.set("base", "mineral");
                }
                Some(format!("[{grade}]"))
            }
            ([(_, one)], None, None) => {
                let one = one.clone();
                self.say(
                    Kind::Question,
                    None,
                    &one,
                    "one viscosity makes no curve: what is the other, or the viscosity index?",
                );
                None
            }
            ([], None, _) => {
                self.say(
                    Kind::Question,
                    None,
                    "",
                    "no viscosity and no grade: it cannot be weighed; ask for the data sheet",
                );
                None
            }
        };
        if let Some(base) = base {
            self.record.set("base", base);
        }
        self.close(viscosity);
    }

    fn close(mut self, viscosity: Option<String>) {
        let notes = std::mem::take(&mut self.record.notes);
        if !notes.is_empty() {
            let note = notes.join("; ");
            self.record.set("note", note);
        }
        if let Some(viscosity) = viscosity {
            self.record.set("viscosity", viscosity);
            self.all.counts.carried += 1;
            let record = std::mem::take(&mut self.record);
            self.all.records.push(record);
            return;
        }
        let mut text = String::new();
        self.record.write(&mut text, 0);
        self.all
            .without
            .push(text.lines().fold(String::new(), |all, line| {
                all + "# "
                    + line
                    + "
"
            }));
        let finding = about(
            self.number,
            Kind::LeftOut,
            &self.record.name.clone(),
            "carried as a remark only, for want of a viscosity",
        );
        self.all.findings.push(finding);
    }
}
