//! Headings of registers and oil lists: what each is, and the phrases it is known by, parted by
//! strokes. The words of the trade (common practice).

/// Words of registers. The longer phrases come first where one holds another.
pub(super) const SITE: &[(&str, &str)] = &[
    (
        "tag",
        "anlage|anlagen nr|anlagennummer|maschine|maschinen nr|technischer platz|repère|équipement|equipo|tag|tag no|tag number|asset|asset no|asset number|asset id|asset tag|equipment no|equipment code|equipment tag|equip tag|tag id|asset code|machine id|machine code|unit no|unit id|plant no|plant item|kks|kks code|equipment id|equipment number|equipment|functional location|machine no|machine tag|machine|item no|position no",
    ),
    (
        "row number",
        "row|row no|line|line no|no|nr|item|pos|position|#",
    ),
    (
        "point",
        "point|lube point|lubrication point|point name|component name",
    ),
    (
        "name",
        "bezeichnung|benennung|beschreibung|désignation|descripción|machine description|item description|tag description|equipment name|asset name|what it is|desc|description|asset description|equipment description|machine name|name|designation|service|function",
    ),
    (
        "area",
        "bereich|standort|abteilung|zone|área|area|location|department|plant area|building|section|site area|zone",
    ),
    (
        "count",
        "anzahl|stückzahl|count|quantity of machines|number of machines|no of machines|pieces|pcs|number off|no off",
    ),
    (
        "lubrication",
        "lubrication|lubrication method|lube method|method|lubrication type|system",
    ),
    (
        "fill",
        "füllung|füllmenge|ölmenge|ölfüllung|quantité d huile|cantidad de aceite|fill|fill quantity|fill volume|sump|sump volume|sump size|sump capacity|oil fill|oil charge|lubricant quantity|lubricant volume|lube quantity|reservoir|reservoir volume|reservoir size|capacity|oil capacity|oil quantity|oil volume|volume|tank|tank volume|litres|liters|charge|qty oil",
    ),
    (
        "annual use",
        "annual use|annual consumption|consumption|use per year|yearly use|top up per year",
    ),
    (
        "running hours",
        "running hours|operating hours|hours per year|annual hours|run hours",
    ),
    (
        "oil now",
        "schmierstoff|öl|ölsorte|schmieröl|lubrifiant|huile|lubricante|aceite|oil|lubricant|oil now|current oil|present oil|oil in use|oil type|lubricant type|lubricant in use|product|oil grade|lube|lube type|lube in use|present lubricant|current lubricant|oil used|lubricant used|oil name|lubricant name|lubricant grade|grease",
    ),
    (
        "asks for",
        "asks for|required class|oem spec|specification|spec required|required spec|additives required",
    ),
    (
        "maker grade",
        "maker grade|recommended grade|recommended viscosity|oem grade|oem viscosity|iso vg required|required viscosity grade|recommended vg|maker vg",
    ),
    ("sump rise", "sump rise|temperature rise|temp rise|rise"),
    (
        "at ambient",
        "at ambient|ambient at reading|air temperature at reading",
    ),
    (
        "start",
        "start|start temperature|start temp|cold start|cold start temperature|minimum start temperature|min start temp",
    ),
    (
        "heater",
        "heater|heater setting|heater set point|heater setpoint",
    ),
    ("heater power", "heater power"),
    (
        "ambient low",
        "amb min|ambient min|ambient low|min ambient|minimum ambient|ambient minimum|coldest ambient|lowest ambient|min air temp",
    ),
    (
        "ambient high",
        "amb max|ambient max|ambient high|max ambient|maximum ambient|ambient maximum|hottest ambient|highest ambient|max air temp",
    ),
    (
        "ambient",
        "ambient|ambient temperature|ambient range|ambient temp|air temperature",
    ),
    (
        "sump",
        "öltemp|öltemperatur|temperatur|betriebstemperatur|température|température huile|temperatura|temperatura aceite|temp|temperature|oil temp|oil temperature|sump temp|sump temperature|operating temperature|operating temp|running temperature|running temp|running temperature of oil|bulk oil temperature|t oil|working temperature|oil operating temperature|lubricant temperature|normal oil temperature",
    ),
    (
        "floor",
        "floor|min viscosity|minimum viscosity|viscosity min",
    ),
    (
        "ceiling",
        "ceiling|max viscosity|maximum viscosity|viscosity max",
    ),
    (
        "start limit",
        "start limit|max start viscosity|maximum start viscosity|max viscosity at start",
    ),
    (
        "oil limit",
        "oil limit|max oil temperature|maximum oil temperature|max oil temp",
    ),
    (
        "yellow metal",
        "yellow metal|yellow metals|bronze|copper alloys",
    ),
    ("backstop", "backstop|holdback|back stop"),
    ("wet clutch", "wet clutch|clutch in oil"),
    ("water entry", "water entry|water ingress|water"),
    (
        "seals",
        "dichtung|dichtungen|seals|seal material|seal|elastomer|seal materials",
    ),
    ("inside paint", "inside paint|internal paint|paint inside"),
    ("sight glass", "sight glass|level gauge"),
    ("food class", "food class|food grade|nsf class"),
    ("environment", "environment class|eal"),
    ("fire class", "fire class|fire resistance"),
    ("shock", "shock|shock load|duty"),
    (
        "cleanliness",
        "cleanliness|cleanliness target|iso 4406|target cleanliness",
    ),
    ("exposure", "exposure|indoor outdoor"),
    ("dust", "dust"),
    ("wet", "wet"),
    ("food zone", "food zone|food area"),
    (
        "motor speed",
        "motordrehzahl|motor speed|motor rpm|drive speed|motor n|n motor|speed motor",
    ),
    (
        "gear mesh: pinion speed",
        "pinion speed|input speed|speed pinion",
    ),
    (
        "gear mesh: ratio",
        "übersetzung|ratio|gear ratio|reduction ratio|reduction",
    ),
    (
        "gear mesh: centre distance",
        "centre distance|center distance",
    ),
    ("gear mesh: face width", "face width|tooth width"),
    (
        "gear mesh: pitch-line speed",
        "pitch line speed|pitch line velocity|pitchline velocity|plv",
    ),
    (
        "gear mesh: power",
        "leistung|puissance|potencia|kw|hp|motor kw|motor hp|motor size|motor rating|power|motor power|drive power|rated power",
    ),
    ("gear mesh: type", "gear type|type of gear|gearing"),
    ("gear mesh: normal module", "module|normal module"),
    (
        "rolling bearing",
        "lager|wälzlager|lagerbezeichnung|roulement|rodamiento|bearing|bearing no|bearing number|bearing type|bearing designation|bearing de|bearing nde|bearing drive end|bearing non drive end|de bearing|nde bearing|bearings",
    ),
    ("rolling bearing: load", "bearing load|equivalent load"),
    (
        "component: pressure",
        "druck|betriebsdruck|pression|presión|pressure|working pressure|system pressure|operating pressure",
    ),
    (
        "component",
        "component|component type|machine type|equipment type|type",
    ),
    (
        "speed",
        "drehzahl|vitesse|velocidad|speed|shaft speed|n|speed n|rotational speed|bearing speed|output speed|rpm",
    ),
    (
        "note",
        "bemerkung|bemerkungen|anmerkung|remarque|remarques|observaciones|note|notes|remark|remarks|comment|comments|last oil change|oil change|last change|next oil change|oil change interval|change interval|interval|last sample|sample date|date|serial number|manufacturer|make|model|criticality|drawing number|oil supplier|supplier|oil price|oil cost|filter|oil filter|oil pump|breather",
    ),
    ("path", "path"),
    ("as written", "as written"),
    ("file kind", "file kind"),
];

/// Words of oil lists.
pub(super) const OILS: &[(&str, &str)] = &[
    (
        "tag",
        "id|oil id|code|oil code|stock code|item|item no|material no|material number|short name|tag",
    ),
    (
        "name",
        "bezeichnung|produkt|schmierstoff|désignation|producto|name|oil|product|lubricant|description|oil name|product name|trade name",
    ),
    ("kind", "kind|application|use|category|oil type|type"),
    (
        "classes",
        "classes|class|iso 6743|din 51517|specification|specifications|din class",
    ),
    ("base", "base|base oil type|base stock|base fluid"),
    ("VI", "vi|viscosity index"),
    (
        "pour point",
        "stockpunkt|point d écoulement|pour point|pour|pourpoint|pp",
    ),
    ("cloud point", "cloud point"),
    (
        "flash point",
        "flammpunkt|point d éclair|flash point|flash|flashpoint|flash coc|flash point coc",
    ),
    (
        "oil limit",
        "max temperature|maximum temperature|upper temperature limit|oil limit",
    ),
    (
        "density",
        "dichte|densité|densidad|density|density at 15 c|density 15|specific gravity|density 15 c",
    ),
    ("additives", "additives|additive|additive type"),
    ("sulphur", "sulphur activity|sulfur activity|sulphur"),
    ("copper strip", "copper strip|copper corrosion|cu corrosion"),
    ("food class", "food class|food grade|nsf"),
    ("environment", "environment|eal"),
    ("fire class", "fire class"),
    ("FZG stage", "fzg|fzg stage|fzg load stage"),
    ("air release", "air release"),
    ("demulsibility", "demulsibility|water separation"),
    ("price", "preis|prix|precio|price|cost|unit price"),
    ("in stock", "stock|in stock|stock quantity"),
    ("thickener", "thickener|soap"),
    ("NLGI", "nlgi|nlgi class|consistency|nlgi grade"),
    ("dropping point", "dropping point|drop point"),
    (
        "viscosity",
        "iso vg|vg|grade|viscosity grade|viscosity class|iso grade",
    ),
    ("source", "source|data sheet|sheet date"),
    (
        "note",
        "bemerkung|bemerkungen|remarque|observaciones|note|notes|remark|remarks|comment|comments",
    ),
    ("path", "path"),
    ("as written", "as written"),
    ("file kind", "file kind"),
];
