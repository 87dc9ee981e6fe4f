"""The three-zone test region: another cover scale, US units, written here and nowhere else."""

from pathlib import Path

from builder.tables.shape import Record, columns

REGION = """
id: willow_breaks
name: Willow Breaks
edition: 't1'
date: '2026-03-01'
answers_for: the tests
invented: true
note: Three zones for tests; no figure is real.
source: demo
texts_source: common practice
latitude_deg: 41
elevation_m: [900, 1500]
units: us
languages: [en, es]
address: null
sensitive_rounding_deg: 0.05
cover_scale:
  id: braun_blanquet
  name: Braun-Blanquet
  classes:
    - {code: r, label: one or two plants, low_pct: 0, high_pct: 0.5, mid_pct: 0.1, by_count: true}
    - {code: '+', label: under 1%, low_pct: 0.5, high_pct: 1, mid_pct: 0.7, by_count: true}
    - {code: '1', label: 1 to 5%, low_pct: 1, high_pct: 5, mid_pct: 2.5}
    - {code: '2', label: 5 to 25%, low_pct: 5, high_pct: 25, mid_pct: 15}
    - {code: '3', label: 25 to 50%, low_pct: 25, high_pct: 50, mid_pct: 37.5}
    - {code: '4', label: 50 to 75%, low_pct: 50, high_pct: 75, mid_pct: 62.5}
    - {code: '5', label: 75 to 100%, low_pct: 75, high_pct: 100, mid_pct: 87.5}
constancy_classes:
  - {code: I, low_pct: 1, high_pct: 20}
  - {code: II, low_pct: 21, high_pct: 40}
  - {code: III, low_pct: 41, high_pct: 60}
  - {code: IV, low_pct: 61, high_pct: 80}
  - {code: V, low_pct: 81, high_pct: 100}
plots_behind: {area_m2: 25, shape: square, search_minutes: 10, months: [5, 6, 7], assumed_n: 20}
lapse:
  tmax_c_per_km: [-5, -5, -6, -6, -7, -7, -7, -7, -6, -6, -5, -5]
  tmin_c_per_km: [-4, -4, -5, -5, -5, -5, -5, -5, -5, -5, -4, -4]
  rain_pct_per_km: [40, 40, 40, 40, 40, 40, 40, 40, 40, 40, 40, 40]
newcomers: {weed_inside: 0.3, weed_outside: 0.03, wind_seed: 0.1, sown: 0.35}
disturbances:
  - {id: none, name: Undisturbed ground, notes: false, states: {stripped: 'no'}}
  - {id: haul_road, name: Haul road, notes: true, dug: true, states: {stripped: 'yes'}}
  - {id: fire, name: Fire, notes: true, kept: {killed: 0.1, shrub: 0.5}, newcomer: 1}
success_rule:
  kind: standard
  text: Nine tenths of the standard, one-sided at one in ten.
  null_kind: direct
  share: 0.9
  alpha: 0.1
  years_wet: 5
  years_dry: 10
  rain_break_mm: 660
seeding_methods: {drilled: 1, broadcast: 2}
cautions:
  - {who: people, level: deadly, text: Have buried lines marked before any spade goes in.}
"""

ZONES = """
source: demo
zones:
  - id: prairie
    letter: A
    short: Prairie
    name: Mixed prairie
    kind: zonal
    one_line: Knee-high grass on loam.
    why_here: Rain reaches half a metre into loam.
    band_m: [900, 1250]
    centre_m: 1075
    soft_edge_m: 60
    north_shift_m: -40
    south_shift_m: 40
    frost_free_days: 140
    limits: [drought]
    neighbours: [breaks, bottom]
    told_from: {breaks: Breaks have pine and bare rock.}
    remnant_clues: Threadleaf sedge mats.
    what_absence_means: Grass returns within years.
  - id: breaks
    letter: B
    short: Pine breaks
    name: Pine breaks
    kind: zonal
    one_line: Open pine over rock and bunchgrass.
    why_here: Cracked rock holds water for deep roots.
    band_m: [1150, 1500]
    centre_m: 1325
    soft_edge_m: 60
    north_shift_m: -60
    south_shift_m: 60
    exposed_shift_m: -30
    frost_free_days: 120
    limits: [shallow soil, wind]
    neighbours: [prairie]
    told_from: {prairie: Prairie has no pine and deep loam.}
    remnant_clues: Pine stumps.
    what_absence_means: Pine missing after fire says little.
  - id: bottom
    letter: W
    short: River bottom
    name: River bottom
    kind: azonal
    one_line: Willow and cordgrass by the river.
    why_here: Water in reach of roots.
    band_m: [900, 1100]
    centre_m: 1000
    soft_edge_m: 60
    north_shift_m: 0
    south_shift_m: 0
    frost_free_days: 130
    ground_water_in_reach: true
    limits: [flood]
    neighbours: [prairie]
    told_from: {prairie: Prairie has no willow.}
    remnant_clues: Willow stubs.
    what_absence_means: Willow missing may mean the water dropped.
"""

PLANTS = """
source: {rest: demo, seeds_per_g: common practice}
plants:
  - {id: blue_grama, scientific: Bouteloua gracilis, common: Blue grama, codes: [BOGR],
     family: Poaceae, form: grass_bunch, origin: native, weed: none, months: [5, 10],
     best_season: July, known_when_dry: true, response: increaser, fate: rhizome, remnant: medium,
     seeds_per_g: 1800, planning_pls: 0.6, marks: Eyebrow spikes.,
     lookalikes: [little_bluestem], lookalike_tell: Bluestem is red and tall.}
  - {id: little_bluestem, scientific: Schizachyrium scoparium, common: Little bluestem,
     codes: [SCSC], synonyms: [Andropogon scoparius], family: Poaceae, form: grass_bunch,
     origin: native, weed: none, months: [6, 11], best_season: August, known_when_dry: true,
     response: decreaser, fate: resprouts, remnant: medium, seeds_per_g: 570, planning_pls: 0.5,
     marks: Red stems.}
  - {id: needle_grass, scientific: Hesperostipa comata, common: Needle-and-thread, codes: [HECO],
     family: Poaceae, form: grass_bunch, origin: native, weed: none, months: [5, 9],
     best_season: June, known_when_dry: true, response: decreaser, fate: resprouts, remnant: medium,
     seeds_per_g: 250, planning_pls: 0.7, marks: Long twisted awns.}
  - {id: ponderosa_pine, scientific: Pinus ponderosa, common: Ponderosa pine, codes: [PIPO],
     family: Pinaceae, form: tree, origin: native, weed: none, months: [1, 12],
     best_season: any month, known_when_dry: true, response: neutral, fate: killed, remnant: high,
     marks: Long needles in threes.}
  - {id: skunkbush, scientific: Rhus trilobata, common: Skunkbush, codes: [RHTR],
     family: Anacardiaceae, form: shrub, origin: native, weed: none, months: [4, 11],
     best_season: June, known_when_dry: true, response: neutral, fate: resprouts, remnant: high,
     marks: Three lobed leaflets.}
  - {id: sandbar_willow, scientific: Salix exigua, common: Sandbar willow, codes: [SAEX],
     family: Salicaceae, form: shrub, origin: native, weed: none, months: [4, 11],
     best_season: June, known_when_dry: true, response: decreaser, fate: resprouts, remnant: high,
     marks: Narrow grey leaves.}
  - {id: prairie_cordgrass, scientific: Spartina pectinata, common: Prairie cordgrass,
     codes: [SPPE], family: Poaceae, form: grass_sod, origin: native, weed: none, months: [6, 10],
     best_season: August, known_when_dry: true, response: neutral, fate: rhizome, remnant: high,
     seeds_per_g: 400, planning_pls: 0.4, marks: Sharp-edged leaves.}
  - {id: death_camas, scientific: Toxicoscordion venenosum, common: Death camas, codes: [TOVE],
     family: Melanthiaceae, form: forb_perennial, origin: native, weed: none, months: [4, 6],
     best_season: May, known_when_dry: false, response: increaser, fate: regrows_slowly,
     remnant: medium, sensitive: true, marks: Cream stars in a spike.,
     cautions: [{who: people, level: deadly, text: All parts kill. Do not handle.}]}
  - {id: cheatgrass, scientific: Bromus tectorum, common: Cheatgrass, codes: [BRTE],
     family: Poaceae, form: grass_annual, origin: introduced, weed: invasive, months: [4, 7],
     best_season: May, known_when_dry: true, response: invader, fate: seedbank, remnant: none,
     marks: Drooping purple heads., cautions: [{who: people, level: care, text: Sharp seeds.}]}
groups:
  - {id: bunch_grass, name: Bunchgrass of some kind, use: answer,
     members: [blue_grama, little_bluestem, needle_grass]}
  - {id: watch_weeds, name: Weeds to watch, use: weeds, members: [cheatgrass]}
  - {id: no_handling, name: Do not handle, use: caution, members: [death_camas]}
"""

OCCURRENCE = """
source: demo
occurrence:
  blue_grama: {prairie: [90, 18], breaks: [35, 4]}
  little_bluestem: {prairie: [30, 5], breaks: [85, 14]}
  needle_grass: {prairie: [75, 12], breaks: [20, 3]}
  ponderosa_pine: {prairie: [2, 1], breaks: [90, 22]}
  skunkbush: {prairie: [10, 2], breaks: [V, '2'], bottom: [15, 2]}
  sandbar_willow: {bottom: [92, 35]}
  prairie_cordgrass: {prairie: [3, 1], bottom: [80, 25]}
  death_camas: {prairie: [40, 0.5], breaks: [25, 0.5]}
  cheatgrass: {prairie: [45, 6], breaks: [30, 4], bottom: [20, 2]}
"""

QUESTIONS = """
source: demo
questions:
  - id: water_table
    kind: azonal
    ask: Dig or auger - how deep is free water?
    digs_cm: 100
    answers:
      - {value: near, label: within 1 m, share: 0.15, zone_log_odds: {bottom: 2.5, breaks: -3}}
      - {value: deep, label: deeper, share: 0.85, zone_log_odds: {bottom: -2}}
    why: Water in reach of roots overrides height.
    act: Treat as azonal ground.
  - id: hollow
    kind: shift
    ask: Is this a hollow where cold air lies?
    answers:
      - {value: 'yes', label: 'yes', effect: {height_off: true}}
      - {value: 'no', label: 'no'}
    why: Cold air turns the order of zones.
    act: Let plants lead.
  - id: stripped
    kind: state
    ask: Has the soil been stripped?
    answers:
      - {value: 'no', label: 'no'}
      - value: 'yes'
        label: 'yes'
        effect: {kept: {killed: 0.05, rhizome: 0.4, any: 0.25}, newcomer: 1, found: {mix: 0.5}}
    why: Roots travel with the soil.
    act: Call the zone from the edges.
rules:
  - id: pine_stand
    when:
      all:
        - {plant: ponderosa_pine, cover_at_least_pct: 25}
        - {not: {question: stripped, answer: 'yes'}}
    zone_log_odds: {breaks: 0.5}
    why: A closed pine stand is no accident.
    act: Look for seedlings as well.
"""

PRODUCTION = """
source: demo
crop_year: October to September
air_dry: constant weight in open air
years_meaning: One year in five lies below low and one above high.
production:
  prairie: {counted: all plants, low_kg_ha: 900, normal_kg_ha: 1300, high_kg_ha: 1700,
    rain_response: 0.9, rain_months: [10, 11, 12, 1, 2, 3, 4, 5, 6, 7], site_spread_cv: 0.3,
    clip: {area_m2: 0.5, every: 5},
    ground_cover_pct: {bare_soil: 20, rock_gravel: 5, litter: 50, crust_or_moss: 5, plant_base: 20},
    foliar_cover_pct: {tree: 0, shrub: 3, grass_like: 45, forb: 10}}
  breaks: {counted: below the trees, low_kg_ha: 500, normal_kg_ha: 800, high_kg_ha: 1100,
    rain_response: 0.7, rain_months: [10, 11, 12, 1, 2, 3, 4, 5, 6, 7], site_spread_cv: 0.4,
    clip: {area_m2: 0.5, every: 5},
    ground_cover_pct: {bare_soil: 15, rock_gravel: 30, litter: 40, crust_or_moss: 3,
      plant_base: 12},
    foliar_cover_pct: {tree: 22, shrub: 12, grass_like: 20, forb: 6},
    standing_crop_t_ha: {counted: live trees, low: 20, normal: 40, high: 70}}
  bottom: {counted: all plants, low_kg_ha: 2500, normal_kg_ha: 3300, high_kg_ha: 4000,
    rain_response: 0.2, rain_months: [3, 4, 5, 6], site_spread_cv: 0.25,
    clip: {area_m2: 0.25, every: 6},
    ground_cover_pct: {bare_soil: 8, rock_gravel: 2, litter: 60, crust_or_moss: 0, plant_base: 30},
    foliar_cover_pct: {tree: 3, shrub: 35, grass_like: 50, forb: 12}}
"""

SOILS = """
source: demo
soils:
  prairie: {summary: loam, rooting_depth_cm: 100, restriction: none within 1 m, layers: [
    {top_cm: 0, bottom_cm: 25, sand_pct: 40, silt_pct: 40, clay_pct: 20, organic_matter_pct: 3,
     stones_vol_pct: 2, ph: 7.2, ec_ds_m: 0.4},
    {top_cm: 25, bottom_cm: 100, sand_pct: 38, silt_pct: 38, clay_pct: 24, organic_matter_pct: 1,
     stones_vol_pct: 5, ph: 7.9, ec_ds_m: 0.6}]}
  breaks: {summary: stony sandy loam, rooting_depth_cm: 50, restriction: rock at 50 cm, layers: [
    {top_cm: 0, bottom_cm: 50, sand_pct: 62, silt_pct: 26, clay_pct: 12, organic_matter_pct: 1.5,
     stones_vol_pct: 35, ph: 7, ec_ds_m: 0.3}]}
  bottom: {summary: silt loam, rooting_depth_cm: 100, restriction: water table, layers: [
    {top_cm: 0, bottom_cm: 100, sand_pct: 20, silt_pct: 60, clay_pct: 20, organic_matter_pct: 4,
     stones_vol_pct: 0, ph: 7.6, ec_ds_m: 1}]}
"""

MIXES = """
source: demo
mixes:
  prairie: {method: drilled, other_method: double when broadcast,
    plants: {blue_grama: 150, needle_grass: 40}}
  breaks: {method: broadcast, other_method: halve for a drill, plants: {little_bluestem: 300}}
  bottom: {method: none, other_method: no seed is sown here,
    propagules: [{kind: stakes, what: willow stakes, rate_low: 1, rate_high: 2,
      rate_unit: stakes_per_m_of_bank, months: [11, 12, 1, 2, 3]}]}
"""

SOURCES = """
sources:
  example_1990: {text: 'Author 1990, Journal 2:2-4', read: from memory}
"""

SPANISH = """
language: es
zones:
  prairie: {name: Pradera mixta, one_line: Hierba hasta la rodilla sobre suelo franco.}
plants: {blue_grama: Navajita azul}
"""


def _notes() -> str:
    rows = ["source: common practice", "zones:"]
    for zone, months in (("prairie", "[10, 11]"), ("breaks", "[9, 10]"), ("bottom", "[9]")):
        rows.append(
            f"""  {zone}:
    wildlife: {{birds: Larks., small_mammals: Mice., large_mammals: Deer., pollinators: Bees.}}
    soil_life: {{mycorrhiza: Some., biocrust: Little., n_fixers: Legumes.}}
    topsoil: Lift 20 cm.
    seedbed: Firm.
    season: Late autumn.
    windows: {{sow_months: {months}}}
    method: Drill.
    protection: Rest two years.
    cautions: Look for lines.
    fails: Brome mixes.
    by_disturbance:
      haul_road: {{do: Rip it., avoid: Gravel.}}
      fire: {{do: Wait., avoid: Haste.}}
    success: {{perennial_cover_share_of_reference: 0.8, share: 1, min_native_perennials: 5,
      max_weed_share_of_cover: 0.1, earliest_year: 5, source: demo}}"""
        )
    return "\n".join(rows) + "\n"


def _climate() -> str:
    rows = ["# source: demo", "zone_id,elevation_m,month,tmax_c,tmin_c,precip_mm"]
    heat = (0, 3, 8, 15, 20, 26, 31, 30, 24, 16, 7, 1)
    rain = (10, 12, 22, 35, 60, 55, 40, 35, 28, 24, 14, 10)
    for zone, height, shift in (("prairie", 1075, 0), ("breaks", 1325, -2), ("bottom", 1000, 0.5)):
        for month in range(12):
            warm = heat[month] + shift
            rows.append(f"{zone},{height},{month + 1},{warm},{warm - 13},{rain[month]}")
    return "\n".join(rows) + "\n"


def three_zone_files() -> dict[str, str]:
    """File name to text of the three-zone region."""
    return {
        "region.yaml": REGION.lstrip(),
        "zones.yaml": ZONES.lstrip(),
        "plants.yaml": PLANTS.lstrip(),
        "occurrence.yaml": OCCURRENCE.lstrip(),
        "questions.yaml": QUESTIONS.lstrip(),
        "production.yaml": PRODUCTION.lstrip(),
        "soils.yaml": SOILS.lstrip(),
        "reclaim.yaml": _notes(),
        "seed.yaml": MIXES.lstrip(),
        "sources.yaml": SOURCES.lstrip(),
        "climate.csv": _climate(),
        "words/es.yaml": SPANISH.lstrip(),
    }


def write_region(folder: Path, files: dict[str, str]) -> Path:
    """Writes a region's files into a folder and hands the folder back."""
    for name, text in files.items():
        path = folder / name
        path.parent.mkdir(parents=True, exist_ok=True)
        path.write_text(text, encoding="utf-8")
    return folder


def all_records(record, seen=None):
    """A record class and every record class inside it."""
    seen = set() if seen is None else seen
    if record in seen:
        return seen
    seen.add(record)
    for _, kind, _ in columns(record):
        for inner in (
            kind,
            getattr(kind, "of", None),
            getattr(getattr(kind, "of", None), "of", None),
        ):
            below = getattr(inner, "record", None)
            if isinstance(below, type) and issubclass(below, Record):
                all_records(below, seen)
    return seen
