"""The slips that offices and packages make, each with a check that would catch it here."""

import importlib
import inspect
import math
import pkgutil

import pytest

import builder.formulas
from builder.formulas import (
    climate,
    clipping,
    cover,
    double_sampling,
    organic_matter,
    quantiles,
    seeding,
    soil_water,
    success,
    terrain,
    texture,
    topsoil,
    water_balance,
)
from builder.formulas.refusal import RefusedError
from builder.formulas.sample import summary

RAIN = [21.6, 29.8, 68.0, 63.8, 112.8, 128.6, 80.5, 94.2, 76.0, 68.7, 35.5, 31.3]
DEMAND = [0.0, 3.0, 21.0, 50.3, 95.7, 144.6, 176.7, 158.8, 100.4, 51.2, 15.4, 0.7]
COVER = [42, 38, 51, 45, 33, 47, 40, 55, 36, 44, 49, 41, 39, 46, 43]


def test_organic_matter_enters_the_water_equation_in_percent():
    right = soil_water.mineral_water(40, 20, 2.5)
    as_fraction = soil_water.mineral_water(40, 20, 0.025)
    assert right.field_capacity == pytest.approx(0.28, abs=0.005)
    assert as_fraction.field_capacity == pytest.approx(0.253, abs=0.001)
    assert as_fraction.wilting_point == pytest.approx(0.122, abs=0.001)


def test_the_square_term_of_field_capacity_is_1_283():
    s, c, om = 0.4, 0.2, 2.5
    t = -0.251 * s + 0.195 * c + 0.011 * om + 0.006 * s * om - 0.027 * c * om + 0.452 * s * c
    t += 0.299
    got = soil_water.mineral_water(40, 20, 2.5).field_capacity
    assert got == pytest.approx(t + 1.283 * t * t - 0.374 * t - 0.015, abs=1e-12)
    assert abs(got - (t + 1.238 * t * t - 0.374 * t - 0.015)) > 0.003


def test_every_coefficient_of_the_water_equations():
    """Equations 1 to 5 (SOILW-09) written out once more, from the paper's list, at four soils."""
    for sand, clay, om in ((88, 5, 2.5), (20, 20, 0.5), (10, 35, 4), (25, 50, 8)):
        s, c = sand / 100, clay / 100
        t15 = -0.024 * s + 0.487 * c + 0.006 * om + 0.005 * s * om - 0.013 * c * om
        t15 += 0.068 * s * c + 0.031
        t33 = -0.251 * s + 0.195 * c + 0.011 * om + 0.006 * s * om - 0.027 * c * om
        t33 += 0.452 * s * c + 0.299
        ts = 0.278 * s + 0.034 * c + 0.022 * om - 0.018 * s * om - 0.027 * c * om
        ts += -0.584 * s * c + 0.078
        field = t33 + (1.283 * t33**2 - 0.374 * t33 - 0.015)
        full = field + ts + (0.636 * ts - 0.107) - 0.097 * s + 0.043
        got = soil_water.mineral_water(sand, clay, om)
        assert got.wilting_point == pytest.approx(t15 + (0.14 * t15 - 0.02), abs=1e-12)
        assert got.field_capacity == pytest.approx(field, abs=1e-12)
        assert got.saturation == pytest.approx(full, abs=1e-12)


def test_the_two_forms_of_thornthwaite_differ_and_are_told_apart():
    means = [2.1, 2.5, 4.8, 7.1, 8.3, 10.7, 13.4, 14.5, 11.1, 8.2, 5.4, 3.7]
    hours = [9.4, 10.6, 11.9, 13.4, 14.6, 15.2, 14.9, 13.9, 12.6, 11.1, 9.8, 9.1]
    plain = climate.thornthwaite_months_mm(means, hours, month_length=False)
    full = climate.thornthwaite_months_mm(means, hours)
    assert full[6] / plain[6] == pytest.approx(31 / 30)
    printed = [10.67, 14.08, 28.49, 45.85, 57.47, 75.2, 89.91, 90.29, 64.26, 43.34, 26.24, 17.31]
    off = [abs(a - b) for a, b in zip(full, printed, strict=True)]
    assert max(off) == pytest.approx(3.3, abs=0.05)


def test_thornthwaite_keeps_the_power_form_above_26_5_degrees():
    hot = [27.58] * 12
    index = climate.heat_index(hot)
    wanted = 16 * (275.8 / index) ** climate.thornthwaite_exponent(index)
    assert climate.thornthwaite_months_mm(hot, [12] * 12, False)[0] == pytest.approx(wanted)


def test_the_two_buckets_differ_and_the_caller_says_where_the_year_starts():
    curved = water_balance.balance(RAIN, DEMAND, 100)
    plain = water_balance.balance(RAIN, DEMAND, 100, linear=True)
    assert math.fsum(curved.actual_mm) == pytest.approx(703.2, abs=0.5)
    assert math.fsum(plain.actual_mm) == pytest.approx(716.6, abs=0.3)
    dry = [month / 4 for month in RAIN]
    settled = water_balance.balance(dry, DEMAND, 100)
    full = water_balance.balance(dry, DEMAND, 100, start="full")
    assert full.storage_mm[0] > settled.storage_mm[0] + 20


def test_a_month_stands_at_its_fifteenth():
    assert climate.MID_MONTH_DAY == (15, 46, 74, 105, 135, 166, 196, 227, 258, 288, 319, 349)
    assert climate.monthly_radiation_mj_m2(40)[2] == climate.radiation_mj_m2(40, 74)


def test_hargreaves_takes_radiation_as_millimetres():
    got = climate.hargreaves_mm_day(26.6, 14.8, 40.55)
    assert got == pytest.approx(5.03, abs=0.005)
    assert got / climate.MM_PER_MJ_M2 == pytest.approx(12.3, abs=0.05)


def test_heat_load_is_no_logarithm_and_equation_1_is():
    assert terrain.heat_load(40, 30, 180) == pytest.approx(0.9825, abs=0.0002)
    assert math.exp(terrain.log_heat_load(40, 30, 180)) == pytest.approx(1.0553, abs=0.0002)
    assert abs(math.exp(terrain.heat_load(40, 30, 180)) - 0.9825) > 1


def test_slope_enters_in_degrees_and_the_folds_are_two():
    assert terrain.heat_load(40, terrain.slope_deg(100), 225) == terrain.heat_load(40, 45, 225)
    assert terrain.heat_fold_deg(225) == 180
    assert terrain.radiation_fold_deg(225) == 135


def test_every_coefficient_of_heat_load_and_radiation():
    """Equations 1 to 3 (HEAT-01, HEAT-10) at points where single terms stand alone."""
    r = math.radians
    lat, slope = 45.0, 30.0
    flat = 0.339 + 0.808 * math.cos(r(lat))
    assert terrain.heat_load(lat, 0, None) == pytest.approx(flat, abs=1e-12)
    level = 0.339 + 0.808 * math.cos(r(lat)) * math.cos(r(slope))
    level -= 0.196 * math.sin(r(lat)) * math.sin(r(slope))
    assert terrain.heat_load(lat, slope, 135) == pytest.approx(level, abs=1e-12)
    hot = level + 0.482 * math.sin(r(slope))
    assert terrain.heat_load(lat, slope, 225) == pytest.approx(hot, abs=1e-12)
    for function, b in (
        (terrain.direct_radiation, (-1.467, 1.582, -1.5, -0.262, 0.607)),
        (terrain.direct_radiation_to_60, (-1.236, 1.35, -1.376, -0.331, 0.375)),
    ):
        flat = math.exp(b[0] + b[1] * math.cos(r(lat)))
        assert function(lat, 0, None) == pytest.approx(flat, abs=1e-12)
        both = b[0] + b[1] * math.cos(r(lat)) * math.cos(r(slope))
        both += b[3] * math.sin(r(lat)) * math.sin(r(slope))
        north = both + b[2] * math.sin(r(slope)) * math.sin(r(lat))
        assert math.log(function(lat, slope, 0)) == pytest.approx(north, abs=1e-12)
        east = both + b[4] * math.sin(r(slope))
        assert math.log(function(lat, slope, 90)) == pytest.approx(east, abs=1e-12)


def test_aspect_coolness_runs_against_heat_load():
    assert terrain.aspect_coolness(45) > terrain.aspect_coolness(225)
    assert terrain.heat_load(40, 30, 45) < terrain.heat_load(40, 30, 225)


def test_flat_ground_has_no_aspect():
    with pytest.raises(RefusedError, match="no aspect"):
        terrain.heat_load(40, 0, 0)
    assert terrain.heat_load(40, 0, None) == pytest.approx(0.958, abs=0.0002)


@pytest.mark.parametrize(("edge", "code"), [(5, "2"), (25, "3"), (50, "4"), (75, "5"), (95, "6")])
def test_a_touching_bound_belongs_to_the_class_above(edge, code):
    assert cover.class_of(edge, cover.SIX_CLASSES) == code


def test_the_six_classes_are_those_of_the_paper():
    bounds = [(row["low_pct"], row["high_pct"]) for row in cover.SIX_CLASSES]
    assert bounds == [(0, 5), (5, 25), (25, 50), (50, 75), (75, 95), (95, 100)]
    mids = [row["mid_pct"] for row in cover.SIX_CLASSES]
    assert mids == [2.5, 15, 37.5, 62.5, 85, 97.5]


def test_domin_codes_are_not_averaged():
    pair = (cover.domin_pct(3) + cover.domin_pct(9)) / 2
    assert pair > 1.5 * cover.domin_pct(6)


def test_handbook_domin_limits_are_kept_apart_from_those_of_a_package():
    """Codes 4 to 8 and 10 turned to percent fall inside the handbook's bounds."""
    bounds = {4: (4, 10), 5: (11, 25), 6: (26, 33), 7: (34, 50), 8: (51, 75), 10: (91, 100)}
    assert all(low <= cover.domin_pct(code) <= high for code, (low, high) in bounds.items())


def test_hoops_summed_before_weighing_share_one_factor():
    one = clipping.plot_factor_lb_acre(1.92)
    five = clipping.plot_factor_lb_acre(1.92, summed=5)
    assert one == pytest.approx(5 * five)
    assert clipping.clip_kg_ha(100, 0.2, summed=5) == pytest.approx(100 * 10)


def test_the_ratio_is_sum_over_sum_and_unrounded():
    seen, cut = [42.0, 60, 35, 80, 51, 47], [45.0, 66, 33, 88, 57, 50]
    got = double_sampling.correction_ratio(seen, cut)
    of_ratios = sum(c / e for c, e in zip(cut, seen, strict=True)) / 6
    assert got == pytest.approx(1.07619, abs=0.00001)
    assert of_ratios == pytest.approx(1.06596, abs=0.00001)
    assert abs(got - of_ratios) > 0.01
    factor = double_sampling.correction_ratio([19.0], [20.2])
    assert factor * 41 == pytest.approx(43.59, abs=0.005)
    assert round(factor, 2) * 41 == pytest.approx(43.46, abs=0.005)


def test_corrected_weights_of_the_printed_well_pad_table():
    """Well-pad table of September 2007 (permit_2007): factor, green and air-dry grams."""
    rows = [(5, 5.4, 13, 0.59, 14.04, 8.28), (2, 2.6, 7, 0.69, 9.1, 6.28), (19, 20.2, 41, 0.62,
            43.59, 27.03)]  # fmt: skip
    for seen, cut, total, dry, green, air_dry in rows:
        corrected = double_sampling.correction_ratio([seen], [cut]) * total
        assert corrected == pytest.approx(green, abs=0.01)
        assert corrected * dry == pytest.approx(air_dry, abs=0.01)


def test_no_formula_gives_a_stocking_figure():
    names = [
        f"{info.name}.{name}"
        for info in pkgutil.iter_modules(builder.formulas.__path__)
        for name, _ in inspect.getmembers(
            importlib.import_module(f"builder.formulas.{info.name}"), inspect.isfunction
        )
    ]
    assert len(names) > 100
    for word in ("aum", "stocking", "animal", "harvest", "forage", "utilisation"):
        assert not [name for name in names if word in name], word


def test_live_seed_counts_dormant_seed_once():
    assert seeding.viable_share(0.92, 0.05) == pytest.approx(0.97)
    with pytest.raises(RefusedError, match="not both"):
        seeding.viable_share(0.92, 0.05, 0.97)


def test_three_percents_are_three_mixes():
    per_g = [308.6, 242.5]
    by_count = seeding.mix_by_seed_count(400, [0.6, 0.4], per_g)
    by_weight = seeding.mix_by_weight(sum(by_count), [0.6, 0.4])
    by_stand = seeding.mix_by_full_stand([0.6, 0.4], [12, 8])
    shares = [seeding.amount_shares(mix)[0] for mix in (by_count, by_weight, by_stand)]
    assert shares == pytest.approx([0.541, 0.6, 0.692], abs=0.001)


def test_one_sided_alpha_takes_t_of_its_own():
    assert quantiles.t_quantile(0.9, 24) == pytest.approx(1.3178, abs=0.0001)
    assert quantiles.t_quantile(0.95, 24) == pytest.approx(1.7109, abs=0.0001)
    assert success.one_sample(COVER, 41.4, 0.1, "reverse").t_critical == pytest.approx(
        1.345, abs=0.0001
    )


def test_the_standard_error_divides_by_the_root_of_n():
    plots = summary(COVER)
    assert plots.se == pytest.approx(plots.sd / math.sqrt(15))
    assert plots.se == pytest.approx(1.50702, abs=0.0006)


def test_the_two_nulls_answer_differently_on_the_same_plots():
    line = success.standard_line(46, 0.9)
    assert not success.one_sample(COVER, line, 0.1, "reverse").passes
    assert success.one_sample(COVER, line, 0.1, "direct").passes
    twice = success.standard_line(line, 0.9)
    assert success.one_sample(COVER, twice, 0.1, "reverse").passes
    with pytest.raises(RefusedError, match="counts once"):
        success.standard_line(line, 0.9, share_already_taken=True)


def test_two_sided_wilson_90_is_one_sided_95():
    low, high = cover.wilson_interval(9, 12, 0.9)
    assert low == cover.wilson_bound(9, 12, 0.95, upper=False)
    assert high == cover.wilson_bound(9, 12, 0.95, upper=True)
    assert low < cover.wilson_bound(9, 12, 0.9, upper=False)


def test_soil_carbon_has_no_further_tenth():
    assert organic_matter.organic_matter_t_ha(0.65, 1.45, 30) == pytest.approx(28.3, abs=0.05)


def test_going_back_from_the_pile_divides():
    assert topsoil.bank_of_loose_m3(1300, 0.3) == pytest.approx(1000)
    assert topsoil.bank_of_loose_m3(1300, 0.3) != pytest.approx(1300 * 0.7)


def test_three_to_one_on_a_drawing_is_33_percent():
    assert terrain.slope_pct_of_ratio(3, 1) == pytest.approx(33.33, abs=0.01)
    assert terrain.slope_deg(100) == pytest.approx(45)


def rule_words(sand, clay):
    """The Manual's twelve rules, each on its own (TEX-02), to see that one and only one holds."""
    silt = 100 - sand - clay
    heavy = silt + 2 * clay >= 30
    rules = {
        "sand": silt + 1.5 * clay < 15,
        "loamy sand": silt + 1.5 * clay >= 15 and silt + 2 * clay < 30,
        "sandy loam": (7 <= clay < 20 and sand > 52 and heavy)
        or (clay < 7 and silt < 50 and sand > 43 and heavy),
        "loam": 7 <= clay < 27 and 28 <= silt < 50 and sand <= 52,
        "silt loam": (silt >= 50 and 12 <= clay < 27) or (50 <= silt < 80 and clay < 12),
        "silt": silt >= 80 and clay < 12,
        "sandy clay loam": 20 <= clay < 35 and silt < 28 and sand > 45,
        "clay loam": 27 <= clay < 40 and 20 < sand <= 45,
        "silty clay loam": 27 <= clay < 40 and sand <= 20,
        "sandy clay": clay >= 35 and sand > 45,
        "silty clay": clay >= 40 and silt >= 40,
        "clay": clay >= 40 and sand <= 45 and silt < 40,
    }
    return [name for name, holds in rules.items() if holds]


def test_the_texture_class_is_the_manuals_at_every_whole_percent_point():
    seen = 0
    for sand in range(101):
        for clay in range(101 - sand):
            seen += 1
            assert rule_words(sand, clay) == [
                texture.texture_class(sand, 100 - sand - clay, clay)
            ], (sand, clay)
    assert seen == 5151
