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
            self.say(Kind::Question, None, &name, super::WHICH_PAG);
            base = Some("PAG water-soluble".to_owned());
        }
        let grade = self
            .grade
            .clone()
            .or_else(|| read.grade.map(|g| format!("ISO VG {g}")));
        let viscosity = match (self.points.as_slice(), grade, &self.vi) {
            ([_, _, ..], ..) => {
                self.rises();
                let points: Vec<String> = self.points.iter().map(|(_, p)| item(p)).collect();
                Some(format!("[{}]", points.join(", ")))
            }
            ([(_, one)], _, Some(vi)) => Some(format!("[{}, VI {vi}]", item(one))),
            (_, Some(grade), Some(vi)) => Some(format!("[{grade}, VI {vi}]")),
            (points, Some(grade), None) => {
                if let [(_, one)] = points {
                    let says = format!(
                        "{one} alone gives no slope: {grade} stands in its place; what is the other viscosity, or the index?"
                    );
                    self.say(Kind::Question, None, "", says);
                }
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

    /// Viscosities that rise with temperature are asked about: columns may be exchanged or shifted.
    fn rises(&mut self) {
        let figure = |text: &str| text.split(' ').next()?.parse::<f64>().ok();
        let same_unit = |a: &str, b: &str| a.split(' ').nth(1) == b.split(' ').nth(1);
        let found = self.points.windows(2).find_map(|pair| {
            let ((_, a), (_, b)) = (&pair[0], &pair[1]);
            let rises = same_unit(a, b) && figure(b)? >= figure(a)?;
            rises.then(|| format!("{a} and {b}: an oil is thinner when hotter; are the two exchanged, or the columns of this row shifted?"))
        });
        if let Some(says) = found {
            self.say(Kind::Question, None, "", says);
        }
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
