//! What each relation was checked against, for the sheet of methods: by family, since a family is
//! tested together.

/// Relations by the beginnings of their names, and what their results are compared with.
const FAMILIES: [(&[&str], &str); 13] = [
    (
        &[
            "viscosity-at",
            "viscosity-line",
            "viscosity-piecewise",
            "temperature-at",
            "d341-",
            "limit-at-40",
        ],
        "published fluids and n-alkanes of the reference libraries CoolProp and thermo, live: about 2 % between the two points, more beyond them; ASTM D341 worked by hand",
    ),
    (
        &[
            "viscosity-index",
            "index-references",
            "nu40-from-index",
            "nu100-from-index",
            "iso-grade",
            "agma-grade",
        ],
        "worked examples of ASTM D2270 and the tables of ISO 3448; the reference library chemicals, live, over 4 000 random oils",
    ),
    (
        &["saybolt", "furol", "engler", "redwood"],
        "tables of ASTM D2161; the reference library chemicals, live, over 1 000 values",
    ),
    (&["sae-"], "tables of SAE J300 and SAE J306"),
    (
        &["bearing-", "kappa-lambda", "grease-"],
        "worked points and tables of ISO 281:2007, and published tables of bearing handbooks",
    ),
    (
        &["gear-", "bevel-", "worm-"],
        "handbook tables; the relations of ISO/TS 6336-22 and ISO/TR 15144-1 worked again by hand",
    ),
    (
        &[
            "film-",
            "hertz-",
            "ellipticity",
            "reduced-",
            "skewed-radii",
            "composite-roughness",
            "rq-from-ra",
            "contact-shear-rate",
        ],
        "published worked examples; complete elliptic integrals of a reference library",
    ),
    (
        &["journal-", "thrust-"],
        "the tables of Raimondi and Boyd, an example of ISO 7902, the Reynolds equation solved again at random points",
    ),
    (
        &[
            "polymer-",
            "shear-",
            "temporary-shear",
            "thickening-",
            "carreau",
            "critical-shear-rate",
            "blend-",
            "d6080-",
        ],
        "published measurements, named beside each test; ordering held by property tests",
    ),
    (
        &["pressure-viscosity-", "alpha-at"],
        "published values of AGMA 925, ISO/TR 15144-1 and the authors of each form",
    ),
    (
        &["density-", "volume-correction", "dynamic-viscosity"],
        "tables of petroleum measurement; definitions worked by hand",
    ),
    (
        &[
            "oil-life",
            "heat-",
            "losses-",
            "seal-",
            "temperature-by-losses",
            "kinematic-limit",
            "sump-across",
            "viscosity-reproducibility",
            "line-tolerance",
            "temperature-coefficient",
        ],
        "worked again by hand from the source named",
    ),
    (
        &[
            "sump-",
            "part-temperature",
            "pour-margin",
            "oil-ceiling-margin",
            "use-range-margin",
            "vg-step-",
        ],
        "a definition: ten pairs of machine and oil worked by hand to a hundredth of a step",
    ),
];

/// What a relation was checked against; nothing for one of no known family.
pub(super) fn against(law: &str) -> &'static str {
    FAMILIES
        .iter()
        .find(|(starts, _)| starts.iter().any(|start| law.starts_with(start)))
        .map_or("", |(_, says)| says)
}

#[cfg(test)]
mod tests {
    use super::against;

    #[test]
    fn the_first_family_that_fits_speaks() {
        assert!(against("viscosity-index").contains("D2270"));
        assert!(against("viscosity-at").contains("CoolProp"));
        assert!(against("sump-rise").contains("definition"));
        assert_eq!(against("no-such-law"), "");
    }
}
