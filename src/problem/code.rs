//! The names of problems: stable, kebab-case, `thing-fault`.
//!
//! Each has a page `rules/messages/<name>.md` that says what it means, with a wrong and a right
//! example; `help <name>` prints it.

use super::Severity;
use std::fmt;

macro_rules! codes {
    ($($(#[doc = $says:literal])+ $variant:ident = $name:literal $severity:ident,)+) => {
        /// What kind of problem it is.
        #[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
        pub enum Code {
            $($(#[doc = $says])+ $variant,)+
        }

        impl Code {
            /// Every code.
            pub const ALL: &'static [Self] = &[$(Self::$variant,)+];

            /// The stable name.
            pub const fn as_str(self) -> &'static str {
                match self {
                    $(Self::$variant => $name,)+
                }
            }

            /// How much such a problem weighs.
            pub const fn severity(self) -> Severity {
                match self {
                    $(Self::$variant => Severity::$severity,)+
                }
            }

            /// One line on what it means.
            pub fn says(self) -> &'static str {
                match self {
                    $(Self::$variant => concat!($($says),+).trim_start(),)+
                }
            }
        }
    };
}

codes! {
    // files
    /// A file is larger than the reader takes.
    FileTooLarge = "file-too-large" Error,
    /// A file is not UTF-8 text.
    FileNotUtf8 = "file-not-utf8" Error,
    /// A file holds nothing.
    FileEmpty = "file-empty" Error,
    /// The file does not say which kind it is.
    FileKindMissing = "file-kind-missing" Error,
    /// The file names a kind that does not exist.
    FileKindUnknown = "file-kind-unknown" Error,
    /// The file is of another edition of the format.
    FileEdition = "file-edition" Error,
    /// A file of one kind stands where another is read.
    FileKindOther = "file-kind-other" Error,
    /// There is no file of a kind that is needed.
    FileMissing = "file-missing" Error,

    // tables
    /// A file that is no workbook and no text table.
    TableKind = "table-kind" Error,
    /// A workbook or text table that is damaged.
    TableDamaged = "table-damaged" Error,
    /// A table larger than is read.
    TableTooLarge = "table-too-large" Error,
    /// A table that holds nothing.
    TableEmpty = "table-empty" Error,
    /// A sheet that is not in the workbook.
    TableSheet = "table-sheet" Error,
    /// A text table in another encoding than stated.
    TableEncoding = "table-encoding" Error,

    // samples
    /// A column that the map names and the table has not.
    ColumnMissing = "column-missing" Error,
    /// Two columns that could be the same.
    ColumnTwice = "column-twice" Error,
    /// A table without a row of headings that are understood.
    ColumnsUnknown = "columns-unknown" Error,
    /// A row whose cells stand under other headings.
    RowShifted = "row-shifted" Warning,
    /// A cell of a laboratory's table that is not understood.
    CellUnread = "cell-unread" Warning,
    /// A cell with a formula whose value was never stored.
    CellWithoutValue = "cell-without-value" Warning,
    /// A figure that stands for nothing in many tables.
    CellPlaceholder = "cell-placeholder" Warning,
    /// A date in another order of figures than stated.
    DateMixed = "date-mixed" Warning,
    /// Two bottles of one machine and day.
    BottleTwice = "bottle-twice" Warning,
    /// The oil on a label is not in the oil list.
    LabelUnknown = "label-unknown" Warning,

    // the form of the text
    /// Text that the file format does not allow at this place.
    YamlSyntax = "yaml-syntax" Error,
    /// A tab where only spaces may indent.
    YamlTab = "yaml-tab" Error,
    /// A line indented differently from those it belongs with.
    YamlIndent = "yaml-indent" Error,
    /// A quotation mark is not closed.
    YamlQuoteOpen = "yaml-quote-open" Error,
    /// Text stands behind a closed quotation mark.
    YamlQuoteTail = "yaml-quote-tail" Error,
    /// A backslash in double quotes with an unknown letter.
    YamlEscape = "yaml-escape" Error,
    /// A bracket is not closed, or closed by another kind.
    YamlBracket = "yaml-bracket" Error,
    /// A colon and a space inside a value that is not in quotes.
    YamlColon = "yaml-colon" Error,
    /// No space behind the colon of a key.
    YamlColonSpace = "yaml-colon-space" Error,
    /// A line that is neither a key with a value nor an item of a list.
    YamlKeyWanted = "yaml-key-wanted" Error,
    /// A character that may not begin a value, or may not stand in a text at all.
    YamlCharacter = "yaml-character" Error,
    /// An anchor.
    YamlAnchor = "yaml-anchor" Error,
    /// An alias.
    YamlAlias = "yaml-alias" Error,
    /// A merge key.
    YamlMerge = "yaml-merge" Error,
    /// A tag.
    YamlTag = "yaml-tag" Error,
    /// A directive.
    YamlDirective = "yaml-directive" Error,
    /// A second document in one file.
    YamlSecondDocument = "yaml-second-document" Error,
    /// Records nested too deep.
    YamlDepth = "yaml-depth" Error,
    /// A key that is a list or a record.
    KeyNotText = "key-not-text" Error,
    /// A key stated twice in one record.
    KeyTwice = "key-twice" Error,
    /// Two records of the same name.
    NameTwice = "name-twice" Error,

    // keys and shapes
    /// A key that no record of this kind has.
    KeyUnknown = "key-unknown" Error,
    /// A key that belongs to another record.
    KeyMisplaced = "key-misplaced" Error,
    /// A key that must be there and is not.
    KeyMissing = "key-missing" Error,
    /// A key without a value.
    ValueMissing = "value-missing" Error,
    /// A list or a record where one value is wanted.
    ValueWanted = "value-wanted" Error,
    /// One value or a record where a list is wanted.
    ListWanted = "list-wanted" Error,
    /// One value or a list where a record is wanted.
    RecordWanted = "record-wanted" Error,
    /// An empty list or record where something must stand.
    ListEmpty = "list-empty" Error,
    /// A word that is none of those understood.
    WordUnknown = "word-unknown" Error,
    /// Something other than yes or no.
    YesNoWanted = "yes-no-wanted" Error,

    // numbers and units
    /// No number where one is wanted.
    NumberWanted = "number-wanted" Error,
    /// A number that is not finite.
    NumberNotFinite = "number-not-finite" Error,
    /// A number that must be whole.
    NumberNotWhole = "number-not-whole" Error,
    /// A number without its unit.
    UnitMissing = "unit-missing" Error,
    /// A unit nobody knows.
    UnitUnknown = "unit-unknown" Error,
    /// A unit of another quantity.
    UnitOther = "unit-other" Error,
    /// A decimal comma.
    DecimalComma = "decimal-comma" Error,
    /// A comma between thousands.
    ThousandsComma = "thousands-comma" Error,
    /// A temperature where a temperature rise is wanted.
    RiseNotTemperature = "rise-not-temperature" Error,
    /// A gallon that may be two.
    GallonWhich = "gallon-which" Error,
    /// A value that cannot be.
    ValueImpossible = "value-impossible" Error,
    /// A value that can be, but rarely is.
    ValueUnusual = "value-unusual" Warning,
    /// A speed equal to the frequency of the mains.
    SpeedMains = "speed-mains" Warning,

    // the grammar of a value
    /// A range written from high to low.
    RangeReversed = "range-reversed" Error,
    /// One value where a range is wanted.
    RangeWanted = "range-wanted" Error,
    /// A range where one value is wanted.
    RangeUnwanted = "range-unwanted" Error,
    /// A range not written with two dots.
    RangeForm = "range-form" Error,
    /// A tolerance that is not understood.
    ToleranceForm = "tolerance-form" Error,
    /// A tolerance where none has a meaning.
    ToleranceUnwanted = "tolerance-unwanted" Error,
    /// `unknown` where a value must be stated.
    UnknownUnwanted = "unknown-unwanted" Error,
    /// `unknown` followed by something not understood.
    UnknownForm = "unknown-form" Error,
    /// A value only said to be about something.
    ValueVague = "value-vague" Error,
    /// A bound where a value is wanted.
    BoundUnwanted = "bound-unwanted" Error,
    /// A bound written with a sign.
    BoundForm = "bound-form" Error,
    /// `held at` where nothing can be held.
    HeldUnwanted = "held-unwanted" Error,
    /// No temperature beside a value that depends on one.
    AtMissing = "at-missing" Error,
    /// A temperature beside a value that does not depend on one.
    AtUnwanted = "at-unwanted" Error,
    /// Words behind the value that are no clause.
    ClauseUnknown = "clause-unknown" Error,
    /// The same clause twice.
    ClauseTwice = "clause-twice" Error,
    /// A clause where it has no meaning.
    ClauseUnwanted = "clause-unwanted" Error,
    /// A remark without quotation marks.
    NoteUnquoted = "note-unquoted" Error,
    /// A remark whose quotation mark is not closed.
    NoteOpen = "note-open" Error,
    /// A date that is not understood.
    DateForm = "date-form" Error,
    /// A date that does not exist.
    DateImpossible = "date-impossible" Error,
    /// Two dates in the wrong order.
    DateOrder = "date-order" Error,
    /// A cleanliness that is neither a code nor a word of ISO 281.
    CleanlinessForm = "cleanliness-form" Error,
    /// Numbers of teeth that are not understood.
    TeethForm = "teeth-form" Error,
    /// A price that is not understood.
    PriceForm = "price-form" Error,
    /// A viscosity grade that does not exist.
    GradeUnknown = "grade-unknown" Error,
    /// A unit of an instrument outside the range its conversion holds in.
    ConversionRange = "conversion-range" Error,

    /// A grade of another system, with what it was read as.
    GradeRead = "grade-read" Note,
    /// A viscosity in other units, with what it was read as.
    ViscosityRead = "viscosity-read" Note,

    // what belongs together
    /// A record names itself through others.
    LikeLoop = "like-loop" Error,
    /// A chain of records that copy each other is too long.
    LikeDeep = "like-deep" Error,
    /// A name to copy from that does not exist.
    LikeUnknown = "like-unknown" Error,
    /// Copied values dropped because the machine stands elsewhere.
    LikeDrops = "like-drops" Note,
    /// An area that is not in the file.
    AreaUnknown = "area-unknown" Error,
    /// An oil that is not in the list.
    OilUnknown = "oil-unknown" Error,
    /// A machine that is not in the file.
    MachineUnknown = "machine-unknown" Error,
    /// A machine named where one of its points is meant.
    PointWhich = "point-which" Error,
    /// A house rule that is not in the file.
    RuleUnknown = "rule-unknown" Error,
    /// A limit of a house rule that is not understood.
    HouseLimitForm = "house-limit-form" Error,
    /// A part that does not say what it is.
    PartKindMissing = "part-kind-missing" Error,
    /// A part that says it is two things.
    PartKindTwice = "part-kind-twice" Error,
    /// Parts both on a machine and on its points.
    PartsTwice = "parts-twice" Error,
    /// Two ways of stating one quantity, both used.
    StatedTwice = "stated-twice" Error,
    /// A sump reading without the ambient it was taken at.
    SumpAmbient = "sump-ambient" Error,
    /// An ambient of a reading without the reading.
    ReadingMissing = "reading-missing" Error,
    /// Running colder than at start.
    StartHotter = "start-hotter" Error,
    /// A start colder than the coldest ambient.
    StartColder = "start-colder" Warning,
    /// A bearing designation that is not in the table.
    BearingUnknown = "bearing-unknown" Error,
    /// Sizes of a bearing that contradict each other.
    BearingSize = "bearing-size" Error,
    /// A clearance that may be radial or diametral.
    ClearanceWhich = "clearance-which" Error,
    /// A component with no window in the rules.
    ComponentUnknown = "component-unknown" Error,
    /// Twelve monthly ranges wanted.
    MonthsTwelve = "months-twelve" Error,
    /// A floor above the ceiling.
    LimitsCrossed = "limits-crossed" Error,

    // oils
    /// An oil without its viscosity.
    ViscosityMissing = "viscosity-missing" Error,
    /// Viscosity that rises with temperature.
    CurveUpsideDown = "curve-upside-down" Error,
    /// Fewer points than a line needs.
    PointsTooFew = "points-too-few" Error,
    /// Two points at one temperature.
    PointsSameTemperature = "points-same-temperature" Error,
    /// A grade with neither viscosity index nor base.
    GradeAlone = "grade-alone" Error,
    /// A sheared viscosity above the new one.
    ShearedThicker = "sheared-thicker" Error,
    /// A base stock nobody knows.
    BaseUnknown = "base-unknown" Error,
    /// A density assumed to convert a dynamic viscosity.
    DensityAssumed = "density-assumed" Note,
    /// A polymer-thickened oil without a sheared viscosity.
    ShearMissing = "shear-missing" Note,

    // the command line and the judging
    /// An option's value that is not KEY=VALUE.
    SetForm = "set-form" Error,
    /// A key that several things have.
    SetWhich = "set-which" Error,
    /// A value for something that is not there.
    SetWhose = "set-whose" Error,
    /// Nothing matches what was asked.
    NothingToWeigh = "nothing-to-weigh" Error,
    /// No oil list keeps the terms asked for.
    ListImpossible = "list-impossible" Error,
    /// An oil is to stay on the list that no machine can take.
    KeepIdle = "keep-idle" Warning,
    /// No machine can be decided, so there is nothing to make a list from.
    NothingDecided = "nothing-decided" Error,
    /// A rule used outside the range it was made for.
    RuleRange = "rule-range" Warning,
    /// An acceptance that has run out.
    AcceptExpired = "accept-expired" Warning,
}

impl Code {
    /// The code of that name.
    pub fn named(name: &str) -> Option<Self> {
        Self::ALL.iter().copied().find(|c| c.as_str() == name)
    }
}

impl fmt::Display for Code {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.as_str())
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::collections::BTreeSet;

    #[test]
    fn names_are_unique_and_kebab_case() {
        let names: BTreeSet<&str> = Code::ALL.iter().map(|c| c.as_str()).collect();
        assert_eq!(names.len(), Code::ALL.len());
        for name in names {
            let fine = name.contains('-')
                && name
                    .bytes()
                    .all(|b| b.is_ascii_lowercase() || b.is_ascii_digit() || b == b'-');
            assert!(fine, "{name}");
            assert_eq!(Code::named(name).map(Code::as_str), Some(name));
        }
    }
    static PAGES: include_dir::Dir<'_> =
        include_dir::include_dir!("$CARGO_MANIFEST_DIR/rules/messages");

    #[test]
    fn every_code_has_its_page_and_every_page_its_code() {
        for code in Code::ALL {
            let page = PAGES
                .get_file(format!("{code}.md"))
                .and_then(include_dir::File::contents_utf8)
                .unwrap_or("");
            assert!(page.starts_with(&format!("# {code}\n\n")), "{code}");
            let says = code.says();
            assert!(page.contains(&says[1..]), "{code}: {says}");
            let examples = if code.severity() == Severity::Error {
                ["Wrong:", "Right:"]
            } else {
                ["Written:", "To change it:"]
            };
            for heading in examples {
                let (_, below) = page.split_once(heading).unwrap_or_default();
                assert!(below.trim_start().len() > 4, "{code}: {heading}");
            }
        }
        for file in PAGES.files() {
            let name = file.path().file_stem().and_then(|n| n.to_str());
            assert!(name.and_then(Code::named).is_some(), "{name:?}");
        }
    }
}
