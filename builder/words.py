"""The glossary: every field of the tables with its unit, a label and one plain sentence.

The only one: forms, column heads, the editors' schema and docs/tables.md all take their words
here. A field that means something else in one record has an entry of its own, "Record.field".
"""

from __future__ import annotations

from typing import NamedTuple


class Word(NamedTuple):
    """Unit (empty when there is none), label for a form, one sentence."""

    unit: str
    label: str
    sentence: str


def word(field: str, record: str = "") -> Word:
    """The words of a field. KeyError when the glossary lacks it."""
    found = WORDS.get(f"{record}.{field}") or WORDS.get(field)
    if found is None:
        raise KeyError(f"{record}.{field}" if record else field)
    return found


def _read(table: str) -> dict[str, Word]:
    found: dict[str, Word] = {}
    for line in table.strip().splitlines():
        name, unit, label, sentence = (part.strip() for part in line.split("|"))
        if name in found:
            raise ValueError(f"{name} stands twice in the glossary")
        found[name] = Word(unit, label, sentence)
    return found


_REGION = """
id||id|Stable name in lower case; it never changes, since records point at it.
name||name|Name for people.
edition||edition|The edition that every record keeps, so that old calls can be reopened.
date||date|Day of the edition, year-month-day.
answers_for||answers for the tables|Who signs this edition.
invented||invented|Whether the region is made up; it is then marked as demo everywhere.
note||note|Anything a reader should know.
gradient_note||note on the gradient|What sorts the zones beside height.
source||source|Where figures come from: demo, common practice, or published and a key.
texts_source||source of the texts|Where the wording comes from.
latitude_deg|degrees|latitude|Latitude of the region's middle, north positive.
elevation_m|m|height|Lowest and highest ground of the region.
units||units shown first|metric or us; the tables themselves are always metric.
languages||languages|Languages of the app, en first; each other one has a file in words/.
address||address|Public address of the app, or null while there is none.
sensitive_rounding_deg|degrees|rounding of places|Positions of sensitive plants are rounded to this.
cover_scale||cover scale|Classes in which cover is written.
classes||classes|Classes from low to high, without gaps.
code||code|What stands on the form.
label||label|What a person reads on the button.
low_pct|%|from|Lower limit; it belongs to the class.
high_pct|%|to|Upper limit; in a cover scale it belongs to the next class.
mid_pct|%|middle|The percent that stands for the class.
by_count||told by count|The class is told by the number of plants, so a percent only guesses it.
second_conversion||second conversion|Another published way from class to percent.
constancy_classes||constancy classes|Classes of the share of plots, in whole percents.
plots_behind||plots behind the constancies|Size, time and months that the constancies are meant for.
area_m2|m2|plot area|Area of the plot.
shape||plot shape|circle, square or strip.
search_minutes|min|search time|How long a plot is searched.
months||months|Months, 1 to 12.
assumed_n||plots assumed|How many plots a hand-written constancy is taken to stand on.
observers||observers|How many people search together.
lapse||lapse rates|How the monthly normals change with height, January to December.
tmax_c_per_km|degrees C/km|day warmth by height|Change of the day's maximum for each km up.
tmin_c_per_km|degrees C/km|night warmth by height|Change of the night's minimum for each km up.
rain_pct_per_km|%/km|rain by height|Rain is multiplied by (1 + this/100) for each km up.
newcomers||newcomers|Chance that a plant has come since the ground was disturbed.
weed_inside|share|weeds inside their range|Chance for weeds in zones where they occur.
weed_outside|share|weeds outside their range|Chance for weeds in other zones.
wind_seed|share|wind-seeded plants|Chance for plants whose seed flies.
Newcomers.sown|share|sown plants|Chance for plants of a mix, where seeding is likely.
disturbances||disturbances|Kinds of disturbance; "none" is one of them.
notes||opens notes|Whether the reclamation notes have a cell for it.
dug||may hide lines|Whether buried lines are likely, so that nothing is dug by default.
states||answers beforehand|Ground questions it answers, until a person says otherwise.
kept|share|kept|Share of plants still shown after the harm, by trait.
newcomer|share|newcomers|Part of the region's newcomer chances that holds, 0 to 1.
layers_gone||layers gone|Layers that cannot be scored, since they were burnt or cut.
success_rule||success rule|When reclaimed ground counts as done.
SuccessRule.kind||kind|standard: against a standard or reference; trajectory: by lines over years.
null_kind||which null decides|direct: fit until shown unfit; reverse: unfit until shown fit.
SuccessRule.share|share|allowance|Part of the standard that is enough; it comes off once.
alpha|share|alpha|One-sided risk of the test.
rain_break_mm|mm|rain break|Yearly rain above which the shorter responsibility holds.
years_wet|years|years, wetter|Responsibility years above the rain break.
years_dry|years|years, drier|Responsibility years at or below it.
visits||visits|Visits on which the lines must hold.
years_between_visits|years|years between visits|Least time between two such visits.
usual_years|years|usual years|Years since the work in which visits are usual.
back_share|share|allowed setback|How far a line may fall back between visits.
peat_forming_group||peat-forming group|The group whose cover is meant by peat-forming cover.
water_table_within_cm|cm|water within|Depth within which the water table should stay.
water_table_statistic||water statistic|How the water table is measured and averaged.
reading||how lines are read|What is done between the years of a line, and what counts as on course.
reverse_null||reverse null|The other way round, with its own risk.
min_samples||least samples|Plots needed before the reverse null may be used.
sample_adequacy||enough plots|How many plots are enough.
d|share|half-width|Half-width wanted, as a share of the mean.
d_bare_peat_pct|%|half-width, bare peat|Half-width wanted for bare peat, in percent of ground.
seeding_methods||seeding methods|Rate factor by method; null where the method is not used.
cautions||cautions|Whom it can hurt, how badly, and what to do.
who||who|people, stock or site.
level||level|deadly, harm or care; only people with deadly or harm stop the hand.
text||text|The sentence a person reads.
Caution.when||when|Time of year.
Caution.zones||zones|Zones it holds in; none named means all.
"""

_ZONES = """
ZonesFile.zones||zones|Belts in order up the slope, then the ground off the slope.
zones||zones|Zones this speaks of.
letter||letter|One letter on the belt: A, B, C up the slope without I, W to Z off it.
short||short name|Name that fits on a belt, 20 letters at most.
Zone.kind||kind|zonal: a belt of the slope; azonal: ground that water, salt or sand decides.
one_line||in one line|What a person sees first.
why_here||why here|Why the zone stands where it stands.
band_m|m|band|Lowest and highest ground of the zone, on level ground.
centre_m|m|centre|Height in the middle, where the climate normals hold.
soft_edge_m|m|soft edge|How fast doubt grows outside the band.
north_shift_m|m|shift on north slopes|Metres added to the band; minus means the zone comes lower.
south_shift_m|m|shift on south slopes|Metres added to the band.
exposed_shift_m|m|shift where scoured|Metres added to the band on wind-scoured ground.
site_ranges||site ranges|Lowest, usual and highest value of what sorts the zone beside height.
frost_free_days|days|frost-free days|Days between the last frost of spring and the first of autumn.
ground_water_in_reach||ground water in reach|Rain does not decide the moist months here.
limits||limits|What holds growth back, the first first.
neighbours||neighbours|Zones that touch this one; each names the other.
told_from||told from|What tells it from each zone it is taken for.
remnant_clues||remnants|What is left after disturbance and still speaks for the zone.
what_absence_means||what absence means|What a missing plant says here, and what it does not.
plots_id||name in known plots|What files of known plots call this zone, where that cannot be its id.
plot_area_m2|m2|plot area here|Plot area in this zone, where it differs from the region's.
"""

_PLANTS = """
plants||plants|Plants this speaks of.
PlantsFile.plants||plants|Every plant a crew may name.
groups||groups|Plants that go together.
scientific||scientific name|Genus and species, without author.
common||common name|The name shown first.
local||local names|Other names that search finds.
codes||codes|Short codes that search finds.
synonyms||synonyms|Older or other scientific names that search finds.
family||family|Plant family.
form||growth form|Tree, shrub, bunchgrass and so on; it also gives the layer.
origin||origin|native or introduced.
weed||weed|none, ruderal, invasive or seeded.
Plant.months||recognisable months|First and last month in which it can be named.
best_season||best season|When it is easiest to name.
known_when_dry||known when dry|Whether dead stalks outside those months can still be named.
response||response to use|Whether it lessens, grows or comes in under heavy use.
fate||after disturbance|What becomes of it: killed, resprouts, rhizome, seedbank and so on.
remnant||value as remnant|How much a surviving plant says about the zone.
amplitude||amplitude|Range over the zones, only where it is declared by hand.
seeds_per_g|1/g|seeds in a gram|Seeds in one gram of pure seed.
planning_pls|share|planning PLS|Pure live seed share for planning; the tag of the lot rules.
subspecies_matters||subspecies matters|Orders must name the subspecies.
difficulty||difficulty|How hard it is to name.
overlooked|share|overlooked|Share of plots in which a crew misses it though it is there.
misnamed|share|misnamed|Share of plots in which it gets another name.
sensitive||sensitive|Positions are rounded before they leave the phone.
marks||field marks|How it looks; never whether it is safe.
lookalikes||look-alikes|Plants it is taken for.
lookalike_tell||tell|The mark that parts it from them.
use||use|answer: may be given for one of its members; success, weeds, caution, evidence.
members||members|Plants of the group.
occurrence||occurrence|Constancy and mean cover where present; no entry means absent.
"""

_QUESTIONS = """
questions||ground questions|What is asked beside plants.
rules||habitat rules|What follows from findings together.
Question.kind||kind|azonal, shift, state or context.
ask||question|What a person is asked.
asked||asked|Whether people are asked; otherwise it is worked out.
digs_cm|cm|digs|Deepest hole it asks for; lines are cleared first.
answers||answers|Answers to choose from; "can't tell" is always there.
value||value|Stable name of the answer.
Answer.share|share|share|How often the answer is given over the region.
zone_log_odds|nats|odds by zone|Natural-log odds that the answer adds to zones.
effect||effect|What it does to other evidence.
why||why|Why it matters.
act||what to do|What to do about it.
height_off||height off|Height says nothing here.
elevation_shift_m|m|height shift|Metres added to the height that is expected.
Effect.sown||sown|Plants of the mix and sown plants score nothing.
found|share|weight of found|Weight of plants that were found, by trait, in quarters.
cover|share|weight of cover|Weight of cover, by trait, in quarters.
dead_counts||dead counts|Stumps and skeletons count as found.
azonal_weight|share|weight of azonal|Weight of what speaks for azonal ground.
question_weight|share|weight of questions|Weight of other questions' answers.
second_call||second call|Make a second call beside this one.
move_plot||move the plot|Move to ordinary ground before going on.
when||when|The condition that must hold.
any||any of|One of these holds.
all||all of|All of these hold.
not||not|This does not hold.
plant||plant|The plant whose cover is meant.
group||group|The group whose cover or count is meant.
cover_at_least_pct|%|cover at least|Cover of the plant, or of the group in all.
count_at_least||count at least|How many of the group were found.
question||question|The question whose answer is meant.
answer||answer|The answer it must have.
site||site fact|Height, slope, aspect or month.
at_least||at least|Lowest value that holds; in a line, [year, value] points.
at_most||at most|Highest value that holds; in a line, [year, value] points.
"""

_GROUND = """
production||production|Yearly growth by zone, air-dry.
counted||counted|What is clipped and what is left out.
low_kg_ha|kg/ha|low year|Growth that one year in five stays below.
normal_kg_ha|kg/ha|normal year|Growth of a normal year.
high_kg_ha|kg/ha|high year|Growth that one year in five goes beyond.
rain_response|share|response to rain|Share of growth gained for each share of rain.
rain_months||rain months|Months whose rain counts.
warmth_response_per_c|share/degree C|response to warmth|Share of growth gained for each degree.
warmth_months||warmth months|Months whose warmth counts.
site_spread_cv|share|spread between sites|Coefficient of variation between sites of the zone.
clip||clip plots|How the zone is clipped.
Clip.area_m2|m2|clip plot area|Area of one clip plot.
every||clip every|One plot in so many is clipped, the others are estimated.
ground_cover_pct|%|ground cover|What covers the ground, in all 100.
foliar_cover_pct|%|foliar cover|Cover of leaves by layer; layers overlap.
standing_crop_t_ha|t/ha|standing crop|Woody matter above ground, oven-dry.
low||low|Low value.
normal||normal|Usual value.
high||high|High value.
by_age||by age|Points of years since fire and t/ha.
moss_kg_ha|kg/ha|moss growth|New moss in a low, normal and high year, over the whole ground.
conifer_effect||conifer effect|How conifer cover lowers the growth below.
coefficient|1/%|coefficient|Growth below falls to exp(-coefficient x cover).
crop_year||crop year|Months a crop year runs over.
air_dry||air-dry|What air-dry means here.
years_meaning||low and high years|What low and high years mean.
reference_lines||reference lines|Published lines to hold the figures against.
figures||figures|The numbers the sentence speaks of.
soils||soils|Soil of each zone.
summary||summary|The soil in a few words.
rooting_depth_cm|cm|rooting depth|How deep roots reach.
restriction||restriction|What stops them.
water_table_cm|cm|water table|Depth when wettest, usual and driest; minus is standing water.
layers||layers|Layers from the top down, without gaps.
top_cm|cm|from|Upper edge of the layer.
bottom_cm|cm|to|Lower edge of the layer.
Layer.kind||kind|mineral, organic_mineral or peat; it decides how water held is worked out.
sand_pct|%|sand|Sand of the fine earth.
silt_pct|%|silt|Silt of the fine earth.
clay_pct|%|clay|Clay of the fine earth.
organic_matter_pct|%|organic matter|Organic matter by weight.
stones_vol_pct|%|stones|Stones by volume.
ph||pH|Reaction in water.
ec_ds_m|dS/m|salt|Electrical conductivity of the saturation extract.
von_post_h||von Post class|Squeeze class of peat, 1 to 10.
saturation|share|water when full|Water by volume when all pores are full.
field_capacity|share|water held|Water by volume after draining.
wilting_point|share|water out of reach|Water by volume that roots cannot take.
water_rules||water rules|Which way water held is worked out.
peat_classes||peat classes|Water held by peat of a range of squeeze classes.
von_post||von Post classes|First and last squeeze class.
bulk_density_g_cm3|g/cm3|bulk density|Lowest and highest density.
mineral_om_max_pct|%|most organic matter, mineral|Up to here the equation for mineral soil serves.
peat_om_min_pct|%|least organic matter, peat|From here on it is peat.
near_water_cm|cm|water near|With water nearer than this, water held limits nothing.
also||also|What else to bear in mind.
zone_id||zone|The zone the normals hold for.
Month.elevation_m|m|height|Height the normals hold for.
month||month|1 to 12.
tmax_c|degrees C|day maximum|Mean of the daily maximum.
tmin_c|degrees C|night minimum|Mean of the daily minimum.
precip_mm|mm|rain and snow|Sum of the month, snow as water.
"""

_WORK = """
general||general notes|Notes that hold in the whole region.
ReclaimFile.zones||zones|Notes by zone.
wildlife||wildlife|Who lives here and what the work should spare.
soil_life||soil life|Fungi, crusts and nitrogen fixers.
topsoil||topsoil|How deep to lift it and how to keep it.
seedbed||seedbed|How to leave the ground.
season||season|When to sow, in words.
windows||windows|Months for the work.
sow_months||sowing months|Months in which seed is sown or spread.
plant_months||planting months|Months for plants, turf and sods.
keep_off_months||keep-off months|Months to keep off, for nests.
when_they_clash||when they clash|What is done where the months overlap.
method||method|How to sow.
Mix.method||method|drilled, broadcast or none; the rates already hold for it.
protection||protection|How long to keep stock and wheels off.
ZoneNotes.cautions||cautions|What to look out for.
fails||what fails|What does not work here.
fertiliser||fertiliser|Whether any is used.
by_disturbance||by disturbance|What to do and to avoid for each disturbance.
do||do|What to do.
avoid||avoid|What to avoid.
expect||expected|unlikely makes the user doubt the call.
success||success|The zone's own standards.
perennial_cover_share_of_reference|share|cover|Cover asked for, as a share of the reference's.
Success.share|share|allowance here|Replaces the region's allowance here; 1 takes nothing off.
min_native_perennials||least native perennials|Kinds of native perennials asked for.
max_weed_share_of_cover|share|most weeds|Largest share of cover that weeds may have.
shrub_density_per_m2|1/m2|shrubs|Shrubs asked for.
tree_stems_per_ha|1/ha|trees|Tree stems asked for.
woody_stems_per_ha|1/ha|woody stems|Woody stems asked for.
earliest_year|years|earliest year|First year in which a look makes sense.
trajectory||trajectory|Lines by years since the work.
measure||measure|What is measured; its unit ends its name.
mixes||mixes|Seed mix of each zone.
Mix.plants|1/m2|live seeds|Live seeds a square metre by plant.
other_method||other method|What changes with another method.
live_plants||live plants|What is planted.
propagules||propagules|Turf, hay, brash, plugs and stakes.
Propagule.kind||kind|Stable name of the kind.
what||what|What is brought.
rate_low||rate from|Lowest rate; left out where nothing is counted.
rate_high||rate to|Highest rate.
rate_unit||unit of the rate|What the rate counts.
source_rule||where it comes from|How near and how like the donor must be.
sources||sources|Publications, rules and pages by key.
read||read|How much of it was read.
language||language|Two letters, the same as the file's name.
reviewed_by||reviewed by|Who read it through; null means unreviewed.
Words.plants||plants|Name of each plant; without one the scientific name shows.
plant_cautions||cautions of plants|The caution's text by plant.
region_cautions||cautions of the region|The caution's text by its id.
cover_classes||cover classes|The label of each class by code.
"""

WORDS = _read(
    "\n".join(
        (
            _REGION.strip(),
            _ZONES.strip(),
            _PLANTS.strip(),
            _QUESTIONS.strip(),
            _GROUND.strip(),
            _WORK.strip(),
        )
    )
)
