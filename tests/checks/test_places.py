"""Each check points at the letter where the fault is. `@` marks it in the changed text."""

# ruff: noqa: E501 - a line of the table is a line of a region

import pytest
from helpers import three_zone_files, write_region

from builder.checks import CHECKS, checked_region

# check, file, text of the three-zone region, text it is changed to
CASES = [
    ("zone-names", "zones.yaml", "neighbours: [prairie]", "neighbours: [prairie, @brakes]"),
    ("zone-names", "occurrence.yaml", "{prairie: [45, 6]", "{@prarie: [45, 6]"),
    ("plant-names", "occurrence.yaml", "  needle_grass:", "  @needel_grass:"),
    ("plant-names", "plants.yaml", "members: [death_camas]", "members: [@deathcamas]"),
    ("group-names", "questions.yaml", "{plant: ponderosa_pine,", "{group: @pines,"),
    ("question-names", "region.yaml", "states: {stripped: 'yes'}", "states: {@striped: 'yes'}"),
    ("disturbance-names", "reclaim.yaml", "      fire: {do: Wait.", "      @fires: {do: Wait."),
    ("double-id", "plants.yaml", "{id: skunkbush,", "{id: @needle_grass,"),
    ("double-id", "questions.yaml", "{value: deep,", "{value: @near,"),
    ("complete", "seed.yaml", "  breaks: {method: broadcast", "  prairies: {method: broadcast"),
    ("occurrence-values", "occurrence.yaml", "[40, 0.5]", "@[40, 0]"),
    ("cover-classes", "region.yaml", "low_pct: 5, high_pct: 25", "low_pct: @6, high_pct: 25"),
    ("cover-classes", "region.yaml", "mid_pct: 37.5", "mid_pct: @50"),
    ("constancy-classes", "region.yaml", "low_pct: 41,", "low_pct: @45,"),
    ("bands", "zones.yaml", "band_m: [1150, 1500]", "band_m: @[1500, 1150]"),
    ("bands", "zones.yaml", "centre_m: 1325", "centre_m: @1125"),
    ("neighbours", "zones.yaml", "neighbours: [breaks, bottom]", "neighbours: [breaks]"),
    ("letters", "zones.yaml", "letter: W", "letter: @C"),
    ("production-order", "production.yaml", "low_kg_ha: 900", "low_kg_ha: @1900"),
    ("production-order", "production.yaml", "low: 20, normal: 40", "low: @60, normal: 40"),
    ("ground-cover", "production.yaml", "{bare_soil: 20, rock", "@{bare_soil: 25, rock"),
    ("month-lists", "reclaim.yaml", "sow_months: [10, 11]", "sow_months: @[10, 11, 10]"),
    ("range", "seed.yaml", "months: [11, 12, 1, 2, 3]", "months: [11, 12, @13]"),
    ("climate-months", "climate.csv", "prairie,1075,2,", "prairie,1075,@1,"),
    ("lapse-months", "region.yaml", "tmin_c_per_km: [-4, -4,", "tmin_c_per_km: @[-4,"),
    ("provenance", "soils.yaml", "source: demo\n", ""),
    ("known-sources", "production.yaml", "source: demo", "source: @published author_1990"),
    ("known-sources", "seed.yaml", "source: demo", "source: @my notebook"),
    ("lookalikes", "plants.yaml", "lookalikes: [little_bluestem]", "lookalikes: [@bluestem]"),
    ("plant-texts", "plants.yaml", "[Andropogon scoparius]", "[@Rhus trilobata]"),
    (
        "group-members",
        "plants.yaml",
        "[blue_grama, little_bluestem, needle_grass]",
        "@[blue_grama]",
    ),
    ("question-zones", "questions.yaml", "effect: {height_off: true}", "effect: {sown: true}"),
    ("answer-shares", "questions.yaml", "share: 0.15", "share: @0.5"),
    ("digging", "questions.yaml", "ask: Is this a hollow", "ask: @Dig here. Is this a hollow"),
    ("acid", "questions.yaml", "ask: Has the soil", "ask: @Does acid fizz? Has the soil"),
    ("soil-layers", "soils.yaml", "{top_cm: 25, bottom_cm: 100,", "{top_cm: @30, bottom_cm: 100,"),
    ("soil-layers", "soils.yaml", "sand_pct: 62,", "sand_pct: @72,"),
    ("seed-counts", "seed.yaml", "plants: {blue_grama: 150,", "plants: {@skunkbush: 150,"),
    ("double-allowance", "reclaim.yaml", "reference: 0.8, share: 1,", "reference: @0.8,"),
    ("success-rules", "region.yaml", "  share: 0.9\n", ""),
    ("disturbance-states", "region.yaml", "{stripped: 'yes'}", "{stripped: @'maybe'}"),
    ("traits", "questions.yaml", "kept: {killed: 0.05", "kept: {@kilt: 0.05"),
    ("traits", "questions.yaml", "found: {mix: 0.5}", "found: {mix: @0.4}"),
    (
        "conditions",
        "questions.yaml",
        "{not: {question: stripped, answer: 'yes'}}",
        "{not: {question: stripped, answer: @'often'}}",
    ),
    (
        "caution-typed",
        "plants.yaml",
        "marks: Three lobed leaflets.",
        "marks: @Three lobed leaflets; poisonous.",
    ),
    ("safe-words", "plants.yaml", "marks: Red stems.", "marks: @Red stems; seeds are edible."),
    ("safe-words", "words/es.yaml", "Navajita azul", "@Navajita comestible"),
    ("editions", "region.yaml", "date: '2026-03-01'", "date: @'spring'"),
    (
        "translations",
        "words/es.yaml",
        "plants:",
        "questions: {hollow: {ask: x, answers: {'yes': si, @nunca: no se}}}\nplants:",
    ),
    ("plants-placed", "occurrence.yaml", "  sandbar_willow: {bottom: [92, 35]}\n", ""),
    ("missing-field", "zones.yaml", "    frost_free_days: 120\n", ""),
    ("unknown-field", "zones.yaml", "    frost_free_days: 120", "    @frost_days: 120"),
    ("known-word", "plants.yaml", "form: tree", "form: @tre"),
    ("known-word", "occurrence.yaml", "[V, '2']", "[@VI, '2']"),
    (
        "missing-field",
        "plants.yaml",
        "{who: people, level: care, text: Sharp",
        "@{who: people, text: Sharp",
    ),
    ("range", "occurrence.yaml", "[90, 22]", "[@190, 22]"),
    ("value-kind", "zones.yaml", "centre_m: 1325", "centre_m: @high"),
    ("id-form", "plants.yaml", "{id: skunkbush,", "{id: @Skunk-bush,"),
    ("text-length", "zones.yaml", "short: Pine breaks", "short: @Pine breaks above the river"),
    # what else each check looks at
    ("cover-classes", "region.yaml", "{code: '4', label: 50", "{code: @'3', label: 50"),
    ("cover-classes", "region.yaml", "low_pct: 75, high_pct: 100", "low_pct: 75, high_pct: @95"),
    ("constancy-classes", "region.yaml", "low_pct: 81, high_pct: 100", "low_pct: 81, high_pct: 99"),
    ("bands", "zones.yaml", "band_m: [900, 1100]", "band_m: @[800, 1100]"),
    (
        "bands",
        "zones.yaml",
        "limits: [flood]",
        "site_ranges: {ph: @[7, 6, 5]}\n    limits: [flood]",
    ),
    (
        "neighbours",
        "zones.yaml",
        "neighbours: [breaks, bottom]",
        "neighbours: [breaks, bottom, @prairie]",
    ),
    ("neighbours", "zones.yaml", "{breaks: Breaks", "{@prairie: x, breaks: Breaks"),
    ("letters", "zones.yaml", "letter: B", "letter: @A"),
    ("letters", "zones.yaml", "short: Pine breaks", "short: @Prairie"),
    (
        "letters",
        "zones.yaml",
        "letter: A\n    short: Prairie\n    name: Mixed prairie\n    kind: zonal",
        "letter: W\n    short: Prairie\n    name: Mixed prairie\n    kind: azonal",
    ),
    (
        "production-order",
        "production.yaml",
        "clip: {area_m2: 0.25,",
        "moss_kg_ha: @[3, 2, 1], clip: {area_m2: 0.25,",
    ),
    ("month-lists", "production.yaml", "rain_months: [3, 4, 5, 6]", "rain_months: @[]"),
    (
        "month-lists",
        "production.yaml",
        "rain_response: 0.2,",
        "rain_response: 0.2, warmth_response_per_c: @0.1,",
    ),
    ("month-lists", "seed.yaml", "months: [11, 12, 1, 2, 3]", "months: @[11, 11]"),
    ("climate-months", "climate.csv", "breaks,1325,5,", "breaks,@1320,5,"),
    ("climate-months", "climate.csv", "prairie,1075,1,0,-13,10", "prairie,1075,1,@-20,-13,10"),
    ("provenance", "climate.csv", "# source: demo\n", "@"),
    ("lookalikes", "plants.yaml", ", lookalike_tell: Bluestem is red and tall.", ""),
    ("lookalikes", "plants.yaml", "lookalikes: [little_bluestem]", "lookalikes: [@blue_grama]"),
    ("plant-texts", "plants.yaml", "codes: [HECO]", "codes: [@BOGR]"),
    ("plant-texts", "plants.yaml", "common: Cheatgrass", "common: @Skunkbush"),
    (
        "group-members",
        "plants.yaml",
        "members: [death_camas]",
        "members: [death_camas, @skunkbush]",
    ),
    ("group-members", "plants.yaml", "members: [cheatgrass]", "members: [cheatgrass, @cheatgrass]"),
    ("answer-shares", "questions.yaml", "label: within 1 m, share: 0.15,", "label: within 1 m,"),
    ("answer-shares", "questions.yaml", "share: 0.15", "share: @0"),
    ("soil-layers", "soils.yaml", "bottom_cm: 50, sand", "bottom_cm: @0, sand"),
    ("soil-layers", "soils.yaml", "rooting_depth_cm: 50", "rooting_depth_cm: @90"),
    (
        "soil-layers",
        "soils.yaml",
        "restriction: rock at 50 cm,",
        "restriction: rock, water_table_cm: @[9, 5, 1],",
    ),
    (
        "soil-layers",
        "soils.yaml",
        "{top_cm: 0, bottom_cm: 50, sand_pct: 62, silt_pct: 26, clay_pct: 12,",
        "@{top_cm: 0, bottom_cm: 50,",
    ),
    (
        "soil-layers",
        "soils.yaml",
        "{top_cm: 0, bottom_cm: 50, sand",
        "@{top_cm: 0, bottom_cm: 50, kind: peat, sand",
    ),
    (
        "soil-layers",
        "soils.yaml",
        "{top_cm: 0, bottom_cm: 50, sand_pct: 62, silt_pct: 26, clay_pct: 12,",
        "{top_cm: 0, bottom_cm: 50, kind: peat, von_post_h: @4,",
    ),
    (
        "soil-layers",
        "soils.yaml",
        "{top_cm: 0, bottom_cm: 50, sand_pct: 62, silt_pct: 26, clay_pct: 12,",
        "@{top_cm: 0, bottom_cm: 50, kind: organic_mineral,",
    ),
    (
        "soil-layers",
        "soils.yaml",
        "bottom_cm: 50, sand",
        "bottom_cm: 50, field_capacity: @0.1, wilting_point: 0.2, sand",
    ),
    ("seed-counts", "seed.yaml", "{method: none,", "{method: @drilled,"),
    (
        "seed-counts",
        "region.yaml",
        "seeding_methods: {drilled: 1, broadcast: 2}",
        "seeding_methods: {drilled: 1}",
    ),
    ("seed-counts", "seed.yaml", "rate_low: 1, rate_high: 2,", "rate_low: @3, rate_high: 2,"),
    ("success-rules", "region.yaml", "null_kind: direct", "null_kind: @reverse"),
    (
        "success-rules",
        "reclaim.yaml",
        "earliest_year: 5, source: demo",
        "earliest_year: 5, trajectory: [@{measure: bare_ground_pct}], source: demo",
    ),
    (
        "success-rules",
        "reclaim.yaml",
        "earliest_year: 5, source: demo",
        "earliest_year: 5, trajectory: [@{measure: bare_ground_pct, at_most: [[5, 9], [3, 1]]}], source: demo",
    ),
    ("disturbance-states", "region.yaml", "{id: none,", "{id: nothing,"),
    (
        "conditions",
        "questions.yaml",
        "{plant: ponderosa_pine, cover_at_least_pct: 25}",
        "@{plant: ponderosa_pine}",
    ),
    (
        "conditions",
        "questions.yaml",
        "    zone_log_odds: {breaks: 0.5}\n    why: A closed",
        "    why: A closed",
    ),
    ("editions", "region.yaml", "elevation_m: [900, 1500]", "elevation_m: @[1500, 900]"),
    ("editions", "region.yaml", "languages: [en, es]", "languages: @[es, en]"),
    ("editions", "region.yaml", "languages: [en, es]", "languages: [en, es, @fr]"),
    ("editions", "words/es.yaml", "language: es", "language: @fr"),
    ("complete", "reclaim.yaml", "      fire: {do: Wait., avoid: Haste.}\n", ""),
    ("csv-width", "climate.csv", "prairie,1075,1,0,-13,10", "@prairie,1075,1,0,-13"),
    ("value-kind", "zones.yaml", "band_m: [900, 1250]", "band_m: @[900]"),
    ("value-kind", "zones.yaml", "limits: [drought]", "limits: @drought"),
    (
        "value-kind",
        "zones.yaml",
        "told_from: {prairie: Prairie has no willow.}",
        "told_from: @[prairie]",
    ),
    ("value-kind", "plants.yaml", "known_when_dry: false", "known_when_dry: @maybe"),
    ("value-kind", "occurrence.yaml", "[90, 22]", "@[90]"),
    ("value-kind", "region.yaml", "name: Willow Breaks", "name: @12"),
    (
        "range",
        "region.yaml",
        "search_minutes: 10, months: [5, 6, 7], assumed_n: 20",
        "search_minutes: 10, months: [5, 6, 7], assumed_n: @20.5",
    ),
    ("unknown-field", "production.yaml", "{tree: 0, shrub: 3,", "{@trees: 0, shrub: 3,"),
]
ELSEWHERE = {  # the fault is an absence, so the place is that of the row it is absent from
    ("complete", "seed.yaml"): ("zones.yaml", "id: breaks", 4),
    ("neighbours", "zones.yaml"): (
        "zones.yaml",
        "neighbours: [prairie]\n    told_from: {prairie: Prairie has no willow",
        13,
    ),
    ("provenance", "soils.yaml"): ("soils.yaml", "rooting_depth_cm: 100, restriction: none", 18),
    ("question-zones", "questions.yaml"): ("questions.yaml", "id: hollow", 4),
    ("success-rules", "region.yaml"): ("region.yaml", "kind: standard", 0),
    ("plants-placed", "occurrence.yaml"): ("plants.yaml", "{id: sandbar_willow", 5),
    ("missing-field", "zones.yaml"): ("zones.yaml", "id: breaks", 0),
    ("constancy-classes", "region.yaml"): ("region.yaml", "- {code: I,", 0),
    ("letters", "zones.yaml"): ("zones.yaml", "zonal\n    one_line: Open", 0),
    ("lookalikes", "plants.yaml"): ("plants.yaml", "[little_bluestem]", 0),
    ("answer-shares", "questions.yaml"): ("questions.yaml", "{value: near", 0),
    ("seed-counts", "region.yaml"): ("seed.yaml", "broadcast, other", 0),
    ("disturbance-states", "region.yaml"): ("region.yaml", "- {id: nothing", 0),
    ("conditions", "questions.yaml"): ("questions.yaml", "pine_stand", 0),
    ("complete", "reclaim.yaml"): ("reclaim.yaml", "by_disturbance", 0),
}


def place_of(text, offset):
    """Line and column, both from 1, of an offset in a text."""
    return text.count("\n", 0, offset) + 1, offset - (text.rfind("\n", 0, offset) + 1) + 1


@pytest.mark.parametrize(("check", "file", "old", "new"), CASES, ids=lambda part: part[:24])
def test_the_problem_stands_where_the_fault_is(tmp_path, check, file, old, new):
    files = three_zone_files()
    assert old in files[file]
    changed = files[file].replace(old, new, 1)
    where = file
    if "@" in changed:
        offset = changed.index("@")
        changed = changed.replace("@", "")
        expected = place_of(changed, offset)
    else:
        where, text, shift = ELSEWHERE[check, file]
        whole = changed if where == file else files[where]
        expected = place_of(whole, whole.index(text) + shift)
    folder = write_region(tmp_path / "r", files | {file: changed})
    problems = checked_region(folder).problems
    places = {(p.file, p.line, p.column) for p in problems if p.check == check}
    assert (str(folder / where), *expected) in places, problems


def test_every_check_has_a_place_tested():
    assert {check.id for check in CHECKS} <= {check for check, *_ in CASES}


def test_a_question_that_changes_nothing_is_told_at_its_id(tmp_path):
    files = three_zone_files()
    text = files["questions.yaml"]
    start = text.index("        effect: {kept: {killed")
    files["questions.yaml"] = text[:start] + text[text.index("\n", start) + 1 :]
    problems = checked_region(write_region(tmp_path / "r", files)).problems
    line, column = place_of(text, text.index("stripped\n"))
    assert [(p.check, p.line, p.column) for p in problems] == [("question-zones", line, column)]
