"""Where the formulas come from: one table of keys, what they are and how far they were read."""

SOURCES: dict[str, tuple[str, str]] = {
    "abdul_kareem_1984": (
        "Abdul-Kareem, A.W. & McRae, S.G. (1984). The effects on topsoil of long-term"
        " storage in stockpiles. Plant and Soil 76: 357-363",
        "abstract read",
    ),
    "adequacy_permits": (
        "Sample adequacy as written in state mining-permit records (Colorado coal rule"
        " 4.15.11; pages of 1996 and 2007)",
        "pages read",
    ),
    "bagnouls_gaussen_1953": (
        "Bagnouls, F. & Gaussen, H. (1953). Saison seche et indice xerothermique",
        "from memory",
    ),
    "beers_1966": (
        "Beers, T.W., Dress, P.E. & Wensel, L.C. (1966). Aspect transformation in site"
        " productivity research. J. Forestry 64: 691-692",
        "from memory; phase and sense confirmed in a later note",
    ),
    "beltbook_rule": (
        "A rule of this program, stated in docs/method.md; thresholds are demo",
        "own rule",
    ),
    "bond_release_2012": (
        "Area-weighted production standard in a 2012 bond-release report of a Colorado"
        " state mining-permit record (document 981418, p. 26)",
        "page read",
    ),
    "bray_sorensen": (
        "Bray, J.R. & Curtis, J.T. (1957). Ecol. Monogr. 27: 325-349; Sorensen, T. (1948)",
        "method",
    ),
    "cfr_816_116": (
        "30 CFR 816.116, as amended at 71 FR 51684 (30 Aug 2006)",
        "a state rule that repeats it read; the federal sentence from memory",
    ),
    "chytry_2002": (
        "Chytry, M., Tichy, L., Holt, J. & Botta-Dukat, Z. (2002). J. Veg. Sci. 13:"
        " 79-90; De Caceres, M. & Legendre, P. (2009). Ecology 90: 3566-3574",
        "formula read",
    ),
    "circle": (
        "Geometry of the circle",
        "definition",
    ),
    "cochran_1977": (
        "Cochran, W.G. (1977). Sampling Techniques, 3rd ed., chapters 6, 7 and 12; Wilm,"
        " Costello & Klipple (1944)",
        "from memory; abstract on ratio and regression read",
    ),
    "colorado_4_15_11": (
        "Colorado coal rule 4.15.11(2), forms (b) and (c), as printed in state"
        " mining-permit records",
        "pages read",
    ),
    "common_practice": (
        "Common practice of the trade, without a source",
        "common practice",
    ),
    "currall_1987": (
        "Currall, J.E.P. (1987). A transformation of the Domin scale. Vegetatio 72: 81-87",
        "abstract read; formula from memory",
    ),
    "daubenmire_1959": (
        "Daubenmire, R. (1959). A canopy-coverage method of vegetational analysis."
        " Northwest Science 33: 43-64",
        "a teaching page and a permit record that quote it read",
    ),
    "definition": (
        "A definition of the trade",
        "definition",
    ),
    "dufrene_legendre_1997": (
        "Dufrene, M. & Legendre, P. (1997). Species assemblages and indicator species."
        " Ecol. Monogr. 67: 345-366",
        "formula read",
    ),
    "earthwork_convention": (
        "Earthwork estimating convention: loose = bank x (1 + swell)",
        "estimating pages read",
    ),
    "fao56": (
        "Allen, R.G., Pereira, L.S., Raes, D. & Smith, M. (1998). Crop"
        " evapotranspiration. FAO Irrigation and Drainage Paper 56",
        "examples and tables read as transcribed in public code",
    ),
    "hand_arithmetic": (
        "Arithmetic, its working shown beside the check",
        "own working",
    ),
    "hargreaves_1985": (
        "Hargreaves, G.H. & Samani, Z.A. (1985). Reference crop evapotranspiration from"
        " temperature. Applied Engineering in Agriculture 1: 96-99",
        "as FAO-56 Eq. 52",
    ),
    "hill_1973": (
        "Hill, M.O. (1973). Reciprocal averaging. J. Ecology 61: 237-249; ter Braak, C.J.F. (1986)",
        "method",
    ),
    "hsu_2012": (
        "Hsu, J.S., Powell, J. & Adler, P.B. (2012). Sensitivity of mean annual primary"
        " production to precipitation. Global Change Biology",
        "abstract read",
    ),
    "international_yard_pound": (
        "International yard and pound agreement of 1959: 1 lb = 0.45359237 kg, 1 ft = 0.3048 m",
        "definition",
    ),
    "labdsv": (
        "R package labdsv 2.0-1, indval(), all 30 plants, 15 digits",
        "run",
    ),
    "lapse_arithmetic": (
        "A change with height times the height; 6.5 K per km is the standard atmosphere"
        " (ISO 2533:1975)",
        "definition",
    ),
    "le_houerou_1984": (
        "Le Houerou, H.N. (1984). Rain use efficiency. J. Arid Environments 7: 213-247",
        "from memory",
    ),
    "levins_hurlbert": (
        "Levins, R. (1968); Hurlbert, S.H. (1978). The measurement of niche overlap."
        " Ecology 59: 67-77",
        "method",
    ),
    "lognormal_identity": (
        "Lognormal about its median m: quantile = m exp(z sigma), sigma^2 = ln(1 + cv^2)",
        "definition",
    ),
    "maine_appendix_e": (
        "University of Maine Cooperative Extension, pasture course, lesson 1 appendix E",
        "page read",
    ),
    "mccune_keon_2002": (
        "McCune, B. & Keon, D. (2002). Equations for potential annual direct incident"
        " radiation and heat load. J. Vegetation Science 13: 603-606",
        "coefficients and results as listed in public code",
    ),
    "mixture_definition": (
        "Quantile of a weighted mixture: where the weighted mean of the curves reaches the share",
        "definition",
    ),
    "native_seed_page": (
        "A native-seed guidance page, switchgrass example",
        "page read",
    ),
    "normal_table": (
        "Table of the standard normal distribution",
        "computed with scipy",
    ),
    "nrcs_full_stand": (
        "USDA NRCS seeding worksheets, percent of full stand",
        "from memory",
    ),
    "nrcs_plant_materials": (
        "USDA NRCS plant materials guidance: a broadcast rate is usually twice the drilled one",
        "from memory",
    ),
    "nrph_ch4": (
        "USDA NRCS National Range and Pasture Handbook, chapter 4; BLM Technical Reference 1734-7",
        "description read; worksheet form and plot list from memory",
    ),
    "permit_2007": (
        "Well-pad vegetation table, September 2007, in a Colorado state mining-permit"
        " record (document 841262, p. 25)",
        "page read",
    ),
    "region_table": (
        "A table of the region; its source stands there",
        "region",
    ),
    "renkonen_1938": (
        "Renkonen, O. (1938); Gauch, H.G. (1982). Multivariate analysis in community ecology",
        "method",
    ),
    "roberts_cooper_1989": (
        "Roberts, D.W. & Cooper, S.V. (1989). Concepts and techniques of vegetation"
        " mapping. USDA Forest Service GTR INT-257: 90-96",
        "form as in public code",
    ),
    "sala_1988": (
        "Sala, O.E., Parton, W.J., Joyce, L.A. & Lauenroth, W.K. (1988). Primary"
        " production of the central grassland region. Ecology 69: 40-45",
        "abstract read; coefficients from memory",
    ),
    "saxton_rawls_2006": (
        "Saxton, K.E. & Rawls, W.J. (2006). Soil water characteristic estimates by"
        " texture and organic matter. Soil Sci. Soc. Am. J. 70: 1569-1578",
        "equations and Table 3 as transcribed in public code",
    ),
    "seed_tables": (
        "USDA NRCS plant guides and technical notes; seed-trade and National Park Service pages",
        "pages read; some counts from memory",
    ),
    "shannon_simpson": (
        "Shannon, C.E. (1948); Simpson, E.H. (1949). Measurement of diversity. Nature 163: 688",
        "method",
    ),
    "soil_survey_manual_2017": (
        "Soil Science Division Staff (2017). Soil Survey Manual, USDA Handbook 18, chapter 3",
        "rules from memory, checked against an open 5,151-point table",
    ),
    "ssir_45_2011": (
        "USDA NRCS (2011). Soil Survey Laboratory Information Manual, SSIR 45; van"
        " Bemmelen factor 1.724",
        "a code list that quotes it read",
    ),
    "student_1908": (
        "Student (1908). The probable error of a mean. Biometrika 6: 1-25",
        "method",
    ),
    "student_t_table": (
        "Table of Student's t",
        "computed with scipy",
    ),
    "tangent": (
        "Definition of the tangent; a hydroseeding conversion sheet prints the same figures",
        "definition; sheet read",
    ),
    "thien_1979": (
        "Thien, S.J. (1979). A flow diagram for teaching texture-by-feel analysis. J."
        " Agronomic Education 8: 54-55",
        "from memory",
    ),
    "thornthwaite_1948": (
        "Thornthwaite, C.W. (1948). An approach toward a rational classification of"
        " climate. Geographical Review 38: 55-94",
        "examples as transcribed in public code",
    ),
    "thornthwaite_mather_1957": (
        "Thornthwaite, C.W. & Mather, J.R. (1955, 1957). The water balance; Instructions"
        " and tables. Publications in Climatology 8(1), 10(3)",
        "abstract read; a completed water-budget exercise read",
    ),
    "tichy_chytry_2006": (
        "Tichy, L. & Chytry, M. (2006). J. Veg. Sci. 17: 809-818",
        "method",
    ),
    "txdot_pls": (
        "Texas Department of Transportation, pure live seed page",
        "page read",
    ),
    "utah_1953_1963": (
        "Percent air dry matter in range species at various growth stages (Utah,"
        " 1953-1963 material)",
        "table read",
    ),
    "walter_lieth_1960": (
        "Walter, H. & Lieth, H. (1960). Klimadiagramm-Weltatlas",
        "from memory; 10 C drawn level with 20 mm read",
    ),
    "watson_burnett": (
        "Watson, I. & Burnett, A. Hydrology: an environmental approach, pp. 435-436",
        "figures as transcribed in public code",
    ),
    "welch_1947": (
        "Welch, B.L. (1947). The generalization of Student's problem. Biometrika 34: 28-35",
        "method",
    ),
    "westhoff_maarel_1978": (
        "Westhoff, V. & van der Maarel, E. (1978). The Braun-Blanquet approach; Dengler,"
        " J., Chytry, M. & Ewald, J. (2008). Phytosociology",
        "encyclopaedia article and teaching pages read",
    ),
    "wilson_1927": (
        "Wilson, E.B. (1927). Probable inference. J. Am. Statistical Association 22: 209-212",
        "method",
    ),
}
"""key -> (reference, how far it was read)."""
