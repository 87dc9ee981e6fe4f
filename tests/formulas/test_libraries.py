"""The same sums by other people's libraries: pyet, pvlib, ptfkit, scipy, statsmodels, vegan."""

import math
import random
import shutil
import subprocess

import numpy as np
import pandas as pd
import ptfkit.saxton2006 as saxton
import pvlib
import pyet
import pytest
from scipy import integrate, optimize, stats
from statsmodels.stats.proportion import proportion_confint

from builder.formulas import (
    climate,
    cover,
    double_sampling,
    production,
    quantiles,
    sample,
    soil_water,
    success,
)
from builder.formulas.refusal import RefusedError

DAYS = pd.date_range("2025-01-01", "2025-12-31", freq="D")
LATITUDES = (-55, -20, 0, 38, 46, 55, 65)


@pytest.mark.parametrize("latitude", LATITUDES)
def test_radiation_and_day_length_equal_pyet(latitude):
    theirs = pyet.extraterrestrial_r(DAYS, math.radians(latitude))
    ours = [climate.radiation_mj_m2(latitude, day) for day in range(1, 366)]
    np.testing.assert_allclose(ours, theirs, atol=1e-9)
    theirs = pyet.daylight_hours(DAYS, math.radians(latitude))
    ours = [climate.daylight_h(latitude, day) for day in range(1, 366)]
    np.testing.assert_allclose(ours, theirs, atol=1e-9)


@pytest.mark.parametrize("latitude", LATITUDES)
def test_radiation_is_near_pvlibs_other_series(latitude):
    """Another course of the sun, hour by hour: the year within 2 %, each day within 1 MJ.

    The two courses lie furthest apart near the equinoxes, where days change fastest.
    """
    hours = pd.date_range("2025-01-01 00:30", "2025-12-31 23:30", freq="h", tz="UTC")
    sun = pvlib.solarposition.get_solarposition(hours, latitude, 0)
    height = np.clip(np.sin(np.radians(sun["elevation"])), 0, None)
    power = pvlib.irradiance.get_extra_radiation(hours, solar_constant=1367) * height
    theirs = power.resample("D").sum() * 3600 / 1e6
    ours = np.array([climate.radiation_mj_m2(latitude, day) for day in range(1, 366)])
    assert np.abs(ours - theirs.to_numpy()).max() < 1
    assert ours.sum() == pytest.approx(theirs.sum(), rel=0.02)


def test_hargreaves_is_within_the_latent_heat_of_pyet():
    """pyet divides by the latent heat at the air temperature; FAO-56 takes 0.408 always."""
    rng = np.random.default_rng(7)
    low = pd.Series(rng.uniform(-15, 20, 365), DAYS)
    high = low + rng.uniform(1, 20, 365)
    mean = (low + high) / 2
    theirs = pyet.hargreaves(mean, high, low, math.radians(40))
    latent = pyet.calc_lambda(mean) * 0.408
    ours = [
        climate.hargreaves_mm_day(h, lo, climate.radiation_mj_m2(40, day))
        for day, (h, lo) in enumerate(zip(high, low, strict=True), start=1)
    ]
    np.testing.assert_allclose(np.array(ours) / latent, theirs, rtol=1e-9, atol=1e-9)
    mild = (mean > 10).to_numpy()
    np.testing.assert_allclose(np.array(ours)[mild], theirs[mild], rtol=0.011)


def soils(count, seed):
    rng = random.Random(seed)
    while count:
        sand, clay = rng.uniform(2, 95), rng.uniform(2, 58)
        if sand + clay < 98:
            count -= 1
            yield sand, clay, rng.uniform(0, 8)


def test_water_contents_equal_ptfkit():
    compared = 0
    for sand, clay, organic in soils(300, 1):
        theirs = saxton.calc_ptf_saxton2006(
            sand=sand / 100, clay=clay / 100, organic_matter=organic
        )
        ours = soil_water.mineral_water(sand, clay, organic)
        assert ours.wilting_point == pytest.approx(theirs.theta_1500, abs=1e-9)
        assert ours.field_capacity == pytest.approx(theirs.theta_33, abs=1e-9)
        assert ours.saturation == pytest.approx(theirs.theta_s, abs=1e-9)
        assert ours.bulk_density == pytest.approx(theirs.normal_density, abs=1e-9)
        if ours.saturation - ours.field_capacity > 0.005:
            compared += 1
            assert ours.flow_mm_h == pytest.approx(theirs.saturated_conductivity, rel=1e-6)
    assert compared > 250


def test_packing_and_gravel_equal_ptfkit():
    rng = random.Random(2)
    for sand, clay, organic in soils(100, 3):
        factor, gravel = rng.uniform(0.9, 1.15), rng.uniform(0, 0.7)
        base = saxton.calc_ptf_saxton2006(sand=sand / 100, clay=clay / 100, organic_matter=organic)
        packed = saxton.calc_density_adjustment_saxton2006(
            normal_density=base.normal_density,
            theta_s=base.theta_s,
            theta_33=base.theta_33,
            density_factor=factor,
        )
        if packed.adjusted_theta_33 >= packed.adjusted_theta_s:
            with pytest.raises(RefusedError, match="all its pores"):
                soil_water.mineral_water(sand, clay, organic, factor)
            continue
        ours = soil_water.mineral_water(sand, clay, organic, factor)
        assert ours.saturation == pytest.approx(packed.adjusted_theta_s, abs=1e-9)
        assert ours.field_capacity == pytest.approx(packed.adjusted_theta_33, abs=1e-9)
        stones = saxton.calc_gravel_adjustment_saxton2006(
            gravel_weight_fraction=gravel,
            matric_density=base.normal_density,
            plant_available_water=base.plant_available_water,
            saturated_conductivity=base.saturated_conductivity,
        )
        share = soil_water.gravel_volume_share(base.normal_density, gravel)
        assert share == pytest.approx(stones.gravel_volume_fraction, abs=1e-9)
        held = soil_water.layer_water_mm(0.1, base.plant_available_water, share)
        assert held == pytest.approx(stones.bulk_plant_available_water, abs=1e-9)


def test_a_one_sample_test_equals_scipy():
    rng = np.random.default_rng(4)
    for n in (2, 5, 15, 60):
        plots = rng.normal(45, 6, n)
        for kind, side in (("reverse", "greater"), ("direct", "less")):
            ours = success.one_sample(list(plots), 41.4, 0.1, kind)
            theirs = stats.ttest_1samp(plots, 41.4, alternative=side)
            assert ours.p == pytest.approx(theirs.pvalue, abs=1e-10)
            assert abs(ours.t) == pytest.approx(abs(theirs.statistic), abs=1e-10)
            low, high = theirs.confidence_interval(0.9)
            assert ours.bound == pytest.approx(low if kind == "reverse" else high, abs=1e-8)


def test_a_two_sample_test_equals_scipys_welch():
    rng = np.random.default_rng(5)
    for n, m in ((2, 3), (10, 8), (30, 12)):
        ground, reference = rng.normal(1150, 170, n), rng.normal(1300, 140, m)
        for kind, side in (("reverse", "greater"), ("direct", "less")):
            ours = success.two_sample(list(ground), list(reference), 0.9, 0.1, kind)
            theirs = stats.ttest_ind(ground, reference * 0.9, equal_var=False, alternative=side)
            assert ours.p == pytest.approx(theirs.pvalue, abs=1e-10)
            assert ours.df == pytest.approx(theirs.df, abs=1e-9)


def test_wilson_equals_statsmodels():
    for n in (1, 7, 20, 150):
        for hits in {0, 1, n // 2, n}:
            for confidence in (0.8, 0.9, 0.95):
                theirs = proportion_confint(hits, n, 1 - confidence, method="wilson")
                ours = cover.wilson_interval(hits, n, confidence)
                assert ours == pytest.approx(theirs, abs=1e-12)


def test_the_fewest_plots_are_the_fewest():
    for mean, sd, precision, confidence in (
        (500, 150, 0.2, 0.9),
        (40, 30, 0.1, 0.8),
        (9, 1, 0.3, 0.95),
    ):
        n = sample.plots_in_all(mean, sd, precision, confidence)

        def half_width(plots, sd=sd, confidence=confidence):
            return stats.t.ppf(0.5 + confidence / 2, plots - 1) * sd / math.sqrt(plots)

        assert half_width(n) <= precision * mean
        assert n == 2 or half_width(n - 1) > precision * mean


def test_the_year_range_is_scipys_lognormal():
    for centre, cv in ((740, 0.3), (200, 0.5), (3000, 0.12)):
        spread = math.sqrt(math.log(1 + cv * cv))
        curve = stats.lognorm(spread, scale=centre)
        assert production.year_range(centre, cv) == pytest.approx(curve.ppf([0.2, 0.8]), rel=1e-10)
        assert curve.std() / curve.mean() == pytest.approx(cv, rel=1e-10)


def test_the_mixture_range_is_scipys_root():
    weights, centres, cvs = [0.55, 0.3, 0.15], [740, 480, 1400], [0.3, 0.35, 0.4]
    curves = [
        stats.lognorm(math.sqrt(math.log(1 + cv * cv)), scale=centre)
        for centre, cv in zip(centres, cvs, strict=True)
    ]

    def below(x):
        return sum(w * curve.cdf(x) for w, curve in zip(weights, curves, strict=True))

    for share in (0.05, 0.2, 0.5, 0.8, 0.95):
        theirs = optimize.brentq(lambda x, share=share: below(x) - share, 1, 1e5, xtol=1e-9)
        ours = production.mixture_quantile(share, weights, centres, cvs)
        assert ours == pytest.approx(theirs, rel=1e-9)


def test_a_mixture_range_grows_with_the_doubt():
    sure = production.mixture_quantile(0.8, [1, 0], [740, 480], [0.3, 0.3])
    torn = production.mixture_quantile(0.2, [0.5, 0.5], [740, 480], [0.3, 0.3])
    assert torn < production.mixture_quantile(0.2, [1, 0], [740, 480], [0.3, 0.3])
    assert production.mixture_quantile(0.8, [0.5, 0.5], [740, 480], [0.3, 0.3]) < sure


def test_the_normal_curve_adds_up():
    for z in (-4, -1, 0.3, 2.5):
        area, _ = integrate.quad(stats.norm.pdf, -12, z, epsabs=1e-13)
        assert quantiles.normal_below(z) == pytest.approx(area, abs=1e-10)
        share = quantiles.normal_below(z)
        assert quantiles.normal_quantile(share) == pytest.approx(z, abs=1e-9)


def test_double_sampling_keeps_its_promise_in_a_long_run():
    """Both 90 % intervals hold the true mean in 85 to 95 of 100 simulated surveys."""
    rng = np.random.default_rng(11)
    held = {"ratio": 0, "regression": 0}
    surveys, truth = 1000, 50.0
    for _ in range(surveys):
        weight = rng.gamma(25, truth / 25, 60)
        seen = np.clip(weight * 0.85 + rng.normal(0, 4, 60), 0, None)
        rows = list(seen[:15]), list(weight[:15]), list(seen[15:])
        ratio = double_sampling.ratio_estimate(*rows, 0.9)
        line = double_sampling.regression_estimate(*rows, 0.9)
        held["ratio"] += ratio.low <= truth <= ratio.high
        held["regression"] += line.low <= truth <= line.high
    assert 850 <= held["ratio"] <= 950
    assert 850 <= held["regression"] <= 950


@pytest.mark.skipif(shutil.which("Rscript") is None, reason="R is not installed here")
def test_cover_classes_equal_vegans_braun_blanquet():
    covers = [0.05, 0.1, 0.5, 1, 3, 5, 15, 25, 40, 50, 60, 75, 90, 100]
    lines = f"""
    suppressMessages(library(vegan))
    x <- matrix(c({", ".join(map(str, covers))}), ncol = 1)
    cat(unlist(coverscale(x, "Braun.Blanquet", character = FALSE)))
    """
    theirs = subprocess.run(
        ["Rscript", "-e", lines], capture_output=True, text=True, check=True, timeout=60
    ).stdout.split()
    codes = "r+12345"
    limits = zip(codes, (0, 0.1, 1, 5, 25, 50, 75), strict=True)
    scale = [{"code": code, "low_pct": low} for code, low in limits]
    assert [cover.class_of(each, scale) for each in covers] == [
        codes[int(number) - 1] for number in theirs
    ]
